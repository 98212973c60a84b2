package limits

import (
	"fmt"
	"sort"
	"strings"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// places lists the hours that the places of the steps have, and what closes them beside.
func (l *lister) places() {
	for i, p := range l.w.Job.Places {
		if !l.any(func(s *expand.Step) bool { return s.Place == p && len(s.Needs) > 0 }) {
			continue
		}
		l.conditions(i, p)
		l.opening(i, p)
	}
	for i, k := range l.w.Job.Kit {
		if k.Slots != nil && (l.any(func(s *expand.Step) bool { return uses(s, k) }) || k.Gives > 0 && l.any(func(s *expand.Step) bool { return s.Power > 0 })) {
			l.add(plan.Limit{Kind: plan.LimitHire, Kit: k}, k.Keys.At("slots", k.Pos), func(c *slice) { c.work.Job.Kit[i].Slots = nil },
				"%s is there only %s", k.Name, slots(l.w.Window.Slots(k.Slots), l.w.Window.Place))
		}
	}
}

// conditions lists permits, noise, light, weather and reach.
func (l *lister) conditions(i int, p *tasks.Place) {
	place := func(c *slice) *tasks.Place { return c.work.Job.Places[i] }
	for k := range p.Permits {
		pm := &p.Permits[k]
		if l.any(func(s *expand.Step) bool { return s.Place == p && has(s.Wants, pm.Name) }) {
			l.add(plan.Limit{Kind: plan.LimitPermit, Place: p, Permit: pm}, pm.Pos, func(c *slice) {
				place(c).Permits[k].Valid, place(c).Permits[k].Issue.Value = hours.Always, 0
			}, "permit %s is valid %s%s", pm.Name, pm.Valid, less(int(pm.Issue.Value), "to issue it"))
		}
	}
	if p.Noisy != nil && l.any(func(s *expand.Step) bool { return s.Place == p && s.Noisy }) {
		l.add(plan.Limit{Kind: plan.LimitNoisy, Place: p}, p.Keys.At("noisy work", p.Pos), func(c *slice) { place(c).Noisy = nil }, "noisy work at %s only %s", p.Name, p.Noisy)
	}
	for _, s := range l.steps {
		if s.Place == p && !s.Absent && (s.Light || s.Face != nil && s.Face.Light) {
			pos := s.Task.Keys.At("daylight", s.Task.Pos)
			if s.Face != nil && s.Face.Light {
				pos = s.Face.Keys.At("daylight", s.Face.Pos)
			}
			l.add(plan.Limit{Kind: plan.LimitDaylight, Step: s}, pos, func(c *slice) {
				q := c.steps[s]
				q.Light = false
				if q.Face != nil {
					bright := *q.Face // the others of the workface still need light
					bright.Light = false
					q.Face = c.twin(q.Face, &bright)
				}
			}, "%s needs daylight", Name(s))
		}
	}
	if p.Climate != nil && p.Climate.Hourly != nil && l.any(func(s *expand.Step) bool { return s.Place == p && (s.Paint != nil || s.Task.Kind == tasks.Prep) }) {
		l.add(plan.Limit{Kind: plan.LimitWeather, Place: p}, p.Climate.Pos, func(c *slice) { place(c).Climate = nil }, "the weather at %s closes hours to coats and surface prep (R25)", p.Name)
	}
	for k, f := range p.Workfaces {
		if l.any(func(s *expand.Step) bool { return s.Face == f }) {
			l.reach(i, k, f)
		}
	}
}

// twin puts a changed workface beside the others of its place.
func (s *slice) twin(old, changed *tasks.Workface) *tasks.Workface {
	old.Place.Workfaces = append(old.Place.Workfaces, changed)
	changed.NextTo = append(append([]string(nil), changed.NextTo...), old.Name)
	return changed
}

// reach lists when a workface can be reached.
func (l *lister) reach(i, k int, f *tasks.Workface) {
	face := func(c *slice) *tasks.Workface { return c.work.Job.Places[i].Workfaces[k] }
	name := f.Place.Name + "/" + f.Name
	if f.Dry != nil {
		l.add(plan.Limit{Kind: plan.LimitDry, Face: f, Place: f.Place}, f.Keys.At("dry hours", f.Pos), func(c *slice) { face(c).Dry = nil },
			"%s is dry only %s", name, slots(l.w.Window.Slots(f.Dry), f.Place))
	}
	tidal := (f.Level.Pos.Given() || f.CoversAt.Pos.Given()) && f.Place.Tide != nil
	if !tidal && f.Reach == nil {
		return
	}
	pos, text := f.ReachPos, ""
	if f.Reach != nil {
		text = name + " can be reached only " + slots(l.w.Window.Slots(f.Reach), f.Place)
	}
	if tidal {
		pos = f.Keys.At("covers at", f.Keys.At("level", f.Pos))
		if text = fmt.Sprintf("%s can be reached only while the water is below %g m", name, f.Covers()); f.Reach != nil {
			text += ", and in the slots of its reach"
		}
	}
	for _, t := range []struct {
		minutes float64
		what    string
	}{{f.WayOff.Value, "to be off before the water"}, {f.OpeningUp.Value, "opening up"}, {f.ClearingUp.Value, "clearing up"}} {
		text += less(int(t.minutes), t.what)
	}
	l.add(plan.Limit{Kind: plan.LimitReach, Face: f, Place: f.Place}, pos, func(c *slice) {
		q := face(c)
		q.Reach, q.Level, q.CoversAt, q.Tidal = nil, tasks.Amount{}, tasks.Amount{}, false
	}, "%s", text)
}

// opening lists the hours of a place.
func (l *lister) opening(i int, p *tasks.Place) {
	place := func(c *slice) *tasks.Place { return c.work.Job.Places[i] }
	if up, down := int(p.OpeningUp.Value), int(p.ClearingUp.Value); up+down > 0 {
		pos := p.OpeningUp.Pos
		if !pos.Given() {
			pos = p.ClearingUp.Pos
		}
		l.add(plan.Limit{Kind: plan.LimitUp, Place: p}, pos, func(c *slice) { place(c).OpeningUp.Value, place(c).ClearingUp.Value = 0, 0 },
			"opening up at %s takes %s, clearing up %s", p.Name, span(up), span(down))
	}
	var days []string
	for d, why := range p.Closed {
		text := d.String()
		if why != "" {
			text += " (" + why + ")"
		}
		days = append(days, text)
	}
	if len(days) > 0 {
		sort.Strings(days)
		if len(days) > 6 {
			days = append(days[:5], fmt.Sprintf("and %d days more", len(days)-5))
		}
		l.add(plan.Limit{Kind: plan.LimitClosed, Place: p}, p.Keys.At("closed", p.Keys.At("closed on holidays", p.Pos)), func(c *slice) { place(c).Closed = nil },
			"%s is closed on %s", p.Name, strings.Join(days, ", "))
	}
	if p.Open.String() != "always" {
		l.add(plan.Limit{Kind: plan.LimitHours, Place: p}, p.OpenPos, func(c *slice) { place(c).Open = hours.Always }, "%s is open %s", p.Name, p.Open)
	}
}

func less(minutes int, what string) string {
	if minutes <= 0 {
		return ""
	}
	return fmt.Sprintf(", less %s %s", span(minutes), what)
}

func has(list []string, word string) bool {
	for _, w := range list {
		if w == word {
			return true
		}
	}
	return false
}
