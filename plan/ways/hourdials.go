package ways

import (
	"fmt"
	"slices"
	"sort"
	"strings"
	"time"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/hours"
)

// daily lets opening hours go on later, begin earlier, or hold on one more day of the week.
func (d *dialer) daily(l plan.Limit) {
	var p hours.Pattern
	var path []string
	var pos, at tasks.Pos
	var what string
	switch l.Kind {
	case plan.LimitPersonHours:
		q := l.Person
		p, path, pos, at, what = q.Hours, []string{"people", q.Name, "hours"}, q.Pos, q.Keys.At("hours", q.Pos), q.Name+" working"
	case plan.LimitHours:
		q := l.Place
		p, path, pos, at, what = q.Open, []string{"places", q.Name, "open"}, q.Pos, q.OpenPos, q.Name+" open"
	case plan.LimitNoisy:
		q := l.Place
		p, path, pos, at, what = q.Noisy, []string{"places", q.Name, "noisy work"}, q.Pos, q.Keys.At("noisy work", q.Pos), "noisy work at "+q.Name+" allowed"
	case plan.LimitPermit:
		q := l.Permit
		p, path, pos, at, what = q.Valid, []string{"places", l.Place.Name, "permits", q.Name, "valid"}, q.Pos, q.Pos, "the permit "+q.Name+" valid"
	}
	if len(p) == 0 {
		return
	}
	key := path[len(path)-1]
	add := func(steps []int, says func(q hours.Pattern, n int) string, change func(n int) (hours.Pattern, bool)) {
		d.add(l, dial{pos: at, was: key + ": " + p.String(), steps: steps,
			says: func(n int) string { q, _ := change(n); return says(q, n) },
			writes: func(n int) string {
				q, _ := change(n)
				return key + ": " + pattern(q)
			},
			sets: func(n int) ([]tasks.Setting, bool) {
				q, ok := change(n)
				return []tasks.Setting{set(d.job, pos, pattern(q), path...)}, ok
			}})
	}
	add(minuteSteps(room(p, true)), func(q hours.Pattern, n int) string {
		return fmt.Sprintf("%s %s longer each day: until %s", what, span(n), ends(q, true))
	}, func(n int) (hours.Pattern, bool) { return longer(p, n, true) })
	add(minuteSteps(room(p, false)), func(q hours.Pattern, n int) string {
		return fmt.Sprintf("%s %s earlier each day: from %s", what, span(n), ends(q, false))
	}, func(n int) (hours.Pattern, bool) { return longer(p, n, false) })
	for _, day := range []time.Weekday{time.Saturday, time.Sunday} {
		if q, ok := another(p, day); ok {
			add([]int{0}, func(hours.Pattern, int) string { return fmt.Sprintf("%s on %ss too", what, day) }, func(int) (hours.Pattern, bool) { return q, true })
		}
	}
}

// room gives by how much the hours of a pattern can go on, or begin earlier, within the day, at most mostLonger.
func room(p hours.Pattern, late bool) int {
	out := mostLonger
	for _, r := range p {
		if len(r.Turns) == 0 {
			return 0
		}
		if late {
			out = min(out, 1440-r.Turns[len(r.Turns)-1].To)
		} else {
			out = min(out, r.Turns[0].From)
		}
	}
	return out
}

// longer moves the end of the last turn of each rule later, or the start of the first earlier.
func longer(p hours.Pattern, n int, late bool) (hours.Pattern, bool) {
	out := hours.Pattern{}
	for _, r := range p {
		r.Turns = append([]hours.Turn(nil), r.Turns...)
		if late {
			r.Turns[len(r.Turns)-1].To += n
		} else {
			r.Turns[0].From -= n
		}
		if r.Turns[0].From < 0 || r.Turns[len(r.Turns)-1].To > 1440 {
			return nil, false
		}
		out = append(out, r)
	}
	return out, true
}

// ends tells when the days of a pattern end, or begin.
func ends(p hours.Pattern, late bool) string {
	var out []string
	for _, r := range p {
		at := r.Turns[0].From
		if late {
			at = r.Turns[len(r.Turns)-1].To
		}
		if c := hours.Clock24(at); !slices.Contains(out, c) {
			out = append(out, c)
		}
	}
	return strings.Join(out, " and ")
}

// another opens a day of the week that the pattern leaves closed, as on its first days.
func another(p hours.Pattern, day time.Weekday) (hours.Pattern, bool) {
	for _, r := range p {
		if r.Days[day] {
			return nil, false
		}
	}
	var days [7]bool
	days[day] = true
	return append(append(hours.Pattern{}, p...), hours.Rule{Days: days, Turns: p[0].Turns}), true
}

// slots makes given slots longer: later at their end, earlier at their start, or, of a reach, both.
func (d *dialer) slots(l plan.Limit) {
	var list []tasks.Slot
	var path []string
	var pos, at tasks.Pos
	var what string
	both := false
	zone := d.a.Work.Window.Place.Zone
	switch l.Kind {
	case plan.LimitBooked:
		p := l.Person
		list, path, pos, at, what = p.Booked, []string{"people", p.Name, "booked"}, p.Pos, p.Keys.At("booked", p.Pos), p.Name+" there"
	case plan.LimitHire:
		k := l.Kit
		list, path, pos, at, what = k.Slots, []string{"hire", k.Name, "slots"}, k.Pos, k.Keys.At("slots", k.Pos), k.Name+" there"
	case plan.LimitReach:
		f := l.Face
		if f.Place.Tide != nil && (f.Level.Pos.Given() || f.CoversAt.Pos.Given()) {
			d.tide(l)
			return
		}
		list, path, pos, at, both = f.Reach, []string{"places", f.Place.Name, "workfaces", f.Name, "reach"}, f.Pos, f.ReachPos, true
		what, zone = f.Place.Name+"/"+f.Name+" reachable", f.Place.Zone
	}
	set0 := d.a.Work.Window.Slots(list)
	if len(set0) == 0 {
		return
	}
	if len(list) > 0 && list[0].From.Zone != nil {
		zone = list[0].From.Zone
	}
	key := path[len(path)-1]
	add := func(head, tail func(n int) int, words string) {
		moved := func(n int) []string {
			var out []string
			for _, s := range set0 {
				out = append(out, slot(hours.Span{From: s.From - hours.Minute(head(n)), To: s.To + hours.Minute(tail(n))}, zone))
			}
			return out
		}
		d.add(l, dial{relaxes: true, pos: at, steps: minuteSteps(mostLonger),
			says: func(n int) string { return fmt.Sprintf("%s %s %s", what, span(n), words) },
			writes: func(n int) string {
				if len(set0) > 3 {
					return fmt.Sprintf("%s: each slot from %s earlier to %s later", key, span(head(n)), span(tail(n)))
				}
				return key + ": [" + strings.Join(moved(n), ", ") + "]"
			},
			sets: func(n int) ([]tasks.Setting, bool) { return one(set(d.job, pos, listOf(moved(n)), path...)) }})
	}
	none := func(int) int { return 0 }
	all := func(n int) int { return n }
	if both {
		add(func(n int) int { return n / 2 }, func(n int) int { return n - n/2 }, "longer at each low water, half of it before and half after")
		return
	}
	add(none, all, "longer in each slot, at its end")
	add(all, none, "longer in each slot, at its start")
}

func listOf(items []string) string { return list(items) }

// tide lets a workface be covered later: by staging, or a higher place to stand.
func (d *dialer) tide(l plan.Limit) {
	f := l.Face
	level := f.Level.Value
	if f.CoversAt.Pos.Given() {
		level = f.CoversAt.Value
	}
	lift := func(n int) float64 { return level + float64(n)/100 }
	gain := func(n int) int { return d.gained(f, n) }
	steps := []int{}
	for n := 5; n <= 200; n += 5 {
		steps = append(steps, n)
	}
	path := []string{"places", f.Place.Name, "workfaces", f.Name, "covers at"}
	d.add(l, dial{relaxes: true, pos: f.Keys.At("covers at", f.Keys.At("level", f.Pos)), was: fmt.Sprintf("covered at %g m", level), steps: steps,
		says: func(n int) string {
			return fmt.Sprintf("%s/%s reachable %s longer at each low water: worked to %.2f m of tide for %.2f m", f.Place.Name, f.Name, span(gain(n)), lift(n), level)
		},
		writes: func(n int) string { return fmt.Sprintf("covers at: %.2f m", lift(n)) },
		sets: func(n int) ([]tasks.Setting, bool) {
			return one(set(d.job, f.Pos, fmt.Sprintf("%.2f m", lift(n)), path...))
		}})
}

// gained is how much longer the workface is clear at a low water in the window if it is covered n cm higher: the least of
// those low waters that it is clear at.
func (d *dialer) gained(f *tasks.Workface, n int) int {
	clear := func(up float64) hours.Set {
		spans, err := f.Place.Tide.Reach(true, f.Covers()+up, int64(d.a.Work.Window.Opens), int64(d.a.Work.Window.Closes))
		if err != nil {
			return nil
		}
		var out []hours.Span
		for _, s := range spans {
			out = append(out, hours.Span{From: hours.Minute(s.From), To: hours.Minute(s.To)})
		}
		return hours.NewSet(out...)
	}
	least := -1
	after := clear(float64(n) / 100)
	for _, s := range clear(0) {
		for _, t := range after {
			if t.From <= s.From && s.To <= t.To {
				if g := int(t.To-t.From) - int(s.To-s.From); least < 0 || g < least {
					least = g
				}
			}
		}
	}
	return max(least, 0)
}

// freed takes away a day on which somewhere is closed, a person is off, or the need of daylight.
func (d *dialer) freed(l plan.Limit) {
	toggle := func(pos, at tasks.Pos, text, write, value string, path ...string) {
		d.add(l, dial{relaxes: true, pos: at, steps: []int{0}, says: func(int) string { return text }, writes: func(int) string { return write },
			sets: func(int) ([]tasks.Setting, bool) { return one(set(d.job, pos, value, path...)) }})
	}
	switch l.Kind {
	case plan.LimitDaylight:
		t, f := l.Step.Task, l.Step.Face
		if f != nil && f.Light {
			toggle(f.Pos, f.Keys.At("daylight", f.Pos), "light to work by at "+f.Place.Name+"/"+f.Name, "daylight: no", "no", "places", f.Place.Name, "workfaces", f.Name, "daylight")
			return
		}
		toggle(t.Pos, t.Keys.At("daylight", t.Pos), "light to work by for "+named(t), "daylight: no", "no", append(taskPath(t), "daylight")...)
	case plan.LimitClosed:
		d.closedDays(l)
	case plan.LimitPersonOff:
		p := l.Person
		for _, day := range dates(p.Off, d.a.Work.Span) {
			var rest []string
			for _, o := range dates(p.Off, hours.Span{From: hours.Never, To: hours.Far}) {
				if o != day {
					rest = append(rest, o.String())
				}
			}
			write, value := "off: "+list(rest), list(rest)
			if len(rest) == 0 {
				write, value = "nothing under off", ""
			}
			toggle(p.Pos, p.Keys.At("off", p.Pos), fmt.Sprintf("%s not off on %s", p.Name, day), write, value, "people", p.Name, "off")
		}
	}
}

// closedDays opens a place on one of its closed days, as on that day of the week.
func (d *dialer) closedDays(l plan.Limit) {
	p := l.Place
	shut := map[hours.Date]bool{}
	for day := range p.Closed {
		shut[day] = true
	}
	for _, day := range dates(shut, d.a.Work.Span) {
		var slots []string
		for _, s := range d.a.Work.Window.Slots(p.AlsoOpen) {
			slots = append(slots, slot(s, p.Zone))
		}
		turns := p.Open.On(day)
		for _, t := range turns {
			from, _ := hours.Instant(day, t.From, p.Zone)
			to, _ := hours.Instant(day, t.To, p.Zone)
			slots = append(slots, slot(hours.Span{From: from, To: to}, p.Zone))
		}
		if len(turns) == 0 {
			continue
		}
		d.add(l, dial{relaxes: true, pos: p.Keys.At("closed", p.Pos), steps: []int{0}, says: func(int) string { return fmt.Sprintf("%s open on %s", p.Name, day) },
			writes: func(int) string { return "also open: [" + strings.Join(slots, ", ") + "]" },
			sets: func(int) ([]tasks.Setting, bool) {
				return one(set(d.job, p.Pos, list(slots), "places", p.Name, "also open"))
			}})
	}
}

// dates lists days within a span, in order.
func dates(set map[hours.Date]bool, in hours.Span) []hours.Date {
	var out []hours.Date
	for day := range set {
		if at, _ := hours.Instant(day, 0, time.UTC); at >= in.From-1440 && at < in.To {
			out = append(out, day)
		}
	}
	sort.Slice(out, func(i, j int) bool { return out[i].Before(out[j]) })
	return out
}
