package weld

import (
	"math"
	"strings"

	"sailby/tasks/origin"
)

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
		rule = e.preheatA(c, thick)
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
	if std == "" && p.Preheat == 0 && (thick > unasked || c.Steel.yield() > 420) {
		e.warnf("no preheat is reckoned for %s of %.4g mm: the procedure gives none, and no standard is named to work it out by (preheat by)", c.Steel.word(), thick)
	}
	if c.Ambient < 0 && e.heatTo.Value < 20 {
		e.heatTo = origin.Recalled("preheat", 20, "C", "AWS D1.1: metal below 0 C is warmed to 20 C")
	}
}

// unasked is the thickness in mm above which preheat is worth a word where nothing asks for it: the
// first step of AWS D1.1 Table 3.3.
const unasked = 20.0

func (s Steel) word() string {
	if s.Grade != "" {
		return s.Grade
	}
	return "steel"
}

// What AWS D1.1 Table 3.3 holds for here: from 3 mm, and to the steels of its third column.
const (
	awsLeast = 3.0   // mm
	awsYield = 460.0 // N/mm2: A572-60/65 and the like, with S460 beside them (house judgement)
)

func (e *seamWork) preheatAWS(c Circumstances, thick float64) origin.Figure {
	cat := "B"
	if e.hydrogen(c.Steel).Value > 15 && e.data.stick {
		cat = "A"
	}
	if c.Steel.yield() > 400 {
		cat = "C"
	}
	switch {
	case c.Steel.quenched():
		e.warnf("%s is quenched and tempered: AWS D1.1 leaves its preheat to the producer, give it in the procedure", c.Steel.Grade)
	case c.Steel.yield() > awsYield:
		e.warnf("a yield of %.0f N/mm2 is above the steels of AWS D1.1 Table 3.3 (its third column, to about %.0f): give the preheat in the procedure", c.Steel.yield(), awsYield)
	}
	if thick < awsLeast {
		e.warnf("%.3g mm is thinner than the %.0f mm at which AWS D1.1 Table 3.3 begins: no preheat is taken from it", thick, awsLeast)
		return origin.Figure{}
	}
	f, err := PreheatAWS(cat, thick)
	if err != nil {
		return origin.Figure{}
	}
	return f
}

const leastB = 10.0 // mm at which method B begins

func (e *seamWork) preheatB(c Circumstances, thick float64) origin.Figure {
	cet := c.Steel.CET()
	if cet.Value == 0 && thick < leastB { // plain thin steel
		return origin.Figure{}
	}
	if cet.Value == 0 {
		e.warnf("method B of EN 1011-2 wants the CET: give it, or the analysis, with the steel; no preheat is reckoned until then")
		return origin.Figure{}
	}
	f, out := preheatOf(cet.Value, math.Max(thick, leastB), e.hydrogen(c.Steel).Value, e.heat.Value)
	if thick < leastB {
		if f.Value >= thinWarm {
			e.warnf("%.3g mm is thinner than the %.0f mm at which EN 1011-2 method B begins, where it would ask for %.0f C: no preheat is reckoned, ask who wrote the procedure", thick, leastB, f.Value)
		}
		return origin.Figure{}
	}
	if out != "" {
		e.warnf("outside the range of EN 1011-2 method B (CET 0.2 to 0.5, 10 to 90 mm, 1 to 20 ml/100 g, 0.5 to 4 kJ/mm): %s; its %.0f C is no proof", out, f.Value)
	}
	if f.Value < 20 {
		return origin.Figure{}
	}
	for i, made := range []origin.Figure{cet, e.thicker(), e.hydrogen(c.Steel), e.heat} {
		if f.From[i].Value == made.Value { // not brought into the method's range
			f.From[i] = made
		}
	}
	return f
}

const thinWarm = 100.0 // C at 10 mm above which thinner plate is worth a word too (house judgement)
