package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// Goods is one thing to take. Sizes of 0 take no room on the bed: small things in corners.
type Goods struct {
	Name                  string
	Mass                  float64 // kg
	Length, Width, Height float64 // mm
	Needed                int     // order of use: 1 is wanted first; equal numbers in any order
	Stack                 bool    // lighter things may stand on it
	Fixed                 bool    // not turned on the bed
	Class                 string  // for carriage rules: "acetylene", "paint"; empty is nothing special
	Amount                float64 // in the unit of the carriage rule, for instance litres
}

// Vehicle is a van, truck or trailer. Payload is what its papers say, or Gross less Empty; crew,
// fuel and the tools that always ride in it come off.
type Vehicle struct {
	Name                    string
	Payload                 float64 // kg; 0 is Gross - Empty
	Gross, Empty            float64 // kg
	Crew                    int     // people not counted in Empty, 75 kg each
	Fuel                    float64 // litres not counted in Empty
	Standing                float64 // kg of tools that always ride in it
	Length, Width, Height   float64 // mm of the bed; Height 0 is open above
	Overhang                float64 // mm that a load may stand out behind
	Trips                   int     // how often it can go; 0 is once
	TowedBy                 string  // a trailer: the vehicle that pulls it
	Train                   float64 // kg of both together, on the vehicle that pulls; 0 is not checked
	Axle, Hitch             float64 // mm, a trailer: axle behind the front of the bed, hitch ahead of it; 0 is not checked
	NoseLeast, NoseGreatest float64 // kg on the hitch; 0 is 25 kg and not checked
}

// Stowed is where one of the goods stands; X runs from the headboard to the tail, Y from the left.
type Stowed struct {
	Goods         int     // index in the list given
	X, Y, Z       float64 // mm of its near corner
	Length, Width float64 // mm as it stands, turned or not
	On            int     // index of what it stands on, -1 is the bed
	Loose         bool    // without sizes: anywhere
}

// Trip is one run of one vehicle with what is in it, in the order of loading.
type Trip struct {
	Vehicle int // index in the list given
	Number  int // from 1
	Stowed  []Stowed
	Mass    float64 // kg of goods
	Payload float64 // kg left for goods
	Nose    float64 // kg on the hitch, for a trailer with an axle
}

// LoadPlan says what goes in which vehicle on which trip.
type LoadPlan struct {
	OK       bool
	Trips    []Trip // those with goods, by number, then by vehicle
	OneTrip  Result // all goods in one trip of every vehicle, by mass
	Reason   string
	Nearest  string // where it does not fit: what would
	Proved   bool   // where it does not fit: no split can; else none was found
	Figure   origin.Figure
	Warnings []string
}

const personMass = 75 // kg with clothes and bag

// forGoods gives the payload left for goods, kg.
func (v Vehicle) forGoods() origin.Figure {
	pay := given("payload of "+v.Name, v.Payload, "kg")
	if v.Payload == 0 {
		pay = origin.Worked("payload of "+v.Name, v.Gross-v.Empty, "kg", "gross - empty", given("gross", v.Gross, "kg"), given("empty", v.Empty, "kg"))
	}
	person := origin.Recalled("a person", personMass, "kg", "usual figure in vehicle papers")
	fuel := origin.Recalled("a litre of fuel", 0.84, "kg", "diesel")
	left := pay.Value - float64(v.Crew)*person.Value - v.Fuel*fuel.Value - v.Standing
	return origin.Worked("left for goods in "+v.Name, left, "kg", "payload - crew - fuel - standing tools", pay,
		given("crew", float64(v.Crew), "people"), person, given("fuel", v.Fuel, "L"), fuel, given("standing tools", v.Standing, "kg"))
}

func (v Vehicle) trips() int { return max(1, v.Trips) }

// maxGoods and maxTrips bound the search.
const (
	maxGoods = 400
	maxTrips = 20
)

// LoadVehicles finds what goes in which vehicle on which trip: within payload and train weight, on
// the bed, each thing reachable when it is wanted, with as few trips as it finds. The plan is
// checked afresh before it is given.
//
// The search is branch and bound over the goods, largest share first, for ever more trips; its
// steps are counted, so equal input gives an equal plan. That no plan was found is Proved only
// where mass or size alone forbid it.
//
// Errors: no goods, no vehicle, numbers out of range, a trailer whose puller is not listed.
func LoadVehicles(goods []Goods, vehicles []Vehicle) (LoadPlan, error) {
	if err := validLoads(goods, vehicles); err != nil {
		return LoadPlan{}, err
	}
	total := origin.Worked("all goods", 0, "kg", "sum")
	for _, g := range goods {
		total.Value += g.Mass
		total.From = append(total.From, given(g.Name, g.Mass, "kg"))
	}
	room := origin.Worked("left for goods in one trip", 0, "kg", "sum of the vehicles")
	for _, v := range vehicles {
		p := v.forGoods()
		room.Value += math.Max(0, p.Value)
		room.From = append(room.From, p)
	}
	plan := LoadPlan{OneTrip: worst(judge{"all goods in one trip", total, room}), Figure: total}
	if why := noBed(goods, vehicles); why != "" {
		plan.Reason, plan.Proved, plan.Nearest = why, true, "a longer bed, an overhang that is allowed, or the piece in two"
		return plan, nil
	}
	s := newStowing(goods, vehicles)
	for k := 1; k <= len(s.slots); k++ {
		if trips, ok := s.solve(k); ok {
			plan.OK, plan.Trips = true, trips
			plan.Reason = plan.describe(goods, vehicles)
			plan.Warnings = s.warn(trips)
			if faults := CheckLoads(goods, vehicles, trips); len(faults) > 0 {
				return LoadPlan{}, fault("load it by hand and report the list", "the load plan did not pass its check: %s", faults[0])
			}
			return plan, nil
		}
	}
	plan.refuse(goods, vehicles)
	return plan, nil
}

// validLoads checks all numbers.
func validLoads(goods []Goods, vehicles []Vehicle) error {
	if len(goods) == 0 || len(vehicles) == 0 {
		return fault("list what to take and what it goes in", "%d things for %d vehicles", len(goods), len(vehicles))
	}
	if len(goods) > maxGoods {
		return fault("box small things together", "%d things are more than the %d that are stowed one by one", len(goods), maxGoods)
	}
	for _, g := range goods {
		n := " of \"" + g.Name + "\""
		if err := checkAll(check{"the mass" + n, g.Mass, 0, maxMass, "kg"}, check{"the length" + n, g.Length, 0, 1e5, "mm"},
			check{"the width" + n, g.Width, 0, 1e5, "mm"}, check{"the height" + n, g.Height, 0, 1e5, "mm"}, check{"the amount" + n, g.Amount, 0, 1e6, ""}); err != nil {
			return err
		}
	}
	names := map[string]bool{}
	for _, v := range vehicles {
		n := " of \"" + v.Name + "\""
		if err := checkAll(check{"the payload" + n, v.Payload, 0, maxMass, "kg"}, check{"the gross mass" + n, v.Gross, 0, maxMass, "kg"},
			check{"the empty mass" + n, v.Empty, 0, maxMass, "kg"}, check{"the crew" + n, float64(v.Crew), 0, 50, "people"}, check{"the fuel" + n, v.Fuel, 0, 5000, "L"},
			check{"the standing tools" + n, v.Standing, 0, maxMass, "kg"}, check{"the bed's length" + n, v.Length, 1, 1e5, "mm"}, check{"the bed's width" + n, v.Width, 1, 1e5, "mm"},
			check{"the bed's height" + n, v.Height, 0, 1e5, "mm"}, check{"the overhang" + n, v.Overhang, 0, 1e4, "mm"}, check{"the trips" + n, float64(v.Trips), 0, maxTrips, ""},
			check{"the train weight" + n, v.Train, 0, maxMass, "kg"}, optional("the axle"+n, v.Axle, 1, 1e5, "mm"), check{"the hitch" + n, v.Hitch, 0, 1e5, "mm"},
			check{"the least nose weight" + n, v.NoseLeast, 0, maxMass, "kg"}, check{"the greatest nose weight" + n, v.NoseGreatest, 0, maxMass, "kg"}); err != nil {
			return err
		}
		if v.Payload == 0 && v.Gross <= v.Empty {
			return fault("read payload, or gross and empty mass, from its papers or a weighbridge", "%q has no payload", v.Name)
		}
		if names[v.Name] {
			return fault("give each vehicle a name of its own, and its number of trips", "two vehicles are named %q", v.Name)
		}
		names[v.Name] = true
	}
	towed := map[string]bool{}
	for _, v := range vehicles {
		towed[v.Name] = v.TowedBy != ""
	}
	for _, v := range vehicles {
		if v.TowedBy != "" && towed[v.TowedBy] && v.TowedBy != v.Name {
			return fault("name the vehicle in front", "the trailer %q is pulled by the trailer %q", v.Name, v.TowedBy)
		}
		if v.TowedBy != "" && !names[v.TowedBy] {
			return fault("list the vehicle that pulls it", "the trailer %q is pulled by %q, which is not listed", v.Name, v.TowedBy)
		}
		if v.TowedBy == v.Name && v.Name != "" {
			return fault("name the vehicle in front of it", "%q pulls itself", v.Name)
		}
	}
	return nil
}

// noBed says which of the goods goes on no vehicle at all, by its own mass and size.
func noBed(goods []Goods, vehicles []Vehicle) string {
	for _, g := range goods {
		ok := false
		for _, v := range vehicles {
			ok = ok || g.Mass <= v.forGoods().Value*(1+rounding) && v.takes(g)
		}
		if !ok {
			return fmt.Sprintf("%q (%s kg, %s x %s x %s mm) goes on no vehicle by itself", g.Name, origin.Trim(g.Mass), num(g.Length), num(g.Width), num(g.Height))
		}
	}
	return ""
}

// takes says whether the bed, empty, has room for g.
func (v Vehicle) takes(g Goods) bool {
	if v.Height > 0 && g.Height > v.Height {
		return false
	}
	if g.Length <= v.Length+v.Overhang && g.Width <= v.Width {
		return true
	}
	return !g.Fixed && g.Width <= v.Length+v.Overhang && g.Length <= v.Width
}
