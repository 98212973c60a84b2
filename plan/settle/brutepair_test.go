package settle

import (
	"slices"
	"strings"

	"sailby/plan"
	"sailby/plan/check"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// without leaves some things out for one step, to see what they do.
type without struct {
	step    *expand.Step
	links   map[int]bool          // by index in the work's links
	persons map[string]bool       // who, as far as the step goes
	apart   map[*expand.Step]bool // states and moves against these
	kit     map[string]bool
	room    bool
	power   bool
	orders  bool
	begin   bool // its not-before time
	clock   bool // its hours: it takes its working minutes at any time
	calm    bool // nothing but this: no start that makes it stop more often counts
}

var nothing without

// together says whether two options of different steps can stand in one plan as far as people,
// states, assemblies and links between them go (R7, R9 to R13).
func (b *brute) together(x, y *option, but *without) bool {
	return b.apart(x, y, but) && b.linked(x, y, but) && b.linked(y, x, but)
}

func (b *brute) apart(x, y *option, but *without) bool {
	if b.sharesPeople(x, y, but) {
		return false
	}
	if but.step == x.s && but.apart[y.s] || but.step == y.s && but.apart[x.s] {
		return true
	}
	return !b.statesMeet(x, y) && !b.moved(x, y) && !b.moved(y, x)
}

// duty is a stretch of somebody's time in an option.
type duty struct {
	hours.Span
	who   string
	watch bool
}

// duties lists who does what when.
func (o *option) duties() []duty {
	var out []duty
	var watch []bool
	for _, n := range o.s.Needs {
		for range n.Count {
			watch = append(watch, n.Watch)
		}
	}
	for i, p := range o.Pieces {
		team := o.People
		if i < len(o.Shifts) && o.Shifts[i] == 1 {
			team = o.Relief
		}
		for k, who := range team {
			out = append(out, duty{p, who, watch[k]})
		}
	}
	for _, w := range o.Watches {
		out = append(out, duty{w.Span, w.Person, true})
	}
	return out
}

func (b *brute) sharesPeople(x, y *option, but *without) bool {
	if x.end <= y.Start || y.end <= x.Start {
		return false
	}
	for _, d := range x.duties() {
		for _, e := range y.duties() {
			left := but.persons[d.who] && (but.step == x.s || but.step == y.s)
			if d.who == e.who && !left && d.Overlaps(e.Span) && !(d.watch && e.watch && x.s.Face != nil && x.s.Face == y.s.Face) {
				return true
			}
		}
	}
	return false
}

// clashing lists the states that clash, in both orders.
func (b *brute) clashing() map[[2]string]bool {
	out := map[[2]string]bool{}
	both := func(c tasks.Clash, v bool) {
		x, y := strings.ToLower(c.A), strings.ToLower(c.B)
		out[[2]string{x, y}], out[[2]string{y, x}] = v, v
	}
	for _, c := range slices.Concat(tasks.DefaultClashes(), b.w.Job.Clashes) {
		both(c, true)
	}
	for _, c := range b.w.Job.NoClash {
		both(c, false)
	}
	return out
}

func (b *brute) statesMeet(x, y *option) bool {
	fx, fy := x.s.Face, y.s.Face
	if fx == nil || fy == nil || x.s.Task == y.s.Task || x.s.Absent || y.s.Absent || fx.Place != fy.Place {
		return false
	}
	if fx != fy && !slices.Contains(fx.NextTo, fy.Name) && !slices.Contains(fy.NextTo, fx.Name) {
		return false
	}
	for _, sx := range x.s.States {
		for _, sy := range y.s.States {
			if b.clashes[[2]string{strings.ToLower(sx.Name), strings.ToLower(sy.Name)}] && x.held(sx).Overlaps(y.held(sy)) {
				return true
			}
		}
	}
	return false
}

func (o *option) held(st expand.State) hours.Span {
	h := hours.Span{From: o.Start, To: o.Finish}
	if st.Tail != nil {
		h.To = max(h.To, st.Tail(o.Finish))
	}
	return h
}

// moved says whether x moves what y works on while it is worked on, or while its film is soft.
func (b *brute) moved(x, y *option) bool {
	if x.s.Moves == "" || x.s.Absent || y.s.Absent || y.s.Class != expand.Hands {
		return false
	}
	hold := hours.Span{From: x.Start, To: x.Finish}
	if y.s.Moves == x.s.Moves {
		return x.s.Task != y.s.Task && hold.Overlaps(hours.Span{From: y.Start, To: y.Finish})
	}
	if !slices.Contains(y.s.Works, x.s.Moves) {
		return false
	}
	if slices.ContainsFunc(y.Pieces, hold.Overlaps) {
		return true
	}
	for _, st := range y.s.States {
		if st.Name == tasks.SoftFilm && hold.Overlaps(y.held(st)) {
			return true
		}
	}
	return false
}

// linked says whether the links from x to y hold (R10, R11, R16).
func (b *brute) linked(x, y *option, but *without) bool {
	for _, k := range b.between[[2]int{x.s.Index, y.s.Index}] {
		if l := &b.w.Links[k]; !but.links[k] && !b.waits(l, end(x, l.FromEnd), end(y, l.ToEnd)) {
			return false
		}
	}
	return true
}

func end(o *option, e tasks.LinkEnd) hours.Minute {
	if e == tasks.Start {
		return o.Start
	}
	return o.Finish
}

func (b *brute) waits(l *expand.Link, from, to hours.Minute) bool {
	passed := func(working bool) int {
		if !working {
			return int(to - from)
		}
		n := 0
		for t := from; t < to; t++ {
			if b.placeOpen(l.To.Place)[b.index(t)] {
				n++
			}
		}
		return n
	}
	if l.Min > expand.NoMin && (to < from && l.Min >= 0 || passed(l.Working) < l.Min) {
		return false
	}
	return !(l.Max < expand.NoMax && passed(l.MaxWorking) > l.Max) && (l.MaxCure == nil || to <= l.MaxCure.Last(from))
}

// placeOpen gives the working minutes of a place, workfaces and people left out: those in which
// somebody who is always on shift could do plain work there.
func (b *brute) placeOpen(p *tasks.Place) []bool {
	if l := b.lines["place "+p.Name]; l != nil {
		return l
	}
	w, job := *b.w, *b.w.Job
	job.People = []*tasks.Person{{Name: "X", Places: []string{p.Name}}}
	w.Trip, w.Window.Opens, w.Window.Closes = nil, w.Span.From-1440, w.Span.To+1440
	job.Duty = tasks.Amount{Value: 1e6, Pos: job.Pos}
	job.Rest = tasks.Amount{Pos: tasks.Pos{File: "x", Line: 1}}
	w.Job = &job
	step := expand.Step{Task: &tasks.Task{Name: "x", Kind: tasks.Plain, Place: p}, Place: p, Needs: []tasks.Need{{Count: 1}}}
	l := b.probe(&w, step, plan.Step{People: []string{"X"}}, 0, func(br check.Breach) bool { return br.Rule == "R5" })
	b.lines["place "+p.Name] = l
	return l
}

// holds says whether a whole or partial plan keeps to kit, room, power and order rules.
func (b *brute) holds(all []*option, but *without) bool {
	for _, o := range all {
		if o == nil || o.s.Absent {
			continue
		}
		for _, p := range o.Pieces {
			if !b.holdsAt(all, p.From, but) {
				return false
			}
		}
		for _, w := range o.Watches {
			if !b.holdsAt(all, w.From, but) {
				return false
			}
		}
	}
	return but.orders || b.ordered(all)
}

// holdsAt says whether at one minute nothing is used beyond what there is.
func (b *brute) holdsAt(all []*option, t hours.Minute, but *without) bool {
	kit, power := map[*tasks.Kit]int{}, map[*tasks.Place]float64{}
	room := map[*tasks.Workface]map[string]bool{}
	for _, o := range all {
		if o == nil || o.s.Absent {
			continue
		}
		working := slices.ContainsFunc(o.Pieces, func(p hours.Span) bool { return p.Has(t) })
		for _, u := range o.s.Kit {
			if (working || u.Stays && o.Start <= t && t < o.Finish) && !(but.kit[u.Kit.Name] && but.step == o.s) {
				kit[u.Kit] += u.Count
			}
		}
		if working && !(but.power && but.step == o.s) {
			power[o.s.Place] += o.s.Power
		}
		if o.s.Face != nil && !(but.room && but.step == o.s) {
			for _, d := range o.duties() {
				if d.Has(t) {
					if room[o.s.Face] == nil {
						room[o.s.Face] = map[string]bool{}
					}
					room[o.s.Face][d.who] = true
				}
			}
		}
	}
	for k, n := range kit {
		if n > k.Count {
			return false
		}
	}
	for p, kva := range power {
		if p.Mains.Pos.Given() && kva > p.Mains.Value+1e-9 {
			return false
		}
	}
	for f, who := range room {
		if f.People > 0 && len(who) > f.People {
			return false
		}
	}
	return true
}

// ordered says whether no order rule is broken by the steps that are there (R17).
func (b *brute) ordered(all []*option) bool {
	for _, rule := range b.w.Orders {
		if !slices.ContainsFunc(rule.Choices, func(c expand.Before) bool {
			for _, x := range c.First {
				for _, y := range c.Then {
					if ox, oy := all[x.Index], all[y.Index]; ox != nil && oy != nil && ox.Finish > oy.Start {
						return false
					}
				}
			}
			return true
		}) {
			return false
		}
	}
	return true
}
