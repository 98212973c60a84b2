package sheets

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// tight is the leeway in minutes below which a task is named on the cover.
const tight = 60

// watchList prints what can spoil the plan, worst first.
func (k *pack) watchList() {
	list := slices.Concat(k.unprinted(), k.lateSides(), k.tightTasks(), k.slots(), k.onlyOnes(), k.maybes(), cleaned(agenda.NoMeals(k.a)))
	if len(list) == 0 {
		return
	}
	k.p.heading("What to watch", 2*lineHeight(body))
	for _, s := range list {
		k.p.point("-", s, false)
	}
}

func cleaned(list []string) []string {
	var out []string
	for _, s := range list {
		out = append(out, paper(s))
	}
	return out
}

// lateSides names the other two answers where they do not fit.
func (k *pack) lateSides() []string {
	words := map[plan.Verdict]string{plan.CannotFit: "cannot fit", plan.Unsettled: "was not shown to fit"}
	var parts []string
	for _, v := range []plan.Verdict{plan.CannotFit, plan.Unsettled} {
		var on []string
		for _, a := range []*plan.Answer{k.report.Maybes, k.report.High} {
			if a != nil && a != k.a && a.Verdict == v {
				on = append(on, agenda.BasisWords(a.Work.Basis))
			}
		}
		if len(on) > 0 {
			parts = append(parts, strings.Join(on, " and ")+" it "+words[v])
		}
	}
	if len(parts) == 0 {
		return nil
	}
	return []string{upper(strings.Join(parts, "; ")) + ": agree now what can be left out."}
}

func upper(s string) string {
	if s == "" {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}

// tightTasks names the tasks at the site with least leeway, at most three.
func (k *pack) tightTasks() []string {
	if !agenda.LeewayKnown(k.a) {
		return []string{"Leeway is " + agenda.NoLeeway(k.a) + "; the sheets give no latest finishes."}
	}
	var list []int
	for i, s := range k.work.Steps {
		if i < len(k.a.Rows) && s.Site && !s.Absent && s.Class == expand.Hands && k.a.Rows[i].Leeway >= 0 && k.a.Rows[i].Leeway < tight {
			list = append(list, i)
		}
	}
	slices.SortStableFunc(list, func(x, y int) int { return cmp.Compare(k.a.Rows[x].Leeway, k.a.Rows[y].Leeway) })
	var parts []string
	for _, i := range list[:min(len(list), 3)] {
		s := k.work.Steps[i]
		parts = append(parts, fmt.Sprintf("%s by %s (%s)", agenda.StepLabel(k.work, s),
			agenda.When(k.a.Rows[i].Latest, agenda.Zone(k.work, s.Place)), quantity.Hours(k.a.Rows[i].Leeway)))
	}
	if len(parts) == 0 {
		return nil
	}
	return []string{"Least leeway; finished later, a deadline is missed: " + strings.Join(parts, "; ") + "."}
}

// slots names the hire and outside people that come only when booked.
func (k *pack) slots() []string {
	var out []string
	zone := agenda.Zone(k.work, k.work.Window.Place)
	say := func(who string, set hours.Set) {
		var parts []string
		for _, s := range set {
			parts = append(parts, agenda.ShortDay(s.From, zone)+" "+agenda.Between(s, zone))
		}
		if len(parts) > 0 {
			out = append(out, who+" comes "+strings.Join(parts, " and "))
		}
	}
	for _, kit := range k.job.Kit {
		if kit.Slots != nil {
			say(paper(kit.Name), k.work.Window.Slots(kit.Slots))
		}
	}
	for _, q := range k.job.People {
		if q.Outside {
			say(paper(q.Name), k.work.Window.Slots(q.Booked))
		}
	}
	if len(out) == 0 {
		return nil
	}
	return []string{"Confirm the day before: " + strings.Join(out, "; ") + "."}
}

// onlyOnes names tickets that one person alone holds and the work at the site needs.
func (k *pack) onlyOnes() []string {
	holders := map[string][]string{}
	for _, q := range k.job.People {
		seen := map[string]bool{}
		for _, t := range q.Tickets {
			if !seen[t.Name] {
				holders[t.Name] = append(holders[t.Name], q.Name)
			}
			seen[t.Name] = true
		}
	}
	var out []string
	seen := map[string]bool{}
	for _, s := range k.work.Steps {
		for _, n := range s.Needs {
			if t := n.Ticket.Name; s.Site && !s.Absent && t != "" && len(holders[t]) == 1 && !seen[t] {
				seen[t] = true
				out = append(out, fmt.Sprintf("%s (%s)", paper(t), paper(holders[t][0])))
			}
		}
	}
	if len(out) == 0 {
		return nil
	}
	return []string{"Tickets that only one person holds: " + strings.Join(out, ", ") + "."}
}

// maybes names the tasks that happen only with a chance.
func (k *pack) maybes() []string {
	var parts []string
	for _, t := range k.job.Tasks {
		if t.Maybe() {
			parts = append(parts, fmt.Sprintf("%s (%.0f %%)", agenda.TaskLabel(t), t.Chance*100))
		}
	}
	if len(parts) == 0 {
		return nil
	}
	return []string{"Look early for what may come: " + strings.Join(parts, ", ") + "."}
}
