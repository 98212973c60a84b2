package sheets

import (
	"fmt"
	"math"
	"strings"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// judged gives what the lift comes to at the stage that the plan makes of it: with all that has been
// joined when it ends.
func (k *pack) judged(s *expand.Step) (expand.Judgement, bool) {
	if s.Rigging == nil {
		return expand.Judgement{}, false
	}
	end := k.planned(s).Finish
	begun, unfinished := map[*tasks.Task]bool{}, map[*tasks.Task]bool{}
	for i, o := range k.work.Steps {
		if o.Class != expand.Hands || o.Absent || i >= len(k.a.Plan.Steps) {
			continue
		}
		if k.a.Plan.Steps[i].Start < end {
			begun[o.Task] = true
		}
		if k.a.Plan.Steps[i].Finish > k.planned(s).Start {
			unfinished[o.Task] = true
		}
	}
	j, err := s.Rigging.Judge(s.Rigging.Among(func(t *tasks.Task) bool { return begun[t] }, func(t *tasks.Task) bool { return begun[t] && !unfinished[t] }))
	return j, err == nil
}

// liftSketch draws the load, or leaves room to draw it.
func (k *pack) liftSketch(s *expand.Step, j expand.Judgement) {
	p := k.p
	p.heading("What is lifted", 40)
	words := []string{"On it by then: " + strings.Join(j.Pieces, ", ") + "."}
	if len(j.Pieces) == 0 {
		words = nil
	}
	words = append(words, fmt.Sprintf("Weight %s kg, with allowance %s, on the hook %s.", origin.Trim(j.Load.Mass), j.Load.Heavy().Amount(), j.Load.Hook().Amount()))
	sk, ok := sketchOf(s.Rigging, j)
	if !ok {
		for _, w := range words {
			p.para(w, body, false)
		}
		p.para("No sizes in the job file: sketch it here, with centre of gravity, lifting points and slings.", body, false)
		const tall = 40.0
		p.room(tall + 1)
		p.put(Item{Kind: Blank, X: p.left, Y: p.y, W: p.wide() - gutter, H: tall, Stroke: thin})
		p.y += tall + 1
		return
	}
	words = append(words, fmt.Sprintf("Centre of gravity (cross): x %s, y %s, z %s mm.", origin.Trim(sk.cg[0]), origin.Trim(sk.cg[1]), origin.Trim(sk.cg[2])))
	if j.Total.Slack > 0 {
		words = append(words, fmt.Sprintf("It may be off by %s mm lengthwise: the trial lift shows.", origin.Trim(math.Ceil(j.Total.Slack))))
	}
	for i, l := range j.Legs {
		words = append(words, fmt.Sprintf("Leg %d: %s deg from vertical, pull %s kg.", i+1, origin.Trim(math.Round(l.Angle*10)/10), origin.Trim(math.Ceil(l.Tension))))
	}
	switch {
	case len(j.Legs) == 0:
		words = append(words, "Slings are not in the job file: draw them in.")
	case sk.assumed:
		words = append(words, "Lugs are not in the job file: the slings are drawn at their angle, to the ends of the load at most.")
	}
	sk.draw(p, words)
}

// liftLimits lists every number against its limit.
func (k *pack) liftLimits(s *expand.Step, j expand.Judgement) {
	p := k.p
	if len(j.Checks) == 0 {
		return
	}
	p.heading("Loads against limits", 3*lineHeight(body))
	tb := p.table(column{"What", 50}, column{"Comes to", 32}, column{"Limit", 76}, column{"", 27})
	for _, c := range j.Checks {
		r := c.Result
		word := "within"
		switch {
		case !r.OK && c.Filter:
			word = "look again"
		case !r.OK:
			word = "REFUSED"
		}
		cells := loud(c.What)
		if what, _, ok := strings.Cut(r.Reason, ": "); ok && what != c.What {
			cells.lines = append(cells.lines, line{text: what})
		}
		tb.row(cells, loud(r.Figure.Amount()), say(r.Limit.Amount()+", "+r.Limit.Name), loud(word, or(r.Nearest, "")))
		for _, o := range r.Others {
			word := "within"
			if !o.OK {
				word = "REFUSED"
			}
			tb.row(loud(o.What), loud(o.Figure.Amount()), say(o.Limit.Amount()+", "+o.Limit.Name), loud(word))
		}
	}
	if rig := s.Rigging.Slung(); rig != nil {
		most, at := 0.0, 0
		for i, l := range j.Legs {
			if l.Tension > most+1e-9 {
				most, at = l.Tension, i
			}
		}
		if most > 0 {
			tb.row(loud(fmt.Sprintf("leg %d, the heaviest", at+1)), loud(origin.Trim(math.Ceil(most))+" kg"), say(legLimits(rig)), say(""))
		}
	}
	tb.end()
}

// legLimits lists what one leg's pull is held against.
func legLimits(r *lift.Rig) string {
	var out []string
	add := func(v float64, what string) {
		if v > 0 {
			out = append(out, origin.Trim(v)+" kg, "+what)
		} else {
			out = append(out, what+": not stated, ask")
		}
	}
	if r.Table != "" {
		out = append(out, r.Table+", size "+origin.Trim(r.Size))
	} else {
		add(r.WLL, "one leg straight by its tag")
	}
	add(r.Coupling, "shackle, hook or ring")
	add(r.LugWLL, "lug at this angle, its designer's figure")
	return strings.Join(out, "; ")
}

// liftSteps lists the steps with their minutes, and who stands where.
func (k *pack) liftSteps(s *expand.Step, j expand.Judgement) {
	p := k.p
	p.heading("Steps", 4*lineHeight(body))
	e, err := s.Rigging.Times(j.Load.Mass)
	minutes := func(h quantity.HandsOn) string {
		if err != nil || h <= 0 {
			return ""
		}
		return fmt.Sprintf(" (%d min)", h.Whole())
	}
	l := s.Rigging.Said()
	n := 0
	step := func(text string) {
		n++
		p.point(fmt.Sprintf("%d", n), text, false)
	}
	keep := "the area below and around"
	if j.Clear.Value > 0 {
		keep = origin.Trim(j.Clear.Value/1000) + " m around, and everything below"
	}
	if l.Proved != nil {
		text := "See that " + l.Proved.Name + " has proved it free"
		if j.CutOff.Value > 0 {
			text += "; load cell on, stop pulling at " + origin.Trim(math.Floor(j.CutOff.Value)) + " kg"
		}
		step(text + ".")
	}
	step("Talk it through; close off " + keep + "; slings on and seen by a second person" + minutes(e.Rig) + ".")
	step("Trial lift of a hand's breadth: wait, look at level, brake, slings, anchor or outriggers" + minutes(e.TrialLift) + ".")
	step("Lift and travel, one signaller, nobody below, tag lines held" + minutes(e.Travel) + ".")
	step("Land and guide into place, hands clear" + minutes(e.Land) + ".")
	if l.Secured != nil {
		step("Make fast. The gear stays on until " + l.Secured.Name + " is done" + minutes(e.MakeFast) + ".")
		step("Unhook only then" + minutes(e.Unhook) + ".")
	} else {
		step("Make fast until it stands by itself" + minutes(e.MakeFast) + "; unhook" + minutes(e.Unhook) + ".")
	}
	if len(j.Crew) > 0 {
		p.para("People such a lift asks for: "+strings.Join(j.Crew, ", ")+"; nobody with two of these at once.", body, false)
	}
}

// liftAsk lists what the job file does not say.
func (k *pack) liftAsk(j expand.Judgement) {
	if len(j.Ask) == 0 {
		return
	}
	k.p.heading("Not known to the plan: to be asked and settled", float64(min(len(j.Ask), 8))*lineHeight(body))
	for _, a := range j.Ask {
		k.p.point("?", strings.TrimPrefix(a, "ask: "), false)
	}
}

func clear(j expand.Judgement, judged bool) string {
	if !judged || j.Clear.Value == 0 {
		return ""
	}
	return origin.Trim(j.Clear.Value/1000) + " m (planned)"
}

// windLimit gives the gust at which to stop: the gear's, less for a large load.
func windLimit(s *expand.Step, j expand.Judgement, judged bool) string {
	if judged && j.Wind != nil && j.Wind.Have > 0 {
		return origin.Trim(math.Floor(j.Wind.Have*10)/10) + " m/s gust"
	}
	return gust(s)
}

// measures names who measures the wind.
func measures(s *expand.Step) string {
	if s.Rigging == nil {
		return ""
	}
	return s.Rigging.Said().Measures
}
