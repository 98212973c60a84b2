package expand

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks"
	"sailby/tasks/coat"
	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// fine is a day that closes nothing: 15 C, steel 14 C, dew point 5 C.
func fine() site.Weather { return site.Weather{Air: 15, Steel: 14, Dew: 5, Wind: 2, Gust: 3} }

// weatherOf makes a series over the span from the weather of each hour.
func weatherOf(span hours.Span, of func(hour int) site.Weather) *site.Series {
	s := &site.Series{Start: site.Minute(span.From) - 120}
	for i := range span.Len()/60 + 24*16 {
		w := of(i - 2)
		w.RH = coat.RelativeHumidity(w.Air, w.Dew)
		s.Air, s.Steel, s.Dew, s.RH = append(s.Air, w.Air), append(s.Steel, w.Steel), append(s.Dew, w.Dew), append(s.RH, w.RH)
		s.Wind, s.Gust, s.Wet, s.Basis = append(s.Wind, w.Wind), append(s.Gust, w.Gust), append(s.Wet, w.Wet), append(s.Basis, "test")
		s.Usual = append(s.Usual, w.Usual)
	}
	return s
}

// under expands a job with the weather of a place given hour by hour from the span's start.
func under(t *testing.T, of func(hour int) site.Weather, sections ...string) *Work {
	t.Helper()
	job := read(t, sections...)
	w, faults := Expand(job, Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	job.Places[1].Climate = &tasks.Climate{Hourly: weatherOf(w.Span, of)}
	if w, faults = Expand(job, Basis{}); len(faults) > 0 {
		t.Fatal(faults)
	}
	return w
}

func closedAt(list []site.Span, m hours.Minute) bool {
	for _, s := range list {
		if s.From <= int64(m) && int64(m) < s.To {
			return true
		}
	}
	return false
}

const coatAndGrind = "tasks: {grind: {kind: surface prep, at: pier/hinge, area: 2 m2, grade: St 3}, paint: {kind: coat, at: pier/hinge, area: 2 m2, coats: primer}}"

// The closed hours are exactly those that break a limit of R25, minute by minute.
func TestClosedHoursAreThoseThatBreakALimit(t *testing.T) {
	const n = 60
	rapid.Check(t, func(rt *rapid.T) {
		days := make([]site.Weather, n)
		bad := rapid.IntRange(0, 30).Draw(rt, "bad hours in a hundred")
		for i := range days {
			days[i] = fine()
			if rapid.IntRange(0, 99).Draw(rt, "hour") >= bad {
				days[i].Steel += rapid.Float64Range(-5, 5).Draw(rt, "steel")
				continue
			}
			air := rapid.Float64Range(-4, 20).Draw(rt, "air")
			days[i] = site.Weather{Air: air, Steel: air + rapid.Float64Range(-6, 10).Draw(rt, "over"), Dew: air - rapid.Float64Range(0, 12).Draw(rt, "dry"),
				Wind: rapid.Float64Range(0, 14).Draw(rt, "wind"), Wet: rapid.IntRange(0, 9).Draw(rt, "wet") == 0}
		}
		of := func(h int) site.Weather { return days[((h%n)+n)%n] }
		w := under(t, of, coatAndGrind)
		p, g := w.step(t, "paint / coat 1"), w.step(t, "grind / surface prep")
		grind := w.Nature(g)
		series := p.Place.Climate.Hourly
		mayPaint := func(h site.Weather) bool {
			ok, _ := coat.MayApply(p.Paint.Paint, h.Air, h.Steel, h.RH, h.Wind, coat.Brush)
			return ok && !h.Wet
		}
		stays := func(h site.Weather) bool {
			frost := h.Dew
			if h.Dew < 0 && h.Steel < 0 {
				frost = coat.FrostPoint(h.Dew)
			}
			return h.Steel >= p.Paint.ApplyMin && h.Steel >= frost && !h.Wet
		}
		p.Paint.LimitsUntil = rapid.SampledFrom(coat.Untils()).Draw(rt, "limits until")
		p.Paint.DryHours = rapid.SampledFrom([]float64{0, 2, 8}).Draw(rt, "stays dry")
		paint := w.Nature(p)
		steel := func(m int) float64 { h, _ := series.At(int64(m)); return h.Steel }
		for range 15 {
			m := w.Span.From + hours.Minute(rapid.IntRange(0, 6*1440).Draw(rt, "minute"))
			h, _ := series.At(int64(m))
			open := mayPaint(h)
			for k := hours.Minute(1); k <= hours.Minute(p.Paint.DryHours*60); k++ {
				a, _ := series.At(int64(m + k))
				open = open && stays(a)
			}
			if curve, ok := p.Paint.State(p.Paint.LimitsUntil); ok {
				dry, _ := coat.Cure(int(m)+1, curve, p.Paint.ApplyMin, steel, int(w.Span.To))
				for k := int(m) + 1; k < dry; k++ {
					a, _ := series.At(int64(k))
					kept, _ := coat.MayStay(p.Paint.Paint, a.Air, a.Steel, a.RH, a.Wind, coat.Brush)
					open = open && kept && !a.Wet
				}
			}
			hard, _ := coat.Cure(int(m)+1, p.Paint.HardDry, p.Paint.ApplyMin, steel, int(w.Span.To))
			for k := int(m) + 1; k < hard; k++ {
				open = open && steel(k) >= 0
			}
			if closedAt(paint, m) == open {
				rt.Fatalf("coat at minute %d: closed %v, open by the limits %v", m-w.Span.From, !open, open)
			}
			ok, _ := coat.MayHold(h.Air, h.Steel, h.RH)
			if closedAt(grind, m) == (ok && !h.Wet) {
				rt.Fatalf("surface prep at minute %d", m-w.Span.From)
			}
		}
	})
}

func TestShelterKeepsRainAndWindOff(t *testing.T) {
	storm := func(int) site.Weather { w := fine(); w.Wind, w.Wet = 20, true; return w }
	for _, c := range []struct {
		face   string
		closed bool
	}{{"", true}, {"sheltered: yes", false}, {"indoors: yes", false}} {
		w := under(t, storm, coatAndGrind, "places: {shop: {open: always}, pier: {open: always, workfaces: {hinge: {"+c.face+"}}}}")
		for _, key := range []string{"paint / coat 1", "grind / surface prep"} {
			if got := len(w.Nature(w.step(t, key))) > 0; got != c.closed {
				t.Errorf("%s with %q: closed %v", key, c.face, got)
			}
		}
	}
	cold := func(int) site.Weather { w := fine(); w.Air, w.Steel, w.Dew = 2, 2, -6; return w }
	indoors := under(t, cold, coatAndGrind, "places: {shop: {open: always}, pier: {open: always, steel temperature: 20 C, workfaces: {hinge: {indoors: yes}}}}")
	if s := indoors.step(t, "paint / coat 1"); len(indoors.Nature(s)) > 0 || s.States[2].Tail(0) != 420 {
		t.Error("indoors the steel has the place's temperature: hard dry in 7 h at 20 C")
	}
	if s := under(t, cold, coatAndGrind).step(t, "paint / coat 1"); s.States[2].Tail(hours.Minute(s.Place.Climate.Hourly.Start)+300) != hours.Far {
		t.Error("below the paint's least nothing cures")
	}
}

func TestReasonsAreSaid(t *testing.T) {
	w := under(t, func(h int) site.Weather {
		x := fine()
		if h%24 >= 18 {
			x.Steel = 4
		}
		return x
	}, coatAndGrind)
	day := w.Span.From + 1440
	said := ""
	for _, s := range w.NatureIn(w.step(t, "paint / coat 1"), hours.Span{From: day, To: day + 1440}) {
		said += s.Why + "\n"
	}
	for _, want := range []string{"must stay dry for 8 h: steel 4.0 C is below", "steel 4.0 C is below the dew point 5.0 C: it is wet; 3.0 K above are wanted"} {
		if !strings.Contains(said, want) {
			t.Errorf("no %q in\n%s", want, said)
		}
	}
}

// Bare steel holds until it turns damp, however long it might hold.
func TestPreparedSteelTurnsInTheDamp(t *testing.T) {
	w := under(t, func(h int) site.Weather {
		x := fine()
		if h%24 == 20 {
			x.Steel = 6
		}
		return x
	}, strings.Replace(coatAndGrind, "coats: primer", "coats: primer, after: grind", 1))
	var last func(hours.Minute) hours.Minute
	for _, l := range w.Links {
		if l.MaxCure != nil && l.To == w.step(t, "paint / coat 1") {
			last = l.MaxCure.Last
		}
	}
	if last == nil {
		t.Fatal("no longest wait")
	}
	day := w.Span.From + 1440
	for _, c := range []struct{ from, want hours.Minute }{{10 * 60, 14 * 60}, {17 * 60, 20 * 60}, {20*60 + 10, 20*60 + 10}, {21 * 60, 25 * 60}} {
		if got := last(day+c.from) - day; got != c.want {
			t.Errorf("prepared at %d: at the latest %d, want %d", c.from, got, c.want)
		}
	}
}

// The longest wait hour by hour is that of package coat minute by minute.
func TestLongestWaitByTheHour(t *testing.T) {
	max := coat.Curve{{Celsius: 5, Min: 3000}, {Celsius: 20, Min: 900}, {Celsius: 40, Min: 120}}
	rapid.Check(t, func(rt *rapid.T) {
		temps := rapid.SliceOfN(rapid.Float64Range(-5, 45), 24, 24).Draw(rt, "steel")
		x := &expander{w: &Work{Span: hours.Span{From: 1_000_007, To: 1_000_007 + 4*1440}}}
		series := weatherOf(x.w.Span, func(h int) site.Weather { return site.Weather{Air: 10, Dew: 1, Steel: temps[((h%24)+24)%24]} })
		last := x.lastRecoat(max, series, 10)
		temp := func(m int) float64 {
			if w, ok := series.At(int64(m)); ok {
				return w.Steel
			}
			return 10
		}
		for range 20 {
			m := int(x.w.Span.From) + rapid.IntRange(0, 3*1440).Draw(rt, "start")
			if got, want := int(last(hours.Minute(m))), coat.LastRecoat(m, max, temp, int(x.w.Span.To)); got != want {
				rt.Fatalf("from %d: %d, want %d", m, got-m, want-m)
			}
		}
	})
}

// Zinc silicate cures with moisture: hours that are too dry do not count.
func TestDryHoursDoNotCureZincSilicate(t *testing.T) {
	w := under(t, func(h int) site.Weather {
		x := site.Weather{Air: 20, Steel: 20, Dew: 14}
		if h%2 == 1 {
			x.Dew = 0
		}
		return x
	}, strings.Replace(coatAndGrind, "primer", "silicate", 1), "paints: {silicate: {kind: zinc ethyl silicate, humidity: {min: 50 %, max: 95 %}, hard dry: {20 C: 2 h}}}")
	s := w.step(t, "paint / coat 1")
	from := hours.Minute(s.Place.Climate.Hourly.Start) + 48*60 // an even hour
	if got := s.States[2].Tail(from) - from; got != 180 {
		t.Errorf("hard dry after %d min, want 60 moist, 60 dry and 60 moist", got)
	}
}

// tidal is a pier whose water stands below 2.6 m from 172 min 22 s after high water on; high water at 16:00,
// 04:00 and so on by UTC: free from 06:53 to 13:07 (cosine between the waters, by hand).
func tidal(t *testing.T, task string) *Work { t.Helper(); return tidalAt(t, 2.6, task) }

// tidalAt is tidal with the workface at another level; high waters are 4 m.
func tidalAt(t *testing.T, level float64, task string) *Work {
	t.Helper()
	job := read(t, "tasks: {it: {at: pier/hinge, "+task+"}}", `paints: {quick: {kind: two-pack epoxy, immersion min: {10 C: 2 h}}}`,
		"places: {shop: {open: always}, pier: {open: always, steel temperature: 10 C, workfaces: {hinge: {between tides: yes, reach: [2027-04-05 08:00-14:00, 2027-04-06 08:00-14:00]}}}}")
	tide := &site.TideTable{}
	for k := range 200 {
		w := site.Water{At: int64(at(t, "03-01 04:00")) + int64(k)*360, Metres: 4, High: k%2 == 0}
		if !w.High {
			w.Metres = 1
		}
		tide.Waters = append(tide.Waters, w)
	}
	pier := job.Places[1]
	pier.Tide, pier.Workfaces[0].Reach = tide, nil
	pier.Workfaces[0].Level = tasks.Amount{Value: level, Pos: tasks.Pos{Line: 1}}
	w, faults := Expand(job, Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return w
}

func TestWhatWaterWouldCover(t *testing.T) {
	noon := func(w *Work, clock string) bool { return closedAt(w.Nature(w.Steps[0]), at(t, "04-06 "+clock)) }
	for _, c := range []struct {
		what, task   string
		open, closed string // last minute that is open, first that is closed; London, an hour ahead
	}{
		{"a coat that wants two hours", "kind: coat, hours: 1 h, coats: quick", "12:06", "12:07"},
		{"what stands three hours", "hours: 1 h, standing: 3 h, may be covered: no", "11:06", "11:07"},
	} {
		w := tidal(t, c.task)
		if noon(w, c.open) || !noon(w, c.closed) {
			t.Errorf("%s: open at %s %v, closed at %s %v", c.what, c.open, !noon(w, c.open), c.closed, noon(w, c.closed))
		}
	}
	for _, free := range []string{"kind: coat, hours: 1 h, coats: quick, may be covered: yes", "hours: 1 h, standing: 3 h", "hours: 1 h, may be covered: no"} {
		if w := tidal(t, free); len(w.Nature(w.Steps[0])) > 0 {
			t.Errorf("%s: closed by water", free)
		}
	}
	if w := tidal(t, "hours: 1 h, may be covered: no"); !w.Steps[0].InOneGo || !w.Steps[0].OverMeals {
		t.Error("what may not be covered goes in one go, meals apart")
	}
	covered, ok := tidal(t, "hours: 1 h").Covered(nil)
	if ok || covered != nil {
		t.Error("no workface, no water")
	}
}

func TestLevelsGiveWayToPressureAndSurge(t *testing.T) {
	w := tidal(t, "hours: 1 h")
	f := w.Steps[0].Face
	f.Place.Sea = tasks.Sea{Allow: site.Allowance{LeastPressure: 983, Surge: 0.2}, AllowPos: tasks.Pos{Line: 1}}
	if got := f.Covers(); math.Abs(got-2.1) > 1e-9 { // 30 hPa are 30 cm (inverse barometer), and 20 cm
		t.Errorf("covers at %.3f m, want 2.1", got)
	}
}

func TestWhatTheTideHasCoveredIsWashedFirst(t *testing.T) {
	for _, c := range []struct {
		task string
		want int
	}{
		{"kind: coat, hours: 1 h, coats: quick", 22}, // 15 min over a face factor of 0.7, rounded up
		{"kind: coat, hours: 1 h, coats: quick, set-up: 0 min", 0},
		{"hours: 1 h", 0},
	} {
		if got := tidal(t, c.task).Steps[0].SetUp; got != c.want {
			t.Errorf("%s: set-up %d, want %d", c.task, got, c.want)
		}
	}
	for level, want := range map[float64]int{4: 22, 4.01: 0} { // no high water covers what is higher than all of them
		if got := tidalAt(t, level, "kind: coat, hours: 1 h, coats: quick").Steps[0].SetUp; got != want {
			t.Errorf("at %v m: set-up %d, want %d", level, got, want)
		}
	}
	refused(t, "does not say when it may go under water", "tasks: {it: {kind: coat, at: pier/hinge, hours: 1 h, coats: dry}}", "paints: {dry: {kind: alkyd}}",
		"places: {shop: {open: always}, pier: {open: always, workfaces: {hinge: {between tides: yes, reach: [2027-04-06 08:00-14:00]}}}}")
}

// Antifouling must go under water in time: 12 h at the least and 90 days at most at 10 C here.
func TestLongestWaitToGoUnderWater(t *testing.T) {
	text := "tasks: {paint: {kind: coat, at: pier, area: 4 m2, coats: foul}, launch: {at: pier, hours: 1 h, after: {paint: immersion min}}}"
	paint := "paints: {foul: {kind: two-pack epoxy, immersion min: {10 C: 12 h}, immersion max: {10 C: 90 d, 20 C: 45 d}}}"
	w := likely(t, text, paint)
	same(t, "links", w.linksOf(w.step(t, "launch / plain")), "paint / coat 1 finish -> start max 129600; paint / immersion min finish -> start")
	w = under(t, func(int) site.Weather { x := fine(); x.Steel = 20; return x }, text, paint)
	for _, l := range w.Links {
		if l.MaxCure != nil {
			if got := l.MaxCure.Last(w.Span.From); got != w.Span.To { // 45 days are longer than all that is planned over
				t.Errorf("at the latest %d", got-w.Span.From)
			}
			return
		}
	}
	t.Error("by the hour there is no longest wait")
}

func TestWeldsNoteTheWeatherPlannedWith(t *testing.T) {
	w := under(t, func(h int) site.Weather {
		x := fine()
		x.Wind, x.Wet = 8, h%24 < 12
		return x
	}, "tasks: {it: {kind: weld, at: pier, joints: [{fillet: {leg: 6 mm}, length: 1 m, position: PB, procedure: wire}]}}", "procedures: {wire: {process: 135}}\nsteel: S355")
	notes := strings.Join(w.Steps[0].Estimate.Notes, "\n")
	for _, want := range []string{"too much wind at the arc without a shelter (up to 8.0 m/s): in ", "steel wet by rain or dew: dry and warm it first: in "} {
		if !strings.Contains(notes, want) {
			t.Errorf("no %q in\n%s", want, notes)
		}
	}
	if strings.Contains(notes, "too cold") {
		t.Error("15 C are not too cold")
	}
}
