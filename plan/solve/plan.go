package solve

import (
	"slices"

	"sailby/plan"
	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Compact shifts every activity of a schedule as early as its own order, people and choices
// allow, so that something sets every start. It is never worse.
func Compact(p *problem.Problem, s *Schedule) *Schedule {
	g := newGenerator(p)
	best := s
	for round := 0; round < 4; round++ {
		g.load(best)
		order := g.list()
		g.reset()
		ok := true
		for rank, i := range order {
			g.rank[i] = rank
			g.lo[i] = p.Acts[i].From
		}
		for _, i := range order {
			lo, fin := g.lower(i, nil)
			lo, fin = g.nearEnough(i, best, lo, fin)
			at := g.earliest(i, best.Mode[i], g.first(i, best.Mode[i], lo, fin), problem.Inf-1, nil)
			if at > best.Start[i] || g.breaksMax(i, best.Mode[i], at) {
				at = best.Start[i]
				if g.fits(i, best.Mode[i], at, nil).kind != free {
					ok = false
					break
				}
			}
			g.put(i, best.Mode[i], at)
		}
		if !ok || !g.whole() {
			return best
		}
		sc := g.score()
		early, was := sc, best.Score
		early.Idle, was.Idle = 0, 0 // waiting is no reason to begin late
		if slices.Equal(g.start, best.Start) || early.Compare(was, true) > 0 {
			return best
		}
		best = g.snapshot(sc)
	}
	return best
}

// nearEnough raises the bounds of i so that no longest wait to something later, where it stands
// in best, is broken, and no wait for something that begins later than i does (i may have to finish
// after it).
func (g *generator) nearEnough(i int, best *Schedule, lo, fin int) (int, int) {
	for _, k := range g.from[i] {
		l := &g.p.Links[k]
		if g.placed[l.To] || l.Max >= expand.NoMax && l.Last == nil || ownStanding(g.p, l) {
			continue
		}
		end := best.Start[l.To]
		if l.ToEnd == tasks.Finish {
			end = best.Finish[l.To]
		}
		if t := pulledTo(l, end, lo); l.FromEnd == tasks.Finish {
			fin = max(fin, t)
		} else {
			lo = max(lo, t)
		}
	}
	for _, k := range g.into[i] {
		l := &g.p.Links[k]
		if l.From < 0 || g.placed[l.From] {
			continue
		}
		t := best.Finish[l.From]
		if l.FromEnd == tasks.Start {
			t = best.Start[l.From]
		}
		if t = l.Earliest(t); l.ToEnd == tasks.Finish {
			fin = max(fin, t)
		} else {
			lo = max(lo, t)
		}
	}
	return lo, fin
}

// load puts a whole schedule into the state.
func (g *generator) load(s *Schedule) {
	g.reset()
	g.kept = s.Watches
	copy(g.choice, s.Choice)
	for i := range s.Start {
		g.put(i, s.Mode[i], s.Start[i])
		g.lo[i] = g.p.Acts[i].From
	}
}

// breaksMax says whether starting i at the given minute would be too early or too late for a maximum wait
// to or from something placed.
func (g *generator) breaksMax(i, m, at int) bool {
	fin := g.p.Acts[i].Modes[m].Time.Finish(at)
	for _, k := range g.into[i] {
		l := &g.p.Links[k]
		if l.From >= 0 && g.placed[l.From] {
			end := at
			if l.ToEnd == tasks.Finish {
				end = fin
			}
			if end > l.LastAt(g.end(l.From, l.FromEnd)) {
				return true
			}
		}
	}
	return false
}

// whole says whether every wait between placed activities holds.
func (g *generator) whole() bool {
	for k := range g.p.Links {
		l := &g.p.Links[k]
		from, to := g.end(l.From, l.FromEnd), g.end(l.To, l.ToEnd)
		if to < l.Earliest(from) || to > l.LastAt(from) {
			return false
		}
	}
	return true
}

// Plan writes a schedule as a plan in the job's words.
func Plan(p *problem.Problem, s *Schedule) *plan.Plan {
	out := &plan.Plan{Basis: p.Work.Basis}
	at := func(t int) hours.Minute { return p.Base + hours.Minute(t) }
	for i := range p.Acts {
		a := &p.Acts[i]
		md := &a.Modes[s.Mode[i]]
		st := plan.Step{Task: a.Step.Task.Name, Step: a.Step.Name, Start: at(s.Start[i]), Finish: at(s.Finish[i])}
		add := func(from, to, team int) {
			st.Pieces = append(st.Pieces, hours.Span{From: at(from), To: at(to)})
			if md.Relief != nil {
				st.Shifts = append(st.Shifts, team)
			}
		}
		md.Time.Pieces(s.Start[i], func(from, to int) {
			if md.Relief == nil {
				add(from, to, 0)
				return
			}
			turns(md, from, to, func(from, to int, second bool) {
				if second {
					add(from, to, 1)
				} else {
					add(from, to, 0)
				}
			})
		})
		if s.Start[i] < s.Finish[i] {
			st.People, st.Relief = names(p, md.Crew), names(p, md.Relief)
			for _, w := range s.Watches[i] {
				st.Watches = append(st.Watches, plan.Watch{Span: hours.Span{From: at(w.From), To: at(w.To)}, Person: p.People[w.Who].Name})
			}
		}
		out.Steps = append(out.Steps, st)
	}
	return out
}

func names(p *problem.Problem, crew []int) []string {
	var out []string
	for _, c := range crew {
		out = append(out, p.People[c].Name)
	}
	return out
}
