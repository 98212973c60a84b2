package main

import (
	"fmt"
	"math"
	"strings"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
	"sailby/weld"
)

// jointInput is a joint as the flags give it.
type jointInput struct {
	seam weld.Seam
	proc weld.Procedure
	c    weld.Circumstances

	chart float64 // C read from method A's chart; 0 is none read
}

// jointAmount is one flag that takes an amount.
type jointAmount struct {
	name  string
	dim   quantity.Dim
	to    func(*jointInput) *float64
	says  string
	field string  // the word for it in errors and origins where it is not the flag's name with blanks
	none  bool    // the word none is taken
	scale float64 // what the base unit is multiplied by; 0 is 1
}

var jointAmounts = []jointAmount{
	{name: "length", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.Length }, says: "of the seam, or of all (default: once round a tube)"},
	{name: "leg", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.Leg }, says: "fillet: leg length z"},
	{name: "second-leg", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.Leg2 }, says: "the other leg of an unequal fillet"},
	{name: "throat", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.Throat }, says: "fillet: throat a, in place of the leg"},
	{name: "thickness", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.Thickness }, says: "of the thinner part"},
	{name: "second-thickness", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.Thickness2 }, says: "of the other part"},
	{name: "root-gap", dim: quantity.Length, none: true, to: func(i *jointInput) *float64 { return &i.seam.Joint.RootGap }, says: "gap between the edges, or none"},
	{name: "root-face", dim: quantity.Length, none: true, to: func(i *jointInput) *float64 { return &i.seam.Joint.RootFace }, says: "blunt part of the edge, or none"},
	{name: "angle", dim: quantity.Angle, to: func(i *jointInput) *float64 { return &i.seam.Joint.Angle }, says: "included angle of the preparation (default: by position)"},
	{name: "second-angle", dim: quantity.Angle, to: func(i *jointInput) *float64 { return &i.seam.Joint.Angle2 }, says: "of the second side"},
	{name: "radius", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.Radius }, says: "of a U or J"},
	{name: "first-depth", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.FirstDepth }, says: "preparation of the first side of a double joint (default: half)"},
	{name: "depth", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.PartialDepth }, says: "of a weld of partial penetration"},
	{name: "cap", dim: quantity.Length, none: true, to: func(i *jointInput) *float64 { return &i.seam.Joint.Cap }, says: "height above flush, or none"},
	{name: "gap", dim: quantity.Length, none: true, to: func(i *jointInput) *float64 { return &i.seam.Joint.Gap }, says: "fit-up gap beyond the drawing"},
	{name: "bead", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.Bead }, says: "intermittent: each weld; slot: its length"},
	{name: "pitch", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.Pitch }, says: "intermittent: start to start"},
	{name: "diameter", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.Diameter }, says: "outside diameter of a tube, a plug's hole, a slot's width"},
	{name: "onto", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.seam.Joint.Onto }, says: "branch: outside diameter of the tube that the one of --diameter stands on, square"},
	{name: "access", dim: quantity.Number, to: func(i *jointInput) *float64 { return &i.seam.Access }, says: "hands-on time times this where access is bad: 1 to 10"},

	{name: "wire", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.proc.WireDiameter }, says: "wire diameter"},
	{name: "electrode", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.proc.ElectrodeDiameter }, says: "electrode diameter"},
	{name: "electrode-length", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.proc.ElectrodeLength }, says: "length of an electrode"},
	{name: "stub", dim: quantity.Length, to: func(i *jointInput) *float64 { return &i.proc.StubLength }, says: "what is thrown away of an electrode"},
	{name: "current", dim: quantity.Current, to: func(i *jointInput) *float64 { return &i.proc.Current }, says: "current"},
	{name: "volts", dim: quantity.Voltage, to: func(i *jointInput) *float64 { return &i.proc.Volts }, says: "arc voltage"},
	{name: "travel", dim: quantity.Travel, to: func(i *jointInput) *float64 { return &i.proc.Travel }, says: "travel speed"},
	{name: "wire-feed", dim: quantity.Feed, to: func(i *jointInput) *float64 { return &i.proc.WireFeed }, says: "wire feed speed"},
	{name: "deposition", dim: quantity.Deposition, to: func(i *jointInput) *float64 { return &i.proc.Deposition }, says: "metal laid while the arc burns"},
	{name: "efficiency", dim: quantity.Percent, to: func(i *jointInput) *float64 { return &i.proc.Efficiency }, says: "metal laid over metal bought"},
	{name: "operating-factor", dim: quantity.Percent, to: func(i *jointInput) *float64 { return &i.proc.OperatingFactor }, says: "arc time over hands-on welding time"},
	{name: "heat-efficiency", dim: quantity.Number, to: func(i *jointInput) *float64 { return &i.proc.HeatEfficiency }, says: "k of EN 1011-1"},
	{name: "bead-area", dim: quantity.Area, scale: 1e6, to: func(i *jointInput) *float64 { return &i.proc.BeadArea }, says: "cross-section that one run lays"},
	{name: "preheat", dim: quantity.Temperature, none: true, to: func(i *jointInput) *float64 { return &i.proc.Preheat }, says: "least temperature before welding, or none"},
	{name: "chart-preheat", dim: quantity.Temperature, none: true, field: "chart preheat", to: func(i *jointInput) *float64 { return &i.chart }, says: "what you read for this joint from the chart of EN 1011-2 method A, or none"},
	{name: "interpass", dim: quantity.Temperature, to: func(i *jointInput) *float64 { return &i.proc.Interpass }, says: "greatest temperature between runs"},
	{name: "min-heat-input", dim: quantity.HeatInput, field: "least heat input", to: func(i *jointInput) *float64 { return &i.proc.MinHeatInput }, says: "least heat input of the procedure"},
	{name: "max-heat-input", dim: quantity.HeatInput, field: "most heat input", to: func(i *jointInput) *float64 { return &i.proc.MaxHeatInput }, says: "most heat input of the procedure"},
	{name: "gas-flow", dim: quantity.Flow, to: func(i *jointInput) *float64 { return &i.proc.GasFlow }, says: "shielding gas"},
	{name: "hydrogen", dim: quantity.Hydrogen, to: func(i *jointInput) *float64 { return &i.proc.Hydrogen }, says: "diffusible hydrogen of the weld metal, as 5ml/100g"},

	{name: "rated", dim: quantity.Current, field: "rated current", to: func(i *jointInput) *float64 { return &i.proc.Set.RatedCurrent }, says: "current that the set holds for its duty cycle"},
	{name: "duty-cycle", dim: quantity.Percent, to: func(i *jointInput) *float64 { return &i.proc.Set.DutyCycle }, says: "share of ten minutes at the rated current"},
	{name: "most-current", dim: quantity.Current, to: func(i *jointInput) *float64 { return &i.proc.Set.MaxCurrent }, says: "the most current that the set gives"},
	{name: "set-efficiency", dim: quantity.Percent, to: func(i *jointInput) *float64 { return &i.proc.Set.Efficiency }, says: "power out over power in"},
	{name: "power-factor", dim: quantity.Number, to: func(i *jointInput) *float64 { return &i.proc.Set.PowerFactor }, says: "power factor of the set"},
	{name: "cable", dim: quantity.Length, scale: 1e-3, field: "welding cable length", to: func(i *jointInput) *float64 { return &i.proc.Cable.Length }, says: "length of the welding cable, one way"},
	{name: "cable-section", dim: quantity.Section, field: "welding cable section", to: func(i *jointInput) *float64 { return &i.proc.Cable.Section }, says: "section of the welding cable"},
	{name: "supply", dim: quantity.Length, scale: 1e-3, field: "supply cable length", to: func(i *jointInput) *float64 { return &i.proc.Supply.Length }, says: "length of the supply cable, one way"},
	{name: "supply-section", dim: quantity.Section, field: "supply cable section", to: func(i *jointInput) *float64 { return &i.proc.Supply.Section }, says: "section of the supply cable"},
	{name: "supply-volts", dim: quantity.Voltage, field: "supply cable volts", to: func(i *jointInput) *float64 { return &i.proc.Supply.Volts }, says: "of the supply"},

	{name: "ambient", dim: quantity.Temperature, to: func(i *jointInput) *float64 { return &i.c.Ambient }, says: "of air and steel (default 20C)"},
	{name: "hold", dim: quantity.Time, scale: 1.0 / 60, none: true, to: func(i *jointInput) *float64 { return &i.c.Hold }, says: "time before final testing, or none"},
	{name: "yield", dim: quantity.Stress, to: func(i *jointInput) *float64 { return &i.c.Steel.Yield }, says: "yield strength of the steel"},
	{name: "density", dim: quantity.Density, to: func(i *jointInput) *float64 { return &i.c.Steel.Density }, says: "of the weld metal"},
	{name: "cev", dim: quantity.Number, field: "CE", to: func(i *jointInput) *float64 { return &i.c.Steel.CEV }, says: "carbon equivalent CE(IIW) on the certificate, percent"},
	{name: "cet", dim: quantity.Number, field: "CET", to: func(i *jointInput) *float64 { return &i.c.Steel.Cet }, says: "carbon equivalent CET on the certificate, percent"},
	{name: "fit-up", dim: quantity.Pace, none: true, to: func(i *jointInput) *float64 { return &i.c.Rates.FitUp }, says: "pulling up and tacks, as 12min/m, or none"},
	{name: "moving", dim: quantity.Pace, none: true, to: func(i *jointInput) *float64 { return &i.c.Rates.Moving }, says: "leads and staging, as 5min/m, or none"},
	{name: "cleaning", dim: quantity.Pace, none: true, to: func(i *jointInput) *float64 { return &i.c.Rates.Cleaning }, says: "by parts: slag and interpass cleaning, a metre of run, or none"},
	{name: "starting", dim: quantity.Pace, none: true, to: func(i *jointInput) *float64 { return &i.c.Rates.Starting }, says: "by parts: getting to the seam, hood, looking, a metre of run, or none"},
	{name: "electrode-change", dim: quantity.Time, scale: 60, none: true, to: func(i *jointInput) *float64 { return &i.c.Rates.ElectrodeChange }, says: "by parts: each, as 15s, or none"},
	{name: "gouging", dim: quantity.Travel, scale: 60.0 / 1000, to: func(i *jointInput) *float64 { return &i.c.Rates.Gouging }, says: "back-gouging and grinding clean, as 3m/h"},
	{name: "turn", dim: quantity.Time, none: true, to: func(i *jointInput) *float64 { return &i.c.Rates.Turn }, says: "turning the part once, or none"},
	{name: "set-up", dim: quantity.Time, none: true, to: func(i *jointInput) *float64 { return &i.c.Rates.SetUp }, says: "leading out and making ready, or none"},
}

var jointYes = [][2]string{
	{"both-sides", "the same again on the other side"}, {"backing", "welded on a strip that stays"}, {"back-gouge", "root gouged from behind and welded again"},
	{"site", "on site, not in the shop"}, {"no-overweld", "exactly what is drawn is laid"}, {"fitted-up", "fit-up and tacks are counted elsewhere"},
	{"by-parts", "hands-on time from its parts, not from the operating factor"},
}

var jointWords = [][2]string{
	{"position", "ISO 6947 position: PA, PB, PC, PD, PE, PF, PG, PH, PJ, H-L045"}, {"process", "ISO 4063 number or usual name: 111, 135, 136"},
	{"procedure-position", "position that a given deposition holds for (default: that of the joint)"},
	{"count", "how many seams the length is made of"}, {"turns", "how often the part is turned over"}, {"supply-phases", "1 or 3"},
	{"steel", "grade, as S355"}, {"analysis", "in percent, as \"C 0.17, Mn 1.45\""},
	{"to-standard", "the contract's standard: EN 1090-2 or AWS D1.1"}, {"preheat-by", "EN 1011-2 A, EN 1011-2 B or AWS D1.1"},
}

// read puts the flags into the joint.
func (in *jointInput) read(o *jointOptions) error {
	for _, a := range jointAmounts {
		if err := in.amount(a, *o.amounts[a.name]); err != nil {
			return err
		}
	}
	if in.chart != 0 {
		in.c.Chart = []weld.ChartReading{{Preheat: in.chart, Origin: given("--chart-preheat, read from the chart for this joint")}}
	}
	j := &in.seam.Joint
	j.BothSides, j.Backing, j.BackGouge = *o.yes["both-sides"], *o.yes["backing"], *o.yes["back-gouge"]
	j.Origin = given("command line")
	in.c.Site, in.c.NoOverweld, in.c.FittedUp, in.c.ByParts = *o.yes["site"], *o.yes["no-overweld"], *o.yes["fitted-up"], *o.yes["by-parts"]
	in.c.Steel.Grade = *o.words["steel"]
	if in.c.Steel.Grade == "" {
		in.c.Steel.Grade = "S355"
	}
	return first(
		whole("count", *o.words["count"], &j.Count), whole("turns", *o.words["turns"], &in.seam.Turns),
		whole("supply-phases", *o.words["supply-phases"], &in.proc.Supply.Phases),
		among("to-standard", *o.words["to-standard"], &in.c.Execution, "EN 1090-2", "AWS D1.1"),
		among("preheat-by", *o.words["preheat-by"], &in.c.PreheatStandard, "EN 1011-2 A", "EN 1011-2 B", "AWS D1.1"),
		inPosition("position", *o.words["position"], &in.seam.Position),
		inPosition("procedure-position", *o.words["procedure-position"], &in.proc.Position),
		in.names(o), in.own())
}

// own has a deposition that is given hold for the position of the joint, where no other is named:
// there is one joint, and what is said of it is said of it there.
func (in *jointInput) own() error {
	if in.proc.Deposition > 0 && in.proc.Position == 0 {
		in.proc.Position = weld.UsualPosition(in.seam.Joint.Type, in.seam.Position)
	}
	return nil
}

func given(what string) origin.Origin { return origin.Origin{Kind: origin.Given, Source: what} }

// first gives the first error that is not nil.
func first(errs ...error) error {
	for _, err := range errs {
		if err != nil {
			return err
		}
	}
	return nil
}

func whole(name, word string, to *int) error {
	if word == "" {
		return nil
	}
	v, err := quantity.Parse(word, quantity.Number)
	if err != nil || v != math.Trunc(v) || v < 0 || v > 1e5 {
		return misuse("--"+name+" 2", "--%s %q: expected a whole number", name, word)
	}
	*to = int(v)
	return nil
}

func inPosition(name, word string, to *weld.Position) error {
	p, ok := weld.ParsePosition(word)
	if word != "" && !ok {
		return misuse("PA, PB, PC, PD, PE, PF, PG, PH, PJ or H-L045", "--%s %q is not a welding position", name, word)
	}
	*to = p
	return nil
}

func among(name, word string, to *string, known ...string) error {
	if word == "" {
		return nil
	}
	for _, k := range known {
		if strings.EqualFold(k, word) {
			*to = k
			return nil
		}
	}
	return misuse(fmt.Sprintf("one of: %s", strings.Join(known, ", ")), "--%s %q is not known here", name, word)
}

// names reads the process and the analysis.
func (in *jointInput) names(o *jointOptions) error {
	if s := *o.words["process"]; s != "" {
		p, ok := weld.ParseProcess(s)
		if !ok {
			return misuse("its ISO 4063 number: 111, 114, 121, 131, 135, 136, 138 or 141", "--process %q is not a welding process known here", s)
		}
		in.proc.Process = p
	}
	st := &in.c.Steel
	elements := map[string]*float64{"C": &st.C, "Mn": &st.Mn, "Mo": &st.Mo, "Cr": &st.Cr, "Cu": &st.Cu, "Ni": &st.Ni, "V": &st.V}
	for _, part := range strings.FieldsFunc(*o.words["analysis"], func(r rune) bool { return r == ',' || r == ';' }) {
		name, value, _ := strings.Cut(strings.TrimSpace(part), " ")
		v, err := quantity.Parse(strings.TrimSuffix(strings.TrimSpace(value), "%"), quantity.Number)
		to := elements[name]
		if err != nil || to == nil || !(v >= 0 && v <= 30) {
			return misuse("--analysis \"C 0.17, Mn 1.45, Cr 0.05\"", "--analysis: %q is not an element with its percent", strings.TrimSpace(part))
		}
		*to = v
	}
	if st.CEV+st.Cet+st.C > 0 {
		st.Origin = given("command line")
	}
	return nil
}

// amount reads one amount.
func (in *jointInput) amount(a jointAmount, s string) error {
	if s == "" {
		return nil
	}
	to := a.to(in)
	key := a.field
	if key == "" {
		key = strings.ReplaceAll(a.name, "-", " ")
	}
	in.c.Rates.Origins[a.name], in.c.Rates.Origins[key] = given("--"+a.name), given("--"+a.name)
	in.proc.Origins[key], in.c.Origins[key] = given("--"+a.name), given("--"+a.name)
	if strings.HasPrefix(key, "welding cable") || strings.HasPrefix(key, "supply cable") {
		in.proc.Origins[strings.Join(strings.Fields(key)[:2], " ")] = given("command line")
	}
	if a.none && s == "none" {
		*to = weld.None
		return nil
	}
	if a.name == "cet" || a.name == "cev" { // certificates print them in percent
		s = strings.TrimSpace(strings.TrimSuffix(s, "%"))
	}
	v, err := quantity.Parse(s, a.dim)
	if err != nil {
		hint := quantity.Hint(err)
		if hint == "" {
			hint = "sailby joint --help"
		}
		return misuse(hint, "--%s: %s", a.name, err)
	}
	if a.scale != 0 {
		v *= a.scale
	}
	switch {
	case v == 0 && a.none:
		v = weld.None
	case v == 0 && a.name == "ambient":
		v = 0.01 // zero would be the default
	case v <= 0 && a.dim != quantity.Temperature:
		return misuse("give more than zero, or leave the flag out", "--%s %s is not above zero", a.name, s)
	}
	*to = v
	return nil
}
