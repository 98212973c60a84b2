package problem

import (
	"fmt"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/hours"
)

func TestCrewsAreDifferentPeopleWithTheTickets(t *testing.T) {
	const crew = "people: {Ines: {tickets: [painter, fitter]}, Tom: {tickets: [fitter]}, Ann: {}, Home: {places: shop, tickets: [fitter]}, Guest: {outside: yes, places: pier, booked: day 2 08:00-12:00, tickets: [inspector]}}"
	for _, tc := range []struct{ what, task, want string }{
		{"anybody who is there, nobody from outside", "hours: 1 h", "Ines, Tom, Ann"},
		{"two of anybody, each pair once", "hours: 1 h, people: 2", "Ines+Tom, Ines+Ann, Tom+Ann"},
		{"by ticket", "hours: 1 h, needs: {fitter: 1}", "Ines, Tom"},
		{"two tickets are two people", "hours: 1 h, needs: {fitter: 1, painter: 1}", "Tom+Ines"},
		{"both in one", "hours: 1 h, needs: {fitter and painter: 1}", "Ines"},
		{"by name", "hours: 1 h, who: Ann", "Ann"},
		{"one of two by name", "hours: 1 h, needs: {Tom or Ann: 1}", "Tom, Ann"},
		{"from outside by ticket", "hours: 1 h, needs: {inspector: 1}", "Guest"},
		{"different needs, the same two people once", "hours: 1 h, needs: {fitter: 1, anybody: 1}", "Ines+Tom, Ines+Ann, Tom+Ann"},
		{"the watch is another place in the crew", "hours: 1 h, hot work: yes, who: Ann, fire watch: 10 min", "Ann+Ines, Ann+Tom"},
	} {
		c := crew
		if strings.Contains(tc.task, "hot work") {
			c = strings.ReplaceAll(crew, "fitter]}", "fitter, fire watch]}")
		}
		p := compiled(t, c, "tasks: {it: {at: pier, "+tc.task+"}}")
		same(t, tc.what, p.crews(p.activity(t, "it")), tc.want)
	}
}

func TestNobodyCanAndWhy(t *testing.T) {
	for _, tc := range []struct{ what, more, task, says string }{
		{"too few with the ticket at the place", "people: {Ines: {tickets: [fitter]}, Tom: {tickets: [fitter], until: 2027-04-01 08:00}}", "hours: 1 h, needs: {fitter: 2}", "it needs 2 x fitter at pier and 1 can be there"},
		{"one person for two needs", "people: {Ines: {tickets: [fitter, painter]}, Tom: {}}", "hours: 1 h, needs: {fitter: 1, painter: 1}", "different people"},
		{"no open hour", "", "hours: 1 h, kit: crane", ""},
		{"too long for any opening", "", "hours: 7 h, kind: lift, in one go: yes, who: [Ines, Tom]", "needs 420 min; the longest opening has 390 min"},
		{"meals do not count as open where it may not pause", "", "hours: 6 h 31 min, kind: coat, coats: top, who: Ines", "needs 391 min; the longest opening has 390 min"},
		{"off shift in the open hours", "people: {Ines: {hours: daily 20:00-23:00}, Tom: {}}", "hours: 1 h, who: Ines", "1 x Ines at pier and 0 can be there"},
		{"more than all hours together", "", "hours: 300 h, who: Ines", "do not fit into"},
	} {
		p := compiled(t, tc.more, "paints: {top: {kind: polyurethane}}", "hire: {crane: {slots: [2027-04-06 01:00-02:00]}}", "tasks: {it: {at: pier, "+tc.task+"}}")
		a := p.activity(t, "it")
		if len(a.Modes) != 0 || a.Hopeless == "" || !strings.Contains(a.Hopeless, tc.says) {
			t.Errorf("%s: %d modes, %q, want %q", tc.what, len(a.Modes), a.Hopeless, tc.says)
		}
	}
}

func TestTheChoicesAreBoundedInTheOrderOfTheFile(t *testing.T) {
	var people []string
	for i := range 30 {
		people = append(people, fmt.Sprintf("P%02d: {}", i))
	}
	p := compiled(t, "people: {"+strings.Join(people, ", ")+"}", "tasks: {it: {at: pier, hours: 1 h, people: 3}}")
	a := p.activity(t, "it")
	if len(a.Modes) != MaxModes {
		t.Fatalf("%d choices of 4060 are kept, want %d", len(a.Modes), MaxModes)
	}
	same(t, "the first and the last", []any{a.Modes[0].Crew, a.Modes[MaxModes-1].Crew}, "[[0 1 2] [1 10 16]]")
	if len(a.Timings()) != 1 {
		t.Errorf("people with the same shifts share one timing, got %d", len(a.Timings()))
	}
}

// R14: at least one more person is on shift at the same place; people from outside do not count.
func TestWorkThatIsNotDoneAloneWaitsForCompany(t *testing.T) {
	const alone = "Ines: {hours: daily 07:00-15:00}"
	for _, tc := range []struct{ what, people, task, want string }{
		{"while the other is on shift", alone + ", Tom: {hours: daily 09:00-19:00}", "who: Ines", "04-06 09:00-15:00"},
		{"two of the crew are company for each other", alone + ", Tom: {hours: daily 09:00-19:00}", "who: [Ines, Tom]", "04-06 09:00-15:00"},
		{"a guest is none", alone + ", Guest: {outside: yes, places: pier, booked: day 2 07:00-12:00}, Tom: {hours: daily 14:00-19:00}", "who: Ines", "04-06 14:00-15:00"},
		{"a third takes over from the second", alone + ", Tom: {hours: daily 07:00-09:00}, Ann: {hours: daily 10:00-12:00}", "who: Ines", "04-06 07:00-09:00, 04-06 10:00-12:00"},
		{"somebody at another place is none", alone + ", Tom: {places: shop}, Ann: {hours: daily 14:00-19:00}", "who: Ines", "04-06 14:00-15:00"},
		{"its author says that it may be done alone", alone + ", Tom: {hours: daily 09:00-19:00}", "who: Ines, alone: yes", "04-06 07:00-15:00"},
		{"a guest who works is in company of anybody", "Guest: {outside: yes, places: pier, booked: day 2 07:00-12:00}, Ines: {hours: daily 09:00-19:00}", "who: Guest", "04-06 09:00-12:00"},
	} {
		p := compiled(t, "places: {shop: {open: always}, pier: {open: daily 07:00-19:00, face factor: 1, workfaces: {tank: {closed space: yes}}}}",
			"people: {"+tc.people+"}", "tasks: {it: {at: pier/tank, hours: 10 min, "+tc.task+"}}")
		got, _, _ := strings.Cut(p.calendar(t, "it", "04-06 00:00"), ", 04-07")
		same(t, tc.what, got, tc.want)
	}
}

// R5 and R13: the last minute of an opening after which somebody could stay the watch out.
func TestHotWorkEndsWhileItsWatchCanBeKept(t *testing.T) {
	for _, tc := range []struct{ what, people, task, want string }{
		{"an hour before closing", "Ines: {tickets: [fire watch]}, Tom: {tickets: [fire watch]}", "", "04-06 07:00-12:00, 04-06 12:30-18:00"},
		{"the welder may keep it as well", "Ines: {}, Tom: {tickets: [fire watch], hours: daily 07:00-16:00}", "", "04-06 07:00-12:00, 04-06 12:30-16:00"},
		{"all go home at four", "Ines: {hours: daily 07:00-16:00}, Tom: {tickets: [fire watch], hours: daily 07:00-16:00}", "", "04-06 07:00-12:00, 04-06 12:30-15:00"},
		{"a third who stays on may keep it", "Ines: {hours: daily 07:00-16:00}, Tom: {tickets: [fire watch], hours: daily 07:00-16:00}, Ann: {tickets: [fire watch]}", "", "04-06 07:00-12:00, 04-06 12:30-16:00"},
		{"without the ticket he may not", "Ines: {hours: daily 07:00-16:00}, Tom: {tickets: [fire watch], hours: daily 07:00-16:00}, Ann: {}", "", "04-06 07:00-12:00, 04-06 12:30-15:00"},
		{"a longer watch", "Ines: {}, Tom: {tickets: [fire watch]}", ", fire watch: 2 h", "04-06 07:00-12:00, 04-06 12:30-17:00"},
		{"the workface is reached to the end of it (at the sill)", "Ines: {}, Tom: {tickets: [fire watch]}", "", "04-06 08:00-12:00, 04-06 12:30-14:00"},
		{"a lunch hour is watched through", "Ines: {}, Tom: {tickets: [fire watch], hours: daily 07:00-12:30 13:30-19:00}", ", fire watch: 2 h", "04-06 07:00-12:00, 04-06 13:30-17:00"},
		{"no watch, no limit", "Ines: {}, Tom: {tickets: [fire watch]}", ", fire watch: 0 min", "04-06 07:00-12:00, 04-06 12:30-19:00"},
	} {
		at := "pier"
		if strings.Contains(tc.what, "sill") {
			at = "pier/sill"
		}
		p := compiled(t, "places: {shop: {open: always}, pier: {open: [daily 07:00-12:00 12:30-19:00], face factor: 1, workfaces: {sill: {reach: [2027-04-06 08:00-15:00]}}}}",
			"people: {"+tc.people+"}", "tasks: {it: {at: "+at+", hours: 30 min, hot work: yes, who: Ines"+tc.task+"}}")
		got, _, _ := strings.Cut(p.calendar(t, "it", "04-06 00:00"), ", 04-07")
		same(t, tc.what, got, tc.want)
		if a := p.activity(t, "it"); len(a.Modes) > 0 && (len(a.Modes[0].Keepers) > 0) != !strings.Contains(tc.task, "watch: 0") {
			t.Errorf("%s: keepers %v", tc.what, a.Modes[0].Keepers)
		}
	}
}

// A minute is worked if the work could stop at its end, or at that of a later minute of the same opening, with
// somebody to stay the watch out (R5, R13): walked minute by minute.
func TestWatchesAreWalkedMinuteByMinute(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		shift := rapid.SampledFrom([]string{"07:00-16:00", "07:00-12:00 13:00-19:00", "09:00-11:00", "10:30-18:00", "07:00-09:30 12:00-15:00", "15:00-19:00"})
		long := rapid.SampledFrom([]int{20, 60, 150}).Draw(t, "watch")
		p := compiled(t, "places: {shop: {open: always}, pier: {open: daily 07:00-19:00, face factor: 1}}",
			fmt.Sprintf("people: {Ines: {hours: daily %s}, Tom: {tickets: [fire watch], hours: daily %s}, Ann: {tickets: [fire watch], hours: daily %s}}", shift.Draw(t, "Ines"), shift.Draw(t, "Tom"), shift.Draw(t, "Ann")),
			fmt.Sprintf("tasks: {it: {at: pier, hours: 1 min, hot work: yes, alone: yes, fire watch: %d min, who: Ines}}", long))
		a, pier := p.activity(t, "it"), place(t, p, "pier")
		from := p.at(t, "04-06 00:00")
		on := func(who, m int) bool { return p.People[who].Shifts[pier].Has(hours.Minute(m)) }
		for _, mode := range a.Modes {
			crew := mode.Crew
			can := func(e int) bool { // somebody stays from e on: on shift, meals of two hours apart
				for who := range p.People {
					gap, ok := 0, true
					for m := e; m < e+long && ok; m++ {
						gap++
						if on(who, m) {
							gap = 0
						}
						ok = gap == 0 || pauseAt(on, who, m) <= 120
					}
					if ok {
						return true
					}
				}
				return false
			}
			works := func(m int) bool { return on(crew[0], m) && on(crew[1], m) }
			for m := from; m < from+1440; m++ {
				want := false
				for e, gap := m, 0; works(m) && gap <= 120 && e < from+2000 && !want; e++ {
					if works(e) {
						gap = 0
						want = can(e + 1)
					} else {
						gap++
					}
				}
				if got := mode.Time.Calendar().Has(hours.Minute(m)); got != want {
					t.Fatalf("%s: %s and %s may work is %v\n%s", p.clock(m), p.People[crew[0]].Name, p.People[crew[1]].Name, got, p.spans(mode.Time.Calendar().Within(hours.Span{From: hours.Minute(from), To: hours.Minute(from + 1440)})))
				}
			}
		}
	})
}

// pauseAt gives the length of somebody's pause at minute m; more than two hours where they are not on shift on both
// sides of it.
func pauseAt(on func(who, m int) bool, who, m int) int {
	n := 0
	for k := m; !on(who, k); k-- {
		if n++; n > 121 {
			return n
		}
	}
	for k := m + 1; !on(who, k); k++ {
		if n++; n > 121 {
			return n
		}
	}
	return n
}

// R9: two teams may take turns: whenever all of the first are on shift it works, else the second.
func TestTeamsTakeTurns(t *testing.T) {
	p := compiled(t, "people: {Ines: {hours: daily 07:00-13:00}, Tom: {hours: daily 11:00-19:00}, Ann: {hours: daily 11:00-19:00}}",
		"places: {shop: {open: always}, pier: {open: daily 07:00-19:00, face factor: 1}}",
		"tasks: {it: {at: pier, hours: 10 h, may change hands: yes}, pair: {at: pier, hours: 1 h, people: 2, may change hands: yes}, own: {at: pier, hours: 10 h}}")
	a := p.activity(t, "it")
	same(t, "alone or in turns, of those whose shifts differ", p.crews(a), "Ines, Tom, Ann, Ines/Tom, Ines/Ann, Tom/Ines, Ann/Ines")
	relay := a.Modes[3]
	day := hours.Span{From: hours.Minute(p.at(t, "04-06 00:00")), To: hours.Minute(p.at(t, "04-07 00:00"))}
	same(t, "they work whenever one of them is there", p.spans(relay.Time.Calendar().Within(day)), "04-06 07:00-19:00")
	same(t, "the first while she is there", p.spans(relay.First.Within(day)), "04-06 07:00-13:00")
	if s := relay.Time.Start(p.at(t, "04-06 07:00")); p.clock(relay.Time.Finish(s)) != "04-06 17:00" || len(relay.Time.Stops(s)) != 1 {
		t.Errorf("in turns ten hours are done without a stop by %s", p.clock(relay.Time.Finish(s)))
	}
	same(t, "pairs with a member in common", p.crews(p.activity(t, "pair")), "Ines+Tom, Ines+Ann, Tom+Ann, Ines+Tom/Tom+Ann, Ines+Ann/Tom+Ann, Tom+Ann/Ines+Tom, Tom+Ann/Ines+Ann")
	same(t, "nobody relieves where the task does not say so", p.crews(p.activity(t, "own")), "Ines, Tom, Ann")
}
