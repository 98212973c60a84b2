package site

import (
	"fmt"
	"strings"

	"sailby/tasks/quantity"
)

// Band is a pair of limits, both ends allowed. The zero value sets no limit.
type Band struct {
	Min, Max       float64
	HasMin, HasMax bool
}

// AtLeast, AtMost and Between make bands.
func AtLeast(v float64) Band           { return Band{Min: v, HasMin: true} }
func AtMost(v float64) Band            { return Band{Max: v, HasMax: true} }
func Between(least, most float64) Band { return Band{least, most, true, true} }

// Limits are what the weather must be for some work: a coat, a weld in the open, a lift.
type Limits struct {
	Air, Steel Band // C
	Spread     Band // K, steel above the dew point; coats want at least 3 K (FHWA-RD-98-084)
	RH         Band // share, 0 to 1
	Wind, Gust Band // m/s
	Dry        bool // closed in wet hours
}

// slack keeps a reading that stands at a limit within it, in spite of rounding.
const slack = 1e-9

// measure is one limit with the way to say that it is broken.
type measure struct {
	band  func(Limits) Band
	value func(Weather) float64
	name  string
	unit  string
	scale float64 // printed value = value * scale
}

var measures = []measure{
	{func(l Limits) Band { return l.Air }, func(w Weather) float64 { return w.Air }, "air", "C", 1},
	{func(l Limits) Band { return l.Steel }, func(w Weather) float64 { return w.Steel }, "steel", "C", 1},
	{func(l Limits) Band { return l.Spread }, func(w Weather) float64 { return w.Steel - w.Dew },
		"steel above dew point", "K", 1},
	{func(l Limits) Band { return l.RH }, func(w Weather) float64 { return w.RH }, "humidity", "%", 100},
	{func(l Limits) Band { return l.Wind }, func(w Weather) float64 { return w.Wind }, "wind", "m/s", 1},
	{func(l Limits) Band { return l.Gust }, func(w Weather) float64 { return w.Gust }, "gusts", "m/s", 1},
}

// Check refuses limits that are no numbers or shut out everything.
func (l Limits) Check() error {
	for _, m := range measures {
		b := m.band(l)
		switch {
		case b.HasMin && !finite(b.Min):
			return advice("write a number", "least %s %v is not a number", m.name, b.Min)
		case b.HasMax && !finite(b.Max):
			return advice("write a number", "greatest %s %v is not a number", m.name, b.Max)
		case b.HasMin && b.HasMax && b.Min > b.Max:
			return advice("write the smaller one as min", "least %s %.4g %s is above the greatest, %.4g %s",
				m.name, b.Min*m.scale, m.unit, b.Max*m.scale, m.unit)
		}
	}
	return nil
}

// breach is one broken limit: which, which end of it, and the value.
type breach struct {
	measure int // -1 for wet
	low     bool
	have    float64
}

func (l Limits) breaches(w Weather) []breach {
	var out []breach
	for i, m := range measures {
		b, v := m.band(l), m.value(w)
		if b.HasMin && !(v >= b.Min-slack) {
			out = append(out, breach{i, true, v})
		} else if b.HasMax && !(v <= b.Max+slack) {
			out = append(out, breach{i, false, v})
		}
	}
	if l.Dry && w.Wet {
		out = append(out, breach{measure: -1})
	}
	return out
}

// say puts a breach in words with both numbers.
func (l Limits) say(b breach) string {
	if b.measure < 0 {
		return "wet, must be dry"
	}
	m := measures[b.measure]
	limit := m.band(l)
	have := fmt.Sprintf("%.1f %s", b.have*m.scale, m.unit)
	if !finite(b.have) {
		have = "not known"
	}
	if b.low {
		return fmt.Sprintf("%s %s, at least %.4g %s needed", m.name, have, limit.Min*m.scale, m.unit)
	}
	return fmt.Sprintf("%s %s, at most %.4g %s allowed", m.name, have, limit.Max*m.scale, m.unit)
}

// Judge gives every limit that the weather breaks, in words with both numbers; none if it is fit.
func (l Limits) Judge(w Weather) []string {
	var out []string
	for _, b := range l.breaches(w) {
		out = append(out, l.say(b))
	}
	return out
}

const unknownWeather = "the weather is not known: no climate or forecast for these hours"

// Closed gives the hours of [from, to) that break the limits. Hours that follow each other and break
// the same limits are one span; its reason gives the worst value of each beside the limit, and
// says from how many hours. Hours outside the series are closed, as nothing is known of them.
func (s Series) Closed(l Limits, from, to Minute) []Span {
	var out []Span
	var run []breach
	flush := func() {
		if len(run) == 0 {
			return
		}
		last := &out[len(out)-1]
		said := make([]string, len(run))
		for i, b := range run {
			said[i] = l.say(b)
		}
		last.Why = strings.Join(said, "; ")
		if last.To-last.From > 60 {
			last.Why += " (worst of " + quantity.Hours(int(last.To-last.From)) + ")"
		}
		run = nil
	}
	s.eachHour(from, to, func(a, b Minute, w Weather, known bool) {
		if !known {
			flush()
			out = append(out, Span{a, b, unknownWeather})
			return
		}
		found := l.breaches(w)
		if len(found) > 0 && sameLimits(run, found) {
			out[len(out)-1].To = b
			for i := range run {
				run[i].have = worse(run[i], found[i])
			}
			return
		}
		flush()
		if len(found) > 0 {
			out, run = append(out, Span{From: a, To: b}), found
		}
	})
	flush()
	return out
}

func sameLimits(a, b []breach) bool {
	if len(a) != len(b) {
		return false
	}
	for i := range a {
		if a[i].measure != b[i].measure || a[i].low != b[i].low {
			return false
		}
	}
	return true
}

func worse(a, b breach) float64 {
	if a.low {
		return min(a.have, b.have)
	}
	return max(a.have, b.have)
}

// ClosedBy gives the hours of [from, to) to which judge objects, each with its words; hours that
// follow each other are joined only where the words are the same. Judge may be a paint's own rule.
func (s Series) ClosedBy(judge func(Weather) []string, from, to Minute) []Span {
	var out []Span
	s.eachHour(from, to, func(a, b Minute, w Weather, known bool) {
		why := unknownWeather
		if known {
			why = strings.Join(judge(w), "; ")
		}
		if why == "" {
			return
		}
		if n := len(out); n > 0 && out[n-1].To == a && out[n-1].Why == why {
			out[n-1].To = b
			return
		}
		out = append(out, Span{a, b, why})
	})
	return out
}

// eachHour visits the hours of [from, to), cut at its ends, and what lies outside the series as one
// unknown piece at either end.
func (s Series) eachHour(from, to Minute, visit func(a, b Minute, w Weather, known bool)) {
	if from < min(to, s.Start) {
		visit(from, min(to, s.Start), Weather{}, false)
	}
	end := s.End()
	for a := max(from, s.Start); a < min(to, end); {
		b := min(s.Start+((a-s.Start)/60+1)*60, to)
		w, _ := s.At(a)
		visit(a, b, w, true)
		a = b
	}
	if a := max(from, end); a < to {
		visit(a, to, Weather{}, false)
	}
}
