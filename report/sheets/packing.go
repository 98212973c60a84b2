package sheets

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"

	"sailby/report/agenda"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
)

// thing is one line of the packing list.
type thing struct {
	what    string
	amount  string
	forWhat []string
	day     hours.Minute // first needed
	mass    float64      // kg, 0 is not known
	stops   bool         // the job stops without it
}

// packing lists what the site work needs, merged over the tasks, with boxes for out and back.
func (k *pack) packing() {
	p := k.p
	p.begin("Packing list", "packing", true)
	p.big("Packing list")
	p.para("Every thing is seen by somebody before it is ticked. The job stops without what is marked so: it is used on the chain that sets the finish, or there is only one.", body, false)
	things := append(k.loads(), append(k.gear(), k.consumables()...)...)
	slices.SortStableFunc(things, func(x, y thing) int { return cmp.Compare(x.day, y.day) })
	zone := agenda.Zone(k.work, k.work.Window.Place)
	p.skip(2)
	t := p.table(column{"Out", 15}, column{"What", 84}, column{"Amount", 32}, column{"First needed", 30}, column{"Back", 15})
	mass := 0.0
	for _, th := range things {
		c := loud(th.what, "for "+strings.Join(th.forWhat, ", "))
		if th.stops {
			c.lines = append(c.lines, line{"Job stops without it.", true})
		}
		amount := say(th.amount)
		if th.mass > 0 {
			amount.lines = append(amount.lines, line{text: origin.Trim(th.mass) + " kg in all"})
			mass += th.mass
		}
		t.row(write(), c, amount, say(agenda.When(th.day, zone)), write())
	}
	for _, s := range k.house() {
		t.row(write(), say(s), say("house list"), say(""), write())
	}
	for range 3 { // room for what the list does not know
		t.row(write(), cell{blank: true}, cell{blank: true}, cell{blank: true}, write())
	}
	t.end()
	if mass > 0 {
		p.para(fmt.Sprintf("Together %s kg, as far as masses are known. Gas, fuel and paint have rules of their own on ferries and roads: ask the carrier.", origin.Trim(math.Ceil(mass))), body, false)
	}
	p.skip(2)
	p.fields(3, field{label: "Packed and seen by", units: 2}, field{label: "Date"})
}

// chain says whether a step is on the chain that sets the finish.
func (k *pack) chain(s *expand.Step) bool {
	for _, c := range k.a.Governing {
		if c.Step == s.Index || c.Other == s.Index {
			return true
		}
	}
	return false
}

// siteSteps are the steps worked at the site.
func (k *pack) siteSteps() []*expand.Step {
	var out []*expand.Step
	for _, s := range k.work.Steps {
		if s.Site && !s.Absent && s.Place == k.work.Window.Place {
			out = append(out, s)
		}
	}
	return out
}

// with adds a step to a thing's reasons.
func (th *thing) with(k *pack, s *expand.Step) {
	label := agenda.TaskLabel(s.Task)
	if !slices.Contains(th.forWhat, label) {
		th.forWhat = append(th.forWhat, label)
	}
	if start := k.planned(s).Start; th.day == 0 || start < th.day {
		th.day = start
	}
	th.stops = th.stops || k.chain(s)
}

// gear is the kit that goes along.
func (k *pack) gear() []thing {
	var out []thing
	for _, kit := range k.job.Kit {
		if kit.Slots != nil || kit.At != nil {
			continue // hired comes by itself, kit with a place stays there
		}
		th := thing{what: paper(kit.Name), amount: fmt.Sprintf("%d", max(kit.Count, 1)), mass: kit.Mass.Value * float64(max(kit.Count, 1))}
		for _, s := range k.siteSteps() {
			if slices.ContainsFunc(s.Kit, func(u expand.Use) bool { return u.Kit == kit }) {
				th.with(k, s)
			}
		}
		if len(th.forWhat) == 0 {
			if kit.Gives == 0 {
				continue
			}
			for _, s := range k.siteSteps() { // a source of power serves all that draws
				if s.Power > 0 {
					th.with(k, s)
				}
			}
		}
		if len(th.forWhat) == 0 {
			continue
		}
		th.stops = th.stops || kit.Count <= 1
		out = append(out, th)
	}
	return out
}

// loads are the assemblies that are lifted or moved at the site and were worked on at home: what
// is only ever at the site is not packed.
func (k *pack) loads() []thing {
	var out []thing
	index := map[string]int{}
	for _, s := range k.siteSteps() {
		name := s.Moves
		if name == "" || !k.fromHome(name) {
			continue
		}
		i, ok := index[name]
		if !ok {
			i = len(out)
			index[name] = i
			out = append(out, thing{what: paper(name), amount: "1"})
			for _, a := range k.job.Assemblies {
				if a.Name == name {
					out[i].mass = a.Mass.Value
				}
			}
			if f, ok := agenda.Fact(s, "mass"); ok && out[i].mass == 0 {
				out[i].mass = f.Value
			}
		}
		out[i].with(k, s)
	}
	return out
}

// fromHome says whether some step away from the site works on the assembly or moves it.
func (k *pack) fromHome(name string) bool {
	return slices.ContainsFunc(k.work.Steps, func(s *expand.Step) bool {
		return !s.Absent && s.Place != k.work.Window.Place && (s.Moves == name || slices.Contains(s.Works, name))
	})
}

// consumables adds up what the site steps use up, with the spare.
func (k *pack) consumables() []thing {
	type key struct{ what, unit string }
	sum, spare := map[key]float64{}, map[key]float64{}
	index, packs := map[key]int{}, map[key]expand.Consumable{}
	var out []thing
	var keys []key
	for _, s := range k.siteSteps() {
		for _, c := range s.Estimate.Consumables {
			id := key{paper(c.What), paper(c.Unit)}
			i, ok := index[id]
			if !ok {
				i = len(out)
				index[id] = i
				out, keys = append(out, thing{what: id.what}), append(keys, id)
			}
			if c.Each > 0 {
				packs[id] = c
			}
			sum[id] += c.Amount
			spare[id] += c.Spare
			out[i].with(k, s)
		}
	}
	for i, id := range keys {
		out[i].amount = joined(" ", origin.Trim(roundUp(sum[id])), id.unit)
		if spare[id] > 0 {
			out[i].amount += joined(" ", " and", origin.Trim(roundUp(spare[id])), id.unit, "spare")
		}
		if c := packs[id]; c.Each > 0 {
			out[i].amount += ": " + paper(agenda.Packs(int(math.Ceil((sum[id]+spare[id])/c.Each-1e-9)), c.Packed))
		}
		if id.unit == "kg" {
			out[i].mass = roundUp(sum[id] + spare[id])
		}
	}
	return out
}

// roundUp keeps one decimal, upwards, so that the list never falls short.
func roundUp(v float64) float64 { return math.Ceil(v*10-1e-9) / 10 }

// house is what such work usually needs and no task names: house judgement, to be struck out.
func (k *pack) house() []string {
	out := []string{"First-aid kit, eyewash", "Drawings, written procedures, this pack, pencils", "Extinguisher, torch, spare batteries"}
	has := map[string]bool{}
	for _, c := range cautionsOf(k.work, k.siteSteps()) {
		has[c.name] = true
	}
	add := func(name, what string) {
		if has[name] {
			out = append(out, what)
		}
	}
	add("Hot work", "Fire blankets, water or second extinguisher, screens, masks and gloves")
	add("Electricity", "Leads, residual current devices, plugs that fit there, return clamp")
	add("Lifting", "Slings and shackles with tags, tag lines, wind meter")
	add("Solvent and epoxy", "Thermometer for steel, hygrometer, wet film comb, film gauge, mixing pots, rags in a tin")
	add("Over water", "Lifejackets, throw line")
	add("Between tides", "Tide table, radio, boots")
	add("Closed space", "Gas tester, fan and duct, rescue line")
	add("Tests", "Penetrant and developer or test gear, gauges, lamp, report forms")
	return out
}
