package weld

import (
	"math"
	"strings"

	"sailby/tasks/origin"
)

// deposit works out metal, rate, runs and arc time.
func (e *seamWork) deposit(c Circumstances) {
	density := c.Steel.density()
	e.density = density
	j, p := e.joint, e.proc
	e.size = p.size(e.data)
	rate, warn := p.rate(e.data, e.pos, density)
	e.rate, e.warn = rate, append(e.warn, warn...)
	e.current = p.current(e.data, e.size.Value)
	e.volts = p.volts(e.data, e.current)
	hottest := e.hottest(density)
	e.bead = p.bead(e.data, e.pos, e.size, e.rate, hottest, density)
	e.runs = p.runsFor(j.Joint, e.section, e.data, e.pos, e.bead, hottest)
	if j.BackGouge {
		e.runs.count++
		e.runs.why = origin.Worked("runs", float64(e.runs.count), "", "runs before the backing run + 1", renamed(e.runs.why, "runs before the backing run"))
	}
	e.warn = append(e.warn, e.runs.warn...)
	e.length = j.Length * j.share()

	length := j.drawn("length", j.Length, "mm")
	if length.Origin.Kind == origin.Formula {
		if j.Onto > 0 {
			length.From = append(length.From, origin.Written("onto a tube of", j.Onto, "mm", j.Origin))
		}
		length.From = append(length.From, origin.Written("diameter", j.Diameter, "mm", j.Origin), origin.Written("count", float64(j.Count), "", j.Origin))
	}
	if j.Pitch > 0 {
		length = origin.Worked("length welded", e.length, "mm", "length x bead / pitch", length,
			origin.Written("bead", j.Bead, "mm", j.Origin), origin.Written("pitch", j.Pitch, "mm", j.Origin))
	}
	rho := densityFigure(density)
	kg := Metal(e.section.Area, e.length, density)
	expr := "area laid x " + length.Name + " x density / 1000000000"
	from := []origin.Figure{e.section.Why, length, rho}
	if j.BackGouge {
		back := backRun(e.pos, j.Thickness)
		kg += back.Value * e.length / 1000
		expr += " + backing run x " + length.Name + " / 1000"
		from = append(from, back)
	}
	e.metal = origin.Worked("weld metal", kg, "kg", expr, from...)
	e.arcTime()
	if j.Gap > wideGap {
		e.warnf("a fit-up gap of %.3g mm is above %.0f mm: ask before welding it up", j.Gap, wideGap)
	}
	if t := math.Min(j.Thickness, j.Thickness2); j.Type.HasLegs() && e.seam.Joint.Thickness > 0 && math.Max(j.Leg, j.Leg2) > mostLeg*t {
		e.warnf("a leg of %.3g mm is a lot on %.3g mm: check the drawing", math.Max(j.Leg, j.Leg2), t)
	}
	if strings.HasPrefix(c.Execution, "AWS") && j.Type == Fillet && e.seam.Joint.Thickness > 0 && j.Leg < minFillet(math.Max(j.Thickness, j.Thickness2))-0.05 {
		e.warnf("a leg of %.3g mm is below the %.0f mm that AWS D1.1:2020 wants on %.3g mm", j.Leg, minFillet(math.Max(j.Thickness, j.Thickness2)), math.Max(j.Thickness, j.Thickness2))
	}
}

const mostLeg = 1.5 // legs of the thinner part's thickness above which the drawing is doubted (house judgement)

const wideGap = 5.0 // mm a fillet's parts may stand apart (from memory: AWS D1.1)

// arcTime is metal over rate; where a fillet's travel speed is given, length over travel as
// well, and the longer of both, with a warning where they disagree by more than routesApart.
func (e *seamWork) arcTime() {
	byMetal := origin.Worked("arc time by metal", e.metal.Value/e.rate.Value*60, "min", "weld metal / deposition rate x 60", e.metal, e.rate)
	if !e.runs.travel {
		e.arc = byMetal
		e.arc.Name = "arc time"
		return
	}
	v := e.proc.given("travel", e.proc.Travel, "mm/min")
	byTravel := origin.Worked("arc time by travel", float64(e.runs.count)*e.length/v.Value, "min", "runs x length welded / travel",
		e.runs.why, origin.Written("length welded", e.length, "mm", e.joint.Origin), v)
	e.arc = origin.Worked("arc time", math.Max(byMetal.Value, byTravel.Value), "min", "max(arc time by metal, arc time by travel)", byMetal, byTravel)
	if r := byTravel.Value / byMetal.Value; r > 1+routesApart || r < 1/(1+routesApart) {
		leg := math.Sqrt(2 * e.bead.Value)
		e.warnf("travel and metal disagree: %.3g min by travel, %.3g min by metal; at %.0f mm/min a run has %.3g mm2, a leg of %.2g mm: check travel against deposition, or what is really laid", byTravel.Value, byMetal.Value, v.Value, e.bead.Value, leg)
	}
}

const routesApart = 0.15 // between the travel and the metal route: what setting a speed by hand is good for

// hottest is the largest bead that the procedure's most heat input allows, where it has one: at
// the least speed v = k U I / Q, the metal of the rate is A = rate / (density v).
func (e *seamWork) hottest(density float64) origin.Figure {
	q := e.proc.MaxHeatInput
	if q == 0 {
		return origin.Figure{}
	}
	k := e.heatEfficiency()
	v := e.rate.Value * 1e9 / 60 / density * 1000 * q / (k.Value * e.volts.Value * e.current.Value * 60)
	return origin.Worked("bead at the most heat input", v, "mm2",
		"deposition rate x 1000000000 / 60 / density x 1000 x most heat input / (heat efficiency x volts x current x 60)",
		e.rate, densityFigure(density), e.proc.given("most heat input", q, "kJ/mm"), k, e.volts, e.current)
}

// heatEfficiency is k of EN 1011-1, or the procedure's.
func (e *seamWork) heatEfficiency() origin.Figure {
	if e.proc.HeatEfficiency > 0 {
		return e.proc.given("heat efficiency", e.proc.HeatEfficiency, "")
	}
	return e.data.heat
}
