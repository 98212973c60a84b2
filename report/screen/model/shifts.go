package model

import (
	"slices"

	"sailby/report/agenda"
)

// together puts a shift all of whose work is part of another one into that: somebody from outside
// who comes for an hour is shown with the crew's day.
func together(list []*agenda.Shift) []*agenda.Shift {
	var out []*agenda.Shift
	for i, s := range list {
		into := slices.IndexFunc(list, func(t *agenda.Shift) bool { return t != s && t.Site == s.Site && holds(t, s) })
		if into < 0 || into > i && holds(s, list[into]) { // of two that are alike the first stays
			out = append(out, s)
			continue
		}
		t := list[into]
		t.From, t.To = min(t.From, s.From), max(t.To, s.To)
		for _, q := range s.People {
			if !slices.ContainsFunc(t.People, func(p agenda.Person) bool { return p.Name == q.Name }) {
				t.People = append(t.People, q)
			}
		}
	}
	return out
}

// holds says whether every piece of s is one of t too.
func holds(t, s *agenda.Shift) bool {
	for _, e := range s.Entries {
		if !slices.ContainsFunc(t.Entries, func(f agenda.Entry) bool { return f.Step == e.Step && f.Span == e.Span && f.Watch == e.Watch }) {
			return false
		}
	}
	return true
}
