package packlist

import (
	"fmt"
	"strings"

	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/lift"
	"sailby/tasks/quantity"
)

// mostRuns bounds how many runs are tried where the load does not go in those that the file allows.
const mostRuns = 4

// inMoreRuns looks for the least number of runs that takes what does not go in those that the file
// allows, and says what would go on which and what that asks for.
func (m *maker) inMoreRuns(goods []lift.Goods, list []lift.Vehicle) {
	for n := 2; n <= mostRuns; n++ {
		more := append([]lift.Vehicle(nil), list...)
		grown := false
		for i := range more {
			grown = grown || more[i].Trips < n
			more[i].Trips = max(more[i].Trips, n)
		}
		if !grown {
			continue
		}
		p, err := lift.LoadVehicles(goods, more)
		if err != nil || !p.OK {
			continue
		}
		m.list.Split = m.stow(goods, p.Trips)
		way := fmt.Sprintf("it goes in %d runs, as below (`runs: %d`)", n, n)
		if m.list.Nearest != "" {
			way += "; or " + strings.Replace(m.list.Nearest, "another run or vehicle", "another vehicle", 1)
		}
		m.list.Nearest = way
		m.carriage(goods, p.Trips)
		m.costOfRuns(goods, p.Trips)
		return
	}
	all := lift.Trip{} // no split: the rules on single things, and on all of them together
	for i := range goods {
		all.Stowed = append(all.Stowed, lift.Stowed{Goods: i, On: -1})
	}
	for _, f := range lift.Carriage(goods, all, m.job.Carriage) {
		m.flag("all goods together: " + f)
	}
}

// way is what a vehicle's way there and back takes, minutes.
type way struct {
	there, back           hours.Minute // door to door, without loading at the start and waiting at the end
	wheelThere, wheelBack hours.Minute
	boat                  bool
}

// wayOf sums the legs of a trip.
func wayOf(t *tasks.Trip) way {
	var w way
	sum := func(legs []tasks.Leg, door, wheel *hours.Minute) {
		for _, l := range legs {
			span := l.To - l.From
			w.boat = w.boat || l.What == "sail"
			if strings.HasPrefix(l.What, "drive") {
				*wheel += span
			}
			if l.What != "break" && l.What != "load" {
				*door += span
			}
		}
	}
	sum(t.Out, &w.there, &w.wheelThere)
	sum(t.Back, &w.back, &w.wheelBack)
	return w
}

// costOfRuns says what runs beyond the first take, and whether what goes on them is there in time. The
// plan has one arrival and holds none of these hours: they are asked for.
func (m *maker) costOfRuns(goods []lift.Goods, trips []lift.Trip) {
	last := 1
	for _, t := range trips {
		last = max(last, t.Number)
	}
	if last == 1 {
		return
	}
	var out []string
	say := func(format string, args ...any) { out = append(out, fmt.Sprintf(format, args...)) }
	var each hours.Minute
	switch {
	case m.w.Trip == nil:
		say("%s: the file gives no trip, so the hours of the road are not known", runWords(last))
	default:
		w := wayOf(m.w.Trip)
		each = w.there + w.back
		say("%s: each run after the first is another %s back and there, %s of it at the wheel; %s in all", runWords(last),
			span(each), span(w.wheelThere+w.wheelBack), span(each*hours.Minute(last-1)))
		if w.boat {
			say("the ferry must be booked again, both ways, for each of them")
		}
	}
	for n := 2; n <= last; n++ {
		if day := m.firstWanted(goods, trips, n); day != 0 {
			when := fmt.Sprintf("of what goes on run %d the first is wanted by %s", n, agenda.When(day, m.list.Zone))
			switch there := m.w.Window.Opens + each*hours.Minute(n-1); {
			case each == 0:
			case there <= day:
				when += fmt.Sprintf(": with the same driver it can be there by %s", agenda.When(there, m.list.Zone))
			default:
				when += fmt.Sprintf(": with the same driver it is not there before %s, %s too late; send it ahead or by another driver", agenda.When(there, m.list.Zone), span(there-day))
			}
			say("%s", when)
		}
	}
	say("the plan does not hold these hours: whoever drives is not at work meanwhile (give the run a task with its hours), unless somebody drives who is not on the job")
	m.list.Runs = strings.Join(out, "; ")
	m.drivingRuns(last)
}

func runWords(n int) string { return fmt.Sprintf("%d runs", n) }

func span(m hours.Minute) string { return quantity.Hours(int(m)) }

// firstWanted gives when the first of what goes on run n is needed; 0 where no task says.
func (m *maker) firstWanted(goods []lift.Goods, trips []lift.Trip, n int) hours.Minute {
	var first hours.Minute
	for _, t := range trips {
		if t.Number != n {
			continue
		}
		for _, s := range t.Stowed {
			if k := goods[s.Goods].Needed; k >= 1 && k <= len(m.days) && (first == 0 || m.days[k-1] < first) {
				first = m.days[k-1]
			}
		}
	}
	return first
}

// Verdict says in one or two lines whether the load goes, where that is worth saying beside the plan's own
// verdict: it does not fit, or takes more than one run.
func (l *List) Verdict() []string {
	if l == nil {
		return nil
	}
	var out []string
	if !l.OK {
		line := "the load: " + l.Reason
		if l.Proved {
			line += " (proved)"
		}
		if l.Nearest != "" {
			line += "; would do: " + strings.Replace(l.Nearest, ", as below", ", see the packing list", 1)
		}
		out = append(out, line)
	}
	if l.Runs != "" {
		out = append(out, "the load: "+l.Runs)
	}
	return out
}
