package network

import (
	"flag"
	"os"
	"testing"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"

	"pgregory.net/rapid"
)

// TestMain fixes the seed of the random networks; give -rapid.seed for others.
func TestMain(m *testing.M) {
	flag.Parse()
	given := false
	flag.Visit(func(f *flag.Flag) { given = given || f.Name == "rapid.seed" })
	if !given {
		flag.Set("rapid.seed", "20270405")
	}
	flag.Set("rapid.nofailfile", "true")
	flag.Set("rapid.checks", "2000")
	os.Exit(m.Run())
}

const horizon = 400 // minutes of the random networks

// drawTiming makes a fixed length, or work on random opening hours.
func drawTiming(t *rapid.T) *problem.Timing {
	if rapid.Bool().Draw(t, "standing") {
		return problem.Fixed(rapid.IntRange(0, 60).Draw(t, "length"))
	}
	var spans []hours.Span
	for at := hours.Minute(0); at < horizon; {
		from := at + hours.Minute(rapid.IntRange(1, 30).Draw(t, "closed"))
		at = from + hours.Minute(rapid.IntRange(10, 120).Draw(t, "open"))
		spans = append(spans, hours.Span{From: from, To: min(at, horizon)})
	}
	set := hours.NewSet(spans...)
	r := problem.Rules{Work: rapid.IntRange(1, 60).Draw(t, "work"), SetUp: rapid.IntRange(0, 5).Draw(t, "set-up"),
		Least: rapid.IntRange(0, 10).Draw(t, "least"), InOneGo: rapid.IntRange(0, 3).Draw(t, "in one go") == 3}
	return problem.Worked(set, set.Joined(rapid.IntRange(0, 20).Draw(t, "meal"), nil), r)
}

// drawNetwork makes a problem of activities, links and dates; modes is how many timings each has.
func drawNetwork(t *rapid.T, modes int) *problem.Problem {
	p := &problem.Problem{End: horizon, Close: horizon}
	n := rapid.IntRange(2, 5).Draw(t, "activities")
	for i := 0; i < n; i++ {
		a := problem.Act{By: problem.Inf}
		for range modes {
			a.Modes = append(a.Modes, problem.Mode{Time: drawTiming(t)})
		}
		if rapid.IntRange(0, 2).Draw(t, "from") == 2 {
			a.From = rapid.IntRange(0, 100).Draw(t, "not before")
		}
		if rapid.IntRange(0, 2).Draw(t, "by") == 2 {
			a.By = rapid.IntRange(60, horizon).Draw(t, "deadline")
		}
		p.Acts = append(p.Acts, a)
	}
	for k := rapid.IntRange(1, 6).Draw(t, "links"); k > 0; k-- {
		l := problem.Link{From: rapid.IntRange(-1, n-1).Draw(t, "link from"), To: rapid.IntRange(0, n-1).Draw(t, "link to"),
			FromEnd: rapid.SampledFrom([]tasks.LinkEnd{tasks.Finish, tasks.Start}).Draw(t, "from end"),
			ToEnd:   rapid.SampledFrom([]tasks.LinkEnd{tasks.Finish, tasks.Start}).Draw(t, "to end"),
			Min:     expand.NoMin, Max: expand.NoMax}
		if l.From == l.To {
			continue
		}
		if rapid.IntRange(0, 4).Draw(t, "min") > 0 {
			l.Min = rapid.IntRange(0, 60).Draw(t, "least")
		}
		set := hours.Set{{From: 20, To: 150}, {From: 170, To: horizon}}
		if l.Min > 0 && rapid.IntRange(0, 3).Draw(t, "working") == 3 {
			l.Count = set
		}
		switch rapid.IntRange(0, 5).Draw(t, "max") {
		case 3:
			l.Max = max(l.Min, 0) + rapid.IntRange(0, 60).Draw(t, "more")
		case 4:
			l.Max, l.MaxCount = max(l.Min, 0)+rapid.IntRange(0, 60).Draw(t, "more"), set
		case 5: // a maximum that shortens as time goes on
			l.Last = func(at int) int { return at + max(5, 80-at/4) }
		}
		p.Links = append(p.Links, l)
	}
	return p
}

// end gives an end of activity i started at s in its first mode; -1 is minute 0.
func endAt(p *problem.Problem, start []int, i int, e tasks.LinkEnd) int {
	if i < 0 {
		return 0
	}
	if e == tasks.Start {
		return start[i]
	}
	return p.Acts[i].Modes[0].Time.Finish(start[i])
}

// step looks for one thing that the starts break, and moves the end that is to blame by one
// minute: later ends up with a sign of 1, earlier ones down with -1. It says which activity moved, -1 if nothing is broken.
func step(p *problem.Problem, start []int, sign int) int {
	for i := range p.Acts {
		w := p.Acts[i].Modes[0].Time
		switch {
		case w.Start(start[i]) != start[i]:
			return i
		case sign > 0 && start[i] < p.Acts[i].From:
			return i
		case sign < 0 && w.Finish(start[i]) > min(p.Acts[i].By, p.End+1):
			return i
		}
	}
	for k := range p.Links {
		l := &p.Links[k]
		a, b := endAt(p, start, l.From, l.FromEnd), endAt(p, start, l.To, l.ToEnd)
		early, late := b < l.Earliest(a), b > l.LastAt(a)
		switch {
		case early && sign > 0 || late && sign < 0:
			return l.To
		case (early || late) && l.From >= 0:
			return l.From
		case late: // after the beginning of the plan: nothing can move
			return -2
		}
	}
	return -1
}

// relax moves starts minute by minute until nothing is broken; ok is false where that ends in a
// contradiction.
func relax(p *problem.Problem, start []int, sign int) (ok bool) {
	for {
		i := step(p, start, sign)
		if i == -1 {
			break
		}
		if i == -2 {
			return false
		}
		start[i] += sign
		if start[i] > p.End+1 || start[i] < 0 {
			return false
		}
	}
	for i := range p.Acts {
		f := p.Acts[i].Modes[0].Time.Finish(start[i])
		if start[i] < p.Acts[i].From || f > min(p.Acts[i].By, p.End+1) {
			return false
		}
	}
	return true
}

// TestEarliest holds the earliest times against starts moved minute by minute: where every
// activity has one timing the two agree, and one finds a contradiction where the other does.
func TestEarliest(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		p := drawNetwork(rt, 1)
		slow := make([]int, len(p.Acts))
		for i := range slow {
			slow[i] = p.Acts[i].From
		}
		ok := relax(p, slow, 1)
		b, c := Propagate(p, Off{})
		if ok != (c == nil) {
			rt.Fatalf("contradiction %+v, minute by minute the starts %v hold: %v", c, slow, ok)
		}
		if !ok {
			return
		}
		for i := range slow {
			if f := p.Acts[i].Modes[0].Time.Finish(slow[i]); b.Start[i] != slow[i] || b.Finish[i] != f {
				rt.Fatalf("activity %d: earliest %d to %d, minute by minute %d to %d", i, b.Start[i], b.Finish[i], slow[i], f)
			}
		}
	})
}

// TestLatest does the same from the other side.
func TestLatest(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		p := drawNetwork(rt, 1)
		b, c := Propagate(p, Off{})
		if c != nil {
			return
		}
		slow := make([]int, len(p.Acts))
		for i := range slow {
			slow[i] = p.End + 1
		}
		if !relax(p, slow, -1) {
			rt.Fatalf("earliest starts %v hold, but minute by minute there are no latest: %v", b.Start, slow)
		}
		for i := range slow {
			f := p.Acts[i].Modes[0].Time.Finish(slow[i])
			if b.LastStart[i] != slow[i] || b.Last[i] < f {
				rt.Fatalf("activity %d: latest %d to %d, minute by minute %d to %d", i, b.LastStart[i], b.Last[i], slow[i], f)
			}
		}
	})
}

// TestModes holds that where activities can be done in several ways no earliest time is later than
// what any one choice of these leads to, and that no choice works where there is a contradiction.
func TestModes(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		p := drawNetwork(rt, 2)
		b, c := Propagate(p, Off{})
		one := *p
		one.Acts = append([]problem.Act(nil), p.Acts...)
		slow := make([]int, len(p.Acts))
		for i := range slow {
			k := rapid.IntRange(0, 1).Draw(rt, "mode")
			one.Acts[i].Modes, one.Acts[i].Times = p.Acts[i].Modes[k:k+1], nil
			slow[i] = p.Acts[i].From
		}
		if !relax(&one, slow, 1) {
			return
		}
		if c != nil {
			rt.Fatalf("contradiction %+v, but the starts %v hold in one choice", c, slow)
		}
		for i := range slow {
			f := one.Acts[i].Modes[0].Time.Finish(slow[i])
			if b.Start[i] > slow[i] || b.Finish[i] > f || b.LastStart[i] < slow[i] || b.Last[i] < f {
				rt.Fatalf("activity %d: between %d and %d, finished between %d and %d; one choice runs %d to %d", i, b.Start[i], b.LastStart[i], b.Finish[i], b.Last[i], slow[i], f)
			}
		}
	})
}
