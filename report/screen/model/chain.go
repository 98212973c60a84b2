package model

import (
	"fmt"
	"strings"

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
	for i, link := range agenda.Chain(a) {
		var causes []string
		for _, c := range link.Causes {
			causes = append(causes, agenda.CauseText(a.Work, c)+inFile(agenda.At(c.Pos)))
		}
		why := strings.Join(causes, "; ")
		if link.Head == "" {
			body = append(body, para(n, fmt.Sprintf("%2d ", i+1), why, Plain, nil)...)
			continue
		}
		step := link.Causes[0].Step
		s, ps := a.Work.Steps[step], a.Plan.Steps[step]
		zone := agenda.Zone(a.Work, s.Place)
		body = append(body, line{text: columns(n, []int{3, n - 3 - 37, 37}, fmt.Sprint(i+1), agenda.StepLabel(a.Work, s),
			agenda.When(ps.Start, zone)+" to "+agenda.When(ps.Finish, zone)), do: p.open(s)})
		body = append(body, para(n, "     ", "starts then because: "+why, Plain, nil)...)
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
