package text

import (
	"fmt"
	"io"
	"strings"

	"github.com/rivo/uniseg"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// Days prints the plan shift by shift and person by person: when each works on what, breaks,
// fire watches, standing time running, reach and hire slots. Without a plan it says so.
func Days(w io.Writer, r *plan.Report, o Options) error {
	p := newPage(w, o)
	a := o.pick(r)
	p.para("", r.Job.Name)
	p.gap()
	p.para("", agenda.Sentence(a, r.LowToo && a == r.Likely))
	switch {
	case a.Plan == nil:
		p.gap()
		why := ""
		if a.NoPlan != "" {
			why = ", not even a late one: " + a.NoPlan
		}
		p.para("", "There is no plan to show"+why+". `sailby fits` says what stands against it.")
	case a.Late:
		p.para("", "The plan below is late: of the plans found it is the one that is least late.")
	}
	for _, s := range agenda.Shifts(a) {
		p.shift(a, s)
	}
	p.leftOut(a)
	p.gap()
	p.para("", agenda.Care)
	return p.err
}

func (p *page) shift(a *plan.Answer, s *agenda.Shift) {
	p.gap()
	p.para("", agenda.Headline(a.Work, s))
	p.para("  ", agenda.Facts(a.Work, s))
	p.gates("Reach of ", agenda.Reach(a.Work, s), s)
	p.gates("Hired ", agenda.Hire(a.Work, s), s)
	p.gates("", agenda.Permits(a.Work, s), s)
	name := 6
	for _, q := range s.People {
		name = max(name, min(uniseg.StringWidth(clean.Line(q.Name)), p.width/5))
	}
	widths := []int{2, name + 2, 13}
	for _, q := range s.People {
		who := q.Name
		rows := personRows(a, s, q)
		if len(rows) == 0 {
			p.row(widths, "", who, agenda.Within(q.On, s.Zone), "no task: free, or standing by")
		}
		for _, r := range rows {
			p.row(widths, "", who, r[0], r[1])
			who = ""
		}
	}
	for _, e := range s.Entries {
		if len(e.People) == 0 {
			p.row(widths, "", "nobody", agenda.Within(e.Span, s.Zone), entryWords(a, e))
		}
	}
	for _, st := range s.Standing {
		p.para("  standing: ", fmt.Sprintf("%s, until %s", agenda.StepLabel(a.Work, st.Step), agenda.When(st.To, s.Zone)))
	}
}

func (p *page) gates(lead string, gates []agenda.Gate, s *agenda.Shift) {
	for _, g := range gates {
		p.para("  ", lead+g.Name+": "+agenda.Opens(g, s.Zone))
	}
}

// personRows gives time and words for each piece of a person's shift, breaks between them.
func personRows(a *plan.Answer, s *agenda.Shift, q agenda.Person) [][2]string {
	var out [][2]string
	open := hours.Set(nil)
	if s.Place != nil {
		open = agenda.PlaceHours(a.Work, s.Place)
	}
	entries := agenda.Merged(q.Entries)
	for i, e := range entries {
		if i > 0 {
			gap := hours.Span{From: entries[i-1].To, To: e.From}
			if gap.Len() > 0 {
				word := "free"
				if open.Count(gap) == 0 || entries[i-1].Step == e.Step && !e.Watch {
					word = "break"
				}
				out = append(out, [2]string{agenda.Within(gap, s.Zone), word})
			}
		}
		words := entryWords(a, e)
		if pause := agenda.Breaks(e, s.Zone); pause != "" {
			words += ", with the " + pause
		}
		out = append(out, [2]string{agenda.Within(e.Span, s.Zone), words})
	}
	return out
}

func entryWords(a *plan.Answer, e agenda.Entry) string {
	if e.Watch {
		return "fire watch after " + agenda.StepLabel(a.Work, e.Step)
	}
	s := agenda.StepLabel(a.Work, e.Step) + " (" + agenda.Where(e.Step) + ")"
	if short := agenda.Sliver(e); short != "" {
		s += ", " + short
	}
	switch {
	case e.Goes && e.From0:
		s += ", goes on from before and after"
	case e.From0:
		s += ", goes on from before"
	case e.Goes:
		s += ", goes on " + agenda.NextPiece(a.Work, e)
	}
	return s
}

// leftOut lists the maybes that do not happen in this plan.
func (p *page) leftOut(a *plan.Answer) {
	var names []string
	seen := map[string]bool{}
	for _, s := range a.Work.Steps {
		if s.Absent && !seen[s.Task.Name] {
			seen[s.Task.Name] = true
			names = append(names, fmt.Sprintf("%s (chance %s)", agenda.TaskLabel(s.Task), percent(s.Task.Chance)))
		}
	}
	if len(names) > 0 {
		p.gap()
		p.para("", "Not in this plan: "+strings.Join(names, ", ")+".")
	}
}

func percent(share float64) string { return fmt.Sprintf("%.4g %%", share*100) }

type shiftForm struct {
	Date     string         `json:"date"`
	Place    string         `json:"place"`
	Site     bool           `json:"site"`
	From     moment         `json:"from"`
	To       moment         `json:"to"`
	People   []personForm   `json:"people"`
	Standing []standingForm `json:"standing"`
}

type personForm struct {
	Name   string      `json:"name"`
	From   moment      `json:"from"`
	To     moment      `json:"to"`
	Pieces []pieceForm `json:"pieces"`
}

type pieceForm struct {
	Task   string `json:"task"`
	Step   string `json:"step"`
	Start  moment `json:"start"`
	Finish moment `json:"finish"`
	Watch  bool   `json:"fire_watch,omitempty"`
}

type standingForm struct {
	Task  string `json:"task"`
	Step  string `json:"step"`
	Until moment `json:"until"`
}

type daysForm struct {
	Job     string      `json:"job"`
	Verdict string      `json:"verdict"`
	Basis   string      `json:"basis"`
	Late    bool        `json:"late"`
	Window  windowForm  `json:"window"`
	Tasks   []taskForm  `json:"tasks"`
	Shifts  []shiftForm `json:"shifts"`
	LeftOut []string    `json:"left_out"`
	Care    string      `json:"care"`
}

// DaysJSON writes the plan for machines: the tasks with their pieces, then the shifts.
func DaysJSON(w io.Writer, r *plan.Report, o Options) error {
	a := o.pick(r)
	f := daysForm{Job: clean.Line(r.Job.Name), Verdict: a.Verdict.String(), Basis: basisName(a.Work.Basis), Late: a.Late,
		Window: windowOf(a), Tasks: tasksOf(a), Shifts: []shiftForm{}, LeftOut: []string{}, Care: agenda.Care}
	for _, s := range agenda.Shifts(a) {
		f.Shifts = append(f.Shifts, shiftOf(s))
	}
	for _, s := range a.Work.Steps {
		if n := len(f.LeftOut); s.Absent && (n == 0 || f.LeftOut[n-1] != s.Task.Name) {
			f.LeftOut = append(f.LeftOut, s.Task.Name)
		}
	}
	return writeJSON(w, f)
}

func shiftOf(s *agenda.Shift) shiftForm {
	m := func(t hours.Minute) moment { return moment{t, s.Zone} }
	f := shiftForm{Date: s.Date.String(), Site: s.Site, From: m(s.From), To: m(s.To), People: []personForm{}, Standing: []standingForm{}}
	if s.Place != nil {
		f.Place = s.Place.Name
	}
	for _, q := range s.People {
		pf := personForm{Name: q.Name, From: m(q.On.From), To: m(q.On.To), Pieces: []pieceForm{}}
		for _, e := range q.Entries {
			pf.Pieces = append(pf.Pieces, pieceForm{e.Step.Task.Name, e.Step.Name, m(e.From), m(e.To), e.Watch})
		}
		f.People = append(f.People, pf)
	}
	for _, st := range s.Standing {
		f.Standing = append(f.Standing, standingForm{st.Step.Task.Name, st.Step.Name, m(st.To)})
	}
	return f
}

// quantityOf is the step's length in words: hands-on time, or how long it stands.
func quantityOf(s *expand.Step) string {
	switch s.Class {
	case expand.Hands:
		return agenda.HandsOn(s) + " hands-on, " + quantity.Hours(s.Working) + " of working time"
	case expand.Clock:
		return agenda.HandsOn(s) + " of clock time"
	}
	return "cure, by the steel's temperature"
}
