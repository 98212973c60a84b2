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
	Number      Dim = iota // a pure number, no unit
	Length                 // millimetre
	Mass                   // kilogram
	Time                   // minute
	Temperature            // degree Celsius
	Area                   // square metre
	Volume                 // litre
	Percent                // share from 0 to 1 and beyond ("35 %" is 0.35)
	Film                   // micrometre
	Current                // ampere
	Voltage                // volt
	Power                  // kilovolt-ampere
	Travel                 // millimetre a minute
	Feed                   // metre a minute (wire feed)
	Deposition             // kilogram an hour
	Coverage               // square metre an hour
	Spreading              // square metre a litre
	Speed                  // metre a second (wind)
	Angle                  // degree
	Flow                   // litre a minute
	Pressure               // bar
	HeatInput              // kilojoule a millimetre
	Force                  // newton
	Density                // kilogram a cubic metre
	LineMass               // kilogram a metre
)

type unit struct {
	name  string
	scale float64 // base = value*scale + shift
	shift float64
}

var units = map[Dim][]unit{
	Length:      {{"mm", 1, 0}, {"cm", 10, 0}, {"m", 1000, 0}, {"km", 1e6, 0}, {"in", 25.4, 0}, {"ft", 304.8, 0}},
	Mass:        {{"kg", 1, 0}, {"g", 0.001, 0}, {"t", 1000, 0}, {"lb", 0.45359237, 0}},
	Time:        {{"min", 1, 0}, {"h", 60, 0}, {"d", 1440, 0}, {"s", 1.0 / 60, 0}, {"days", 1440, 0}, {"day", 1440, 0}, {"hours", 60, 0}, {"hour", 60, 0}, {"minutes", 1, 0}},
	Temperature: {{"C", 1, 0}, {"°C", 1, 0}, {"F", 5.0 / 9, -160.0 / 9}, {"°F", 5.0 / 9, -160.0 / 9}},
	Area:        {{"m2", 1, 0}, {"m²", 1, 0}, {"mm2", 1e-6, 0}, {"cm2", 1e-4, 0}, {"ft2", 0.09290304, 0}},
	Volume:      {{"L", 1, 0}, {"l", 1, 0}, {"ml", 0.001, 0}, {"m3", 1000, 0}, {"US gal", 3.785411784, 0}},
	Percent:     {{"%", 0.01, 0}},
	Film:        {{"um", 1, 0}, {"µm", 1, 0}, {"μm", 1, 0}, {"mm", 1000, 0}, {"mil", 25.4, 0}},
	Current:     {{"A", 1, 0}},
	Voltage:     {{"V", 1, 0}},
	Power:       {{"kVA", 1, 0}, {"VA", 0.001, 0}},
	Travel:      {{"mm/min", 1, 0}, {"mm/s", 60, 0}, {"cm/min", 10, 0}, {"m/min", 1000, 0}, {"m/h", 1000.0 / 60, 0}, {"in/min", 25.4, 0}},
	Feed:        {{"m/min", 1, 0}, {"mm/s", 0.06, 0}, {"in/min", 0.0254, 0}},
	Deposition:  {{"kg/h", 1, 0}, {"lb/h", 0.45359237, 0}},
	Coverage:    {{"m2/h", 1, 0}, {"m²/h", 1, 0}, {"ft2/h", 0.09290304, 0}},
	Spreading:   {{"m2/L", 1, 0}, {"m²/L", 1, 0}, {"m2/l", 1, 0}},
	Speed:       {{"m/s", 1, 0}, {"km/h", 1 / 3.6, 0}, {"mph", 0.44704, 0}, {"kn", 1852.0 / 3600, 0}},
	Angle:       {{"deg", 1, 0}, {"°", 1, 0}},
	Flow:        {{"L/min", 1, 0}, {"l/min", 1, 0}, {"cfh", 28.316846592 / 60, 0}},
	Pressure:    {{"bar", 1, 0}, {"kPa", 0.01, 0}, {"hPa", 0.001, 0}, {"psi", 0.0689475729, 0}},
	HeatInput:   {{"kJ/mm", 1, 0}, {"kJ/in", 1 / 25.4, 0}},
	Force:       {{"N", 1, 0}, {"kN", 1000, 0}, {"daN", 10, 0}},
	Density:     {{"kg/m3", 1, 0}, {"g/cm3", 1000, 0}, {"kg/L", 1000, 0}},
	LineMass:    {{"kg/m", 1, 0}, {"lb/ft", 1.48816394, 0}},
}

var dimNames = map[Dim]string{
	Number: "a plain number", Length: "a length", Mass: "a mass", Time: "a time", Temperature: "a temperature",
	Area: "an area", Volume: "a volume", Percent: "a share", Film: "a film thickness", Current: "a current",
	Voltage: "a voltage", Power: "a power", Travel: "a travel speed", Feed: "a wire feed speed",
	Deposition: "a deposition rate", Coverage: "an area rate", Spreading: "a spreading rate", Speed: "a speed",
	Angle: "an angle", Flow: "a gas flow", Pressure: "a pressure", HeatInput: "a heat input", Force: "a force",
	Density: "a density", LineMass: "a mass per length",
}

// String names the dimension with its article, as error messages use it: "a length".
func (d Dim) String() string { return dimNames[d] }

// Base names the unit that amounts of d are kept in; empty for Number.
func (d Dim) Base() string {
	if d == Percent {
		return "%"
	}
	if u := units[d]; len(u) > 0 {
		return u[0].name
	}
	return ""
}

// UnitList names the units that d may be written in, most usual first: "mm, cm, m, in or ft".
func (d Dim) UnitList() string {
	var names []string
	for _, u := range units[d] {
		if strings.ContainsAny(u.name, "°²µμ") || u.name == "l" || strings.HasPrefix(u.name, "l/") ||
			strings.HasSuffix(u.name, "/l") || u.name == "day" || u.name == "days" || u.name == "hour" ||
			u.name == "hours" || u.name == "minutes" {
			continue
		}
		names = append(names, u.name)
	}
	if len(names) < 2 {
		return strings.Join(names, "")
	}
	return strings.Join(names[:len(names)-1], ", ") + " or " + names[len(names)-1]
}

// Units lists every spelling of the units that d may be written in.
func (d Dim) Units() []string {
	var names []string
	for _, u := range units[d] {
		names = append(names, u.name)
	}
	return names
}

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

func example(d Dim) string {
	if d == Number {
		return "write a number, for instance 3"
	}
	ex := map[Dim]string{Time: "4 h", Temperature: "10 C", Percent: "35 %", Length: "6 mm", Mass: "410 kg", Film: "100 um"}[d]
	if ex == "" {
		ex = "3 " + d.Base()
	}
	return fmt.Sprintf("write the unit after the number, for instance %s (units: %s)", ex, d.UnitList())
}

// explain says what is wrong with s as an amount of dimension d.
func explain(s string, d Dim) error {
	if i, thousands := comma(s); i > 0 {
		hint := "write " + s[:i] + "." + s[i+1:]
		if thousands {
			hint = fmt.Sprintf("write %s, or %s if a decimal is meant", s[:i]+s[i+1:], s[:i]+"."+s[i+1:])
		}
		return fault(ErrComma, hint, "%q has a decimal comma", s)
	}
	n, rest, ok := takeNumber(s)
	if !ok {
		return fault(nil, example(d), "expected %s, found %q", d, s)
	}
	rest = strings.TrimSpace(rest)
	if rest == "" {
		return fault(ErrNoUnit, example(d), "%q has no unit; expected %s in %s", s, d, d.UnitList())
	}
	if math.Abs(n) > maxMagnitude {
		return fault(nil, "", "%q is out of all proportion", s)
	}
	if d == Number {
		return fault(ErrUnit, "write a number alone", "expected a plain number, found %q", s)
	}
	if r := strings.TrimLeft(rest, "-–—"); r != rest && r != "" && numberEnd(strings.TrimSpace(r)) > 0 {
		return fault(ErrUnit, fmt.Sprintf("write a range with the word to: %s to %s", strings.TrimSpace(s[:len(s)-len(rest)]), strings.TrimSpace(r)), "%q has a dash between two numbers", s)
	}
	if u, ok := likeUnit(rest, d); ok {
		return fault(ErrUnit, fmt.Sprintf("did you mean %s?", strings.TrimSpace(s[:len(s)-len(rest)])+" "+u), "%q is not a unit for %s; expected %s", rest, d, d.UnitList())
	}
	return fault(ErrUnit, example(d), "%q is not a unit for %s; expected %s", rest, d, d.UnitList())
}

// comma finds the first comma between digits, 0 if there is none. Three digits and no more behind it
// may be thousands.
func comma(s string) (at int, thousands bool) {
	digit := func(i int) bool { return i >= 0 && i < len(s) && s[i] >= '0' && s[i] <= '9' }
	for i := range len(s) {
		if s[i] == ',' && digit(i-1) && digit(i+1) {
			return i, digit(i+2) && digit(i+3) && !digit(i+4)
		}
	}
	return 0, false
}

// otherWords are what people write for a unit.
var otherWords = map[string]string{
	"hr": "h", "hrs": "h", "mins": "min", "minute": "min", "sec": "s", "metre": "m", "metres": "m", "meter": "m", "meters": "m",
	"kgs": "kg", "kilo": "kg", "kilos": "kg", "ton": "t", "tons": "t", "tonne": "t", "tonnes": "t", "inch": "in", "inches": "in",
	"\"": "in", "'": "ft", "feet": "ft", "foot": "ft", "lbs": "lb", "micron": "um", "microns": "um", "percent": "%", "amp": "A", "amps": "A",
	"volts": "V", "kW": "kVA", "sqm": "m2", "sq m": "m2", "m^2": "m2", "litres": "L", "litre": "L", "degC": "C", "deg C": "C", "knots": "kn",
	"degrees": "deg",
}

// likeUnit gives the unit of d that word is likely meant to be.
func likeUnit(word string, d Dim) (string, bool) {
	if u, ok := otherWords[word]; ok {
		for _, x := range units[d] {
			if x.name == u {
				return u, true
			}
		}
	}
	for _, x := range units[d] {
		if strings.EqualFold(x.name, word) {
			return x.name, true
		}
	}
	return "", false
}
