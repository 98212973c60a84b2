package model

import (
	"errors"
	"slices"

	"sailby/plan"
	"sailby/report/clean"
	"sailby/tasks"
)

// whatPage tries changes: hours of a task, somebody who does not come, a second holder of a
// ticket, a change that the job file keeps. Each plans again at once, beside the plan of the file.
type whatPage struct {
	m        *Model
	changes  []change
	running  bool
	run      int
	progress string
	err      error
	stopped  bool
	at       scroll
}

func newWhat(m *Model) *whatPage { return &whatPage{m: m} }

func (p *whatPage) title() string         { return "What if (nothing is written to the job file)" }
func (p *whatPage) place() *scroll        { return &p.at }
func (p *whatPage) press(Key) (Ask, bool) { return Ask{}, false }
func (p *whatPage) keys() string {
	if p.running {
		return "Esc stop planning   Up/Down choose   Enter do it"
	}
	return "Up/Down choose   Enter do it   1-5 pages   Esc back"
}

func (p *whatPage) job() *tasks.Job { return p.m.file.Job }

func (p *whatPage) lay(n int) ([]Row, []line) {
	var body []line
	act := func(text string, do func() Ask) { body = append(body, line{text: cut(text, n), do: do}) }
	body = append(body, line{"Try", Head, nil})
	act("other hours for a task", p.pickTask)
	act("the work without somebody", p.pickPerson)
	act("somebody who holds one more ticket", p.pickHolder)
	if len(p.job().Changes) > 0 {
		act("a change that the job file keeps", p.pickKept)
	}
	body = append(body, line{}, line{"Tried now (Enter takes one back)", Head, nil})
	for i, c := range p.changes {
		act("- "+c.text, func() Ask { return p.drop(i) })
	}
	if len(p.changes) == 0 {
		return nil, append(body, line{text: "nothing yet"})
	}
	if p.err != nil || p.stopped {
		act("Plan again", p.plan)
	}
	switch {
	case p.m.tried != nil && p.m.shown == p.m.file:
		act("Show the plan with these changes on every page", func() Ask { p.m.shown, p.m.basis = p.m.tried, likely; return Ask{} })
	case p.m.shown != p.m.file:
		act("Show the plan of the file on every page again", func() Ask { p.m.shown = p.m.file; return Ask{} })
	}
	body = append(body, line{})
	return nil, append(body, p.outcome(n)...)
}

// outcome is how the changes turn out.
func (p *whatPage) outcome(n int) []line {
	var faults tasks.Faults
	switch {
	case p.running:
		return para(n, "", "Planning again ("+p.progress+") ... Esc stops it.", Plain, nil)
	case errors.As(p.err, &faults):
		out := []line{{"The job with these changes has a fault", Head, nil}}
		for _, f := range faults {
			out = append(out, para(n, "- ", f.Text, Bad, nil)...)
			if f.Hint != "" {
				out = append(out, para(n, "  try: ", f.Hint, Plain, nil)...)
			}
		}
		return out
	case p.err != nil:
		return para(n, "", "Could not plan again: "+p.err.Error(), Bad, nil)
	case p.stopped:
		return para(n, "", "Stopped before it was planned.", Plain, nil)
	case p.m.tried == nil:
		return nil
	}
	return compare(p.m, p.m.file.Likely, p.m.tried.Likely, n)
}

// plan asks for a plan with all the changes; without any the plan of the file is shown again.
func (p *whatPage) plan() Ask {
	p.run++
	p.err, p.stopped, p.m.tried, p.m.shown = nil, false, nil, p.m.file
	if len(p.changes) == 0 {
		p.running = false
		return Ask{Stop: true}
	}
	p.running, p.progress = true, "reading the job with the changes"
	return Ask{Plan: true, Sets: settings(p.job(), p.changes), Run: p.run}
}

// stop ends the run that goes on; its result will not be taken.
func (p *whatPage) stop() Ask {
	p.run++
	p.running, p.stopped = false, true
	return Ask{Stop: true}
}

// try adds a change, shows the page, and plans again.
func (p *whatPage) try(c change) Ask {
	p.m.turn(p)
	p.changes = append(p.changes, c)
	p.at = scroll{at: len(p.changes) + 5} // the line of the change
	if len(p.job().Changes) > 0 {
		p.at.at++
	}
	return p.plan()
}

func (p *whatPage) drop(i int) Ask {
	p.changes = slices.Delete(p.changes, i, i+1)
	return p.plan()
}

// Planned hands in the result of a run; that of an older run is left aside.
func (m *Model) Planned(run int, r *plan.Report, err error) {
	if !m.what.running || run != m.what.run {
		return
	}
	m.what.running = false
	if err == nil && (r == nil || r.Likely == nil || r.Likely.Work == nil) {
		err = errors.New("no answer came back")
	}
	if err != nil {
		m.what.err = err
		return
	}
	m.tried = r
}

// Progress says how far a run is.
func (m *Model) Progress(run int, text string) {
	if m.what.running && run == m.what.run {
		m.what.progress = clean.Line(text)
	}
}

func (p *whatPage) pickTask() Ask {
	return p.m.open(newList(p.m, "Other hours for which task?", p.askHours))
}

// askHours asks for the hours of a task.
func (p *whatPage) askHours(name string) Ask {
	i := slices.IndexFunc(p.job().Tasks, func(t *tasks.Task) bool { return t.Name == name })
	if i < 0 {
		return Ask{}
	}
	t := p.job().Tasks[i]
	_, what := hoursKey(t)
	return p.m.open(&askPage{m: p.m, name: "What if: " + what, now: hoursNow(p.m, t), accept: func(typed string) (Ask, error) {
		c, err := hoursChange(t, typed)
		if err != nil {
			return Ask{}, err
		}
		path := c.sets[0].Path
		p.changes = slices.DeleteFunc(p.changes, func(o change) bool { return len(o.sets) == 1 && slices.Equal(o.sets[0].Path, path) })
		return p.try(c), nil
	}})
}

func (p *whatPage) pickPerson() Ask {
	page := &pickPage{m: p.m, name: "The work without whom?"}
	for _, q := range p.job().People {
		if !q.Outside {
			page.add(q.Name+tradeOf(q), func() Ask { return p.try(leaveOut(p.m.file.Likely.Work, q)) })
		}
	}
	return p.m.open(page)
}

func tradeOf(q *tasks.Person) string {
	if q.Trade == "" {
		return ""
	}
	return " (" + q.Trade + ")"
}

func (p *whatPage) pickHolder() Ask {
	page := &pickPage{m: p.m, name: "Who holds one more ticket?"}
	for _, q := range p.job().People {
		if q.Outside {
			continue
		}
		page.add(q.Name+tradeOf(q), func() Ask {
			next := &pickPage{m: p.m, name: "Which ticket does " + clean.Line(q.Name) + " hold too?"}
			for _, t := range tickets(p.job(), q) {
				next.add(ticketWords(t), func() Ask { return p.try(giveTicket(q, t)) })
			}
			return p.m.open(next)
		})
	}
	return p.m.open(page)
}

func (p *whatPage) pickKept() Ask {
	page := &pickPage{m: p.m, name: "Which change of the job file?"}
	for _, c := range p.job().Changes {
		text := c.Name
		if c.Text != "" {
			text += ": " + c.Text
		}
		page.add(text, func() Ask { return p.try(change{text: clean.Line(text), sets: c.Sets}) })
	}
	return p.m.open(page)
}
