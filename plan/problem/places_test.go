package problem

import (
	"strings"
	"testing"

	"sailby/tasks/hours"
)

// When one person with nothing else to do can work at a task, in the two days from 6 April on: every row
// is one thing that closes hours (R5, R6, R23), beside opening hours of 07:00 to 19:00.
func TestWhenWorkIsOpen(t *testing.T) {
	const all = "04-06 07:00-19:00, 04-07 07:00-19:00"
	for _, tc := range []struct{ what, pier, face, task, more, want string }{
		{what: "opening hours", want: all},
		{what: "opening up and clearing up, once round a meal", pier: "open: [daily 07:00-12:00 12:30-19:00], opening up: 20 min, clearing up: 40 min",
			want: "04-06 07:20-12:00, 04-06 12:30-18:20, 04-07 07:20-12:00, 04-07 12:30-18:20"},
		{what: "twice round a break of more than two hours", pier: "open: [daily 07:00-12:00 14:01-19:00], opening up: 20 min, clearing up: 40 min",
			want: "04-06 07:20-11:20, 04-06 14:21-18:20, 04-07 07:20-11:20, 04-07 14:21-18:20"},
		{what: "an opening too short for both", pier: "open: [daily 07:00-19:00 21:10-22:00], opening up: 20 min, clearing up: 40 min", want: "04-06 07:20-18:20, 04-07 07:20-18:20"},
		{what: "closed on a day", pier: "open: daily 07:00-19:00, closed: [2027-04-06]", want: "04-07 07:00-19:00"},
		{what: "open besides", pier: "open: daily 07:00-19:00, closed: [2027-04-06], also open: [2027-04-06 10:00-11:00]", want: "04-06 10:00-11:00, 04-07 07:00-19:00"},
		{what: "noisy work, only in its hours", pier: "open: daily 07:00-19:00, noisy work: daily 08:00-18:00", task: "noisy: yes", want: "04-06 08:00-18:00, 04-07 08:00-18:00"},
		{what: "quiet work, at any", pier: "open: daily 07:00-19:00, noisy work: daily 08:00-18:00", want: all},
		{what: "given reach", face: "reach: [2027-04-06 08:00-12:00, day 3 13:00-15:00]", want: "04-06 08:00-12:00, 04-07 13:00-15:00"},
		{what: "off in good time, and time to get there", face: "reach: [2027-04-06 08:00-12:00], way off before: 30 min, opening up: 15 min, clearing up: 20 min", want: "04-06 08:15-11:30"},
		{what: "opening up and clearing up while the place is open", face: "reach: [2027-04-06 03:00-23:00], opening up: 15 min, clearing up: 20 min", want: "04-06 07:15-18:40"},
		{what: "after the place's own opening up, before its clearing up", pier: "open: daily 07:00-19:00, opening up: 20 min, clearing up: 40 min",
			face: "reach: [2027-04-06 06:50-23:00], opening up: 15 min, clearing up: 20 min", want: "04-06 07:35-18:00"},
		{what: "a reach in which the place is never open", face: "reach: [2027-04-06 02:00-06:00, 2027-04-07 08:00-09:00], opening up: 15 min", want: "04-07 08:15-09:00"},
		{what: "dry hours", face: "dry hours: [2027-04-06 09:00-16:00]", want: "04-06 09:00-16:00"},
		{what: "a level: 3 m is passed at nine and at three", face: "level: 3.01 m", want: "04-06 09:00-15:00, 04-07 09:00-15:00"},
		{what: "covered only from another height on", face: "level: 1 m, covers at: 3.01 m, way off before: 30 min", want: "04-06 09:00-14:30, 04-07 09:00-14:30"},
		{what: "a height of tide without a level", face: "covers at: 3.01 m", want: "04-06 09:00-15:00, 04-07 09:00-15:00"},
		{what: "level and reach both hold", face: "level: 3.01 m, reach: [2027-04-06 07:00-10:00]", want: "04-06 09:00-10:00"},
		{what: "hired kit, only in its slots", task: "kit: crane", more: "hire: {crane: {slots: [2027-04-06 08:00-12:00, day 3 13:00-15:00]}}", want: "04-06 08:00-12:00, 04-07 13:00-15:00"},
		{what: "a permit, once it is issued", pier: "open: daily 07:00-19:00, permits: {hot work: {valid: daily 08:00-16:00, issue: 30 min}}", task: "hot work: yes, fire watch: 0 min", want: "04-06 08:30-16:00, 04-07 08:30-16:00"},
		{what: "a permit whose hours touch is issued once", pier: "open: daily 07:00-19:00, permits: {hot work: {valid: daily 08:00-12:00 12:00-16:00, issue: 30 min}}", task: "hot work: yes, fire watch: 0 min", want: "04-06 08:30-16:00, 04-07 08:30-16:00"},
		{what: "none is issued on a closed day, though it is open", pier: "open: daily 07:00-19:00, closed: [2027-04-06], also open: [2027-04-06 07:00-19:00], permits: {hot work: {valid: daily 08:00-16:00}}", task: "hot work: yes, fire watch: 0 min", want: "04-07 08:00-16:00"},
		{what: "work that needs no permit", pier: "open: daily 07:00-19:00, permits: {hot work: {valid: daily 08:00-16:00}}", want: all},
	} {
		pier := tc.pier
		if pier == "" {
			pier = "open: daily 07:00-19:00"
		}
		p := compiled(t, "places: {shop: {open: always}, pier: {"+pier+", face factor: 1, tide: {table: tide.csv}, workfaces: {hinge: {"+tc.face+"}}}}",
			"window: {place: pier, opens: 2027-04-05 06:00, closes: 2027-04-09 19:00}", "people: {Ines: {}, Tom: {}}", tc.more,
			"tasks: {it: {at: pier/hinge, hours: 10 min, alone: yes, "+tc.task+"}}")
		same(t, tc.what, p.calendar(t, "it", "04-06 00:00"), tc.want)
	}
}

// Who comes in the middle of an opening opens up then, the place first and the workface after it; what was open
// before they came is nobody's (R5). The window opens on 5 April at 14:30.
func TestOpeningUpBeginsWhenTheCrewComes(t *testing.T) {
	for _, tc := range []struct{ what, pier, face, want string }{
		{"the place", "opening up: 20 min", "", "04-05 14:50-19:00"},
		{"the workface", "opening up: 0 min", "reach: [2027-04-05 08:00-20:00], opening up: 15 min", "04-05 14:45-19:00"},
		{"both", "opening up: 20 min, clearing up: 10 min", "reach: [2027-04-05 08:00-17:00], opening up: 15 min, way off before: 30 min", "04-05 15:05-16:30"},
	} {
		p := compiled(t, "places: {shop: {open: Sun 09:00-10:00}, pier: {open: Mon 07:00-19:00, "+tc.pier+", face factor: 1, workfaces: {hinge: {"+tc.face+"}}}}",
			"window: {place: pier, opens: 2027-04-05 14:30, closes: 2027-04-09 19:00}", "people: {Ines: {}, Tom: {}}",
			"tasks: {it: {at: pier/hinge, hours: 10 min, alone: yes}}")
		same(t, tc.what, p.calendar(t, "it", "04-05 00:00"), tc.want)
	}
}

// Civil twilight at 57 N, 7 W on 6 April: NOAA's solar calculator gives sunrise 06:47 and sunset 20:13 summer
// time, and about 36 min of civil twilight on both sides.
func TestWorkThatNeedsLight(t *testing.T) {
	for what, face := range map[string]string{"the task says so": "}, task: {needs light: yes", "the workface says so": "daylight: yes}, task: {"} {
		f, task, _ := strings.Cut(face, "}, task: {")
		p := compiled(t, "places: {shop: {open: always}, pier: {open: always, at: [57 N, 7 W], face factor: 1, workfaces: {hinge: {"+f+"}}}}",
			"people: {Ines: {}, Tom: {}}", "duty: {longest: 24 h, rest: 0 min}", "tasks: {it: {at: pier/hinge, hours: 10 min, "+task+"}}")
		cal := p.activity(t, "it").Modes[0].Time.Calendar()
		for clock, want := range map[string]bool{"04-06 05:45": false, "04-06 06:25": true, "04-06 20:35": true, "04-06 21:15": false} {
			if cal.Has(hours.Minute(p.at(t, clock))) != want {
				t.Errorf("%s: at %s work is %v", what, clock, !want)
			}
		}
	}
}

// R7: kit that goes along is not used at home while it is away; what stays behind is.
func TestKitThatIsAwayIsNotUsedAtHome(t *testing.T) {
	trip := "trips: [{name: a, place: pier, people: [Ines], out: {leave: 2027-04-06 06:00, drive: 2 h}, back: {leave: 2027-04-07 15:00, drive: 2 h}}]"
	const all, home = "04-06 08:00-12:00, 04-06 12:30-17:00, 04-07 08:00-12:00, 04-07 12:30-17:00", ""
	for _, tc := range []struct{ what, kit, want string }{
		{"it goes along", "kit: {saw: {}}", home},
		{"it stays in the shop", "kit: {saw: {at: shop}}", all},
		{"hire without a place goes along too", "hire: {saw: {slots: [2027-04-06 08:00-17:00]}}", home},
		{"hire for the shop", "hire: {saw: {at: shop, slots: [2027-04-06 08:00-17:00]}}", "04-06 08:00-12:00, 04-06 12:30-17:00"},
	} {
		p := compiled(t, trip, tc.kit, "people: {Ines: {}, Tom: {places: shop}}", "tasks: {it: {at: shop, hours: 10 min, who: Tom, kit: saw}}")
		got, _, _ := strings.Cut(p.calendar(t, "it", "04-06 00:00"), "hopeless")
		same(t, tc.what, got, tc.want)
	}
	w := expanded(t, yaml(trip, "kit: {saw: {}}", "people: {Ines: {}, Tom: {places: shop}}", "tasks: {it: {at: shop, hours: 10 min, who: Tom, kit: saw}}"))
	carried := Compile(w.Carry())
	if cal := carried.activity(t, "it").Modes[0].Time.Calendar(); cal.Has(hours.Minute(carried.at(t, "04-09 10:00"))) {
		t.Error("carried on past the window nobody brings the kit home (R18)")
	}
	if cal := Compile(w).activity(t, "it").Modes[0].Time.Calendar(); !cal.Has(hours.Minute(carried.at(t, "04-09 10:00"))) {
		t.Error("after the trip the kit is home again")
	}
}

// R5 and R6 beside each other: what of a pause is a meal.
func TestMealsAndStops(t *testing.T) {
	for _, tc := range []struct {
		what, pier, face, task, more string
		meal                         bool
	}{
		{what: "the place closes for lunch", pier: "open: [daily 07:00-12:00 14:00-19:00]", meal: true},
		{what: "for more than two hours", pier: "open: [daily 07:00-12:00 14:01-19:00]"},
		{what: "the person takes lunch", pier: "open: [daily 07:00-19:00]", task: "who: Tom", meal: true},
		{what: "the tide comes in for half an hour", pier: "open: [daily 07:00-19:00]", face: "reach: [2027-04-06 07:00-12:00, 2027-04-06 12:30-19:00]"},
		{what: "over lunch noisy work is not allowed", pier: "open: [daily 07:00-12:00 13:00-19:00], noisy work: daily 07:00-12:30 12:45-19:00", task: "noisy: yes"},
		{what: "over lunch it is allowed", pier: "open: [daily 07:00-12:00 13:00-19:00], noisy work: daily 07:00-19:00", task: "noisy: yes", meal: true},
	} {
		p := compiled(t, "places: {shop: {open: always}, pier: {"+tc.pier+", face factor: 1, workfaces: {hinge: {"+tc.face+"}}}}",
			"people: {Ines: {}, Tom: {hours: daily 07:00-12:00 13:00-19:00}}", "tasks: {it: {at: pier/hinge, hours: 8 h, "+tc.task+"}}")
		w := p.activity(t, "it").Modes[0].Time
		stops := w.Stops(w.Start(p.at(t, "04-06 07:00")))
		if (len(stops) == 1) != tc.meal {
			t.Errorf("%s: it stops %d times", tc.what, len(stops)-1)
		}
	}
}
