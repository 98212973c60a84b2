package check

import (
	"fmt"
	"strings"
	"testing"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/coat"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// weather gives the pier a weather by the hour, UTC; hours count from 5 April 00:00 on London's clock.
func (f *fix) weather(of func(hour int, w *site.Weather)) {
	start := at(f.t, "03-20 00:00")
	s := &site.Series{Start: int64(start)}
	zero := int(at(f.t, "04-05 00:00")-start) / 60
	for i := range 40 * 24 {
		w := site.Weather{Air: 15, Steel: 14, Dew: 5, Wind: 2}
		of(i-zero, &w)
		w.RH = coat.RelativeHumidity(w.Air, w.Dew)
		s.Air, s.Steel, s.Dew, s.RH = append(s.Air, w.Air), append(s.Steel, w.Steel), append(s.Dew, w.Dew), append(s.RH, w.RH)
		s.Wind, s.Gust, s.Wet, s.Basis = append(s.Wind, w.Wind), append(s.Gust, w.Wind), append(s.Wet, w.Wet), append(s.Basis, "test")
	}
	f.pier.Climate = &tasks.Climate{Hourly: s}
}

// coated adds a coat of one hour that Ruaridh puts on at the deck.
func (f *fix) coated(name string, face *tasks.Workface, pieces ...string) *expand.Step {
	p, _ := coat.Defaults("two-pack epoxy")
	p.Name, p.ApplyMin, p.DryHours = "primer", 5, 4
	p.ImmersionMin = coat.Curve{{Celsius: 10, Min: 120}}
	s := f.step(f.task(name, tasks.Coat, f.pier, face), "coat 1", 60, need("painter"))
	s.InOneGo, s.Paint = true, &tasks.Paint{Paint: p}
	f.put(s, "Ruaridh", pieces...)
	return s
}

func (f *fix) broken(want string, text string) {
	f.t.Helper()
	rules, all := f.rules()
	if got := strings.Join(rules, " "); got != want {
		f.t.Errorf("breaks %q, want %q: %v", got, want, all)
		return
	}
	if want != "" && !strings.Contains(fmt.Sprint(all), text) {
		f.t.Errorf("no %q in %v", text, all)
	}
}

// A coat of 09:00 to 10:00 on Tuesday, 6 April (hours 33 and on), under weathers that break one limit of R25.
func TestWeatherForCoats(t *testing.T) {
	in := func(from, to int, set func(*site.Weather)) func(int, *site.Weather) {
		return func(h int, w *site.Weather) {
			if h >= from && h < to {
				set(w)
			}
		}
	}
	for _, c := range []struct {
		what string
		of   func(int, *site.Weather)
		rule string
	}{
		{"a fine day", in(0, 0, nil), ""},
		{"steel below the least", in(33, 34, func(w *site.Weather) { w.Steel = 4.9 }), "R25"},
		{"air below the least", in(33, 34, func(w *site.Weather) { w.Air, w.Dew = 4.9, 0 }), "R25"},
		{"steel above the greatest", in(33, 34, func(w *site.Weather) { w.Steel = 41 }), "R25"},
		{"2.9 K above the dew point", in(33, 34, func(w *site.Weather) { w.Steel = 7.9 }), "R25"},
		{"3 K are enough", in(33, 34, func(w *site.Weather) { w.Steel = 8 }), ""},
		{"86 % of humidity", in(33, 34, func(w *site.Weather) { w.Air, w.Dew, w.Steel = 15, 12.7, 17 }), "R25"},
		{"more wind than a brush takes", in(33, 34, func(w *site.Weather) { w.Wind = 10.1 }), "R25"},
		{"wet", in(33, 34, func(w *site.Weather) { w.Wet = true }), "R25"},
		{"wet just before", in(32, 33, func(w *site.Weather) { w.Wet = true }), ""},
		{"wet within the four hours", in(37, 38, func(w *site.Weather) { w.Wet = true }), "R25"},
		{"dew within the four hours", in(37, 38, func(w *site.Weather) { w.Steel = 4.9 }), "R25"},
		{"humid before it is touch dry", in(37, 38, func(w *site.Weather) { w.Air, w.Dew, w.Steel = 15, 12.7, 17 }), "R25"},
		{"2 K above the dew point before it is touch dry", in(37, 38, func(w *site.Weather) { w.Steel = 7 }), "R25"},
		{"wind before it is touch dry", in(37, 38, func(w *site.Weather) { w.Wind = 10.1 }), "R25"},
		{"wind in the hour in which it gets touch dry", in(38, 39, func(w *site.Weather) { w.Wind = 10.1 }), "R25"}, // 4.18 h at 14 C
		{"wet, damp and windy after that", in(39, 60, func(w *site.Weather) { w.Wet, w.Wind, w.Steel = true, 12, 4.9 }), ""},
		{"steel hot and air cold before it is touch dry", in(36, 37, func(w *site.Weather) { w.Steel, w.Air, w.Dew = 45, 4, 0 }), ""},
		{"frost before it is hard dry", in(44, 45, func(w *site.Weather) { w.Steel = -0.1 }), "R25"}, // 13.3 h at 14 C, one of them lost
		{"frost after it is hard dry", in(48, 49, func(w *site.Weather) { w.Steel = -0.1 }), ""},
	} {
		t.Run(c.what, func(t *testing.T) {
			f := newFix(t)
			f.weather(c.of)
			f.coated("paint", f.deck, "04-06 09:00-10:00")
			f.broken(c.rule, "may not be put on")
		})
	}
	windy := in(38, 44, func(w *site.Weather) { w.Wind = 10.1 })
	// touch dry takes 4.18 h, 250.8 min, at 14 C: what is put on up to 09:49 is by 13:59.8, up to 09:50 not before 14:00.8
	for to, rule := range map[string]string{"09:49": "", "09:50": "R25"} {
		f := newFix(t)
		f.weather(windy)
		f.coated("paint", f.deck, "04-06 08:50-"+to).Working = map[string]int{"09:49": 59, "09:50": 60}[to]
		f.broken(rule, "may not be put on")
	}
	for until, rule := range map[string]string{"applied": "", "touch dry": "R25", "hard dry": "R25"} {
		f := newFix(t)
		f.weather(windy)
		f.coated("paint", f.deck, "04-06 09:00-10:00").Paint.LimitsUntil = until
		f.broken(rule, "may not be put on")
	}
	f := newFix(t)
	f.weather(in(43, 44, func(w *site.Weather) { w.Wind = 10.1 }))
	f.coated("paint", f.deck, "04-06 09:00-10:00").Paint.LimitsUntil = "hard dry"
	f.broken("R25", "may not be put on")
	f = newFix(t)
	f.weather(func(_ int, w *site.Weather) { w.Wet, w.Wind = true, 20 })
	f.coated("paint", f.deck, "04-06 09:00-10:00")
	f.deck.Sheltered = true
	f.broken("", "")
	f.deck.Sheltered, f.deck.Indoors = false, true
	f.broken("", "")
}

// What is prepared on Tuesday at 10:00 holds four hours on site, and not past the damp (R25).
func TestPreparedSteelIsCoatedInTime(t *testing.T) {
	for _, c := range []struct {
		what, coat string
		damp       int // hour
		set        func(*fix, *tasks.Task, *tasks.Link)
		rule       string
	}{
		{"in time", "04-06 13:00-14:00", 0, nil, ""},
		{"too late", "04-06 14:30-15:30", 0, nil, "R25"},
		{"it holds longer", "04-06 14:30-15:30", 0, func(_ *fix, g *tasks.Task, _ *tasks.Link) {
			g.HoldsFor = tasks.Amount{Value: 300, Pos: tasks.Pos{Line: 1}}
		}, ""},
		{"the link says so", "04-06 14:30-15:30", 0, func(_ *fix, _ *tasks.Task, l *tasks.Link) { l.Max = &tasks.Wait{Minutes: 600} }, ""},
		{"it has turned damp", "04-06 13:00-14:00", 36, nil, "R25"},
		{"a wipe holds nothing", "04-06 14:30-15:30", 0, func(_ *fix, g *tasks.Task, _ *tasks.Link) { g.Method = "solvent wipe" }, ""},
	} {
		t.Run(c.what, func(t *testing.T) {
			f := newFix(t)
			f.weather(func(h int, w *site.Weather) {
				if c.damp > 0 && h == c.damp {
					w.Steel = 7
				}
			})
			g := f.work("grind", tasks.Prep, f.deck, 60, need("fitter"))
			g.Task.Grade = "St 3"
			f.put(g, "Tom", "04-06 09:00-10:00")
			p := f.coated("paint", f.deck, c.coat)
			p.Paint.DryHours = 0
			p.Task.Links = []tasks.Link{{Task: "grind"}}
			if c.set != nil {
				c.set(f, g.Task, &p.Task.Links[0])
			}
			f.broken(c.rule, "grind has prepared")
		})
	}
	left := newFix(t)
	half := left.work("grind", tasks.Prep, left.deck, 60, need("fitter"))
	left.put(half, "Tom", "04-06 17:30-18:00", "04-07 08:00-08:30")
	p := left.coated("paint", left.deck, "04-07 09:00-10:00")
	p.Task.Links = []tasks.Link{{Task: "grind"}}
	left.broken("R25", "is left half done")
	f := newFix(t)
	f.weather(func(h int, w *site.Weather) {
		if h == 33 {
			w.Steel = 7
		}
	})
	g := f.work("grind", tasks.Prep, f.deck, 60, need("fitter"))
	f.put(g, "Tom", "04-06 09:00-10:00")
	f.broken("R25", "would turn")
}

// The slip is free from 08:53 to 15:07 on Tuesday; what is put on there is fit for water after two hours at
// 10 °C (R26).
func TestWaterOverFreshWork(t *testing.T) {
	set := func(t *testing.T) *fix {
		f := newFix(t)
		f.pier.Open = week(t, "Mon-Sat 08:00-18:00")
		tide := &site.TideTable{}
		for k := range 120 {
			w := site.Water{At: int64(at(t, "03-20 05:00")) + int64(k)*360, Metres: 4, High: k%2 == 0}
			if !w.High {
				w.Metres = 1
			}
			tide.Waters = append(tide.Waters, w)
		}
		f.pier.Tide, f.slip.Level = tide, tasks.Amount{Value: 2.6, Pos: tasks.Pos{Line: 3}}
		return f
	}
	no, yes := false, true
	for _, c := range []struct {
		what, pieces string
		may          *bool
		rule         string
	}{
		{"in time", "04-06 12:07-13:07", nil, ""},
		{"too late", "04-06 12:08-13:08", nil, "R26"},
		{"too late, and its author says that it may", "04-06 12:08-13:08", &yes, ""},
	} {
		f := set(t)
		s := f.coated("paint", f.slip, c.pieces)
		s.Task.Covered = c.may
		f.broken(c.rule, "before it is fit for it")
	}
	for _, c := range []struct {
		what, pour string
		may        *bool
		rule       string
	}{{"three hours to stand before 15:07", "04-06 11:07-12:07", &no, ""}, {"a minute too long", "04-06 11:08-12:08", &no, "R26"}, {"nobody minds", "04-06 11:08-12:08", nil, ""}} {
		f := set(t)
		pour := f.work("pour", tasks.Plain, f.slip, 60, need("fitter"))
		pour.InOneGo, pour.OverMeals = true, true
		f.put(pour, "Tom", c.pour)
		pour.Task.Covered, pour.Task.Standing = c.may, tasks.Range{Pos: tasks.Pos{Line: 4}}
		f.link(pour, f.standing(pour.Task, "sets", 180), 0, 0)
		p := plan.Step{Task: "pour", Step: "sets", Start: f.p.Steps[0].Finish, Finish: f.p.Steps[0].Finish + 180}
		p.Pieces = []hours.Span{{From: p.Start, To: p.Finish}}
		f.p.Steps = append(f.p.Steps, p)
		f.broken(c.rule, "is covered by water before it is done")
	}
}

// Levels give way to pressure and surge: 30 hPa are 30 cm, and 20 cm of surge (R26).
func TestAllowanceByOwnArithmetic(t *testing.T) {
	f := &tasks.Workface{Level: tasks.Amount{Value: 2.6, Pos: tasks.Pos{Line: 1}}, Place: &tasks.Place{}}
	for _, c := range []struct {
		allow site.Allowance
		want  float64
	}{{site.Allowance{LeastPressure: 983, Surge: 0.2}, 2.1}, {site.Allowance{Surge: 0.2}, 2.4}, {site.Allowance{LeastPressure: 1020}, 2.6}, {site.Allowance{GreatestPressure: 1020}, 2.3}} {
		f.Place.Sea = tasks.Sea{Allow: c.allow, AllowPos: tasks.Pos{Line: 1}}
		if got, theirs := covers(f), f.Covers(); got < c.want-1e-9 || got > c.want+1e-9 || theirs < got-1e-9 || theirs > got+1e-9 {
			t.Errorf("%+v: covers at %.3f, the planner's %.3f, want %.3f", c.allow, got, theirs, c.want)
		}
	}
}

// Hot work on a frame that is coated on Tuesday from 10:00 on (R27).
func TestHotWorkAndPaint(t *testing.T) {
	for _, c := range []struct {
		what, burn string
		set        func(burn, paint *tasks.Task)
		rule       string
	}{
		{"before it", "04-06 08:30-09:30", nil, ""},
		{"after it, cured or not", "04-08 08:30-09:30", nil, "R27"},
		{"after it on another part", "04-08 08:30-09:30", func(b, p *tasks.Task) { b.Parts, p.Surface = []string{"frame/base"}, []string{"frame/posts"} }, ""},
		{"on a part of what is coated", "04-08 08:30-09:30", func(b, _ *tasks.Task) { b.Parts = []string{"frame/base"} }, "R27"},
		{"seams left bare", "04-08 08:30-09:30", func(_, p *tasks.Task) { p.Bare = tasks.Amount{Value: 900, Pos: tasks.Pos{Line: 1}} }, ""},
		{"behind it", "04-08 08:30-09:30", func(b, p *tasks.Task) { b.Parts, p.Behind = []string{"hull/side"}, []string{"hull"} }, "R27"},
		{"behind it, before it", "04-06 08:30-09:30", func(b, p *tasks.Task) { b.Parts, p.Behind = []string{"hull/side"}, []string{"hull"} }, ""},
		{"seams left bare do not help behind it", "04-08 08:30-09:30", func(b, p *tasks.Task) {
			b.Parts, p.Behind, p.Bare = []string{"hull"}, []string{"hull/side"}, tasks.Amount{Value: 900, Pos: tasks.Pos{Line: 1}}
		}, "R27"},
		{"behind something else", "04-08 08:30-09:30", func(b, p *tasks.Task) { b.Parts, p.Behind = []string{"hull/deck"}, []string{"hull/side"} }, ""},
		{"paint taken off first", "04-08 08:30-09:30", func(b, _ *tasks.Task) { b.PaintOff = true }, ""},
	} {
		t.Run(c.what, func(t *testing.T) {
			f := newFix(t)
			f.pier.FireWatch = tasks.Amount{Value: 0, Pos: tasks.Pos{Line: 1}}
			burn := f.work("burn", tasks.Cut, f.hinge, 60, need("fitter"))
			burn.Hot, burn.Task.Parts = true, []string{"frame"}
			f.put(burn, "Tom", c.burn)
			p := f.coated("paint", f.slip, "04-06 10:00-11:00")
			p.Task.Surface = []string{"frame"}
			if c.set != nil {
				c.set(burn.Task, p.Task)
			}
			f.broken(c.rule, "hot work on what paint coats")
		})
	}
}

// Hot work in a closed space with paint in the next workface is tested for gas by one of its people (R27).
func TestGasTest(t *testing.T) {
	for _, c := range []struct {
		what, tickets string
		setUp         int
		painted       string
		rule          string
	}{
		{"tested", "fitter,gas tester", 15, "04-06 09:00-10:00", ""},
		{"nobody may", "fitter", 15, "04-06 09:00-10:00", "R27"},
		{"no time for it", "fitter,gas tester", 14, "04-06 09:00-10:00", "R27"},
		{"painted later", "fitter", 14, "04-08 13:00-14:00", ""},
	} {
		t.Run(c.what, func(t *testing.T) {
			f := newFix(t)
			f.pier.FireWatch = tasks.Amount{Value: 0, Pos: tasks.Pos{Line: 1}}
			f.tom.Tickets = ticket(strings.Split(c.tickets, ",")...)
			f.hinge.Closed = true
			burn := f.work("burn", tasks.Cut, f.hinge, 60, need("fitter"))
			burn.Hot, burn.SetUp, burn.Lone = true, c.setUp, false
			from := at(t, "04-08 08:30")
			f.put(burn, "Tom", "04-08 08:30-"+(from+60+hours.Minute(c.setUp)).In(london(t)).Format("15:04"))
			f.coated("paint", f.deck, c.painted)
			f.broken(c.rule, map[bool]string{true: "no time for the gas test", false: "nobody who works on it may test for gas"}[c.setUp < 15])
		})
	}
}
