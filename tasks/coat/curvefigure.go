package coat

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// figure evaluates the curve at celsius and says how; o is where the points come from.
func (c Curve) figure(name string, celsius float64, s side, o origin.Origin) (float64, origin.Figure, error) {
	if err := c.Validate(); err != nil {
		return 0, origin.Figure{}, err
	}
	if err := within("the steel's temperature", celsius, -90, 200, "C", "give the steel's temperature in C"); err != nil {
		return 0, origin.Figure{}, err
	}
	v := c.minutes(celsius, s)
	if math.IsInf(v, 1) {
		return 0, origin.Figure{}, c.coldFault(celsius)
	}
	point := func(i int) origin.Figure {
		return origin.Figure{Name: "at " + amount(c[i].Celsius, "C"), Value: c[i].Min, Unit: "min", Origin: o}
	}
	name += " at " + amount(celsius, "C")
	lo, hi := c.beside(celsius, -1, true), c.beside(celsius, 1, true)
	switch {
	case lo == hi:
		return v, origin.Worked(name, v, "min", "the paint's own point", point(lo)), nil
	case lo >= 0 && hi >= 0:
		return v, origin.Worked(name, v, "min", "log of time against temperature between two points", point(lo), point(hi)), nil
	case lo < 0 && s.cold == 0:
		return v, origin.Worked(name, v, "min", "colder than the coldest point: taken as no longer", point(hi)), nil
	case lo < 0:
		return v, origin.Worked(name, v, "min", "colder than the coldest point: longer by rule of thumb", point(hi), s.rule(c, -1)), nil
	case s.hot == 0:
		return v, origin.Worked(name, v, "min", "hotter than the hottest point: no faster credit", point(lo)), nil
	}
	return v, origin.Worked(name, v, "min", "hotter than the hottest point: shorter by rule of thumb", point(lo), s.rule(c, 1)), nil
}

// rule names the factor per 10 K that was used outside the points, at the cold (-1) or hot (1) end.
func (s side) rule(c Curve, dir float64) origin.Figure {
	if s == toPot {
		return origin.Published("factor for each 10 K", perTenKelvin, "", "UFGS-09971 3.7.1.3: pot life halves for +10 C, doubles for -10 C")
	}
	end := c.beside(far*dir, -dir, true)
	next := c.beside(c[end].Celsius, -dir, false)
	hotter, colder, least, what := end, next, s.hot, "hottest"
	if dir < 0 {
		hotter, colder, least, what = next, end, s.cold, "coldest"
	}
	if k := s.slope(least, c, hotter, colder); k > least {
		return origin.Worked("factor for each 10 K", math.Exp(10*k), "", "slope of the "+what+" two points, steeper than the rule of thumb")
	}
	return origin.House("factor for each 10 K", perTenKelvin, "", "rule of thumb where the paint has no point; sheets show 1.4 to 1.8 between points")
}

func (c Curve) coldFault(celsius float64) error {
	k := c[c.beside(-far, 1, true)]
	return &coldFault{quantity.Error{
		Problem: fmt.Sprintf("%s is more than %s below the coldest point (%s): no cure is counted there",
			amount(celsius, "C"), amount(coldReach, "K"), amount(k.Celsius, "C")),
		Hint: "give a point of the paint's own at that temperature, take a winter hardener, or keep the steel warm",
	}}
}
