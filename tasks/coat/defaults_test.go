package coat

import (
	"testing"

	"sailby/tasks/origin"
)

// Every default is a whole paint that can be applied, and says where each figure comes from.
func TestDefaultsAreWhole(t *testing.T) {
	for _, k := range Kinds() {
		p, ok := Defaults(k)
		if !ok || p.Kind != k {
			t.Fatalf("no default for %q", k)
		}
		if err := p.Validate(); err != nil {
			t.Errorf("%s: %v", k, err)
		}
		if p.Origin.Kind != origin.Memory {
			t.Errorf("%s: origin is %v, want from memory", k, p.Origin)
		}
		for _, m := range Methods() {
			a, err := Apply(Job{Paint: p, Area: 12, Method: m, Celsius: 15, Stripe: 10, Profile: 50})
			if err != nil {
				t.Errorf("%s by %s: %v", k, m, err)
				continue
			}
			if a.Litres <= 0 || a.Minutes <= 0 || a.Stripe == nil {
				t.Errorf("%s by %s: empty application %+v", k, m, a)
			}
		}
		for _, s := range []string{"touch dry", "hard dry", "solvent gone"} {
			if _, _, err := p.Wait(s, 15); err != nil {
				t.Errorf("%s: %s: %v", k, s, err)
			}
		}
	}
}

// A caller may change a paint without changing the next one's defaults.
func TestDefaultsAreFresh(t *testing.T) {
	for _, k := range Kinds() {
		p, _ := Defaults(k)
		p.WindMax[Airless], p.Sources["x"] = 1, origin.Origin{}
		p.TouchDry[0].Min = 7
		p.PackSizes[0] = 3
		for n := range p.NextCoat {
			for _, c := range []Curve{p.NextCoat[n].Min, p.NextCoat[n].Max, p.PotLife, p.HardDry} {
				for i := range c {
					c[i].Min = 77
				}
			}
		}
		q, _ := Defaults(k)
		if q.WindMax[Airless] == 1 || q.Sources["x"] != q.Sources["y"] || q.TouchDry[0].Min == 7 || q.PackSizes[0] == 3 || q.HardDry[0].Min == 77 {
			t.Errorf("%s: defaults are shared between callers", k)
		}
		if err := q.Validate(); err != nil {
			t.Errorf("%s after a caller's changes: %v", k, err)
		}
	}
}
