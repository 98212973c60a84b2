package problem

import (
	"fmt"
	"strings"
	"testing"

	"sailby/plan"
)

// What keeps Ines from a task at a minute: every row closes one thing, or two that are printed together (R21).
func TestWhatKeepsAStepClosed(t *testing.T) {
	const places = `places:
  shop: {open: [Mon-Fri 08:00-12:00 12:30-17:00]}
  pier:
    open: daily 07:00-22:00
    at: [57 N, 7 W]
    opening up: 20 min
    noisy work: daily 08:00-18:00
    permits: {hot work: {valid: daily 09:00-16:00}}
    workfaces: {hinge: {reach: [2027-04-06 08:00-12:00]}, dim: {daylight: yes}, tank: {closed space: yes}}`
	for _, tc := range []struct{ what, task, at, want string }{
		{"all is open", "at: pier", "04-06 10:00", ""},
		{"before the window", "at: pier", "04-05 06:30", "start: the window opens"},
		{"at night", "at: pier", "04-06 23:00", "hours: pier opens"},
		{"while it opens up", "at: pier", "04-06 07:10", "hours: opening up at pier is done"},
		{"under water", "at: pier/hinge", "04-06 13:00", "reach: pier/hinge can be reached"},
		{"too early to be loud", "at: pier, noisy: yes", "04-06 07:30", "conditions: noisy work allowed at pier"},
		{"too dark for the task", "at: pier, needs light: yes", "04-06 21:30", "conditions: daylight"},
		{"too dark for the workface", "at: pier/dim", "04-06 21:30", "conditions: daylight"},
		{"no crane", "at: pier, kit: crane", "04-06 13:00", "hire: crane is there"},
		{"no permit", "at: pier, hot work: yes, fire watch: 0 min, alone: yes", "04-06 08:30", "permit: permit hot work is valid"},
		{"two things at once", "at: pier, noisy: yes, hot work: yes, fire watch: 0 min, alone: yes", "04-06 07:30", "conditions: noisy work allowed at pier; permit: permit hot work is valid"},
		{"her own hours", "at: pier, who: Tom", "04-06 18:00", "person: Tom is on shift"},
		{"her duty is over", "at: pier", "04-06 19:30", "rest: Ines may work again (longest duty 12 h, rest 11 h, R15)"},
		{"nobody else is there", "at: pier/tank", "04-06 18:00", "person: a second person is on shift at pier"},
		{"in the shop", "at: shop", "04-02 12:15", "hours: shop opens"},
	} {
		who := ", who: Ines"
		if strings.Contains(tc.task, "who") {
			who = ""
		}
		p := compiled(t, places, "people: {Ines: {}, Tom: {hours: daily 07:00-17:00}}", "hire: {crane: {slots: [2027-04-06 08:00-12:00]}}", "tasks: {it: {hours: 10 min, "+tc.task+who+"}}")
		words := map[plan.CauseKind]string{plan.ByStart: "start", plan.ByHours: "hours", plan.ByReach: "reach", plan.ByConditions: "conditions", plan.ByHire: "hire", plan.ByPermit: "permit", plan.ByPerson: "person", plan.ByRest: "rest"}
		var got []string
		for _, c := range p.Closed(0, 0, p.at(t, tc.at)) {
			got = append(got, words[c.Kind]+": "+c.Text)
			if c.Step != 0 || c.Other != -1 || c.Pos.Line == 0 {
				t.Errorf("%s: %v does not say what it is about", tc.what, c)
			}
		}
		same(t, tc.what, strings.Join(got, "; "), tc.want)
	}
}

func TestStandingTimeIsNeverClosed(t *testing.T) {
	p := compiled(t, "tasks: {it: {at: pier, standing: 1 h}, maybe: {at: pier, hours: 1 h, chance: 5 %}}")
	for i := range p.Acts {
		if got := p.Closed(i, 0, p.at(t, "04-06 03:00")); got != nil {
			t.Errorf("%s: %v", p.Acts[i].Name, got)
		}
	}
}

func TestAReliefIsOnShiftInPlaceOfTheFirst(t *testing.T) {
	p := compiled(t, "people: {Ines: {hours: daily 07:00-13:00}, Tom: {hours: daily 11:00-17:00}}", "tasks: {it: {at: pier, hours: 8 h, may change hands: yes}}")
	a := p.activity(t, "it")
	for k, m := range a.Modes {
		got := fmt.Sprint(len(p.Closed(0, k, p.at(t, "04-06 09:00"))), len(p.Closed(0, k, p.at(t, "04-06 16:00"))), len(p.Closed(0, k, p.at(t, "04-06 18:00"))))
		want := map[string]string{"Ines": "0 1 1", "Tom": "1 0 1"}[p.People[m.Crew[0]].Name]
		if m.Relief != nil {
			want = "0 0 1"
		}
		same(t, p.People[m.Crew[0]].Name+fmt.Sprint(m.Relief), got, want)
	}
}
