package model

import (
	"fmt"
	"strings"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// daysPage shows one shift: a strip for each person, what limits it, and its work in order.
type daysPage struct {
	m   *Model
	day int
	at  scroll
}

// newDays begins at the first shift at the site, else at the first.
func newDays(m *Model) *daysPage {
	p := &daysPage{m: m}
	for i, s := range m.shifts() {
		if s.Site {
			p.day = i
			break
		}
	}
	return p
}

func (p *daysPage) place() *scroll { return &p.at }
func (p *daysPage) keys() string {
	return "Left/Right other days   Up/Down choose   Enter open task   Esc back"
}

func (p *daysPage) title() string {
	n := len(p.m.shifts())
	if n == 0 {
		return "The days"
	}
	return fmt.Sprintf("The days: %d of %d", min(p.day, n-1)+1, n)
}

func (p *daysPage) press(k Key) (Ask, bool) {
	n := len(p.m.shifts())
	p.day = max(min(p.day, n-1), 0) // another answer may have fewer
	switch {
	case k.Code == Left && p.day > 0:
		p.day--
	case k.Code == Right && p.day < n-1:
		p.day++
	case k.Code != Left && k.Code != Right:
		return Ask{}, false
	default:
		return Ask{}, true
	}
	p.at = scroll{}
	return Ask{}, true
}

// leastDay is the number of rows for which a following day is begun.
const leastDay = 12

func (p *daysPage) lay(n int) ([]Row, []line) {
	shifts := p.m.shifts()
	a := p.m.answer()
	if len(shifts) == 0 {
		return nil, para(n, "", "There is no plan to show "+agenda.BasisWords(a.Work.Basis)+". Page 4 says why.", Plain, nil)
	}
	s := shifts[min(p.day, len(shifts)-1)]
	var fixed []Row
	for _, t := range wrap(agenda.Headline(a.Work, s), n) {
		fixed = append(fixed, Row{t, Head})
	}
	body := p.lines(s, n)
	room := p.m.tall - edge - 1 - len(fixed)
	for _, next := range shifts[min(p.day, len(shifts)-1)+1:] { // where there is room, the days that follow
		if len(body)+leastDay > room {
			break
		}
		body = append(body, line{})
		body = append(body, para(n, "", agenda.Headline(a.Work, next), Head, nil)...)
		body = append(body, p.lines(next, n)...)
	}
	return fixed, body
}

// lines gives the strips of a day and its work.
func (p *daysPage) lines(s *agenda.Shift, n int) []line {
	a := p.m.answer()
	body := para(n, "", agenda.Facts(a.Work, s), Faint, nil)
	d := dayStrips{a: a, s: s, n: n, letters: letters(s)}
	body = append(body, d.lines()...)
	body = append(body, line{})
	for _, e := range agenda.Merged(s.Entries) {
		body = append(body, p.entry(d, e))
	}
	for _, st := range s.Standing {
		task := st.Step.Task.Name
		body = append(body, line{
			text: cut(": standing: "+agenda.StepLabel(a.Work, st.Step)+", until "+agenda.When(st.To, s.Zone), n),
			do:   func() Ask { return p.m.open(newTask(p.m, task)) }})
	}
	return body
}

// entry is one piece of work of the day; Enter opens its task.
func (p *daysPage) entry(d dayStrips, e agenda.Entry) line {
	task := e.Step.Task.Name
	what := agenda.StepLabel(d.a.Work, e.Step)
	if e.Watch {
		what = "fire watch after " + what
	}
	if e.Goes {
		what += " (goes on)"
	}
	if short := agenda.Sliver(e); short != "" {
		what += " (" + short + ")"
	}
	if pause := agenda.Breaks(e, d.s.Zone); pause != "" {
		what += " (" + pause + ")"
	}
	who := strings.Join(e.People, ", ")
	if who == "" {
		who = "nobody"
	}
	where := ""
	if e.Step.Face != nil {
		where = e.Step.Face.Name
	} else {
		where = e.Step.Place.Name
	}
	names := max(d.n-14-10-22, 20)
	widths := []int{14, names, 10}
	if d.n > 110 {
		widths = []int{14, d.n - 14 - 20 - 45, 20}
	}
	text := columns(d.n, widths, string(d.letters[e.Step])+" "+agenda.Within(e.Span, d.s.Zone), what, where, who)
	return line{text: text, do: func() Ask { return p.m.open(newTask(p.m, task)) }}
}

// letters gives every step of a shift its letter, in the order of work.
func letters(s *agenda.Shift) map[*expand.Step]rune {
	const all = "abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZ"
	out := map[*expand.Step]rune{}
	for _, e := range s.Entries {
		if _, ok := out[e.Step]; ok {
			continue
		}
		out[e.Step] = '#'
		if len(out) <= len(all) {
			out[e.Step] = rune(all[len(out)-1])
		}
	}
	return out
}

// dayStrips draws the strips of one shift.
type dayStrips struct {
	a       *plan.Answer
	s       *agenda.Shift
	n       int
	letters map[*expand.Step]rune
}

// lines gives the ruler, a strip for each person, and one for each limit of the day.
func (d dayStrips) lines() []line {
	label := 9
	for _, q := range d.s.People {
		label = max(label, min(width(clean.Line(q.Name))+1, d.n/5))
	}
	base := newStrip(d.s.Span, d.s.Zone, d.n-label)
	row := func(name string, s strip, mark Mark) line {
		return line{text: strings.TrimRight(pad(clean.Line(name), label-1)+" "+s.String(), " "), mark: mark}
	}
	out := []line{row("", strip{cells: []rune(base.ruler(d.s.Zone))}, Faint)}
	for _, q := range d.s.People {
		out = append(out, row(q.Name, d.person(base.blank(), q), Plain))
	}
	gates := func(list []agenda.Gate) {
		for _, g := range list {
			s := base.blank()
			for _, o := range g.Open {
				s.fill(o, '_')
			}
			out = append(out, row(g.Name, s, Plain))
		}
	}
	gates(agenda.Reach(d.a.Work, d.s))
	gates(agenda.Hire(d.a.Work, d.s))
	gates(agenda.Permits(d.a.Work, d.s))
	key := fmt.Sprintf("a== work, ~ fire watch, . free, - break, > on the way, _ open (%d min each)", base.step)
	return append(out, para(d.n, "", key, Faint, nil)...)
}

// person draws one person's shift into a strip.
func (d dayStrips) person(s strip, q agenda.Person) strip {
	s.fill(q.On, '.')
	for _, p := range d.openPlaces() {
		for _, shut := range (hours.Set{q.On}).Less(agenda.PlaceHours(d.a.Work, p)) {
			s.fill(shut, '-')
		}
	}
	for i, e := range q.Entries {
		if i > 0 && q.Entries[i-1].Step == e.Step && !e.Watch && e.From > q.Entries[i-1].To {
			s.fill(hours.Span{From: q.Entries[i-1].To, To: e.From}, '-')
		}
	}
	for _, t := range d.a.Work.Travel[q.Name] {
		s.fill(t, '>')
	}
	for _, e := range q.Entries {
		r := '='
		if e.Watch {
			r = '~'
		}
		from, to := s.fill(e.Span, r)
		if to > from {
			s.cells[from] = d.letters[e.Step]
		}
		if name := agenda.TaskLabel(e.Step.Task); to-from > 5 && !e.Watch {
			name, _ = split(name, to-from-3)
			s.write(from+1, to-1, " "+strings.TrimRight(name, " ")+" ")
		}
	}
	return s
}

// openPlaces gives the places of the shift's work whose closing is everybody's break: only where
// there is one place.
func (d dayStrips) openPlaces() []*tasks.Place {
	var out []*tasks.Place
	for _, e := range d.s.Entries {
		if len(out) == 0 {
			out = append(out, e.Step.Place)
		} else if out[0] != e.Step.Place {
			return nil
		}
	}
	return out
}
