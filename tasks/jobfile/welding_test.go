package jobfile

import (
	"math"
	"strings"
	"testing"

	"sailby/tasks"
	"sailby/weld"
)

const weldJob = `job: Welds
zone: Europe/London
places: {shop: {open: Mon-Fri 08:00-17:00}, pier: {open: daily 07:00-19:00}}
window: {place: pier, opens: 2027-04-05 07:00, closes: 2027-04-09 19:00}
people: {Ines: {tickets: [{weld: all}]}}
`

func welds(t *testing.T, more string) *tasks.Job {
	t.Helper()
	job, err := ReadBytes("job.yaml", []byte(weldJob+more), nil)
	if err != nil {
		t.Fatal(err)
	}
	return job
}

const oneWeld = "tasks: {it: {kind: weld, at: shop, joints: [{fillet: {leg: 6 mm}, length: 1 m}]}}\n"

// Every amount arrives in the unit that package weld reckons in, with its line.
func TestWeldingInItsUnits(t *testing.T) {
	job := welds(t, `rates: {operating factor: 22 %, hands-on by: parts, fit-up: 8 min/m, moving: none, cleaning: 1 min/m, starting: 3 min/m, electrode change: 12 s, gouging: 2.5 m/h, set-up: 15 min, turn: 20 min, dress flush: 4 m/h, drill: 6 min, grind away: 3 kg/h}
steels: {plate: {grade: S355J2, yield: 345 N/mm2, C: 0.17 %, Mn: 1.45 %, Mo: 0.02 %, Cr: 0.05 %, Cu: 0.03 %, Ni: 0.04 %, V: 0.01 %}, mill: {CEV: 0.43, CET: 0.32, density: 2700 kg/m3}}
preheat by: EN 1011-2 B
hold before NDT: 16 h
overweld: no
kit: {mig: {set: {rated: 200 A, duty cycle: 35 %, most: 250 A, efficiency: 88 %, power factor: 0.9}, welding cable: {length: 30 m, section: 50 mm2}, supply cable: {length: 40 m, section: 2.5 mm2, volts: 110 V}}}
procedures: {p: {process: 136, kit: mig, hydrogen: 5 ml/100 g, bead area: 30 mm2, welding cable: {length: 60 m, section: 70 mm2}, by person: {Ines: {operating factor: 28 %, bead area: 25 mm2}}}}
tasks:
  it: {kind: weld, at: shop, steel: plate, hold before NDT: none, overweld: yes, joints: [{fillet: {leg: 6 mm, diameter: 48.3 mm}, count: 4, at: [1 m, 0, 12 mm]}]}
  mend: {kind: weld, at: pier, repair of: it, after: it}
  drill: {kind: cut, at: shop, by: drill, count: 12, bevel: 30 deg, pierces: 4, current: 65 A, speed: 400 mm/min, mass: 4 kg}
  air: {kind: test, at: shop, by: air, length: 2 m, dwell: 45 min, pressure: 15 kPa, steel temperature: 12 C}
`)
	w := job.Welding
	r := w.Rates
	r.Origins = nil
	if want := (weld.Rates{OperatingFactor: 0.22, FitUp: 8, Moving: weld.None, Cleaning: 1, Starting: 3, ElectrodeChange: 12, Gouging: 2.5, SetUp: 15, Turn: 20}); !equalRates(r, want) {
		t.Errorf("rates %+v, want %+v", r, want)
	}
	if !w.ByParts || w.Preheat != "EN 1011-2 B" || w.Hold.Value != 16 || !w.NoOverweld || w.Rates.Origins["gouging"].Line == 0 {
		t.Errorf("%+v", w)
	}
	for name, want := range map[string]float64{"dress flush": 4, "drill": 6, "grind away": 3} {
		if a := w.Activities[name]; math.Abs(a.Value-want) > 1e-9 || !a.Pos.Given() {
			t.Errorf("%s: %+v, want %v", name, a, want)
		}
	}
	// CET and CE of that analysis, worked by hand: 0.322 and 0.430, with vanadium 0.432.
	plate, mill := w.Steel("plate"), w.Steel("mill")
	if math.Abs(plate.CET().Value-0.322) > 5e-4 || math.Abs(plate.CE().Value-0.432) > 5e-4 || plate.Yield != 345 || plate.Origin.Line == 0 {
		t.Errorf("plate %+v: CET %v, CE %v", plate, plate.CET().Value, plate.CE().Value)
	}
	if mill.CE().Value != 0.43 || mill.CET().Value != 0.32 || mill.Density != 2700 || mill.Grade != "mill" || w.Steel("S235").Grade != "S235" {
		t.Errorf("mill %+v", mill)
	}
	p := job.Procedures[0]
	if p.Set != (weld.Set{RatedCurrent: 200, DutyCycle: .35, MaxCurrent: 250, Efficiency: .88, PowerFactor: .9}) || p.Cable != (weld.Cable{Length: 60, Section: 70}) || p.Supply != (weld.Cable{Length: 40, Section: 2.5, Volts: 110}) || p.Hydrogen != 5 {
		t.Errorf("procedure %+v", p.Procedure)
	}
	if len(p.By) != 1 || p.By[0].Person != "Ines" || p.By[0].OperatingFactor != 0.28 || math.Abs(p.By[0].BeadArea-25) > 1e-9 || p.By[0].Process != 136 || math.Abs(p.BeadArea-30) > 1e-9 || p.OperatingFactor != 0 {
		t.Errorf("by person %+v", p.By)
	}
	it, mend, drill, air := job.Tasks[0], job.Tasks[1], job.Tasks[2], job.Tasks[3]
	if it.Steel != "plate" || it.Hold.Value != weld.None || it.Overweld == nil || !*it.Overweld || it.Seams[0].At != [3]float64{1000, 0, 12} || !it.Seams[0].HasAt {
		t.Errorf("weld %+v", it)
	}
	e, err := weld.Work([]weld.Seam{it.Seams[0].Seam}, weld.Circumstances{})
	if err != nil || math.Abs(e.Seams[0].Length-4*math.Pi*48.3) > 1e-6 { // once round each of four tubes
		t.Errorf("round the tubes %v, %v", e.Seams, err)
	}
	if mend.Repairs != it || len(mend.Welds()) != 1 || !mend.Maybe() {
		t.Errorf("repair %+v", mend)
	}
	if drill.Count != 12 || drill.Bevel.Value != 30 || drill.Pierces != 4 || drill.Current.Value != 65 || drill.Speed.Value != 400 || drill.Mass.Value != 4 {
		t.Errorf("cut %+v", drill)
	}
	if air.Dwell.Value != 45 || math.Abs(air.Pressure.Value-0.15) > 1e-9 || air.Warm.Value != 12 {
		t.Errorf("test %+v", air)
	}
}

func equalRates(a, b weld.Rates) bool {
	for _, v := range [][2]float64{{a.OperatingFactor, b.OperatingFactor}, {a.FitUp, b.FitUp}, {a.Moving, b.Moving}, {a.Cleaning, b.Cleaning}, {a.ElectrodeChange, b.ElectrodeChange},
		{a.Starting, b.Starting}, {a.Gouging, b.Gouging}, {a.SetUp, b.SetUp}, {a.Turn, b.Turn}} {
		if math.Abs(v[0]-v[1]) > 1e-9*math.Max(1, math.Abs(v[1])) {
			return false
		}
	}
	return true
}

// Welding in a round of a repeated block is repaired in the same round.
func TestRepairOfARound(t *testing.T) {
	job := welds(t, "repeat: {bay: {count: 2, tasks: {seam: {kind: weld, at: pier, joints: [{fillet: {leg: 6 mm}, length: 2 m}]}, mend: {kind: weld, at: pier, repair of: seam, after: seam, chance: 20 %}}}}\n")
	for _, k := range job.Tasks {
		if strings.HasPrefix(k.Name, "mend") && (k.Repairs == nil || k.Repairs.Round != k.Round || k.Chance != 0.2) {
			t.Errorf("%s repairs %+v with a chance of %v", k.Name, k.Repairs, k.Chance)
		}
	}
}

func TestWeldingFaults(t *testing.T) {
	for more, want := range map[string]string{
		"kit: {mig: {welding cable: {length: 30 m}}}\n":                                    "a cable has a length and a section",
		"kit: {mig: {supply cable: {length: 30 m, section: 4 mm2, phases: 2}}}\n":          "one phase or three",
		"kit: {mig: {set: {rated: 200 A}}}\n":                                              "go together",
		"rates: {fit-up: 8 min}\n":                                                         "min/m",
		"rates: {gouging: none}\n":                                                         "none",
		"steels: {plate: {Mn: 1.4 %}}\n":                                                   "without carbon",
		"steels: {plate: {C: 17 kg}}\n":                                                    "kg",
		"steels: {plate: {C: 60 %}}\n":                                                     "outside",
		"preheat by: the book\n":                                                           "not one of",
		"hold before NDT: soon\n":                                                          "soon",
		"procedures: {p: {by person: {Inez: {current: 200 A}}}}\n":                         "no person is called",
		"procedures: {p: {hydrogen: 5 ml}}\n":                                              "ml",
		"tasks: {mend: {kind: weld, at: shop, repair of: nothing}}\n":                      "no task is called",
		"tasks: {mend: {kind: weld, at: shop, repair of: mend}}\n":                         "no repair of itself",
		"tasks: {a: {at: shop, hours: 1 h}, mend: {kind: weld, at: shop, repair of: a}}\n": "has no joints",
		"tasks: {mend: {kind: weld, at: shop, repair of: mend, joints: [{fillet: {leg: 6 mm}, length: 1 m}]}}\n":       "those of the weld that is repaired",
		"tasks: {it: {kind: weld, at: shop, joints: [{fillet: {leg: 6 mm}, length: 1 m, at: [1 m, 2 m]}]}}\n":          "x, y and z",
		"tasks: {it: {kind: weld, at: shop, joints: [{fillet: {leg: 6 mm}, length: 1 m}], hold before NDT: 2000 h}}\n": "outside",
		"tasks: {it: {kind: cut, at: shop, by: oxy-fuel, length: 1 m, thickness: 10 mm, bevel: 80 deg}}\n":             "outside",
		"tasks: {it: {kind: test, at: shop, by: air, length: 1 m, pressure: 0.15}}\n":                                  "no unit",
	} {
		text := weldJob + more
		if !strings.HasPrefix(more, "tasks") {
			text += oneWeld
		}
		_, err := ReadBytes("job.yaml", []byte(text), nil)
		all, ok := err.(tasks.Faults)
		if !ok || !strings.Contains(all[0].Text, want) || all[0].Hint == "" || all[0].Pos.Line < 2 {
			t.Errorf("%s: %v, want %q", more, err, want)
		}
	}
}

// What is for one position has its figures there; what says a position keeps it, and what is for
// several says none.
func TestProcedureForOnePosition(t *testing.T) {
	job := welds(t, `procedures:
  up: {process: 136, deposition: 2.4 kg/h, for: {positions: [PF]}, by person: {Ines: {deposition: 2.6 kg/h}}}
  said: {process: 136, deposition: 2.4 kg/h, position: PB, for: {positions: [PF]}}
  both: {process: 136, deposition: 2.4 kg/h, for: {positions: [PB, PF]}}
`+oneWeld)
	for i, want := range []weld.Position{weld.PF, weld.PB, 0} {
		if p := job.Procedures[i]; p.Position != want {
			t.Errorf("%s: %v, want %v", p.Name, p.Position, want)
		}
	}
	if by := job.Procedures[0].By[0]; by.Position != weld.PF {
		t.Errorf("by person: %v", by.Position)
	}
}
