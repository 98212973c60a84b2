package agenda_test

import (
	"testing"

	"sailby/report/agenda"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// A remnant of under five minutes is joined to its neighbour over the meal; a start or an end is never
// moved, and nothing is joined over other work, a night, or between other people.
func TestRemnantsAreJoined(t *testing.T) {
	st, other := &expand.Step{}, &expand.Step{Index: 1}
	piece := func(n int, from, to hours.Minute, who ...string) agenda.Entry {
		return agenda.Entry{Span: hours.Span{From: from, To: to}, Step: st, Piece: n, People: who}
	}
	busy := agenda.Entry{Span: hours.Span{From: 755, To: 770}, Step: other, People: []string{"Ada"}}
	for name, c := range map[string]struct {
		in   []agenda.Entry
		want []hours.Span
	}{
		"before the meal":  {[]agenda.Entry{piece(0, 748, 750, "Ada"), piece(1, 780, 860, "Ada")}, []hours.Span{{From: 748, To: 860}}},
		"after the meal":   {[]agenda.Entry{piece(0, 700, 750, "Ada"), piece(1, 780, 781, "Ada")}, []hours.Span{{From: 700, To: 781}}},
		"five minutes":     {[]agenda.Entry{piece(0, 700, 750, "Ada"), piece(1, 780, 785, "Ada")}, []hours.Span{{From: 700, To: 750}, {From: 780, To: 785}}},
		"over a night":     {[]agenda.Entry{piece(0, 1000, 1002, "Ada"), piece(1, 1900, 1960, "Ada")}, []hours.Span{{From: 1000, To: 1002}, {From: 1900, To: 1960}}},
		"lent out between": {[]agenda.Entry{piece(0, 748, 750, "Ada"), busy, piece(1, 780, 860, "Ada")}, []hours.Span{{From: 748, To: 750}, busy.Span, {From: 780, To: 860}}},
		"another person":   {[]agenda.Entry{piece(0, 748, 750, "Ada"), piece(1, 780, 860, "Bo")}, []hours.Span{{From: 748, To: 750}, {From: 780, To: 860}}},
	} {
		got := agenda.Merged(c.in)
		if len(got) != len(c.want) {
			t.Errorf("%s: %d entries, want %d", name, len(got), len(c.want))
			continue
		}
		for i, e := range got {
			if e.Span != c.want[i] {
				t.Errorf("%s: entry %d is %v, want %v", name, i, e.Span, c.want[i])
			}
		}
	}
	e := agenda.Merged([]agenda.Entry{piece(0, 748, 750, "Ada"), piece(1, 780, 860, "Ada")})[0]
	if got := agenda.Breaks(e, nil); got != "break 12:30-13:00" {
		t.Errorf("the pause is written %q", got)
	}
}

// A piece of 2 min at the end of a day keeps its time and says how short it is; one of 5 min, a whole short task, and
// a fire watch say nothing.
func TestSliver(t *testing.T) {
	for _, c := range []struct {
		e    agenda.Entry
		want string
	}{
		{agenda.Entry{Span: hours.Span{From: 1078, To: 1080}, Goes: true}, "only 2 min here"},
		{agenda.Entry{Span: hours.Span{From: 480, To: 484}, From0: true}, "only 4 min here"},
		{agenda.Entry{Span: hours.Span{From: 1075, To: 1080}, Goes: true}, ""},
		{agenda.Entry{Span: hours.Span{From: 480, To: 482}}, ""},
		{agenda.Entry{Span: hours.Span{From: 480, To: 482}, Goes: true, Watch: true}, ""},
	} {
		if got := agenda.Sliver(c.e); got != c.want {
			t.Errorf("%v: %q, want %q", c.e.Span, got, c.want)
		}
	}
}
