package site

import (
	"math"
	"sort"
)

// Forecast is weather from a file: a forecast, or readings taken at the place. See Series.With.
type Forecast struct {
	Name     string
	Readings bool // measured, not foreseen
	Notes    []string
	rows     []observation // in order of time
}

// observation is one row; NaN where the file says nothing.
type observation struct {
	at                          Minute
	air, dew, steel, wind, gust float64 // C, C, C, m/s, m/s
	wet, wetKnown               bool
}

// How far apart rows may be for the time between them to count as known. Conditions are to be
// checked every 4 hours (FHWA-RD-98-084); forecasts come three- or six-hourly.
const (
	forecastGap Minute = 6 * 60
	readingsGap Minute = 4 * 60
)

func (f *Forecast) kind() string {
	if f.Readings {
		return "readings"
	}
	return "forecast"
}

// Covers gives the spans of time for which the file has weather.
func (f *Forecast) Covers() []Span {
	var out []Span
	for i, o := range f.rows {
		if n := len(out); n > 0 && out[n-1].To >= o.at {
			out[n-1].To = o.at + f.holds(i)
		} else {
			out = append(out, Span{From: o.at, To: o.at + f.holds(i)})
		}
	}
	return out
}

// holds is how long row i stands for: to the next row, or where that is too far off as long as the row
// before it did, an hour at least.
func (f *Forecast) holds(i int) Minute {
	gap := forecastGap
	if f.Readings {
		gap = readingsGap
	}
	if i+1 < len(f.rows) {
		if d := f.rows[i+1].at - f.rows[i].at; d <= gap {
			return d
		}
	}
	if f.Readings || i == 0 || f.rows[i].at-f.rows[i-1].at > gap {
		return 60
	}
	return max(60, f.rows[i].at-f.rows[i-1].at)
}

// at gives the weather at m: straight lines between rows, wet if either row is.
func (f *Forecast) at(m Minute) (observation, bool) {
	i := sort.Search(len(f.rows), func(i int) bool { return f.rows[i].at > m }) - 1
	if i < 0 || m >= f.rows[i].at+f.holds(i) {
		return observation{}, false
	}
	a := f.rows[i]
	if i+1 == len(f.rows) || f.rows[i].at+f.holds(i) < f.rows[i+1].at {
		return a, true
	}
	b := f.rows[i+1]
	x := float64(m-a.at) / float64(b.at-a.at)
	mix := func(a, b float64) float64 {
		if math.IsNaN(b) {
			return a
		}
		return a + (b-a)*x
	}
	return observation{m, mix(a.air, b.air), mix(a.dew, b.dew), mix(a.steel, b.steel), mix(a.wind, b.wind),
		mix(a.gust, b.gust),
		a.wet || b.wet, a.wetKnown && b.wetKnown || a.wet || b.wet}, true
}
