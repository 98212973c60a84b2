package check

import (
	"slices"
	"sort"
	"strings"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// What hangs together is played through in the order of the plan (R24): a joining task ties things together when it
// begins, a task that takes off cuts them loose when it ends. Ties are kept one by one, so that what is cut loose takes
// along what is tied to it alone.

// tie is pieces that hang together by one task, or as parts of one assembly.
type tie struct {
	pieces []string
	wholes []string // assemblies that were tied as a whole
}

// times gives when the hands-on work of each task begins and ends; those that do not happen too.
func (c *checker) times() (begins, ends map[string]hours.Minute) {
	begins, ends = map[string]hours.Minute{}, map[string]hours.Minute{}
	for _, o := range c.list {
		if o.s.Class != expand.Hands {
			continue
		}
		if at, ok := begins[o.s.Task.Name]; !ok || o.p.Start < at {
			begins[o.s.Task.Name] = o.p.Start
		}
		if at, ok := ends[o.s.Task.Name]; !ok || o.p.Finish > at {
			ends[o.s.Task.Name] = o.p.Finish
		}
	}
	return begins, ends
}

func named(list []tasks.Named, name string) bool {
	return slices.ContainsFunc(list, func(n tasks.Named) bool { return n.Name == name })
}

// onLater lists the parts that come onto their assembly by a `joins` that names them, and were not on it before: a
// part that some task takes off before any joins it was.
func (c *checker) onLater() map[string]bool {
	begins, ends := c.times()
	out := map[string]bool{}
	for _, t := range c.w.Job.Tasks {
		for _, n := range t.Joins {
			if !strings.Contains(n.Name, "/") {
				continue
			}
			out[n.Name] = true
			for _, off := range c.w.Job.Tasks {
				first := named(off.TakesOff, n.Name)
				for _, on := range c.w.Job.Tasks {
					first = first && (!named(on.Joins, n.Name) || ends[on.Name] > begins[off.Name])
				}
				if first {
					out[n.Name] = false
					break
				}
			}
		}
	}
	return out
}

// parts24 lists all parts of an assembly, the assembly itself where it has none, or the one part.
func (c *checker) parts24(name string) []string {
	if strings.Contains(name, "/") {
		return []string{name}
	}
	i := slices.IndexFunc(c.w.Job.Assemblies, func(a *tasks.Assembly) bool { return a.Name == name })
	if i < 0 {
		return nil
	}
	var out []string
	for _, p := range c.w.Job.Assemblies[i].Parts {
		out = append(out, name+"/"+p.Name)
	}
	if len(out) == 0 {
		return []string{name}
	}
	return out
}

// pieces24 lists what a name stands for: parts24 without those that come on later.
func (c *checker) pieces24(name string, later map[string]bool) []string {
	return slices.DeleteFunc(c.parts24(name), func(p string) bool { return p != name && later[p] })
}

// whole24 is pieces24; where `joins` name every part of an assembly, those that have been joined.
func (c *checker) whole24(name string, later, begun map[string]bool) []string {
	out := c.pieces24(name, later)
	if len(out) > 0 || strings.Contains(name, "/") {
		return out
	}
	on := map[string]bool{}
	for _, t := range c.w.Job.Tasks {
		if begun[t.Name] && (t.Kind == tasks.FitUp || t.Kind == tasks.Weld) {
			for _, n := range t.Joins {
				on[n.Name] = true
			}
		}
	}
	return slices.DeleteFunc(c.parts24(name), func(p string) bool { return !on[p] })
}

// hanging gives the pieces that are taken up with what a task lifts, in the order of the job.
func (c *checker) hanging(t *tasks.Task, begun, done map[string]bool) []string {
	later := c.onLater()
	begins, ends := c.times()
	type event struct {
		at  hours.Minute
		off bool
		t   *tasks.Task
	}
	var events []event
	anyOff := map[string]bool{}
	for _, o := range c.w.Job.Tasks {
		if begun[o.Name] && (o.Kind == tasks.FitUp || o.Kind == tasks.Weld) {
			events = append(events, event{begins[o.Name], false, o})
		}
		if done[o.Name] && len(o.TakesOff) > 0 {
			events = append(events, event{ends[o.Name], true, o})
		}
		for _, n := range o.TakesOff {
			anyOff[n.Name] = true
		}
	}
	sort.SliceStable(events, func(i, k int) bool { // what ends at a minute ends before what begins at it
		a, b := events[i], events[k]
		return a.at < b.at || a.at == b.at && a.off && !b.off
	})
	var ties []tie
	if !strings.Contains(t.Lifts, "/") || anyOff[t.Lifts] {
		for _, a := range c.w.Job.Assemblies {
			ties = append(ties, tie{c.whole24(a.Name, later, begun), []string{a.Name}})
		}
	}
	gone := map[string]bool{}
	for _, e := range events {
		if e.off {
			for _, n := range e.t.TakesOff {
				gone[n.Name] = true
				c.loosen(ties, n.Name)
			}
			continue
		}
		var one tie
		for _, n := range e.t.Joins {
			one.wholes = append(one.wholes, n.Name)
			for _, p := range c.whole24(n.Name, later, begun) {
				if p == n.Name || !gone[p] {
					one.pieces = append(one.pieces, p)
				}
			}
		}
		if len(e.t.Joins) == 0 {
			one.pieces = partsOfOne(e.t.Parts)
		}
		ties = append(ties, one)
	}
	up := map[string]bool{}
	for _, p := range c.whole24(t.Lifts, later, begun) {
		up[p] = p == t.Lifts || !gone[p]
	}
	return c.follow(up, ties)
}

// loosen cuts a thing out of every tie in which it hangs on more than itself.
func (c *checker) loosen(ties []tie, thing string) {
	mine := c.parts24(thing)
	whole, _, part := strings.Cut(thing, "/")
	for i, one := range ties {
		rest := slices.DeleteFunc(slices.Clone(one.pieces), func(p string) bool { return slices.Contains(mine, p) })
		if slices.ContainsFunc(rest, func(p string) bool {
			a, _, _ := strings.Cut(p, "/")
			return !part || a == whole || slices.Contains(one.wholes, whole)
		}) {
			ties[i].pieces = rest
		}
	}
}

// follow goes along the ties from what is taken up.
func (c *checker) follow(up map[string]bool, ties []tie) []string {
	for again := true; again; {
		again = false
		for _, one := range ties {
			if slices.ContainsFunc(one.pieces, func(p string) bool { return up[p] }) {
				for _, p := range one.pieces {
					again = again || !up[p]
					up[p] = true
				}
			}
		}
	}
	var out []string
	for _, a := range c.w.Job.Assemblies {
		for _, p := range c.parts24(a.Name) {
			if up[p] {
				out = append(out, p)
			}
		}
	}
	return out
}
