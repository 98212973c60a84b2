package coat

import "fmt"

// Validate reports the first fault of the paint, in the order of its fields.
func (p Paint) Validate() error {
	checks := []error{
		share("volume solids", p.VolumeSolids, 0.05, 1, "the sheet gives volume solids in percent, for instance 60 %"),
		within("dry film", p.DFT, 5, 3000, "um", "give the dry film of one coat in um"),
		within("the least steel temperature", p.ApplyMin, lowCelsius, highCelsius, "C", "give `apply: {min: 5 C}`"),
		within("the greatest steel temperature", p.ApplyMax, p.ApplyMin, highCelsius, "C", "it must be above the least"),
		share("the greatest humidity", p.RHMax, 0, 1, "give it in percent, for instance 85 %"),
		share("the least humidity", p.RHMin, 0, 1, "give it in percent, for instance 50 %"),
		within("the spread above the dew point", p.DewSpread, 0, 30, "K", "3 K is usual"),
		within("the hours that must stay dry", p.DryHours, 0, 24*14, "h", "give hours, for instance 8 h"),
		within("the induction time", p.Induction, 0, 240, "min", "give minutes, for instance 15 min"),
		share("thinner", p.Thinner, 0, 1, "give thinner as a share of the paint, for instance 10 %"),
	}
	for _, err := range checks {
		if err != nil {
			return p.in(err)
		}
	}
	if p.RHMax > 0 && p.RHMin >= p.RHMax {
		return p.in(fault("one of the two is wrong", "least humidity %s leaves no room below the greatest %s", amount(p.RHMin*100, "%"), amount(p.RHMax*100, "%")))
	}
	if !contains(Untils(), p.HeldUntil()) {
		return p.in(fault("write "+oneOf(Untils()), "its limits hold until %q", p.LimitsUntil))
	}
	for _, m := range sorted(p.WindMax) {
		if err := within("the wind limit for "+m, p.WindMax[m], 0.1, 40, "m/s", "give it in m/s"); err != nil {
			return p.in(err)
		}
	}
	if err := p.validateCurves(); err != nil {
		return p.in(err)
	}
	return p.validateMix()
}

func (p Paint) validateCurves() error {
	named := func(name string, c Curve) error {
		if len(c) == 0 {
			return nil
		}
		if err := c.Validate(); err != nil {
			return fault(hint(err), "%s: %v", name, err)
		}
		return nil
	}
	if err := named("pot life", p.PotLife); err != nil {
		return err
	}
	for _, s := range States() {
		c, _ := p.State(s)
		if err := named(s, c); err != nil {
			return err
		}
	}
	for _, k := range sorted(p.NextCoat) {
		r := p.NextCoat[k]
		if len(r.Min) == 0 {
			return fault("give at least one, for instance 20 C: 8 h", "next coat %q has no least wait", k)
		}
		if err := named(fmt.Sprintf("next coat %q", k), r.Min); err != nil {
			return err
		}
		if err := named(fmt.Sprintf("longest wait for next coat %q", k), r.Max); err != nil {
			return err
		}
		if err := r.opens(); err != nil {
			return fault(hint(err), "next coat %q: %v", k, err)
		}
	}
	return nil
}

// opens checks that a window has room at every temperature of its max points.
func (r Recoat) opens() error {
	for _, m := range r.Max {
		if t := r.Min.minutes(m.Celsius, toWait); t > m.Min && m.Min > 0 {
			return fault("look at the sheet again: the max must be longer than the min",
				"at %s the max is %s, the min %s", amount(m.Celsius, "C"), amount(m.Min, "min"), amount(t, "min"))
		}
	}
	return nil
}

func (p Paint) validateMix() error {
	if p.TwoPack() {
		for _, v := range p.MixRatio {
			if err := within("a part of the mix", v, 0.01, 1000, "", "give the mix by volume, for instance 4:1"); err != nil {
				return p.in(err)
			}
		}
		if len(p.PotLife) == 0 {
			return p.in(fault("give `pot life`, for instance 20 C: 4 h", "it is mixed from two parts and has no pot life"))
		}
	}
	for _, v := range p.PackSizes {
		if err := within("a pack", v, leastPack, largestPack, "L", "give the litres of one tin or kit"); err != nil {
			return p.in(err)
		}
	}
	if len(p.PackSizes) > 12 {
		return p.in(fault("keep the sizes you can buy", "it has %d pack sizes, at most 12 are taken", len(p.PackSizes)))
	}
	return nil
}

// in says whose fault err is.
func (p Paint) in(err error) error {
	return fault(hint(err), "paint %s: %v", called(p), err)
}
