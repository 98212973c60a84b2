package tasks

import (
	"cmp"
	"fmt"
	"slices"
	"strings"
)

// Fault is one thing wrong with a job file: where, what, and a way out.
type Fault struct {
	Pos  Pos
	Text string // quotes the person's own word, gives both numbers and the gap
	Hint string // the way out; may be empty
}

// Error gives "file:line:col: text" and, on a second line, "  try: hint".
func (f Fault) Error() string {
	var b strings.Builder
	if f.Pos.File != "" {
		b.WriteString(f.Pos.File)
		if f.Pos.Line > 0 {
			fmt.Fprintf(&b, ":%d:%d", f.Pos.Line, f.Pos.Col)
		}
		b.WriteString(": ")
	}
	b.WriteString(f.Text)
	if f.Hint != "" {
		b.WriteString("\n  try: " + f.Hint)
	}
	return b.String()
}

// Faults is all that is wrong with a job file, sorted by place.
type Faults []Fault

// Error joins the faults, one after the other.
func (fs Faults) Error() string {
	lines := make([]string, len(fs))
	for i, f := range fs {
		lines[i] = f.Error()
	}
	return strings.Join(lines, "\n")
}

// Sorted gives the faults by file, line and column, doubles left out.
func (fs Faults) Sorted() Faults {
	out := slices.Clone(fs)
	slices.SortStableFunc(out, func(a, b Fault) int {
		return cmp.Or(cmp.Compare(a.Pos.File, b.Pos.File), cmp.Compare(a.Pos.Line, b.Pos.Line),
			cmp.Compare(a.Pos.Col, b.Pos.Col))
	})
	return slices.Compact(out)
}
