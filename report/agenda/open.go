package agenda

import (
	"cmp"
	"slices"

	"sailby/plan"
	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// Gate is something that is open for part of a shift: reach of a workface, a hire, a permit.
type Gate struct {
	Name string
	Open hours.Set // inside the shift
}

// Reach gives when each workface worked in can be reached during the shift, where that is
// limited: by given access times or by tide and level, less the way off; opening up and clearing
// up are not taken off.
func Reach(w *expand.Work, s *Shift) []Gate {
	var out []Gate
	seen := map[*tasks.Workface]bool{}
	for _, e := range s.Entries {
		f := e.Step.Face
		if f == nil || seen[f] {
			continue
		}
		seen[f] = true
		if set, limited := faceReach(w, f, s.Span); limited {
			out = append(out, Gate{clean.Line(f.Name), set})
		}
	}
	return out
}

func faceReach(w *expand.Work, f *tasks.Workface, in hours.Span) (hours.Set, bool) {
	switch {
	case f.Reach != nil:
		var open []hours.Span
		for _, s := range w.Window.Slots(f.Reach) {
			s.To -= hours.Minute(f.WayOff.Value)
			open = append(open, s)
		}
		return hours.NewSet(open...).Within(in), true
	case (f.Level.Pos.Given() || f.CoversAt.Pos.Given()) && f.Place != nil && f.Place.Tide != nil && len(f.Place.Tide.Waters) > 1:
		// Asked a day wide, as far as the table goes, so that the way off is taken from the tide's end
		// and not from the shift's.
		waters := f.Place.Tide.Waters
		wide := hours.Span{From: max(in.From-1440, hours.Minute(waters[0].At)), To: min(in.To+1440, hours.Minute(waters[len(waters)-1].At))}
		spans, err := f.Place.Tide.Reach(true, f.Covers(), int64(wide.From), int64(wide.To))
		if err != nil {
			return nil, false // the table does not reach so far; the plan says so where it matters
		}
		var open []hours.Span
		for _, s := range site.WayOff(spans, int64(f.WayOff.Value), int64(wide.To)) {
			open = append(open, hours.Span{From: hours.Minute(s.From), To: hours.Minute(s.To)})
		}
		return hours.NewSet(open...).Within(in), true
	}
	return nil, false
}

// Hire gives the hired kit that is there during the shift, and hired kit that a task of the
// shift uses.
func Hire(w *expand.Work, s *Shift) []Gate {
	var out []Gate
	for _, k := range w.Job.Kit {
		if k.Slots == nil || !s.Site && k.At == nil || k.At != nil && (k.At == w.Window.Place) != s.Site {
			continue
		}
		open := w.Window.Slots(k.Slots).Within(s.Span)
		used := slices.ContainsFunc(s.Entries, func(e Entry) bool {
			return slices.ContainsFunc(e.Step.Kit, func(u expand.Use) bool { return u.Kit == k })
		})
		if open.Total() > 0 || used {
			out = append(out, Gate{clean.Line(k.Name), open})
		}
	}
	return out
}

// Permits gives the permits that work of the shift wants, with their valid hours.
func Permits(w *expand.Work, s *Shift) []Gate {
	var out []Gate
	for _, p := range s.placesOf() {
		for _, m := range p.Permits {
			wanted := slices.ContainsFunc(s.Entries, func(e Entry) bool {
				return e.Step.Place == p && slices.Contains(e.Step.Wants, m.Name)
			})
			if wanted {
				out = append(out, Gate{clean.Line(m.Name), m.Valid.Spans(s.Zone, s.Span, nil)})
			}
		}
	}
	return out
}

func (s *Shift) placesOf() []*tasks.Place {
	var out []*tasks.Place
	for _, e := range s.Entries {
		if !slices.Contains(out, e.Step.Place) {
			out = append(out, e.Step.Place)
		}
	}
	return out
}

// Sun gives sunrise and sunset at the shift's place on its day as "06:31" and "20:02"; ok is
// false where the job file gives no position or the sun does not rise or set.
func Sun(s *Shift) (rise, set string, ok bool) {
	if s.Place == nil || !s.Place.HasAt {
		return "", "", false
	}
	midnight, _ := hours.Instant(s.Date, 0, s.Zone)
	d, err := site.Sun(s.Place.Lat, s.Place.Lon, int64(midnight))
	if err != nil || !d.HasRise || !d.HasSet {
		return "", "", false
	}
	return Clock(hours.Minute(d.Rise), s.Zone), Clock(hours.Minute(d.Set), s.Zone), true
}

// SunWords says when the sun is up at the shift's place on its day: "sun 06:31 to 20:02", "sun up all day", "sun
// not up all day, light enough from 10:20 to 13:40"; "" where the job file gives no position.
func SunWords(s *Shift) string {
	if rise, set, ok := Sun(s); ok {
		return "sun " + rise + " to " + set
	}
	if s.Place == nil || !s.Place.HasAt {
		return ""
	}
	midnight, _ := hours.Instant(s.Date, 0, s.Zone)
	d, err := site.Sun(s.Place.Lat, s.Place.Lon, int64(midnight))
	clock := func(m site.Minute) string { return Clock(hours.Minute(m), s.Zone) }
	switch {
	case err != nil:
		return ""
	case d.PolarDay:
		return "sun up all day"
	case d.PolarNight && d.HasDawn && d.HasDusk:
		return "sun not up all day, light enough to work from " + clock(d.CivilDawn) + " to " + clock(d.CivilDusk)
	case d.PolarNight:
		return "sun not up all day, no light"
	case d.HasRise:
		return "sun from " + clock(d.Rise) + " on"
	case d.HasSet:
		return "sun until " + clock(d.Set)
	}
	return ""
}

// Ready is a step that could be worked in a shift before its time, from a moment on.
type Ready struct {
	Step *expand.Step
	From hours.Minute
}

// Spare lists steps that could be worked in the shift if it has to stop: planned for later, at
// the shift's places, with tickets that people in the shift hold, and with all that they wait for
// finished, by the plan, an hour before the shift ends. At most that many are given, those ready first
// at the front. Reach and states are not asked: people on the spot see them.
func Spare(a *plan.Answer, s *Shift, most int) []Ready {
	w := a.Work
	var out []Ready
	for i, st := range w.Steps {
		if i >= len(a.Plan.Steps) {
			break
		}
		if st.Absent || st.Class != expand.Hands || a.Plan.Steps[i].Start < s.To || !slices.Contains(s.placesOf(), st.Place) ||
			hiredOnly(st) || !s.canDo(w.Job, st) {
			continue
		}
		from := max(s.From, st.NotBefore)
		for _, l := range w.Links {
			if l.To != st || l.From == nil || l.From.Index >= len(a.Plan.Steps) {
				continue
			}
			at := a.Plan.Steps[l.From.Index].Finish
			if l.FromEnd == tasks.Start {
				at = a.Plan.Steps[l.From.Index].Start
			}
			if l.Min > 0 {
				at += hours.Minute(l.Min)
			}
			from = max(from, at)
		}
		if from+60 <= s.To {
			out = append(out, Ready{st, from})
		}
	}
	slices.SortStableFunc(out, func(x, y Ready) int { return cmp.Compare(x.From, y.From) })
	return out[:min(len(out), most)]
}

func hiredOnly(s *expand.Step) bool {
	return slices.ContainsFunc(s.Kit, func(u expand.Use) bool { return u.Kit != nil && u.Kit.Slots != nil })
}

// canDo says whether for each need of the step somebody in the shift has the ticket by name.
func (s *Shift) canDo(job *tasks.Job, st *expand.Step) bool {
	for _, n := range st.Needs {
		if !slices.ContainsFunc(s.People, func(p Person) bool { return holds(job, p.Name, n) }) {
			return false
		}
	}
	return true
}

func holds(job *tasks.Job, name string, n tasks.Need) bool {
	if n.Who != nil {
		return slices.Contains(n.Who, name)
	}
	if n.Ticket.Name == "" {
		return true
	}
	for _, p := range job.People {
		if p.Name == name {
			return slices.ContainsFunc(p.Tickets, func(t tasks.Ticket) bool {
				return t.Name == n.Ticket.Name && (t.Process == "" || n.Ticket.Process == "" || t.Process == n.Ticket.Process)
			})
		}
	}
	return false
}
