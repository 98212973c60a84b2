package site

import (
	"math"

	"sailby/tasks/coat"
	"sailby/tasks/origin"
)

// Weather is the weather of one hour.
type Weather struct {
	Air   float64 // C
	Steel float64 // C, of the work itself: colder than air on clear nights, hotter in the sun
	Dew   float64 // C, over water
	RH    float64 // share, 0 to 1
	Wind  float64 // m/s, mean
	Gust  float64 // m/s
	Wet   bool    // rain, snow, fog or spray: work that must stay dry is closed
	Basis string  // where the hour comes from: "climate, poor day (one in 5)", "forecast x.csv"
	Usual bool    // wind and gust are worked out from monthly normals: nothing foreseen or measured tells them
}

// Series is the weather hour by hour: element i holds from Start+60i for one hour. All slices are
// equally long; hours beyond the shortest are not known.
type Series struct {
	Start                           Minute
	Air, Steel, Dew, RH, Wind, Gust []float64 // as in Weather
	Wet                             []bool
	Basis                           []string
	Usual                           []bool // may be left out: no hour's wind is worked out from normals
}

func (s Series) hours() int {
	return min(len(s.Air), len(s.Steel), len(s.Dew), len(s.RH), len(s.Wind), len(s.Gust), len(s.Wet), len(s.Basis))
}

// End is the first minute after the last hour.
func (s Series) End() Minute { return s.Start + 60*Minute(s.hours()) }

// At gives the weather of the hour that m lies in; it is not ok outside the series.
func (s Series) At(m Minute) (w Weather, ok bool) {
	if m < s.Start || m >= s.End() {
		return Weather{}, false
	}
	i := int((m - s.Start) / 60)
	usual := i < len(s.Usual) && s.Usual[i]
	return Weather{s.Air[i], s.Steel[i], s.Dew[i], s.RH[i], s.Wind[i], s.Gust[i], s.Wet[i], s.Basis[i], usual}, true
}

// Figures gives the numbers of the hour that m lies in, for `why`; none outside the series.
func (s Series) Figures(m Minute) []origin.Figure {
	w, ok := s.At(m)
	if !ok {
		return nil
	}
	how := w.Basis
	air := origin.Worked("air", w.Air, "C", how)
	dew := origin.Worked("dew point", w.Dew, "C", how)
	return []origin.Figure{
		air, dew, origin.Worked("steel", w.Steel, "C", how),
		origin.Worked("steel above dew point", w.Steel-w.Dew, "K", "steel - dew point"),
		origin.Worked("relative humidity", 100*w.RH, "%", "Magnus formula with the WMO coefficients", air, dew),
		origin.Worked("wind", w.Wind, "m/s", how), origin.Worked("gusts", w.Gust, "m/s", how),
	}
}

// add appends one hour; the dew point is held at or below the air and gives the humidity.
func (s *Series) add(w Weather) {
	w.Dew = min(w.Dew, w.Air)
	w.RH = coat.RelativeHumidity(w.Air, w.Dew)
	s.Air, s.Steel, s.Dew, s.RH = append(s.Air, w.Air), append(s.Steel, w.Steel), append(s.Dew, w.Dew), append(s.RH, w.RH)
	s.Wind, s.Gust, s.Wet, s.Basis = append(s.Wind, w.Wind), append(s.Gust, w.Gust), append(s.Wet,
		w.Wet), append(s.Basis, w.Basis)
	s.Usual = append(s.Usual, w.Usual)
}

// With gives a copy in which the forecast or the readings stand in place of every hour that they cover.
// What they do not tell stays as it was: steel keeps its distance from the air, gusts their
// share of the wind.
func (s Series) With(f *Forecast) Series {
	out := Series{Start: s.Start}
	for m := s.Start; m < s.End(); m += 60 {
		w, _ := s.At(m)
		if f != nil {
			if o, ok := f.at(m + 30); ok {
				w = o.over(w, f)
			}
		}
		out.add(w)
	}
	return out
}

// over puts what was observed over the planned hour.
func (o observation) over(w Weather, f *Forecast) Weather {
	off, factor := w.Steel-w.Air, gustFactor
	if w.Wind > 0 {
		factor = max(1, w.Gust/w.Wind)
	}
	w.Air, w.Dew, w.Steel = o.air, o.dew, o.air+off
	if !math.IsNaN(o.steel) {
		w.Steel = o.steel
	}
	if !math.IsNaN(o.wind) {
		w.Wind, w.Gust, w.Usual = o.wind, o.wind*factor, false
	}
	if !math.IsNaN(o.gust) {
		w.Gust, w.Usual = max(o.gust, w.Wind), false
	}
	if o.wetKnown {
		w.Wet = o.wet
	}
	w.Basis = f.kind() + " " + f.Name
	return w
}
