package lift

import (
	"fmt"
	"math"
	"sort"
	"strings"

	"sailby/tasks/origin"
)

// ChartRow is one radius of a crane's chart.
type ChartRow struct {
	Radius float64 // mm
	Mass   float64 // kg
}

// Piece is something between hook and load, or in a vehicle, with its mass in kg.
type Piece struct {
	Name string
	Mass float64
}

// CraneLift is a loader or mobile crane as it stands for one lift. Zero heights and clearances
// are not known, and asked for.
type CraneLift struct {
	Chart     []ChartRow // in any order
	Radius    float64    // mm, the greatest on the way
	Deduct    []Piece    // hook block, slings, shackles, beam
	Moving    bool       // it travels with the load
	HookAt    float64    // mm above ground that the hook reaches at that radius
	Raise     float64    // mm that the load's lifting point must reach above ground
	Rigging   float64    // mm of slings between lifting point and hook
	BoomClear float64    // mm between boom and load as measured or drawn
	Pad       float64    // m2 under one outrigger
	PadLoad   float64    // kg on the heaviest outrigger
	Ground    float64    // kN/m2 that the ground may carry
}

// Crane judges a load on a crane by its chart: the row of the next longer radius, never a figure
// between two rows, less block, slings, shackles and beam.
//
// Errors: no chart, a chart that rises with the radius, numbers out of range.
func Crane(l Load, c CraneLift) (Result, error) {
	if err := l.valid(); err != nil {
		return Result{}, err
	}
	rows, err := c.rows()
	if err != nil {
		return Result{}, err
	}
	need, err := c.onHook(l)
	if err != nil {
		return Result{}, err
	}
	last := rows[len(rows)-1]
	if c.Radius > last.Radius+1e-6 {
		r := worst(judge{"out of reach", given("radius", c.Radius, "mm"), given("longest radius of the chart", last.Radius, "mm")})
		r.Nearest = fmt.Sprintf("the crane %.0f mm nearer, or one that reaches %.0f mm with %.0f kg", math.Ceil(c.Radius-last.Radius), c.Radius, math.Ceil(need.Value))
		r.Warnings = c.ask()
		return r, nil
	}
	at := sort.Search(len(rows), func(i int) bool { return rows[i].Radius >= c.Radius-1e-6 })
	have := origin.Worked(fmt.Sprintf("chart at %s m", num(rows[at].Radius/1000)), rows[at].Mass, "kg", "row of the next longer radius, no interpolation",
		given("radius", c.Radius, "mm"), given("chart row", rows[at].Radius, "mm"))
	list := []judge{{"the crane", need, have}}
	if c.HookAt > 0 && c.Raise > 0 {
		list = append(list, judge{"hook height", origin.Worked("height that it takes", c.Raise+c.Rigging, "mm", "lifting point + slings",
			given("lifting point", c.Raise, "mm"), given("slings", c.Rigging, "mm")), given("hook height at that radius", c.HookAt, "mm")})
	}
	if c.Pad > 0 && c.PadLoad > 0 && c.Ground > 0 {
		list = append(list, judge{"the ground under an outrigger", origin.Worked("pressure", c.PadLoad*Gravity/1000/c.Pad, "kN/m2", "load x 9.81 / area",
			given("outrigger load", c.PadLoad, "kg"), given("pad", c.Pad, "m2")), given("the ground may carry", c.Ground, "kN/m2")})
	}
	r := worst(list...)
	r.Warnings = c.ask()
	if !r.OK {
		r.Nearest = c.nearest(rows, need, r)
	}
	return r, nil
}

// rows gives the chart by radius, checked.
func (c CraneLift) rows() ([]ChartRow, error) {
	if len(c.Chart) == 0 {
		return nil, fault("copy the chart of the crane as it will stand, for instance 4 m: 2.4 t, 6 m: 1.5 t", "the crane has no chart")
	}
	if err := checkAll(check{"the radius", c.Radius, tiny, 1e6, "mm"}, check{"the hook height", c.HookAt, 0, 1e6, "mm"},
		check{"the lifting point's height", c.Raise, 0, 1e6, "mm"}, check{"the slings' height", c.Rigging, 0, 1e6, "mm"},
		check{"the boom's clearance", c.BoomClear, 0, 1e6, "mm"}, optional("the pad", c.Pad, 1e-4, 1000, "m2"),
		check{"the outrigger load", c.PadLoad, 0, maxMass, "kg"}, optional("what the ground may carry", c.Ground, 0.01, 1e5, "kN/m2")); err != nil {
		return nil, err
	}
	rows := append([]ChartRow(nil), c.Chart...)
	for _, r := range rows {
		if err := checkAll(check{"a radius of the chart", r.Radius, tiny, 1e6, "mm"}, check{"a mass of the chart", r.Mass, 0, maxMass, "kg"}); err != nil {
			return nil, err
		}
	}
	sort.SliceStable(rows, func(i, k int) bool { return rows[i].Radius < rows[k].Radius })
	for i := 1; i < len(rows); i++ {
		if rows[i].Radius == rows[i-1].Radius || rows[i].Mass > rows[i-1].Mass {
			return nil, fault("copy the chart again: further out a crane lifts less", "the chart gives %s kg at %s m and %s kg at %s m",
				origin.Trim(rows[i-1].Mass), num(rows[i-1].Radius/1000), origin.Trim(rows[i].Mass), num(rows[i].Radius/1000))
		}
	}
	return rows, nil
}

// onHook gives what hangs on the crane, kg.
func (c CraneLift) onHook(l Load) (origin.Figure, error) {
	hook := l.Hook()
	from := []origin.Figure{hook}
	v := hook.Value
	if c.Moving && l.Dynamic == 0 {
		f := origin.Published("crane moving with the load", 1.15, "", "Guidelines for Lifting Operations, Rev 5, up to 100 t")
		heavy := l.Heavy()
		v = heavy.Value * f.Value
		from = []origin.Figure{heavy, f}
	}
	for _, d := range c.Deduct {
		if err := ranged("the mass of "+d.Name, d.Mass, 0, maxMass, "kg"); err != nil {
			return origin.Figure{}, err
		}
		v += d.Mass
		from = append(from, given(d.Name, d.Mass, "kg"))
	}
	return origin.Worked("load with block and tackle", v, "kg", "load + what hangs with it", from...), nil
}

// ask lists what the chart alone does not settle.
func (c CraneLift) ask() []string {
	var out []string
	if c.HookAt == 0 || c.Raise == 0 {
		out = append(out, "ask: does the hook reach high enough at that radius?")
	}
	if c.BoomClear == 0 {
		out = append(out, "ask: what clears between boom and load, and overhead lines?")
	}
	if c.Ground == 0 || c.Pad == 0 || c.PadLoad == 0 {
		out = append(out, "ask: does the ground carry the outriggers, and on which pads?")
	}
	if len(c.Deduct) == 0 {
		out = append(out, "hook block, slings, shackles and beam are not deducted: name them")
	}
	return out
}

// nearest names what would do, for everything that fails.
func (c CraneLift) nearest(rows []ChartRow, need origin.Figure, r Result) string {
	failed := []Held{{OK: r.OK, Figure: r.Figure, Limit: r.Limit}}
	var out []string
	for _, f := range append(failed, r.Others...) {
		if !f.OK {
			out = append(out, c.way(rows, need, f))
		}
	}
	return strings.Join(out, "; and ")
}

// way names what would do for one number that fails.
func (c CraneLift) way(rows []ChartRow, need origin.Figure, f Held) string {
	switch f.Figure.Unit {
	case "mm":
		return fmt.Sprintf("slings %.0f mm shorter, a shorter radius or a longer boom", math.Ceil(f.Figure.Value-f.Limit.Value))
	case "kN/m2":
		return fmt.Sprintf("pads of %.2f m2", math.Ceil(c.PadLoad*Gravity/10/c.Ground)/100)
	}
	for i := len(rows) - 1; i >= 0; i-- {
		if rows[i].Mass >= need.Value {
			return fmt.Sprintf("the crane nearer: within %s m it lifts %.0f kg", num(rows[i].Radius/1000), rows[i].Mass)
		}
	}
	return fmt.Sprintf("a crane for %.0f kg at %s m", math.Ceil(need.Value), num(c.Radius/1000))
}
