package expand

import (
	"fmt"

	"sailby/tasks"
	"sailby/tasks/origin"
)

// GasTest is how long a gas test takes, minutes, at every start of hot work (house judgement).
const GasTest = 15

// GasTester is the ticket of those who may test a closed space for gas.
const GasTester = "gas tester"

// washed gives the minutes that a weld or coat spends, at every start, on washing and drying what the tide
// has covered (R26).
func (x *expander) washed(t *tasks.Task, s *Step) float64 {
	if t.Kind != tasks.Weld && t.Kind != tasks.Coat || t.SetUp.Pos.Given() {
		return 0
	}
	f := t.Face.WashTime()
	if x.neverCovered(t.Face) {
		return 0
	}
	if f.Value > 0 && x.sharesWash(t) {
		x.w.Shared = true
		if x.w.Basis.Washed {
			return 0
		}
	}
	if f.Value > 0 {
		s.Estimate.Facts = append(s.Estimate.Facts, f)
	}
	return f.Value
}

// sharesWash says whether another weld or coat at the workface, or another coat of the task, could start in the same tide.
func (x *expander) sharesWash(t *tasks.Task) bool {
	if t.Kind == tasks.Coat && (len(t.Coats) > 1 || t.Stripe.Pos.Given()) {
		return true
	}
	for _, o := range x.w.Job.Tasks {
		if o != t && o.Face == t.Face && (o.Kind == tasks.Weld || o.Kind == tasks.Coat) && !x.absent[o] && !o.SetUp.Pos.Given() {
			return true
		}
	}
	return false
}

// neverCovered says whether the tide table shows no water, up to the first that comes after the window, that covers a
// workface: nothing is washed there.
func (x *expander) neverCovered(f *tasks.Workface) bool {
	if f == nil || f.Place == nil || f.Place.Tide == nil || !f.Level.Pos.Given() && !f.CoversAt.Pos.Given() {
		return false
	}
	for _, w := range f.Place.Tide.Waters {
		if w.Metres >= f.Covers() {
			return false
		}
		if w.At > int64(x.w.Window.Closes) && w.High {
			break
		}
	}
	return true
}

// gasTest puts the gas test before hot work in a closed space where there is paint (R27).
func (x *expander) gasTest(t *tasks.Task, s *Step, face func(float64) int) {
	f := t.Face
	if !s.Hot || f == nil || !f.Closed {
		return
	}
	var paint *tasks.Task
	for _, c := range x.w.Job.Tasks {
		if c.Kind == tasks.Coat && !x.absent[c] && c.Face != nil && nextTo(c.Face, f) && !x.comesAfter(c, t) {
			paint = c
			break
		}
	}
	if paint == nil {
		return
	}
	test := origin.House("gas test", GasTest, "min", "at every start: "+paint.Label()+" is in the same or the next workface")
	s.SetUp += face(test.Value)
	s.Estimate.Facts = append(s.Estimate.Facts, test)
	ticket := tasks.Ticket{Name: GasTester}
	holds := false
	for _, p := range x.w.Job.People {
		holds = holds || p.Holds(ticket)
	}
	if !holds {
		x.fault(t.Pos, "give somebody the ticket `"+GasTester+"`", "task %q: hot work in a closed space beside the paint of %q wants a gas test, and nobody has the ticket %s", t.Name, paint.Name, GasTester)
		return
	}
	for i := range s.Needs {
		if s.Needs[i].Watch {
			s.Needs[i].Also = append(append([]tasks.Ticket(nil), s.Needs[i].Also...), ticket)
			s.Estimate.Notes = append(s.Estimate.Notes, "gas test before every start, by the fire watch; and again whenever the air may have changed")
			return
		}
	}
	s.Needs = append(s.Needs, tasks.Need{Ticket: ticket, Count: 1, Pos: t.Pos})
	s.Estimate.Notes = append(s.Estimate.Notes, "gas test before every start; and again whenever the air may have changed")
}

// nextTo says whether two workfaces are one, or declared next to each other.
func nextTo(a, b *tasks.Workface) bool {
	return a == b || a.Place == b.Place && (has(a.NextTo, b.Name) || has(b.NextTo, a.Name))
}

// comesAfter says whether links put task t after task before.
func (x *expander) comesAfter(t, before *tasks.Task) bool {
	seen := map[*tasks.Task]bool{}
	var look func(*tasks.Task) bool
	look = func(at *tasks.Task) bool {
		if at == nil || seen[at] {
			return false
		}
		seen[at] = true
		for _, l := range at.Links {
			if l.To == tasks.Finish || l.From == tasks.Start {
				continue
			}
			if f := x.byName[l.Task]; f == before || look(f) {
				return true
			}
		}
		return false
	}
	return look(t)
}

// hotOverCoats keeps hot work before the coats on the same part, or behind it: burning and welding through a film is
// forbidden, cured or not (R27).
func (x *expander) hotOverCoats() {
	for _, h := range x.w.Job.Tasks {
		if x.absent[h] || h.PaintOff || len(h.Parts) == 0 || !x.hot(h) {
			continue
		}
		for _, c := range x.w.Job.Tasks {
			if c.Kind != tasks.Coat || x.absent[c] || !burns(h, c) || x.comesAfter(c, h) {
				continue
			}
			if x.comesAfter(h, c) {
				what, way := "on what %q has coated", "put it before the coat, write `leave bare: 2 m` (its seams) on the coat, or `paint off first: yes` here"
				if meet(h.Parts, c.Behind) {
					what, way = "behind what %q has coated", "put it before the coat, or write `paint off first: yes` here"
				}
				x.fault(h.Pos, way, "task %q: hot work "+what, h.Name, c.Name)
				continue
			}
			x.w.Orders = append(x.w.Orders, Order{Pos: c.Pos, Text: fmt.Sprintf("%s before %s: no hot work on paint", h.Name, c.Name),
				Choices: []Before{{First: x.handsOf(h), Then: x.handsOf(c)}}})
		}
	}
}

// burns says whether hot work h harms coat c: on what it coats, unless the seams are left bare, or on what it is behind.
func burns(h, c *tasks.Task) bool {
	return !c.Bare.Pos.Given() && meet(h.Parts, c.Surface) || meet(h.Parts, c.Behind)
}

func (x *expander) hot(t *tasks.Task) bool {
	for _, s := range x.first[t] {
		if s.Hot {
			return true
		}
	}
	return false
}
