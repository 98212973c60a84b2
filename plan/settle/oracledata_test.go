package settle

import (
	"slices"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// write gives the data of a job for testdata/oracle/job.mzn.
func (x *exported) write() string {
	d := &data{}
	d.put("H", x.slots)
	d.put("n", len(x.w.Steps))
	d.put("P", len(x.w.Job.People))
	x.steps(d)
	x.calendars(d)
	x.links(d)
	x.held(d)
	x.apart(d)
	x.orders(d)
	return d.String()
}

// steps writes the steps and, for each, its choices of people with the calendar that follows from each.
func (x *exported) steps(d *data) {
	var hands, long, site, soonest, latest, first, modes, cal []int
	var crew [][]int
	for _, s := range x.w.Steps {
		h, l := 0, 0
		choices := [][]*tasks.Person{nil}
		switch {
		case s.Absent:
		case s.Class == expand.Hands:
			if s.SetUp != 0 || s.Watch != 0 || s.LeastPiece != 0 && !s.InOneGo || s.SafeStop != 0 && !s.InOneGo || s.ChangeHands || len(s.Needs) == 0 {
				x.t.Fatalf("%s has more to it than the outside model knows: %+v", s.Key(), s)
			}
			h, l, choices = 1, x.whole(s.Working), x.crews(s)
		case s.Class == expand.Clock:
			l = x.whole(s.Clock)
		default:
			l = x.whole(x.cure(s, x.w.Window.Opens))
		}
		hands, long = append(hands, h), append(long, l)
		site = append(site, map[bool]int{true: 1}[s.Site])
		from, by := 0, x.slots+24*60/slot*4 // what cures on past the window
		if s.NotBefore > x.w.Window.Opens {
			from = x.whole(int(s.NotBefore - x.w.Window.Opens))
		}
		if s.Deadline < hours.Far {
			by = x.whole(int(s.Deadline - x.w.Window.Opens))
		}
		soonest, latest = append(soonest, from), append(latest, by)
		first, modes = append(first, len(cal)+1), append(modes, len(choices))
		access := x.access(s)
		for _, c := range choices {
			in := make([]int, len(x.w.Job.People))
			for i, p := range x.w.Job.People {
				for _, q := range c {
					if p == q {
						in[i] = 1
					}
				}
			}
			k := 0
			if h == 1 {
				k = x.calendarOf(s, x.working(s, access, c), access)
			}
			cal, crew = append(cal, k), append(crew, in)
		}
	}
	d.list("hands", hands)
	d.list("long", long)
	d.list("site", site)
	d.list("soonest", soonest)
	d.list("latest", latest)
	d.list("first", first)
	d.list("modes", modes)
	d.put("M", len(cal))
	d.list("cal", cal)
	d.table("crew", crew)
}

// cure gives the minutes that a film takes from a minute on (R11): all alike at one temperature.
func (x *exported) cure(s *expand.Step, at hours.Minute) int {
	sum, n := 0.0, 0
	for ; sum < 1-1e-9; n++ {
		sum += s.Rate(at + hours.Minute(n))
	}
	return n
}

func (x *exported) calendars(d *data) {
	d.put("C", len(x.rows))
	var open [][]int
	for _, r := range x.rows {
		row := make([]int, len(r))
		for i, on := range r {
			if on {
				row[i] = 1
			}
		}
		open = append(open, row)
	}
	d.table("openSlots", open)
	d.table("openings", x.runs)
	place := make([]int, x.slots)
	for i, on := range x.open {
		if on {
			place[i] = 1
		}
	}
	d.list("placeSlots", place)
}

// links writes the waits (R10): ends are 0 for starts and 1 for finishes; -1 is no wait.
func (x *exported) links(d *data) {
	var a, b, aEnd, bEnd, least, most, working []int
	for _, l := range x.w.Links {
		if l.From == nil || l.MaxWorking || l.MaxCure != nil {
			x.t.Fatalf("%s: a wait that the outside model does not know: %+v", l.To.Key(), l)
		}
		lo, hi := -1, -1
		if l.Min > expand.NoMin {
			lo = x.whole(l.Min)
		}
		if l.Max < expand.NoMax {
			hi = x.whole(l.Max)
			if hi > 0 && l.FromEnd == tasks.Finish {
				x.t.Fatalf("%s: a wait at most from a finish takes the best plan off the lattice", l.To.Key())
			}
		}
		w := 0
		if l.Working {
			w = 1
		}
		a, b = append(a, l.From.Index+1), append(b, l.To.Index+1)
		aEnd, bEnd = append(aEnd, x.end(l.FromEnd)), append(bEnd, x.end(l.ToEnd))
		least, most, working = append(least, lo), append(most, hi), append(working, w)
	}
	d.put("L", len(a))
	d.list("from", a)
	d.list("to", b)
	d.list("fromEnd", aEnd)
	d.list("toEnd", bEnd)
	d.list("least", least)
	d.list("most", most)
	d.list("working", working)
}

func (x *exported) end(e tasks.LinkEnd) int {
	if e == tasks.Finish {
		return 1
	}
	return 0
}

// held writes what there is only so much of (R7): kit, power in watts, room; with what each step
// takes, and whether it keeps that in pauses.
func (x *exported) held(d *data) {
	var capacity []int
	var take, stays [][]int
	add := func(most int, of func(s *expand.Step) (int, bool)) {
		t, k := make([]int, len(x.w.Steps)), make([]int, len(x.w.Steps))
		for i, s := range x.w.Steps {
			n, all := of(s)
			if t[i] = n; all {
				k[i] = 1
			}
		}
		capacity, take, stays = append(capacity, most), append(take, t), append(stays, k)
	}
	for _, k := range x.w.Job.Kit {
		add(k.Count, func(s *expand.Step) (int, bool) {
			for _, u := range s.Kit {
				if u.Kit == k {
					return u.Count, u.Stays
				}
			}
			return 0, false
		})
	}
	place := x.w.Window.Place
	kva := place.Mains.Value
	for _, k := range x.w.Job.Kit {
		kva += k.Gives * float64(max(1, k.Count))
	}
	add(int(kva*1000+0.5), func(s *expand.Step) (int, bool) { return int(s.Power*1000 + 0.5), false })
	for _, f := range place.Workfaces {
		if f.People > 0 {
			add(f.People, func(s *expand.Step) (int, bool) {
				if s.Face == f {
					return s.Room, false
				}
				return 0, false
			})
		}
	}
	d.put("R", len(capacity))
	d.list("capacity", capacity)
	d.table("take", take)
	d.table("stays", stays)
}

// apart writes the pairs of steps that never overlap, with how long each goes on after its finish: states that
// clash (R12), and lifts of one assembly (R7).
func (x *exported) apart(d *data) {
	clash := x.w.Job.ClashTable()
	var a, b, tailA, tailB []int
	for i, s := range x.w.Steps {
		for _, u := range x.w.Steps[i+1:] {
			if s.Task == u.Task || s.Absent || u.Absent {
				continue
			}
			if s.Moves != "" && s.Moves == u.Moves {
				a, b, tailA, tailB = append(a, s.Index+1), append(b, u.Index+1), append(tailA, 0), append(tailB, 0)
			}
			if s.Face == nil || u.Face == nil || s.Face != u.Face && !nextTo(s.Face, u.Face) {
				continue
			}
			for _, p := range s.States {
				for _, q := range u.States {
					if clash.Has(p.Name, q.Name) {
						a, b = append(a, s.Index+1), append(b, u.Index+1)
						tailA, tailB = append(tailA, x.tail(p)), append(tailB, x.tail(q))
					}
				}
			}
		}
	}
	d.put("A", len(a))
	d.list("one", a)
	d.list("other", b)
	d.list("tailOne", tailA)
	d.list("tailOther", tailB)
}

func (x *exported) tail(s expand.State) int {
	if s.Tail == nil {
		return 0
	}
	return x.whole(int(s.Tail(x.w.Window.Opens) - x.w.Window.Opens))
}

// orders writes the order rules (R17): each has two choices, each of them a step before a step.
func (x *exported) orders(d *data) {
	var before [][]int
	n := 0
	for _, o := range x.w.Orders {
		n++
		for c, choice := range o.Choices {
			for _, f := range choice.First {
				for _, t := range choice.Then {
					before = append(before, []int{n, c + 1, f.Index + 1, t.Index + 1})
				}
			}
		}
	}
	d.put("O", n)
	d.put("B", len(before))
	if len(before) == 0 {
		d.put("before", "array2d(1..0, 1..4, [])")
		return
	}
	d.table("before", before)
}

func nextTo(a, b *tasks.Workface) bool {
	return slices.Contains(a.NextTo, b.Name) || slices.Contains(b.NextTo, a.Name)
}
