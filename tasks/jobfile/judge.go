package jobfile

import (
	"slices"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

func trim(v float64) string { return origin.Trim(v) }

// judge makes the checks that need the whole job.
func (r *reader) judge() {
	r.judgePeople()
	r.judgeMoments()
	r.judgeNeeds()
	r.judgeCrew()
	r.judgeStates()
	r.judgeCycles()
	r.judgeDeadlines()
	r.judgeStays()
	r.judgeTides()
	r.judgeSea()
	r.judgeTasks()
}

// judgeDeadlines reports deadlines that lie outside every window, and starts after deadlines.
func (r *reader) judgeDeadlines() {
	for _, d := range r.drafts {
		t := d.t
		if t.Place == nil || t.Place != r.site || len(r.windows) == 0 {
			continue
		}
		for _, m := range []struct {
			key    string
			moment *tasks.Moment
		}{{"must be done by", t.Deadline}, {"not before", t.NotBefore}} {
			if m.moment == nil {
				continue
			}
			inside := slices.ContainsFunc(r.windows, func(w window) bool { _, _, times := w.at(m.moment); return times != 1 }) // reported
			for _, w := range r.windows {
				at, _, times := w.at(m.moment)
				inside = inside || times == 1 && at > w.opens && at <= w.closes || m.key == "not before" && at <= w.opens
			}
			if !inside {
				w := r.windows[0]
				r.faultAt(m.moment.Pos, "look at the date, or leave it out", "%s%s lies outside %s (%s to %s)", d.f.lead(m.key), short(m.moment.Text), w.what,
					w.opens.In(w.zone).Format("2006-01-02 15:04"), w.closes.In(w.zone).Format("2006-01-02 15:04"))
			}
		}
	}
	for _, d := range r.drafts {
		if t := d.t; t.Deadline != nil && t.NotBefore != nil && t.Deadline.Zone != nil {
			for _, w := range r.windows {
				a, _, n1 := w.at(t.NotBefore)
				b, _, n2 := w.at(t.Deadline)
				if n1 == 1 && n2 == 1 && a > b {
					r.faultAt(t.Deadline.Pos, "look at both dates", "%sit may not start before %s, %s later", d.f.lead("must be done by"), short(t.NotBefore.Text), quantity.Span(int(a-b)))
					break
				}
			}
		}
	}
}

// judgeStays reports people who are named for work where they never are, and who leave before
// they come.
func (r *reader) judgeStays() {
	byName := map[string]*tasks.Person{}
	for _, p := range r.job.People {
		byName[p.Name] = p
		for _, w := range r.windows {
			if p.From == nil || p.Until == nil || p.From.Zone == nil {
				break
			}
			a, _, n1 := w.at(p.From)
			b, _, n2 := w.at(p.Until)
			if n1 == 1 && n2 == 1 && b <= a {
				r.faultAt(p.Until.Pos, "look at both dates", "person %q: until: they are there until %s, before they come %s", p.Name, p.Until.Text, p.From.Text)
				break
			}
		}
	}
	for _, d := range r.drafts {
		if d.t.Place == nil {
			continue
		}
		for _, ref := range d.f.names("who") {
			p := byName[ref.text]
			if p != nil && p.Places != nil && !slices.Contains(p.Places, d.t.Place.Name) {
				r.faultAt(ref.pos, "name somebody else, or add the place to their `places`", "%s%s works only at %s, not at %s", d.f.lead("who"), p.Name, list(p.Places, 6), d.t.Place.Name)
			}
		}
	}
}

// judgeTides reports tide tables that end before a window does.
func (r *reader) judgeTides() {
	for _, p := range r.job.Places {
		needs := slices.ContainsFunc(p.Workfaces, func(w *tasks.Workface) bool { return w.Level.Pos.Given() || w.CoversAt.Pos.Given() })
		if p.Tide == nil || !needs || p != r.site {
			continue
		}
		first, last := hours.Minute(p.Tide.Waters[0].At), hours.Minute(p.Tide.Waters[len(p.Tide.Waters)-1].At)
		for _, w := range r.windows {
			if first > w.opens || last < w.closes {
				r.faultAt(p.Pos, "get a table for all days of the window, with a tide before and after", "place %q: its tide table runs from %s to %s, %s from %s to %s", p.Name,
					first.In(p.Zone).Format("2006-01-02 15:04"), last.In(p.Zone).Format("2006-01-02 15:04"), w.what,
					w.opens.In(p.Zone).Format("2006-01-02 15:04"), w.closes.In(p.Zone).Format("2006-01-02 15:04"))
				break
			}
		}
	}
}

// judgeTasks makes the checks between tasks.
func (r *reader) judgeTasks() {
	groups := map[string]int{}
	for _, d := range r.drafts {
		if d.t.Group != "" && d.t.Chance > 0 {
			groups[d.t.Group]++
		}
	}
	sums := map[string]float64{}
	for _, d := range r.drafts {
		g := d.t.Group
		if g == "" || d.t.Chance == 0 {
			continue
		}
		sums[g] += d.t.Chance
		if groups[g] == 1 {
			r.faultAt(d.t.Pos, "give the others the same `group`, or leave it out", "%sgroup %q has one task: of a group exactly one happens", d.f.lead(""), g)
		} else if sums[g] > 1.0001 {
			r.faultAt(d.t.Pos, "let the chances of a group come to 100 %", "%sthe chances of group %q come to more than 100 %%", d.f.lead(""), g)
			sums[g] = -1000
		}
	}
	if len(r.drafts) == 0 && !slices.ContainsFunc(r.faults, func(f tasks.Fault) bool { return true }) {
		r.faultAt(tasks.Pos{File: r.name, Line: 1, Col: 1}, "add `tasks`", "the job has no task")
	}
}
