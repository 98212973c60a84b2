package expand

import (
	"fmt"
	"math"
	"sort"
	"time"

	"sailby/tasks"
	"sailby/tasks/coat"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
	"sailby/tasks/site"
)

// Nature lists the spans of the work's span in which weather and water close a hands-on step (R25,
// R26), each with the reason in words, in order of their starts; spans may overlap. Reach, light and
// hire are not in it. Cost: O(hours of the span) a step.
func (w *Work) Nature(s *Step) []site.Span { return w.NatureIn(s, w.Span) }

// NatureIn is Nature for a part of the work's span; reasons are those of the hours in it.
func (w *Work) NatureIn(s *Step, in hours.Span) []site.Span {
	if s.Class != Hands || s.Absent || s.Working == 0 {
		return nil
	}
	var out []site.Span
	switch {
	case s.Paint != nil:
		out = w.coatWeather(s, in)
	case s.Mends:
		out = w.dampAir(s.Task, in)
	case s.Task.Kind == tasks.Prep:
		out = w.damp(s.Task, in)
	case s.Gust.Name != "":
		out = w.gusty(s, in)
	}
	for _, shut := range w.water(s) {
		shut.From, shut.To = max(shut.From, int64(in.From)), min(shut.To, int64(in.To))
		if shut.From < shut.To {
			out = append(out, shut)
		}
	}
	sort.SliceStable(out, func(i, j int) bool { return out[i].From < out[j].From })
	return out
}

// felt is the weather as it is at a workface: no rain and no wind where it is sheltered.
func felt(t *tasks.Task, w site.Weather) site.Weather {
	if t.Face != nil && t.Face.Sheltered {
		w.Wet, w.Wind, w.Gust = false, 0, 0
	}
	return w
}

// coatWeather gives when a coat may not be put on, and when what is put on would be lost.
func (w *Work) coatWeather(s *Step, in hours.Span) []site.Span {
	series := s.Place.Hourly(s.Face)
	if series == nil {
		return nil
	}
	p, method := s.Paint.Paint, s.Method()
	from, to := int64(in.From), int64(in.To)
	out := series.ClosedBy(func(h site.Weather) []string {
		h = felt(s.Task, h)
		_, reasons := coat.MayApply(p, h.Air, h.Steel, h.RH, h.Wind, method)
		if h.Wet {
			reasons = append(reasons, "wet")
		}
		return reasons
	}, from, to)
	out = append(out, w.wetFilm(s, in)...)
	stays := int64(math.Ceil(p.DryHours*60 - 1e-6))
	if stays <= 0 {
		return out
	}
	lost := series.ClosedBy(func(h site.Weather) []string { return spoilt(p, felt(s.Task, h)) }, from, to+stays)
	for _, b := range lost {
		if a := max(from, b.From-stays); a < b.To-1 {
			out = append(out, site.Span{From: a, To: min(b.To-1, to), Why: fmt.Sprintf("must stay dry for %s: %s at %s", quantity.Hours(int(stays)), b.Why, w.told(s, b.From))})
		}
	}
	return out
}

func (w *Work) told(s *Step, at int64) string {
	return hours.Minute(at).In(zone(s.Place)).Format("Mon 15:04")
}

// Method gives how a coat is put on: the stripe by brush.
func (s *Step) Method() string {
	if s.Name == "stripe" {
		return coat.Brush
	}
	return coatMethod(s.Task)
}

// wetFilm gives when a coat may not be put on because, before it has dried so far, an hour comes that is bad for it:
// the paint's own limits until touch dry (or what it says), frost until hard dry. Each bad hour closes the
// minutes whose film is not yet so far when it comes; as a later film is never dry earlier, these end where it begins.
func (w *Work) wetFilm(s *Step, in hours.Span) (out []site.Span) {
	p, series := s.Paint.Paint, s.Place.Hourly(s.Face)
	hold := func(state, must string, judge func(site.Weather) []string) {
		curve, ok := p.State(state)
		if !ok {
			return
		}
		film := (&expander{w: w}).film(curve, s.Paint, s.Task)
		end := min(film.finish(in.To), w.Span.To) // what would be dry only beyond the span is judged as far as that
		for _, b := range series.ClosedBy(func(h site.Weather) []string { return judge(felt(s.Task, h)) }, int64(in.From), int64(max(in.To, end))) {
			to := min(hours.Minute(b.From), in.To)
			n := sort.Search(max(0, int(to-in.From)), func(k int) bool { return film.finish(in.From+hours.Minute(k)+1) > hours.Minute(b.From) })
			if a := in.From + hours.Minute(n); a < to {
				out = append(out, site.Span{From: int64(a), To: int64(to), Why: fmt.Sprintf("%s until %s: %s at %s", must, state, b.Why, w.told(s, b.From))})
			}
		}
	}
	if until := p.HeldUntil(); until != "applied" {
		hold(until, "must keep within its limits", func(h site.Weather) []string {
			_, why := coat.MayStay(p, h.Air, h.Steel, h.RH, h.Wind, s.Method())
			if h.Wet {
				why = append(why, "wet")
			}
			return why
		})
	}
	hold("hard dry", "must not freeze", func(h site.Weather) []string {
		if coat.Freezes(p, h.Steel) {
			return []string{fmt.Sprintf("steel %.1f C", h.Steel)}
		}
		return nil
	})
	return out
}

// spoilt says what harms a film in its first hours: cold, dew, rain.
func spoilt(p coat.Paint, h site.Weather) []string {
	var out []string
	if h.Steel < p.ApplyMin {
		out = append(out, fmt.Sprintf("steel %.1f C is below the least %.1f C", h.Steel, p.ApplyMin))
	}
	if dew := settles(h.Dew, h.Steel); h.Steel < dew {
		out = append(out, fmt.Sprintf("steel %.1f C is below the dew point %.1f C", h.Steel, dew))
	}
	if h.Wet {
		out = append(out, "wet")
	}
	return out
}

// settles gives the temperature below which water settles on steel: the dew point, or the frost point where both
// are below freezing.
func settles(dew, steel float64) float64 {
	if dew < 0 && steel < 0 {
		return coat.FrostPoint(dew)
	}
	return dew
}

// damp gives when surface preparation may not be done and prepared steel turns; nil where weather
// does not bear on it.
func (w *Work) damp(t *tasks.Task, in hours.Span) []site.Span {
	if t.Place.Hourly(t.Face) == nil {
		return nil
	}
	if p, ok := (&expander{w: w}).preparation(t); !ok || p.MaxWait <= 0 {
		return nil
	}
	return w.dampAir(t, in)
}

// dampAir gives when steel that is bared or abraded would not keep its grade.
func (w *Work) dampAir(t *tasks.Task, in hours.Span) []site.Span {
	series := t.Place.Hourly(t.Face)
	if series == nil {
		return nil
	}
	return series.ClosedBy(func(h site.Weather) []string {
		h = felt(t, h)
		ok, reasons := coat.MayHold(h.Air, h.Steel, h.RH)
		if ok {
			reasons = nil
		}
		if h.Wet {
			reasons = append(reasons, "wet")
		}
		return reasons
	}, int64(in.From), int64(in.To))
}

func zone(p *tasks.Place) *time.Location {
	if p.Zone == nil {
		return time.UTC
	}
	return p.Zone
}

// Covered gives the minutes of the work's span in which a workface is under water (R26); ok is false
// where no water comes.
func (w *Work) Covered(f *tasks.Workface) (hours.Set, bool) {
	if !f.Floods() {
		return nil, false
	}
	all := hours.Set{w.Span}
	tide := f.Place.Tide
	if tide == nil || !f.Level.Pos.Given() && !f.CoversAt.Pos.Given() {
		return all.Less(w.Window.Slots(f.Reach)), true
	}
	var dry []hours.Span
	for k := 1; k < len(tide.Waters); k++ { // piece by piece: the table may have holes
		from, to := max(int64(w.Span.From), tide.Waters[k-1].At), min(int64(w.Span.To), tide.Waters[k].At)
		if from >= to {
			continue
		}
		if spans, err := tide.Reach(true, f.Covers(), from, to); err == nil {
			for _, s := range spans {
				dry = append(dry, hours.Span{From: hours.Minute(s.From), To: hours.Minute(s.To)})
			}
		}
	}
	return all.Less(hours.NewSet(dry...)), true
}

// water gives when what a step does would not be fit for water before it comes.
func (w *Work) water(s *Step) []site.Span {
	covered, floods := w.Covered(s.Face)
	if !floods || len(covered) == 0 {
		return nil
	}
	t := s.Task
	var ready func(hours.Minute) hours.Minute
	why := ""
	switch {
	case t.Covered != nil && *t.Covered:
		return nil
	case s.Paint != nil:
		x := &expander{w: w}
		film := x.film(s.Paint.ImmersionMin, s.Paint, t)
		ready, why = film.finish, s.Paint.Name+" put on then is not fit for water"
	case t.Covered != nil:
		stands := hours.Minute(0)
		if t.Standing.Pos.Given() {
			stands = hours.Minute(whole((&expander{w: w}).pick(t.Standing)))
		}
		if stands == 0 {
			return nil
		}
		ready, why = func(m hours.Minute) hours.Minute { return m + stands }, "it must stand "+quantity.Hours(int(stands))
	default:
		return nil
	}
	var out []site.Span
	for _, dry := range (hours.Set{w.Span}).Less(covered) {
		if dry.To >= w.Span.To {
			continue // nothing is known beyond
		}
		n := sort.Search(dry.Len()+1, func(k int) bool { return ready(dry.From+hours.Minute(k)) > dry.To })
		last := dry.From + hours.Minute(n) - 1 // the last finish that is ready in time
		if from := max(dry.From, last); from < dry.To {
			out = append(out, site.Span{From: int64(from), To: int64(dry.To),
				Why: fmt.Sprintf("%s before it is covered at %s", why, dry.To.In(zone(s.Place)).Format("Mon 15:04"))})
		}
	}
	return out
}
