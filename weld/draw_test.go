package weld

import (
	"math"

	"pgregory.net/rapid"
)

func drawNumber(t *rapid.T, name string, lo, hi float64) float64 {
	return math.Round(rapid.Float64Range(lo, hi).Draw(t, name)*8) / 8
}

// drawJoint gives any joint that can be welded.
func drawJoint(t *rapid.T) Joint {
	j := Joint{Type: JointType(rapid.IntRange(int(Fillet), int(lastJoint)).Draw(t, "type")), Length: drawNumber(t, "length", 50, 20000)}
	j.Thickness = drawNumber(t, "thickness", 12, 60)
	switch j.Type {
	case Fillet, Lap:
		j.Leg = drawNumber(t, "leg", 3, 25)
		j.BothSides = rapid.Bool().Draw(t, "both sides")
		if rapid.Bool().Draw(t, "intermittent") {
			j.Bead = drawNumber(t, "bead", 20, 100)
			j.Pitch = j.Bead + drawNumber(t, "between", 0, 200)
		}
	case Plug, Slot:
		j.Diameter = drawNumber(t, "diameter", 10, 40)
		if j.Type == Slot {
			j.Bead = j.Diameter + drawNumber(t, "slot", 0, 100)
		}
		j.Count = rapid.IntRange(1, 20).Draw(t, "count")
	case DoubleU, DoubleJ:
		j.Thickness += 20
	}
	if j.Type.twoSided() {
		if rapid.Bool().Draw(t, "unlike") {
			j.FirstDepth = j.Thickness * 0.6
		}
		if j.Type < SingleU && rapid.Bool().Draw(t, "two angles") {
			j.Angle, j.Angle2 = 60, drawNumber(t, "second angle", 40, 70)
		}
	}
	if j.Type != Plug && j.Type != Slot && rapid.Bool().Draw(t, "gap") {
		j.Gap = drawNumber(t, "fit-up gap", 0.5, 3)
	}
	if j.Type.groove() {
		j.BackGouge = rapid.Bool().Draw(t, "back-gouge")
		if j.Type != Square && j.Type < SingleU && j.FirstDepth == 0 && rapid.Bool().Draw(t, "partial") {
			j.PartialDepth = j.Thickness / 2
		}
		if rapid.Bool().Draw(t, "flush") {
			j.Cap = None
		}
	}
	return j
}

func drawSeam(t *rapid.T) Seam {
	s := Seam{Joint: drawJoint(t), Position: Position(rapid.IntRange(0, int(lastPosition)).Draw(t, "position"))}
	p := Procedure{Process: processes[rapid.IntRange(0, len(processes)-1).Draw(t, "process")].number}
	if p.Process == 121 && s.Position > PC {
		s.Position = PA
	}
	switch rapid.IntRange(0, 4).Draw(t, "how") {
	case 0:
		p.Current = drawNumber(t, "current", 90, 300)
	case 1:
		p.Deposition = drawNumber(t, "deposition", 0.5, 6)
		p.Position = s.Position
	case 2:
		if p.Travel = drawNumber(t, "travel", 100, 600); p.Process != 111 {
			p.WireFeed = drawNumber(t, "wire feed", 3, 12)
		}
	case 3:
		p.Set, p.Current = Set{RatedCurrent: 200, DutyCycle: 0.25}, 200
		p.MaxHeatInput = 1.5
	}
	s.Procedure = &p
	s.Turns = rapid.IntRange(0, 2).Draw(t, "turns")
	return s
}

func drawCircumstances(t *rapid.T) Circumstances {
	return Circumstances{
		Site: rapid.Bool().Draw(t, "site"), NoOverweld: rapid.Bool().Draw(t, "no overweld"), ByParts: rapid.Bool().Draw(t, "by parts"),
		Ambient:         drawNumber(t, "ambient", -20, 35),
		Execution:       rapid.SampledFrom([]string{"", "EN 1090-2", "AWS D1.1"}).Draw(t, "execution"),
		PreheatStandard: rapid.SampledFrom([]string{"", "EN 1011-2 A", "EN 1011-2 B", "AWS D1.1"}).Draw(t, "preheat"),
		Steel:           Steel{Grade: rapid.SampledFrom([]string{"", "S355", "S690Q", "A514"}).Draw(t, "grade"), C: 0.17, Mn: 1.45, Cr: 0.05},
	}
}
