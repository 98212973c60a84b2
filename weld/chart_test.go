package weld

import (
	"strings"
	"testing"

	"sailby/tasks/origin"
)

// butt40 is 40 mm of single V with 111 at 1.5 kJ/mm and 5 ml/100 g (scale D): combined thickness 80 mm.
func butt40() Seam {
	return Seam{Joint: Joint{Type: SingleV, Thickness: 40, Length: 1000}, Procedure: &Procedure{Process: 111, Hydrogen: 5, Current: 180, Volts: 25, Travel: 144}}
}

// TestMethodAAsksForItsChart: EN 1011-2 method A is charts, which are not here. Without a reading the note says
// with what to enter; a reading holds for a seam that asks for no more, and the least of those that hold is
// taken; its origin is told.
func TestMethodAAsksForItsChart(t *testing.T) {
	read := func(ce, combined, heat float64, scale string, warm float64) ChartReading {
		return ChartReading{CE: ce, Combined: combined, Heat: heat, Scale: scale, Preheat: warm, Origin: origin.Origin{File: "job.yaml", Line: 9}}
	}
	good := read(0.45, 100, 1.2, "C", 100)
	for _, c := range []struct {
		name  string
		chart []ChartReading
		want  float64
		warns string
	}{
		{"no reading", nil, 0, "enter with CE 0.43, combined thickness 80 mm, hydrogen scale D, 1.50 kJ/mm"},
		{"a reading that covers", []ChartReading{good}, 100, ""},
		{"the least of two that cover", []ChartReading{good, read(0.43, 80, 1.5, "D", 75)}, 75, ""},
		{"whatever the seam has", []ChartReading{{Preheat: 60}}, 60, ""},
		{"the chart asks for none", []ChartReading{{Preheat: None}}, 0, ""},
		{"less CE", []ChartReading{read(0.42, 100, 1.2, "C", 100)}, 0, "none of the readings"},
		{"thinner", []ChartReading{read(0.45, 79, 1.2, "C", 100)}, 0, "none of the readings"},
		{"hotter", []ChartReading{read(0.45, 100, 1.6, "C", 100)}, 0, "none of the readings"},
		{"drier", []ChartReading{read(0.45, 100, 1.2, "E", 100)}, 0, "none of the readings"},
	} {
		e := mustWork(t, Circumstances{PreheatStandard: "EN 1011-2 A", Steel: Steel{CEV: 0.43}, Chart: c.chart}, butt40())
		near(t, c.name, e.Seams[0].Preheat, c.want, 0)
		all := strings.Join(e.Warnings, "|")
		if c.warns == "" && all != "" || !strings.Contains(all, c.warns) {
			t.Errorf("%s: warns %q, want %q", c.name, all, c.warns)
		}
		if e.Why.Combined.Value != 80 || e.Why.Scale.Text != "D" {
			t.Errorf("%s: combined thickness %v, scale %q", c.name, e.Why.Combined.Value, e.Why.Scale.Text)
		}
		for _, f := range e.Steps() {
			checkTree(t, f)
		}
	}
	e := mustWork(t, Circumstances{PreheatStandard: "EN 1011-2 A", Steel: Steel{CEV: 0.43}, Chart: []ChartReading{good}}, butt40())
	if o := e.Why.Preheat.Origin.String(); o != "job.yaml:9 read from the chart at CE 0.45, combined thickness 100 mm, scale C, 1.2 kJ/mm" {
		t.Errorf("preheat comes from %q", o)
	}
}

func TestMethodARange(t *testing.T) {
	a := Circumstances{PreheatStandard: "EN 1011-2 A", Chart: []ChartReading{{Preheat: 150}}}
	for want, s := range map[string]Steel{"CE 0.75 is above the 0.70": {CEV: 0.75}, "0.30 % of carbon is above the 0.25 %": {C: 0.30, Mn: 1}, "": {C: 0.2, Mn: 1.4}} {
		a.Steel = s
		if all := strings.Join(mustWork(t, a, butt40()).Warnings, "|"); want == "" && all != "" || !strings.Contains(all, want) {
			t.Errorf("%+v: %q, want %q", s, all, want)
		}
	}
	thin := mustWork(t, Circumstances{PreheatStandard: "EN 1011-2 A"}, Seam{Joint: Joint{Type: Fillet, Leg: 5, Thickness: 6, Length: 1000}})
	if len(thin.Warnings) > 0 || thin.Why.Combined.Name != "" {
		t.Errorf("plain thin steel: %q", thin.Warnings)
	}
	for _, r := range []ChartReading{{Scale: "F"}, {Scale: "AB"}, {CE: 9}, {Combined: -4}, {Heat: 90}, {Preheat: 900}} {
		_, err := Work([]Seam{butt40()}, Circumstances{Chart: []ChartReading{r}})
		if err == nil || hintOf(err) == "" {
			t.Errorf("%+v is taken", r)
		}
	}
	near(t, "lap", Joint{Type: Lap, Thickness: 10, Thickness2: 12}.CombinedThickness(), 34, 0)
	near(t, "butt", Joint{Type: SingleV, Thickness: 10, Thickness2: 12}.CombinedThickness(), 22, 0)
}

// TestRangesAreNamed: each method says which figure is outside and what it holds for (EN 1011-2 C.3 from memory;
// AWS D1.1:2015 Table 3.3 begins at 3 mm and ends with its third column of steels).
func TestRangesAreNamed(t *testing.T) {
	thick := func(mm float64) Seam {
		return Seam{Joint: Joint{Type: SingleV, Thickness: mm, Length: 1000}, Procedure: &Procedure{Process: 111}}
	}
	heavy := thick(30)
	heavy.Procedure = &Procedure{Process: 121, Current: 900, Volts: 35, Travel: 250}
	for _, c := range []struct {
		name, std string
		steel     Steel
		s         Seam
		want      string
	}{
		{"CET", "EN 1011-2 B", Steel{Cet: 0.55}, thick(30), "CET 0.55 outside 0.2 to 0.5"},
		{"thickness", "EN 1011-2 B", Steel{Cet: 0.3}, thick(120), "thickness 120 outside 10 to 90 mm"},
		{"hydrogen", "EN 1011-2 B", Steel{Cet: 0.3, Hydrogen: 25}, thick(30), "hydrogen 25 outside 1 to 20 ml/100 g"},
		{"heat input", "EN 1011-2 B", Steel{Cet: 0.3}, heavy, "outside 0.5 to 4 kJ/mm"},
		{"thin but hard", "EN 1011-2 B", Steel{Cet: 0.45}, thick(8), "8 mm is thinner than the 10 mm"},
		{"thin", "EN 1011-2 B", Steel{Cet: 0.26}, thick(8), ""},
		{"inside", "EN 1011-2 B", Steel{Cet: 0.3}, thick(30), ""},
		{"AWS sheet", "AWS D1.1", Steel{}, thick(2.5), "thinner than the 3 mm"},
		{"AWS strength", "AWS D1.1", Steel{Grade: "S690QL"}, thick(20), "a yield of 690 N/mm2 is above"},
		{"AWS", "AWS D1.1", Steel{Grade: "S460N"}, thick(20), ""},
	} {
		e := mustWork(t, Circumstances{PreheatStandard: c.std, Steel: c.steel}, c.s)
		if all := strings.Join(e.Warnings, "|"); c.want == "" && all != "" || !strings.Contains(all, c.want) {
			t.Errorf("%s: %q, want %q", c.name, all, c.want)
		}
	}
}
