package settle

import (
	"fmt"
	"slices"
	"strings"

	"sailby/plan"
	"sailby/plan/check"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// brute knows a job minute by minute, from the independent checker alone: it asks it about every
// minute by itself, and tries out everything that is left.
type brute struct {
	w     *expand.Work // with a short span: nothing past the window matters here
	grain int          // minutes between the starts tried
	tick  int          // minutes: all that is open changes on it
	hi    hours.Minute // nothing is tried after it
	lines map[string][]bool
	early bool // the window need not be open yet

	clashes map[[2]string]bool
	between map[[2]int][]int // links by the steps that they join
	nodes   int
	opts    [][]option // by step
	beside  [][][]set  // by step, other step, option: the other's options that can stand beside it
}

func newBrute(w *expand.Work, grain, tick int) *brute {
	c := *w
	end := w.Window.Closes
	if w.Trip != nil {
		end = w.Trip.Home
	}
	c.Span.To = end + 2*1440
	b := &brute{w: &c, grain: grain, tick: tick, hi: end + 1440, lines: map[string][]bool{}, between: map[[2]int][]int{}}
	b.clashes = b.clashing()
	for k, l := range w.Links {
		if l.From != nil {
			key := [2]int{l.From.Index, l.To.Index}
			b.between[key] = append(b.between[key], k)
		}
	}
	return b
}

// index gives the place of a minute in a line.
func (b *brute) index(t hours.Minute) int { return int(t - b.w.Span.From) }

func (b *brute) minute(i int) hours.Minute { return b.w.Span.From + hours.Minute(i) }

// unary are the rules that one minute of work can break by itself.
var unary = []string{"R1", "R2", "R5", "R13", "R14", "R15", "R23", "R25", "R26"}

// open asks the checker in which minutes a team can work on a step, or with a relief either of
// the two: one probe of a minute for each.
func (b *brute) open(s *expand.Step, team, relief []string) []bool {
	key := fmt.Sprint(s.Index, team, relief, b.early)
	if l := b.lines[key]; l != nil {
		return l
	}
	l := b.probe(b.w, *s, plan.Step{People: team, Relief: relief}, 0, func(br check.Breach) bool {
		return slices.Contains(unary, br.Rule) && !(b.early && br.Rule == "R2") && (br.Rule != "R13" || strings.Contains(br.Text, "is worked when"))
	})
	b.lines[key] = l
	return l
}

// first asks in which minutes the first of two teams works: in the others it is the second's turn.
func (b *brute) first(s *expand.Step, team, relief []string) []bool {
	key := fmt.Sprint(s.Index, "first", team, relief)
	if l := b.lines[key]; l != nil {
		return l
	}
	l := b.probe(b.w, *s, plan.Step{People: team, Relief: relief}, 0, func(br check.Breach) bool { return br.Rule == "R9" })
	b.lines[key] = l
	return l
}

// stays asks from which minutes on somebody can stay the fire watch of a step out.
func (b *brute) stays(s *expand.Step, team, relief []string, who string) []bool {
	key := fmt.Sprint(s.Index, "watch", team, relief, who)
	if l := b.lines[key]; l != nil {
		return l
	}
	watch := []plan.Watch{{Span: hours.Span{To: hours.Minute(s.Watch)}, Person: who}}
	l := b.probe(b.w, *s, plan.Step{People: team, Relief: relief, Watches: watch}, 1, func(br check.Breach) bool {
		return br.Rule == "R13" && !strings.Contains(br.Text, "is worked when")
	})
	b.lines[key] = l
	return l
}

// access asks the checker in which minutes all but opening hours and shifts is open for a step
// (R6): the same probes where every place is always open and everybody always on shift.
func (b *brute) access(s *expand.Step, team []string) []bool {
	key := fmt.Sprint(s.Index, "access")
	if l := b.lines[key]; l != nil {
		return l
	}
	w, job := *b.w, *b.w.Job
	job.Places, job.People = slices.Clone(job.Places), slices.Clone(job.People)
	job.Duty = tasks.Amount{Value: 1e6, Pos: job.Pos}
	job.Rest = tasks.Amount{Pos: tasks.Pos{File: "x", Line: 1}}
	step := *s
	for i, p := range job.Places {
		free := *p
		free.Open, free.AlsoOpen, free.OpeningUp, free.ClearingUp = hours.Always, nil, tasks.Amount{}, tasks.Amount{}
		job.Places[i] = &free
		if p == s.Place {
			step.Place = &free
		}
		if p == w.Window.Place {
			w.Window.Place = &free
		}
	}
	for i, p := range job.People {
		free := *p
		free.Hours, free.Off, free.From, free.Until, free.Places = nil, nil, nil, nil, nil
		job.People[i] = &free
	}
	w.Job = &job
	l := b.probe(&w, step, plan.Step{People: team}, 0, func(br check.Breach) bool { return br.Rule == "R5" || br.Rule == "R23" })
	b.lines[key] = l
	return l
}

// probe plans one minute of a step, once for every tick, and asks which of these are shut; back is by how much
// the minute lies before the one asked about.
func (b *brute) probe(w *expand.Work, s expand.Step, with plan.Step, back hours.Minute, shut func(check.Breach) bool) []bool {
	probes := *w
	probes.Steps, probes.Links, probes.Orders, probes.Deadlines = nil, nil, nil, nil
	p := plan.Plan{Basis: w.Basis}
	s.Working, s.HandsOn, s.SetUp, s.LeastPiece, s.SafeStop, s.InOneGo, s.Power = 1, 0, 0, 0, 0, false, 0
	s.Deadline, s.NotBefore = hours.Far, hours.Never
	line := make([]bool, b.index(b.hi))
	var at []int
	for i := b.tick; i < len(line); i += b.tick {
		t := b.minute(i) - back
		if s.Site && t+1 > w.Window.Closes || len(with.Watches) > 0 && t+1+hours.Minute(s.Watch) > w.Window.Closes {
			continue // past the window: never
		}
		one := s
		one.Index, one.Name = len(probes.Steps), fmt.Sprint("probe ", i)
		probes.Steps = append(probes.Steps, &one)
		st := with
		st.Task, st.Step, st.Start, st.Finish, st.Pieces = s.Task.Name, one.Name, t, t+1, []hours.Span{{From: t, To: t + 1}}
		st.Watches = nil
		for _, x := range with.Watches {
			st.Watches = append(st.Watches, plan.Watch{Span: hours.Span{From: t + 1, To: t + 1 + x.To}, Person: x.Person})
		}
		p.Steps = append(p.Steps, st)
		at = append(at, i)
	}
	closed := map[string]bool{}
	for _, br := range check.Plan(&probes, &p) {
		if br.Other == "" && shut(br) {
			closed[br.Step] = true
		}
	}
	for k, i := range at {
		for j := i; j < min(i+b.tick, len(line)) && !closed[probes.Steps[k].Key()]; j++ {
			line[j] = true
		}
	}
	return line
}

// run is what a step started at a minute goes through: the minutes worked, and where it stops.
type run struct {
	worked []int
	stops  []int // ends of its pieces that end in a stop, the finish last
}

// walk starts a step at minute t and goes on minute by minute, by R5, R6 and R8; ok is false
// where it may not start there.
func walk(s *expand.Step, open, access []bool, t int) (r run, ok bool) {
	left := s.Working
	if t >= len(open) || !open[t] {
		return r, false
	}
	for first := true; left > 0; first = false {
		o, meals := opening(open, access, t, s.SetUp+left)
		if len(o) == 0 {
			return r, false
		}
		t = o[len(o)-1] + 1
		room := len(o) - s.SetUp
		switch {
		case room >= left && first && s.InOneGo && meals && !s.OverMeals:
			return r, false
		case room >= left:
			room = left
		case first && (s.InOneGo || room < max(s.LeastPiece, s.SafeStop, 1)):
			return r, false
		case room < max(s.LeastPiece, 1):
			continue
		}
		left -= room
		r.worked = append(r.worked, o...)
		r.stops = append(r.stops, t)
	}
	return r, true
}

// opening gives the worked minutes of the opening that begins at or after t, at most enough of
// them, and whether there is a meal among them.
func opening(open, access []bool, t, enough int) (worked []int, meals bool) {
	for t < len(open) && !open[t] {
		t++
	}
	for t < len(open) && len(worked) < enough {
		if open[t] {
			worked = append(worked, t)
			t++
			continue
		}
		u := t
		for u < len(open) && !open[u] && access[u] && u-t <= 120 {
			u++
		}
		if u == len(open) || !open[u] || u-t > 120 {
			return worked, meals
		}
		meals, t = true, u
	}
	return worked, meals
}
