// Package network is the temporal network of a problem: links, calendars, not-before times and
// deadlines alone, with as many people and kits as anybody could wish. It gives the earliest and
// latest times of every activity, and explains a contradiction by limits none of which can be
// left out. Times are minutes from the problem's base.
//
// The method is longest paths by repeated relaxation over monotone arc functions (a simple
// temporal problem after Dechter, Meiri and Pearl 1991, with calendar arcs as in Kreter, Schutt
// and Stuckey 2017). Cost: O(links) for a round; rounds are bounded by the horizon, and few in practice.
package network

import (
	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// Bounds are the earliest and latest starts and finishes with unlimited people. A latest time
// is problem.Inf where nothing limits it.
type Bounds struct {
	Start, Finish   []int // earliest
	LastStart, Last []int // latest start, latest finish
}

// Off leaves limits out, to see what a contradiction needs. Nil maps leave nothing out.
type Off struct {
	Link     map[int]bool // by index in Problem.Links
	By       map[int]bool // deadline of an activity
	From     map[int]bool // not-before time of an activity
	Calendar map[int]bool // calendar of an activity: it then takes its working minutes at any hour
}

// Conflict is a contradiction: the earliest finish of an activity is after its latest.
type Conflict struct {
	Act  int   // the activity that cannot be done in time; -1 if an activity has no opening
	Late int   // by how many minutes
	Path []int // links on the chain that leads to it, first first
}

// network is one propagation.
type network struct {
	p          *problem.Problem
	off        Off
	b          Bounds
	into, from [][]int // links by their later and by their earlier activity
	why        []int   // link that set the earliest start last; -1 its own not-before
	whyF       []int   // the same for the earliest finish
}

// Propagate gives the bounds, or the first contradiction met.
func Propagate(p *problem.Problem, off Off) (Bounds, *Conflict) {
	n := newNetwork(p, off)
	if c := n.forward(); c != nil {
		return n.b, c
	}
	if c := n.backward(); c != nil {
		return n.b, c
	}
	return n.b, nil
}

func newNetwork(p *problem.Problem, off Off) *network {
	k := len(p.Acts)
	n := &network{p: p, off: off, into: make([][]int, k), from: make([][]int, k), why: make([]int, k), whyF: make([]int, k)}
	n.b = Bounds{make([]int, k), make([]int, k), make([]int, k), make([]int, k)}
	for i, l := range p.Links {
		if off.Link[i] {
			continue
		}
		n.into[l.To] = append(n.into[l.To], i)
		if l.From >= 0 {
			n.from[l.From] = append(n.from[l.From], i)
		}
	}
	return n
}

// earliest gives the first start at or after t over all modes, and the least finish.
func (n *network) earliest(i, t int) (start, finish int) {
	a := &n.p.Acts[i]
	start, finish = problem.Inf, problem.Inf
	for _, w := range a.Timings() {
		if n.off.Calendar[i] && w.Calendar() != nil {
			return t, t + w.Length()
		}
		s := w.Start(t)
		if s >= problem.Inf {
			continue
		}
		start = min(start, s)
		finish = min(finish, w.Finish(s))
	}
	return start, finish
}

// forward raises earliest times to a fixpoint.
func (n *network) forward() *Conflict {
	p, b := n.p, n.b
	queue := make([]int, 0, len(p.Acts))
	queued := make([]bool, len(p.Acts))
	push := func(i int) {
		if !queued[i] {
			queued[i] = true
			queue = append(queue, i)
		}
	}
	for i := range p.Acts {
		n.why[i], n.whyF[i] = -1, -1
		from := p.Acts[i].From
		if n.off.From[i] {
			from = 0
		}
		b.Start[i], b.Finish[i] = from, from
		push(i)
	}
	for i := range p.Links {
		if l := &p.Links[i]; l.From < 0 && !n.off.Link[i] {
			n.raise(i, l.Earliest(0))
		}
	}
	for len(queue) > 0 {
		i := queue[0]
		queue = queue[1:]
		queued[i] = false
		s, f := n.earliest(i, b.Start[i])
		if s >= problem.Inf {
			return n.conflict(i, problem.Inf)
		}
		b.Start[i] = s
		if f > b.Finish[i] {
			b.Finish[i], n.whyF[i] = f, n.why[i]
		}
		if by := n.by(i); b.Finish[i] > by {
			return n.conflict(i, b.Finish[i]-by)
		}
		for _, k := range n.from[i] {
			l := &p.Links[k]
			t := b.Finish[i]
			if l.FromEnd == tasks.Start {
				t = b.Start[i]
			}
			if n.raise(k, l.Earliest(t)) {
				push(l.To)
			}
		}
		for _, k := range n.into[i] { // a maximum pulls the earlier end along
			if l := &p.Links[k]; l.From >= 0 && n.pull(k) {
				push(l.From)
			}
		}
	}
	return nil
}

func (n *network) by(i int) int {
	if n.off.By[i] {
		return n.p.End + 1
	}
	return min(n.p.Acts[i].By, n.p.End+1)
}

// raise lifts the later end of link k to at least t.
func (n *network) raise(k, t int) bool {
	l := &n.p.Links[k]
	if l.ToEnd == tasks.Start {
		if t > n.b.Start[l.To] {
			n.b.Start[l.To], n.why[l.To] = t, k
			return true
		}
		return false
	}
	if t > n.b.Finish[l.To] {
		n.b.Finish[l.To], n.whyF[l.To] = t, k
		if s := n.firstFinishing(l.To, t); s > n.b.Start[l.To] {
			n.b.Start[l.To], n.why[l.To] = s, k
		}
		return true
	}
	return false
}

// firstFinishing gives the least start, over all modes, whose finish is at least f.
func (n *network) firstFinishing(i, f int) int {
	best := problem.Inf
	for _, w := range n.p.Acts[i].Timings() {
		if n.off.Calendar[i] && w.Calendar() != nil {
			return f - w.Length()
		}
		lo, hi := n.b.Start[i], f
		for lo < hi { // least t with Finish(Start(t)) >= f
			mid := (lo + hi) / 2
			if s := w.Start(mid); s < problem.Inf && w.Finish(s) < f {
				lo = mid + 1
			} else {
				hi = mid
			}
		}
		best = min(best, w.Start(lo))
	}
	return best
}

// pull lifts the earlier end of link k so far that its maximum allows the later end where it is.
func (n *network) pull(k int) bool {
	l := &n.p.Links[k]
	end := n.b.Start[l.To]
	if l.ToEnd == tasks.Finish {
		end = n.b.Finish[l.To]
	}
	now := n.b.Finish[l.From]
	if l.FromEnd == tasks.Start {
		now = n.b.Start[l.From]
	}
	if l.Max >= expand.NoMax && l.Last == nil || l.LastAt(now) >= end {
		return false
	}
	lo, hi := now, end
	if l.Min < 0 {
		hi = end - l.Min
	}
	for lo < hi { // least t with LastAt(t) >= end
		mid := (lo + hi) / 2
		if l.LastAt(mid) >= end {
			hi = mid
		} else {
			lo = mid + 1
		}
	}
	if l.FromEnd == tasks.Start {
		n.b.Start[l.From], n.why[l.From] = lo, k
		return true
	}
	n.b.Finish[l.From], n.whyF[l.From] = lo, k
	if s := n.firstFinishing(l.From, lo); s > n.b.Start[l.From] {
		n.b.Start[l.From], n.why[l.From] = s, k
	}
	return true
}

// conflict walks back over what set the times of activity i.
func (n *network) conflict(i, late int) *Conflict {
	c := &Conflict{Act: i, Late: late}
	seen := map[int]bool{}
	at, k := i, n.why[i]
	if n.whyF[i] >= 0 && k < 0 {
		k = n.whyF[i]
	}
	for k >= 0 && !seen[k] {
		seen[k] = true
		c.Path = append(c.Path, k)
		l := &n.p.Links[k]
		next := l.From
		if next == at || next < 0 { // a maximum: it came from the later end
			next = l.To
		}
		if next < 0 || next == at {
			break
		}
		at = next
		k = n.why[at]
		if l.FromEnd == tasks.Finish && n.whyF[at] >= 0 {
			k = n.whyF[at]
		}
	}
	for a, b := 0, len(c.Path)-1; a < b; a, b = a+1, b-1 {
		c.Path[a], c.Path[b] = c.Path[b], c.Path[a]
	}
	return c
}

// backward lowers latest times to a fixpoint.
func (n *network) backward() *Conflict {
	p, b := n.p, n.b
	queue := make([]int, 0, len(p.Acts))
	queued := make([]bool, len(p.Acts))
	push := func(i int) {
		if !queued[i] {
			queued[i] = true
			queue = append(queue, i)
		}
	}
	for i := range p.Acts {
		b.Last[i], b.LastStart[i] = n.by(i), n.by(i)
		push(i)
	}
	for k := range p.Links { // a maximum from the beginning
		if l := &p.Links[k]; l.From < 0 && !n.off.Link[k] {
			n.cut(l.To, l.ToEnd, l.LastAt(0))
		}
	}
	for len(queue) > 0 {
		i := queue[0]
		queue = queue[1:]
		queued[i] = false
		b.LastStart[i], b.Last[i] = n.latest(i)
		if b.LastStart[i] < b.Start[i] {
			return n.conflict(i, b.Start[i]-max(b.LastStart[i], -1))
		}
		for _, k := range n.into[i] {
			if l := &p.Links[k]; l.From >= 0 && n.lower(k) {
				push(l.From)
			}
		}
		for _, k := range n.from[i] { // a maximum limits the later end
			l := &p.Links[k]
			t := b.Last[i]
			if l.FromEnd == tasks.Start {
				t = b.LastStart[i]
			}
			if n.cut(l.To, l.ToEnd, l.LastAt(t)) {
				push(l.To)
			}
		}
	}
	return nil
}

// latest gives the last start and the last finish, over all modes, that the latest times leave.
func (n *network) latest(i int) (start, finish int) {
	lo, hi, by := n.b.Start[i], n.b.LastStart[i], n.b.Last[i]
	start, finish = -problem.Inf, -problem.Inf
	for _, w := range n.p.Acts[i].Timings() {
		if n.off.Calendar[i] && w.Calendar() != nil {
			start = min(hi, by-w.Length())
			return start, min(by, start+w.Length())
		}
		s := w.Latest(by, lo)
		if s > hi {
			s = lastStart(w, lo, hi)
		}
		if s > -problem.Inf {
			start, finish = max(start, s), max(finish, w.Finish(s))
		}
	}
	return start, finish
}

// lastStart gives the last possible start from lo to hi, -problem.Inf if there is none.
func lastStart(w *problem.Timing, lo, hi int) int {
	s := w.Start(lo)
	if s > hi {
		return -problem.Inf
	}
	for end := hi + 1; s+1 < end; { // Start(end) is after hi
		mid := s + (end-s)/2
		if x := w.Start(mid); x <= hi {
			s = x
		} else {
			end = mid
		}
	}
	return s
}

// lower cuts the earlier end of link k to the last minute that lets the later end be in time.
func (n *network) lower(k int) bool {
	l := &n.p.Links[k]
	if l.Min <= expand.NoMin {
		return false
	}
	end := n.b.LastStart[l.To]
	if l.ToEnd == tasks.Finish {
		end = n.b.Last[l.To]
	}
	t := end - l.Min
	if l.Count != nil {
		lo, hi := 0, max(0, end)
		for lo < hi { // last t with Earliest(t) <= end
			mid := (lo + hi + 1) / 2
			if l.Earliest(mid) <= end {
				lo = mid
			} else {
				hi = mid - 1
			}
		}
		t = lo
	}
	return n.cut(l.From, l.FromEnd, t)
}

func (n *network) cut(i int, end tasks.LinkEnd, t int) bool {
	if end == tasks.Start {
		if t < n.b.LastStart[i] {
			n.b.LastStart[i] = t
			return true
		}
		return false
	}
	if t < n.b.Last[i] {
		n.b.Last[i] = t
		return true
	}
	return false
}
