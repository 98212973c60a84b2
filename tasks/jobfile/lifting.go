package jobfile

import (
	"fmt"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/lift"
	"sailby/tasks/quantity"
)

var zoneWords = []string{"shoulder", "elbow to shoulder", "knuckle to elbow", "lower leg to knuckle", "floor"}

func length(name string, high float64, example, says string) key {
	return key{name: name, takes: anAmount, dim: quantity.Length, low: 0, high: high, example: example, says: says}
}

func massOf(name, example, says string) key {
	return key{name: name, takes: anAmount, dim: quantity.Mass, low: 0.01, high: 1e6, example: example, says: says}
}

var slingsSection = section{name: "Slings", where: "tasks / NAME / slings", host: "tasks/load/slings", says: "One set of slings to one hook. Their shape is an angle with its datum, or leg length with the hook's height above the lugs, or the lugs with that height. What is left out is not known and asked for.", keys: []key{
	{name: "legs", takes: aCount, low: 1, high: 4, usual: "one for each lug, else 1", example: "2", says: "how many"},
	{name: "angle", takes: itsOwn, form: "angle `from vertical` or `from horizontal`", shape: anyText, example: "50 deg from horizontal", says: "of a leg; more than 60 degrees from the vertical is refused"},
	length("leg length", 1e5, "2 m", "of each leg"),
	length("hook above", 1e5, "1.4 m", "the hook above the highest lug"),
	{name: "lugs", takes: itsOwn, form: "list of [x, y, z]", shape: anyList, example: "[[0, 400 mm, 12 mm], [2400 mm, 400 mm, 12 mm]]", beside: "hook above: 2 m", without: "legs angle", says: "where they are, in the axes of the assembly with z up: the centre of gravity then counts"},
	{name: "hitch", takes: aWord, words: []string{"straight", "choked", "basket", "endless"}, usual: "straight", example: "choked", says: "how they hold the load"},
	{name: "table", takes: aWord, words: lift.SlingTables(), usual: "none: `rated` counts", example: "EN 818-4 grade 8", beside: "size: 8 mm", says: "the table that rates them"},
	{name: "size", takes: itsOwn, form: "length of chain or rope, mass of webbing", shape: anyText, example: "8 mm", beside: "table: EN 818-4 grade 8", says: "of chain or rope in mm, of webbing in t"},
	massOf("rated", "1 t", "one leg straight, as on its tag; with a table the lower counts"),
	{name: "equalised", takes: yesNo, usual: "no", example: "yes", says: "four legs are made to share; otherwise two of them carry a rigid load"},
	{name: "choke angle", takes: anAmount, dim: quantity.Angle, low: 1, high: 180, usual: "135 deg", example: "120 deg", says: "in the bight of a choked sling"},
	{name: "edge", takes: aNumber, low: 0.1, high: 1000, usual: "no edge", example: "2", says: "bend radius over the diameter of chain or rope"},
	{name: "hot", takes: anAmount, dim: quantity.Temperature, low: 0, high: 1000, usual: "not hot", example: "250 C", says: "what they touch"},
	massOf("lug rated", "1.5 t", "along the leg, as the lug's designer states it"),
	massOf("coupling rated", "2 t", "the smallest shackle, hook or ring in a leg"),
	massOf("mass", "12 kg", "slings, shackles and beam together"),
}}

var handsSection = section{name: "Hands", where: "tasks / NAME / hands", host: "tasks/to the gate/hands", says: "People who lift by hand, for the guideline figures of HSE L23.", keys: []key{
	{name: "men", takes: aCount, low: 0, high: 8, usual: "the people of the task", example: "2", says: "men among them"},
	{name: "women", takes: aCount, low: 0, high: 8, usual: "0", example: "1", says: "women among them"},
	{name: "through", takes: words, words: zoneWords, usual: "floor to knuckle", example: "[lower leg to knuckle, knuckle to elbow]", says: "zones that the hands pass through"},
	{name: "far", takes: yesNo, usual: "no", example: "yes", says: "at arm's length, not close to the body"},
	{name: "per hour", takes: aNumber, low: 1, high: 1000, usual: "up to 30", example: "60", says: "lifts an hour"},
	{name: "twist", takes: anAmount, dim: quantity.Angle, low: 0, high: 180, usual: "0 deg", example: "45 deg", says: "of the body"},
	{name: "slope", takes: yesNo, usual: "no", example: "yes", says: "on steps or a slope"},
	{name: "NIOSH", takes: keysOf, sub: &nioshSection, example: "{out: 400 mm, up: 200 mm, travel: 600 mm, turn: 45 deg, grip: fair}", says: "the revised NIOSH equation, on request"},
}}

var nioshSection = section{name: "NIOSH lift", where: "tasks / NAME / hands / NIOSH", host: "tasks/to the gate/hands/NIOSH", says: "One end of a two-handed lift for the revised NIOSH lifting equation, worked out beside the guideline figures.", keys: []key{
	{name: "out", takes: anAmount, dim: quantity.Length, low: 1, high: 2000, need: true, example: "400 mm", says: "from between the ankles to the hands (H)"},
	{name: "up", takes: anAmount, dim: quantity.Length, low: 0, high: 3000, need: true, example: "200 mm", says: "from the floor to the hands (V)"},
	{name: "travel", takes: anAmount, dim: quantity.Length, low: 0, high: 3000, need: true, example: "600 mm", says: "up or down (D)"},
	{name: "turn", takes: anAmount, dim: quantity.Angle, low: 0, high: 180, usual: "0 deg", example: "45 deg", says: "to the side (A)"},
	{name: "per minute", takes: aNumber, low: 0, high: 30, usual: "0.2", example: "1", says: "lifts a minute (F)"},
	{name: "hours", takes: aNumber, low: 0.1, high: 8, usual: "1", example: "2", says: "hours at it"},
	{name: "grip", takes: aWord, words: []string{"good", "fair", "poor"}, usual: "good", example: "fair", says: "how well the hands hold it"},
}}

var pushSection = section{name: "Pushing", where: "tasks / NAME / pushing", host: "tasks/to the gate/pushing", says: "People who push or pull a load on wheels, for the guideline forces of HSE.", keys: []key{
	{name: "men", takes: aCount, low: 0, high: 8, usual: "the people of the task", example: "2", says: "men among them"},
	{name: "women", takes: aCount, low: 0, high: 8, usual: "0", example: "1", says: "women among them"},
	{name: "uneven", takes: yesNo, usual: "no", example: "yes", says: "soft or uneven ground, small or worn wheels"},
	{name: "ramp", takes: aNumber, low: 0.001, high: 1, usual: "level", example: "0.083", says: "rise over length along the ground: 1 in 12 is 0.083"},
}}

var secondSection = section{name: "Second hook", where: "tasks / NAME / second hook", host: "tasks/load/second hook", says: "A second piece of gear on the same load.", keys: []key{
	{name: "by", takes: aName, need: true, example: "chain hoist", says: "the kit; the same name where there are two of it"},
	{name: "at", takes: itsOwn, form: "[x of the first hook, x of the second]", shape: pairOfText, need: true, example: "[200 mm, 2200 mm]", says: "where they hold, along x of the assembly"},
	{name: "tilt", takes: anAmount, dim: quantity.Angle, low: 0, high: 45, usual: "0 deg", example: "3 deg", says: "how far it may go out of level"},
	length("off", 1e5, "100 mm", "the centre of gravity square to the line of the hooks"),
	{name: "turns over", takes: yesNo, usual: "no", example: "yes", says: "turned over between them: each hook and each lug then carries all of it"},
}}

// Keys of lifts and of moves, and those that only lifts have.
var bothKeys = []key{
	{name: "hands", takes: keysOf, sub: &handsSection, example: "{men: 2, through: [floor, knuckle to elbow]}", says: "how it is lifted by hand"},
	{name: "weight allowance", takes: aNumber, low: 1, high: 3, usual: "by how the mass is known", example: "1.1", says: "factor on the mass for what is not known"},
	{name: "floor", takes: anAmount, dim: quantity.Pressure, low: 0.001, high: 1000, example: "5 kPa", says: "what the landing place may carry; 1 kPa is 1 kN/m2"},
	{name: "lands on", takes: anAmount, dim: quantity.Area, low: 1e-4, high: 1000, example: "0.4 m2", says: "area that it stands on when landed"},
	{name: "in water", takes: yesNo, usual: "no", example: "yes", says: "wholly under when it is taken up: whether it floats is worked out, sealed bores staying dry"},
	{name: "secured by", takes: aName, example: "resin", says: "the task that secures it: from the lift until that is done its gear is not free (R24)"},
	{name: "proved free by", takes: aName, example: "fit frame", says: "the task that proves an old part free, with a cut-off pull (R24)"},
	{name: "stiff with", takes: names, example: "frame/posts", says: "parts that must be on before it is lifted (R24)"},
}

var liftOnlyKeys = []key{
	{name: "slings", takes: keysOf, sub: &slingsSection, example: "{legs: 2, angle: 50 deg from horizontal, rated: 1 t}", says: "between hook and load"},
	{name: "under the hook", takes: itsOwn, form: "{what: mass}", shape: massShape, example: "{hook block: 35 kg}", says: "what else hangs there: block, beam; deducted from a crane's chart"},
	length("sling height", 1e5, "1.2 m", "from the lifting point up to the hook"),
	length("lifting point", 1e5, "900 mm", "above the floor before the lift"),
	length("hook height", 2e5, "7 m", "what a crane's hook reaches at that radius"),
	length("boom clearance", 1e5, "600 mm", "between boom and load"),
	{name: "outrigger pad", takes: anAmount, dim: quantity.Area, low: 1e-4, high: 100, example: "0.36 m2", says: "area under one outrigger"},
	massOf("outrigger load", "4 t", "on the heaviest outrigger"),
	{name: "ground", takes: anAmount, dim: quantity.Pressure, low: 0.01, high: 100, example: "150 kPa", says: "what it may carry; 1 kPa is 1 kN/m2"},
	{name: "hangs from", takes: aText, usual: "the weakest of those of the hoist", example: "shop beam", says: "which of the things under `hangs from` of the hoist"},
	{name: "side pull", takes: anAmount, dim: quantity.Angle, low: 0, high: 90, usual: "0 deg", example: "1 deg", says: "from the vertical; only a lever hoist may"},
	{name: "sea air", takes: yesNo, usual: "no", example: "yes", says: "the hoist stays in sea air"},
	{name: "on water", takes: aWord, words: []string{"inshore", "offshore"}, usual: "on shore", example: "inshore", says: "lifted from or onto a boat: the dynamic factor"},
	{name: "sail area", takes: anAmount, dim: quantity.Area, low: 0.001, high: 1000, usual: "the largest face of its sizes", example: "1.6 m2", says: "that the load shows to the wind"},
	{name: "body", takes: aWord, words: []string{"box", "round"}, usual: "not known: drag 2.4", example: "box", says: "shape to the wind"},
	length("tip height", 2e5, "9 m", "highest point of boom or load above ground; 10 m if left out"),
	{name: "gust", takes: anAmount, dim: quantity.Speed, low: 0, high: 80, example: "7 m/s", says: "measured or forecast at the tip"},
	{name: "gust limit", takes: anAmount, dim: quantity.Speed, low: 1, high: 40, usual: "by gear, mass and sail (R25)", example: "6 m/s", says: "gust at the tip up to which whoever plans the lift has it done; in place of what is worked out, and never above the gear's"},
	{name: "wind measured by", takes: aName, example: "Tom", says: "who measures the wind"},
	{name: "second hook", takes: keysOf, sub: &secondSection, example: "{by: chain hoist, at: [200 mm, 2200 mm]}", says: "a second piece of gear on the same load"},
}

var moveOnlyKeys = []key{
	{name: "pushing", takes: keysOf, sub: &pushSection, example: "{men: 2, ramp: 0.083}", says: "how it is pushed on wheels"},
}

var joinsKey = key{name: "joins", takes: names, example: "[frame/base, frame/posts]", says: "assemblies or parts that hang together from its finish on: a lift after it lifts all of them (R24)"}

var takesOffKey = key{name: "takes off", takes: names, example: "frame/posts", says: "assemblies or parts that hang on nothing else any more from its finish on: each by itself, with what hangs on it alone (R24)"}

func init() {
	liftKeys.keys = slices.Concat(liftKeys.keys, liftOnlyKeys, bothKeys)
	moveKeys.keys = slices.Concat(moveKeys.keys, moveOnlyKeys, bothKeys)
	weldKeys.keys = append(weldKeys.keys, joinsKey)
	cutKeys.keys = append(cutKeys.keys, takesOffKey)
	fitKeys.keys = append(fitKeys.keys, joinsKey, takesOffKey,
		key{name: "fit proved by", takes: names, example: "resin", says: "survey, template or trial fit; a site fit-up with none is warned of"})
	plainKeys.keys = append(plainKeys.keys, takesOffKey,
		key{name: "sent out", takes: aText, beside: "standing: 5 d", example: "galvanizing", says: "work done elsewhere, its lead time and collection being the standing time: galvanizing, machining, profile cutting or other"})
	kitSection.keys = append(kitSection.keys, stowKeys...)
	kitSection.keys = append(kitSection.keys, length("closed height", 1e4, "350 mm", "of a hoist, from what it hangs from to the hook when fully up"),
		length("hung at", 1e5, "3.6 m", "what it hangs from above the floor"))
	partSection.keys = append(partSection.keys,
		key{name: "weld metal", takes: anAmount, dim: quantity.Mass, low: 0.001, high: 1e5, example: "4 kg", without: "plate", says: "welded onto the other parts, at their centre of gravity"},
		key{name: "paint film", takes: anAmount, dim: quantity.Film, low: 10, high: 5000, example: "300 um", without: "plate", says: "dry film on all of the other parts"},
		key{name: "displaces", takes: anAmount, dim: quantity.Volume, low: 0, high: 1e7, example: "12 L", without: "plate", beside: "item: 35 kg", says: "of an item: the water that it pushes aside, each"},
		key{name: "water", takes: anAmount, dim: quantity.Volume, low: 0, high: 1e7, usual: "none", example: "40 L", says: "standing in an old part, each"},
		key{name: "silt", takes: anAmount, dim: quantity.Volume, low: 0, high: 1e7, usual: "none", example: "15 L", says: "silt or growth in or on an old part, each"},
		key{name: "rust", takes: anAmount, dim: quantity.Length, low: 0, high: 100, usual: "none", example: "2 mm", says: "rust scale over its surface"},
		key{name: "weight allowance", takes: aNumber, low: 1, high: 3, usual: "by how its mass is known", example: "1.15", says: "factor on its mass for what is not known"})
	assemblySection.keys = append(assemblySection.keys, stowKeys...)
	assemblySection.keys = append(assemblySection.keys,
		key{name: "old", takes: yesNo, usual: "no", example: "yes", says: "it sits in place: a lift of it says which task has proved it free (R24)"})
}

// liftingOf reads the keys of rigging, joining and sending out.
func (r *reader) liftingOf(t *tasks.Task, f *fields) {
	if f.sec.find("joins") != nil {
		for _, ref := range f.names("joins") {
			t.Joins = append(t.Joins, tasks.Named{Name: ref.text, Pos: ref.pos})
		}
		if r.partNames(f, "joins"); len(t.Joins) == 1 {
			f.fault("joins", "name two things, for instance joins: [gate, frame]", "one thing alone is not joined to anything")
		}
	}
	if f.sec.find("takes off") != nil {
		for _, ref := range f.names("takes off") {
			t.TakesOff = append(t.TakesOff, tasks.Named{Name: ref.text, Pos: ref.pos})
		}
		r.partNames(f, "takes off")
	}
	if f.sec.find("sent out") != nil {
		if t.SentOut = f.line("sent out"); t.SentOut != "" && !f.tried("standing") {
			f.fault("sent out", "add `standing: 5 d`", "nothing says how long it is away")
		}
	}
	if f.sec.find("secured by") == nil {
		return
	}
	l := &tasks.Lifting{InWater: f.yes("in water"), Allowance: f.amount("weight allowance", 0), Floor: kilopascals(f.amount("floor", 0)), Lands: f.amount("lands on", 0)}
	for _, name := range r.partNames(f, "stiff with") {
		l.Stiff = append(l.Stiff, tasks.Named{Name: name, Pos: f.pos("stiff with")})
	}
	if n := f.node("hands"); n != nil {
		g := r.open(n, &handsSection, f.what+": hands")
		l.Hands = g.hands()
		if n := g.node("NIOSH"); n != nil {
			q := r.open(n, &nioshSection, f.what+": hands: NIOSH")
			l.NIOSH = &lift.NIOSHLift{Out: q.value("out"), Up: q.value("up"), Travel: q.value("travel"), Turn: q.value("turn"), PerMinute: q.value("per minute"), Hours: q.value("hours"),
				Grip: map[string]lift.Coupling{"fair": lift.FairGrip, "poor": lift.PoorGrip}[q.choice("grip", "good")]}
		}
	}
	if t.Kind == tasks.Lift {
		r.liftOnly(l, f)
	} else if n := f.node("pushing"); n != nil {
		g := r.open(n, &pushSection, f.what+": pushing")
		l.Push = &lift.Push{Men: g.count("men", 0), Women: g.count("women", 0), Uneven: g.yes("uneven"), Rise: g.value("ramp")}
	}
	t.Lifting = l
}

func kilopascals(a tasks.Amount) tasks.Amount { a.Value *= 100; return a }

func (f *fields) hands() *lift.Handling {
	h := &lift.Handling{Men: f.count("men", 0), Women: f.count("women", 0), PerHour: f.value("per hour"), Twist: f.value("twist"), Slope: f.yes("slope")}
	far := f.yes("far")
	for _, ref := range f.names("through") {
		i := slices.Index(zoneWords, ref.text)
		if i < 0 {
			f.r.faultAt(ref.pos, f.r.among(ref.text, zoneWords, ""), "%s%s is not one of %s", f.lead("through"), short(ref.text), list(zoneWords, 6))
			continue
		}
		h.Through = append(h.Through, lift.Reach{Zone: lift.Zone(i), Far: far})
	}
	if far && len(h.Through) == 0 {
		h.Through = []lift.Reach{{Zone: lift.Floor, Far: true}, {Zone: lift.LowerLeg, Far: true}}
	}
	return h
}

func (r *reader) liftOnly(l *tasks.Lifting, f *fields) {
	l.SlingHeight, l.LugHeight, l.HookHeight, l.BoomClear = f.amount("sling height", 0), f.amount("lifting point", 0), f.amount("hook height", 0), f.amount("boom clearance", 0)
	l.Pad, l.PadLoad, l.Ground = f.amount("outrigger pad", 0), f.amount("outrigger load", 0), kilopascals(f.amount("ground", 0))
	l.Hangs, l.SidePull, l.SeaAir = f.line("hangs from"), f.amount("side pull", 0), f.yes("sea air")
	l.Water = map[string]lift.Water{"inshore": lift.Inshore, "offshore": lift.Offshore}[f.choice("on water", "")]
	l.Body = map[string]lift.Body{"box": lift.BoxBody, "round": lift.RoundBody}[f.choice("body", "")]
	l.Sail, l.Tip, l.Gust, l.MayGust = f.amount("sail area", 0), f.amount("tip height", 0), f.amount("gust", 0), f.amount("gust limit", 0)
	if refs := r.people(f, "wind measured by"); len(refs) > 0 {
		l.Measures = refs[0].text
	}
	for _, kv := range f.pairs("under the hook") {
		if what, ok := r.newName(kv[0], "thing", true); ok {
			if v, ok := r.amount(kv[1], f.lead("under the hook"), &key{takes: anAmount, dim: quantity.Mass, low: 0.01, high: 1e5, example: "35 kg"}); ok {
				l.Under = append(l.Under, lift.Piece{Name: what, Mass: v})
			}
		}
	}
	if n := f.node("slings"); n != nil {
		g := r.open(n, &slingsSection, f.what+": slings")
		l.Slings, l.SlingsPos, l.Tackle = g.slings(), f.pos("slings"), g.amount("mass", 0)
	}
	if n := f.node("second hook"); n != nil {
		l.Second = r.open(n, &secondSection, f.what+": second hook").secondHook(f)
	}
	if k := r.kitOf[f.line("by")]; l.Hangs != "" {
		var known []string
		if k != nil {
			for what := range k.Hangs {
				known = append(known, what)
			}
			slices.Sort(known)
		}
		if !slices.Contains(known, l.Hangs) {
			r.faultAt(f.pos("hangs from"), r.among(l.Hangs, known, "write it under `hangs from` of the hoist, with what it may carry"), "%s%s is not under `hangs from` of the kit that lifts it", f.lead("hangs from"), short(l.Hangs))
		}
	}
}

func (f *fields) slings() *lift.Rig {
	s := &lift.Rig{Legs: f.count("legs", 0), LegLength: f.value("leg length"), Rise: f.value("hook above"), Table: f.choice("table", ""),
		WLL: f.value("rated"), Equalised: f.yes("equalised"), ChokeAngle: f.value("choke angle"), Edge: f.value("edge"), Heat: f.value("hot"),
		LugWLL: f.value("lug rated"), Coupling: f.value("coupling rated"),
		Hitch: map[string]lift.Hitch{"choked": lift.Choked, "basket": lift.Basket, "endless": lift.Endless}[f.choice("hitch", "straight")]}
	if text, ok := f.word("angle"); ok {
		var err error
		if s.Angle, s.Datum, err = lift.ParseAngle(text); err != nil {
			f.r.advice(f.vals["angle"], f.lead("angle"), err, "write for instance 50 deg from horizontal")
		}
	}
	if text, ok := f.word("size"); ok {
		var err error
		if s.Size, err = lift.ParseSize(text); err != nil {
			f.r.advice(f.vals["size"], f.lead("size"), err, "write for instance 8 mm, or 2 t")
		}
	}
	for _, n := range f.items("lugs") {
		if at, ok := f.spot(n, "lugs"); ok {
			s.Lugs = append(s.Lugs, at)
		}
	}
	if f.has("table") != f.has("size") {
		f.fault("", "write both, for instance table: EN 818-4 grade 8, size: 8 mm", "`table` and `size` go together")
	}
	return s
}

// spot reads [x, y, z] of any key; a bare 0 needs no unit.
func (f *fields) spot(n *yaml.Node, name string) (at [3]float64, ok bool) {
	if n.Kind != yaml.SequenceNode || len(n.Content) != 3 {
		f.r.fault(n, "write for instance [0, 400 mm, 12 mm]", "%sa position has x, y and z", f.lead(name))
		return at, false
	}
	for i, c := range n.Content {
		if c.Kind == yaml.ScalarNode && c.Value == "0" {
			continue
		}
		if at[i], ok = f.r.amount(c, f.lead(name), &key{takes: anAmount, dim: quantity.Length, low: -1e6, high: 1e6, example: "12 mm"}); !ok {
			return at, false
		}
	}
	return at, true
}

func (f *fields) secondHook(task *fields) *tasks.SecondHook {
	s := &tasks.SecondHook{Tilt: f.value("tilt"), Off: f.value("off"), Turns: f.yes("turns over"), Pos: task.pos("second hook")}
	if ref, ok := f.name("by"); ok {
		if s.Kit = f.r.kitOf[ref.text]; s.Kit == nil {
			f.r.unknown(ref.pos, f.lead("by"), "kit", ref.text, f.r.kitNames())
		}
	}
	list := f.items("at")
	if len(list) != 2 {
		if f.has("at") {
			f.fault("at", "write for instance [200 mm, 2200 mm]", "two places are wanted, one for each hook")
		}
		return s
	}
	for i, n := range list {
		if n.Kind == yaml.ScalarNode && n.Value == "0" {
			continue
		}
		v, _ := f.r.amount(n, f.lead("at"), &key{takes: anAmount, dim: quantity.Length, low: -1e6, high: 1e6, example: "200 mm"})
		if i == 0 {
			s.A = v
		} else {
			s.B = v
		}
	}
	return s
}

// resolveLifting finds the tasks that secure a load, prove it free or prove its fit; their order is
// held by links.
func (r *reader) resolveLifting() {
	for _, d := range r.drafts {
		t := d.t
		if d.f.sec.find("fit proved by") != nil {
			for _, ref := range d.f.names("fit proved by") {
				for _, name := range r.resolve(ref, d.f.lead("fit proved by"), d.block, t.Round) {
					if name != t.Name {
						t.FitProved = append(t.FitProved, name)
						t.Links = append(t.Links, tasks.Link{Task: name, Pos: ref.pos})
					}
				}
			}
		}
		if t.Lifting == nil {
			continue
		}
		l := *t.Lifting // rounds of a block share what is read once
		t.Lifting = &l
		l.Proved, l.Secured = r.oneTask(d, "proved free by"), r.oneTask(d, "secured by")
		if l.Proved != nil {
			t.Links = append(t.Links, tasks.Link{Task: l.Proved.Name, Pos: l.Proved.Pos})
		}
		if i := slices.IndexFunc(r.drafts, func(o *draft) bool { return l.Secured != nil && o.t.Name == l.Secured.Name }); i >= 0 {
			o := r.drafts[i].t
			o.Links = append(o.Links, tasks.Link{Task: t.Name, Pos: l.Secured.Pos})
		}
		asm, _, _ := strings.Cut(t.Lifts, "/")
		for _, a := range r.job.Assemblies {
			if a.Name == asm && a.Old && l.Proved == nil && !d.f.tried("proved free by") {
				r.faultAt(t.Pos, fmt.Sprintf("add `proved free by:` with the task that jacks or pulls it loose; for what has come out already, leave `old` out of %s", a.Name),
					"%s%s is old and sits in place: a stuck load until a task has proved it free", d.f.lead(""), a.Name)
			}
		}
	}
}

// oneTask resolves the one task under a key, nil if there is none.
func (r *reader) oneTask(d *draft, name string) *tasks.Named {
	ref, ok := d.f.name(name)
	if !ok {
		return nil
	}
	list := r.resolve(ref, d.f.lead(name), d.block, d.t.Round)
	switch {
	case len(list) > 1:
		r.faultAt(ref.pos, "name one round", "%s%s means several tasks", d.f.lead(name), short(ref.text))
	case len(list) == 1 && list[0] == d.t.Name:
		r.faultAt(ref.pos, "name another task", "%sit cannot do that itself", d.f.lead(name))
	case len(list) == 1:
		return &tasks.Named{Name: list[0], Pos: ref.pos}
	}
	return nil
}
