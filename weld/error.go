package weld

import (
	"fmt"
	"math"
)

// Error is a value that the package cannot work with. Field is the word for it in the job file
// ("leg", "travel"), Problem one sentence with the value and the limit, Hint a way out.
type Error struct{ Field, Problem, Hint string }

func (e *Error) Error() string { return e.Problem }

func fault(field, hint, format string, args ...any) error {
	return &Error{Field: field, Problem: fmt.Sprintf(format, args...), Hint: hint}
}

// within says what is wrong with v, called name, unless it is a number from lo to hi.
func within(name string, v, lo, hi float64, unit string) error {
	if unit != "" {
		unit = " " + unit
	}
	switch {
	case math.IsNaN(v) || math.IsInf(v, 0):
		return fault(name, fmt.Sprintf("give %s from %g to %g%s", name, lo, hi, unit), "%s is not a number", name)
	case v < lo || v > hi:
		return fault(name, fmt.Sprintf("give %s from %g to %g%s", name, lo, hi, unit),
			"%s %.6g%s is outside %g to %g%s", name, v, unit, lo, hi, unit)
	}
	return nil
}

// optional is within for a field that may be left at zero, which means its default.
func optional(name string, v, lo, hi float64, unit string) error {
	if v == 0 {
		return nil
	}
	return within(name, v, lo, hi, unit)
}

// first gives the first error that is not nil.
func first(errs ...error) error {
	for _, err := range errs {
		if err != nil {
			return err
		}
	}
	return nil
}
