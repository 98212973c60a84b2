package problem

import (
	"fmt"

	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// part is one thing that must be open for a step, with its name in a sentence.
type part struct {
	name string
	set  hours.Set
}

// parts lists what must be open for a step beside the shifts of its people (R5).
func (g *ground) parts(s *expand.Step) []part {
	place := s.Place.Name
	out := []part{{"the working hours of " + place, g.face[s.Place]}}
	if r, limited := g.reach[s.Face]; limited && s.Face != nil {
		out = append(out, part{"the reach of " + place + "/" + s.Face.Name, r})
	}
	if n, limited := g.noise[s.Place]; s.Noisy && limited {
		out = append(out, part{"the noisy-work hours of " + place, n})
	}
	if s.Light || s.Face != nil && s.Face.Light {
		out = append(out, part{"daylight at " + place, g.light[s.Place]})
	}
	for _, u := range s.Kit {
		if slots, hired := g.hire[u.Kit]; hired {
			out = append(out, part{"the hire of " + u.Kit.Name, slots})
		}
	}
	for _, name := range s.Wants {
		if v, ok := g.valid[s.Place][name]; ok {
			out = append(out, part{"the permit " + name, v})
		}
	}
	if shut := g.weather(s); len(shut) > 0 {
		out = append(out, part{"the hours that weather and water leave it (closed most by: " + mostly(shut) + ")", hours.Set{g.span}.Less(fromSite(shut))})
	}
	return out
}

// mostly gives the reason of the longest of some spans, the first of equals.
func mostly(shut []site.Span) string {
	longest := shut[0]
	for _, s := range shut[1:] {
		if s.To-s.From > longest.To-longest.From {
			longest = s
		}
	}
	return longest.Why
}

// shutOut says why a step has no open hour: what is never open, else what is never open together.
func (g *ground) shutOut(s *expand.Step) string {
	parts := g.parts(s)
	for _, p := range parts {
		if len(p.set) == 0 {
			return p.name + ": none in the time planned over"
		}
	}
	for i, a := range parts {
		for _, b := range parts[i+1:] {
			if len(a.set.And(b.set)) == 0 {
				return fmt.Sprintf("%s and %s have no minute in common", a.name, b.name)
			}
		}
	}
	return "there is no open hour for it: its place, reach, hire, permits and other hours are never open all at once"
}
