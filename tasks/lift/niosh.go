package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// Coupling is how well the hands hold the load.
type Coupling uint8

// The couplings of the revised NIOSH equation.
const (
	GoodGrip Coupling = iota
	FairGrip
	PoorGrip
)

// NIOSHLift is one end of a two-handed lift as the revised NIOSH lifting equation sees it.
type NIOSHLift struct {
	Out       float64 // mm from between the ankles to the hands (H)
	Up        float64 // mm from the floor to the hands (V)
	Travel    float64 // mm up or down (D)
	Turn      float64 // degrees to the side (A)
	PerMinute float64 // lifts a minute (F)
	Hours     float64 // hours at it, up to 8 (with the rests that the manual asks); 0 is 1
	Grip      Coupling
}

// NIOSHResult is a Result with its lifting index.
type NIOSHResult struct {
	Result
	Index float64 // load over recommended weight limit; 0 where the limit is 0
}

const nioshManual = "NIOSH 94-110, Applications Manual for the Revised NIOSH Lifting Equation, 1994, revised September 2021"

// frequency is the frequency multiplier by lifts a minute: up to 1 h, 2 h and 8 h, each with the
// hands below 750 mm and at or above it.
var frequency = []struct {
	rate float64
	m    [6]float64
}{
	{0.2, [6]float64{1, 1, .95, .95, .85, .85}}, {0.5, [6]float64{.97, .97, .92, .92, .81, .81}}, {1, [6]float64{.94, .94, .88, .88, .75, .75}},
	{2, [6]float64{.91, .91, .84, .84, .65, .65}}, {3, [6]float64{.88, .88, .79, .79, .55, .55}}, {4, [6]float64{.84, .84, .72, .72, .45, .45}},
	{5, [6]float64{.80, .80, .60, .60, .35, .35}}, {6, [6]float64{.75, .75, .50, .50, .27, .27}}, {7, [6]float64{.70, .70, .42, .42, .22, .22}},
	{8, [6]float64{.60, .60, .35, .35, .18, .18}}, {9, [6]float64{.52, .52, .30, .30, 0, .15}}, {10, [6]float64{.45, .45, .26, .26, 0, .13}},
	{11, [6]float64{.41, .41, 0, .23, 0, 0}}, {12, [6]float64{.37, .37, 0, .21, 0, 0}}, {13, [6]float64{0, .34, 0, 0, 0, 0}},
	{14, [6]float64{0, .31, 0, 0, 0, 0}}, {15, [6]float64{0, .28, 0, 0, 0, 0}},
}

// NIOSH judges a two-handed lift by one person by the revised NIOSH equation, origin and
// destination; the end with the lower limit counts.
//
//	RWL = 23 kg x HM x VM x DM x AM x FM x CM, each at most 1
//
// Special cases are:
//
//	H above 630, V or D above 1750 mm, A above 135 degrees, F past the table: RWL is 0
//	a pace between two rows of the table takes the faster row
//
// The equation does not hold for one hand, pushing, carrying, kneeling or cramped places.
//
// Errors: no end of the lift, numbers out of range, more than 8 hours.
func NIOSH(l Load, ends ...NIOSHLift) (NIOSHResult, error) {
	if err := l.valid(); err != nil {
		return NIOSHResult{}, err
	}
	if len(ends) == 0 {
		return NIOSHResult{}, fault("give where the lift begins, and where it ends if control is needed there", "the lift has no end to judge")
	}
	var low origin.Figure
	for i, e := range ends {
		rwl, err := e.limit()
		if err != nil {
			return NIOSHResult{}, err
		}
		if i == 0 || rwl.Value < low.Value {
			low = rwl
		}
	}
	out := NIOSHResult{Result: worst(judge{"lift by hand", l.Heavy(), low})}
	if low.Value > 0 {
		out.Index = out.Need / low.Value
		out.Reason += fmt.Sprintf(", lifting index %.2f", out.Index)
	}
	out.Warnings = []string{"holds for two hands, standing, room to move and a sure floor; not for carrying, pushing, kneeling or one hand"}
	if !out.OK {
		weak, v := "", 1.0
		for _, f := range low.From[1:] {
			if f.Value < v {
				weak, v = f.Name, f.Value
			}
		}
		out.Nearest = "lighter pieces or gear"
		if weak != "" {
			out.Nearest = fmt.Sprintf("improve %s first (multiplier %.2f); else lighter pieces or gear", weak, v)
		}
	}
	return out, nil
}

// limit gives the recommended weight limit of one end, kg.
func (e NIOSHLift) limit() (origin.Figure, error) {
	if err := checkAll(check{"the reach", e.Out, 0, 5000, "mm"}, check{"the height of the hands", e.Up, 0, 5000, "mm"},
		check{"the travel", e.Travel, 0, 5000, "mm"}, check{"the turn", e.Turn, 0, 180, "degrees"},
		check{"the lifts a minute", e.PerMinute, 0, 100, ""}, check{"the hours", e.Hours, 0, 8, "h"}); err != nil {
		return origin.Figure{}, err
	}
	if e.Grip > PoorGrip {
		return origin.Figure{}, fault("grips are good, fair and poor", "the grip is not a known one")
	}
	pub := func(name string, v float64) origin.Figure { return origin.Published(name, v, "", nioshManual) }
	rec := func(name string, v float64) origin.Figure { return origin.Recalled(name, v, "", nioshManual) }
	from := []origin.Figure{origin.Published("load constant", 23, "kg", nioshManual),
		pub("the reach", horizontal(e.Out/10)), pub("the height of the hands", vertical(e.Up/10)), pub("the travel", distanceFactor(e.Travel/10)),
		rec("the turn", asymmetry(e.Turn)), pub("the pace", e.pace()), rec("the grip", e.grip())}
	if e.PerMinute > 10 { // the rows past 10 a minute are recalled
		from[5] = rec("the pace", e.pace())
	}
	v := 1.0
	for _, f := range from {
		v *= f.Value
	}
	return origin.Worked("recommended weight limit", v, "kg", "23 kg x HM x VM x DM x AM x FM x CM", from...), nil
}

// horizontal, vertical, distanceFactor (cm) and asymmetry (degrees) are HM, VM, DM and AM.
func horizontal(h float64) float64 {
	switch {
	case h <= 25:
		return 1
	case h > 63:
		return 0
	}
	return 25 / h
}

func vertical(v float64) float64 {
	if v > 175 {
		return 0
	}
	return 1 - 0.003*math.Abs(v-75)
}

func distanceFactor(d float64) float64 {
	switch {
	case d <= 25:
		return 1
	case d > 175:
		return 0
	}
	return 0.82 + 4.5/d
}

func asymmetry(a float64) float64 {
	if a > 135 {
		return 0
	}
	return 1 - 0.0032*a
}

// pace gives FM.
func (e NIOSHLift) pace() float64 {
	col := 0
	switch {
	case e.Hours > 2:
		col = 4
	case e.Hours > 1:
		col = 2
	}
	if e.Up >= 750 {
		col++
	}
	for _, r := range frequency {
		if e.PerMinute <= r.rate {
			return r.m[col]
		}
	}
	return 0
}

// grip gives CM.
func (e NIOSHLift) grip() float64 {
	switch {
	case e.Grip == PoorGrip:
		return 0.90
	case e.Grip == FairGrip && e.Up < 750:
		return 0.95
	}
	return 1
}
