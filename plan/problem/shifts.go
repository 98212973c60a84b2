package problem

import (
	"sort"

	"sailby/tasks"
	"sailby/tasks/hours"
)

// people lays out everybody's shifts (R1, R15).
func (g *ground) people() []Person {
	out := make([]Person, len(g.work.Job.People))
	for i, p := range g.work.Job.People {
		at := g.hoursOf(p)
		g.own = append(g.own, at)
		var duty hours.Set
		for _, set := range at {
			duty = duty.Or(set)
		}
		out[i] = Person{Name: p.Name, Outside: p.Outside, Shifts: map[*tasks.Place]hours.Set{}}
		var shifts hours.Set
		if p.Outside {
			shifts = duty
		} else {
			shifts = g.shifts(duty, hours.NewSet(g.work.Travel[p.Name]...))
		}
		for place, set := range at {
			out[i].Shifts[place] = set.And(shifts)
			out[i].Hours = out[i].Hours.Or(out[i].Shifts[place])
		}
	}
	return out
}

// hoursOf gives the minutes in which p is at each open place in own hours.
func (g *ground) hoursOf(p *tasks.Person) map[*tasks.Place]hours.Set {
	at := map[*tasks.Place]hours.Set{}
	if p.Outside {
		for _, place := range g.work.Job.Places {
			if len(p.Places) == 0 && place == g.work.Window.Place || len(p.Places) > 0 && p.Places[0] == place.Name {
				at[place] = g.open[place].And(g.work.Window.Slots(p.Booked))
			}
		}
		return at
	}
	for _, place := range g.work.Job.Places {
		if len(p.Places) > 0 && !contains(p.Places, place.Name) {
			continue
		}
		var there []hours.Span
		for _, stay := range g.work.Presence[p.Name] {
			if stay.Site == (place == g.work.Window.Place) {
				there = append(there, stay.Span)
			}
		}
		set := g.open[place].And(hours.NewSet(there...))
		if p.Hours != nil || len(p.Off) > 0 {
			own := p.Hours
			if own == nil {
				own = hours.Always
			}
			set = set.And(own.Spans(place.Zone, g.span, func(d hours.Date) bool { return p.Off[d] }))
		}
		at[place] = set
	}
	return at
}

// shifts cuts hours so that no shift is longer than the longest duty and rests lie between
// them (R15); legs of the trip are duty too, and come first.
func (g *ground) shifts(work, travel hours.Set) hours.Set {
	duty, rest := hours.Minute(g.work.Job.Duty.Value), hours.Minute(g.work.Job.Rest.Value)
	for _, legs := range travel.Joined(int(rest)-1, nil) {
		start := min(legs.From, legs.To-duty)
		start, _ = work.Or(hours.Set{legs}).Next(start)
		work = work.Less(hours.Set{{From: start - rest, To: start}})
	}
	all := work.Or(travel)
	var out []hours.Span
	for i, t := 0, hours.Never; i < len(all); {
		if all[i].To <= t {
			i++
			continue
		}
		start := max(t, all[i].From)
		stop := start + duty
		for _, leg := range travel { // legs are not cut: the shift lasts at least to their end
			if leg.From <= stop && leg.To > stop && leg.From >= start {
				stop = leg.To
			}
		}
		end := start
		for i < len(all) && all[i].From < stop && (end == start || all[i].From-end < rest) {
			end = min(all[i].To, stop)
			out = append(out, hours.Span{From: max(start, all[i].From), To: end})
			if all[i].To > stop {
				break
			}
			i++
		}
		t = end + rest
	}
	return hours.NewSet(out...).And(work)
}

func contains(list []string, word string) bool {
	for _, w := range list {
		if w == word {
			return true
		}
	}
	return false
}

// company gives the minutes in which at least one inside person other than those of crew is on
// shift at place, or in which at least two of the crew are (R14).
func company(people []Person, crew []int, place *tasks.Place) hours.Set {
	inside := 0
	for _, c := range crew {
		if !people[c].Outside {
			inside++
		}
	}
	if inside >= 2 {
		return nil
	}
	var set hours.Set
	for i := range people {
		if !people[i].Outside && !has(crew, i) {
			set = set.Or(people[i].Shifts[place])
		}
	}
	if set == nil {
		set = hours.Set{}
	}
	return set
}

func has(list []int, x int) bool {
	i := sort.SearchInts(list, x)
	if i < len(list) && list[i] == x {
		return true
	}
	for _, v := range list {
		if v == x {
			return true
		}
	}
	return false
}
