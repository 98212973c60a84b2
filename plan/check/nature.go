package check

import (
	"math"
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Limits of R25 where a paint or preparation does not say, and how far the arithmetic of others may be off.
const (
	spread     = 3.0  // K above the dew point
	usualSteel = 10.0 // °C
	siteHolds  = 240  // minutes from preparation to the first coat at the window's place
	homeHolds  = 480
	slackK     = 0.01 // K
	slackShare = 1e-4 // of humidity
	gasTest    = 15   // hands-on minutes (R27)
)

var usualWind = map[string]float64{"brush": 10, "roller": 10, "airless": 6.7, "air spray": 6.7}

// wipes says whether a preparation is only washing or wiping.
func wipes(t *tasks.Task) bool {
	if t.Method == "wash" || t.Method == "solvent wipe" {
		return true
	}
	grade := strings.NewReplacer("-", " ", "sspc ", "").Replace(strings.ToLower(t.Grade))
	return t.Method == "" && slices.Contains([]string{"solvent clean", "sp 1", "sp1", "degrease", "fresh water wash", "fresh water", "wash"}, strings.TrimPrefix(grade, "sspc "))
}

// under gives the minutes in which water covers a workface (R26); ok is false where none comes.
func (c *checker) under(f *tasks.Workface) (line, bool) {
	if f == nil || f.Place == nil {
		return line{}, false
	}
	level := f.Level.Pos.Given() || f.CoversAt.Pos.Given()
	switch {
	case level && f.Place.Tide != nil:
		l := c.line(false)
		for t := c.lo; t < c.hi; t++ {
			l.on[t-c.lo] = !f.Place.Tide.Clear(true, covers(f), int64(t))
		}
		return l, true
	case f.Tidal && f.Reach != nil:
		l := c.slots(c.line(false), f.Reach)
		for i := range l.on {
			l.on[i] = !l.on[i]
		}
		return l, true
	}
	return line{}, false
}

// covers gives the height of tide at which a workface is covered, less the allowance for pressure and
// surge (R26).
func covers(f *tasks.Workface) float64 {
	level := f.Level.Value
	if f.CoversAt.Pos.Given() {
		level = f.CoversAt.Value
	}
	if sea := f.Place.Sea; sea.AllowPos.Given() {
		low := sea.Allow.LeastPressure
		switch {
		case low > 0:
			level -= max(0, 1013-low)*0.01 + sea.Allow.Surge
		case sea.Allow.Surge > 0:
			level -= sea.Allow.Surge
		default:
			level -= 0.3
		}
	}
	return level
}

// water checks that what is done at a workface is fit for water before it comes (R26).
func (c *checker) water(r *row) {
	s, t := r.s, r.s.Task
	if s.Class != expand.Hands || s.Working == 0 || t.Covered != nil && *t.Covered || s.Paint == nil && t.Covered == nil {
		return
	}
	under, floods := c.under(s.Face)
	if !floods {
		return
	}
	if s.Paint == nil {
		end := r.p.Finish
		for _, o := range c.list {
			if o.s.Task == t && !o.bad && o.s.Class == expand.Clock && o.s.Index > s.Index && t.Standing.Pos.Given() {
				end = max(end, o.p.Finish)
			}
		}
		for m := r.p.Start; m < end && m < c.span.To; m++ {
			if under.has(m) {
				c.add("R26", r, "", c.when(m, s.Place), "is covered by water before it is done")
				return
			}
		}
		return
	}
	for _, piece := range r.p.Pieces {
		cured := 0.0
		for m := piece.To; m < c.span.To && cured < 1-2e-9; m++ {
			if under.has(m) {
				c.add("R26", r, "1", share(cured), "%s is covered by water at %s before it is fit for it", s.Paint.Name, c.when(m, s.Place))
				return
			}
			cured += gains(s, s.Paint.ImmersionMin.Rate, m)
		}
	}
}

// gains gives the share of the way to a state that a film gains in a minute (R11).
func gains(s *expand.Step, rate func(celsius float64) float64, m hours.Minute) float64 {
	p, steel, humid := s.Paint, usualSteel, math.Inf(1)
	if s.Place.Steel.Pos.Given() {
		steel = s.Place.Steel.Value
	}
	if w, ok, _ := felt(s, m); ok {
		steel, humid = w.Steel, math.Exp(magnus(math.Min(w.Dew, w.Air))-magnus(w.Steel))
	}
	if steel < p.ApplyMin || p.RHMin > 0 && humid < p.RHMin-slackShare {
		return 0
	}
	return rate(steel)
}

// holds checks the time from preparation to the first coat that waits for it (R25).
func (c *checker) holds() {
	for _, t := range c.w.Job.Tasks {
		if t.Kind == tasks.Coat {
			if first := c.firstHands(t); first != nil {
				c.heldBy(first, t, map[*tasks.Task]bool{})
			}
		}
	}
}

func (c *checker) heldBy(first *row, at *tasks.Task, seen map[*tasks.Task]bool) {
	for _, l := range at.Links {
		f := c.named(l.Task)
		if f != nil && (f.Kind == tasks.Test || f.Kind == tasks.SignOff) && !seen[f] && l.From != tasks.Start && c.firstHands(f) != nil {
			seen[f] = true
			c.heldBy(first, f, seen)
			continue
		}
		if f == nil || f.Kind != tasks.Prep || seen[f] || l.From == tasks.Start || l.Max != nil {
			continue
		}
		last := c.last(f)
		if last == nil || last.s.Absent || last.s.Class != expand.Hands || len(f.Surface) > 0 && len(first.s.Task.Surface) > 0 && !meet(f.Surface, first.s.Task.Surface) {
			continue
		}
		seen[f] = true
		most := hours.Minute(homeHolds)
		switch {
		case f.HoldsFor.Pos.Given():
			most = hours.Minute(f.HoldsFor.Value)
		case wipes(f):
			c.heldBy(first, f, seen)
			continue
		case f.Place == c.w.Window.Place:
			most = siteHolds
		}
		if f.InOneGo == nil && last.s.Working+last.s.SetUp <= int(most) {
			for i := 1; i < len(last.p.Pieces); i++ {
				if gap := (hours.Span{From: last.p.Pieces[i-1].To, To: last.p.Pieces[i].From}); !last.isMeal(gap) {
					c.add("R25", last, "", c.when(gap.From, f.Place), "is left half done, and would turn")
					break
				}
			}
		}
		if first.p.Start > last.p.Finish+most {
			c.add("R25", first, mins(int(most)), mins(int(first.p.Start-last.p.Finish)), "comes too late on what %s has prepared", f.Label()).Other = last.s.Key()
			continue
		}
		if wipes(f) || f.Place.Hourly(f.Face) == nil {
			continue
		}
		air := c.dryAir(last.s)
		for m := last.p.Finish; m < first.p.Start; m++ {
			if !air.has(m) {
				c.add("R25", first, "", c.when(m, f.Place), "comes after what %s has prepared has turned damp", f.Label()).Other = last.s.Key()
				break
			}
		}
	}
}

func (c *checker) named(name string) *tasks.Task {
	for _, t := range c.w.Job.Tasks {
		if t.Name == name {
			return t
		}
	}
	return nil
}

// firstHands gives the first step of a task that people work on; nil if it does not happen.
func (c *checker) firstHands(t *tasks.Task) *row {
	for _, r := range c.list {
		if r.s.Task == t && !r.bad && !r.s.Absent && r.s.Class == expand.Hands && r.s.Working > 0 {
			return r
		}
	}
	return nil
}

// paint checks that hot work on what is coated is finished before the coat, and that a closed space with paint
// is tested for gas (R27).
func (c *checker) paint() {
	for _, h := range c.list {
		if h.bad || h.s.Absent || !h.s.Hot || h.s.Class != expand.Hands || h.s.Working == 0 {
			continue
		}
		tested := false
		for _, k := range c.list {
			if k.bad || k.s.Absent || k.s.Paint == nil || k.s.Working == 0 || k.s.Task == h.s.Task {
				continue
			}
			t := k.s.Task
			on, back := meet(h.s.Task.Parts, t.Surface) && !t.Bare.Pos.Given(), meet(h.s.Task.Parts, t.Behind)
			if !h.s.Task.PaintOff && (on || back) && h.p.Finish > k.p.Start {
				c.add("R27", h, c.when(k.p.Start, h.s.Place), c.when(h.p.Finish, h.s.Place), "hot work on what %s coats", t.Label()).Other = k.s.Key()
			}
			if f := h.s.Face; f != nil && f.Closed && k.s.Face != nil && near(f, k.s.Face) && k.p.Start < h.p.Finish && !tested {
				tested = true
				c.gas(h)
			}
		}
	}
}

// gas checks that hot work in a closed space with paint has a tester among its people and the time.
func (c *checker) gas(h *row) {
	factor := h.s.Place.FaceFactor.Value
	if factor <= 0 {
		factor = 1
	}
	if h.s.SetUp < int(math.Ceil(gasTest/factor-1e-6)) {
		c.add("R27", h, mins(gasTest), mins(h.s.SetUp), "has no time for the gas test in its set-up")
	}
	for _, team := range h.team {
		if len(team) > 0 && !slices.ContainsFunc(team, func(p *person) bool {
			return slices.ContainsFunc(p.Tickets, func(t tasks.Ticket) bool { return strings.EqualFold(t.Name, "gas tester") })
		}) {
			c.add("R27", h, "gas tester", "", "nobody who works on it may test for gas")
		}
	}
}

// meet says whether a part of one list is, or belongs to, one of the other.
func meet(a, b []string) bool {
	for _, p := range a {
		for _, q := range b {
			x, _, _ := strings.Cut(p, "/")
			y, _, _ := strings.Cut(q, "/")
			if p == q || x == y && (p == x || q == y) {
				return true
			}
		}
	}
	return false
}
