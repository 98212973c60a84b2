package jobfile

import (
	"slices"
	"strings"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
)

// needs reads {fitter: 1, weld 136 PF: 1, Ines or Tom: 1, anybody: 2}.
func (r *reader) needs(f *fields, name string) []tasks.Need {
	if n := f.node(name); n != nil && n.Kind != yaml.MappingNode {
		f.fault(name, "write each ticket with how many: {fitter: 1, weld 136 PF: 1}", "expected tickets with how many, found %s", kindOf(n))
		return nil
	}
	var out []tasks.Need
	for _, kv := range f.pairs(name) {
		s, ok := r.text(kv[1], f.lead(name), "1")
		if !ok {
			continue
		}
		count, ok := r.whole(kv[1], f.lead(name), s, &key{low: 1, high: 50, example: "1"})
		if !ok {
			continue
		}
		if n, ok := r.need(f, name, kv[0]); ok {
			n.Count, n.Pos = count, r.pos(kv[0])
			out = append(out, n)
			r.needRefs = append(r.needRefs, needRef{n, f})
		}
	}
	return out
}

// need reads one key of needs.
func (r *reader) need(f *fields, name string, at *yaml.Node) (tasks.Need, bool) {
	text := strings.TrimSpace(at.Value)
	if text == "anybody" {
		return tasks.Need{}, true
	}
	if names := strings.Split(text, " or "); r.isPerson(names[0]) {
		for _, n := range names {
			r.personRefs = append(r.personRefs, personRef{ref{n, r.pos(at)}, f.lead(name)})
		}
		return tasks.Need{Who: names}, true
	}
	if _, ok := r.newName(at, "ticket", true); !ok {
		return tasks.Need{}, false
	}
	n := tasks.Need{}
	for i, part := range strings.Split(text, " and ") {
		if strings.TrimSpace(part) == "" {
			r.fault(at, "write for instance fitter and painter", "%s%s names no ticket", f.lead(name), short(text))
			return n, false
		}
		t, err := parseTicket(part)
		if err != nil {
			r.advice(at, f.lead(name), err, "write for instance weld 136 PF")
			return n, false
		}
		t.Pos = r.pos(at)
		if i == 0 {
			n.Ticket = t
		} else {
			n.Also = append(n.Also, t)
		}
	}
	n.Watch = n.Ticket.Name == tasks.FireWatchTicket
	return n, true
}

func (r *reader) isPerson(name string) bool {
	return slices.ContainsFunc(r.job.People, func(p *tasks.Person) bool { return p.Name == name })
}

type needRef struct {
	need tasks.Need
	f    *fields
}

// judgeNeeds checks that enough people hold the tickets asked for, at the task's place.
func (r *reader) judgeNeeds() {
	if r.ticketsLost {
		return
	}
	var tickets []string
	for _, p := range r.job.People {
		for _, t := range p.Tickets {
			if !slices.Contains(tickets, t.Name) {
				tickets = append(tickets, t.Name)
			}
		}
	}
	for _, n := range r.needRefs {
		place := r.placeOfTask(n.f)
		holders, here := 0, 0
		for _, p := range r.job.People {
			if !n.holds(p) {
				continue
			}
			holders++
			if place == nil || p.Places == nil || slices.Contains(p.Places, place.Name) {
				here++
			}
		}
		what := n.f.what + ": needs"
		word := n.need.Ticket.String()
		switch {
		case n.need.Who != nil && n.need.Count > len(n.need.Who):
			r.faultAt(n.need.Pos, "name more people, or ask for fewer", "%s: %d of %s", what, n.need.Count, list(n.need.Who, 6))
		case n.need.Who != nil || n.need.Ticket.Name == "" && len(r.job.People) == 0:
		case holders == 0 && !slices.Contains(tickets, n.need.Ticket.Name):
			r.faultAt(n.need.Pos, r.among(word, tickets, "give somebody this ticket under `people`"), "%s: nobody has the ticket %q", what, word)
		case holders == 0:
			r.faultAt(n.need.Pos, "look at the process, positions, joints and thickness of the tickets, or ask for less", "%s: nobody's ticket covers %q", what, word)
		case here < n.need.Count && here < holders:
			r.faultAt(n.need.Pos, "ask for fewer, or let somebody go there", "%s: %d with %q are asked for, only %d may be at %s", what, n.need.Count, word, here, place.Name)
		case holders < n.need.Count:
			r.faultAt(n.need.Pos, "ask for fewer, or give somebody else the ticket", "%s: %d with %q are asked for, only %d there", what, n.need.Count, word, holders)
		}
	}
}

func (n needRef) holds(p *tasks.Person) bool {
	return p.Holds(n.need.Ticket) && p.HoldsAll(n.need.Also)
}
