package model

import (
	"strings"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks/expand"
)

// The smallest screen that is drawn; below it a line asks for more room.
const (
	LeastWidth  = 40
	LeastHeight = 12
)

// edge is the number of rows around a page: pages, job and verdict, title; more to come, keys.
const edge = 5

// page is one thing that can be looked at.
type page interface {
	title() string
	// lay gives the rows that stay in sight and, below them, the lines that scroll, for n columns.
	lay(n int) (fixed []Row, body []line)
	place() *scroll
	keys() string // what the keys do here, in words
	// press does what a key means here only; false hands it on.
	press(k Key) (Ask, bool)
}

// typist is a page with a line being typed; cursor gives its row among the fixed ones and its
// column.
type typist interface {
	typing() bool
	cursor() (row, col int)
}

// Model is the state of the screen. It is not safe for use by several goroutines.
type Model struct {
	file  *plan.Report // of the job as it is in the file
	tried *plan.Report // with the changes tried; nil if none was planned yet
	shown *plan.Report // one of the two
	basis basis
	stack []page // the first is always the window
	days  map[*plan.Answer][]*agenda.Shift
	what  *whatPage
	wide  int // columns and rows as last drawn
	tall  int
}

// basis is which of a report's answers is looked at.
type basis uint8

const (
	likely basis = iota
	maybes
	high
)

func (b basis) String() string { return [...]string{"likely", "every maybe", "high end"}[b] }

// New makes the model of a report: the window is shown first.
func New(r *plan.Report) *Model {
	m := &Model{file: r, shown: r, days: map[*plan.Answer][]*agenda.Shift{}}
	m.what = newWhat(m)
	m.stack = []page{&glancePage{m: m}}
	return m
}

// of gives a report's answer on a basis; one that a report does not hold is the likely one.
func of(r *plan.Report, b basis) *plan.Answer {
	switch {
	case b == maybes && r.Maybes != nil:
		return r.Maybes
	case b == high && r.High != nil:
		return r.High
	}
	return r.Likely
}

func (m *Model) answer() *plan.Answer { return of(m.shown, m.basis) }

func (m *Model) work() *expand.Work { return m.answer().Work }

func (m *Model) shifts() []*agenda.Shift {
	a := m.answer()
	if _, ok := m.days[a]; !ok {
		m.days[a] = agenda.Shifts(a)
	}
	return m.days[a]
}

func (m *Model) top() page { return m.stack[len(m.stack)-1] }

// open puts a page on top; Esc comes back from it.
func (m *Model) open(p page) Ask {
	m.stack = append(m.stack, p)
	return Ask{}
}

// turn goes to one of the numbered pages; Esc comes back to the window from it.
func (m *Model) turn(p page) Ask {
	m.stack = m.stack[:1]
	if p != nil {
		m.open(p)
	}
	return Ask{}
}

// Press does what a key means and says what it asks of the driver.
func (m *Model) Press(k Key) Ask {
	if k.Code == Away {
		return Ask{Leave: true}
	}
	p := m.top()
	if ask, taken := p.press(k); taken {
		return ask
	}
	switch k.Code {
	case Back:
		return m.back()
	case Enter:
		return p.place().enter()
	case Letter:
		return m.number(k.Letter)
	}
	p.place().press(k)
	return Ask{}
}

// Paste takes text that was pasted: into the line being typed, else nowhere.
func (m *Model) Paste(text string) {
	if t, ok := m.top().(typist); ok && t.typing() {
		for _, r := range clean.Line(text) {
			m.top().press(Key{Letter, r})
		}
	}
}

// back ends a run that goes on, else goes one page back, else asks about leaving.
func (m *Model) back() Ask {
	switch {
	case m.what.running && m.top() == page(m.what):
		return m.what.stop()
	case len(m.stack) > 1:
		m.stack = m.stack[:len(m.stack)-1]
		return Ask{}
	}
	return m.open(&leavePage{m: m})
}

// number turns to the page of a digit.
func (m *Model) number(r rune) Ask {
	switch r {
	case '1':
		return m.turn(nil)
	case '2':
		return m.turn(newDays(m))
	case '3':
		return m.turn(newList(m, "Tasks", func(t string) Ask { return m.open(newTask(m, t)) }))
	case '4':
		return m.turn(&chainPage{m: m})
	case '5':
		return m.turn(m.what)
	case '6':
		m.basis = m.nextBasis()
	}
	return Ask{}
}

// nextBasis gives the next answer that the report holds.
func (m *Model) nextBasis() basis {
	for b := (m.basis + 1) % 3; b != m.basis; b = (b + 1) % 3 {
		if b == likely || of(m.shown, b) != m.shown.Likely {
			return b
		}
	}
	return m.basis
}

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
	fixed, body := p.lay(width - 2)
	if keep := height - edge - 3; len(fixed) > keep { // leave three rows to scroll in
		fixed = fixed[:keep]
	}
	tall := height - edge - len(fixed)
	p.place().show(body, tall)
	out := make([]Row, 0, height)
	out = append(out, Row{m.bar(width), Bar}, m.status(width), Row{rule(width, p.title()), Plain})
	for _, r := range fixed {
		out = append(out, Row{cut("  "+r.Text, width), r.Mark})
	}
	out = append(out, p.place().rows(width)...)
	return append(out, Row{rule(width, m.news()), Plain}, Row{cut(" "+p.keys(), width), Bar})
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
	if n < 76 {
		names = []string{"1 Window", "2 Days", "3 Tasks", "4 Why", "5 If"}
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
			b.WriteString("[" + name + "] ")
		} else {
			b.WriteString(" " + name + "  ")
		}
	}
	return pad(b.String()+" 6 Hours: "+m.basis.String(), n)
}

// status is the row with the job's name, and the verdict at its right end.
func (m *Model) status(n int) Row {
	a := m.answer()
	verdict, mark := agenda.Word(a.Verdict), Plain
	switch {
	case a.Verdict == plan.Fits:
		mark = Good
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
		return "planning again: " + m.what.progress + " (Esc on page 5 stops it)"
	}
	return m.top().place().more()
}
