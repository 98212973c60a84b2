package problem

import (
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// Meal is the longest pause, in minutes, that counts as a meal (R6).
const Meal = 120

// ground is what is known about open hours, all in UTC minutes, before anybody works.
type ground struct {
	work  *expand.Work
	span  hours.Span
	open  map[*tasks.Place]hours.Set // opening hours, opening up and clearing up included
	face  map[*tasks.Place]hours.Set // the same less opening up and clearing up (R5)
	reach map[*tasks.Workface]hours.Set
	noise map[*tasks.Place]hours.Set
	light map[*tasks.Place]hours.Set
	valid map[*tasks.Place]map[string]hours.Set // by permit name
	hire  map[*tasks.Kit]hours.Set
	shut  map[*expand.Step][]site.Span // by weather and water, with the reasons
	own   []map[*tasks.Place]hours.Set // by person: at an open place in own hours, before shifts are cut
}

func newGround(w *expand.Work) *ground {
	g := &ground{work: w, span: w.Span,
		open: map[*tasks.Place]hours.Set{}, face: map[*tasks.Place]hours.Set{},
		reach: map[*tasks.Workface]hours.Set{}, noise: map[*tasks.Place]hours.Set{},
		light: map[*tasks.Place]hours.Set{}, valid: map[*tasks.Place]map[string]hours.Set{},
		hire: map[*tasks.Kit]hours.Set{}, shut: map[*expand.Step][]site.Span{}}
	for _, p := range w.Job.Places {
		g.place(p)
	}
	for _, k := range w.Job.Kit {
		if k.Slots != nil {
			g.hire[k] = w.Window.Slots(k.Slots)
		}
	}
	return g
}

// place lays out the hours of one place.
func (g *ground) place(p *tasks.Place) {
	closed := func(d hours.Date) bool { _, no := p.Closed[d]; return no }
	wide := hours.Span{From: g.span.From - 2*1440, To: g.span.To + 2*1440}
	open := p.Open.Spans(p.Zone, wide, closed).Or(g.work.Window.Slots(p.AlsoOpen))
	g.open[p] = open.Within(g.span)
	g.face[p] = g.worked(p, open).Within(g.span)
	if p.Noisy != nil {
		g.noise[p] = p.Noisy.Spans(p.Zone, g.span, nil)
	}
	if p.HasAt && g.wantsLight(p) {
		g.light[p] = daylight(p, g.span)
	}
	g.valid[p] = map[string]hours.Set{}
	for _, pm := range p.Permits {
		all := pm.Valid.Spans(p.Zone, wide, closed)
		g.valid[p][pm.Name] = trimmed(all, all, minutes(pm.Issue), 0).Within(g.span)
	}
	for _, f := range p.Workfaces {
		if set, limited := g.face2(f); limited {
			g.reach[f] = set
		}
	}
}

// wantsLight says whether some step at the place needs daylight: laying it out is most of the work of a place.
func (g *ground) wantsLight(p *tasks.Place) bool {
	for _, s := range g.work.Steps {
		if s.Place == p && (s.Light || s.Face != nil && s.Face.Light) {
			return true
		}
	}
	return false
}

// face2 gives the minutes in which a workface can be worked, and whether anything limits it.
func (g *ground) face2(f *tasks.Workface) (hours.Set, bool) {
	set, limited := hours.Set{g.span}, false
	if f.Reach != nil {
		set, limited = g.work.Window.Slots(f.Reach), true
	}
	if (f.Level.Pos.Given() || f.CoversAt.Pos.Given()) && f.Place.Tide != nil {
		set, limited = set.And(g.tide(f)), true
	}
	if limited {
		set = g.readied(f, set)
	}
	if f.Dry != nil {
		set, limited = set.And(g.work.Window.Slots(f.Dry)), true
	}
	return set.Within(g.span), limited
}

// readied takes way off, opening up and clearing up off each reach of a workface. The last two pass while
// the place is open and its own opening up and clearing up are not going on (R5).
func (g *ground) readied(f *tasks.Workface, reach hours.Set) hours.Set {
	up, down := hours.Minute(minutes(f.OpeningUp)), hours.Minute(minutes(f.ClearingUp))
	var keep []hours.Span
	for _, s := range reach {
		off := s.To - hours.Minute(minutes(f.WayOff))
		open := g.face[f.Place].Within(s)
		if f.Place == g.work.Window.Place {
			open = open.Within(g.manned())
		}
		if len(open) == 0 && up+down > 0 {
			continue
		}
		if up > 0 {
			s.From = open[0].From + up
		}
		if down > 0 {
			s.To = open[len(open)-1].To - down
		}
		s.To = min(s.To, off)
		keep = append(keep, s)
	}
	return hours.NewSet(keep...)
}

// worked gives a place's openings less opening up and clearing up. At the site nobody opens up before the
// window opens: an opening in which it opens begins there.
func (g *ground) worked(p *tasks.Place, open hours.Set) hours.Set {
	less := func(set hours.Set) hours.Set {
		return trimmed(set, set.Joined(Meal, nil), minutes(p.OpeningUp), minutes(p.ClearingUp))
	}
	if p != g.work.Window.Place {
		return less(open)
	}
	in := g.manned()
	return less(open).Less(hours.Set{in}).Or(less(open.Within(in)))
}

// manned is when the crew can be at the site; when they leave is asked of people and not of hours.
func (g *ground) manned() hours.Span {
	return hours.Span{From: g.work.Window.Opens, To: g.span.To + 4*1440}
}

// tide gives the minutes in which the water is below the workface's level. Where the table says
// nothing the workface counts as covered.
func (g *ground) tide(f *tasks.Workface) hours.Set {
	waters := f.Place.Tide.Waters
	if len(waters) < 2 {
		return nil
	}
	level := f.Covers()
	var out []hours.Span
	for k := 1; k < len(waters); k++ { // piece by piece: the table may have holes
		from, to := max(int64(g.span.From), waters[k-1].At), min(int64(g.span.To), waters[k].At)
		if from >= to {
			continue
		}
		spans, err := f.Place.Tide.Reach(true, level, from, to)
		if err == nil {
			out = append(out, fromSite(spans)...)
		}
	}
	return hours.NewSet(out...)
}

func fromSite(spans []site.Span) hours.Set {
	out := make([]hours.Span, len(spans))
	for i, s := range spans {
		out[i] = hours.Span{From: hours.Minute(s.From), To: hours.Minute(s.To)}
	}
	return hours.NewSet(out...)
}

func daylight(p *tasks.Place, span hours.Span) hours.Set {
	spans, err := site.Daylight(p.Lat, p.Lon, int64(span.From), int64(span.To), true)
	if err != nil {
		return nil
	}
	return fromSite(spans)
}

// trimmed takes the first head and the last tail minutes off each of the openings in joined,
// and gives the minutes of set that are left.
func trimmed(set, joined hours.Set, head, tail int) hours.Set {
	if head == 0 && tail == 0 {
		return set
	}
	var keep []hours.Span
	for _, s := range joined {
		keep = append(keep, hours.Span{From: s.From + hours.Minute(head), To: s.To - hours.Minute(tail)})
	}
	return set.And(hours.NewSet(keep...))
}

func minutes(a tasks.Amount) int { return int(a.Value) }

// access gives the minutes in which everything but the opening hours and the shifts allows the
// step to be worked: reach, conditions, hire, noise, light, permits (R5, R6).
func (g *ground) access(s *expand.Step) hours.Set {
	set := hours.Set{g.span}
	if r, limited := g.reach[s.Face]; limited && s.Face != nil {
		set = set.And(r)
	}
	if s.Noisy {
		if n, limited := g.noise[s.Place]; limited {
			set = set.And(n)
		}
	}
	if s.Light || s.Face != nil && s.Face.Light {
		set = set.And(g.light[s.Place])
	}
	for _, u := range s.Kit {
		if slots, hired := g.hire[u.Kit]; hired {
			set = set.And(slots)
		}
	}
	if !s.Site {
		for _, u := range s.Kit {
			if u.Kit.At == nil { // it goes along
				set = set.Less(hours.Set{g.away()})
				break
			}
		}
	}
	for _, name := range s.Wants {
		if v, ok := g.valid[s.Place][name]; ok {
			set = set.And(v)
		}
	}
	if shut := g.weather(s); len(shut) > 0 {
		set = set.Less(fromSite(shut))
	}
	return set
}

// weather gives when weather and water close a step, with the reasons (R25, R26); worked out once.
func (g *ground) weather(s *expand.Step) []site.Span {
	if shut, known := g.shut[s]; known {
		return shut
	}
	g.shut[s] = g.work.Nature(s)
	return g.shut[s]
}

// away is when the things that go along are not at home (R1): to the end where the hours are
// carried on past the window, for nobody comes home then (R18).
func (g *ground) away() hours.Span {
	away := hours.Span{From: g.work.Window.Opens, To: g.work.Window.Closes}
	if t := g.work.Trip; t != nil {
		away = hours.Span{From: t.Leaves, To: t.Home}
	}
	if g.work.Carried {
		away.To = g.span.To
	}
	return away
}
