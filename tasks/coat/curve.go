package coat

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// Point is what a paint's own sheet says for one steel temperature.
type Point struct {
	Celsius float64 // steel temperature, -40 to 120
	Min     float64 // minutes, above 0 and at most two years
	Max     float64 // minutes, not below Min; 0 is none
}

// Curve is a paint's own points for one time, by steel temperature, in any order. An empty curve
// is a time that the paint does not state.
type Curve []Point

// The rules outside a paint's own points.
const (
	perTenKelvin = 2.0          // outside the points times change by this factor for each 10 K
	coldReach    = 10.0         // K below the coldest point, beyond which there is no cure at all
	leastApart   = 0.5          // K between two points, so that a slope has meaning
	longestTime  = 2 * 525600.0 // minutes: two years, more than any recoat or launch limit (18 months)
	lowCelsius   = -40.0
	highCelsius  = 120.0
	far          = 1000.0 // C, beyond every point
)

// side says what may be assumed outside the points, always on the careful side of the use.
type side struct {
	cold, hot float64 // natural log of the least change per kelvin; 0 keeps the end point's time
	steeper   bool    // the slope of the outermost two points is used where it is steeper
	reach     float64 // K below the coldest point up to which the rule holds
	stops     bool    // beyond reach there is no time at all (no cure); otherwise it stays the same
}

var (
	slope  = math.Log(perTenKelvin) / 10
	toWait = side{cold: slope, steeper: true, reach: coldReach, stops: true} // colder is slower, hotter no faster
	toLive = side{hot: slope, steeper: true, reach: math.Inf(1)}             // colder no longer, hotter is shorter
	toPot  = side{cold: slope, hot: slope, steeper: false, reach: coldReach} // the published pot life rule, both ways
)

// Validate reports the first fault of the curve: no points, a value out of range, two points at
// one temperature, a hotter point with a longer time, or a max at some points only.
func (c Curve) Validate() error {
	if len(c) == 0 {
		return fault("give at least one, for instance 20 C: 8 h", "there are no points")
	}
	for i, p := range c {
		if err := within("a point's temperature", p.Celsius, lowCelsius, highCelsius, "C", "give the steel's temperature in C"); err != nil {
			return err
		}
		name := fmt.Sprintf("the time at %s", amount(p.Celsius, "C"))
		if !(p.Min > 0) || p.Min > longestTime {
			return fault("give a time such as 8 h", "%s is %s, must be above 0 min and at most 2 years", name, amount(p.Min, "min"))
		}
		if p.Max != 0 && !(p.Max >= p.Min && p.Max <= longestTime) {
			return fault("the max must leave room for the min, and be at most 2 years",
				"the max at %s is %s, the min %s", amount(p.Celsius, "C"), amount(p.Max, "min"), amount(p.Min, "min"))
		}
		if (p.Max != 0) != (c[0].Max != 0) {
			return fault("give a max at every temperature or at none", "only one of the points at %s and %s has a max",
				amount(c[0].Celsius, "C"), amount(p.Celsius, "C"))
		}
		for _, q := range c[:i] {
			if err := inOrder(p, q); err != nil {
				return err
			}
		}
	}
	return nil
}

// inOrder checks two points of one curve against each other.
func inOrder(p, q Point) error {
	if p.Celsius > q.Celsius {
		p, q = q, p
	}
	if q.Celsius-p.Celsius < leastApart {
		return fault("keep one of the two", "two points stand at %s and %s, closer than %s",
			amount(p.Celsius, "C"), amount(q.Celsius, "C"), amount(leastApart, "K"))
	}
	if q.Min > p.Min {
		return fault("look at the sheet again: warm film is never slower", "%s at %s is longer than %s at %s",
			amount(q.Min, "min"), amount(q.Celsius, "C"), amount(p.Min, "min"), amount(p.Celsius, "C"))
	}
	if q.Max > p.Max {
		return fault("look at the sheet again: a warm film closes sooner", "a max of %s at %s is longer than %s at %s",
			amount(q.Max, "min"), amount(q.Celsius, "C"), amount(p.Max, "min"), amount(p.Celsius, "C"))
	}
	return nil
}

// Maxima gives the max of each point as a curve of its own (its Min), for Recoat.Max; empty
// where the points have none.
func (c Curve) Maxima() Curve {
	var out Curve
	for _, p := range c {
		if p.Max != 0 {
			out = append(out, Point{Celsius: p.Celsius, Min: p.Max})
		}
	}
	return out
}

// Time gives the minutes that the film needs when the steel stays at celsius.
//
// Between points the log of time runs straight against temperature. Special cases are:
//   - above the hottest point the time stays that of the hottest point (no faster credit);
//   - below the coldest point it grows by the steeper of the coldest two points' slope and
//     doubling per 10 K (house judgement), down to 10 K below;
//   - colder than that there is no cure: the error is ErrCold.
//
// The figure tells which of these was used. Errors: those of Validate, ErrCold, celsius not a number.
func (c Curve) Time(celsius float64) (minutes float64, figure origin.Figure, err error) {
	return c.figure("time", celsius, toWait, origin.Origin{Kind: origin.Given, Source: "the paint's own points"})
}

// Life gives the longest time in minutes that a limit allows when the steel stays at celsius: a
// max recoat or a max time to immersion. It interpolates as Time does; above the hottest point
// it shortens (the steeper of the hottest two points' slope and halving per 10 K), below the
// coldest point it gets no longer. Errors as for Time, without ErrCold.
func (c Curve) Life(celsius float64) (minutes float64, figure origin.Figure, err error) {
	return c.figure("longest time", celsius, toLive, origin.Origin{Kind: origin.Given, Source: "the paint's own points"})
}

// Rate gives the share of cure per minute at celsius: one over Time. It is 0 where Time has an
// error, so below the paint's own minimum, for celsius not a number and for a faulty curve.
func (c Curve) Rate(celsius float64) float64 {
	if c.Validate() != nil {
		return 0
	}
	return c.rate(celsius)
}

func (c Curve) rate(celsius float64) float64 {
	if math.IsNaN(celsius) {
		return 0
	}
	return 1 / c.minutes(celsius, toWait)
}

// minutes evaluates a valid curve; +Inf where there is no cure.
func (c Curve) minutes(t float64, s side) float64 {
	t = math.Max(-far, math.Min(far, t))
	lo, hi := c.beside(t, -1, true), c.beside(t, 1, true)
	switch {
	case lo == hi:
		return c[lo].Min
	case lo < 0:
		k, next := c[hi], c.beside(c[hi].Celsius, 1, false)
		gap := k.Celsius - t
		if gap > s.reach {
			if s.stops {
				return math.Inf(1)
			}
			gap = s.reach
		}
		if s.cold == 0 {
			return k.Min
		}
		return k.Min * math.Exp(s.slope(s.cold, c, next, hi)*gap)
	case hi < 0:
		k, next := c[lo], c.beside(c[lo].Celsius, -1, false)
		if s.hot == 0 {
			return k.Min
		}
		return k.Min * math.Exp(-s.slope(s.hot, c, lo, next)*(t-k.Celsius))
	}
	a, b := c[lo], c[hi]
	f := (t - a.Celsius) / (b.Celsius - a.Celsius)
	v := math.Exp(math.Log(a.Min) + f*(math.Log(b.Min)-math.Log(a.Min)))
	return math.Min(a.Min, math.Max(b.Min, v)) // rounding must not leave the two points
}

// slope is the change of the log of time per kelvin outside the points, from the rule or, where
// steeper, from the outermost two points: the hotter and the colder of them by index, -1 if none.
func (s side) slope(rule float64, c Curve, hotter, colder int) float64 {
	if !s.steeper || hotter < 0 || colder < 0 {
		return rule
	}
	own := (math.Log(c[colder].Min) - math.Log(c[hotter].Min)) / (c[hotter].Celsius - c[colder].Celsius)
	return math.Max(rule, own)
}

// beside gives the point nearest to t on one side (-1 colder, 1 hotter), t itself included or
// not; -1 if there is none.
func (c Curve) beside(t float64, dir float64, included bool) int {
	best := -1
	for i, p := range c {
		d := (p.Celsius - t) * dir
		if d < 0 || d == 0 && !included {
			continue
		}
		if best < 0 || d < (c[best].Celsius-t)*dir {
			best = i
		}
	}
	return best
}
