package sheets

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// Options says how the pack is laid out. The zero value is A4 with every sheet, for the plan on
// likely hours.
type Options struct {
	Letter   bool       // US Letter in place of A4
	SiteOnly bool       // leave out what is done at the home places: shifts, welds, coats, lifts
	Maybes   bool       // the plan with every maybe
	End      expand.End // High: the plan at the high end of the hours
}

// ErrNoPlan is given where there is no plan to print.
var ErrNoPlan = errors.New("there is no plan to print: the work was not shown to fit, and no late plan was found either")

// pack is the work on one document.
type pack struct {
	p      *pen
	report *plan.Report
	a      *plan.Answer
	work   *expand.Work
	job    *tasks.Job
	opt    Options
	shifts []*agenda.Shift
	worked []agenda.Entry
}

// Pack lays out the whole pack: cover, a sheet for each shift, handover, weld list, paint log,
// lift sheets, packing list and cautions; lists without entries are left out. The error is
// ErrNoPlan, or says that the report is empty.
func Pack(r *plan.Report, o Options) (*Document, error) {
	if r == nil || r.Likely == nil || r.Job == nil {
		return nil, errors.New("there is nothing to print: the report has no answer")
	}
	a := r.Likely
	switch {
	case o.Maybes && r.Maybes != nil:
		a = r.Maybes
	case o.End == expand.High && r.High != nil:
		a = r.High
	}
	if a.Plan == nil {
		return nil, ErrNoPlan
	}
	doc := &Document{Title: paper(r.Job.Name), Width: 210, Height: 297, Left: 15, Right: 12, Top: 17, Bottom: 10}
	if o.Letter {
		doc.Width, doc.Height = 215.9, 279.4
	}
	k := newPack(doc, r, a, o)
	k.cover()
	k.allShifts()
	k.handover()
	k.weldList()
	k.paintLog()
	k.liftSheets()
	k.packing()
	k.cautionPage()
	k.foot()
	return doc, nil
}

func newPack(doc *Document, r *plan.Report, a *plan.Answer, o Options) *pack {
	return &pack{p: newPen(doc), report: r, a: a, work: a.Work, job: r.Job, opt: o, shifts: agenda.Shifts(a), worked: agenda.Worked(a)}
}

// foot draws the last line of every page, now that their number is known.
func (k *pack) foot() {
	p := k.p
	base := p.doc.Height - p.doc.Bottom - descent*body*mmPerPoint
	for i, page := range p.doc.Pages {
		p.page = page
		s := fmt.Sprintf("page %d of %d", i+1, len(p.doc.Pages))
		w := width(s, body, false)
		p.put(Item{Kind: Text, X: p.right - w, Y: base, W: w, Text: s, Size: body})
		left := "Printed from " + baseName(k.job.File)
		if p.forms[i] {
			left = "Write N/A, leave no box empty."
		}
		p.run(p.left, base, fitted(left, body, p.forms[i], p.wide()-w-6), body, p.forms[i])
	}
}

// steps gives the distinct steps of entries, in order of first work.
func stepsOf(list []agenda.Entry) []*expand.Step {
	var out []*expand.Step
	for _, e := range list {
		if !slices.Contains(out, e.Step) {
			out = append(out, e.Step)
		}
	}
	return out
}

// planned gives the planned step.
func (k *pack) planned(s *expand.Step) plan.Step { return k.a.Plan.Steps[s.Index] }

// span writes when a step is planned: "Wed 7 Apr 08:00 to Thu 8 Apr 09:40".
func (k *pack) span(s *expand.Step) string {
	ps, zone := k.planned(s), agenda.Zone(k.work, s.Place)
	return agenda.When(ps.Start, zone) + " to " + agenda.When(ps.Finish, zone)
}

// taskSteps gives the hands-on steps of the tasks of a kind that happen, in the order of the file; those at home
// are left out where the pack is for the site.
func (k *pack) taskSteps(kind tasks.Kind) []*expand.Step {
	var out []*expand.Step
	for i, s := range k.work.Steps {
		if s.Task.Kind == kind && s.Class == expand.Hands && !s.Absent && (s.Site || !k.opt.SiteOnly) && i < len(k.a.Plan.Steps) && s.HandsOn > 0 {
			out = append(out, s)
		}
	}
	return out
}

// baseName is the last part of a path, on any system that wrote it.
func baseName(path string) string { return path[strings.LastIndexAny(path, `/\\`)+1:] }
