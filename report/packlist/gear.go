package packlist

import (
	"fmt"
	"math"
	"slices"
	"sort"
	"strconv"
	"strings"

	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/coat"
	"sailby/tasks/expand"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
)

// gear is the kit that goes along: what a task at the site uses, and what powers it.
func (m *maker) gear() {
	for _, k := range m.job.Kit {
		if k.Slots != nil || k.At != nil {
			continue // hired comes by itself, kit with a place stays there
		}
		n := max(k.Count, 1)
		it := Item{Group: Gear, What: k.Name, Amount: strconv.Itoa(n), Mass: roundUp(k.Mass.Value * float64(n)), stow: k.Stowing, Spare: k.Spare, pieces: n}
		for _, s := range m.steps() {
			if slices.ContainsFunc(s.Kit, func(u expand.Use) bool { return u.Kit == k }) {
				m.with(&it, s)
			}
		}
		used := len(it.For) > 0
		m.spareOf(&it, k)
		for _, s := range m.steps() { // a source of power serves all that draws
			if len(it.For) == 0 && k.Gives == 0 {
				break
			}
			if k.Gives > 0 && s.Power > 0 {
				used = true
				m.with(&it, s)
			}
		}
		if len(it.For) == 0 {
			continue
		}
		if k.HasKind {
			it.Group = LiftGear
		}
		it.Stops = it.Stops || k.Count <= 1 && used
		m.add(it)
	}
}

// spareOf adds to a kit's reasons that it stands in for another that goes along: kit that is named as a spare
// goes too.
func (m *maker) spareOf(it *Item, k *tasks.Kit) {
	for _, other := range m.job.Kit {
		if other == k || other.Spare != k.Name || other.Slots != nil || other.At != nil {
			continue
		}
		if slices.ContainsFunc(m.steps(), func(s *expand.Step) bool {
			return slices.ContainsFunc(s.Kit, func(u expand.Use) bool { return u.Kit == other })
		}) {
			it.For = append(it.For, other.Name+", as its spare")
		}
	}
}

// liftGear is what each lift takes beside its hoist or crane.
func (m *maker) liftGear() {
	var lines, wind Item
	for _, s := range m.steps() {
		r := s.Rigging
		if r == nil || s.Task.Kind != tasks.Lift || r.Way == lift.ByHands || r.Way == lift.ByTrolley {
			continue
		}
		it := Item{Group: LiftGear, What: "slings and shackles for " + agenda.TaskLabel(s.Task), Amount: "1 set", Stops: true, pieces: 1}
		it.House = true
		if l := s.Task.Lifting; l != nil && l.Slings != nil {
			it.Amount, it.House, it.Mass = slingWords(l.Slings), false, roundUp(l.Tackle.Value)
		}
		m.with(&it, s)
		it.Stops = true
		m.add(it)
		m.with(&lines, s)
		if r.Way == lift.ByLoaderCrane {
			m.with(&wind, s)
		}
	}
	if len(lines.For) > 0 {
		lines.Group, lines.What, lines.Amount, lines.House, lines.Stops, lines.pieces = LiftGear, "tag lines", "2", true, false, 1
		m.add(lines)
	}
	if len(wind.For) > 0 {
		wind.Group, wind.What, wind.Amount, wind.House, wind.Stops, wind.pieces = LiftGear, "wind meter", "1", true, true, 1
		m.add(wind)
	}
}

// slingWords writes a set of slings.
func slingWords(r *lift.Rig) string {
	n := max(r.Legs, len(r.Lugs), 1)
	words := []string{fmt.Sprintf("%d legs", n)}
	if n == 1 {
		words[0] = "1 leg"
	}
	if r.LegLength > 0 {
		words = append(words, origin.Trim(r.LegLength/1000)+" m")
	}
	if r.Table != "" {
		words = append(words, r.Table+", size "+origin.Trim(r.Size))
	}
	if r.WLL > 0 {
		words = append(words, origin.Trim(r.WLL)+" kg a leg")
	}
	if r.Coupling > 0 {
		words = append(words, "shackles of "+origin.Trim(r.Coupling)+" kg")
	}
	return strings.Join(words, ", ")
}

// defaultAllowance is taken on consumables that have no spare of their own (house judgement).
const defaultAllowance = 0.10

// used is one consumable summed over the tasks, exact until it is rounded.
type used struct {
	Item
	unit       string
	sum, spare float64
	each       float64
	packed     string
	paint      *tasks.Paint
	owed       float64 // of sum, what has no spare of its own
}

// consumables adds up what the site's tasks use up; allowance and spare come on top of the sum, and
// then, once, the rounding to what it is sold in.
func (m *maker) consumables() {
	index := map[[2]string]*used{}
	var list []*used
	for _, s := range m.steps() {
		for _, c := range s.Estimate.Consumables {
			id := [2]string{c.What, c.Unit}
			u := index[id]
			if u == nil {
				u = &used{Item: Item{Group: groupOf(c.What), What: c.What, pieces: 1}, unit: c.Unit}
				index[id] = u
				list = append(list, u)
			}
			u.sum += c.Amount
			u.spare += c.Spare
			if c.Spare == 0 {
				u.owed += c.Amount
			}
			if c.Each > 0 {
				u.each, u.packed = c.Each, c.Packed
			}
			m.with(&u.Item, s)
		}
	}
	share := defaultAllowance
	if a := m.job.Packing.Allowance; a.Pos.Given() {
		share = a.Value
	}
	for _, u := range list {
		u.spare += u.owed * share
		for _, p := range m.job.Paints {
			if u.What == "paint "+p.Name {
				u.paint = p
			}
		}
		m.sold(u)
		m.add(u.Item)
	}
}

// groupOf sorts a consumable by its name.
func groupOf(what string) Group {
	for _, w := range []string{"gas", "oxygen", "acetylene", "propane", "argon"} {
		if strings.Contains(what, w) {
			return Gas
		}
	}
	switch {
	case strings.HasPrefix(what, "paint ") || strings.HasPrefix(what, "thinner"):
		return Paint
	case strings.Contains(what, "abrasive"):
		return Abrasives
	}
	return Consumables
}

// sold rounds a consumable up to what it is sold in, and gives its mass and class.
func (m *maker) sold(u *used) {
	if u.unit == "pieces" {
		u.sum, u.spare = math.Ceil(u.sum-1e-9), math.Ceil(u.spare-1e-9)
	}
	total := u.sum + u.spare
	unit := " " + u.unit
	if u.unit == "pieces" {
		unit = ""
	}
	u.Amount = origin.Trim(roundUp(u.sum)) + unit
	if u.spare > 0 {
		u.Amount += " and " + origin.Trim(roundUp(u.spare)) + unit + " spare"
	}
	size, own := m.packOf(u.What)
	count := 0
	switch {
	case own:
		count = int(math.Ceil(total/size - 1e-9))
		u.Amount += fmt.Sprintf(": %d of %s %s", count, origin.Trim(size), u.unit)
		total = float64(count) * size
	case u.paint != nil && len(u.paint.PackSizes) > 0:
		if tins, err := coat.Tins(total, u.paint.PackSizes); err == nil {
			var words []string
			total = 0
			for _, t := range tins {
				words = append(words, fmt.Sprintf("%d of %s L", t.Count, origin.Trim(t.Size)))
				total += float64(t.Count) * t.Size
				count += t.Count
			}
			u.Amount += ": tins " + strings.Join(words, " and ")
		}
	case u.each > 0:
		count = int(math.Ceil(total/u.each - 1e-9))
		u.Amount += ": " + agenda.Packs(count, u.packed)
		if u.packed != "electrodes" {
			total = float64(count) * u.each
		}
	}
	switch {
	case u.Group == Gas && u.unit != "kg":
		u.Mass = float64(count) * bottleMass
		u.stow.Class, u.stow.Of = "gas", float64(max(count, 1))
	case u.Group == Gas:
		u.Mass = roundUp(total)
		u.stow.Class, u.stow.Of = "gas", float64(max(count, 1))
	case u.unit == "kg":
		u.Mass = roundUp(total)
	case u.Group == Paint:
		u.Mass = roundUp(total * litreMass)
		u.stow.Class, u.stow.Of = "paint", total
		if strings.HasPrefix(u.What, "thinner") {
			u.stow.Class, u.Mass = "thinner", roundUp(total*0.9)
		}
	}
}

// Masses that nothing states (house judgement): a full 50 L steel bottle, a litre of mixed paint with its
// tin.
const (
	bottleMass = 75.0
	litreMass  = 1.5
)

// packOf finds the pack size that the job file gives, by the longest beginning of the name.
func (m *maker) packOf(what string) (size float64, ok bool) {
	var names []string
	for n := range m.job.Packing.Packs {
		if strings.HasPrefix(what, n) || strings.HasPrefix(strings.TrimPrefix(what, "paint "), n) {
			names = append(names, n)
		}
	}
	sort.Slice(names, func(i, k int) bool {
		return len(names[i]) > len(names[k]) || len(names[i]) == len(names[k]) && names[i] < names[k]
	})
	if len(names) == 0 || m.job.Packing.Packs[names[0]] <= 0 {
		return 0, false
	}
	return m.job.Packing.Packs[names[0]], true
}

// also lists what the job file adds.
func (m *maker) also() {
	for _, e := range m.job.Packing.Also {
		it := Item{Group: Also, What: e.Name, Amount: e.Amount, Mass: e.Mass, Spare: e.Spare, pieces: 1, stow: tasks.Stowing{Size: e.Size, Class: e.Class, Of: e.Of}}
		if it.Amount == "" {
			it.Amount = "1"
		}
		for _, s := range m.w.Steps {
			if slices.Contains(e.For, s.Task.Name) && !s.Absent {
				m.with(&it, s)
			}
		}
		it.Stops = e.Stops
		m.add(it)
	}
}
