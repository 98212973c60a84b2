package lift

import (
	"math"
	"sort"
	"strings"

	"sailby/tasks/origin"
)

// slingRow is one size of sling as its table rates it, kg: one straight leg; then two legs, then
// three or four, by band of angle; endless is an endless sling choked, or one leg choked.
type slingRow struct {
	size float64 // mm of chain or rope; t of webbing
	one  float64
	two  []float64
	four []float64
	loop float64
}

// band is a range of angles from the vertical with the mode factors that go with it.
type band struct {
	upTo      float64 // degrees from the vertical, inclusive
	two, four float64 // factors on one leg
}

// slingTable is one standard's table of slings.
type slingTable struct {
	name   string
	source string
	unit   string // of size
	bands  []band
	choked float64 // factor of a choked leg
	endles float64 // factor of an endless sling choked; 0: the table has none
	rows   []slingRow
	heat   bool // rated by temperature as chain is
	soft   bool // webbing
}

// enBands are the European mode factors: two legs, and three or four.
var enBands = []band{{45, 1.4, 2.1}, {60, 1.0, 1.5}}

// usBands are the horizontal angles 60, 45 and 30 degrees: n sin(h) with n = 2, and n = 3 for
// both triple and quadruple slings.
var usBands = []band{
	{30, 2 * math.Sin(math.Pi/3), 3 * math.Sin(math.Pi/3)},
	{45, 2 * math.Sin(math.Pi/4), 3 * math.Sin(math.Pi/4)},
	{60, 1, 1.5},
}

// tonnes turns rows of t into rows of kg.
func tonnes(rows [][8]float64) []slingRow {
	var out []slingRow
	for _, r := range rows {
		out = append(out, slingRow{r[0], r[1] * 1000, []float64{r[2] * 1000, r[3] * 1000}, []float64{r[4] * 1000, r[5] * 1000}, r[6] * 1000})
	}
	return out
}

// pound in kilograms, by definition.
const pound = 0.45359237

// pounds turns rows of lb into rows of kg.
func pounds(rows [][9]float64) []slingRow {
	var out []slingRow
	for _, r := range rows {
		out = append(out, slingRow{r[0], r[1] * pound, []float64{r[2] * pound, r[3] * pound, r[4] * pound},
			[]float64{r[5] * pound, r[6] * pound, r[7] * pound}, r[8] * pound})
	}
	return out
}

// webbing makes the colour-coded series of EN 1492-1: each rating is the mode factor times one leg.
func webbing() []slingRow {
	var out []slingRow
	for _, t := range []float64{1, 2, 3, 4, 5, 6, 8, 10} {
		w := t * 1000
		out = append(out, slingRow{t, w, []float64{1.4 * w, w}, []float64{2.1 * w, 1.5 * w}, 0})
	}
	return out
}

var slingTables = []slingTable{
	{name: "EN 818-4 grade 8", source: "EN 818-4, grade 8 chain slings", unit: "mm", bands: enBands, choked: 0.8, endles: 1.6, heat: true, rows: tonnes([][8]float64{
		{6, 1.12, 1.60, 1.12, 2.36, 1.70, 1.80}, {7, 1.50, 2.12, 1.50, 3.15, 2.24, 2.50}, {8, 2.00, 2.80, 2.00, 4.25, 3.00, 3.15},
		{10, 3.15, 4.25, 3.15, 6.70, 4.75, 5.00}, {13, 5.30, 7.50, 5.30, 11.20, 8.00, 8.50}, {16, 8.00, 11.20, 8.00, 17.00, 11.80, 12.50}})},
	{name: "EN 13414-1 steel core", source: "EN 13414-1 Table 4, steel core, ferrule-secured wire rope slings", unit: "mm", bands: enBands, choked: 0.75, endles: 1.6, rows: tonnes([][8]float64{
		{8, .750, 1.05, .750, 1.55, 1.10, 1.20}, {10, 1.15, 1.60, 1.15, 2.40, 1.70, 1.85}, {12, 1.70, 2.30, 1.70, 3.55, 2.50, 2.70},
		{16, 3.00, 4.20, 3.00, 6.30, 4.50, 4.80}, {20, 4.60, 6.50, 4.60, 9.80, 6.90, 7.35}})},
	{name: "EN 1492-1 webbing", source: "EN 1492-1, flat woven webbing slings", unit: "t", bands: enBands, choked: 0.8, soft: true, rows: webbing()},
	{name: "US grade 80 chain", source: "OSHA Guidance on Safe Sling Use, Tables 1 and 3", unit: "mm", bands: usBands, choked: 0.8, heat: true, rows: pounds([][9]float64{
		{5.5, 2100, 3600, 3000, 2100, 5500, 4400, 3200, 1700}, {7, 3500, 6100, 4900, 3500, 9100, 7400, 5200, 2800},
		{8, 4500, 7800, 6400, 4500, 11700, 9500, 6800, 3600}, {10, 7100, 12300, 10000, 7100, 18400, 15100, 10600, 5700},
		{13, 12000, 20800, 17000, 12000, 31200, 25500, 18000, 9600}, {16, 18100, 31300, 25600, 18100, 47000, 38400, 27100, 0},
		{20, 28300, 49000, 40000, 28300, 73500, 60000, 42400, 0}})},
	{name: "US grade 100 chain", source: "OSHA Guidance on Safe Sling Use, grade 100 alloy chain", unit: "mm", bands: usBands, choked: 0.8, heat: true, rows: pounds([][9]float64{
		{5.5, 2700, 4700, 3800, 2700, 7000, 5700, 4000, 0}, {10, 8800, 15200, 12400, 8800, 22900, 18700, 13200, 0}})},
}

// findTable finds a sling table by name, case and spaces aside. An empty name is a sling known
// only by its tag, rated by the European mode factors.
func findTable(name string) (slingTable, error) {
	if strings.TrimSpace(name) == "" {
		return slingTable{name: "tag", source: "mode factors of EN 818-4", bands: enBands, choked: 0.75}, nil
	}
	want := strings.ToLower(strings.Join(strings.Fields(name), " "))
	var names []string
	for _, t := range slingTables {
		if strings.ToLower(t.name) == want {
			return t, nil
		}
		names = append(names, t.name)
	}
	sort.Strings(names)
	return slingTable{}, fault("known are "+strings.Join(names, ", ")+"; or give the WLL on its tag alone", "%q is not a sling table known here", name)
}

// row finds one size.
func (t slingTable) row(size float64) (slingRow, error) {
	var sizes []string
	for _, r := range t.rows {
		if math.Abs(r.size-size) < 0.01 {
			return r, nil
		}
		sizes = append(sizes, num(r.size))
	}
	return slingRow{}, fault("sizes there are "+strings.Join(sizes, ", ")+" "+t.unit, "%s has no size %s %s", t.name, origin.Trim(size), t.unit)
}

// band gives the index of the band that an angle from the vertical falls in; the steeper band's
// rating never applies past its own angle. ok is false past the last.
func (t slingTable) band(angle float64) (i int, ok bool) {
	for i, b := range t.bands {
		if angle <= b.upTo+1e-9 {
			return i, true
		}
	}
	return 0, false
}

// set gives what legs of rating one (kg, straight) may lift in a band: the lower of the table and
// factor x one leg. r may be a zero row where only a tag is known.
func (t slingTable) set(r slingRow, one float64, legs, at int) origin.Figure {
	factor, printed := t.bands[at].two, 0.0
	if at < len(r.two) {
		printed = r.two[at]
	}
	what := "two legs"
	if legs > 2 {
		factor, what = t.bands[at].four, "three or four legs"
		if at < len(r.four) {
			printed = r.four[at]
		}
	}
	one1 := given("one leg", one, "kg")
	f := origin.Published("mode factor, "+what, factor, "", t.source)
	product := origin.Worked("rating of "+what, one*factor, "kg", "mode factor x one leg", f, one1)
	if row := printed * math.Min(1, one/math.Max(r.one, tiny)); printed > 0 && row < product.Value {
		if row == printed {
			return origin.Published("rating of "+what, printed, "kg", t.source)
		}
		return origin.Worked("rating of "+what, row, "kg", "printed rating x what remains of one leg",
			origin.Published("printed rating", printed, "kg", t.source), one1, origin.Published("printed rating of one leg", r.one, "kg", t.source))
	}
	return product
}
