package instance

import (
	"fmt"
	"time"

	"sailby/plan"
	"sailby/plan/check"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// AsJob writes the instance as a job whose minutes are its units: one task for each activity at
// a place that is always open, a kit for each resource, a link for each lag. The independent
// checker then judges its plans as it judges every other.
func (in *Instance) AsJob() *expand.Work {
	place := &tasks.Place{Name: "site", Zone: time.UTC, Open: hours.Always, FaceFactor: tasks.Amount{Value: 1}}
	job := &tasks.Job{Name: in.Name, Zone: time.UTC, Places: []*tasks.Place{place},
		Duty: tasks.Amount{Value: 720}, Rest: tasks.Amount{Value: 660}}
	end := hours.Minute(in.Horizon() + 1)
	w := &expand.Work{Job: job, Window: expand.Window{Place: place, Opens: 0, Closes: end}, Span: hours.Span{From: 0, To: end + 1440}}
	job.Window = &tasks.Closure{Place: place, Opens: 0, Closes: end}
	for k, c := range in.Capacity {
		job.Kit = append(job.Kit, &tasks.Kit{Name: fmt.Sprintf("R%d", k+1), Count: c})
	}
	for i, d := range in.Length {
		t := &tasks.Task{Name: fmt.Sprint(i), Kind: tasks.Plain, Place: place}
		job.Tasks = append(job.Tasks, t)
		s := &expand.Step{Index: i, Task: t, Name: string(tasks.Plain), Class: expand.Hands, Place: place, HandsOn: d, Working: d,
			Site: true, NotBefore: 0, Deadline: end}
		for k, n := range in.Demand[i] {
			if n > 0 {
				s.Kit = append(s.Kit, expand.Use{Kit: job.Kit[k], Count: n})
			}
		}
		w.Steps = append(w.Steps, s)
	}
	for _, l := range in.Lags {
		link := expand.Link{From: w.Steps[l.From], To: w.Steps[l.To], FromEnd: tasks.Start, ToEnd: tasks.Start, Min: l.Min, Max: expand.NoMax, Why: "lag"}
		if l.Min < 0 { // a longest wait, seen from the other side
			link.From, link.To, link.Min, link.Max = link.To, link.From, expand.NoMin, -l.Min
		}
		w.Links = append(w.Links, link)
	}
	return w
}

// CheckAsJob has a schedule judged by the independent checker; nil if it obeys every rule.
func (in *Instance) CheckAsJob(starts []int) error {
	if len(starts) != len(in.Length) {
		return fmt.Errorf("%s: %d starts for %d activities", in.Name, len(starts), len(in.Length))
	}
	w := in.AsJob()
	p := &plan.Plan{}
	for i, s := range w.Steps {
		st := plan.Step{Task: s.Task.Name, Step: s.Name, Start: hours.Minute(starts[i]), Finish: hours.Minute(starts[i] + in.Length[i])}
		if in.Length[i] > 0 {
			st.Pieces = []hours.Span{{From: st.Start, To: st.Finish}}
		}
		p.Steps = append(p.Steps, st)
	}
	if b := check.Plan(w, p); len(b) > 0 {
		return fmt.Errorf("%s: %s", in.Name, b[0].String())
	}
	return nil
}
