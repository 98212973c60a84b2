package coat

import (
	"math"
	"testing"
	"unicode/utf8"
)

// Any word may come from a job file: it is found or refused with a way out, never a crash; what is
// found once is found again by its own name.
func FuzzWords(f *testing.F) {
	for _, k := range append(append(Kinds(), Methods()...), "Sa 2½", "SSPC-SP10", "", " ", "sspc", "sspc ", "SP", "\xff", "any", "garnet", "immersion max") {
		f.Add(k, 20.0, 3.0)
	}
	f.Fuzz(func(t *testing.T, s string, celsius, size float64) {
		if p, ok := Defaults(s); ok {
			if q, again := Defaults(p.Kind); !again || q.Kind != p.Kind {
				t.Fatalf("%q gives %q, which gives %q", s, p.Kind, q.Kind)
			}
		}
		if g, err := findGrade(s); err == nil {
			if h, err := findGrade(g.name); err != nil || h.name != g.name {
				t.Fatalf("%q gives %q, which gives %q", s, g.name, h.name)
			}
		} else if hint(err) == "" || utf8.ValidString(s) && !utf8.ValidString(err.Error()) {
			t.Fatalf("%q is refused with %q", s, err)
		}
		p, _ := Defaults("two-pack epoxy")
		p.NextCoat[s] = Recoat{Min: Curve{{celsius, size, 0}}}
		p.WindMax[s] = size
		_, _ = p.Next(Paint{Name: s, Kind: s})
		if p.Validate() == nil {
			if !(size > 0) || math.IsNaN(celsius) {
				t.Fatalf("a paint with a point of %v at %v is valid", size, celsius)
			}
			if _, err := p.Next(Paint{Name: s}); err != nil && word(s) != "" && s != "" {
				t.Fatalf("the next coat %q is not found: %v", s, err)
			}
		}
		q, _ := Defaults("two-pack epoxy")
		if a, err := Apply(Job{Paint: q, Area: size, Method: s, Surface: s, Celsius: celsius}); err == nil && !(a.Minutes > 0 && a.Litres > 0) {
			t.Fatalf("%q: %+v", s, a)
		}
		if got, err := Prepare(Prep{Area: size, Grade: s, Method: s, State: s, Abrasive: s}); err == nil && !(got.Minutes > 0) {
			t.Fatalf("%q: %+v", s, got)
		}
		_, _ = MayApply(q, celsius, celsius, size, size, s)
		_, _, _ = q.Wait(s, celsius)
		_, _, _ = q.Pot(celsius)
		_, _ = Tins(size, []float64{size, celsius})
	})
}
