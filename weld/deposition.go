package weld

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// point is one row of a deposition table: current in A, rate in kg/h with the arc burning.
type point struct{ amps, rate float64 }

// curve is the deposition of one process and size; usual is the current where none is given.
type curve struct {
	process Process
	size    float64
	usual   float64
	points  []point
}

const depositionMemory = "ESAB filler metal deposition tables, lb/h converted"

// curves from memory but for 111 4.8 mm 250 A and 136 1.6 mm 300 A, which are published in a
// cost worksheet (5.4 and 10.2 lb/h).
var curves = []curve{
	{111, 2.4, 80, []point{{70, 0.62}, {90, 0.75}}},
	{111, 3.2, 120, []point{{120, 1.17}, {140, 1.24}, {160, 1.36}}},
	{111, 4.0, 150, []point{{140, 1.41}, {160, 1.71}}},
	{111, 4.8, 220, []point{{200, 2.20}, {250, 2.45}}},
	{114, 1.8, 180, []point{{150, 1.5}, {250, 3.0}}},
	{121, 2.4, 400, []point{{400, 4.3}, {500, 5.9}, {600, 7.8}}},
	{121, 3.2, 500, []point{{500, 5.2}, {600, 6.8}}},
	{121, 4.0, 600, []point{{600, 6.6}, {700, 8.3}, {800, 10.0}}},
	{131, 1.2, 200, []point{{150, 0.8}, {200, 1.2}, {250, 1.6}}},
	{135, 0.8, 110, []point{{80, 0.9}, {130, 1.5}, {160, 2.2}, {180, 2.6}}},
	{135, 1.0, 150, []point{{100, 1.1}, {150, 1.9}, {200, 3.0}, {240, 4.2}}},
	{135, 1.2, 200, []point{{125, 1.32}, {150, 1.68}, {200, 2.5}, {250, 3.36}, {300, 4.7}, {350, 6.3}}},
	{136, 1.2, 180, []point{{150, 1.8}, {180, 2.4}, {200, 2.7}, {240, 3.6}, {280, 4.8}}},
	{136, 1.6, 250, []point{{180, 2.2}, {250, 3.6}, {300, 4.63}}},
	{138, 1.2, 200, []point{{150, 1.8}, {200, 2.7}, {250, 3.6}, {300, 5.0}}},
	{141, 2.4, 140, []point{{80, 0.3}, {140, 0.6}, {220, 1.0}}},
}

// curveFor finds the curve of the nearest size; ok is false for a process without one.
func curveFor(p Process, size float64) (curve, bool) {
	best, ok := curve{}, false
	for _, c := range curves {
		if c.process == p && (!ok || math.Abs(c.size-size) < math.Abs(best.size-size)) {
			best, ok = c, true
		}
	}
	return best, ok
}

// at gives the rate at a current: straight between rows, in proportion to the current beyond them.
func (c curve) at(amps float64) float64 {
	pts := c.points
	switch {
	case amps <= pts[0].amps:
		return pts[0].rate * amps / pts[0].amps
	case amps >= pts[len(pts)-1].amps:
		last := pts[len(pts)-1]
		return last.rate * amps / last.amps
	}
	for i := 1; ; i++ {
		if a, b := pts[i-1], pts[i]; amps <= b.amps {
			return a.rate + (b.rate-a.rate)*(amps-a.amps)/(b.amps-a.amps)
		}
	}
}

// beyond says whether a current is more than a fifth outside the curve.
func (c curve) beyond(amps float64) bool {
	return amps < c.points[0].amps*0.8 || amps > c.points[len(c.points)-1].amps*1.2
}

// current gives the current in use.
func (p Procedure) current(d process, size float64) origin.Figure {
	if p.Current > 0 {
		return p.given("current", p.Current, "A")
	}
	c, _ := curveFor(d.number, size)
	return origin.House("current", c.usual, "A", fmt.Sprintf("usual for %s of %.3g mm in the flat position", d.name, c.size))
}

// rateFactor is what a position leaves of the flat position's rate, at the lower current that
// the position wants (house judgement; no published table was found).
func rateFactor(pos Position) float64 {
	switch pos {
	case PB:
		return 0.95
	case PC:
		return 0.80
	case PF, PH:
		return 0.75
	case PG, PJ:
		return 0.90
	case HL045:
		return 0.70
	case PD, PE:
		return 0.65
	}
	return 1
}

// rate gives the deposition in the position, kg/h with the arc burning: as given, else from the
// wire feed (mass of wire through the torch), else from current and size. Position slows only
// rates that are the flat position's: a default current, or a deposition given for PA or no position.
func (p Procedure) rate(d process, pos Position, density float64) (origin.Figure, []string) {
	const name = "deposition rate"
	slow := origin.House("position factor on rate", rateFactor(pos), "", "what "+pos.String()+" leaves of the flat rate")
	size := p.size(d)
	switch {
	case p.Deposition > 0 && (p.Position > PA || slow.Value == 1):
		f := p.given("deposition", p.Deposition, "kg/h")
		f.Name = name
		return f, nil
	case p.Deposition > 0:
		return origin.Worked(name, p.Deposition*slow.Value, "kg/h", "deposition x position factor on rate",
			p.given("deposition", p.Deposition, "kg/h"), slow), nil
	case p.WireFeed > 0 && !d.stick:
		return p.fed(d, size, density), nil
	}
	c, ok := curveFor(d.number, size.Value)
	if !ok {
		return origin.House(name, 1, "kg/h", "no table for this process"), nil
	}
	amps := p.current(d, size.Value)
	var warn []string
	if c.beyond(amps.Value) {
		warn = append(warn, fmt.Sprintf("%.4g A is far from what the %s table holds (%.4g to %.4g A at %.3g mm): give the deposition or the wire feed",
			amps.Value, d.name, c.points[0].amps, c.points[len(c.points)-1].amps, c.size))
	}
	v := c.at(amps.Value)
	read := origin.Recalled("rate from the table", v, "kg/h", fmt.Sprintf("%s, %s %.3g mm", depositionMemory, d.number, c.size))
	if d.number == 111 && c.size == 4.8 && amps.Value == 250 || d.number == 136 && c.size == 1.6 && amps.Value == 300 {
		read.Origin = origin.Origin{Kind: origin.Table, Source: "ESAB Filler Metal Handbook, cost worksheet p. 8"}
	}
	read.From = []origin.Figure{amps, size}
	if p.Current > 0 {
		return origin.Worked(name, v, "kg/h", "rate from the table", read), warn
	}
	return origin.Worked(name, v*slow.Value, "kg/h", "rate from the table x position factor on rate", read, slow), warn
}

// fed is the mass of wire that runs through the torch, less what is lost: feed x section x
// density x efficiency. A cored wire has less in it than a solid one.
func (p Procedure) fed(d process, size origin.Figure, density float64) origin.Figure {
	fill := origin.House("fill of the wire", d.cored, "", "mass of the wire over that of a solid one")
	if d.number == 114 {
		fill.Origin.Source = "from a maker's rates for 2.0 mm wire (200 and 240 in/min give 4.5 and 5.5 kg/h)"
	}
	eff := p.used(d, size.Value)
	v := p.WireFeed * 60 * math.Pi * size.Value * size.Value / 4 * density / 1e6 * fill.Value * eff.Value
	return origin.Worked("deposition rate", v, "kg/h",
		"wire feed x 60 x pi x "+size.Name+"^2 / 4 x density / 1000000 x fill of the wire x "+eff.Name,
		p.given("wire feed", p.WireFeed, "m/min"), size, densityFigure(density), fill, eff)
}

// WireMetres gives how many metres of solid wire of a diameter in mm weigh a kilogram, at a
// density in kg/m3 (0 is steel). Special case: a diameter of 0 gives +Inf.
func WireMetres(diameter, density float64) float64 {
	if density == 0 {
		density = steelDensity
	}
	return 4e6 / (math.Pi * diameter * diameter * density)
}
