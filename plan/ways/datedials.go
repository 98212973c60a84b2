package ways

import (
	"fmt"
	"time"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/hours"
)

// date moves a date of the job file: of a task, of a person, the begin of work at home.
func (d *dialer) date(l plan.Limit) {
	var m *tasks.Moment
	var path []string
	var pos tasks.Pos
	what, way := "", 1
	zone := d.a.Work.Window.Place.Zone
	switch l.Kind {
	case plan.LimitNotBefore:
		t := l.Step.Task
		m, path, pos, way = t.NotBefore, append(taskPath(t), "not before"), t.Pos, -1
		what = named(t) + " free to begin"
	case plan.LimitDeadline:
		t := l.Step.Task
		m, path, pos = t.Deadline, append(taskPath(t), "must be done by"), t.Pos
		what = "the deadline of " + named(t)
	case plan.LimitPersonFrom:
		m, path, pos, way = l.Person.From, []string{"people", l.Person.Name, "from"}, l.Person.Pos, -1
		what = l.Person.Name + " there"
	case plan.LimitPersonUntil:
		m, path, pos = l.Person.Until, []string{"people", l.Person.Name, "until"}, l.Person.Pos
		what = l.Person.Name + " there until"
	case plan.LimitBegin:
		m, path, pos, way = d.job.Begin, []string{"begin"}, d.job.Pos, -1
		what = "work at home begun"
	}
	if m == nil {
		return
	}
	at, ok := d.at(*m)
	if !ok {
		return
	}
	if m.Zone != nil {
		zone = m.Zone
	}
	key := path[len(path)-1]
	moved := func(n int) hours.Minute { return at + hours.Minute(way*n) }
	word := "later"
	if way < 0 {
		word = "earlier"
	}
	d.add(l, dial{relaxes: true, pos: m.Pos, was: key + ": " + m.Text, steps: minuteSteps(mostLater),
		says:   func(n int) string { return fmt.Sprintf("%s %s %s: %s", what, span(n), word, when(moved(n), zone)) },
		writes: func(n int) string { return key + ": " + stamp(moved(n), zone) },
		sets:   func(n int) ([]tasks.Setting, bool) { return one(set(d.job, pos, stamp(moved(n), zone), path...)) }})
}

// window moves one end of the window: of a plain one its date, of a trip its legs there or back.
func (d *dialer) window(l plan.Limit) {
	w := d.a.Work
	if w.Trip != nil {
		d.legs(l, w.Trip)
		return
	}
	zone, name := w.Window.Place.Zone, w.Window.Place.Name
	key, way, at, word := "closes", 1, w.Window.Closes, "closing"
	switch l.Kind {
	case plan.LimitOpens:
		key, way, at, word = "opens", -1, w.Window.Opens, "opening"
	case plan.LimitLeaves:
		key, way, at, word = "opens", 1, w.Window.Opens, "opening"
	}
	moved := func(n int) hours.Minute { return at + hours.Minute(way*n) }
	side := "later"
	if way < 0 {
		side = "earlier"
	}
	pos := w.Window.Pos
	if d.job.Window != nil {
		pos = d.job.Window.Keys.At(key, pos)
	}
	d.add(l, dial{relaxes: l.Kind != plan.LimitLeaves, pos: pos, was: key + ": " + stamp(at, zone), steps: minuteSteps(mostLater),
		says: func(n int) string {
			return fmt.Sprintf("the window at %s %s %s %s: %s", name, word, span(n), side, when(moved(n), zone))
		},
		writes: func(n int) string { return key + ": " + stamp(moved(n), zone) },
		sets:   func(n int) ([]tasks.Setting, bool) { return one(set(d.job, pos, stamp(moved(n), zone), "window", key)) }})
}

// leg is one time of a trip that the job file gives.
type leg struct {
	key  string
	at   hours.Minute
	zone *time.Location
}

// legs moves all times of a trip's way there or back.
func (d *dialer) legs(l plan.Limit, t *tasks.Trip) {
	out := l.Kind != plan.LimitCloses
	way, side, what, keys, legs := 1, "back", "the way back of trip", t.BackKeys, t.Back
	here, there := d.a.Work.Window.Place.Zone, d.job.Zone // where it begins, where it ends
	first, last := t.Departs, t.Home
	word := "later"
	if out {
		side, what, keys, legs, here, there = "out", "the way out of trip", t.OutKeys, t.Out, there, here
		first, last = t.Leaves, t.Arrives
		if l.Kind == plan.LimitOpens {
			way, word = -1, "earlier"
		}
	}
	if _, own := keys["sail zone"]; own {
		return
	}
	if _, own := keys["land zone"]; own {
		return
	}
	var list []leg
	note := func(key string, at hours.Minute, zone *time.Location) {
		if _, given := keys[key]; given {
			list = append(list, leg{key, at, zone})
		}
	}
	for _, g := range legs {
		if g.What == "sail" {
			note("sail", g.From, here)
			note("land", g.To, there)
		}
	}
	note("leave", first, here)
	note("arrive", last, there)
	if len(list) == 0 {
		return
	}
	write := func(n int) string {
		s := side + ": "
		for i, g := range list {
			if i > 0 {
				s += ", "
			}
			s += g.key + " " + stamp(g.at+hours.Minute(way*n), g.zone)
		}
		return s
	}
	d.add(l, dial{relaxes: l.Kind != plan.LimitLeaves, pos: t.Keys.At(side, t.Pos), was: write(0), steps: minuteSteps(mostLater), writes: write,
		says: func(n int) string { return fmt.Sprintf("%s %s %s %s", what, t.Name, span(n), word) },
		sets: func(n int) ([]tasks.Setting, bool) {
			var sets []tasks.Setting
			for _, g := range list {
				sets = append(sets, set(d.job, t.Pos, stamp(g.at+hours.Minute(way*n), g.zone), "trips", t.Name, side, g.key))
			}
			return sets, true
		}})
}
