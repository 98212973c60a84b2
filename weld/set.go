package weld

import (
	"maps"
	"math"

	"sailby/tasks/origin"
)

// Set is a welding set after IEC 60974-1 and what it draws. Fields at zero have defaults.
type Set struct {
	RatedCurrent float64 // A that it holds for DutyCycle of every ten minutes at 40 C
	DutyCycle    float64 // share of ten minutes at RatedCurrent, 0 to 1
	MaxCurrent   float64 // A; the most the set gives, for sizing a generator; default RatedCurrent
	Efficiency   float64 // power out over power in; default 0.85 (inverter)
	PowerFactor  float64 // default 0.7 (no correction)
}

func (s Set) check() error {
	err := first(
		optional("rated current", s.RatedCurrent, 10, 2000, "A"),
		optional("duty cycle", s.DutyCycle, 0.05, 1, ""),
		optional("most current", s.MaxCurrent, 10, 2000, "A"),
		optional("set efficiency", s.Efficiency, 0.3, 1, ""),
		optional("power factor", s.PowerFactor, 0.3, 1, ""))
	if err == nil && (s.RatedCurrent > 0) != (s.DutyCycle > 0) {
		return fault("duty cycle", "the rating plate has both, for instance 200 A at 35 %", "a set's rated current and its duty cycle go together")
	}
	return err
}

// Share gives the part of every ten minutes for which the set holds a current: the rated share
// x (rated current / current)^2, at most 1. Without a rating it is 1.
//
// Source: IEC 60974-1, ten-minute period; the square law as set makers print it.
func (s Set) Share(current float64) float64 {
	if s.RatedCurrent <= 0 || s.DutyCycle <= 0 || !(current > 0) {
		return 1
	}
	return math.Min(1, s.DutyCycle*math.Pow(s.RatedCurrent/current, 2))
}

// CurrentAt gives the current that the set holds for a share of ten minutes: rated current x
// the root of rated share over share. Special case: a share of 0 gives +Inf.
func (s Set) CurrentAt(share float64) float64 {
	return s.RatedCurrent * math.Sqrt(s.DutyCycle/share)
}

// share is Share as a figure.
func (p Procedure) share(current origin.Figure) origin.Figure {
	if p.Set.RatedCurrent == 0 {
		return origin.House("duty cycle at this current", 1, "", "no rating given: the set is taken to hold it")
	}
	return origin.Worked("duty cycle at this current", p.Set.Share(current.Value), "", "min(1, duty cycle x (rated current / current)^2)",
		p.given("duty cycle", p.Set.DutyCycle, ""), p.given("rated current", p.Set.RatedCurrent, "A"), current)
}

// volts gives the arc voltage: as given, else the load voltage of IEC 60974-1.
func (p Procedure) volts(d process, current origin.Figure) origin.Figure {
	if p.Volts > 0 {
		return p.given("volts", p.Volts, "V")
	}
	a, b := d.slope[0], d.slope[1]
	f := origin.Recalled("volts", a+b*current.Value, "V", "IEC 60974-1 load voltage "+origin.Trim(a)+" + "+origin.Trim(b)+" x current")
	f.From = []origin.Figure{current}
	return f
}

// SetFrom takes over the welding set and the cables of q where p has none.
func (p *Procedure) SetFrom(q Procedure) {
	mine := map[string]bool{"welding cable": p.Cable.Length > 0, "supply cable": p.Supply.Length > 0}
	set := p.Set.RatedCurrent > 0
	for _, name := range []string{"rated current", "duty cycle", "most current", "set efficiency", "power factor"} {
		mine[name] = set
	}
	if !set {
		p.Set = q.Set
	}
	if !mine["welding cable"] {
		p.Cable = q.Cable
	}
	if !mine["supply cable"] {
		p.Supply = q.Supply
	}
	origins := maps.Clone(p.Origins)
	if origins == nil {
		origins = map[string]origin.Origin{}
	}
	for name, o := range q.Origins {
		if !mine[name] {
			origins[name] = o
		}
	}
	p.Origins = origins
}

// InputPower gives the kilowatts that the set takes at an arc of volts and current.
func (s Set) InputPower(volts, current float64) float64 {
	return volts * current / 1000 / s.or().Efficiency
}

// Draws gives the kVA that the set draws at an arc of volts and current.
func (s Set) Draws(volts, current float64) float64 {
	return s.InputPower(volts, current) / s.or().PowerFactor
}

// or fills in the defaults.
func (s Set) or() Set {
	if s.Efficiency == 0 {
		s.Efficiency = 0.85
	}
	if s.PowerFactor == 0 {
		s.PowerFactor = 0.7
	}
	if s.MaxCurrent == 0 {
		s.MaxCurrent = s.RatedCurrent
	}
	return s
}

// power is Draws as a figure.
func (p Procedure) power(volts, current origin.Figure) origin.Figure {
	s := p.Set.or()
	eff := origin.Published("set efficiency", s.Efficiency, "", "0.85 for an inverter, as makers reckon (200 A x 25 V / 0.85 = 5.9 kW)")
	if p.Set.Efficiency > 0 {
		eff = p.given("set efficiency", s.Efficiency, "")
	}
	pf := origin.Recalled("power factor", s.PowerFactor, "", "0.65 to 0.7 without correction")
	if p.Set.PowerFactor > 0 {
		pf = p.given("power factor", s.PowerFactor, "")
	}
	return origin.Worked("power drawn", s.Draws(volts.Value, current.Value), "kVA",
		"volts x current / 1000 / set efficiency / power factor", volts, current, eff, pf)
}

// generatorMargin is the generator's kVA over the largest kVA of the sets on it (set makers'
// manuals: 1.35, and never below the set's own).
const generatorMargin = 1.35

// generator is what a generator for the set must give: the margin over the kVA at the most
// current that the set gives, and not below what the arc draws.
func (p Procedure) generator(d process, power origin.Figure) origin.Figure {
	most := p.Set.or().MaxCurrent
	draws := power
	if most > 0 && most > p.Current {
		u := d.slope[0] + d.slope[1]*most
		current := p.given("rated current", most, "A")
		if p.Set.MaxCurrent > 0 {
			current = p.given("most current", most, "A")
		}
		current.Name = "current"
		volts := origin.Recalled("volts", u, "V", "IEC 60974-1 load voltage "+origin.Trim(d.slope[0])+" + "+origin.Trim(d.slope[1])+" x current")
		volts.From = []origin.Figure{current}
		draws = p.power(volts, current)
		if draws.Value < power.Value {
			draws = power
		}
	}
	draws.Name = "most power drawn"
	return origin.Worked("generator", Generator(draws.Value), "kVA", "most power drawn x generator margin", draws,
		origin.Published("generator margin", generatorMargin, "", "set makers' manuals: 1.35 times the set's largest kVA, never below it"))
}

// Generator gives the kVA of a generator that starts and carries sets drawing kVA at most: 1.35 times it.
func Generator(kVA float64) float64 { return generatorMargin * kVA }
