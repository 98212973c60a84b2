package site

import (
	"math"

	"sailby/tasks/origin"
)

// SteelRule is how the steel's temperature departs from the air's where nobody has measured it.
// Bare radiation under a clear night sky pulls it below the air, sun lifts it above, and mass makes it late.
type SteelRule struct {
	NightPoor    float64 // K below the air on the poor day's clear night, 0 to 15
	NightAverage float64 // K below the air on the average night, 0 to 15
	SunAverage   float64 // K above the air with the sun overhead, average day, 0 to 60; less as the sun stands lower
	SunWarm      float64 // K above the air with the sun overhead, warm day, 0 to 60
	Lag          float64 // hours until 63 % of a change of the air has reached the steel, 0 to 48
}

var usualSteel = SteelRule{NightPoor: 5, NightAverage: 2, SunAverage: 5, SunWarm: 20, Lag: 2}

// UsualSteel gives the rule that holds where a climate has none of its own.
func UsualSteel() SteelRule { return usualSteel }

func (r *SteelRule) rule() SteelRule {
	if r == nil {
		return usualSteel
	}
	return *r
}

func (r SteelRule) figures() []origin.Figure {
	const night = "clear-night cooling of 2 to 5 K below the air"
	figure := func(name string, v float64, unit, note string, usual float64, recalled bool) origin.Figure {
		switch {
		case v != usual:
			return origin.Written(name, v, unit, origin.Origin{})
		case recalled:
			return origin.Recalled(name, v, unit, note)
		}
		return origin.House(name, v, unit, note)
	}
	return []origin.Figure{
		figure("steel below air, clear night", r.NightPoor, "K", night, usualSteel.NightPoor, true),
		figure("steel below air, average night", r.NightAverage, "K", night, usualSteel.NightAverage, true),
		figure("steel above air in the sun, average day", r.SunAverage, "K",
			"times the sine of the sun's altitude; none on the poor day", usualSteel.SunAverage, false),
		figure("steel above air in the sun, warm day", r.SunWarm, "K",
			"dark steel square to the sun may have more", usualSteel.SunWarm, false),
		figure("time in which the steel follows the air", r.Lag, "h",
			"plate of some 10 to 20 mm; thin sheet less, castings more", usualSteel.Lag, false),
	}
}

func (r SteelRule) check() error {
	for _, v := range []struct {
		name     string
		is, most float64
	}{{"steel below air on the poor night (K)", r.NightPoor,
		15}, {"steel below air on the average night (K)", r.NightAverage, 15},
		{"steel above air in the sun (K)", r.SunAverage, 60}, {"steel above air on the warm day (K)",
			r.SunWarm, 60}, {"the steel's lag (h)", r.Lag, 48}} {
		if !(v.is >= 0 && v.is <= v.most) {
			return advice("leave it out for the usual value", "%s %v is not between 0 and %v", v.name, v.is, v.most)
		}
	}
	return nil
}

// steelState follows the steel hour by hour: dT/dt = (target - T)/lag, solved for a constant
// target over one hour.
type steelState struct {
	keep       float64 // share of the distance to the target that is left after an hour
	night, sun float64
	t          float64
	started    bool
}

func newSteel(lag, night, sun float64) *steelState {
	keep := 0.0
	if lag > 0 {
		keep = math.Exp(-1 / lag)
	}
	return &steelState{keep: keep, night: night, sun: sun}
}

// hour gives the steel's temperature at the end of an hour of air at air C under a sun at altitude degrees.
func (s *steelState) hour(air, altitude float64) float64 {
	target := air + s.sun*max(0, math.Sin(rad(altitude)))
	if altitude < riseAltitude {
		target -= s.night
	}
	if !s.started {
		s.t, s.started = target, true
	}
	s.t = target + (s.t-target)*s.keep
	return s.t
}
