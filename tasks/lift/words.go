package lift

import (
	"strings"

	"sailby/tasks/quantity"
)

// SlingTables names the tables of slings that Rig.Table takes, in their own order.
func SlingTables() []string {
	var out []string
	for _, t := range slingTables {
		out = append(out, t.name)
	}
	return out
}

// ParseAngle reads a sling's angle with its datum: "40 deg from horizontal", "30 deg from the
// vertical".
//
// Errors: no datum, another datum, an amount that is no angle.
func ParseAngle(text string) (degrees float64, from Datum, err error) {
	amount, datum, ok := strings.Cut(text, " from ")
	degrees, err = quantity.Parse(strings.TrimSpace(amount), quantity.Angle)
	switch word := strings.TrimPrefix(strings.TrimSpace(datum), "the "); {
	case err != nil:
		return 0, NoDatum, err
	case !ok:
		return 0, NoDatum, fault("say "+strings.TrimSpace(amount)+" from horizontal, or from vertical", "the angle %q has no datum: 30 degrees is steep from one, flat from the other", text)
	case word == "vertical":
		return degrees, FromVertical, nil
	case word == "horizontal":
		return degrees, FromHorizontal, nil
	}
	return 0, NoDatum, fault("say from horizontal, or from vertical", "%q is no datum of an angle", datum)
}

// ParseSize reads the size of a sling as its table counts it: mm of chain or rope ("8 mm", "3/8
// in"), tonnes of webbing ("2 t").
func ParseSize(text string) (float64, error) {
	if v, err := quantity.Parse(text, quantity.Mass); err == nil {
		return v / 1000, nil
	}
	return quantity.Parse(text, quantity.Length)
}
