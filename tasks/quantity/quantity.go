// Package quantity reads and prints amounts with their units: "6 mm", "1/4 in", "3 to 5 h".
// Every dimension has one base unit, in which the rest of the program works. It also holds the
// three kinds of time that must not be mixed: arc, hands-on and clock minutes.
package quantity

import (
	"errors"
	"fmt"
	"math"
	"strconv"
	"strings"
)

// Dim is the dimension of an amount.
type Dim uint8

// The dimensions, each with its base unit.
const (
	Number       Dim = iota // a pure number, no unit
	Length                  // millimetre
	Mass                    // kilogram
	Time                    // minute
	Temperature             // degree Celsius
	Area                    // square metre
	Volume                  // litre
	Percent                 // share from 0 to 1 and beyond ("35 %" is 0.35)
	Film                    // micrometre
	Current                 // ampere
	Voltage                 // volt
	Power                   // kilovolt-ampere
	Travel                  // millimetre a minute
	Feed                    // metre a minute (wire feed)
	Deposition              // kilogram an hour
	Coverage                // square metre an hour
	Spreading               // square metre a litre
	Speed                   // metre a second (wind)
	Angle                   // degree
	Flow                    // litre a minute
	Pressure                // bar
	HeatInput               // kilojoule a millimetre
	Force                   // newton
	Density                 // kilogram a cubic metre
	LineMass                // kilogram a metre
	Pace                    // minute a metre
	Hydrogen                // millilitre in 100 g of weld metal
	Section                 // square millimetre (of a cable)
	Stress                  // newton a square millimetre
	SecondMoment            // millimetre to the fourth
)

// Error is what was wrong with a written amount. Problem is one sentence; Hint a way out.
type Error struct{ Problem, Hint string }

func (e *Error) Error() string { return e.Problem }

// ErrNoUnit, ErrComma and ErrUnit tell the commonest mistakes apart (errors.Is).
var (
	ErrNoUnit = errors.New("no unit")
	ErrComma  = errors.New("decimal comma")
	ErrUnit   = errors.New("wrong unit")
)

type wrapped struct {
	text Error
	is   error
}

func (w *wrapped) Error() string   { return w.text.Problem }
func (w *wrapped) Unwrap() []error { return []error{&w.text, w.is} }

func fault(is error, hint, format string, args ...any) error {
	e := Error{Problem: fmt.Sprintf(format, args...), Hint: hint}
	if is == nil {
		return &e
	}
	return &wrapped{text: e, is: is}
}

// Hint gives the way out that goes with an error from this package, or "".
func Hint(err error) string {
	var e *Error
	if errors.As(err, &e) {
		return e.Hint
	}
	return ""
}

const maxMagnitude = 1e12 // beyond any amount on a job; keeps products finite

// Parse reads one amount of dimension d and gives it in d's base unit. It takes decimals with a
// point, fractions ("1/4 in", "2 1/2 in"), and for times sums ("1 h 30 min").
//
// Errors: no unit, unknown unit, decimal comma, not a number; each names what was expected.
func Parse(text string, d Dim) (float64, error) {
	s := strings.TrimSpace(strings.NewReplacer("\u00a0", " ", "\u202f", " ", "\u2009", " ").Replace(text))
	if s == "" {
		return 0, fault(ErrNoUnit, example(d), "expected %s, found nothing", d)
	}
	if v, rest, ok := takeUnit(s, d); ok && rest == "" {
		return v, nil
	}
	if d == Time {
		if v, ok := timeSum(s); ok {
			return v, nil
		}
	}
	return 0, explain(s, d)
}

// takeUnit reads "number unit" from the start of s.
func takeUnit(s string, d Dim) (v float64, rest string, ok bool) {
	n, rest, ok := takeNumber(s)
	if !ok || math.Abs(n) > maxMagnitude {
		return 0, s, false
	}
	rest = strings.TrimLeft(rest, " ")
	if d == Number {
		return n, rest, true
	}
	best := -1
	for i, u := range units[d] {
		if strings.HasPrefix(rest, u.name) && (best < 0 || len(u.name) > len(units[d][best].name)) {
			after := rest[len(u.name):]
			if after == "" || after[0] == ' ' {
				best = i
			}
		}
	}
	if best < 0 {
		return 0, s, false
	}
	u := units[d][best]
	if d == Percent { // 35/100 is nearer to 0.35 than 35 x 0.01
		return n / 100, strings.TrimLeft(rest[len(u.name):], " "), true
	}
	return n*u.scale + u.shift, strings.TrimLeft(rest[len(u.name):], " "), true
}

// timeSum reads "1 h 30 min" and "2 d 4 h": at least two parts, each unit smaller than the last.
func timeSum(s string) (float64, bool) {
	total, last, parts := 0.0, math.Inf(1), 0
	for s != "" {
		n, _, ok := takeNumber(s)
		if !ok {
			return 0, false
		}
		v, rest, ok := takeUnit(s, Time)
		if !ok || n < 0 {
			return 0, false
		}
		scale := unitScale(s, n, v)
		if scale >= last {
			return 0, false
		}
		last, total, s = scale, total+v, rest
		parts++
	}
	return total, parts > 1
}

func unitScale(s string, n, v float64) float64 {
	if n != 0 {
		return v / n
	}
	_, rest, _ := takeNumber(s)
	word, _, _ := strings.Cut(strings.TrimLeft(rest, " "), " ")
	for _, u := range units[Time] {
		if u.name == word {
			return u.scale
		}
	}
	return 0
}

// takeNumber reads a decimal, a fraction "1/4" or a mixed number "2 1/2" from the start of s.
func takeNumber(s string) (v float64, rest string, ok bool) {
	end := numberEnd(s)
	if end == 0 {
		return 0, s, false
	}
	a, err := strconv.ParseFloat(s[:end], 64)
	if err != nil {
		return 0, s, false
	}
	rest = s[end:]
	if strings.HasPrefix(rest, "/") { // a fraction
		e := numberEnd(rest[1:])
		b, err := strconv.ParseFloat(rest[1:1+e], 64)
		if err != nil || b <= 0 {
			return 0, s, false
		}
		return a / b, rest[1+e:], true
	}
	if strings.HasPrefix(rest, " ") { // perhaps a mixed number
		t := rest[1:]
		if e := numberEnd(t); e > 0 && strings.HasPrefix(t[e:], "/") {
			if f, r, ok := takeNumber(t); ok && f < 1 && f > 0 {
				if a < 0 {
					f = -f
				}
				return a + f, r, true
			}
		}
	}
	return a, rest, true
}

func numberEnd(s string) int {
	i := 0
	if i < len(s) && (s[i] == '-' || s[i] == '+') {
		i++
	}
	digits := 0
	for i < len(s) && (s[i] >= '0' && s[i] <= '9' || s[i] == '.') {
		if s[i] != '.' {
			digits++
		}
		i++
	}
	if digits == 0 {
		return 0
	}
	return i
}
