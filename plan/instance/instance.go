// Package instance reads the open scheduling instances: activities with fixed lengths, minimum
// and maximum lags between starts, and resources with a constant capacity. Time is counted in
// the instance's own whole units. The formats are the single-mode `.sm` files of PSPLIB (Kolisch
// and Sprecher 1997), the `.sch` files of ProGen/max (Schwindt 1998) and Patterson's `.rcp`.
package instance

import (
	"fmt"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// Instance is what a file says, with nothing worked out from it.
type Instance struct {
	Name     string
	Length   []int   // by activity, >= 0; the first is the source and the last the sink
	Demand   [][]int // by activity and resource, >= 0
	Capacity []int   // by resource, >= 0
	Lags     []Lag
}

// Lag says that the start of To comes at least Min after the start of From; a negative Min is a
// longest wait seen from the other side.
type Lag struct{ From, To, Min int }

// Horizon gives a length of time within which a shortest schedule ends if there is a schedule
// at all: each activity adds its length, or its longest lag to a later one if that is more.
func (in *Instance) Horizon() int {
	most := append([]int(nil), in.Length...)
	for _, l := range in.Lags {
		most[l.From] = max(most[l.From], l.Min)
	}
	sum := 0
	for _, m := range most {
		sum += m
	}
	return sum
}

// Problem gives the instance as the solver takes it: one mode for each activity, every
// activity at the site, and a window that is open for the whole horizon.
func (in *Instance) Problem() *problem.Problem {
	end := in.Horizon()
	p := &problem.Problem{End: end, Open: 0, Close: end}
	for i, d := range in.Length {
		a := problem.Act{
			Name:  fmt.Sprintf("%d", i),
			Modes: []problem.Mode{{Time: problem.Fixed(d)}},
			By:    end,
			Site:  true,
		}
		for k, n := range in.Demand[i] {
			if n > 0 && d > 0 {
				a.Uses = append(a.Uses, problem.Use{Res: k, Amount: n})
			}
		}
		p.Acts = append(p.Acts, a)
	}
	for k, c := range in.Capacity {
		p.Res = append(p.Res, problem.Resource{Name: fmt.Sprintf("R%d", k+1), Kind: problem.Plain, Capacity: c})
	}
	for _, l := range in.Lags {
		p.Links = append(p.Links, problem.Link{From: l.From, To: l.To, FromEnd: tasks.Start, ToEnd: tasks.Start,
			Min: l.Min, Max: expand.NoMax})
	}
	return p
}

// Finish gives the latest finish of the activities for the given starts.
func (in *Instance) Finish(starts []int) int {
	last := 0
	for i, s := range starts {
		last = max(last, s+in.Length[i])
	}
	return last
}

// Check says what is wrong with a schedule, nil if nothing is: every lag, and every resource in
// every unit of time, straight from the file. O(lags + resources x finish).
func (in *Instance) Check(starts []int) error {
	if len(starts) != len(in.Length) {
		return fmt.Errorf("%s: %d starts for %d activities", in.Name, len(starts), len(in.Length))
	}
	for i, s := range starts {
		if s < 0 {
			return fmt.Errorf("%s: activity %d starts at %d, before 0", in.Name, i, s)
		}
	}
	for _, l := range in.Lags {
		if starts[l.To] < starts[l.From]+l.Min {
			return fmt.Errorf("%s: activity %d starts at %d, but %d starts at %d and wants %d between", in.Name,
				l.To, starts[l.To], l.From, starts[l.From], l.Min)
		}
	}
	finish := in.Finish(starts)
	for k, c := range in.Capacity {
		used := make([]int, finish)
		for i, s := range starts {
			for t := s; t < s+in.Length[i]; t++ {
				used[t] += in.Demand[i][k]
			}
		}
		for t, u := range used {
			if u > c {
				return fmt.Errorf("%s: resource %d is used %d times at %d, there are %d", in.Name, k+1, u, t, c)
			}
		}
	}
	return nil
}
