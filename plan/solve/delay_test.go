package solve

import (
	"testing"

	"sailby/plan/check"
	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// Every leeway is held against the independent checker: the plan made again with a step as late
// as its leeway allows, and some ways on the way there, breaks no rule and no deadline (R20).
func TestDelayedPlansObeyTheRules(t *testing.T) {
	for _, file := range []string{"added-watch", "delayed-over-night"} {
		job, err := jobfile.Read("testdata/" + file + ".yaml")
		if err != nil {
			t.Fatal(err)
		}
		w, faults := expand.Expand(job, expand.Basis{})
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		p := problem.Compile(w.Carry())
		b, _ := network.Propagate(p, network.Off{})
		s := Compact(p, Find(p, b, Options{Ticks: 50_000}).Best)
		rows := Rows(p, s, nil)
		r := &rower{g: newGenerator(p), p: p, s: s}
		r.g.load(s)
		r.order = r.g.list()
		r.inOrder()
		r.ties()
		r.g.reset()
		tried := 0
		for rank, i := range r.order {
			r.g.save(&r.prefix)
			for part := 0; part <= 8 && rows[i].Leeway > 0; part++ {
				l := rows[i].Leeway * part / 8
				if _, ok := r.delayed(rank, i, l); !ok {
					t.Errorf("%s: %s has %d min of leeway, and cannot be %d later", file, p.Acts[i].Name, rows[i].Leeway, l)
					continue
				}
				tried++
				for _, br := range check.Plan(w, Plan(p, r.g.snapshot(r.g.score()))) {
					t.Errorf("%s: %s %d min later: %s", file, p.Acts[i].Name, l, br)
				}
			}
			r.g.restore(&r.prefix)
			r.g.put(i, s.Mode[i], s.Start[i])
		}
		if tried < 9 {
			t.Errorf("%s: only %d delays were tried", file, tried)
		}
	}
}

// A watch that a delay adds is kept by whoever keeps the others: with somebody else the test
// after the weld would have nobody, and the weld no more than 285 min.
func TestAddedWatchIsKeptByTheSame(t *testing.T) {
	job, err := jobfile.Read("testdata/added-watch.yaml")
	if err != nil {
		t.Fatal(err)
	}
	w, _ := expand.Expand(job, expand.Basis{})
	p := problem.Compile(w.Carry())
	b, _ := network.Propagate(p, network.Off{})
	s := Compact(p, Find(p, b, Options{Ticks: 50_000}).Best)
	if l := Rows(p, s, nil)[0].Leeway; l < 1440 {
		t.Errorf("the weld has %d min of leeway, a day later it works as well", l)
	}
}

// TestOnlyLaterMoves: a step that waits for nothing stays where the plan has it when another is delayed, and does not
// come forward.
func TestOnlyLaterMoves(t *testing.T) {
	p := plain(10, 10)
	s := &Schedule{Start: []int{0, 50}, Finish: []int{10, 60}, Mode: []int{0, 0}, Watches: make([][]Watch, 2)}
	r := &rower{g: newGenerator(p), p: p, s: s}
	r.g.load(s)
	r.order = r.g.list()
	r.inOrder()
	r.ties()
	r.g.reset()
	r.g.save(&r.prefix)
	moved, ok := r.delayed(0, 0, 5)
	if !ok || len(moved) > 0 || r.g.start[0] != 5 || r.g.start[1] != 50 {
		t.Errorf("delayed by 5: %v, moved %v, starts %v", ok, moved, r.g.start)
	}
}
