package quantity

import (
	"errors"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func near(a, b float64) bool { return math.Abs(a-b) <= 1e-12*math.Max(1, math.Abs(b)) }

// Wanted values are exact by definition: inch 25.4 mm, pound 0.45359237 kg, US gallon 3.785411784 L,
// knot 1852 m/h, mile 1609.344 m (international agreements of 1959 and 1929); the rest is arithmetic.
func TestParse(t *testing.T) {
	for _, c := range []struct {
		text string
		d    Dim
		want float64
	}{
		{"6 mm", Length, 6}, {"6mm", Length, 6}, {" 3.2 m ", Length, 3200}, {"1/4 in", Length, 6.35}, {"2 1/2 in", Length, 63.5}, {"-2 1/2 in", Length, -63.5},
		{"12 ft", Length, 3657.6}, {"6\u00a0mm", Length, 6}, {".5 m", Length, 500}, {"+4 mm", Length, 4}, {"-4 mm", Length, -4},
		{"410 kg", Mass, 410}, {"1.5 t", Mass, 1500}, {"10 lb", Mass, 4.5359237}, {"250 g", Mass, 0.25},
		{"4 h", Time, 240}, {"1 h 30 min", Time, 90}, {"2 d 4 h", Time, 3120}, {"1 d 2 h 3 min 30 s", Time, 1563.5}, {"90 s", Time, 1.5}, {"2 days", Time, 2880}, {"1 hour", Time, 60},
		{"0 h 30 min", Time, 30}, {"1/2 h", Time, 30}, {"0 min", Time, 0},
		{"10 C", Temperature, 10}, {"50 F", Temperature, 10}, {"-40 F", Temperature, -40}, {"5 °C", Temperature, 5},
		{"35 %", Percent, 0.35}, {"35%", Percent, 0.35}, {"7.5 kVA", Power, 7.5}, {"800 VA", Power, 0.8},
		{"100 um", Film, 100}, {"4 mil", Film, 101.6}, {"0.1 mm", Film, 100}, {"1 US gal", Volume, 3.785411784}, {"20 L", Volume, 20},
		{"300 mm/min", Travel, 300}, {"12 in/min", Travel, 304.8}, {"18 m/h", Travel, 300}, {"9 m/min", Feed, 9}, {"35 km/h", Speed, 35 / 3.6}, {"10 kn", Speed, 18520.0 / 3600},
		{"1 mph", Speed, 1609.344 / 3600}, {"60 deg", Angle, 60}, {"16 L/min", Flow, 16}, {"2 kJ/mm", HeatInput, 2}, {"50.8 kJ/in", HeatInput, 2}, {"3", Number, 3}, {"2/3", Number, 2.0 / 3},
	} {
		if got, err := Parse(c.text, c.d); err != nil || !near(got, c.want) {
			t.Errorf("%q as %s: %v (%v), want %v", c.text, c.d, got, err, c.want)
		}
	}
}

func TestParseRefuses(t *testing.T) {
	for _, c := range []struct {
		text string
		d    Dim
		is   error
		says string
		hint string
	}{
		{"6", Length, ErrNoUnit, `"6" has no unit; expected a length in mm, cm, m, km, in or ft`, "for instance 6 mm"},
		{"", Mass, ErrNoUnit, "found nothing", "410 kg"}, {"1/4", Length, ErrNoUnit, "has no unit", "6 mm"},
		{"2,5 h", Time, ErrComma, "decimal comma", "write 2.5 h"}, {"1,000 mm", Length, ErrComma, "decimal comma", "write 1000 mm, or 1.000 mm if a decimal is meant"},
		{"3, 4,5 h", Time, ErrComma, "decimal comma", "4.5"},
		{"6 kg", Length, ErrUnit, `"kg" is not a unit for a length`, "mm"}, {"6 hr", Time, ErrUnit, `"hr" is not a unit`, "did you mean 6 h?"}, {"2 KG", Mass, ErrUnit, "is not a unit", "did you mean 2 kg?"},
		{"3 feet", Length, ErrUnit, "is not a unit", "did you mean 3 ft?"}, {"3-5 h", Time, ErrUnit, "has a dash between two numbers", "write a range with the word to: 3 to 5 h"}, {"3 - 5 h", Time, ErrUnit, "dash", "3 to 5 h"},
		{"six mm", Length, nil, `found "six mm"`, "6 mm"}, {"NaN mm", Length, nil, "found", "mm"}, {"Inf mm", Length, nil, "found", "mm"}, {"1e3 mm", Length, ErrUnit, "is not a unit", "mm"},
		{"0x10 mm", Length, ErrUnit, "is not a unit", "mm"}, {"1.2.3 mm", Length, nil, "found", "mm"}, {"1/0 mm", Length, nil, "found", "mm"}, {"1/-2 mm", Length, nil, "found", "mm"},
		{"9999999999999 mm", Length, nil, "out of all proportion", ""}, {"3 mm", Number, ErrUnit, "expected a plain number", "alone"}, {"30 min 1 h", Time, nil, "is not a unit", ""},
		{"1 h -5 min", Time, nil, "is not a unit", ""}, {"1 h 30", Time, nil, "is not a unit", ""}, {"1 h 2 h", Time, nil, "is not a unit", ""}, {"5 K", Temperature, ErrUnit, "is not a unit", "10 C"},
	} {
		got, err := Parse(c.text, c.d)
		if err == nil || got != 0 || c.is != nil && !errors.Is(err, c.is) || !strings.Contains(err.Error(), c.says) || !strings.Contains(Hint(err), c.hint) {
			t.Errorf("%q as %s: %v, %v, hint %q; want %q with hint %q", c.text, c.d, got, err, Hint(err), c.says, c.hint)
		}
	}
	if Hint(nil) != "" || Hint(errors.New("x")) != "" {
		t.Error("another error has a hint")
	}
}

func TestParseRange(t *testing.T) {
	for _, c := range []struct {
		text string
		d    Dim
		want Range
	}{
		{"4 h", Time, Range{240, 240, 240}}, {"3 to 5 h", Time, Range{180, 240, 300}}, {"30 min to 1 h 30 min", Time, Range{30, 60, 90}}, {"3 mm to 20 mm", Length, Range{3, 11.5, 20}},
		{"1/4 to 3/4 in", Length, Range{6.35, 12.7, 19.05}}, {"50 to 68 F", Temperature, Range{10, 15, 20}}, {"2 to 2 h", Time, Range{120, 120, 120}},
	} {
		got, err := ParseRange(c.text, c.d)
		if err != nil || !near(got.Low, c.want.Low) || !near(got.Likely, c.want.Likely) || !near(got.High, c.want.High) {
			t.Errorf("%q: %v (%v), want %v", c.text, got, err, c.want)
		}
	}
	for text, says := range map[string]string{
		"5 to 3 h": "runs from more to less", "3 to 5": "has no unit", "3 to x h": "found", "x to 3 h": "found", "3 kg to 5 h": "is not a unit", "1 to 1 h 30 min": `"1" has no unit`, " to 5 h": "", "3 to ": "", "3 to 5 to 7 h": "",
	} {
		if got, err := ParseRange(text, Time); err == nil || got != (Range{}) || !strings.Contains(err.Error(), says) {
			t.Errorf("%q: %v, %v, want %q", text, got, err, says)
		}
	}
}

func TestRange(t *testing.T) {
	r := Range{1, 2, 4}
	if !Sure(3).IsSure() || r.IsSure() || !(Range{}).Zero() || r.Zero() || r.Scale(2) != (Range{2, 4, 8}) {
		t.Error("ranges are not what they say")
	}
}

func TestSpans(t *testing.T) {
	for m, want := range map[int][2]string{
		0: {"0 min", "0 min"}, 45: {"45 min", "45 min"}, 60: {"1 h", "1 h"}, 90: {"1 h 30 min", "1 h 30 min"}, 2879: {"47 h 59 min", "47 h 59 min"}, 2880: {"2 d", "48 h"},
		3120: {"2 d 4 h", "52 h"}, 2881: {"2 d 1 min", "48 h 1 min"}, -90: {"-1 h 30 min", "-1 h 30 min"},
	} {
		if Span(m) != want[0] || Hours(m) != want[1] {
			t.Errorf("%d min: %q and %q, want %q and %q", m, Span(m), Hours(m), want[0], want[1])
		}
	}
}

func TestWhole(t *testing.T) {
	for v, want := range map[float64]int{0: 0, 0.1: 1, 59.9999999: 60, 60: 60, 60.0000001: 60, 60.01: 61} {
		if HandsOn(v).Whole() != want || Clock(v).Whole() != want {
			t.Errorf("%v: %d, want %d", v, HandsOn(v).Whole(), want)
		}
	}
}

func TestDims(t *testing.T) {
	for d := Number; d <= LineMass; d++ {
		if d.String() == "" {
			t.Errorf("dimension %d has no name", d)
		}
		if d != Number && (d.Base() == "" || d.UnitList() == "" || len(d.Units()) == 0) {
			t.Errorf("%s has no units", d)
		}
		if d != Number {
			if v, err := Parse("1 "+d.Base(), d); err != nil || d != Percent && v != 1 {
				t.Errorf("1 %s is %v (%v)", d.Base(), v, err)
			}
		}
	}
	if got := Time.UnitList(); got != "min, h, d or s" {
		t.Errorf("times are written in %s", got)
	}
}

// What is written with a unit is read back, and in another unit it is the same amount.
func TestUnitsAgree(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := Dim(rapid.IntRange(int(Length), int(LineMass)).Draw(t, "dim"))
		u := units[d][rapid.IntRange(0, len(units[d])-1).Draw(t, "unit")]
		n := rapid.IntRange(0, 9999).Draw(t, "n")
		text := itoa(n) + " " + u.name
		got, err := Parse(text, d)
		if want := float64(n)*u.scale + u.shift; err != nil || math.Abs(got-want) > 1e-9*math.Max(1, math.Abs(want)) {
			t.Fatalf("%q is %v (%v), want %v", text, got, err, want)
		}
	})
}

func itoa(n int) string {
	if n < 10 {
		return string(rune('0' + n))
	}
	return itoa(n/10) + string(rune('0'+n%10))
}

// Spans are read back as the same minutes.
func TestSpanReadsBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := rapid.IntRange(0, 100000).Draw(t, "minutes")
		for _, s := range []string{Span(m), Hours(m)} {
			if got, err := Parse(s, Time); err != nil || math.Abs(got-float64(m)) > 1e-9 {
				t.Fatalf("%d min is written %q and read as %v (%v)", m, s, got, err)
			}
		}
	})
}

func FuzzParse(f *testing.F) {
	for _, s := range []string{"6 mm", "1/4 in", "3 to 5 h", "1 h 30 min", "2 1/2 in", "2,5 h", "-", "1/", "5 to", "NaN", "1e999 h"} {
		f.Add(s, uint8(Time))
		f.Add(s, uint8(Length))
	}
	f.Fuzz(func(t *testing.T, s string, dim uint8) {
		d := Dim(dim) % (LineMass + 1)
		v, err := Parse(s, d)
		if err != nil && (v != 0 || err.Error() == "") || math.IsNaN(v) || math.IsInf(v, 0) {
			t.Fatalf("%q: %v, %v", s, v, err)
		}
		r, err := ParseRange(s, d)
		if err == nil && !(r.Low <= r.Likely && r.Likely <= r.High) || err != nil && r != (Range{}) {
			t.Fatalf("%q: %v, %v", s, r, err)
		}
	})
}
