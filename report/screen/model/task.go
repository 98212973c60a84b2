package model

import (
	"bytes"
	"strings"

	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/report/text"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/quantity"
)

// taskPage is one task in full: what sets its dates, leeway and who shares it, the tree of its
// hours with where each number comes from, and its links.
type taskPage struct {
	m    *Model
	task string // by name, so that it can be shown in another plan
	at   scroll
}

func newTask(m *Model, task string) *taskPage { return &taskPage{m: m, task: task} }

func (p *taskPage) title() string         { return "Task: " + clean.Line(p.task) }
func (p *taskPage) place() *scroll        { return &p.at }
func (p *taskPage) press(Key) (Ask, bool) { return Ask{}, false }
func (p *taskPage) keys() string          { return "Up/Down scroll, choose   Enter open   PgUp/PgDn   Esc back" }

func (p *taskPage) find() *tasks.Task {
	for _, t := range p.m.work().Job.Tasks {
		if t.Name == p.task {
			return t
		}
	}
	return nil
}

func (p *taskPage) lay(n int) ([]Row, []line) {
	t := p.find()
	if t == nil {
		return nil, []line{{text: "This task is not in the plan shown."}}
	}
	var b bytes.Buffer
	o := text.Options{Width: n, Maybes: p.m.basis == maybes}
	if p.m.basis == high {
		o.End = expand.High
	}
	if err := text.Why(&b, p.m.shown, t.Name, o); err != nil {
		return nil, para(n, "", err.Error(), Bad, nil)
	}
	lines := strings.Split(strings.TrimRight(b.String(), "\n"), "\n")
	var body []line
	for i, l := range lines {
		mark := Plain
		if i == 0 || l != "" && l[0] != ' ' && i > 0 && lines[i-1] == "" && len(l) < 40 {
			mark = Head
		}
		body = append(body, line{text: l, mark: mark}) // cleaned by package text
	}
	body = append(body, line{})
	body = append(body, p.shared(n)...)
	body = append(body, p.links(t, n, "Comes after", func(l expand.Link) (*expand.Step, *expand.Step) { return l.To, l.From })...)
	body = append(body, p.links(t, n, "Before", func(l expand.Link) (*expand.Step, *expand.Step) { return l.From, l.To })...)
	if t.Note != "" {
		body = append(body, line{"Note on the sheet", Head, nil})
		for _, s := range clean.Lines(t.Note) {
			body = append(body, para(n, "  ", s, Plain, nil)...)
		}
	}
	return nil, append(body, line{}, line{text: "Try other hours for this task", do: func() Ask { return p.m.what.askHours(t.Name) }})
}

// shared lists the tasks that the leeway is shared with; Enter opens one.
func (p *taskPage) shared(n int) []line {
	a := p.m.answer()
	var names []string
	for i, s := range a.Work.Steps {
		if s.Task.Name == p.task && i < len(a.Rows) && !s.Absent {
			for _, name := range a.Rows[i].Shares {
				names = add(names, name)
			}
		}
	}
	if len(names) == 0 {
		return nil
	}
	out := []line{{"Leeway shared with", Head, nil}}
	for _, name := range names {
		out = append(out, line{text: cut("  "+clean.Line(name), n), do: func() Ask { return p.m.open(newTask(p.m, name)) }})
	}
	return out
}

// links lists the links on one side of the task; Enter opens the task at the other end.
func (p *taskPage) links(t *tasks.Task, n int, head string, ends func(expand.Link) (here, there *expand.Step)) []line {
	var out []line
	for _, l := range p.m.work().Links {
		here, there := ends(l)
		if here == nil || there == nil || here.Task != t || there.Task == t {
			continue
		}
		name := there.Task.Name
		s := agenda.StepLabel(p.m.work(), there)
		if w := waitWords(l); w != "" {
			s += ": " + w
		}
		if l.Why != "" {
			s += " [" + l.Why + "]"
		}
		out = append(out, para(n, "  ", s+inFile(agenda.At(l.Pos)), Plain, func() Ask { return p.m.open(newTask(p.m, name)) })...)
	}
	if len(out) == 0 {
		return nil
	}
	return append([]line{{head, Head, nil}}, out...)
}

// waitWords says what a link asks: which ends, the least and the greatest wait.
func waitWords(l expand.Link) string {
	var parts []string
	end := map[tasks.LinkEnd]string{tasks.Finish: "finish", tasks.Start: "start"}
	if l.FromEnd != tasks.Finish || l.ToEnd != tasks.Start {
		parts = append(parts, end[l.FromEnd]+" to "+end[l.ToEnd])
	}
	working := func(on bool) string {
		if on {
			return " of opening hours"
		}
		return ""
	}
	if l.Min > 0 {
		parts = append(parts, "at least "+quantity.Hours(l.Min)+working(l.Working))
	}
	if l.Max < expand.NoMax {
		parts = append(parts, "at most "+quantity.Hours(l.Max)+working(l.MaxWorking))
	}
	if l.MaxCure != nil {
		parts = append(parts, "a longest wait by the steel's temperature")
	}
	return strings.Join(parts, ", ")
}
