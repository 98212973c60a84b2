package expand

import (
	"fmt"

	"sailby/tasks"
	"sailby/tasks/origin"
	"sailby/weld"
)

// weld estimates a weld task: its seams one after the other, shared by its welders.
func (x *expander) weld(t *tasks.Task) hands {
	h := hands{people: max(1, x.crewSize(t)), hot: true}
	if t.People > 0 {
		h.people = t.People
	}
	if len(t.Seams) == 0 {
		h.fault = fmt.Errorf("it has no joints and no hours")
		h.hint = "list its joints, for instance joints: [{fillet: {leg: 6 mm}, length: 2 m, position: PB}], or give hours"
		return h
	}
	seams := make([]weld.Seam, len(t.Seams))
	for i, s := range t.Seams {
		seams[i] = s.Seam
	}
	e, err := weld.Work(seams, weld.Circumstances{
		Site: x.atSite(t), Ambient: x.steel(t.Place), Execution: x.w.Job.Execution,
		Steel: weld.Steel{Grade: x.w.Job.Steel}, FittedUp: x.fittedUp(t),
	})
	if err != nil {
		h.fault = err
		if we, ok := err.(*weld.Error); ok {
			h.hint = we.Hint
		}
		return h
	}
	n := float64(h.people)
	h.minutes = spread(float64(e.HandsOn) / n)
	h.setUp, h.safe = float64(e.SetUp), float64(e.SafeStop)
	h.power = e.Power * n
	h.est.Figure = e.Hours
	if h.people > 1 {
		h.est.Figure = origin.Worked("hands-on time", float64(e.HandsOn)/n, "min", "time of one welder over the welders",
			e.Hours, origin.Written("welders", n, "", t.Pos.Origin("people")))
	}
	h.est.Notes = e.Warnings
	for _, c := range e.Consumables {
		h.est.Consumables = append(h.est.Consumables, Consumable{What: c.Name, Amount: c.Amount, Unit: c.Unit, Spare: c.Spare})
	}
	for _, f := range []origin.Figure{e.Why.Metal, e.Why.Arc, e.Why.Passes, e.Why.HeatInput, e.Why.Preheat, e.Why.SetUp,
		e.Why.SafeStop, e.Why.Cooling, e.Why.BeforeNDT, e.Why.Power} {
		if f.Name != "" {
			h.est.Facts = append(h.est.Facts, f)
		}
	}
	x.welded[t] = e
	return h
}

// fittedUp says whether a fit-up task comes before t, so that fitting is not counted twice.
func (x *expander) fittedUp(t *tasks.Task) bool {
	seen := map[string]bool{}
	var look func(name string) bool
	look = func(name string) bool {
		u := x.byName[name]
		if u == nil || seen[name] {
			return false
		}
		seen[name] = true
		if u.Kind == tasks.FitUp {
			return true
		}
		for _, l := range u.Links {
			if look(l.Task) {
				return true
			}
		}
		return false
	}
	for _, l := range t.Links {
		if look(l.Task) {
			return true
		}
	}
	return false
}

// cutter is a way to cut: how fast, how hot, how loud.
type cutter struct {
	hot, noisy bool
	speed      func(thickness float64) origin.Figure // mm/min
	pierce     float64                               // s for each start
}

// plasmaPoints are the quality speeds of a 40 A hand plasma on carbon steel.
var plasmaPoints = [][2]float64{{3, 3150}, {4, 1900}, {6, 1050}, {8, 650}, {10, 390}, {12, 310}, {15, 180}, {20, 70}, {25, 50}}

// oxyPoints are low (hand) speeds of oxy-fuel cutting.
var oxyPoints = [][2]float64{{6, 400}, {10, 380}, {12, 300}, {20, 300}, {25, 230}, {38, 150}, {50, 150}, {75, 100}}

func cutters() map[string]cutter {
	return map[string]cutter{
		"plasma": {hot: true, noisy: true, speed: func(t float64) origin.Figure {
			return origin.Published("cutting speed", between(plasmaPoints, t), "mm/min", "40 A hand plasma, maker's manual, quality cut")
		}, pierce: 3},
		"oxy-fuel": {hot: true, speed: func(t float64) origin.Figure {
			return origin.Recalled("cutting speed", between(oxyPoints, t), "mm/min", "AWS Welding Handbook, hand cutting, low end")
		}, pierce: 20},
		"disc": {hot: true, noisy: true, speed: func(t float64) origin.Figure {
			return origin.House("cutting speed", 600/t, "mm/min", "cut-off disc: 600 mm2 of section a minute")
		}},
		"saw": {noisy: true, speed: func(t float64) origin.Figure {
			return origin.House("cutting speed", 800/t, "mm/min", "saw: 800 mm2 of section a minute")
		}},
	}
}

// Cutters names the ways to cut that have a speed of their own.
func Cutters() []string { return []string{"plasma", "oxy-fuel", "disc", "saw"} }

// between interpolates linearly, and keeps to the nearest end outside.
func between(points [][2]float64, at float64) float64 {
	if at <= points[0][0] {
		return points[0][1]
	}
	for i := 1; i < len(points); i++ {
		a, b := points[i-1], points[i]
		if at <= b[0] {
			return a[1] + (b[1]-a[1])*(at-a[0])/(b[0]-a[0])
		}
	}
	return points[len(points)-1][1]
}

// The house's own minutes around a cut: marking out and setting up a guide, and dressing the edge.
const (
	markOut  = 6.0 // min a metre
	dressing = 4.0 // min a metre
	cutReady = 10. // min for each task
)

// cut estimates a cutting task from its length and thickness.
func (x *expander) cut(t *tasks.Task) hands {
	h := hands{people: 1}
	by := t.By
	if by == "" {
		by = "disc"
	}
	c, known := cutters()[by]
	if !known {
		c = cutters()["disc"]
		c.hot, c.noisy = by != "drill" && by != "shear", true
	}
	h.hot, h.noisy = c.hot, c.noisy
	length, thick := t.Length, t.Thickness
	if !thick.Pos.Given() || !length.Pos.Given() {
		h.fault = fmt.Errorf("it needs length and thickness, or hours")
		h.hint = "write for instance length: 1.9 m, thickness: 16 mm, by: oxy-fuel"
		return h
	}
	if !known && !t.Hours.Pos.Given() && !t.ManHours.Pos.Given() {
		h.fault = fmt.Errorf("cutting by %q has no speed of its own", by)
		h.hint = "give hours, or cut by plasma, oxy-fuel, disc or saw"
		return h
	}
	metres := length.Value / 1000
	speed := c.speed(thick.Value)
	arc := length.Value / speed.Value
	l := origin.Written("length", length.Value, "mm", length.Pos.Origin("length"))
	cutting := origin.Worked("cutting", arc, "min", "length over speed", l, speed,
		origin.Written("thickness", thick.Value, "mm", thick.Pos.Origin("thickness")))
	around := origin.Worked("marking, guide, dressing", cutReady+metres*(markOut+dressing), "min", "fixed part + length x rate", l,
		origin.House("make ready", cutReady, "min", "leads, gas, guide"),
		origin.House("mark out", markOut, "min/m", "mark out and set a guide"),
		origin.House("dress", dressing, "min/m", "take off slag, dress the edge"),
		origin.House("pierce", c.pierce, "s", "each start"))
	total := arc + around.Value + c.pierce/60
	h.minutes = spread(total)
	h.least = 10
	h.est.Figure = origin.Worked("hands-on time", total, "min", "cutting + what is around it", cutting, around)
	return h
}
