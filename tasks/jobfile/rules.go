package jobfile

import (
	"fmt"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
)

var orderSection = section{name: "Order", where: "orders / item", host: "orders/1", says: "A rule on the order itself (R17): `either`, or `not both` with `before`. The tasks must exist.", keys: []key{
	{name: "either", takes: itsOwn, form: "list of `x before y`", shape: textOrList, example: "[weld lugs before resin, load before resin]", without: "not_both before", says: "at least one of these holds"},
	{name: "not both", takes: names, example: "[weld lugs, MT]", beside: "before: load", without: "either", says: "not all of these are finished before the task under `before` starts"},
	{name: "before", takes: aName, example: "load", beside: "not both: [weld lugs, MT]", without: "either", says: "the task that `not both` is about"},
	{name: "why", takes: aText, example: "the frame is lifted before it is closed", says: "printed with the rule"},
}}

var clashSection = section{name: "Clashes", where: "clashes", host: "clashes", says: "Pairs of workface states that never overlap (R12).", keys: []key{
	{name: "add", takes: itsOwn, form: "list of pairs", shape: pairsShape, example: "[[people, soft film]]", says: "pairs besides those of R12"},
	{name: "drop", takes: itsOwn, form: "list of pairs", shape: pairsShape, example: "[[grit, wet film]]", says: "pairs of R12 that do not matter here"},
}}

const maxOrders = 200

// readOrders reads the rules on the order; tasks are known.
func (r *reader) readOrders(f *fields) {
	for i, n := range f.items("orders") {
		if i == maxOrders {
			r.fault(n, "use links where an order is fixed", "orders: more than %d", maxOrders)
			return
		}
		g := r.open(n, &orderSection, fmt.Sprintf("order %d", i+1))
		o := tasks.Order{Pos: r.pos(n), Text: g.line("why")}
		switch {
		case g.tried("either") && (g.tried("not both") || g.tried("before")):
			g.fault("either", "make two items of it", "`either` and `not both` are two rules")
			continue
		case g.has("either"):
			o.Choices = r.choices(g)
		case g.has("not both") && g.has("before"):
			o.Choices = r.notBoth(g)
		default:
			g.fault("", "write {either: [a before b, c before b]}, or {not both: [a, b], before: c}", "it says no order")
		}
		if o.Text == "" && len(o.Choices) > 0 {
			var words []string
			for _, c := range o.Choices {
				words = append(words, c.First+" before "+c.Then)
			}
			o.Text = strings.Join(words, ", or ")
		}
		r.job.Orders = append(r.job.Orders, o)
	}
}

// choices reads "a before b".
func (r *reader) choices(f *fields) []tasks.Before {
	var out []tasks.Before
	for _, n := range f.items("either") {
		s, ok := r.text(n, f.lead("either"), "weld lugs before prime")
		if !ok {
			continue
		}
		a, b, ok := r.splitBefore(s)
		if !ok {
			r.fault(n, "write for instance weld lugs before prime", "%s%s does not say what comes before what", f.lead("either"), short(s))
			continue
		}
		first, ok1 := r.single(ref{a, r.pos(n)}, f.lead("either"))
		then, ok2 := r.single(ref{b, r.pos(n)}, f.lead("either"))
		switch {
		case !ok1 || !ok2:
		case first == then:
			r.fault(n, "name two tasks", "%s%s is not before itself", f.lead("either"), short(a))
		default:
			out = append(out, tasks.Before{First: first, Then: then})
		}
	}
	return out
}

// splitBefore splits at the word before; where names have it too, at the one that leaves two tasks.
func (r *reader) splitBefore(s string) (a, b string, ok bool) {
	const word = " before "
	for i := 0; ; {
		j := strings.Index(s[i:], word)
		if j < 0 {
			return a, b, ok
		}
		x, y := strings.TrimSpace(s[:i+j]), strings.TrimSpace(s[i+j+len(word):])
		if !ok || r.isTask(x) && r.isTask(y) {
			a, b, ok = x, y, true
		}
		i += j + len(word)
	}
}

// single resolves a name that must mean one task.
func (r *reader) single(name ref, lead string) (string, bool) {
	list := r.resolve(name, lead, nil, 0)
	if len(list) > 1 {
		r.faultAt(name.pos, "name one round", "%s%s means several tasks", lead, short(name.text))
	}
	return strings.Join(list, ""), len(list) == 1
}

// notBoth says that at least one of the tasks comes after the one under before.
func (r *reader) notBoth(f *fields) []tasks.Before {
	refs := f.names("not both")
	at, ok := f.name("before")
	pivot := ""
	if ok {
		pivot, ok = r.single(at, f.lead("before"))
	}
	if len(refs) < 2 {
		f.fault("not both", "name two tasks, or use a link", "it takes two tasks or more")
	}
	var out []tasks.Before
	for _, ref := range refs {
		name, ok2 := r.single(ref, f.lead("not both"))
		switch {
		case !ok || !ok2:
		case name == pivot:
			r.faultAt(ref.pos, "name another task", "%s%s is the task under `before` as well", f.lead("not both"), short(name))
		default:
			out = append(out, tasks.Before{First: pivot, Then: name})
		}
	}
	return out
}

// readClashes reads pairs of states. Pairs that are added make their states known.
func (r *reader) readClashes(f *fields) {
	n := f.node("clashes")
	if n == nil {
		return
	}
	g := r.open(n, &clashSection, "clashes")
	r.job.Clashes = append(r.job.Clashes, r.clashPairs(g, "add")...)
	for _, c := range r.clashPairs(g, "drop") {
		if !slices.ContainsFunc(tasks.DefaultClashes(), func(d tasks.Clash) bool { return d.A == c.A && d.B == c.B || d.A == c.B && d.B == c.A }) {
			r.faultAt(c.Pos, "the pairs that can be dropped are those of R12", "clashes: drop: %s and %s do not clash anyway", short(c.A), short(c.B))
			continue
		}
		r.job.NoClash = append(r.job.NoClash, c)
	}
}

func (r *reader) clashPairs(f *fields, name string) []tasks.Clash {
	var out []tasks.Clash
	for _, n := range f.items(name) {
		if n.Kind != yaml.SequenceNode || len(n.Content) != 2 {
			r.fault(n, "write for instance [[hot work, solvent]]", "%sexpected pairs of states, found %s", f.lead(name), kindOf(n))
			continue
		}
		a, ok1 := r.newName(n.Content[0], "state", true)
		b, ok2 := r.newName(n.Content[1], "state", true)
		if ok1 && ok2 {
			out = append(out, tasks.Clash{A: a, B: b, Pos: r.pos(n)})
		}
	}
	return out
}

// judgeStates checks the states that tasks put their workfaces in.
func (r *reader) judgeStates() {
	known := slices.Clone(stateNames)
	for _, c := range r.job.Clashes {
		known = append(known, c.A, c.B)
	}
	for _, d := range r.drafts {
		for _, ref := range d.f.names("states") {
			if !slices.Contains(known, ref.text) {
				r.faultAt(ref.pos, r.among(ref.text, known, ""), "%sno state is called %s, and no clash names it", d.f.lead("states"), short(ref.text))
			}
		}
	}
}
