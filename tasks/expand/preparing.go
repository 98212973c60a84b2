package expand

import (
	"fmt"

	"sailby/tasks"
	"sailby/tasks/origin"
	"sailby/weld"
)

// prepareJob estimates a preparing or finishing job that is no cut: bevelling, gouging,
// grinding, drilling, tacking, at the crew's own rate where the job file gives one.
func (x *expander) prepareJob(t *tasks.Task, h hands) hands {
	var a weld.Activity
	for _, b := range weld.Activities() {
		if b.Name == t.By {
			a = b
		}
	}
	amount, key, example := t.Length.Value/1000, "length", "length: 3 m"
	pos := t.Length.Pos
	switch a.Unit {
	case "kg/h":
		amount, key, example, pos = t.Mass.Value, "mass", "mass: 4 kg", t.Mass.Pos
	case "min each":
		amount, key, example, pos = float64(t.Count), "count", "count: 12", t.Pos
	}
	if amount <= 0 {
		h.fault, h.hint = fmt.Errorf("nothing says how much there is to do: %s has no %s", a.Name, key), "add "+example+", or hours"
		return h
	}
	own := x.w.Job.Welding.Activities[a.Name]
	l, err := weld.Prepare(a.Name, amount, t.Thickness.Value, own.Value)
	if err != nil {
		return h.failed(err)
	}
	f := l.Hours
	f.From = append([]origin.Figure(nil), f.From...)
	for i := range f.From {
		switch g := &f.From[i]; {
		case g.Name == "amount":
			g.Origin = pos.Origin(key)
		case g.Name == "rate" && own.Pos.Given():
			g.Origin = own.Pos.Origin(a.Name)
		}
	}
	h.minutes, h.est.Figure, h.est.Notes = spread(float64(l.HandsOn)), f, l.Warnings
	h.uses(l.Consumables, 1)
	if c, ok := weld.GougeWith(t.Thickness.Value); ok && (a.Name == "gouge out" || a.Name == "back-gouge") {
		h.est.Notes = append(h.est.Notes, fmt.Sprintf("where it is gouged by air carbon-arc: a carbon of %s mm at %s to %s A cuts %s mm deep in one pass",
			origin.Trim(c.Diameter), origin.Trim(c.MinCurrent), origin.Trim(c.MaxCurrent), origin.Trim(t.Thickness.Value)))
		if t.Current.Pos.Given() { // by carbon
			h.uses([]weld.Consumable{c.Carbons(t.Length.Value)}, 1)
		}
	}
	return h
}
