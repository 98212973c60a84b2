package model

import (
	"cmp"
	"slices"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// compare sets the plan of the file and the one with the changes side by side, then the tasks
// that finish at another time, those that move most first.
func compare(m *Model, before, after *plan.Answer, n int) []line {
	label := 21
	each := (n - label) / 3
	widths := []int{label, each, each}
	row := func(name, x, y, diff string) line {
		return line{text: columns(n, widths, name, x, y, diff)}
	}
	out := []line{{columns(n, widths, "", "as in the file", "with the changes", "difference"), Head, nil}}
	out = append(out, row("verdict", agenda.Word(before), agenda.Word(after), ""))
	finish, hand := "", ""
	if before.Plan != nil && after.Plan != nil {
		finish = later(int(after.Finish - before.Finish))
		hand = more(after.InHand - before.InHand)
	}
	out = append(out, row("site finish", agenda.Finish(before), agenda.Finish(after), finish))
	out = append(out, row("time in hand", agenda.InHand(before, before.InHand), agenda.InHand(after, after.InHand), hand))
	out = append(out, row("earliest possible", agenda.Moment(before, before.Bound), agenda.Moment(after, after.Bound), ""))
	for _, d := range before.Deadlines {
		for _, e := range after.Deadlines {
			if d.Task == nil || e.Task == nil || d.Task.Name != e.Task.Name {
				continue
			}
			diff := ""
			if before.Plan != nil && after.Plan != nil {
				diff = more(e.InHand - d.InHand)
			}
			out = append(out, row("in hand: "+agenda.DeadlineName(d), agenda.InHand(before, d.InHand), agenda.InHand(after, e.InHand), diff))
		}
	}
	if after.CutShort {
		out = append(out, para(n, "", "The search was cut short; with more time it may find a better plan or a proof.", Plain, nil)...)
	}
	if after.Proof != nil {
		out = append(append(out, line{}), proofLines(after, n)...)
	}
	return append(out, moved(m, before, after, n)...)
}

// later says how much later something is.
func later(minutes int) string {
	switch {
	case minutes > 0:
		return quantity.Hours(minutes) + " later"
	case minutes < 0:
		return quantity.Hours(-minutes) + " earlier"
	}
	return "the same"
}

// more says how much more there is of something.
func more(minutes int) string {
	switch {
	case minutes > 0:
		return quantity.Hours(minutes) + " more"
	case minutes < 0:
		return quantity.Hours(-minutes) + " less"
	}
	return "the same"
}

// moved lists the tasks whose finish moves.
func moved(m *Model, before, after *plan.Answer, n int) []line {
	if before.Plan == nil || after.Plan == nil {
		return nil
	}
	then := finishes(before)
	type move struct {
		name     string
		from, to hours.Minute
	}
	var list []move
	now := finishes(after)
	for _, t := range before.Work.Job.Tasks {
		f, ok := then[t.Name]
		g, still := now[t.Name]
		if ok && still && f != g {
			list = append(list, move{t.Name, f, g})
		}
	}
	if len(list) == 0 {
		return nil
	}
	size := func(x move) hours.Minute { return max(x.to-x.from, x.from-x.to) }
	slices.SortStableFunc(list, func(x, y move) int { return cmp.Compare(size(y), size(x)) })
	out := []line{{}, {"Tasks that finish at another time", Head, nil}}
	widths := []int{n - 3*19, 19, 19}
	for _, x := range list {
		zone := agenda.Zone(before.Work, before.Work.Window.Place)
		for _, t := range before.Work.Job.Tasks {
			if t.Name == x.name {
				zone = agenda.Zone(before.Work, t.Place)
			}
		}
		out = append(out, line{text: columns(n, widths, x.name, agenda.When(x.from, zone), agenda.When(x.to, zone), later(int(x.to-x.from))),
			do: func() Ask { return m.open(newTask(m, x.name)) }})
	}
	return out
}

// finishes gives the last finish of hands-on work of every planned task, of its last step where
// nobody works on it.
func finishes(a *plan.Answer) map[string]hours.Minute {
	out := map[string]hours.Minute{}
	hands := map[string]bool{}
	for i, s := range a.Work.Steps {
		if s.Absent || i >= len(a.Plan.Steps) {
			continue
		}
		name := s.Task.Name
		if f := a.Plan.Steps[i].Finish; !standing(s) {
			if !hands[name] || f > out[name] {
				out[name] = f
			}
			hands[name] = true
		} else if !hands[name] {
			out[name] = max(out[name], f)
		}
	}
	return out
}
