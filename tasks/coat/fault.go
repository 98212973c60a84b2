package coat

import (
	"errors"
	"fmt"
	"math"
	"strings"

	"sailby/tasks/quantity"
)

// ErrCold marks a time that was asked for at a temperature at which the paint gives no cure at all.
var ErrCold = errors.New("too cold to cure")

// fault makes an error of one sentence with a way out (see quantity.Hint).
func fault(hint, format string, args ...any) error {
	return &quantity.Error{Problem: fmt.Sprintf(format, args...), Hint: hint}
}

type coldFault struct{ text quantity.Error }

func (c *coldFault) Error() string   { return c.text.Problem }
func (c *coldFault) Unwrap() []error { return []error{&c.text, ErrCold} }

// within checks that v is a number from lo to hi.
func within(name string, v, lo, hi float64, unit, hint string) error {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return fault(hint, "%s is not a number", name)
	}
	if v < lo || v > hi {
		return fault(hint, "%s is %s, must be from %s to %s", name, amount(v, unit), amount(lo, unit), amount(hi, unit))
	}
	return nil
}

// share checks that v is a share from lo to hi, and prints it in percent.
func share(name string, v, lo, hi float64, hint string) error {
	return within(name, v*100, lo*100, hi*100, "%", hint)
}

// amount writes a number with its unit: short, without needless zeros; large ones in full.
func amount(v float64, unit string) string {
	if math.Abs(v) >= 1e4 && math.Abs(v) < 1e15 {
		return strings.TrimSpace(fmt.Sprintf("%.0f", v) + " " + unit)
	}
	return strings.TrimSpace(strings.TrimSuffix(fmt.Sprintf("%.4g", v), ".0") + " " + unit)
}

// word brings a name to the form in which names are compared: lower case, single spaces, no hyphens.
func word(s string) string {
	return strings.Join(strings.Fields(spacing.Replace(strings.ToLower(s))), " ")
}

var spacing = strings.NewReplacer("-", " ", "_", " ", "½", " 1/2")

// oneOf writes a list of names as people say it: "brush, roller or airless".
func oneOf(names []string) string {
	if len(names) < 2 {
		return strings.Join(names, "")
	}
	return strings.Join(names[:len(names)-1], ", ") + " or " + names[len(names)-1]
}

func hint(err error) string { return quantity.Hint(err) }
