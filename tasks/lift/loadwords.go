package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// describe tells the plan in one sentence.
func (p LoadPlan) describe(goods []Goods, vehicles []Vehicle) string {
	last := 0
	for _, t := range p.Trips {
		last = max(last, t.Number)
	}
	if last <= 1 {
		return fmt.Sprintf("all %d things go in one run", len(goods))
	}
	if !p.OneTrip.OK {
		return fmt.Sprintf("one run is %.0f kg over; it goes in %d runs", math.Ceil(p.OneTrip.Need-p.OneTrip.Have), last)
	}
	return fmt.Sprintf("the beds are too small for one run; it goes in %d runs", last)
}

// refuse says by how much it does not fit and what would do.
func (p *LoadPlan) refuse(goods []Goods, vehicles []Vehicle) {
	room := 0.0
	for _, v := range vehicles {
		room += math.Max(0, v.forGoods().Value) * float64(min(v.trips(), pulls(vehicles, v)))
	}
	over := p.OneTrip.Need - room
	if over <= rounding*room {
		p.Reason = "no way was found to stow it all: the mass would go, the beds or the order of use do not"
		p.Nearest = "another run, a longer bed, or things that may be stacked"
		return
	}
	p.Proved = true
	p.Reason = fmt.Sprintf("%.0f kg of goods is %.0f kg over the %.0f kg that all runs take", p.OneTrip.Need, math.Ceil(over), math.Floor(room))
	p.Nearest = fmt.Sprintf("another run or vehicle for at least %.0f kg", math.Ceil(over))
	leave, least := -1, math.Inf(1)
	for i, g := range goods {
		if g.Mass >= over && g.Mass < least {
			leave, least = i, g.Mass
		}
	}
	if leave >= 0 {
		p.Nearest += fmt.Sprintf(", or send %q (%s kg) ahead", goods[leave].Name, origin.Trim(least))
	}
}
