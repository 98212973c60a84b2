package learn

// pair is two activities that cannot overlap, whichever goes first.
type pair struct{ a, b int }

// apart lists the pairs that together ask more of a resource than there is.
func (m *model) apart() []pair {
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
// b cannot be over before a starts, a goes first. Those still open are given back; false: there is
// no plan. O(rounds x pairs + forced x n^2).
func (w *network) force(pairs []pair, length []int32) (open []pair, ok bool) {
	for again := true; again; {
		again = false
		open = open[:0:0]
		for _, p := range pairs {
			// a after b needs start a - start b >= length b, so start b - start a <= -length b
			ab, ba := w.get(p.a, p.b), w.get(p.b, p.a)
			switch {
			case ab >= length[p.a] || ba >= length[p.b]:
				continue // in order already
			case ab > -length[p.b] && ba > -length[p.a]:
				return nil, false
			case ab > -length[p.b]:
				if !w.add(p.a, p.b, length[p.a]) {
					return nil, false
				}
				again = true
			case ba > -length[p.a]:
				if !w.add(p.b, p.a, length[p.b]) {
					return nil, false
				}
				again = true
			default:
				open = append(open, p)
			}
		}
		pairs = open
	}
	return open, true
}
