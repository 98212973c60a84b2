package text

import (
	"io"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/report/packlist"
	"sailby/tasks/expand"
)

// answerForm is one answer for machines. finish and in_hand_min are null without a plan.
type answerForm struct {
	Verdict   string         `json:"verdict"`
	Basis     string         `json:"basis"`
	Says      string         `json:"says"`
	Window    windowForm     `json:"window"`
	Finish    moment         `json:"finish"`
	Earliest  moment         `json:"earliest_possible"`
	Why       string         `json:"earliest_possible_why,omitempty"`
	Best      bool           `json:"best"`
	Late      bool           `json:"late"`
	InHand    *int           `json:"in_hand_min"`
	Gap       *int           `json:"gap_min"`
	HandBest  bool           `json:"in_hand_best"` // the least in hand over the deadlines inside the window is shown to be the most that this finish allows
	Deadlines []deadlineForm `json:"deadlines"`
	Governing []causeForm    `json:"governing"`
	Proof     *proofForm     `json:"proof"`
	CutShort  bool           `json:"cut_short"`
	Days      []dayForm      `json:"days,omitempty"`        // sun, tide and weather, where the file tells them
	Getaways  []getawayForm  `json:"getting_off,omitempty"` // craft that came in on the tide
}

// dayForm is what nature does on one day of the window.
type dayForm struct {
	Date string   `json:"date"`
	Says []string `json:"says"`
	name string   // "Tue 6 Apr"
}

// getawayForm says whether a craft gets off again.
type getawayForm struct {
	Place  string `json:"place"`
	Neaped bool   `json:"neaped"`
	Says   string `json:"says"`
}

type fitsForm struct {
	Job  string `json:"job"`
	File string `json:"file"`
	answerForm
	Maybes answerForm `json:"with_maybes"`
	High   answerForm `json:"high_hours"`
	Ways   *waysForm  `json:"ways,omitempty"` // what would make it fit; left out where it fits
	Orders []noteForm `json:"orders_held"`    // because a lift is allowed in no other (R24)
	Notes  []noteForm `json:"notes"`
	Care   string     `json:"care"`
}

// FitsJSON writes what Fits prints for machines: the answer on likely hours, with the same
// fields again under with_maybes and high_hours.
func FitsJSON(w io.Writer, r *plan.Report) error {
	maybes, high := r.Maybes, r.High
	if maybes == nil {
		maybes = r.Likely
	}
	if high == nil {
		high = r.Likely
	}
	f := fitsForm{Job: clean.Line(r.Job.Name), File: r.Job.File, answerForm: answerOf(r.Likely, "likely", r.LowToo),
		Maybes: answerOf(maybes, "with-maybes", false), High: answerOf(high, "high", false), Ways: waysOf(r), Orders: []noteForm{}, Notes: []noteForm{}, Care: agenda.Care}
	if r.Likely.Work != nil {
		for _, o := range r.Likely.Work.Orders {
			if o.Made {
				f.Orders = append(f.Orders, noteForm{clean.Line(o.Text), at(o.Pos)})
			}
		}
	}
	for _, line := range append(packlist.Make(r.Likely).Verdict(), agenda.NoMeals(r.Likely)...) {
		f.Notes = append(f.Notes, noteForm{Text: clean.Line(line)})
	}
	for _, n := range append(windsOf(r), r.Job.Notes...) {
		f.Notes = append(f.Notes, noteForm{clean.Line(n.Text), at(n.Pos)})
	}
	return writeJSON(w, f)
}

func answerOf(a *plan.Answer, basis string, low bool) answerForm {
	f := answerForm{
		Verdict: a.Verdict.String(), Basis: basis, Says: agenda.Sentence(a, low), Window: windowOf(a),
		Earliest: siteMoment(a, a.Bound), Why: clean.Line(a.BoundWhy), Best: a.Best, Late: a.Late, InHand: count(a, a.InHand), HandBest: a.HandBest,
		Deadlines: deadlinesOf(a), Governing: causesOf(a, a.Governing), Proof: proofOf(a, low), CutShort: a.CutShort,
	}
	f.Days, f.Getaways = daysOfNature(a), getaways(a)
	if a.Plan != nil {
		f.Finish = siteMoment(a, a.Finish)
		if gap(a) != "-" {
			n := max(int(a.Finish-a.Bound), 0)
			if a.Best {
				n = 0
			}
			f.Gap = &n
		}
	}
	return f
}

// basisName names the basis of an answer in JSON.
func basisName(b expand.Basis) string {
	switch {
	case b.Maybes:
		return "with-maybes"
	case b.End == expand.High:
		return "high"
	case b.End == expand.Low:
		return "low"
	}
	return "likely"
}
