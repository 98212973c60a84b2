// Package packlist works out what to take to the site: one list for the command and for the
// printed pack. Masses are kilograms, lengths millimetres, times UTC minutes.
//
// What tasks use up is summed before it is rounded, once, to what it is sold in. What stands on no
// task (tools, protective gear, papers) is house judgement by kind of work, and marked so.
package packlist

import (
	"cmp"
	"math"
	"slices"
	"strings"
	"time"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Group is what kind of thing an item is; the list is in this order within a day.
type Group string

// The groups.
const (
	Loads       Group = "assemblies"
	Gear        Group = "gear"
	LiftGear    Group = "gear for lifts"
	Consumables Group = "consumables"
	Gas         Group = "gas"
	Paint       Group = "paint"
	Abrasives   Group = "abrasives"
	Tools       Group = "tools"
	Protective  Group = "protective gear"
	Papers      Group = "papers"
	Also        Group = "also"
)

// Item is one line of the list.
type Item struct {
	Group  Group
	What   string
	Amount string       // as printed: "2 spools of 15 kg", "1", "24 kg and 2.4 kg spare"
	For    []string     // the tasks, as printed
	Day    hours.Minute // first needed; 0 is not known
	Mass   float64      // kg in all; 0 is not known
	Stops  bool         // the job stops without it
	Spare  string       // what stands in for it
	House  bool         // house judgement: no task names it
	Box    string       // "" is loose
	Where  []string     // vehicles that take it, "van, run 2"; nil without vehicles
	pieces int          // so many goods of it
	stow   tasks.Stowing
	over   float64 // weight allowance on its mass; 0 is none
	flat   bool    // no mass to carry: papers
}

// Box is a box with what is in it.
type Box struct {
	Name  string
	Mass  float64 // kg with all that is in it
	Items []string
	Where string
}

// List is what to take.
type List struct {
	Job      string
	Zone     *time.Location // of the days
	Items    []Item         // by group, then by day
	Boxes    []Box
	Mass     float64  // kg, as far as known
	Unknown  []string // things without a mass
	Vehicles []Vehicle
	OK       bool      // everything has a vehicle; true without vehicles
	Reason   string    // of the load plan
	Nearest  string    // where it does not fit: what would
	Proved   bool      // where it does not fit: no split can
	Split    []Vehicle // where it does not fit: what goes on which run, with as many more runs as that takes
	Runs     string    // what the further runs of Vehicles or Split ask for, in hours; empty is one run
	Flags    []string  // carriage, driving and bands: flagged, never decided
	Notes    []string
}

// maker is what is known while a list is made.
type maker struct {
	a     *plan.Answer
	w     *expand.Work
	job   *tasks.Job
	items []Item
	list  *List
	over  map[string]float64 // weight allowance of goods by name
	days  []hours.Minute     // of the ranks, from 1
}

// Make works out what to take for an answer's plan; without a plan the days are left out. An
// answer without work gives nil.
func Make(a *plan.Answer) *List {
	if a == nil || a.Work == nil || a.Work.Window.Place == nil {
		return nil
	}
	m := &maker{a: a, w: a.Work, job: a.Work.Job}
	m.list = &List{Job: m.job.Name, OK: true, Zone: agenda.Zone(m.w, m.w.Window.Place)}
	m.loads()
	m.gear()
	m.liftGear()
	m.consumables()
	m.house()
	m.also()
	order := []Group{Loads, Gear, LiftGear, Consumables, Gas, Paint, Abrasives, Tools, Protective, Papers, Also}
	slices.SortStableFunc(m.items, func(x, y Item) int {
		return cmp.Or(cmp.Compare(slices.Index(order, x.Group), slices.Index(order, y.Group)), cmp.Compare(x.Day, y.Day))
	})
	m.boxes()
	m.vehicles()
	for _, it := range m.items {
		if it.Mass > 0 {
			m.list.Mass += it.Mass
		} else if !it.House && !it.flat {
			m.list.Unknown = append(m.list.Unknown, it.What)
		}
	}
	for _, b := range m.job.Packing.Boxes {
		if slices.ContainsFunc(m.items, func(it Item) bool { return it.Box == b.Name }) {
			m.list.Mass += b.Mass
		}
	}
	m.list.Items = m.items
	return m.list
}

// steps are the steps worked at the site, those that happen.
func (m *maker) steps() []*expand.Step {
	var out []*expand.Step
	for _, s := range m.w.Steps {
		if !s.Absent && s.Place == m.w.Window.Place {
			out = append(out, s)
		}
	}
	return out
}

// with adds a step to the reasons of an item.
func (m *maker) with(it *Item, s *expand.Step) {
	label := agenda.TaskLabel(s.Task)
	if !slices.Contains(it.For, label) {
		it.For = append(it.For, label)
	}
	if m.a.Plan != nil && s.Index < len(m.a.Plan.Steps) {
		if start := m.a.Plan.Steps[s.Index].Start; it.Day == 0 || start < it.Day {
			it.Day = start
		}
	}
	it.Stops = it.Stops || slices.ContainsFunc(m.a.Governing, func(c plan.Cause) bool { return c.Step == s.Index || c.Other == s.Index })
}

func (m *maker) add(it Item) { m.items = append(m.items, it) }

// lifted says whether a lift or move at the site takes an assembly up.
func (m *maker) lifted(a *tasks.Assembly) bool {
	return slices.ContainsFunc(m.steps(), func(s *expand.Step) bool { return s.Moves == a.Name })
}

// loads are the pieces of assemblies that are worked on at home and at the site: what hangs
// together when the trip leaves travels in one piece.
func (m *maker) loads() {
	for _, a := range m.job.Assemblies {
		home := false
		it := Item{Group: Loads, What: a.Name, Amount: "1", stow: a.Stowing, Spare: a.Spare, pieces: 1}
		for _, s := range m.w.Steps {
			if s.Absent || s.Moves != a.Name && !slices.Contains(s.Works, a.Name) {
				continue
			}
			if s.Place == m.w.Window.Place {
				m.with(&it, s)
			} else {
				home = true
			}
		}
		if !home && len(it.For) > 0 && !a.Old && m.lifted(a) {
			m.list.Notes = append(m.list.Notes, a.Name+" is not on this list: no task at home has to do with it, so it is taken to stand at the site already (`old: yes` says so); if it goes along, give it a task at home")
		}
		if !home || len(it.For) == 0 {
			continue
		}
		it.Stops = true
		groups := expand.Travels(m.w, a)
		for i, g := range groups {
			one := it
			if len(groups) > 1 {
				one.What = a.Name + ": " + g.Name
				one.For = slices.Clone(it.For)
			}
			if i > 0 {
				one.stow = tasks.Stowing{}
			}
			one.Mass, one.over = roundUp(g.Total.Mass), g.Total.Allowance
			if one.stow.Size == [3]float64{} {
				for k := range 3 {
					one.stow.Size[k] = g.Total.High[k] - g.Total.Low[k]
				}
			}
			m.add(one)
		}
	}
}

// roundUp keeps one decimal, upwards, so that the list never falls short.
func roundUp(v float64) float64 { return math.Ceil(v*10-1e-9) / 10 }

// begins says whether a name is one of the words, or begins with one.
func begins(name string, words []string) bool {
	return slices.ContainsFunc(words, func(w string) bool { return w != "" && strings.HasPrefix(name, w) })
}

// boxes puts things into the boxes of the job file.
func (m *maker) boxes() {
	for _, b := range m.job.Packing.Boxes {
		out := Box{Name: b.Name, Mass: b.Mass}
		for i := range m.items {
			it := &m.items[i]
			if it.Box == "" && it.Group != Loads && begins(it.What, b.Holds) {
				it.Box = b.Name
				out.Items = append(out.Items, it.What)
				out.Mass += it.Mass
			}
		}
		if len(out.Items) > 0 {
			out.Mass = roundUp(out.Mass)
			m.list.Boxes = append(m.list.Boxes, out)
		} else {
			m.list.Notes = append(m.list.Notes, "box "+b.Name+": nothing on the list goes into it")
		}
	}
}
