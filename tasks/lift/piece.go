package lift

import (
	"math"

	"sailby/tasks/origin"
)

// piece is what one of a part's equal pieces comes to.
type piece struct {
	mass     origin.Figure // kg, before allowance and without what is in or on it
	surface  float64       // m2
	size     [3]float64    // mm along, across, up
	metal    float64       // litres of solid material
	bore     float64       // litres enclosed
	centred  bool          // At is its middle whatever Middle says
	onCentre bool          // a bar: At is the centre of its start
}

// piece works out one piece of a bar, plate, bolt set or item; weld metal and paint come later,
// when the rest is known.
func (p Part) piece() (piece, error) {
	density, err := Density(p.Material)
	if err != nil && p.Stated == 0 {
		return piece{}, err
	}
	if err != nil {
		density = densities["steel"]
	}
	var out piece
	switch p.Shape.Kind {
	case Bar:
		out, err = p.bar(density)
	case Plate:
		out, err = p.plate(density)
	case Bolts:
		out, err = p.bolts(density)
	case Item:
		out, err = p.item()
	default:
		return piece{}, fault("use bar, plate, bolts, weld, paint or item", "part %q is of no known kind", p.Name)
	}
	if err != nil {
		return piece{}, err
	}
	if p.Shape.Kind != Item {
		out.metal = out.mass.Value / density.Value * 1000
	}
	if p.Stated > 0 {
		out.mass = p.stated(out.mass)
	}
	if out.mass.Value < tiny/1000 {
		return piece{}, fault("give its sizes, or state its mass", "part %q comes to no mass at all", p.Name)
	}
	return out, nil
}

// stated gives the mass that the job file states, with what was worked out beside it.
func (p Part) stated(computed origin.Figure) origin.Figure {
	f := p.written("mass of "+p.Name+", "+p.known().String(), p.Stated, "kg")
	if computed.Value > 0 && p.Shape.Kind != Item {
		computed.Name += " (overruled)"
		f.From = []origin.Figure{computed}
	}
	return f
}

// known says how the part's mass is known when nothing was said.
func (p Part) known() Known {
	switch {
	case p.Known != Unsaid:
		return p.Known
	case p.Stated > 0:
		return Guessed
	}
	return Drawn
}

func (p Part) bar(density origin.Figure) (piece, error) {
	s := p.Shape.Section
	if s.LineMass <= 0 && p.Stated == 0 {
		return piece{}, fault("give a section such as SHS 100x100x6", "part %q is a bar without a section", p.Name)
	}
	if p.Length <= 0 {
		return piece{}, fault("give its length", "part %q is a bar without a length", p.Name)
	}
	m := s.LineMass * p.Length / 1000
	how := "kg/m x length"
	from := []origin.Figure{s.figure(s.LineMass, "kg/m"), p.written("length", p.Length, "mm")}
	if density.Value != steelDensity {
		m *= density.Value / steelDensity
		how += " x density / 7850"
		from = append(from, density)
	}
	return piece{
		mass:    origin.Worked("mass of "+p.Name, m, "kg", how, from...),
		surface: s.Surface * p.Length / 1000, bore: s.Bore * p.Length * 1e-6,
		size: [3]float64{p.Length, s.Wide, s.High}, onCentre: true,
	}, nil
}

func (p Part) plate(density origin.Figure) (piece, error) {
	s := p.Shape
	t := s.Thick
	perArea := t / 1000 * density.Value
	from := []origin.Figure{p.written("length", p.Length, "mm"), p.written("width", s.Width, "mm")}
	if s.Section.AreaMass > 0 { // a floor plate, or a plate by name
		t = s.Section.High
		perArea = s.Section.AreaMass * density.Value / steelDensity
		from = append(from, s.Section.figure(s.Section.AreaMass, "kg/m2"))
	} else {
		from = append(from, p.written("thickness", t, "mm"))
	}
	if p.Length <= 0 || s.Width <= 0 || t <= 0 {
		return piece{}, fault("give length, width and thickness", "part %q is a plate without all of its sizes", p.Name)
	}
	face := p.Length*s.Width - s.Holes
	if face <= 0 {
		return piece{}, fault("holes are mm2 cut out of it", "part %q: its holes are as large as the plate", p.Name)
	}
	if s.Holes > 0 {
		from = append(from, p.written("holes", s.Holes, "mm2"))
	}
	return piece{
		mass:    origin.Worked("mass of "+p.Name, perArea*face*1e-6, "kg", "length x width less holes x thickness x density", append(from, density)...),
		surface: (2*face + 2*(p.Length+s.Width)*t) * 1e-6,
		size:    [3]float64{p.Length, s.Width, t},
	}, nil
}

// bolts works out a hexagon bolt, its nut and two washers by proportions of the thread d:
// head 0.625 d high, nut 0.9 d, both 1.5 d across flats; washers 1.85 d wide and 0.15 d thick.
func (p Part) bolts(density origin.Figure) (piece, error) {
	d := p.Shape.Thread
	if (d <= 0 || p.Length <= 0) && p.Stated == 0 {
		return piece{}, fault("give thread and length, for instance M20 and 60 mm", "part %q is a bolt set without thread or length", p.Name)
	}
	hex := math.Sqrt(3) / 2 * 1.5 * d * 1.5 * d
	shank := math.Pi / 4 * d * d
	volume := shank*p.Length + hex*0.625*d + (hex-shank)*0.9*d + 2*(math.Pi/4*1.85*1.85*d*d-shank)*0.15*d
	m := volume * 1e-9 * density.Value
	return piece{centred: true, mass: origin.Worked("mass of "+p.Name, m, "kg", "shank, head, nut and two washers by proportions of the thread",
		p.written("thread", d, "mm"), p.written("length", p.Length, "mm"),
		origin.House("proportions", 1, "", "ISO 4014, 4032 and 7089 sizes rounded to shares of the thread"), density)}, nil
}

func (p Part) item() (piece, error) {
	if p.Stated <= 0 {
		return piece{}, fault("weigh it, read its plate, or guess and say that it is a guess", "part %q is bought in and has no stated mass", p.Name)
	}
	return piece{centred: true, surface: p.Shape.Area, metal: p.Shape.Volume,
		size: [3]float64{p.Length, p.Shape.Width, p.Shape.Thick}}, nil
}

// axes gives the three directions of a part's length, width and thickness. Those not given point
// to the positive side, so that a plate lies in the positive quarter from its corner.
func (p Part) axes() (u, v, w [3]float64, err error) {
	u = p.Along
	if norm(u) < tiny {
		u = [3]float64{1, 0, 0}
	}
	u = scale(u, 1/norm(u))
	v = p.Across
	if norm(v) < tiny {
		v = cross([3]float64{0, 0, 1}, u)
		if norm(v) < 1e-6 { // it stands upright
			v = [3]float64{1, 0, 0}
		}
		v = positive(v)
	} else if math.Abs(dot(u, v))/norm(v) > 1e-3 {
		return u, v, w, fault("give a direction across that is square to the direction along", "part %q: its length and width are not square to each other", p.Name)
	}
	v = sub(v, scale(u, dot(u, v)))
	v = scale(v, 1/norm(v))
	return u, v, positive(cross(u, v)), nil
}

// positive turns a direction so that its largest component is positive.
func positive(v [3]float64) [3]float64 {
	big := 0
	for i := range v {
		if math.Abs(v[i]) > math.Abs(v[big])+1e-9 {
			big = i
		}
	}
	if v[big] < 0 {
		return scale(v, -1)
	}
	return v
}

func dot(a, b [3]float64) float64 { return a[0]*b[0] + a[1]*b[1] + a[2]*b[2] }

func norm(a [3]float64) float64 { return math.Sqrt(dot(a, a)) }

func scale(a [3]float64, k float64) [3]float64 { return [3]float64{a[0] * k, a[1] * k, a[2] * k} }

func add(a, b [3]float64) [3]float64 { return [3]float64{a[0] + b[0], a[1] + b[1], a[2] + b[2]} }

func sub(a, b [3]float64) [3]float64 { return add(a, scale(b, -1)) }

func cross(a, b [3]float64) [3]float64 {
	return [3]float64{a[1]*b[2] - a[2]*b[1], a[2]*b[0] - a[0]*b[2], a[0]*b[1] - a[1]*b[0]}
}
