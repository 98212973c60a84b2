package weld

import (
	"testing"

	"pgregory.net/rapid"
)

// TestRunsAddUp: the runs of a seam are as many as its passes, and their metal, arc and hands-on
// times are the seam's.
func TestRunsAddUp(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		e := mustWork(t, drawCircumstances(t), drawSeam(t))
		s := e.Seams[0]
		n, area, arc, welding := 0, 0.0, 0.0, 0.0
		for _, r := range s.Runs {
			n += r.Count
			area += float64(r.Count) * r.Area
			arc += float64(r.Count) * r.Arc.Value
			welding += float64(r.Count) * r.Welding.Value
			if r.Count < 1 || !(r.Area > 0) {
				t.Errorf("%d of %s, %v mm2", r.Count, r.Name, r.Area)
			}
			checkTree(t, r.Arc)
			checkTree(t, r.Welding)
		}
		if n != s.Passes || !near9(arc, float64(s.Arc)) || !near9(welding, float64(s.Welding)) {
			t.Errorf("%d runs of %d, arc %v of %v, welding %v of %v", n, s.Passes, arc, s.Arc, welding, s.Welding)
		}
		if back := area - s.Section.Area; back < -1e-9*area || back > 0.2/7.85*1e3 {
			t.Errorf("runs of %v mm2 in %v", area, s.Section.Area)
		}
	})
}

// TestRunsByHand: 16 mm V of 60 degrees, gap 3, face 2, back-gouged, beads of 30: 48 + 196 tan 30 = 161.16 mm2. A
// root of 24, five fills of 27.4, a backing run of 0.15 kg/m; at 2.5 kg/h the root of a metre burns 24 x 7.85e-3 / 2.5 h.
func TestRunsByHand(t *testing.T) {
	s := Seam{Joint: Joint{Type: SingleV, Thickness: 16, RootGap: 3, RootFace: 2, Angle: 60, Cap: None, BackGouge: true, Length: 1000}, Position: PA,
		Procedure: &Procedure{Process: 136, Position: PA, Deposition: 2.5, BeadArea: 30}}
	e := mustWork(t, plain, s)
	r := e.Seams[0].Runs
	if len(r) != 3 || e.Passes != 7 || r[0].Count != 1 || r[1].Count != 5 || r[2].Count != 1 {
		t.Fatalf("%d runs, %+v", e.Passes, r)
	}
	near(t, "root", r[0].Arc.Value, 24*7.85e-3/2.5*60, 1e-9)
	near(t, "fill", r[1].Area, (48+196*tanDeg(30)-24)/5, 1e-9)
	near(t, "backing", r[2].Arc.Value, 0.15/2.5*60, 1e-9)
}
