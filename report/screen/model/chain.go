package model

import (
	"fmt"

	"sailby/report/agenda"
	"sailby/tasks/expand"
)

// chainPage is the governing chain: what sets the finish, step by step, the last first.
type chainPage struct {
	m  *Model
	at scroll
}

func (p *chainPage) title() string         { return "What governs the finish" }
func (p *chainPage) place() *scroll        { return &p.at }
func (p *chainPage) press(Key) (Ask, bool) { return Ask{}, false }
func (p *chainPage) keys() string          { return "Up/Down choose   Enter open task   1-5 pages   Esc back" }

func (p *chainPage) lay(n int) ([]Row, []line) {
	a := p.m.answer()
	if a.Plan == nil {
		var body []line
		if a.Proof != nil {
			body = proofLines(a, n)
		} else {
			body = para(n, "", agenda.Sentence(a, false), Plain, nil)
		}
		return nil, body
	}
	fixed := []Row{{"Finish " + agenda.Finish(a) + " " + agenda.BasisWords(a.Work.Basis) + "; each line: why not earlier", Head}}
	var body []line
	for i, c := range a.Governing {
		lead := fmt.Sprintf("%2d ", i+1)
		if c.Step < 0 || c.Step >= len(a.Work.Steps) || c.Step >= len(a.Plan.Steps) {
			body = append(body, para(n, lead, agenda.CauseText(a.Work, c)+inFile(agenda.At(c.Pos)), Plain, nil)...)
			continue
		}
		s := a.Work.Steps[c.Step]
		do := p.open(s)
		ps := a.Plan.Steps[c.Step]
		zone := agenda.Zone(a.Work, s.Place)
		body = append(body, line{text: columns(n, []int{3, n - 3 - 37, 37}, fmt.Sprint(i+1), agenda.StepLabel(a.Work, s),
			agenda.When(ps.Start, zone)+" to "+agenda.When(ps.Finish, zone)), do: do})
		body = append(body, para(n, "     ", "starts then because: "+agenda.CauseText(a.Work, c)+inFile(agenda.At(c.Pos)), Plain, nil)...)
	}
	if len(a.Governing) == 0 {
		body = append(body, para(n, "", "Nothing is known of what sets the finish.", Plain, nil)...)
	}
	if a.Proof != nil {
		body = append(append(body, line{}), proofLines(a, n)...)
	}
	return fixed, body
}

func (p *chainPage) open(s *expand.Step) func() Ask {
	return func() Ask { return p.m.open(newTask(p.m, s.Task.Name)) }
}
