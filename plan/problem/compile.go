package problem

import (
	"math"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Compile makes the problem of a job written out. It costs O(steps x modes x openings).
func Compile(w *expand.Work) *Problem {
	g := newGround(w)
	p := &Problem{Work: w, Base: w.Span.From, End: w.Span.Len(),
		Open: int(w.Window.Opens - w.Span.From), Close: int(w.Window.Closes - w.Span.From)}
	p.ground = g
	p.People = g.people()
	maker := newCrewMaker(g, p.People)
	for _, s := range w.Steps {
		p.Acts = append(p.Acts, p.act(s, maker))
	}
	for i := range w.Links {
		p.Links = append(p.Links, p.link(&w.Links[i], g))
	}
	p.resources()
	p.pairs()
	p.orders()
	for i := range p.People { // from here on all minutes count from Base
		p.People[i].Hours = moved(p.People[i].Hours, -p.Base)
		for place, set := range p.People[i].Shifts {
			p.People[i].Shifts[place] = moved(set, -p.Base)
		}
	}
	return p
}

func (p *Problem) act(s *expand.Step, maker *crewMaker) Act {
	a := Act{Name: s.Key(), Step: s, Site: s.Site, Home: s.Place != p.Work.Window.Place, From: 0, By: Inf}
	if s.NotBefore > hours.Never {
		a.From = max(0, int(s.NotBefore-p.Base))
	}
	if s.Deadline < hours.Far {
		a.By = p.since(s.Deadline)
	}
	switch {
	case s.Absent || s.Class == expand.Hands && s.Working == 0 || s.Class == expand.Clock && s.Clock == 0 && len(s.Needs) == 0:
		a.Modes = []Mode{{Time: Fixed(0)}}
	case s.Class == expand.Hands || len(s.Needs) > 0:
		a.Modes, a.Hopeless = maker.modes(s, &a)
	case s.Class == expand.Clock:
		a.Modes = []Mode{{Time: Fixed(s.Clock)}}
	default:
		rate := make([]float64, p.End)
		for t := range rate {
			rate[t] = s.Rate(p.Base + hours.Minute(t))
		}
		a.Modes = []Mode{{Time: Curing(rate)}}
	}
	a.Timings()
	return a
}

func (p *Problem) link(l *expand.Link, g *ground) Link {
	out := Link{From: -1, To: l.To.Index, FromEnd: l.FromEnd, ToEnd: l.ToEnd, Min: l.Min, Max: l.Max, Step: l}
	if l.From != nil {
		out.From = l.From.Index
	}
	if l.Working {
		out.Count = moved(g.face[l.To.Place], -p.Base)
	}
	if l.MaxWorking {
		out.MaxCount = moved(g.face[l.To.Place], -p.Base)
	}
	if l.MaxCure != nil {
		last := l.MaxCure.Last
		out.Last = func(t int) int { return p.since(last(p.Base + hours.Minute(t))) }
	}
	return out
}

// since counts the minutes from the problem's base to m, kept within -Inf and Inf.
func (p *Problem) since(m hours.Minute) int { return int(min(max(m-p.Base, -Inf), Inf)) }

// resources makes the kit, the room of workfaces and the power of places into resources.
func (p *Problem) resources() {
	w := p.Work
	add := func(r Resource, amount func(s *expand.Step) (int, bool)) {
		index, used := len(p.Res), false
		for i, s := range w.Steps {
			if s.Absent {
				continue
			}
			if n, stays := amount(s); n > 0 {
				p.Acts[i].Uses = append(p.Acts[i].Uses, Use{index, n, stays})
				used = true
			}
		}
		if used {
			p.Res = append(p.Res, r)
		}
	}
	for _, k := range w.Job.Kit {
		add(Resource{Name: k.Name, Kind: Kit, Capacity: k.Count, Pos: k.Pos}, func(s *expand.Step) (int, bool) {
			for _, u := range s.Kit {
				if u.Kit == k {
					return u.Count, u.Stays
				}
			}
			return 0, false
		})
	}
	for _, place := range w.Job.Places {
		for _, f := range place.Workfaces {
			if f.People > 0 {
				add(Resource{Name: place.Name + "/" + f.Name, Kind: Room, Capacity: f.People, Pos: f.Pos}, func(s *expand.Step) (int, bool) {
					if s.Face == f {
						if s.Watch > 0 && s.Room > 0 { // watchers are counted as people: one may watch several works
							p.Acts[s.Index].WatchRoom = len(p.Res) + 1
						}
						return s.Room - watchers(s), false
					}
					return 0, false
				})
			}
		}
		if kva, limited := Supply(w, place); limited {
			add(Resource{Name: "power at " + place.Name, Kind: Power, Capacity: int(math.Round(kva * 1000)), Taken: p.hiredAway(place), Pos: place.Pos}, func(s *expand.Step) (int, bool) {
				if s.Place == place {
					return int(math.Round(s.Power * 1000)), false
				}
				return 0, false
			})
		}
	}
}

// hiredAway gives the power of hired generators at a place in the hours in which they are not there.
func (p *Problem) hiredAway(place *tasks.Place) []Taken {
	var out []Taken
	for _, k := range p.Work.Job.Kit {
		slots, hired := p.ground.hire[k]
		if !hired || k.Gives <= 0 || k.At != place && !(k.At == nil && place == p.Work.Window.Place) {
			continue
		}
		for _, s := range moved(hours.Set{p.ground.span}.Less(slots), -p.Base) {
			out = append(out, Taken{int(s.From), int(s.To), int(math.Round(k.Gives * float64(max(k.Count, 1)) * 1000))})
		}
	}
	return out
}

// watchers counts the people of a step who only watch.
func watchers(s *expand.Step) int {
	n := 0
	for _, need := range s.Needs {
		if need.Watch {
			n += need.Count
		}
	}
	return n
}

// Supply gives the power there is at a place and whether anything limits it: its mains where
// the job file states them, and the generators that are there. What goes along counts at the
// window's place only.
func Supply(w *expand.Work, place *tasks.Place) (kVA float64, limited bool) {
	kVA = place.Mains.Value
	limited = place.Mains.Pos.Given()
	for _, k := range w.Job.Kit {
		if k.Gives > 0 && (k.At == place || k.At == nil && place == w.Window.Place) {
			kVA += k.Gives * float64(max(k.Count, 1))
			limited = true
		}
	}
	return kVA, limited
}

// pairs finds the activities that must not overlap: clashing states in one workface or in
// neighbours (R12), and lifts or moves of what others work on (R7). Two activities have one
// pair, with the longest of their tails: whichever comes first must be clear of all of them.
func (p *Problem) pairs() {
	steps := p.Work.Steps
	clash := p.Work.Job.ClashTable()
	for i, a := range steps {
		if a.Absent {
			continue
		}
		for j := i + 1; j < len(steps); j++ {
			b := steps[j]
			if b.Absent || a.Task == b.Task {
				continue
			}
			if pr, apart := p.pair(a, b, clash); apart {
				p.Pairs = append(p.Pairs, pr)
			}
		}
	}
}

// Pairs gives the steps of a work that must not overlap, by their index, and why; without their tails' times.
func Pairs(w *expand.Work) []Pair {
	p := &Problem{Work: w, Base: w.Span.From}
	p.pairs()
	return p.Pairs
}

// pair says whether two steps must not overlap, and why.
func (p *Problem) pair(a, b *expand.Step, clash tasks.ClashTable) (Pair, bool) {
	pr := Pair{A: a.Index, B: b.Index}
	var tailsA, tailsB []func(int) int
	if touching(a.Face, b.Face) {
		for _, sa := range a.States {
			for _, sb := range b.States {
				if !clash.Has(sa.Name, sb.Name) {
					continue
				}
				if pr.Why == "" {
					pr.Why = sa.Name + " and " + sb.Name + " at " + a.Face.Place.Name + "/" + a.Face.Name
				}
				tailsA, tailsB = append(tailsA, p.tail(sa)), append(tailsB, p.tail(sb))
			}
		}
	}
	if shared := movesWhat(a, b); shared != "" {
		if pr.Why == "" {
			pr.Why, pr.Kind = shared+" is moved", Moving
		}
		tailsA, tailsB = append(tailsA, p.softTail(a)), append(tailsB, p.softTail(b))
	}
	pr.TailA, pr.TailB = longest(tailsA), longest(tailsB)
	return pr, pr.Why != ""
}

// longest joins tails: the latest end of all; nil if none has one.
func longest(tails []func(int) int) func(int) int {
	var real []func(int) int
	for _, t := range tails {
		if t != nil {
			real = append(real, t)
		}
	}
	switch len(real) {
	case 0:
		return nil
	case 1:
		return real[0]
	}
	return func(f int) int {
		end := f
		for _, t := range real {
			end = max(end, t(f))
		}
		return end
	}
}

func touching(a, b *tasks.Workface) bool {
	if a == nil || b == nil || a.Place != b.Place {
		return false
	}
	return a == b || contains(a.NextTo, b.Name) || contains(b.NextTo, a.Name)
}

func movesWhat(a, b *expand.Step) string {
	if a.Moves != "" && (contains(b.Works, a.Moves) || b.Moves == a.Moves) {
		return a.Moves
	}
	if b.Moves != "" && contains(a.Works, b.Moves) {
		return b.Moves
	}
	return ""
}

func (p *Problem) tail(s expand.State) func(int) int {
	if s.Tail == nil {
		return nil
	}
	return func(f int) int { return p.since(s.Tail(p.Base + hours.Minute(f))) }
}

// softTail gives the tail of a coat until its film is hard dry: until then what it is on is not
// moved (R11).
func (p *Problem) softTail(s *expand.Step) func(int) int {
	for _, st := range s.States {
		if st.Name == tasks.SoftFilm {
			return p.tail(st)
		}
	}
	return nil
}

func (p *Problem) orders() {
	for _, o := range p.Work.Orders {
		out := Order{Text: o.Text, Pos: o.Pos}
		for _, c := range o.Choices {
			var all []Before
			for _, x := range c.First {
				for _, y := range c.Then {
					all = append(all, Before{x.Index, y.Index})
				}
			}
			out.Choices = append(out.Choices, all)
		}
		p.Orders = append(p.Orders, out)
	}
}
