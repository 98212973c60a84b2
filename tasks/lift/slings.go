package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// Hitch is how a sling holds the load.
type Hitch uint8

// The hitches.
const (
	Straight Hitch = iota
	Choked
	Basket  // both ends on the hook
	Endless // an endless sling, choked
)

// Datum is the line that a sling's angle is measured from.
type Datum uint8

// The datums. An angle without one is refused: 30 degrees is steep from one, flat from the other.
const (
	NoDatum Datum = iota
	FromVertical
	FromHorizontal
)

// Rig is one set of slings to one hook. Its shape is given by one of: Angle with Datum; LegLength
// with Rise; Lugs with Rise. Zero ratings are not known, and asked for.
type Rig struct {
	Table string  // "EN 818-4 grade 8", "US grade 80 chain", ...; empty: only WLL is known
	Size  float64 // mm of chain or rope, t of webbing
	WLL   float64 // kg, one leg straight, as on its tag; with a Table the lower counts
	Legs  int     // 1 to 4; 0 is the number of Lugs, or 1
	Hitch Hitch

	Angle     float64 // degrees, 0 to 90
	Datum     Datum
	LegLength float64      // mm
	Rise      float64      // mm of the hook above the (highest) lug
	Lugs      [][3]float64 // mm, in the axes of the load; the hook hangs over its centre of gravity

	Equalised  bool    // four legs made to share, by a beam or an equaliser
	ChokeAngle float64 // degrees in the bight; 0 is the natural 135
	Edge       float64 // bend radius over chain or rope diameter; 0 is no edge
	Heat       float64 // C of what it touches; 0 is not hot
	LugWLL     float64 // kg along the leg, as the lug's designer states it
	Coupling   float64 // kg, the smallest shackle, hook or ring in a leg
}

// MaxSling is the greatest angle from the vertical at which a sling is used (EN 818-4, and OSHA's
// 30 degrees from the horizontal).
const MaxSling = 60

// SlingResult is a Result with what each leg carries.
type SlingResult struct {
	Result
	Legs []Leg
	Rule string // mode factor or rating used, in words
}

// Slings judges a load on a set of slings: the pull in each leg against the leg, its coupling and
// the lug, and the whole against the lower of the table and the mode factor.
//
// Special cases are:
//
//	past 60 degrees from the vertical is refused, whatever the rating
//	four legs on a rigid load count as two unless Equalised
//	a centre of gravity outside the lugs, or above two of them, is refused
//
// Errors: an angle without its datum, an unknown table or size, no rating at all, numbers out of range.
func Slings(l Load, r Rig) (SlingResult, error) {
	if err := r.valid(l); err != nil {
		return SlingResult{}, err
	}
	table, err := findTable(r.Table)
	if err != nil {
		return SlingResult{}, err
	}
	var row slingRow
	if len(table.rows) > 0 {
		if row, err = table.row(r.Size); err != nil {
			return SlingResult{}, err
		}
	}
	w := l.Hook()
	legs, refused, warnings, err := r.shape(l, w)
	if err != nil {
		return SlingResult{}, err
	}
	if refused != nil {
		return SlingResult{Result: *refused, Legs: legs}, nil
	}
	out, err := r.judge(w, legs, table, row)
	if err != nil {
		return SlingResult{}, err
	}
	out.Warnings = append(warnings, r.warn(legs, table)...)
	if !out.OK {
		out.Nearest = r.nearest(w, legs, table, out.Need/math.Max(out.Have, tiny))
	}
	return out, nil
}

func (r Rig) legs() int {
	switch {
	case r.Legs > 0:
		return r.Legs
	case len(r.Lugs) > 0:
		return len(r.Lugs)
	}
	return 1
}

func (r Rig) valid(l Load) error {
	if err := l.valid(); err != nil {
		return err
	}
	list := []check{
		{"the number of legs", float64(r.Legs), 0, 4, "legs"}, {"the sling's angle", r.Angle, 0, 90, "degrees"},
		{"the WLL", r.WLL, 0, maxMass, "kg"}, {"the sling's size", r.Size, 0, 200, "mm"}, {"the leg length", r.LegLength, 0, maxLength, "mm"},
		{"the hook's height above the lugs", r.Rise, 0, maxLength, "mm"}, {"the choke angle", r.ChokeAngle, 0, 180, "degrees"},
		{"the edge radius over the diameter", r.Edge, 0, 1000, ""}, {"the temperature", r.Heat, -50, 1000, "C"},
		{"the lug's WLL", r.LugWLL, 0, maxMass, "kg"}, {"the coupling's WLL", r.Coupling, 0, maxMass, "kg"},
	}
	for _, lug := range r.Lugs {
		for _, v := range lug {
			list = append(list, check{"the lug's place", v, -maxLength, maxLength, "mm"})
		}
	}
	if err := checkAll(list...); err != nil {
		return err
	}
	if r.Hitch > Endless || r.Datum > FromHorizontal {
		return fault("say straight, choked, basket or endless, and vertical or horizontal", "the hitch or the datum is not a known one")
	}
	if len(r.Lugs) > 4 || r.Legs > 0 && len(r.Lugs) > 0 && r.Legs != len(r.Lugs) {
		return fault("give one lug for each leg, at most four", "%d legs but %d lugs", r.Legs, len(r.Lugs))
	}
	if r.Hitch == Endless && r.legs() != 1 {
		return fault("give endless slings one by one, each with its share", "an endless choked sling is judged alone, not as %d legs", r.legs())
	}
	return nil
}

// shape finds the legs, or refuses the rig for its shape.
func (r Rig) shape(l Load, w origin.Figure) (legs []Leg, refused *Result, warnings []string, err error) {
	n := r.legs()
	if len(r.Lugs) > 0 {
		return r.fromLugs(l, w)
	}
	angle, length := 0.0, r.LegLength
	switch {
	case r.Angle != 0 || r.Datum != NoDatum:
		if r.Datum == NoDatum {
			return nil, nil, nil, fault("say whether it is from the vertical or from the horizontal", "a sling angle of %s degrees has no datum", origin.Trim(r.Angle))
		}
		angle = r.Angle
		if r.Datum == FromHorizontal {
			angle = 90 - r.Angle
		}
	case r.LegLength > 0 && r.Rise > 0:
		if r.Rise > r.LegLength*(1+1e-9) {
			return nil, nil, nil, fault("measure both again", "the hook is %s mm above the lugs, more than the leg's %s mm", origin.Trim(r.Rise), origin.Trim(r.LegLength))
		}
		angle = math.Acos(math.Min(1, r.Rise/r.LegLength)) * 180 / math.Pi
	case n > 1 || r.Hitch == Basket:
		return nil, nil, nil, fault("give the angle with its datum, or leg length and the hook's height, or the lugs", "the shape of %d sling legs is not known", n)
	}
	if angle > MaxSling+1e-9 {
		return nil, tooFlat(angle, length), nil, nil
	}
	if n > 1 {
		warnings = append(warnings, "legs taken as equal with the centre of gravity in their middle: give the lugs if not")
	}
	return even(w.Value, n, angle, length, r.Equalised), nil, warnings, nil
}

// tooFlat refuses an angle past the limit.
func tooFlat(angle, length float64) *Result {
	limit := origin.Published("greatest angle from the vertical", MaxSling, "deg", "EN 818-4; OSHA Guidance on Safe Sling Use (30 degrees from the horizontal)")
	need := origin.Worked("sling angle from the vertical", angle, "deg", "90 - angle from the horizontal, or acos(rise / leg)")
	res := worst(judge{"the slings lie too flat", need, limit})
	res.Nearest = "longer slings or a spreader beam, so that no leg is more than 45 degrees from the vertical"
	if length > 0 && angle < 90 {
		res.Nearest = fmt.Sprintf("legs of at least %.0f mm (45 degrees) in place of %.0f mm, or a spreader beam",
			math.Ceil(length*math.Sin(angle*math.Pi/180)*math.Sqrt2), length)
	}
	return &res
}
