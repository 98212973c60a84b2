package agenda

import (
	"cmp"
	"slices"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// with is the furthest that two people's shifts may start apart and still be one sheet, minutes.
const with = 4 * 60

// Shifts sorts the plan's pieces into shifts, in order of time. It gives nil without a plan.
func Shifts(a *plan.Answer) []*Shift {
	if a == nil || a.Plan == nil || a.Work == nil {
		return nil
	}
	b := builder{a: a, duty: map[string][]hours.Span{}, outside: map[string]bool{"": true}}
	for _, p := range a.Work.Job.People {
		b.outside[p.Name] = p.Outside
		b.duty[p.Name] = Duty(a.Work, p)
		if set, known := a.Shifts[p.Name]; known { // as they were planned with
			b.duty[p.Name] = set
		}
	}
	b.collect()
	b.group()
	for _, s := range b.shifts {
		b.finish(s)
	}
	return b.shifts
}

// turn is one person's piece with the duty it falls into; nobody's pieces have no name.
type turn struct {
	who   string
	on    hours.Span
	entry Entry
}

type builder struct {
	a       *plan.Answer
	duty    map[string][]hours.Span
	outside map[string]bool // people who come when booked, and nobody: they join the crew's shift
	turns   []turn
	shifts  []*Shift
}

func (b *builder) collect() {
	for _, e := range Worked(b.a) {
		if len(e.People) == 0 {
			b.turns = append(b.turns, turn{on: e.Span, entry: e})
		}
		for _, who := range e.People {
			t := turn{who: who, on: e.Span, entry: e}
			for _, d := range b.duty[who] {
				if d.Has(e.From) {
					t.on = d
				}
			}
			b.turns = append(b.turns, t)
		}
	}
	slices.SortStableFunc(b.turns, func(x, y turn) int {
		return cmp.Or(cmp.Compare(boolInt(b.outside[x.who]), boolInt(b.outside[y.who])), cmp.Compare(x.on.From, y.on.From), cmp.Compare(x.entry.From, y.entry.From))
	})
}

func boolInt(v bool) int {
	if v {
		return 1
	}
	return 0
}

func (b *builder) group() {
	for _, t := range b.turns {
		site := t.entry.Step.Place == b.a.Work.Window.Place
		zone := Zone(b.a.Work, t.entry.Step.Place)
		span := t.on
		if b.outside[t.who] { // a booking may be far longer than the crew's shift
			span = t.entry.Span
		}
		home := b.holds(t, site, zone.String())
		for _, s := range b.shifts {
			if home != nil {
				break
			}
			near := t.on.From >= s.From && t.on.From-s.From <= with
			if b.outside[t.who] || t.on == t.entry.Span { // no shift of their own: wherever it lies inside
				near = s.From <= t.entry.From && t.entry.From < s.To || near || s.From > t.on.From && s.From-t.on.From <= with
			}
			if near && s.Site == site && s.Zone.String() == zone.String() {
				home = s
			}
		}
		if home == nil {
			home = &Shift{Span: span, Site: site, Zone: zone}
			b.shifts = append(b.shifts, home)
		}
		home.From, home.To = min(home.From, span.From), max(home.To, span.To)
		home.add(t)
	}
	slices.SortStableFunc(b.shifts, func(x, y *Shift) int {
		return cmp.Or(cmp.Compare(x.From, y.From), cmp.Compare(boolInt(x.Site), boolInt(y.Site)))
	})
}

// holds gives the shift in which somebody from outside is at work, nil where there is none.
func (b *builder) holds(t turn, site bool, zone string) *Shift {
	if !b.outside[t.who] {
		return nil
	}
	for _, s := range b.shifts {
		if s.Site == site && s.Zone.String() == zone && s.From <= t.entry.From && t.entry.From < s.To {
			return s
		}
	}
	return nil
}

func (s *Shift) add(t turn) {
	if t.who != "" {
		i := slices.IndexFunc(s.People, func(p Person) bool { return p.Name == t.who })
		if i < 0 {
			i = len(s.People)
			s.People = append(s.People, Person{Name: t.who, On: t.on})
		}
		s.People[i].On.To = max(s.People[i].On.To, t.on.To)
		s.People[i].Entries = append(s.People[i].Entries, t.entry)
	}
	for _, e := range s.Entries {
		if e.Step == t.entry.Step && e.Span == t.entry.Span && e.Watch == t.entry.Watch && slices.Equal(e.People, t.entry.People) {
			return
		}
	}
	s.Entries = append(s.Entries, t.entry)
}

// finish sorts a shift, marks what runs over its ends, adds people who are on shift without
// work, and the standing time.
func (b *builder) finish(s *Shift) {
	w := b.a.Work
	byTime := func(x, y Entry) int {
		return cmp.Or(cmp.Compare(x.From, y.From), cmp.Compare(x.Step.Index, y.Step.Index), cmp.Compare(boolInt(x.Watch), boolInt(y.Watch)))
	}
	slices.SortStableFunc(s.Entries, byTime)
	for i := range s.Entries {
		e := &s.Entries[i]
		e.From0 = !e.Watch && e.Planned.Start < s.From
		e.Goes = !e.Watch && e.Planned.Finish > s.To
	}
	if s.Site {
		for _, p := range w.Job.People {
			for _, d := range b.duty[p.Name] {
				if d.From-s.From > with || s.From-d.From > with || !b.at(p, d, true) || slices.ContainsFunc(s.People, func(q Person) bool { return q.Name == p.Name }) {
					continue
				}
				s.People = append(s.People, Person{Name: p.Name, On: d})
				s.From, s.To = min(s.From, d.From), max(s.To, d.To)
			}
		}
	}
	if s.Site && w.Trip == nil { // at home until the window opens: that is no part of the site's day
		s.From = max(s.From, w.Window.Opens)
		for i := range s.People {
			s.People[i].On.From = max(s.People[i].On.From, w.Window.Opens)
		}
	}
	order := map[string]int{}
	for i, p := range w.Job.People {
		order[p.Name] = i
	}
	slices.SortStableFunc(s.People, func(x, y Person) int { return cmp.Compare(order[x.Name], order[y.Name]) })
	for i := range s.People {
		q := &s.People[i]
		slices.SortStableFunc(q.Entries, byTime)
		if b.outside[q.Name] {
			q.On = hours.Span{From: max(q.On.From, s.From), To: max(min(q.On.To, s.To), max(q.On.From, s.From))}
		}
	}
	s.place()
	begin := s.From.In(s.Zone)
	s.Date = hours.DateOf(begin)
	s.Night = hours.DateOf((s.To - 1).In(s.Zone)) != s.Date
	for i, ps := range b.a.Plan.Steps[:min(len(b.a.Plan.Steps), len(w.Steps))] {
		st := w.Steps[i]
		span := hours.Span{From: ps.Start, To: ps.Finish}
		if st.Absent || st.Class == expand.Hands || (st.Place == w.Window.Place) != s.Site || !span.Overlaps(s.Span) {
			continue
		}
		s.Standing = append(s.Standing, Standing{span, st})
	}
}

// at says whether the person is at the site for the start of d.
func (b *builder) at(p *tasks.Person, d hours.Span, site bool) bool {
	for _, stay := range b.a.Work.Presence[p.Name] {
		if stay.Site == site && stay.Overlaps(d) && stay.From <= d.From {
			return true
		}
	}
	return false
}

// place picks the place with most of the shift's minutes, the first of equals.
func (s *Shift) place() {
	minutes := map[*tasks.Place]int{}
	for _, e := range s.Entries {
		minutes[e.Step.Place] += e.Len()
	}
	for _, e := range s.Entries {
		if s.Place == nil || minutes[e.Step.Place] > minutes[s.Place] {
			s.Place = e.Step.Place
		}
	}
}
