package settle

import (
	"context"
	"strings"
	"testing"

	"sailby/plan"
	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"

	"pgregory.net/rapid"
)

// TestCoreIsLeast: what a proof by a chain is made of contradicts itself, and without any one
// link, date or step of it the rest holds: every line said to be needed is.
func TestCoreIsLeast(t *testing.T) {
	checks(t, 300)
	proofs, lines := 0, 0
	rapid.Check(t, func(rt *rapid.T) {
		s := drawLaw(rt)
		job, ok := s.read(rt)
		if !ok {
			return
		}
		a, err := ask(context.Background(), job, expand.Basis{}, Options{})
		if err != nil {
			return
		}
		for i := range a.p.Acts {
			if len(a.p.Acts[i].Modes) == 0 {
				return
			}
		}
		_, c := network.Propagate(a.p, network.Off{})
		if c == nil {
			return
		}
		proofs++
		off := a.core(c)
		holds := func() bool { _, c := network.Propagate(a.p, off); return c == nil }
		if holds() {
			rt.Fatalf("what the proof is made of holds\n%s", s.yaml())
		}
		for k := range a.p.Links {
			if off.Link[k] || a.p.Links[k].From < 0 {
				continue
			}
			off.Link[k] = true
			if !holds() {
				rt.Fatalf("link %d is in the proof and not needed\n%s", k, s.yaml())
			}
			off.Link[k] = false
		}
		for i := range a.p.Acts {
			if off.By[i] || a.p.Acts[i].By >= problem.Inf {
				continue
			}
			off.By[i] = true
			if !holds() {
				rt.Fatalf("the date of %s is in the proof and not needed\n%s", a.p.Acts[i].Name, s.yaml())
			}
			off.By[i] = false
		}
		for _, l := range a.chain(c).Lines {
			if l.Pos.Given() {
				lines++
			}
		}
	})
	t.Logf("%d proofs with %d lines", proofs, lines)
	if proofs == 0 && !testing.Short() {
		t.Error("no proof by a chain among all these jobs")
	}
}

// handJob is a day of eight hours at a quay, with the tasks given.
func handJob(t *testing.T, tasks string) *plan.Answer {
	t.Helper()
	job, err := jobfile.ReadBytes("job.yaml", []byte(`
job: proof
zone: Africa/Abidjan
places:
  shop: {open: [daily 08:00-16:00]}
  quay: {open: [daily 08:00-12:00 13:00-17:00], face factor: 1}
window: {place: quay, opens: 2027-04-05 08:00, closes: 2027-04-05 17:00}
people: {Ann: {}, Bob: {}}
tasks:
`+tasks), nil)
	if err != nil {
		t.Fatal(err)
	}
	rep, err := Ask(context.Background(), job, Options{Only: true, Ticks: 1000})
	if err != nil {
		t.Fatal(err)
	}
	return rep.Likely
}

// TestProofs: one proof of each kind, its sum worked out beside it.
func TestProofs(t *testing.T) {
	for _, tc := range []struct {
		name, tasks string
		kind        plan.ProofKind
		over        int
		says        string
	}{
		// 5 h from 8:00 end at 14:00; 4 more end at 9:00 on the next day, 16 h after 17:00
		{"a chain", "  a: {at: quay, hours: 5 h}\n  b: {at: quay, hours: 4 h, after: a}", plan.ByChain, 16 * 60, `the work up to the end of "b" takes too long`},
		// 3 h end at 11:00, 7 h of standing at 18:00
		{"standing time", "  a: {at: quay, hours: 3 h}\n  b: {at: quay, standing: 7 h, after: a}", plan.ByChain, 60, `"b" (standing): 7 h standing`},
		// 5 h + 4 h of Ann's in 8 h
		{"too much work", "  a: {at: quay, hours: 5 h, who: Ann}\n  b: {at: quay, hours: 4 h, who: Ann}", plan.ByWork, 60, "Ann: 9 h of work"},
		// 5 h in one go do not fit four
		{"no opening", "  a: {at: quay, kind: coat, hours: 5 h, area: 1 m2, coats: [p]}\npaints: {p: {kind: alkyd}}", plan.ByNoOpening, 0, "it goes in one go"},
		// b begins at least 3 h after the start of a, at most 2 h after it
		{"waits against each other", "  a: {at: quay, hours: 1 h}\n  b: {at: quay, hours: 1 h, after start of: {a: {max: 2 h}}, after: {a: {min: 2 h}}}", plan.ByChain, 0, "contradict each other"},
	} {
		a := handJob(t, tc.tasks)
		if a.Verdict != plan.CannotFit || a.Proof == nil {
			t.Errorf("%s: %v, want a proof that it cannot fit", tc.name, a.Verdict)
			continue
		}
		text := a.Proof.Summary
		for _, l := range a.Proof.Lines {
			text += "\n" + l.Text
		}
		if a.Proof.Kind != tc.kind || a.Proof.Over != tc.over || !strings.Contains(text, tc.says) {
			t.Errorf("%s: kind %d, %d min over, want kind %d, %d over and %q in:\n%s", tc.name, a.Proof.Kind, a.Proof.Over, tc.kind, tc.over, tc.says, text)
		}
	}
}
