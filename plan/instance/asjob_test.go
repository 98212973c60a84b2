package instance

import "testing"

// Two activities of 3 and 2 on one unit of a resource, the second 1 to 4 after the start of the
// first.
func small() *Instance {
	return &Instance{Name: "small", Length: []int{0, 3, 2, 0}, Demand: [][]int{{0}, {1}, {1}, {0}}, Capacity: []int{1},
		Lags: []Lag{{0, 1, 0}, {0, 2, 0}, {1, 3, 3}, {2, 3, 2}, {1, 2, 1}, {2, 1, -4}}}
}

// The checker of jobs and the check against the raw file agree, on what is right and on each
// thing that can be wrong.
func TestJudgedAsAJob(t *testing.T) {
	in := small()
	for _, c := range []struct {
		name   string
		starts []int
		ok     bool
	}{
		{"right", []int{0, 0, 3, 5}, true},
		{"as late as the longest wait allows", []int{0, 0, 4, 6}, true},
		{"past the longest wait", []int{0, 0, 5, 7}, false},
		{"both on one unit", []int{0, 0, 2, 5}, false},
		{"before the shortest wait", []int{0, 2, 0, 5}, false},
		{"sink before the end", []int{0, 0, 3, 4}, false},
	} {
		raw, job := in.Check(c.starts), in.CheckAsJob(c.starts)
		if (raw == nil) != c.ok || (job == nil) != c.ok {
			t.Errorf("%s: raw file says %v, as a job %v, want right %v", c.name, raw, job, c.ok)
		}
	}
}
