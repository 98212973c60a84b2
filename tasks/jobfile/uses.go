package jobfile

import (
	"fmt"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/quantity"
)

// uses reads the kit of a task.
func (r *reader) uses(f *fields) []tasks.Use {
	var out []tasks.Use
	add := func(n *yaml.Node, count int) {
		s, ok := r.text(n, f.lead("kit"), "mig set")
		if !ok {
			return
		}
		k := r.kitOf[s]
		if k == nil {
			r.unknown(r.pos(n), f.lead("kit"), "kit", s, r.kitNames())
			return
		}
		if count > k.Count {
			r.fault(n, fmt.Sprintf("ask for fewer, or add `count: %d` to %s", count, s), "%s%d of %q asked for, only %d there", f.lead("kit"), count, s, k.Count)
		}
		if k.At != nil && f.r.placeOfTask(f) != nil && f.r.placeOfTask(f) != k.At {
			r.fault(n, "use kit that goes along, or leave `at` out of the kit", "%s%q stays at %s", f.lead("kit"), s, k.At.Name)
		}
		out = append(out, tasks.Use{Kit: k, Count: count, Pos: r.pos(n)})
	}
	n := f.node("kit")
	if n != nil && n.Kind == yaml.MappingNode {
		for _, kv := range f.pairs("kit") {
			if s, ok := r.text(kv[1], f.lead("kit"), "1"); ok {
				if c, ok := r.whole(kv[1], f.lead("kit"), s, &key{low: 1, high: 1000, example: "1"}); ok {
					add(kv[0], c)
				}
			}
		}
		return out
	}
	for _, n := range f.items("kit") {
		add(n, 1)
	}
	return out
}

// placeOfTask gives the place named under `at`, nil if there is none.
func (r *reader) placeOfTask(f *fields) *tasks.Place {
	n := f.vals["at"]
	if n == nil {
		return nil
	}
	p, _ := r.look(n.Value)
	return p
}

// safePoint reads when the first stop may come; the estimate's own safe point is the usual one.
func (f *fields) safePoint() tasks.Amount {
	s, ok := f.word("not before")
	if !ok || s == "root and second run" {
		return tasks.Amount{}
	}
	v, ok := f.r.measure(f.vals["not before"], f.lead("not before"), s, &key{dim: quantity.Time, low: 0, high: longestTask, example: "90 min, or root and second run"}, quantity.Time)
	if !ok {
		return tasks.Amount{}
	}
	return tasks.Amount{Value: v, Pos: f.pos("not before")}
}

func needed(needs []tasks.Need) int {
	n := 0
	for _, x := range needs {
		n += x.Count
	}
	return n
}
