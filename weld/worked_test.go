package weld

import (
	"fmt"
	"testing"
)

// TestV2V3 is 6 m of 10 mm V, 111 at 1.3 kg/h, factor 0.30, efficiency 0.62, flat and upwards,
// worked by hand from the V table (0.57 and 0.76 kg/m) and 0.75 of the rate upwards.
func TestV2V3(t *testing.T) {
	for _, c := range []struct {
		pos                   Position
		kg, arc, hours, stick float64
	}{{PA, 3.42, 2.631, 8.769, 5.516}, {PF, 4.56, 4.677, 15.590, 7.355}} {
		p := &Procedure{Process: 111, Deposition: 1.3, OperatingFactor: 0.30, Efficiency: 0.62}
		e := mustWork(t, plain, Seam{Joint: Joint{Type: SingleV, Thickness: 10, Length: 6000}, Position: c.pos, Procedure: p})
		near(t, "kg", e.Metal, c.kg, 0.001)
		near(t, "arc h", float64(e.Arc)/60, c.arc, 0.001)
		near(t, "total h", float64(e.Seams[0].Welding)/60, c.hours, 0.001)
		near(t, "electrodes kg", e.Consumables[0].Amount, c.stick, 0.001)
	}
}

// TestDerivedHeat: heat vectors worked by hand from the published formulas.
func TestDerivedHeat(t *testing.T) {
	q, err := HeatInput(0.8, 25, 180, 300)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "kJ/mm", q.Value, 0.72, 1e-9)
	for _, c := range []struct{ T, three, two, change float64 }{{20, 5.288, 11.364, 14.66}, {100, 6.643, 16.290, 15.66}, {150, 7.846, 21.186, 16.43}} {
		r, err := Cool(1, 10, c.T, 1, 1)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "3D", r.ThreeD, c.three, 0.001)
		near(t, "2D", r.TwoD, c.two, 0.001)
		near(t, "transition", r.Transition, c.change, 0.01)
		at, _ := Cool(1, r.Transition, c.T, 1, 1)
		near(t, "2D is 3D at the transition", at.TwoD, at.ThreeD, 1e-10)
		checkTree(t, r.Why)
	}
	r, _ := Cool(1.5, 12, 20, 0.9, 0.9)
	near(t, "butt run", r.Seconds, 15.98, 0.01)
	near(t, "butt run 3D", r.ThreeD, 7.14, 0.01)
	// SSAB Welding Handbook, figure 3.9, reads about 5 s for thick plate at 20 C and 1 kJ/mm.
	thick, _ := Cool(1, 40, 20, 1, 1)
	near(t, "chart", thick.Seconds, 5, 0.5)
	for _, c := range []struct{ cet, d, h, q, want float64 }{{.30, 20, 5, 1, 56.5}, {.32, 30, 5, 1.5, 92.5}, {.35, 30, 5, 1.5, 115.8}, {.322, 50, 10, 1, 162.9}, {.40, 50, 5, 2, 180.7}, {.35, 60, 10, 1, 191.2}} {
		f, in := PreheatB(c.cet, c.d, c.h, c.q)
		if !in {
			t.Errorf("%v is out of range", c)
		}
		near(t, fmt.Sprint(c), f.Value, c.want, 0.06)
		checkTree(t, f)
	}
	s := Steel{C: .17, Mn: 1.45, Mo: .02, Cr: .05, Cu: .03, Ni: .04}
	near(t, "CET", s.CET().Value, 0.322, 0.0005)
	near(t, "CE", s.CE().Value, 0.430, 0.0005)
	near(t, "300 A 60 %", Set{RatedCurrent: 300, DutyCycle: .6}.CurrentAt(1), 232.4, 0.05)
	near(t, "200 A 35 %", Set{RatedCurrent: 200, DutyCycle: .35}.CurrentAt(.6), 152.8, 0.05)
	near(t, "at 160 A", Set{RatedCurrent: 200, DutyCycle: .35}.Share(160), 0.547, 0.0005)
	near(t, "160 A stick kW", Set{}.InputPower(26.4, 160), 5.0, 0.05)
	near(t, "gas a kg", GasPerKilogram(15, 3), 300, 1e-9)
}

// TestButtsByHand are butts with gap and caps worked by hand: V 60, double V 60, bevel 50; kg/m
// bare and with 1.5 mm caps 3 mm wider than the opening.
func TestButtsByHand(t *testing.T) {
	for _, c := range []struct {
		kind             JointType
		thick, bare, cap float64
	}{{SingleV, 6, .234, .324}, {SingleV, 8, .416, .527}, {SingleV, 10, .610, .740}, {SingleV, 20, 2.127, 2.347}, {SingleV, 30, 4.550, 4.861},
		{DoubleV, 10, .384, .553}, {DoubleV, 15, .745, .960}, {DoubleV, 25, 1.809, 2.114}, {SingleBevel, 6, .239, .331}, {SingleBevel, 12, .862, 1.013}, {SingleBevel, 25, 3.316, 3.589}} {
		j := Joint{Type: c.kind, Thickness: c.thick, RootGap: 2, Length: 1000}
		if c.thick == 6 {
			j.RootGap = 1.5
		}
		s := areaOf(t, j, PA)
		near(t, fmt.Sprint(c), Metal(s.Drawn, 1000, 0), c.bare, 0.0007)
		j.Cap = 1.5
		capped := areaOf(t, j, PA)
		near(t, fmt.Sprint(c, " capped"), Metal(capped.Area, 1000, 0), c.cap, 0.0012)
	}
}
