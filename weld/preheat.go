package weld

import (
	"fmt"
	"math"
	"strings"

	"sailby/tasks/origin"
)

// preheatB is EN 1011-2 Annex C.3 (method B), from memory.
const preheatB = "697 x CET + 160 x tanh(thickness / 35) + 62 x hydrogen^0.35 + (53 x CET - 32) x heat input - 328"

// PreheatB gives the preheat of EN 1011-2 method B in C for CET in percent, thickness in mm,
// hydrogen in ml/100 g and heat input in kJ/mm. Below 0 nothing is wanted. in is false outside
// the method's range: CET 0.2 to 0.5, 10 to 90 mm, 1 to 20 ml/100 g, 0.5 to 4.0 kJ/mm; the value
// is then the formula's at the nearest end and proves nothing. Where the weld metal's CET plus
// 0.03 is above the plate's, that is the CET to give (SSAB Welding Handbook p. 23).
func PreheatB(cet, thickness, hydrogen, heat float64) (f origin.Figure, in bool) {
	in = true
	clip := func(name string, v, lo, hi float64, unit string) origin.Figure {
		if !(v >= lo) {
			in, v = false, lo
		} else if v > hi {
			in, v = false, hi
		}
		return origin.Written(name, v, unit, origin.Origin{})
	}
	c := clip("CET", cet, 0.2, 0.5, "%")
	d := clip("thickness", thickness, 10, 90, "mm")
	h := clip("hydrogen", hydrogen, 1, 20, "ml/100 g")
	q := clip("heat input", heat, 0.5, 4, "kJ/mm")
	v := 697*c.Value + 160*math.Tanh(d.Value/35) + 62*math.Pow(h.Value, 0.35) + (53*c.Value-32)*q.Value - 328
	return origin.Worked("preheat", v, "C", preheatB, c, d, h, q), in
}

// PreheatAWS gives the least preheat and interpass temperature in C of AWS D1.1:2015 Table 3.3
// for a category (A: electrodes that are not low-hydrogen; B: low-hydrogen 111, and 121, 135,
// 136; C: the higher-strength steels of the third column) and the thickest part in mm.
//
// Errors: a *Error for another category or a thickness below 3 mm, where the table begins.
func PreheatAWS(category string, thickness float64) (origin.Figure, error) {
	if err := within("thickness", thickness, 3, maxThick, "mm"); err != nil {
		return origin.Figure{}, err
	}
	row := 3
	for i, most := range []float64{20, 38, 65} {
		if thickness <= most {
			row = i
			break
		}
	}
	rows, ok := map[string][4]float64{
		"A": {0, 65, 110, 150}, "B": {0, 10, 65, 110}, "C": {10, 65, 110, 150},
	}[strings.ToUpper(strings.TrimSpace(category))]
	if !ok {
		return origin.Figure{}, fault("category", "A, B or C", "AWS D1.1 has no preheat category %q here", category)
	}
	return origin.Published("preheat", rows[row], "C", "AWS D1.1:2015 Table 3.3, category "+strings.ToUpper(category)), nil
}

// CombinedThickness gives the combined thickness of EN 1011-2 method A in mm: the sum of the
// parts that lead heat away, averaged over 75 mm from the weld. A butt has two, a T fillet three
// paths (the through plate counts twice).
func (j Joint) CombinedThickness() float64 {
	t1 := j.Thickness
	t2 := j.Thickness2
	if t2 == 0 {
		t2 = t1
	}
	if j.Type == Fillet {
		return t1 + 2*math.Max(t1, t2)
	}
	return t1 + t2
}

// preheat decides the preheat: the procedure's governs; else the standard that the job names.
func (e *seamWork) preheat(c Circumstances) {
	p := e.proc
	std := c.PreheatStandard
	if std == "" && strings.HasPrefix(c.Execution, "AWS") {
		std = "AWS D1.1"
	}
	thick := e.thicker().Value
	var rule origin.Figure
	switch strings.ToLower(strings.TrimSpace(std)) {
	case "":
	case "aws d1.1":
		rule = e.preheatAWS(c, thick)
	case "en 1011-2 b", "en 1011-2", "en 1011-2 method b":
		rule = e.preheatB(c, thick)
	case "en 1011-2 a", "en 1011-2 method a":
		e.preheatA(c)
		if c.Steel.CET().Value > 0 {
			rule = e.preheatB(c, thick)
		}
	}
	switch {
	case p.Preheat == None:
		e.heatTo = origin.Written("preheat", 0, "C", p.Origins["preheat"])
	case p.Preheat > 0:
		e.heatTo = p.given("preheat", p.Preheat, "C")
	default:
		e.heatTo = rule
	}
	if p.Preheat != 0 && rule.Value > e.heatTo.Value+0.5 && rule.Value > c.Ambient {
		e.warnf("the procedure preheats to %.0f C, %s asks for %.0f C: the procedure governs, ask who wrote it", e.heatTo.Value, std, rule.Value)
	}
	if c.Ambient < 0 && e.heatTo.Value < 20 {
		e.heatTo = origin.Recalled("preheat", 20, "C", "AWS D1.1: metal below 0 C is warmed to 20 C")
	}
}

func (e *seamWork) preheatAWS(c Circumstances, thick float64) origin.Figure {
	cat := "B"
	if e.hydrogen(c.Steel).Value > 15 && e.data.stick {
		cat = "A"
	}
	if c.Steel.yield() > 400 {
		cat = "C"
	}
	if c.Steel.quenched() {
		e.warnf("%s is quenched and tempered: AWS D1.1 leaves its preheat to the producer, give it in the procedure", c.Steel.Grade)
	}
	f, err := PreheatAWS(cat, thick)
	if err != nil {
		return origin.Figure{}
	}
	return f
}

func (e *seamWork) preheatB(c Circumstances, thick float64) origin.Figure {
	cet := c.Steel.CET()
	if cet.Value == 0 && thick < 10 { // below the method's range: plain thin steel
		return origin.Figure{}
	}
	if cet.Value == 0 {
		e.warnf("method B of EN 1011-2 wants the CET: give it, or the analysis, with the steel; no preheat is reckoned until then")
		return origin.Figure{}
	}
	f, in := PreheatB(cet.Value, thick, e.hydrogen(c.Steel).Value, e.heat.Value)
	if !in && thick >= 10 {
		e.warnf("outside the range of EN 1011-2 method B (CET 0.2 to 0.5, 10 to 90 mm, 1 to 20 ml/100 g, 0.5 to 4 kJ/mm): its %.0f C is no proof", f.Value)
	}
	if thick < 10 || f.Value < 20 {
		return origin.Figure{}
	}
	for i, made := range []origin.Figure{cet, e.thicker(), e.hydrogen(c.Steel), e.heat} {
		if f.From[i].Value == made.Value { // not brought into the method's range
			f.From[i] = made
		}
	}
	return f
}

// preheatA says what method A's charts are entered with; they are curves in the standard.
func (e *seamWork) preheatA(c Circumstances) {
	h := e.hydrogen(c.Steel).Value
	e.warnf("EN 1011-2 method A is read from the standard's charts: enter with CE %s, combined thickness %.0f mm, hydrogen scale %s, %.2f kJ/mm, and write the reading as the procedure's preheat; method B stands in where the CET is known",
		shown(c.Steel.CE().Value), e.joint.CombinedThickness(), hydrogenScale(h), e.heat.Value)
}

func shown(v float64) string {
	if v == 0 {
		return "(not given)"
	}
	return fmt.Sprintf("%.2f", v)
}
