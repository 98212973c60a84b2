package weld

import (
	"strconv"
	"strings"
	"unicode"

	"sailby/tasks/origin"
)

// Steel is the parent metal. Leave at zero what is not known; Composition is in percent by mass.
type Steel struct {
	Grade   string  // "S355J2", "S460N", "A36", "A514"
	Yield   float64 // N/mm2; default from a grade that begins with S and three digits, else 355
	Density float64 // kg/m3; default 7850

	C, Mn, Mo, Cr, Cu, Ni, V float64
	CEV                      float64 // CE(IIW) from the certificate, where the analysis is not at hand
	Cet                      float64 // CET from the certificate
	Hydrogen                 float64 // of the weld metal, ml in 100 g, where the procedure does not say; default by process, 5 or 10

	Origin origin.Origin // where its figures are written; default analysis or certificate
}

func (s Steel) check() error {
	for _, e := range []struct {
		name string
		v    float64
	}{{"carbon", s.C}, {"manganese", s.Mn}, {"molybdenum", s.Mo}, {"chromium", s.Cr}, {"copper", s.Cu}, {"nickel", s.Ni}, {"vanadium", s.V}} {
		if err := optional(e.name, e.v, 0, 30, "%"); err != nil {
			return err
		}
	}
	return first(
		optional("yield", s.Yield, 100, 1500, "N/mm2"),
		optional("density", s.Density, 1500, 12000, "kg/m3"),
		optional("CE", s.CEV, 0.05, 2, ""), optional("CET", s.Cet, 0.05, 2, ""),
		optional("hydrogen", s.Hydrogen, 0.5, 60, "ml/100 g"))
}

func (s Steel) density() float64 {
	if s.Density > 0 {
		return s.Density
	}
	return steelDensity
}

func densityFigure(v float64) origin.Figure {
	if v == steelDensity {
		return origin.Published("density", v, "kg/m3", "TWI Job Knowledge 95: 7.85 g/cm3 for steel")
	}
	return origin.Written("density", v, "kg/m3", origin.Origin{Source: "steel"})
}

// yield gives the yield strength that the grade's name promises.
func (s Steel) yield() float64 {
	if s.Yield > 0 {
		return s.Yield
	}
	g := strings.TrimSpace(strings.ToUpper(s.Grade))
	if strings.HasPrefix(g, "S") {
		digits := strings.IndexFunc(g[1:], func(r rune) bool { return !unicode.IsDigit(r) })
		if digits < 0 {
			digits = len(g) - 1
		}
		if v, err := strconv.Atoi(g[1 : 1+digits]); err == nil && v >= 100 && v <= 1500 {
			return float64(v)
		}
	}
	if s.quenched() {
		return 690
	}
	return 355
}

// quenched says whether the grade is one of the quenched and tempered plates of AWS D1.1.
func (s Steel) quenched() bool {
	g := strings.ToUpper(strings.ReplaceAll(s.Grade, " ", ""))
	for _, q := range []string{"A514", "A517", "A709-100", "A709GR100", "HPS100"} {
		if strings.Contains(g, q) {
			return true
		}
	}
	return false
}

func (s Steel) element(name string, v float64) origin.Figure {
	return origin.Written(name, v, "%", s.from("analysis"))
}

// CE gives the carbon equivalent CE(IIW) = C + Mn/6 + (Cr+Mo+V)/5 + (Ni+Cu)/15; from the
// certificate's value where the analysis is not given. Its Value is 0 where neither is.
func (s Steel) CE() origin.Figure {
	if s.C == 0 || s.CEV > 0 {
		return origin.Written("CE(IIW)", s.CEV, "%", s.from("certificate"))
	}
	return origin.Worked("CE(IIW)", s.C+s.Mn/6+(s.Cr+s.Mo+s.V)/5+(s.Ni+s.Cu)/15, "%",
		"carbon + manganese / 6 + (chromium + molybdenum + vanadium) / 5 + (nickel + copper) / 15",
		s.element("carbon", s.C), s.element("manganese", s.Mn), s.element("chromium", s.Cr), s.element("molybdenum", s.Mo),
		s.element("vanadium", s.V), s.element("nickel", s.Ni), s.element("copper", s.Cu))
}

// CET gives the carbon equivalent of EN 1011-2 method B, C + (Mn+Mo)/10 + (Cr+Cu)/20 + Ni/40
// (from memory of Annex C.3), as CE does.
func (s Steel) CET() origin.Figure {
	if s.C == 0 || s.Cet > 0 {
		return origin.Written("CET", s.Cet, "%", s.from("certificate"))
	}
	return origin.Worked("CET", s.C+(s.Mn+s.Mo)/10+(s.Cr+s.Cu)/20+s.Ni/40, "%",
		"carbon + (manganese + molybdenum) / 10 + (chromium + copper) / 20 + nickel / 40",
		s.element("carbon", s.C), s.element("manganese", s.Mn), s.element("molybdenum", s.Mo),
		s.element("chromium", s.Cr), s.element("copper", s.Cu), s.element("nickel", s.Ni))
}

// from is where the steel's figures come from; what they are, where that is not said.
func (s Steel) from(what string) origin.Origin {
	o := s.Origin
	if o.Line == 0 && o.Source == "" {
		o.Source = what
	}
	return o
}

// hydrogen gives the weld metal's diffusible hydrogen: the procedure's, the steel's, or usual.
func (e *seamWork) hydrogen(s Steel) origin.Figure {
	p := e.data.number
	switch {
	case e.proc.Hydrogen > 0:
		return e.proc.given("hydrogen", e.proc.Hydrogen, "ml/100 g")
	case s.Hydrogen > 0:
		return origin.Written("hydrogen", s.Hydrogen, "ml/100 g", origin.Origin{Source: "consumable"})
	case p == 135 || p == 131 || p == 141 || p == 138:
		return origin.House("hydrogen", 5, "ml/100 g", "solid wire or rod, scale D")
	}
	return origin.House("hydrogen", 10, "ml/100 g", "dry low-hydrogen electrodes or cored wire, top of scale C")
}

// hydrogenScale gives the scale A to E of EN 1011-2 for ml of diffusible hydrogen in 100 g of
// weld metal: A above 15, B to 15, C to 10, D to 5, E to 3 (from memory).
func hydrogenScale(ml float64) string {
	switch {
	case ml > 15:
		return "A"
	case ml > 10:
		return "B"
	case ml > 5:
		return "C"
	case ml > 3:
		return "D"
	}
	return "E"
}
