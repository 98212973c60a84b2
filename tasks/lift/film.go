package lift

import "sailby/tasks/origin"

// extras is the water, silt and rust scale in and on one piece, kg.
func (p Part) extras(surface float64) origin.Figure {
	water, silt, scale := densities["sea water"], densities["silt"], densities["rust scale"]
	kg := p.Water/1000*water.Value + p.Silt/1000*silt.Value + surface*p.Rust/1000*scale.Value
	f := origin.Worked("water, silt and rust in and on one", kg, "kg", "litres x density, and surface x scale x density")
	for _, e := range []struct {
		v    float64
		name string
		unit string
		per  origin.Figure
	}{{p.Water, "standing water", "L", water}, {p.Silt, "silt", "L", silt}, {p.Rust, "rust scale", "mm", scale}} {
		if e.v > 0 {
			f.From = append(f.From, p.written(e.name, e.v, e.unit), e.per)
		}
	}
	return f
}

// film works out weld metal or paint on what base holds.
func (p Part) film(base sum) (PartMass, error) {
	allow := allowance(p.known())
	if p.Allowance != 0 {
		allow = p.written("weight allowance", p.Allowance, "")
	}
	n := float64(p.count())
	out := PartMass{Name: p.Name, Count: p.count(), CG: base.centre(), Low: base.centre(), High: base.centre()}
	var f origin.Figure
	switch {
	case p.Stated > 0:
		f = p.written("mass of "+p.Name+", "+p.known().String(), p.Stated, "kg")
	case p.Shape.Kind == Weld:
		share := origin.Recalled("weld metal", 0.015, "", "1 to 2 % of the steel, fabricators' habit")
		f = origin.Worked("mass of "+p.Name, base.mass*share.Value, "kg", "share x mass of the parts", share, origin.Worked("mass of the parts", base.mass, "kg", "sum"))
	default:
		film, area := p.written("dry film", p.Shape.Film, "um"), p.written("area", p.Shape.Area, "m2")
		if p.Shape.Film == 0 {
			film = origin.House("dry film", 300, "um", "a common full system")
		}
		if p.Shape.Area == 0 {
			area = origin.Worked("surface of the parts", base.surface, "m2", "sum of the parts")
		}
		per := densities["paint film"]
		f = origin.Worked("mass of "+p.Name, film.Value*1e-6*area.Value*per.Value, "kg", "area x film x density", area, film, per)
	}
	if base.mass == 0 {
		return out, fault("name the parts that it is on", "%q: %s needs something to lie on", p.Name, p.Shape.Kind)
	}
	out.Each, out.Mass, out.Heavy = f.Value, f.Value*n, f.Value*n*allow.Value
	out.Figure = origin.Worked(p.Name, out.Mass, "kg", "pieces x mass of one", p.written("pieces", n, ""), f, allow)
	return out, nil
}
