package weld

import (
	"math"

	"sailby/tasks/origin"
)

// None in a field of a Joint means that there is truly nothing, where zero would mean the
// default: RootGap: None is plates hard together, Cap: None a flush weld.
const None = -1e300

// Joint is one joint as drawn. Lengths are millimetres, angles degrees. A field left at zero has
// its default; None means nothing at all.
type Joint struct {
	Type JointType

	Leg    float64 // fillet leg z; or give Throat
	Leg2   float64 // the other leg of an unequal fillet; default Leg
	Throat float64 // fillet throat a; leg is a times the square root of two

	Thickness  float64 // of the thinner part; needed but for fillets, where the default is leg over 0.7
	Thickness2 float64 // of the other part; default Thickness

	RootGap      float64 // b; default 2 (1.5 below 8, 1 up to 6 thick; half the thickness to 3 for square; 6 on backing)
	RootFace     float64 // c; default none, 3 for U and J
	Angle        float64 // included angle: single and double V by position 60, 60, 70, 80 (PA, PC, PF, PE); bevel 50; U 16; J 15
	Angle2       float64 // of the second side of a double joint; default Angle
	Radius       float64 // of a U or J; default 6 and 8
	FirstDepth   float64 // height of the preparation on the first side of a double joint; default half of it
	PartialDepth float64 // depth of a weld of partial penetration, of a double joint both sides together; default all through
	Cap          float64 // height above flush; default 1.5 where overweld is on, else none
	Backing      bool    // welded on a backing strip that stays
	BackGouge    bool    // root gouged from behind and welded again

	Gap       float64 // fit-up gap beyond the drawing: a fillet's legs grow by it, a root gap opens by it
	BothSides bool    // the same again on the other side (fillet, square, lap)

	Bead  float64 // intermittent: length of each weld; slot: its length
	Pitch float64 // intermittent: from the start of one weld to the start of the next

	Diameter float64 // outside diameter of a tube, hole of a plug, width of a slot
	Onto     float64 // outside diameter of a tube that the tube of Diameter stands on, square: Length is that of the saddle
	Length   float64 // in all; default once round the tube times Count
	Count    int     // how many seams (or plugs) Length is made of; default 1

	Origin origin.Origin // where the drawing's figures are written
}

const (
	maxLength = 1e7 // 10 km of seam: beyond any one task
	maxThick  = 400.0
	maxLeg    = 60.0
)

// groove says whether the joint is a butt weld in a prepared groove.
func (t JointType) groove() bool { return t >= Square && t <= DoubleJ }

// twoSided says whether the joint's preparation is on both faces.
func (t JointType) twoSided() bool {
	return t == DoubleV || t == DoubleBevel || t == DoubleU || t == DoubleJ
}

// check refuses what cannot be a joint.
func (j Joint) check() error {
	if j.Type == 0 || j.Type > lastJoint {
		return fault("joint", "give one, for instance fillet or single V", "no such joint")
	}
	bare := func(v float64) float64 { // None is allowed where a default exists
		if v == None {
			return 0
		}
		return v
	}
	err := first(
		optional("leg", j.Leg, 1, maxLeg, "mm"),
		optional("second leg", j.Leg2, 1, maxLeg, "mm"),
		optional("throat", j.Throat, 0.7, maxLeg, "mm"),
		optional("thickness", j.Thickness, 0.5, maxThick, "mm"),
		optional("second thickness", j.Thickness2, 0.5, maxThick, "mm"),
		optional("root gap", bare(j.RootGap), 0, 40, "mm"),
		optional("root face", bare(j.RootFace), 0, maxThick, "mm"),
		optional("angle", j.Angle, 1, 120, "deg"),
		optional("second angle", j.Angle2, 1, 120, "deg"),
		optional("radius", j.Radius, 1, 40, "mm"),
		optional("first depth", j.FirstDepth, 0.5, maxThick, "mm"),
		optional("depth", j.PartialDepth, 0.5, maxThick, "mm"),
		optional("cap", bare(j.Cap), 0, 10, "mm"),
		optional("gap", bare(j.Gap), 0, 40, "mm"),
		optional("bead", j.Bead, 5, maxLength, "mm"),
		optional("pitch", j.Pitch, 5, maxLength, "mm"),
		optional("diameter", j.Diameter, 3, 1e5, "mm"),
		optional("onto", j.Onto, 3, 1e5, "mm"),
		optional("length", j.Length, 0.1, maxLength, "mm"),
		within("count", float64(j.Count), 0, 1e5, ""))
	if err != nil {
		return err
	}
	return first(j.checkBelongs(), j.checkNeeds())
}

// checkNeeds asks for the figures that no default can stand for.
func (j Joint) checkNeeds() error {
	switch {
	case j.Type == Fillet && j.Leg == 0 && j.Throat == 0:
		return fault("leg", "give leg or throat", "the fillet has no size")
	case j.Leg > 0 && j.Throat > 0 && j.Leg2 == 0 && math.Abs(j.Leg-j.Throat*math.Sqrt2) > 0.3:
		return fault("throat", "give one of the two", "leg %.4g mm and throat %.4g mm are not the same fillet (a leg of %.4g mm has a throat of %.3g mm)", j.Leg, j.Throat, j.Leg, j.Leg/math.Sqrt2)
	case j.Type != Fillet && j.Thickness == 0 && !(j.Type == Lap && j.Leg+j.Throat > 0):
		return fault("thickness", "give the thickness of the thinner part", "the %s has no thickness", j.Type)
	case (j.Type == SingleBevel || j.Type == DoubleBevel) && math.Max(j.Angle, j.Angle2) > 75:
		return fault("angle", "a bevel is prepared at 35 to 60 deg", "a bevel of %.4g deg cannot be filled", math.Max(j.Angle, j.Angle2))
	case (j.Type == Plug || j.Type == Slot) && j.Diameter == 0:
		return fault("diameter", "give the hole's diameter, or the slot's width", "the %s has no diameter", j.Type)
	case j.Onto > 0 && j.Diameter == 0:
		return fault("diameter", "give the outside diameter of the branch", "a branch onto a tube of %.4g mm has no diameter", j.Onto)
	case j.Onto > 0 && j.Onto < j.Diameter:
		return fault("onto", "give the outside diameter of the larger tube, which the branch stands on", "a branch of %.4g mm is larger than the tube of %.4g mm", j.Diameter, j.Onto)
	case j.Onto > 0 && j.Length > 0:
		return fault("length", "leave one of the two out", "the length of %.4g mm and the saddle on a tube of %.4g mm are both given", j.Length, j.Onto)
	case j.Type == Slot && j.Bead < j.Diameter:
		return fault("bead", "give the slot's length, not less than its width", "slot %.4g mm long is shorter than its width %.4g mm", j.Bead, j.Diameter)
	case j.Pitch > 0 && j.Bead == 0:
		return fault("bead", "give the length of each weld", "intermittent weld at a pitch of %.4g mm has no length of each weld", j.Pitch)
	case j.Pitch > 0 && j.Bead > j.Pitch:
		return fault("pitch", "pitch is from the start of one weld to the start of the next", "welds of %.4g mm do not fit a pitch of %.4g mm", j.Bead, j.Pitch)
	}
	return nil
}

// share is the welded part of the length: 1, or bead over pitch.
func (j Joint) share() float64 {
	if j.Pitch > 0 {
		return j.Bead / j.Pitch
	}
	return 1
}

// faces is how many sides are welded alike.
func (j Joint) faces() int {
	if j.BothSides && !j.Type.twoSided() && j.Type != Plug && j.Type != Slot {
		return 2
	}
	return 1
}
