package weld

import (
	"fmt"
	"math"
	"reflect"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/origin"
)

// TestEveryFigureRecomputes: each formula printed gives the value printed beside it, and the
// plain fields are the figures' values.
func TestEveryFigureRecomputes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		seams := rapid.SliceOfN(rapid.Custom(drawSeam), 1, 3).Draw(t, "seams")
		e, err := Work(seams, drawCircumstances(t))
		if err != nil {
			t.Fatal(err)
		}
		for _, f := range e.Steps() {
			checkTree(t, f)
		}
		for _, f := range []struct{ plain, figure float64 }{
			{e.Metal, e.Why.Metal.Value}, {float64(e.Arc), e.Why.Arc.Value}, {float64(e.HandsOn), e.Hours.Value}, {e.HeatInput, e.Why.HeatInput.Value},
			{float64(e.SetUp), e.Why.SetUp.Value}, {float64(e.SafeStop), e.Why.SafeStop.Value}, {e.Power, e.Why.Power.Value}} {
			if f.plain != f.figure {
				t.Errorf("field %v and figure %v differ", f.plain, f.figure)
			}
		}
		if float64(e.Arc) > float64(e.HandsOn) || e.SafeStop > e.HandsOn || !(e.Arc > 0) {
			t.Errorf("arc %v, safe stop %v, hands-on %v", e.Arc, e.SafeStop, e.HandsOn)
		}
	})
}

// fixed is a rate that no position changes.
func fixed(pos Position) *Procedure { return &Procedure{Process: 136, Position: pos, Deposition: 2} }

func mustWork(t interface{ Fatal(...any) }, c Circumstances, seams ...Seam) Estimate {
	e, err := Work(seams, c)
	if err != nil {
		t.Fatal(err)
	}
	return e
}

// less says whether a is no more than b but for rounding.
func less(a, b float64) bool { return a <= b*(1+1e-9) }

func TestGrowsWithLengthAndSplits(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, c := drawSeam(t), drawCircumstances(t)
		if s.Joint.Type == Plug || s.Joint.Type == Slot {
			s.Joint.Type, s.Joint.Leg, s.Joint.Bead = Fillet, 6, 0
		}
		whole := mustWork(t, c, s)
		twice, half := s, s
		twice.Joint.Length *= 2
		half.Joint.Length /= 2
		e2, parts := mustWork(t, c, twice), mustWork(t, c, half, half)
		if !near9(e2.Metal, 2*whole.Metal) || !near9(float64(e2.Arc), 2*float64(whole.Arc)) {
			t.Errorf("twice the length: %v kg %v min, once %v kg %v min", e2.Metal, e2.Arc, whole.Metal, whole.Arc)
		}
		if !(whole.Metal > 0) || !(whole.Arc > 0) || whole.Passes != e2.Passes || whole.Passes != parts.Passes {
			t.Errorf("%v kg, %v min, %d runs; %d of twice the length, %d of halves", whole.Metal, whole.Arc, whole.Passes, e2.Passes, parts.Passes)
		}
		if !near9(parts.Metal, whole.Metal) || !near9(float64(parts.Arc), float64(whole.Arc)) {
			t.Errorf("two halves: %v kg, whole %v kg", parts.Metal, whole.Metal)
		}
	})
}

func near9(a, b float64) bool { return math.Abs(a-b) <= 1e-9*math.Max(math.Abs(a), math.Abs(b)) }

func TestGrowsWithSize(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, c := drawSeam(t), Circumstances{NoOverweld: rapid.Bool().Draw(t, "no overweld")}
		s.Procedure, s.Joint.PartialDepth = fixed(s.Position), 0
		more := s
		step := drawNumber(t, "step", 0.25, 10)
		if s.Joint.Type == Fillet || s.Joint.Type == Lap {
			more.Joint.Leg += step
		} else {
			more.Joint.Thickness += step
		}
		a, b := mustWork(t, c, s), mustWork(t, c, more)
		if !(a.Metal < b.Metal) || !(a.Arc < b.Arc) || a.Passes > b.Passes {
			t.Errorf("%s: %v kg, %v min, %d runs; %v larger %v kg, %v min, %d runs", s.Joint.Type, a.Metal, a.Arc, a.Passes, step, b.Metal, b.Arc, b.Passes)
		}
	})
}

func TestTwoSidesAreTwice(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := Seam{Joint: Joint{Type: Fillet, Leg: drawNumber(t, "leg", 3, 25), Length: drawNumber(t, "length", 50, 9000)}, Procedure: fixed(PB)}
		if rapid.Bool().Draw(t, "lap") {
			s.Joint.Type, s.Joint.Thickness = Lap, 12
		}
		if rapid.Bool().Draw(t, "unequal") {
			s.Joint.Leg2 = drawNumber(t, "second leg", 3, 25)
		}
		if rapid.Bool().Draw(t, "intermittent") {
			s.Joint.Bead, s.Joint.Pitch = 50, drawNumber(t, "pitch", 50, 300)
		}
		both := s
		both.Joint.BothSides = true
		a, b := mustWork(t, Circumstances{}, s), mustWork(t, Circumstances{}, both)
		if !near9(b.Metal, 2*a.Metal) || !near9(float64(b.Arc), 2*float64(a.Arc)) || b.Passes != 2*a.Passes {
			t.Errorf("both sides %v kg %d runs, one %v kg %d runs", b.Metal, b.Passes, a.Metal, a.Passes)
		}
	})
}

// TestUpwardsIsNeverLess: at a fixed rate and equal preparation, PF takes at least the metal and
// the arc time of PA.
func TestUpwardsIsNeverLess(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := drawSeam(t)
		switch {
		case s.Joint.Type == SingleJ || s.Joint.Type == DoubleJ:
			s.Joint.Angle = 15
		case s.Joint.Type.groove() && s.Joint.Type != Square:
			s.Joint.Angle = drawNumber(t, "angle", 16, 70)
		}
		at := func(pos Position) Estimate {
			s.Position, s.Procedure = pos, fixed(pos)
			return mustWork(t, Circumstances{}, s)
		}
		a, f := at(PA), at(PF)
		if !less(a.Metal, f.Metal) || !less(float64(a.Arc), float64(f.Arc)) || !(a.Metal > 0) || f.Seams[0].Position != PF {
			t.Errorf("%s: PA %v kg, PF %v kg", s.Joint.Type, a.Metal, f.Metal)
		}
	})
}

// TestUpwardsIsMore: with the preparation that each position has by default a V takes strictly
// more metal and more arc time upwards, and with usual settings a fillet of equal metal takes longer.
func TestUpwardsIsMore(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		at := func(j Joint, pos Position, p *Procedure) Estimate {
			return mustWork(t, plain, Seam{Joint: j, Position: pos, Procedure: p})
		}
		v := Joint{Type: rapid.SampledFrom([]JointType{SingleV, DoubleV}).Draw(t, "type"), Thickness: drawNumber(t, "thickness", 8, 40), Length: 1000}
		a, f := at(v, PA, fixed(PA)), at(v, PF, fixed(PF))
		if !(f.Metal > a.Metal*1.01) || !(f.Arc > a.Arc) {
			t.Errorf("%+v: flat %v kg, upwards %v kg", v, a.Metal, f.Metal)
		}
		leg := Joint{Type: Fillet, Leg: drawNumber(t, "leg", 4, 10), Length: 1000}
		p := &Procedure{Process: rapid.SampledFrom([]Process{111, 135, 136}).Draw(t, "process")}
		a, f = at(leg, PB, p), at(leg, PF, p)
		if !near9(a.Metal, f.Metal) || !(f.Arc > a.Arc*1.1) {
			t.Errorf("%+v: horizontal %v kg %v min, upwards %v kg %v min", leg, a.Metal, a.Arc, f.Metal, f.Arc)
		}
	})
}

// TestTwoDimensionsMeetThree: at the transition thickness both times are equal; thinner plate
// cools as 2D, thicker as 3D, and thinner never faster.
func TestTwoDimensionsMeetThree(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		q, warm := drawNumber(t, "heat", 0.5, 4), drawNumber(t, "temperature", 0, 300)
		f2, f3 := rapid.SampledFrom([]float64{1, 0.9, 0.67, 0.45}).Draw(t, "F2"), rapid.SampledFrom([]float64{1, 0.9, 0.67}).Draw(t, "F3")
		cool := func(d float64) CoolingTime {
			c, err := Cool(q, d, warm, f2, f3)
			if err != nil {
				t.Fatal(err)
			}
			checkTree(t, c.Why)
			return c
		}
		at := cool(cool(10).Transition)
		thin, thick := cool(at.Transition*0.9), cool(at.Transition*1.1)
		if !near9(at.TwoD, at.ThreeD) || thin.Seconds != thin.TwoD || thick.Seconds != thick.ThreeD || thin.Seconds <= thick.Seconds {
			t.Errorf("at %v mm 2D %v s, 3D %v s; thinner %+v, thicker %+v", at.Transition, at.TwoD, at.ThreeD, thin, thick)
		}
	})
}

func TestSameAgain(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, c := drawSeam(t), drawCircumstances(t)
		if a, b := mustWork(t, c, s, s), mustWork(t, c, s, s); !reflect.DeepEqual(a, b) {
			t.Error("equal seams gave two estimates")
		}
	})
}

// TestNothingPanics: any numbers at all give an estimate of finite numbers or a *Error with a
// way out.
func TestNothingPanics(t *testing.T) {
	odd := rapid.OneOf(rapid.Float64(), rapid.SampledFrom([]float64{0, None, math.NaN(), math.Inf(1), math.Inf(-1), -1, 1, 10, 1e-12, 1e12}))
	rapid.Check(t, func(t *rapid.T) {
		s, c := drawSeam(t), drawCircumstances(t)
		for _, v := range []any{&s.Joint, s.Procedure, &s.Procedure.Set, &c.Steel, &c.Rates, &c} {
			r := reflect.ValueOf(v).Elem()
			for i := range r.NumField() {
				if f := r.Field(i); f.Kind() == reflect.Float64 && rapid.IntRange(0, 12).Draw(t, "upset") == 0 {
					f.SetFloat(odd.Draw(t, r.Type().Field(i).Name))
				}
			}
		}
		e, err := Work([]Seam{s}, c)
		if err != nil {
			if w, ok := err.(*Error); !ok || w.Field == "" || w.Hint == "" || w.Problem == "" {
				t.Errorf("an error without field, problem or way out: %#v", err)
			}
			return
		}
		for _, f := range e.Steps() {
			f.Walk(func(f origin.Figure, _ int) {
				if math.IsNaN(f.Value) || math.IsInf(f.Value, 0) {
					t.Errorf("%s is %v", f.Name, f.Value)
				}
			})
		}
	})
}

func ExampleWork() {
	seam := Seam{
		Joint:    Joint{Type: Fillet, Leg: 6, Length: 9600},
		Position: PB, Procedure: &Procedure{Process: 136, WireDiameter: 1.2, Current: 210, Volts: 25},
	}
	e, err := Work([]Seam{seam}, Circumstances{Site: true})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%.2f kg in %d run, arc %.0f min, hands-on %d min, stop not before %d min\n", e.Metal, e.Passes, float64(e.Arc), e.HandsOn.Whole(), e.SafeStop.Whole())
	for _, c := range e.Consumables {
		fmt.Printf("%s: %.1f %s, spare %.1f\n", c.Name, c.Amount, c.Unit, c.Spare)
	}
	// Output:
	// 1.85 kg in 1 run, arc 38 min, hands-on 478 min, stop not before 179 min
	// flux-cored wire 1.2 mm: 2.1 kg, spare 0.3
	// shielding gas for flux-cored: 781.1 L, spare 117.2
	// grinding discs 125 mm: 1.0 pieces, spare 1.0
}
