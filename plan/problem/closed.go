package problem

import (
	"fmt"

	"sailby/plan"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// Closed says what keeps a step from being worked in the minute that begins at t by the people
// of a mode: nil where it is open to them.
func (p *Problem) Closed(i, mode, t int) []plan.Cause {
	a := &p.Acts[i]
	s := a.Step
	if s == nil || s.Class != expand.Hands || s.Absent {
		return nil
	}
	if cal := a.Modes[mode].Time.Calendar(); cal != nil && cal.Has(hours.Minute(t)) {
		return nil
	}
	g, at := p.ground, p.Base+hours.Minute(t)
	var out []plan.Cause
	add := func(kind plan.CauseKind, name, format string, args ...any) {
		out = append(out, plan.Cause{Kind: kind, Step: i, Other: -1, Name: name, Text: fmt.Sprintf(format, args...), Pos: s.Place.OpenPos})
	}
	place := s.Place.Name
	switch {
	case s.Site && at < p.Work.Window.Opens:
		add(plan.ByStart, place, "the window opens")
		out[len(out)-1].Pos = p.Work.Window.Pos
		return out
	case !g.open[s.Place].Has(at):
		add(plan.ByHours, place, "%s opens", place)
	case !g.face[s.Place].Has(at):
		add(plan.ByHours, place, "opening up at %s is done", place)
	}
	if r, limited := g.reach[s.Face]; s.Face != nil && limited && !r.Has(at) {
		add(plan.ByReach, s.Face.Name, "%s/%s can be reached", place, s.Face.Name)
		out[len(out)-1].Pos = s.Face.ReachPos
	}
	if n, limited := g.noise[s.Place]; s.Noisy && limited && !n.Has(at) {
		add(plan.ByConditions, "noise", "noisy work allowed at %s", place)
	}
	if (s.Light || s.Face != nil && s.Face.Light) && !g.light[s.Place].Has(at) {
		add(plan.ByConditions, "light", "daylight")
	}
	for _, shut := range g.weather(s) {
		if shut.From <= int64(at) && int64(at) < shut.To {
			add(plan.ByConditions, "weather", "closed before it: %s", shut.Why)
			if s.Place.Climate != nil {
				out[len(out)-1].Pos = s.Place.Climate.Pos
			}
			break
		}
	}
	for _, u := range s.Kit {
		if slots, hired := g.hire[u.Kit]; hired && !slots.Has(at) {
			add(plan.ByHire, u.Kit.Name, "%s is there", u.Kit.Name)
			out[len(out)-1].Pos = u.Kit.Pos
		}
	}
	for _, name := range s.Wants {
		if v, ok := g.valid[s.Place][name]; ok && !v.Has(at) {
			add(plan.ByPermit, name, "permit %s is valid", name)
		}
	}
	md := &a.Modes[mode]
	for k, c := range md.Crew {
		if md.Relief != nil && k < len(md.Relief) && p.People[md.Relief[k]].Shifts[s.Place].Has(hours.Minute(t)) {
			continue
		}
		if !p.People[c].Shifts[s.Place].Has(hours.Minute(t)) && (len(out) == 0 || p.ownHours(c) && !g.own[c][s.Place].Has(at)) {
			add(plan.ByPerson, p.People[c].Name, "%s is on shift", p.People[c].Name)
			if g.own[c][s.Place].Has(at) { // there and willing: duty and rest keep them off
				out[len(out)-1].Kind = plan.ByRest
				out[len(out)-1].Text = fmt.Sprintf("%s may work again (longest duty %s, rest %s, R15)", p.People[c].Name,
					quantity.Hours(int(p.Work.Job.Duty.Value)), quantity.Hours(int(p.Work.Job.Rest.Value)))
			}
			out[len(out)-1].Pos = p.Work.Job.People[c].Pos
		}
	}
	if len(out) == 0 && s.Lone {
		add(plan.ByPerson, "company", "a second person is on shift at %s", place)
	}
	return out
}

// ownHours says whether a person's hours differ from the opening hours of places.
func (p *Problem) ownHours(c int) bool {
	person := p.Work.Job.People[c]
	return person.Hours != nil || person.Outside || person.From != nil
}
