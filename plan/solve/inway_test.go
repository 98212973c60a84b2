package solve

import (
	"testing"

	"sailby/plan/problem"
)

// plain gives a problem of activities with fixed lengths and nothing else.
func plain(lengths ...int) *problem.Problem {
	p := &problem.Problem{End: 1000, Close: 1000}
	for _, d := range lengths {
		p.Acts = append(p.Acts, problem.Act{By: problem.Inf, Modes: []problem.Mode{{Time: problem.Fixed(d)}}})
	}
	return p
}

// TestPairBlock: two activities that clash touch, and overlap by no minute; a tail keeps the other out as
// well, and only the one that comes after it.
func TestPairBlock(t *testing.T) {
	tail := func(finish int) int { return finish + 5 }
	for _, tc := range []struct {
		name   string
		tailA  func(int) int
		at     int // of the 10 minutes of A; B is from 20 to 30
		blocks bool
	}{
		{"ends as the other begins", nil, 10, false},
		{"a minute too long", nil, 11, true},
		{"within", nil, 20, true},
		{"the other's last minute", nil, 29, true},
		{"begins as the other ends", nil, 30, false},
		{"its tail ends as the other begins", tail, 5, false},
		{"its tail a minute too long", tail, 6, true},
		{"its tail alone, right before", tail, 10, true},
		{"no tail of the other", tail, 30, false},
	} {
		p := plain(10, 10)
		p.Pairs = []problem.Pair{{A: 0, B: 1, TailA: tc.tailA}}
		s := newState(p)
		s.put(1, 0, 20)
		b := s.pairBlock(0, 0, tc.at, tc.at+10, nil)
		if blocks := b.next > 0; blocks != tc.blocks {
			t.Errorf("%s: in the way %v, want %v", tc.name, blocks, tc.blocks)
		}
		if tc.blocks && (b.next != 30 || b.other != 1 || b.before != 20) {
			t.Errorf("%s: clear from %d, behind %d at %d", tc.name, b.next, b.other, b.before)
		}
	}
}

// TestWaitsForAll: an activity is in the queue once all that it waits for are placed, not before.
func TestWaitsForAll(t *testing.T) {
	p := plain(10, 10, 10)
	p.Links = []problem.Link{{From: 0, To: 2, Max: problem.Inf}, {From: 1, To: 2, Max: problem.Inf}}
	g := newGenerator(p)
	g.prepare()
	for _, want := range []int{2, 1} {
		if g.pending[2] != want {
			t.Fatalf("the last waits for %d, want %d", g.pending[2], want)
		}
		first := g.next()
		if first == 2 {
			t.Fatalf("the last is next with %d to wait for", want)
		}
		g.placed[first] = true
		g.release(first)
	}
	if got := g.next(); got != 2 {
		t.Errorf("next is %d, want the last", got)
	}
}
