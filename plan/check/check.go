// Package check judges a plan by the rules of the job file (JOBFILE.md, R1 to R24) and by nothing
// else: it knows the job, the minutes of its steps and the plan, and works out by itself, minute by
// minute, where people are, what is open and who is on shift. Times are UTC minutes, spans
// half-open. It shares no code with the solver and may be slow: its cost is the planned minutes
// times people and places, plus the minutes between the start and finish of every step.
package check

import (
	"fmt"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Breach is one rule that a plan breaks.
type Breach struct {
	Rule        string    // "R9"
	Step, Other string    // keys of the step and of the one it meets; "" where there is none
	Pos         tasks.Pos // the line of the job file that asks for it
	Need, Have  string    // what the rule asks for and what the plan has
	Text        string    // the breach in a sentence
	Late        bool      // nothing but lateness: a deadline or the close of the window is missed
}

// String gives "R9: cut lugs / cut: text (needs ..., has ...)".
func (b Breach) String() string {
	s := b.Rule + ": "
	if b.Step != "" {
		s += b.Step + ": "
	}
	s += b.Text
	switch {
	case b.Need != "" && b.Have != "":
		s += fmt.Sprintf(" (needs %s, has %s)", b.Need, b.Have)
	case b.Need+b.Have != "":
		s += " (" + b.Need + b.Have + ")"
	}
	return s
}

// Late says whether a plan is late and has no other fault: there are breaches, and every one is
// lateness. Such a plan may be shown, but never called fitting (R18).
func Late(breaches []Breach) bool {
	for _, b := range breaches {
		if !b.Late {
			return false
		}
	}
	return len(breaches) > 0
}

// Plan lists every rule that p breaks as a plan for w, in the order of the work's steps within
// each rule's own check; nil if it obeys them all.
func Plan(w *expand.Work, p *plan.Plan) []Breach {
	if w == nil || p == nil || w.Job == nil || w.Window.Place == nil || w.Window.Place.Zone == nil {
		return []Breach{{Rule: "R2", Text: "there is no plan, or no window to judge it for"}}
	}
	c := &checker{w: w, span: w.Span, plan: p, places: map[*tasks.Place]*place{}, faces: map[*tasks.Workface]face{},
		hire: map[*tasks.Kit]line{}, people: map[string]*person{}, rows: map[*expand.Step]*row{}}
	if w.Span.Len() == 0 || w.Span.Len() > longest {
		return []Breach{{Rule: "R2", Text: "the time planned over is empty or longer than five years"}}
	}
	c.lo, c.hi = w.Span.From-pad, w.Span.To+pad
	c.basis()
	c.match()
	c.layOut()
	for _, r := range c.list {
		c.shape(r)
	}
	for _, r := range c.list {
		if r.bad {
			continue
		}
		c.window(r)
		c.leaving(r)
		c.needs(r)
		c.kitPlace(r)
		switch {
		case r.s.Absent:
		case r.s.Class == expand.Hands:
			c.pieces(r)
			c.watches(r)
			c.water(r)
		case r.s.Class == expand.Cure:
			c.cure(r)
		default:
			c.kept(r)
		}
	}
	c.oneThing()
	c.links()
	c.holds()
	c.paint()
	c.states()
	c.room()
	c.assemblies()
	c.kit()
	c.power()
	c.deadlines()
	c.orders()
	c.lifts()
	return c.out
}

const (
	pad     = 3 * 1440       // minutes laid out beyond both ends of the span, so that none of its openings is cut
	longest = 5 * 366 * 1440 // minutes: longer is a mistake
	meal    = 120            // minutes: the longest pause that is a meal (R6)
)

// checker is what is known while one plan is judged.
type checker struct {
	w      *expand.Work
	plan   *plan.Plan
	span   hours.Span
	lo, hi hours.Minute // the minutes laid out

	list    []*row // in the order of the work
	rows    map[*expand.Step]*row
	carried bool // site work runs past the window: the same hours are carried on (R18)

	places map[*tasks.Place]*place
	faces  map[*tasks.Workface]face
	hire   map[*tasks.Kit]line
	people map[string]*person
	inside []*person // in the order of the job, without those from outside

	out []Breach
}

// row is a step with its place in the plan.
type row struct {
	s      *expand.Step
	p      plan.Step
	bad    bool         // malformed: nothing more can be said
	team   [2][]*person // first team and relief, the known ones
	access []gate       // what must be open beside the place and the shifts
	alone  bool         // may not be done alone (R14)
	watch  int          // minutes of fire watch (R13)
}

// when writes a minute on the clock of a place.
func (c *checker) when(t hours.Minute, p *tasks.Place) string {
	zone := c.w.Window.Place.Zone
	if p != nil && p.Zone != nil {
		zone = p.Zone
	}
	return t.In(zone).Format("2006-01-02 15:04")
}

// add reports a breach of a step.
func (c *checker) add(rule string, r *row, need, have, format string, args ...any) *Breach {
	b := Breach{Rule: rule, Need: need, Have: have, Text: fmt.Sprintf(format, args...)}
	if r != nil {
		b.Step, b.Pos = r.s.Key(), r.s.Task.Pos
	}
	c.out = append(c.out, b)
	return &c.out[len(c.out)-1]
}

// mins writes minutes.
func mins(n int) string { return fmt.Sprintf("%d min", n) }
