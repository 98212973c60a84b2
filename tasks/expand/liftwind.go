package expand

import (
	"fmt"
	"math"
	"strings"

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

// windNotes tells of the lifts that stand still for wind in some hours, and of those whose hours nobody has
// forecast yet: the usual wind closes none of them, and is told as a share of the time.
func (x *expander) windNotes(add func(tasks.Pos, string, ...any)) {
	for _, s := range x.w.Steps {
		if s.Gust.Name == "" {
			continue
		}
		limit, by, way := math.Floor(s.Gust.Value*10)/10, "by its gear, mass and sail", ". Whoever plans the lift may state another (`gust limit`), no higher than the gear's"
		if r := s.Rigging; r == nil {
			by, way = "by its gear", ""
		} else if r.lifting().MayGust.Pos.Given() {
			by, way = "as whoever plans it says", ""
		}
		if len(x.w.gusty(s, x.w.Span)) > 0 && way != "" {
			add(s.Task.Pos, "%s: lifted in gusts up to %.1f m/s, %s; some hours have more%s", s.Task.Label(), limit, by, way)
		}
		if low, high, month := x.usualGusts(s); high >= 0.05 {
			share := fmt.Sprintf("%.0f", 100*high)
			if least := fmt.Sprintf("%.0f", 100*low); least != share {
				share = least + " to " + share
			}
			text := fmt.Sprintf("%s: lifted in gusts up to %.1f m/s, %s; no forecast tells its hours yet, and in %s the usual gusts there pass that for %s %% of the time. The plan does not wait for it: keep other hours in hand, and give a forecast when there is one%s",
				s.Task.Label(), limit, by, month, share, way)
			add(s.Task.Pos, "%s", text)
			x.w.Winds = append(x.w.Winds, tasks.Note{Pos: s.Task.Pos, Text: text})
		}
	}
}

// usualGusts gives the least and the greatest share of time, over the hours of the window that no forecast or
// reading tells, in which gusts pass those of a lift: with mean wind U and gusts g U, P(gust > G) = exp(-pi/4 (G / (g U))^2),
// Rayleigh's distribution; and the months of those hours.
func (x *expander) usualGusts(s *Step) (low, high float64, months string) {
	series := s.Place.Hourly(s.Face)
	if series == nil || s.Place.Climate.Average == nil || s.Face != nil && s.Face.Sheltered {
		return 0, 0, ""
	}
	low = 1
	var named []string
	in := x.w.Window
	for m := in.Opens; m < in.Closes; m += 60 {
		h, ok := series.At(int64(m))
		mean, known := s.Place.Climate.Average.At(int64(m))
		if !ok || !known || !h.Usual || mean.Gust <= 0 {
			continue
		}
		p := math.Exp(-math.Pi / 4 * math.Pow(s.Gust.Value/mean.Gust, 2))
		low, high = math.Min(low, p), math.Max(high, p)
		if n := m.In(zone(s.Place)).Month().String(); len(named) == 0 || named[len(named)-1] != n {
			named = append(named, n)
		}
	}
	return low, high, strings.Join(named, " and ")
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

// gusty gives when a lift stands still for wind that was foreseen or measured: what monthly normals give is no
// reason to close an hour, and no proof (R25).
func (w *Work) gusty(s *Step, in hours.Span) []site.Span {
	series := s.Place.Hourly(s.Face)
	if series == nil || s.Gust.Name == "" {
		return nil
	}
	return series.ClosedBy(func(h site.Weather) []string {
		if g := felt(s.Task, h).Gust; !h.Usual && tooGusty(g, s.Gust.Value) {
			return []string{fmt.Sprintf("gusts %.1f m/s, lifted up to %.1f m/s (%s)", g, math.Floor(s.Gust.Value*10)/10, h.Basis)}
		}
		return nil
	}, int64(in.From), int64(in.To))
}

// tooGusty leaves room for the last digits of a sum.
func tooGusty(gust, limit float64) bool { return gust > limit*(1+1e-9) }
