package sheets

import (
	"strings"
	"testing"

	"sailby/report/fixture"
)

// Spools and bottles are counted over all tasks and not task by task: 4.2 and 1.1 kg with 0.8 and 0.3 kg to spare are
// one spool of 15 kg.
func TestPackagesAreCountedTogether(t *testing.T) {
	r := fixture.Report()
	n := 0
	for _, s := range r.Likely.Work.Steps {
		for i := range s.Estimate.Consumables {
			if c := &s.Estimate.Consumables[i]; strings.HasPrefix(c.What, "flux-cored wire") {
				c.Each, c.Packed = 15, "spools of 15 kg"
				n++
			} else if c.What == "shielding gas" {
				c.Each, c.Packed, c.Spare = 500, "bottles of 0.5 m3", 200
			}
		}
	}
	if n < 2 {
		t.Fatalf("only %d tasks use wire", n)
	}
	s := flat(packed(t, r, Options{}), "packing")
	for _, want := range []string{"1 spool of 15 kg", "3 bottles of 0.5 m3"} {
		if !strings.Contains(s, want) {
			t.Errorf("the packing list does not say %q:\n%s", want, s)
		}
	}
}
