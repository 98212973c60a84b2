package coat

import (
	"errors"
	"strings"
	"testing"

	"sailby/tasks/origin"
)

// Worked from the primer's data sheet: coat 1 at 0 h, coat 2 from 16 h to 7 d, in use 5 d after it: 136 h at
// 20 C; at 10 C 24 h and 7 d: 192 h. A slot of 6 days (144 h) holds the first and not the second.
func TestTwoCoatsInSixDays(t *testing.T) {
	const slot = 144 * 60
	p := primer()
	for celsius, want := range map[float64]int{20: 136 * 60, 10: 192 * 60} {
		temp := steady(celsius)
		window, err := p.Next(p)
		if err != nil {
			t.Fatal(err)
		}
		second, ok := Cure(0, window.Min, p.ApplyMin, temp, 1e6)
		if last := LastRecoat(0, window.Max, temp, 1e6); !ok || second > last || last != 7*1440 {
			t.Errorf("%v C: second coat at %d (%v), last at %d, want 7 d", celsius, second, ok, last)
		}
		use, ok := Cure(second, p.Service, p.ApplyMin, temp, 1e6)
		if !ok || use != want {
			t.Errorf("%v C: in use at %d min (%v), want %d", celsius, use, ok, want)
		}
		if fits := use <= slot; fits != (celsius == 20) {
			t.Errorf("%v C: fits is %v", celsius, fits)
		}
	}
}

// The same sheet at every stated temperature, by Paint.Window and Paint.Wait.
func TestPrimerSheet(t *testing.T) {
	p := primer()
	for _, c := range []struct{ celsius, least, most, use, pot float64 }{
		{10, 24, 168, 168, 48}, {20, 16, 168, 120, 24}, {30, 10, 72, 72, 12},
	} {
		least, most, err := p.Window(p, c.celsius)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "least", least.Value/hour, c.least, 1e-9)
		near(t, "most", most.Value/hour, c.most, 1e-9)
		use, fig, err := p.Wait("service", c.celsius)
		if err != nil || fig.From[0].Origin.Source != "primer data sheet" {
			t.Errorf("use: %v from %+v", err, fig)
		}
		near(t, "use", use/hour, c.use, 1e-9)
		pot, _, _ := p.Pot(c.celsius)
		near(t, "pot life", pot/hour, c.pot, 1e-9)
	}
}

// Epoxy over itself and under polyurethane are two pairs; a pair that is not stated is not guessed.
func TestNextCoat(t *testing.T) {
	a, b, any := at(hour, 20, 1), at(hour, 20, 2), at(hour, 20, 3)
	p := Paint{Name: "grey", Kind: "two-pack epoxy", NextCoat: map[string]Recoat{"finish": {Min: a}, "Polyurethane": {Min: b, Max: any}}, Never: map[string]string{"bitumen": "it bleeds"}}
	for _, c := range []struct {
		next Paint
		want Curve
		says string
	}{
		{Paint{Name: "finish", Kind: "polyurethane"}, a, ""},
		{Paint{Name: "other", Kind: "polyurethane topcoat"}, b, ""},
		{Paint{Name: "tar", Kind: "blacking"}, nil, `"tar" must not go over "grey": it bleeds`},
		{Paint{Name: "grey", Kind: "two-pack epoxy"}, nil, `"grey" does not say when "grey" may follow`},
		{Paint{}, nil, "does not say when"},
	} {
		r, err := p.Next(c.next)
		if c.want == nil {
			if err == nil || !strings.Contains(err.Error(), c.says) || hint(err) == "" {
				t.Errorf("%q: got %v, want %q", c.next.Name, err, c.says)
			}
			if _, _, err := p.Window(c.next, 20); err == nil {
				t.Errorf("%q has a window", c.next.Name)
			}
			continue
		}
		if err != nil || r.Min[0] != c.want[0] {
			t.Errorf("%q: %v %v, want %v", c.next.Name, r, err, c.want)
		}
	}
	p.NextCoat["any"] = Recoat{Min: Curve{{20, 180, 600}}}
	r, err := p.Next(Paint{Kind: "two-pack epoxy"})
	if err != nil || r.Min[0].Min != 180 || len(r.Max) != 1 || r.Max[0].Min != 600 {
		t.Errorf("any: %v %v, want 180 and 600 min", r, err)
	}
	if _, most, err := p.Window(Paint{Name: "finish"}, 20); err != nil || most.Text != "none" {
		t.Errorf("no longest wait: %+v %v", most, err)
	}
}

func TestStates(t *testing.T) {
	p, _ := Defaults("self-polishing antifouling")
	if _, ok := p.State("Service"); ok {
		t.Error("a state that the paint does not state")
	}
	if _, _, err := p.Wait("service", 10); err == nil || hint(err) == "" {
		t.Errorf("a state that the paint does not state: %v", err)
	}
	// Hotter than its point the longest wait to immersion shortens.
	warm, _, err := p.Wait("immersion max", 40)
	if err != nil || warm >= 90*day {
		t.Errorf("longest wait at 40 C is %v min (%v), want below 90 d", warm, err)
	}
	least, _, _ := p.Wait("immersion min", 10)
	near(t, "least wait to immersion", least, 18*hour, 1e-9)
	if _, _, err := p.Wait("hard dry", -6); !errors.Is(err, ErrCold) {
		t.Errorf("hard dry at -6 C: %v, want ErrCold", err)
	}
	// Below its own least temperature no cure at all, although the points reach further.
	if _, _, err := p.Wait("hard dry", 4); !errors.Is(err, ErrCold) || !strings.Contains(err.Error(), "its own least is 5 C") || hint(err) == "" {
		t.Errorf("hard dry at 4 C: %v, want ErrCold", err)
	}
	if _, _, err := p.Window(p, 4); !errors.Is(err, ErrCold) {
		t.Errorf("recoat at 4 C: %v, want ErrCold", err)
	}
	e, _ := Defaults("epoxy")
	hard, _, _ := e.Wait("hard dry", 10)
	gone, fig, err := e.Wait("solvent gone", 10)
	if err != nil || gone <= hard || fig.From[0].Origin.Kind != origin.Judgement {
		t.Errorf("solvent gone %v, hard dry %v, %+v, %v", gone, hard, fig, err)
	}
}

// The generic polyurethane takes its longest wait from UFGS-09971.
func TestPolyurethaneDefault(t *testing.T) {
	p, _ := Defaults("polyurethane")
	for celsius, want := range map[float64][2]float64{18: {8, 48}, 25: {6, 48}, 30: {4, 36}, 35: {3, 24}, 41: {2, 12}, 46: {1, 2}} {
		least, most, err := p.Window(p, celsius)
		if err != nil || most.From[0].Origin.Kind != origin.Table {
			t.Fatal(err, most)
		}
		near(t, "least", least.Value/hour, want[0], 1e-9)
		near(t, "most", most.Value/hour, want[1], 1e-9)
	}
}

// UFGS-09971: over epoxy a tack coat of 25-50 um wet thinned by about 25 %; MIL-HDBK-1110: about 4 h to tack.
func TestMissedWindow(t *testing.T) {
	r, err := Missed(Job{Paint: primer(), Area: 20, Method: Airless, Celsius: 20, Stripe: 30, Profile: 60})
	if err != nil || r.Name != "tack coat" || r.Wet < 25 || r.Wet > 50 || r.Thinner != 0.25 || r.Wait != 240 {
		t.Errorf("epoxy: %+v %v", r, err)
	}
	near(t, "tack coat paint", r.Litres*(1+r.Thinner)*0.7/20*1000, r.Wet, 1e-9)
	pu, _ := Defaults("polyurethane")
	flat, err := Missed(Job{Paint: pu, Area: 20, Surface: Flat, Celsius: 20})
	if err != nil || flat.Name != "abrade and wipe" || flat.Minutes <= 0 || flat.Litres != 0 {
		t.Errorf("polyurethane: %+v %v", flat, err)
	}
	if lattice, _ := Missed(Job{Paint: pu, Area: 20, Surface: Lattice, Celsius: 20}); lattice.Minutes <= flat.Minutes {
		t.Errorf("open steelwork %v min, plate %v", lattice.Minutes, flat.Minutes)
	}
	if _, err := Missed(Job{Paint: pu, Area: -1, Celsius: 20}); err == nil {
		t.Error("a rescue of -1 m2")
	}
}
