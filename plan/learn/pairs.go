package learn

import "sailby/plan/problem"

// pair is two activities that do not overlap from start to finish, whichever goes first.
type pair struct{ a, b int }

// orders finds the pairs that together ask more of a resource than there is and hold it from
// start to finish. Those that the links decide become links; each other gets a variable that
// says which goes first. O(n^2 x resources + n^3), the last part only up to mostClosed activities.
func (m *model) orders() bool {
	pairs := m.crowded()
	open := pairs
	if n := len(m.start); n <= mostClosed {
		w := newNetwork(n)
		for _, a := range m.lags {
			w.put(a.i, a.j, a.lag)
		}
		if !w.close() {
			m.circle()
			return false
		}
		before := append([]int32(nil), w.lag...)
		var ok bool
		if open, ok = w.force(pairs, m.length, &m.forced); !ok {
			m.circle()
			return false
		}
		for _, p := range pairs {
			for _, q := range []pair{p, {p.b, p.a}} {
				if v := w.get(q.a, q.b); v >= m.length[q.a] && before[q.a*n+q.b] < m.length[q.a] {
					m.label = label{forForced, q.a, q.b}
					m.join(m.start[q.a], m.start[q.b], m.length[q.a], always)
				}
			}
		}
	}
	if len(open) > mostOrders {
		return true // the resources say it all, only less well
	}
	for _, p := range open {
		x := m.variable(0, 1)
		m.told(x, "order %d %d", p.a, p.b)
		m.join(m.start[p.a], m.start[p.b], m.length[p.a], fact{x, 1})
		m.join(m.start[p.b], m.start[p.a], m.length[p.b], fact{x ^ 1, 0})
	}
	return true
}

const (
	mostClosed = 400    // activities whose network is closed
	mostOrders = 20_000 // order variables made for crowded resources
)

// crowded lists the pairs of activities of fixed length that overfill a resource together.
func (m *model) crowded() []pair {
	n := len(m.p.Acts)
	use := make([][]int32, len(m.p.Res))
	for k := range use {
		use[k] = make([]int32, n)
	}
	for i := range m.p.Acts {
		if m.length[i] == 0 {
			continue
		}
		for _, u := range m.p.Acts[i].Uses {
			use[u.Res][i] += int32(u.Amount)
		}
	}
	var out []pair
	for i := 0; i < n; i++ {
		for j := i + 1; j < n; j++ {
			for k := range use {
				if use[k][i] > 0 && use[k][j] > 0 && use[k][i]+use[k][j] > int32(m.p.Res[k].Capacity) {
					out = append(out, pair{i, j})
					break
				}
			}
		}
	}
	return out
}

// force decides the pairs whose order the network leaves no choice in, until nothing changes: if
// b cannot be over before a starts, a goes first. Those still open are given back, those decided are
// added to forced, the one that goes first first; false: there is no plan. O(rounds x pairs + forced x n^2).
func (w *network) force(pairs []pair, length []int32, forced *[]pair) (open []pair, ok bool) {
	for again := true; again; {
		again = false
		open = nil
		for _, p := range pairs {
			ab, ba := w.get(p.a, p.b), w.get(p.b, p.a)
			switch {
			case ab >= length[p.a] || ba >= length[p.b]:
				continue // in order already
			case ab > -length[p.b] && ba > -length[p.a]:
				*forced = append(*forced, p)
				return nil, false
			case ab > -length[p.b]:
				*forced = append(*forced, p)
				ok = w.add(p.a, p.b, length[p.a])
				again = true
			case ba > -length[p.a]:
				*forced = append(*forced, pair{p.b, p.a})
				ok = w.add(p.b, p.a, length[p.b])
				again = true
			default:
				open = append(open, p)
				continue
			}
			if !ok {
				return nil, false
			}
		}
		pairs = open
	}
	return open, true
}

// apart makes the pairs of the problem: the one that goes first is over, and its tail too, before
// the other starts. Pairs with an activity that may take no time are left out.
func (m *model) apart() bool {
	for k, p := range m.p.Pairs {
		if m.acts[p.A].empty || m.acts[p.B].empty {
			continue
		}
		x := m.variable(0, 1)
		m.told(x, "pair %d", k)
		first, second := fact{x, 1}, fact{x ^ 1, 0}
		if on := m.guard(ByPair, k); on.s >= 0 { // neither order, if the pair is left out
			second = fact{m.variable(0, 1), 1}
			m.add([]fact{on.not(), first, second})
		}
		m.ahead(p.A, p.B, p.TailA, first)
		m.ahead(p.B, p.A, p.TailB, second)
	}
	return true
}

// ahead says that a and its tail are over before b starts, while on holds.
func (m *model) ahead(a, b int, tail func(int) int, on fact) {
	if tail == nil {
		m.join(m.finish[a], m.start[b], m.length[a], on)
		return
	}
	m.bend(m.finish[a], m.length[a], m.start[b], 0, byFunc(tail, m.p.End), on)
}

// rules makes the order rules: at least one choice holds, and with it each of its pairs.
func (m *model) rules() bool {
	for k := range m.p.Orders {
		o := &m.p.Orders[k]
		guard := m.guard(ByOrder, k)
		if len(o.Choices) == 0 && guard.s < 0 {
			m.never("rule %d 0", k)
			return false
		}
		if len(o.Choices) == 1 {
			m.label = label{forRule, k, 0}
			m.choice(o.Choices[0], guard)
			continue
		}
		var any []fact
		for n, c := range o.Choices {
			on := fact{m.variable(0, 1), 1}
			m.told(on.s, "choice %d %d", k, n)
			m.label = label{forRule, k, n}
			any = append(any, on)
			m.choice(c, on)
		}
		if guard.s >= 0 {
			any = append(any, guard.not())
		}
		if !m.axiom(any, "some %d", k) {
			return false
		}
	}
	return true
}

func (m *model) choice(all []problem.Before, on fact) {
	for _, b := range all {
		m.ahead(b.First, b.Then, nil, on)
	}
}
