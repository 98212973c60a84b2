package sheets

import (
	"fmt"
	"slices"
	"strings"

	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
)

// liftSheets has one sheet for each lift: the plan's figures as facts, boxes for what the
// competent person decides.
func (k *pack) liftSheets() {
	for _, s := range k.taskSteps(tasks.Lift) {
		k.liftSheet(s)
	}
}

func (k *pack) liftSheet(s *expand.Step) {
	p, t := k.p, s.Task
	p.begin("Lift sheet", "lift "+paper(t.Name), true)
	p.big("Lift sheet")
	p.para(agenda.TaskLabel(t), strong, true)
	p.para(joined("; ", t.Lifts, prefixed("by ", t.By), agenda.Where(s), k.span(s), "planned: "+strings.Join(names(k.planned(s).People), ", ")), body, false)
	for _, g := range k.hireOf(s) {
		p.para(g, body, false)
	}
	j, judged := k.judged(s)
	if judged {
		k.liftSketch(s, j)
		k.liftLimits(s, j)
	}
	p.heading("What the plan counted with", 3*lineHeight(body))
	k.liftFacts(s) // one line after the other: the front of the sheet tells, its back is for those who decide and sign
	for _, n := range s.Estimate.Notes {
		p.point("!", n, true)
	}
	if judged {
		k.liftSteps(s, j)
		k.liftAsk(j)
	}
	p.heading("Decided by the competent person", 60)
	mass := ""
	if f, ok := agenda.Fact(s, "mass"); ok {
		mass = f.Amount()
	} else if t.Mass.Value > 0 {
		mass = origin.Trim(t.Mass.Value) + " kg"
	}
	p.fields(3, field{label: "Load", value: t.Lifts}, field{label: "Weight planned with", value: mass}, field{label: "Weight, how known"},
		field{label: "Lifting points seen by"}, field{label: "Centre of gravity, trial lift"}, field{label: "Slings, shackles, angle"},
		field{label: "Machine or hoist, no.", value: ""}, field{label: "Radius and chart there"}, field{label: "Share of the chart, %"},
		field{label: "Ground, outriggers, hang point"}, field{label: "Overhead lines, obstructions"}, field{label: "Nobody inside the line of", value: clear(j, judged)},
		field{label: "Wind limit", value: windLimit(s, j, judged)}, field{label: "Wind measured by, where", value: measures(s)}, field{label: "Tag lines, hands"},
		field{label: "Signaller, and how"}, field{label: "Landing place ready, seen by"}, field{label: "Certificates seen, dates"})
	p.heading("Before the load leaves the ground", 2*(boxHeight+lineHeight(body)))
	p.fields(2, field{label: "Planned by a competent person, signature"}, field{label: "Lift supervisor, signature"},
		field{label: "Stop if (rule agreed)"}, field{label: "Lifted at, landed at"})
}

// liftFacts lists the figures of the lift with where they come from.
func (k *pack) liftFacts(s *expand.Step) {
	p, t := k.p, s.Task
	type fact struct{ what, value, from string }
	var facts []fact
	add := func(what, value, from string) {
		known := slices.ContainsFunc(facts, func(f fact) bool { return f.what == what && f.value == value })
		if value != "" && !known {
			facts = append(facts, fact{what, value, from})
		}
	}
	for _, f := range s.Estimate.Facts {
		add(f.Name, f.Amount(), soft(f.Origin))
		for _, g := range f.From {
			if len(f.From) > 3 || len(f.From) == 1 {
				break // the parts of a sum: `sailby why` lists them
			}
			add("of which "+g.Name, g.Amount(), soft(g.Origin))
		}
	}
	add("hook travel", amountOf(t.Height, "m", 1000), "job file")
	add("travel on the level", amountOf(t.Travel, "m", 1000), "job file")
	add("radius", amountOf(t.Radius, "m", 1000), "job file")
	for _, u := range s.Kit {
		if u.Kit == nil {
			continue
		}
		add(paper(u.Kit.Name)+" rated", amountOf(u.Kit.Rated, "kg", 1), "job file")
		var chart []string
		for _, c := range u.Kit.Chart {
			chart = append(chart, fmt.Sprintf("%s kg at %s m", origin.Trim(c.Mass), origin.Trim(c.Radius)))
		}
		add(paper(u.Kit.Name)+" chart", strings.Join(chart, ", "), "job file")
	}
	var words []string
	for _, f := range facts {
		words = append(words, f.what+": "+f.value+" ("+f.from+")")
	}
	p.para(strings.Join(words, "; ")+".", body, false)
}

// soft says where a figure comes from, and marks defaults that nothing stands behind.
func soft(o origin.Origin) string {
	o.File = baseName(o.File)
	if o.Soft() {
		return o.String() + " (default: check it)"
	}
	return o.String()
}

func amountOf(a tasks.Amount, unit string, per float64) string {
	if a.Value == 0 {
		return ""
	}
	return origin.Trim(a.Value/per) + " " + unit
}

// gust gives the wind limit of the lift's kit; "" leaves a box.
func gust(s *expand.Step) string {
	for _, u := range s.Kit {
		if u.Kit != nil && u.Kit.Gust.Value > 0 {
			return origin.Trim(u.Kit.Gust.Value) + " m/s gust"
		}
	}
	return ""
}

// hireOf gives the slots of the step's hired kit on the day of the lift.
func (k *pack) hireOf(s *expand.Step) []string {
	var out []string
	zone := agenda.Zone(k.work, s.Place)
	day := hours.DateOf(k.planned(s).Start.In(zone))
	for _, u := range s.Kit {
		if u.Kit == nil || u.Kit.Slots == nil {
			continue
		}
		for _, slot := range k.work.Window.Slots(u.Kit.Slots) {
			if hours.DateOf(slot.From.In(zone)) == day {
				out = append(out, fmt.Sprintf("Hired %s: %s %s.", paper(u.Kit.Name), agenda.ShortDay(slot.From, zone), agenda.Between(slot, zone)))
			}
		}
	}
	return out
}
