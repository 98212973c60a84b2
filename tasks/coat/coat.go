// Package coat gives the physics of painting steel: film and paint to order, hands-on minutes and
// mixes, drying, cure and recoat by steel temperature, the air that a coat needs, and preparation.
//
// Areas are square metres, films micrometres, volumes litres, temperatures degrees Celsius, times
// minutes, wind metres a second, humidity and losses shares from 0 to 1. Sources stand in every
// figure; what has none is marked as house judgement or from memory and can be changed.
package coat

import (
	"fmt"
	"sort"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// The ways to apply paint.
const (
	Brush    = "brush"
	Roller   = "roller"
	Airless  = "airless"
	AirSpray = "air spray"
)

// The shapes of surface, by how much they slow the work and waste paint.
const (
	Flat     = "flat"     // large flat plates
	Sections = "sections" // beams, frames, stiffened plate
	Lattice  = "lattice"  // open steelwork, handrails, mesh
)

// Recoat is the window for the next coat: the least wait and the longest, each by steel temperature.
type Recoat struct {
	Min Curve // from the finish of this coat to the start of the next
	Max Curve // longest waits as the points' Min; empty is no max
}

// Paint is one paint as its own sheet describes it. Start from Defaults and overwrite what the
// sheet says; a zero Paint is not usable.
type Paint struct {
	Name, Kind         string
	VolumeSolids       float64            // share of the unthinned mix, 0.05 to 1
	DFT                float64            // dry film thickness of one coat, um, 5 to 3000
	PotLife            Curve              // of the mix, by its temperature; empty for one-pack paints
	ApplyMin, ApplyMax float64            // steel temperature between which it may go on, C; no cure below ApplyMin
	RHMax              float64            // greatest relative humidity of the air, share; 0 is none
	RHMin              float64            // least relative humidity at the steel, share; 0 is none (zinc silicate cures with moisture)
	DewSpread          float64            // K that the steel must be above the dew point; 0 is the usual 3 K
	WindMax            map[string]float64 // m/s by method; a method left out takes the default
	NextCoat           map[string]Recoat  // by the name or kind of the coat that follows, "any" for every other
	Never              map[string]string  // kinds that must not follow, with the reason
	TouchDry           Curve              // dust may settle
	HardDry            Curve              // may be walked on, handled, slung and strapped
	SolventGone        Curve              // hot work nearby, after a gas test in closed spaces
	Service            Curve              // full cure
	ImmersionMin       Curve              // before it may go under water
	ImmersionMax       Curve              // and the longest it may wait for it
	DryHours           float64            // hours after application that must stay dry and above ApplyMin
	LimitsUntil        string             // what its limits hold until, one of Untils; empty is "touch dry"
	PackSizes          []float64          // litres of mixed paint in one tin or kit
	MixRatio           [2]float64         // base to hardener by volume; zero for one-pack paints
	Induction          float64            // minutes the mix must stand before use
	Thinner            float64            // share of the paint's volume
	Isocyanate         bool
	Origin             origin.Origin // where the figures come from
	// Sources tells where single figures come from, by name: those of States, "volume solids", "dft",
	// "pot life", "induction", "next coat", "next coat max", "apply", "humidity", "dew spread",
	// "wind", "dry hours" and "limits until". What is not in it comes from Origin.
	Sources map[string]origin.Origin
}

// States lists the names of a film's states in the order in which they come.
func States() []string {
	return []string{"touch dry", "hard dry", "solvent gone", "service", "immersion min", "immersion max"}
}

// State gives the curve of one state by its name in States; false if the paint does not state it.
func (p Paint) State(name string) (Curve, bool) {
	c := map[string]Curve{"touch dry": p.TouchDry, "hard dry": p.HardDry, "solvent gone": p.SolventGone,
		"service": p.Service, "immersion min": p.ImmersionMin, "immersion max": p.ImmersionMax}[word(name)]
	return c, len(c) > 0
}

// Wait gives the minutes until a state at a steady steel temperature, with where they come from;
// "immersion max" gives the longest time allowed. Errors: an unknown state, one that the paint does
// not state, ErrCold below ApplyMin, those of Curve.Time.
func (p Paint) Wait(state string, celsius float64) (minutes float64, figure origin.Figure, err error) {
	c, ok := p.State(state)
	if !ok {
		return 0, figure, fault("give its points by temperature; the states are "+oneOf(States()), "paint %q does not say when it is %q", p.Name, state)
	}
	if word(state) == "immersion max" {
		return c.figure(word(state), celsius, toLive, p.source(word(state)))
	}
	if celsius < p.ApplyMin {
		return 0, figure, p.coldFault(celsius)
	}
	return c.figure(word(state), celsius, toWait, p.source(word(state)))
}

func (p Paint) coldFault(celsius float64) error {
	return &coldFault{quantity.Error{
		Problem: fmt.Sprintf("paint %s does not cure at %s, its own least is %s", called(p), amount(celsius, "C"), amount(p.ApplyMin, "C")),
		Hint:    "keep the steel warm, wait for warmer hours, or take a paint with a winter hardener",
	}}
}

// Next gives the window for coat q over this one: by q's name, else its kind, else "any".
// Errors: a pair that must not be, a pair that the paint does not state.
func (p Paint) Next(q Paint) (Recoat, error) {
	for _, key := range []string{q.Name, q.Kind} {
		for _, k := range sorted(p.Never) {
			if key != "" && kindName(k) == kindName(key) {
				return Recoat{}, fault("ask the paint's maker for a tie coat, or take another paint", "%s must not go over %s: %s", called(q), called(p), p.Never[k])
			}
		}
	}
	for _, key := range []string{q.Name, q.Kind, "any"} {
		for _, k := range sorted(p.NextCoat) {
			if key != "" && kindName(k) == kindName(key) {
				r := p.NextCoat[k]
				if len(r.Max) == 0 { // the points may carry their max beside their min
					r.Max = r.Min.Maxima()
				}
				return r, nil
			}
		}
	}
	return Recoat{}, fault("give `next coat` for this pair: two coats are a pair of their own, even of one kind",
		"%s does not say when %s may follow", called(p), called(q))
}

// Window gives the least and the longest wait in minutes for coat q over this one at a steady steel
// temperature; most has the text "none" where there is no longest wait. Errors: those of Next,
// ErrCold below ApplyMin, those of Curve.Time.
func (p Paint) Window(q Paint, celsius float64) (least, most origin.Figure, err error) {
	r, err := p.Next(q)
	if err != nil {
		return least, most, err
	}
	if celsius < p.ApplyMin {
		return least, most, p.coldFault(celsius)
	}
	if _, least, err = r.Min.figure("least wait", celsius, toWait, p.source("next coat")); err != nil {
		return least, most, err
	}
	from := p.source("next coat max")
	if len(r.Max) == 0 {
		return least, origin.Word("longest wait", "none", from), nil
	}
	_, most, err = r.Max.figure("longest wait", celsius, toLive, from)
	return least, most, err
}

func called(p Paint) string {
	if p.Name != "" {
		return fmt.Sprintf("%q", p.Name)
	}
	return fmt.Sprintf("%q", p.Kind)
}

func sorted[V any](m map[string]V) []string {
	keys := make([]string, 0, len(m))
	for k := range m {
		keys = append(keys, k)
	}
	sort.Strings(keys)
	return keys
}

// From says where one of the paint's figures comes from; names are those of Sources.
func (p Paint) From(name string) origin.Origin { return p.source(name) }

// source says where one of the paint's figures comes from.
func (p Paint) source(name string) origin.Origin {
	if o, ok := p.Sources[name]; ok {
		return o
	}
	if o, ok := p.Sources["next coat"]; ok && name == "next coat max" {
		return o
	}
	return p.Origin
}

// fig makes a figure of one of the paint's own numbers.
func (p Paint) fig(name string, v float64, unit string) origin.Figure {
	return origin.Figure{Name: name, Value: v, Unit: unit, Origin: p.source(name)}
}

// TwoPack says whether the paint is mixed from two parts, so that it has a pot life.
func (p Paint) TwoPack() bool { return p.MixRatio != [2]float64{} }
