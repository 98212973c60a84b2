package problem

import (
	"fmt"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks"
	"sailby/tasks/hours"
)

// duty walks R15 minute by minute: open[t] are the minutes in which somebody is at an open place in their
// own hours, legs their legs of the trip, ways the legs out and the legs back. It gives the minutes
// inside shifts.
func duty(open []bool, legs []hours.Span, ways [][]hours.Span, longest, rest int) []bool {
	n := len(open)
	on := make([]bool, n)
	copy(on, open)
	leg := make([]bool, n)
	for _, l := range legs {
		for t := l.From; t < l.To; t++ {
			leg[t] = true
		}
	}
	for _, way := range ways {
		if len(way) == 0 {
			continue
		}
		first, last := int(way[0].From), int(way[len(way)-1].To)
		begin := first // where the legs alone are longer
		for t := max(0, last-longest); t < first; t++ {
			if on[t] {
				begin = t
				break
			}
		}
		for t := max(0, begin-rest); t < begin; t++ {
			on[t] = false
		}
	}
	for t := range on {
		on[t] = on[t] || leg[t]
	}
	out := make([]bool, n)
	for t := 0; t < n; {
		if !on[t] {
			t++
			continue
		}
		end := t + 1 // of the shift that begins at t
		for u := t + 1; u < n && u-end < rest; u++ {
			if on[u] && (u-t < longest || leg[u] && begun(legs, u, end)) {
				end = u + 1
			}
		}
		for u := t; u < end; u++ {
			out[u] = on[u]
		}
		t = end + rest
	}
	for t := range out { // minutes not worked before the legs are none of a shift
		out[t] = out[t] && open[t]
	}
	return out
}

// begun says whether minute u lies in a leg that began no later than end.
func begun(legs []hours.Span, u, end int) bool {
	for _, l := range legs {
		if l.Has(hours.Minute(u)) && int(l.From) <= end {
			return true
		}
	}
	return false
}

// presence walks R1: whether somebody is at a place of the given sort in the minute t.
func presence(p *Problem, who *tasks.Person, site bool, t hours.Minute) bool {
	w := p.Work
	for _, m := range []*tasks.Moment{who.From, who.Until} {
		if m == nil {
			continue
		}
		at, _, _ := w.Window.At(*m)
		if m == who.From && t < at || m == who.Until && t >= at {
			return false
		}
	}
	tied := who.Places != nil && who.Places[0] == "shop"
	if site {
		return !tied && t >= w.Trip.Arrives && t < w.Trip.Departs
	}
	return tied || t < w.Trip.Leaves || t >= w.Trip.Home
}

func TestShiftsAreWalkedMinuteByMinute(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		clock := func(name string) string {
			return fmt.Sprintf("%02d:%02d", rapid.IntRange(0, 23).Draw(t, name), 10*rapid.IntRange(0, 5).Draw(t, name+" minutes"))
		}
		open := rapid.SampledFrom([]string{"daily 07:00-12:00 12:30-19:00", "always", "daily 20:00-06:00", "Mon-Fri 06:00-22:00", "daily 04:00-10:00 13:00-23:00"})
		drive := rapid.IntRange(30, 20*60)
		var person []string
		if rapid.Bool().Draw(t, "own hours") {
			person = append(person, "hours: "+rapid.SampledFrom([]string{"daily 09:00-16:00", "daily 18:00-04:00", "Mon-Thu 00:00-20:00"}).Draw(t, "hours"))
		}
		switch rapid.IntRange(0, 3).Draw(t, "comings") {
		case 1: // often on the day of the trip, while others are on the way or unload
			person = append(person, fmt.Sprintf("from: 2027-04-0%d %s", rapid.SampledFrom([]int{1, 5, 5, 6, 6, 8}).Draw(t, "from day"), clock("from")))
		case 2:
			person = append(person, fmt.Sprintf("until: 2027-04-0%d %s", rapid.IntRange(7, 9).Draw(t, "until day"), clock("until")))
		case 3:
			person = append(person, "places: shop")
		}
		p := compiled(t, fmt.Sprintf("places:\n  shop: {open: %s, face factor: 1}\n  pier: {zone: Europe/Oslo, open: %s, face factor: 1}",
			open.Draw(t, "shop"), open.Draw(t, "pier")),
			fmt.Sprintf("trips: [{name: a, place: pier, out: {leave: 2027-04-05 %s, drive: %d min, unload: %d min}, back: {load: 45 min, leave: 2027-04-09 %s, drive: %d min}}]",
				clock("leave"), drive.Draw(t, "out"), rapid.SampledFrom([]int{0, 60, 240}).Draw(t, "unload"), clock("back"), drive.Draw(t, "home")),
			fmt.Sprintf("duty: {longest: %d h, rest: %d h}", rapid.IntRange(8, 14).Draw(t, "duty"), rapid.IntRange(8, 12).Draw(t, "rest")),
			fmt.Sprintf("people: {Ines: {tickets: [fitter], %s}, Tom: {tickets: [fitter]}}", strings.Join(person, ", ")),
			"begin: 2027-04-01 08:00", "tasks: {cut: {at: shop, hours: 1 h}}")
		compareShifts(t, p)
	})
}

func compareShifts(t *rapid.T, p *Problem) {
	who, trip := p.Work.Job.People[0], p.Work.Trip
	n := 16 * 1440
	shop, pier := place(t, p, "shop"), place(t, p, "pier")
	lay := func(pl *tasks.Place) []bool {
		out := make([]bool, n)
		span := hours.Span{From: p.Base, To: p.Base + hours.Minute(n)}
		at := pl.Open.Spans(pl.Zone, span, nil)
		if who.Hours != nil {
			at = at.And(who.Hours.Spans(pl.Zone, span, nil))
		}
		for _, s := range at {
			for m := s.From; m < s.To; m++ {
				out[m-p.Base] = presence(p, who, pl == pier, m)
			}
		}
		return out
	}
	home, site := lay(shop), lay(pier)
	open := make([]bool, n)
	for i := range open {
		open[i] = home[i] || site[i]
	}
	var legs []hours.Span
	var ways [][]hours.Span
	if who.Places == nil {
		for k, way := range [][]tasks.Leg{trip.Out, trip.Back} {
			from, until := p.Base, hours.Far
			if who.From != nil {
				from, _, _ = p.Work.Window.At(*who.From)
			}
			if who.Until != nil {
				until, _, _ = p.Work.Window.At(*who.Until)
			}
			if k == 0 && from >= trip.Arrives || k == 1 && until <= trip.Departs {
				continue // comes later or leaves earlier by their own means
			}
			var one []hours.Span
			for _, l := range way {
				one = append(one, hours.Span{From: l.From - p.Base, To: l.To - p.Base})
			}
			legs, ways = append(legs, one...), append(ways, one)
		}
	}
	want := duty(open, legs, ways, int(p.Work.Job.Duty.Value), int(p.Work.Job.Rest.Value))
	for m := range want {
		at := hours.Minute(m)
		if got := p.People[0].Shifts[shop].Has(at); got != (want[m] && home[m]) {
			t.Fatalf("%s in the shop: on shift %v\nlegs %v", p.clock(m), got, p.spans(hours.NewSet(legs...)))
		}
		inside := p.Base+at >= trip.Opens && p.Base+at < trip.Closes
		if got := p.People[0].Shifts[pier].Has(at); inside && got != (want[m] && site[m]) {
			t.Fatalf("%s on the pier: on shift %v\nlegs %v\n site %v shop %v", p.clock(m), got, p.spans(hours.NewSet(legs...)), p.spans(p.People[0].Shifts[pier]), p.spans(p.People[0].Shifts[shop]))
		}
	}
}
