package learn

import (
	"fmt"
	"strings"
)

// Lags between starts add up along a path. Where the sum round a circle is above 0 the conditions of
// its steps cannot all hold: so the order of a forced pair is shown, from the lags and the pairs
// forced before it. The log's name for forced pair k is yk: 1 where the first goes first.

// hop is a step of a path: a lag, or the order of a forced pair.
type hop struct {
	from, to int
	w        int32
	text     string
	forced   int // -1: a lag
}

// hops lists the lags and the first n forced pairs.
func (m *model) hops(n int) []hop {
	out := make([]hop, 0, len(m.lags)+n)
	for _, l := range m.lags {
		kind := "min"
		if l.back {
			kind = "max"
		}
		out = append(out, hop{l.i, l.j, int32(l.lag), fmt.Sprintf("%s%d", kind, l.link), -1})
	}
	for k, p := range m.forced[:n] {
		out = append(out, hop{p.a, p.b, m.length[p.a], fmt.Sprintf("y%d", k), k})
	}
	return out
}

// longest gives the longest path from a to b (Bellman 1958, Ford 1956), or, with a < 0, a circle with a sum
// above 0; nil if there is none. O(activities x hops).
func longest(n int, hops []hop, a, b int) []hop {
	far := make([]int64, n)
	last := make([]int, n)
	for i := range far {
		last[i] = -1
		if a >= 0 && i != a {
			far[i] = -1 << 40
		}
	}
	moved := -1
	for round := 0; round <= n; round++ {
		moved = -1
		for k, h := range hops {
			if far[h.from] > -1<<40 && far[h.from]+int64(h.w) > far[h.to] {
				far[h.to], last[h.to] = far[h.from]+int64(h.w), k
				moved = h.to
			}
		}
		if moved < 0 {
			break
		}
	}
	end, stop := b, a
	if a < 0 {
		if moved < 0 {
			return nil
		}
		for range n { // go back far enough to be on the circle
			moved = hops[last[moved]].from
		}
		end, stop = moved, moved
	}
	var back []hop
	for at := end; len(back) <= n; {
		if last[at] < 0 {
			return nil
		}
		h := hops[last[at]]
		back = append(back, h)
		if at = h.from; at == stop {
			for i, j := 0, len(back)-1; i < j; i, j = i+1, j-1 {
				back[i], back[j] = back[j], back[i]
			}
			return back
		}
	}
	return nil
}

// prepare derives what a reason rests on beside its facts: the orders of forced pairs.
func (r *record) prepare(w why) {
	if w.kind != whyArc && w.kind != whyOff {
		return
	}
	if l := r.m.arcs.label[w.id]; l.kind == forForced {
		for _, h := range r.way(pair{l.a, l.b}) {
			r.first(h)
		}
	}
}

// way gives the path by which a forced pair is in order.
func (r *record) way(p pair) []hop {
	m := r.m
	if r.order == nil {
		r.order = map[pair]int{}
		for k, q := range m.forced {
			r.order[q] = k
		}
	}
	all := m.hops(len(m.forced))
	if k, ok := r.order[p]; ok {
		return all[len(m.lags)+k : len(m.lags)+k+1]
	}
	return longest(len(m.start), all, p.a, p.b)
}

// first derives the order of the forced pair of a hop: the other way round there is a circle.
func (r *record) first(h hop) {
	m := r.m
	for len(r.orders) < len(m.forced) {
		r.orders = append(r.orders, false)
	}
	k := h.forced
	if k < 0 || r.orders[k] {
		return
	}
	r.orders[k] = true
	p := m.forced[k]
	path := longest(len(m.start), m.hops(k), p.a, p.b)
	for _, g := range path {
		r.first(g)
	}
	r.line("var y%d order %d %d", k, p.a, p.b)
	r.line("path %s !y%d :%s y%d<=0", texts(path), k, conditions(path), k)
	r.line("so : y%d<=0", k)
}

// forced writes the lemma of an arc whose order is forced.
func (r *record) forced(p pair, f fact, behind []fact) {
	path := r.way(p)
	r.w.WriteString("path " + texts(path) + " :" + conditions(path))
	for _, g := range behind {
		r.fact(g)
	}
	r.fact(f.not())
	r.w.WriteByte('\n')
}

// circle writes that the lags and the forced pairs contradict each other.
func (m *model) circle() {
	if m.log == nil {
		return
	}
	path := longest(len(m.start), m.hops(len(m.forced)), -1, -1)
	for _, h := range path {
		m.log.first(h)
	}
	m.log.begin()
	m.clash = m.clash[:0]
	m.log.line("path %s :%s", texts(path), conditions(path))
}

func texts(path []hop) string {
	out := make([]string, len(path))
	for i, h := range path {
		out[i] = h.text
	}
	return strings.Join(out, " ")
}

func conditions(path []hop) string {
	var b strings.Builder
	for _, h := range path {
		if h.forced >= 0 {
			fmt.Fprintf(&b, " %s>=1", h.text)
		}
	}
	return b.String()
}
