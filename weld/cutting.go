package weld

import (
	"fmt"
	"math"
	"sort"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Labour is what a piece of work beside welding takes: cutting, preparing, testing.
type Labour struct {
	HandsOn  quantity.HandsOn
	Standing quantity.Clock // clock time that must pass: dwell, pressure held
	Warnings []string
	Hours    origin.Figure // the tree of HandsOn
	Wait     origin.Figure // the tree of Standing; no name where nothing is waited for

	Consumables []Consumable // what it uses up, spares included
}

// Cut is a cut through plate or section.
type Cut struct {
	Method    string    // "plasma", "oxy-fuel" or "disc"
	Thickness float64   // mm
	Length    float64   // mm in all
	Bevel     float64   // deg off square; the torch goes through the longer way
	Pierces   int       // starts inside the plate
	Current   float64   // A of a plasma set; default 40
	Speed     float64   // mm/min, given
	Table     *CutTable // the house's own speeds, in place of those here
	Site      bool
	Origin    origin.Origin
}

// plasma40 is a 40 A hand air plasma set in carbon steel, speeds for a clean cut and the most
// the set does, mm/min (a maker's manual; order of the columns inferred).
var plasma40 = []struct{ thick, most, clean float64 }{
	{3, 4000, 3150}, {4, 2500, 1900}, {6, 1400, 1050}, {8, 950, 650}, {10, 560, 390},
	{12, 450, 310}, {15, 280, 180}, {20, 110, 70}, {25, 60, 50},
}

// oxyFuel is hand cutting, low ends of the ranges, mm/min (from memory: AWS Welding Handbook).
var oxyFuel = []struct{ thick, speed float64 }{
	{6, 400}, {10, 380}, {12, 300}, {20, 300}, {25, 230}, {38, 150}, {50, 150}, {75, 100}, {100, 100},
}

const (
	handCut   = 254.0 // mm/min: the speed at which hand plasma sets are rated (10 in/min)
	discArea  = 600.0 // mm2 of cut face a minute with a 125 or 230 mm disc (house judgement)
	discThick = 30.0  // mm that a 230 mm disc reaches with care (house judgement)
	pierceMin = 0.33  // min: 5 to 30 s each (from memory)
)

// speed gives the cutting speed in mm/min as a figure.
//
// Errors: a *Error for an unknown method, and for plate that the set or torch does not cut: a
// 40 A plasma set ends at 25 mm (and is slow above about 12), larger sets in proportion to
// their current.
func (c Cut) speed() (origin.Figure, []string, error) {
	err := first(within("thickness", c.Thickness, 0.5, 300, "mm"), optional("bevel", c.Bevel, 0, 70, "deg"),
		optional("current", c.Current, 15, 400, "A"), optional("speed", c.Speed, 5, 20000, "mm/min"))
	if err != nil {
		return origin.Figure{}, nil, err
	}
	way := c.Thickness / math.Cos(c.Bevel*math.Pi/180)
	through := origin.Worked("way through", way, "mm", "thickness / cos(bevel)", origin.Written("thickness", c.Thickness, "mm", c.Origin), origin.Written("bevel", c.Bevel, "deg", c.Origin))
	if c.Table != nil {
		f, err := c.Table.speed(through)
		return c.given(f), nil, err
	}
	switch c.Method {
	case "plasma":
		return c.plasma(through)
	case "oxy-fuel":
		if way > 100 {
			return origin.Figure{}, nil, fault("thickness", "give the speed of your own torch, or cut by other means", "oxy-fuel speeds here end at 100 mm, the cut goes through %.4g mm", way)
		}
		f := origin.Recalled("cutting speed", between(way, len(oxyFuel), func(i int) (float64, float64) { return oxyFuel[i].thick, oxyFuel[i].speed }), "mm/min", "hand oxy-fuel cutting, low end, AWS Welding Handbook")
		f.From = []origin.Figure{through}
		return c.given(f), nil, nil
	case "disc":
		if way > discThick {
			return origin.Figure{}, nil, fault("thickness", "use plasma or oxy-fuel", "a disc cuts to about %.0f mm, the cut goes through %.4g mm", discThick, way)
		}
		f := origin.House("cutting speed", discArea/way, "mm/min", "600 mm2 of cut face a minute by disc")
		f.From = []origin.Figure{through}
		return c.given(f), nil, nil
	}
	return origin.Figure{}, nil, fault("by", "plasma, oxy-fuel or disc", "no cutting method %q", c.Method)
}

func (c Cut) given(f origin.Figure) origin.Figure {
	if c.Speed > 0 {
		return origin.Written("cutting speed", c.Speed, "mm/min", c.Origin)
	}
	return f
}

func (c Cut) plasma(through origin.Figure) (origin.Figure, []string, error) {
	amps := c.Current
	if amps == 0 {
		amps = 40
	}
	alike := through.Value * 40 / amps // thickness that a 40 A set cuts alike (house judgement)
	last := plasma40[len(plasma40)-1]
	if alike > last.thick {
		return origin.Figure{}, nil, fault("thickness", "use oxy-fuel, or a larger set", "a plasma set of %.0f A cuts to %.0f mm, the cut goes through %.4g mm", amps, last.thick*amps/40, through.Value)
	}
	v := between(alike, len(plasma40), func(i int) (float64, float64) { return plasma40[i].thick, plasma40[i].clean })
	f := origin.Published("cutting speed", v, "mm/min", "40 A hand air plasma, clean cut, maker's manual (columns in inferred order)")
	if amps != 40 {
		f.Origin = origin.Origin{Kind: origin.Judgement, Source: fmt.Sprintf("as a 40 A set cuts %.3g mm: thickness in proportion to current", alike)}
	}
	f.From = []origin.Figure{through}
	var warn []string
	if v < handCut {
		warn = append(warn, fmt.Sprintf("%.4g mm is more than the plasma set is rated for by hand (%.0f mm/min): expect a rough edge at %.0f mm/min", through.Value, handCut, v))
	}
	return c.given(f), warn, nil
}

// between reads a table by thickness: straight between rows, the end rows beyond them.
func between(x float64, n int, row func(int) (float64, float64)) float64 {
	i := sort.Search(n, func(i int) bool { t, _ := row(i); return t >= x })
	if i == 0 {
		_, v := row(0)
		return v
	}
	if i == n {
		_, v := row(n - 1)
		return v
	}
	t0, v0 := row(i - 1)
	t1, v1 := row(i)
	return v0 + (v1-v0)*(x-t0)/(t1-t0)
}

// Work gives the hands-on time of a cut: cutting and piercing over the share of the time that
// the torch burns (marking, guides, dross and moving are the rest; house judgement 0.3 on site,
// 0.4 in the shop).
//
// Errors: see the method's limits; a *Error with a way out.
func (c Cut) Work() (Labour, error) {
	v, warn, err := c.speed()
	if err == nil {
		err = first(within("length", c.Length, 0.1, maxLength, "mm"), within("pierces", float64(c.Pierces), 0, 1e5, ""))
	}
	if err != nil {
		return Labour{}, err
	}
	share := origin.House("cutting share", bySite(c.Site, 0.3, 0.4), "", "cutting over hands-on time; marking, guides, dross and moving are the rest")
	each := origin.Recalled("piercing", pierceMin, "min", "5 to 30 s each")
	if t := c.Table; t != nil {
		share, each = t.or("cutting share", t.Share, share), t.or("piercing", t.Pierce, each)
	}
	length := origin.Written("length", c.Length, "mm", c.Origin)
	pierces := origin.Written("pierces", float64(c.Pierces), "", c.Origin)
	burning := origin.Worked("cutting time", c.Length/v.Value+float64(c.Pierces)*each.Value, "min", "length / cutting speed + pierces x piercing", length, v, pierces, each)
	m := burning.Value / share.Value
	f := origin.Worked("hands-on time", m, "min", "cutting time / cutting share", burning, share)
	return Labour{HandsOn: quantity.HandsOn(m), Warnings: warn, Hours: f, Consumables: c.uses(burning)}, nil
}
