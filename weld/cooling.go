package weld

import (
	"math"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// The heat balance of a seam: the band that takes up the heat is 75 mm wide on either side
// (where preheat is measured), steel holds 0.49 kJ/(kg K), and both faces give off 50 W/(m2 K)
// to air and neighbouring plate. House judgement but for the heat capacity.
const (
	bandWidth   = 75.0
	heatHeld    = 0.49
	givenOff    = 50.0
	interpassAt = 250.0  // C, where the procedure does not say (house judgement)
	handWarm    = 50.0   // C at which a weld is looked at and handled
	plainTo     = 12.0   // mm
	shortCool   = 15.0   // min of cooling that pass while leads are cleared: counted as none
	burner      = 6.0    // kW that a preheating torch leaves in the plate (house judgement)
	heatedAtOne = 1000.0 // mm heated before the first arc, again after every stop
)

// bandMass is the mass of a millimetre of seam's band, kg.
func bandMass(thick, density float64) float64 { return 2 * bandWidth * thick * density / 1e9 }

// slackness is the time constant of the band in minutes: rho c t / (2 h).
func slackness(thick, density float64) float64 {
	return density * heatHeld * 1000 * thick / 1000 / (2 * givenOff) / 60
}

// heating works out current, heat input, t8/5 and preheat.
func (e *seamWork) heating(c Circumstances) error {
	p := e.proc
	e.power = p.power(e.volts, e.current)
	e.generator = p.generator(e.data, e.power)
	e.drops()
	if most := p.Set.or().MaxCurrent; most > 0 && e.current.Value > most {
		e.warnf("the welding set gives %.0f A at most, the weld is reckoned with %.0f A: a smaller electrode or wire, or a larger set", most, e.current.Value)
	}
	k := e.heatEfficiency()
	e.travel = p.travelOf(e.rate, e.runs.large, c.Steel.density())
	e.heat = heatInput(k, e.volts, e.current, e.travel)
	if p.MaxHeatInput > 0 && e.heat.Value > p.MaxHeatInput*1.0001 {
		e.warnf("heat input %.2f kJ/mm is above the procedure's %.2f: weld faster, with smaller runs (and more of them)", e.heat.Value, p.MaxHeatInput)
	}
	if p.MinHeatInput > 0 && e.heat.Value < p.MinHeatInput*0.9999 {
		e.warnf("heat input %.2f kJ/mm is below the procedure's %.2f: weld slower, with larger runs", e.heat.Value, p.MinHeatInput)
	}
	e.preheat(c)
	f2, f3 := shapeFactors(e.joint.Type)
	from := math.Max(c.Ambient, e.heatTo.Value)
	if from <= 400 && e.heat.Value >= 0.05 && e.heat.Value <= 20 {
		var err error
		if e.cooling, err = Cool(e.heat.Value, e.joint.Thickness, from, f2, f3); err != nil {
			return err
		}
		plate := origin.Worked("plate temperature", from, "C", "ambient", c.ambient())
		if e.heatTo.Value > 0 {
			plate = origin.Worked("plate temperature", from, "C", "max(preheat, ambient)", renamed(e.heatTo, "preheat"), c.ambient())
		}
		if e.cooling.Why = (origin.Figure{}); !e.plainThin(c) {
			e.cooling.Why = e.cooling.why(e.heat, plate, e.joint.drawn("thickness", e.joint.Thickness, "mm"), f2, f3)
		}
	}
	return nil
}

// plainThin says that nobody asks how fast it cools: plain steel to 12 mm (house judgement), not
// preheated, and nothing given that heat is reckoned from.
func (e *seamWork) plainThin(c Circumstances) bool {
	p, asked := e.proc, c.Steel.CE().Value+c.Steel.CET().Value > 0 || c.PreheatStandard != ""
	asked = asked || p.Volts+p.HeatEfficiency+p.MinHeatInput+p.MaxHeatInput+p.Interpass > 0 || e.heatTo.Value > 0
	return !asked && c.Steel.yield() <= 355 && math.Max(e.joint.Thickness, e.joint.Thickness2) <= plainTo
}

// preheating gives the hands-on minutes of heating the seam beyond its first metre, and sets
// set-up (leads, and the first metre heated) and the soak that goes with it.
func (e *seamWork) preheating(c Circumstances) (along origin.Figure, ok bool) {
	ready := c.Rates.pick("set-up", c.Rates.SetUp, bySite(c.Site, 20, 10), "min", "lead out, make ready, test on scrap")
	e.setUp = ready
	rise := e.heatTo.Value - c.Ambient
	if e.heatTo.Name == "" || rise <= 0 {
		return along, false
	}
	t := e.thicker().Value
	perMetre := origin.Worked("heating a metre", bandMass(t, c.Steel.density())*1000*heatHeld*rise/burner/60, "min",
		"band mass x 0.49 x (preheat - ambient) / torch / 60",
		origin.Worked("band mass", bandMass(t, c.Steel.density())*1000, "kg", "2 x 75 x thickness x density / 1000000",
			e.thicker(), densityFigure(c.Steel.density())),
		e.heatTo, c.ambient(),
		origin.House("torch", burner, "kW", "what a preheating torch leaves in the plate"))
	one := math.Min(1, e.joint.Length/heatedAtOne)
	first := origin.Written("metres heated first", one, "m", e.joint.Origin)
	e.setUp = origin.Worked("set-up", ready.Value+perMetre.Value*one, "min", "set-up of the leads + heating a metre x metres heated first",
		renamed(ready, "set-up of the leads"), perMetre, first)
	e.soak = origin.Worked("soak", 2*math.Max(1, t/25), "min", "2 x max(1, thickness / 25)", e.thicker())
	e.soak.Origin = origin.Origin{Kind: origin.Judgement, Source: "2 min for every 25 mm of thickness, at least 2"}
	rest := e.joint.Length/1000 - one
	if rest <= 0 {
		return along, false
	}
	return origin.Worked("preheat along the seam", perMetre.Value*rest, "min", "heating a metre x metres heated later", perMetre,
		origin.Written("metres heated later", rest, "m", e.joint.Origin)), true
}

// thicker is the thicker part of the joint, which preheat goes by.
func (e *seamWork) thicker() origin.Figure {
	j := e.joint
	if j.Thickness2 > j.Thickness {
		return renamed(j.drawn("second thickness", j.Thickness2, "mm"), "thickness")
	}
	return j.drawn("thickness", j.Thickness, "mm")
}

func renamed(f origin.Figure, name string) origin.Figure {
	f.Name = name
	return f
}

// coolingTimes runs the heat balance through the runs: each adds heat input over band mass and
// heat capacity, and between runs the band cools with its time constant. A band above the
// interpass temperature is waited for.
func (e *seamWork) coolingTimes(c Circumstances) {
	density := c.Steel.density()
	most := interpassAt
	if e.proc.Interpass > 0 {
		most = e.proc.Interpass
	}
	start := math.Max(c.Ambient, e.heatTo.Value)
	if most <= start {
		e.warnf("interpass %.0f C is not above the preheat of %.0f C: the wait between runs cannot be reckoned", most, start)
		most = start + 25
	}
	rise := e.heat.Value / (bandMass(e.joint.Thickness, density) * heatHeld)
	tau := slackness(e.joint.Thickness, density)
	between := e.welding.Value / float64(e.runs.count)
	temp, wait := start, 0.0
	for i := 0; i < e.runs.count; i++ {
		if i > 0 {
			temp = c.Ambient + (temp-c.Ambient)*math.Exp(-between/tau)
			temp = math.Max(temp, e.heatTo.Value)
			if temp > most {
				wait += tau * math.Log((temp-c.Ambient)/(most-c.Ambient))
				temp = most
			}
		}
		temp += rise
	}
	note := "heat balance of a band 75 mm either side, 50 W/(m2 K) from both faces"
	e.standBy = origin.House("standing by for interpass", float64(standing(quantity.Clock(wait))), "min", note)
	e.standBy.From = []origin.Figure{origin.House("interpass", most, "C", "as the procedure says, else 250 C"), e.heat}
	cool := 0.0
	if to := math.Max(handWarm, c.Ambient+10); temp > to {
		cool = tau * math.Log((temp-c.Ambient)/(to-c.Ambient))
	}
	if cool < shortCool {
		cool = 0
	}
	e.cool = origin.House("cooling", cool, "min", note+", to hand-warm; under 15 min counts as none")
	e.cool.From = []origin.Figure{e.heat}
}

// standing is where clock time becomes a person's time, in this one place: a welder kept at the
// seam by its heat is at the face.
func standing(c quantity.Clock) quantity.HandsOn { return quantity.HandsOn(c) }
