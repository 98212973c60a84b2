package lift

import (
	"math"
	"slices"
	"strings"
	"testing"

	"sailby/tasks/quantity"
)

func TestParseAngle(t *testing.T) {
	for text, want := range map[string]struct {
		degrees float64
		from    Datum
	}{
		"40 deg from horizontal": {40, FromHorizontal}, "30 deg from the vertical": {30, FromVertical}, "0 deg from vertical": {0, FromVertical}, "45° from the horizontal": {45, FromHorizontal},
	} {
		if v, d, err := ParseAngle(text); err != nil || v != want.degrees || d != want.from {
			t.Errorf("%q: %v %v %v", text, v, d, err)
		}
	}
	for _, text := range []string{"", "40", "40 deg", "40 deg from level", "steep from vertical", "40 mm from vertical", "40 deg from"} {
		if _, d, err := ParseAngle(text); err == nil || d != NoDatum || quantity.Hint(err) == "" {
			t.Errorf("%q is taken, or its error has no way out: %v", text, err)
		}
	}
}

func TestParseSize(t *testing.T) {
	for text, want := range map[string]float64{"8 mm": 8, "2 t": 2, "3/8 in": 9.525, "500 kg": 0.5} {
		if v, err := ParseSize(text); err != nil || math.Abs(v-want) > 1e-9 {
			t.Errorf("%q: %v %v, want %v", text, v, err, want)
		}
	}
	if _, err := ParseSize("large"); err == nil {
		t.Error("a size without a number is taken")
	}
}

// Every table that is named is one that Slings takes.
func TestSlingTablesAreTaken(t *testing.T) {
	names := SlingTables()
	if len(names) < 5 || !slices.Contains(names, "EN 818-4 grade 8") {
		t.Fatalf("tables: %v", names)
	}
	for _, n := range names {
		if table, err := findTable(strings.ToUpper(n)); err != nil || table.name != n {
			t.Errorf("%s: %v", n, err)
		}
	}
}
