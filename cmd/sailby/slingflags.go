package main

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// slingInput is one lift as the flags give it.
type slingInput struct {
	load                     lift.Load
	rig                      lift.Rig
	hoist                    lift.Hoist
	crane                    lift.CraneLift
	wind                     lift.Wind
	span, cg, below          float64 // below: the centre of gravity under the lugs
	pads                     float64 // m2 that it lands on
	floor                    float64 // kN/m2
	given                    map[string]bool
	shapes                   []origin.Figure // how the shape of the slings came about
	slung, hung, craned, air bool
	way                      slingWay
}

// slingAmount is one flag that takes an amount.
type slingAmount struct {
	name  string
	dim   quantity.Dim
	to    func(*slingInput) *float64
	says  string
	scale float64 // what the base unit is multiplied by; 0 is 1
}

var slingAmounts = []slingAmount{
	{name: "mass", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.load.Mass }, says: "of the load"},
	{name: "allowance", dim: quantity.Number, to: func(i *slingInput) *float64 { return &i.load.Allowance }, says: "factor on the mass (default: by --known)"},
	{name: "dynamic", dim: quantity.Number, to: func(i *slingInput) *float64 { return &i.load.Dynamic }, says: "factor for starting and stopping (default: by mass and --water)"},
	{name: "length", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.load.Length }, says: "of the load, for wind and the area to keep clear"},
	{name: "width", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.load.Width }, says: "of the load"},
	{name: "height", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.load.Height }, says: "of the load"},

	{name: "span", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.span }, says: "between the two lugs"},
	{name: "cg", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.cg }, says: "centre of gravity from the first lug, along the span (default: the middle)"},
	{name: "lugs-above", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.below }, says: "the lugs above the centre of gravity (default: just above it, which a note asks about)"},
	{name: "leg-length", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.rig.LegLength }, says: "of each leg"},
	{name: "hook-above", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.rig.Rise }, says: "the hook above the lugs"},
	{name: "rated", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.rig.WLL }, says: "one leg straight, as on its tag"},
	{name: "choke-angle", dim: quantity.Angle, to: func(i *slingInput) *float64 { return &i.rig.ChokeAngle }, says: "in the bight (default: 135 deg)"},
	{name: "edge", dim: quantity.Number, to: func(i *slingInput) *float64 { return &i.rig.Edge }, says: "bend radius over the diameter of chain or rope"},
	{name: "hot", dim: quantity.Temperature, to: func(i *slingInput) *float64 { return &i.rig.Heat }, says: "what the sling touches"},
	{name: "lug-rated", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.rig.LugWLL }, says: "along the leg, as the lug's designer states it"},
	{name: "coupling-rated", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.rig.Coupling }, says: "the smallest shackle, hook or ring"},

	{name: "hoist", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.hoist.WLL }, says: "rating of the hoist"},
	{name: "hoist-mass", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.hoist.Own }, says: "of the hoist with its chain"},
	{name: "anchor", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.hoist.Anchor }, says: "what the hoist hangs from may carry"},
	{name: "side-pull", dim: quantity.Angle, to: func(i *slingInput) *float64 { return &i.hoist.Pull }, says: "from the vertical"},
	{name: "tackle", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.hoist.Tackle }, says: "slings, shackles, beam and block under the hook"},
	{name: "radius", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.crane.Radius }, says: "of the crane"},
	{name: "hook-height", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.crane.HookAt }, says: "that the crane's hook reaches there"},
	{name: "raise", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.crane.Raise }, says: "height above ground that the lifting point must reach"},
	{name: "boom-clearance", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.crane.BoomClear }, says: "between boom and load"},
	{name: "pad", dim: quantity.Area, to: func(i *slingInput) *float64 { return &i.crane.Pad }, says: "under one outrigger"},
	{name: "pad-load", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.crane.PadLoad }, says: "on the heaviest outrigger"},
	{name: "ground", dim: quantity.Pressure, scale: 100, to: func(i *slingInput) *float64 { return &i.crane.Ground }, says: "what it may carry, as 150kPa"},
	{name: "gust-limit", dim: quantity.Speed, to: func(i *slingInput) *float64 { return &i.wind.Limit }, says: "of the crane (default: 9.8 m/s)"},
	{name: "gust", dim: quantity.Speed, to: func(i *slingInput) *float64 { return &i.wind.Gust }, says: "measured or forecast"},
	{name: "sail-area", dim: quantity.Area, to: func(i *slingInput) *float64 { return &i.wind.Area }, says: "that the load shows to the wind"},
	{name: "lands-on", dim: quantity.Area, to: func(i *slingInput) *float64 { return &i.pads }, says: "area that it stands on when landed"},
	{name: "floor", dim: quantity.Pressure, scale: 100, to: func(i *slingInput) *float64 { return &i.floor }, says: "what the landing place may carry, as 5kPa"},
}

// mayBeZero are the amounts that may be nothing and still say something.
var mayBeZero = map[string]bool{"cg": true, "lugs-above": true, "hot": true, "hoist-mass": true, "side-pull": true, "tackle": true, "twist": true, "carry": true,
	"distance": true, "trolley-mass": true, "tilt": true, "off": true, "raise": true, "gust": true}

// slingWords are the flags that take a word.
var slingWords = [][2]string{{"angle", "of a leg, with its datum: \"40 deg from horizontal\""}, {"known", "how the mass is known: weighed, drawn or guessed (default: guessed)"},
	{"hitch", "straight, choked, basket or endless (default: straight)"}, {"table", "table of the slings, as \"EN 818-4 grade 8\""},
	{"size", "of chain or rope, or t of webbing"}, {"by", "hands, trolley, jack, chain hoist, lever hoist, gantry or crane (default: by the other flags)"},
	{"chart", "of the crane: \"4m: 2.4t, 6m: 1.5t\""}, {"water", "inshore or offshore: lifted from or onto a boat"}, {"body", "box or round, to the wind"}}

// read puts the flags into the input.
func (i *slingInput) read(o *slingOptions) error {
	i.given = map[string]bool{}
	for _, a := range append(slices.Clone(slingAmounts), wayAmounts...) {
		text := *o.amounts[a.name]
		if text == "" {
			continue
		}
		v, err := quantity.Parse(text, a.dim)
		if err != nil {
			return misuse(quantity.Hint(err), "--%s: %v", a.name, err)
		}
		if a.scale != 0 {
			v *= a.scale
		}
		if math.IsNaN(v) || math.IsInf(v, 0) || v < 0 {
			return misuse("an amount above zero", "--%s %s is below zero", a.name, text)
		}
		if v == 0 && !mayBeZero[a.name] {
			return misuse("leave it out if it is not known", "--%s %s is nothing", a.name, text)
		}
		*a.to(i) = v
		i.given[a.name] = true
	}
	i.rig.Legs, i.rig.Equalised = o.legs, o.equalised
	if err := i.words(o); err != nil {
		return err
	}
	i.slung = i.any("rated", "table", "angle", "leg-length", "hook-above", "span", "lug-rated", "coupling-rated") || o.legs > 0
	i.hung = i.any("hoist", "anchor") && !i.craned
	i.air = i.any("gust", "gust-limit", "sail-area") || i.craned && i.load.Length > 0
	if !i.given["mass"] {
		return misuse("--mass 410kg", "nothing says what is lifted")
	}
	if err := i.ways(o, *o.words["by"]); err != nil {
		return err
	}
	if i.way.two {
		i.slung, i.hung = false, false
		return i.between()
	}
	if i.way.byJack && !i.any("legs", "angle", "leg-length", "hook-above", "rated", "table") {
		i.slung = i.slung && !i.any("span")
	}
	return i.spread()
}

// any says whether one of these flags is given.
func (i *slingInput) any(names ...string) bool {
	return slices.ContainsFunc(names, func(n string) bool { return i.given[n] })
}

// between puts the centre of gravity between two hooks.
func (i *slingInput) between() error {
	if !i.given["cg"] {
		i.cg = i.span / 2
	}
	i.load.CG = [3]float64{i.cg, 0, 0}
	return nil
}

func (i *slingInput) words(o *slingOptions) error {
	one := func(name string, to map[string]int) (int, error) {
		w := *o.words[name]
		if v, ok := to[w]; ok {
			return v, nil
		}
		var names []string
		for n := range to {
			if n != "" {
				names = append(names, n)
			}
		}
		slices.Sort(names)
		return 0, misuse("one of: "+strings.Join(names, ", "), "--%s: %q is not known", name, w)
	}
	known, err := one("known", map[string]int{"": int(lift.Guessed), "weighed": int(lift.Weighed), "drawn": int(lift.Drawn), "guessed": int(lift.Guessed)})
	if err != nil {
		return err
	}
	if err := i.weigh(lift.Known(known)); err != nil {
		return err
	}
	hitch, err := one("hitch", map[string]int{"": 0, "straight": 0, "choked": int(lift.Choked), "basket": int(lift.Basket), "endless": int(lift.Endless)})
	if err != nil {
		return err
	}
	i.rig.Hitch = lift.Hitch(hitch)
	body, err := one("body", map[string]int{"": 0, "box": int(lift.BoxBody), "round": int(lift.RoundBody)})
	if err != nil {
		return err
	}
	i.wind.Body = lift.Body(body)
	water, err := one("water", map[string]int{"": 0, "inshore": int(lift.Inshore), "offshore": int(lift.Offshore)})
	if err != nil {
		return err
	}
	if water > 0 && i.load.Dynamic == 0 && i.load.Mass > 0 {
		f, err := lift.DynamicFactor(i.load.Mass, lift.Water(water))
		if err != nil {
			return misuse(quantity.Hint(err), "--water: %v", err)
		}
		i.load.Dynamic = f.Value
		i.shapes = append(i.shapes, f)
	}
	by, err := one("by", map[string]int{"": int(lift.ByChainHoist), "chain hoist": int(lift.ByChainHoist), "lever hoist": int(lift.ByLeverHoist), "gantry": int(lift.ByGantry), "crane": int(lift.ByLoaderCrane), "loader crane": int(lift.ByLoaderCrane),
		"hands": int(lift.ByHands), "trolley": int(lift.ByTrolley), "jack": int(lift.ByJack)})
	if err != nil {
		return err
	}
	i.hoist.By = lift.Way(by)
	i.craned = lift.Way(by) == lift.ByLoaderCrane || *o.words["chart"] != ""
	if text := *o.words["angle"]; text != "" {
		i.given["angle"] = true
		if i.rig.Angle, i.rig.Datum, err = lift.ParseAngle(text); err != nil {
			return misuse(quantity.Hint(err), "--angle: %v", err)
		}
	}
	if i.rig.Table = *o.words["table"]; i.rig.Table != "" {
		i.given["table"] = true
		if *o.words["size"] == "" {
			return misuse("--size 8mm", "--table %q: which size?", i.rig.Table)
		}
	}
	if text := *o.words["size"]; text != "" {
		if i.rig.Size, err = lift.ParseSize(text); err != nil {
			return misuse(quantity.Hint(err), "--size: %v", err)
		}
	}
	return i.chart(*o.words["chart"])
}

// weigh gives the load its mass with the allowance of how it is known.
func (i *slingInput) weigh(k lift.Known) error {
	if i.load.Mass == 0 {
		return nil
	}
	t, err := lift.Mass([]lift.Part{{Name: "load", Shape: lift.Shape{Kind: lift.Item}, Stated: i.load.Mass, Known: k}})
	if err != nil {
		return misuse(quantity.Hint(err), "--mass: %v", err)
	}
	i.load.Name = "the load"
	i.load.From = origin.Written("mass", i.load.Mass, "kg", origin.Origin{Kind: origin.Given, Source: "--mass"})
	if i.load.Allowance == 0 {
		i.load.Allowance = t.Allowance
		i.shapes = append(i.shapes, origin.Recalled("weight allowance, "+k.String(), t.Allowance, "", "weight contingency as in the ISO 19901-5 family"))
	}
	return nil
}

// chart reads "4m: 2.4t, 6m: 1.5t".
func (i *slingInput) chart(text string) error {
	for _, row := range strings.Split(text, ",") {
		if strings.TrimSpace(row) == "" {
			continue
		}
		a, b, ok := strings.Cut(row, ":")
		r, err1 := quantity.Parse(strings.TrimSpace(a), quantity.Length)
		m, err2 := quantity.Parse(strings.TrimSpace(b), quantity.Mass)
		if !ok || err1 != nil || err2 != nil {
			return misuse("--chart \"4m: 2.4t, 6m: 1.5t\"", "--chart: %q is no radius with its mass", strings.TrimSpace(row))
		}
		i.crane.Chart = append(i.crane.Chart, lift.ChartRow{Radius: r, Mass: m})
	}
	return nil
}

// spread works out the shape of two legs over a span.
func (i *slingInput) spread() error {
	if !i.given["span"] {
		if i.given["cg"] {
			return misuse("--span 2.4m", "--cg: between which lugs?")
		}
		return nil
	}
	if i.rig.Legs != 0 && i.rig.Legs != 2 {
		return misuse("--legs 2, or leave --span out", "--span: a span is of two legs, not of %d", i.rig.Legs)
	}
	if !i.given["cg"] {
		i.cg = i.span / 2
	}
	if i.cg > i.span {
		return misuse("a centre of gravity between the lugs", "--cg: %s mm is outside the span of %s mm", origin.Trim(i.cg), origin.Trim(i.span))
	}
	if i.way.byJack && !i.any("legs", "angle", "leg-length", "hook-above", "rated", "table") {
		return nil // from jack to jack
	}
	even := math.Abs(i.cg-i.span/2) < 1e-9
	span := origin.Written("span", i.span, "mm", origin.Origin{Kind: origin.Given, Source: "--span"})
	switch {
	case i.given["hook-above"]:
		i.rig.LegLength = 0
	case i.given["angle"] && even:
		b := i.rig.Angle
		if i.rig.Datum == lift.FromHorizontal {
			b = 90 - b
		}
		if b <= 0 || b > lift.MaxSling {
			return nil // judged, and refused, as an angle
		}
		i.rig.Rise = i.span / 2 / math.Tan(b*math.Pi/180)
		i.shapes = append(i.shapes, origin.Worked("length of a leg", i.span/2/math.Sin(b*math.Pi/180), "mm", "span / 2 / sin(angle from the vertical)", span))
	case i.rig.LegLength > i.span/2 && even:
		i.rig.Rise = math.Sqrt(i.rig.LegLength*i.rig.LegLength - i.span*i.span/4)
		i.rig.LegLength = 0
	default:
		return misuse("--hook-above 1.4m, which is the hook above the lugs", "with --span the slings need the hook's height, or for a centre of gravity in the middle the angle or legs longer than half the span")
	}
	i.shapes = append(i.shapes, origin.Worked("hook above the lugs", i.rig.Rise, "mm", "given, or by span and leg", span))
	i.rig.Angle, i.rig.Datum, i.rig.Legs = 0, lift.NoDatum, 0
	i.rig.Lugs = [][3]float64{{0, 0, 0}, {i.span, 0, 0}}
	i.load.CG = [3]float64{i.cg, 0, -max(i.below, 1)}
	return nil
}

func legLine(n int, l lift.Leg) string {
	s := fmt.Sprintf("leg %d: takes %s kg of the weight, pull along the leg %s kg, %s degrees from the vertical (%s from the horizontal)", n+1,
		origin.Trim(l.Share), origin.Trim(l.Tension), origin.Trim(l.Angle), origin.Trim(90-l.Angle))
	if l.Length > 0 {
		s += fmt.Sprintf(", %s m long", origin.Trim(l.Length/1000))
	}
	return s
}
