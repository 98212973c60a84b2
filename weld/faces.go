package weld

import (
	"math"

	"sailby/tasks/origin"
)

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
