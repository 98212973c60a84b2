package site

import (
	"fmt"
	"math"
	"strings"
	"testing"
	"time"
)

const forecast = `# zone: UTC+1
time,air F,rh %,wind kn,gust mph,wet
2026-04-13 01:00,50,70,10,,no
2026-04-13 02:00,59,70,20,,no
2026-04-13 05:00,59,70,20,40,yes
2026-04-14 01:00,50,,,,
`

func TestForecastReplacesHours(t *testing.T) {
	_, err := ReadForecast("f.csv", strings.NewReader(forecast))
	if err == nil || !strings.Contains(err.Error(), "f.csv:6:18: air, and dew point or humidity, must not be blank") {
		t.Fatalf("a blank humidity was taken: %v", err)
	}
	f, err := ReadForecast("f.csv", strings.NewReader(strings.Replace(forecast, "50,,,,", "50,100,,,", 1)))
	if err != nil {
		t.Fatal(err)
	}
	s := hourly(t, make([]float64, 30), make([]float64, 30))
	for i := range s.Steel {
		s.Steel[i], s.Wind[i], s.Gust[i] = 8, 4, 8
	}
	got := s.With(f)
	w, _ := got.At(s.Start)
	near(t, "air half way from 50 to 59 F", w.Air, 12.5, 1e-9)
	near(t, "steel stays 2 K below the air", w.Steel, 10.5, 1e-9)
	near(t, "wind half way from 10 to 20 kn", w.Wind, 15*1852.0/3600, 1e-9)
	near(t, "gusts keep their share", w.Gust, 2*15*1852.0/3600, 1e-9)
	if w.Basis != "forecast f.csv" || w.Wet {
		t.Errorf("hour %+v", w)
	}
	if w, _ := got.At(s.Start + 60); !w.Wet {
		t.Errorf("hours before a wet row are wet: %+v", w)
	}
	if w, _ := got.At(s.Start + 4*60); !w.Wet || math.Abs(w.Gust-40*0.44704) > 1e-9 || w.Basis != "forecast f.csv" {
		t.Errorf("the row before a gap holds as long as the one before it: %+v", w)
	}
	if w, _ := got.At(s.Start + 7*60); w.Basis != "test" || w.Wind != 4 {
		t.Errorf("after it the plan holds: %+v", w)
	}
	if w, _ := got.At(s.Start + day); w.Basis != "forecast f.csv" || w.Wind != 4 || w.RH != 1 {
		t.Errorf("blank wind keeps the plan's: %+v", w)
	}
	if c := f.Covers(); len(c) != 2 || c[0] != (Span{From: s.Start, To: s.Start + 7*60}) || c[1].To != s.Start+day+60 {
		t.Errorf("covers %v", c)
	}
	if w, _ := s.At(s.Start); w.Air != 10 {
		t.Error("the series itself was changed")
	}
	if len(s.With(nil).Air) != 30 {
		t.Error("no forecast changes nothing")
	}
}

func TestReadings(t *testing.T) {
	f, err := ReadReadings("log.csv", strings.NewReader("# zone: UTC\ntime,air C,dew C,steel C,rain mm\n2026-04-13 06:00,8,6,5.5,0\n2026-04-13 10:00,10,6,9.5,0.2\n2026-04-13 15:00,12,6,11,0\n"))
	if err != nil {
		t.Fatal(err)
	}
	s := hourly(t, make([]float64, 24), make([]float64, 24)).With(f)
	w, _ := s.At(s.Start + 7*60 + 59)
	near(t, "steel between readings", w.Steel, 5.5+4*1.5/4, 1e-9)
	if w.Basis != "readings log.csv" || !w.Wet {
		t.Errorf("hour %+v", w)
	}
	for _, h := range []Minute{5, 11, 14, 16} { // readings more than 4 h apart tell only of their own hour
		if w, _ := s.At(s.Start + h*60); w.Basis != "test" {
			t.Errorf("%d:00 is known: %+v", h, w)
		}
	}
}

func TestForecastFaults(t *testing.T) {
	const head = "# zone: UTC\ntime,air C,dew C,wind m/s,wet\n"
	for _, c := range []struct{ text, want string }{
		{"time,air C,dew C\n2026-04-13 01:00,5,1\n", "f:1:1: does not state its zone"},
		{"# zone: UTC\n", "f:1:1: no rows"},
		{head, "f:2:1: no weather below the column names"},
		{"# zone: UTC\ntime,air,dew C\n", `f:2:6: column "air" has to be in C or F`},
		{"# zone: UTC\ntime,air C,clouds\n", `f:2:12: column "clouds" is not known`},
		{"# zone: UTC\ntime,air C\n", `f:2:1: there is no column dew or rh`},
		{"# zone: UTC\ntime,air C,air F,dew C\n", `f:2:12: column air is there twice`},
		{"# zone: UTC\ntime,air C,rh %,dew C\n", `f:2:1: both dew and rh are given`},
		{head + "2026-04-13 01:00,5,1,3\n", `f:3:22: 4 fields where 5 was expected`},
		{head + "2026-04-13 01:00,warm,1,3,no\n", `f:3:18: air "warm" is not a number`},
		{head + "2026-04-13 01:00,NaN,1,3,no\n", `f:3:18: air "NaN" is not a number`},
		{head + "2026-04-13 01:00,5,1,300,no\n", `f:3:22: wind "300" m/s is out of range`},
		{head + "2026-04-13 01:00,5,1,-3,no\n", `f:3:22: wind "-3" m/s is out of range`},
		{head + "2026-04-13 01:00,5,1,3,maybe\n", `f:3:24: "maybe" is neither yes nor no`},
		{head + "2026-04-13 01:00,5,8,3,no\n", `f:3:18: dew point 8.0 C is above the air, 5.0 C`},
		{head + "13 April,5,1,3,no\n", `f:3:1: "13 April" is not a date and time`},
		{head + "2026-04-13 01:00,5,1,3,no\n2026-04-13 01:00,5,1,3,no\n", `f:4:1: "2026-04-13 01:00 UTC" is not after the row before it`},
	} {
		f, err := ReadForecast("f", strings.NewReader(c.text))
		if f != nil || err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("want %q in\n%v", c.want, err)
		}
	}
}

// rewrite writes a forecast in base units, as ReadForecast reads it.
func rewrite(f *Forecast) string {
	var b strings.Builder
	b.WriteString("# zone: UTC\ntime,air C,dew C,steel C,wind m/s,gust m/s,wet\n")
	num := func(v float64) string {
		if math.IsNaN(v) {
			return ""
		}
		return fmt.Sprintf("%.9f", v)
	}
	for _, o := range f.rows {
		wet := map[bool]string{true: "yes", false: "no"}[o.wet]
		if !o.wetKnown {
			wet = ""
		}
		fmt.Fprintf(&b, "%s,%s,%s,%s,%s,%s,%s\n", strings.TrimSuffix(moment(o.at), " UTC"), num(o.air), num(o.dew), num(o.steel), num(o.wind), num(o.gust), wet)
	}
	return b.String()
}

func FuzzReadForecast(f *testing.F) {
	f.Add(forecast)
	f.Add(strings.Replace(forecast, "50,,,,", "50,100,,,", 1))
	f.Add("# zone: Europe/London\ntime,dew c,air c,rain mm\n2026-10-25 01:30,1,2,\n2026-10-25 07:30,1.4,1,0.1\n")
	f.Add("# zone: UTC\ntime,air C,rh %\n2026-01-01 00:00,-45,1\n,,\n")
	f.Fuzz(func(t *testing.T, text string) {
		got, err := ReadForecast("f.csv", strings.NewReader(text))
		if err != nil {
			if fs, ok := err.(Faults); got != nil || !ok || fs[0].Line < 1 || fs[0].Col < 1 || fs[0].Problem == "" {
				t.Fatalf("forecast %v with error %v", got, err)
			}
			return
		}
		again, err := ReadForecast("f.csv", strings.NewReader(rewrite(got)))
		if err != nil || rewrite(again) != rewrite(got) {
			t.Fatalf("does not read again: %v\n%s", err, rewrite(got))
		}
		s := hourly(t, make([]float64, 48), make([]float64, 48))
		for _, c := range s.With(got).ClosedBy(Limits{Spread: AtLeast(3)}.Judge, s.Start, s.End()) {
			if c.Why == "" {
				t.Fatal("closed without reason")
			}
		}
	})
}

// Wind is usual, worked out from normals, until a forecast tells wind or gusts; air and dew alone leave it so.
func TestUsualWind(t *testing.T) {
	out, err := Climate{Months: map[time.Month]Normal{time.April: {AirLeast: 4, AirGreatest: 11, Dew: 4, Wind: 6}}}.Hourly(0, 24*60, 57.6, -7.2)
	if err == nil {
		t.Fatal("January 1970 has no normals")
	}
	start := Minute(time.Date(2027, time.April, 13, 0, 0, 0, 0, time.UTC).Unix() / 60)
	out, err = Climate{Months: map[time.Month]Normal{time.March: {AirLeast: 3, AirGreatest: 9, Dew: 3, Wind: 6}, time.April: {AirLeast: 4, AirGreatest: 11, Dew: 4, Wind: 6},
		time.May: {AirLeast: 6, AirGreatest: 13, Dew: 5, Wind: 6}}}.Hourly(start, start+24*60, 57.6, -7.2)
	if err != nil {
		t.Fatal(err)
	}
	f, err := ReadForecast("f.csv", strings.NewReader("# zone: UTC\ntime,air C,dew C,wind m/s,gust m/s\n2027-04-13 06:00,8,6,4,\n2027-04-13 07:00,8,6,4,\n2027-04-13 12:00,8,6,,\n2027-04-13 18:00,8,6,,9\n"))
	if err != nil {
		t.Fatal(err)
	}
	s := out.Poor.With(f)
	for h, usual := range map[Minute]bool{2: true, 6: false, 12: true, 18: false} {
		if w, ok := s.At(start + h*60); !ok || w.Usual != usual {
			t.Errorf("%d:00: %+v", h, w)
		}
	}
	if w, _ := (Series{Start: 0, Air: []float64{1}, Steel: []float64{1}, Dew: []float64{1}, RH: []float64{1}, Wind: []float64{1}, Gust: []float64{1}, Wet: []bool{false}, Basis: []string{"b"}}).At(0); w.Usual {
		t.Error("a series made by hand is usual")
	}
}
