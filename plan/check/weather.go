package check

import (
	"math"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// magnus is the exponent of the vapour pressure over water at t °C.
func magnus(t float64) float64 { return 17.62 * t / (243.12 + t) }

// settles gives the temperature at which water or, below freezing, frost settles out of air.
func settles(w site.Weather, frozen bool) float64 {
	dew := math.Min(w.Dew, w.Air)
	if dew >= 0 || !frozen {
		return dew
	}
	g := magnus(dew)
	return 272.62 * g / (22.46 - g)
}

// felt gives the hour's weather at a step's workface; ok is false where nothing is known, all where no weather
// holds.
func felt(s *expand.Step, t hours.Minute) (w site.Weather, ok, none bool) {
	series := s.Place.Hourly(s.Face)
	if series == nil {
		return w, false, true
	}
	w, ok = series.At(int64(t))
	if s.Face != nil && s.Face.Sheltered {
		w.Wet, w.Wind, w.Gust = false, 0, 0
	}
	return w, ok, false
}

// paintable says whether a coat may be put on in a minute, what comes after left aside (R25).
func paintable(s *expand.Step, w site.Weather) bool {
	p := s.Paint
	humid := math.Exp(magnus(math.Min(w.Dew, w.Air)) - magnus(w.Steel))
	return wetAllowed(s, w) && w.Air >= p.ApplyMin-slackK && w.Steel <= p.ApplyMax+slackK && (p.RHMin == 0 || humid >= p.RHMin-slackShare)
}

// wetAllowed says whether a film that is not dry may be out in a minute (R25).
func wetAllowed(s *expand.Step, w site.Weather) bool {
	p := s.Paint
	method := s.Task.Method
	if method == "" || s.Name == "stripe" {
		method = "brush"
	}
	wind := p.WindMax[method]
	if wind == 0 {
		wind = usualWind[method]
	}
	above := p.DewSpread
	if above == 0 {
		above = spread
	}
	return w.Steel >= p.ApplyMin-slackK && w.Steel-settles(w, w.Steel < above) >= above-slackK &&
		(p.RHMax == 0 || w.RH <= p.RHMax+slackShare) && w.Wind <= wind+slackK && !w.Wet
}

// untilDry closes the minutes of a coat after which, before the film has dried so far, a minute comes that it may not
// be out in (R25).
func (c *checker) untilDry(l line, s *expand.Step) {
	p := s.Paint
	frost := math.Min(0, p.ApplyMin)
	if len(p.HardDry) > 0 {
		c.holdsOut(l, s, p.HardDry.Rate, func(w site.Weather) bool { return w.Steel >= frost-slackK })
	}
	until := p.TouchDry
	switch p.LimitsUntil {
	case "applied":
		return
	case "hard dry":
		until = p.HardDry
	}
	if len(until) > 0 {
		c.holdsOut(l, s, until.Rate, func(w site.Weather) bool { return wetAllowed(s, w) })
	}
}

// holdsOut goes through the minutes backwards: bad is the next minute that is not allowed, dry the first by which a film
// of the minute has gathered the whole of its time, which never comes later for an earlier minute.
func (c *checker) holdsOut(l line, s *expand.Step, rate func(celsius float64) float64, allowed func(site.Weather) bool) {
	n := int(c.span.To - c.lo)
	gained, fine := make([]float64, n), make([]bool, n)
	var last site.Weather
	for i := range gained {
		w, ok, _ := felt(s, c.lo+hours.Minute(i))
		if i > 0 && w == last { // the hour goes on
			gained[i], fine[i] = gained[i-1], fine[i-1]
			continue
		}
		last, gained[i], fine[i] = w, gains(s, rate, c.lo+hours.Minute(i)), ok && allowed(w)
	}
	bad, dry, sum := n+1, n, 0.0 // sum is what the minutes after this one gain up to dry
	for i := n - 1; i >= 0; i-- {
		for dry > i+1 && sum-gained[dry-1] >= 1-2e-9 {
			dry--
			sum -= gained[dry]
		}
		first := dry
		if sum < 1-2e-9 {
			first = n // not dry as far as is looked at
		}
		if bad < first {
			l.on[i] = false
		}
		if !fine[i] {
			bad = i
		}
		sum += gained[i]
	}
}

// keeps dry says whether a fresh film is not lost in a minute.
func keepsDry(s *expand.Step, w site.Weather) bool {
	return w.Steel >= s.Paint.ApplyMin-slackK && w.Steel >= settles(w, w.Steel < 0)-slackK && !w.Wet
}

// weather adds what R25 asks to be open for a coat or a preparation.
func (c *checker) weather(r *row, need func(line, string, string, string)) {
	s := r.s
	if s.Class != expand.Hands || s.Working == 0 || s.Place.Hourly(s.Face) == nil {
		return
	}
	switch {
	case s.Paint != nil:
		l := c.line(false)
		stays := hours.Minute(math.Ceil(s.Paint.DryHours*60 - 1e-6))
		bad := c.hi + stays + 1 // the next minute in which the film would be lost
		for t := c.hi + stays; t >= c.lo; t-- {
			w, ok, _ := felt(s, t)
			if t < c.hi {
				l.on[t-c.lo] = ok && paintable(s, w) && bad > t+stays
			}
			if !ok || !keepsDry(s, w) {
				bad = t
			}
		}
		c.untilDry(l, s)
		need(l, "R25", s.Paint.Name, "may not be put on: weather, or what would be lost in it")
	case s.Task.Kind == tasks.Prep && !wipes(s.Task), s.Mends:
		need(c.dryAir(s), "R25", "surface preparation", "would turn: damp or wet")
	case s.Gust.Value > 0:
		l := c.line(false)
		for t := c.lo; t < c.hi; t++ {
			w, ok, _ := felt(s, t)
			l.on[t-c.lo] = ok && (w.Usual || w.Gust <= s.Gust.Value*(1+1e-6))
		}
		need(l, "R25", "the wind", "is stronger than it may be lifted in")
	}
}

// dryAir is when prepared steel keeps its grade.
func (c *checker) dryAir(s *expand.Step) line {
	l := c.line(true)
	for t := c.lo; t < c.hi; t++ {
		if w, ok, none := felt(s, t); !none {
			l.on[t-c.lo] = ok && w.Steel-settles(w, w.Steel < spread) >= spread-slackK && !w.Wet
		}
	}
	return l
}
