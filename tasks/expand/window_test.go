package expand

import (
	"fmt"
	"strings"
	"testing"

	"sailby/tasks"
	"sailby/tasks/hours"
)

// A trip from London time to Oslo time, which is an hour ahead: 4 h on the road and 1 h to unload.
const trips = `trips:
  - {name: short, place: pier, out: {leave: 2027-04-05 06:00, drive: 4 h, unload: 1 h}, back: {load: 90 min, leave: 2027-04-07 18:00, drive: 4 h}}
  - {name: long, place: pier, booked: yes, people: [Ines, Tom], out: {leave: 2027-04-12 06:00, drive: 4 h, unload: 1 h}, back: {load: 90 min, leave: 2027-04-16 18:00, drive: 4 h}}
  - {name: later, place: pier, out: {leave: 2027-04-19 06:00, drive: 4 h, unload: 1 h}, back: {load: 90 min, leave: 2027-04-21 18:00, drive: 4 h}}`

const two = `places:
  shop: {open: [Mon-Fri 08:00-12:00 12:30-17:00]}
  pier: {zone: Europe/Oslo, open: [daily 07:00-19:00], workfaces: {hinge: {}}}`

func TestTheWindowIsThatOfTheTripNamedElseBookedElseTheFirst(t *testing.T) {
	unbooked := strings.ReplaceAll(trips, "booked: yes, ", "")
	for _, tc := range []struct{ what, trips, name, want, opens string }{
		{"the booked one", trips, "", "long", "04-12 11:00"},
		{"the one named", trips, "later", "later", "04-19 11:00"},
		{"the first of those not booked", unbooked, "", "short", "04-05 11:00"},
	} {
		w := on(t, Basis{Trip: tc.name}, tc.trips, two, "tasks: {it: {at: pier, hours: 1 h}}")
		if w.Trip.Name != tc.want || w.Window.Opens != at(t, tc.opens) || w.Window.Closes != w.Trip.Departs-90 {
			t.Errorf("%s: %q from %v", tc.what, w.Trip.Name, w.Window.Opens.In(w.Job.Zone))
		}
	}
	w := likely(t, "tasks: {it: {at: pier, hours: 1 h}}")
	if w.Trip != nil || w.Window.Opens != at(t, "04-05 07:00") || w.Window.Closes != at(t, "04-09 19:00") {
		t.Errorf("a plain window is %v", w.Window)
	}
}

func TestTheSpanReachesFromHomeWorkToWellPastTheWindow(t *testing.T) {
	for _, tc := range []struct {
		what, begin string
		from        hours.Minute
	}{
		{"two weeks before leaving, from midnight", "", at(t, "03-29 00:00")},
		{"the time given", "begin: 2027-04-01 07:30", at(t, "04-01 07:30")},
	} {
		w := on(t, Basis{Trip: "long"}, trips, two, tc.begin+"\n", "tasks: {it: {at: pier, hours: 1 h}}")
		if w.Span.From != tc.from || w.Span.To != w.Trip.Home+PastDays*1440 {
			t.Errorf("%s: %v to %v", tc.what, w.Span.From.In(w.Job.Zone), w.Span.To.In(w.Job.Zone))
		}
	}
	long := likely(t, "window: {place: pier, opens: 2027-04-05 07:00, closes: 2027-06-05 19:00}", "tasks: {it: {at: pier, hours: 1 h}}")
	if past := long.Span.To - long.Window.Closes; past != long.Window.Closes-long.Window.Opens {
		t.Errorf("a window longer than three weeks is laid out twice over, not %d min more", past)
	}
}

// where writes somebody's stays and legs: "home -> 04-12 06:00, site 04-12 10:00 -> ...".
func where(w *Work, name string) string {
	clock := func(m hours.Minute) string {
		switch m {
		case w.Span.From:
			return "begin"
		case w.Span.To:
			return "end"
		}
		return m.In(w.Job.Zone).Format("02 15:04")
	}
	var out []string
	for _, s := range w.Presence[name] {
		out = append(out, map[bool]string{true: "site", false: "home"}[s.Site]+" "+clock(s.From)+"-"+clock(s.To))
	}
	legs := hours.NewSet(w.Travel[name]...)
	for _, l := range legs {
		out = append(out, "way "+clock(l.From)+"-"+clock(l.To))
	}
	return strings.Join(out, ", ")
}

// R1, by the clock of London: leaves 06:00, there 10:00, unloaded 11:00; loading from 15:30, away 17:00, home 21:00.
func TestWhereEverybodyIs(t *testing.T) {
	const there = "way 12 06:00-12 11:00, way 16 15:30-16 21:00"
	for _, tc := range []struct{ what, person, want string }{
		{"goes along", "{}", "home begin-12 06:00, site 12 10:00-16 15:30, home 16 21:00-end, " + there},
		{"is tied to the shop", "{places: shop}", "home begin-end"},
		{"is tied to the site", "{places: pier}", "home begin-12 06:00, site 12 10:00-16 15:30, home 16 21:00-end, " + there},
		{"comes to the shop before the trip", "{from: 2027-04-08 08:00, places: [shop, pier]}", "home 08 08:00-12 06:00, site 12 10:00-16 15:30, home 16 21:00-end, " + there},
		{"comes to the site later, local to it", "{from: 2027-04-14 08:00}", "site 14 07:00-16 15:30, home 16 21:00-end, way 16 15:30-16 21:00"},
		{"comes as the others arrive, and is on duty while they unload", "{from: 2027-04-12 11:00}", "site 12 10:00-16 15:30, home 16 21:00-end, way 16 15:30-16 21:00"},
		{"leaves early", "{until: 2027-04-14 17:00}", "home begin-12 06:00, site 12 10:00-14 16:00, way 12 06:00-12 11:00"},
		{"comes for a day", "{from: day 2 08:00, until: day 2 17:00}", "site 13 07:00-13 16:00"},
		{"stays until after the way home", "{until: 2027-04-18 12:00}", "home begin-12 06:00, site 12 10:00-16 15:30, home 16 21:00-18 11:00, " + there},
		{"is an inspector", "{outside: yes, places: pier, booked: day 2 10:00-12:00}", ""},
	} {
		w := likely(t, trips, two, "people: {Ines: {tickets: [fitter]}, Tom: "+tc.person+"}", "tasks: {it: {at: pier, hours: 1 h}}")
		same(t, tc.what, where(w, "Tom"), tc.want)
	}
	w := likely(t, trips, two, "people: {Ines: {}, Tom: {}, Ann: {}}", "tasks: {it: {at: pier, hours: 1 h}}")
	same(t, "somebody who does not go stays at home", where(w, "Ann"), "home begin-end")
}

func TestWhereEverybodyIsForAPlainWindow(t *testing.T) {
	w := likely(t, "people: {Ines: {}, Tom: {places: shop}, Ann: {from: 2027-04-06 08:00}}", "tasks: {it: {at: pier, hours: 1 h}}")
	same(t, "at the site from its opening to its close", where(w, "Ines"), "home begin-05 07:00, site 05 07:00-09 19:00, home 09 19:00-end")
	same(t, "tied to the shop", where(w, "Tom"), "home begin-end")
	same(t, "comes later", where(w, "Ann"), "site 06 08:00-09 19:00, home 09 19:00-end")
}

// R18: for a plan that is late the same hours are carried on past the window, and nobody goes home.
func TestCarriedOnPastTheWindow(t *testing.T) {
	for _, window := range []string{trips, usual[3]} {
		w := likely(t, window, two, "people: {Ines: {}, Tom: {places: shop}}", "tasks: {it: {at: pier, hours: 1 h}}")
		before := where(w, "Ines")
		c := w.Carry()
		if got := where(c, "Ines"); !strings.Contains(got, "site") || strings.Contains(got, "home 16") || strings.Contains(got, "home 09") {
			t.Errorf("carried on she is: %s", got)
		}
		if last := c.Presence["Ines"]; last[len(last)-1].To != c.Span.To || !last[len(last)-1].Site {
			t.Error("the stay is not carried on to the end")
		}
		if !c.Carried || w.Carried || where(w, "Ines") != before || where(c, "Tom") != "home begin-end" {
			t.Error("the work that it was asked of has changed, or somebody who does not go")
		}
	}
}

func TestStepsAtTheSiteLieInTheWindow(t *testing.T) {
	w := likely(t, trips, two, `tasks:
  home: {at: shop, hours: 1 h}
  site: {at: pier, hours: 1 h}
  later: {at: pier/hinge, hours: 1 h, not before: day 2 08:00, must be done by: day 3 17:00}
  early: {at: pier, hours: 1 h, not before: 2027-04-09 08:00}
  wait: {at: pier, standing: 3 h, not before: day 2 08:00, must be done by: day 4 17:00}
  after: {at: pier, hours: 1 h, standing: 3 h, not before: day 2 08:00, must be done by: day 4 17:00}`)
	opens, closes := w.Window.Opens, w.Window.Closes
	for _, tc := range []struct {
		key      string
		from, by hours.Minute
	}{
		{"home / plain", hours.Never, hours.Far},
		{"site / plain", opens, closes},
		{"later / plain", in(t, "Europe/Oslo", "04-13 08:00"), in(t, "Europe/Oslo", "04-14 17:00")},
		{"early / plain", opens, closes},
		{"wait / standing", in(t, "Europe/Oslo", "04-13 08:00"), in(t, "Europe/Oslo", "04-15 17:00")},
		{"after / plain", in(t, "Europe/Oslo", "04-13 08:00"), in(t, "Europe/Oslo", "04-15 17:00")}, // R18: its last hands-on step
		{"after / standing", opens, closes},
	} {
		s := w.step(t, tc.key)
		same(t, tc.key+": not before, by, site", []any{s.NotBefore, s.Deadline, s.Site}, []any{tc.from, tc.by, s.Place.Name == "pier"})
	}
	var got []string
	for _, d := range w.Deadlines {
		name := "the window"
		if d.Task != nil {
			name = d.Step.Key()
		}
		got = append(got, name)
	}
	same(t, "deadlines", got, []string{"the window", "later / plain", "wait / standing", "after / plain"})
}

// R1: what is also worked on or lifted at the site is finished before the trip leaves, and dry to handle.
func TestHomeWorkOnWhatTravelsIsDoneBeforeLeaving(t *testing.T) {
	w := likely(t, trips, two, "assemblies: {frame: {mass: 100 kg}, mast: {mass: 80 kg}, bench: {mass: 50 kg}}", `tasks:
  weld frame: {kind: weld, at: shop, hours: 1 h, part: frame}
  prime frame: {kind: coat, at: shop, hours: 1 h, surface: frame, coats: [primer, primer]}
  weld mast: {kind: weld, at: shop, hours: 1 h, part: mast, must be done by: 2027-04-08 12:00}
  weld bench: {kind: weld, at: shop, hours: 1 h, part: bench}
  load frame: {kind: lift, at: shop, hours: 1 h, lifts: frame}
  hang frame: {kind: lift, at: pier, hours: 1 h, lifts: frame}
  fit mast: {kind: fit-up, at: pier, hours: 1 h, part: mast}
  maybe bench: {kind: fit-up, at: pier, hours: 1 h, part: bench, chance: 10 %}`)
	leaves := w.Trip.Leaves
	for key, by := range map[string]hours.Minute{
		"weld frame / weld": leaves, "prime frame / coat 1": leaves, "prime frame / coat 2": leaves, "prime frame / hard dry": leaves,
		"load frame / lift": leaves, "weld mast / weld": at(t, "04-08 12:00"), "weld bench / weld": hours.Far, "hang frame / lift": w.Window.Closes,
	} {
		if got := w.step(t, key).Deadline; got != by {
			t.Errorf("%s is due at %v, want %v", key, got.In(w.Job.Zone), by.In(w.Job.Zone))
		}
	}
	plain := likely(t, "assemblies: {frame: {mass: 100 kg}}", "tasks: {weld: {kind: weld, at: shop, hours: 1 h, part: frame}, hang: {kind: lift, at: pier, hours: 1 h, lifts: frame}}")
	if got := plain.step(t, "weld / weld").Deadline; got != plain.Window.Opens {
		t.Errorf("with a plain window it is due when that opens, not %v", got)
	}
}

func TestMomentsOfTheWindow(t *testing.T) {
	w := likely(t, trips, two, "tasks: {it: {at: pier, hours: 1 h}}").Window // Monday 11:00 to Friday 15:30 in London, an hour more in Oslo
	oslo := w.Place.Zone
	moment := func(m tasks.Moment) string {
		at, clock, ok := w.At(m)
		return fmt.Sprintf("%s %d %v", at.In(oslo).Format("01-02 15:04"), clock, ok)
	}
	for _, tc := range []struct {
		what string
		m    tasks.Moment
		want string
	}{
		{"day 1 is the day on which it opens", tasks.Moment{Day: 1, Minute: 615}, "04-12 10:15 0 true"},
		{"day 3", tasks.Moment{Day: 3, Minute: 615}, "04-14 10:15 0 true"},
		{"a weekday", tasks.Moment{ByName: true, Weekday: 3, Minute: 615}, "04-14 10:15 0 true"},
		{"a date, on another clock", tasks.Moment{Date: hours.Date{Year: 2027, Month: 4, Day: 13}, Minute: 480, Zone: hoursZone(t)}, "04-13 09:00 0 true"},
		{"24:00", tasks.Moment{Day: 1, Minute: 1440}, "04-13 00:00 0 true"},
	} {
		same(t, tc.what, moment(tc.m), tc.want)
	}
	if _, _, ok := w.At(tasks.Moment{ByName: true, Weekday: 0}); ok {
		t.Error("there is no Sunday in the window")
	}
	if _, clock, ok := w.At(tasks.Moment{Date: hours.Date{Year: 2027, Month: 3, Day: 28}, Minute: 150}); ok || clock != hours.Gap {
		t.Error("the clocks jump over 02:30")
	}
	bad, good := tasks.Moment{ByName: true, Weekday: 0}, tasks.Moment{Day: 1, Minute: 600}
	set := w.Slots([]tasks.Slot{{From: bad, To: good}, {From: good, To: tasks.Moment{Day: 1, Minute: 720}}})
	if len(set) != 1 || set.Total() != 120 {
		t.Errorf("slots that cannot be are left out: %v", set)
	}
}
