package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// Push is people moving a load on wheels.
type Push struct {
	Men, Women int     // who pushes; both 0 is one man
	Own        float64 // kg of the trolley
	Rated      float64 // kg, the trolley's own rating; 0 is not known
	Uneven     bool    // soft or uneven ground, small or worn wheels
	Rise       float64 // ramp: rise over length along the ground, 1 in 12 is 1/12; 0 is level
	Distance   float64 // mm
}

const pushGuide = "HSE push and pull assessment guidance; INDG143"

// Trolley judges pushing or pulling a load on wheels against the HSE guideline forces: 20 kgf for
// a man and 15 kgf for a woman to start or stop, 10 and 7 to keep moving.
//
//	F = W (sin a + c cos a), a the slope, c the rolling share of the weight
//
// Errors: numbers out of range.
func Trolley(l Load, p Push) (Result, error) {
	if err := l.valid(); err != nil {
		return Result{}, err
	}
	if err := checkAll(check{"the men", float64(p.Men), 0, 50, "people"}, check{"the women", float64(p.Women), 0, 50, "people"},
		check{"the trolley's own mass", p.Own, 0, maxMass, "kg"}, check{"the trolley's rating", p.Rated, 0, maxMass, "kg"},
		check{"the ramp's rise over its length", p.Rise, 0, 1, ""}, check{"the distance", p.Distance, 0, maxLength, "mm"}); err != nil {
		return Result{}, err
	}
	heavy := l.Heavy()
	start, keep := p.limits()
	list := []judge{
		{"push to start or stop", p.force(heavy, p.rolling(true)), start},
		{"push to keep it moving", p.force(heavy, p.rolling(false)), keep},
	}
	if p.Rated > 0 {
		list = append(list, judge{"the trolley", heavy, given("the trolley's rating", p.Rated, "kg")})
	}
	r := worst(list...)
	if p.Distance > 20000 {
		r.Warnings = append(r.Warnings, "rest every 20 m: the push figures hold for about that far")
	}
	if p.Rise > 0 {
		r.Warnings = append(r.Warnings, "ramp: hold it back going down as hard as going up, and chock it when it stands")
	}
	if p.Rated == 0 {
		r.Warnings = append(r.Warnings, "the trolley's own rating is not stated")
	}
	if !r.OK {
		r.Nearest = p.nearest(heavy)
	}
	return r, nil
}

func (p Push) people() (men, women float64) {
	if p.Men == 0 && p.Women == 0 {
		return 1, 0
	}
	return float64(p.Men), float64(p.Women)
}

// limits gives kgf to start and to keep moving for all who push, with the lifting team's factor.
func (p Push) limits() (start, keep origin.Figure) {
	men, women := p.people()
	share := origin.Figure{Name: "alone", Value: 1, Origin: origin.Origin{Kind: origin.Formula, Source: "one person"}}
	switch n := men + women; {
	case n == 2:
		share = origin.House("two people", 2.0/3, "", "the lifting team's factor of "+teamGuide+", used for pushing")
	case n >= 3:
		share = origin.House("three people or more", 0.5, "", "the lifting team's factor of "+teamGuide+", used for pushing")
	}
	if men+women > 3 { // more than three get into each other's way
		men = math.Min(men, 3)
		women = math.Min(women, 3-men)
	}
	sum := func(name string, man, woman float64) origin.Figure {
		from := []origin.Figure{origin.Published("a man", man, "kgf", pushGuide), origin.Published("a woman", woman, "kgf", pushGuide), share}
		return origin.Worked(name, (men*man+women*woman)*share.Value, "kgf", "guideline force x people x team factor", from...)
	}
	return sum("guideline to start or stop", 20, 15), sum("guideline to keep moving", 10, 7)
}

// rolling gives the share of the weight that it takes to roll on the level.
func (p Push) rolling(start bool) origin.Figure {
	switch {
	case !p.Uneven:
		return origin.Published("rolling share, good wheels on a hard level floor", 0.02, "", pushGuide)
	case start:
		return origin.Published("rolling share, uneven ground", 0.10, "", pushGuide)
	}
	return origin.House("rolling share once moving, uneven ground", 0.05, "", "half of that to start")
}

// force gives the push, kgf.
func (p Push) force(heavy, rolling origin.Figure) origin.Figure {
	a := math.Atan(p.Rise)
	w := heavy.Value + p.Own
	from := []origin.Figure{heavy, rolling}
	if p.Own > 0 {
		from = append(from, given("mass of the trolley", p.Own, "kg"))
	}
	if p.Rise > 0 {
		from = append(from, given("rise over length of the ramp", p.Rise, ""))
	}
	return origin.Worked("push", w*(math.Sin(a)+rolling.Value*math.Cos(a)), "kgf", "weight x (sin slope + rolling share x cos slope)", from...)
}

// nearest names what would do: more people up to three, else a winch or more wheels.
func (p Push) nearest(heavy origin.Figure) string {
	men, women := p.people()
	if p.Rated > 0 && heavy.Value > p.Rated {
		return fmt.Sprintf("a trolley rated %.0f kg", math.Ceil(heavy.Value))
	}
	for n := int(men+women) + 1; n <= 3; n++ {
		more := p
		more.Men, more.Women = n-int(women), int(women)
		start, keep := more.limits()
		if more.force(heavy, more.rolling(true)).Value <= start.Value && more.force(heavy, more.rolling(false)).Value <= keep.Value {
			return fmt.Sprintf("%d people", n)
		}
	}
	pull := math.Max(p.force(heavy, p.rolling(true)).Value, p.force(heavy, p.rolling(false)).Value)
	return fmt.Sprintf("a winch or lever hoist of at least %.0f kgf, or a hard level way", math.Ceil(pull))
}
