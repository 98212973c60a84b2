package check

import (
	"fmt"
	"go/ast"
	"go/parser"
	"go/token"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/site"

	"pgregory.net/rapid"
)

func TestValid(t *testing.T) {
	for _, tc := range []struct {
		name  string
		build func(*fix)
	}{
		{"an empty plan of no work", func(*fix) {}},
		{"a weld over a night with its watches", hot},
		{"a coat and hot work beside it", coated},
		{"a relief team", relieved},
		{"service runs on past the window", func(f *fix) {
			c := f.task("paint", tasks.Coat, f.pier, f.deck)
			s := f.film(c, "service", 7*1440)
			s.Site = false
			f.put(s, "", "04-09 16:00-16:30")
			f.p.Steps[0].Finish = f.p.Steps[0].Start + 7*1440
			f.p.Steps[0].Pieces[0].To = f.p.Steps[0].Finish
		}},
		{"a cure sums by the minute", func(f *fix) {
			s := f.film(f.task("paint", tasks.Coat, f.pier, f.deck), "dry 1", 0)
			noon := at(t, "04-06 12:00") // a third in the first hour, then twice as fast
			s.Rate = func(m hours.Minute) float64 {
				if m < noon {
					return 1.0 / 180
				}
				return 2.0 / 180
			}
			f.put(s, "", "04-06 11:00-13:00")
		}},
		{"a night shift over the change of the clocks", func(f *fix) {
			// 28 March: 01:00 becomes 02:00, so 22:00 to 06:00 is seven hours, of which six are worked.
			f.shop.Open = week(t, "Sat 22:00-06:00")
			f.put(f.step(f.task("weld", tasks.Plain, f.shop, nil), "weld", 360, need("fitter")), "Tom", "03-27 23:00-06:00")
		}},
		{"watches shared in one workface", func(f *fix) {
			_, p := f.weldAtHinge()
			cut := f.work("cut", tasks.Cut, f.hinge, 30, need("fitter"), tasks.Need{Ticket: tasks.Ticket{Name: "fire watch"}, Count: 1, Watch: true})
			cut.Hot, cut.Lone = true, true
			q := f.put(cut, "Ruaridh,Tom", "04-07 08:00-08:30")
			f.watch(q, "Tom", "04-07 08:30-09:30")
			p.Watches[1].Person = "Ruaridh" // free since half past eight
		}},
		{"a watch through a meal", func(f *fix) {
			s := f.work("cut", tasks.Cut, f.slip, 30, need("weld"))
			s.Hot, s.Lone = true, true
			f.watch(f.put(s, "Ines", "04-06 11:15-11:45"), "Tom", "04-06 11:45-12:45")
		}},
		{"no watch after a meal", func(f *fix) {
			s := f.work("cut", tasks.Cut, f.slip, 60, need("weld"))
			s.Hot, s.Lone = true, true
			f.watch(f.put(s, "Ines", "04-06 11:30-12:00", "04-06 12:30-13:00"), "Tom", "04-06 13:00-14:00")
		}},
		{"somebody who comes later by their own means", func(f *fix) {
			fitUp(f)
			f.job.Trips[0].Leaves -= 6 * 60 // for the others the way is longer than a duty
			f.job.Trips[0].Out[0].From -= 6 * 60
			f.tom.From = moment(t, "04-05 09:00")
			f.move(0, "04-05 16:30-17:30")
		}},
		{"a generator that goes along is no limit at home, where no supply is stated", func(f *fix) {
			f.mate.Places = []string{"shop"}
			f.job.Kit = []*tasks.Kit{{Name: "generator", Count: 1, Gives: 5}}
			s := f.step(f.task("cut", tasks.Cut, f.shop, nil), "cut", 60, need("fitter"))
			s.Power = 9
			f.put(s, "Ruaridh", "04-02 08:00-09:00")
		}},
		{"home work pauses while its worker is away", func(f *fix) {
			s := f.step(f.task("cut", tasks.Cut, f.shop, nil), "cut", 120, need("fitter"))
			f.put(s, "Tom", "04-02 16:00-17:00", "04-12 08:00-09:00")
		}},
		{"neighbours only by one side's word, and a clash switched off", func(f *fix) {
			coated(f)
			f.weldEarlier("04-06 09:30-10:30", "04-06 10:30-11:30")
			f.job.NoClash = []tasks.Clash{{A: "wet film", B: "hot work"}, {A: "Hot work", B: "solvent"}}
		}},
		{"standing time that keeps somebody", func(f *fix) {
			s := f.standing(f.task("resin", tasks.Plain, f.pier, f.deck), "set", 120)
			s.Needs = []tasks.Need{need("fitter")}
			f.put(s, "Tom", "04-06 13:00-15:00")
		}},
	} {
		t.Run(tc.name, func(t *testing.T) {
			f := newFix(t)
			tc.build(f)
			f.wants("")
		})
	}
}

// TestMealOrStop: a pause of two hours is a meal, one minute more is a stop, and so is any pause
// in which the workface cannot be reached; a stop takes set-up and a fire watch (R6).
func TestMealOrStop(t *testing.T) {
	for _, tc := range []struct{ opens, last, rule string }{
		{"14:00", "04-06 14:00-14:30", ""},
		{"14:01", "04-06 14:01-14:31", "R6"},
	} {
		f := newFix(t)
		f.pier.Open = week(t, "daily 08:00-12:00 "+tc.opens+"-18:00")
		s := f.work("fit", tasks.Test, f.slip, 60, need("fitter"))
		s.InOneGo, s.OverMeals = true, true
		f.put(s, "Tom", "04-06 11:30-12:00", tc.last)
		f.wants(tc.rule)
	}
	f := newFix(t)
	s := f.work("fit", tasks.FitUp, f.slip, 60, need("fitter"))
	s.SetUp = 10
	f.put(s, "Tom", "04-06 11:20-12:00", "04-06 12:30-13:00")
	f.slip.Reach = []tasks.Slot{slot(t, "04-06 08:00-12:10"), slot(t, "04-06 12:20-16:00")} // covered for ten minutes of the meal
	f.wants("R8")
	f.move(0, "04-06 11:20-12:00", "04-06 12:30-13:10")
	f.wants("")
}

// TestOpeningUpOfAWorkface: opening up passes once the place is open and the crew has come, clearing up before it
// closes, and not in the night before or after (R5).
func TestOpeningUpOfAWorkface(t *testing.T) {
	for _, tc := range []struct{ when, rule string }{
		{"04-06 08:15-09:15", ""}, {"04-06 08:14-09:14", "R5"}, {"04-06 16:50-17:50", ""}, {"04-06 16:51-17:51", "R5"},
		{"04-05 12:45-13:45", ""}, {"04-05 12:44-13:44", "R5"},
	} {
		f := newFix(t)
		f.slip.Reach = []tasks.Slot{slot(t, "04-05 02:00-20:00"), slot(t, "04-06 02:00-22:00")}
		f.slip.OpeningUp.Value, f.slip.ClearingUp.Value = 15, 10
		opens := at(t, "04-05 12:30") // the boat is unloaded
		f.w.Window.Opens, f.job.Trips[0].Opens, f.job.Trips[0].Out[1].To = opens, opens, opens
		s := f.work("fit", tasks.FitUp, f.slip, 60, need("fitter"))
		f.put(s, "Tom", tc.when)
		f.wants(tc.rule)
	}
}

// TestWatchesWithoutAWorkface: one person keeps two watches in one workface, but not where no workface is named (R13).
func TestWatchesWithoutAWorkface(t *testing.T) {
	for _, tc := range []struct {
		named bool
		rule  string
	}{{true, ""}, {false, "R13"}} {
		f := newFix(t)
		face := f.slip
		if !tc.named {
			face = nil
		}
		for i, name := range []string{"cut", "burn"} {
			s := f.step(f.task(name, tasks.Cut, f.pier, face), "cut", 30, need("fitter"))
			s.Hot, s.Lone = true, true
			who := []string{"Tom", "Ruaridh"}[i]
			f.watch(f.put(s, who, "04-06 09:00-09:30"), "Tom", "04-06 09:30-10:30")
		}
		f.wants(tc.rule)
	}
}

// TestClockChange: the hours of an opening that the clocks jump into are not there to be worked.
func TestClockChange(t *testing.T) {
	f := newFix(t)
	f.shop.Open = week(t, "Sat 22:00-06:00")
	s := f.step(f.task("weld", tasks.Plain, f.shop, nil), "weld", 420, need("fitter"))
	f.put(s, "Tom", "03-27 22:00-06:00")
	f.wants("")
	s.HandsOn, s.Working = 480, 480 // eight hours on the clock's face
	f.wants("R5")
}

// TestLate: the hours go on past the close, and lateness alone is told apart.
func TestLate(t *testing.T) {
	f := newFix(t)
	f.weldAtHinge()
	f.move(0, "04-09 15:00-17:00", "04-10 08:00-11:40")
	p := &f.p.Steps[0]
	p.Watches = nil
	f.watch(p, "Tom", "04-09 17:00-18:00", "04-10 11:40-12:40")
	f.wants("R2")
	_, all := f.rules()
	if !Late(all) {
		t.Error("a late plan is not called late")
	}
	f.job.Tasks[0].Deadline = moment(t, "04-09 16:00")
	if _, all = f.rules(); !Late(all) || len(all) != 2 || all[1].Rule != "R18" {
		t.Errorf("want R2 and R18, both late: %v", all)
	}
	p.Watches = p.Watches[:1]
	if _, all = f.rules(); Late(all) {
		t.Errorf("late and without its watch is called late: %v", all)
	}
	if Late(nil) {
		t.Error("a plan without breach is called late")
	}
	watchOnly := newFix(t) // the work is done in time, its watch is not
	s := watchOnly.work("cut", tasks.Cut, watchOnly.deck, 60, need("weld"))
	s.Hot, s.Lone = true, true
	watchOnly.watch(watchOnly.put(s, "Ines", "04-09 15:30-16:30"), "Tom", "04-09 16:30-17:30")
	watchOnly.wants("R2")
}

// TestBreachSays: a breach names the step, the line and both numbers.
func TestBreachSays(t *testing.T) {
	f := newFix(t)
	twoFits(f)
	f.link(f.w.Steps[0], f.w.Steps[1], 90, expand.NoMax)
	f.w.Links[0].Pos = tasks.Pos{File: "job.yaml", Line: 42, Col: 9}
	_, all := f.rules()
	want := Breach{Rule: "R10", Step: "second / fit-up", Other: "first / fit-up", Pos: f.w.Links[0].Pos, Need: "at least 90 min",
		Have: "2027-04-06 09:00 to 2027-04-06 10:00", Text: "test: comes too early"}
	if len(all) != 1 || all[0] != want {
		t.Errorf("have %+v", all)
	}
	if s := all[0].String(); s != "R10: second / fit-up: test: comes too early (needs at least 90 min, has 2027-04-06 09:00 to 2027-04-06 10:00)" {
		t.Errorf("written %q", s)
	}
}

// TestStandsAlone: the checker shares nothing with the solver.
func TestStandsAlone(t *testing.T) {
	files, err := filepath.Glob("*.go")
	if err != nil || len(files) == 0 {
		t.Fatal(err)
	}
	for _, name := range files {
		if strings.HasSuffix(name, "_test.go") {
			continue
		}
		f, err := parser.ParseFile(token.NewFileSet(), name, nil, 0)
		if err != nil {
			t.Fatal(err)
		}
		for _, i := range f.Imports {
			if path := strings.Trim(i.Path.Value, `"`); strings.HasPrefix(path, "sailby/plan/") {
				t.Errorf("%s imports %s", name, path)
			}
		}
		ast.Inspect(f, func(n ast.Node) bool {
			if s, ok := n.(*ast.SelectorExpr); ok && slices.Contains([]string{"Presence", "Travel", "NewSet", "Spans", "Joined", "ClashTable", "Holds", "HoldsAll"}, s.Sel.Name) {
				t.Errorf("%s takes %s from elsewhere", name, s.Sel.Name)
			}
			return true
		})
	}
}

// TestTide: the water decides minute by minute, and the way off is kept before it comes.
func TestTide(t *testing.T) {
	tide, err := site.ReadTideTable("pier.csv", strings.NewReader("# zone: UTC\n# datum: chart\n"+
		"2027-04-06 02:00,4.0,HW\n2027-04-06 08:00,1.0,LW\n2027-04-06 14:00,4.0,HW\n2027-04-06 20:00,1.0,LW\n"))
	if err != nil {
		t.Fatal(err)
	}
	f := newFix(t)
	fitUp(f)
	f.pier.Tide = tide
	f.deck.Level = tasks.Amount{Value: 2.5, Pos: tasks.Pos{Line: 5}} // below half tide: 5:00 to 11:00 UTC, 6:00 to 12:00 on the clock
	f.move(0, "04-06 10:59-11:59")
	f.wants("")
	f.move(0, "04-06 11:00-12:00")
	f.wants("R5")
	f.deck.WayOff.Value = 30
	f.move(0, "04-06 10:29-11:29")
	f.wants("")
	f.move(0, "04-06 10:30-11:30")
	f.wants("R5")
	f.move(0, "04-07 08:00-09:00") // the table says nothing of it
	f.wants("R5")
}

// TestLegs: a leg is never cut; the shift that holds it ends with it, and rest follows (R15).
func TestLegs(t *testing.T) {
	f := newFix(t)
	trip := f.job.Trips[0]
	trip.Leaves, trip.Out[0].From = at(t, "04-04 16:00"), at(t, "04-04 16:00") // sixteen hours to Monday 8:00
	fitUp(f)
	f.move(0, "04-05 17:00-17:59")
	f.w.Steps[0].HandsOn, f.w.Steps[0].Working = 59, 59
	f.wants("R15") // rested from 19:00 only
	f.move(0, "04-06 08:00-08:59")
	f.wants("")
	// Home work on the day of leaving counts from where the duty of the way allows.
	g := newFix(t)
	trip = g.job.Trips[0]
	trip.Leaves, trip.Out[0].From = at(t, "04-04 20:00"), at(t, "04-04 20:00")
	trip.Arrives, trip.Out[0].To, trip.Out[1].From = at(t, "04-04 23:00"), at(t, "04-04 23:00"), at(t, "04-04 23:00")
	trip.Opens, trip.Out[1].To, g.w.Window.Opens = at(t, "04-05 00:00"), at(t, "04-05 00:00"), at(t, "04-05 00:00")
	g.shop.Open = week(t, "daily 08:00-20:00")
	g.put(g.step(g.task("cut", tasks.Cut, g.shop, nil), "cut", 60, need("fitter")), "Tom", "04-04 12:00-13:00")
	g.wants("")
	g.move(0, "04-04 11:59-12:59")
	g.wants("R15")
}

// TestRestLaw: whatever the hours, no shift is longer than the duty and all are a rest apart.
func TestRestLaw(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		f := newFix(t)
		c := &checker{w: f.w, span: f.w.Span, lo: f.w.Span.From, hi: f.w.Span.From + 6*1440}
		work := c.line(false)
		for i := 0; i < 8; i++ {
			from := c.lo + hours.Minute(rapid.IntRange(0, 6*1440).Draw(rt, "from"))
			work.fill(hours.Span{From: from, To: from + hours.Minute(rapid.IntRange(1, 900).Draw(rt, "len"))}, true)
		}
		shift := c.shifts(work, nil)
		for from := c.lo; from < c.hi; from++ {
			if !shift.has(from) || shift.has(from-1) {
				continue
			}
			to := from
			for shift.has(to) {
				to++
			}
			if to-from > 720 || !work.has(from) || !work.has(to-1) {
				rt.Fatalf("shift of %d min", to-from)
			}
			for u := to; u < to+660; u++ {
				if shift.has(u) {
					rt.Fatalf("rest of %d min", u-to)
				}
			}
		}
	})
}

// TestAnyPlan: nonsense is judged, never a panic.
func TestAnyPlan(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		f := newFix(t)
		hot(f)
		coated(f)
		minute := rapid.Custom(func(rt *rapid.T) hours.Minute {
			return hours.Minute(rapid.SampledFrom([]int64{0, -1 << 60, 1 << 40, int64(f.w.Span.From), int64(f.w.Span.To)}).Draw(rt, "base") +
				rapid.Int64Range(-3000, 3000).Draw(rt, "off"))
		})
		for i := range f.p.Steps {
			p := &f.p.Steps[i]
			p.Start, p.Finish = minute.Draw(rt, "start"), minute.Draw(rt, "finish")
			p.Pieces = []hours.Span{{From: p.Start, To: minute.Draw(rt, "to")}, {From: minute.Draw(rt, "from"), To: p.Finish}}
			p.People = rapid.SliceOfN(rapid.SampledFrom([]string{"Ines", "Tom", "nobody", "Ms Reid"}), 0, 3).Draw(rt, "people")
			p.Shifts = rapid.SliceOfN(rapid.IntRange(-1, 3), 0, 3).Draw(rt, "shifts")
			p.Watches = []plan.Watch{{Span: hours.Span{From: minute.Draw(rt, "watch"), To: p.Finish}, Person: "Tom"}}
		}
		if len(Plan(f.w, f.p)) == 0 {
			rt.Fatal("nonsense is accepted")
		}
	})
	if len(Plan(nil, nil)) == 0 || len(Plan(&expand.Work{}, &plan.Plan{})) == 0 {
		t.Error("nothing at all is accepted")
	}
}

// chain plans n fit-ups of half an hour by three people, one after the other.
func chain(tb testing.TB, n int) *fix {
	f := newFix(tb)
	f.pier.Open = week(tb, "daily 08:00-18:00")
	f.job.Trips[0].Closes, f.w.Window.Closes = at(tb, "10-01 00:00"), at(tb, "10-01 00:00")
	f.job.Trips[0].Departs, f.job.Trips[0].Home, f.job.Trips[0].Back = f.w.Window.Closes, f.w.Window.Closes, nil
	start := at(tb, "04-06 08:00")
	for i := 0; i < n; i++ {
		s := f.work(fmt.Sprint("fit ", i), tasks.FitUp, f.deck, 30, need("fitter"))
		day, half := i/20, i%20
		from := start + hours.Minute(day*1440+half*30)
		p := f.put(s, "Tom")
		p.Pieces = []hours.Span{{From: from, To: from + 30}}
		p.Start, p.Finish = from, from+30
		if i > 0 {
			f.link(f.w.Steps[i-1], s, 0, expand.NoMax)
		}
	}
	f.w.Span.To = start + hours.Minute((n/20+5)*1440)
	return f
}

func TestLongPlan(t *testing.T) {
	chain(t, 400).wants("")
}

func BenchmarkPlan(b *testing.B) {
	for _, n := range []int{200, 2000} {
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			f := chain(b, n)
			for b.Loop() {
				Plan(f.w, f.p)
			}
		})
	}
}
