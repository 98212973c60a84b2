package expand

import (
	"slices"
	"strings"
	"testing"

	"sailby/tasks"
)

// What draws more than there is can never be worked: it is a fault, not a search without an end. Mains and
// generators add up (R7).
func TestMorePowerThanThereIs(t *testing.T) {
	for _, c := range []struct {
		what, kit, mains, want string
	}{
		{"generator", "gen: {gives: 6 kVA}", "", "draws 9 kVA, there are 6 kVA at pier"},
		{"two of them", "gen: {gives: 6 kVA, count: 2}", "", ""},
		{"mains", "", ", mains: 8 kVA", "draws 9 kVA, there are 8 kVA at pier"},
		{"mains and generator", "gen: {gives: 6 kVA}", ", mains: 8 kVA", ""},
		{"nothing is said", "", "", ""},
		{"a generator elsewhere", "gen: {gives: 6 kVA, at: shop}", "", ""},
	} {
		kit := "kit: {mig: {draws: 9 kVA}"
		if c.kit != "" {
			kit += ", " + c.kit
		}
		_, faults := Expand(read(t, kit+"}", "places: {shop: {open: Mon-Fri 08:00-17:00}, pier: {open: daily 07:00-19:00"+c.mains+"}}",
			"tasks: {it: {at: pier, hours: 1 h, kit: mig}}"), Basis{})
		switch {
		case c.want == "" && len(faults) > 0, c.want != "" && (len(faults) != 1 || !strings.Contains(faults[0].Text, c.want) || faults[0].Hint == ""):
			t.Errorf("%s: %v, want %q", c.what, faults, c.want)
		}
	}
}

// Where more is to be done than anybody should do without a break, and neither the place nor the people have any,
// a note says so; a place with a meal, little work, or people who have their own breaks need none.
func TestNobodyIsGivenAMeal(t *testing.T) {
	for _, c := range []struct {
		what, open, people, hours string
		want                      bool
	}{
		{"always open", "always", "{Tom: {}}", "9 h", true},
		{"a long day without a break", "daily 07:00-19:00", "{Tom: {}}", "9 h", true},
		{"a meal", "daily 07:00-12:00 12:30-19:00", "{Tom: {}}", "9 h", false},
		{"little to do", "always", "{Tom: {}}", "2 h", false},
		{"their own breaks", "always", "{Tom: {hours: [daily 07:00-12:00 12:30-17:00]}}", "9 h", false},
	} {
		w, faults := Expand(read(t, "people: "+c.people, "places: {shop: {open: Mon-Fri 08:00-17:00}, pier: {open: "+c.open+", face factor: 1}}",
			"tasks: {it: {at: pier, hours: "+c.hours+"}}"), Basis{})
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		got := slices.ContainsFunc(w.Notes, func(n tasks.Note) bool { return strings.Contains(n.Text, "nobody is given a meal") })
		if got != c.want {
			t.Errorf("%s: a note is %v, want %v: %v", c.what, got, c.want, w.Notes)
		}
	}
}
