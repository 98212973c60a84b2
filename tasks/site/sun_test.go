package site

import (
	"math"
	"testing"
	"time"

	"pgregory.net/rapid"
)

// at reads "2006-01-02 15:04" or with seconds as UTC; seconds are dropped by utc, kept by exact.
func exact(t testing.TB, text string) float64 {
	t.Helper()
	for _, layout := range []string{"2006-01-02 15:04:05", "2006-01-02 15:04", "2006-01-02"} {
		if v, err := time.Parse(layout, text); err == nil {
			return float64(v.Unix()) / 60
		}
	}
	t.Fatalf("bad time %q", text)
	return 0
}

func utc(t testing.TB, text string) Minute { t.Helper(); return Minute(math.Floor(exact(t, text))) }

// careful checks that got lies within a minute of want on the dark side, allowing slack seconds
// for the difference between ephemerides.
func careful(t *testing.T, what string, got Minute, ok bool, want float64, up bool) {
	t.Helper()
	const slack = 10.0 / 60
	if !ok {
		t.Errorf("%s: none, want %s", what, moment(Minute(want)))
		return
	}
	late := float64(got) - want
	if !up {
		late = -late
	}
	if late < -slack || late > 1+slack {
		t.Errorf("%s: %s is %.2f min on the dark side of the reference, want 0 to 1", what, moment(got), late)
	}
}

func TestSunAgainstReference(t *testing.T) {
	// Rise and set: npm suncalc 2.0.2, confirmed within 8 s by npm astronomy-engine 2.1.19.
	rows := []struct{ date, rise, set, dawn, dusk, rise55, set55, rise67, set67 string }{
		{"2026-04-01", "05:29:35", "18:39:28", "04:50:33", "19:18:43", "05:51:32", "19:01:30", "04:14:10", "17:59:44"},
		{"2026-04-08", "05:10:42", "18:54:23", "04:30:38", "19:34:42", "05:32:39", "19:16:25", "03:45:45", "18:24:18"},
		{"2026-04-15", "04:52:09", "19:09:20", "04:10:41", "19:51:06", "05:14:07", "19:31:22", "03:17:07", "18:49:30"},
		{"2026-04-22", "04:34:09", "19:24:19", "03:50:52", "20:07:56", "04:56:07", "19:46:21", "02:48:11", "19:15:36"},
		{"2026-04-30", "04:14:31", "19:41:24", "03:28:37", "20:27:41", "04:36:28", "20:03:26", "02:14:35", "19:46:54"},
		{"2026-06-21", "03:05:07", "20:58:33", "01:56:44", "22:06:55", "03:27:07", "21:20:33", "", ""},
		{"2026-12-21", "08:36:42", "15:19:26", "07:47:06", "16:09:02", "08:58:43", "15:41:26", "10:14:58", "11:45:08"},
	}
	for _, r := range rows {
		a, err := Sun(57, 0, utc(t, r.date))
		if err != nil {
			t.Fatal(err)
		}
		careful(t, r.date+" 57 N rise", a.Rise, a.HasRise, exact(t, r.date+" "+r.rise), true)
		careful(t, r.date+" 57 N set", a.Set, a.HasSet, exact(t, r.date+" "+r.set), false)
		careful(t, r.date+" 57 N dawn", a.CivilDawn, a.HasDawn, exact(t, r.date+" "+r.dawn), true)
		careful(t, r.date+" 57 N dusk", a.CivilDusk, a.HasDusk, exact(t, r.date+" "+r.dusk), false)
		b, _ := Sun(57, -5.5, utc(t, r.date))
		careful(t, r.date+" 57 N 5.5 W rise", b.Rise, b.HasRise, exact(t, r.date+" "+r.rise55), true)
		careful(t, r.date+" 57 N 5.5 W set", b.Set, b.HasSet, exact(t, r.date+" "+r.set55), false)
		c, _ := Sun(67, 14.5, utc(t, r.date))
		if r.rise67 == "" {
			if c.HasRise || c.HasSet || !c.PolarDay || c.PolarNight {
				t.Errorf("%s 67 N: want polar day without rise or set, have %+v", r.date, c)
			}
			continue
		}
		careful(t, r.date+" 67 N rise", c.Rise, c.HasRise, exact(t, r.date+" "+r.rise67), true)
		careful(t, r.date+" 67 N set", c.Set, c.HasSet, exact(t, r.date+" "+r.set67), false)
	}
}

func TestSunAlmanacExample(t *testing.T) {
	// Almanac for Computers (US Naval Observatory), worked example: 25 June 1990, 40.9 N 74.3 W,
	// zenith 90 deg 50': local mean time of rise ends at UT 9.441 h (05:26 EDT).
	d, err := Sun(40.9, -74.3, utc(t, "1990-06-25 04:00"))
	if err != nil {
		t.Fatal(err)
	}
	careful(t, "Almanac for Computers", d.Rise, d.HasRise, exact(t, "1990-06-25")+9.441*60, true)
}

func TestMidnightSun(t *testing.T) {
	// First and last days on which the lower transit stays above -0.833 degrees in 2026, from
	// npm astronomy-engine 2.1.19. A day here runs from transit to transit.
	for _, c := range []struct {
		lat         float64
		first, last string
	}{{67, "2026-06-02", "2026-07-09"}, {66.5, "2026-06-06", "2026-07-05"}, {66, "2026-06-12", "2026-06-29"}, {65.8, "2026-06-16", "2026-06-24"}} {
		polar := func(m Minute) bool { d, _ := Sun(c.lat, 0, m); return d.PolarDay }
		first, last := utc(t, c.first), utc(t, c.last)
		// An arc has a midnight at each end, so that a full polar day may be one shorter at each end.
		if !polar(first+day) || !polar(last-day) {
			t.Errorf("%v N: no polar day inside %s to %s", c.lat, c.first, c.last)
		}
		if polar(first-day) || polar(last+day) {
			t.Errorf("%v N: polar day outside %s to %s", c.lat, c.first, c.last)
		}
	}
	for m := utc(t, "2026-05-01"); m < utc(t, "2026-08-01"); m += day {
		if d, _ := Sun(65.7, 0, m); d.PolarDay {
			t.Errorf("65.7 N has a polar day on %s, the reference has none", moment(m))
		}
	}
	if d, _ := Sun(70, 25, utc(t, "2026-12-21")); !d.PolarNight || d.HasRise || d.DarkAllDay {
		t.Errorf("70 N at midwinter: want no rise but some twilight, have %+v", d)
	}
	if d, _ := Sun(-80, 0, utc(t, "2026-06-21")); !d.PolarNight || !d.DarkAllDay {
		t.Errorf("80 S in June: want polar night and dark, have %+v", d)
	}
	if d, _ := Sun(58.5, -3, utc(t, "2026-06-21")); !d.HasSet || d.LightAllNight {
		t.Errorf("58.5 N at midsummer: want a set and a dark hour, have %+v", d)
	}
	if d, _ := Sun(61, -1, utc(t, "2026-06-21")); !d.HasSet || !d.LightAllNight || d.HasDusk {
		t.Errorf("61 N at midsummer: want a set but no civil dusk, have %+v", d)
	}
}

func TestPolesDoNotBreakIt(t *testing.T) {
	for _, lat := range []float64{90, -90, 89.99, -89.99} {
		year, err := Daylight(lat, 0, utc(t, "2026-01-01"), utc(t, "2027-01-01"), false)
		if err != nil || len(year) == 0 || len(year) > 4 {
			t.Errorf("%v: want one long day in a year, have %d spans, %v", lat, len(year), err)
		}
	}
}

func TestDaylightLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		lat := rapid.Float64Range(-90, 90).Draw(t, "lat")
		lon := rapid.Float64Range(-180, 180).Draw(t, "lon")
		from := rapid.Int64Range(0, 100*366*day).Draw(t, "from")
		to := from + rapid.Int64Range(1, 3*day).Draw(t, "length")
		sun, err := Daylight(lat, lon, from, to, false)
		if err != nil {
			t.Fatal(err)
		}
		civil, _ := Daylight(lat, lon, from, to, true)
		inside := func(spans []Span, m Minute) bool {
			for _, s := range spans {
				if m >= s.From && m < s.To {
					return true
				}
			}
			return false
		}
		for m := from; m < to; m += 7 {
			if inside(sun, m) && !inside(civil, m) {
				t.Fatalf("minute %d has sun but no civil light", m)
			}
			if lat > -89 && lat < 89 && inside(sun, m) != LightAt(lat, lon, m, false) {
				t.Fatalf("minute %d: span says %v, the altitude the opposite", m, inside(sun, m))
			}
		}
		for i, s := range sun {
			if s.From >= s.To || s.From < from || s.To > to || i > 0 && sun[i-1].To >= s.From {
				t.Fatalf("spans out of order: %v", sun)
			}
		}
	})
}

func TestDaylightAgreesWithSun(t *testing.T) {
	from := utc(t, "2026-04-13")
	spans, err := Daylight(57.6, -7.2, from, from+3*day, false)
	if err != nil || len(spans) != 3 {
		t.Fatalf("want three days, have %v, %v", spans, err)
	}
	for i, s := range spans {
		if d, _ := Sun(57.6, -7.2, from+Minute(i)*day); d.Rise != s.From || d.Set != s.To {
			t.Errorf("day %d: %v differs from rise %d and set %d", i, s, d.Rise, d.Set)
		}
	}
}

func TestSunRefuses(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, p := range [][2]float64{{nan, 0}, {0, nan}, {91, 0}, {-90.5, 0}, {0, 181}, {inf, 0}, {0, -inf}} {
		if _, err := Sun(p[0], p[1], 0); err == nil {
			t.Errorf("Sun took %v", p)
		}
		if _, err := Daylight(p[0], p[1], 0, 10, true); err == nil {
			t.Errorf("Daylight took %v", p)
		}
		if LightAt(p[0], p[1], 720, true) {
			t.Errorf("light at %v", p)
		}
	}
	for _, s := range [][2]Minute{{10, 10}, {10, 5}, {math.MinInt64, 0}, {0, math.MaxInt64}, {0, 20 * 366 * day}} {
		if _, err := Daylight(57, 0, s[0], s[1], true); err == nil {
			t.Errorf("Daylight took the span %v", s)
		}
	}
	for _, m := range []Minute{math.MinInt64, math.MaxInt64} {
		if _, err := Sun(57, 0, m); err == nil {
			t.Errorf("Sun took day %d", m)
		}
	}
}
