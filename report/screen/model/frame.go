package model

import (
	"strings"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
)

// The smallest screen that is drawn; below it a line asks for more room.
const (
	LeastWidth  = 40
	LeastHeight = 12
)

// edge is the number of rows around a page, without those for the keys: pages, job and verdict,
// title; more to come.
const edge = 4

// Rows gives the screen: exactly height rows, none wider than width columns.
func (m *Model) Rows(width, height int) []Row {
	m.wide, m.tall = width, height
	if width < LeastWidth || height < LeastHeight {
		out := make([]Row, max(height, 0))
		if height > 0 {
			out[0].Text = cut("Make the window larger: 40 by 12 at least, 80 by 24 is good.", width)
		}
		return out
	}
	p := m.top()
	keys := wrapKeep(p.keys(), width-1)
	keys = keys[:min(len(keys), 3)]
	fixed, body := p.lay(width - 2)
	if keep := height - edge - len(keys) - 3; len(fixed) > keep { // leave three rows to scroll in
		fixed = fixed[:keep]
	}
	tall := height - edge - len(keys) - len(fixed)
	p.place().show(body, tall)
	out := make([]Row, 0, height)
	out = append(out, Row{m.bar(width), Bar}, m.status(width), Row{rule(width, p.title()), Plain})
	for _, r := range fixed {
		out = append(out, Row{cut("  "+r.Text, width), r.Mark})
	}
	out = append(out, p.place().rows(width)...)
	out = append(out, Row{rule(width, m.news()), Plain})
	for _, k := range keys {
		out = append(out, Row{pad(" "+k, width), Bar})
	}
	return out
}

// Cursor gives the column and row of the text cursor; shown is false where nothing is typed.
func (m *Model) Cursor() (x, y int, shown bool) {
	t, ok := m.top().(typist)
	if !ok || !t.typing() || m.wide < LeastWidth || m.tall < LeastHeight {
		return 0, 0, false
	}
	row, col := t.cursor()
	return min(col+2, m.wide-1), 3 + row, true
}

// rule is a line across with words in it.
func rule(n int, words string) string {
	if words == "" {
		return strings.Repeat("─", n)
	}
	s := cut("── "+words+" ", n)
	return s + strings.Repeat("─", max(n-width(s), 0))
}

// bar is the row of pages with their digits, the open one in brackets.
func (m *Model) bar(n int) string {
	names := []string{"1 Window", "2 Days", "3 Tasks", "4 What governs", "5 What if"}
	gap, last := "  ", " 6 Hours: "+m.basis.String()
	switch {
	case n < 60:
		names, gap, last = []string{"1 Win", "2 Days", "3 Tasks", "4 Why", "5 If"}, "", "6"
	case n < 76:
		names = []string{"1 Window", "2 Days", "3 Tasks", "4 Why", "5 If"}
		last = " 6 " + m.basis.String()
	}
	open := 0
	if len(m.stack) > 1 {
		switch m.stack[1].(type) {
		case *daysPage:
			open = 1
		case *listPage:
			open = 2
		case *chainPage:
			open = 3
		case *whatPage:
			open = 4
		}
	}
	var b strings.Builder
	for i, name := range names {
		if i == open {
			b.WriteString("[" + name + "]" + gap[min(1, len(gap)):])
		} else {
			b.WriteString(" " + name + " " + gap[min(1, len(gap)):])
		}
	}
	return pad(b.String()+last, n)
}

// status is the row with the job's name, and the verdict at its right end.
func (m *Model) status(n int) Row {
	a := m.answer()
	verdict, mark := agenda.Word(a), Plain
	switch {
	case a.Verdict == plan.Fits:
		if !agenda.Neaped(a) {
			mark = Good
		}
		verdict += ", " + agenda.InHand(a, a.InHand) + " in hand"
	case a.Verdict == plan.CannotFit:
		mark = Bad
	case a.Plan != nil && a.InHand < 0:
		verdict += ", " + agenda.InHand(a, a.InHand)
	}
	name := clean.Line(m.shown.Job.Name)
	if m.shown != m.file {
		name = "WHAT IF, not in the file: " + name
	}
	room := n - width(verdict) - 4
	return Row{" " + pad(name, max(room, 8)) + "  " + verdict + " ", mark}
}

// news is what the lower rule says: a run that goes on, or rows out of sight.
func (m *Model) news() string {
	if m.what.running {
		return "planning again (" + m.what.progress + "); Esc on page 5 stops it"
	}
	return m.top().place().more()
}
