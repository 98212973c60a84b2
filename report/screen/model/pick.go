package model

import (
	"slices"
	"strings"

	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/quantity"
)

// pickPage is a list of things of which one is picked.
type pickPage struct {
	m       *Model
	name    string
	options []line
	at      scroll
}

func (p *pickPage) title() string         { return p.name }
func (p *pickPage) place() *scroll        { return &p.at }
func (p *pickPage) press(Key) (Ask, bool) { return Ask{}, false }
func (p *pickPage) keys() string          { return "Up/Down choose   Enter take it   Esc back" }

func (p *pickPage) add(text string, do func() Ask) {
	p.options = append(p.options, line{text: clean.Line(text), do: do})
}

func (p *pickPage) lay(int) ([]Row, []line) {
	if len(p.options) == 0 {
		return nil, []line{{text: "There is nothing to pick here."}}
	}
	return nil, p.options
}

// askPage asks for a line of typing; accept says what is wrong with it.
type askPage struct {
	m      *Model
	name   string
	now    string
	in     input
	err    error
	accept func(typed string) (Ask, error)
	at     scroll
}

func (p *askPage) title() string  { return p.name }
func (p *askPage) place() *scroll { return &p.at }
func (p *askPage) typing() bool   { return true }
func (p *askPage) keys() string   { return "type the hours   Enter plan with them   Esc back" }

func (p *askPage) cursor() (row, col int) {
	_, x := p.in.shown(p.room(p.m.wide - 2))
	return 2, len("hours: ") + x
}

func (p *askPage) room(n int) int { return max(n-len("hours: ")-1, 4) }

func (p *askPage) lay(n int) ([]Row, []line) {
	text, _ := p.in.shown(p.room(n))
	fixed := []Row{{cut("now: "+p.now, n), Plain}, {}, {"hours: " + text, Plain}, {}}
	var body []line
	if p.err != nil {
		body = para(n, "", p.err.Error(), Bad, nil)
	}
	return fixed, append(body, para(n, "", "For instance 3 h, 2 h 30 min, or a range: 3 to 5 h. Hours are elapsed hours with the people named.", Faint, nil)...)
}

func (p *askPage) press(k Key) (Ask, bool) {
	if k.Code == Enter {
		ask, err := p.accept(p.in.text())
		p.err = err
		return ask, true
	}
	p.err = nil
	return Ask{}, p.in.press(k)
}

// hoursNow says how long a task takes in the plan of the file.
func hoursNow(m *Model, t *tasks.Task) string {
	var parts []string
	for _, s := range m.file.Likely.Work.Steps {
		if s.Task != t && s.Task.Name != t.Name {
			continue
		}
		n := s.HandsOn
		what := " hands-on"
		if s.Class == expand.Clock {
			n, what = s.Clock, " of clock time"
		}
		if s.Class == expand.Cure || n == 0 {
			continue
		}
		text := clean.Line(s.Name) + " " + quantity.Hours(n) + what
		if !slices.Contains(parts, text) {
			parts = append(parts, text)
		}
	}
	if len(parts) == 0 {
		return "no hours on the likely plan"
	}
	return strings.Join(parts, ", ")
}
