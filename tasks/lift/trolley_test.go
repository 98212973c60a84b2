package lift

import (
	"math"
	"strings"
	"testing"

	"sailby/tasks/quantity"
)

// HSE push and pull guidance: 2 % of the weight on good wheels (200 kg is 4 kgf; INDG143: 400 kg is
// 8 kgf), up to 10 % on uneven ground; 400 kg up 1 in 12 is "over 30 kgf". Slopes by arithmetic.
func TestPushForces(t *testing.T) {
	for _, c := range []struct {
		name  string
		mass  float64
		p     Push
		start bool
		want  float64
	}{
		{"HSE, 200 kg level", 200, Push{}, true, 4}, {"INDG143, 400 kg level", 400, Push{}, false, 8}, {"HSE, uneven", 200, Push{Uneven: true}, true, 20},
		{"400 kg up 1 in 12", 400, Push{Rise: 1.0 / 12}, false, 41.19}, {"500 kg up 1 in 10", 500, Push{Rise: .1}, false, 59.70},
	} {
		if got := c.p.force(plain(c.mass).Heavy(), c.p.rolling(c.start)).Value; !near1(got, c.want, .006) {
			t.Errorf("%s: %.3f kgf, want %.2f", c.name, got, c.want)
		}
	}
}

// What one man may push: 20 kgf to start, 10 to keep moving (HSE), turned into mass.
func TestTrolleyLimits(t *testing.T) {
	for _, c := range []struct {
		name string
		p    Push
		most float64
	}{
		{"level", Push{}, 500}, {"uneven", Push{Uneven: true}, 200}, {"1 in 12", Push{Rise: 1.0 / 12}, 97.1}, {"woman, level", Push{Women: 1}, 350},
		{"with a trolley of 100 kg", Push{Own: 100}, 400}, {"rated 300", Push{Rated: 300}, 300}, {"two men", Push{Men: 2}, 666.6},
	} {
		under, err1 := Trolley(plain(c.most*.999), c.p)
		over, err2 := Trolley(plain(c.most*1.002), c.p)
		if err1 != nil || err2 != nil || !under.OK || over.OK {
			t.Errorf("%s: %v %v, %q %q", c.name, err1, err2, under.Reason, over.Reason)
		}
	}
	for mass, want := range map[float64]string{600: "2 people", 700: "3 people", 900: "winch"} {
		if r, _ := Trolley(plain(mass), Push{}); r.OK || !strings.Contains(r.Nearest, want) {
			t.Errorf("%.0f kg: %q", mass, r.Nearest)
		}
	}
	for _, p := range []Push{{Rise: 2}, {Men: -1}, {Own: math.Inf(1)}} {
		if _, err := Trolley(plain(1), p); err == nil || quantity.Hint(err) == "" {
			t.Errorf("%+v: %v", p, err)
		}
	}
}

// Lever pull at rated load as a maker's manual gives it, kgf; the anchor carries load, hoist and pull.
func TestHang(t *testing.T) {
	for wll, want := range map[float64]float64{750: 21, 1500: 27, 3000: 39, 6000: 45} {
		if got := (Hoist{By: ByLeverHoist, WLL: wll}).effort().Value; got != want {
			t.Errorf("%.0f kg: %.0f kgf", wll, got)
		}
	}
	h := Hoist{By: ByLeverHoist, WLL: 1500, Own: 10, Anchor: 1037, Closed: 400, Over: 4000, Lug: 1000, Raise: 1500, Rigging: 1000}
	if r, err := Hang(plain(1000), h); err != nil || !r.OK || r.Need != 1037 {
		t.Errorf("%+v (%v)", r, err)
	}
	for _, c := range []struct {
		name           string
		mass           float64
		change         func(*Hoist)
		reason, wanted string
	}{
		{"hoist", 1501, func(h *Hoist) { h.Anchor = 0 }, "the lever hoist", "lever hoist of 3000 kg"},
		{"anchor", 1000, func(h *Hoist) { h.Anchor = 1036; h.Hangs = "shop beam" }, "shop beam", "anchor for 1037 kg"},
		{"headroom", 1000, func(h *Hoist) { h.Over = 3850 }, "headroom", "50 mm less"},
		{"side pull", 100, func(h *Hoist) { h.By, h.Pull = ByChainHoist, 15 }, "side pull: 15 deg exceeds 2 deg", "straight above"},
	} {
		x := h
		c.change(&x)
		if r, err := Hang(plain(c.mass), x); err != nil || r.OK || !strings.Contains(r.Reason, c.reason) || !strings.Contains(r.Nearest, c.wanted) {
			t.Errorf("%s: %+v (%v)", c.name, r, err)
		}
	}
	light, _ := Hang(plain(40), Hoist{By: ByChainHoist, WLL: 500, Marine: true})
	if !strings.Contains(strings.Join(light.Warnings, "\n"), "at least 50 kg") {
		t.Error(light.Warnings)
	}
	for _, x := range []Hoist{{By: ByHands, WLL: 1}, {By: ByChainHoist}, {By: ByGantry, WLL: math.NaN()}} {
		if _, err := Hang(plain(1), x); err == nil || quantity.Hint(err) == "" {
			t.Errorf("%+v: %v", x, err)
		}
	}
}

func TestJacksAndCutOff(t *testing.T) {
	for _, c := range []struct {
		n    int
		want float64
	}{{1, 1000}, {2, 500}, {4, 500}} {
		if r, err := Jacks(plain(1000), c.n, 600); err != nil || r.Need != c.want || r.OK != (c.want <= 600) {
			t.Errorf("%d: %+v (%v)", c.n, r, err)
		}
	}
	if f, err := CutOff(plain(1000), 2000); err != nil || !near1(f.Value, 1100, 1e-9) {
		t.Error(f.Value, err)
	}
	if f, _ := CutOff(plain(1000), 1050); f.Value != 1050 {
		t.Error(f.Value)
	}
	if _, err := Jacks(plain(1000), 0, 600); err == nil {
		t.Error("no jack passed")
	}
}
