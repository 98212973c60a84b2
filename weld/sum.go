package weld

import (
	"fmt"
	"strings"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// sum makes one estimate of all seams.
func sum(parts []*seamWork, c Circumstances) Estimate {
	var est Estimate
	for _, e := range parts {
		e.holding(c)
		est.Seams = append(est.Seams, e.estimate())
		est.Passes = max(est.Passes, e.runs.count)
	}
	pick := func(f func(*seamWork) origin.Figure) []origin.Figure {
		var list []origin.Figure
		for _, e := range parts {
			list = append(list, f(e))
		}
		return list
	}
	w := &est.Why
	w.Metal = joined("weld metal", pick(func(e *seamWork) origin.Figure { return e.metal }))
	w.Arc = joined("arc time", pick(func(e *seamWork) origin.Figure { return e.arc }))
	est.Hours = joined("hands-on time", pick(func(e *seamWork) origin.Figure { return e.hours }))
	w.SafeStop = joined("safe stop", pick(func(e *seamWork) origin.Figure { return e.safe }))
	w.Passes = largest(pick(func(e *seamWork) origin.Figure { return e.runs.why }))
	w.HeatInput = largest(pick(func(e *seamWork) origin.Figure { return e.heat }))
	w.Preheat = largest(pick(func(e *seamWork) origin.Figure { return e.heatTo }))
	w.SetUp = largest(pick(func(e *seamWork) origin.Figure { return e.setUp }))
	w.Cooling = largest(pick(func(e *seamWork) origin.Figure { return e.cool }))
	w.BeforeNDT = largest(pick(func(e *seamWork) origin.Figure { return e.hold }))
	w.Soak = largest(pick(func(e *seamWork) origin.Figure { return e.soak }))
	w.Power = largest(pick(func(e *seamWork) origin.Figure { return e.power }))
	w.Generator = largest(pick(func(e *seamWork) origin.Figure { return e.generator }))
	w.Drop = largest(pick(func(e *seamWork) origin.Figure { return e.drop }))
	w.SupplyDrop = largest(pick(func(e *seamWork) origin.Figure { return e.supplyDrop }))
	w.T85 = smallest(pick(func(e *seamWork) origin.Figure { return e.cooling.Why }))
	w.Combined = largest(pick(func(e *seamWork) origin.Figure { return e.combined }))
	w.Scale = largest(pick(func(e *seamWork) origin.Figure { return e.scale }))
	if f := c.Steel.CE(); f.Value > 0 {
		w.CE = f
	}
	if f := c.Steel.CET(); f.Value > 0 {
		w.CET = f
	}
	est.Metal, est.HeatInput, est.Power = w.Metal.Value, w.HeatInput.Value, w.Power.Value
	est.Arc = quantity.Arc(w.Arc.Value)
	est.HandsOn = quantity.HandsOn(est.Hours.Value)
	est.SetUp = quantity.HandsOn(w.SetUp.Value)
	est.SafeStop = quantity.HandsOn(w.SafeStop.Value)
	est.Cooling, est.BeforeNDT = quantity.Clock(w.Cooling.Value), quantity.Clock(w.BeforeNDT.Value)
	for _, e := range parts {
		est.Interpass += quantity.Clock(e.standBy.Value)
		est.Soak = max(est.Soak, quantity.Clock(e.soak.Value))
	}
	est.Consumables = gather(parts, c)
	est.Warnings = warnings(parts)
	return est
}

func (e *seamWork) estimate() SeamEstimate {
	return SeamEstimate{
		Title: e.title(), Section: e.section, Position: e.pos, Process: e.proc.Process, Length: e.length, Metal: e.metal.Value, Passes: e.runs.count,
		Arc: quantity.Arc(e.arc.Value), HandsOn: quantity.HandsOn(e.hours.Value), Welding: quantity.HandsOn(e.welding.Value),
		HeatInput: e.heat.Value, Preheat: e.heatTo.Value, Hours: e.hours, Runs: e.runList(),
	}
}

// joined is the one figure there is, or the sum of several named by seam.
func joined(name string, list []origin.Figure) origin.Figure {
	if len(list) == 1 {
		return list[0]
	}
	f := origin.Figure{Name: name, Unit: list[0].Unit}
	var names []string
	for i, g := range list {
		g.Name = fmt.Sprintf("seam %d", i+1)
		names = append(names, g.Name)
		f.Value += g.Value
		f.From = append(f.From, g)
	}
	f.Origin = origin.Origin{Kind: origin.Formula, Source: strings.Join(names, " + ")}
	return f
}

// largest gives the first figure with the largest value; smallest likewise, leaving out those
// that do not apply.
func largest(list []origin.Figure) origin.Figure {
	var best origin.Figure
	for _, f := range list {
		if f.Name != "" && (best.Name == "" || f.Value > best.Value) {
			best = f
		}
	}
	return best
}

func smallest(list []origin.Figure) origin.Figure {
	var best origin.Figure
	for _, f := range list {
		if f.Name != "" && (best.Name == "" || f.Value < best.Value) {
			best = f
		}
	}
	return best
}

// warnings gives every warning once, in order of seams, with the seam's number where there are
// several.
func warnings(parts []*seamWork) []string {
	seen := map[string]bool{}
	var list []string
	for i, e := range parts {
		for _, w := range e.warn {
			if seen[w] {
				continue
			}
			seen[w] = true
			if len(parts) > 1 {
				w = fmt.Sprintf("joint %d: %s", i+1, w)
			}
			list = append(list, w)
		}
	}
	return list
}

// Steps gives every figure of the estimate that applies, in the order in which they are worked
// out: metal, runs, arc, hands-on, set-up, safe stop, heat, preheat, cooling, testing, power and
// cables, consumables.
func (e Estimate) Steps() []origin.Figure {
	w := e.Why
	all := []origin.Figure{w.Metal, w.Passes, w.Arc, e.Hours, w.SetUp, w.SafeStop, w.HeatInput, w.CE, w.CET, w.Combined, w.Scale, w.Preheat, w.Soak, w.T85, w.Cooling, w.BeforeNDT, w.Power, w.Generator, w.Drop, w.SupplyDrop}
	for _, c := range e.Consumables {
		all = append(all, renamed(c.Why, c.Name))
		if c.Count.Name != "" {
			all = append(all, renamed(c.Count, c.Name+", count without spare"))
		}
	}
	var steps []origin.Figure
	for _, f := range all {
		if f.Name != "" {
			steps = append(steps, f)
		}
	}
	return steps
}
