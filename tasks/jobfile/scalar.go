package jobfile

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

const (
	longestName = 80   // runes of a name
	longestText = 300  // of a line of text
	longestNote = 2000 // of a note
)

// text gives the words of a scalar; lead begins the message where it is none.
func (r *reader) text(n *yaml.Node, lead, example string) (string, bool) {
	hint := "write for instance " + example
	switch {
	case n.Kind != yaml.ScalarNode:
		r.fault(n, hint, "%sexpected one value, found %s", lead, kindOf(n))
		return "", false
	case n.Tag == "!!null" || strings.TrimSpace(n.Value) == "":
		r.fault(n, hint, "%sthere is no value", lead)
		return "", false
	}
	return strings.TrimSpace(n.Value), true
}

// word gives a scalar of the mapping as it is written.
func (f *fields) word(name string) (string, bool) {
	n := f.node(name)
	if n == nil {
		return "", false
	}
	return f.r.text(n, f.lead(name), f.key(name).example)
}

// line gives a text, or "".
func (f *fields) line(name string) string {
	s, ok := f.word(name)
	if !ok {
		return ""
	}
	most := longestText
	if f.key(name).takes == aNote {
		most = longestNote
	} else if strings.Contains(s, "\n") {
		f.fault(name, "write it in one line", "the text has several lines")
	}
	if n := utf8.RuneCountInString(s); n > most {
		f.fault(name, fmt.Sprintf("keep it below %d letters", most), "the text has %d letters, at most %d are taken", n, most)
	}
	return s
}

// yes gives a yes or no; no if it is left out.
func (f *fields) yes(name string) bool {
	b := f.yesOrNot(name)
	return b != nil && *b
}

// yesOrNot gives a yes or no, or nil.
func (f *fields) yesOrNot(name string) *bool {
	s, ok := f.word(name)
	if !ok {
		return nil
	}
	yes := s == "yes" || s == "true"
	if !yes && s != "no" && s != "false" {
		f.fault(name, fmt.Sprintf("write `%s: yes` or `%s: no`", name, name), "%s is neither yes nor no", short(s))
		return nil
	}
	return &yes
}

// leadingZero says whether YAML would read the number in base 8.
func leadingZero(s string) bool {
	s = strings.TrimLeft(s, "+-")
	return len(s) > 1 && s[0] == '0' && s[1] >= '0' && s[1] <= '9'
}

// count gives a whole number, or usual if it is left out.
func (f *fields) count(name string, usual int) int {
	s, ok := f.word(name)
	if !ok {
		return usual
	}
	n, ok := f.r.whole(f.vals[name], f.lead(name), s, f.key(name))
	if !ok {
		return usual
	}
	return n
}

// whole reads a whole number within the limits of a key.
func (r *reader) whole(n *yaml.Node, lead, s string, k *key) (int, bool) {
	low, high := k.limits()
	v, err := quantity.Parse(s, quantity.Number)
	switch {
	case err != nil:
		r.fault(n, "write a whole number, for instance "+k.example, "%sexpected a whole number, found %s", lead, short(s))
	case leadingZero(s):
		r.fault(n, "write it without the zero in front", "%s%s begins with a zero, which may mean base 8", lead, short(s))
	case v != math.Trunc(v):
		r.fault(n, fmt.Sprintf("write %g or %g", math.Floor(v), math.Ceil(v)), "%s%s is not a whole number", lead, s)
	case v < low || v > high:
		r.fault(n, fmt.Sprintf("give a number from %g to %g", low, high), "%s%s is outside %g to %g", lead, s, low, high)
	default:
		return int(v), true
	}
	return 0, false
}

// number reads a plain number within the limits of a key.
func (r *reader) number(n *yaml.Node, lead string, k *key) (float64, bool) {
	s, ok := r.text(n, lead, k.example)
	if !ok {
		return 0, false
	}
	if leadingZero(s) {
		r.fault(n, "write it without the zero in front", "%s%s begins with a zero, which may mean base 8", lead, short(s))
		return 0, false
	}
	return r.measure(n, lead, s, k, quantity.Number)
}

// amount gives an amount in the base unit of the key's dimension, or usual, which stands nowhere.
func (f *fields) amount(name string, usual float64) tasks.Amount {
	n := f.node(name)
	if n == nil {
		return tasks.Amount{Value: usual}
	}
	v, ok := f.r.amount(n, f.lead(name), f.key(name))
	if !ok {
		return tasks.Amount{Value: usual}
	}
	return tasks.Amount{Value: v, Pos: f.r.pos(n)}
}

// value is amount without its place.
func (f *fields) value(name string) float64 { return f.amount(name, 0).Value }

func (r *reader) amount(n *yaml.Node, lead string, k *key) (float64, bool) {
	if k.takes == aNumber {
		return r.number(n, lead, k)
	}
	s, ok := r.text(n, lead, k.example)
	if !ok {
		return 0, false
	}
	return r.measure(n, lead, s, k, k.dim)
}

// measure reads s as an amount of dimension d within the limits of k.
func (r *reader) measure(n *yaml.Node, lead, s string, k *key, d quantity.Dim) (float64, bool) {
	v, err := quantity.Parse(s, d)
	if err != nil && k.takes == hourly && errors.Is(err, quantity.ErrNoUnit) {
		v, err = quantity.Parse(s+" h", d)
	}
	if err != nil {
		r.advice(n, lead, err, "write for instance "+k.example)
		return 0, false
	}
	if low, high := k.limits(); !(v >= low && v <= high) {
		r.fault(n, "give "+d.String()+" from "+show(low, d)+" to "+show(high, d), "%s%s is outside %s to %s", lead, s, show(low, d), show(high, d))
		return 0, false
	}
	return v, true
}

// advice reports another package's error with its way out, else with the one given.
func (r *reader) advice(n *yaml.Node, lead string, err error, hint string) {
	if h := quantity.Hint(err); h != "" {
		hint = h
	}
	r.fault(n, hint, "%s%s", lead, err.Error())
}

// show writes an amount in its base unit; times as people say them.
func show(v float64, d quantity.Dim) string {
	switch d {
	case quantity.Time:
		if v == math.Trunc(v) && math.Abs(v) < 1e9 {
			return quantity.Span(int(v))
		}
		return origin.Trim(v) + " min"
	case quantity.Percent:
		return origin.Trim(v*100) + " %"
	case quantity.Length:
		if math.Abs(v) >= 1000 {
			return origin.Trim(v/1000) + " m"
		}
	case quantity.Area:
		if v != 0 && math.Abs(v) < 1e-3 {
			return origin.Trim(v*1e6) + " mm2"
		}
	}
	return strings.TrimSpace(origin.Trim(v) + " " + d.Base())
}

// choice gives one of the key's words, or usual.
func (f *fields) choice(name, usual string) string {
	s, ok := f.word(name)
	if !ok {
		return usual
	}
	if k := f.key(name); !slices.Contains(k.words, s) {
		f.fault(name, f.r.among(s, k.words, ""), "%s is not one of %s", short(s), list(k.words, 12))
		return usual
	}
	return s
}
