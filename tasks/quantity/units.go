package quantity

import "strings"

type unit struct {
	name  string
	scale float64 // base = value*scale + shift
	shift float64
}

var units = map[Dim][]unit{
	Length:       {{"mm", 1, 0}, {"cm", 10, 0}, {"m", 1000, 0}, {"km", 1e6, 0}, {"in", 25.4, 0}, {"ft", 304.8, 0}},
	Mass:         {{"kg", 1, 0}, {"g", 0.001, 0}, {"t", 1000, 0}, {"lb", 0.45359237, 0}},
	Time:         {{"min", 1, 0}, {"h", 60, 0}, {"d", 1440, 0}, {"s", 1.0 / 60, 0}, {"days", 1440, 0}, {"day", 1440, 0}, {"hours", 60, 0}, {"hour", 60, 0}, {"minutes", 1, 0}},
	Temperature:  {{"C", 1, 0}, {"°C", 1, 0}, {"F", 5.0 / 9, -160.0 / 9}, {"°F", 5.0 / 9, -160.0 / 9}},
	Area:         {{"m2", 1, 0}, {"m²", 1, 0}, {"mm2", 1e-6, 0}, {"cm2", 1e-4, 0}, {"ft2", 0.09290304, 0}},
	Volume:       {{"L", 1, 0}, {"l", 1, 0}, {"ml", 0.001, 0}, {"m3", 1000, 0}, {"US gal", 3.785411784, 0}},
	Percent:      {{"%", 0.01, 0}},
	Film:         {{"um", 1, 0}, {"µm", 1, 0}, {"μm", 1, 0}, {"mm", 1000, 0}, {"mil", 25.4, 0}},
	Current:      {{"A", 1, 0}},
	Voltage:      {{"V", 1, 0}},
	Power:        {{"kVA", 1, 0}, {"VA", 0.001, 0}},
	Travel:       {{"mm/min", 1, 0}, {"mm/s", 60, 0}, {"cm/min", 10, 0}, {"m/min", 1000, 0}, {"m/h", 1000.0 / 60, 0}, {"in/min", 25.4, 0}},
	Feed:         {{"m/min", 1, 0}, {"mm/s", 0.06, 0}, {"in/min", 0.0254, 0}},
	Deposition:   {{"kg/h", 1, 0}, {"lb/h", 0.45359237, 0}},
	Coverage:     {{"m2/h", 1, 0}, {"m²/h", 1, 0}, {"ft2/h", 0.09290304, 0}},
	Spreading:    {{"m2/L", 1, 0}, {"m²/L", 1, 0}, {"m2/l", 1, 0}},
	Speed:        {{"m/s", 1, 0}, {"km/h", 1 / 3.6, 0}, {"mph", 0.44704, 0}, {"kn", 1852.0 / 3600, 0}},
	Angle:        {{"deg", 1, 0}, {"°", 1, 0}},
	Flow:         {{"L/min", 1, 0}, {"l/min", 1, 0}, {"cfh", 28.316846592 / 60, 0}},
	Pressure:     {{"bar", 1, 0}, {"kPa", 0.01, 0}, {"hPa", 0.001, 0}, {"psi", 0.0689475729, 0}},
	HeatInput:    {{"kJ/mm", 1, 0}, {"kJ/in", 1 / 25.4, 0}},
	Force:        {{"N", 1, 0}, {"kN", 1000, 0}, {"daN", 10, 0}},
	Density:      {{"kg/m3", 1, 0}, {"g/cm3", 1000, 0}, {"kg/L", 1000, 0}},
	LineMass:     {{"kg/m", 1, 0}, {"lb/ft", 1.48816394, 0}},
	Pace:         {{"min/m", 1, 0}, {"min/ft", 1 / 0.3048, 0}, {"s/m", 1.0 / 60, 0}},
	Hydrogen:     {{"ml/100 g", 1, 0}, {"ml/100g", 1, 0}},
	Section:      {{"mm2", 1, 0}, {"mm²", 1, 0}},
	SecondMoment: {{"cm4", 1e4, 0}, {"mm4", 1, 0}, {"cm⁴", 1e4, 0}, {"mm⁴", 1, 0}},
	Stress:       {{"N/mm2", 1, 0}, {"N/mm²", 1, 0}, {"MPa", 1, 0}, {"ksi", 6.894757293, 0}},
}

var dimNames = map[Dim]string{
	Number: "a plain number", Length: "a length", Mass: "a mass", Time: "a time", Temperature: "a temperature",
	Area: "an area", Volume: "a volume", Percent: "a share", Film: "a film thickness", Current: "a current",
	Voltage: "a voltage", Power: "a power", Travel: "a travel speed", Feed: "a wire feed speed",
	Deposition: "a deposition rate", Coverage: "an area rate", Spreading: "a spreading rate", Speed: "a speed",
	Angle: "an angle", Flow: "a gas flow", Pressure: "a pressure", HeatInput: "a heat input", Force: "a force",
	Density: "a density", LineMass: "a mass per length",
	Pace: "a time per length", Hydrogen: "a hydrogen content", Section: "a cross-section", Stress: "a strength", SecondMoment: "a second moment of area",
}

// String names the dimension with its article, as error messages use it: "a length".
func (d Dim) String() string { return dimNames[d] }

// Base names the unit that amounts of d are kept in; empty for Number.
func (d Dim) Base() string {
	if d == Percent {
		return "%"
	}
	if u := units[d]; len(u) > 0 {
		return u[0].name
	}
	return ""
}

// UnitList names the units that d may be written in, most usual first: "mm, cm, m, in or ft".
func (d Dim) UnitList() string {
	var names []string
	for _, u := range units[d] {
		if strings.ContainsAny(u.name, "°²µμ") || u.name == "l" || strings.HasPrefix(u.name, "l/") ||
			strings.HasSuffix(u.name, "/l") || u.name == "day" || u.name == "days" || u.name == "hour" ||
			u.name == "hours" || u.name == "minutes" {
			continue
		}
		names = append(names, u.name)
	}
	if len(names) < 2 {
		return strings.Join(names, "")
	}
	return strings.Join(names[:len(names)-1], ", ") + " or " + names[len(names)-1]
}

// Units lists every spelling of the units that d may be written in.
func (d Dim) Units() []string {
	var names []string
	for _, u := range units[d] {
		names = append(names, u.name)
	}
	return names
}

// otherWords are what people write for a unit.
var otherWords = map[string]string{
	"hr": "h", "hrs": "h", "mins": "min", "minute": "min", "sec": "s", "metre": "m", "metres": "m", "meter": "m", "meters": "m",
	"kgs": "kg", "kilo": "kg", "kilos": "kg", "ton": "t", "tons": "t", "tonne": "t", "tonnes": "t", "inch": "in", "inches": "in",
	"\"": "in", "'": "ft", "feet": "ft", "foot": "ft", "lbs": "lb", "micron": "um", "microns": "um", "percent": "%", "amp": "A", "amps": "A",
	"volts": "V", "kW": "kVA", "sqm": "m2", "sq m": "m2", "m^2": "m2", "litres": "L", "litre": "L", "degC": "C", "deg C": "C", "knots": "kn",
	"degrees": "deg",
}

// likeUnit gives the unit of d that word is likely meant to be.
func likeUnit(word string, d Dim) (string, bool) {
	if u, ok := otherWords[word]; ok {
		for _, x := range units[d] {
			if x.name == u {
				return u, true
			}
		}
	}
	for _, x := range units[d] {
		if strings.EqualFold(x.name, word) {
			return x.name, true
		}
	}
	return "", false
}
