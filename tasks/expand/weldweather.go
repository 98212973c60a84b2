package expand

import (
	"fmt"
	"math"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// weldHours says how much of the time that a weld may be worked in breaks the limits of its process by
// the weather that is planned with: most wind in m/s at the arc, least air in °C, wet steel. These are notes: a
// shelter and a torch change them.
func (x *expander) weldHours(t *tasks.Task, s *site.Series, wind, air float64) []string {
	from, to := x.w.Window.Opens, x.w.Window.Closes
	open := t.Place.Open.Spans(zone(t.Place), hours.Span{From: from, To: to}, nil)
	windy, wet, cold, n := 0, 0, 0, 0
	most, least := 0.0, math.Inf(1)
	for m := from; m < to; m += 60 {
		h, ok := s.At(int64(m))
		if !ok || !open.Has(m) {
			continue
		}
		h = felt(t, h)
		n++
		most, least = math.Max(most, h.Wind), math.Min(least, h.Air)
		if h.Wind > wind {
			windy++
		}
		if h.Wet || h.Steel < h.Dew {
			wet++
		}
		if h.Air < air {
			cold++
		}
	}
	var out []string
	say := func(hours int, format string, args ...any) {
		if hours > 0 {
			out = append(out, fmt.Sprintf(format, args...)+fmt.Sprintf(": in %d of the %d open hours of the window by the weather planned with", hours, n))
		}
	}
	say(windy, "too much wind at the arc without a shelter (up to %.1f m/s)", most)
	say(wet, "steel wet by rain or dew: dry and warm it first")
	say(cold, "too cold to weld (down to %.0f °C): warm a shelter", least)
	return out
}
