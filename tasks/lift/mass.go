package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// PartMass is what one part of an assembly comes to, all its pieces together.
type PartMass struct {
	Name      string
	Count     int
	Each      float64 // kg, best estimate of one piece, with water, silt and rust
	Mass      float64 // kg
	Heavy     float64 // kg, with the allowance
	Surface   float64 // m2
	CG        [3]float64
	Low, High [3]float64 // mm, corners of the box around all pieces
	Figure    origin.Figure
}

// Total is what an assembly comes to.
type Total struct {
	Mass      float64       // kg, best estimate
	Heavy     float64       // kg, with the allowance of each part
	Allowance float64       // Heavy over Mass
	CG        [3]float64    // mm
	Slack     float64       // mm by which the centre of gravity may be off lengthwise, if not found by lifting
	Surface   float64       // m2 of outside surface; faces that parts cover on each other are not taken off
	Low, High [3]float64    // mm, corners of the box around it
	Displaced float64       // litres when wholly under water, open bores flooded
	Flooded   float64       // litres of water that open bores hold when flooded
	Parts     []PartMass    // in the order given
	Figure    origin.Figure // Mass
	Notes     []string
}

// Load gives the assembly as one thing to move.
func (t Total) Load(name string) Load {
	return Load{Name: name, Mass: t.Mass, CG: t.CG, Allowance: math.Max(t.Allowance, 1), From: t.Figure,
		Length: t.High[0] - t.Low[0], Width: t.High[1] - t.Low[1], Height: t.High[2] - t.Low[2]}
}

// Mass works out what parts come to together: mass, centre of gravity, surface to paint, volume.
//
// Special cases are:
//
//	a stated mass overrules what sizes give, with the allowance of how it is known
//	weld metal without a stated mass is a share of the metal parts; paint without an area covers all
//	water, silt and rust scale count at the middle of the piece, as guessed
//
// Errors: no parts, a part without what it needs, numbers out of range; each names the part.
func Mass(parts []Part) (Total, error) {
	if len(parts) == 0 {
		return Total{}, fault("name at least one part", "an assembly without parts has no mass")
	}
	sum := newSum()
	done := make([]PartMass, len(parts))
	var late []int
	parts = append([]Part(nil), parts...)
	for i, p := range parts {
		if p.Name == "" {
			p.Name = fmt.Sprintf("part %d", i+1)
			parts[i] = p
		}
		if err := p.valid(); err != nil {
			return Total{}, err
		}
		if p.Shape.Kind == Weld || p.Shape.Kind == Paint {
			late = append(late, i)
			continue
		}
		m, err := p.total(&sum)
		if err != nil {
			return Total{}, err
		}
		done[i] = m
	}
	base := sum // weld metal and paint lie on what was there before them
	for _, i := range late {
		m, err := parts[i].film(base)
		if err != nil {
			return Total{}, err
		}
		sum.put(m.Mass, m.Heavy, base.centre())
		done[i] = m
	}
	return sum.total(done)
}

// sum adds parts up.
type sum struct {
	mass, heavy, surface float64
	moment               [3]float64
	low, high            [3]float64
	solid, sealed, open  float64 // litres
	notes                []string
}

func newSum() sum {
	inf := math.Inf(1)
	return sum{low: [3]float64{inf, inf, inf}, high: [3]float64{-inf, -inf, -inf}}
}

func (s *sum) put(mass, heavy float64, at [3]float64) {
	s.mass += mass
	s.heavy += heavy
	s.moment = add(s.moment, scale(at, mass))
}

func (s *sum) centre() [3]float64 {
	if s.mass == 0 {
		return [3]float64{}
	}
	return scale(s.moment, 1/s.mass)
}

// extend grows the box by a point.
func extend(low, high *[3]float64, p [3]float64) {
	for i := range p {
		low[i] = math.Min(low[i], p[i])
		high[i] = math.Max(high[i], p[i])
	}
}

// total works out all pieces of a part and adds them to s.
func (p Part) total(s *sum) (PartMass, error) {
	one, err := p.piece()
	if err != nil {
		return PartMass{}, err
	}
	u, v, w, err := p.axes()
	if err != nil {
		return PartMass{}, err
	}
	allow := allowance(p.known())
	if p.Allowance != 0 {
		allow = p.written("weight allowance", p.Allowance, "")
	}
	extra := p.extras(one.surface)
	each := one.mass.Value + extra.Value
	heavy := one.mass.Value*allow.Value + extra.Value*allowance(Guessed).Value
	n := p.count()
	out := PartMass{Name: p.Name, Count: n, Each: each, Mass: each * float64(n), Heavy: heavy * float64(n), Surface: one.surface * float64(n)}
	box := newSum()
	for i := range n {
		middle := p.middle(i, one, u, v, w)
		box.put(each, heavy, middle)
		for corner := range 8 {
			c := middle
			for k, dir := range [][3]float64{u, v, w} {
				half := one.size[k] / 2
				if corner>>k&1 == 1 {
					half = -half
				}
				c = add(c, scale(dir, half))
			}
			extend(&box.low, &box.high, c)
		}
	}
	out.CG, out.Low, out.High = box.centre(), box.low, box.high
	out.Figure = origin.Worked(p.Name, out.Mass, "kg", "pieces x mass of one", p.written("pieces", float64(n), ""), one.mass)
	if extra.Value > 0 {
		out.Figure.From = append(out.Figure.From, extra)
	}
	out.Figure.From = append(out.Figure.From, allow)
	s.put(out.Mass, out.Heavy, out.CG)
	s.surface += out.Surface
	extend(&s.low, &s.high, out.Low)
	extend(&s.low, &s.high, out.High)
	s.solid += one.metal * float64(n)
	if p.Shape.Sealed {
		s.sealed += one.bore * float64(n)
	} else {
		s.open += one.bore * float64(n)
	}
	s.notes = append(s.notes, p.Shape.Section.Notes...)
	return out, nil
}

// middle gives the middle of the i-th piece.
func (p Part) middle(i int, one piece, u, v, w [3]float64) [3]float64 {
	at := p.at(i)
	if p.Middle || one.centred {
		return at
	}
	at = add(at, scale(u, one.size[0]/2))
	if one.onCentre {
		return at
	}
	return add(add(at, scale(v, one.size[1]/2)), scale(w, one.size[2]/2))
}

// total closes the sum.
func (s sum) total(parts []PartMass) (Total, error) {
	t := Total{Mass: s.mass, Heavy: s.heavy, CG: s.centre(), Surface: s.surface, Low: s.low, High: s.high,
		Displaced: s.solid + s.sealed, Flooded: s.open, Parts: parts, Notes: unique(s.notes)}
	t.Allowance = t.Heavy / t.Mass
	t.Slack = 0.05 * math.Max(t.High[0]-t.Low[0], t.High[1]-t.Low[1])
	t.Notes = append(t.Notes, fmt.Sprintf("centre of gravity worked out, not found by lifting: allow %s mm either way (5 %% of the plan length, from memory)", origin.Trim(math.Ceil(t.Slack))))
	t.Figure = origin.Worked("mass", t.Mass, "kg", "sum of the parts")
	for _, p := range parts {
		t.Figure.From = append(t.Figure.From, p.Figure)
	}
	if t.Mass > maxMass {
		return Total{}, fault("check the units of its sizes", "the assembly comes to %s kg, beyond what is planned here", origin.Trim(t.Mass))
	}
	return t, nil
}

// unique drops repeated texts, keeping the order.
func unique(list []string) []string {
	seen := map[string]bool{}
	var out []string
	for _, s := range list {
		if !seen[s] {
			seen[s] = true
			out = append(out, s)
		}
	}
	return out
}
