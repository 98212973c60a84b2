package packlist

import (
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/lift"
)

const (
	wheelBreak = 45     // minutes off the wheel that count as a break
	nightRest  = 8 * 60 // a gap in work from which on it is another day's work
)

// driving flags what the rules of the job file say of the drivers' days, on the way out and on the way back.
func (m *maker) driving() {
	if m.w.Trip == nil || len(m.job.Driving) == 0 {
		return
	}
	m.judgeDriving(m.w.Trip.Out, " on the way out", 0)
	m.judgeDriving(m.w.Trip.Back, " on the way back", 0)
}

// drivingRuns flags what n runs in one day would come to.
func (m *maker) drivingRuns(n int) {
	if m.w.Trip == nil || len(m.job.Driving) == 0 {
		return
	}
	w := wayOf(m.w.Trip)
	if w.boat {
		return // not in one day
	}
	m.judgeDriving(m.w.Trip.Out, " with all runs in one day", (w.wheelThere+w.wheelBack)*hours.Minute(n-1))
}

// judgeDriving judges the legs of one way; more is further time at the wheel that day.
func (m *maker) judgeDriving(legs []tasks.Leg, which string, more hours.Minute) {
	if len(legs) == 0 {
		return
	}
	var d lift.Duty
	run := 0.0
	for _, l := range legs {
		length := float64(l.To - l.From)
		if strings.HasPrefix(l.What, "drive") {
			d.Drive += length
			run += length
			d.LongestDrive = max(d.LongestDrive, run)
		} else if length >= wheelBreak {
			run = 0
		}
	}
	d.Drive += float64(more)
	for _, v := range m.job.Vehicles {
		if v.TowedBy != "" {
			continue
		}
		one := d
		one.Driver, one.Gross, one.OwnWorkTools = v.Driver, v.Gross, v.OwnTools
		duty, rest := m.dutyAround(v.Driver, hours.Span{From: legs[0].From, To: legs[len(legs)-1].To})
		one.OnDuty, one.RestBefore = float64(duty+more), float64(rest)
		if one.Driver == "" {
			one.Driver = "the driver of " + v.Name
		}
		if one.Gross == 0 {
			one.Gross = v.Empty + v.Payload
		}
		for _, t := range m.job.Vehicles {
			if t.TowedBy == v.Name {
				one.Gross += max(t.Gross, t.Empty+t.Payload)
			}
		}
		for _, f := range lift.Driving(one, m.job.Driving) {
			m.flag(f + which + "; check it, it is not decided here")
		}
	}
}

// dutyAround gives how long a driver is on duty around a way, with the work that the plan gives them
// before and after it until a night's rest, and the rest before that; rest is 0 where it is not known.
func (m *maker) dutyAround(driver string, way hours.Span) (duty, rest hours.Minute) {
	var work []hours.Span
	if m.a.Plan != nil && driver != "" {
		for _, s := range m.a.Plan.Steps {
			if slices.Contains(s.People, driver) {
				work = append(work, s.Pieces...)
			}
		}
	}
	day := way
	for grown := true; grown; {
		grown = false
		for _, w := range work {
			if (w.From < day.From && w.To > day.From-nightRest) || (w.To > day.To && w.From < day.To+nightRest) {
				day = hours.Span{From: min(day.From, w.From), To: max(day.To, w.To)}
				grown = true
			}
		}
	}
	var before hours.Minute
	for _, w := range work {
		if w.To <= day.From {
			before = max(before, w.To)
		}
	}
	if before > 0 {
		rest = day.From - before
	}
	return day.To - day.From, rest
}
