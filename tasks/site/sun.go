package site

import "math"

// SunSource says where sun times come from, for outputs.
const SunSource = "NOAA solar calculation, long form, after Meeus, Astronomical Algorithms; " +
	"zenith 90.833 degrees, civil twilight 96"

// Altitudes of the sun's centre, degrees, without refraction.
const (
	riseAltitude  = -0.833 // upper limb on a sea horizon: 34' refraction, 16' half the disc (NOAA, zenith 90.833)
	civilAltitude = -6.0   // civil twilight: outdoor work can go on without lamps
)

// SunDay is the sun's one arc over a place: the rise before and the set after the noon that is
// nearest to the middle of the day asked for. Near midsummer in high latitudes a set may
// fall after midnight. Times err on the dark side: rise and dawn are rounded up to the whole
// minute, set and dusk down. A time counts only where its Has flag is true.
type SunDay struct {
	Noon                              Minute // upper transit, to the nearest minute
	Rise, Set                         Minute
	CivilDawn, CivilDusk              Minute
	HasRise, HasSet, HasDawn, HasDusk bool
	PolarDay                          bool // the sun is up from midnight to midnight
	PolarNight                        bool // the sun does not rise
	LightAllNight                     bool // never darker than civil twilight
	DarkAllDay                        bool // never lighter than civil twilight
}

// Sun gives rise, set and civil twilight at a place for the day that starts at dayStartUTC,
// usually local midnight, by the NOAA long form after Meeus. Against precise ephemerides it is
// good to some seconds up to 70 degrees of latitude; hills, and air colder or denser than
// usual, move the seen rise by minutes. At the poles the sun rises and sets once a year: on all
// other days a polar flag holds.
//
// Errors: a position off the globe, or a day outside 1900 to 2200.
func Sun(latDeg, lonDeg float64, dayStartUTC Minute) (SunDay, error) {
	if err := checkPlace(latDeg, lonDeg); err != nil {
		return SunDay{}, err
	}
	if dayStartUTC < firstMinute || dayStartUTC > lastMinute {
		return SunDay{}, advice("give dates between 1900 and 2200",
			"day start at minute %d is out of all proportion", dayStartUTC)
	}
	noon := transit(lonDeg, dayStartUTC+day/2)
	d := SunDay{Noon: noon}
	up := arc(latDeg, lonDeg, noon, riseAltitude)
	d.Rise, d.HasRise, d.Set, d.HasSet, d.PolarDay, d.PolarNight = up.from, up.hasFrom, up.to, up.hasTo, up.always, up.never
	light := arc(latDeg, lonDeg, noon, civilAltitude)
	d.CivilDawn, d.HasDawn, d.CivilDusk, d.HasDusk = light.from, light.hasFrom, light.to, light.hasTo
	d.LightAllNight, d.DarkAllDay = light.always, light.never
	return d, nil
}

// Daylight gives the light minutes of [from, to): from sunrise to sunset, or with civil from
// civil dawn to civil dusk, merged across midnights of polar days.
//
// Errors: as for Sun, and a span that runs backwards or over more than 11 years.
func Daylight(lat, lon float64, from, to Minute, civil bool) ([]Span, error) {
	if err := checkPlace(lat, lon); err != nil {
		return nil, err
	}
	if err := checkSpan(from, to); err != nil {
		return nil, err
	}
	return minutesIn(sunKnots(lon, from, to), func(m Minute) bool {
		return sunAltitude(lat, lon, float64(m)) >= lightAltitude(civil)
	}), nil
}

// LightAt says whether the minute from m on is light, by the sun's altitude at both its ends; it
// is the test behind Daylight, for checking minute by minute. Positions off the globe are dark.
func LightAt(lat, lon float64, m Minute, civil bool) bool {
	if checkPlace(lat, lon) != nil || m < firstMinute || m > lastMinute {
		return false
	}
	h := lightAltitude(civil)
	return sunAltitude(lat, lon, float64(m)) >= h && sunAltitude(lat, lon, float64(m+1)) >= h
}

func lightAltitude(civil bool) float64 {
	if civil {
		return civilAltitude
	}
	return riseAltitude
}

type sunArc struct {
	from, to       Minute
	hasFrom, hasTo bool
	always, never  bool
}

// arc finds when the sun is above altitude within half a day of noon.
func arc(lat, lon float64, noon Minute, altitude float64) sunArc {
	pass := func(m Minute) bool { return sunAltitude(lat, lon, float64(m)) >= altitude }
	first, last := noon-day/2, noon+day/2
	spans := minutesIn(sunKnots(lon, first, last), pass)
	if len(spans) == 0 {
		return sunArc{never: true}
	}
	var a sunArc
	for _, s := range spans { // more than one only around a midnight in polar twilight
		if s.From > first && s.From <= noon && !a.hasFrom {
			a.from, a.hasFrom = s.From, true
		}
		if s.To < last && s.To >= noon {
			a.to, a.hasTo = s.To, true
		}
	}
	a.always = len(spans) == 1 && spans[0].From == first && spans[0].To == last
	return a
}

// sunKnots are moments between which the sun crosses an altitude at most once: every half hour
// and the transits, where it turns.
func sunKnots(lon float64, from, to Minute) []Minute {
	const step = 30
	knots := []Minute{from}
	add := func(m Minute) {
		if m > knots[len(knots)-1] && m < to {
			knots = append(knots, m)
		}
	}
	noon := transit(lon, from)
	next := from
	for next < to {
		for _, turn := range [2]Minute{noon, noon + day/2} {
			for ; next < turn; next += step {
				add(next)
			}
			add(turn)
		}
		noon = transit(lon, noon+day)
	}
	return append(knots, to)
}

// transit gives the sun's upper transit nearest to m, to the minute.
func transit(lon float64, m Minute) Minute {
	_, eot := sunPlace(float64(m))
	at := float64(m)
	dayOf := math.Floor(at/1440) * 1440
	noon := dayOf + 720 - 4*lon - eot // true solar time 720: m + equation of time + 4 lon = 720
	noon += 1440 * math.Round((at-noon)/1440)
	_, eot = sunPlace(noon)
	dayOf = math.Round((noon-720+4*lon)/1440) * 1440
	return Minute(math.Round(dayOf + 720 - 4*lon - eot))
}

// sunAltitude gives the altitude of the sun's centre in degrees, without refraction, at UTC
// minute m (fractions allowed).
func sunAltitude(lat, lon, m float64) float64 {
	decl, eot := sunPlace(m)
	hour := rad((math.Mod(m, 1440)+eot+4*lon)/4 - 180)
	phi, d := rad(lat), rad(decl)
	s := math.Sin(phi)*math.Sin(d) + math.Cos(phi)*math.Cos(d)*math.Cos(hour)
	return deg(math.Asin(max(-1, min(1, s))))
}

// sunPlace gives the sun's declination in degrees and the equation of time in minutes at UTC
// minute m: NOAA long form, low-accuracy solar coordinates of Meeus, Astronomical Algorithms,
// chapter 25 (mean longitude, equation of centre, nutation term), equation of time chapter 28.
// Dynamical time is taken as UTC: about a minute, which moves the declination by 0.0003 degrees.
func sunPlace(m float64) (decl, eot float64) {
	t := (m/1440 + 2440587.5 - 2451545) / 36525 // Julian centuries from 2000-01-01 12:00
	long := 280.46646 + t*(36000.76983+0.0003032*t)
	anom := rad(357.52911 + t*(35999.05029-0.0001537*t))
	ecc := 0.016708634 - t*(0.000042037+0.0000001267*t)
	centre := math.Sin(anom)*(1.914602-t*(0.004817+0.000014*t)) +
		math.Sin(2*anom)*(0.019993-0.000101*t) + math.Sin(3*anom)*0.000289
	node := rad(125.04 - 1934.136*t)
	app := rad(long + centre - 0.00569 - 0.00478*math.Sin(node))
	obl := rad(23 + (26+(21.448-t*(46.815+t*(0.00059-t*0.001813)))/60)/60 + 0.00256*math.Cos(node))
	decl = deg(math.Asin(math.Sin(obl) * math.Sin(app)))
	y := math.Tan(obl/2) * math.Tan(obl/2)
	l := rad(long)
	eot = 4 * deg(y*math.Sin(2*l)-2*ecc*math.Sin(anom)+4*ecc*y*math.Sin(anom)*math.Cos(2*l)-
		0.5*y*y*math.Sin(4*l)-1.25*ecc*ecc*math.Sin(2*anom))
	return decl, eot
}

func rad(d float64) float64 { return d * math.Pi / 180 }
func deg(r float64) float64 { return r * 180 / math.Pi }
