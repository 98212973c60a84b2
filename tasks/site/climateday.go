package site

import (
	"math"
	"time"
)

// margin is how many days before and after the window are worked out too: for the steel's memory and
// for the night that begins the first day.
const margin = 2

// climateDay is one day by the sun at the place, from one midnight by the sun to the next.
type climateDay struct {
	from, to         Minute
	coldest, hottest float64 // minutes
	least, greatest  float64 // air, C
	dew, wind, wet   float64 // C, m/s, chance of a wet day
}

// days gives the days that [from, to) touches, and margin days at either end. Those take their
// normals from the window's first and last day, so that only the window's months are needed.
func (c Climate) days(from, to Minute, lat, lon float64) ([]climateDay, error) {
	noon := transit(lon, from)
	if noon-day/2 > from {
		noon = transit(lon, noon-day)
	}
	first := noon
	var noons []Minute
	for i := -margin; i < 0; i++ {
		noons = append(noons, first+Minute(i)*day)
	}
	for last := first; ; {
		noons = append(noons, noon)
		if noon = transit(lon, noon+day); noon-day/2 >= to {
			for i := Minute(0); i < margin; i++ {
				noons = append(noons, last+(i+1)*day)
			}
			break
		}
		last = noon
	}
	out := make([]climateDay, len(noons))
	for i, noon := range noons {
		n, err := c.normal(noons[min(max(i, margin), len(noons)-1-margin)])
		if err != nil {
			return nil, err
		}
		sun, err := Sun(lat, lon, noon-day/2)
		if err != nil {
			return nil, err
		}
		d := climateDay{from: noon - day/2, coldest: float64(noon - day/2), hottest: float64(noon + hottestAfter),
			least: n.AirLeast, greatest: n.AirGreatest, dew: n.Dew, wind: n.Wind, wet: n.WetDays}
		if sun.HasRise {
			d.coldest = float64(sun.Rise)
		}
		out[i] = d
	}
	for i := range out {
		out[i].to = out[i].from + day
		if i+1 < len(out) {
			out[i].to = out[i+1].from
		}
	}
	return out, nil
}

// normal gives the normals of one day: straight lines through the mid-month values; flat where the
// neighbouring month is not given. WetDays is turned into a share of days.
func (c Climate) normal(m Minute) (Normal, error) {
	t := time.Unix(m*60, 0).UTC()
	here, ok := c.Months[t.Month()]
	if !ok {
		return Normal{}, advice("give its normals, or end the window before it",
			"the climate says nothing of %s", t.Month())
	}
	here.WetDays /= daysIn(t)
	at := float64(t.Day()) - 0.5 - daysIn(t)/2 // days after mid-month
	side := time.Date(t.Year(), t.Month()+1, 15, 0, 0, 0, 0, time.UTC)
	if at < 0 {
		side = time.Date(t.Year(), t.Month()-1, 15, 0, 0, 0, 0, time.UTC)
	}
	there, ok := c.Months[side.Month()]
	if !ok {
		return here, nil
	}
	there.WetDays /= daysIn(side)
	x := math.Abs(at) / ((daysIn(t) + daysIn(side)) / 2)
	mix := func(a, b float64) float64 { return a + (b-a)*x }
	return Normal{mix(here.AirLeast, there.AirLeast), mix(here.AirGreatest, there.AirGreatest),
		mix(here.Dew, there.Dew), mix(here.Wind, there.Wind), mix(here.WetDays, there.WetDays)}, nil
}

func daysIn(t time.Time) float64 {
	return float64(time.Date(t.Year(), t.Month()+1, 0, 0, 0, 0, 0, time.UTC).Day())
}

// dayOf finds the day that m lies in; moments beyond either end belong to the end day.
func dayOf(days []climateDay, m Minute) (int, climateDay) {
	for i, d := range days {
		if m < d.to {
			return i, d
		}
	}
	return len(days) - 1, days[len(days)-1]
}

// dayAir gives the air at minute m of day i: half a cosine from the last turning point to the next.
func dayAir(days []climateDay, i int, m float64) float64 {
	d := days[i]
	wave := func(from, to, a, b float64) float64 {
		x := min(max((m-from)/(to-from), 0), 1)
		return (a+b)/2 + (a-b)/2*math.Cos(math.Pi*x)
	}
	switch {
	case m < d.coldest:
		before := days[max(i-1, 0)]
		return wave(before.hottest, d.coldest, before.greatest, d.least)
	case m <= d.hottest:
		return wave(d.coldest, d.hottest, d.least, d.greatest)
	}
	after := days[min(i+1, len(days)-1)]
	return wave(d.hottest, after.coldest, d.greatest, after.least)
}
