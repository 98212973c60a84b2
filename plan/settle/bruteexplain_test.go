package settle

import (
	"fmt"
	"slices"

	"sailby/plan"
)

// differs says what in a plan that the checker accepts is not among what is tried out; "" if
// nothing is: for the message of a failed test.
func (b *brute) differs(p *plan.Plan) string {
	all := make([]*option, len(b.opts))
	for i, s := range p.Steps {
		k := slices.IndexFunc(b.opts[i], func(o option) bool {
			return o.Start == s.Start && o.Finish == s.Finish && slices.Equal(o.People, s.People) && slices.Equal(o.Relief, s.Relief)
		})
		if k < 0 {
			return fmt.Sprintf("%s / %s is not among the %d options of its step", s.Task, s.Step, len(b.opts[i]))
		}
		all[i] = &b.opts[i][k]
	}
	for i, x := range all {
		for _, y := range all[:i] {
			if !b.together(x, y, &nothing) {
				return fmt.Sprintf("%s / %s and %s / %s do not stand together", x.Task, x.Step.Step, y.Task, y.Step.Step)
			}
		}
	}
	if !b.holds(all, &nothing) {
		return "kit, room, power or an order rule"
	}
	return "the keepers of fire watches differ"
}
