package weld

import (
	"fmt"
	"math"
	"sort"

	"sailby/tasks/origin"
)

// The single V as really deposited, kilograms a metre without cap, by thickness and position,
// transverse shrinkage included: ESAB electrode consumption table for butt joints. Rows whose
// printed cells are misprints (5 mm in PF, 14 mm in PC) are left out.
const vSource = "ESAB electrode consumption table, V joints (deposited metal by position, shrinkage included)"

type vRow struct {
	thick, gap                   float64
	flat50, flat60, pc, pf, over float64
}

var vTable = []vRow{
	{4, 1, 0.09, 0.10, 0.11, 0.13, 0.14},
	{6, 1, 0.17, 0.20, 0.24, 0.29, 0.30},
	{8, 1.5, 0.31, 0.37, 0.44, 0.47, 0.55},
	{10, 2, 0.49, 0.57, 0.64, 0.76, 0.86},
	{12, 2, 0.65, 0.77, 0.89, 1.05, 1.23},
	{15, 2, 0.97, 1.15, 1.34, 1.55, 1.81},
	{16, 2, 1.04, 1.23, 1.46, 1.75, 2.02},
	{18, 2, 1.33, 1.60, 1.83, 2.17, 2.51},
	{20, 2, 1.63, 1.94, 2.21, 2.62, 3.11},
	{25, 2, 2.46, 2.94, 3.34, 4.00, 4.76},
}

// shrink is deposited over drawn volume of a row: the table's mass over the mass of
// gap x t + t^2 tan(angle/2).
func (r vRow) shrink(kgPerM, angle float64) float64 {
	theory := r.gap*r.thick + r.thick*r.thick*math.Tan(angle/2*math.Pi/180)
	return kgPerM / (theory * steelDensity / 1e6)
}

// deposit is the row's factor in a position at an included angle.
func (r vRow) deposit(pos Position, angle float64) float64 {
	switch pos {
	case PC:
		return r.shrink(r.pc, 60)
	case PF, PG, PH, PJ, HL045:
		return r.shrink(r.pf, 70)
	case PE, PD:
		return r.shrink(r.over, 80)
	}
	if angle < 55 {
		return r.shrink(r.flat50, 50)
	}
	return r.shrink(r.flat60, 60)
}

// depositFactor is deposited over drawn metal of a butt. A single V of the table's preparation
// (no root face, its gap and angle, flush) has the table's, straight between its rows and flat
// beyond; other grooves have 1 flat and 1.05 elsewhere, which the table's rows lie near.
func (j shape) depositFactor(pos Position) origin.Figure {
	const name = "position factor on metal"
	gap, _, _ := j.usualGap()
	angle, _, _ := usualAngle(SingleV, pos)
	same := math.Abs(j.Angle-angle) < 0.01 || angle == 60 && pos != PC && math.Abs(j.Angle-50) < 0.01
	switch {
	case j.Type == SingleV && same && j.RootGap == gap && j.RootFace == 0 && j.Gap == 0 && j.Cap == 0 && j.PartialDepth == j.Thickness && !j.Backing:
		f := origin.Published(name, vFactor(pos, j.Thickness, j.Angle), "", vSource)
		if first, last := vTable[0].thick, vTable[len(vTable)-1].thick; j.Thickness < first || j.Thickness > last {
			f = origin.House(name, f.Value, "", fmt.Sprintf("as at the end of the V table, which holds %.0f to %.0f mm", first, last))
		}
		return f
	case pos != PA && pos != PB:
		return origin.House(name, 1.05, "", "as the V table has it near, out of the flat position")
	}
	return origin.House(name, 1, "", "drawn metal")
}

func vFactor(pos Position, thick, angle float64) float64 {
	i := sort.Search(len(vTable), func(i int) bool { return vTable[i].thick >= thick })
	switch {
	case i == 0:
		return vTable[0].deposit(pos, angle)
	case i == len(vTable):
		return vTable[i-1].deposit(pos, angle)
	}
	a, b := vTable[i-1], vTable[i]
	w := (thick - a.thick) / (b.thick - a.thick)
	return a.deposit(pos, angle)*(1-w) + b.deposit(pos, angle)*w
}

// backRun is the metal of the root or backing run that follows gouging, kilograms a metre, from
// the same table; thinner plate than it covers takes its smallest run.
func backRun(pos Position, thick float64) origin.Figure {
	v := 0.10
	switch {
	case pos == PE || pos == PD:
	case thick > 12, pos != PA && pos != PB && thick > 8:
		v = 0.15
	}
	return origin.Published("backing run", v, "kg/m", vSource)
}
