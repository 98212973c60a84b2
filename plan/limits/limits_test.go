package limits

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// read reads a job at a pier that is open 8 to 12 and 12:30 to 17, two days long where closes does not say otherwise.
func read(t *testing.T, top, place, people, work string) *expand.Work {
	t.Helper()
	if people == "" {
		people = "{Ines: {tickets: [weld, fitter, fire watch]}, Tom: {tickets: [fitter, fire watch]}}"
	}
	closes := "2027-04-06 17:00"
	if c, rest, ok := strings.Cut(top, "|"); ok {
		closes, top = c, rest
	}
	job, err := jobfile.ReadBytes("job.yaml", []byte(fmt.Sprintf(`job: limits
zone: UTC
places:
  pier:
    open: Mon-Sat 08:00-12:00 12:30-17:00
    face factor: 1
    fire watch: 0 min
%swindow: {place: pier, opens: 2027-04-05 08:00, closes: %s}
people: %s
%stasks:
%s`, place, closes, people, top, work)), nil)
	if err != nil {
		t.Fatal(err)
	}
	w, faults := expand.Expand(job, expand.Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return w
}

// TestMembers: for each job the limits that its contradiction needs, reasoned out by hand: no other set
// with fewer of the named kinds is one.
func TestMembers(t *testing.T) {
	const (
		len_, min_, max_     = plan.LimitLength, plan.LimitMinWait, plan.LimitMaxWait
		opens, closes, hours = plan.LimitOpens, plan.LimitCloses, plan.LimitHours
	)
	for _, tc := range []struct {
		name, top, place, people, work string
		want                           []plan.LimitKind
	}{
		{"two tasks in a row, 18 h in 17", "", "", "", "  a: {at: pier, hours: 9 h, who: Ines}\n  b: {at: pier, hours: 9 h, after: a, who: Tom}\n",
			[]plan.LimitKind{len_, len_, min_, hours, opens, closes}},
		{"one person, 18 h in 17", "", "", "", "  a: {at: pier, hours: 9 h, who: Ines}\n  b: {at: pier, hours: 9 h, who: Ines}\n",
			[]plan.LimitKind{len_, len_, plan.LimitNeed, plan.LimitNeed, plan.LimitPerson, hours, opens, closes}},
		{"one kit, 18 h in 17", "kit: {rig: {count: 1}}\n", "", "", "  a: {at: pier, hours: 9 h, who: Ines, kit: rig}\n  b: {at: pier, hours: 9 h, who: Tom, kit: rig}\n",
			[]plan.LimitKind{len_, len_, plan.LimitKit, hours, opens, closes}},
		{"room for one, 18 h in 17", "", "    workfaces: {deck: {people: 1}}\n", "", "  a: {at: pier/deck, hours: 9 h, who: Ines}\n  b: {at: pier/deck, hours: 9 h, who: Tom}\n",
			[]plan.LimitKind{len_, len_, plan.LimitRoom, hours, opens, closes}},
		{"two sets of 8 kVA on 10 kVA", "kit: {gen: {gives: 10 kVA}, set: {count: 2, draws: 8 kVA}}\n", "", "", "  a: {at: pier, hours: 9 h, who: Ines, kit: set}\n  b: {at: pier, hours: 9 h, who: Tom, kit: set}\n",
			[]plan.LimitKind{len_, len_, plan.LimitPower, hours, opens, closes}},
		{"5 h 30 min of reach for 6 h", "", "    workfaces: {hinge: {reach: [2027-04-05 09:00-12:00, 2027-04-06 10:00-13:00]}}\n", "", "  a: {at: pier/hinge, hours: 6 h, who: Ines}\n",
			[]plan.LimitKind{len_, hours, plan.LimitReach}},
		{"comes too late", "", "", "{Ines: {from: 2027-04-06 13:00}, Tom: {}}", "  a: {at: pier, hours: 6 h, who: Ines}\n",
			[]plan.LimitKind{len_, plan.LimitNeed, plan.LimitPersonFrom, closes}},
		{"goes too early", "", "", "{Ines: {until: 2027-04-05 12:00}, Tom: {}}", "  a: {at: pier, hours: 6 h, who: Ines}\n",
			[]plan.LimitKind{len_, plan.LimitNeed, plan.LimitPersonUntil, opens}},
		{"works 3 h a day", "", "", "{Ines: {hours: Mon-Fri 09:00-12:00}, Tom: {}}", "  a: {at: pier, hours: 8 h, who: Ines}\n",
			[]plan.LimitKind{len_, plan.LimitNeed, plan.LimitPersonHours, opens, closes}},
		{"the inspector is gone", "", "", "{Ines: {}, Tom: {}, Insp: {outside: yes, places: pier, booked: [2027-04-05 09:00-10:00]}}", "  a: {at: pier, hours: 4 h, who: Ines}\n  i: {kind: sign-off, at: pier, hours: 30 min, after: a, who: Insp}\n",
			[]plan.LimitKind{len_, len_, min_, plan.LimitNeed, plan.LimitBooked, opens}},
		{"the crane is gone", "hire: {crane: {slots: [2027-04-05 08:00-10:00]}}\n", "", "", "  a: {at: pier, hours: 4 h, who: Ines}\n  b: {at: pier, hours: 1 h, after: a, who: Tom, kit: crane}\n",
			[]plan.LimitKind{len_, len_, min_, plan.LimitHire, opens}},
		{"a deadline", "", "", "", "  a: {at: pier, hours: 6 h, who: Ines}\n  b: {at: pier, hours: 4 h, after: a, who: Tom, must be done by: 2027-04-05 16:00}\n",
			[]plan.LimitKind{len_, len_, min_, opens, plan.LimitDeadline}},
		{"not before", "", "", "", "  a: {at: pier, hours: 6 h, who: Ines, not before: 2027-04-06 13:00}\n",
			[]plan.LimitKind{len_, plan.LimitNotBefore, closes}},
		{"an order rule", "orders: [{either: [b before a]}]\n", "", "", "  a: {at: pier, hours: 5 h, who: Ines, must be done by: 2027-04-05 16:00}\n  b: {at: pier, hours: 5 h, who: Tom}\n",
			[]plan.LimitKind{len_, len_, plan.LimitOrder, opens, plan.LimitDeadline}},
		{"noisy for an hour a day", "", "    noisy work: Mon-Sat 10:00-11:00\n", "", "  a: {at: pier, hours: 3 h, who: Ines, noisy: yes}\n",
			[]plan.LimitKind{len_, plan.LimitNoisy, opens, closes}},
		{"a permit for 90 min a day", "", "    permits: {hot work: {valid: Mon-Sat 09:00-11:00, issue: 30 min}}\n", "", "  a: {kind: cut, by: oxy-fuel, at: pier, hours: 5 h, who: Ines}\n",
			[]plan.LimitKind{len_, plan.LimitPermit, opens, closes}},
		{"nobody else there", "", "    workfaces: {tank: {closed space: yes}}\n", "{Ines: {}, Tom: {hours: Mon-Fri 08:00-10:00}}", "  a: {at: pier/tank, hours: 6 h, who: Ines}\n",
			[]plan.LimitKind{len_, plan.LimitLone, plan.LimitPersonHours, opens, closes}},
		{"the watch after it", "2027-04-05 17:00|", "", "", "  a: {kind: cut, by: oxy-fuel, at: pier, hours: 8 h, who: Ines, fire watch: 60 min}\n",
			[]plan.LimitKind{len_, plan.LimitWatch, hours, opens, closes}},
		{"a closed day", "2027-04-07 17:00|", "    closed: [2027-04-06]\n", "", "  a: {at: pier, hours: 18 h, who: Ines}\n",
			[]plan.LimitKind{len_, hours, plan.LimitClosed, opens, closes}},
		{"a day off", "2027-04-07 17:00|", "", "{Ines: {off: [2027-04-06]}, Tom: {}}", "  a: {at: pier, hours: 18 h, who: Ines}\n",
			[]plan.LimitKind{len_, plan.LimitNeed, hours, plan.LimitPersonOff, opens, closes}},
		// whoever does a ends it after b's two hours, and the next of those are 16 h later at least; in three days Tom could do both
		{"a longest wait over a night", "", "", "{Ines: {hours: daily 11:00-17:00}, Tom: {hours: daily 08:00-10:00}}", "  a: {at: pier, hours: 4 h, who: Ines}\n  b: {at: pier, hours: 1 h, who: Tom, after: {a: {max: 4 h}}}\n",
			[]plan.LimitKind{len_, len_, min_, max_, plan.LimitNeed, plan.LimitPersonHours, plan.LimitPersonHours, opens, closes}},
		{"clearing up", "2027-04-05 17:00|", "    clearing up: 30 min\n", "", "  a: {at: pier, hours: 8.5 h, who: Ines}\n",
			[]plan.LimitKind{len_, plan.LimitUp, hours, opens, closes}},
	} {
		w := read(t, tc.top, tc.place, tc.people, tc.work)
		found := Find(w, nil, Options{})
		if found == nil {
			t.Errorf("%s: not refuted", tc.name)
			continue
		}
		var got []plan.LimitKind
		text := ""
		for _, l := range found.Lines {
			got = append(got, l.Limit.Kind)
			text += fmt.Sprintf("\n  %s (%d) needed %v", l.Text, l.Pos.Line, l.Needed)
			if !l.Needed || !l.Pos.Given() || l.Text == "" {
				t.Errorf("%s: %q, line %d, needed %v", tc.name, l.Text, l.Pos.Line, l.Needed)
			}
		}
		slices.Sort(got)
		slices.Sort(tc.want)
		if !slices.Equal(got, tc.want) {
			t.Errorf("%s: kinds %v, want %v:%s", tc.name, got, tc.want, text)
		}
	}
}

// TestLinesOfTheFile: each limit stands at its own line, not at that of what it belongs to.
func TestLinesOfTheFile(t *testing.T) {
	job, err := jobfile.ReadBytes("job.yaml", []byte(`job: lines
zone: UTC
places:
  pier:
    open: Mon-Sat 08:00-12:00 12:30-17:00
    face factor: 1
window:
  place: pier
  opens: 2027-04-05 08:00
  closes: 2027-04-06 17:00
people:
  Ines:
    tickets: [fitter]
    hours: Mon-Fri 09:00-12:00
tasks:
  a:
    at: pier
    needs: {fitter: 1}
    hours: 8 h
`), nil)
	if err != nil {
		t.Fatal(err)
	}
	w, _ := expand.Expand(job, expand.Basis{})
	want := map[plan.LimitKind]int{plan.LimitLength: 19, plan.LimitPersonHours: 14, plan.LimitOpens: 9, plan.LimitCloses: 10}
	found := Find(w, nil, Options{})
	for _, l := range found.Lines {
		if l.Pos.Line != want[l.Limit.Kind] {
			t.Errorf("%q stands at line %d, want %d", l.Text, l.Pos.Line, want[l.Limit.Kind])
		}
	}
	if len(found.Lines) != len(want) {
		t.Errorf("%d lines, want %d", len(found.Lines), len(want))
	}
}

// TestNothingIsChanged: the work that is asked about is as it was.
func TestNothingIsChanged(t *testing.T) {
	w := read(t, "", "", "", "  a: {at: pier, hours: 9 h, who: Ines}\n  b: {at: pier, hours: 9 h, who: Ines}\n")
	places, needs, span := w.Job.Places[0].Open.String(), len(w.Steps[0].Needs), w.Span
	people := append([]*tasks.Person(nil), w.Job.People...)
	Find(w, nil, Options{})
	if w.Job.Places[0].Open.String() != places || len(w.Steps[0].Needs) != needs || w.Span != span || w.Steps[0].Working != 540 || !slices.Equal(people, w.Job.People) {
		t.Error("the work was changed")
	}
}

// TestWhatHoldsIsNotRefuted: a job that fits gives nothing.
func TestWhatHoldsIsNotRefuted(t *testing.T) {
	if found := Find(read(t, "", "", "", "  a: {at: pier, hours: 9 h, who: Ines}\n"), nil, Options{}); found != nil {
		t.Errorf("refuted by %v", found.Lines)
	}
}
