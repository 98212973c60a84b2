// Package origin says where a number comes from, so that every number the tool prints can be
// asked for it: a line of the job file, a published table, a formula, or house judgement.
// A Figure is one such number with its unit and the figures it was made from.
package origin

import (
	"fmt"
	"strings"
)

// Kind is the kind of place a number comes from.
type Kind uint8

const (
	Given     Kind = iota // written in the job file (File, Line)
	Formula               // worked out from the figures in From
	Table                 // read from a published table or text (Source)
	Judgement             // house judgement: no published source, the user can change it
	Memory                // recalled from a publication that was not at hand; a default only
	Practice              // common practice in the trade, no single source
)

// String names the kind in plain words.
func (k Kind) String() string {
	switch k {
	case Given:
		return "given"
	case Formula:
		return "formula"
	case Table:
		return "published"
	case Judgement:
		return "house judgement"
	case Memory:
		return "from memory"
	case Practice:
		return "common practice"
	}
	return "unknown"
}

// Origin tells where one number comes from.
type Origin struct {
	Kind   Kind
	Source string // table and section, or what the formula is; may be empty for Given
	File   string // for Given: the file's name as the user gave it
	Line   int    // for Given: line, from 1; 0 is unknown
	Col    int    // for Given: column, from 1
}

// String gives the origin as one phrase, for instance "job.yaml:42" or
// "house judgement: site face factor".
func (o Origin) String() string {
	switch {
	case o.Kind == Given && o.Line > 0:
		return strings.TrimSpace(fmt.Sprintf("%s:%d %s", o.File, o.Line, o.Source))
	case o.Source == "":
		return o.Kind.String()
	default:
		return o.Kind.String() + ": " + o.Source
	}
}

// Soft says whether the number is a default without evidence behind it (house judgement or
// from memory), which outputs mark as such.
func (o Origin) Soft() bool { return o.Kind == Judgement || o.Kind == Memory }

// Figure is one number with its unit, its origin, and what it was made from.
type Figure struct {
	Name   string // what it is: "weld metal", "operating factor"
	Value  float64
	Unit   string // "kg", "min", "mm2"; empty for a pure number
	Text   string // shown in place of Value and Unit when the figure is a word ("PF", "epoxy")
	Origin Origin
	From   []Figure // for a formula: its inputs, in order of use
}

// Worked makes a figure that a formula gives; how is the formula in words or symbols.
func Worked(name string, value float64, unit, how string, from ...Figure) Figure {
	return Figure{Name: name, Value: value, Unit: unit, Origin: Origin{Kind: Formula, Source: how}, From: from}
}

// Published makes a figure read from a published source.
func Published(name string, value float64, unit, source string) Figure {
	return Figure{Name: name, Value: value, Unit: unit, Origin: Origin{Kind: Table, Source: source}}
}

// House makes a figure that is house judgement; note says what it stands for.
func House(name string, value float64, unit, note string) Figure {
	return Figure{Name: name, Value: value, Unit: unit, Origin: Origin{Kind: Judgement, Source: note}}
}

// Recalled makes a figure recalled from a publication that was not at hand.
func Recalled(name string, value float64, unit, source string) Figure {
	return Figure{Name: name, Value: value, Unit: unit, Origin: Origin{Kind: Memory, Source: source}}
}

// Written makes a figure that the job file gives at file:line:col.
func Written(name string, value float64, unit string, o Origin) Figure {
	o.Kind = Given
	return Figure{Name: name, Value: value, Unit: unit, Origin: o}
}

// Word makes a figure that is a word instead of a number.
func Word(name, text string, o Origin) Figure {
	return Figure{Name: name, Text: text, Origin: o}
}

// Amount gives the figure's value as text with its unit, rounded to four significant digits.
func (f Figure) Amount() string {
	if f.Text != "" {
		return f.Text
	}
	return strings.TrimSpace(Trim(f.Value) + " " + f.Unit)
}

// Trim writes v with at most four significant digits and no needless zeros; values of 1000 and
// more keep all digits before the point.
func Trim(v float64) string {
	if v >= 1000 || v <= -1000 {
		return fmt.Sprintf("%.0f", v)
	}
	return fmt.Sprintf("%.4g", v)
}

// Walk calls visit for f and everything it was made from, depth first; depth counts from 0.
func (f Figure) Walk(visit func(f Figure, depth int)) { f.walk(visit, 0) }

func (f Figure) walk(visit func(Figure, int), depth int) {
	visit(f, depth)
	for _, g := range f.From {
		g.walk(visit, depth+1)
	}
}
