package check

import (
	"slices"

	"sailby/tasks"
	"sailby/tasks/hours"
)

// person is where somebody is and when they are on shift, minute by minute, at each place where
// they can be.
type person struct {
	*tasks.Person
	here map[*tasks.Place]line // at the place (R1)
	open map[*tasks.Place]line // at the place while it is open, in their own hours
	duty map[*tasks.Place]line // the same inside their shifts (R15): on shift
	stay map[*tasks.Place]line // on shift, gaps of a meal filled: for a watch (R13)
}

// layPerson works out where somebody is (R1), then their shifts (R15).
func (c *checker) layPerson(p *tasks.Person) {
	out := &person{Person: p, here: map[*tasks.Place]line{}, open: map[*tasks.Place]line{},
		duty: map[*tasks.Place]line{}, stay: map[*tasks.Place]line{}}
	c.people[p.Name] = out
	if !p.Outside {
		c.inside = append(c.inside, out)
	}
	work := c.line(false) // hours at open places
	for pl, at := range c.places {
		spans := c.stays(p, pl)
		if len(spans) == 0 {
			continue
		}
		here := c.line(false)
		for _, s := range spans {
			here.fill(s, true)
		}
		open := line{c.lo, slices.Clone(here.on)}
		own := c.own(p, pl)
		for i := range open.on {
			open.on[i] = open.on[i] && at.open.on[i] && own.on[i]
			work.on[i] = work.on[i] || open.on[i]
		}
		out.here[pl], out.open[pl] = here, open
	}
	shift := c.line(true)
	if !p.Outside {
		shift = c.shifts(work, c.legs(p))
	}
	for pl, open := range out.open {
		duty := line{c.lo, slices.Clone(open.on)}
		for i := range duty.on {
			duty.on[i] = duty.on[i] && shift.on[i]
		}
		out.duty[pl], out.stay[pl] = duty, duty.joined(meal)
	}
}

// own lays out somebody's own hours on the clock of a place; without any they follow the place.
func (c *checker) own(p *tasks.Person, at *tasks.Place) line {
	pattern := p.Hours
	if pattern == nil {
		if len(p.Off) == 0 || p.Outside {
			return c.line(true)
		}
		pattern = hours.Always
	}
	return c.pattern(pattern, at.Zone, func(d hours.Date) bool { return p.Off[d] })
}

// stays gives the spans in which somebody is at a place.
func (c *checker) stays(p *tasks.Person, at *tasks.Place) []hours.Span {
	win := c.w.Window
	there := c.there(p)
	var spans []hours.Span
	if p.Outside {
		home := win.Place.Name
		if len(p.Places) > 0 {
			home = p.Places[0]
		}
		for _, s := range p.Booked {
			if span, ok := win.Slot(s); ok && at.Name == home {
				spans = append(spans, span)
			}
		}
		return clip(spans, there)
	}
	if len(p.Places) > 0 && !slices.Contains(p.Places, at.Name) {
		return nil
	}
	site := at == win.Place
	away := c.away()
	switch {
	case !c.goes(p) && !site:
		spans = []hours.Span{c.all()}
	case !c.goes(p):
	case site:
		from, to := win.Opens, win.Closes
		if t := c.w.Trip; t != nil {
			from, to = t.Arrives, t.Departs
		}
		if c.carried {
			to = c.hi
		}
		spans = []hours.Span{{From: from, To: to}}
	default:
		spans = []hours.Span{{From: c.lo, To: away.From}, {From: away.To, To: c.hi}}
	}
	return clip(spans, there)
}

func (c *checker) all() hours.Span { return hours.Span{From: c.lo, To: c.hi} }

// there gives the span in which somebody is there at all.
func (c *checker) there(p *tasks.Person) hours.Span {
	all := c.all()
	if p.From != nil {
		if t, _, ok := c.w.Window.At(*p.From); ok {
			all.From = t
		}
	}
	if p.Until != nil {
		if t, _, ok := c.w.Window.At(*p.Until); ok {
			all.To = t
		}
	}
	return all
}

// goes says whether somebody works at the site: the trip names them, or names nobody, and they
// are not tied to other places.
func (c *checker) goes(p *tasks.Person) bool {
	named := c.w.Trip == nil || c.w.Trip.People == nil || slices.Contains(c.w.Trip.People, p.Name)
	return named && (len(p.Places) == 0 || slices.Contains(p.Places, c.w.Window.Place.Name))
}

// away gives the span in which those who go, and the kit that goes along, are not at home. When
// the hours are carried on past the window (R18) nobody comes home.
func (c *checker) away() hours.Span {
	away := hours.Span{From: c.w.Window.Opens, To: c.w.Window.Closes}
	if t := c.w.Trip; t != nil {
		away = hours.Span{From: t.Leaves, To: t.Home}
	}
	if c.carried {
		away.To = c.hi
	}
	return away
}

// legs gives the legs of the trip that somebody makes, in order: none out where they come later
// by their own means, none back where they leave before the others.
func (c *checker) legs(p *tasks.Person) []hours.Span {
	t := c.w.Trip
	if t == nil || !c.goes(p) {
		return nil
	}
	var legs []tasks.Leg
	if c.there(p).From < t.Arrives {
		legs = append(legs, t.Out...)
	}
	if c.there(p).To > t.Departs {
		legs = append(legs, t.Back...)
	}
	var out []hours.Span
	for _, l := range legs {
		if l.From < l.To {
			out = append(out, hours.Span{From: l.From, To: l.To})
		}
	}
	return out
}

func clip(spans []hours.Span, to hours.Span) []hours.Span {
	var out []hours.Span
	for _, s := range spans {
		s.From, s.To = max(s.From, to.From), min(s.To, to.To)
		if s.Len() > 0 {
			out = append(out, s)
		}
	}
	return out
}
