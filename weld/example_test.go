package weld

import (
	"fmt"
	"testing"

	"sailby/tasks/origin"
)

func ExampleCool() {
	c, _ := Cool(1.5, 12, 20, 0.9, 0.9)
	fmt.Printf("t8/5 %.1f s: 2D %.1f s, 3D %.1f s, plate thinner than %.1f mm cools as 2D\n", c.Seconds, c.TwoD, c.ThreeD, c.Transition)
	// Output: t8/5 16.0 s: 2D 16.0 s, 3D 7.1 s, plate thinner than 18.0 mm cools as 2D
}

func ExamplePreheatAWS() {
	f, _ := PreheatAWS("B", 50)
	fmt.Println(f.Amount(), f.Origin)
	// Output: 65 C published: AWS D1.1:2015 Table 3.3, category B
}

func ExamplePreheatB() {
	f, in := PreheatB(0.32, 30, 5, 1.5)
	fmt.Printf("%.1f C, in range: %v\n", f.Value, in)
	_, in = PreheatB(0.55, 30, 5, 1.5)
	fmt.Printf("CET 0.55 in range: %v\n", in)
	// Output:
	// 92.5 C, in range: true
	// CET 0.55 in range: false
}

// Without a reading of the chart the estimate says with what to enter it.
func ExampleChartReading() {
	seam := Seam{Joint: Joint{Type: SingleV, Thickness: 40, Length: 1000}, Procedure: &Procedure{Process: 111, Hydrogen: 5, Current: 180, Volts: 25, Travel: 144}}
	c := Circumstances{PreheatStandard: "EN 1011-2 A", Steel: Steel{CEV: 0.43}}
	e, _ := Work([]Seam{seam}, c)
	fmt.Println(e.Warnings[0][:123])
	c.Chart = []ChartReading{{CE: 0.45, Scale: "D", Combined: 80, Heat: 1.5, Preheat: 75, Origin: origin.Origin{File: "job.yaml", Line: 12}}}
	e, _ = Work([]Seam{seam}, c)
	fmt.Println(e.Why.Preheat.Amount(), e.Why.Preheat.Origin)
	// Output:
	// EN 1011-2 method A is read from the standard's charts: enter with CE 0.43, combined thickness 80 mm, hydrogen scale D, 1.50
	// 75 C job.yaml:12 read from the chart at CE 0.45, combined thickness 80 mm, scale D, 1.5 kJ/mm
}

func ExampleHoldBeforeNDT() {
	f, _ := HoldBeforeNDT(20, 1.5, 355)
	fmt.Println(f.Amount(), "from", f.Origin)
	// Output: 16 h from published: EN 1090-2:2008 Table 23, S235 to S420 (the 2018 edition keeps it, from memory)
}

func ExampleSet_CurrentAt() {
	s := Set{RatedCurrent: 400, DutyCycle: 0.25}
	fmt.Printf("%.1f A for half the time, %.0f A all the time\n", s.CurrentAt(0.5), s.CurrentAt(1))
	// Output: 282.8 A for half the time, 200 A all the time
}

func ExampleVoltageDrop() {
	v, _ := VoltageDrop(60, 50, 200, false)
	fmt.Printf("60 m of 50 mm2 lose %.1f V at 200 A, there and back\n", v)
	// Output: 60 m of 50 mm2 lose 8.4 V at 200 A, there and back
}

func ExamplePrepare() {
	l, _ := Prepare("dress flush", 6, 0, 0)
	fmt.Printf("%d min and %.0f %s\n", l.HandsOn.Whole(), l.Consumables[0].Amount, l.Consumables[0].Name)
	// Output: 120 min and 2 grinding discs 125 mm
}

func ExampleTest_Work() {
	l, _ := Test{Method: "penetrant", Length: 2000, Temperature: 7}.Work()
	fmt.Printf("%d min, and %d min of dwell\n", l.HandsOn.Whole(), int(l.Standing))
	_, err := Test{Method: "penetrant", Length: 2000, Temperature: 3}.Work()
	fmt.Println(err)
	// Output:
	// 22 min, and 40 min of dwell
	// penetrant on steel at 3.0 C: below 5 C it shows nothing sure
}

func ExampleEstimate_Repair() {
	c := Circumstances{Site: true, Execution: "EN 1090-2"}
	e, _ := Work([]Seam{{Joint: Joint{Type: SingleV, Thickness: 16, Length: 3000}}}, c)
	r := e.Repair(c, false)
	fmt.Printf("%.0f %% chance of a repair, then %.0f mm and %.0f h of waiting again\n", r.Chance*100, r.Length, float64(r.Standing)/60)
	// Output: 55 % chance of a repair, then 218 mm and 16 h of waiting again
}

func ExampleBow() {
	v, _ := Bow(25*80, 6000, 2e7)
	fmt.Printf("%.0f mm\n", v)
	// Output: 18 mm
}

// BenchmarkJoint is the cost of one joint, by kind: what a job of a thousand joints pays.
func BenchmarkJoint(b *testing.B) {
	for _, c := range []struct {
		name string
		s    Seam
	}{
		{"fillet", Seam{Joint: Joint{Type: Fillet, Leg: 6, Length: 3000}, Position: PB, Procedure: &Procedure{Process: 136}}},
		{"single V upwards", Seam{Joint: Joint{Type: SingleV, Thickness: 20, Length: 3000}, Position: PF, Procedure: &Procedure{Process: 136}}},
		{"unequal double V", Seam{Joint: Joint{Type: DoubleV, Thickness: 40, FirstDepth: 24, Length: 3000, BackGouge: true}, Procedure: &Procedure{Process: 121}}},
		{"preheated", Seam{Joint: Joint{Type: SingleU, Thickness: 50, Length: 3000}, Procedure: &Procedure{Process: 111}}},
	} {
		b.Run(c.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := Work([]Seam{c.s}, Circumstances{Site: true, Execution: "EN 1090-2", PreheatStandard: "EN 1011-2 B", Steel: Steel{Cet: 0.32}}); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
