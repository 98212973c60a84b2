package expand

import (
	"strings"
	"testing"
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
