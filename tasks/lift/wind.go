package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// Body is the shape of a load to the wind.
type Body uint8

// The bodies; the drag figure of each is given in Gust.
const (
	UnknownBody Body = iota // 2.4
	BoxBody                 // 2.0
	RoundBody               // 1.0
)

// Wind is the wind on a hung load.
type Wind struct {
	Limit float64 // m/s gust, from the crane's chart or papers; 0 is 9.8
	Area  float64 // m2 that the load shows to the wind; 0 is the largest face of its sizes
	Body  Body
	Drag  float64 // factor in place of that of Body
	Tip   float64 // mm of the highest point of boom or load above ground; 0 is 10 m
	Mean  float64 // m/s forecast mean at 10 m
	May   float64 // m/s at the tip that whoever plans the lift permits, in place of what sail and mass give; never above Limit
	Gust  float64 // m/s measured or forecast gust at the tip, in place of Mean
}

const (
	loaderManual = "loader crane maker's manual, wind on large loads"
	mobileManual = "mobile crane maker's manual, wind: gust at height and reference sail area"
)

// WindResult is a Result with the force at the limit.
type WindResult struct {
	Result
	Force float64 // N on the load at the permitted gust
}

// Gust judges the gust at tip height against what the gear permits, less for a large sail area:
//
//	V = limit x sqrt(1.2 P / (A c)), at most limit (P t, A m2)
//	gust at z = ((z / 10 m)^0.14 + 0.4) x mean
//
// Special cases are:
//
//	below 0.5 m2 a tonne the sail area is not checked
//	without a forecast the result says at what gust to stop, and is OK
//
// Errors: no area and no sizes, numbers out of range.
func Gust(l Load, w Wind) (WindResult, error) {
	if err := l.valid(); err != nil {
		return WindResult{}, err
	}
	if err := checkAll(check{"the gust limit", w.Limit, 0, 50, "m/s"}, check{"the permitted gust", w.May, 0, 50, "m/s"}, check{"the sail area", w.Area, 0, 1e5, "m2"}, check{"the drag", w.Drag, 0, 5, ""},
		check{"the tip's height", w.Tip, 0, 5e5, "mm"}, check{"the mean wind", w.Mean, 0, 100, "m/s"}, check{"the gust", w.Gust, 0, 150, "m/s"}); err != nil {
		return WindResult{}, err
	}
	area, err := w.area(l)
	if err != nil {
		return WindResult{}, err
	}
	drag := w.drag()
	limit := given("gust limit of the gear", w.Limit, "m/s")
	if w.Limit == 0 {
		limit = UsualGust()
	}
	mass := l.best() // the lighter it is, the more the wind moves it: no allowance
	t := mass.Value / 1000
	factor := 1.0
	if area.Value/t >= 0.5 {
		factor = math.Min(1, math.Sqrt(1.2*t/(area.Value*drag.Value)))
	}
	have := origin.Worked("permitted gust", limit.Value*factor, "m/s", "limit x sqrt(1.2 P / (A c)), at most the limit", limit, mass, area, drag,
		origin.Published("reference sail area", 1.2, "m2/t", mobileManual))
	if w.May > 0 {
		have = origin.Worked("permitted gust", math.Min(w.May, limit.Value), "m/s", "as whoever plans the lift states it, at most the gear's", given("permitted by who plans the lift", w.May, "m/s"), limit)
	}
	need := w.gust()
	out := WindResult{Result: worst(judge{"wind", need, have}), Force: pressure(have.Value) * area.Value * drag.Value}
	if need.Value == 0 {
		out.Reason = fmt.Sprintf("stop above a gust of %.1f m/s at the tip", math.Floor(have.Value*10)/10)
	}
	out.Warnings = []string{"name who measures the gust, with what, and at what height"}
	if factor < 1 && w.May == 0 {
		out.Warnings = append(out.Warnings, "the gust is brought down for the load's sail by crane makers' rule (1.2 m2 a tonne, drag counted), which is strict for light loads: whoever plans the lift may state another, no higher than the gear's")
	}
	if factor < 1 {
		out.Warnings = append(out.Warnings, "large for its weight: tag lines, and nobody between it and a wall")
	}
	if !out.OK {
		out.Nearest = fmt.Sprintf("wait for gusts below %.1f m/s at the tip, or lift it lower, on edge to the wind or in smaller pieces", math.Floor(have.Value*10)/10)
	}
	return out, nil
}

// UsualGust is the limit of gear whose papers do not say.
func UsualGust() origin.Figure {
	return origin.Recalled("gust limit of the gear", 9.8, "m/s", "usual limit of mobile cranes")
}

// TipShare gives the gust at a height z, mm, over that at 10 m: ((z / 10 m)^0.14 + 0.4) / 1.4.
func TipShare(z float64) origin.Figure {
	return origin.Worked("gust at the tip over gust at 10 m", (math.Pow(math.Max(z, 1)/10000, 0.14)+0.4)/1.4, "", "((z / 10 m)^0.14 + 0.4) / 1.4, "+mobileManual,
		given("tip", z, "mm"))
}

// pressure of the wind, N/m2: v^2 / 1.6.
func pressure(v float64) float64 { return v * v / 1.6 }

func (w Wind) area(l Load) (origin.Figure, error) {
	if w.Area > 0 {
		return given("sail area", w.Area, "m2"), nil
	}
	faces := []float64{l.Length * l.Width, l.Length * l.Height, l.Width * l.Height}
	big := math.Max(faces[0], math.Max(faces[1], faces[2])) * 1e-6
	if big <= 0 {
		return origin.Figure{}, fault("give the area it shows to the wind, or its sizes", "the sail area of %s is not known", l.name())
	}
	return origin.Worked("sail area", big, "m2", "largest face of its sizes", given("length", l.Length, "mm"), given("width", l.Width, "mm"), given("height", l.Height, "mm")), nil
}

func (w Wind) drag() origin.Figure {
	switch {
	case w.Drag > 0:
		return given("drag", w.Drag, "")
	case w.Body == BoxBody:
		return origin.Published("drag, box", 2.0, "", loaderManual)
	case w.Body == RoundBody:
		return origin.Published("drag, cylinder", 1.0, "", loaderManual)
	}
	return origin.Published("drag, shape not known", 2.4, "", loaderManual)
}

// gust gives the gust at the tip, m/s; 0 where nothing is forecast.
func (w Wind) gust() origin.Figure {
	if w.Gust > 0 || w.Mean == 0 {
		return given("gust at the tip", w.Gust, "m/s")
	}
	z := w.Tip
	if z == 0 {
		z = 10000
	}
	v := (math.Pow(z/10000, 0.14) + 0.4) * w.Mean
	return origin.Worked("gust at the tip", v, "m/s", "((z / 10 m)^0.14 + 0.4) x mean, "+mobileManual, given("mean at 10 m", w.Mean, "m/s"), given("tip", z, "mm"))
}
