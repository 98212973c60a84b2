package network

import (
	"slices"
	"testing"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// wait makes a link from finish to start.
func wait(from, to, least, most int) problem.Link {
	return problem.Link{From: from, To: to, FromEnd: tasks.Finish, ToEnd: tasks.Start, Min: least, Max: most}
}

// standing makes activities of so many minutes at any hour.
func standing(minutes ...int) []problem.Act {
	var out []problem.Act
	for _, n := range minutes {
		out = append(out, problem.Act{By: problem.Inf, Modes: []problem.Mode{{Time: problem.Fixed(n)}}})
	}
	return out
}

// day is work in the hours 8 to 12 and 13 to 17 of two days, meals joined; minutes from midnight.
func day(work int, oneGo bool) *problem.Timing {
	open := hours.Set{{From: 480, To: 720}, {From: 780, To: 1020}, {From: 1920, To: 2160}, {From: 2220, To: 2460}}
	return problem.Worked(open, open.Joined(60, nil), problem.Rules{Work: work, InOneGo: oneGo, OverMeals: true})
}

// TestContradiction: each is made of the links listed and the deadline; the sums are in the comments.
func TestContradiction(t *testing.T) {
	from := func(l problem.Link, a, b tasks.LinkEnd) problem.Link { l.FromEnd, l.ToEnd = a, b; return l }
	for _, tc := range []struct {
		name  string
		acts  []problem.Act
		links []problem.Link
		date  func(acts []problem.Act)
		late  int   // minutes, 0: not said
		path  []int // links that the contradiction needs
	}{
		// 20 + 60 + 30 + 45 = 155, and 140 are there
		{"a chain of standing times", standing(60, 45), []problem.Link{wait(0, 1, 30, expand.NoMax), wait(-1, 0, 20, expand.NoMax)},
			func(a []problem.Act) { a[1].By = 140 }, 15, []int{1, 0}},
		// 1 begins 100 after the start of 0, and at most 60 after it
		{"two waits against each other", standing(60, 10), []problem.Link{wait(0, 1, 40, expand.NoMax),
			from(problem.Link{From: 0, To: 1, Min: expand.NoMin, Max: 60}, tasks.Start, tasks.Start)}, nil, 0, []int{0, 1}},
		// 0 to 1 to 2 takes 90, and 2 begins at most 30 after 0 finishes
		{"a circle of three", standing(5, 60, 5), []problem.Link{wait(0, 1, 15, expand.NoMax), wait(1, 2, 15, expand.NoMax), wait(0, 2, expand.NoMin, 30)},
			nil, 0, []int{0, 1, 2}},
		// at most 70 after the beginning, and 0 takes 80
		{"a maximum from the beginning", standing(80, 1), []problem.Link{wait(0, 1, 0, expand.NoMax), wait(-1, 1, expand.NoMin, 70)},
			nil, 0, []int{0, 1}},
		// 540 working minutes are one day of 480 and 60 of the next, to 9:00 of it: 1980; the next 60 end at 2040, and 2000 is the deadline
		{"hours of two days", []problem.Act{{By: problem.Inf, Modes: []problem.Mode{{Time: day(540, false)}}}, {By: problem.Inf, Modes: []problem.Mode{{Time: day(60, false)}}}},
			[]problem.Link{wait(0, 1, 0, expand.NoMax)}, func(a []problem.Act) { a[1].By = 2000 }, 40, []int{0}},
		// one hour is done at 9:00 at the earliest; an hour later 480 in one go no longer fit that day, and 120 after it is the last
		{"a maximum over a night", []problem.Act{{By: problem.Inf, Modes: []problem.Mode{{Time: day(60, true)}}}, {By: problem.Inf, Modes: []problem.Mode{{Time: day(480, true)}}}},
			[]problem.Link{wait(0, 1, 60, 120)}, nil, 0, []int{0}},
	} {
		p := &problem.Problem{Acts: tc.acts, Links: tc.links, End: 3000, Close: 3000}
		if tc.date != nil {
			tc.date(p.Acts)
		}
		_, c := Propagate(p, Off{})
		if c == nil {
			t.Errorf("%s: no contradiction found", tc.name)
			continue
		}
		if tc.late > 0 && c.Late != tc.late {
			t.Errorf("%s: %d min late, want %d", tc.name, c.Late, tc.late)
		}
		off := Off{Link: map[int]bool{}}
		for k := range p.Links {
			off.Link[k] = !slices.Contains(tc.path, k)
		}
		if _, c := Propagate(p, off); c == nil {
			t.Errorf("%s: the links %v alone hold", tc.name, tc.path)
		}
		for _, k := range tc.path {
			off.Link[k] = true
			if _, c := Propagate(p, off); c != nil {
				t.Errorf("%s: still a contradiction without link %d", tc.name, k)
			}
			off.Link[k] = false
		}
		for _, k := range c.Path {
			if !slices.Contains(tc.path, k) {
				t.Errorf("%s: the trace %v names link %d, which is not needed", tc.name, c.Path, k)
			}
		}
	}
}

// TestOff leaves out one limit at a time: each time what is left holds.
func TestOff(t *testing.T) {
	make := func() *problem.Problem {
		p := &problem.Problem{End: 3000, Close: 3000, Acts: []problem.Act{
			{By: problem.Inf, From: 1000, Modes: []problem.Mode{{Time: day(120, false)}}},
			{By: 2100, Modes: []problem.Mode{{Time: day(120, false)}}}}, Links: []problem.Link{wait(0, 1, 0, expand.NoMax)}}
		return p
	}
	// 20 of 120 minutes are done on the first day, 100 to 2020 on the second; the next 120 end at 2140.
	if _, c := Propagate(make(), Off{}); c == nil || c.Late != 40 || c.Act != 1 {
		t.Fatalf("got %+v, want activity 1 to be 40 min late", c)
	}
	one := map[int]bool{1: true}
	for name, off := range map[string]Off{"link": {Link: map[int]bool{0: true}}, "deadline": {By: one}, "date": {From: map[int]bool{0: true}},
		"calendar": {Calendar: map[int]bool{0: true}}} {
		if _, c := Propagate(make(), off); c != nil {
			t.Errorf("%s left out: still %+v", name, c)
		}
	}
}

// TestFarHorizon: a step that never finishes is a contradiction, not an endless search.
func TestFarHorizon(t *testing.T) {
	p := &problem.Problem{Acts: []problem.Act{{By: problem.Inf, Modes: []problem.Mode{{Time: day(2000, false)}}}}, End: 3000}
	if _, c := Propagate(p, Off{}); c == nil || c.Late < problem.Inf {
		t.Errorf("got %+v, want one that no opening ends", c)
	}
}
