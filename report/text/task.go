package text

import (
	"slices"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// taskForm is one task of the plan. start is the start of its first step, finish the finish of
// its last hands-on step (of its last step where nobody works on it); leeway is that step's.
type taskForm struct {
	ID        string      `json:"id"`
	Title     string      `json:"title"`
	Kind      string      `json:"kind"`
	Place     string      `json:"place"`
	Workface  string      `json:"workface"`
	Start     moment      `json:"start"`
	Finish    moment      `json:"finish"`
	Pieces    [][2]moment `json:"pieces"`
	People    []string    `json:"people"`
	Kit       []string    `json:"kit"`
	Latest    moment      `json:"latest_finish"`
	Leeway    *int        `json:"leeway_min"`
	Shares    []string    `json:"leeway_shared_with"`
	SetBy     []causeForm `json:"set_by"`
	Watches   []watchForm `json:"fire_watches,omitempty"`
	Steps     []stepForm  `json:"steps"`
	ByMoment  moment      `json:"must_be_done_by"`
	HandsOnIs int         `json:"hands_on_min"`
}

type watchForm struct {
	Person string `json:"person"`
	Start  moment `json:"start"`
	Finish moment `json:"finish"`
}

type stepForm struct {
	Step   string      `json:"step"`
	Class  string      `json:"class"`
	Start  moment      `json:"start"`
	Finish moment      `json:"finish"`
	Pieces [][2]moment `json:"pieces"`
	People []string    `json:"people"`
	Relief []string    `json:"relief,omitempty"`
	Latest moment      `json:"latest_finish"`
	Leeway *int        `json:"leeway_min"`
	SetBy  []causeForm `json:"set_by"`
	// HandsOn, Working and Clock are the step's minutes: hands-on, of open hours, of clock time.
	HandsOn int          `json:"hands_on_min"`
	Working int          `json:"working_min"`
	Clock   int          `json:"clock_min"`
	Hours   *figureForm  `json:"hours,omitempty"`
	Given   bool         `json:"hours_given,omitempty"`
	Facts   []figureForm `json:"facts,omitempty"`
	Notes   []string     `json:"notes,omitempty"`
}

func className(c expand.Class) string {
	return [...]string{"hands-on", "clock", "cure"}[min(int(c), 2)]
}

// tasksOf gives the tasks of the plan in the job file's order; those that do not happen are left
// out.
func tasksOf(a *plan.Answer) []taskForm {
	out := []taskForm{}
	if a.Plan == nil {
		return out
	}
	for _, t := range a.Work.Job.Tasks {
		if f, ok := taskOf(a, t, false); ok {
			out = append(out, f)
		}
	}
	return out
}

// stepsOf gives the indices of a task's steps that happen and are planned.
func stepsOf(a *plan.Answer, t *tasks.Task) []int {
	var out []int
	for i, s := range a.Work.Steps {
		if s.Task == t && !s.Absent && i < len(a.Plan.Steps) {
			out = append(out, i)
		}
	}
	return out
}

// lastHands gives the task's last step that people work on, else its last step.
func lastHands(a *plan.Answer, list []int) int {
	last := list[len(list)-1]
	for _, i := range list {
		if a.Work.Steps[i].Class == expand.Hands {
			last = i
		}
	}
	return last
}

func taskOf(a *plan.Answer, t *tasks.Task, tree bool) (taskForm, bool) {
	list := stepsOf(a, t)
	if len(list) == 0 {
		return taskForm{}, false
	}
	zone := agenda.Zone(a.Work, t.Place)
	m := func(at hours.Minute) moment { return moment{at, zone} }
	last := lastHands(a, list)
	f := taskForm{ID: t.Name, Title: agenda.TaskLabel(t), Kind: string(t.Kind), Place: t.Place.Name,
		Start: m(a.Plan.Steps[list[0]].Start), Finish: m(a.Plan.Steps[last].Finish),
		Pieces: [][2]moment{}, People: []string{}, Kit: []string{}, Shares: []string{}, SetBy: []causeForm{}, Steps: []stepForm{}}
	if t.Face != nil {
		f.Workface = t.Face.Name
	}
	for _, i := range list {
		st, ps := a.Work.Steps[i], a.Plan.Steps[i]
		sf := stepOf(a, i, m, tree)
		f.Steps = append(f.Steps, sf)
		f.HandsOnIs += st.HandsOn
		if st.Class == expand.Hands {
			f.Pieces = append(f.Pieces, sf.Pieces...)
		}
		for _, who := range append(slices.Clone(ps.People), ps.Relief...) {
			if !slices.Contains(f.People, who) {
				f.People = append(f.People, who)
			}
		}
		for _, u := range st.Kit {
			if u.Kit != nil && !slices.Contains(f.Kit, u.Kit.Name) {
				f.Kit = append(f.Kit, u.Kit.Name)
			}
		}
		for _, w := range ps.Watches {
			f.Watches = append(f.Watches, watchForm{w.Person, m(w.From), m(w.To)})
		}
		if st.Deadline < hours.Far && t.Deadline != nil {
			f.ByMoment = m(st.Deadline)
		}
	}
	f.Latest, f.Leeway = f.Steps[indexOf(list, last)].Latest, f.Steps[indexOf(list, last)].Leeway
	f.SetBy = f.Steps[0].SetBy
	if last < len(a.Rows) {
		f.Shares = append(f.Shares, a.Rows[last].Shares...)
	}
	return f, true
}

func indexOf(list []int, v int) int { return slices.Index(list, v) }

func stepOf(a *plan.Answer, i int, m func(hours.Minute) moment, tree bool) stepForm {
	st, ps := a.Work.Steps[i], a.Plan.Steps[i]
	f := stepForm{Step: st.Name, Class: className(st.Class), Start: m(ps.Start), Finish: m(ps.Finish), Pieces: [][2]moment{},
		People: append([]string{}, ps.People...), Relief: ps.Relief, SetBy: []causeForm{}, HandsOn: st.HandsOn, Working: st.Working, Clock: st.Clock,
		Given: st.Estimate.Overruled}
	for _, p := range ps.Pieces {
		f.Pieces = append(f.Pieces, [2]moment{m(p.From), m(p.To)})
	}
	if i < len(a.Rows) {
		f.SetBy = causesOf(a, a.Rows[i].SetBy)
		if n := a.Rows[i].Leeway; n >= 0 { // standing time has none of its own
			f.Leeway = &n
		}
		if f.Leeway != nil || st.Class != expand.Hands { // where it is not known, so is the latest finish
			f.Latest = m(a.Rows[i].Latest)
		}
	}
	if tree {
		h := figureOf(st.Estimate.Figure)
		f.Hours = &h
		for _, g := range st.Estimate.Facts {
			f.Facts = append(f.Facts, figureOf(g))
		}
		for _, n := range st.Estimate.Notes {
			f.Notes = append(f.Notes, clean.Line(n))
		}
	}
	return f
}
