package check

import (
	"fmt"
	"math"

	"sailby/tasks/expand"
	"sailby/tasks/lift"
)

// usualGust is the gust limit of gear that states none, m/s (R25).
const usualGust = 9.8

// sail checks that the gust up to which a lift was planned is no stronger than what is taken up then may
// have (R25): the gear's limit, less for a large sail on a light load, at the tip.
func (c *checker) sail(r *row, j expand.Judgement) {
	series := r.s.Place.Hourly(r.s.Face)
	by := r.s.Rigging.Way
	if series == nil || by == lift.ByHands || by == lift.ByTrolley || by == lift.ByJack {
		return
	}
	limit := usualGust
	for _, u := range r.s.Kit {
		if u.Kit.Gust.Value > 0 && u.Kit == r.s.Rigging.Kit {
			limit = u.Kit.Gust.Value
		}
	}
	gear := limit
	area, drag := math.Max(j.Load.Length*j.Load.Width, math.Max(j.Load.Length*j.Load.Height, j.Load.Width*j.Load.Height))/1e6, 2.4
	tip := 10.0
	if l := r.s.Task.Lifting; l != nil {
		if l.Sail.Value > 0 {
			area = l.Sail.Value
		}
		switch l.Body {
		case lift.BoxBody:
			drag = 2
		case lift.RoundBody:
			drag = 1
		}
		if l.Tip.Value > 0 {
			tip = l.Tip.Value / 1000
		}
	}
	tonnes := j.Load.Mass / 1000
	if area >= 0.5*tonnes {
		limit *= math.Min(1, math.Sqrt(1.2*tonnes/(area*drag)))
	}
	if l := r.s.Task.Lifting; l != nil && l.MayGust.Value > 0 {
		limit = math.Min(gear, l.MayGust.Value)
	}
	limit *= 1.4 / (math.Pow(tip/10, 0.14) + 0.4)
	if r.s.Gust.Value == 0 && !r.s.Rigging.Swings() {
		return
	}
	if r.s.Gust.Value > limit+slackWind || r.s.Gust.Value == 0 {
		c.add("R25", r, fmt.Sprintf("%.2f m/s", limit), fmt.Sprintf("%.2f m/s", r.s.Gust.Value), "is planned up to a gust that what is lifted then may not have")
	}
}

// slackWind is how far the arithmetic of others may be off, m/s.
const slackWind = 1e-3
