package settle

import (
	"fmt"

	"sailby/plan"
	"sailby/plan/limits"
	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/plan/solve"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

func span(minutes int) string { return quantity.Hours(minutes) }

// clock writes a minute of the problem as the window's place reads it.
func (a *asked) clock(t int) string { return a.clockAt(t, a.work.Window.Place) }

func (a *asked) clockAt(t int, p *tasks.Place) string {
	return a.at(t).In(p.Zone).Format("Mon 2 Jan 15:04")
}

func scope(s string) string {
	if s == "" {
		return ""
	}
	return " " + s
}

// noOpening proves that one step fits no opening at all.
func (a *asked) noOpening(i int) *plan.Proof {
	act := &a.p.Acts[i]
	s := act.Step
	p := &plan.Proof{Kind: plan.ByNoOpening,
		Summary: fmt.Sprintf("%q cannot be done at all: %s", s.Task.Label(), act.Hopeless),
		Lines: []plan.ProofLine{
			{Text: fmt.Sprintf("%q at %s: %s of working time", s.Task.Label(), s.Task.Where(), span(s.Working+s.SetUp)), Minutes: s.Working + s.SetUp, Pos: s.Task.Pos, Needed: true},
			{Text: act.Hopeless, Pos: s.Place.OpenPos, Needed: true},
		}}
	a.members(p, []int{i}, nil)
	return p
}

// shrinkLimit bounds the links for which every one is tried out when a proof is made small.
const shrinkLimit = 1500

// chain proves that a chain of links is too long for the hours, whoever does the work: the
// links that the contradiction needs, each of which, left out, lets the others hold.
func (a *asked) chain(c *network.Conflict) *plan.Proof {
	off := a.core(c)
	_, left := network.Propagate(a.p, off)
	return a.chainText(off, left)
}

// besideLimits is the work, in ticks of the search, of making a proof small beside the likely hours, and besideLines how many
// limits it may have there if they are not all tried.
const (
	besideLimits = 8_000_000
	besideLines  = 25
)

// members puts in place of a proof's lines the limits of some steps that cannot all hold, each tried by itself. Of the
// lines for steps those that are there already stay as they are said.
func (a *asked) members(p *plan.Proof, acts []int, said map[*expand.Step]string) *limits.Found {
	if a.plain || a.stop() {
		return nil
	}
	a.say("what the proof needs")
	o := limits.Options{Stop: a.stop}
	if a.work.Basis.Maybes || a.work.Basis.End != expand.Likely {
		o.Ticks, o.Lines = besideLimits, besideLines
	}
	found := limits.Find(a.work, limits.Steps(a.p, acts), o)
	if found == nil {
		return nil
	}
	lines := found.Lines
	for i := range lines {
		l := &lines[i]
		if text := said[l.Limit.Step]; text != "" && (l.Limit.Kind == plan.LimitLength || l.Limit.Kind == plan.LimitStanding) {
			l.Text = text
		}
	}
	p.Lines = lines
	return found
}

// linked gives some activities and all that links tie to them, near or far.
func (a *asked) linked(acts []int) []int {
	next := make([][]int, len(a.p.Acts))
	for k := range a.p.Links {
		if l := &a.p.Links[k]; l.From >= 0 {
			next[l.From] = append(next[l.From], l.To)
			next[l.To] = append(next[l.To], l.From)
		}
	}
	in := make([]bool, len(a.p.Acts))
	list := append([]int(nil), acts...)
	for k := 0; k < len(list); k++ {
		if i := list[k]; !in[i] {
			in[i] = true
			list = append(list, next[i]...)
		}
	}
	var out []int
	for i, yes := range in {
		if yes {
			out = append(out, i)
		}
	}
	return out
}

// core leaves out every link and date that a contradiction does not need: what is left is one still, and
// holds without any of what is left. A cancel leaves more in than that.
func (a *asked) core(c *network.Conflict) network.Off {
	off := network.Off{Link: map[int]bool{}, By: map[int]bool{}, From: map[int]bool{}, Calendar: map[int]bool{}}
	path := map[int]bool{}
	for _, k := range c.Path {
		path[k] = true
	}
	for k := range a.p.Links {
		off.Link[k] = !path[k]
	}
	still := func() *network.Conflict { _, c := network.Propagate(a.p, off); return c }
	if still() == nil { // the trace missed something: begin with every link
		for k := range a.p.Links {
			off.Link[k] = false
		}
	}
	if len(a.p.Links) <= shrinkLimit {
		for k := range a.p.Links {
			if !off.Link[k] && a.p.Links[k].From >= 0 && !a.stop() {
				off.Link[k] = true
				if still() == nil {
					off.Link[k] = false
				}
			}
		}
		for i := range a.p.Acts {
			if a.p.Acts[i].By < problem.Inf && !off.By[i] && !a.stop() {
				off.By[i] = true
				if still() == nil {
					off.By[i] = false
				}
			}
		}
	}
	return off
}

// chainText writes the proof of a chain that off has made small. Its dates are those of the
// hours carried on past the window, so that what comes too late has a date.
func (a *asked) chainText(off network.Off, c *network.Conflict) *plan.Proof {
	free := network.Off{Link: off.Link, By: allActs(a.p), From: off.From}
	far := problem.Compile(a.work.Remain())
	b, stuck := network.Propagate(far, free)
	if stuck != nil { // something does not come again, however late: the dates are those of the window's own hours
		b, _ = network.Propagate(a.p, free)
	}
	free.Calendar = allActs(a.p)
	_, never := network.Propagate(far, free) // the waits alone contradict each other
	dated := never == nil
	last, end := &a.p.Acts[c.Act], c.Act
	by := a.p.Close
	for i := range a.p.Acts {
		if a.p.Acts[i].By < problem.Inf && !off.By[i] && b.Finish[i] > a.p.Acts[i].By {
			end, last, by = i, &a.p.Acts[i], a.p.Acts[i].By
		}
	}
	p := &plan.Proof{Kind: plan.ByChain}
	involved := []int{}
	seen := map[int]bool{}
	note := func(i int) {
		if i >= 0 && !seen[i] {
			seen[i] = true
			involved = append(involved, i)
		}
	}
	var links []*problem.Link
	for k := range a.p.Links {
		if !off.Link[k] {
			l := &a.p.Links[k]
			note(l.From)
			note(l.To)
			links = append(links, l)
		}
	}
	note(end)
	sortBy(involved, b.Start)
	said := map[*expand.Step]string{}
	defer func() { a.members(p, involved, said) }()
	for _, i := range involved {
		act := &a.p.Acts[i]
		if !dated { // any date will do: lengths alone say it
			p.Lines = append(p.Lines, plan.ProofLine{Text: fmt.Sprintf("%s: %s", stepName(act.Step), a.length(act)),
				Minutes: act.Step.Minutes() + act.Step.SetUp, Pos: act.Pos(), Needed: a.needed(off, i)})
			continue
		}
		text := fmt.Sprintf("%s: %s, not before %s, so not finished before %s", stepName(act.Step), a.length(act), a.clockAt(b.Start[i], act.Step.Place), a.clockAt(b.Finish[i], act.Step.Place))
		if s, _ := earliest(act, b.Start[i]); s >= problem.Inf {
			text = fmt.Sprintf("%s: %s, not before %s, and no opening after that is long enough", stepName(act.Step), a.length(act), a.clockAt(b.Start[i], act.Step.Place))
		}
		said[act.Step] = text
		p.Lines = append(p.Lines, plan.ProofLine{Text: text, Minutes: act.Step.Minutes() + act.Step.SetUp, Pos: act.Pos(), Needed: a.needed(off, i)})
	}
	for _, l := range links {
		if l.Last != nil && dated {
			from := b.Finish[max(l.From, 0)]
			p.Lines = append(p.Lines, plan.ProofLine{Text: fmt.Sprintf("%s: no later than %s", l.Step.Why, a.clock(l.Last(from))), Pos: l.Step.Pos, Needed: true})
		}
		if l.Max < expand.NoMax && l.Max > 0 {
			p.Lines = append(p.Lines, plan.ProofLine{Text: fmt.Sprintf("%s: at most %s", l.Step.Why, span(l.Max)), Minutes: l.Max, Pos: l.Step.Pos, Needed: true})
		}
	}
	p.Over = b.Finish[end] - by
	if p.Over >= problem.Inf/2 || p.Over < 0 {
		p.Over = 0
	}
	if !dated {
		p.Over = 0
		p.Summary = fmt.Sprintf("the waits round %s contradict each other, on any date and with unlimited people", stepName(last.Step))
		return p
	}
	limit := fmt.Sprintf("%s must be finished by %s", stepName(last.Step), a.clockAt(by, last.Step.Place))
	if by == a.p.Close && last.Step.Site {
		limit = fmt.Sprintf("the window at %s closes %s", a.work.Window.Place.Name, a.clockAt(by, last.Step.Place))
	}
	p.Lines = append(p.Lines, plan.ProofLine{Text: limit, Pos: a.byPos(last), Needed: true})
	p.Summary = fmt.Sprintf("the work up to the end of %s takes too long one thing after another, however many people there are", stepName(last.Step))
	if p.Over > 0 {
		p.Summary += fmt.Sprintf(": at least %s over", span(p.Over))
	}
	return p
}

// earliest gives the first start of an activity at or after t in any mode, and its finish.
func earliest(act *problem.Act, t int) (start, finish int) {
	start, finish = problem.Inf, problem.Inf
	for _, w := range act.Timings() {
		if s := w.Start(t); s < problem.Inf {
			start, finish = min(start, s), min(finish, w.Finish(s))
		}
	}
	return start, finish
}

func allActs(p *problem.Problem) map[int]bool {
	m := map[int]bool{}
	for i := range p.Acts {
		m[i] = true
	}
	return m
}

func sortBy(list, key []int) {
	for i := 1; i < len(list); i++ {
		for j := i; j > 0 && key[list[j]] < key[list[j-1]]; j-- {
			list[j], list[j-1] = list[j-1], list[j]
		}
	}
}

// needed says whether the contradiction goes away when the step takes no time at all.
func (a *asked) needed(off network.Off, i int) bool {
	act := &a.p.Acts[i]
	keep, times := act.Modes, act.Times
	act.Modes, act.Times = []problem.Mode{{Time: problem.Fixed(0)}}, nil
	_, c := network.Propagate(a.p, off)
	act.Modes, act.Times = keep, times
	return c == nil
}

func (a *asked) length(act *problem.Act) string {
	s := act.Step
	switch s.Class {
	case expand.Hands:
		return span(s.Working+s.SetUp) + " of working time"
	case expand.Clock:
		return span(s.Clock) + " standing"
	}
	return span(s.Estimate.Range[1]) + " drying"
}

func stepName(s *expand.Step) string {
	if s.Name == string(s.Task.Kind) {
		return fmt.Sprintf("%q", s.Task.Label())
	}
	return fmt.Sprintf("%q (%s)", s.Task.Label(), s.Name)
}

// byPos is where the limit on a step's finish stands: its own deadline, else the window.
func (a *asked) byPos(act *problem.Act) tasks.Pos {
	for _, d := range a.work.Deadlines {
		if d.Step == act.Step {
			return d.Pos
		}
	}
	return a.work.Window.Pos
}

// overload proves that there is more work than hours.
func (a *asked) overload(o *solve.Overload) *plan.Proof {
	p := &plan.Proof{Kind: plan.ByWork, Over: o.Total - o.Have}
	place := a.p.Acts[o.Acts[0]].Step.Place
	from, to := a.clockAt(o.From, place), a.clockAt(o.To, place)
	p.Summary = a.sum(o, a.p)
	for k, i := range o.Acts {
		act := &a.p.Acts[i]
		text := fmt.Sprintf("%s: %s", stepName(act.Step), span(o.Need[k]))
		if all := o.All(k); all > o.Need[k] {
			text += fmt.Sprintf(" at least of its %s", span(all))
		}
		p.Lines = append(p.Lines, plan.ProofLine{Text: text, Minutes: o.Need[k], Pos: act.Pos(), Needed: o.Total-o.Need[k] <= o.Have})
	}
	p.Lines = append(p.Lines, plan.ProofLine{
		Text:    fmt.Sprintf("open for %s%s from %s to %s: %s", o.Load.Who, scope(o.Load.Scope), from, to, span(o.Have)),
		Minutes: o.Have, Pos: a.work.Window.Pos, Needed: true})
	found := a.members(p, o.Acts, nil)
	if found == nil {
		found = a.members(p, a.linked(o.Acts), nil)
	}
	switch {
	case found != nil && found.Over != nil: // of the members alone: what else there is, may be too much too
		p.Over, p.Summary = found.Over.Total-found.Over.Have, a.sum(found.Over, found.Problem)
	case found != nil:
		p.Kind, p.Over, p.Summary = plan.BySearch, 0, bySearch
	}
	return p
}

// sum says how much work there is for how many hours.
func (a *asked) sum(o *solve.Overload, p *problem.Problem) string {
	place := p.Acts[o.Acts[0]].Step.Place
	clock := func(t int) string { return limits.When(p.Base+hours.Minute(t), place) }
	return fmt.Sprintf("%s%s: %s of work between %s and %s, and %s open for it; %s over",
		o.Load.Who, scope(o.Load.Scope), span(o.Total), clock(o.From), clock(o.To), span(o.Have), span(o.Total-o.Have))
}
