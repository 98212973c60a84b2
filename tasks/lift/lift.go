// Package lift works out what an assembly weighs, where its centre of gravity is, whether it can
// be moved with the gear and the people at hand, how long that takes, and whether it all goes into
// the van. Lengths are millimetres, masses and leg loads kilograms (as weight), areas square
// metres, forces newtons, angles degrees, wind metres a second, times minutes.
//
// Every answer carries an origin.Figure that shows what it was made from. The limits come from
// HSE L23 and NIOSH 94-110 (hands), EN 818-4, EN 13414-1, EN 1492-1 and the OSHA sling tables
// (slings), EN 12195-1 (straps) and plain statics. An answer is arithmetic; it never stands for
// the decision of a competent person.
package lift

import (
	"fmt"
	"math"
	"sort"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Gravity is the standard acceleration of free fall, m/s2.
const Gravity = 9.81

// Result says whether one way of moving a load is within its limit. Need and Have are in Unit and
// belong to the check that comes nearest to failing or fails by most.
type Result struct {
	OK       bool
	Need     float64
	Have     float64
	Unit     string
	Reason   string        // one sentence with both numbers, whether it passes or not
	Nearest  string        // where it fails: the nearest gear, people or change that would do
	Figure   origin.Figure // Need, and what it was made from
	Limit    origin.Figure // Have, and what it was made from
	Warnings []string      // what to look at or ask though the number passes
	Others   []Held        // what else was held against a limit, the nearest to failing first
}

// Load is one thing to move.
type Load struct {
	Name      string
	Mass      float64    // kg, best estimate, above 0
	CG        [3]float64 // mm, in the axes of the parts
	Length    float64    // mm, outside sizes; 0 is not known
	Width     float64
	Height    float64
	Allowance float64       // factor on Mass for what is not known, 1 to 3; 0 is that of a guessed weight
	Dynamic   float64       // factor for starting and stopping, 1 to 3; 0 is that of its mass on shore
	From      origin.Figure // where Mass comes from; may be empty
}

// fault makes an error with a way out, readable with quantity.Hint.
func fault(hint, format string, args ...any) error {
	return &quantity.Error{Problem: fmt.Sprintf(format, args...), Hint: hint}
}

// maxMass and maxLength are beyond any small steel job and keep all arithmetic finite.
const (
	maxMass   = 1e7 // kg
	maxLength = 1e7 // mm
)

// ranged checks that v is a number within [low, high]; what names it with its unit.
func ranged(what string, v, low, high float64, unit string) error {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return fault("give a number in "+unit, "%s is not a number", what)
	}
	if v < low || v > high {
		return fault(fmt.Sprintf("give %s between %s and %s %s", what, origin.Trim(low), origin.Trim(high), unit),
			"%s is %s %s, outside %s to %s %s", what, origin.Trim(v), unit, origin.Trim(low), origin.Trim(high), unit)
	}
	return nil
}

// check is one number that must lie in a range, for tables of checks.
type check struct {
	what      string
	v         float64
	low, high float64
	unit      string
}

// optional is a check of a number that may be left out as 0, and is within low and high otherwise.
func optional(what string, v, low, high float64, unit string) check {
	if v == 0 {
		low = 0
	}
	return check{what, v, low, high, unit}
}

func checkAll(list ...check) error {
	for _, c := range list {
		if err := ranged(c.what, c.v, c.low, c.high, c.unit); err != nil {
			return err
		}
	}
	return nil
}

// tiny is the least mass, length or rating taken as real: below it a value is as good as zero.
const tiny = 1e-3

// valid checks the load's numbers.
func (l Load) valid() error {
	list := []check{
		{"the load's mass", l.Mass, tiny, maxMass, "kg"},
		{"the load's length", l.Length, 0, maxLength, "mm"},
		{"the load's width", l.Width, 0, maxLength, "mm"},
		{"the load's height", l.Height, 0, maxLength, "mm"},
	}
	for _, v := range l.CG {
		list = append(list, check{"the centre of gravity", v, -maxLength, maxLength, "mm"})
	}
	if l.Allowance != 0 {
		list = append(list, check{"the weight allowance", l.Allowance, 1, 3, "(factor)"})
	}
	if l.Dynamic != 0 {
		list = append(list, check{"the dynamic factor", l.Dynamic, 1, 3, "(factor)"})
	}
	return checkAll(list...)
}

// best is the load's mass as a figure.
func (l Load) best() origin.Figure {
	if l.From.Name != "" {
		f := l.From
		f.Value, f.Unit = l.Mass, "kg"
		return f
	}
	return origin.Figure{Name: "mass of " + l.name(), Value: l.Mass, Unit: "kg", Origin: origin.Origin{Kind: origin.Given}}
}

func (l Load) name() string {
	if l.Name == "" {
		return "the load"
	}
	return l.Name
}

// Heavy gives the mass to plan with: the best estimate times the weight allowance, kg.
func (l Load) Heavy() origin.Figure {
	a := allowance(Guessed)
	if l.Allowance != 0 {
		a = origin.Figure{Name: "weight allowance", Value: l.Allowance, Origin: origin.Origin{Kind: origin.Given}}
	}
	return origin.Worked("mass with allowance", l.Mass*a.Value, "kg", "mass x weight allowance", l.best(), a)
}

// Hook gives the load as gear must carry it: Heavy times the dynamic factor, kg.
func (l Load) Hook() origin.Figure {
	h := l.Heavy()
	d := dynamic(h.Value)
	if l.Dynamic != 0 {
		d = origin.Figure{Name: "dynamic factor", Value: l.Dynamic, Origin: origin.Origin{Kind: origin.Given}}
	}
	return origin.Worked("load on the hook", h.Value*d.Value, "kg", "mass with allowance x dynamic factor", h, d)
}

// judge is one check on the way to a Result: Need must not exceed Have.
type judge struct {
	what       string // "the heaviest leg"
	need, have origin.Figure
}

// ratio says how much of the limit is used; no limit at all is used up wholly.
func (j judge) ratio() float64 {
	if j.have.Value <= 0 {
		if j.need.Value <= 0 {
			return 0
		}
		return math.Inf(1)
	}
	return j.need.Value / j.have.Value
}

// rounding is the share by which a need may pass its limit through rounding alone.
const rounding = 1e-9

// worst makes the Result of the check that comes nearest to failing.
func worst(list ...judge) Result {
	sort.SliceStable(list, func(i, k int) bool { return list[i].ratio() > list[k].ratio() })
	j := list[0]
	r := Result{
		OK:   j.ok(),
		Need: j.need.Value, Have: j.have.Value, Unit: j.need.Unit,
		Figure: j.need, Limit: j.have,
	}
	r.Reason = j.words()
	for _, other := range list[1:] {
		r.Others = append(r.Others, Held{What: other.what, Reason: other.words(), OK: other.ok(), Figure: other.need, Limit: other.have})
	}
	return r
}

func (j judge) ok() bool { return j.need.Value <= j.have.Value*(1+rounding) }

// words writes a check out: what, need, limit.
func (j judge) words() string {
	verb := "is within"
	if !j.ok() {
		verb = "exceeds"
	}
	return fmt.Sprintf("%s: %s %s %s (%s)", j.what, j.need.Amount(), verb, j.have.Amount(), j.have.Name)
}

// Held is one more number that was held against its limit beside the one that comes nearest to failing.
type Held struct {
	What          string // "what it hangs from"
	Reason        string // written out
	OK            bool
	Figure, Limit origin.Figure
}
