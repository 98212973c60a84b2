package weld

import (
	"math"

	"sailby/tasks/origin"
)

// HeatInput gives the heat input of EN 1011-1, kJ/mm: k U I / (1000 v), with v in mm/s. Here
// travel is in mm/min, volts in V, current in A; k is 1.0 for 121, 0.8 for arcs with consumable
// electrode, 0.6 for TIG and plasma.
//
// Errors: a *Error for figures outside what arcs are run at.
func HeatInput(k, volts, current, travel float64) (origin.Figure, error) {
	err := first(
		within("heat efficiency", k, 0.3, 1, ""), within("volts", volts, 8, 60, "V"),
		within("current", current, 10, 1500, "A"), within("travel", travel, 20, 5000, "mm/min"))
	if err != nil {
		return origin.Figure{}, err
	}
	return heatInput(origin.Published("heat efficiency", k, "", en1011),
		origin.Written("volts", volts, "V", origin.Origin{}), origin.Written("current", current, "A", origin.Origin{}),
		origin.Written("travel", travel, "mm/min", origin.Origin{})), nil
}

func heatInput(k, u, i, v origin.Figure) origin.Figure {
	return origin.Worked("heat input", k.Value*u.Value*i.Value*60/(1000*v.Value), "kJ/mm",
		"heat efficiency x volts x current x 60 / (1000 x travel)", k, u, i, v)
}

// travelOf gives the speed at which the largest run is laid at a rate, mm/min: as given, else
// what the metal says.
func (p Procedure) travelOf(rate, area origin.Figure, density float64) origin.Figure {
	if p.Travel > 0 {
		return p.given("travel", p.Travel, "mm/min")
	}
	return origin.Worked("travel", rate.Value*1e9/60/density/area.Value, "mm/min", "deposition rate x 1000000000 / 60 / density / area of the largest run",
		rate, densityFigure(density), area)
}

// CoolingTime is t8/5, the seconds from 800 to 500 C, after EN 1011-2 Annex D.
type CoolingTime struct {
	Seconds    float64
	TwoD       float64 // as in thin plate, s
	ThreeD     float64 // as in thick plate, s
	Transition float64 // mm: thinner plate cools as 2D, thicker as 3D
	Why        origin.Figure
}

// Cool gives t8/5 for a heat input in kJ/mm, a thickness in mm and a plate temperature in C
// before the run. f2 and f3 are the shape factors: 1 and 1 for a bead on plate, 0.9 and 0.9
// between runs of a butt, 0.9 and 0.67 for a corner fillet, 0.45 to 0.67 and 0.67 for a T
// fillet. The larger of both times counts; at the transition thickness they are equal.
//
//	2D: (4300 - 4.3 T) 1e5 (Q/d)^2 [1/(500-T)^2 - 1/(800-T)^2] F2
//	3D: (6700 - 5 T) Q [1/(500-T) - 1/(800-T)] F3
//	transition: sqrt of (4300 - 4.3 T)/(6700 - 5 T) 1e5 Q [1/(500-T) + 1/(800-T)] F2/F3
//
// Errors: a *Error outside 0.1 to 20 kJ/mm, 1 to 400 mm, -40 to 400 C, factors 0.1 to 1.5.
func Cool(heat, thickness, temperature, f2, f3 float64) (CoolingTime, error) {
	err := first(
		within("heat input", heat, 0.05, 20, "kJ/mm"), within("thickness", thickness, 0.5, maxThick, "mm"),
		within("plate temperature", temperature, -40, 400, "C"),
		within("shape factor F2", f2, 0.1, 1.5, ""), within("shape factor F3", f3, 0.1, 1.5, ""))
	if err != nil {
		return CoolingTime{}, err
	}
	a, b := 1/(500-temperature), 1/(800-temperature)
	two, three := 4300-4.3*temperature, 6700-5*temperature
	c := CoolingTime{
		TwoD:       two * 1e5 * heat * heat / (thickness * thickness) * (a*a - b*b) * f2,
		ThreeD:     three * heat * (a - b) * f3,
		Transition: math.Sqrt(two / three * 1e5 * heat * (a + b) * f2 / f3),
	}
	c.Seconds = math.Max(c.TwoD, c.ThreeD)
	c.Why = c.why(origin.Written("heat input", heat, "kJ/mm", origin.Origin{}), origin.Written("plate temperature", temperature, "C", origin.Origin{}),
		origin.Written("thickness", thickness, "mm", origin.Origin{}), f2, f3)
	return c, nil
}

// why is the tree of the time, from the figures it was made from.
func (c CoolingTime) why(q, T, d origin.Figure, f2, f3 float64) origin.Figure {
	F2, F3 := origin.Recalled("shape factor F2", f2, "", "EN 1011-2 Annex D"), origin.Recalled("shape factor F3", f3, "", "EN 1011-2 Annex D")
	change := origin.Worked("transition thickness", c.Transition, "mm",
		"sqrt((4300 - 4.3 x plate temperature) / (6700 - 5 x plate temperature) x 100000 x heat input x (1 / (500 - plate temperature) + 1 / (800 - plate temperature)) x shape factor F2 / shape factor F3)", T, q, F2, F3)
	return origin.Worked("t8/5", c.Seconds, "s", "max(2D time, 3D time)",
		origin.Worked("2D time", c.TwoD, "s", "(4300 - 4.3 x plate temperature) x 100000 x (heat input / thickness)^2 x (1 / (500 - plate temperature)^2 - 1 / (800 - plate temperature)^2) x shape factor F2", T, q, d, F2),
		origin.Worked("3D time", c.ThreeD, "s", "(6700 - 5 x plate temperature) x heat input x (1 / (500 - plate temperature) - 1 / (800 - plate temperature)) x shape factor F3", T, q, F3),
		change)
}

// shapeFactors are F2 and F3 for a joint (from memory of EN 1011-2 Annex D).
func shapeFactors(t JointType) (f2, f3 float64) {
	switch {
	case t == Fillet || t == Lap:
		return 0.67, 0.67
	case t == Corner:
		return 0.9, 0.67
	}
	return 0.9, 0.9
}
