package agenda_test

import (
	"testing"
	"time"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/fixture"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/weld"
)

func TestClocks(t *testing.T) {
	z := london(t)
	at := func(s string) hours.Minute {
		m, err := time.Parse(time.RFC3339, s)
		if err != nil {
			t.Fatal(err)
		}
		return hours.Of(m)
	}
	for _, c := range []struct{ got, want string }{
		{agenda.When(at("2027-04-06T08:20:00Z"), z), "Tue 6 Apr 09:20"},
		{agenda.When(at("2026-10-25T00:30:00Z"), z), "Sun 25 Oct 01:30 BST"}, // the hour that comes twice
		{agenda.When(at("2026-10-25T01:30:00Z"), z), "Sun 25 Oct 01:30 GMT"},
		{agenda.When(at("2026-10-25T02:30:00Z"), z), "Sun 25 Oct 02:30"},
		{agenda.When(hours.Far, z), "-"},
		{agenda.When(hours.Never, z), "-"},
		{agenda.Between(hours.Span{From: at("2027-04-06T08:20:00Z"), To: at("2027-04-06T10:00:00Z")}, z), "09:20-11:00"},
		{agenda.Between(hours.Span{From: at("2027-04-06T20:00:00Z"), To: at("2027-04-06T23:00:00Z")}, z), "21:00-24:00"},
		{agenda.Between(hours.Span{From: at("2027-04-06T20:00:00Z"), To: at("2027-04-07T05:00:00Z")}, z), "21:00-Wed 7 Apr 06:00"},
		{agenda.When(0, nil), "Thu 1 Jan 00:00"},
		{agenda.LongDay(hours.Date{Year: 2027, Month: 4, Day: 6}), "Tuesday 6 April 2027"},
	} {
		if c.got != c.want {
			t.Errorf("got %q, want %q", c.got, c.want)
		}
	}
}

func TestSentences(t *testing.T) {
	r := fixture.Report()
	for _, c := range []struct {
		got, want string
	}{
		{agenda.Sentence(r.Likely, false), "Fits: on likely hours the work at Tarskay pier is finished by Fri 9 Apr 11:00, 5 h before the window closes."},
		{agenda.Sentence(r.Maybes, false), "Not settled: with every maybe the best plan found finishes Fri 9 Apr 18:10, 2 h 10 min after the window closes; no plan can finish before Fri 9 Apr 15:15."},
		{agenda.Sentence(r.High, false), "Cannot fit: proved, at the high end of the hours: the work in workface hinge needs 14 h 50 min of reach, and the window has 11 h 30 min of it (3 h 20 min too much)."},
		{agenda.Sentence(r.High, true)[:60], "Cannot fit: proved, even at the low end of every range: the "},
	} {
		if c.got != c.want {
			t.Errorf("got\n %s\nwant\n %s", c.got, c.want)
		}
	}
	r.Maybes.InHand = 10 // inside the window, but the deadline falls
	if got, want := agenda.Sentence(r.Maybes, false), "Not settled: with every maybe the best plan found finishes Fri 9 Apr 18:10, but is 25 min late for open again; no plan can finish before Fri 9 Apr 15:15."; got != want {
		t.Errorf("got\n %s\nwant\n %s", got, want)
	}
	r.Maybes.Plan = nil
	if got, want := agenda.Sentence(r.Maybes, false), "Not settled: with every maybe no plan was found in the time allowed, and nothing shows that there is none; no plan can finish before Fri 9 Apr 15:15."; got != want {
		t.Errorf("got\n %s\nwant\n %s", got, want)
	}
}

func TestCauses(t *testing.T) {
	w := fixture.Report().Likely.Work
	for _, c := range []struct {
		cause plan.Cause
		want  string
	}{
		{plan.Cause{Text: "after cut \x1b[31mlugs"}, "after cut lugs"},
		{plan.Cause{Kind: plan.ByPerson, Name: "Ines", Other: 0}, "a person (Ines), after cut plate"},
		{plan.Cause{Kind: plan.ByHire, Name: "loader crane", Other: -1}, "a hire slot (loader crane)"},
		{plan.Cause{Kind: plan.ByStart, Other: 999}, "the start of the plan"},
	} {
		if got := agenda.CauseText(w, c.cause); got != c.want {
			t.Errorf("got %q, want %q", got, c.want)
		}
	}
	seen := map[string]bool{}
	for k := plan.ByLink; k <= plan.ByConditions; k++ {
		name := agenda.CauseKind(k)
		if name == "other" || seen[name] || agenda.CauseText(w, plan.Cause{Kind: k, Other: -1}) == "" {
			t.Errorf("cause %d has no name of its own: %q", k, name)
		}
		seen[name] = true
	}
}

func TestAmounts(t *testing.T) {
	w := fixture.Report().Likely.Work
	want := map[string]string{
		"cut plate":        "9.6 m, 16 mm thick, by plasma",
		"weld frame":       "9.6 m of 6 mm fillet PB, 800 mm of single V, 12 mm PA",
		"prime frame":      "9.6 m2, primer, on frame",
		"load frame":       "frame, 410 kg, by chain hoist",
		"weld lugs":        "4.5 m of 6 mm fillet PF",
		"hang frame":       "frame, 451 kg, by loader crane", // the estimate's mass, not the bare one
		"drill anchors":    "",
		"cut out old lugs": "1.9 m, 16 mm thick, by oxy-fuel",
	}
	seen := map[string]bool{}
	for _, s := range w.Steps {
		if text, ok := want[s.Task.Name]; ok && !seen[s.Task.Name] {
			seen[s.Task.Name] = true
			if got := agenda.Amount(s); got != text {
				t.Errorf("%s: %q, want %q", s.Task.Name, got, text)
			}
		}
	}
	if len(seen) != len(want) {
		t.Errorf("%d tasks seen, want %d", len(seen), len(want))
	}
	if got := agenda.SeamWords(tasks.Seam{Seam: weld.Seam{Joint: weld.Joint{Type: weld.Fillet, Throat: 4, BothSides: true}}}); got != "fillet a4 both sides" {
		t.Errorf("seam: %q", got)
	}
	coat := &expand.Step{Name: "coat 2", Task: &tasks.Task{Kind: tasks.Coat}}
	if n := agenda.CoatNumber(coat); n != 2 {
		t.Errorf("coat number %d", n)
	}
}
