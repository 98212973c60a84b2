package weld

import "strings"

// belonging is a figure of a Joint that only some joints have.
type belonging struct {
	field, hint string
	given       func(Joint) bool
	has         func(JointType) bool
}

// HasLegs says whether the joint has legs: a fillet, a lap or a corner.
func (t JointType) HasLegs() bool { return t == Fillet || t == Lap || t == Corner }

var belongings = []belonging{
	{"leg", "give thickness and preparation", func(j Joint) bool { return j.Leg > 0 }, JointType.HasLegs},
	{"second leg", "give thickness and preparation", func(j Joint) bool { return j.Leg2 > 0 }, JointType.HasLegs},
	{"throat", "give thickness, and depth where it does not go through", func(j Joint) bool { return j.Throat > 0 }, JointType.HasLegs},
	{"root gap", "the gap that poor fit-up leaves is `gap`", func(j Joint) bool { return j.RootGap > 0 }, JointType.groove},
	{"root face", "leave it out", func(j Joint) bool { return j.RootFace > 0 }, func(t JointType) bool { return t.groove() && t != Square }},
	{"angle", "leave it out", func(j Joint) bool { return j.Angle > 0 }, func(t JointType) bool { return t.groove() && t != Square }},
	{"second angle", "a joint prepared from both faces is a double one", func(j Joint) bool { return j.Angle2 > 0 }, JointType.twoSided},
	{"first depth", "a joint prepared from both faces is a double one", func(j Joint) bool { return j.FirstDepth > 0 }, JointType.twoSided},
	{"radius", "only U and J have one", func(j Joint) bool { return j.Radius > 0 }, func(t JointType) bool { return t >= SingleU && t <= DoubleJ }},
	{"depth", "leave it out", func(j Joint) bool { return j.PartialDepth > 0 }, JointType.groove},
	{"cap", "overweld is `overweld`, or a larger leg", func(j Joint) bool { return j.Cap > 0 }, func(t JointType) bool { return t.groove() || t == Corner }},
	{"backing", "leave it out", func(j Joint) bool { return j.Backing }, JointType.groove},
	{"back-gouge", "a weld right through a T is a single or double bevel", func(j Joint) bool { return j.BackGouge }, JointType.groove},
	{"both sides", "a joint welded from both faces is a double one, or one with back-gouge", func(j Joint) bool { return j.BothSides },
		func(t JointType) bool { return t.HasLegs() || t == Square }},
	{"gap", "leave it out", func(j Joint) bool { return j.Gap > 0 }, func(t JointType) bool { return t != Plug && t != Slot }},
	{"bead", "a long hole is a slot", func(j Joint) bool { return j.Bead > 0 }, func(t JointType) bool { return t != Plug }},
	{"onto", "leave it out", func(j Joint) bool { return j.Onto > 0 }, func(t JointType) bool { return t != Plug && t != Slot }},
	{"pitch", "give count", func(j Joint) bool { return j.Pitch > 0 }, func(t JointType) bool { return t != Plug && t != Slot }},
}

// checkBelongs refuses figures that the joint does not have: left unsaid, they would count for
// nothing, and nobody would know.
func (j Joint) checkBelongs() error {
	for _, b := range belongings {
		if b.given(j) && !b.has(j.Type) {
			if b.field == "both sides" {
				return fault(b.field, b.hint, "a %s is welded from one side", j.Type)
			}
			return fault(b.field, b.hint, "a %s has no %s", j.Type, strings.ReplaceAll(b.field, "-", " "))
		}
	}
	switch {
	case j.Bead > 0 && j.Pitch == 0 && j.Type != Slot:
		return fault("bead", "give pitch, from the start of one weld to the start of the next, or leave bead out", "welds of %.4g mm have no pitch", j.Bead)
	case j.FirstDepth > 0 && j.Thickness > 0 && j.FirstDepth >= j.Thickness:
		return fault("first depth", "leave something for the second side", "a first side %.4g mm deep leaves nothing of %.4g mm", j.FirstDepth, j.Thickness)
	}
	return nil
}
