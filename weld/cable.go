package weld

import (
	"math"

	"sailby/tasks/origin"
)

// Cable is a pair of copper conductors: to the arc and back, or from the supply to a set.
type Cable struct {
	Length  float64 // m, one way
	Section float64 // mm2
	Volts   float64 // V of the supply; default 230, with three phases 400
	Phases  int     // of the supply: 1 or 3; default 1
}

func (c Cable) check(name string) error {
	if (c.Length > 0) != (c.Section > 0) {
		return fault(name, "give both, for instance 30 m of 50 mm2", "length and section of a %s go together", name)
	}
	if c.Phases != 0 && c.Phases != 1 && c.Phases != 3 {
		return fault(name, "write 1 or 3", "a %s of %d phases", name, c.Phases)
	}
	return first(optional(name+" length", c.Length, 0.1, 2000, "m"), optional(name+" section", c.Section, 0.5, 500, "mm2"),
		optional(name+" volts", c.Volts, 24, 1000, "V"))
}

// Drops beyond which a cable is too long or too thin.
const (
	mostArcDrop    = 4.0  // V in welding cables (from memory: set makers lay out their cable tables for it)
	mostSupplyDrop = 0.05 // of the supply's volts (from memory: IEC 60364-5-52, 5 %)
)

// drops gives the volts lost in the welding cable at the arc's current, and in the supply cable
// at the current that the set takes, with a warning where they are too many.
func (e *seamWork) drops() {
	p := e.proc
	if c := p.Cable; c.Length > 0 {
		v, _ := VoltageDrop(c.Length, c.Section, e.current.Value, false)
		e.drop = origin.Worked("volts lost in the welding cable", v, "V", "2 x cable length x current x 0.01744 / cable section",
			renamed(p.given("welding cable", c.Length, "m"), "cable length"), e.current, renamed(p.given("welding cable", c.Section, "mm2"), "cable section"))
		if v > mostArcDrop {
			e.warnf("%.3g m of %.3g mm2 welding cable lose %.1f V at %.0f A, more than %.0f V: take a thicker cable or set up closer", c.Length, c.Section, v, e.current.Value, mostArcDrop)
		}
	}
	if c := p.Supply; c.Length > 0 {
		ways, volts, times := 2.0, 230.0, 1.0
		if c.Phases == 3 {
			ways, volts, times = math.Sqrt(3), 400, math.Sqrt(3)
		}
		if c.Volts > 0 {
			volts = c.Volts
		}
		amps := e.power.Value * 1000 / volts / times
		supply := p.given("supply cable", volts, "V")
		if c.Volts == 0 {
			supply = origin.House("", volts, "V", "usual supply")
		}
		drawn := origin.Worked("current drawn", amps, "A", "power drawn x 1000 / supply volts / phase factor", e.power,
			renamed(supply, "supply volts"), renamed(p.given("supply cable", times, ""), "phase factor"))
		v, _ := VoltageDrop(c.Length, c.Section, math.Min(amps, 2000), c.Phases == 3)
		e.supplyDrop = origin.Worked("volts lost in the supply cable", v, "V", "ways x cable length x current drawn x 0.01744 / cable section",
			renamed(p.given("supply cable", ways, ""), "ways"), renamed(p.given("supply cable", c.Length, "m"), "cable length"), drawn,
			renamed(p.given("supply cable", c.Section, "mm2"), "cable section"))
		if v > mostSupplyDrop*volts {
			e.warnf("%.3g m of %.3g mm2 supply cable lose %.0f V of %.0f V at %.0f A, more than 5 %%: the set may not hold its current; take a thicker cable", c.Length, c.Section, v, volts, amps)
		}
	}
}

// VoltageDrop gives the volts lost there and back in a copper cable of metres length and mm2
// section at a current: 2 l I rho / A; for three phases the root of three instead of two.
// rho is 0.01744 ohm mm2/m (20 C).
//
// Errors: a *Error for a length, section or current outside what cables are made for.
func VoltageDrop(metres, section, current float64, threePhase bool) (float64, error) {
	err := first(
		within("cable length", metres, 0, 2000, "m"),
		within("cable section", section, 0.5, 500, "mm2"),
		within("current", current, 0, 2000, "A"))
	if err != nil {
		return 0, err
	}
	ways := 2.0
	if threePhase {
		ways = math.Sqrt(3)
	}
	return ways * metres * current * 0.01744 / section, nil
}
