package model

import (
	"fmt"
	"strings"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// glancePage is the window at a glance: verdict, time in hand, the window as a strip, deadlines,
// and the three answers side by side.
type glancePage struct {
	m  *Model
	at scroll
}

func (p *glancePage) title() string         { return "The window at a glance" }
func (p *glancePage) place() *scroll        { return &p.at }
func (p *glancePage) press(Key) (Ask, bool) { return Ask{}, false }
func (p *glancePage) keys() string {
	return "1-5 pages   6 other hours   Up/Down choose   Enter open   Esc leave"
}

func (p *glancePage) lay(n int) ([]Row, []line) {
	m := p.m
	a := m.answer()
	mark := Plain
	switch a.Verdict {
	case plan.Fits:
		if !agenda.Neaped(a) {
			mark = Good
		}
	case plan.CannotFit:
		mark = Bad
	}
	out := para(n, "", agenda.Sentence(a, m.shown.LowToo && a == m.shown.Likely), mark, nil)
	if a.CutShort {
		out = append(out, para(n, "", "The search was cut short; with more time it may find a better plan or a proof.", Plain, nil)...)
	}
	out = append(out, line{})
	out = append(out, windowStrip(a, m.shifts(), n)...)
	out = append(out, line{})
	out = append(out, sideBySide(m.shown, m.shown == m.tried, n)...)
	if len(a.Deadlines) > 0 {
		out = append(out, line{})
		out = append(out, p.deadlines(a, n)...)
	}
	if a.Proof != nil {
		out = append(out, line{})
		out = append(out, proofLines(a, n)...)
	}
	out = append(out, m.waysLines(n)...)
	if !a.Best && a.BoundWhy != "" && a.Plan != nil {
		out = append(out, line{})
		out = append(out, para(n, "", "No plan can finish before "+agenda.Moment(a, a.Bound)+": "+a.BoundWhy+".", Plain, nil)...)
	}
	for i, note := range m.shown.Job.Notes {
		if i == 0 {
			out = append(out, line{}, line{"Notes on the job file", Head, nil})
		}
		out = append(out, para(n, "- ", note.Text+inFile(agenda.At(note.Pos)), Plain, nil)...)
	}
	out = append(out, line{})
	return nil, append(out, para(n, "", agenda.Care, Faint, nil)...)
}

func inFile(at string) string {
	if at == "" {
		return ""
	}
	return " (" + at + ")"
}

// sideBySide is the table of the three answers; only says that no more than the likely one was
// planned.
func sideBySide(r *plan.Report, only bool, n int) []line {
	label := 19
	each := (n - label) / 3
	widths := []int{label, each, each}
	same := func(a *plan.Answer, f func(*plan.Answer) string) string {
		switch {
		case a == nil && only:
			return "not planned"
		case a == nil:
			return "the same"
		}
		return f(a)
	}
	row := func(name string, f func(*plan.Answer) string) line {
		return line{columns(n, widths, name, f(r.Likely), same(r.Maybes, f), same(r.High, f)), Plain, nil}
	}
	return []line{
		{columns(n, widths, "", "likely hours", "every maybe", "high end"), Head, nil},
		row("verdict", func(a *plan.Answer) string { return agenda.Word(a) }),
		row("site finish", agenda.Finish),
		row("time in hand", func(a *plan.Answer) string { return agenda.InHand(a, a.InHand) }),
		row("earliest possible", func(a *plan.Answer) string {
			if a.Best && a.Plan != nil {
				return "this, proved"
			}
			return agenda.Moment(a, a.Bound)
		}),
	}
}

// deadlines is the table of deadlines; Enter opens the task.
func (p *glancePage) deadlines(a *plan.Answer, n int) []line {
	name := max(n-3*18, 16)
	widths := []int{name, 18, 18}
	out := []line{{columns(n, widths, "Deadlines", "must be done by", "planned finish", "in hand"), Head, nil}}
	for _, d := range a.Deadlines {
		finish := "-"
		if a.Plan != nil {
			finish = agenda.Moment(a, d.Finish)
		}
		l := line{text: columns(n, widths, agenda.DeadlineName(d), agenda.Moment(a, d.By), finish, agenda.InHand(a, d.InHand))}
		if d.Task != nil {
			task := d.Task.Name
			l.do = func() Ask { return p.m.open(newTask(p.m, task)) }
		} else {
			l.do = func() Ask { return p.m.open(&chainPage{m: p.m}) }
		}
		out = append(out, l)
		if a.Plan != nil && d.Task != nil && d.LastStart < hours.Far && d.LastStart != 0 {
			out = append(out, line{text: cut("  last start that still makes it: "+agenda.Moment(a, d.LastStart), n)})
		}
	}
	return out
}

// proofLines says why it cannot fit.
func proofLines(a *plan.Answer, n int) []line {
	out := []line{{"Why it cannot fit " + agenda.BasisWords(a.Work.Basis), Head, nil}}
	if a.Proof.Summary != "" {
		out = append(out, para(n, "", a.Proof.Summary, Plain, nil)...)
	}
	for _, l := range a.Proof.Lines {
		s := l.Text
		if n := quantity.Hours(l.Minutes); l.Minutes != 0 && !strings.Contains(s, n) {
			s += ", " + n
		}
		if !l.Needed {
			s += " [not shown to be needed]"
		}
		out = append(out, para(n, "- ", s+inFile(agenda.At(l.Pos)), Plain, nil)...)
	}
	if a.Proof.Over > 0 && !strings.Contains(a.Proof.Summary, quantity.Hours(a.Proof.Over)) {
		out = append(out, line{text: fmt.Sprintf("Together %s more than there is.", quantity.Hours(a.Proof.Over))})
	}
	return out
}
