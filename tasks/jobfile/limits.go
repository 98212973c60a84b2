package jobfile

import (
	"errors"
	"strings"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/quantity"
)

// uncertain gives a range, or the zero range if the key is left out.
func (f *fields) uncertain(name string) tasks.Range {
	n := f.node(name)
	if n == nil {
		return tasks.Range{}
	}
	k := f.key(name)
	if n.Kind == yaml.MappingNode {
		return f.threePoint(name, n, k)
	}
	s, ok := f.r.text(n, f.lead(name), k.example)
	if !ok {
		return tasks.Range{}
	}
	rg, err := quantity.ParseRange(s, k.dim)
	if err != nil && k.takes == hourly && errors.Is(err, quantity.ErrNoUnit) {
		rg, err = quantity.ParseRange(s+" h", k.dim)
	}
	if err != nil {
		f.r.advice(n, f.lead(name), err, "write for instance "+k.example)
		return tasks.Range{}
	}
	if low, high := k.limits(); rg.Low < low || rg.High > high {
		f.fault(name, "give "+k.dim.String()+" from "+show(low, k.dim)+" to "+show(high, k.dim), "%s is outside %s to %s", s, show(low, k.dim), show(high, k.dim))
		return tasks.Range{}
	}
	return tasks.Range{Range: rg, Pos: f.r.pos(n)}
}

var rangeSection = section{name: "Range", where: "an uncertain amount", says: "an uncertain amount written out", keys: []key{
	{name: "low", takes: itsOwn, form: "amount", example: "3 h", need: true, says: "least", shape: anyText},
	{name: "likely", takes: itsOwn, form: "amount", example: "3.5 h", usual: "the middle", says: "what the verdict counts with", shape: anyText},
	{name: "high", takes: itsOwn, form: "amount", example: "5 h", need: true, says: "most", shape: anyText},
}}

// threePoint reads {low, likely, high}.
func (f *fields) threePoint(name string, n *yaml.Node, k *key) tasks.Range {
	g := f.r.open(n, &rangeSection, strings.TrimSuffix(f.lead(name), ": "))
	var v [3]float64
	for i, part := range []string{"low", "likely", "high"} {
		if !g.has(part) {
			if part == "likely" {
				continue
			}
			return tasks.Range{}
		}
		x, ok := f.r.amount(g.vals[part], g.lead(part), k)
		if !ok {
			return tasks.Range{}
		}
		v[i] = x
	}
	if !g.has("likely") {
		v[1] = (v[0] + v[2]) / 2
	}
	if v[0] > v[1] || v[1] > v[2] {
		f.fault(name, "low comes first, high last", "low %s, likely %s and high %s are not in order", show(v[0], k.dim), show(v[1], k.dim), show(v[2], k.dim))
		return tasks.Range{}
	}
	return tasks.Range{Range: quantity.Range{Low: v[0], Likely: v[1], High: v[2]}, Pos: f.r.pos(n)}
}

// span gives a pair of limits {min, max}; nil where one is left out.
func (f *fields) span(name string, k *key) (least, most *float64) {
	n := f.node(name)
	if n == nil {
		return nil, nil
	}
	return f.r.span(n, strings.TrimSuffix(f.lead(name), ": "), k)
}

var spanSection = section{name: "Limits", where: "a pair of limits", says: "a pair of limits", keys: []key{
	{name: "min", takes: itsOwn, form: "amount", example: "4 h", says: "least", shape: anyText},
	{name: "max", takes: itsOwn, form: "amount", example: "48 h", says: "most", shape: anyText},
}}

func (r *reader) span(n *yaml.Node, what string, k *key) (least, most *float64) {
	g := r.open(n, &spanSection, what)
	for _, end := range []string{"min", "max"} {
		if !g.has(end) {
			continue
		}
		if v, ok := r.amount(g.vals[end], g.lead(end), k); !ok {
			return nil, nil
		} else if end == "min" {
			least = &v
		} else {
			most = &v
		}
	}
	if least != nil && most != nil && *least > *most {
		r.fault(n, "give the smaller one as min", "%smin %s is more than max %s", g.lead(""), show(*least, k.dim), show(*most, k.dim))
		return nil, nil
	}
	return least, most
}
