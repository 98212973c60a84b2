package text

import (
	"encoding/json"
	"io"
	"time"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
)

// writeJSON writes v indented, signs such as < as they are.
func writeJSON(w io.Writer, v any) error {
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	return e.Encode(v)
}

// moment is a time as RFC 3339 with the offset of its place; null where it is unknown.
type moment struct {
	at   hours.Minute
	zone *time.Location
}

// MarshalJSON gives the time or null.
func (m moment) MarshalJSON() ([]byte, error) {
	if m.at == 0 || m.at >= hours.Far || m.at <= hours.Never || m.zone == nil {
		return []byte("null"), nil
	}
	return json.Marshal(m.at.In(m.zone).Format(time.RFC3339))
}

type windowForm struct {
	Place  string `json:"place"`
	Trip   string `json:"trip,omitempty"`
	Opens  moment `json:"opens"`
	Closes moment `json:"closes"`
}

type deadlineForm struct {
	Task      string `json:"task"`
	By        moment `json:"by"`
	Finish    moment `json:"finish"`
	InHand    *int   `json:"in_hand_min"`
	LastStart moment `json:"last_start"`
	At        string `json:"at,omitempty"`
}

type causeForm struct {
	Task  string `json:"task,omitempty"`
	Step  string `json:"step,omitempty"`
	Start moment `json:"start"`
	Kind  string `json:"kind"`
	Name  string `json:"name,omitempty"`
	Text  string `json:"text"`
	After string `json:"after,omitempty"`
	At    string `json:"at,omitempty"`
}

type proofForm struct {
	Kind    string       `json:"kind"`
	EvenLow bool         `json:"even_at_low_end"`
	Summary string       `json:"summary"`
	Over    int          `json:"over_min"`
	Members []memberForm `json:"members"`
}

type memberForm struct {
	Text   string `json:"text"`
	Takes  int    `json:"takes_min"`
	Needed bool   `json:"shown_needed"`
	At     string `json:"at,omitempty"`
}

type noteForm struct {
	Text string `json:"text"`
	At   string `json:"at,omitempty"`
}

// at writes a place in a file, "" if there is none.
func at(p tasks.Pos) string { return agenda.At(p) }

// count gives a pointer to n where a plan stands behind it, else nil.
func count(a *plan.Answer, n int) *int {
	if a.Plan == nil {
		return nil
	}
	return &n
}

func siteMoment(a *plan.Answer, m hours.Minute) moment {
	return moment{m, agenda.Zone(a.Work, a.Work.Window.Place)}
}

func windowOf(a *plan.Answer) windowForm {
	f := windowForm{Place: a.Work.Window.Place.Name, Opens: siteMoment(a, a.Work.Window.Opens), Closes: siteMoment(a, a.Work.Window.Closes)}
	if a.Work.Trip != nil {
		f.Trip = a.Work.Trip.Name
	}
	return f
}

func deadlinesOf(a *plan.Answer) []deadlineForm {
	out := []deadlineForm{}
	for _, d := range a.Deadlines {
		f := deadlineForm{By: siteMoment(a, d.By), InHand: count(a, d.InHand), LastStart: siteMoment(a, d.LastStart), At: at(d.Pos)}
		if d.Task != nil {
			f.Task = d.Task.Name
		}
		if a.Plan != nil {
			f.Finish = siteMoment(a, d.Finish)
		} else {
			f.LastStart = moment{}
		}
		out = append(out, f)
	}
	return out
}

func causesOf(a *plan.Answer, list []plan.Cause) []causeForm {
	out := []causeForm{}
	for _, c := range list {
		f := causeForm{Kind: agenda.CauseKind(c.Kind), Name: c.Name, Text: agenda.CauseText(a.Work, c), At: at(c.Pos)}
		if s := stepAt(a, c.Step); s != nil {
			f.Task, f.Step = s.Task.Name, s.Name
			if a.Plan != nil && c.Step < len(a.Plan.Steps) {
				f.Start = moment{a.Plan.Steps[c.Step].Start, agenda.Zone(a.Work, s.Place)}
			}
		}
		if s := stepAt(a, c.Other); s != nil {
			f.After = s.Task.Name
		}
		out = append(out, f)
	}
	return out
}

func stepAt(a *plan.Answer, i int) *expand.Step {
	if i < 0 || i >= len(a.Work.Steps) {
		return nil
	}
	return a.Work.Steps[i]
}

func proofOf(a *plan.Answer, low bool) *proofForm {
	if a.Proof == nil {
		return nil
	}
	kinds := map[plan.ProofKind]string{plan.ByChain: "chain", plan.ByWork: "work", plan.BySearch: "search", plan.ByNoOpening: "no-opening"}
	f := &proofForm{Kind: kinds[a.Proof.Kind], EvenLow: low || a.Proof.Even, Summary: clean.Line(a.Proof.Summary), Over: a.Proof.Over, Members: []memberForm{}}
	for _, l := range a.Proof.Lines {
		f.Members = append(f.Members, memberForm{clean.Line(l.Text), l.Minutes, l.Needed, at(l.Pos)})
	}
	return f
}

// figureForm is one number with where it comes from and what it was made from.
type figureForm struct {
	Name   string       `json:"name"`
	Value  *float64     `json:"value,omitempty"`
	Unit   string       `json:"unit,omitempty"`
	Text   string       `json:"text,omitempty"`
	Origin string       `json:"origin"`
	Source string       `json:"source,omitempty"`
	At     string       `json:"at,omitempty"`
	Soft   bool         `json:"default,omitempty"`
	From   []figureForm `json:"from,omitempty"`
}

func figureOf(f origin.Figure) figureForm {
	out := figureForm{Name: f.Name, Unit: f.Unit, Text: f.Text, Origin: f.Origin.Kind.String(), Source: clean.Line(f.Origin.Source), Soft: f.Origin.Soft()}
	if f.Text == "" {
		v := f.Value
		out.Value = &v
	}
	if f.Origin.Kind == origin.Given {
		out.At = at(tasks.Pos{File: f.Origin.File, Line: f.Origin.Line, Col: f.Origin.Col})
	}
	for _, g := range f.From {
		out.From = append(out.From, figureOf(g))
	}
	return out
}
