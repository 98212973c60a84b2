package solve

import (
	"cmp"

	"sailby/plan/problem"
)

// Score is how good a schedule is, compared field by field (R18, R19): smaller is better.
type Score struct {
	Late   int // the worst lateness over all deadlines and the window, minutes
	Tardy  int // sum of all lateness, to guide the search; it does not count in Compare
	Finish int // site finish, fire watches included
	Hand   int // minus the least time in hand over deadlines other than the window
	Stops  int // stops of hands-on work
	Idle   int // minutes between a person's pieces on one shift
	Home   int // sum of home finishes: home work is early
}

// finishStep is the step, in minutes, in which site finishes are told apart (R19).
const finishStep = 15

// Compare orders two scores; exact compares finishes by the minute.
func (a Score) Compare(b Score, exact bool) int {
	fa, fb := a.Finish, b.Finish
	if !exact {
		fa, fb = (fa+finishStep-1)/finishStep, (fb+finishStep-1)/finishStep
	}
	return cmp.Or(cmp.Compare(a.Late, b.Late), cmp.Compare(fa, fb), cmp.Compare(a.Hand, b.Hand),
		cmp.Compare(a.Stops, b.Stops), cmp.Compare(a.Finish, b.Finish), cmp.Compare(a.Idle, b.Idle), cmp.Compare(a.Home, b.Home))
}

// score judges the schedule that is in the state.
func (s *state) score() Score {
	var out Score
	hand := problem.Inf
	anySite := false
	for i := range s.p.Acts {
		anySite = anySite || s.p.Acts[i].Site
	}
	for i := range s.p.Acts {
		a := &s.p.Acts[i]
		md := &a.Modes[s.mode[i]]
		end := s.finish[i]
		if md.Time.Watch() > 0 && s.start[i] < s.finish[i] {
			end += md.Time.Watch()
		}
		if a.Site || !anySite {
			out.Finish = max(out.Finish, end)
		} else {
			out.Home += s.finish[i] >> 6
		}
		if a.By < problem.Inf {
			out.Late = max(out.Late, s.finish[i]-a.By)
			out.Tardy += max(0, s.finish[i]-a.By)
			if a.Site {
				out.Late = max(out.Late, end-max(s.p.Close, 0))
			}
			if a.By != s.p.Close {
				hand = min(hand, a.By-s.finish[i])
			}
		}
		if md.Time.Calendar() != nil && s.start[i] < s.finish[i] {
			out.Stops += len(md.Time.Stops(s.start[i])) - 1
		}
	}
	if hand < problem.Inf {
		out.Hand = -hand
	}
	for _, list := range s.people {
		for k := 1; k < len(list); k++ {
			if gap := list[k].from - list[k-1].to; gap > 0 && gap < 6*60 {
				out.Idle += gap
			}
		}
	}
	return out
}
