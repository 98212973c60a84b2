package weld

import (
	"fmt"
	"testing"
)

// outsideHeat is heat, preheat and waits.
func outsideHeat(t *testing.T) []outside {
	var rows []outside
	for _, c := range []struct {
		p    Process
		want float64
	}{{121, 1}, {111, .8}, {114, .8}, {131, .8}, {135, .8}, {136, .8}, {138, .8}, {141, .6}} {
		d, _ := processData(c.p)
		rows = append(rows, outside{fmt.Sprintf("k of %v", c.p), "EN 1011-1 Table 1, as TWI and the SSAB Welding Handbook print it", seen, true, d.heat.Value, c.want, 0, exact})
	}
	for _, c := range []struct {
		thick float64
		want  [3]float64
	}{{3, [3]float64{0, 0, 10}}, {20, [3]float64{0, 0, 10}}, {21, [3]float64{65, 10, 65}}, {38, [3]float64{65, 10, 65}}, {39, [3]float64{110, 65, 110}}, {65, [3]float64{110, 65, 110}}, {66, [3]float64{150, 110, 150}}} {
		for i, cat := range []string{"A", "B", "C"} {
			f, err := PreheatAWS(cat, c.thick)
			if err != nil {
				t.Fatal(err)
			}
			rows = append(rows, outside{fmt.Sprintf("preheat of category %s, %v mm", cat, c.thick), "AWS D1.1:2015 Table 3.3, TI 809-26 Table 3-1", seen, true, f.Value, c.want[i], 0, exact})
		}
	}
	for i, fahrenheit := range []float64{50, 150, 225, 300} {
		f, _ := PreheatAWS("C", []float64{10, 30, 50, 80}[i])
		rows = append(rows, outside{fmt.Sprintf("preheat of the third column, %v F", fahrenheit), "AWS D1.1 Table 3.3 in Fahrenheit", seen, false, f.Value*1.8 + 32, fahrenheit, 5, "the metric column is rounded to 5 C"})
	}
	for _, c := range []struct{ size, heat, low, high float64 }{
		{6, 1, 0, 24}, {6, 5, 0, 24}, {6.1, 3, 8, 24}, {12, 3, 8, 24}, {12, 3.1, 16, 40}, {12.1, 3, 16, 40}, {40, 1, 16, 40}, {12.1, 3.1, 40, 48},
	} {
		for yield, want := range map[float64]float64{355: c.low, 460: c.high} {
			f, err := HoldBeforeNDT(c.size, c.heat, yield)
			if err != nil {
				t.Fatal(err)
			}
			rows = append(rows, outside{fmt.Sprintf("hours before NDT of %v mm at %v kJ/mm, %v N/mm2", c.size, c.heat, yield), "EN 1090-2:2008 Table 23", seen, true, f.Value, want, 0, exact})
		}
	}
	thick, err := Cool(1, 40, 20, 1, 1)
	if err != nil {
		t.Fatal(err)
	}
	rows = append(rows, outside{"t8/5 of thick plate at 20 C and 1 kJ/mm, s", "SSAB Welding Handbook, figure 3.9, read off", recalled, false, thick.Seconds, 5, 0.5, "read off a chart"})
	for _, temperature := range []float64{20, 100, 150} {
		a, _ := Cool(1.4, 10, temperature, 1, 1)
		b, _ := Cool(1.4, a.Transition, temperature, 1, 1)
		rows = append(rows, outside{fmt.Sprintf("2D time over 3D time at the transition thickness, %v C", temperature), "EN 1011-2 Annex D", recalled, false, b.TwoD / b.ThreeD, 1, 1e-12, exact})
	}
	for ml, want := range map[float64]string{16: "A", 15: "B", 10: "C", 5: "D", 3: "E"} {
		rows = append(rows, outside{fmt.Sprintf("%v ml/100 g is hydrogen scale %s", ml, want), "EN 1011-2", recalled, true, map[bool]float64{true: 1}[hydrogenScale(ml) == want], 1, 0, exact})
	}
	w := Process(136).Weather()
	return append(rows,
		outside{"mph of wind at a gas-shielded arc", "AWS D1.1", recalled, true, w.MaxWind / 0.44704, 5, 1e-9, exact},
		outside{"repair share of mild steel structures", "TWI survey of repair rates 2011", seen, true, Estimate{Seams: []SeamEstimate{{Length: 1000, Welding: 10}}}.Repair(Circumstances{}, false).Share, 0.015, 1e-12, exact})
}

// outsidePower is duty cycle, supply and cables.
func outsidePower(t *testing.T) []outside {
	s := Set{RatedCurrent: 400, DutyCycle: 0.25}
	drop, err := VoltageDrop(20, 0.75, 20, false)
	if err != nil {
		t.Fatal(err)
	}
	return []outside{
		{"A at 50 % of a set of 400 A at 25 %", "manual of a 400 A set", seen, false, s.CurrentAt(0.5), 282.8, 0.05, printed},
		{"share at 282.8 A of a set of 400 A at 25 %", "manual of a 400 A set", seen, false, s.Share(282.8), 0.5, 0.0005, printed},
		{"minutes in ten at a duty cycle of 60 %", "AWS glossary", seen, false, Set{RatedCurrent: 300, DutyCycle: 0.6}.Share(300) * 10, 6, 1e-9, exact},
		{"share of a set far below its rating", "set makers' manuals: at most 100 %", seen, false, Set{RatedCurrent: 300, DutyCycle: 0.6}.Share(100), 1, 0, exact},
		{"kW that 200 A at 25 V take through an inverter", "page of a set maker", seen, false, Set{}.InputPower(25, 200), 5.9, 0.05, printed},
		{"generator over the set's largest kVA", "set makers' manuals", seen, true, Generator(10) / 10, 1.35, 1e-12, exact},
		{"V lost in 20 m of 0.75 mm2 at 20 A", "page on leads of electric tools", recalled, false, drop, 18.6, 0.05, printed},
		{"V of a stick arc at 160 A", "IEC 60974-1 load voltage 20 + 0.04 I", recalled, true, func() float64 {
			d, _ := processData(111)
			return Procedure{}.volts(d, Procedure{Current: 160}.current(d, 4)).Value
		}(), 26.4, 1e-9, exact},
	}
}

// outsideCutting is cutting and gouging.
func outsideCutting(t *testing.T) []outside {
	var rows []outside
	for _, c := range [][2]float64{{3, 3150}, {4, 1900}, {6, 1050}, {8, 650}, {10, 390}, {12, 310}, {15, 180}, {20, 70}, {25, 50}} {
		f, _, err := Cut{Method: "plasma", Thickness: c[0]}.speed()
		if err != nil {
			t.Fatal(err)
		}
		rows = append(rows, outside{fmt.Sprintf("mm/min of a clean plasma cut through %v mm", c[0]), "manual of a 40 A hand plasma set", seen, true, f.Value, c[1], 1e-9, exact})
	}
	_, warn, _ := Cut{Method: "plasma", Thickness: 12}.speed()
	_, rough, _ := Cut{Method: "plasma", Thickness: 15}.speed()
	rows = append(rows, outside{"thickness at which a 40 A set falls below its hand-cut rating of 10 in/min", "maker's page on hand cutting", seen, false,
		map[bool]float64{true: 1}[len(warn) == 0 && len(rough) == 1], 1, 0, exact})
	for _, c := range [][2]float64{{5, 6.5}, {9, 8}, {12, 9.5}, {16, 12.7}} {
		g, _ := GougeWith(c[0])
		rows = append(rows, outside{fmt.Sprintf("carbon for a groove %v mm deep", c[0]), "handbook of air carbon-arc", seen, true, g.Diameter, c[1], 0, exact})
	}
	return rows
}

// outsidePractice is what the trade knows without a source.
func outsidePractice(t *testing.T) []outside {
	rows := []outside{
		inRange("kg of a steel plate 1 m x 1 m x 3 mm", "common practice", practice, Metal(3*1000, 1000, 0), 23, 24),
		inRange("kg of the same plate in aluminium", "common practice: about 8 kg", practice, Metal(3*1000, 1000, 2700), 7.8, 8.3),
		inRange("metal of a 6 mm fillet laid 1 mm over, against the drawing", "common practice: a third more and a bit", practice, func() float64 {
			s, err := Joint{Type: Fillet, Leg: 6, Length: 1}.Section(PB, true)
			if err != nil {
				t.Fatal(err)
			}
			return s.Area / s.Drawn
		}(), 1.3, 1.4),
	}
	for _, p := range []Process{111, 114, 135, 136} {
		for _, leg := range []float64{6, 8} {
			f, err := SiteDay(p, leg)
			if err != nil {
				t.Fatal(err)
			}
			rows = append(rows, inRange(fmt.Sprintf("metres of %v mm fillet in a ten-hour site day with %v", leg, p), "common practice: about 5 to 8 m, all in", practice, f.Value, 5, 8))
		}
	}
	for _, c := range []struct {
		p      Process
		lo, hi float64
	}{{135, 3, 4}, {136, 3, 4}, {111, 1.5, 2}} {
		e := mustWork(t, Circumstances{}, Seam{Joint: Joint{Type: Fillet, Leg: 6, Length: 1000}, Procedure: &Procedure{Process: c.p}})
		rows = append(rows, inRange(fmt.Sprintf("m/h of 6 mm fillet in the shop with %v", c.p), "common practice", practice, 60/float64(e.HandsOn), c.lo, c.hi))
	}
	return rows
}
