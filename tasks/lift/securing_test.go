package lift

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
	"sailby/tasks/quantity"
)

func secure(t *testing.T, l Load, c Cargo, s Strap) SecureResult {
	t.Helper()
	r, err := Secure(l, c, s)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// Load securing handbook, chapter 2: LC 2500 daN, S_TF 400 daN, friction 0.3: one strap over the
// top holds at most 2 x 0.3 x 400 = 240 daN.
func TestOneStrap(t *testing.T) {
	if r := secure(t, plain(1000), Cargo{Friction: .3}, Strap{STF: 400, LC: 2500}); !near1(r.HoldsMost, 240, 1e-9) {
		t.Errorf("%.2f daN", r.HoldsMost)
	}
}

// 1000 kg, S_TF 400 daN, worked by hand from fs (c - mu) m g / (2 mu sin a S_TF).
func TestStraps(t *testing.T) {
	for _, c := range []struct {
		mu, angle           float64
		forward, side, used int
		exact               float64 // forward
	}{{.3, 90, 3, 1, 3, 2.555}, {.3, 60, 3, 2, 3, 2.950}, {.45, 90, 2, 1, 2, 1.192}, {.6, 90, 1, 0, 2, .511}} {
		r := secure(t, plain(1000), Cargo{Friction: c.mu}, Strap{STF: 400, Angle: c.angle})
		f, s := r.Directions[0], r.Directions[2]
		if f.Slide != c.forward || s.Slide != c.side || r.Straps != c.used || !near1(f.Figure.Value, c.exact, .001) || f.G != .8 || s.G != .5 {
			t.Errorf("%+v: %+v", c, r)
		}
	}
	// the container handbook's coil: friction leaves c - mu to secure: 0.4 g of 0.8, 0.5 g with 0.3
	r := secure(t, plain(1000), Cargo{Friction: .4}, Strap{STF: 400, Angle: 90})
	if want := 1.25 * .4 * 981 / (2 * .4 * 400); !near1(r.Directions[0].Figure.Value, want, 1e-9) {
		t.Errorf("%v, want %v", r.Directions[0].Figure.Value, want)
	}
	blocked := secure(t, plain(1000), Cargo{Friction: .3, Blocked: true}, Strap{})
	if blocked.Straps != 2 || len(blocked.Directions) != 2 {
		t.Errorf("%+v", blocked)
	}
}

// The edition changes the number, so it is printed; a sea leg may be worse than the road sideways.
func TestEditionAndSea(t *testing.T) {
	now := secure(t, plain(5000), Cargo{Friction: .3}, Strap{})
	old := secure(t, plain(5000), Cargo{Friction: .3, Old: true}, Strap{})
	if now.Edition != "EN 12195-1:2010" || old.Edition != "EN 12195-1:2003" || old.Straps <= now.Straps {
		t.Errorf("%d by %s, %d by %s", now.Straps, now.Edition, old.Straps, old.Edition)
	}
	// 2003 by hand: (0.8 - 0.21) 4905 / (1.5 x 0.21 x 400) = 22.97
	if old.Straps != 23 {
		t.Errorf("%d straps by the old edition, want 23", old.Straps)
	}
	sea := secure(t, plain(2000), Cargo{Friction: .3, Blocked: true, Sea: SeaB}, Strap{})
	// sideways 0.7 at sea B: 1.1 x 0.4 x 1962 / 240 = 3.6; lengthwise 0.3 with 0.3 on the bed: 1.1 x 0.21 x 1962 / 240 = 1.9
	if sea.Straps != 4 || sea.Governs != "sideways, sea B" || sea.Directions[3].Slide != 2 {
		t.Errorf("%+v", sea)
	}
}

func TestTipping(t *testing.T) {
	tall := Load{Mass: 1000, Allowance: 1, Length: 2000, Width: 500, Height: 2000}
	r := secure(t, tall, Cargo{Friction: .6}, Strap{STF: 400, LC: 2500})
	// sideways, road: 1.1 x 981 x (0.5 x 1000 - 250) / (500 x 400) = 1.35; 0.6 with 1250 daN: 0.60
	// forward: 1.25 x 981 x (0.8 x 1000 - 1000) / ... : none
	if d := r.Directions[2]; d.Tip != 2 || !near1(d.Figure.Value, 1.349, .001) || r.Directions[0].Tip != 0 {
		t.Errorf("%+v", r.Directions)
	}
	if low := secure(t, plain(10), Cargo{Friction: .6}, Strap{}); !strings.Contains(strings.Join(low.Warnings, "\n"), "tipping not checked") {
		t.Error(low.Warnings)
	}
}

// CTU Code informative material, friction factors.
func TestFriction(t *testing.T) {
	for on, want := range map[Surface]float64{WoodOnPly: .45, WoodOnSteel: .30, SteelOnPly: .45, SteelOnAlu: .30, SteelOnStainles: .20, SteelOnSteel: .40, PaintOnPaint: .30, SmoothPainted: .20, "": .20} {
		if f, err := (Cargo{On: on}).friction(); err != nil || f.Value != want {
			t.Errorf("%q: %v (%v)", on, f.Value, err)
		}
	}
	for _, c := range []Cargo{{On: "ice"}, {Friction: math.NaN()}, {Friction: -1}, {Friction: 1e-9}, {Sea: 7}} {
		if _, err := Secure(plain(1), c, Strap{}); err == nil || quantity.Hint(err) == "" {
			t.Errorf("%+v: %v", c, err)
		}
	}
	if _, err := Secure(plain(1), Cargo{}, Strap{Angle: 10}); err == nil {
		t.Error("a strap at 10 degrees passed")
	}
	if _, err := Secure(plain(1e7), Cargo{Friction: .01}, Strap{STF: 1}); err == nil {
		t.Error("more straps than there are")
	}
}

// More friction or pretension never takes more straps; more mass never fewer.
func TestSecureLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m, mu := rapid.Float64Range(10, 5000).Draw(t, "mass"), rapid.Float64Range(.1, .6).Draw(t, "friction")
		s := Strap{STF: rapid.Float64Range(100, 1000).Draw(t, "S_TF"), Angle: rapid.Float64Range(30, 90).Draw(t, "angle")}
		a, err := Secure(plain(m), Cargo{Friction: mu, Sea: SeaC}, s)
		if err != nil {
			t.Fatal(err)
		}
		b, _ := Secure(plain(m), Cargo{Friction: mu + .05, Sea: SeaC}, s)
		c, _ := Secure(plain(m*1.2), Cargo{Friction: mu, Sea: SeaC}, s)
		if b.Straps > a.Straps || c.Straps < a.Straps {
			t.Fatalf("%d, more friction %d, more mass %d", a.Straps, b.Straps, c.Straps)
		}
	})
}
