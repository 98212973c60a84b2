package jobfile

import (
	"fmt"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/coat"
	"sailby/tasks/quantity"
)

// linkKeys are the keys that make links, with the ends that they hold on to.
var linkKeys = []struct {
	name     string
	from, to tasks.LinkEnd
}{
	{"after", tasks.Finish, tasks.Start},
	{"after start of", tasks.Start, tasks.Start},
	{"finish after", tasks.Finish, tasks.Finish},
	{"finish after start of", tasks.Start, tasks.Finish},
	{"starts with", tasks.Start, tasks.Start},
}

var linkSection = section{name: "Link", where: "tasks / NAME / after / NAME", host: "tasks/MT/after/weld lugs", says: "A wait between two tasks (R10).", keys: []key{
	{name: "min", takes: itsOwn, form: "time, or `4 working h`", shape: anyText, usual: "0 min", example: "4 h", says: "least wait; working hours are those of this task's place"},
	{name: "max", takes: itsOwn, form: "time, or `4 working h`", shape: anyText, usual: "none", example: "48 h", says: "longest wait"},
	{name: "state", takes: itsOwn, form: "state of the other task", shape: anyText, usual: "by kind (R10)", example: "cooled", without: "min max", says: "what it waits for: of a coat applied, touch dry, hard dry, solvent gone, cured; of a weld cooled, ready for NDT"},
}}

// filmWords are the states of a coat that a link may wait for.
func filmWords() []string {
	out := []string{"applied"}
	for _, s := range coat.States() {
		if s == "service" {
			s = "cured"
		}
		if s != "immersion max" {
			out = append(out, s)
		}
	}
	return out
}

var weldWords = []string{"cooled", "ready for NDT"}

// linkDraft is a link whose name is not resolved yet.
type linkDraft struct {
	link tasks.Link // Task is the word of the file
	key  string
	name ref
}

func (r *reader) linkDrafts(f *fields) []linkDraft {
	var out []linkDraft
	for _, k := range linkKeys {
		n := f.node(k.name)
		if n == nil {
			continue
		}
		base := tasks.Link{From: k.from, To: k.to}
		if n.Kind != yaml.MappingNode {
			if k.name == "starts with" {
				base.Max = &tasks.Wait{}
			}
			for _, ref := range f.names(k.name) {
				l := base
				l.Task, l.Pos = ref.text, ref.pos
				out = append(out, linkDraft{l, k.name, ref})
			}
			continue
		}
		if k.name == "starts with" {
			f.fault(k.name, "write the names alone, or use `after start of` with min and max", "it takes names, not waits")
			continue
		}
		for _, kv := range f.pairs(k.name) {
			l := base
			l.Task, l.Pos = strings.TrimSpace(kv[0].Value), r.pos(kv[0])
			if r.linkValue(f, k.name, &l, kv) {
				out = append(out, linkDraft{l, k.name, ref{l.Task, l.Pos}})
			}
		}
	}
	return out
}

// linkValue reads what stands behind a name: a state, or min, max and state.
func (r *reader) linkValue(f *fields, name string, l *tasks.Link, kv [2]*yaml.Node) bool {
	lead := f.lead(name) + short(l.Task) + ": "
	if kv[1].Kind != yaml.MappingNode {
		s, ok := r.text(kv[1], lead, "hard dry")
		if !ok {
			return false
		}
		if _, err := parseWait(s); err == nil {
			r.fault(kv[1], fmt.Sprintf("write {min: %s} or {max: %s}", s, s), "%s%s may be the least wait or the longest", lead, short(s))
			return false
		}
		l.State = s
		return true
	}
	g := r.open(kv[1], &linkSection, strings.TrimSuffix(lead, ": "))
	if s, ok := g.word("state"); ok {
		l.State = s
	}
	if w := g.wait("min"); w != nil {
		l.Min = *w
	}
	l.Max = g.wait("max")
	if l.Max != nil && l.Max.Working == l.Min.Working && l.Max.Minutes < l.Min.Minutes {
		g.fault("max", "give the smaller one as min", "the longest wait %s is shorter than the least, %s", quantity.Span(l.Max.Minutes), quantity.Span(l.Min.Minutes))
		return false
	}
	return true
}

// parseWait reads "4 h", "36 h" or "4 working h".
func parseWait(s string) (tasks.Wait, error) {
	n, working := s, false
	if i := strings.Index(s, " working "); i > 0 {
		n, working = s[:i]+" "+s[i+len(" working "):], true
	}
	v, err := quantity.Parse(n, quantity.Time)
	switch {
	case err != nil:
		return tasks.Wait{}, err
	case v < 0 || v > longestWait:
		return tasks.Wait{}, advise("give a time from 0 min to 2 years", "%s is outside 0 min to 2 years", short(s))
	}
	return tasks.Wait{Minutes: quantity.Clock(v).Whole(), Working: working}, nil
}

func (f *fields) wait(name string) *tasks.Wait {
	s, ok := f.word(name)
	if !ok {
		return nil
	}
	w, err := parseWait(s)
	if err != nil {
		f.r.advice(f.vals[name], f.lead(name), err, "write for instance 4 h, or 4 working h")
		return nil
	}
	if w.Pos = f.pos(name); name == "max" && w.Minutes > 0 && !w.Working {
		if v, err := quantity.Parse(s, quantity.Time); err == nil {
			w.Minutes = int(v + 1e-6) // a longest wait is never rounded up
		}
	}
	return &w
}

// maxLinks bounds the links of a job with its blocks written out.
const maxLinks = 50_000

// resolveLinks puts the names of all tasks into their links and checks their states.
func (r *reader) resolveLinks() {
	byName := map[string]*tasks.Task{}
	for _, d := range r.drafts {
		byName[d.t.Name] = d.t
	}
	count := 0
	for _, d := range r.drafts {
		for _, l := range d.links {
			lead := d.f.lead(l.key)
			if count > maxLinks {
				r.faultAt(l.link.Pos, "put a task between: one that comes after `every` round, and that the others come after", "%smore than %d links when blocks are written out", lead, maxLinks)
				return
			}
			for _, name := range r.resolve(l.name, lead, d.block, d.t.Round) {
				count++
				if name == d.t.Name {
					r.faultAt(l.link.Pos, "name another task, or leave it out", "%sit is linked to itself", lead)
					continue
				}
				r.linkState(l, byName[name], lead)
				link := l.link
				link.Task = name
				d.t.Links = append(d.t.Links, link)
			}
		}
	}
}

// linkState checks that the earlier task has the state.
func (r *reader) linkState(l linkDraft, from *tasks.Task, lead string) {
	s := l.link.State
	if s == "" || from == nil {
		return
	}
	var known []string
	switch from.Kind {
	case tasks.Coat:
		known = filmWords()
	case tasks.Weld:
		known = weldWords
	}
	switch {
	case l.link.From == tasks.Start:
		r.faultAt(l.link.Pos, "leave the state out, or use `after`", "%sthe start of %q has no state", lead, from.Name)
	case known == nil:
		r.faultAt(l.link.Pos, "leave the state out, or write {min: 4 h}", "%s%s %q has no states to wait for", lead, from.Kind, from.Name)
	case !slices.Contains(known, s):
		r.faultAt(l.link.Pos, r.among(s, known, ""), "%s%s %q has no state %s", lead, from.Kind, from.Name, short(s))
	}
}
