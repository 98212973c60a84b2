package site

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/coat"
)

// hourly makes a series from 2026-04-13 00:00 with the given steel and wind; air 10 C, dew 6 C.
func hourly(t testing.TB, steel []float64, wind []float64) Series {
	s := Series{Start: utc(t, "2026-04-13")}
	for i := range steel {
		s.add(Weather{Air: 10, Steel: steel[i], Dew: 6, Wind: wind[i], Gust: 1.5 * wind[i], Basis: "test"})
	}
	return s
}

func TestSeriesHumidity(t *testing.T) {
	// Published dew points (US chart in whole F; allow 1 F): 70 F/65 % 57; 60/80 54; 50/70 40; 80/50 59; 90/60 74.
	for _, c := range [][3]float64{{70, .65, 57}, {60, .80, 54}, {50, .70, 40}, {80, .50, 59}, {70, .85, 65}, {90, .60, 74}} {
		air, dew := (c[0]-32)/1.8, (c[2]-32)/1.8
		var s Series
		s.add(Weather{Air: air, Dew: dew - 1/1.8})
		s.add(Weather{Air: air, Dew: dew + 1/1.8})
		if s.RH[0] > c[1] || s.RH[1] < c[1] {
			t.Errorf("%v F: humidity %.3f to %.3f does not hold %v", c[0], s.RH[0], s.RH[1], c[1])
		}
	}
	var s Series
	s.add(Weather{Air: 5, Dew: 8})
	if s.RH[0] != 1 || s.Dew[0] != 5 {
		t.Errorf("dew point above the air: %+v", s)
	}
}

func TestClosedReasons(t *testing.T) {
	s := hourly(t, []float64{7, 8.2, 9.5, 9.5, 12, 4}, []float64{3, 3, 3, 9, 8, 8})
	s.Wet[5] = true
	l := Limits{Steel: AtLeast(5), Spread: AtLeast(3), Wind: AtMost(6.7), Dry: true}
	from := s.Start + 30
	got := s.Closed(l, from, s.Start+7*60)
	want := []Span{
		{from, s.Start + 120, "steel above dew point 1.0 K, at least 3 K needed (worst of 1 h 30 min)"},
		{s.Start + 180, s.Start + 300, "wind 9.0 m/s, at most 6.7 m/s allowed (worst of 2 h)"},
		{s.Start + 300, s.Start + 360, "steel 4.0 C, at least 5 C needed; steel above dew point -2.0 K, at least 3 K needed; wind 8.0 m/s, at most 6.7 m/s allowed; wet, must be dry"},
		{s.Start + 360, s.Start + 420, unknownWeather},
	}
	if len(got) != len(want) {
		t.Fatalf("got %v", got)
	}
	for i := range want {
		if got[i] != want[i] {
			t.Errorf("got  %v\nwant %v", got[i], want[i])
		}
	}
	if early := s.Closed(l, s.Start-300, s.Start-100); len(early) != 1 || early[0] != (Span{s.Start - 300, s.Start - 100, unknownWeather}) {
		t.Errorf("before the series: %v", early)
	}
	if s.Closed(l, from, from) != nil {
		t.Error("no time has closed hours")
	}
}

func TestClosedByPaint(t *testing.T) {
	s := hourly(t, []float64{7, 9.5, 9.5, 9.5}, []float64{3, 3, 9, 9})
	p := coat.Paint{ApplyMin: 5, ApplyMax: 40}
	got := s.ClosedBy(func(w Weather) []string {
		_, why := coat.MayApply(p, w.Air, w.Steel, w.RH, w.Wind, coat.Airless)
		return why
	}, s.Start, s.End())
	if len(got) != 2 || got[0].To != s.Start+60 || got[1] != (Span{s.Start + 120, s.Start + 240, "wind 9.0 m/s is above the greatest 6.7 m/s for airless"}) {
		t.Errorf("got %v", got)
	}
}

func TestClosedLaws(t *testing.T) { // closed hours are exactly the minutes that break a limit
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 30).Draw(t, "n")
		draw := func(name string, lo, hi float64) []float64 {
			return rapid.SliceOfN(rapid.OneOf(rapid.Float64Range(lo, hi), rapid.Just(math.NaN())), n, n).Draw(t, name)
		}
		steel, wind := draw("steel", -5, 20), draw("wind", 0, 15)
		s := hourly(&testing.T{}, steel, wind)
		l := Limits{Steel: Between(2, 15), Spread: AtLeast(3), Gust: AtMost(12)}
		from := s.Start + rapid.Int64Range(-100, 500).Draw(t, "from")
		to := from + rapid.Int64Range(1, 2000).Draw(t, "length")
		closed := map[Minute]int{}
		for _, c := range s.Closed(l, from, to) {
			for m := c.From; m < c.To; m++ {
				closed[m]++
			}
		}
		for _, c := range s.ClosedBy(l.Judge, from, to) {
			for m := c.From; m < c.To; m++ {
				closed[m] += 10
			}
		}
		for m := from; m < to; m++ {
			w, ok := s.At(m)
			want := 11
			if ok && w.Steel >= 2 && w.Steel <= 15 && w.Steel-w.Dew >= 3 && w.Gust <= 12 {
				want = 0
			}
			if closed[m] != want {
				t.Fatalf("minute %d: %d, want %d for %+v", m-s.Start, closed[m], want, w)
			}
		}
	})
}

func TestLimitsCheck(t *testing.T) {
	for _, l := range []Limits{{Air: Between(10, 5)}, {RH: AtMost(math.NaN())}, {Wind: AtLeast(math.Inf(1))}} {
		if l.Check() == nil {
			t.Errorf("took %+v", l)
		}
	}
	if err := (Limits{RH: Between(.85, .5)}).Check(); err == nil || err.Error() != "least humidity 85 % is above the greatest, 50 %" {
		t.Errorf("%v", err)
	}
	if err := (Limits{Air: Between(5, 30), Spread: AtLeast(3)}).Check(); err != nil {
		t.Error(err)
	}
}

func TestFiguresOfAnHour(t *testing.T) {
	s := hourly(t, []float64{9.5}, []float64{3})
	f := s.Figures(s.Start + 59)
	if len(f) != 7 || f[3].Value != 3.5 || math.Abs(f[4].Value-76.2) > 0.1 || f[0].Origin.Source != "test" || s.Figures(s.Start+60) != nil {
		t.Errorf("figures %+v", f)
	}
	var text []string
	for _, x := range f {
		text = append(text, x.Name+" "+x.Amount())
	}
	if got := strings.Join(text[:3], ", "); got != "air 10 C, dew point 6 C, steel 9.5 C" {
		t.Error(got)
	}
}
