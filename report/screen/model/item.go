package model

import (
	"cmp"
	"slices"

	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/hours"
)

// item is a task with what the list says of it.
type item struct {
	task          *tasks.Task
	start, finish hours.Minute
	people        []string
	days          []hours.Date
	leeway        int
	planned       bool
}

// items lists the tasks in the order of their starts; those that are not planned come last, in
// the order of the file.
func items(m *Model) []item {
	a := m.answer()
	first := map[string]int{}
	var out []item
	for _, t := range a.Work.Job.Tasks {
		first[t.Name] = len(out)
		out = append(out, item{task: t})
	}
	if a.Plan == nil {
		return out
	}
	for i, s := range a.Work.Steps {
		k, ok := first[s.Task.Name]
		if !ok || s.Absent || i >= len(a.Plan.Steps) {
			continue
		}
		it, ps := &out[k], a.Plan.Steps[i]
		if !it.planned || ps.Start < it.start {
			it.start = ps.Start
		}
		if !it.planned || !standing(s) {
			it.finish = ps.Finish
			if i < len(a.Rows) {
				it.leeway = a.Rows[i].Leeway
			}
		}
		it.planned = true
		for _, who := range append(slices.Clone(ps.People), ps.Relief...) {
			if !slices.Contains(it.people, who) {
				it.people = append(it.people, who)
			}
		}
		zone := agenda.Zone(a.Work, s.Place)
		for _, piece := range ps.Pieces {
			d := hours.DateOf(piece.From.In(zone))
			if !slices.Contains(it.days, d) {
				it.days = append(it.days, d)
			}
		}
	}
	slices.SortStableFunc(out, func(x, y item) int {
		if x.planned != y.planned {
			if x.planned {
				return -1
			}
			return 1
		}
		return cmp.Compare(x.start, y.start)
	})
	return out
}
