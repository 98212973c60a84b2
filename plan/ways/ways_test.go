package ways

import (
	"context"
	"flag"
	"fmt"
	"slices"
	"strings"
	"testing"

	"sailby/plan"
	"sailby/plan/settle"
	"sailby/tasks"
	"sailby/tasks/jobfile"

	"pgregory.net/rapid"
)

const crew = "{Ines: {tickets: [weld, fitter, fire watch]}, Tom: {tickets: [fitter, fire watch]}}"

// file writes a job at a pier that is open 8 to 12 and 12:30 to 17, for two days where the top does not say other with "closes|".
func file(top, place, people, work string) []byte {
	if people == "" {
		people = crew
	}
	closes := "2027-04-06 17:00"
	if c, rest, ok := strings.Cut(top, "|"); ok {
		closes, top = c, rest
	}
	return []byte(fmt.Sprintf(`job: ways
zone: UTC
places:
  pier:
    open: Mon-Sat 08:00-12:00 12:30-17:00
    face factor: 1
    fire watch: 0 min
%swindow: {place: pier, opens: 2027-04-05 08:00, closes: %s}
people: %s
%stasks:
%s`, place, closes, people, top, work))
}

// find asks a job file for its ways.
func find(t interface {
	Helper()
	Fatal(...any)
}, data []byte, o Options) (*plan.Answer, *plan.Ways) {
	t.Helper()
	job, err := jobfile.ReadBytes("job.yaml", data, nil)
	if err != nil {
		t.Fatal(err)
	}
	rep, err := settle.Ask(context.Background(), job, settle.Options{Only: true})
	if err != nil {
		t.Fatal(err)
	}
	o.Read = func(sets []tasks.Setting) (*tasks.Job, error) {
		return jobfile.ReadBytesChanged("job.yaml", data, nil, sets)
	}
	return rep.Likely, Find(context.Background(), job, rep.Likely, o)
}

// TestLeastChange: jobs whose least change is known by hand; the sums stand beside them.
func TestLeastChange(t *testing.T) {
	in18 := "  a: {at: pier, hours: 9 h, who: Ines}\n  b: {at: pier, hours: 9 h, after: a, who: Tom}\n" // 18 h in a row, 17 h open
	for i, tc := range []struct {
		name, top, place, people, work string
		kind                           plan.LimitKind
		says                           string
		amount                         int
		write                          string
	}{
		{"an hour more each day is two hours, half an hour is the one that lacks", "", "", "", in18, plan.LimitHours, "longer each day", 60, `open: ["Mon-Sat 08:00-12:00 12:30-18:00"]`}, // b begins on the second day: 8 h 30 min do not hold it, 9 h 30 min do
		{"one of the tasks an hour shorter", "", "", "", in18, plan.LimitLength, `"b" taking`, 60, "hours: 8 h"},
		// the hour that lacks is worked from 8 to 9 on the day after: 16 h past 17:00
		{"the window closing on the next morning", "", "", "", in18, plan.LimitCloses, "closing", 16 * 60, "closes: 2027-04-07 09:00"},
		{"a second rig", "kit: {rig: {count: 1}}\n", "", "", "  a: {at: pier, hours: 9 h, who: Ines, kit: rig}\n  b: {at: pier, hours: 9 h, who: Tom, kit: rig}\n", plan.LimitKit, "1 more of rig", 1, "count: 2"},
		{"room for two", "", "    workfaces: {deck: {people: 1}}\n", "", "  a: {at: pier/deck, hours: 9 h, who: Ines}\n  b: {at: pier/deck, hours: 9 h, who: Tom}\n", plan.LimitRoom, "room for 2", 1, "people: 2"},
		// two of 8 kVA on 10 kVA
		{"power for both", "kit: {gen: {gives: 10 kVA}, set: {count: 2, draws: 8 kVA}}\n", "", "", "  a: {at: pier, hours: 9 h, who: Ines, kit: set}\n  b: {at: pier, hours: 9 h, who: Tom, kit: set}\n", plan.LimitPower, "6 kVA more", 6, "gives: 16 kVA"},
		{"a second welder", "", "", "", "  a: {at: pier, hours: 9 h, needs: {weld: 1}}\n  b: {at: pier, hours: 9 h, needs: {weld: 1}}\n", plan.LimitPerson, "one more in the crew", 1, "under people"},
		// 3 h and 2 h (10 to 12, 12:30 to 13) of reach for 6 h of work: 30 min lack... each low water a quarter at both ends is 30 min more of the first
		{"the hinge longer", "", "    workfaces: {hinge: {reach: [2027-04-05 09:00-12:00, 2027-04-06 10:00-13:00]}}\n", "", "  a: {at: pier/hinge, hours: 6 h, who: Ines}\n", plan.LimitReach, "longer at each low water", 30, "reach"},
		// 4 h are left from 13:00: 2 h more before it, with the meal between
		{"the late one earlier", "", "", "{Ines: {from: 2027-04-06 13:00}, Tom: {}}", "  a: {at: pier, hours: 6 h, who: Ines}\n", plan.LimitPersonFrom, "Ines there", 150, "from: 2027-04-06 10:30"},
		{"the early one longer", "", "", "{Ines: {until: 2027-04-05 12:00}, Tom: {}}", "  a: {at: pier, hours: 6 h, who: Ines}\n", plan.LimitPersonUntil, "Ines there until", 150, "until: 2027-04-05 14:30"},
		{"free to begin earlier", "", "", "", "  a: {at: pier, hours: 6 h, who: Ines, not before: 2027-04-06 13:00}\n", plan.LimitNotBefore, "free to begin", 150, "not before: 2027-04-06 10:30"},
		// 6 h to 14:30, 4 h to 9:30 of the next day: 17 h 30 min after 16:00, in hours beyond 12 h
		{"the deadline later", "", "", "", "  a: {at: pier, hours: 6 h, who: Ines}\n  b: {at: pier, hours: 4 h, after: a, who: Tom, must be done by: 2027-04-05 16:00}\n", plan.LimitDeadline, `the deadline of "b"`, 18 * 60, "must be done by: 2027-04-06 10:00"},
		// a ends at 15:00 or later, b begins at 8:00: 17 h at least
		{"the longest wait longer", "", "", "{Ines: {hours: daily 11:00-17:00}, Tom: {hours: daily 08:00-10:00}}", "  a: {at: pier, hours: 4 h, who: Ines}\n  b: {at: pier, hours: 1 h, who: Tom, after: {a: {max: 4 h}}}\n", plan.LimitMaxWait, "the longest wait", 11 * 60, "max: 15 h"},
		{"the crane for longer", "hire: {crane: {slots: [2027-04-05 08:00-10:00]}}\n", "", "", "  a: {at: pier, hours: 4 h, who: Ines}\n  b: {at: pier, hours: 1 h, after: a, who: Tom, kit: crane}\n", plan.LimitHire, "at its end", 210, "slots"},
		{"the inspector for longer", "", "", "{Ines: {}, Tom: {}, Insp: {outside: yes, places: pier, booked: [2027-04-05 09:00-10:00]}}", "  a: {at: pier, hours: 4 h, who: Ines}\n  i: {kind: sign-off, at: pier, hours: 30 min, after: a, who: Insp}\n", plan.LimitBooked, "at its end", 180, "booked"},
		{"no closed day", "2027-04-07 17:00|", "    closed: [2027-04-06]\n", "", "  a: {at: pier, hours: 18 h, who: Ines}\n", plan.LimitClosed, "open on 2027-04-06", 0, "also open"},
		{"no day off", "2027-04-07 17:00|", "", "{Ines: {off: [2027-04-06]}, Tom: {}}", "  a: {at: pier, hours: 18 h, who: Ines}\n", plan.LimitPersonOff, "not off on", 0, "nothing under off"},
		{"noisy work for longer", "", "    noisy work: Mon-Sat 10:00-11:00\n", "", "  a: {at: pier, hours: 3 h, who: Ines, noisy: yes}\n", plan.LimitNoisy, "longer each day", 30, `noisy work: ["Mon-Sat 10:00-11:30"]`},
		{"the change that the file keeps", "changes: {quick: {says: a faster way, set: {tasks/a/hours: 7 h}}}\n", "", "", in18, plan.LimitOther, `the change "quick" (a faster way)`, 0, `--with "quick", or what stands under it`},
	} {
		if testing.Short() && i%3 != 0 {
			continue
		}
		a, w := find(t, file(tc.top, tc.place, tc.people, tc.work), Options{})
		if a.Verdict != plan.CannotFit || w == nil {
			t.Errorf("%s: %v", tc.name, a.Verdict)
			continue
		}
		found := false
		all := ""
		for _, x := range w.List {
			all += fmt.Sprintf("\n  %s, %d, %s", x.Text, x.Amount, x.Write)
			if x.Kind == tc.kind && strings.Contains(x.Text, tc.says) {
				found = true
				if x.Amount != tc.amount || !strings.HasPrefix(x.Write, tc.write) || x.Pos.Line == 0 {
					t.Errorf("%s: %q, amount %d, write %q, line %d; want %d and %q", tc.name, x.Text, x.Amount, x.Write, x.Pos.Line, tc.amount, tc.write)
				}
			}
		}
		if !found {
			t.Errorf("%s: not among%s", tc.name, all)
		}
	}
}

// TestNoSingleChange: two contradictions that have nothing in common; each of what would mend one leaves the other.
func TestNoSingleChange(t *testing.T) {
	_, w := find(t, file("", "", "", `  a: {at: pier, hours: 4 h, who: Ines, not before: 2027-04-05 10:00, must be done by: 2027-04-05 11:00}
  b: {at: pier, hours: 4 h, who: Tom, not before: 2027-04-06 10:00, must be done by: 2027-04-06 11:00}
`), Options{})
	if w == nil || len(w.List) != 0 || w.Left != 0 || w.Tried == 0 {
		t.Errorf("%+v: want none, all tried", w)
	}
}

// TestNeverOffered: what keeps people safe and what a material needs is named, and no way rests on it.
func TestNeverOffered(t *testing.T) {
	_, w := find(t, file("2027-04-05 17:00|", "", "", "  a: {kind: cut, by: oxy-fuel, at: pier, hours: 8 h, who: Ines, fire watch: 60 min}\n"), Options{})
	if w == nil || len(w.Not) != 1 || !strings.Contains(w.Not[0], "fire watch") {
		t.Fatalf("%+v", w)
	}
	for _, x := range w.List {
		for _, s := range x.Sets {
			if p := strings.Join(s.Path, "/"); strings.Contains(p, "fire watch") || strings.Contains(p, "duty") || strings.Contains(p, "alone") {
				t.Errorf("%s is offered", p)
			}
		}
	}
}

// TestFitsHasNoWays: a job that fits is asked nothing.
func TestFitsHasNoWays(t *testing.T) {
	if a, w := find(t, file("", "", "", "  a: {at: pier, hours: 4 h, who: Ines}\n"), Options{}); a.Verdict != plan.Fits || w != nil {
		t.Errorf("%v, %v", a.Verdict, w)
	}
}

// TestBounded: few trials leave the rest untried, and say so; a cancel ends it.
func TestBounded(t *testing.T) {
	data := file("", "", "", "  a: {at: pier, hours: 9 h, who: Ines}\n  b: {at: pier, hours: 9 h, who: Ines}\n")
	if _, w := find(t, data, Options{Trials: 3}); w == nil || w.Left == 0 {
		t.Errorf("%+v: want some left", w)
	}
	job, _ := jobfile.ReadBytes("job.yaml", data, nil)
	rep, _ := settle.Ask(context.Background(), job, settle.Options{Only: true})
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	w := Find(ctx, job, rep.Likely, Options{Read: func(s []tasks.Setting) (*tasks.Job, error) { return jobfile.ReadBytesChanged("job.yaml", data, nil, s) }})
	if len(w.List) != 0 || w.Left == 0 {
		t.Errorf("cancelled: %+v", w)
	}
}

// TestWaysHold is the law: each way, written into the text of the job file, gives a job that fits with what is said to be
// in hand, and one step less of it does not.
func TestWaysHold(t *testing.T) {
	old := flag.Lookup("rapid.checks").Value.String()
	n := "12"
	if testing.Short() {
		n = "3"
	}
	flag.Set("rapid.checks", n)
	t.Cleanup(func() { flag.Set("rapid.checks", old) })
	seen, none := 0, 0
	rapid.Check(t, func(rt *rapid.T) {
		data := drawn(rt)
		a, w := find(rt, data, Options{})
		if a.Verdict == plan.Fits {
			return
		}
		if len(w.List) == 0 {
			none++
			if w.Left == 0 {
				noneOfAll(rt, data, a)
			}
		}
		for _, x := range w.List {
			seen++
			if got := ask(rt, data, x.Sets); got == nil || got.Verdict != plan.Fits || got.InHand != x.InHand || got.Finish != x.Finish {
				rt.Fatalf("%s, %d in hand: %+v\n%s", x.Text, x.InHand, got, data)
			}
			for k, tr := range x.Tried { // what was tried below it did not fit; the amounts rise, and each says what it was
				if k > 0 && tr.Amount <= x.Tried[k-1].Amount || tr.Text == "" || tr.Amount < x.Amount && tr.Verdict == plan.Fits {
					rt.Fatalf("%s: tried %+v\n%s", x.Text, x.Tried, data)
				}
			}
			if !slices.Contains(x.Tried, plan.WayTrial{Text: x.Text, Amount: x.Amount, Verdict: plan.Fits}) {
				rt.Fatalf("%s is not among what was tried: %+v\n%s", x.Text, x.Tried, data)
			}
			if less := lesser(a, x); less != nil && ask(rt, data, less).Verdict == plan.Fits {
				rt.Fatalf("%s: one step less fits as well\n%s", x.Text, data)
			}
		}
	})
	t.Logf("%d ways; %d jobs without", seen, none)
	if seen == 0 && !testing.Short() {
		t.Error("no way in all these jobs")
	}
}

// noneOfAll tries what the job has in all, the proof left out of it: no single change may help where none was found.
func noneOfAll(rt *rapid.T, data []byte, a *plan.Answer) {
	bare := *a
	bare.Proof = nil
	for _, d := range dials(a.Work.Job, &bare) {
		for _, k := range d.probes() {
			sets, ok := d.sets(d.steps[k])
			job, err := jobfile.ReadBytesChanged("job.yaml", data, nil, sets)
			if !ok || err != nil {
				continue
			}
			if got, err := settle.Try(context.Background(), job, settle.Options{}, false); err == nil && got.Verdict == plan.Fits {
				rt.Fatalf("none was found, and %s is enough\n%s", d.says(d.steps[k]), data)
			}
		}
	}
}

// lesser gives the settings of a way's amount one step down; nil where it is the least there is.
func lesser(a *plan.Answer, x plan.Way) []tasks.Setting {
	for _, d := range dials(a.Work.Job, a) {
		k := slices.Index(d.steps, x.Amount)
		if k < 1 || d.kind != x.Kind || d.says(x.Amount) != x.Text {
			continue
		}
		sets, _ := d.sets(d.steps[k-1])
		return sets
	}
	return nil
}

// ask plans the text of a job file with some values written into it.
func ask(rt *rapid.T, data []byte, sets []tasks.Setting) *plan.Answer {
	text, err := jobfile.Apply(data, sets)
	if err != nil {
		rt.Fatal(err)
	}
	job, err := jobfile.ReadBytes("job.yaml", text, nil)
	if err != nil {
		rt.Fatal(err)
	}
	rep, err := settle.Ask(context.Background(), job, settle.Options{Only: true})
	if err != nil {
		rt.Fatal(err)
	}
	return rep.Likely
}

// drawn writes a small job that is rather too tight.
func drawn(rt *rapid.T) []byte {
	pick := func(what string, from ...string) string { return rapid.SampledFrom(from).Draw(rt, what) }
	place := pick("place", "", "    clearing up: 20 min\n", "    noisy work: Mon-Sat 09:00-15:00\n", "    closed: [2027-04-06]\n") +
		pick("faces", "    workfaces: {deck: {people: 1}}\n", "    workfaces: {deck: {people: 2, reach: [2027-04-05 09:00-14:00, 2027-04-06 10:00-15:00]}}\n")
	people := pick("people", "", "{Ines: {tickets: [weld, fitter], hours: Mon-Sat 09:00-16:00}, Tom: {tickets: [fitter], from: 2027-04-05 12:00}}")
	work := ""
	n := rapid.IntRange(2, 4).Draw(rt, "tasks")
	for i := 0; i < n; i++ {
		work += fmt.Sprintf("  t%d: {at: %s, hours: %d min, %s%s", i, pick("at", "pier", "pier/deck"), 30*rapid.IntRange(4, 18).Draw(rt, "half hours"),
			pick("who", "who: Ines", "who: Tom", "needs: {fitter: 1}", "needs: {weld: 1}"), pick("kit", "", ", kit: rig", ", noisy: yes"))
		if i > 0 && rapid.Bool().Draw(rt, "linked") {
			work += fmt.Sprintf(", after: {t%d: %s}", rapid.IntRange(0, i-1).Draw(rt, "after"), pick("wait", "{}", "{min: 1 h}", "{max: 6 h}"))
		}
		work += pick("date", "", "", ", not before: 2027-04-05 14:00", ", must be done by: 2027-04-06 11:00") + "}\n"
	}
	return file("kit: {rig: {count: 1}}\n", place, people, work)
}
