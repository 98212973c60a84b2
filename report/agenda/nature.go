package agenda

import (
	"fmt"
	"math"
	"regexp"
	"slices"
	"sort"
	"strings"
	"time"

	"sailby/plan"
	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
	"sailby/tasks/site"
)

// day gives the span of a calendar day at a place.
func day(w *expand.Work, p *tasks.Place, d hours.Date) hours.Span {
	from, _ := hours.Instant(d, 0, Zone(w, p))
	to, _ := hours.Instant(d.Add(1), 0, Zone(w, p))
	return hours.Span{From: from, To: to}
}

// Tides writes the high and low waters of a day at a place: "high 04:23 3.66 m, low 10:33 0.74 m
// (on chart)"; "" where there is no table.
func Tides(w *expand.Work, p *tasks.Place, d hours.Date) string {
	if p == nil || p.Tide == nil {
		return ""
	}
	s := day(w, p, d)
	var parts []string
	for _, h := range p.Tide.Between(int64(s.From), int64(s.To)) {
		word := "low"
		if h.High {
			word = "high"
		}
		parts = append(parts, fmt.Sprintf("%s %s %.2f m", word, Clock(hours.Minute(h.At), Zone(w, p)), h.Metres))
	}
	if len(parts) == 0 {
		return "no tide known"
	}
	out := strings.Join(parts, ", ") + " on " + clean.Line(p.Tide.Datum)
	if p.Tide.NotForSafety {
		out += ", predicted from constants: not for safety"
	}
	return out
}

// Covers says when a workface is covered in a span and by when people are off it: "way off by
// 12:10, covered 12:40-18:05"; none where no water comes.
func Covers(w *expand.Work, f *tasks.Workface, in hours.Span) []string {
	set, floods := w.Covered(f)
	if !floods {
		return nil
	}
	var out []string
	for _, s := range set {
		off := s.From - hours.Minute(f.WayOff.Value)
		if s.To <= in.From || off >= in.To {
			continue
		}
		words := "covered until " + Clock(s.To, Zone(w, f.Place))
		if s.From > in.From {
			words = "covered " + Between(s, Zone(w, f.Place))
			words = "way off by " + Clock(off, Zone(w, f.Place)) + ", " + words
		}
		out = append(out, words)
	}
	return out
}

// Weathered is work that weather or water closes for part of a span.
type Weathered struct {
	Name   string // "primer by brush at hinge", "blast fender"
	Open   hours.Set
	Closed []site.Span // with the reasons, in order
	Step   *expand.Step
}

// Fit gives, for each paint, method and workface of the coats at a place and for its surface preparation,
// the hours of a span that nature leaves open, and why the others are closed. Work that nature never
// bears on is left out.
func Fit(w *expand.Work, p *tasks.Place, in hours.Span) []Weathered {
	var out []Weathered
	seen := map[string]bool{}
	for _, s := range w.Steps {
		if s.Place != p || s.Absent || s.Class != expand.Hands || s.Paint == nil && s.Task.Kind != tasks.Prep ||
			p.Hourly(s.Face) == nil && !s.Face.Floods() {
			continue
		}
		name := clean.Line(TaskLabel(s.Task))
		if s.Paint != nil {
			method := s.Task.Method
			if method == "" || s.Name == "stripe" {
				method = "brush"
			}
			name = clean.Line(s.Paint.Name) + " by " + method
			if s.Face != nil {
				name += " at " + clean.Line(s.Face.Name)
			}
		}
		if seen[name] {
			continue
		}
		seen[name] = true
		x := Weathered{Name: name, Step: s, Closed: append(w.NatureIn(s, in), underWater(w, s.Face, in)...)}
		sort.SliceStable(x.Closed, func(i, j int) bool { return x.Closed[i].From < x.Closed[j].From })
		var shut []hours.Span
		for _, c := range x.Closed {
			shut = append(shut, hours.Span{From: hours.Minute(c.From), To: hours.Minute(c.To)})
		}
		x.Open = hours.Set{in}.Less(hours.NewSet(shut...))
		out = append(out, x)
	}
	return out
}

// underWater gives when nobody works at a workface for the water: covered, or on the way off.
func underWater(w *expand.Work, f *tasks.Workface, in hours.Span) (out []site.Span) {
	covered, _ := w.Covered(f)
	add := func(from, to hours.Minute, why string) {
		if from, to = max(from, in.From), min(to, in.To); from < to {
			out = append(out, site.Span{From: int64(from), To: int64(to), Why: why})
		}
	}
	for _, s := range covered {
		add(s.From-hours.Minute(f.WayOff.Value), s.From, "way off before the water")
		add(s.From, s.To, "covered by the water")
	}
	return out
}

// FitWords writes the hours that nature leaves open, of work that it closes for part of the span:
// "primer by brush at hinge: 10:00-15:00".
func FitWords(w *expand.Work, p *tasks.Place, in hours.Span) []string {
	var out []string
	for _, x := range Fit(w, p, in) {
		if x.Open.Total() == in.Len() {
			continue // nothing closes it: nothing to say
		}
		words := "no hour"
		if x.Open.Total() > 0 {
			var parts []string
			for _, s := range x.Open {
				parts = append(parts, Between(s, Zone(w, p)))
			}
			words = strings.Join(parts, " and ")
		} else if why := mostly(x.Closed); why != "" {
			words += " (" + why + ")"
		}
		out = append(out, x.Name+": "+words)
	}
	return out
}

// ClosedWords gives the reasons of the hours that are closed, one line for each run of hours closed
// by the same limits, with the numbers of its first: of overlapping reasons the first.
func ClosedWords(w *expand.Work, p *tasks.Place, x Weathered) []string {
	type run struct {
		hours.Span
		key, why string
	}
	var runs []run
	told := hours.Minute(math.MinInt64)
	for _, c := range x.Closed {
		s := hours.Span{From: max(hours.Minute(c.From), told), To: hours.Minute(c.To)}
		if s.From >= s.To {
			continue
		}
		told = s.To
		key := strings.Map(wordsOnly, c.Why)
		if n := len(runs); n > 0 && runs[n-1].To == s.From && runs[n-1].key == key {
			runs[n-1].To = s.To
			continue
		}
		runs = append(runs, run{s, key, c.Why})
	}
	var out []string
	for _, r := range runs {
		out = append(out, Between(r.Span, Zone(w, p))+": "+r.why)
	}
	return out
}

// wordsOnly drops what numbers are written with.
func wordsOnly(r rune) rune {
	if r >= '0' && r <= '9' || r == '.' || r == '-' {
		return -1
	}
	return r
}

// WeatherWords writes the weather of a span that a place is planned with, and the average day
// beside it; "" where none is known.
func WeatherWords(p *tasks.Place, in hours.Span) string {
	if p == nil || p.Climate == nil || p.Climate.Hourly == nil {
		return ""
	}
	out := seriesWords(p.Climate.Hourly, in)
	if a := p.Climate.Average; a != nil && out != "" {
		if words := seriesWords(a, in); words != "" && words != out {
			out += "; " + words
		}
	}
	return out
}

// seriesWords writes the least and greatest values of a span with where they come from.
func seriesWords(s *site.Series, in hours.Span) string {
	var basis []string
	low, high := [4]float64{}, [4]float64{}
	wet, n := 0, 0
	for m := in.From; m < in.To; m += 60 {
		h, ok := s.At(int64(m))
		if !ok {
			continue
		}
		if !slices.Contains(basis, h.Basis) {
			basis = append(basis, h.Basis)
		}
		for i, v := range [4]float64{h.Air, h.Steel, h.Dew, h.Wind} {
			if n == 0 {
				low[i], high[i] = v, v
			}
			low[i], high[i] = math.Min(low[i], v), math.Max(high[i], v)
		}
		n++
		if h.Wet {
			wet++
		}
	}
	if n == 0 {
		return ""
	}
	rain := "dry"
	if wet == n {
		rain = "wet"
	} else if wet > 0 {
		rain = fmt.Sprintf("wet for %d of %d h", wet, n)
	}
	return fmt.Sprintf("%s: air %s °C, steel %s °C, dew point %s °C, wind up to %s m/s, %s", clean.Line(strings.Join(basis, ", ")),
		fromTo(low[0], high[0]), fromTo(low[1], high[1]), fromTo(low[2], high[2]), origin.Trim(math.Round(high[3]*10)/10), rain)
}

func fromTo(a, b float64) string {
	x, y := fmt.Sprintf("%.0f", a), fmt.Sprintf("%.0f", b)
	if x == y {
		return x
	}
	return x + " to " + y
}

// Hour gives the numbers of the hour that a step is planned in, with where they come from.
func Hour(s *expand.Step, m hours.Minute) []origin.Figure {
	series := s.Place.Hourly(s.Face)
	if series == nil {
		return nil
	}
	return series.Figures(int64(m))
}

// Getaway is what can be said of a craft that must get off again.
type Getaway struct {
	Place  *tasks.Place
	Neaped bool
	Words  string
}

// Getaways applies the rule for getting off again at every place whose tide names a craft (R26): by the plan, the
// water must come after the work there.
func Getaways(answer *plan.Answer) []Getaway {
	var out []Getaway
	w := answer.Work
	for _, p := range w.Job.Places {
		c := p.Sea.Craft
		if c == nil || p.Tide == nil {
			continue
		}
		g := Getaway{Place: p}
		in, by := c.Resolve(func(m tasks.Moment) (hours.Minute, bool) { at, _, ok := w.Window.At(m); return at, ok }, w.Window.Opens, w.Window.Closes)
		level := c.Needs.Value
		if p.Sea.AllowPos.Given() {
			if f, err := p.Sea.Allow.Level(false, level); err == nil {
				level = f.Value
			}
		}
		a, err := p.Tide.Neaped(level, int64(in), int64(workDone(answer, p)), int64(by))
		switch {
		case err != nil:
			g.Neaped, g.Words = true, "cannot be said: "+err.Error()
		default:
			g.Neaped, g.Words = a.Neaped, a.Why
		}
		if level != c.Needs.Value {
			g.Words += fmt.Sprintf(" (%.2f m and the allowance for pressure and surge)", c.Needs.Value)
		}
		g.Words = "Getting off again at " + PlaceLabel(p) + ": " + local(clean.Line(g.Words), Zone(w, p))
		out = append(out, g)
	}
	return out
}

// workDone gives when the work at a place is done in the plan: hands-on work, the standing time of tasks and fire
// watches; 0 without a plan, or where nothing is done there. Films may still cure.
func workDone(a *plan.Answer, p *tasks.Place) (done hours.Minute) {
	if a.Plan == nil {
		return 0
	}
	for i, s := range a.Work.Steps {
		if s.Place != p || s.Absent || s.Class == expand.Cure {
			continue
		}
		ps := a.Plan.Steps[i]
		done = max(done, ps.Finish)
		for _, watch := range ps.Watches {
			done = max(done, watch.To)
		}
	}
	return done
}

// utc is a moment as tide tables write it.
var utc = regexp.MustCompile(`\d{4}-\d\d-\d\d \d\d:\d\d UTC`)

// local turns the moments of a text, which are UTC, into those of the place.
func local(text string, zone *time.Location) string {
	return utc.ReplaceAllStringFunc(text, func(s string) string {
		at, err := time.Parse("2006-01-02 15:04 UTC", s)
		if err != nil {
			return s
		}
		return When(hours.Minute(at.Unix()/60), zone)
	})
}

// Neaped says whether some craft of an answer's job is not shown to get off again in time.
func Neaped(a *plan.Answer) bool {
	return a != nil && a.Work != nil && slices.ContainsFunc(Getaways(a), func(g Getaway) bool { return g.Neaped })
}

// DayWords gives what nature does on a day at a place, a sentence each: sun, tide, weather, and the hours in which
// what waits for weather may be done. None where the job file tells neither tide nor weather.
func DayWords(w *expand.Work, p *tasks.Place, d hours.Date) []string {
	if p == nil || p.Tide == nil && (p.Climate == nil || p.Climate.Hourly == nil) {
		return nil
	}
	var out []string
	s := &Shift{Place: p, Date: d, Zone: Zone(w, p)}
	if t := SunWords(s); t != "" {
		out = append(out, t)
	}
	if t := Tides(w, p, d); t != "" {
		out = append(out, t)
	}
	span := day(w, p, d)
	if x := WeatherWords(p, span); x != "" {
		out = append(out, x)
	}
	return append(out, FitWords(w, p, span)...)
}

// mostly gives the reason of the longest of some spans, the first of equals.
func mostly(shut []site.Span) string {
	why, longest := "", int64(0)
	for _, s := range shut {
		if s.To-s.From > longest {
			why, longest = s.Why, s.To-s.From
		}
	}
	return why
}
