package agenda_test

import (
	"strings"
	"testing"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Seven hours at a stretch are told with the name and the time; six are not, nor seven with a break of twenty
// minutes in them.
func TestNoMeals(t *testing.T) {
	for _, c := range []struct {
		what   string
		pieces []hours.Span
		want   string
	}{
		{"seven hours", []hours.Span{{From: 0, To: 420}}, "bridge gives no break: by this plan Ada works 7 h at a stretch, from Fri 4 Jun 21:00 on."},
		{"six hours", []hours.Span{{From: 0, To: 360}}, ""},
		{"a break in them", []hours.Span{{From: 0, To: 240}, {From: 260, To: 440}}, ""},
		{"too short a break", []hours.Span{{From: 0, To: 240}, {From: 259, To: 440}}, "Ada works 7 h 20 min at a stretch"},
	} {
		w := bridge(t, "always", &tasks.Person{Name: "Ada"})
		s := &expand.Step{Task: &tasks.Task{Name: "cut"}, Place: w.Window.Place, Class: expand.Hands, Site: true, Working: 60}
		w.Steps = []*expand.Step{s}
		ps := plan.Step{People: []string{"Ada"}}
		for _, p := range c.pieces {
			ps.Pieces = append(ps.Pieces, hours.Span{From: w.Window.Opens + p.From, To: w.Window.Opens + p.To})
		}
		ps.Start, ps.Finish = ps.Pieces[0].From, ps.Pieces[len(ps.Pieces)-1].To
		got := strings.Join(agenda.NoMeals(&plan.Answer{Work: w, Plan: &plan.Plan{Steps: []plan.Step{ps}}}), "\n")
		if c.want == "" && got != "" || !strings.Contains(got, c.want) {
			t.Errorf("%s: says %q, want %q", c.what, got, c.want)
		}
	}
}
