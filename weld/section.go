package weld

import (
	"math"

	"sailby/tasks/origin"
)

const (
	steelDensity = 7850.0 // kg/m3
	capWiden     = 3.0    // the cap is this much wider than the groove's opening, mm (house judgement)
	overLeg      = 1.0    // a fillet's legs are laid this much over the drawing, mm (house judgement)
)

// Section is the cross-section of a weld: what is laid and what is drawn, in square millimetres,
// all sides together, without a back run.
type Section struct {
	Area, Drawn float64
	Width       float64 // across the face, mm
	Height      float64 // throat of a fillet, thickness with caps of a butt, mm
	Size        float64 // the a or s that waiting times go by: throat, depth or thickness, mm
	Sides       int     // how many sides are welded: runs are counted for each
	Why         origin.Figure

	first origin.Figure // area laid on the first of two sides that are not alike; no name: alike
}

// Section gives the cross-section of j in a position. With overweld, fillets are laid 1 mm over
// the drawn leg and butts get a cap of 1.5 mm unless Cap says otherwise.
//
// Errors: a *Error for a missing or impossible size.
func (j Joint) Section(pos Position, overweld bool) (Section, error) {
	f, err := j.filled(UsualPosition(j.Type, pos), overweld)
	if err != nil {
		return Section{}, err
	}
	return f.section(UsualPosition(j.Type, pos), overweld)
}

// UsualPosition gives the position meant for a joint where pos is zero, PB for fillets and laps and
// PA for the rest, and puts fillets into fillet positions: PC is PB for them, PE is PD.
func UsualPosition(t JointType, pos Position) Position {
	legs := t == Fillet || t == Lap
	switch {
	case pos == 0 && legs, legs && pos == PC:
		return PB
	case pos == 0:
		return PA
	case legs && pos == PE:
		return PD
	}
	return pos
}

// section wants a filled joint.
func (j shape) section(pos Position, overweld bool) (Section, error) {
	switch {
	case j.Type == Fillet || j.Type == Lap || j.Type == Corner:
		return j.fillet(overweld), nil
	case j.Type == Plug || j.Type == Slot:
		return j.hole(), nil
	}
	return j.butt(pos)
}

// fillet is the triangle z1 z2 / 2, both legs grown by fit-up gap and overweld. A corner is the
// open triangle of two edges, with a cap.
func (j shape) fillet(overweld bool) Section {
	extra := 0.0
	if overweld && j.Type != Corner {
		extra = overLeg
	}
	n := float64(j.faces())
	over := origin.House("overweld", extra, "mm", "laid over the drawn leg; 0 where overweld is off")
	gap := j.drawn("fit-up gap", j.Gap, "mm")
	z1, z2 := j.Leg+j.Gap+extra, j.Leg2+j.Gap+extra
	leg := j.drawn("leg drawn", j.Leg, "mm")
	if leg.Origin.Kind == origin.Formula {
		leg.From = []origin.Figure{j.drawn("thickness", j.Thickness, "mm")}
		if j.Throat > 0 {
			leg.From[0] = origin.Written("throat", j.Throat, "mm", j.Origin)
		}
	}
	a := origin.Worked("leg laid", z1, "mm", "leg drawn + fit-up gap + overweld", leg, gap, over)
	b := origin.Worked("second leg laid", z2, "mm", "second leg drawn + fit-up gap + overweld", j.drawn("second leg drawn", j.Leg2, "mm"), gap, over)
	width := math.Hypot(z1, z2)
	s := Section{
		Drawn: n * j.Leg * j.Leg2 / 2, Width: width, Height: z1 * z2 / width, Sides: j.faces(),
		Size: j.Leg * j.Leg2 / math.Hypot(j.Leg, j.Leg2),
	}
	capArea := 2.0 / 3 * width * j.Cap
	s.Area = n * (z1*z2/2 + capArea)
	sides := j.drawn("sides", n, "")
	if j.Cap == 0 {
		s.Why = origin.Worked("area laid", s.Area, "mm2", "leg laid x second leg laid / 2 x sides", a, b, sides)
		return s
	}
	s.Height += j.Cap
	s.Why = origin.Worked("area laid", s.Area, "mm2", "(leg laid x second leg laid / 2 + cap area) x sides", a, b, j.capFigure(width), sides)
	return s
}

func (j shape) capFigure(width float64) origin.Figure {
	return origin.Worked("cap area", 2.0/3*width*j.Cap, "mm2", "2 / 3 x cap width x cap height",
		origin.House("cap width", width, "mm", "opening of the groove and 3 mm; face of a corner"), j.drawn("cap height", j.Cap, "mm"))
}

// hole is the volume of a plug or slot over its length, so that area x length is the volume.
func (j shape) hole() Section {
	w, t := j.Diameter, j.Thickness
	long := math.Max(j.Bead, w)
	if j.Type == Plug {
		long = w
	}
	s := Section{Width: w, Height: t, Size: t, Sides: 1}
	s.Area = (math.Pi*w*w/4 + w*(long-w)) * t / long
	s.Drawn = s.Area
	s.Why = origin.Worked("area laid", s.Area, "mm2", "(pi x diameter^2 / 4 + diameter x (hole length - diameter)) x thickness / hole length",
		j.drawn("diameter", w, "mm"), j.drawn("hole length", long, "mm"), j.drawn("thickness", t, "mm"))
	return s
}

// butt is gap, faces and caps: A = g d + faces, where each prepared face adds h^2 tan(angle) as
// its shape has it; times what the position adds to the metal.
func (j shape) butt(pos Position) (Section, error) {
	deep := j.PartialDepth
	d := j.drawn("depth", deep, "mm")
	if d.Origin.Kind == origin.Formula {
		d.From = []origin.Figure{j.drawn("thickness", j.Thickness, "mm")}
	}
	gap := j.drawn("root gap", j.RootGap, "mm")
	if j.Gap > 0 {
		gap = origin.Worked("root gap as fitted", j.RootGap+j.Gap, "mm", "root gap + fit-up gap", gap, j.drawn("fit-up gap", j.Gap, "mm"))
	}
	sides := 1.0
	if j.Type.twoSided() || j.faces() == 2 {
		sides = 2
	}
	prep, open, err := j.bothFaces(d)
	if err != nil {
		return Section{}, err
	}
	width := gap.Value + open + capWiden
	body := gap.Value*deep + prep.Value
	fac := j.depositFactor(pos)
	s := Section{Drawn: body, Width: width, Height: deep + sides*j.Cap, Size: deep, Sides: int(sides)}
	s.Area = body*fac.Value + sides*2/3*width*j.Cap
	s.first = j.firstSide(gap, d, prep, fac, j.capFigure(width))
	s.Why = origin.Worked("area laid", s.Area, "mm2", "("+gap.Name+" x depth + faces) x position factor on metal + cap area x sides",
		gap, d, prep, fac, j.capFigure(width), j.drawn("sides", sides, ""))
	return s, nil
}

func tanDeg(d float64) float64 { return math.Tan(d * math.Pi / 180) }

// Metal gives the mass of length mm of an area of mm2, kilograms, at a density in kg/m3 (0 is
// steel, 7850).
func Metal(area, length, density float64) float64 {
	if density == 0 {
		density = steelDensity
	}
	return area * length * density / 1e9
}
