package lift

import (
	"fmt"
	"math"
	"slices"
	"testing"
)

// mark says how well an outside value is vouched for.
type mark string

// Seen is a figure read in the publication or in a copy of it; recalled is from memory and confirms nothing by itself.
const (
	seen     mark = "seen"
	recalled mark = "from memory"
)

// outside is one value that somebody else published, beside what this package makes of it. No row
// holds our arithmetic against itself: want is always the publication's own figure.
type outside struct {
	subject string
	what    string
	source  string
	mark    mark
	got     float64
	want    float64
	tol     float64
	why     string // reason for the tolerance; empty is half of the last printed digit
	atMost  bool   // got may not exceed want: a rating
}

// The publications.
const (
	lgh        = "LGH User Guide 2018 (UK, 2nd edition) p. 155"
	slingSheet = "sling maker's instruction sheet, page 4"
	osha       = "OSHA Guidance on Safe Sling Use, Tables 1 and 3"
	en818      = "EN 818-4 grade 8 chain slings, table (copy)"
	en13414    = "EN 13414-1 Table 4, steel core (copy)"
	en1492     = "EN 1492-1 mode factors, in a user manual (copy)"
	nioshBook  = "NIOSH 94-110 Tables 1 to 5"
	nioshCases = "NIOSH 94-110 section 3, worked examples"
	hsePush    = "HSE push and pull assessment; INDG143 extract"
	handbook   = "load securing handbook, chapter 2"
)

// digits is the tolerance of a figure printed with so many decimals.
func digits(n int) float64 { return 0.5001 * math.Pow(10, -float64(n)) }

// TestOutside holds every published value against the package, and counts them.
func TestOutside(t *testing.T) {
	var all []outside
	for _, list := range [][]outside{slingRows(t), tableRows(t), handRows(t), wheelRows(t), massRows(t), plateRows(t), windRows(t), roadRows(t), hookRows(t)} {
		all = append(all, list...)
	}
	marks, subjects := map[mark]int{}, map[string]int{}
	names := map[string]bool{}
	for _, r := range all {
		name := r.subject + "/" + r.what
		if names[name] || r.source == "" || r.why == "" && !slices.Contains([]float64{digits(0), digits(1), digits(2), digits(3)}, r.tol) {
			t.Errorf("row %q: twice, without a source, or a wide tolerance without a reason", name)
		}
		names[name] = true
		marks[r.mark]++
		subjects[r.subject]++
		t.Run(name, func(t *testing.T) {
			if math.IsNaN(r.got) || math.Abs(r.got-r.want) > r.tol+1e-9 || r.atMost && r.got > r.want*(1+1e-8) {
				t.Errorf("%v, want %v within %v (%s, %s)", r.got, r.want, r.tol, r.source, r.mark)
			}
		})
	}
	if marks[seen]+marks[recalled] < 50 || marks[seen] < 30 {
		t.Errorf("%d outside checks, %d of them seen: at least 50 and 30", marks[seen]+marks[recalled], marks[seen])
	}
	for subject, least := range map[string]int{"sling examples": 4, "OSHA tables": 40, "EN tables": 40, "off-centre shares": 2, "choke table": 6, "NIOSH multipliers": 60,
		"NIOSH examples": 4, "team rule": 3, "push forces": 4, "section masses": 40, "floor plate": 5, "wind examples": 4, "straps": 2} {
		if subjects[subject] < least {
			t.Errorf("%s: %d rows, at least %d", subject, subjects[subject], least)
		}
	}
	t.Logf("%d outside checks: %d seen, %d from memory; by subject %v", len(all), marks[seen], marks[recalled], subjects)
}

// most finds the greatest mass, kg, that a set of slings passes, without allowances.
func most(t *testing.T, r Rig) float64 {
	t.Helper()
	low, high := 0.01, 1e6
	for range 60 {
		mid := (low + high) / 2
		s, err := Slings(Load{Mass: mid, Allowance: 1, Dynamic: 1, CG: [3]float64{0, 0, -1}}, r)
		if err != nil {
			t.Fatal(err)
		}
		if s.OK {
			low = mid
		} else {
			high = mid
		}
	}
	return low
}

// perLeg gives the pull in the first leg.
func perLeg(t *testing.T, mass float64, r Rig) float64 {
	t.Helper()
	return slings(t, plain(mass), r).Legs[0].Tension
}

func named(format string, args ...any) string { return fmt.Sprintf(format, args...) }
