package lift

import (
	"fmt"
	"math"
	"strconv"

	"sailby/tasks/origin"
)

// Section is the cross section of a long part. Masses are for steel of 7850 kg/m3; Mass scales
// them for other materials.
type Section struct {
	Name     string  // as the tool writes it: "SHS 100x100x6 cold"
	Family   string  // "SHS", "UPN", "FL" ...
	LineMass float64 // kg/m in steel; 0 for plate
	AreaMass float64 // kg/m2 in steel, plate and floor plate only
	Surface  float64 // m2/m of outside surface to paint; 0 is not known
	Bore     float64 // mm2 enclosed by a hollow section, otherwise 0
	High     float64 // mm, outside
	Wide     float64 // mm, outside
	Figure   origin.Figure
	Notes    []string // what was assumed
}

const steelDensity = 7850.0 // kg/m3, steel section tables, general notes

// figure gives the section's own figure, or one made of v where a caller gave numbers alone.
func (s Section) figure(v float64, unit string) origin.Figure {
	if s.Figure.Name == "" {
		return given("mass of section "+s.Name, v, unit)
	}
	return s.Figure
}

// lineMass turns an area in mm2 into kg/m of steel.
func lineMass(area float64) float64 { return area * 1e-6 * steelDensity }

// given is a figure that comes from the caller.
func given(name string, v float64, unit string) origin.Figure {
	if name == "" {
		name = "unnamed"
	}
	return origin.Figure{Name: name, Value: v, Unit: unit, Origin: origin.Origin{Kind: origin.Given}}
}

// exact makes a section whose mass follows from its area in mm2 by formula how.
func exact(name, family string, area, surface, high, wide float64, how string, from ...origin.Figure) Section {
	return Section{Name: name, Family: family, LineMass: lineMass(area), Surface: surface, High: high, Wide: wide,
		Figure: origin.Worked("mass of "+name, lineMass(area), "kg/m", how, append(from, densities["steel"])...)}
}

// hollow makes a square or rectangular hollow section h x b x t; hot formed has tighter corners.
//
// A = 2t(b+h-2t) - (4-pi)(ro^2-ri^2); corner radii as EN 10219-2 (cold) and EN 10210-2 (hot).
func hollow(h, b, t float64, hot bool) (Section, error) {
	family := "RHS"
	if h == b {
		family = "SHS"
	}
	made, standard := "cold", "corner radii of EN 10219-2"
	if hot {
		made, standard = "hot", "corner radii of EN 10210-2"
	}
	name := fmt.Sprintf("%s %sx%sx%s %s", family, num(h), num(b), num(t), made)
	if t*2 >= math.Min(h, b) {
		return Section{}, fault("write outside height, width and wall, for instance SHS 100x100x6",
			"%s: a wall of %s mm leaves nothing hollow in %s mm", name, num(t), num(math.Min(h, b)))
	}
	ro, ri := corners(t, hot)
	ro = math.Min(ro, math.Min(h, b)/2)
	ri = math.Min(ri, math.Min(h, b)/2-t)
	area := 2*t*(b+h-2*t) - (4-math.Pi)*(ro*ro-ri*ri)
	surface := (2*(h+b) - (8-2*math.Pi)*ro) / 1000
	s := exact(name, family, area, surface, h, b, "7850 x [2t(b+h-2t) - (4-pi)(ro^2-ri^2)]",
		given("height", h, "mm"), given("width", b, "mm"), given("wall", t, "mm"),
		origin.Recalled("outer corner radius", ro, "mm", standard), origin.Recalled("inner corner radius", ri, "mm", standard))
	s.Bore = (h-2*t)*(b-2*t) - (4-math.Pi)*ri*ri
	return s, nil
}

func corners(t float64, hot bool) (outer, inner float64) {
	switch {
	case hot:
		return 1.5 * t, t
	case t <= 6:
		return 2 * t, t
	case t <= 10:
		return 2.5 * t, 1.5 * t
	}
	return 3 * t, 2 * t
}

// tube makes a circular hollow section: A = pi t (d - t), which is 0.0246615 t(d-t) kg/m.
func tube(d, t float64) (Section, error) {
	name := fmt.Sprintf("CHS %sx%s", num(d), num(t))
	if t*2 >= d {
		return Section{}, fault("write outside diameter and wall, for instance CHS 48.3x3.2",
			"%s: a wall of %s mm leaves nothing hollow in %s mm", name, num(t), num(d))
	}
	s := exact(name, "CHS", math.Pi*t*(d-t), math.Pi*d/1000, d, d, "7850 x pi t (d-t)", given("diameter", d, "mm"), given("wall", t, "mm"))
	s.Bore = math.Pi / 4 * (d - 2*t) * (d - 2*t)
	return s, nil
}

// angle makes a rolled angle with root radius R and toe radius R/2, R from EN 10056-1 by mean leg.
func angle(a, b, t float64) (Section, error) {
	name := fmt.Sprintf("L %sx%sx%s", num(a), num(b), num(t))
	if t >= math.Min(a, b) {
		return Section{}, fault("write both legs and the thickness, for instance L 60x60x6",
			"%s: a thickness of %s mm is no less than a leg of %s mm", name, num(t), num(math.Min(a, b)))
	}
	root := math.Min(rootRadius((a+b)/2), math.Min(a, b)-t)
	toe := root / 2
	s := exact(name, "L", angleArea(a, b, t, root, toe), 2*(a+b)/1000-0.43*(root+2*toe)/1000, a, b,
		"7850 x [t(a+b-t) + 0.2146(R^2-2r^2)]", given("leg", a, "mm"), given("other leg", b, "mm"), given("thickness", t, "mm"),
		origin.Recalled("root radius", root, "mm", "EN 10056-1, by the mean leg"))
	return s, nil
}

// angleArea gives mm2: two legs, a fillet of radius root, two rounded toes. 0.2146 is 1 - pi/4.
func angleArea(a, b, t, root, toe float64) float64 {
	return t*(a+b-t) + (1-math.Pi/4)*(root*root-2*toe*toe)
}

// rootRadius gives the root radius of a rolled angle by its leg, mm (EN 10056-1, from memory).
func rootRadius(leg float64) float64 {
	rows := [][2]float64{{25, 3.5}, {37, 5}, {42, 6}, {55, 7}, {62, 8}, {75, 9}, {85, 10}, {95, 11}, {110, 12}, {125, 13}, {140, 14}, {160, 16}}
	for _, r := range rows {
		if leg <= r[0] {
			return r[1]
		}
	}
	return 18
}

// rolled is one I or H section by its sizes, mm.
type rolled struct{ h, b, web, flange, root float64 }

// area of an I or H section: flanges, web and four root fillets.
func (s rolled) area() float64 {
	return 2*s.b*s.flange + (s.h-2*s.flange)*s.web + (4-math.Pi)*s.root*s.root
}

// surface of an I or H section, m2/m.
func (s rolled) surface() float64 {
	return (2*s.h + 4*s.b - 2*s.web - (8-2*math.Pi)*s.root) / 1000
}

// num writes a size to a thousandth without needless zeros, so that a section's name reads back.
func num(v float64) string {
	return strconv.FormatFloat(math.Round(v*1000)/1000, 'f', -1, 64)
}
