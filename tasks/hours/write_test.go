package hours

import (
	"reflect"
	"testing"

	"pgregory.net/rapid"
)

// TestRuleWritten: the texts are the manual's own (JOBFILE.md, opening hours).
func TestRuleWritten(t *testing.T) {
	for _, s := range []string{"Mon-Fri 07:30-12:00 12:30-17:30", "Sat 08:00-13:00", "Mon,Wed 19:00-07:00", "daily 06:00-22:00", "always", "Mon,Tue 08:00-24:00", "Sat,Sun 00:00-24:00"} {
		r, err := ParseRule(s)
		if err != nil {
			t.Fatal(err)
		}
		if got := r.String(); got != s {
			t.Errorf("%q is written as %q", s, got)
		}
	}
}

// TestRuleRoundTrip: what is written reads as it was.
func TestRuleRoundTrip(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		var r Rule
		any := false
		for d := range r.Days {
			r.Days[d] = rapid.Bool().Draw(rt, "day")
			any = any || r.Days[d]
		}
		if !any {
			r.Days[1] = true
		}
		at := 0
		for i := 0; i < rapid.IntRange(1, 3).Draw(rt, "turns"); i++ {
			from := at + rapid.IntRange(0, 300).Draw(rt, "from")
			to := from + rapid.IntRange(1, 180).Draw(rt, "length")
			r.Turns = append(r.Turns, Turn{from, to})
			at = to
		}
		again, err := ParseRule(r.String())
		if err != nil || !reflect.DeepEqual(again, r) {
			rt.Fatalf("%q reads as %v, want %v (%v)", r.String(), again, r, err)
		}
	})
}
