package solve

import (
	"testing"

	"sailby/plan/check"
	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// TestCorners: small jobs whose best finish is worked out by hand beside each, one for each thing
// that a schedule must not forget. The quay is open from 8 to 18 on two days, without a break.
func TestCorners(t *testing.T) {
	for _, tc := range []struct {
		name, head, tasks string
		finish            string
	}{
		// Bob is there 12 to 13 and 17 to 19. Ann's six hours run 8 to 12 and 14 to 16, and hold the set from 8 to 16.
		{"kit that stays is held through pauses", "people: {Ann: {hours: [daily 08:00-12:00 14:00-18:00]}, Bob: {hours: [daily 12:00-13:00 17:00-19:00]}}\nkit: {set: {stays: yes}}",
			"  a: {at: quay, hours: 6 h, who: Ann, kit: set, may stop: {not before: 0 min, least piece: 15 min}}\n  b: {at: quay, hours: 1 h, who: Bob, kit: set}", "05 18:00"},
		// The same with kit that is free in pauses: Bob has it from 12 to 13.
		{"kit that does not is free in pauses", "people: {Ann: {hours: [daily 08:00-12:00 14:00-18:00]}, Bob: {hours: [daily 12:00-13:00 17:00-19:00]}}\nkit: {set: {}}",
			"  a: {at: quay, hours: 6 h, who: Ann, kit: set, may stop: {not before: 0 min, least piece: 15 min}}\n  b: {at: quay, hours: 1 h, who: Bob, kit: set}", "05 16:00"},
		// b takes an hour and may run along with the last hour of a.
		{"what must finish later may start earlier", "people: {Ann: {}, Bob: {}}",
			"  a: {at: quay, hours: 2 h, who: Ann}\n  b: {at: quay, hours: 1 h, who: Bob, finish after: a}", "05 10:00"},
		// A coat from 8 to 9 would leave solvent about until 10; the weld runs from 9 to 10 and is watched until 11, so the coat follows.
		{"a coat just before hot work", "people: {Ann: {}, Bob: {}, Cid: {tickets: [fire watch]}}\npaints: {p: {kind: alkyd, touch dry: {5 C: 1 h, 10 C: 1 h}, hard dry: {5 C: 1 h, 10 C: 1 h}, solvent gone: {5 C: 1 h, 10 C: 1 h}}}",
			"  w: {kind: weld, at: quay/deck, hours: 1 h, needs: {Ann: 1}, not before: 2027-04-05 09:00, must be done by: 2027-04-05 10:00}\n" +
				"  c: {kind: coat, at: quay/deck, hours: 1 h, area: 1 m2, needs: {Bob: 1}, set-up: 0 min, coats: [p]}", "05 12:00"},
		// The coat must be done by 9 and goes first; its solvent is gone at 10, the weld done at 11 and watched until 12.
		{"hot work waits until the solvent is gone", "people: {Ann: {}, Bob: {}, Cid: {tickets: [fire watch]}}\npaints: {p: {kind: alkyd, touch dry: {5 C: 1 h, 10 C: 1 h}, hard dry: {5 C: 1 h, 10 C: 1 h}, solvent gone: {5 C: 1 h, 10 C: 1 h}}}",
			"  c: {kind: coat, at: quay/deck, hours: 1 h, area: 1 m2, needs: {Bob: 1}, set-up: 0 min, coats: [p], must be done by: 2027-04-05 09:00}\n" +
				"  w: {kind: weld, at: quay/deck, hours: 1 h, needs: {Ann: 1}}", "05 12:00"},
		// y takes 8 to 10 by itself; x before y or z before y: z is the shorter, 8 to 9, so y runs 9 to 11.
		{"an order rule", "people: {Ann: {}, Bob: {}, Cid: {}}\norders: [{either: [x before y, z before y]}]",
			"  x: {at: quay, hours: 3 h, who: Ann}\n  y: {at: quay, hours: 2 h, who: Bob}\n  z: {at: quay, hours: 1 h, who: Cid}", "05 11:00"},
		// b follows a within 30 min and needs Ann, who is there from 9:45: a ends at 9:15 at the earliest.
		{"a maximum wait that is missed by a little", "people: {Ann: {hours: [daily 09:45-18:00]}, Bob: {}}",
			"  a: {at: quay, hours: 1 h, who: Bob}\n  b: {at: quay, hours: 1 h, who: Ann, after: {a: {max: 30 min}}}", "05 10:45"},
		// Ann is there from 12: a ends at 11:30 at the earliest.
		{"a maximum wait pulls the earlier task along", "people: {Ann: {hours: [daily 12:00-18:00]}, Bob: {}}",
			"  a: {at: quay, hours: 1 h, who: Bob}\n  b: {at: quay, hours: 1 h, who: Ann, after: {a: {max: 30 min}}}", "05 13:00"},
		// The same where Ann could do a as well, but only from 12 on.
		{"a maximum wait pulls somebody's task along", "people: {Ann: {hours: [daily 12:00-18:00]}, Bob: {}}",
			"  a: {at: quay, hours: 1 h, people: 1}\n  b: {at: quay, hours: 1 h, who: Ann, after: {a: {max: 30 min}}}", "05 13:00"},
		// One watcher for two welds in one workface: both at once, 8 to 10, watched until 11.
		{"one watcher keeps two watches in a workface", "people: {Ann: {}, Bob: {}, Cid: {tickets: [fire watch]}}",
			"  v: {kind: weld, at: quay/deck, hours: 2 h, needs: {Ann: 1}}\n  w: {kind: weld, at: quay/deck, hours: 2 h, needs: {Bob: 1}}", "05 11:00"},
		// In two workfaces he cannot; Ann or Bob keep the watch after theirs, so the second weld runs 10 to 12 and is watched until 13.
		{"but not in two", "people: {Ann: {}, Bob: {}, Cid: {tickets: [fire watch]}}",
			"  v: {kind: weld, at: quay/deck, hours: 2 h, needs: {Ann: 1}}\n  w: {kind: weld, at: quay/hold, hours: 2 h, needs: {Bob: 1}}", "05 13:00"},
		// Without a workface nobody knows how far apart they are: as in two.
		{"nor where no workface is named", "people: {Ann: {}, Bob: {}, Cid: {tickets: [fire watch]}}",
			"  v: {kind: weld, at: quay, hours: 2 h, needs: {Ann: 1}}\n  w: {kind: weld, at: quay, hours: 2 h, needs: {Bob: 1}}", "05 13:00"},
		// Two sets of 6 kVA on mains of 10: one after another.
		{"power", "people: {Ann: {}, Bob: {}}\nkit: {set: {count: 2, draws: 6 kVA}}",
			"  a: {at: quay, hours: 2 h, who: Ann, kit: set}\n  b: {at: quay, hours: 2 h, who: Bob, kit: set}", "05 12:00"},
		// Room for two, three people: one of the three waits two hours.
		{"room", "people: {Ann: {}, Bob: {}, Cid: {}}",
			"  a: {at: quay/tank, hours: 2 h, who: Ann}\n  b: {at: quay/tank, hours: 2 h, who: Bob}\n  c: {at: quay/tank, hours: 2 h, who: Cid}", "05 12:00"},
		// Ann 8 to 12, Bob from 12 on: six hours that may change hands end at 14, else on the next day.
		{"work that changes hands", "people: {Ann: {hours: [daily 08:00-12:00]}, Bob: {hours: [daily 12:00-18:00]}}",
			"  a: {at: quay, hours: 5 h, people: 1, may change hands: yes, in one go: yes}", "05 13:00"},
	} {
		p := compile(t, `
job: corner
zone: Africa/Abidjan
begin: 2027-04-05 06:00
places:
  shop: {open: [daily 08:00-16:00]}
  quay: {open: [daily 08:00-18:00], face factor: 1, fire watch: 60 min, mains: 10 kVA, steel temperature: 10 C, workfaces: {deck: {}, hold: {}, tank: {people: 2}}}
window: {place: quay, opens: 2027-04-05 08:00, closes: 2027-04-06 18:00}
`+tc.head+"\ntasks:\n"+tc.tasks)
		p = problem.Compile(p.Work.Carry())
		b, conflict := network.Propagate(p, network.Off{})
		if conflict != nil {
			t.Errorf("%s: %+v", tc.name, conflict)
			continue
		}
		res := Find(p, b, Options{Ticks: 20_000})
		if res.Best == nil {
			t.Errorf("%s: no plan found", tc.name)
			continue
		}
		s := Compact(p, res.Best)
		made := Plan(p, s)
		for _, br := range check.Plan(p.Work, made) {
			t.Errorf("%s: %s", tc.name, br)
		}
		got := (p.Base + hours.Minute(s.Score.Finish)).In(p.Work.Job.Zone).Format("02 15:04")
		if got != tc.finish {
			t.Errorf("%s: finished %s, want %s: starts %v, finishes %v", tc.name, got, tc.finish, s.Start, s.Finish)
		}
	}
}
