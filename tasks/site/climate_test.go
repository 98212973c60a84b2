package site

import (
	"math"
	"reflect"
	"strings"
	"testing"
	"time"

	"pgregory.net/rapid"
)

// west is an invented place on a western coast in spring.
var west = Climate{Months: map[time.Month]Normal{
	time.March: {3, 9, 2.5, 7, 17}, time.April: {4, 11, 4, 6, 14}, time.May: {6.5, 14, 6, 5.5, 12},
}}

func april(t *testing.T, c Climate, days Minute) Outlook {
	t.Helper()
	from := utc(t, "2026-04-05")
	o, err := c.Hourly(from, from+days*day, 57.6, -7.2)
	if err != nil {
		t.Fatal(err)
	}
	return o
}

func TestClimateKeepsTheNormals(t *testing.T) {
	c := Climate{Months: map[time.Month]Normal{time.April: {4, 11, 4, 6, 14}}}
	o := april(t, c, 9)
	if n := len(o.Average.Air); n != 9*24 || o.Average.End() != utc(t, "2026-04-14") {
		t.Fatalf("%d hours", n)
	}
	for d := 0; d < 9; d++ {
		lo, hi := math.Inf(1), math.Inf(-1)
		for _, v := range o.Average.Air[d*24 : d*24+24] {
			lo, hi = min(lo, v), max(hi, v)
		}
		// Samples stand at half past, so that they miss each turning point by half an hour at most.
		if lo < 4 || lo > 4.2 || hi > 11 || hi < 10.8 {
			t.Errorf("day %d runs from %.2f to %.2f C, normals 4 to 11", d, lo, hi)
		}
	}
	sun, _ := Sun(57.6, -7.2, utc(t, "2026-04-05"))
	if w, _ := o.Average.At(sun.Rise); w.Air > 4.1 {
		t.Errorf("sunrise is not the coldest: %.2f C", w.Air)
	}
	if w, _ := o.Average.At(sun.Noon + hottestAfter); w.Air < 10.9 {
		t.Errorf("two hours after the sun's highest is not the hottest: %.2f C", w.Air)
	}
}

func TestPoorDay(t *testing.T) {
	o := april(t, west, 9)
	// One day in five: normal quantile 0.8416 (tables of the normal distribution) x 2.5 K; Rayleigh
	// wind sqrt(-4/pi ln 0.2) = 1.4315 (arithmetic).
	near(t, "air below average", o.Average.Air[30]-o.Poor.Air[30], 0.8416*2.5, 1e-3)
	near(t, "warm above average", o.Warm.Air[30]-o.Average.Air[30], 0.8416*2.5, 1e-3)
	near(t, "wind", o.Poor.Wind[30]/o.Average.Wind[30], 1.4315, 1e-4)
	wet := func(s Series) (n int) {
		for i := 12; i < len(s.Wet); i += 24 {
			if s.Wet[i] {
				n++
			}
		}
		return n
	}
	// 9 days at about 14.8 wet days in 30 (early April, between the mid-month values): 4.4 on average.
	if p, a := wet(o.Poor), wet(o.Average); a != 4 || p < 6 || p > 7 || wet(o.Warm) != 0 {
		t.Errorf("wet days: poor %d, average %d", p, a)
	}
	if !o.Poor.Wet[12] {
		t.Error("the first day is not among the wet ones")
	}
	for i := range o.Poor.Air {
		if o.Poor.RH[i] < o.Average.RH[i]-1e-9 || o.Poor.Dew[i] > o.Poor.Air[i] {
			t.Fatalf("hour %d: poor day drier (%.2f) than the average (%.2f)", i, o.Poor.RH[i], o.Average.RH[i])
		}
	}
	if o.Poor.Basis[0] != "climate, poor day (one in 5)" {
		t.Error(o.Poor.Basis[0])
	}
}

func TestDewClosesTheMorning(t *testing.T) {
	o := april(t, west, 3)
	l := Limits{Spread: AtLeast(3), Steel: AtLeast(5)}
	closed := o.Average.Closed(l, o.Average.Start, o.Average.End())
	open := gaps(closed, o.Average.Start, o.Average.End(), func(_, _ Minute) string { return "" })
	if len(open) != 3 {
		t.Fatalf("want one open spell a day, have %v", open)
	}
	for i, s := range open {
		sun, _ := Sun(57.6, -7.2, o.Average.Start+Minute(i)*day)
		if s.From <= sun.Rise || s.From >= sun.Noon || s.To <= sun.Noon {
			t.Errorf("day %d opens at %s and closes at %s", i, moment(s.From), moment(s.To))
		}
	}
	if !strings.Contains(closed[0].Why, "steel above dew point") || !strings.Contains(closed[0].Why, "at least 3 K needed") {
		t.Error(closed[0].Why)
	}
}

func TestSteelFollows(t *testing.T) {
	c := west
	c.Steel = &SteelRule{}
	o := april(t, c, 2)
	if !reflect.DeepEqual(o.Average.Steel, o.Average.Air) {
		t.Error("without night, sun and lag the steel is not the air")
	}
	c.Steel = &SteelRule{NightAverage: 4, NightPoor: 4}
	o = april(t, c, 2)
	near(t, "steel at midnight", o.Average.Steel[0]-o.Average.Air[0], -4, 1e-9)
	near(t, "steel at noon", o.Average.Steel[12]-o.Average.Air[12], 0, 1e-9)
	s := newSteel(2, 0, 0) // after two hours 1 - 1/e of a step is made: the solution of the rate law
	s.hour(0, 0)
	s.hour(10, 0)
	near(t, "step of 10 K after 2 h", s.hour(10, 0), 10*(1-math.Exp(-1)), 1e-9)
}

func TestClimateThroughMonths(t *testing.T) {
	at := func(text string) Normal { n, _ := west.normal(utc(t, text)); return n }
	if n := at("2026-04-15 23:59"); math.Abs(n.AirGreatest-11) > 0.1 {
		t.Errorf("mid April %v", n)
	}
	near(t, "turn of the month", at("2026-05-01").Dew, 5, 0.05) // half way from 4 to 6
	near(t, "no February given", at("2026-03-02").Dew, 2.5, 0)
	_, err := west.Hourly(utc(t, "2026-05-30"), utc(t, "2026-06-03"), 57, 0)
	if err == nil || err.Error() != "the climate says nothing of June" {
		t.Errorf("%v", err)
	}
}

func TestClimateRefuses(t *testing.T) {
	nan := math.NaN()
	month := func(n Normal) Climate { return Climate{Months: map[time.Month]Normal{time.April: n}} }
	good := Normal{4, 11, 4, 6, 14}
	with := func(f func(*Climate)) Climate { c := month(good); f(&c); return c }
	from := utc(t, "2026-04-05")
	for i, c := range []Climate{{}, month(Normal{11, 4, 4, 6, 14}), month(Normal{4, 11, 12, 6, 14}), month(Normal{4, 11, 4, -1, 14}),
		month(Normal{4, 11, 4, 6, 32}), month(Normal{nan, 11, 4, 6, 14}), month(Normal{4, 11, nan, 6, 14}),
		with(func(c *Climate) { c.Poor = 0.7 }), with(func(c *Climate) { c.Poor = nan }), with(func(c *Climate) { c.Spread = -1 }),
		with(func(c *Climate) { c.Steel = &SteelRule{Lag: nan} }), with(func(c *Climate) { c.Steel = &SteelRule{NightPoor: 40} })} {
		if _, err := c.Hourly(from, from+day, 57, 0); err == nil {
			t.Errorf("case %d taken: %+v", i, c)
		}
	}
	for _, p := range [][2]float64{{nan, 0}, {100, 0}, {0, 200}} {
		if _, err := month(good).Hourly(from, from+day, p[0], p[1]); err == nil {
			t.Errorf("took the place %v", p)
		}
	}
	for _, to := range []Minute{from, from - day, from + 400*day, math.MaxInt64} {
		if _, err := month(good).Hourly(from, to, 57, 0); err == nil {
			t.Errorf("took the end %d", to)
		}
	}
}

func TestClimateFigures(t *testing.T) {
	soft := 0
	for _, f := range west.Figures() {
		if f.Name == "" || f.Origin.Source == "" {
			t.Errorf("figure without name or origin: %+v", f)
		}
		if f.Origin.Soft() {
			soft++
		}
	}
	if soft < 5 {
		t.Errorf("%d house judgements and memories told, want 5 at least", soft)
	}
}

func TestClimateLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		lat := rapid.Float64Range(-90, 90).Draw(t, "lat")
		lon := rapid.Float64Range(-180, 180).Draw(t, "lon")
		from := utc(&testing.T{}, "2026-01-01") + rapid.Int64Range(0, 300*day).Draw(t, "from")
		to := from + rapid.Int64Range(1, 3*day).Draw(t, "length")
		c := Climate{Months: map[time.Month]Normal{}}
		for m := time.January; m <= time.December; m++ {
			c.Months[m] = Normal{2, 9, 3, 5, 10}
		}
		o, err := c.Hourly(from, to, lat, lon)
		if err != nil {
			t.Fatal(err)
		}
		for _, s := range []Series{o.Poor, o.Average, o.Warm} {
			if s.Start > from || s.Start <= from-60 || s.End() < to || s.End() >= to+60 {
				t.Fatalf("runs from %d to %d, asked for %d to %d", s.Start, s.End(), from, to)
			}
		}
		for i, v := range o.Average.Air {
			if v < 2-1e-9 || v > 9+1e-9 || !(o.Average.RH[i] > 0 && o.Average.RH[i] <= 1) || math.IsNaN(o.Poor.Steel[i]) {
				t.Fatalf("hour %d: air %v, humidity %v", i, v, o.Average.RH[i])
			}
		}
	})
}
