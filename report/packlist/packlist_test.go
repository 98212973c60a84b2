package packlist

import (
	"bytes"
	"encoding/csv"
	"math"
	"os"
	"slices"
	"strings"
	"testing"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

const sluice = "../../testdata/jobs/sluice/job.yaml"

// listOf makes the list of a job without a plan.
func listOf(t *testing.T, text string) *List {
	t.Helper()
	job, err := jobfile.ReadBytes("job.yaml", []byte(text), nil)
	if err != nil {
		t.Fatal(err)
	}
	w, faults := expand.Expand(job, expand.Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return Make(&plan.Answer{Work: w})
}

func textOf(t *testing.T) string {
	t.Helper()
	data, err := os.ReadFile(sluice)
	if err != nil {
		t.Fatal(err)
	}
	return string(data)
}

func (l *List) find(t *testing.T, what string) Item {
	t.Helper()
	i := slices.IndexFunc(l.Items, func(it Item) bool { return it.What == what })
	if i < 0 {
		t.Fatalf("%q is not on the list", what)
	}
	return l.Items[i]
}

// What only the site joins travels in two pieces; what stays or was always there does not travel.
func TestLoadsTravelAsTheyHangTogether(t *testing.T) {
	l := listOf(t, textOf(t))
	skin, braces := l.find(t, "gate: skin"), l.find(t, "gate: braces")
	if math.Abs(skin.Mass-282.6) > 0.05 || !skin.Stops { // 2 x 1.8 x 0.01 m x 7850 kg/m3
		t.Errorf("skin: %+v", skin)
	}
	if braces.Mass < 115 || braces.Mass > 125 { // 4 x 1.8 m of about 17 kg/m
		t.Errorf("braces: %+v", braces)
	}
	for _, it := range l.Items {
		if strings.Contains(it.What, "old gate:") || it.What == "old gate" || it.What == "shop hoist" {
			t.Errorf("%s is on the list", it.What)
		}
	}
}

// The load list is 40 kg over the van alone; with the trailer it goes, and nothing is over a payload.
func TestVanAloneIsFortyOver(t *testing.T) {
	text := textOf(t)
	var kept []string
	for _, line := range strings.Split(text, "\n") {
		if !strings.HasPrefix(line, "  trailer:") {
			kept = append(kept, line)
		}
	}
	alone := listOf(t, strings.Join(kept, "\n"))
	if alone.OK || !alone.Proved || !strings.Contains(alone.Reason, "40 kg over the 709 kg") || !strings.Contains(alone.Nearest, "at least 40 kg") {
		t.Errorf("alone: %v %q %q", alone.OK, alone.Reason, alone.Nearest)
	}
	both := listOf(t, text)
	if !both.OK || len(both.Vehicles) != 2 {
		t.Fatalf("both: %+v", both)
	}
	sum := 0.0
	for _, v := range both.Vehicles {
		goods := 0.0
		for _, g := range v.Goods {
			goods += g.Mass
		}
		if math.Abs(goods-v.Mass) > 0.11 || v.Mass > v.Payload {
			t.Errorf("%s: %v kg of goods, %v kg said, %v kg of payload", v.Name, goods, v.Mass, v.Payload)
		}
		sum += goods
	}
	if math.Abs(sum-both.Mass) > 0.2 {
		t.Errorf("the vehicles take %v kg, the list comes to %v kg", sum, both.Mass)
	}
	for _, it := range both.Items {
		if it.Mass > 0 && len(it.Where) == 0 {
			t.Errorf("%s has no vehicle", it.What)
		}
	}
}

// Rules are flagged with both numbers and decide nothing; the ferry's band is that of van and trailer.
func TestFlags(t *testing.T) {
	l := listOf(t, textOf(t))
	all := strings.Join(append(slices.Clone(l.Flags), l.Notes...), "\n")
	for _, want := range []string{"3 bottles of gas is over 2 bottles", "declare 24 h before sailing", `books as "van and trailer"`} {
		if !strings.Contains(all, want) {
			t.Errorf("nothing says %q:\n%s", want, all)
		}
	}
	l = listOf(t, strings.Replace(textOf(t), "drive: 9 h,", "drive: 2 h,", 1))
	if all := strings.Join(l.Flags, "\n"); !strings.Contains(all, "Brede drives 180 min against 120 min") {
		t.Errorf("driving: %s", all)
	}
	if !l.OK {
		t.Error("a flag decides")
	}
}

const small = `job: Small
zone: Europe/London
places: {shop: {open: always}, pier: {open: always}}
window: {place: pier, opens: 2027-04-05 08:00, closes: 2027-04-19 18:00}
people: {Tom: {tickets: [{weld: all}, painter, fire watch]}, Ann: {tickets: [fire watch]}}
paints: {primer: {kind: two-pack epoxy, packs: [1 L, 5 L]}}
`

// Sums come before rounding: two coats that each want less than a litre share a tin.
func TestRoundedOnceAfterTheSum(t *testing.T) {
	one := small + "tasks:\n  a: {kind: coat, at: pier, area: 1 m2, coats: primer}\n"
	two := one + "  b: {kind: coat, at: pier, area: 1 m2, coats: primer}\n"
	a, b := listOf(t, one).find(t, "paint primer"), listOf(t, two).find(t, "paint primer")
	if !strings.Contains(a.Amount, "tins 1 of 1 L") || !strings.Contains(b.Amount, "tins 1 of 1 L") {
		t.Errorf("one coat: %s; two coats: %s: both fill one tin", a.Amount, b.Amount)
	}
	if len(b.For) != 2 {
		t.Errorf("for %v", b.For)
	}
}

// Sizes that the job file gives count; the longest beginning of the name wins; an allowance comes on
// what has no spare of its own.
func TestPacksAndAllowance(t *testing.T) {
	weld := "tasks: {w: {kind: weld, at: pier, joints: [{fillet: {leg: 8 mm}, length: 20 m}]}}\n"
	m := &maker{job: &tasks.Job{Packing: tasks.Packing{Packs: map[string]float64{"elec": 10, "electrodes 3": 2.5, "primer": 20}}}}
	for what, want := range map[string]float64{"electrodes 3.2 mm": 2.5, "electrodes 4 mm": 10, "paint primer": 20} {
		if got, ok := m.packOf(what); !ok || got != want {
			t.Errorf("%s: %v %v", what, got, ok)
		}
	}
	if _, ok := m.packOf("wire"); ok {
		t.Error("wire has a pack size that nobody gave")
	}
	l := listOf(t, small+weld)
	var rods Item
	for _, it := range l.Items {
		if strings.Contains(it.What, "electrodes") {
			rods = it
		}
	}
	if rods.Mass < 5 || !strings.Contains(rods.Amount, "spare") {
		t.Errorf("20 m of 8 mm fillet: %+v", rods)
	}
}

// A box weighs itself and what is in it, and stands for it on the bed.
func TestBoxes(t *testing.T) {
	l := listOf(t, textOf(t))
	for _, b := range l.Boxes {
		sum := map[string]float64{"weld box": 4, "paint box": 3}[b.Name]
		for _, what := range b.Items {
			sum += l.find(t, what).Mass
		}
		if math.Abs(sum-b.Mass) > 0.11 || b.Where == "" {
			t.Errorf("%s: %v kg in %q, its things come to %v kg", b.Name, b.Mass, b.Where, sum)
		}
	}
	if len(l.Boxes) != 2 {
		t.Errorf("boxes: %v", l.Boxes)
	}
}

// Every row of the table has every column, and nothing in it runs as a formula.
func TestCSV(t *testing.T) {
	text := strings.Replace(textOf(t), "    pins and keys:", "    \"=HYPERLINK(1)\": {mass: 1 kg}\n    pins and keys:", 1)
	l := listOf(t, text)
	var b bytes.Buffer
	if err := l.CSV(&b); err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(&b).ReadAll()
	if err != nil || len(rows) != len(l.Items)+1 {
		t.Fatalf("%d rows for %d things: %v", len(rows), len(l.Items), err)
	}
	for _, r := range rows {
		for _, cell := range r {
			if cell != "" && strings.ContainsAny(cell[:1], "=+-@") {
				t.Errorf("%q would run as a formula", cell)
			}
		}
	}
}

func TestNothingToList(t *testing.T) {
	if Make(nil) != nil || Make(&plan.Answer{}) != nil {
		t.Error("a list of nothing")
	}
}

const ferried = `job: Beam
zone: Europe/London
places: {shop: {open: Mon-Fri 07:30-17:30}, pier: {open: daily 08:00-18:00}}
window: {place: pier, opens: 2027-04-05 08:00, closes: 2027-04-09 18:00}
people: {Tom: {tickets: [slinger/signaller, lift supervisor]}, Ann: {}}
kit:
  chain hoist: {rated: 1 t, mass: 24 kg, spare: lever hoist}
  lever hoist: {rated: 1 t, mass: 11 kg}
  oxygen: {class: oxygen, of it: 50, mass: 80 kg}
  acetylene: {class: acetylene, of it: 40, mass: 70 kg}
assemblies: {beam: {mass: 250 kg}, frame: {mass: 100 kg}, stump: {mass: 90 kg, old: yes}}
tasks:
  make frame: {at: shop, hours: 1 h, kind: fit-up, part: frame}
  frame in: {kind: lift, at: pier, lifts: frame, by: chain hoist, after: make frame}
  beam in: {kind: lift, at: pier, lifts: beam, by: chain hoist}
  free stump: {at: pier, hours: 1 h}
  stump out: {kind: lift, at: pier, lifts: stump, by: chain hoist, proved free by: free stump}
  burn: {at: pier, hours: 1 h, kit: [oxygen, acetylene]}
carriage: {ferry gas: {class: acetylene, most: 20, unit: L, not with: oxygen}}
`

// An assembly that no task at home has to do with is told of, an old one is not; kit that is named as a spare goes
// along and does not stop the job.
func TestWhatIsNotTakenIsTold(t *testing.T) {
	l := listOf(t, ferried)
	notes := strings.Join(l.Notes, "\n")
	if !strings.Contains(notes, "beam is not on this list") || strings.Contains(notes, "stump") || strings.Contains(notes, "frame") {
		t.Error(notes)
	}
	spare := l.find(t, "lever hoist")
	if spare.Mass != 11 || spare.Stops || len(spare.For) != 1 || spare.For[0] != "chain hoist, as its spare" {
		t.Errorf("%+v", spare)
	}
	if !l.find(t, "chain hoist").Stops {
		t.Error("the only hoist does not stop the job")
	}
	for _, it := range listOf(t, strings.Replace(ferried, ", spare: lever hoist", "", 1)).Items {
		if it.What == "lever hoist" {
			t.Errorf("nothing asks for it: %+v", it)
		}
	}
}

// Rules of carriage are flagged whether the goods fit, fit in more runs, or do not fit at all.
func TestCarriageIsFlaggedWhateverFits(t *testing.T) {
	for name, payload := range map[string]string{"fits": "900 kg", "in two runs": "200 kg", "not at all": "60 kg"} {
		l := listOf(t, ferried+"vehicles: {van: {payload: "+payload+", bed: [4 m, 1.7 m, 1.8 m]}}\n")
		if flags := strings.Join(l.Flags, "\n"); !strings.Contains(flags, "40 L of acetylene is over 20 L") || l.OK != (name == "fits") {
			t.Errorf("%s: %v %v", name, l.OK, l.Flags)
		}
	}
}
