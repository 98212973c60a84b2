package check

import (
	"fmt"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// kitPlace checks that a step uses kit where the kit is (R1): at its own place, else along with
// those who go.
func (c *checker) kitPlace(r *row) {
	if r.s.Absent {
		return
	}
	for _, u := range r.s.Kit {
		if at := u.Kit.At; at != nil && at != r.s.Place {
			c.add("R1", r, "at "+at.Name, "at "+r.s.Place.Name, "uses %s, which stays elsewhere", u.Kit.Name)
			continue
		}
		if u.Kit.At != nil || r.s.Place == c.w.Window.Place {
			continue
		}
		for _, s := range r.taken(stays(u)) {
			if s.Overlaps(c.away()) {
				c.add("R1", r, "", c.when(max(s.From, c.away().From), r.s.Place), "uses %s while it is away with those who go", u.Kit.Name)
				break
			}
		}
	}
}

func stays(u expand.Use) bool { return u.Stays || u.Kit.Stays }

// taken gives the spans in which a step takes what it uses: its pieces, or with stays all from
// start to finish (R7).
func (r *row) taken(stays bool) []hours.Span {
	if stays && r.p.Finish > r.p.Start {
		return []hours.Span{{From: r.p.Start, To: r.p.Finish}}
	}
	return r.p.Pieces
}

// kit checks that no more of a kit is used at once than there is (R7).
func (c *checker) kit() {
	by := map[*tasks.Kit][]use{}
	for _, r := range c.list {
		if r.bad || r.s.Absent {
			continue
		}
		for _, u := range r.s.Kit {
			for _, s := range r.taken(stays(u)) {
				by[u.Kit] = append(by[u.Kit], use{Span: s, r: r, amount: float64(u.Count)})
			}
		}
	}
	c.landed(by)
	for _, k := range c.w.Job.Kit {
		c.within(by[k], k.Name, "", func(hours.Minute) (float64, bool) { return float64(k.Count), true })
	}
}

// power checks the kVA drawn at each place against its mains and what the kit there gives (R7).
func (c *checker) power() {
	by := map[*tasks.Place][]use{}
	for _, r := range c.list {
		if r.bad || r.s.Absent || r.s.Power <= 0 {
			continue
		}
		for _, s := range r.p.Pieces {
			by[r.s.Place] = append(by[r.s.Place], use{Span: s, r: r, amount: r.s.Power})
		}
	}
	for _, p := range c.w.Job.Places {
		if len(by[p]) == 0 {
			continue
		}
		for _, t := range c.changes() { // look again when the supply changes
			for _, u := range by[p] {
				if u.Has(t) {
					by[p] = append(by[p], use{Span: hours.Span{From: t, To: t + 1}, r: u.r})
					break
				}
			}
		}
		c.within(by[p], "power at "+p.Name, " kVA", func(t hours.Minute) (float64, bool) { return c.supply(p, t) })
	}
}

// supply gives the kVA there are at a place in the minute that begins at t: its mains and the kit
// that gives power there. ok is false where nothing is stated. A generator that goes along adds
// to what a home place has while it is there, but says nothing of a home place that states none.
func (c *checker) supply(p *tasks.Place, t hours.Minute) (kva float64, ok bool) {
	kva, ok = p.Mains.Value, p.Mains.Value > 0 || p.Mains.Pos.Given()
	along := 0.0
	for _, k := range c.w.Job.Kit {
		gives := k.Gives * float64(k.Count)
		if l, hired := c.hire[k]; hired && !l.has(t) {
			gives = 0
		}
		switch {
		case k.Gives <= 0:
		case k.At == p:
			kva, ok = kva+gives, true
		case k.At != nil:
		case p == c.w.Window.Place:
			kva, ok = kva+gives, true
		case !c.away().Has(t):
			along += gives
		}
	}
	return kva + along, ok
}

// changes lists the minutes at which the supply of a place may change.
func (c *checker) changes() []hours.Minute {
	out := []hours.Minute{c.away().From, c.away().To}
	for _, k := range c.w.Job.Kit {
		if k.Gives > 0 {
			for _, s := range k.Slots {
				if span, ok := c.w.Window.Slot(s); ok {
					out = append(out, span.From, span.To)
				}
			}
		}
	}
	return out
}

// within reports the first minute at which more is used than there is.
func (c *checker) within(uses []use, what, unit string, limit func(hours.Minute) (float64, bool)) {
	const grain = 1e-9 // kVA: sums of decimal fractions differ by less
	told := false
	sweep(uses, func(t hours.Minute, running []use) {
		sum := 0.0
		for _, u := range running {
			sum += u.amount
		}
		if most, ok := limit(t); ok && sum > most+grain && !told && len(running) > 0 {
			told = true
			last := running[len(running)-1].r
			c.add("R7", last, fmt.Sprintf("at most %g%s", most, unit), fmt.Sprintf("%g%s at %s", sum, unit, c.when(t, last.s.Place)), "takes more than there is: %s", what)
		}
	})
}
