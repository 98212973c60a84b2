package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// Zone is the height that the hands are at, in the boxes of the HSE guideline.
type Zone uint8

// The zones, from the top.
const (
	Shoulder Zone = iota // shoulder height and above
	Elbow                // elbow to shoulder
	Knuckle              // knuckle to elbow
	LowerLeg             // middle of the lower leg to knuckle
	Floor                // below the middle of the lower leg
)

// Reach is one box that the hands pass through.
type Reach struct {
	Zone Zone
	Far  bool // arm's length, not close to the body
}

// hseBoxes are kg by zone: men close, men far, women close, women far.
var hseBoxes = [5][4]float64{{10, 5, 7, 3}, {20, 10, 13, 7}, {25, 15, 16, 10}, {20, 10, 13, 7}, {10, 5, 7, 3}}

var zoneNames = [...]string{"shoulder", "elbow to shoulder", "knuckle to elbow", "lower leg to knuckle", "floor"}

// ZoneNames lists the zones from the top, in the words that ParseZone takes.
func ZoneNames() []string { return zoneNames[:] }

// ParseZone reads the name of a zone.
func ParseZone(name string) (Zone, bool) {
	for i, n := range zoneNames {
		if n == name {
			return Zone(i), true
		}
	}
	return 0, false
}

// Handling is people lifting by hand.
type Handling struct {
	Men, Women int     // who lifts; both 0 is one man
	Through    []Reach // every box the hands pass through; none is from the floor to the knuckles, close
	PerHour    float64 // lifts an hour; 0 is up to 30
	Twist      float64 // degrees, 0 to 180
	Carry      float64 // mm without a rest
	Slope      bool    // on steps or a slope
}

const (
	hseGuide  = "HSE L23 and INDG143, lifting and lowering boxes"
	hseRules  = "HSE L23, frequency and twisting"
	teamGuide = "HSE L23 paragraph 120"
)

func (h Handling) people() (men, women int) {
	if h.Men == 0 && h.Women == 0 {
		return 1, 0
	}
	return h.Men, h.Women
}

// Hands judges a lift by hand against the HSE guideline figures and team rule: the smallest box
// that the hands pass through, less for pace and twisting; two people do two thirds of their sum,
// three a half. The figures are filters, not limits: what exceeds them needs a closer look or gear.
//
// Special cases are:
//
//	four people count as three, and more than four are refused: no factor is published
//
// Errors: numbers out of range, an unknown zone.
func Hands(l Load, h Handling) (Result, error) {
	if err := l.valid(); err != nil {
		return Result{}, err
	}
	if err := checkAll(check{"the men", float64(h.Men), 0, 50, "people"}, check{"the women", float64(h.Women), 0, 50, "people"},
		check{"the lifts an hour", h.PerHour, 0, 3600, ""}, check{"the twist", h.Twist, 0, 180, "degrees"},
		check{"the carry", h.Carry, 0, maxLength, "mm"}); err != nil {
		return Result{}, err
	}
	man, woman, err := h.one()
	if err != nil {
		return Result{}, err
	}
	men, women := h.people()
	have := team(men, women, man, woman)
	r := worst(judge{"lift by hand", l.Heavy(), have})
	if n := men + women; n > 4 {
		r.OK = false
		r.Reason = fmt.Sprintf("%d people: a team of more than four is unlikely to work (%s)", n, teamGuide)
	}
	if men+women == 4 {
		r.Warnings = append(r.Warnings, "four people: no factor is published, so they are counted as three")
	}
	if h.Carry > 10000 {
		r.Warnings = append(r.Warnings, "set it down every 10 m: the figures hold for a carry of up to about 10 m against the body")
	}
	if h.Slope && men+women > 1 {
		r.Warnings = append(r.Warnings, "on steps or a slope most of the weight may fall on those below")
	}
	if !r.OK {
		r.Nearest = "a hoist or trolley rated " + origin.Trim(nextRating(chainRatings, l.Hook().Value)) + " kg"
		for n := men + women + 1; n <= 3; n++ {
			if t := team(men+n-(men+women), women, man, woman); t.Value >= r.Need {
				r.Nearest = fmt.Sprintf("%d people, or %s", n, r.Nearest)
				break
			}
		}
	}
	return r, nil
}

// one gives what a man and a woman may lift alone under h, kg.
func (h Handling) one() (man, woman origin.Figure, err error) {
	through := h.Through
	if len(through) == 0 {
		through = []Reach{{Zone: Floor}, {Zone: LowerLeg}}
	}
	least := [2]float64{math.Inf(1), math.Inf(1)}
	where := [2]string{}
	for _, r := range through {
		if r.Zone > Floor {
			return man, woman, fault("zones are shoulder, elbow, knuckle, lower leg and floor", "a zone of the hands is not a known one")
		}
		far, name := 0, zoneNames[r.Zone]+", close"
		if r.Far {
			far, name = 1, zoneNames[r.Zone]+", at arm's length"
		}
		for who := range 2 {
			if v := hseBoxes[r.Zone][2*who+far]; v < least[who] {
				least[who], where[who] = v, name
			}
		}
	}
	pace, twist := h.pace(), h.twist()
	make := func(name string, i int) origin.Figure {
		box := origin.Recalled(name+", "+where[i], least[i], "kg", hseGuide)
		return origin.Worked("what "+name+" may lift", least[i]*pace.Value*twist.Value, "kg", "smallest box x pace x twist", box, pace, twist)
	}
	return make("a man", 0), make("a woman", 1), nil
}

// pace gives what remains at a pace of lifts. Between the bands as published, the harsher counts.
func (h Handling) pace() origin.Figure {
	switch f := h.PerHour; {
	case f <= 30:
		return origin.Published("pace", 1, "", hseRules)
	case f <= 120:
		return origin.Published("pace", 0.7, "", hseRules)
	case f <= 480:
		return origin.Published("pace", 0.5, "", hseRules)
	}
	return origin.Published("pace", 0.2, "", hseRules)
}

// twist gives what remains when the trunk twists.
func (h Handling) twist() origin.Figure {
	switch {
	case h.Twist > 90:
		return origin.Published("twist", 0.8, "", hseRules)
	case h.Twist > 45:
		return origin.Published("twist", 0.9, "", hseRules)
	}
	return origin.Published("twist", 1, "", hseRules)
}

// team gives what a team may lift, kg. A fourth person adds nothing.
func team(men, women int, man, woman origin.Figure) origin.Figure {
	n := men + women
	if n > 3 { // the three strongest
		men = min(men, 3)
		women = min(women, 3-men)
	}
	total := float64(men)*man.Value + float64(women)*woman.Value
	factor := origin.Published("alone", 1, "", teamGuide)
	switch {
	case n == 2:
		factor = origin.Published("two people", 2.0/3, "", teamGuide)
	case n >= 3:
		factor = origin.Published("three people", 0.5, "", teamGuide)
	}
	from := []origin.Figure{factor}
	if men > 0 {
		from = append(from, man)
	}
	if women > 0 {
		from = append(from, woman)
	}
	return origin.Worked(fmt.Sprintf("guideline for %d", n), total*factor.Value, "kg", "sum of what each may lift x team factor", from...)
}
