package problem

import "sailby/tasks/hours"

// What a timing is made of, for who works out starts and finishes on their own.

// Rules gives the stopping rules of hands-on work; for standing work only Work is set.
func (w *Timing) Rules() Rules {
	return Rules{Work: w.length, SetUp: w.setUp, Least: w.least, Safe: w.safe, InOneGo: w.inOneGo, OverMeals: w.overMeals, Watch: w.watch}
}

// Standing says whether a timing runs on any minute of the clock: no calendar, though it may be a film's.
func (w *Timing) Standing() bool { return w.cal == nil }

// Openings gives the worked spans, opening by opening (R8); nil for standing work.
func (w *Timing) Openings() []hours.Set {
	if w.cal == nil {
		return nil
	}
	out := []hours.Set{}
	for i, s := range w.cal.spans {
		if w.cal.block[i] == i {
			out = append(out, nil)
		}
		out[len(out)-1] = append(out[len(out)-1], s)
	}
	return out
}

// Cured gives the cure gathered before each minute, nil if the timing is no film's. A film is cured
// where it has gathered CuredAt.
func (w *Timing) Cured() []float64 { return w.cure }

// CuredAt is how much of a cure counts as all of it.
const CuredAt = curedAt
