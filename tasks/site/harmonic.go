package site

import (
	"fmt"
	"math"
	"sort"
)

// Constituent is one cosine of a port's tide: amplitude in metres, phase lag on Greenwich (g) in
// degrees, for times in UTC.
type Constituent struct {
	Name      string // "M2", "K1", ...; see Constituents
	Amplitude float64
	Phase     float64
}

// Harmonic predicts a tide from a port's constants:
// h(t) = Z0 + sum f H cos(V0 + u + a t - g), after Schureman (1940), with node factors f and u of the
// four main families at every moment. Not for safety: with ten or more constituents of a port with little shallow
// water it comes within some 10 minutes and 10 cm of an authority's table; shallow ports are
// worse, and weather is not in it.
type Harmonic struct {
	Name         string
	Datum        string  // what Mean is measured from, for instance "chart"
	Mean         float64 // metres, Z0: mean level above the datum
	Constituents []Constituent
}

// speeds of the angles in degrees a day and their values at 2000-01-01 00:00 UTC: mean longitude of
// the moon (s), of the sun (h), of the moon's perigee (p), of its node (N), of the sun's perigee (p1). Linear
// terms of Meeus, Astronomical Algorithms, chapters 22, 25 and 47, from memory; moved from noon to midnight.
type longitudes struct{ s, h, p, n, p1 float64 }

func longitudesAt(m float64) longitudes {
	d := m/1440 - 10957 - 0.5 // days from 2000-01-01 12:00
	return longitudes{218.3164477 + 13.17639648*d, 280.4664567 + 0.98564736*d, 83.3532465 + 0.11140353*d,
		125.0445479 - 0.05295376*d, 282.93735 + 0.0000470*d}
}

// family is how the moon's node changes a constituent.
type family int

const (
	steady family = iota // the sun's own
	moon2                // M2 and its kin
	lunar1               // O1 and its kin
	k1
	k2
	l2 // also with the moon's perigee
)

// orbit is the moon's orbit against the equator for one place of its node: inclination I, right ascension nu
// and longitude xi of the crossing, radians.
// P is the moon's perigee counted from that crossing.
type orbit struct{ i, nu, xi, p float64 }

// orbitAt follows Schureman, from memory: cos I = 0.91370 - 0.03569 cos N,
// tan((N-xi+nu)/2) = 1.01883 tan(N/2), tan((N-xi-nu)/2) = 0.64412 tan(N/2).
func orbitAt(l longitudes) orbit {
	n := rad(math.Remainder(l.n, 360))
	a, b := math.Atan(1.01883*math.Tan(n/2)), math.Atan(0.64412*math.Tan(n/2))
	xi := n - a - b
	return orbit{math.Acos(0.91370 - 0.03569*math.Cos(n)), a - b, xi, rad(l.p) - xi}
}

// node gives the factor f and the shift u in degrees of a family: Schureman, from memory.
func (k family) node(o orbit) (f, u float64) {
	s, c, s2 := math.Sin(o.i), math.Cos(o.i/2), math.Sin(2*o.i)
	switch k {
	case moon2:
		return math.Pow(c, 4) / 0.9154, deg(2*o.xi - 2*o.nu)
	case lunar1:
		return s * c * c / 0.3800, deg(2*o.xi - o.nu)
	case k1:
		return math.Sqrt(0.8965*s2*s2 + 0.6001*s2*math.Cos(o.nu) + 0.1006),
			-deg(math.Atan2(s2*math.Sin(o.nu), s2*math.Cos(o.nu)+0.3347))
	case k2:
		return math.Sqrt(19.0444*math.Pow(s, 4) + 2.7702*s*s*math.Cos(2*o.nu) + 0.0981),
			-deg(math.Atan2(s*s*math.Sin(2*o.nu), s*s*math.Cos(2*o.nu)+0.0727))
	case l2:
		f, u = moon2.node(o)
		x := 6 * math.Pow(math.Tan(o.i/2), 2)
		return f * math.Sqrt(1-2*x*math.Cos(2*o.p)+x*x), u - deg(math.Atan2(x*math.Sin(2*o.p), 1-x*math.Cos(2*o.p)))
	}
	return 1, 0
}

// argument is V0 as multiples: t cycles a day of mean solar time, then s, h, p, p1, and a constant in degrees;
// power is how many times the family's factor comes in.
type argument struct {
	t, s, h, p, p1, add float64
	family              family
	power               int
}

// arguments of M2 to MS4 are those of the National Ocean Service's equilibrium arguments as published with a note
// on tide prediction; the others from memory of Schureman, table 2.
var arguments = map[string]argument{
	"M2": {2, -2, 2, 0, 0, 0, moon2, 1}, "S2": {2, 0, 0, 0, 0, 0, steady, 0}, "N2": {2, -3, 2, 1, 0, 0, moon2, 1},
	"K1": {1, 0, 1, 0, 0, 90, k1, 1}, "O1": {1, -2, 1, 0, 0, -90, lunar1, 1}, "P1": {1, 0, -1, 0, 0, -90, steady, 0},
	"Q1": {1, -3, 1, 1, 0, -90, lunar1, 1}, "K2": {2, 0, 2, 0, 0, 0, k2, 1},
	"M4": {4, -4, 4, 0, 0, 0, moon2, 2}, "MS4": {4, -2, 2, 0, 0, 0, moon2, 1},
	"NU2": {2, -3, 4, -1, 0, 0, moon2, 1}, "MU2": {2, -4, 4, 0, 0, 0, moon2, 1}, "2N2": {2, -4, 2, 2, 0, 0, moon2, 1},
	"L2": {2, -1, 2, -1, 0, 180, l2, 1}, "LAM2": {2, -1, 0, 1, 0, 180, moon2, 1}, "T2": {2, 0, -1, 0, 1, 0, steady, 0},
	"MN4": {4, -5, 4, 1, 0, 0, moon2, 2}, "M6": {6, -6, 6, 0, 0, 0, moon2, 3},
	"S4": {4, 0, 0, 0, 0, 0, steady, 0}, "2MS6": {6, -4, 4, 0, 0, 0, moon2, 2}, "SA": {0, 0, 1, 0, 0, 0,
		steady, 0}, "SSA": {0, 0, 2, 0, 0, 0, steady, 0},
}

// ConstituentNames lists the constituents known here, in alphabetical order.
func ConstituentNames() []string {
	names := make([]string, 0, len(arguments))
	for n := range arguments {
		names = append(names, n)
	}
	sort.Strings(names)
	return names
}

// at gives V0 in degrees at minute m; without the node's u.
func (a argument) at(m float64, l longitudes) float64 {
	return a.t*360*(m/1440-math.Floor(m/1440)) + a.s*l.s + a.h*l.h + a.p*l.p + a.p1*l.p1 + a.add
}

// speed gives the constituent's speed in degrees an hour.
func (a argument) speed() float64 {
	x, y := longitudesAt(0), longitudesAt(1440)
	return (a.t*360 + a.s*(y.s-x.s) + a.h*(y.h-x.h) + a.p*(y.p-x.p) + a.p1*(y.p1-x.p1)) / 24
}

// check refuses constants that cannot be a port's.
func (h Harmonic) check() error {
	if len(h.Constituents) == 0 {
		return advice("give M2 and S2 at least", "%s has no constituents", h.Name)
	}
	if h.Datum == "" {
		return advice("state what the mean level is measured from", "%s has no datum", h.Name)
	}
	if !(math.Abs(h.Mean) <= highest) {
		return advice("give metres above the datum", "%s: mean level %v m is beyond any tide", h.Name, h.Mean)
	}
	seen := map[string]bool{}
	for _, c := range h.Constituents {
		_, ok := arguments[c.Name]
		switch {
		case !ok:
			return advice(fmt.Sprintf("leave it out if it is small; known are %v", ConstituentNames()),
				"%s: constituent %s is not known here", h.Name, short(c.Name))
		case seen[c.Name]:
			return advice("leave one of them out", "%s: constituent %s is there twice", h.Name, c.Name)
		case !(c.Amplitude >= 0 && c.Amplitude <= 10):
			return advice("give metres", "%s: amplitude %v m of %s is not between 0 and 10", h.Name, c.Amplitude, c.Name)
		case !(math.Abs(c.Phase) <= 720):
			return advice("give degrees on Greenwich", "%s: phase %v of %s is not an angle in degrees", h.Name,
				c.Phase, c.Name)
		}
		seen[c.Name] = true
	}
	return nil
}

// Height gives the predicted height at m in metres above the datum. Not for safety.
// Special cases are: constants that Table refuses give NaN.
func (h Harmonic) Height(m Minute) float64 {
	if h.check() != nil {
		return math.NaN()
	}
	return h.height(float64(m))
}

func (h Harmonic) height(m float64) float64 {
	l := longitudesAt(m)
	o := orbitAt(l)
	sum := h.Mean
	for _, c := range h.Constituents {
		a := arguments[c.Name]
		f, u := a.family.node(o)
		f, u = math.Pow(f, float64(a.power)), u*float64(a.power)
		sum += f * c.Amplitude * math.Cos(rad(a.at(m, l)+u-c.Phase))
	}
	return sum
}
