package model

import (
	"fmt"
	"strconv"
	"strings"

	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/quantity"
)

// change is one thing tried: what it says, and the values of the job file it stands for.
type change struct {
	text   string
	sets   []tasks.Setting
	person string // for a ticket: whose, so that several tickets of one person become one value
	ticket tasks.Ticket
}

// hoursKey gives the path to the hours of a task in the job file: those given in man-hours or as
// standing time are replaced in kind; a task of a repeated block is changed in every round.
func hoursKey(t *tasks.Task) (path []string, what string) {
	key := "hours"
	switch {
	case t.ManHours.Pos.Given():
		key = "man-hours"
	case !t.Hours.Pos.Given() && t.Standing.Pos.Given() && t.Kind == tasks.Plain:
		key = "standing"
	}
	if t.Block == "" {
		return []string{"tasks", t.Name, key}, key + " of " + clean.Line(t.Name)
	}
	base := strings.TrimSuffix(t.Name, fmt.Sprintf(" %s %d", t.Block, t.Round))
	return []string{"repeat", t.Block, "tasks", base, key}, key + " of " + clean.Line(base) + " in every round of " + clean.Line(t.Block)
}

// hoursChange makes the change of a task's hours from what was typed; the error says what is
// wrong with it.
func hoursChange(t *tasks.Task, typed string) (change, error) {
	typed = strings.TrimSpace(typed)
	if typed == "" {
		return change{}, fmt.Errorf("type the hours, for instance 3 h or 3 to 5 h")
	}
	if _, err := strconv.ParseFloat(typed, 64); err == nil {
		typed += " h"
	}
	r, err := quantity.ParseRange(typed, quantity.Time)
	switch {
	case err != nil && quantity.Hint(err) != "":
		return change{}, fmt.Errorf("%w (%s)", err, quantity.Hint(err))
	case err != nil:
		return change{}, err
	case r.Low < 0:
		return change{}, fmt.Errorf("%q is below zero; type for instance 3 h", typed)
	}
	path, what := hoursKey(t)
	return change{text: what + ": " + typed, sets: []tasks.Setting{{Path: path, Value: strconv.Quote(typed)}}}, nil
}

// leaveOut makes the change that somebody does not come: they are there only until a day before
// the plan begins.
func leaveOut(w *expand.Work, p *tasks.Person) change {
	day := w.Span.From.In(agenda.Zone(w, nil)).AddDate(0, 0, -2).Format("2006-01-02")
	return change{text: clean.Line(p.Name) + " does not come",
		sets: []tasks.Setting{{Path: []string{"people", p.Name, "until"}, Value: strconv.Quote(day + " 00:00")}}}
}

// giveTicket makes the change that somebody holds one more ticket.
func giveTicket(p *tasks.Person, t tasks.Ticket) change {
	return change{text: clean.Line(p.Name) + " holds the ticket " + ticketWords(t) + " too", person: p.Name, ticket: t}
}

// ticketWords names a ticket: "fitter", "weld 136 PF PA fillet".
func ticketWords(t tasks.Ticket) string {
	words := []string{t.Name}
	if t.Process != "" {
		words = append(words, t.Process)
	}
	words = append(append(words, t.Positions...), t.Joints...)
	if t.ThickTo > 0 {
		words = append(words, fmt.Sprintf("%g to %g mm", t.ThickFrom, t.ThickTo))
	}
	return clean.Line(strings.Join(words, " "))
}

// ticketValue writes a ticket as the job file has it.
func ticketValue(t tasks.Ticket) string {
	if t.Name != "weld" {
		return strconv.Quote(t.Name)
	}
	process := t.Process
	if process == "" {
		process = "all"
	}
	parts := []string{"weld: " + process}
	if len(t.Positions) > 0 {
		parts = append(parts, "positions: ["+strings.Join(t.Positions, ", ")+"]")
	}
	if len(t.Joints) > 0 {
		parts = append(parts, "joints: ["+strings.Join(t.Joints, ", ")+"]")
	}
	if t.ThickTo > 0 {
		parts = append(parts, fmt.Sprintf("thickness: %g mm to %g mm", t.ThickFrom, t.ThickTo))
	}
	return "{" + strings.Join(parts, ", ") + "}"
}

// settings gives the values that all the changes stand for, in the order they were made; the
// tickets given to one person are one value with those they hold.
func settings(job *tasks.Job, list []change) []tasks.Setting {
	var out []tasks.Setting
	done := map[string]bool{}
	for _, c := range list {
		out = append(out, c.sets...)
		if c.person == "" || done[c.person] {
			continue
		}
		done[c.person] = true
		var values []string
		for _, p := range job.People {
			for _, t := range p.Tickets {
				if p.Name == c.person {
					values = append(values, ticketValue(t))
				}
			}
		}
		for _, d := range list {
			if d.person == c.person {
				values = append(values, ticketValue(d.ticket))
			}
		}
		out = append(out, tasks.Setting{Path: []string{"people", c.person, "tickets"}, Value: "[" + strings.Join(values, ", ") + "]"})
	}
	return out
}

// tickets lists the tickets that others hold and p does not, each once, in the order of the file.
func tickets(job *tasks.Job, p *tasks.Person) []tasks.Ticket {
	has := map[string]bool{}
	for _, t := range p.Tickets {
		has[ticketValue(t)] = true
	}
	var out []tasks.Ticket
	for _, q := range job.People {
		for _, t := range q.Tickets {
			if !has[ticketValue(t)] && !q.Outside {
				has[ticketValue(t)] = true
				out = append(out, t)
			}
		}
	}
	return out
}

// Tried tells the changes of the what-if page as lines of the job file: "tasks/weld lugs/hours: 3 h".
func (m *Model) Tried() []string {
	var out []string
	for _, s := range settings(m.file.Job, m.what.changes) {
		out = append(out, clean.Line(strings.Join(s.Path, "/")+": "+s.Value))
	}
	return out
}
