package packlist

import (
	"slices"
	"strings"

	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// usual is what a kind of work usually needs and no task names: house judgement, to be struck out.
type usual struct {
	group Group
	what  string
	when  func(m *maker, s *expand.Step) bool
}

func of(kinds ...tasks.Kind) func(*maker, *expand.Step) bool {
	return func(_ *maker, s *expand.Step) bool {
		return s.Class == expand.Hands && slices.Contains(kinds, s.Task.Kind)
	}
}

// uses says whether a step's estimate counts something out.
func uses(s *expand.Step, what string) bool {
	return slices.ContainsFunc(s.Estimate.Consumables, func(c expand.Consumable) bool { return c.What == what })
}

func hot(_ *maker, s *expand.Step) bool { return s.Hot }

func powered(_ *maker, s *expand.Step) bool { return s.Power > 0 }

func face(is func(f *tasks.Workface) bool) func(*maker, *expand.Step) bool {
	return func(_ *maker, s *expand.Step) bool { return s.Face != nil && is(s.Face) }
}

func slung(_ *maker, s *expand.Step) bool {
	return s.Task.Kind == tasks.Lift && s.Class == expand.Hands
}

func pulled(_ *maker, s *expand.Step) bool {
	return s.Task.Lifting != nil && s.Task.Lifting.Proved != nil
}

var usuals = []usual{
	{Tools, "return clamp, chipping hammer, wire brushes, temperature sticks, spare torch parts", of(tasks.Weld)},
	{Tools, "angle grinders, cutting and flap discs, spanners for them", of(tasks.Weld, tasks.Cut, tasks.Prep)},
	{Tools, "torch set, nozzles, flashback arrestors, lighter", func(_ *maker, s *expand.Step) bool { return s.Task.Kind == tasks.Cut && s.Task.By == "oxy-fuel" }},
	{Gas, "oxygen and fuel gas for the torch: count the bottles by the cut", func(_ *maker, s *expand.Step) bool {
		return s.Task.Kind == tasks.Cut && s.Task.By == "oxy-fuel" && !uses(s, "oxygen")
	}},
	{Tools, "clamps, wedges, dogs, levels, squares, tape, scriber, podger spanners, drifts", of(tasks.FitUp)},
	{Tools, "mixing paddle, brushes, rollers, masking tape, rags in a tin, steel thermometer, hygrometer, wet film comb, film gauge", of(tasks.Coat)},
	{Tools, "blast hoses, nozzles, dead-man handle, sheeting to catch the grit", func(_ *maker, s *expand.Step) bool {
		return s.Task.Kind == tasks.Prep && (s.Task.Method == "blast" || strings.HasPrefix(s.Task.Grade, "Sa"))
	}},
	{Tools, "test gear, gauges, lamp, penetrant and developer or magnetic ink", of(tasks.Test)},
	{Tools, "packing timber, wedges, pinch bars", of(tasks.Lift, tasks.Move)},
	{Tools, "load cell or jack with a gauge, for pulling to the cut-off", pulled},
	{Tools, "leads, residual current devices, plugs that fit there", powered},
	{Tools, "screens, fire blankets", hot},
	{Protective, "helmets, safety boots, gloves, eye protection, ear protection, high-visibility jackets, one set each", func(*maker, *expand.Step) bool { return true }},
	{Protective, "welding helmets with breathing protection, leathers, gauntlets", of(tasks.Weld)},
	{Protective, "face shields, dust masks", of(tasks.Cut, tasks.Prep)},
	{Protective, "breathing filters for vapour, chemical gloves, overalls, eyewash", of(tasks.Coat)},
	{Protective, "extinguishers: one at the work, one with the fire watch", hot},
	{Protective, "lifejackets, throw line", face(func(f *tasks.Workface) bool { return f.Water })},
	{Protective, "radio, tide table, boots", face(func(f *tasks.Workface) bool { return f.Tidal })},
	{Protective, "gas tester, fan and duct, rescue line", face(func(f *tasks.Workface) bool { return f.Closed })},
	{Protective, "barrier tape and signs for the lift", slung},
	{Protective, "first-aid kit, torch, spare batteries", func(*maker, *expand.Step) bool { return true }},
}

// house lists tools, protective gear and papers by kind of work.
func (m *maker) house() {
	steps := m.steps()
	for _, u := range usuals {
		it := Item{Group: u.group, What: u.what, Amount: "house list", House: true, pieces: 1}
		for _, s := range steps {
			if u.when(m, s) {
				m.with(&it, s)
			}
		}
		if len(it.For) == 0 {
			continue
		}
		if len(it.For) > 4 {
			it.For = append(it.For[:4:4], "and others")
		}
		it.Stops = false
		m.add(it)
	}
	m.papers(steps)
}

// papers lists what must be on paper, by what the tasks name.
func (m *maker) papers(steps []*expand.Step) {
	index := map[string]int{}
	paper := func(what string, stops bool, s *expand.Step) {
		i, ok := index[what]
		if !ok {
			i = len(m.items)
			index[what] = i
			m.add(Item{Group: Papers, What: what, Amount: "1", flat: true, pieces: 1})
		}
		it := &m.items[i]
		before := it.Stops
		if s != nil {
			m.with(it, s)
		}
		it.Stops = before || stops
	}
	paper("this pack, and pencils", false, nil)
	for _, s := range steps {
		t := s.Task
		if s.Class != expand.Hands || s.HandsOn == 0 {
			continue
		}
		if t.Drawing != "" {
			paper("drawing "+t.Drawing, false, s)
		}
		for _, seam := range t.Seams {
			if seam.Procedure != "" {
				paper("welding procedure: "+seam.Procedure, true, s)
			}
		}
		for _, c := range t.Coats {
			paper("data and safety sheet of "+c, false, s)
		}
		for _, p := range s.Wants {
			paper("permit: "+p, true, s)
		}
		if t.Kind == tasks.Weld && len(t.Seams) > 0 {
			paper("welders' qualifications", false, s)
		}
		if slung(m, s) {
			paper("lift sheet, signed: "+agenda.TaskLabel(t), true, s)
			paper("certificates of hoists, slings and shackles", true, s)
		}
		if s.Place.Tide != nil {
			paper("tide table", false, s)
		}
		for _, c := range s.Estimate.Consumables {
			if groupOf(c.What) == Gas {
				paper("safety sheets of the gases, and the dangerous goods note that the carrier wants", false, s)
			}
		}
	}
	if m.w.Trip != nil {
		paper("booking of "+m.w.Trip.Name, true, nil)
	}
	for _, v := range m.job.Vehicles {
		paper("papers of "+v.Name+", and the driver's licence for it", true, nil)
	}
}
