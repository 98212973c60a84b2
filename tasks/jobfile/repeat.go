package jobfile

import (
	"fmt"
	"slices"
	"strings"

	"sailby/tasks"
)

var blockSection = section{name: "Repeat", where: "repeat / NAME", host: "repeat/bay", says: "Work that is done several times. Task `cut` of round 2 of block `bay` is `cut bay 2`. Inside the block `cut` means the same round and `previous cut` the round before; outside write `cut bay 2` or `every cut bay`.", keys: []key{
	{name: "count", takes: aCount, low: 1, high: 500, need: true, example: "3", says: "how many rounds"},
	{name: "first times", takes: itsOwn, form: "list of factors", shape: anyList, usual: "[1]", example: "[1.5, 1.2, 1]", says: "how much longer the first rounds take; the last factor holds on"},
	{name: "workfaces", takes: names, usual: "none", example: "[hinge, deck, hinge]", says: "one for each round: tasks of the block that are at a place without a workface are in that of their round, if the place has it"},
	{name: "tasks", takes: namedOf, sub: &taskSection, need: true, example: "{grind: {at: pier, hours: 1 h}}", says: "the tasks of a round"},
}}

// block is one repeated block.
type block struct {
	name  string
	count int
	tasks []string
}

const maxBlocks = 100

func (r *reader) readRepeat(f *fields) {
	for i, kv := range f.pairs("repeat") {
		if i == maxBlocks {
			f.fault("repeat", "put tasks of one round into one block", "more than %d blocks", maxBlocks)
			return
		}
		name, ok := r.newName(kv[0], "block", true)
		if !ok {
			continue
		}
		g := r.open(kv[1], &blockSection, fmt.Sprintf("block %q", name))
		b := &block{name: name, count: g.count("count", 1)}
		list := g.pairs("tasks")
		if len(r.drafts)+b.count*len(list) > maxTasks {
			g.fault("count", "make several jobs of it", "written out these are %d tasks, at most %d are taken in all", len(r.drafts)+b.count*len(list), maxTasks)
			continue
		}
		factors := g.factors("first times")
		var round []*draft
		for _, kv := range list {
			if base, ok := r.taskName(kv[0]); ok {
				b.tasks = append(b.tasks, base)
				d := r.task(base, kv[0], kv[1])
				d.block, d.base = b, base
				round = append(round, d)
			}
		}
		for _, d := range round {
			for _, other := range r.drafts {
				if other.block == nil && other.t.Name == d.base {
					r.faultAt(d.t.Pos, "rename one of them", "block %q: task %q is declared outside it as well, in line %d", b.name, d.base, other.t.Pos.Line)
				}
			}
		}
		r.blocks = append(r.blocks, b)
		r.writeOut(b, round, factors, g.roundFaces(b, round))
	}
}

// factors reads how much longer the first rounds take.
func (f *fields) factors(name string) []float64 {
	var out []float64
	for _, n := range f.items(name) {
		if v, ok := f.r.number(n, f.lead(name), &key{takes: aNumber, low: 0.1, high: 10, example: "1.5"}); ok {
			out = append(out, v)
		}
	}
	return out
}

// roundFaces reads the workfaces of the rounds: as many as there are rounds, each at the place
// of some task of the block.
func (f *fields) roundFaces(b *block, round []*draft) []string {
	var out []string
	for _, name := range f.names("workfaces") {
		known := map[string]bool{}
		var list []string
		for _, d := range round {
			if d.t.Place == nil {
				continue
			}
			for _, w := range d.t.Place.Workfaces {
				if !known[w.Name] {
					known[w.Name] = true
					list = append(list, w.Name)
				}
			}
		}
		if !known[name.text] {
			f.r.faultAt(name.pos, f.r.among(name.text, list, "declare it under `workfaces` of the place"), "%sno workface is called %s at the places of the block", f.lead("workfaces"), short(name.text))
		}
		out = append(out, name.text)
	}
	if len(out) > 0 && len(out) != b.count {
		f.fault("workfaces", "name one for each round, in order", "%d workfaces for %d rounds", len(out), b.count)
		return nil
	}
	return out
}

// writeOut adds the rounds of a block, one after the other.
func (r *reader) writeOut(b *block, round []*draft, factors []float64, faces []string) {
	for n := 1; n <= b.count; n++ {
		for _, d := range round {
			t := *d.t
			t.Name = roundName(d.base, b, n)
			t.Block, t.Round = b.name, n
			if t.Title != "" {
				t.Title = fmt.Sprintf("%s, %s %d", t.Title, b.name, n)
			}
			if t.Face == nil && t.Place != nil && len(faces) > 0 {
				for _, w := range t.Place.Workfaces {
					if w.Name == faces[n-1] {
						t.Face = w
					}
				}
			}
			if len(factors) > 0 {
				t.Factor = factors[min(n, len(factors))-1]
			}
			r.drafts = append(r.drafts, &draft{t: &t, links: d.links, block: b, base: d.base, f: d.f})
		}
	}
}

func roundName(base string, b *block, n int) string { return fmt.Sprintf("%s %s %d", base, b.name, n) }

// distinctTasks reports tasks of one name, written out or declared.
func (r *reader) distinctTasks() {
	seen := map[string]*tasks.Task{}
	for _, d := range r.drafts {
		if old := seen[d.t.Name]; old != nil && old.Pos != d.t.Pos {
			r.faultAt(d.t.Pos, "rename one of them", "two tasks are called %q, the other in line %d", d.t.Name, old.Pos.Line)
			continue
		}
		seen[d.t.Name] = d.t
	}
}

// resolve gives the tasks that a name means for a task of round n of block b (nil outside).
func (r *reader) resolve(name ref, lead string, b *block, n int) []string {
	word := name.text
	if b != nil {
		if prev, ok := strings.CutPrefix(word, "previous "); ok && slices.Contains(b.tasks, prev) {
			if n == 1 {
				return nil
			}
			return []string{roundName(prev, b, n-1)}
		}
		if slices.Contains(b.tasks, word) {
			return []string{roundName(word, b, n)}
		}
	}
	if r.isTask(word) {
		return []string{word}
	}
	if every, ok := strings.CutPrefix(word, "every "); ok {
		for _, x := range r.blocks {
			base, ok := strings.CutSuffix(every, " "+x.name)
			if ok && slices.Contains(x.tasks, base) {
				var out []string
				for i := 1; i <= x.count; i++ {
					out = append(out, roundName(base, x, i))
				}
				return out
			}
		}
	}
	r.noTask(name, lead, b)
	return nil
}

func (r *reader) isTask(word string) bool {
	if r.taskSet == nil {
		r.taskSet = map[string]bool{}
		for _, d := range r.drafts {
			r.taskSet[d.t.Name] = true
			r.taskNames = append(r.taskNames, d.t.Name)
		}
	}
	return r.taskSet[word]
}

// noTask reports a name that no task has.
func (r *reader) noTask(name ref, lead string, b *block) {
	hint := ""
	for _, x := range r.blocks {
		if slices.Contains(x.tasks, name.text) {
			hint = fmt.Sprintf("it is in block %q: write %q, or %q", x.name, roundName(name.text, x, 1), "every "+name.text+" "+x.name)
		}
	}
	if hint == "" {
		options := r.taskNames
		if b != nil {
			options = append(slices.Clone(b.tasks), options...)
		}
		hint = r.among(name.text, options, "declare it under `tasks`")
	}
	r.faultAt(name.pos, hint, "%sno task is called %s", lead, short(name.text))
}
