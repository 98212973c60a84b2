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

// height is that of the preparation on one side: depth less root face, halved where both faces
// are prepared. A given depth is the preparation's own.
func (j shape) height(d origin.Figure) origin.Figure {
	how, h := "depth - root face", j.prepHeight()
	if d.Value < j.Thickness {
		how = "depth"
	}
	if j.Type.twoSided() {
		how, h = "("+how+") / 2", h/2
	}
	return origin.Worked(prepName, h, "mm", how, d, j.drawn("root face", j.RootFace, "mm"))
}

const prepName = "height of the preparation"

// single is the joint that one side of a double one is.
var single = map[JointType]JointType{DoubleV: SingleV, DoubleBevel: SingleBevel, DoubleU: SingleU, DoubleJ: SingleJ}

// bothFaces is prepared for all faces; those of a double joint with a depth of its own on the
// first side are worked out one by one.
func (j shape) bothFaces(d origin.Figure) (area origin.Figure, open float64, err error) {
	if j.FirstDepth == 0 {
		return j.prepared(j.height(d))
	}
	one, two := j, j
	one.Type, two.Type, two.Angle = single[j.Type], single[j.Type], j.Angle2
	h := origin.Written("first depth", j.FirstDepth, "mm", j.Origin)
	rest := origin.Worked("rest of the preparation", j.prepHeight()-j.FirstDepth, "mm", "depth - root face - first depth", d, j.drawn("root face", j.RootFace, "mm"), h)
	if d.Value < j.Thickness {
		rest.Origin.Source = "depth - first depth"
	}
	a, wide, err := one.prepared(origin.Worked(prepName, j.FirstDepth, "mm", "first depth", h))
	if err != nil {
		return a, 0, err
	}
	b, _, err := two.prepared(origin.Worked(prepName, rest.Value, "mm", "rest of the preparation", rest))
	return origin.Worked("faces", a.Value+b.Value, "mm2", "first side + second side", renamed(a, "first side"), renamed(b, "second side")), wide, err
}

// firstSide is the area laid on the first side of a double joint whose sides are not alike: its
// faces, the gap as far as half the root face, and a cap.
func (j shape) firstSide(gap, d, prep, fac, top origin.Figure) origin.Figure {
	if !j.Type.twoSided() || j.FirstDepth == 0 && (j.Angle2 == j.Angle || j.Type == DoubleU || j.Type == DoubleJ) {
		return origin.Figure{}
	}
	deep := origin.Worked("depth of the first side", d.Value/2, "mm", "depth / 2", d)
	face := origin.Worked("faces of the first side", prep.Value, "mm2", "first side", prep)
	if j.FirstDepth > 0 {
		face = renamed(prep.From[0], face.Name)
		first := origin.Written("first depth", j.FirstDepth, "mm", j.Origin)
		deep = origin.Worked(deep.Name, j.FirstDepth+j.RootFace/2, "mm", "first depth + root face / 2", first, j.drawn("root face", j.RootFace, "mm"))
		if d.Value < j.Thickness {
			deep = origin.Worked(deep.Name, j.FirstDepth, "mm", "first depth", first)
		}
	} else {
		lean, how := func(a float64) float64 { return tanDeg(a / 2) }, "faces x tan(included angle / 2) / (tan(included angle / 2) + tan(second angle / 2))"
		if j.Type == DoubleBevel {
			lean, how = tanDeg, "faces x tan(included angle) / (tan(included angle) + tan(second angle))"
		}
		face = origin.Worked(face.Name, prep.Value*lean(j.Angle)/(lean(j.Angle)+lean(j.Angle2)), "mm2", how,
			prep, j.drawn("included angle", j.Angle, "deg"), j.drawn("second angle", j.Angle2, "deg"))
	}
	v := (gap.Value*deep.Value+face.Value)*fac.Value + top.Value
	return origin.Worked("area of the first side", v, "mm2", "("+gap.Name+" x depth of the first side + faces of the first side) x position factor on metal + cap area", gap, deep, face, fac, top)
}

// prepared gives the area of the bevelled or gouged faces of height H (each side of a double
// joint) and how much wider than the gap the groove opens.
func (j shape) prepared(H origin.Figure) (area origin.Figure, open float64, err error) {
	const name = "faces"
	h := H.Value
	a1, a2 := j.drawn("included angle", j.Angle, "deg"), j.drawn("second angle", j.Angle2, "deg")
	t1, t2 := tanDeg(j.Angle/2), tanDeg(j.Angle2/2)
	switch j.Type {
	case SingleV:
		return origin.Worked(name, h*h*t1, "mm2", "height of the preparation^2 x tan(included angle / 2)", H, a1), 2 * h * t1, nil
	case DoubleV:
		return origin.Worked(name, h*h*(t1+t2), "mm2", "height of the preparation^2 x (tan(included angle / 2) + tan(second angle / 2))", H, a1, a2), 2 * h * t1, nil
	case SingleBevel:
		t := tanDeg(j.Angle)
		return origin.Worked(name, h*h*t/2, "mm2", "height of the preparation^2 x tan(included angle) / 2", H, a1), h * t, nil
	case DoubleBevel:
		t, u := tanDeg(j.Angle), tanDeg(j.Angle2)
		return origin.Worked(name, h*h*(t+u)/2, "mm2", "height of the preparation^2 x (tan(included angle) + tan(second angle)) / 2", H, a1, a2), h * t, nil
	case SingleU, DoubleU, SingleJ, DoubleJ:
		return j.rounded(H, a1)
	}
	return origin.Worked(name, 0, "mm2", "0"), 0, nil // square
}

// rounded is a J or, doubled, a U: a round root of radius R with a face that leans by beta. Round
// part up to the tangent point R(1 - sin beta): R^2/2 (pi/2 - beta - sin beta cos beta); above it
// a face that starts R cos beta out and leans by tan beta.
func (j shape) rounded(H, angle origin.Figure) (origin.Figure, float64, error) {
	halves, how := 2.0, "included angle / 2"
	lean := j.Angle / 2
	if j.Type == SingleJ || j.Type == DoubleJ {
		halves, how, lean = 1, "included angle", j.Angle
	}
	times := halves
	if j.Type.twoSided() {
		times *= 2
	}
	if lean >= 45 {
		return origin.Figure{}, 0, fault("angle", "a U leans by about 8 degrees a side, a J by 10 to 20", "an angle of %.4g deg is no %s", j.Angle, j.Type)
	}
	b := lean * math.Pi / 180
	R := j.Radius
	foot := R * (1 - math.Sin(b))
	if H.Value <= foot {
		return origin.Figure{}, 0, fault("radius", "make the radius or the root face smaller, or choose a V", "a root radius of %.4g mm does not go into a preparation %.4g mm high", R, H.Value)
	}
	round := R * R / 2 * (math.Pi/2 - b - math.Sin(b)*math.Cos(b))
	up := H.Value - foot
	v := times * (round + up*R*math.Cos(b) + up*up*math.Tan(b)/2)
	r, l := j.drawn("radius", R, "mm"), origin.Worked("lean", lean, "deg", how, angle)
	f := origin.Worked("faces", v, "mm2",
		"halves x (radius^2 / 2 x (pi / 2 - lean x pi / 180 - sin(lean) x cos(lean)) + face height x radius x cos(lean) + face height^2 x tan(lean) / 2)",
		j.drawn("halves", times, ""), r, l, origin.Worked("face height", up, "mm", "height of the preparation - radius x (1 - sin(lean))", H, r, l))
	return f, halves * (R*math.Cos(b) + up*math.Tan(b)), nil
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
