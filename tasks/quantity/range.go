package quantity

import (
	"strings"
)

// Range is an uncertain amount in its dimension's base unit: Low <= Likely <= High. A sure
// amount has all three equal.
type Range struct{ Low, Likely, High float64 }

// Sure makes a range of one value.
func Sure(v float64) Range { return Range{v, v, v} }

// IsSure says whether the range has no width.
func (r Range) IsSure() bool { return r.Low == r.High }

// Zero says whether the range was never set.
func (r Range) Zero() bool { return r == Range{} }

// Scale multiplies all three values by k, which must not be negative.
func (r Range) Scale(k float64) Range { return Range{r.Low * k, r.Likely * k, r.High * k} }

// ParseRange reads "4 h" or "3 to 5 h" or "3 h to 5 h" of dimension d. Without a likely value
// the middle is meant.
//
// Errors: those of Parse, and a low end above the high end.
func ParseRange(text string, d Dim) (Range, error) {
	lo, hi, two := strings.Cut(text, " to ")
	if !two {
		v, err := Parse(text, d)
		return Sure(v), err
	}
	b, err := Parse(hi, d)
	if err != nil {
		return Range{}, err
	}
	lo = strings.TrimSpace(lo)
	a, err := Parse(lo, d)
	if err != nil {
		hi = strings.TrimSpace(hi)
		if _, rest, ok := takeNumber(lo); ok && rest == "" { // the unit stands after the second number
			if _, more, ok := takeUnit(hi, d); ok && more == "" {
				_, unit, _ := takeNumber(hi)
				a, err = Parse(lo+" "+strings.TrimSpace(unit), d)
			} else { // "1 to 1 h 30 min": of which unit the first is cannot be told
				err = fault(ErrNoUnit, "give both ends their units", "%q has no unit", lo)
			}
		}
		if err != nil {
			return Range{}, err
		}
	}
	if a > b {
		return Range{}, fault(nil, "write the smaller amount first", "%q runs from more to less", text)
	}
	return Range{a, (a + b) / 2, b}, nil
}
