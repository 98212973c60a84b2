package jobfile

import (
	"fmt"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
)

// fields is one mapping of the job file, its keys checked against a section.
type fields struct {
	r    *reader
	sec  *section
	what string // begins every message: `task "cut lugs"`; empty at the top
	at   *yaml.Node
	vals map[string]*yaml.Node
	lost bool // it has keys that are not known: what seems to be missing may be there
}

// open reads the keys of a mapping. Unknown ones are reported; a node that is no mapping is
// reported and gives no keys.
func (r *reader) open(n *yaml.Node, sec *section, what string) *fields {
	f := &fields{r: r, sec: sec, what: what, at: n, vals: map[string]*yaml.Node{}}
	if n.Kind != yaml.MappingNode {
		k := sec.first()
		r.fault(n, fmt.Sprintf("write keys and values, for instance {%s: %s}", k.name, k.example),
			"%sexpected keys with values, found %s", f.lead(""), kindOf(n))
		return f
	}
	for i := 0; i+1 < len(n.Content); i += 2 {
		k, v := n.Content[i], n.Content[i+1]
		if sec.find(k.Value) == nil {
			r.fault(k, r.unknownKey(k.Value, sec), "%s%s is not a key here", f.lead(""), short(k.Value))
			f.lost = true
			continue
		}
		if _, twice := f.vals[k.Value]; twice {
			continue // reported by distinct
		}
		if v.Kind == yaml.ScalarNode && v.Tag == "!!null" {
			r.fault(v, fmt.Sprintf("write for instance `%s: %s`, or leave the key out", k.Value, sec.find(k.Value).example), "%s%s has no value", f.lead(""), k.Value)
			continue
		}
		f.vals[k.Value] = v
	}
	for at := sec; at != nil; at = at.more {
		for _, k := range at.keys {
			if k.need && !f.tried(k.name) {
				r.fault(n, fmt.Sprintf("add `%s: %s`", k.name, k.example), "%s%s is missing", f.lead(""), k.name)
			}
		}
	}
	return f
}

// unknownKey makes the hint for a key that the section does not have.
func (r *reader) unknownKey(word string, sec *section) string {
	if k, ok := r.nearest(word, sec.names()); ok {
		return fmt.Sprintf("did you mean %q?", k)
	}
	for _, s := range kindSections() {
		if sec.more == &taskSection && s.find(word) != nil {
			return fmt.Sprintf("%q is a key of %s", word, s.says)
		}
	}
	return "the keys here are " + list(sec.names(), 12)
}

// tried says whether the mapping has the key, with a value or without.
func (f *fields) tried(name string) bool {
	for i := 0; i+1 < len(f.at.Content) && f.at.Kind == yaml.MappingNode; i += 2 {
		if f.at.Content[i].Value == name {
			return true
		}
	}
	return false
}

// lead gives the words in front of a message about a key.
func (f *fields) lead(name string) string {
	out := ""
	if f.what != "" {
		out = f.what + ": "
	}
	if name != "" {
		out += name + ": "
	}
	return out
}

func (f *fields) has(name string) bool { return f.vals[name] != nil }

// node gives the value of a key, nil if it is left out.
func (f *fields) node(name string) *yaml.Node {
	f.key(name)
	return f.vals[name]
}

// key gives the description of a key; asking for one that the section lacks is a mistake in the
// program, which every test would meet.
func (f *fields) key(name string) *key {
	k := f.sec.find(name)
	if k == nil {
		panic("jobfile: section " + f.sec.name + " has no key " + name)
	}
	return k
}

// pos gives the place of a key's value; nowhere if it is left out.
func (f *fields) pos(name string) tasks.Pos {
	if n := f.node(name); n != nil {
		return f.r.pos(n)
	}
	return tasks.Pos{}
}

// keys gives the places of all values.
func (f *fields) keys() tasks.Keys {
	out := tasks.Keys{}
	for k, n := range f.vals {
		out[k] = f.r.pos(n)
	}
	return out
}

// fault reports a value; the key's name stands in front of the message.
func (f *fields) fault(name, hint, format string, args ...any) {
	n := f.vals[name]
	if n == nil {
		n = f.at
	}
	f.r.fault(n, hint, "%s%s", f.lead(name), fmt.Sprintf(format, args...))
}

// pairs gives the entries of a mapping in order, or reports that it is none.
func (f *fields) pairs(name string) [][2]*yaml.Node {
	n := f.node(name)
	if n == nil {
		return nil
	}
	return f.r.pairs(n, f.lead(name), f.key(name).example)
}

func (r *reader) pairs(n *yaml.Node, lead, example string) [][2]*yaml.Node {
	if n.Kind != yaml.MappingNode {
		r.fault(n, "write for instance "+example, "%sexpected names with values, found %s", lead, kindOf(n))
		return nil
	}
	seen := map[string]bool{}
	var out [][2]*yaml.Node
	for i := 0; i+1 < len(n.Content); i += 2 {
		if k := n.Content[i]; !seen[k.Value] { // a second one is reported by distinct
			seen[k.Value] = true
			out = append(out, [2]*yaml.Node{k, n.Content[i+1]})
		}
	}
	return out
}

// items gives a list's items, or the one value that stands alone.
func (f *fields) items(name string) []*yaml.Node {
	n := f.node(name)
	switch {
	case n == nil:
		return nil
	case n.Kind == yaml.SequenceNode:
		if len(n.Content) == 0 {
			f.fault(name, fmt.Sprintf("write for instance `%s: %s`, or leave the key out", name, f.key(name).example), "the list is empty")
		}
		return n.Content
	}
	return []*yaml.Node{n}
}

// kindOf says what a node is, for messages.
func kindOf(n *yaml.Node) string {
	switch n.Kind {
	case yaml.MappingNode:
		return "keys with values"
	case yaml.SequenceNode:
		return "a list"
	}
	if n.Tag == "!!null" {
		return "nothing"
	}
	return short(n.Value)
}
