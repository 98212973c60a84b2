package check

import (
	"slices"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// place is what is open at a place, minute by minute.
type place struct {
	open  line // opening hours, opening up and clearing up included: duty (R15)
	work  line // the same without them: working time (R5)
	noisy line // noisy work allowed
	light line // daylight, by civil twilight; laid out when first asked for
	valid []line
}

// siteWatch is the fire watch at the window's place where the job says nothing, minutes (R13).
const siteWatch = 60

// face is when a workface can be reached (R5), and when it is dry and warm.
type face struct {
	reach, dry       line
	limited, weather bool
}

// gate is something that must be open for a step to be worked, beside its place and its people.
type gate struct {
	line
	rule, who, why string
}

// layOut works out all lines, then what each step needs open.
func (c *checker) layOut() {
	for _, p := range c.w.Job.Places {
		c.layPlace(p)
	}
	for _, r := range c.list {
		if !r.bad && c.places[r.s.Place] == nil {
			c.layPlace(r.s.Place)
		}
	}
	for _, k := range c.w.Job.Kit {
		if k.Slots != nil {
			c.hire[k] = c.slots(c.line(false), k.Slots)
		}
	}
	for _, p := range c.w.Job.People {
		c.layPerson(p)
	}
	for _, r := range c.list {
		if !r.bad && !r.s.Absent {
			c.layStep(r)
		}
	}
}

func (c *checker) layPlace(p *tasks.Place) {
	if p.Zone == nil {
		return
	}
	closed := func(d hours.Date) bool { _, no := p.Closed[d]; return no }
	open := c.slots(c.pattern(p.Open, p.Zone, closed), p.AlsoOpen)
	work := line{open.from, slices.Clone(open.on)}
	up, down := int(p.OpeningUp.Value), int(p.ClearingUp.Value)
	work.trim(up, down, meal)
	if win := c.w.Window; p == win.Place && up > 0 { // nobody opens up before they come
		in := line{open.from, slices.Clone(open.on)}
		in.fill(hours.Span{From: c.lo, To: win.Opens}, false)
		in.trim(up, down, meal)
		for t := max(win.Opens, c.lo); t < c.hi; t++ {
			work.on[t-c.lo] = in.has(t)
		}
	}
	out := &place{open: open, work: work}
	if p.Noisy != nil {
		out.noisy = c.pattern(p.Noisy, p.Zone, nil)
	}
	for _, pm := range p.Permits { // R23: no permit is issued on a closed day
		valid := c.pattern(pm.Valid, p.Zone, closed)
		valid.trim(int(pm.Issue.Value), 0, 0)
		out.valid = append(out.valid, valid)
	}
	for _, f := range p.Workfaces {
		c.faces[f] = c.layFace(p, f, work)
	}
	c.places[p] = out
}

// layFace lays out when a workface can be reached; work has the minutes in which its place can be worked.
func (c *checker) layFace(p *tasks.Place, f *tasks.Workface, work line) face {
	out := face{reach: c.line(true), limited: f.Reach != nil, weather: f.Dry != nil}
	if f.Reach != nil {
		out.reach = c.slots(c.line(false), f.Reach)
	}
	if (f.Level.Pos.Given() || f.CoversAt.Pos.Given()) && p.Tide != nil {
		out.limited = true
		for t := c.lo; t < c.hi; t++ { // false where the table does not reach
			if !p.Tide.Clear(true, covers(f), int64(t)) {
				out.reach.on[t-c.lo] = false
			}
		}
	}
	if out.limited {
		c.ready(p, f, work, out.reach)
	}
	if f.Dry != nil {
		out.dry = c.slots(c.line(false), f.Dry)
	}
	return out
}

// ready takes way off, opening up and clearing up off every run of a workface's reach. Opening up begins with
// the first minute of the run in which the place can be worked, at the site not before the window opens;
// clearing up ends with the last (R5).
func (c *checker) ready(p *tasks.Place, f *tasks.Workface, work, reach line) {
	up, down := hours.Minute(f.OpeningUp.Value), hours.Minute(f.ClearingUp.Value)
	open := func(t hours.Minute) bool {
		return work.has(t) && (p != c.w.Window.Place || t >= c.w.Window.Opens)
	}
	for from := c.lo; from < c.hi; {
		to := from
		for to < c.hi && reach.has(to) {
			to++
		}
		if to == from {
			from++
			continue
		}
		first, last := from, to
		for first < to && !open(first) {
			first++
		}
		for last > first && !open(last-1) {
			last--
		}
		if to < c.hi {
			reach.fill(hours.Span{From: to - hours.Minute(f.WayOff.Value), To: to}, false)
		}
		if up > 0 || down > 0 && first == to {
			reach.fill(hours.Span{From: from, To: min(first+up, to)}, false)
		}
		if down > 0 && (last < to || to < c.hi) {
			reach.fill(hours.Span{From: max(last-down, from), To: to}, false)
		}
		from = to
	}
}

// daylight lays out a place's light minute by minute.
func (c *checker) daylight(p *tasks.Place) line {
	at := c.places[p]
	if at.light.on == nil {
		at.light = c.line(false)
		for t := c.lo; t < c.hi && p.HasAt; t++ { // without a position nothing is known to be light
			at.light.on[t-c.lo] = site.LightAt(p.Lat, p.Lon, int64(t), true)
		}
	}
	return at.light
}

// layStep collects what must be open for a hands-on step (R5, R23), and whether R13 and R14 hold
// for it.
func (c *checker) layStep(r *row) {
	s, at := r.s, c.places[r.s.Place]
	need := func(l line, rule, who, why string) {
		r.access = append(r.access, gate{l, rule, who, why})
	}
	if s.Face != nil {
		f := c.faces[s.Face]
		if f.limited {
			need(f.reach, "R5", s.Face.Name, "cannot be reached")
		}
		if f.weather {
			need(f.dry, "R5", s.Face.Name, "is not dry and warm")
		}
	}
	if s.Noisy && s.Place.Noisy != nil {
		need(at.noisy, "R5", "noisy work", "is not allowed")
	}
	if s.Light || s.Face != nil && s.Face.Light {
		need(c.daylight(s.Place), "R5", "it", "is dark")
	}
	for _, u := range s.Kit {
		if l, hired := c.hire[u.Kit]; hired {
			need(l, "R23", u.Kit.Name, "is not on hire")
		}
	}
	for i, pm := range s.Place.Permits {
		if wants(s, pm) {
			need(at.valid[i], "R23", "the permit "+pm.Name, "is not valid")
		}
	}
	c.weather(r, need)
	t := s.Task
	r.alone = s.Lone || s.Class == expand.Hands && (s.Hot || t.Kind == tasks.Lift ||
		s.Face != nil && (s.Face.Closed || s.Face.Water || s.Face.Tidal))
	if t.Lone != nil && !*t.Lone {
		r.alone = false
	}
	if s.Hot && s.Class == expand.Hands {
		r.watch = int(s.Place.FireWatch.Value)
		if s.Place == c.w.Window.Place && !s.Place.FireWatch.Pos.Given() && r.watch == 0 {
			r.watch = siteWatch
		}
		if t.FireWatch.Pos.Given() {
			r.watch = int(t.FireWatch.Value)
		}
		r.watch = max(r.watch, s.Watch)
	}
	for k, names := range [][]string{r.p.People, r.p.Relief} {
		for _, n := range names {
			if p := c.people[n]; p != nil {
				r.team[k] = append(r.team[k], p)
			}
		}
	}
}

// wants says whether a permit is for the step: by name, for one of its states, for its kind, or
// for the workface that it is at.
func wants(s *expand.Step, pm tasks.Permit) bool {
	if slices.Contains(s.Wants, pm.Name) || pm.For == string(s.Task.Kind) || pm.For == tasks.HotWorkState && s.Hot {
		return true
	}
	for _, st := range s.States {
		if st.Name == pm.For {
			return true
		}
	}
	f := s.Face
	return f != nil && (pm.For == "closed space" && f.Closed || pm.For == "over water" && f.Water || pm.For == "between tides" && f.Tidal)
}
