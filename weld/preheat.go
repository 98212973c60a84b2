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
	f, out := preheatOf(cet, thickness, hydrogen, heat)
	return f, out == ""
}

// preheatOf is PreheatB, and says in words which figures are outside the method's range.
func preheatOf(cet, thickness, hydrogen, heat float64) (f origin.Figure, out string) {
	var outside []string
	clip := func(name string, v, lo, hi float64, unit string) origin.Figure {
		if !(v >= lo && v <= hi) {
			outside = append(outside, strings.TrimSpace(fmt.Sprintf("%s %s outside %g to %g %s", name, origin.Trim(v), lo, hi, unit)))
			v = math.Max(lo, math.Min(hi, v))
		}
		return origin.Written(name, v, unit, origin.Origin{})
	}
	c := clip("CET", cet, 0.2, 0.5, "%")
	d := clip("thickness", thickness, 10, 90, "mm")
	h := clip("hydrogen", hydrogen, 1, 20, "ml/100 g")
	q := clip("heat input", heat, 0.5, 4, "kJ/mm")
	v := 697*c.Value + 160*math.Tanh(d.Value/35) + 62*math.Pow(h.Value, 0.35) + (53*c.Value-32)*q.Value - 328
	return origin.Worked("preheat", v, "C", preheatB, c, d, h, q), strings.Join(outside, ", ")
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
