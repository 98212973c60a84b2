package weld

import (
	"strings"
	"testing"
)

// TestWhatAJointHas: a figure that the joint does not have would count for nothing, so it is
// refused, with a way out.
func TestWhatAJointHas(t *testing.T) {
	fillet, v := Joint{Type: Fillet, Leg: 6, Length: 1000}, Joint{Type: SingleV, Thickness: 12, Length: 1000}
	x, plug := Joint{Type: DoubleV, Thickness: 20, Length: 1000}, Joint{Type: Plug, Thickness: 10, Diameter: 20}
	for _, c := range []struct {
		j      Joint
		change func(*Joint)
		want   string
	}{
		{fillet, func(j *Joint) { j.RootFace = 3 }, "a fillet has no root face"},
		{fillet, func(j *Joint) { j.RootGap = 3 }, "a fillet has no root gap"},
		{fillet, func(j *Joint) { j.Angle = 60 }, "a fillet has no angle"},
		{fillet, func(j *Joint) { j.BackGouge = true }, "a fillet has no back gouge"},
		{fillet, func(j *Joint) { j.Cap = 2 }, "a fillet has no cap"},
		{fillet, func(j *Joint) { j.Backing = true }, "a fillet has no backing"},
		{fillet, func(j *Joint) { j.PartialDepth = 3 }, "a fillet has no depth"},
		{fillet, func(j *Joint) { j.Bead = 50 }, "welds of 50 mm have no pitch"},
		{v, func(j *Joint) { j.Leg = 6 }, "a single V has no leg"},
		{v, func(j *Joint) { j.Throat = 6 }, "a single V has no throat"},
		{v, func(j *Joint) { j.BothSides = true }, "a single V is welded from one side"},
		{v, func(j *Joint) { j.Angle2 = 90 }, "a single V has no second angle"},
		{v, func(j *Joint) { j.FirstDepth = 5 }, "a single V has no first depth"},
		{v, func(j *Joint) { j.Radius = 5 }, "a single V has no radius"},
		{x, func(j *Joint) { j.FirstDepth = 20 }, "leaves nothing of 20 mm"},
		{x, func(j *Joint) { j.FirstDepth, j.RootFace = 17, 4 }, "leaves nothing of the 16 mm"},
		{plug, func(j *Joint) { j.Gap = 1 }, "a plug has no gap"},
		{plug, func(j *Joint) { j.Bead = 30 }, "a plug has no bead"},
		{plug, func(j *Joint) { j.Bead, j.Pitch = 0, 30 }, "a plug has no pitch"},
		{Joint{Type: Square, Thickness: 8, Length: 100}, func(j *Joint) { j.PartialDepth, j.Cap = 4, None }, "no room for metal"},
		{Joint{Type: Square, Thickness: 8, Length: 100}, func(j *Joint) { j.RootFace = 4 }, "a square butt has no root face"},
	} {
		j := c.j
		if _, err := j.Section(0, true); err != nil {
			t.Fatalf("%+v as it is: %v", j, err)
		}
		c.change(&j)
		_, err := j.Section(0, true)
		if err == nil || !strings.Contains(err.Error(), c.want) || hintOf(err) == "" {
			t.Errorf("%+v: %v, want %q with a way out", j, err, c.want)
		}
	}
	none := fillet // nothing at all is no figure
	none.RootGap, none.RootFace, none.Cap = None, None, None
	if _, err := none.Section(0, true); err != nil {
		t.Error(err)
	}
}

// TestSidesThatAreNotAlike by hand: a double V of 30 mm, gap 3, face 2, 18 mm deep at 60 degrees and 10 mm
// at 90: 3 x 30 + 18^2 tan 30 + 10^2 tan 45 = 90 + 187.06 + 100 mm2. The first side has the gap to the middle of the face:
// 3 x 19 + 187.06 = 244.06 mm2, the second 133. Runs of 30 with a root of 24: 1 + ceil(220.06 / 30) = 9, and
// 1 + ceil(109 / 30) = 5.
func TestSidesThatAreNotAlike(t *testing.T) {
	j := Joint{Type: DoubleV, Thickness: 30, RootGap: 3, RootFace: 2, FirstDepth: 18, Angle: 60, Angle2: 90, Length: 1000}
	e := mustWork(t, plain, Seam{Joint: j, Procedure: &Procedure{Process: 136, BeadArea: 30}})
	near(t, "mm2", e.Seams[0].Section.Area, 90+324*tanDeg(30)+100, 1e-9)
	if e.Passes != 14 {
		t.Errorf("%d runs, want 9 and 5", e.Passes)
	}
	for _, f := range e.Steps() {
		checkTree(t, f)
	}
	// Half and half is the double V without a depth of its own.
	j.FirstDepth, j.Angle2 = 14, 60
	half := areaOf(t, j, PA)
	j.FirstDepth = 0
	near(t, "alike", half.Area, areaOf(t, j, PA).Area, 1e-9)
	// The deeper side of a K, a double U and a double J holds more: the square of the depth counts.
	for _, kind := range []JointType{DoubleV, DoubleBevel, DoubleU, DoubleJ} {
		even, odd := Joint{Type: kind, Thickness: 60, Length: 1000}, Joint{Type: kind, Thickness: 60, FirstDepth: 40, Length: 1000}
		if a, b := areaOf(t, even, PA), areaOf(t, odd, PA); a.Area >= b.Area || a.Width >= b.Width {
			t.Errorf("%v: %v mm2 evenly, %v unevenly", kind, a.Area, b.Area)
		}
	}
	// Without a root gap or face: 2/3 and 1/3 of 30 mm, by hand (400 + 100) tan 30.
	thirds := areaOf(t, Joint{Type: DoubleV, Thickness: 30, RootGap: None, FirstDepth: 20, Length: 1}, PA)
	near(t, "two thirds", thirds.Area, 500*tanDeg(30), 1e-9)
}

func TestWireIsNoElectrode(t *testing.T) {
	fillet := Joint{Type: Fillet, Leg: 6, Length: 1000}
	for want, p := range map[string]Procedure{"no wire of 1.2 mm": {Process: 111, WireDiameter: 1.2}, "no wire feed": {Process: 111, WireFeed: 8}, "no stick electrode of 4 mm": {Process: 136, ElectrodeDiameter: 4}} {
		_, err := Work([]Seam{{Joint: fillet, Procedure: &p}}, plain)
		if err == nil || !strings.Contains(err.Error(), want) || hintOf(err) == "" {
			t.Errorf("%+v: %v, want %q", p, err, want)
		}
	}
	if e := mustWork(t, plain, Seam{Joint: fillet, Procedure: &Procedure{ElectrodeDiameter: 3.2}}); e.Seams[0].Process != 111 {
		t.Errorf("an electrode is welded with %v", e.Seams[0].Process)
	}
	if e := mustWork(t, plain, Seam{Joint: Joint{Type: Fillet, Leg: 12, Thickness: 5, Length: 1000}}); len(e.Warnings) != 1 || !strings.Contains(e.Warnings[0], "12 mm is a lot on 5 mm") {
		t.Errorf("warnings %q", e.Warnings)
	}
}
