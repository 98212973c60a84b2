package weld

import (
	"fmt"
	"math"
	"strings"

	"sailby/tasks/origin"
)

// ChartReading is one reading that the user took from a chart of EN 1011-2 method A. The charts
// are curves in the standard and are not here; a reading holds for every seam that asks for no
// more of the chart: a CE and a combined thickness not above its own, a hydrogen scale not worse,
// a heat input not below. Zero, or no scale, is that of the seam.
type ChartReading struct {
	CE       float64 // CE(IIW), percent
	Scale    string  // hydrogen scale, A (most) to E
	Combined float64 // mm
	Heat     float64 // kJ/mm
	Preheat  float64 // C that the chart gives; None for none
	Origin   origin.Origin
}

func (r ChartReading) check() error {
	warm := r.Preheat
	if warm == None {
		warm = 0
	}
	if s := strings.ToUpper(r.Scale); s != "" && (len(s) != 1 || s < "A" || s > "E") {
		return fault("chart", "A, B, C, D or E", "no hydrogen scale %q", r.Scale)
	}
	return first(optional("CE", r.CE, 0.05, 2, ""), optional("combined thickness", r.Combined, 1, 1000, "mm"),
		optional("heat input", r.Heat, 0.05, 20, "kJ/mm"), optional("chart preheat", warm, 5, 400, "C"))
}

// covers says whether the reading holds for a seam.
func (r ChartReading) covers(ce, combined, heat float64, scale string) bool {
	return (r.CE == 0 || ce <= r.CE+1e-9) && (r.Combined == 0 || combined <= r.Combined+1e-9) &&
		(r.Heat == 0 || heat >= r.Heat-1e-9) && (r.Scale == "" || scale >= strings.ToUpper(r.Scale))
}

// String gives the reading as a line.
func (r ChartReading) String() string {
	var at []string
	add := func(v float64, format string) {
		if v != 0 {
			at = append(at, fmt.Sprintf(format, v))
		}
	}
	add(r.CE, "CE %.3g")
	add(r.Combined, "combined thickness %.3g mm")
	if r.Scale != "" {
		at = append(at, "scale "+strings.ToUpper(r.Scale))
	}
	add(r.Heat, "%.3g kJ/mm")
	return strings.Join(at, ", ")
}

// The steels that the charts hold for (from memory of EN 1011-2 Annex C.2).
const mostCE, mostCarbon = 0.70, 0.25

// CombinedThickness gives the combined thickness of EN 1011-2 method A in mm: the sum of the
// parts that lead heat away, averaged over 75 mm from the weld. A butt or a corner has two paths, a T
// fillet or a lap three (the through plate counts twice).
func (j Joint) CombinedThickness() float64 {
	t1 := j.Thickness
	t2 := j.Thickness2
	if t2 == 0 {
		t2 = t1
	}
	if j.Type == Fillet || j.Type == Lap {
		return t1 + 2*math.Max(t1, t2)
	}
	return t1 + t2
}

// preheatA takes the preheat from the readings of the charts: the least of those that hold for
// the seam. Where none does, it says with what to enter the chart; method B stands in where the
// CET is known.
func (e *seamWork) preheatA(c Circumstances, thick float64) origin.Figure {
	ce := c.Steel.CE()
	if ce.Value == 0 && c.Steel.CET().Value == 0 && thick < leastB && len(c.Chart) == 0 { // plain thin steel
		return origin.Figure{}
	}
	ml := e.hydrogen(c.Steel)
	scale := hydrogenScale(ml.Value)
	e.combined = e.combinedFigure()
	e.scale = origin.Word("hydrogen scale", scale, origin.Origin{Kind: origin.Memory, Source: "EN 1011-2: A above 15, B to 15, C to 10, D to 5, E to 3 ml/100 g"})
	e.scale.From = []origin.Figure{ml}
	if ce.Value > mostCE {
		e.warnf("CE %.2f is above the %.2f to which the charts of EN 1011-2 method A go (from memory): a reading is no proof", ce.Value, mostCE)
	}
	if c.Steel.C > mostCarbon {
		e.warnf("%.2f %% of carbon is above the %.2f %% of the steels that EN 1011-2 method A holds for (from memory): a reading is no proof", c.Steel.C, mostCarbon)
	}
	best := -1
	for i, r := range c.Chart {
		if (r.CE == 0 || ce.Value > 0) && r.covers(ce.Value, e.combined.Value, e.heat.Value, scale) && (best < 0 || r.Preheat < c.Chart[best].Preheat) {
			best = i
		}
	}
	if best >= 0 {
		r := c.Chart[best]
		f := origin.Written("preheat", math.Max(r.Preheat, 0), "C", r.Origin)
		if f.Origin.Source == "" || r.Origin.Line > 0 {
			f.Origin.Source = strings.TrimSpace("read from the chart at " + r.String())
		}
		f.From = []origin.Figure{e.combined, e.scale, e.heat}
		if ce.Value > 0 {
			f.From = append([]origin.Figure{ce}, f.From...)
		}
		return f
	}
	why := "write the reading into the job, or as the procedure's preheat"
	if len(c.Chart) > 0 {
		why = "none of the readings given holds for that"
	}
	e.warnf("EN 1011-2 method A is read from the standard's charts: enter with CE %s, combined thickness %s mm, hydrogen scale %s, %.2f kJ/mm; %s; method B stands in where the CET is known",
		shown(ce.Value), origin.Trim(e.combined.Value), scale, e.heat.Value, why)
	if c.Steel.CET().Value == 0 {
		return origin.Figure{}
	}
	return e.preheatB(c, thick)
}

func (e *seamWork) combinedFigure() origin.Figure {
	j := e.joint
	v := j.CombinedThickness()
	how := "thickness + second thickness"
	if j.Type == Fillet || j.Type == Lap {
		how = "thickness + 2 x max(thickness, second thickness)"
	}
	return origin.Worked("combined thickness", v, "mm", how, j.drawn("thickness", j.Thickness, "mm"), j.drawn("second thickness", j.Thickness2, "mm"))
}

func shown(v float64) string {
	if v == 0 {
		return "(not given)"
	}
	return fmt.Sprintf("%.2f", v)
}
