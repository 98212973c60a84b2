package weld

import (
	"fmt"
	"math"
	"testing"
)

// rateOf is the rate of a procedure flat, kg/h.
func rateOf(t *testing.T, p Procedure) float64 {
	d, ok := processData(p.Process)
	if !ok {
		t.Fatal(p.Process)
	}
	f, _ := p.rate(d, PA, steelDensity)
	return f.Value
}

// outsideRates are deposition rates, wire and gas.
func outsideRates(t *testing.T) []outside {
	const (
		sheet   = "ESAB Filler Metal Handbook, cost worksheet p. 8"
		wire    = "ESAB MIG Handbook p. 7-10"
		self    = "data sheet of a self-shielded wire of 2.0 mm"
		twi     = "TWI Job Knowledge 97, Table 1"
		cigweld = "CIGWELD Deposition Data"
	)
	weighed, err := Weighed(2.000, 2.095, 60)
	if err != nil {
		t.Fatal(err)
	}
	feed := func(perMin float64) float64 {
		return rateOf(t, Procedure{Process: 114, WireDiameter: 2, WireFeed: perMin * inch / 1000}) / pound
	}
	rows := []outside{
		{"lb/h of E7018 4.8 mm at 250 A", sheet, seen, true, rateOf(t, Procedure{Process: 111, ElectrodeDiameter: 4.8, Current: 250}) / pound, 5.4, 0.01, "2.45 kg/h has three digits"},
		{"lb/h of E71T-1 1.6 mm at 300 A", sheet, seen, true, rateOf(t, Procedure{Process: 136, WireDiameter: 1.6, Current: 300}) / pound, 10.2, 0.01, "4.63 kg/h has three digits"},
		{"lb/h of solid wire at 250 A", "ESAB AWTC Lesson 9 s. 9.8", seen, true, rateOf(t, Procedure{Process: 135, Current: 250}) / pound, 7.4, 0.02, "3.36 kg/h has three digits"},
		{"lb/h of self-shielded wire at 200 in/min", self, seen, false, feed(200), 9.9, 0.3, "one fill of the wire stands for both feeds, 3 %"},
		{"lb/h of self-shielded wire at 240 in/min", self, seen, false, feed(240), 12.1, 0.3, "one fill of the wire stands for both feeds, 3 %"},
		{"kg/h of a plate of 2.000 kg that weighs 2.095 kg after 60 s", cigweld, seen, false, weighed, 5.7, 1e-9, exact},
	}
	for _, c := range [][2]float64{{0.030, 276.9}, {0.035, 203.9}, {0.045, 122.7}, {1.0 / 16, 64.4}} {
		rows = append(rows, outside{fmt.Sprintf("metres a kilogram of steel wire of %.3f in", c[0]), wire, seen, false, WireMetres(c[0]*inch, 0), c[1], c[1] * 0.015, "the print is within 1.5 % of geometry"})
	}
	for _, c := range []struct {
		p      Process
		lo, hi float64
	}{{111, 0.4, 5.5}, {135, 0.6, 12}, {136, 1, 15}, {121, 3, 16}} {
		v := rateOf(t, Procedure{Process: c.p})
		ok := 0.0
		if v >= c.lo && v <= c.hi {
			ok = 1
		}
		rows = append(rows, outside{fmt.Sprintf("usual rate of %v lies where the table has its process", c.p), twi, seen, false, ok, 1, 0, ranged})
	}
	const gas = "ESAB Filler Metal Handbook p. 8-7"
	solid, _ := processData(135)
	cored, _ := processData(136)
	return append(rows,
		inRange("cfh of gas for solid wire", gas, seen, solid.flow/cubicFoot*60, 25, 30),
		outside{"cfh of gas for cored wire to 1.6 mm", gas, seen, true, cored.flow / cubicFoot * 60, 35, 0.1, "16.5 L/min has three digits"},
		inRange("mm/min of a 3 mm MAG fillet on 1.6 mm sheet", "manual of a MAG set", seen, func() float64 {
			e := mustWork(t, plain, Seam{Joint: Joint{Type: Fillet, Leg: 3, Thickness: 1.6, Length: 1000}, Position: PB, Procedure: &Procedure{Process: 135, Current: 105}})
			return 1000 / float64(e.Arc)
		}(), 500, 600))
}

// outsideStubs is the correction of electrode efficiency for stubs, and counts of electrodes.
func outsideStubs(t *testing.T) []outside {
	const lesson = "ESAB AWTC Lesson 9, figure 5"
	var rows []outside
	stick, _ := processData(111)
	for _, c := range []struct {
		long, eff float64
		want      [4]float64
	}{{12, .60, [4]float64{50, 45, 40, 35}}, {12, .70, [4]float64{58.3, 52.5, 46.6, 40.8}}, {14, .65, [4]float64{55.7, 51.1, 46.4, 41.8}},
		{14, .70, [4]float64{60, 55, 50, 45}}, {18, .75, [4]float64{66.6, 62.5, 58.3, 54.2}}} {
		for i, want := range c.want {
			p := Procedure{Efficiency: c.eff, ElectrodeLength: c.long * inch, StubLength: float64(2+i) * inch}
			rows = append(rows, outside{fmt.Sprintf("efficiency of %.0f %% with %v in and a stub of %d in", c.eff*100, c.long, 2+i), lesson, seen, false, p.used(stick, 4).Value * 100, want, 0.11, cutOff})
		}
	}
	for _, c := range []struct{ size, long, lo, hi float64 }{{3.2, 350, 27, 30}, {3.2, 450, 20, 22}, {4, 450, 13, 15}, {5, 450, 8, 9}} {
		s := Seam{Joint: Joint{Type: Fillet, Leg: 10, Length: 50000}, Procedure: &Procedure{Process: 111, ElectrodeDiameter: c.size, ElectrodeLength: c.long}}
		bought := mustWork(t, plain, s).Consumables[0]
		rows = append(rows, inRange(fmt.Sprintf("electrodes a kilogram, E7018 %v x %v", c.size, c.long), "makers' tables, whole electrodes", recalled, 1/bought.Each, c.lo-0.5, c.hi+0.5))
	}
	return rows
}

// outsideRuns are runs, their limits and least fillets.
func outsideRuns(t *testing.T) []outside {
	const aws = "AWS D1.1:2020 Table 5.1"
	var rows []outside
	for _, c := range []struct {
		p    Process
		pos  Position
		want Limits
	}{
		{111, PA, Limits{10, 10, 5, 8}}, {111, PB, Limits{8, 8, 5, 6.4}}, {111, PF, Limits{12, 12, 5, 4.8}}, {111, PE, Limits{8, 8, 5, 4.8}},
		{136, PA, Limits{12, 10, 6, 3.2}}, {136, PB, Limits{10, 8, 6, 3.2}}, {135, PF, Limits{12, 12, 6, 2.4}}, {136, PD, Limits{8, 8, 6, 2}},
		{121, PB, Limits{Fillet: 8, Fill: 6}},
	} {
		got, _ := c.p.Limits(c.pos)
		same := 0.0
		if got == c.want {
			same = 1
		}
		rows = append(rows, outside{fmt.Sprintf("largest fillet, root and fill run and electrode of %v in %v", c.p, c.pos), aws, seen, true, same, 1, 0, exact})
	}
	flat, _ := Process(121).Limits(PA)
	rows = append(rows, outside{"a flat fillet of submerged arc has no limit", aws, seen, true, map[bool]float64{true: 1}[math.IsInf(flat.Fillet, 1)], 1, 0, exact})
	for _, c := range [][2]float64{{6, 1.0 / 8}, {12, 3.0 / 16}, {20, 1.0 / 4}, {25, 5.0 / 16}} {
		rows = append(rows, outside{fmt.Sprintf("least fillet on %v mm", c[0]), "AWS D1.1 minimum fillet sizes, inches", seen, true, minFillet(c[0]), c[1] * inch, 0.4, "the metric column is rounded to whole millimetres"})
	}
	runs := func(p Process, leg float64) float64 {
		return float64(mustWork(t, Circumstances{}, Seam{Joint: Joint{Type: Fillet, Leg: leg, Length: 1000}, Position: PB, Procedure: &Procedure{Process: p}}).Passes)
	}
	const miller = "D. K. Miller, Practical Cost-Saving Ideas no. 2"
	for _, p := range []Process{111, 136} {
		rows = append(rows,
			outside{fmt.Sprintf("a 6 mm horizontal fillet with %v is one run", p), miller, seen, false, runs(p, 6), 1, 0, exact},
			inRange(fmt.Sprintf("a 12 mm horizontal fillet with %v takes three to six runs", p), miller, seen, runs(p, 12), 3, 6),
			outside{fmt.Sprintf("an 8 mm horizontal fillet with %v is one run", p), "AISC Steel Interchange: 5/16 in is the largest usual", seen, false, runs(p, 8), 1, 0, exact},
			outside{fmt.Sprintf("a 9 mm horizontal fillet with %v is more than one run", p), "AISC Steel Interchange: 5/16 in is the largest usual", seen, false, math.Min(2, runs(p, 9)), 2, 0, "at least"})
	}
	for _, c := range []struct{ leg, lo, hi float64 }{{10, 3, 3}, {14, 4, 6}, {16, 5, 7}, {20, 8, 10}} {
		rows = append(rows, inRange(fmt.Sprintf("runs of a %v mm fillet with stick", c.leg), "rod-pass tables, within one run", recalled, runs(111, c.leg), c.lo, c.hi))
	}
	return rows
}
