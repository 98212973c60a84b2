package text

import (
	"fmt"
	"io"
	"strings"

	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks/origin"
)

// Steps prints figures that are worked out one after the other, each on its own line with its
// origin, and under it what it was made from; what was explained above is named only.
// head are lines that stand in front, notes lines that stand behind.
func Steps(w io.Writer, head []string, steps []origin.Figure, notes []string, o Options) error {
	p := newPage(w, o)
	for _, l := range head {
		p.para("", clean.Line(l))
	}
	p.gap()
	told := map[string]bool{}
	soft := false
	for _, f := range steps {
		soft = p.step1(f, 0, told) || soft
	}
	for i, n := range notes {
		if i == 0 {
			p.gap()
		}
		p.para("note: ", clean.Line(n))
	}
	if soft {
		p.gap()
		p.para("", "(default): no evidence stands behind it; give your own figure.")
	}
	p.gap()
	p.para("", agenda.Care)
	return p.err
}

// step1 prints one figure and what is new of what it was made from; it says whether a soft
// default is among that.
func (p *page) step1(f origin.Figure, depth int, told map[string]bool) bool {
	line := fmt.Sprintf("%s: %s [%s]%s", f.Name, f.Amount(), f.Origin, mark(f.Origin.Soft()))
	soft := f.Origin.Soft()
	known := told[line] && len(f.From) > 0
	told[line] = true
	if known {
		line = fmt.Sprintf("%s: %s [as above]", f.Name, f.Amount())
	}
	p.para(strings.Repeat("  ", min(depth, p.width/4)), clean.Line(line))
	if known {
		return false
	}
	for _, g := range f.From {
		soft = p.step1(g, depth+1, told) || soft
	}
	return soft
}

type stepsForm struct {
	Head  []string     `json:"head"`
	Steps []figureForm `json:"steps"`
	Notes []string     `json:"notes"`
	Care  string       `json:"care"`
}

// StepsJSON is Steps for machines.
func StepsJSON(w io.Writer, head []string, steps []origin.Figure, notes []string) error {
	f := stepsForm{Head: []string{}, Steps: []figureForm{}, Notes: []string{}, Care: agenda.Care}
	for _, l := range head {
		f.Head = append(f.Head, clean.Line(l))
	}
	for _, s := range steps {
		f.Steps = append(f.Steps, figureOf(s))
	}
	for _, n := range notes {
		f.Notes = append(f.Notes, clean.Line(n))
	}
	return writeJSON(w, f)
}
