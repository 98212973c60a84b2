package weld

import (
	"math"

	"sailby/tasks/origin"
)

// shape is a joint with every default in place, and where each of those came from.
type shape struct {
	Joint
	usual map[string]origin.Origin // by the figure's name
}

// drawn makes a figure of one of the joint's sizes: written, or the default it has.
func (j shape) drawn(name string, v float64, unit string) origin.Figure {
	if o, ok := j.usual[name]; ok {
		return origin.Figure{Name: name, Value: v, Unit: unit, Origin: o}
	}
	return origin.Written(name, v, unit, j.Origin)
}

// filled gives j with every default in place, for position pos.
func (j Joint) filled(pos Position, overweld bool) (shape, error) {
	s := shape{Joint: j, usual: map[string]origin.Origin{}}
	if err := j.check(); err != nil {
		return s, err
	}
	s.fillLegs()
	s.or("thickness", &s.Thickness, s.Leg/0.7, origin.Judgement, "a fillet's leg over 0.7, where no thickness is given")
	s.or("second thickness", &s.Thickness2, s.Thickness, origin.Judgement, "as the other part")
	s.or("depth", &s.PartialDepth, s.Thickness, origin.Formula, "thickness")
	s.or("fit-up gap", &s.Gap, 0, origin.Judgement, "fitted up as drawn")
	gap, kind, note := s.usualGap()
	s.or("root gap", &s.RootGap, gap, kind, note)
	face, radius := 0.0, 0.0
	switch j.Type {
	case SingleU, DoubleU:
		face, radius = 3, 6
	case SingleJ, DoubleJ:
		face, radius = 3, 8
	}
	s.or("root face", &s.RootFace, face, origin.Memory, iso9692)
	s.or("radius", &s.Radius, radius, origin.Memory, iso9692)
	angle, kind, note := usualAngle(j.Type, pos)
	s.or("included angle", &s.Angle, angle, kind, note)
	s.or("second angle", &s.Angle2, s.Angle, origin.Judgement, "as the first side")
	usualCap := 0.0
	if overweld && (j.Type.groove() || j.Type == Corner) {
		usualCap = 1.5
	}
	s.or("cap height", &s.Cap, usualCap, origin.Judgement, "1.5 mm over flush where overweld is on, else flush")
	if s.Count == 0 {
		s.Count = 1
	}
	return s, s.measured()
}

const iso9692 = "usual preparation, ISO 9692-1"

// or puts the default v in a field that was left at zero and remembers it under name; None
// becomes 0.
func (j shape) or(name string, field *float64, v float64, kind origin.Kind, note string) {
	switch *field {
	case 0:
		*field = v
		j.usual[name] = origin.Origin{Kind: kind, Source: note}
	case None:
		*field = 0
	}
}

// fillLegs gives fillets, laps and corners their legs.
func (j *shape) fillLegs() {
	leg := func(v float64, kind origin.Kind, note string) {
		j.Leg = v
		j.usual["leg drawn"] = origin.Origin{Kind: kind, Source: note}
	}
	switch {
	case j.Leg > 0:
	case j.Throat > 0:
		leg(j.Throat*math.Sqrt2, origin.Formula, "throat x sqrt(2)")
	case j.Type == Lap:
		leg(lapLeg(j.Thickness), origin.Memory, "the edge's thickness, less 2 mm above 6 mm (AWS D1.1)")
	case j.Type == Corner:
		leg(j.Thickness, origin.Formula, "thickness")
		if j.Leg2 == 0 && j.Thickness2 > 0 {
			j.Leg2 = j.Thickness2
		}
	}
	j.or("second leg drawn", &j.Leg2, j.Leg, origin.Judgement, "as the first leg")
}

// measured works out the length where it follows from the shape, and checks that shapes fit.
func (j *shape) measured() error {
	switch j.Type {
	case Plug:
		j.Length = j.Diameter * float64(j.Count)
	case Slot:
		j.Length = j.Bead * float64(j.Count)
	default:
		if j.Onto > 0 {
			j.onRun()
		} else if j.Length == 0 {
			j.Length = math.Pi * j.Diameter * float64(j.Count)
			j.usual["length"] = origin.Origin{Kind: origin.Formula, Source: "pi x diameter x count"}
		}
	}
	if j.Length <= 0 {
		return fault("length", "give the length in all, or the diameter of the tube", "the %s has no length", j.Type)
	}
	if j.Length > maxLength {
		return fault("length", "write it as several tasks", "a seam of %.4g m is beyond one task", j.Length/1000)
	}
	if j.PartialDepth > j.Thickness {
		return fault("depth", "give a depth up to the thickness", "partial penetration of %.4g mm is more than the thickness %.4g mm", j.PartialDepth, j.Thickness)
	}
	if j.Type == Square && j.PartialDepth < j.Thickness && j.RootGap+j.Gap == 0 && j.Cap == 0 {
		return fault("root gap", "give the root gap, or a cap", "a square butt %.4g mm deep without a gap has no room for metal", j.PartialDepth)
	}
	if j.Type.groove() && j.PartialDepth == j.Thickness && j.RootFace >= j.Thickness && j.Type != Square {
		return fault("root face", "give a root face below the thickness", "root face %.4g mm leaves nothing of %.4g mm to weld", j.RootFace, j.Thickness)
	}
	if whole := j.prepHeight(); j.FirstDepth > 0 && j.FirstDepth >= whole {
		return fault("first depth", "leave something for the second side", "a first side %.4g mm deep leaves nothing of the %.4g mm that are prepared", j.FirstDepth, whole)
	}
	return nil
}

// prepHeight is the height of the preparation of both sides together: the thickness less the
// root face; a given depth is the preparation's own.
func (j shape) prepHeight() float64 {
	if j.PartialDepth < j.Thickness {
		return j.PartialDepth
	}
	return j.Thickness - j.RootFace
}

// usualGap is the root gap where none is given, with its origin.
func (j shape) usualGap() (float64, origin.Kind, string) {
	switch {
	case !j.Type.groove() || j.PartialDepth < j.Thickness:
		return 0, origin.Judgement, "no root gap"
	case j.Backing:
		return 6, origin.Practice, "6 mm on a backing strip"
	case j.Type == Square:
		return math.Min(j.Thickness/2, 3), origin.Memory, iso9692 + ": half the thickness, to 3 mm"
	}
	kind, note := origin.Memory, iso9692
	if j.Type == SingleV {
		kind, note = origin.Table, vSource
	}
	switch {
	case j.Thickness <= 6:
		return 1, kind, note
	case j.Thickness < 10:
		return 1.5, kind, note
	}
	return 2, kind, note
}

// usualAngle is the included angle where none is given, with its origin.
func usualAngle(t JointType, pos Position) (float64, origin.Kind, string) {
	switch t {
	case SingleV, DoubleV:
		switch pos {
		case PF, PG, PH, PJ, HL045:
			return 70, origin.Table, vSource
		case PE, PD:
			return 80, origin.Table, vSource
		}
		return 60, origin.Table, vSource
	case SingleBevel, DoubleBevel:
		return 50, origin.Memory, iso9692 + ": 35 to 60 deg"
	case SingleU, DoubleU:
		return 16, origin.Memory, iso9692 + ": 8 deg a side"
	case SingleJ, DoubleJ:
		return 15, origin.Memory, iso9692 + ": 10 to 20 deg"
	}
	return 0, origin.Judgement, "no bevel"
}

// lapLeg is the leg of a lap whose size is not given: the edge, less 2 mm above 6 mm so that the
// edge still shows (from memory: AWS D1.1).
func lapLeg(t float64) float64 {
	if t > 6 {
		return t - 2
	}
	return t
}
