package solve

import (
	"fmt"
	"sailby/plan"
	"sailby/plan/problem"
)

// Governing follows what sets the site finish back to the beginning of the window or of the
// job, last step first.
func Governing(p *problem.Problem, s *Schedule, rows []plan.Row) []plan.Cause {
	last := -1
	for i := range p.Acts {
		if a := &p.Acts[i]; a.Site && (last < 0 || s.end(p, i) > s.end(p, last) || s.end(p, i) == s.end(p, last) && s.Start[i] > s.Start[last]) {
			last = i
		}
	}
	var out []plan.Cause
	seen := map[int]bool{}
	for i := last; i >= 0 && !seen[i]; {
		seen[i] = true
		next := -1
		for _, c := range rows[i].SetBy {
			if c.Other >= 0 && !seen[c.Other] && (next < 0 || s.Finish[c.Other] > s.Finish[next]) {
				next = c.Other
			}
		}
		kept := false
		said := map[string]bool{}
		for _, c := range rows[i].SetBy {
			if (c.Other < 0 || c.Other == next) && !said[c.Text] {
				said[c.Text] = true
				out = append(out, c)
				kept = true
			}
		}
		if !kept && len(rows[i].SetBy) > 0 { // held by what comes after it in the list, and so is told already
			out = append(out, rows[i].SetBy[0])
		} else if !kept {
			out = append(out, plan.Cause{Kind: plan.ByStart, Step: i, Other: -1, Text: fmt.Sprint("start of ", p.Acts[i].Label())})
		}
		i = next
	}
	return out
}

// end gives the finish of i with its fire watch.
func (s *Schedule) end(p *problem.Problem, i int) int {
	w := p.Acts[i].Modes[s.Mode[i]].Time
	if s.Start[i] < s.Finish[i] {
		return s.Finish[i] + w.Watch()
	}
	return s.Finish[i]
}
