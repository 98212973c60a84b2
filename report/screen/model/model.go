package model

import (
	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks/expand"
)

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
	file    *plan.Report // of the job as it is in the file
	tried   *plan.Report // with the changes tried; nil if none was planned yet
	shown   *plan.Report // one of the two
	looking bool         // for what would make the job of the file fit
	basis   basis
	stack   []page // the first is always the window
	days    map[*plan.Answer][]*agenda.Shift
	what    *whatPage
	wide    int // columns and rows as last drawn
	tall    int
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
		m.days[a] = together(agenda.Shifts(a))
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
