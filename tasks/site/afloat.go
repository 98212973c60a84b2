package site

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"sailby/tasks/origin"
)

// Getaway tells whether what came in on one tide gets off again: a boat over a sill or on a
// grid, a float at a slip.
type Getaway struct {
	Level   float64 // water needed, metres above the table's datum
	Grounds Minute  // when the water first falls below the level; 0 where it never does
	Off     []Span  // when there is water enough again and the work is done, each Why names its high water
	Neaped  bool    // no later water is enough in time: the work may fit, the boat stays
	Why     string  // the answer in words, with both heights
	Next    Water   // where neaped: the first high water after the window that would do; its At is 0 if the table shows none
}

// Neaped applies the rule for getting off again: what settles when the water falls below level
// needs a tide at or above that level once the work on it is done, at ready, and before to. From is when it arrives,
// afloat; ready at or before from asks for no more than a tide after it has settled. The level is what the craft needs there (sill or keel blocks, draught, margin; see Allowance), in
// metres above the table's datum. After springs each tide is lower than the last, so that arriving on the
// highest of them is the mistake.
//
// Errors: as for Reach, and water below the level at from, as it cannot have come in then.
func (t *TideTable) Neaped(level float64, from, ready, to Minute) (Getaway, error) {
	open, err := t.Reach(false, level, from, to)
	if err != nil {
		return Getaway{}, err
	}
	if h, _ := t.Height(from); h < level {
		hint := "no later water in the window is enough either"
		if len(open) > 0 {
			hint = "come in at " + moment(open[0].From)
		}
		return Getaway{}, advice(hint, "the water is %.2f m at %s, %.2f m are needed to come in", h, moment(from), level)
	}
	g := Getaway{Level: level}
	if len(open) == 1 && open[0].From == from && open[0].To == to {
		lo, _ := t.extremes(from, to)
		g.Why = fmt.Sprintf("stays afloat: water never below %.2f m, %.2f m needed", lo, level)
		return g, nil
	}
	g.Grounds = from
	if len(open) > 0 && open[0].From == from {
		g.Grounds = open[0].To
	}
	for _, s := range open {
		if s.From > g.Grounds && s.To > ready {
			s.From = max(s.From, ready)
			_, hi := t.extremes(s.From, s.To)
			s.Why = fmt.Sprintf("water up to %.2f m, %.2f m needed", hi, level)
			g.Off = append(g.Off, s)
		}
	}
	for _, w := range t.Between(max(g.Grounds+1, ready), to) { // one that just reaches the level is enough, and has no length
		if w.High && w.Metres == level {
			g.Off = append(g.Off, Span{w.At, w.At + 1, fmt.Sprintf("water up to %.2f m, just the %.2f m needed",
				w.Metres, level)})
		}
	}
	slices.SortFunc(g.Off, func(a, b Span) int { return cmp.Compare(a.From, b.From) })
	after := ""
	if ready > g.Grounds {
		after = " after the work is done at " + moment(ready)
	}
	if len(g.Off) > 0 {
		first, last := g.Off[0], g.Off[len(g.Off)-1]
		g.Why = fmt.Sprintf("gets off at %s at the earliest%s, at %s at the latest: %s", moment(first.From), after, moment(last.To), last.Why)
		return g, nil
	}
	g.Neaped = true
	best, rises := 0.0, false
	if ready > to {
		g.Why = fmt.Sprintf("neaped: the work is done at %s, it must be off by %s", moment(ready), moment(to))
	} else if best, rises = t.rise(max(g.Grounds, ready), to, ready > g.Grounds); rises {
		g.Why = fmt.Sprintf("neaped: %.2f m needed to get off, the highest water%s and before %s is %.2f m (%.2f m short)",
			level, after, moment(to), best, level-best)
	} else {
		g.Why = fmt.Sprintf("neaped: %.2f m needed to get off, the water only falls before %s", level, moment(to))
	}
	if after == "" {
		g.Why = strings.Replace(g.Why, "water and before", "water before", 1)
	}
	for _, w := range t.Waters[t.after(to):] {
		if w.High && w.Metres >= level {
			g.Next = w
			g.Why += "; the next that would do is " + w.String()
			break
		}
	}
	return g, nil
}

// rise gives the greatest height between the next low water after from and to, if there is one; settled says that
// from is past a low water itself.
func (t *TideTable) rise(from, to Minute, settled bool) (highest float64, ok bool) {
	if settled && from < to {
		_, hi := t.extremes(from, to)
		return hi, true
	}
	for _, w := range t.Between(from, to) {
		if !w.High {
			_, hi := t.extremes(w.At, to)
			return hi, true
		}
	}
	return 0, false
}

// Allowance is what the water may stand above or below the predicted height. Air pressure and
// surge are not in predictions.
type Allowance struct {
	LeastPressure    float64 // hPa expected at the lowest; 0 means not known
	GreatestPressure float64 // hPa expected at the highest; 0 means not known
	Surge            float64 // metres either way for wind and waves; 0 without the pressure that matters means 0.3 m in all
}

// Pressure at which predictions hold, and how far a change of one hectopascal moves the water.
const (
	meanPressure     = 1013.0 // hPa
	metresPerHPa     = 0.01
	defaultAllowance = 0.3 // metres
)

// Level moves a level by the allowance to the careful side: work below the water must keep clear
// of a level that much lower, a craft that floats in needs a predicted height that much higher.
//
// Errors: pressures outside 870 to 1085 hPa (the world's records are just inside), a surge that is
// negative or above 5 m, a level that is no number.
func (a Allowance) Level(below bool, level float64) (origin.Figure, error) {
	if !finite(level) {
		return origin.Figure{}, advice("give the level in metres", "level %v is not a height", level)
	}
	for _, p := range []float64{a.LeastPressure, a.GreatestPressure} {
		if p != 0 && !(p >= 870 && p <= 1085) {
			return origin.Figure{}, advice("give hectopascals at sea level, for instance 985",
				"air pressure %v hPa is not between 870 and 1085", p)
		}
	}
	if a.LeastPressure != 0 && a.GreatestPressure != 0 && a.LeastPressure > a.GreatestPressure {
		return origin.Figure{}, advice("write the lower one first",
			"least pressure %v hPa is above the greatest, %v hPa", a.LeastPressure, a.GreatestPressure)
	}
	if !(a.Surge >= 0 && a.Surge <= 5) {
		return origin.Figure{}, advice("give metres, 0 to 5", "surge %v m is out of range", a.Surge)
	}
	given := origin.Written("level", level, "m", origin.Origin{})
	part := a.part(below)
	sign, how := 1.0, "level raised by the allowance"
	if below {
		sign, how = -1, "level lowered by the allowance"
	}
	return origin.Worked("level with allowance", level+sign*part.Value, "m", how, given, part), nil
}

// part is the allowance that matters: high water for work below it, low water for floating.
func (a Allowance) part(below bool) origin.Figure {
	press, off := a.LeastPressure, meanPressure-a.LeastPressure
	if !below {
		press, off = a.GreatestPressure, a.GreatestPressure-meanPressure
	}
	if press == 0 && a.Surge == 0 {
		return origin.Recalled("allowance for pressure and surge", defaultAllowance, "m",
			"keep 0.3 m at least where no pressure or surge is known")
	}
	if press == 0 {
		off = 0
	}
	rate := origin.Recalled("water for each hPa from 1013", metresPerHPa, "m",
		"inverse barometer: about 1 cm for each hectopascal")
	p := origin.Worked("pressure", max(off, 0)*metresPerHPa, "m", "(pressure - 1013) x rate, only the careful way",
		origin.Written("air pressure", press, "hPa", origin.Origin{}), rate)
	surge := origin.Written("surge", a.Surge, "m", origin.Origin{})
	return origin.Worked("allowance for pressure and surge", p.Value+surge.Value, "m", "pressure + surge", p, surge)
}
