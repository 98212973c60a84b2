package site

import (
	"os"
	"strconv"
	"strings"
	"testing"
)

// rows reads a file of reference values kept in testdata; its head says how they were made.
func rows(t *testing.T, file string) (names []string, out [][]string) {
	t.Helper()
	data, err := os.ReadFile("testdata/" + file)
	if err != nil {
		t.Fatal(err)
	}
	for _, line := range strings.Split(strings.TrimSpace(string(data)), "\n") {
		switch {
		case strings.HasPrefix(line, "#"):
		case names == nil:
			names = strings.Split(line, ",")
		default:
			out = append(out, strings.Split(line, ","))
		}
	}
	return names, out
}

func number(t *testing.T, text string) float64 {
	t.Helper()
	v, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Fatal(err)
	}
	return v
}

// TestSunRoundTheGlobe compares with npm suncalc 2.0.2 (testdata/sun.csv) to the minute, both hemispheres,
// 1990 to 2045, with days that have no rise or no dusk.
func TestSunRoundTheGlobe(t *testing.T) {
	_, table := rows(t, "sun.csv")
	if len(table) < 100 {
		t.Fatalf("only %d rows", len(table))
	}
	for _, r := range table {
		lat, lon := number(t, r[0]), number(t, r[1])
		d, err := Sun(lat, lon, utc(t, r[2])-Minute(4*lon))
		if err != nil {
			t.Fatal(err)
		}
		for i, e := range []struct {
			at Minute
			ok bool
			up bool
		}{{d.Rise, d.HasRise, true}, {d.Set, d.HasSet, false}, {d.CivilDawn, d.HasDawn, true}, {d.CivilDusk, d.HasDusk, false}} {
			what := strings.Join(r[:3], " ") + " " + []string{"rise", "set", "dawn", "dusk"}[i]
			if want := r[3+i]; want != "" {
				careful(t, what, e.at, e.ok, exact(t, want), e.up)
			} else if e.ok {
				t.Errorf("%s: %s, the reference has none", what, moment(e.at))
			}
		}
	}
}

// TestConstituentsOutside compares each constituent alone with npm @neaps/tide-predictor 0.11.0
// (testdata/constituents.csv) over more than two turns of the moon's node.
func TestConstituentsOutside(t *testing.T) {
	names, table := rows(t, "constituents.csv")
	for _, r := range table {
		for i := 1; i < len(names); i++ {
			h := Harmonic{Name: names[i], Datum: "mean", Constituents: []Constituent{{names[i], 1, 0}}}
			near(t, r[0]+" "+names[i], h.Height(utc(t, r[0])), number(t, r[i]), 0.02)
		}
	}
}

// TestExtremesOutside compares high and low waters with npm @neaps/tide-predictor 0.11.0 (testdata/extremes.csv): a
// half-daily port, a mixed one and one with a great range, constants of the National Ocean Service.
func TestExtremesOutside(t *testing.T) {
	ports := map[string]Harmonic{
		"Boston": bostonConstants,
		"Seattle": {Name: "Seattle", Datum: "a datum", Mean: 2, Constituents: []Constituent{
			{"M2", 1.063, 10.8}, {"S2", .268, 36.8}, {"K1", .834, 276.8}, {"O1", .459, 254.6}}},
		"Eastport": {Name: "Eastport", Datum: "a datum", Mean: 2.9, Constituents: []Constituent{
			{"M2", 2.648, 98.4}, {"S2", .415, 138.8}, {"N2", .542, 67}, {"K1", .155, 195.5}, {"O1", .118, 176.3}, {"K2", .116, 138.3}}},
	}
	_, table := rows(t, "extremes.csv")
	runs := map[string][]Water{}
	for _, r := range table {
		key := r[0] + " " + r[1][:7]
		runs[key] = append(runs[key], Water{At: Minute(exact(t, r[1]) + 0.5), Metres: number(t, r[2]), High: r[3] == "HW"})
	}
	if len(runs) != 6 {
		t.Fatalf("%d runs", len(runs))
	}
	for key, want := range runs {
		port, _, _ := strings.Cut(key, " ")
		first, last := want[0].At, want[len(want)-1].At
		got, err := ports[port].Table(first-60, last+60)
		if err != nil {
			t.Fatal(err)
		}
		compare(t, got.Between(first-30, last+30), want, 2, 0.01)
	}
}
