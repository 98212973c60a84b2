package agenda

import (
	"fmt"

	"sailby/plan"
	"sailby/report/clean"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// Stretch is the longest that somebody may work without a break before it is worth a word, and Break the
// shortest pause that counts as one, both in minutes (common practice; the law of the land may ask for more).
const (
	Stretch = 360
	Break   = 20
)

// NoMeals says, for each place in the order of the plan, who works longest there without a break by the plan,
// where that is more than Stretch: breaks come only from opening hours and people's hours, and a place that
// is always open gives none.
func NoMeals(a *plan.Answer) []string {
	type worst struct {
		who  string
		span hours.Span
	}
	var order []string
	most := map[string]worst{}
	where := map[string]*Shift{}
	for _, s := range Shifts(a) {
		place := PlaceLabel(s.Place)
		for _, q := range s.People {
			run := hours.Span{}
			for _, e := range q.Entries {
				if run.Len() == 0 || e.From-run.To >= Break {
					run = e.Span
				}
				run.To = max(run.To, e.To)
				if run.Len() <= Stretch || run.Len() <= most[place].span.Len() {
					continue
				}
				if where[place] == nil {
					order = append(order, place)
				}
				most[place], where[place] = worst{clean.Line(q.Name), run}, s
			}
		}
	}
	var out []string
	for _, place := range order {
		w := most[place]
		out = append(out, fmt.Sprintf("%s gives no break: by this plan %s works %s at a stretch, from %s on. Write breaks into its opening hours, or into people's hours.",
			place, w.who, quantity.Hours(w.span.Len()), When(w.span.From, where[place].Zone)))
	}
	return out
}
