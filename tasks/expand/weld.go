package expand

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/weld"
)

// weld estimates a weld task: its seams one after the other, the metal shared by its welders, of
// whom each leads out and makes ready once at the same time.
func (x *expander) weld(t *tasks.Task) hands {
	h := hands{people: max(1, x.crewSize(t)), hot: true, least: leastPiece}
	if t.People > 0 {
		h.people = t.People
	}
	h.welders = x.weldersOn(t, h.people)
	if len(t.Welds()) == 0 {
		h.fault = fmt.Errorf("it has no joints and no hours")
		h.hint = "list its joints, for instance joints: [{fillet: {leg: 6 mm}, length: 2 m, position: PB}], or give hours"
		return h
	}
	c := x.circumstances(t)
	e, err := weld.Work(x.seamsOf(t, ""), c)
	if err != nil {
		return h.failed(err)
	}
	x.welded[t] = e // the tickets that it asks for are read from it
	share := origin.Written("welders", float64(h.welders), "", t.Pos.Origin("welders"))
	hours := e.Hours
	if h.welders > 1 {
		hours = origin.Worked("hands-on time", e.Hours.Value/share.Value, "min", "time of one welder / welders", renamed(e.Hours, "time of one welder"), share)
	}
	if f, by, ok := x.byPerson(t, c, e, h.welders); ok {
		hours, e = f, by
	}
	part := hours.Value / float64(e.HandsOn) // of one welder's time
	h.warnings = e.Warnings
	h.est.Notes = append(slices.Clone(e.Warnings), x.weatherNotes(t, e)...)
	h.setUp, h.safe = float64(e.SetUp)+float64(e.Soak), float64(e.SafeStop)*part
	h.power = e.Power * float64(h.welders)
	h.facts(e, hours, part)
	h.est.Facts = append(x.procedures(t, e), h.est.Facts...)
	h.est.Facts = append(h.est.Facts, x.metresADay(t, e))
	if t.Repairs != nil {
		return x.repair(t, h, e, c, part)
	}
	h.uses(e.Consumables, 1)
	h.minutes, h.est.Figure = spread(hours.Value), hours
	x.advise(t, e, &h)
	x.welded[t] = e
	return h
}

// facts lists the figures worth asking for, those that apply.
func (h *hands) facts(e weld.Estimate, hours origin.Figure, part float64) {
	w := e.Why
	safe := w.SafeStop
	if part < 1-1e-9 {
		safe = origin.Worked("safe stop", safe.Value*part, "min", "safe stop of one welder x part of one welder's time",
			renamed(safe, "safe stop of one welder"), origin.Worked("part of one welder's time", part, "", "hands-on time / time of one welder"))
	}
	soak := w.Soak
	if soak.Name != "" {
		soak = origin.Worked("soak, at every start", soak.Value, "min", "soak", soak)
	}
	for _, f := range []origin.Figure{w.Metal, w.Arc, w.Passes, w.HeatInput, w.CE, w.CET, w.Combined, w.Scale, w.Preheat, w.T85, w.SetUp, soak,
		safe, w.Cooling, w.BeforeNDT, w.Power, w.Generator, w.Drop, w.SupplyDrop} {
		if f.Name != "" && (f.Value != 0 || f.Text != "") {
			h.est.Facts = append(h.est.Facts, f)
		}
	}
}

// metresADay is the figure by which the trade checks an estimate: what one welder finishes in ten
// hours at the place, all in but set-up.
func (x *expander) metresADay(t *tasks.Task, e weld.Estimate) origin.Figure {
	metres := 0.0
	for _, s := range e.Seams {
		metres += s.Length / 1000
	}
	face := x.faceFactor(t.Place)
	how := "length welded x 600 x face factor / time of one welder"
	switch {
	case x.fittedUp(t):
		how += "; fit-up is a task of its own and not in it"
	case x.atSite(t):
		how += "; on site practice knows 5 to 8 m of 6 to 8 mm fillet, all in"
	}
	return origin.Worked("metres a welder in a ten-hour day", metres*600*face.Value/e.Hours.Value, "m", how,
		origin.Worked("length welded", metres, "m", "sum of the joints"), face, renamed(e.Hours, "time of one welder"))
}

// procedures says by which procedure each joint is welded where it names none: the one picked, or
// the usual settings of its process. Joints alike are said once.
func (x *expander) procedures(t *tasks.Task, e weld.Estimate) []origin.Figure {
	var out []origin.Figure
	said := map[string]bool{}
	if len(x.w.Job.Procedures) == 0 {
		return nil
	}
	for i, s := range t.Welds() {
		text, o := s.Procedure, origin.Origin{Kind: origin.Given, Source: s.Picked}
		switch {
		case s.Picked != "":
			for _, p := range x.w.Job.Procedures {
				if p.Name == s.Procedure {
					o = p.For.Pos.Origin(s.Picked)
				}
			}
		case s.Procedure == "":
			text = "usual settings of " + e.Seams[i].Process.String()
			o = origin.Origin{Kind: origin.Judgement, Source: "the joint names no procedure, and none is for it"}
		default:
			continue // named in the joint
		}
		if !said[text+o.String()] {
			said[text+o.String()] = true
			out = append(out, origin.Word("procedure of "+seamName(t, i), text, o))
		}
	}
	return out
}

// uses puts a share of what is used up on the estimate. Pieces are not rounded here: they are
// rounded once, when all tasks are summed.
func (h *hands) uses(list []weld.Consumable, share float64) {
	for _, n := range list {
		amount, spare := n.Amount, n.Spare
		if n.Unit == "pieces" && n.Why.Name != "" {
			amount = n.Why.Value
			spare = amount * weld.SpareShare
		}
		h.est.Consumables = append(h.est.Consumables, Consumable{What: n.Name, Amount: amount * share, Unit: n.Unit, Spare: spare * share, Each: n.Each, Packed: n.Packed})
	}
}

func renamed(f origin.Figure, name string) origin.Figure {
	f.Name = name
	return f
}

// circumstances gathers what the job says of a weld's surroundings.
func (x *expander) circumstances(t *tasks.Task) weld.Circumstances {
	job := x.w.Job
	w := job.Welding
	word := t.Steel
	if word == "" {
		word = x.grade(t)
	}
	c := weld.Circumstances{Site: x.atSite(t), Ambient: notZero(x.steel(t.Place)), Execution: job.Execution, PreheatStandard: w.Preheat,
		Steel: w.Steel(word), NoOverweld: w.NoOverweld, FittedUp: x.fittedUp(t), ByParts: w.ByParts, Hold: w.Hold.Value, Rates: w.Rates, Chart: w.Chart,
		Origins: map[string]origin.Origin{"hold": w.Hold.Pos.Origin(""), "ambient": {Source: fmt.Sprintf("steel at %s, not given", t.Place.Name)}}}
	if p := t.Place.Steel.Pos; p.Given() {
		c.Origins["ambient"] = p.Origin("steel temperature of " + t.Place.Name)
	}
	if t.Hold.Pos.Given() {
		c.Hold, c.Origins["hold"] = t.Hold.Value, t.Hold.Pos.Origin("")
	}
	if t.Overweld != nil {
		c.NoOverweld = !*t.Overweld
	}
	if rho, err := lift.Density(c.Steel.Grade); err == nil && c.Steel.Density == 0 && c.Steel.Grade != "" {
		c.Steel.Density = rho.Value
	}
	return c
}

// seamsOf gives the seams of a weld task as a person makes them: with their own rates, if the
// procedure has them ("" is the procedure's), and on the set among the task's kit where the
// procedure names none.
func (x *expander) seamsOf(t *tasks.Task, person string) []weld.Seam {
	var set weld.Procedure
	for _, u := range t.Kit {
		if u.Kit.Set.Set.RatedCurrent > 0 || u.Kit.Set.Cable.Length > 0 || u.Kit.Set.Supply.Length > 0 {
			set = u.Kit.Set
		}
	}
	var out []weld.Seam
	for _, s := range t.Welds() {
		seam := s.Seam
		for _, p := range x.w.Job.Procedures {
			if p.Name != s.Procedure {
				continue
			}
			for i := range p.By {
				if p.By[i].Person == person {
					seam.Procedure = &p.By[i].Procedure
				}
			}
		}
		if len(set.Origins) > 0 {
			p := weld.Procedure{}
			if seam.Procedure != nil {
				p = *seam.Procedure
			}
			p.SetFrom(set)
			seam.Procedure = &p
		}
		out = append(out, seam)
	}
	return out
}

// weldersOn counts those among the people of a task who weld.
func (x *expander) weldersOn(t *tasks.Task, people int) int {
	n := 0
	for _, need := range t.Needs {
		if strings.EqualFold(need.Ticket.Name, tasks.WeldTicket) {
			n += need.Count
		}
	}
	if n > 0 {
		return n
	}
	return people
}

// byPerson gives the hands-on time where the procedures have rates for people: of those named
// under who, else of the slowest who may weld it, so that it holds whoever does. Together their
// rates add up. Its estimate is that of the slowest of them.
func (x *expander) byPerson(t *tasks.Task, c weld.Circumstances, usual weld.Estimate, welders int) (origin.Figure, weld.Estimate, bool) {
	own := map[string]bool{}
	for _, s := range t.Welds() {
		for _, p := range x.w.Job.Procedures {
			for i := range p.By {
				own[p.By[i].Person] = own[p.By[i].Person] || p.Name == s.Procedure
			}
		}
	}
	if len(own) == 0 {
		return origin.Figure{}, usual, false
	}
	type one struct {
		name string
		e    weld.Estimate
	}
	var list []one
	first, also := x.welders(t)
	for _, p := range x.w.Job.People {
		named := has(t.Who, p.Name)
		may := !p.Outside && (len(p.Places) == 0 || has(p.Places, t.Place.Name)) && p.HoldsAll(append([]tasks.Ticket{first}, also...))
		if !named && (len(t.Who) > 0 || !may) {
			continue
		}
		if e, err := weld.Work(x.seamsOf(t, p.Name), c); err == nil {
			list = append(list, one{p.Name, e})
		}
	}
	slices.SortStableFunc(list, func(a, b one) int {
		switch {
		case a.e.HandsOn > b.e.HandsOn:
			return -1
		case a.e.HandsOn < b.e.HandsOn:
			return 1
		}
		return 0
	})
	if len(list) == 0 {
		return origin.Figure{}, usual, false
	}
	list = list[:min(len(list), max(1, welders))]
	sum, words := 0.0, []string{}
	var from []origin.Figure
	for _, p := range list {
		f := renamed(p.e.Hours, "time of "+p.name)
		sum += 1 / f.Value
		from, words = append(from, f), append(words, "1 / "+f.Name)
	}
	how := "1 / (" + strings.Join(words, " + ") + ")"
	if len(list) == 1 {
		how = from[0].Name
	}
	if len(t.Who) == 0 {
		how += ": the slowest who may weld it"
	}
	return origin.Worked("hands-on time", 1/sum, "min", how, from...), list[0].e, true
}

// weatherNotes says what weather stops welding at the site.
func (x *expander) weatherNotes(t *tasks.Task, e weld.Estimate) []string {
	if !x.atSite(t) {
		return nil
	}
	wind := math.Inf(1)
	air := -math.MaxFloat64
	for _, s := range e.Seams {
		w := s.Process.Weather()
		air = math.Max(air, w.MinAir)
		if w.MaxWind > 0 {
			wind = math.Min(wind, w.MaxWind)
		}
	}
	note := fmt.Sprintf("no welding on wet steel or below %.0f °C", air)
	if !math.IsInf(wind, 1) {
		note += fmt.Sprintf(", nor in more than %.1f m/s of wind at the arc without a shelter (AWS D1.1)", wind)
	}
	out := []string{note}
	if h := t.Place.Hourly(t.Face); h != nil {
		return append(out, x.weldHours(t, h, wind, air)...)
	}
	if t := x.steel(t.Place); t < air {
		out = append(out, fmt.Sprintf("planned at %.0f °C, too cold to weld: warm a shelter", t))
	}
	return out
}
