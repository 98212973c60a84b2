package lift

import (
	"math"
	"strings"
	"testing"
)

// Every number that is held against a limit is told, not only the one nearest to failing. By hand: 824 kg with its
// allowance, 906.4 kg on the hook; on the anchor 24 kg of hoist and 320 N of hand chain more.
func TestAllLimitsAreTold(t *testing.T) {
	l := Load{Mass: 800, Allowance: 1.03, Dynamic: 1.1}
	h := Hoist{By: ByChainHoist, WLL: 1000, Own: 24, Anchor: 980, Closed: 350, Over: 3600, Lug: 400, Raise: 900, Rigging: 1500}
	r, err := Hang(l, h)
	if err != nil || !r.OK || len(r.Others) != 2 {
		t.Fatalf("%v %+v", err, r)
	}
	if want := 906.4 + 24 + 320/9.80665; math.Abs(r.Need-want) > 0.1 || r.Have != 980 {
		t.Errorf("on the anchor %v, by hand %v", r.Need, want)
	}
	if o := r.Others[0]; !o.OK || math.Abs(o.Figure.Value-906.4) > 1e-9 || o.Limit.Value != 1000 || !strings.Contains(o.Reason, "906.4 kg is within 1000 kg") {
		t.Errorf("%+v", o)
	}
	if o := r.Others[1]; o.What != "headroom" || o.Figure.Value != 3150 {
		t.Errorf("%+v", o)
	}
}

// What fails is told with its own way out each, whichever is worse.
func TestWaysOutOfAllThatFails(t *testing.T) {
	h := Hoist{By: ByChainHoist, WLL: 500, Anchor: 600, Pull: 10, Closed: 350, Over: 2600, Lug: 400, Raise: 900, Rigging: 1500}
	r, err := Hang(Load{Mass: 800, Allowance: 1, Dynamic: 1}, h)
	if err != nil || r.OK {
		t.Fatal(r, err)
	}
	for _, want := range []string{"chain hoist of 1000 kg", "an anchor for 826 kg", "straight above the lifting point", "550 mm less"} {
		if !strings.Contains(r.Nearest, want) {
			t.Errorf("no %q in %q", want, r.Nearest)
		}
	}
	if !strings.Contains(strings.Join(r.Warnings, "\n"), "own mass is not given") {
		t.Error(r.Warnings)
	}
	c, err := Crane(Load{Mass: 1360, Allowance: 1, Dynamic: 1}, CraneLift{Chart: []ChartRow{{4000, 2400}, {6000, 1300}}, Radius: 5000,
		HookAt: 6000, Raise: 5000, Rigging: 1500, Pad: 0.36, PadLoad: 4000, Ground: 100})
	if err != nil || c.OK {
		t.Fatal(c, err)
	}
	for _, want := range []string{"pads of 0.40 m2", "within 4 m it lifts 2400 kg", "slings 500 mm shorter"} {
		if !strings.Contains(c.Nearest, want) {
			t.Errorf("no %q in %q", want, c.Nearest)
		}
	}
}

// Statics: with the centre of gravity 0.3 m from the first of two jacks 2 m apart, the first carries 1.7 / 2 of
// the weight; midway each carries half.
func TestJacksOffTheMiddle(t *testing.T) {
	l := Load{Mass: 1000, Allowance: 1, Dynamic: 1}
	for _, tc := range []struct {
		n              int
		span, cg, want float64
	}{{2, 2000, 300, 850}, {2, 2000, 1700, 850}, {2, 2000, 1000, 500}, {4, 2000, 600, 700}, {2, 0, 0, 500}} {
		r, err := JacksAt(l, tc.n, 800, tc.span, tc.cg)
		if err != nil || math.Abs(r.Need-tc.want) > 1e-9 || r.OK != (tc.want <= 800) {
			t.Errorf("%+v: %v %v", tc, r.Need, err)
		}
		if asks := strings.Contains(strings.Join(r.Warnings, "\n"), "must be midway"); asks != (tc.span == 0) {
			t.Errorf("%+v: %v", tc, r.Warnings)
		}
	}
	for _, bad := range [][3]float64{{1, 2000, 500}, {2, 2000, 2500}, {2, math.NaN(), 0}, {2, 2000, -1}} {
		if r, err := JacksAt(l, int(bad[0]), 800, bad[1], bad[2]); err == nil && !(math.IsNaN(bad[1])) {
			t.Errorf("%v was taken: %+v", bad, r)
		}
	}
}

// What nobody gave is not shown as given.
func TestNothingGivenIsNotShown(t *testing.T) {
	f, err := Exclusion(0, 0)
	if err != nil || f.Value != 3000 || len(f.From) != 2 {
		t.Errorf("%v %+v", err, f.From)
	}
	if f, _ = Exclusion(5000, 2000); len(f.From) != 4 || math.Abs(f.Value-(5000.0/3+2000)) > 1e-9 {
		t.Errorf("%+v", f)
	}
}
