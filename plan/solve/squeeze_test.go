package solve

import (
	"strings"
	"testing"

	"sailby/plan/network"
	"sailby/plan/problem"
)

// squeezed gives the bound of a job in minutes from the window's opening.
func squeezed(t *testing.T, text string) (int, *Overload, *problem.Problem) {
	t.Helper()
	p := compile(t, text)
	finish, why := Squeeze(p, Loads(p), 0, p.Close+1, nil)
	return finish - p.Open, why, p
}

// TestSqueeze: finishes that work content rules out; the sums are by hand beside each. The pier is open 8 to 12
// and 13 to 17, so that minute 240 is noon and minute 300 is one o'clock.
func TestSqueeze(t *testing.T) {
	for _, tc := range []struct {
		name   string
		job    string
		finish int // minutes from the opening
		who    string
	}{
		// Ann does a, b and c, 2 h each; 2 h of curing follow each of them: 8-10-12, 13-15, cured at 17
		{"a tail behind the last", pier(twoDays, "", "Ann: {}", "", `
  a: {at: pier, hours: 2 h}
  b: {at: pier, hours: 2 h}
  c: {at: pier, hours: 2 h}
  a2: {at: pier, standing: 2 h, after: a}
  b2: {at: pier, standing: 2 h, after: b}
  c2: {at: pier, standing: 2 h, after: c}
`), 540, "Ann"},
		// two sets of 8 kVA on 13 kVA: one at a time, 3 h and 3 h over noon
		{"power for one at a time", pier(twoDays, "", "Ann: {}, Bob: {}", "set: {count: 2, draws: 8 kVA}, gen: {gives: 13 kVA}", `
  a: {at: pier, hours: 3 h, kit: {set: 1}}
  b: {at: pier, hours: 3 h, kit: {set: 1}}
`), 420, "power at pier, 1 at once of what draws more than 6.5 kVA"},
		// half of the power each: both at once
		{"power for two at a time", pier(twoDays, "", "Ann: {}, Bob: {}", "set: {count: 2, draws: 6.5 kVA}, gen: {gives: 13 kVA}", `
  a: {at: pier, hours: 3 h, kit: {set: 1}}
  b: {at: pier, hours: 3 h, kit: {set: 1}}
`), 180, ""},
		// three at 5 kVA on 13: two at once, 9 h of work at two a minute: 4.5 h, over noon
		{"power for two of three", pier(twoDays, "", "Ann: {}, Bob: {}, Cid: {}", "set: {count: 3, draws: 5 kVA}, gen: {gives: 13 kVA}", `
  a: {at: pier, hours: 3 h, kit: {set: 1}}
  b: {at: pier, hours: 3 h, kit: {set: 1}}
  c: {at: pier, hours: 3 h, kit: {set: 1}}
`), 330, "2 at once"},
		// what may be done outside a stretch does not count in it: long has all day
		{"work with room elsewhere", pier(twoDays, "", "Ann: {}", "", `
  long: {at: pier, hours: 3 h}
  last: {at: pier, hours: 1 h, not before: 2027-04-05 11:00}
`), 240, ""},
		// hot work and the hour of watch after it
		{"a fire watch at the end", strings.Replace(pier(twoDays, "", "Ann: {tickets: [fire watch]}, Bob: {tickets: [fire watch]}", "", `
  a: {at: pier, hours: 2 h, people: 1, hot work: yes}
`), "fire watch: 0 min", "fire watch: 60 min", 1), 180, ""},
	} {
		t.Run(tc.name, func(t *testing.T) {
			finish, why, p := squeezed(t, tc.job)
			if finish != tc.finish {
				t.Errorf("bound %d min after the opening, want %d", finish, tc.finish)
			}
			if tc.who != "" && (why == nil || !strings.Contains(why.Load.Who, tc.who) || why.Total <= why.Have) {
				t.Errorf("ruled out by %+v, want %q", why, tc.who)
			}
			b, _ := network.Propagate(p, network.Off{})
			if r := Find(p, b, Options{Ticks: 100_000}); r.Best == nil || r.Best.Score.Finish-p.Open < finish {
				t.Errorf("the bound %d passes a plan", finish)
			}
		})
	}
}
