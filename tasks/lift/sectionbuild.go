package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// buildHollow takes height x width x wall, or side x wall for a square.
func buildHollow(w sectionWord) (Section, error) {
	n := w.n
	if len(n) == 2 {
		if w.family == "RHS" {
			return Section{}, fault("write RHS height x width x wall, for instance RHS 120x80x5", "%q has 2 sizes, a rectangle takes 3", w.said)
		}
		n = []float64{n[0], n[0], n[1]}
	}
	if w.family == "SHS" && n[0] != n[1] {
		return Section{}, fault(fmt.Sprintf("write RHS %sx%sx%s if it is a rectangle", num(n[0]), num(n[1]), num(n[2])),
			"%q is not square", w.said)
	}
	s, err := hollow(n[0], n[1], n[2], w.hot)
	if err == nil && !w.hot && w.family != "" {
		s.Notes = append(s.Notes, s.Name+": cold formed; hot formed weighs 2 to 5 % more, so the order must say which")
	}
	return s, err
}

// buildHSS takes inches; two sizes are a round: diameter x wall.
func buildHSS(w sectionWord) (Section, error) {
	n := make([]float64, len(w.n))
	for i, v := range w.n {
		n[i] = inches(v)
	}
	if len(n) == 2 {
		return tube(n[0], n[1])
	}
	s, err := hollow(n[0], n[1], n[2], false)
	if err == nil {
		s.Notes = append(s.Notes, w.said+": full wall taken; the design wall of some grades is less")
	}
	return s, err
}

// inches turns inches into mm, unless the number is already too large for inches.
func inches(v float64) float64 {
	if v > 48 {
		return v
	}
	return math.Round(v*25.4*1000) / 1000
}

func buildAngle(w sectionWord) (Section, error) {
	n := w.n
	if len(n) == 2 {
		n = []float64{n[0], n[0], n[1]}
	}
	return angle(n[0], n[1], n[2])
}

func buildFlat(w sectionWord) (Section, error) {
	b, t := w.n[0], w.n[1]
	name := fmt.Sprintf("FL %sx%s", num(b), num(t))
	return exact(name, "FL", b*t, 2*(b+t)/1000, t, b, "7850 x b t", given("width", b, "mm"), given("thickness", t, "mm")), nil
}

func buildRound(w sectionWord) (Section, error) {
	d := w.n[0]
	return exact("RB "+num(d), "RB", math.Pi/4*d*d, math.Pi*d/1000, d, d, "7850 x pi d^2/4", given("diameter", d, "mm")), nil
}

func buildSquare(w sectionWord) (Section, error) {
	a := w.n[0]
	return exact("SB "+num(a), "SB", a*a, 4*a/1000, a, a, "7850 x a^2", given("side", a, "mm")), nil
}

// buildHexagon: A = s^2 sqrt(3)/2 and perimeter 2 sqrt(3) s for s across flats.
func buildHexagon(w sectionWord) (Section, error) {
	s := w.n[0]
	return exact("HEX "+num(s), "HEX", math.Sqrt(3)/2*s*s, 2*math.Sqrt(3)*s/1000, s, 2/math.Sqrt(3)*s,
		"7850 x s^2 sqrt(3)/2", given("across flats", s, "mm")), nil
}

// buildOctagon: A = 2 (sqrt(2)-1) s^2 and perimeter 8 (sqrt(2)-1) s for s across flats.
func buildOctagon(w sectionWord) (Section, error) {
	s := w.n[0]
	k := math.Sqrt2 - 1
	return exact("OCT "+num(s), "OCT", 2*k*s*s, 8*k*s/1000, s, s, "7850 x 2(sqrt(2)-1) s^2", given("across flats", s, "mm")), nil
}

// buildMetricNamed: UB 203x133x25 carries its own kg/m.
func buildMetricNamed(w sectionWord) (Section, error) {
	h, b, m := w.n[0], w.n[1], w.n[2]
	name := fmt.Sprintf("%s %sx%sx%s", w.family, num(h), num(b), num(m))
	return carried(name, w.family, m, h, b)
}

// buildPoundNamed: W 8x31 carries its own lb/ft; its width is not in the name. Written with
// millimetres (W 200x46) it carries kg/m.
func buildPoundNamed(w sectionWord) (Section, error) {
	const poundFoot = 0.45359237 / 0.3048 // kg/m, exact by definition of the pound and the foot
	h := inches(w.n[0])
	name := fmt.Sprintf("%s %sx%s", w.family, num(w.n[0]), num(w.n[1]))
	if h == w.n[0] {
		return carried(name, w.family, w.n[1], h, 0)
	}
	return carried(name, w.family, w.n[1]*poundFoot, h, 0)
}

// carried makes a section whose name carries its mass per length. The surface is the outline's.
func carried(name, family string, mass, h, b float64) (Section, error) {
	if mass > lineMass(h*math.Max(b, h)) {
		return Section{}, fault("write the nominal height, width and kg/m, for instance UB 203x133x25",
			"%s: %s kg/m is more than a solid bar of that size", name, num(mass))
	}
	s := Section{Name: name, Family: family, LineMass: mass, High: h, Wide: b}
	s.Figure = origin.Figure{Name: "mass of " + name, Value: mass, Unit: "kg/m",
		Origin: origin.Origin{Kind: origin.Practice, Source: "the name of the section carries its mass per length"}}
	if b == 0 {
		s.Wide = h
		s.Notes = append(s.Notes, name+": the name does not carry a width or surface; its height is taken as the width and the surface is an upper estimate")
		b = h
	} else {
		s.Notes = append(s.Notes, "surface of "+name+" is an outline estimate")
	}
	s.Surface = (2*h + 4*b) / 1000
	return s, nil
}

func buildPlate(w sectionWord) (Section, error) {
	t := w.n[0]
	name := "plate " + num(t)
	m := t / 1000 * steelDensity
	return Section{Name: name, Family: "PLATE", AreaMass: m, High: t,
		Figure: origin.Worked("mass of "+name, m, "kg/m2", "7.85 kg/m2 a mm", given("thickness", t, "mm"), densities["steel"])}, nil
}

// pattern is what a raised pattern adds to the plain plate under it.
var pattern = origin.Published("pattern", 1.6, "kg/m2", "raised-pattern floor plate design tables, less plain plate; an older set adds 2.64")

func buildFloorPlate(w sectionWord) (Section, error) {
	t := w.n[0]
	name := "floor plate " + num(t)
	m := t/1000*steelDensity + pattern.Value
	return Section{Name: name, Family: "FLOOR PLATE", AreaMass: m, High: t,
		Figure: origin.Worked("mass of "+name, m, "kg/m2", "7.85 kg/m2 a mm on plain, and the pattern", given("thickness on plain", t, "mm"), densities["steel"], pattern)}, nil
}
