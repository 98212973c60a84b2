package text

import (
	"fmt"
	"io"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// Ways prints only what would make the job fit. It gives the error of writing.
func Ways(w io.Writer, r *plan.Report, o Options) error {
	p := newPage(w, o)
	p.para("", r.Job.Name)
	p.gap()
	p.para("", agenda.Sentence(r.Likely, r.LowToo))
	if r.Likely.Verdict == plan.Fits {
		p.gap()
		p.para("", "It fits on likely hours as it is: no change was looked for.")
	}
	p.ways(r.Ways)
	p.gap()
	p.para("", agenda.Care)
	return p.err
}

func (p *page) ways(w *plan.Ways) {
	if w == nil {
		return
	}
	p.gap()
	p.para("", agenda.WaysHead)
	for i, x := range w.List {
		p.para(fmt.Sprintf("%3d  ", i+1), agenda.Way(x)+inFile(agenda.At(x.Pos)))
		if s := agenda.WayWrite(x); s != "" {
			p.para("       ", s)
		}
	}
	if len(w.List) > 0 {
		p.para("  ", "`sailby why JOB way 1` tells of the first what was tried above and below it.")
	}
	for _, s := range agenda.WaysEnd(w) {
		p.para("  ", s)
	}
}

// UnknownWay says that a job has no way of that number.
type UnknownWay struct{ Number, Count int }

// Error tells how many there are.
func (e *UnknownWay) Error() string {
	if e.Count == 0 {
		return fmt.Sprintf("there is no way %d: no single change was found that makes the work fit, or it fits as it is", e.Number)
	}
	return fmt.Sprintf("there is no way %d: the ways have the numbers 1 to %d", e.Number, e.Count)
}

// WhyWay prints where way n, counted from 1, comes from: its line in the job file, what to write, how its time in hand comes
// about, and the amounts that were tried. The error is an *UnknownWay or that of writing.
func WhyWay(w io.Writer, r *plan.Report, n int, o Options) error {
	count := 0
	if r.Ways != nil {
		count = len(r.Ways.List)
	}
	if n < 1 || n > count {
		return &UnknownWay{n, count}
	}
	x := r.Ways.List[n-1]
	p := newPage(w, o)
	p.para("", fmt.Sprintf("Way %d of %d: %s%s", n, count, agenda.Way(x), inFile(agenda.At(x.Pos))))
	p.gap()
	if s := agenda.WayWrite(x); s != "" {
		p.para("  change    ", s)
	}
	zone := agenda.Zone(r.Likely.Work, r.Likely.Work.Window.Place)
	closes := x.Finish + hours.Minute(x.InHand)
	p.para("  finish    ", agenda.When(x.Finish, zone)+": the job was read with this change and planned on likely hours, and the checker took the plan")
	p.para("  in hand   ", fmt.Sprintf("%s = window's close %s - finish %s", quantity.Hours(x.InHand), agenda.When(closes, zone), agenda.When(x.Finish, zone)))
	words := map[plan.Verdict]string{plan.Fits: "fits", plan.CannotFit: "does not fit", plan.Unsettled: "not settled in the time of a trial"}
	for i, t := range x.Tried {
		lead := "  tried     "
		if i > 0 {
			lead = "            "
		}
		p.para(lead, clean.Line(t.Text)+": "+words[t.Verdict])
	}
	if len(x.Tried) > 1 {
		p.para("            ", "What lies between two amounts was not tried; the least that fits is offered.")
	}
	p.gap()
	p.para("", agenda.Care)
	return p.err
}

// waysForm are the ways for machines.
type waysForm struct {
	List  []wayForm `json:"list"`
	Tried int       `json:"tried"`
	Left  int       `json:"left_untried"`
	Not   []string  `json:"not_offered"`
}

type wayForm struct {
	Says   string        `json:"says"`
	Write  string        `json:"write"`
	At     string        `json:"at"`
	Set    []settingForm `json:"set"`
	Finish moment        `json:"finish"`
	InHand int           `json:"in_hand_min"`
}

type settingForm struct {
	Path  []string `json:"path"`
	Value string   `json:"value"`
}

func waysOf(r *plan.Report) *waysForm {
	if r.Ways == nil {
		return nil
	}
	f := &waysForm{List: []wayForm{}, Tried: r.Ways.Tried, Left: r.Ways.Left, Not: []string{}}
	for _, s := range r.Ways.Not {
		f.Not = append(f.Not, clean.Line(s))
	}
	for _, w := range r.Ways.List {
		x := wayForm{Says: agenda.Way(w), Write: clean.Line(w.Write), At: agenda.At(w.Pos), Set: []settingForm{}, Finish: siteMoment(r.Likely, w.Finish), InHand: w.InHand}
		for _, s := range w.Sets {
			x.Set = append(x.Set, settingForm{s.Path, s.Value})
		}
		f.List = append(f.List, x)
	}
	return f
}
