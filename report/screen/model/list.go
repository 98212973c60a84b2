package model

import (
	"slices"
	"strings"

	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/quantity"
)

// listPage is the list of tasks in the order of work, with a search and filters. What opens a
// task is given, so that a task can also be picked here for a change.
type listPage struct {
	m       *Model
	name    string
	choose  func(task string) Ask
	search  input
	filters []*filter
	field   int // the filter that Left and Right change
	at      scroll
}

func newList(m *Model, name string, choose func(string) Ask) *listPage {
	return &listPage{m: m, name: name, choose: choose, filters: newFilters()}
}

func (p *listPage) title() string  { return p.name }
func (p *listPage) place() *scroll { return &p.at }
func (p *listPage) typing() bool   { return len(p.search.chars) > 0 }
func (p *listPage) keys() string {
	if p.typing() {
		return "type to search   Tab, Left/Right: filter   Enter open   Esc all tasks again"
	}
	return "type to search   Tab, Left/Right: filter   Enter open   Esc back"
}

func (p *listPage) cursor() (row, col int) {
	_, x := p.search.shown(40)
	return 0, len("Search: ") + x
}

func (p *listPage) press(k Key) (Ask, bool) {
	switch k.Code {
	case Letter:
		if k.Letter >= '1' && k.Letter <= '6' && !p.typing() {
			return Ask{}, false // the pages; a search may hold digits but not begin with these
		}
		if k.Letter == ' ' && !p.typing() {
			return Ask{}, true
		}
		p.search.at = len(p.search.chars)
		p.search.press(k)
	case Erase:
		p.search.press(k)
	case Next:
		p.field = (p.field + 1) % len(p.filters)
		return Ask{}, true
	case Prev:
		p.field = (p.field + len(p.filters) - 1) % len(p.filters)
		return Ask{}, true
	case Left:
		p.filters[p.field].turn(-1)
	case Right:
		p.filters[p.field].turn(1)
	case Back:
		if !p.narrowed() {
			return Ask{}, false
		}
		p.search.set("")
		for _, f := range p.filters {
			f.at = 0
		}
	default:
		return Ask{}, false
	}
	p.at = scroll{}
	return Ask{}, true
}

func (p *listPage) narrowed() bool {
	return p.typing() || slices.ContainsFunc(p.filters, func(f *filter) bool { return f.at > 0 })
}

func (p *listPage) lay(n int) ([]Row, []line) {
	all := items(p.m)
	var body []line
	for _, f := range p.filters {
		f.values = f.from(p.m, all)
		f.at = min(f.at, len(f.values))
	}
	widths, heads := listColumns(n)
	for _, it := range all {
		if !p.takes(it) {
			continue
		}
		name := it.task.Name
		body = append(body, line{text: columns(n, widths, p.cells(it, len(widths))...), do: func() Ask { return p.choose(name) }})
	}
	found := count(len(body), "task") + " of " + count(len(all), "task")
	if len(body) == 0 {
		body = []line{{}, {text: "No task is like that. Esc shows all of them again."}}
	}
	text, _ := p.search.shown(40)
	if !p.typing() {
		text = "(type a word)"
	}
	fixed := []Row{{pad("Search: "+text, n-width(found)) + found, Plain}}
	var b strings.Builder
	for i, f := range p.filters {
		word := f.name + " " + f.value()
		if i == p.field {
			word = f.name + " <" + f.value() + ">"
		}
		b.WriteString(cut(word, max(n/3, 16)) + "   ")
	}
	for _, t := range wrapKeep(b.String(), n) {
		fixed = append(fixed, Row{t, Plain})
	}
	return append(fixed, Row{columns(n, widths, heads...), Head}), body
}

// wrapKeep breaks at the triple blanks between filters only.
func wrapKeep(s string, n int) []string {
	var out []string
	line := ""
	for _, part := range strings.Split(strings.TrimRight(s, " "), "   ") {
		switch {
		case line == "":
			line = part
		case width(line)+3+width(part) <= n:
			line += "   " + part
		default:
			out, line = append(out, line), part
		}
	}
	return append(out, line)
}

// listColumns gives the columns of the list for a width of screen.
func listColumns(n int) ([]int, []string) {
	if n >= 116 {
		return []int{18, 18, 12, n - 18 - 18 - 12 - 20 - 24 - 12, 20, 24, 12}, []string{"starts", "finishes", "kind", "task", "where", "who", "leeway"}
	}
	if n < 62 {
		return []int{17, n - 17 - 11, 11}, []string{"starts", "task", "leeway"}
	}
	rest := n - 17 - 11
	where := rest / 4
	who := rest / 4
	return []int{17, rest - where - who, where, who, 11}, []string{"starts", "task", "where", "who", "leeway"}
}

// cells gives the words of one task for the columns.
func (p *listPage) cells(it item, n int) []string {
	zone := agenda.Zone(p.m.work(), it.task.Place)
	start, finish, leeway := "-", "-", "-"
	switch {
	case it.planned:
		start, finish, leeway = agenda.When(it.start, zone), agenda.When(it.finish, zone), roughly(it.leeway)
	case absent(p.m.work(), it.task):
		start, leeway = "does not happen", ""
	}
	who := strings.Join(it.people, ", ")
	switch n {
	case 3:
		return []string{start, agenda.TaskLabel(it.task), leeway}
	case 7:
		return []string{start, finish, string(it.task.Kind), agenda.TaskLabel(it.task), it.task.Where(), who, leeway}
	}
	return []string{start, agenda.TaskLabel(it.task), it.task.Where(), who, leeway}
}

// roughly writes minutes as hours and minutes, from two days on without the minutes.
func roughly(minutes int) string {
	if minutes < 0 {
		return "-"
	}
	if minutes >= 48*60 {
		minutes -= minutes % 60
	}
	return quantity.Span(minutes)
}

func absent(w *expand.Work, t *tasks.Task) bool {
	return slices.ContainsFunc(w.Steps, func(s *expand.Step) bool { return s.Task == t && s.Absent })
}

// takes says whether the search and every filter let a task through. The search looks for each of
// its words in the name, title, kind, place, people, drawing and note.
func (p *listPage) takes(it item) bool {
	t := it.task
	hay := strings.ToLower(clean.Line(strings.Join(append([]string{t.Name, t.Title, string(t.Kind), t.Where(), t.Place.Title, t.Drawing, t.Note}, it.people...), " ")))
	for _, word := range strings.Fields(strings.ToLower(p.search.text())) {
		if !strings.Contains(hay, word) {
			return false
		}
	}
	for _, f := range p.filters {
		if f.at > 0 && !f.takes(p.m, it, f.value()) {
			return false
		}
	}
	return true
}
