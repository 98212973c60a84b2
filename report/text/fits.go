package text

import (
	"fmt"
	"io"
	"sailby/tasks"
	"slices"
	"strings"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/packlist"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// Fits prints the verdict: one sentence, the three answers side by side, the deadlines, what sets
// the finish, the proof where it cannot fit, notes, and the line of care. It gives the error of
// writing.
func Fits(w io.Writer, r *plan.Report, o Options) error {
	p := newPage(w, o)
	a := r.Likely
	p.para("", r.Job.Name)
	p.gap()
	p.para("", agenda.Sentence(a, r.LowToo))
	if a.CutShort && a.Verdict == plan.Unsettled {
		p.para("", "The search was cut short; a longer limit may settle it.")
	}
	for _, g := range agenda.Getaways(a) {
		p.para("", g.Words+".")
	}
	p.gap()
	p.sideBySide(r)
	p.window(a)
	p.deadlines(a)
	p.nature(a)
	p.governing(a)
	for _, side := range []*plan.Answer{r.Likely, r.Maybes, r.High} {
		if side != nil && side.Proof != nil {
			p.proof(side, r.LowToo && side == r.Likely)
		}
	}
	p.ways(r.Ways)
	p.orders(a)
	p.notes(r)
	p.gap()
	p.para("", agenda.Care)
	return p.err
}

// sideBySide prints the likely answer, the one with every maybe and the one at the high end.
func (p *page) sideBySide(r *plan.Report) {
	same := func(a *plan.Answer, f func(*plan.Answer) string) string {
		if a == nil {
			return "the same"
		}
		return f(a)
	}
	label := min(20, p.width/4)
	each := (p.width - label) / 3
	widths := []int{label, each, each}
	line := func(name string, f func(*plan.Answer) string) {
		p.row(widths, name, f(r.Likely), same(r.Maybes, f), same(r.High, f))
	}
	maybes, high := "with every maybe", "high end of the hours"
	if r.Maybes == nil {
		maybes = "with every maybe (there are none)"
	}
	if r.High == nil {
		high = "high end of the hours (no range)"
	}
	p.row(widths, "", "likely hours", maybes, high)
	line("verdict", func(a *plan.Answer) string { return agenda.Word(a) })
	line("site finish", agenda.Finish)
	line("time in hand", func(a *plan.Answer) string { return agenda.InHand(a, a.InHand) })
	line("earliest possible", func(a *plan.Answer) string {
		if a.Best && a.Plan != nil {
			return agenda.Moment(a, a.Finish) + " (this plan: the earliest, proved)"
		}
		return agenda.Moment(a, a.Bound)
	})
	line("earlier at most by", gap)
}

// gap says how far the plan is from the earliest possible finish.
func gap(a *plan.Answer) string {
	switch {
	case a.Plan == nil || a.Bound == 0 || a.Bound >= hours.Far || a.Bound <= hours.Never:
		return "-"
	case a.Best || a.Finish <= a.Bound:
		return "none"
	}
	return quantity.Hours(int(a.Finish - a.Bound))
}

func (p *page) window(a *plan.Answer) {
	win := a.Work.Window
	zone := agenda.Zone(a.Work, win.Place)
	what := "Window"
	if a.Work.Trip != nil {
		what = "Window of trip " + a.Work.Trip.Name
	}
	p.gap()
	p.para("", fmt.Sprintf("%s, %s: %s to %s, %s (times local, %s)", what, agenda.PlaceLabel(win.Place),
		agenda.When(win.Opens, zone), agenda.When(win.Closes, zone), quantity.Span(int(win.Closes-win.Opens)), zone))
	if !a.Best && a.BoundWhy != "" {
		p.para("", "No plan can finish before "+agenda.Moment(a, a.Bound)+": "+a.BoundWhy+".")
	}
}

func (p *page) deadlines(a *plan.Answer) {
	if len(a.Deadlines) == 0 {
		return
	}
	p.gap()
	p.raw("Deadlines (" + agenda.BasisWords(a.Work.Basis) + ")")
	name := max(p.width-58, 14)
	widths := []int{2, name - 2, 19, 19}
	p.row(widths, "", "what", "must be done by", "planned finish", "in hand")
	for _, d := range a.Deadlines {
		finish := "-"
		if a.Plan != nil {
			finish = agenda.Moment(a, d.Finish)
		}
		p.row(widths, "", agenda.DeadlineName(d), agenda.Moment(a, d.By), finish, agenda.InHand(a, d.InHand))
		if a.Plan != nil && d.LastStart < hours.Far && d.Task != nil {
			p.para("    ", "last start that still makes it: "+agenda.Moment(a, d.LastStart))
		}
	}
	if a.HandBest && a.Plan != nil {
		p.para("  ", "Proved: no plan with this finish has more time in hand at the tightest of the other deadlines.")
	}
}

func (p *page) governing(a *plan.Answer) {
	if len(a.Governing) == 0 || a.Plan == nil {
		return
	}
	p.gap()
	p.para("", "What sets the finish of "+agenda.Finish(a)+", step by step, the last first")
	for i, link := range agenda.Chain(a) {
		var causes []string
		for _, c := range link.Causes {
			causes = append(causes, agenda.CauseText(a.Work, c)+inFile(agenda.At(c.Pos)))
		}
		p.para(fmt.Sprintf("%3d  ", i+1), link.Head+strings.Join(causes, "; "))
	}
}

func inFile(at string) string {
	if at == "" {
		return ""
	}
	return " (" + at + ")"
}

func (p *page) proof(a *plan.Answer, low bool) {
	pr := a.Proof
	p.gap()
	p.para("", "Why it cannot fit "+agenda.BasisWords(a.Work.Basis)+even(low || pr.Even))
	if pr.Summary != "" {
		p.para("  ", pr.Summary)
	}
	if late := worstLate(a); pr.Over > 0 && late > pr.Over {
		p.para("  ", fmt.Sprintf("The plan found is %s late, the proof shows %s at the least: it keeps only what it needs.", quantity.Hours(late), quantity.Hours(pr.Over)))
	}
	for _, l := range pr.Lines {
		s := l.Text
		if n := quantity.Hours(l.Minutes); l.Minutes != 0 && !strings.Contains(s, n) {
			s += ", " + n
		}
		s += inFile(agenda.At(l.Pos))
		if !l.Needed {
			s += " [not shown to be needed]"
		}
		p.para("  - ", s)
	}
	if pr.Over > 0 && !strings.Contains(pr.Summary, quantity.Hours(pr.Over)) {
		p.para("  ", "Together "+quantity.Hours(pr.Over)+" more than there is.")
	}
}

// worstLate gives by how many minutes a late plan misses the deadline that it misses most; 0 where there is none.
func worstLate(a *plan.Answer) int {
	late := 0
	for _, d := range a.Deadlines {
		if a.Plan != nil && a.Late {
			late = max(late, -d.InHand)
		}
	}
	return late
}

func even(low bool) string {
	if low {
		return ", and at the low end of every range"
	}
	return ""
}

func (p *page) notes(r *plan.Report) {
	said := append(packlist.Make(r.Likely).Verdict(), agenda.NoMeals(r.Likely)...)
	winds := windsOf(r)
	if len(r.Job.Notes)+len(said)+len(winds) == 0 {
		return
	}
	p.gap()
	p.raw("Notes")
	for _, line := range said {
		p.para("  - ", line)
	}
	for _, n := range append(winds, r.Job.Notes...) {
		p.para("  - ", n.Text+inFile(agenda.At(n.Pos)))
	}
}

// windsOf gives what is to be said beside the verdict of lifts whose gusts nobody has forecast.
func windsOf(r *plan.Report) []tasks.Note {
	if r.Likely == nil || r.Likely.Work == nil {
		return nil
	}
	return slices.Clone(r.Likely.Work.Winds)
}
