package weld

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// Limits are the largest sizes of AWS D1.1:2020 Table 5.1 for one process and position, mm; +Inf
// is unlimited, 0 does not apply. They are a ceiling: what a run really lays is smaller.
type Limits struct {
	Fillet    float64 // leg of a single-run fillet
	Root      float64 // thickness of the root run
	Fill      float64 // thickness of a fill run
	Electrode float64 // electrode or wire diameter, for a fillet
}

// Limits gives the limits of AWS D1.1:2020 Table 5.1 for a process in a position; ok is false where the table has none.
func (p Process) Limits(pos Position) (Limits, bool) {
	col := 0
	switch pos {
	case PA:
	case PB, PC:
		col = 1
	case PF, PG, PH, PJ, HL045:
		col = 2
	case PD, PE:
		col = 3
	default:
		return Limits{}, false
	}
	root := [4]float64{10, 8, 12, 8}[col]
	switch p {
	case 111:
		return Limits{[4]float64{10, 8, 12, 8}[col], root, 5, [4]float64{8, 6.4, 4.8, 4.8}[col]}, true
	case 114, 131, 135, 136, 138:
		return Limits{[4]float64{12, 10, 12, 8}[col], root, 6, [4]float64{3.2, 3.2, 2.4, 2}[col]}, true
	case 121:
		if col < 2 {
			return Limits{Fillet: [2]float64{math.Inf(1), 8}[col], Fill: 6}, true
		}
	}
	return Limits{}, false
}

// beads are the areas that one run lays flat, mm2, by process and size (house judgement: 111
// 3.2 mm 15 to 20, 4.0 mm 20 to 30, 5.0 mm 30 to 40; wires of 1.2 mm 25 to 40).
var beads = []struct {
	process Process
	size    float64
	area    float64
}{
	{111, 2.5, 10}, {111, 3.2, 17}, {111, 4.0, 25}, {111, 5.0, 35},
	{114, 1.8, 30}, {121, 3.2, 50}, {121, 4.0, 65}, {131, 1.2, 30},
	{135, 0.8, 15}, {135, 1.0, 24}, {135, 1.2, 30},
	{136, 1.2, 30}, {136, 1.6, 42}, {138, 1.2, 30}, {141, 2.4, 10},
}

// beadFactor is what a position makes of the bead: a weave upwards is larger, overhead smaller.
func beadFactor(pos Position) float64 {
	switch pos {
	case PC:
		return 0.8
	case PF, PH:
		return 1.2
	case PG, PJ:
		return 0.6
	case PD, PE, HL045:
		return 0.7
	}
	return 1
}

// singleLeg is the largest drawn leg usually laid in one run (published: 8 mm horizontal, 5/16
// in; the rest house judgement below the ceiling of AWS D1.1).
func singleLeg(p Process, pos Position) float64 {
	if p == 141 {
		return 4
	}
	switch pos {
	case PA, PF, PH:
		if p == 111 && pos == PA {
			return 8
		}
		return 10
	case PG, PJ:
		return 5
	case PD, PE, HL045:
		return 6
	}
	return 8
}

const largestRun = "area of the largest run"

const rootShare = 0.8 // a root run lays this part of the usual bead (house judgement)

// runs is how a section is filled: count in all, the largest area of one, and why.
type runs struct {
	count  int     // all sides
	area   float64 // mm2 of the largest run
	travel bool    // one run a side laid at a given travel speed
	why    origin.Figure
	large  origin.Figure // area as a figure
	warn   []string
}

// bead gives the area of one run: as given, from rate over travel, else usual for process, size
// and position, and not above what the most heat input allows.
func (p Procedure) bead(d process, pos Position, size, rate, hottest origin.Figure, density float64) origin.Figure {
	const name = "area of a run"
	switch {
	case p.BeadArea > 0:
		f := p.given("bead area", p.BeadArea, "mm2")
		f.Name = name
		return f
	case p.Travel > 0:
		return origin.Worked(name, rate.Value*1e9/60/density/p.Travel, "mm2", "deposition rate x 1000000000 / 60 / density / travel",
			rate, densityFigure(density), p.given("travel", p.Travel, "mm/min"))
	}
	best, gap := 20.0, math.Inf(1)
	for _, b := range beads {
		if g := math.Abs(b.size - size.Value); b.process == d.number && g < gap {
			best, gap = b.area, g
		}
	}
	f := origin.Worked(name, best*beadFactor(pos), "mm2", "usual bead x position factor on bead",
		origin.House("usual bead", best, "mm2", d.name+" of "+size.Amount()),
		origin.House("position factor on bead", beadFactor(pos), "", pos.String()))
	if hottest.Name == "" || hottest.Value >= f.Value {
		return f
	}
	hottest.Name = name
	return hottest
}

// runsFor fills a section. Butts: a root run of its own, then runs of the bead. Fillets within
// the usual single-run leg, with no bead or travel given: one. Everything else: area over bead.
func (p Procedure) runsFor(j Joint, s Section, d process, pos Position, bead, hottest origin.Figure) runs {
	n := float64(s.Sides)
	each := s.Area / n
	legs := j.Type == Fillet || j.Type == Lap
	leg := math.Max(j.Leg, j.Leg2)
	sides := origin.Written("sides", n, "", j.Origin)
	var r runs
	switch {
	case legs && p.BeadArea == 0 && p.Travel == 0 && leg <= singleLeg(d.number, pos) && (hottest.Name == "" || each <= hottest.Value):
		r.count, r.area = s.Sides, each
		most := origin.House("largest leg in one run", singleLeg(d.number, pos), "mm", d.name+" in "+pos.String())
		if pos == PB {
			most.Origin = origin.Origin{Kind: origin.Table, Source: "AISC Steel Interchange: 8 mm (5/16 in) is the largest usual single-run horizontal fillet"}
		}
		r.why = origin.Worked("runs", n, "", "sides", sides, most)
		r.large = origin.Worked(largestRun, r.area, "mm2", "area laid / sides", s.Why, sides)
	case legs && p.Travel > 0 && p.BeadArea == 0: // the leg drawn must come out; a tenth short is within the hand
		wants := s.Drawn / n
		c := math.Max(1, math.Ceil(wants/bead.Value-0.1))
		r.count, r.area, r.travel = int(c*n), each/c, true
		r.why = origin.Worked("runs", c*n, "", "max(1, ceil(area drawn on a side / area of a run - 0.1)) x sides",
			origin.Written("area drawn on a side", wants, "mm2", j.Origin), bead, sides)
		r.large = origin.Worked(largestRun, r.area, "mm2", "area laid / runs", s.Why, r.why)
	case legs:
		c := math.Ceil(each/bead.Value - 1e-9)
		r.count, r.area = int(c*n), each/c
		r.why = origin.Worked("runs", c*n, "", "ceil(area laid / sides / area of a run) x sides", s.Why, sides, bead)
		r.large = origin.Worked(largestRun, r.area, "mm2", "area laid / runs", s.Why, r.why)
	default:
		r = buttRuns(j, s, bead)
	}
	r.warn = ceilings(p, j, s, d, pos, bead, r)
	return r
}

// buttRuns fills each side of a butt: a root run, then runs of the bead. Sides that are not alike
// are counted one by one.
func buttRuns(j Joint, s Section, bead origin.Figure) runs {
	n := float64(s.Sides)
	each := s.Area / n
	first := origin.Worked("root run", rootShare*bead.Value, "mm2", "area of a run x root share", bead, origin.House("root share", rootShare, "", "the root lays less than a fill run"))
	count := func(area float64) float64 {
		return 1 + math.Ceil((area-math.Min(area, first.Value))/bead.Value-1e-9)
	}
	sides := origin.Written("sides", n, "", j.Origin)
	var r runs
	c := count(each) * n
	r.why = origin.Worked("runs", c, "", "(1 + ceil(max(0, area laid / sides - root run) / area of a run)) x sides", s.Why, sides, first, bead)
	large, how := each, "area laid / sides"
	from := []origin.Figure{s.Why, sides, first, bead}
	if s.first.Name != "" {
		a := s.first
		b := origin.Worked("area of the second side", s.Area-a.Value, "mm2", "area laid - area of the first side", s.Why, a)
		c = count(a.Value) + count(b.Value)
		r.why = origin.Worked("runs", c, "", "2 + ceil(max(0, area of the first side - root run) / area of a run) + ceil(max(0, area of the second side - root run) / area of a run)", a, b, first, bead)
		large, how = math.Max(a.Value, b.Value), "max(area of the first side, area of the second side)"
		from = []origin.Figure{a, b, first, bead}
	}
	r.count = int(c)
	root := math.Min(large, first.Value)
	r.area = math.Min(bead.Value, math.Max(root, large-root))
	r.large = origin.Worked(largestRun, r.area, "mm2", "min(area of a run, max(min("+how+", root run), "+how+" - root run))", from...)
	return r
}

// ceilings warns where the given bead is above what AWS D1.1 allows, and where the electrode is.
func ceilings(p Procedure, j Joint, s Section, d process, pos Position, bead origin.Figure, r runs) []string {
	lim, ok := d.number.Limits(pos)
	if !ok {
		return nil
	}
	var warn []string
	size := p.size(d).Value
	if lim.Electrode > 0 && size > lim.Electrode+0.05 {
		warn = append(warn, fmt.Sprintf("%s of %.3g mm in %s is above the %.3g mm of AWS D1.1:2020 Table 5.1", p.size(d).Name, size, pos, lim.Electrode))
	}
	legs := j.Type == Fillet || j.Type == Lap
	if legs && r.count == s.Sides && lim.Fillet > 0 && math.Max(j.Leg, j.Leg2) > lim.Fillet {
		warn = append(warn, fmt.Sprintf("a leg of %.3g mm in one run in %s is above the %.3g mm of AWS D1.1:2020 Table 5.1", j.Leg, pos, lim.Fillet))
	}
	if legs || !j.Type.groove() || p.BeadArea == 0 && p.Travel == 0 {
		return warn
	}
	root := heightOf(j, rootShare*bead.Value)
	if lim.Root > 0 && root > lim.Root {
		warn = append(warn, fmt.Sprintf("a root run %.2g mm thick is above the %.3g mm of AWS D1.1:2020 Table 5.1", root, lim.Root))
	}
	if fill := heightOf(j, (1+rootShare)*bead.Value) - root; lim.Fill > 0 && r.count > s.Sides && fill > lim.Fill {
		warn = append(warn, fmt.Sprintf("a fill run %.2g mm thick is above the %.3g mm of AWS D1.1:2020 Table 5.1", fill, lim.Fill))
	}
	return warn
}

// heightOf is how high an area fills a V from its root: g h + h^2 t = A solved for h.
func heightOf(j Joint, area float64) float64 {
	t := tanDeg(j.Angle / 2)
	if j.Type == SingleBevel || j.Type == DoubleBevel {
		t = tanDeg(j.Angle) / 2
	}
	g := j.RootGap + j.Gap
	if t <= 0 {
		return area / math.Max(g, 1)
	}
	return (-g + math.Sqrt(g*g+4*t*area)) / (2 * t)
}

// minFillet gives the smallest leg that AWS D1.1:2020 allows for a thickness of base metal in mm
// (minimum fillet size table, single run): 3 to 6 mm thick, 5 to 12, 6 to 20, 8 above.
func minFillet(thickness float64) float64 {
	switch {
	case thickness <= 6:
		return 3
	case thickness <= 12:
		return 5
	case thickness <= 20:
		return 6
	}
	return 8
}
