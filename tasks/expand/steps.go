package expand

import (
	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
	"slices"
)

// kindRule is what a kind of task does at closing time (R6).
type kindRule struct{ oneGo, overMeals bool }

var kindRules = map[tasks.Kind]kindRule{
	tasks.Weld: {false, true}, tasks.Cut: {false, true}, tasks.Prep: {false, true},
	tasks.Coat: {true, false}, tasks.Lift: {true, false}, tasks.FitUp: {false, true},
	tasks.Test: {true, true}, tasks.Move: {true, false}, tasks.SignOff: {true, false}, tasks.Plain: {false, true},
}

// task makes the steps of one task, in order.
func (x *expander) task(t *tasks.Task) {
	if x.absent[t] {
		s := x.step(t, string(t.Kind))
		s.Absent, s.NotBefore, s.Deadline = true, hours.Never, hours.Far
		return
	}
	switch {
	case t.Kind == tasks.Coat:
		x.coatSteps(t)
	case t.Standing.Pos.Given() && !t.Hours.Pos.Given() && !t.ManHours.Pos.Given() && (t.Kind == tasks.Plain || t.Kind == tasks.Test || t.Kind == tasks.SignOff):
		x.standing(t, nil)
	default:
		main := x.handsStep(t, string(t.Kind), x.estimate(t))
		if t.Kind == tasks.Weld {
			x.afterWeld(t, main)
		}
		if t.Standing.Pos.Given() {
			x.standing(t, main)
		} else if t.Kind == tasks.Prep {
			x.dryOff(t, main)
		}
	}
}

// step adds an empty step to the work.
func (x *expander) step(t *tasks.Task, name string) *Step {
	s := &Step{Task: t, Name: name, Place: t.Place, Face: t.Face, Site: x.atSite(t),
		NotBefore: hours.Never, Deadline: hours.Far}
	x.w.Steps = append(x.w.Steps, s)
	x.first[t] = append(x.first[t], s)
	s.Index = len(x.w.Steps) - 1
	if s.Site {
		s.NotBefore, s.Deadline = x.w.Window.Opens, x.w.Window.Closes
	}
	return s
}

// handsStep makes a hands-on step from an estimate.
func (x *expander) handsStep(t *tasks.Task, name string, h hands) *Step {
	s := x.step(t, name)
	s.Class = Hands
	if h.fault != nil {
		x.fault(t.Pos, h.hint, "task %q: %v", t.Name, h.fault)
		return s
	}
	factor := x.faceFactor(t.Place)
	face := func(m float64) int { return whole(m / factor.Value) }
	s.HandsOn = x.value(h.minutes)
	s.Working = face(float64(s.HandsOn))
	s.Estimate, s.Rigging = h.est, h.rigging
	s.welders, s.warnings = h.welders, h.warnings
	s.Estimate.Figure = origin.Worked("working time", float64(s.Working), "min", "hands-on time over face factor, rounded up",
		h.est.Figure, factor)
	if s.HandsOn == 0 {
		return s
	}
	x.stopping(t, s, h, face)
	x.nature(t, s, h)
	s.Needs = x.needs(t, h)
	x.hotWork(t, s)
	x.gasTest(t, s, face)
	for _, n := range s.Needs {
		s.Room += n.Count
	}
	if f := t.Face; f != nil && f.People > 0 && s.Room > f.People {
		x.fault(t.Pos, "fewer people, or more room in the workface's `people`",
			"task %q: %d people at work in %s/%s, which has room for %d (%d too many)", t.Name, s.Room, t.Place.Name, f.Name, f.People, s.Room-f.People)
	}
	x.kit(t, s, h)
	x.statesOf(t, s, h)
	x.permits(t, s)
	if t.NotBefore != nil {
		s.NotBefore = max(s.NotBefore, x.moment(*t.NotBefore))
	}
	return s
}

// stopping sets what the step does at closing time (R6, R8).
func (x *expander) stopping(t *tasks.Task, s *Step, h hands, face func(float64) int) {
	rule := kindRules[t.Kind]
	s.InOneGo, s.OverMeals = rule.oneGo, rule.overMeals
	if t.InOneGo != nil {
		s.InOneGo = *t.InOneGo
	}
	if t.OverMeals != nil {
		s.OverMeals = *t.OverMeals
	}
	s.ChangeHands = t.MayChangeHands
	own := func(a tasks.Amount, estimated float64) int {
		if a.Pos.Given() {
			return face(a.Value)
		}
		return face(estimated)
	}
	s.SetUp = own(t.SetUp, h.setUp+x.washed(t, s))
	if t.Covered != nil && !*t.Covered && t.Face.Floods() { // R26
		s.InOneGo, s.OverMeals = true, true
	}
	s.SafeStop = min(own(t.SafeStop, h.safe), s.Working)
	s.LeastPiece = min(own(t.LeastPiece, h.least), s.Working)
}

// hotWork adds the fire watch (R13).
func (x *expander) hotWork(t *tasks.Task, s *Step) {
	if !s.Hot {
		return
	}
	watch := t.Place.FireWatch
	if !watch.Pos.Given() && x.atSite(t) {
		watch.Value = DefaultWatch
	}
	if t.FireWatch.Pos.Given() {
		watch = t.FireWatch
	}
	s.Watch = whole(watch.Value)
	if s.Watch == 0 {
		return
	}
	ticket := tasks.Ticket{Name: tasks.FireWatchTicket}
	s.Needs = append(s.Needs, tasks.Need{Ticket: ticket, Count: 1, Watch: true, Pos: t.Pos})
	s.Watcher = &tasks.Need{Ticket: ticket, Count: 1, Watch: true, Pos: t.Pos}
}

// DefaultWatch is the fire watch after hot work on site, minutes (common practice; UK Joint
// Code of Practice: at least 1 h).
const DefaultWatch = 60

// kit sets what the step uses, and the power it draws.
func (x *expander) kit(t *tasks.Task, s *Step, h hands) {
	use := append([]tasks.Use(nil), t.Kit...)
	for _, seam := range t.Welds() {
		for _, p := range x.w.Job.Procedures {
			if p.Name == seam.Procedure && p.Kit != "" {
				if k := x.kitNamed(p.Kit); k != nil && !uses(use, k) {
					use = append(use, tasks.Use{Kit: k, Count: max(1, h.welders), Pos: p.Pos})
				}
			}
		}
	}
	if k := x.kitNamed(t.By); k != nil && !uses(use, k) {
		use = append(use, tasks.Use{Kit: k, Count: 1, Pos: t.Pos})
	}
	use = x.bothHooks(t, use)
	drawn := false
	for _, u := range use {
		if u.Kit.At != nil && u.Kit.At != t.Place {
			x.fault(t.Pos, "leave out its `at`, or use other kit", "task %q: kit %q stays at %s and the task is at %s", t.Name, u.Kit.Name, u.Kit.At.Name, t.Place.Name)
		}
		s.Kit = append(s.Kit, Use{Kit: u.Kit, Count: u.Count, Stays: u.Kit.Stays})
		s.Power += u.Kit.Draws * float64(u.Count)
		drawn = drawn || u.Kit.Draws > 0
	}
	if !drawn {
		s.Power = h.power
	}
}

// bothHooks adds what holds the second hook of a lift (R24): one more where both hang on kit of one name, unless the
// task takes as many anyway.
func (x *expander) bothHooks(t *tasks.Task, use []tasks.Use) []tasks.Use {
	if t.Lifting == nil || t.Lifting.Second == nil || t.Lifting.Second.Kit == nil {
		return use
	}
	second := t.Lifting.Second
	want := 1
	if x.kitNamed(t.By) == second.Kit {
		want = 2
	}
	out := append([]tasks.Use(nil), use...)
	i := slices.IndexFunc(out, func(u tasks.Use) bool { return u.Kit == second.Kit })
	if i < 0 {
		out, i = append(out, tasks.Use{Kit: second.Kit, Pos: second.Pos}), len(out)
	}
	out[i].Count = max(out[i].Count, want)
	if out[i].Count > second.Kit.Count {
		x.fault(second.Pos, "name two things under `by`, or give its `count`", "task %q: its two hooks take %d of %q, and there is %d", t.Name, out[i].Count, second.Kit.Name, second.Kit.Count)
	}
	return out
}

func (x *expander) kitNamed(name string) *tasks.Kit {
	for _, k := range x.w.Job.Kit {
		if k.Name == name && name != "" {
			return k
		}
	}
	return nil
}

func uses(list []tasks.Use, k *tasks.Kit) bool {
	for _, u := range list {
		if u.Kit == k {
			return true
		}
	}
	return false
}

// standing adds the clock time that a task keeps: alone, or after its hands-on part.
func (x *expander) standing(t *tasks.Task, after *Step) *Step {
	name := t.Why
	if name == "" {
		name = "standing"
	}
	minutes := whole(x.pick(t.Standing))
	s := x.clock(t, name, minutes, origin.Written("standing time", x.pick(t.Standing), "min", t.Standing.Pos.Origin("standing")))
	s.Estimate.Range = [3]int{whole(t.Standing.Low), whole(t.Standing.Likely), whole(t.Standing.High)}
	s.Needs = append(s.Needs, t.Keeps...)
	if len(s.Needs) > 0 {
		s.InOneGo, s.OverMeals, s.Working = true, false, minutes
		s.Class = Hands
		s.HandsOn, s.Clock = minutes, 0
		s.States = append(s.States, State{Name: tasks.PeopleState})
		s.Lone = mayNotBeAlone(t, false)
		for _, n := range s.Needs {
			s.Room += n.Count
		}
	}
	if after != nil {
		x.tie(after, s, s.Name)
	} else if t.NotBefore != nil {
		s.NotBefore = max(s.NotBefore, x.moment(*t.NotBefore))
	}
	return s
}

// clock makes a standing step of so many minutes.
func (x *expander) clock(t *tasks.Task, name string, minutes int, f origin.Figure) *Step {
	s := x.step(t, name)
	s.Class, s.Clock = Clock, minutes
	s.Estimate.Figure = f
	s.Estimate.Range = [3]int{minutes, minutes, minutes}
	return s
}

// tie makes a step start exactly when another finishes (R10).
func (x *expander) tie(from, to *Step, why string) {
	x.w.Links = append(x.w.Links, Link{From: from, To: to, FromEnd: tasks.Finish, ToEnd: tasks.Start,
		Min: 0, Max: 0, Pos: to.Task.Pos, Why: why})
}

// afterWeld adds cooling, and the hold before NDT where a test waits for it.
func (x *expander) afterWeld(t *tasks.Task, main *Step) {
	e, ok := x.welded[t]
	if !ok || main.HandsOn == 0 {
		return
	}
	name := t.Name
	x.states[name+" / cooled"], x.states[name+" / ready for NDT"] = main, main
	if e.Cooling > 0 {
		s := x.clock(t, "cooling", e.Cooling.Whole(), e.Why.Cooling)
		x.tie(main, s, "cooling")
		x.states[name+" / cooled"], x.states[name+" / ready for NDT"] = s, s
	}
	if e.BeforeNDT > e.Cooling && (t.Repairs != nil || x.tested(t)) { // the longer of the two is waited for
		s := x.clock(t, "hold before NDT", e.BeforeNDT.Whole(), e.Why.BeforeNDT)
		x.tie(main, s, "hold before NDT")
		x.states[name+" / ready for NDT"] = s
	}
}

func (x *expander) tested(t *tasks.Task) bool {
	for _, u := range x.w.Job.Tasks {
		if x.absent[u] {
			continue
		}
		for _, l := range u.Links {
			if l.Task == t.Name && (u.Kind == tasks.Test && (l.State == "" || l.State == "ready for NDT") || l.State == "ready for NDT") {
				return true
			}
		}
	}
	return false
}
