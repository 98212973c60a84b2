package coat

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/origin"
)

// plain is a paint with the published limits: 3 C above the dew point (FHWA-RD-98-084), 85 % (US federal
// specification, ISO 12944-7), steel from 4 to 52 C (the same federal specification: 40 to 125 F).
var plain = Paint{Name: "plain", ApplyMin: 4, ApplyMax: 52, RHMax: 0.85, DewSpread: 3}

func TestMayApply(t *testing.T) {
	silicate, _ := Defaults("zinc ethyl silicate")
	for _, c := range []struct {
		name                 string
		paint                Paint
		air, steel, rh, wind float64
		method               string
		reasons              []string
	}{
		{"a good day", plain, 15, 15, 0.70, 3, Airless, nil},
		{"steel and air cold", plain, 3, 2, 0.5, 1, Brush, []string{"steel 2.0 C is below the least 4.0 C (2.0 K short)", "air 3.0 C is below the least 4.0 C (1.0 K short)"}},
		{"steel hot", plain, 30, 55, 0.3, 1, Brush, []string{"steel 55.0 C is above the greatest 52.0 C (3.0 K over)"}},
		{"dew at dawn: 10 C and 80 %, steel 8.2 C", plain, 10, 8.2, 0.80, 1, Brush, []string{"steel 8.2 C is only 1.5 K above the dew point 6.7 C; 3.0 K are wanted"}},
		{"steel wet", plain, 10, 6, 0.80, 1, Brush, []string{"steel 6.0 C is below the dew point 6.7 C: it is wet; 3.0 K above are wanted"}},
		{"humid", plain, 20, 25, 0.86, 1, Brush, []string{"humidity 86 % is above the greatest 85 %"}},
		{"just above 85 % does not read as 85", plain, 20, 25, 0.8501, 1, Brush, []string{"humidity 86 % is above the greatest 85 %"}},
		{"windy for spray", plain, 15, 15, 0.5, 8, "Air-Spray", []string{"wind 8.0 m/s is above the greatest 6.7 m/s for air spray"}},
		{"windy, but by brush", plain, 15, 15, 0.5, 8, Brush, nil},
		{"wind is not judged after application", plain, 15, 15, 0.5, 30, "", nil},
		{"no such method", plain, 15, 15, 0.5, 1, "mop", []string{`"mop" is no method that is known here; write brush, roller, airless or air spray`}},
		{"zinc silicate too dry: 30 C and 85 %, steel 40 C", silicate, 30, 40, 0.85, 1, Brush, []string{"humidity at the steel 48 % is below the 50 % that this paint cures with (air 85 %)"}},
		{"zinc silicate moist enough", silicate, 20, 20, 0.65, 1, Brush, nil},
		{"nothing known", plain, math.NaN(), math.Inf(1), 0, math.NaN(), Brush, []string{"air temperature is not known", "steel temperature is not known", "humidity is not known", "wind is not known"}},
		{"percent in place of a share", plain, 15, 15, 70, 1, Brush, []string{"humidity is not known"}},
	} {
		ok, reasons := MayApply(c.paint, c.air, c.steel, c.rh, c.wind, c.method)
		if ok != (len(c.reasons) == 0) || strings.Join(reasons, "|") != strings.Join(c.reasons, "|") {
			t.Errorf("%s: %v %q, want %q", c.name, ok, reasons, c.reasons)
		}
	}
}

// Frost settles sooner than dew would: below 0 C the frost point counts.
func TestFrost(t *testing.T) {
	p := Paint{ApplyMin: -10, ApplyMax: 40}
	if ok, reasons := MayApply(p, 0, 0.1, 0.80, 0, Brush); ok || !strings.Contains(reasons[0], "frost point -2.7 C") {
		t.Errorf("0 C, 80 %%, steel 0.1 C: %v %q, want closed by the frost point (psychrolib -2.68 C)", ok, reasons)
	}
}

// Worked out with Magnus: with steel as warm as the air, 3 K over the dew point closes before 85 %.
func TestSpreadClosesBeforeHumidity(t *testing.T) {
	p := plain
	p.ApplyMin = -5
	for c, want := range map[float64]float64{5: 0.810, 10: 0.816, 15: 0.823, 20: 0.829, 30: 0.840} {
		limit := 0.5
		for ok := true; ok; limit += 0.0005 {
			ok, _ = MayApply(p, c, c, limit, 0, Brush)
		}
		near(t, amount(c, "C"), limit-0.0005, want, 0.002)
	}
}

// Holding a blast: a spread of 17 to 25 F keeps surface humidity at 40 to 55 % (NACE 6A192/SSPC-TR 3).
func TestMayHold(t *testing.T) {
	steel := (70.0 - 32) / 1.8
	rh := func(spreadF float64) float64 { return RelativeHumidity(steel, steel-spreadF/1.8) }
	if ok, notes := MayHold(steel, steel, rh(20)); !ok || len(notes) != 0 {
		t.Errorf("spread of 20 F: %v %q, want held without advice", ok, notes)
	}
	if ok, notes := MayHold(steel, steel, rh(10)); !ok || len(notes) != 1 || !strings.Contains(notes[0], "rust bloom") {
		t.Errorf("spread of 10 F: %v %q, want held with advice", ok, notes)
	}
	if ok, notes := MayHold(steel, steel, rh(4)); ok || len(notes) != 1 {
		t.Errorf("spread of 4 F: %v %q, want not held", ok, notes)
	}
}

func TestWindLimit(t *testing.T) {
	p := Paint{WindMax: map[string]float64{"Air-Spray": 5}}
	if p.WindLimit(AirSpray) != 5 || p.WindLimit(Airless) != usualWind[Airless] || p.WindLimit("mop") != 0 {
		t.Errorf("limits %v %v %v", p.WindLimit(AirSpray), p.WindLimit(Airless), p.WindLimit("mop"))
	}
}

// An antifouling label: 10 to 32 C, humidity below 85 %, 10 C for 8 h after it, not late in the afternoon.
func TestAntifoulingLabel(t *testing.T) {
	p, _ := Defaults("self-polishing antifouling")
	p.ApplyMin, p.ApplyMax = 10, 32
	for _, c := range []struct {
		what           string
		air, steel, rh float64
		open           bool
	}{
		{"a spring noon", 14, 15, 0.65, true},
		{"late afternoon: the steel cools to the dew point", 11, 10, 0.84, false},
		{"cold", 9.5, 12, 0.5, false},
		{"sun on a dark hull", 25, 33, 0.5, false},
		{"damp", 16, 20, 0.86, false},
	} {
		if ok, reasons := MayApply(p, c.air, c.steel, c.rh, 1, Roller); ok != c.open {
			t.Errorf("%s: open %v %q", c.what, ok, reasons)
		}
	}
	if p.DryHours != 8 {
		t.Errorf("%v h to stay dry, the label says 8", p.DryHours)
	}
}

func TestLimits(t *testing.T) {
	p, _ := Defaults("zinc ethyl silicate")
	byName := map[string]origin.Figure{}
	for _, f := range p.Limits("airless") {
		byName[f.Name] = f
	}
	for name, want := range map[string]string{"steel at least": "5 C", "steel at most": "40 C", "steel above the dew point at least": "3 K",
		"humidity at most": "95 %", "humidity at the steel at least": "50 %", "wind at most by airless": "6.7 m/s", "dry and warm after it for": "8 h", "cold, dew, damp and wind kept off until": "touch dry"} {
		if got := byName[name].Amount(); got != want || byName[name].Origin.String() == "" {
			t.Errorf("%s: %q from %v, want %q", name, got, byName[name].Origin, want)
		}
	}
	bare := Paint{ApplyMin: 4, ApplyMax: 52}.Limits("brush")
	if len(bare) != 5 || bare[2].Origin.Kind != origin.Table || bare[3].Origin.Kind != origin.Memory {
		t.Errorf("a paint without limits of its own: %+v", bare)
	}
	if n := len(plain.Limits("mop")); n != 5 {
		t.Errorf("%d limits for no method, want 5", n)
	}
}

// What must hold until the film is dry: not how hot the steel is, nor how cold the air or how dry.
func TestMayStay(t *testing.T) {
	silicate, _ := Defaults("zinc ethyl silicate")
	for _, c := range []struct {
		name                 string
		paint                Paint
		air, steel, rh, wind float64
		says                 string
	}{
		{"fine", plain, 15, 15, 0.7, 3, ""},
		{"sun on it", plain, 20, 60, 0.5, 3, ""},
		{"cold air, warm steel", plain, 1, 8, 0.5, 3, ""},
		{"too dry for zinc silicate", silicate, 30, 40, 0.5, 3, ""},
		{"cold steel", plain, 5, 3, 0.3, 3, "steel 3.0 C is below the least 4.0 C (1.0 K short)"},
		{"2 K above the dew point", plain, 10, 8.7, 0.8, 1, "steel 8.7 C is only 2.0 K above the dew point 6.7 C; 3.0 K are wanted"},
		{"damp air", plain, 20, 25, 0.86, 1, "humidity 86 % is above the greatest 85 %"},
		{"gale", plain, 15, 15, 0.5, 11, "wind 11.0 m/s is above the greatest 10.0 m/s for brush"},
		{"nothing known", plain, 15, math.NaN(), 0.5, 1, "steel temperature is not known"},
	} {
		ok, reasons := MayStay(c.paint, c.air, c.steel, c.rh, c.wind, Brush)
		if ok != (c.says == "") || strings.Join(reasons, "|") != c.says {
			t.Errorf("%s: %v %q, want %q", c.name, ok, reasons, c.says)
		}
	}
	for steel, want := range map[float64]bool{-0.1: true, 0: false, 3: false} {
		if Freezes(plain, steel) != want || Freezes(Paint{ApplyMin: -5}, steel) {
			t.Errorf("frost at %v C: %v", steel, Freezes(plain, steel))
		}
	}
	for _, until := range Untils() {
		if p := (Paint{LimitsUntil: until}); p.HeldUntil() != until {
			t.Errorf("limits hold until %q, want %q", p.HeldUntil(), until)
		}
	}
	if p := primer(); p.HeldUntil() != "touch dry" {
		t.Errorf("limits hold until %q", p.HeldUntil())
	}
	p := primer()
	p.LimitsUntil = "christmas"
	if err := p.Validate(); err == nil || hint(err) == "" {
		t.Error("limits until christmas are taken")
	}
}

// Worse air never opens a closed hour: damper, windier, colder steel.
func TestMayApplyLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		air, steel := rapid.Float64Range(-10, 40).Draw(t, "air"), rapid.Float64Range(-10, 51).Draw(t, "steel")
		rh, wind := rapid.Float64Range(0.1, 1).Draw(t, "rh"), rapid.Float64Range(0, 15).Draw(t, "wind")
		method := rapid.SampledFrom(Methods()).Draw(t, "method")
		open, reasons := MayApply(plain, air, steel, rh, wind, method)
		if open == (len(reasons) > 0) {
			t.Fatalf("open %v with reasons %q", open, reasons)
		}
		if open {
			return
		}
		worse := []float64{rapid.Float64Range(0, 3).Draw(t, "colder"), rapid.Float64Range(0, 1-rh).Draw(t, "damper"), rapid.Float64Range(0, 5).Draw(t, "windier")}
		if steel <= plain.ApplyMax {
			if ok, _ := MayApply(plain, air, steel-worse[0], math.Min(1, rh+worse[1]), wind+worse[2], method); ok {
				t.Fatalf("closed by %q, and open in worse air", reasons)
			}
		}
	})
}
