package site

import (
	"fmt"
	"math"
	"time"

	"sailby/tasks/origin"
)

// Normal is the long-run mean of one month at a place.
type Normal struct {
	AirLeast    float64 // C, mean of the coldest moment of each day, -45 to 60
	AirGreatest float64 // C, mean of the hottest moment of each day
	Dew         float64 // C, mean dew point; no higher than AirGreatest
	Wind        float64 // m/s, mean, 0 to 40
	WetDays     float64 // days with 1 mm or more
}

// Climate is what is known of the weather before there is a forecast. Zero settings mean the
// defaults, which Figures lists with their origins.
type Climate struct {
	Months map[time.Month]Normal // those of the job at least
	Poor   float64               // the poor day is passed with this chance: 0.2, one day in five; up to 0.5
	Spread float64               // K, standard deviation of a day's air about the normal: 2.5; up to 15
	Steel  *SteelRule            // nil means the default
}

// Outlook is the climate hour by hour in three weathers. Plans use Poor for what cold, damp,
// wind and rain hinder, Warm for what heat shortens (pot life, longest wait before the next
// coat), and show Average beside them.
type Outlook struct{ Poor, Average, Warm Series }

const (
	defaultPoor   = 0.2
	defaultSpread = 2.5
	hottestAfter  = 2 * 60 // minutes after the sun's transit
	gustFactor    = 1.5
)

func (c Climate) poor() float64 {
	if c.Poor == 0 {
		return defaultPoor
	}
	return c.Poor
}

func (c Climate) spread() float64 {
	if c.Spread == 0 {
		return defaultSpread
	}
	return c.Spread
}

// sigmas is how many standard deviations the poor day lies from the mean: the normal quantile.
func (c Climate) sigmas() float64 { return math.Sqrt2 * math.Erfinv(1-2*c.poor()) }

// windFactor is the poor day's wind over the mean: Rayleigh's distribution, P(v > w) =
// exp(-pi/4 (w/mean)^2), solved for w/mean.
func (c Climate) windFactor() float64 { return math.Sqrt(-4 / math.Pi * math.Log(c.poor())) }

// Figures lists what the outlook assumes beyond the monthly normals.
func (c Climate) Figures() []origin.Figure {
	poor := origin.House("chance that a day is worse than the poor day", c.poor(), "",
		"one day in five is planned for, not the average")
	spread := origin.House("day-to-day spread of air temperature", c.spread(), "K",
		"standard deviation about the monthly normal; inland winters have more")
	return append([]origin.Figure{poor, spread,
		origin.Worked("poor day's air below normal", c.sigmas()*c.spread(), "K",
			"normal quantile x spread; the dew point stays as it is", poor, spread),
		origin.Worked("poor day's wind over the mean", c.windFactor(), "", "Rayleigh distribution of wind speeds", poor),
		origin.House("gusts over mean wind", gustFactor, "", "open ground; more in the lee of buildings"),
		origin.House("hottest after the sun's highest", hottestAfter, "min", "coldest at sunrise; half a cosine between"),
		origin.Published("persistence of wet days", persistence, "",
			"Tel Aviv in December, data of Gabriel and Neumann (1962): 213 of 326 wet after wet, 117 of 511 wet after dry"),
	}, c.Steel.rule().figures()...)
}

// Hourly works the outlook out for every hour that [from, to) touches, at a place. Least and
// greatest air come at sunrise and two hours after the sun's highest, with half a cosine between,
// moving from month to month through the mid-month values. On the poor day the air is colder
// by the spread at the normal dew point, the wind is that which one day in five passes,
// and nights are clear for the steel: for each limit alone that is the one-in-five day, for all
// together a rarer one. Wet days are as many as one window in five passes, spread evenly,
// the first day wet, each wet for 24 hours.
//
// Errors: a month of the window without normals, values out of range, a span that runs backwards
// or over more than a year, a position off the globe.
func (c Climate) Hourly(from, to Minute, lat, lon float64) (Outlook, error) {
	if err := c.check(from, to, lat, lon); err != nil {
		return Outlook{}, err
	}
	start := from - mod(from, 60)
	days, err := c.days(start, to, lat, lon)
	if err != nil {
		return Outlook{}, err
	}
	first, n := counted(days, start, to)
	share := 0.0
	for _, d := range days[first : first+n] {
		share += d.wet / float64(n)
	}
	spells, err := SpellsOf(min(share, 1))
	if err != nil {
		return Outlook{}, err
	}
	one := "one in " + origin.Trim(1/c.poor())
	rule := c.Steel.rule()
	shift := c.sigmas() * c.spread()
	plan := func(air, wind float64, night, sun float64, wet int, basis string) Series {
		s := Series{Start: start}
		steel := newSteel(rule.Lag, night, sun)
		for m := start - day; m < to; m += 60 {
			i, d := dayOf(days, m+30)
			a := dayAir(days, i, float64(m)+30) + air
			w := Weather{Air: a, Steel: steel.hour(a, sunAltitude(lat, lon, float64(m)+30)), Dew: d.dew,
				Wind: d.wind * wind,
				Gust: d.wind * wind * gustFactor, Wet: evenly(min(max(i-first, 0), n-1), wet, n), Basis: basis, Usual: true}
			if m >= start {
				s.add(w)
			}
		}
		return s
	}
	return Outlook{
		Poor: plan(-shift, c.windFactor(), rule.NightPoor, 0, spells.PoorWetDays(n, c.poor()),
			fmt.Sprintf("climate, poor day (%s)", one)),
		Average: plan(0, 1, rule.NightAverage, rule.SunAverage, int(math.Round(share*float64(n))), "climate, average day"),
		Warm:    plan(shift, 1, 0, rule.SunWarm, 0, fmt.Sprintf("climate, warm day (%s)", one)),
	}, nil
}

// counted gives the first day of the window that counts for the number of wet days, and how many
// count: a day of which less than two hours lie in the window goes with its neighbour.
func counted(days []climateDay, from, to Minute) (first, n int) {
	first, n = margin, len(days)-2*margin
	if n > 1 && days[first].to-from < 120 {
		first, n = first+1, n-1
	}
	if n > 1 && to-days[first+n-1].from < 120 {
		n--
	}
	return first, n
}

// evenly says whether day i of n is one of k, spread evenly, the first one among them.
func evenly(i, k, n int) bool { return i*k%n < k }

func mod(a, b Minute) Minute { return (a%b + b) % b }

func (c Climate) check(from, to Minute, lat, lon float64) error {
	if err := checkSpan(from, to); err != nil {
		return err
	}
	if to-from > 366*day {
		return advice("ask for one window at a time", "the time from %s to %s is longer than a year",
			moment(from), moment(to))
	}
	if err := checkPlace(lat, lon); err != nil {
		return err
	}
	if !(c.poor() >= 0.001 && c.poor() <= 0.5) {
		return advice("write 0.2 for one day in five",
			"chance %v of a day worse than planned is not between 0.001 and 0.5", c.Poor)
	}
	if !(c.spread() > 0 && c.spread() <= 15) {
		return advice("2 to 3 K by the sea, 4 to 6 K inland in winter",
			"day-to-day spread %v K is not between 0 and 15", c.Spread)
	}
	if err := c.Steel.rule().check(); err != nil {
		return err
	}
	for m := time.January; m <= time.December; m++ {
		if n, ok := c.Months[m]; ok {
			if err := n.check(m); err != nil {
				return err
			}
		}
	}
	return nil
}

func (n Normal) check(m time.Month) error {
	switch {
	case !(n.AirLeast >= -45 && n.AirGreatest <= 60 && n.AirLeast <= n.AirGreatest):
		return advice("give the mean least and greatest air of a day in C",
			"%s: air from %v to %v C is out of range or upside down", m, n.AirLeast, n.AirGreatest)
	case !(n.Dew >= -60 && n.Dew <= n.AirGreatest):
		return advice("give the mean dew point in C",
			"%s: dew point %v C is not between -60 and the greatest air, %v C", m, n.Dew, n.AirGreatest)
	case !(n.Wind >= 0 && n.Wind <= 40):
		return advice("give the mean wind in m/s (1 kn is 0.51 m/s)", "%s: wind %v m/s is not between 0 and 40", m, n.Wind)
	case !(n.WetDays >= 0 && n.WetDays <= 31):
		return advice("give the days with 1 mm or more", "%s: %v wet days are not between 0 and 31", m, n.WetDays)
	}
	return nil
}
