package text

import (
	"fmt"
	"io"
	"sort"
	"strings"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
)

// UnknownTask says that a job has no task of that name; Near are the names closest to it.
type UnknownTask struct {
	Name string
	Near []string
}

// Error names the task and those closest to it.
func (e *UnknownTask) Error() string {
	s := fmt.Sprintf("there is no task %q", e.Name)
	if len(e.Near) > 0 {
		quoted := make([]string, len(e.Near))
		for i, n := range e.Near {
			quoted[i] = fmt.Sprintf("%q", n)
		}
		s += "; the closest are " + strings.Join(quoted, ", ")
	}
	return s
}

// find gives the task by name, or by an only task whose name or title holds the word.
func find(job *tasks.Job, name string) (*tasks.Task, error) {
	var holds []*tasks.Task
	want := strings.ToLower(strings.TrimSpace(name))
	for _, t := range job.Tasks {
		if t.Name == name {
			return t, nil
		}
		if want != "" && (strings.Contains(strings.ToLower(t.Name), want) || strings.Contains(strings.ToLower(t.Title), want)) {
			holds = append(holds, t)
		}
	}
	if len(holds) == 1 {
		return holds[0], nil
	}
	e := &UnknownTask{Name: name}
	pool := holds
	if len(pool) == 0 {
		pool = job.Tasks
	}
	names := make([]string, len(pool))
	for i, t := range pool {
		names[i] = t.Name
	}
	sort.SliceStable(names, func(i, k int) bool {
		return distance(want, strings.ToLower(names[i])) < distance(want, strings.ToLower(names[k]))
	})
	e.Near = names[:min(len(names), 5)]
	return nil, e
}

// distance counts the letters to change, add or drop to make b from a (Levenshtein 1965);
// O(len a x len b), names cut to 60 letters.
func distance(a, b string) int {
	x, y := []rune(a), []rune(b)
	x, y = x[:min(len(x), 60)], y[:min(len(y), 60)]
	row := make([]int, len(y)+1)
	for j := range row {
		row[j] = j
	}
	for i := range x {
		last := row[0]
		row[0] = i + 1
		for j := range y {
			n := last
			if x[i] != y[j] {
				n++
			}
			last = row[j+1]
			row[j+1] = min(n, row[j]+1, row[j+1]+1)
		}
	}
	return row[len(y)]
}

// Why prints what sets a task's dates and where its hours come from, back to the job file's
// lines and the sources. The task is named as in the job file, or by a word that only its name
// holds. The error is an *UnknownTask or that of writing.
func Why(w io.Writer, r *plan.Report, task string, o Options) error {
	a := o.pick(r)
	t, err := find(a.Work.Job, task)
	if err != nil {
		return err
	}
	p := newPage(w, o)
	p.para("", fmt.Sprintf("%s: %s at %s%s", agenda.TaskLabel(t), t.Kind, t.Where(), inFile(at(t.Pos))))
	if t.Title != "" && t.Title != t.Name {
		p.para("", "In the job file: "+t.Name)
	}
	if t.Maybe() {
		p.para("", "A maybe: it happens with a chance of "+percent(t.Chance)+".")
	}
	if t.Lone != nil && !*t.Lone {
		p.para("", "The job file says that it may be done alone.")
	}
	soft := false
	for i, s := range a.Work.Steps {
		if s.Task == t {
			soft = p.step(a, i, s) || soft
		}
	}
	p.taskDeadline(a, t)
	p.gap()
	if soft {
		p.para("", "(default): no evidence stands behind it; put your own figure into the job file.")
	}
	p.para("", agenda.Care)
	return p.err
}

// step prints one step and says whether its hours rest on a soft default.
func (p *page) step(a *plan.Answer, i int, s *expand.Step) bool {
	p.gap()
	p.para("", strings.ToUpper(s.Name[:min(1, len(s.Name))])+s.Name[min(1, len(s.Name)):])
	if s.Absent {
		p.para("  ", "Does not happen "+agenda.BasisWords(a.Work.Basis)+".")
		return false
	}
	if a.Plan != nil && i < len(a.Plan.Steps) {
		p.planned(a, i, s)
		p.curing(a, i, s)
	}
	label := "  hours     "
	if s.Estimate.Overruled {
		p.para(label, quantityOf(s)+" (given in the job file, overrules the estimate)")
	} else {
		p.para(label, quantityOf(s))
	}
	_, told := agenda.Fact(s, "face factor") // the tree of the hours may hold it
	if !told && s.Class == expand.Hands && s.Place != nil && s.Working != s.HandsOn {
		f := s.Place.FaceFactor
		p.para("            ", fmt.Sprintf("working time is hands-on time / face factor %s [%s]%s", origin.Trim(f.Value),
			f.Pos.Origin("share of the hours at the face").String(), mark(!f.Pos.Given())))
	}
	soft := p.tree(s.Estimate.Figure)
	for _, n := range s.Estimate.Notes {
		p.para("    note: ", n)
	}
	for _, f := range s.Estimate.Facts {
		p.para("    also: ", f.Name+" "+f.Amount()+" ["+f.Origin.String()+"]"+mark(f.Origin.Soft()))
	}
	return soft || !told && s.Class == expand.Hands && s.Working != s.HandsOn && s.Place != nil && !s.Place.FaceFactor.Pos.Given()
}

func mark(soft bool) string {
	if soft {
		return " (default)"
	}
	return ""
}

// planned prints when the step is worked and what sets that.
func (p *page) planned(a *plan.Answer, i int, s *expand.Step) {
	ps := a.Plan.Steps[i]
	zone := agenda.Zone(a.Work, s.Place)
	p.para("  planned   ", fmt.Sprintf("%s to %s%s", agenda.When(ps.Start, zone), agenda.When(ps.Finish, zone), people(ps)))
	if len(ps.Pieces) > 1 {
		var parts []string
		for _, piece := range ps.Pieces {
			parts = append(parts, agenda.ShortDay(piece.From, zone)+" "+agenda.Between(piece, zone))
		}
		p.para("            ", "in pieces: "+strings.Join(parts, ", "))
	}
	for _, w := range ps.Watches {
		p.para("            ", fmt.Sprintf("fire watch %s %s by %s", agenda.ShortDay(w.From, zone), agenda.Between(w.Span, zone), w.Person))
	}
	if i >= len(a.Rows) {
		return
	}
	for k, c := range a.Rows[i].SetBy {
		lead := "  set by    "
		if k > 0 {
			lead = "  and by    "
		}
		p.para(lead, agenda.CauseText(a.Work, c)+inFile(at(c.Pos)))
	}
	if leeway := agenda.Leeway(a, i); leeway != "" {
		p.para("  leeway    ", leeway)
	}
}

func people(ps plan.Step) string {
	s := ""
	if len(ps.People) > 0 {
		s = ", by " + strings.Join(ps.People, ", ")
	}
	if len(ps.Relief) > 0 {
		s += ", relieved by " + strings.Join(ps.Relief, ", ")
	}
	return s
}

// tree prints a figure and what it was made from, each behind its parent; it says whether a soft
// default is among them.
func (p *page) tree(f origin.Figure) bool {
	soft := false
	if f.Name == "" {
		return false
	}
	f.Walk(func(g origin.Figure, depth int) {
		soft = soft || g.Origin.Soft()
		lead := strings.Repeat("  ", min(depth, p.width/4)) + "    "
		p.para(lead, fmt.Sprintf("%s: %s [%s]%s", g.Name, g.Amount(), g.Origin, mark(g.Origin.Soft())))
	})
	return soft
}

func (p *page) taskDeadline(a *plan.Answer, t *tasks.Task) {
	for _, d := range a.Deadlines {
		if d.Task != t {
			continue
		}
		p.gap()
		s := "Must be done by " + agenda.Moment(a, d.By) + inFile(at(d.Pos))
		if a.Plan != nil {
			s += ": " + agenda.InHand(a, d.InHand) + " in hand"
			if d.LastStart < hours.Far {
				s += "; last start that still makes it " + agenda.Moment(a, d.LastStart)
			}
		}
		p.para("", s)
	}
}
