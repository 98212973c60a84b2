package solve

import (
	"strings"
	"testing"

	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// compile reads a job and compiles it.
func compile(t testing.TB, text string) *problem.Problem {
	t.Helper()
	job, err := jobfile.ReadBytes("job.yaml", []byte(text), nil)
	if err != nil {
		t.Fatal(err)
	}
	w, faults := expand.Expand(job, expand.Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return problem.Compile(w)
}

// pier is a job of one or two days of eight hours at a pier, 8 to 12 and 13 to 17, with the lines
// given: what is at the pier, who there is, what there is, what is done.
func pier(closes, faces, people, kit, tasks string) string {
	return `
job: overload
zone: Africa/Abidjan
begin: 2027-04-05 06:00
places:
  shop: {open: [daily 08:00-16:00]}
  pier: {open: [daily 08:00-12:00 13:00-17:00], face factor: 1, fire watch: 0 min, workfaces: {` + faces + `}}
window: {place: pier, opens: 2027-04-05 08:00, closes: ` + closes + `}
people: {` + people + `}
kit: {` + kit + `}
tasks:
` + tasks
}

const (
	oneDay  = "2027-04-05 17:00"
	twoDays = "2027-04-06 17:00"
)

// TestOverload: more work than hours for a person, a ticket, a kit, the room of a workface and a
// workface that the tide leaves dry for a while; the sums are worked out by hand beside each.
func TestOverload(t *testing.T) {
	for _, tc := range []struct {
		name        string
		job         string
		who, scope  string
		total, have int // minutes
		acts        int
	}{
		// 5 h + 4 h against 8 h
		{"a person", pier(oneDay, "", "Ann: {}, Bob: {}", "", `
  a: {at: pier, hours: 5 h, who: Ann, set-up: 0 min}
  b: {at: pier, hours: 4 h, who: Ann, set-up: 0 min}
  c: {at: pier, hours: 8 h, who: Bob, set-up: 0 min}`), "Ann", "", 540, 480, 2},
		// 4 h, with 30 min of set-up each, twice: 9 h against 8 h
		{"set-up counts once for each", pier(oneDay, "", "Ann: {}", "", `
  a: {at: pier, hours: 4 h, set-up: 30 min}
  b: {at: pier, hours: 4 h, set-up: 30 min}`), "Ann", "", 540, 480, 2},
		// three of 6 h for two fitters, 2 x 8 h there: 18 h against 16 h; Cid is no fitter
		{"a ticket", pier(oneDay, "", "Ann: {tickets: [fitter]}, Bob: {tickets: [fitter]}, Cid: {}", "", `
  a: {at: pier, hours: 6 h, needs: {fitter: 1}, set-up: 0 min}
  b: {at: pier, hours: 6 h, needs: {fitter: 1}, set-up: 0 min}
  c: {at: pier, hours: 6 h, needs: {fitter: 1}, set-up: 0 min}
  d: {at: pier, hours: 2 h, who: Cid, set-up: 0 min}`), "Ann and Bob", "", 1080, 960, 3},
		// two at once for 5 h, and 7 h for one of the two: 17 h against 16 h
		{"two of a ticket", pier(oneDay, "", "Ann: {tickets: [fitter]}, Bob: {tickets: [fitter]}", "", `
  a: {at: pier, hours: 5 h, needs: {fitter: 2}, set-up: 0 min}
  b: {at: pier, hours: 7 h, needs: {fitter: 1}, set-up: 0 min}`), "Ann and Bob", "", 1020, 960, 2},
		// one set: 5 h + 4 h against 8 h, though two people could use it
		{"kit", pier(oneDay, "", "Ann: {}, Bob: {}", "set: {at: pier}", `
  a: {at: pier, hours: 5 h, who: Ann, kit: set, set-up: 0 min}
  b: {at: pier, hours: 4 h, who: Bob, kit: set, set-up: 0 min}`), "kit set", "", 540, 480, 2},
		// two sets: three of 6 h against 2 x 8 h
		{"two of a kit", pier(oneDay, "", "Ann: {}, Bob: {}, Cid: {}", "set: {at: pier, count: 2}", `
  a: {at: pier, hours: 6 h, who: Ann, kit: set, set-up: 0 min}
  b: {at: pier, hours: 6 h, who: Bob, kit: set, set-up: 0 min}
  c: {at: pier, hours: 6 h, who: Cid, kit: set, set-up: 0 min}`), "kit set", "", 1080, 960, 3},
		// room for one: 5 h + 4 h against 8 h
		{"room", pier(oneDay, "hinge: {people: 1}", "Ann: {}, Bob: {}", "", `
  a: {at: pier/hinge, hours: 5 h, who: Ann, set-up: 0 min}
  b: {at: pier/hinge, hours: 4 h, who: Bob, set-up: 0 min}`), "room at pier/hinge", "", 540, 480, 2},
		// dry 9 to 12 and 10 to 12, less the half hour of the way off: 2 h 30 min and 1 h 30 min, against 3 h + 2 h of Ann there;
		// what she does elsewhere does not count
		{"a tide", pier(twoDays, "hinge: {reach: [2027-04-05 09:00-12:00, 2027-04-06 10:00-12:00], way off before: 30 min}", "Ann: {}, Bob: {}", "", `
  a: {at: pier/hinge, hours: 3 h, who: Ann, set-up: 0 min, may stop: {not before: 0 min, least piece: 15 min}}
  b: {at: pier/hinge, hours: 2 h, who: Ann, set-up: 0 min, may stop: {not before: 0 min, least piece: 15 min}}
  c: {at: pier, hours: 4 h, who: Ann, set-up: 0 min}`), "Ann", "at pier/hinge", 300, 240, 2},
		// 4 h not before 11:00 and by 14:00: 2 h are there; b may wait
		{"between two dates", pier(twoDays, "", "Ann: {}", "", `
  a: {at: pier, hours: 1 h, not before: 2027-04-05 11:00, must be done by: 2027-04-05 14:00, set-up: 0 min}
  c: {at: pier, hours: 90 min, not before: 2027-04-05 11:00, must be done by: 2027-04-05 14:00, set-up: 0 min}
  b: {at: pier, hours: 4 h, set-up: 0 min}`), "Ann", "", 150, 120, 2},
	} {
		p := compile(t, tc.job)
		b, c := network.Propagate(p, network.Off{})
		if c != nil {
			t.Errorf("%s: the chain alone is a contradiction: %+v", tc.name, c)
			continue
		}
		o := FindOverload(Loads(p), b)
		if o == nil {
			t.Errorf("%s: no overload found", tc.name)
			continue
		}
		if o.Load.Who != tc.who || o.Load.Scope != tc.scope || o.Total != tc.total || o.Have != tc.have || len(o.Acts) != tc.acts {
			t.Errorf("%s: %s %s: %d min of %d steps in %d min, want %s %s: %d of %d in %d", tc.name, o.Load.Who, o.Load.Scope, o.Total, len(o.Acts), o.Have,
				tc.who, tc.scope, tc.total, tc.acts, tc.have)
		}
		sum := 0
		for _, n := range o.Need {
			sum += n
		}
		if sum != o.Total {
			t.Errorf("%s: the lines add up to %d, and %d are said", tc.name, sum, o.Total)
		}
	}
}

// TestNoOverload: the same where it just fits: an hour less, an hour more, or one more of what is short.
func TestNoOverload(t *testing.T) {
	for name, job := range map[string]string{
		"a person": pier(oneDay, "", "Ann: {}", "", `
  a: {at: pier, hours: 5 h, set-up: 0 min}
  b: {at: pier, hours: 3 h, set-up: 0 min}`),
		"what somebody else may do": pier(oneDay, "", "Ann: {}, Bob: {}", "", `
  a: {at: pier, hours: 5 h, who: Ann, set-up: 0 min}
  b: {at: pier, hours: 4 h, people: 1, set-up: 0 min}`),
		"a ticket that a third holds": pier(oneDay, "", "Ann: {tickets: [fitter]}, Bob: {tickets: [fitter]}, Cid: {tickets: [fitter]}", "", `
  a: {at: pier, hours: 6 h, needs: {fitter: 1}, set-up: 0 min}
  b: {at: pier, hours: 6 h, needs: {fitter: 1}, set-up: 0 min}
  c: {at: pier, hours: 6 h, needs: {fitter: 1}, set-up: 0 min}`),
		"a watcher, who may keep two watches": strings.Replace(pier(oneDay, "deck: {}", "Ann: {tickets: [{weld: 136}]}, Bob: {tickets: [{weld: 136}]}, Cid: {tickets: [fire watch]}", "", `
  a: {kind: weld, at: pier/deck, hours: 6 h, needs: {weld 136: 1}, set-up: 0 min}
  b: {kind: weld, at: pier/deck, hours: 6 h, needs: {weld 136: 1}, set-up: 0 min}`), "fire watch: 0 min", "fire watch: 30 min", 1),
		"a task that does not happen": pier(oneDay, "", "Ann: {}", "", `
  a: {at: pier, hours: 5 h, set-up: 0 min}
  b: {at: pier, hours: 5 h, set-up: 0 min, chance: 30 %}`),
	} {
		p := compile(t, job)
		b, c := network.Propagate(p, network.Off{})
		if c != nil {
			t.Errorf("%s: %+v", name, c)
			continue
		}
		if o := FindOverload(Loads(p), b); o != nil {
			t.Errorf("%s: %s %s: %d min in %d", name, o.Load.Who, o.Load.Scope, o.Total, o.Have)
		}
	}
}

// TestContentBound: nine hours of one person's work from 8:00 end on the second day at 9:00.
func TestContentBound(t *testing.T) {
	p := compile(t, pier(twoDays, "", "Ann: {}, Bob: {}", "", `
  a: {at: pier, hours: 5 h, who: Ann, set-up: 0 min}
  b: {at: pier, hours: 4 h, who: Ann, set-up: 0 min}
  c: {at: pier, hours: 3 h, who: Bob, set-up: 0 min}`))
	b, _ := network.Propagate(p, network.Off{})
	at, why := ContentBound(p, Loads(p), b)
	if got := at - p.Open; why == nil || got != 25*60 || why.Load.Who != "Ann" || why.Total != 540 {
		t.Errorf("bound %d min after the opening by %+v, want 1500 by Ann's 540", got, why)
	}
}
