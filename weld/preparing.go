package weld

import (
	"strings"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Activity is a preparing or finishing job with its house rate. No published rate was found for
// any of them: all are house judgement, to be replaced by the crew's own.
type Activity struct {
	Name string
	Rate float64 // in Unit
	Unit string  // "m/h", "kg/h" or "min each"
	Note string
	by   float64 // mm of thickness at which Rate holds and beyond which it falls with its square; 0: it does not
}

var activities = []Activity{
	{"bevel by disc", 1.5, "m/h", "an edge of 10 mm, 1 to 2 m/h; with the square of the thickness", 10},
	{"bevel by machine", 40, "m/h", "portable beveller, one pass, 20 to 60 m/h", 0},
	{"dress flush", 3, "m/h", "butt ground flush, 2 to 4 m/h", 0},
	{"remove mill scale", 15, "m/h", "a strip 50 mm wide, 10 to 20 m/h", 0},
	{"back-gouge", 3, "m/h", "gouge and grind clean, all in, 2 to 4 m/h", 0},
	{"gouge out", 3, "m/h", "air carbon-arc or disc, 8 mm deep, with grinding", 8},
	{"grind away", 2, "kg/h", "230 mm disc 2 to 4 kg/h, 125 mm 1 to 1.5 kg/h", 0},
	{"drill", 5, "min each", "magnetic drill through 10 mm, set and moved; in proportion to thickness beyond", 0},
	{"tack", 0.75, "min each", "25 to 50 mm long, 0.5 to 1 min each", 0},
}

// Activities lists the preparing jobs with their rates.
func Activities() []Activity { return append([]Activity(nil), activities...) }

// IsActivity says whether the word is a preparing job.
func IsActivity(word string) bool {
	for _, a := range activities {
		if a.Name == plainName(word) {
			return true
		}
	}
	return false
}

// Prepare gives the hands-on time of an amount (metres, kilograms or pieces, as the activity's
// unit says) of an activity at a thickness in mm (0: does not matter). rate overrides the house's
// where it is above zero.
//
// Errors: a *Error for an unknown activity or an amount that is no number above zero.
func Prepare(activity string, amount, thickness, rate float64) (Labour, error) {
	var a Activity
	names := make([]string, len(activities))
	for i, x := range activities {
		names[i] = x.Name
		if x.Name == plainName(activity) {
			a = x
		}
	}
	if a.Name == "" {
		return Labour{}, fault("activity", "one of: "+strings.Join(names, ", "), "no activity %q", activity)
	}
	if err := first(within("amount", amount, 1e-6, 1e6, ""), optional("thickness", thickness, 0.5, maxThick, "mm"), optional("rate", rate, 0.001, 1e4, a.Unit)); err != nil {
		return Labour{}, err
	}
	r := origin.House("rate", a.Rate, a.Unit, a.Name+": "+a.Note)
	slow := 1.0
	switch {
	case rate > 0:
		r = origin.Written("rate", rate, a.Unit, origin.Origin{})
	case a.by > 0 && thickness > a.by:
		slow = thickness * thickness / (a.by * a.by)
	case a.Name == "drill" && thickness > 10:
		slow = thickness / 10
	}
	n := origin.Written("amount", amount, "", origin.Origin{})
	s := origin.House("thickness factor", slow, "", "how much slower at this thickness")
	m, how := amount/r.Value*60*slow, "amount / rate x 60 x thickness factor"
	if a.Unit == "min each" {
		m, how = amount*r.Value*slow, "amount x rate x thickness factor"
	}
	f := origin.Worked("hands-on time", m, "min", how, n, r, s)
	return Labour{HandsOn: quantity.HandsOn(m), Hours: f, Consumables: a.uses(amount, f)}, nil
}

// What preparing uses up (house judgement).
const (
	discHour  = 60.0 // min of grinding that a 125 mm disc lasts
	holesEach = 50.0 // holes that a cutter lasts
	gougeDisc = 4.0  // m of gouge that a disc grinds clean
)

// uses lists what an amount of the activity uses up.
func (a Activity) uses(amount float64, time origin.Figure) []Consumable {
	const discs = "grinding discs 125 mm"
	piece := func(name string, n float64, note string, from ...origin.Figure) []Consumable {
		f := origin.House(name, n, "", note)
		f.From = from
		return []Consumable{{Name: name, Amount: n, Unit: "pieces", Spare: n * SpareShare, Why: f}}
	}
	switch a.Name {
	case "bevel by disc", "dress flush", "remove mill scale", "grind away":
		return piece(discs, time.Value/discHour, "one for an hour of grinding", time)
	case "back-gouge", "gouge out":
		return piece(discs, amount/gougeDisc, "one for 4 m of gouge ground clean")
	case "drill":
		return piece("cutters for the magnetic drill", amount/holesEach, "one for 50 holes")
	}
	return nil
}

func plainName(s string) string { return strings.ToLower(strings.Join(strings.Fields(s), " ")) }

// Carbon is an air carbon-arc electrode: what it draws and the groove it cuts (a maker's
// handbook). The speed of gouging was not found in print.
type Carbon struct {
	Diameter               float64 // mm
	MinCurrent, MaxCurrent float64 // A
	MinWidth, MaxWidth     float64 // mm of the groove
	MinDepth, MaxDepth     float64
}

var carbons = []Carbon{
	{6.5, 200, 250, 9, 11, 4, 6},
	{8.0, 250, 350, 11, 13, 6, 9},
	{9.5, 350, 450, 13, 15, 8, 12},
	{12.7, 800, 900, 15, 19, 10, 16},
}

const carbonMetres = 1.0 // m of groove that a carbon of 305 mm lasts (house judgement)

// Carbons gives the carbons for a groove of a length in mm, with spares.
func (c Carbon) Carbons(length float64) Consumable {
	name := "gouging carbons " + origin.Trim(c.Diameter) + " mm"
	n := length / 1000 / carbonMetres
	return Consumable{Name: name, Amount: n, Unit: "pieces", Spare: n * SpareShare, Why: origin.House(name, n, "", "one for a metre of groove")}
}

// GougeWith gives the smallest carbon that cuts a groove of a depth in mm in one pass; ok is
// false where none does.
func GougeWith(depth float64) (c Carbon, ok bool) {
	for _, c := range carbons {
		if depth > 0 && depth <= c.MaxDepth {
			return c, true
		}
	}
	return Carbon{}, false
}
