package settle

import (
	"math/bits"
	"slices"

	"sailby/plan"
	"sailby/tasks/hours"
)

// mostNodes is how many choices are made before a job is left as too much to try out.
const mostNodes = 100_000

// optimum finds the earliest site finish of all plans with starts on the lattice, and a plan that
// has it; nil where there is none. Every start and all people are tried; what cannot stand beside
// what is chosen already is left out at once.
func (b *brute) optimum() (best hours.Minute, p *plan.Plan) {
	n := len(b.w.Steps)
	b.opts = make([][]option, n)
	for i, s := range b.w.Steps {
		for _, o := range b.options(s) {
			if b.alone(&o) {
				b.opts[i] = append(b.opts[i], o)
			}
		}
		if len(b.opts[i]) == 0 {
			return 0, nil
		}
	}
	b.pairUp()
	var ends []hours.Minute // of the site: the optimum is one of them
	for i, s := range b.w.Steps {
		for _, o := range b.opts[i] {
			if s.Site {
				ends = append(ends, o.end)
			}
		}
	}
	slices.Sort(ends)
	ends = slices.Compact(ends)
	lo, hi := 0, len(ends) // least k with a plan that ends by ends[k]
	var found []*option
	for lo < hi {
		mid := (lo + hi) / 2
		if plan := b.by(ends[mid]); plan != nil {
			found, hi = plan, mid
		} else {
			lo = mid + 1
		}
	}
	if found == nil {
		return 0, nil
	}
	return ends[lo], b.plan(found)
}

// plan writes options as a plan.
func (b *brute) plan(all []*option) *plan.Plan {
	p := &plan.Plan{Basis: b.w.Basis}
	for _, o := range all {
		p.Steps = append(p.Steps, o.Step)
	}
	return p
}

// alone says whether an option keeps to the dates of its own step: deadlines, not-before times,
// the window, waits from the start of the plan.
func (b *brute) alone(o *option) bool {
	s := o.s
	if s.Absent {
		return true
	}
	if o.Start < s.NotBefore || o.Finish > s.Deadline {
		return false
	}
	if s.Site && o.end > b.w.Window.Closes && s.Deadline < hours.Far {
		return false
	}
	for k := range b.w.Links {
		if l := &b.w.Links[k]; l.From == nil && l.To == s && !b.waits(l, b.w.Span.From, end(o, l.ToEnd)) {
			return false
		}
	}
	return true
}

// set is a set of options as bits.
type set []uint64

func (s set) has(k int) bool { return s[k/64]>>(k%64)&1 == 1 }
func (s set) count() int {
	n := 0
	for _, w := range s {
		n += bits.OnesCount64(w)
	}
	return n
}

// pairUp notes for every option which options of every other step can stand beside it.
func (b *brute) pairUp() {
	n := len(b.opts)
	b.beside = make([][][]set, n)
	for i := range n {
		b.beside[i] = make([][]set, n)
		for j := range n {
			b.beside[i][j] = make([]set, len(b.opts[i]))
			for k := range b.beside[i][j] {
				b.beside[i][j][k] = make(set, (len(b.opts[j])+63)/64)
			}
		}
	}
	for i := range n {
		for j := range i {
			for x := range b.opts[i] {
				for y := range b.opts[j] {
					if b.together(&b.opts[i][x], &b.opts[j][y], &nothing) {
						b.beside[i][j][x][y/64] |= 1 << (y % 64)
						b.beside[j][i][y][x/64] |= 1 << (x % 64)
					}
				}
			}
		}
	}
}

// by looks for a plan in which the site is finished by a minute; nil if there is none.
func (b *brute) by(f hours.Minute) []*option {
	n := len(b.opts)
	domains := make([]set, n)
	for i := range n {
		domains[i] = make(set, (len(b.opts[i])+63)/64)
		for k := range b.opts[i] {
			if !b.w.Steps[i].Site || b.opts[i][k].end <= f {
				domains[i][k/64] |= 1 << (k % 64)
			}
		}
	}
	all := make([]*option, n)
	if b.assign(all, domains, n) {
		return all
	}
	return nil
}

// assign gives the step with the fewest options left one of them, and goes on to the next.
func (b *brute) assign(all []*option, domains []set, left int) bool {
	if b.nodes++; b.nodes > mostNodes {
		return false
	}
	if left == 0 {
		return true
	}
	i, least := -1, 0
	for k := range all {
		if n := domains[k].count(); all[k] == nil && (i < 0 || n < least) {
			i, least = k, n
		}
	}
	for k := range b.opts[i] {
		if !domains[i].has(k) {
			continue
		}
		all[i] = &b.opts[i][k]
		if next, ok := b.narrow(all, domains, i, k); ok && b.holds(all, &nothing) && b.assign(all, next, left-1) {
			return true
		}
		all[i] = nil
	}
	return false
}

// narrow leaves out what cannot stand beside option k of step i.
func (b *brute) narrow(all []*option, domains []set, i, k int) (next []set, ok bool) {
	next = make([]set, len(domains))
	for j := range domains {
		if all[j] != nil {
			next[j] = domains[j]
			continue
		}
		next[j] = make(set, len(domains[j]))
		some := false
		for w := range next[j] {
			next[j][w] = domains[j][w] & b.beside[i][j][k][w]
			some = some || next[j][w] != 0
		}
		if !some {
			return nil, false
		}
	}
	return next, true
}
