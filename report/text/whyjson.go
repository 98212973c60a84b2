package text

import (
	"io"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks"
)

type whyForm struct {
	taskForm
	Happens bool    `json:"happens"`
	Chance  float64 `json:"chance,omitempty"`
	At      string  `json:"at"`
	Basis   string  `json:"basis"`
	Care    string  `json:"care"`
}

// WhyJSON writes what Why prints for machines: the task as in DaysJSON, each step with the tree
// of its hours.
func WhyJSON(w io.Writer, r *plan.Report, task string, o Options) error {
	a := o.pick(r)
	t, err := find(a.Work.Job, task)
	if err != nil {
		return err
	}
	f := whyForm{Chance: t.Chance, At: at(t.Pos), Basis: basisName(a.Work.Basis), Care: agenda.Care}
	if a.Plan != nil {
		f.taskForm, f.Happens = taskOf(a, t, true)
	} else {
		f.taskForm, f.Happens = unplanned(a, t)
	}
	if !f.Happens {
		f.ID, f.Title, f.Kind, f.Place = t.Name, agenda.TaskLabel(t), string(t.Kind), t.Place.Name
	}
	return writeJSON(w, f)
}

// unplanned gives a task's hours where there is no plan.
func unplanned(a *plan.Answer, t *tasks.Task) (taskForm, bool) {
	bare := *a
	bare.Rows = nil
	bare.Plan = &plan.Plan{Steps: make([]plan.Step, len(a.Work.Steps))}
	return taskOf(&bare, t, true)
}
