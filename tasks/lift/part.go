package lift

import "sailby/tasks/origin"

// Kind is what sort of part a Shape is.
type Kind uint8

// The kinds of part.
const (
	Bar   Kind = iota // a Section by its Length
	Plate             // Length x Width x Thick, or a plate Section
	Bolts             // hexagon bolt, nut and two washers: Thread, Length
	Weld              // weld metal: a stated mass, else a share of the metal
	Paint             // dry film: Area (else all of the surface) x Film
	Item              // bought in: a stated mass
)

// String names the kind.
func (k Kind) String() string {
	if int(k) < len(kindNames) {
		return kindNames[k]
	}
	return "unknown"
}

var kindNames = [...]string{"bar", "plate", "bolt set", "weld metal", "paint", "item"}

// Shape is what a part is, without its length and place.
type Shape struct {
	Kind    Kind
	Section Section // Bar; for Plate in place of Thick (floor plate)
	Width   float64 // mm; Plate, Item
	Thick   float64 // mm; Plate; height of an Item
	Holes   float64 // mm2 cut out of a Plate
	Thread  float64 // mm, nominal; Bolts
	Film    float64 // um dry; Paint; 0 is 300
	Area    float64 // m2 each; Item: its surface to paint; Paint: what it covers, 0 is all
	Volume  float64 // litres each; Item: what it displaces when under water
	Sealed  bool    // a hollow Bar closed at both ends: keeps water out
}

// Known is how a mass is known.
type Known uint8

// How a mass is known; Unsaid is Guessed for a stated mass and Drawn for one worked out here.
const (
	Unsaid Known = iota
	Weighed
	Drawn
	Guessed
)

// String names how the mass is known.
func (k Known) String() string {
	return [...]string{"unsaid", "weighed", "drawn", "guessed"}[min(k, Guessed)]
}

// allowance gives the factor on a mass for what is not known about it. The heavy end of each
// recalled range is used.
func allowance(k Known) origin.Figure {
	const source = "weight contingency as in the ISO 19901-5 family"
	switch k {
	case Weighed:
		return origin.Recalled("weight allowance, weighed", 1.03, "", source)
	case Drawn:
		return origin.Recalled("weight allowance, drawn", 1.10, "", source+", heavy end of 1.05 to 1.10")
	}
	return origin.Recalled("weight allowance, guessed", 1.25, "", source+", heavy end of 1.15 to 1.25")
}

// Part is one kind of piece in an assembly, Count times.
//
// A bar starts at At (centroid of its section) and runs along Along. A plate has its corner at At
// and lies on the positive side of it: Length along Along, Width along Across. A bolt set or item
// has its centre of gravity at At. With Middle, At is the middle of any of them. Weld metal and
// paint lie at the centre of gravity of what they are on.
type Part struct {
	Name   string
	Shape  Shape
	Length float64 // mm; each
	Count  int     // 0 is 1, or the number of Places

	Material string       // as Density takes it; empty is steel
	At       [3]float64   // mm
	Places   [][3]float64 // mm, one for each of Count, in place of At
	Along    [3]float64   // direction of Length; zero is x
	Across   [3]float64   // direction of Width; zero is level, square to Along
	Middle   bool         // At is the middle of the piece

	Stated    float64 // kg each; overrules what is worked out; 0 is not stated
	Known     Known
	Allowance float64 // factor on the mass in place of that of Known, 1 to 3

	Water float64 // litres of water standing in it, each
	Silt  float64 // litres of silt or growth in or on it, each
	Rust  float64 // mm of rust scale over its surface; lost metal is not taken off

	Given origin.Origin // the job file's line
}

// count gives how many there are.
func (p Part) count() int {
	if p.Count == 0 {
		return max(1, len(p.Places))
	}
	return p.Count
}

// at gives the place of the i-th piece.
func (p Part) at(i int) [3]float64 {
	if len(p.Places) > 0 {
		return p.Places[i]
	}
	return p.At
}

// written is a figure that the part's line of the job file gives.
func (p Part) written(name string, v float64, unit string) origin.Figure {
	return origin.Written(name, v, unit, p.Given)
}

// maxCount is beyond any number of equal pieces on a small job.
const maxCount = 100000

// valid checks the part's numbers; every message names the part.
func (p Part) valid() error {
	n := func(s string) string { return s + " of part \"" + p.Name + "\"" }
	list := []check{
		{n("the count"), float64(p.Count), 0, maxCount, "pieces"},
		{n("the length"), p.Length, 0, maxLength, "mm"}, {n("the width"), p.Shape.Width, 0, maxLength, "mm"},
		{n("the thickness"), p.Shape.Thick, 0, maxLength, "mm"}, {n("the holes"), p.Shape.Holes, 0, maxLength * maxLength, "mm2"},
		{n("the thread"), p.Shape.Thread, 0, 200, "mm"}, {n("the film"), p.Shape.Film, 0, 20000, "um"},
		{n("the area"), p.Shape.Area, 0, 1e5, "m2"}, {n("the volume"), p.Shape.Volume, 0, maxMass, "L"},
		{n("the stated mass"), p.Stated, 0, maxMass, "kg"}, {n("the water"), p.Water, 0, maxMass, "L"},
		{n("the silt"), p.Silt, 0, maxMass, "L"}, {n("the rust scale"), p.Rust, 0, 100, "mm"},
		{n("the section's kg/m"), p.Shape.Section.LineMass, 0, 1e5, "kg/m"}, {n("the section's kg/m2"), p.Shape.Section.AreaMass, 0, 1e5, "kg/m2"},
		{n("the section's surface"), p.Shape.Section.Surface, 0, 1e3, "m2/m"}, {n("the section's bore"), p.Shape.Section.Bore, 0, 1e8, "mm2"},
		{n("the section's height"), p.Shape.Section.High, 0, maxLength, "mm"}, {n("the section's width"), p.Shape.Section.Wide, 0, maxLength, "mm"},
	}
	if p.Allowance != 0 {
		list = append(list, check{n("the weight allowance"), p.Allowance, 1, 3, "(factor)"})
	}
	for _, v := range [][3]float64{p.At, p.Along, p.Across} {
		for _, x := range v {
			list = append(list, check{n("the position"), x, -maxLength, maxLength, "mm"})
		}
	}
	for _, at := range p.Places {
		for _, x := range at {
			list = append(list, check{n("the position"), x, -maxLength, maxLength, "mm"})
		}
	}
	if err := checkAll(list...); err != nil {
		return err
	}
	if len(p.Places) > 0 && p.count() != len(p.Places) {
		return fault("give one place for each piece, or one for all", "part %q is there %d times but has %d places", p.Name, p.count(), len(p.Places))
	}
	if p.Known > Guessed {
		return fault("say weighed, drawn or guessed", "part %q: how its mass is known is not one of the known ways", p.Name)
	}
	return nil
}
