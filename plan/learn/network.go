package learn

// network holds the longest lags between starts: far[i][j] is the least by which the start of j
// comes after the start of i, whatever the resources do.
type network struct {
	n   int
	lag []int32 // n x n; unlinked where there is none
}

const unlinked = -far

func newNetwork(n int) *network {
	w := &network{n: n, lag: make([]int32, n*n)}
	for i := range w.lag {
		w.lag[i] = unlinked
	}
	for i := 0; i < n; i++ {
		w.lag[i*n+i] = 0
	}
	return w
}

func (w *network) get(i, j int) int32 { return w.lag[i*w.n+j] }

func (w *network) put(i, j int, v int32) { w.lag[i*w.n+j] = max(w.lag[i*w.n+j], v) }

// close makes every lag the longest path (Floyd 1962, Warshall 1962); it gives false on a cycle of
// positive length. O(n^3).
func (w *network) close() bool {
	n := w.n
	for k := 0; k < n; k++ {
		row := w.lag[k*n : k*n+n]
		for i := 0; i < n; i++ {
			d := w.lag[i*n+k]
			if d == unlinked || i == k {
				continue
			}
			to := w.lag[i*n : i*n+n]
			for j, x := range row {
				if x != unlinked && d+x > to[j] {
					to[j] = d + x
				}
			}
		}
	}
	return w.sound()
}

func (w *network) sound() bool {
	for i := 0; i < w.n; i++ {
		if w.lag[i*w.n+i] > 0 {
			return false
		}
	}
	return true
}

// add puts one more lag into a closed network and closes it again; false on a positive cycle. O(n^2).
func (w *network) add(a, b int, v int32) bool {
	if v <= w.get(a, b) {
		return true
	}
	n := w.n
	if back := w.get(b, a); back != unlinked && back+v > 0 {
		return false
	}
	for i := 0; i < n; i++ {
		d := w.lag[i*n+a]
		if d == unlinked || d+v <= w.lag[i*n+b] {
			continue
		}
		to := w.lag[i*n : i*n+n]
		for j, x := range w.lag[b*n : b*n+n] {
			if x != unlinked && d+v+x > to[j] {
				to[j] = d + v + x
			}
		}
	}
	return true
}
