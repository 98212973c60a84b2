package lift

import (
	"math"

	"sailby/tasks/origin"
)

const marineGuide = "Guidelines for Marine Lifting and Lowering Operations 0027/ND Rev 11, Table 5-1"

// Water is where a lift is made, for its dynamic factor.
type Water uint8

// The places of a lift.
const (
	Onshore  Water = iota
	Inshore        // from or onto a boat or pontoon in sheltered water
	Offshore       // in open water
)

// DynamicFactor gives the factor for starting, stopping and waves on a load of m kg, to put into
// Load.Dynamic. On the water a load below 3 t counts as 3 t, as the guidelines recommend.
//
// Errors: an unknown place, a mass out of range, more than 100 t on the water.
func DynamicFactor(m float64, where Water) (origin.Figure, error) {
	if err := ranged("the mass", m, tiny, maxMass, "kg"); err != nil {
		return origin.Figure{}, err
	}
	if where > Offshore {
		return origin.Figure{}, fault("say onshore, inshore or offshore", "the place of the lift is not a known one")
	}
	if where == Onshore {
		return dynamic(m), nil
	}
	if m > 100e3 {
		return origin.Figure{}, fault("ask a marine warranty surveyor", "%s kg on the water is beyond 100 t", origin.Trim(m))
	}
	root := math.Sqrt(100 / (math.Max(m, 3000) / 1000))
	if where == Inshore {
		return origin.Worked("dynamic factor, inshore", 1.07+0.05*root, "", "1.07 + 0.05 sqrt(100 / t), "+marineGuide, given("mass", m, "kg")), nil
	}
	return origin.Worked("dynamic factor, offshore", 1+0.25*root, "", "1 + 0.25 sqrt(100 / t), "+marineGuide, given("mass", m, "kg")), nil
}

// dynamic gives the factor for starting and stopping of a load of m kg on shore.
func dynamic(m float64) origin.Figure {
	const source = marineGuide + ", onshore in air"
	switch t := m / 1000; {
	case t <= 3:
		return origin.House("dynamic factor", 1.10, "", "below 3 t as for 3 to 100 t in "+source)
	case t <= 100:
		return origin.Published("dynamic factor", 1.10, "", source)
	case t <= 1000:
		return origin.Published("dynamic factor", 1.05, "", source)
	}
	return origin.Published("dynamic factor", 1.03, "", source)
}
