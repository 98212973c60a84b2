package expand

import (
	"fmt"
	"math"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/tasks/site"
)

// winds gives every lift by hook in the open, where the hours of a place have their weather, the gust at
// 10 m above which it is not worked (R25).
func (x *expander) winds() {
	for _, s := range x.w.Steps {
		if s.Class != Hands || s.Absent || s.HandsOn == 0 || s.Task.Kind != tasks.Lift && s.Task.Kind != tasks.Move || s.Place.Hourly(s.Face) == nil {
			continue
		}
		if f, ok := x.stopGust(s); ok {
			s.Gust = f
			s.Estimate.Facts = append(s.Estimate.Facts, f)
		}
	}
}

// stopGust gives the gust at 10 m at which a lift stops: with the least mass and the largest sail that the
// open order leaves it. ok is false where nothing swings, or no limit is known.
func (x *expander) stopGust(s *Step) (origin.Figure, bool) {
	r := s.Rigging
	if r == nil {
		return gearGust(s)
	}
	if may := r.lifting().MayGust; may.Pos.Given() && r.Swings() {
		gear := r.gearLimit()
		low := origin.Written("permitted gust", may.Value, "m/s", may.Pos.Origin("gust limit"))
		if gear.Value < low.Value {
			low = gear
		}
		return r.atTen(low), true
	}
	if !r.Swings() {
		return origin.Figure{}, false
	}
	sure, open := x.split(s)
	low := r.gearLimit()
	least, err1 := r.s.stage(r.Task, onto(sure, open, true))
	if most, err2 := r.s.stage(r.Task, onto(sure, open, false)); err1 == nil && err2 == nil {
		load := most.Load
		load.Mass, load.From = least.Load.Mass, least.Load.From
		if res, known, err := r.wind(load); known && err == nil {
			low = res.Limit
		}
	}
	return r.atTen(low), true
}

// atTen turns a gust at the tip into that at 10 m.
func (r *Rigging) atTen(low origin.Figure) origin.Figure {
	tip := r.lifting().Tip
	if !tip.Pos.Given() {
		low.Name = "gust above which it is not lifted"
		return low
	}
	share := lift.TipShare(tip.Value)
	return origin.Worked("gust at 10 m above which it is not lifted", low.Value/share.Value, "m/s", "permitted gust / gust at the tip over gust at 10 m", low, share)
}

// windNotes tells of the lifts that stand still for wind in some hours.
func (x *expander) windNotes(add func(tasks.Pos, string, ...any)) {
	for _, s := range x.w.Steps {
		if s.Gust.Name == "" || s.Rigging == nil || s.Rigging.lifting().MayGust.Pos.Given() || len(x.w.gusty(s, x.w.Span)) == 0 {
			continue
		}
		add(s.Task.Pos, "%s: lifted in gusts up to %.1f m/s, by its gear, mass and sail; some hours have more. Whoever plans the lift may state another (`gust limit`)",
			s.Task.Label(), math.Floor(s.Gust.Value*10)/10)
	}
}

// Swings says whether the load hangs free while it is moved.
func (r *Rigging) Swings() bool {
	if r.Way == lift.ByHands || r.Way == lift.ByTrolley || r.Way == lift.ByJack {
		return false
	}
	return r.Task.Kind == tasks.Lift || r.Kit != nil || r.Task.By != ""
}

// gearLimit gives the gust that the gear permits, where the load's sail is not known.
func (r *Rigging) gearLimit() origin.Figure {
	if r.Kit != nil && r.Kit.Gust.Value > 0 {
		return origin.Written("permitted gust", r.Kit.Gust.Value, "m/s", r.Kit.Gust.Pos.Origin("gust limit of "+r.Kit.Name))
	}
	return lift.UsualGust()
}

// gearGust gives the gust that gear states, of a lift of which nothing else is known.
func gearGust(s *Step) (origin.Figure, bool) {
	for _, u := range s.Kit {
		if u.Kit.Gust.Value > 0 {
			return origin.Written("gust above which it is not lifted", u.Kit.Gust.Value, "m/s", u.Kit.Gust.Pos.Origin("gust limit of "+u.Kit.Name)), true
		}
	}
	return origin.Figure{}, false
}

// gusty gives when a lift stands still for wind.
func (w *Work) gusty(s *Step, in hours.Span) []site.Span {
	series := s.Place.Hourly(s.Face)
	if series == nil || s.Gust.Name == "" {
		return nil
	}
	return series.ClosedBy(func(h site.Weather) []string {
		if g := felt(s.Task, h).Gust; tooGusty(g, s.Gust.Value) {
			return []string{fmt.Sprintf("gusts %.1f m/s, lifted up to %.1f m/s (%s)", g, math.Floor(s.Gust.Value*10)/10, h.Basis)}
		}
		return nil
	}, int64(in.From), int64(in.To))
}

// tooGusty leaves room for the last digits of a sum.
func tooGusty(gust, limit float64) bool { return gust > limit*(1+1e-9) }
