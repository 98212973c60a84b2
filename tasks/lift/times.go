package lift

import (
	"math"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Way is a way of moving a load.
type Way uint8

// The ways of moving.
const (
	ByHands Way = iota
	ByChainHoist
	ByLeverHoist
	ByLoaderCrane
	ByGantry // a portable gantry with a hand chain hoist
	ByTrolley
	ByJack
)

var wayNames = [...]string{"hands", "chain hoist", "lever hoist", "loader crane", "gantry", "trolley", "jack"}

// String names the way as the job file writes it.
func (w Way) String() string {
	if int(w) < len(wayNames) {
		return wayNames[w]
	}
	return "unknown"
}

// ParseWay reads a way as String writes it; also "crane" for a loader crane.
func ParseWay(word string) (Way, error) {
	if word == "crane" {
		return ByLoaderCrane, nil
	}
	for i, n := range wayNames {
		if n == word {
			return Way(i), nil
		}
	}
	return 0, fault("ways are hands, chain hoist, lever hoist, loader crane, gantry, trolley and jack; nearest is "+near(word, wayNames[:]),
		"%q is not a way to move a load", word)
}

// Move is one move of a load.
type Move struct {
	Mass   float64 // kg
	Height float64 // mm up or down, 0 or more
	Travel float64 // mm sideways, 0 or more
	By     Way
	People int     // at it, 1 or more; 0 is 2
	Speed  float64 // mm/min of the hoist under load, as its maker says; 0 is worked out
	First  bool    // the first of its kind: rigging, trial and landing take longer
	Site   bool    // away from the shop: talk before the lift, and an area closed off
}

// Estimate is how long one move takes with the people named. Each step is in minutes.
type Estimate struct {
	Rig       quantity.HandsOn // talk, closing off, slings on
	TrialLift quantity.HandsOn // a hand's breadth up, wait, look
	Travel    quantity.HandsOn // up, along and down
	Land      quantity.HandsOn // set down, pack, guide into place
	MakeFast  quantity.HandsOn // bolts, tacks or wedges until it stands by itself
	Unhook    quantity.HandsOn
	HandsOn   quantity.HandsOn // all of them
	Hours     origin.Figure    // HandsOn as a figure, min
}

// handling is what a way of moving takes beside its travel, min, house judgement throughout: no
// published minutes per step are at hand.
type handling struct{ rig, trial, land, fast, unhook float64 }

var handlings = map[Way]handling{
	ByHands:       {0, 0, 1, 5, 0},
	ByChainHoist:  {12, 5, 10, 10, 5},
	ByLeverHoist:  {12, 5, 10, 10, 5},
	ByLoaderCrane: {12, 5, 10, 10, 5},
	ByGantry:      {15, 5, 10, 10, 5},
	ByTrolley:     {5, 0, 5, 5, 3},
	ByJack:        {10, 5, 5, 10, 5},
}

const (
	houseEstimate = "house estimate of minutes a step, recalled from lifting practice; measure your own"
	firstFactor   = 1.5 // low end of 1.5 to 2 for the first lift of a new type
	siteTalk      = 10  // min: talk before the lift and closing off
)

// Times estimates a move.
//
// A hand hoist lifts at what one person keeps up: 75 W at 0.75 efficiency, so speed = 56.25 W over
// the weight, at most 3 m/min; more people relieve each other but do not speed it up.
//
// Errors: no mass, numbers out of range, more people than a load has room for.
func Times(m Move) (Estimate, error) {
	if err := checkAll(check{"the mass to move", m.Mass, tiny, maxMass, "kg"}, check{"the height", m.Height, 0, 1e6, "mm"},
		check{"the travel", m.Travel, 0, maxLength, "mm"}, check{"the people", float64(m.People), 0, 20, "people"},
		optional("the hoist's speed", m.Speed, 1, 1e6, "mm/min")); err != nil {
		return Estimate{}, err
	}
	h, ok := handlings[m.By]
	if !ok {
		return Estimate{}, fault("use hands, chain hoist, lever hoist, loader crane, gantry, trolley or jack", "the way of moving is not a known one")
	}
	first := origin.Figure{Name: "not the first of its kind", Value: 1, Origin: origin.Origin{Kind: origin.Formula, Source: "no allowance"}}
	if m.First {
		first = origin.Recalled("first of its kind", firstFactor, "", "low end of 1.5 to 2, erectors' habit")
	}
	var e Estimate
	e.Hours = origin.Worked("time of the move by "+m.By.String(), 0, "min", "sum of the steps")
	step := func(into *quantity.HandsOn, name string, minutes float64, slow bool, more ...origin.Figure) {
		base := origin.House(name, minutes, "min", houseEstimate)
		if slow && m.First {
			base = origin.Worked(name, minutes*first.Value, "min", "step x first of its kind", base, first)
		}
		if len(more) > 0 {
			more = append([]origin.Figure{base}, more...)
			total := 0.0
			for _, f := range more {
				total += f.Value
			}
			base = origin.Worked(name, total, "min", "sum", more...)
		}
		*into = quantity.HandsOn(base.Value)
		e.HandsOn += *into
		e.Hours.From = append(e.Hours.From, base)
	}
	if m.Site && m.By != ByHands && m.By != ByTrolley {
		step(&e.Rig, "rig", h.rig, true, origin.House("talk before the lift and closing off", siteTalk, "min", houseEstimate))
	} else {
		step(&e.Rig, "rig", h.rig, true)
	}
	step(&e.TrialLift, "trial lift", h.trial, true)
	travel := m.travel()
	e.Travel = quantity.HandsOn(travel.Value)
	e.HandsOn += e.Travel
	e.Hours.From = append(e.Hours.From, travel)
	step(&e.Land, "land", h.land, true)
	step(&e.MakeFast, "make fast", h.fast, true)
	step(&e.Unhook, "unhook", h.unhook, false)
	e.Hours.Value = float64(e.HandsOn)
	return e, nil
}

// travel gives the minutes of going up or down and along.
func (m Move) travel() origin.Figure {
	up, along := m.speeds()
	u := origin.Worked("up or down", m.Height/up.Value, "min", "height / speed", given("height", m.Height, "mm"), up)
	a := origin.Worked("along", m.Travel/along.Value, "min", "travel / speed", given("travel", m.Travel, "mm"), along)
	f := origin.Worked("travel", u.Value+a.Value, "min", "up or down, then along", u, a)
	if m.By == ByJack && m.Height > 0 { // pack as you go
		stops := math.Ceil(m.Height / 50)
		pack := origin.House("packing under the load", 2*stops, "min", "2 min every 50 mm: pack as you go, a jack is never the sole support")
		f.Value += pack.Value
		f.From = append(f.From, pack)
	}
	return f
}

// speeds gives mm/min up and along.
func (m Move) speeds() (up, along origin.Figure) {
	house := func(v float64, note string) origin.Figure { return origin.House("speed", v, "mm/min", note) }
	up, along = m.handHoist(), house(5000, "a hung load pushed along a beam")
	switch m.By {
	case ByHands:
		up, along = house(10000, "lifted by hand"), house(30000, "walking pace with a load")
	case ByLoaderCrane:
		up, along = house(5000, "loader crane, hook up or down"), house(8000, "loader crane, slewing a load on a tag line")
	case ByGantry:
		along = house(3000, "a loaded trolley along a gantry's beam")
	case ByTrolley:
		up, along = house(1000, "a lifting trolley's pump"), house(20000, "a trolley pushed on a hard floor")
	case ByLeverHoist:
		along = house(1000, "moved over from one lever hoist to another")
	case ByJack:
		along = house(500, "on skates, with bars")
	}
	if m.Speed > 0 {
		up = given("speed", m.Speed, "mm/min")
	}
	return up, along
}

// handHoist gives how fast a hand hoist goes up under the load, mm/min.
func (m Move) handHoist() origin.Figure {
	power := origin.House("a person's sustained work", 75, "W", "energy balance; no published speeds of hand hoists are at hand")
	yield := origin.Recalled("efficiency of a hand hoist", 0.75, "", "energy balance")
	limit := origin.House("fastest hauling of a light load", 3000, "mm/min", "chain through the hands")
	v := power.Value * yield.Value / (m.Mass * Gravity) * 60 * 1000
	return origin.Worked("speed of a hand hoist", math.Min(v, limit.Value), "mm/min", "75 W x 0.75 / weight, at most 3 m/min", power, yield, given("mass", m.Mass, "kg"), limit)
}
