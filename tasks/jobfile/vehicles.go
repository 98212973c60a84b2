package jobfile

import (
	"fmt"
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/lift"
	"sailby/tasks/quantity"
)

var stowKeys = []key{
	{name: "size", takes: itsOwn, form: "[length, width, height]", shape: pairOfText, usual: "takes no room on the bed", example: "[1200 mm, 600 mm, 900 mm]", says: "as it travels"},
	{name: "stack", takes: yesNo, usual: "no", example: "yes", says: "lighter things may stand on it"},
	{name: "class", takes: aText, example: "acetylene", says: "what `carriage` rules call it"},
	{name: "of it", takes: aNumber, low: 0.001, high: 1e6, example: "20", beside: "class: acetylene", says: "how much of that, in the unit of the carriage rule"},
	{name: "spare", takes: aText, example: "a second hoist on hire at the harbour", says: "what stands in for it if it fails"},
}

var tableSurfaces = []string{string(lift.WoodOnPly), string(lift.WoodOnSteel), string(lift.SteelOnPly), string(lift.SteelOnAlu), string(lift.SteelOnSteel),
	string(lift.PaintOnPaint), string(lift.SmoothPainted), string(lift.SteelOnStainles), string(lift.RubberMat)}

var vehicleSection = section{name: "Vehicle", where: "vehicles / NAME", host: "vehicles/van", says: "A van, truck or trailer that takes things to the site. Its payload is what its papers say, or gross less empty; crew, fuel and the tools that always ride in it come off.", keys: []key{
	massOf("payload", "1100 kg", "what its papers say"),
	massOf("gross", "3500 kg", "greatest mass by its papers"),
	massOf("empty", "2150 kg", "as it is weighed"),
	{name: "crew", takes: aCount, low: 0, high: 9, usual: "0", example: "2", says: "people not counted in its empty mass, 75 kg each"},
	{name: "fuel", takes: anAmount, dim: quantity.Volume, low: 0, high: 1000, usual: "0 L", example: "70 L", says: "not counted in its empty mass"},
	massOf("standing load", "180 kg", "tools that always ride in it"),
	{name: "bed", takes: itsOwn, form: "[length, width, height]", shape: pairOfText, need: true, example: "[3200 mm, 1700 mm, 1800 mm]", says: "inside; with two lengths it is open above"},
	length("overhang", 1e4, "600 mm", "that a load may stand out behind"),
	{name: "runs", takes: aCount, low: 1, high: 50, usual: "1", example: "2", says: "how often it can go"},
	{name: "towed by", takes: aName, example: "truck", says: "a trailer: the vehicle that pulls it"},
	massOf("train", "7000 kg", "both together, on the vehicle that pulls"),
	length("axle", 2e4, "1500 mm", "a trailer: behind the front of its bed"),
	length("hitch", 1e4, "1200 mm", "a trailer: ahead of its bed"),
	{name: "nose", takes: itsOwn, form: "{min, max}", shape: limitsShape, usual: "at least 25 kg", example: "{min: 25 kg, max: 100 kg}", says: "a trailer: on the hitch"},
	length("long", 5e4, "5990 mm", "over all, for the ferry's bands"),
	length("high", 1e4, "2600 mm", "over all, for the ferry's bands"),
	{name: "driver", takes: aName, example: "Tom", says: "who drives, for `driving` rules"},
	{name: "own tools", takes: yesNo, usual: "no", example: "yes", says: "it carries the driver's own tools and materials"},
	{name: "surface", takes: aWord, words: tableSurfaces, usual: "the most slippery of the table", example: "steel on plywood", says: "load on bed, for friction"},
	{name: "strap", takes: anAmount, dim: quantity.Force, low: 500, high: 50000, usual: "400 daN", example: "350 daN", says: "pretension of a ratchet (S_TF on its label)"},
	{name: "strap angle", takes: anAmount, dim: quantity.Angle, low: 30, high: 90, usual: "90 deg", example: "75 deg", says: "from the bed"},
	{name: "strap edition", takes: aWord, words: []string{"2003", "2010"}, usual: "2010", example: "\"2003\"", says: "of EN 12195-1"},
}}

var carriageSection = section{name: "Carriage rule", where: "carriage / NAME", host: "carriage/ferry, gas", says: "What a ferry, a road or a tunnel lets a vehicle carry. It is flagged, never decided: the operator's answer counts.", keys: []key{
	{name: "class", takes: aText, need: true, example: "acetylene", says: "what it is about, as under `class` of kit; consumables are paint (L), thinner (L) and gas (bottles)"},
	{name: "most", takes: aNumber, low: 0, high: 1e6, example: "50", says: "greatest amount in one vehicle; 0 is none at all"},
	{name: "unit", takes: aText, usual: "pieces", example: "L", says: "of that amount"},
	massOf("heaviest", "25 kg", "of one piece"),
	length("tallest", 1e4, "900 mm", "of one piece"),
	{name: "not with", takes: names, example: "[oxygen]", says: "classes that may not be in the same vehicle"},
	{name: "says", takes: aText, example: "declare 24 h ahead", says: "what must be done"},
	{name: "ask", takes: yesNo, usual: "no", example: "yes", says: "the operator is asked before booking in any case"},
}}

var drivingSection = section{name: "Driving rule", where: "driving / NAME", host: "driving/house", says: "A limit on a driver's day on the way out. It is flagged, never decided.", keys: []key{
	massOf("over", "3500 kg", "gross mass of vehicle and trailer above which it applies"),
	{name: "drive", takes: anAmount, dim: quantity.Time, low: 1, high: 1440, example: "9 h", says: "at the wheel in a day"},
	{name: "drive without break", takes: anAmount, dim: quantity.Time, low: 1, high: 1440, example: "4 h 30 min", says: "at the wheel before a break"},
	{name: "on duty", takes: anAmount, dim: quantity.Time, low: 1, high: 1440, example: "11 h", says: "from the first to the last work of the day"},
	{name: "rest before", takes: anAmount, dim: quantity.Time, low: 1, high: 2880, example: "11 h", says: "since the day before"},
	{name: "not for own tools", takes: yesNo, usual: "no", example: "yes", says: "it may not apply to a driver with own tools: said, not decided"},
}}

var packingSection = section{name: "Packing", where: "packing", host: "packing", says: "What the packing list adds to what the tasks ask for.", keys: []key{
	{name: "allowance", takes: anAmount, dim: quantity.Percent, low: 0, high: 2, usual: "10 % (house judgement)", example: "15 %", says: "on consumables that have no spare of their own"},
	{name: "packs", takes: itsOwn, form: "{what: pack size}", shape: massShape, usual: "as sold", example: "{flux-cored wire: 5 kg, electrodes: 2.5 kg}", says: "size of a spool, packet or tin by the beginning of the name; paints have `packs` of their own"},
	{name: "boxes", takes: namedOf, sub: &boxSection, example: "{red box: {holds: [wire, discs], mass: 6 kg}}", says: "what is packed together"},
	{name: "also", takes: namedOf, sub: &extraSection, example: "{staging tubes: {mass: 84 kg}}", says: "what to take that no task names"},
}}

var boxSection = section{name: "Box", where: "packing / boxes / NAME", host: "packing/boxes/red box", says: "One box.", keys: []key{
	{name: "holds", takes: names, need: true, example: "[flux-cored wire, grinding discs]", says: "what is in it, by its name on the packing list or the beginning of that"},
	massOf("mass", "6 kg", "empty"),
	stowKeys[0],
}}

var extraSection = section{name: "Extra", where: "packing / also / NAME", host: "packing/also/staging tubes", says: "Something to take that no task names.", keys: []key{
	{name: "amount", takes: aText, usual: "1", example: "12 of 2 m", says: "how much, as printed"},
	massOf("mass", "84 kg", "all of it"),
	{name: "for", takes: names, example: "resin", says: "the tasks that it is for"},
	{name: "stops", takes: yesNo, usual: "no", example: "yes", says: "the job stops without it"},
	stowKeys[0], stowKeys[2], stowKeys[3], stowKeys[4],
}}

var bandSection = section{name: "Band", where: "trips / item / bands / NAME", host: "trips/1/bands/small", says: "A length and height that the ferry books vehicles by, the first that takes one counts.", keys: []key{
	{name: "length", takes: anAmount, dim: quantity.Length, low: 100, high: 1e5, need: true, example: "6 m", says: "up to"},
	{name: "height", takes: anAmount, dim: quantity.Length, low: 100, high: 1e4, usual: "any", example: "3 m", says: "up to"},
}}

func init() {
	tripSection.keys = append(tripSection.keys,
		key{name: "bands", takes: namedOf, sub: &bandSection, example: "{small: {length: 6 m, height: 3 m}, large: {length: 8 m}}", says: "vehicle lengths and heights of the ferry"},
		key{name: "sea", takes: aWord, words: []string{"A", "B", "C"}, usual: "B where there is a boat", example: "A", says: "sea area of the crossing, for straps: A waves up to 8 m, B up to 12 m, C beyond"})
	topSection.keys = append(topSection.keys,
		key{name: "vehicles", takes: namedOf, sub: &vehicleSection, example: "{van: {payload: 1100 kg, bed: [3200 mm, 1700 mm, 1800 mm]}}", without: "carriage", says: "what takes things to the site"},
		key{name: "carriage", takes: namedOf, sub: &carriageSection, example: "{ferry gas: {class: acetylene, most: 50, unit: L}}", says: "what may be carried"},
		key{name: "driving", takes: namedOf, sub: &drivingSection, example: "{house rule: {drive: 9 h}}", says: "limits on a driver's day"},
		key{name: "packing", takes: keysOf, sub: &packingSection, example: "{allowance: 15 %}", says: "what the packing list adds"})
}

// stowing reads how a thing travels.
func (f *fields) stowing() tasks.Stowing {
	s := tasks.Stowing{Class: f.line("class"), Of: f.value("of it"), Spare: f.line("spare"), Size: f.sizes("size", 3)}
	if f.sec.find("stack") != nil {
		s.Stack = f.yes("stack")
	}
	if s.Of > 0 && s.Class == "" {
		f.fault("of it", "add `class: acetylene`", "nothing says what it is of")
	}
	return s
}

// sizes reads lengths; fewer than three stand for an open top.
func (f *fields) sizes(name string, least int) (out [3]float64) {
	if !f.has(name) {
		return out
	}
	n := len(f.items(name))
	if n < least || n > 3 {
		f.fault(name, "write for instance "+f.key(name).example, "expected length, width and height, found %s", strconv.Itoa(n))
		return out
	}
	copy(out[:], f.lengths(name, n))
	return out
}

// readVehicles reads vehicles, the rules for them, bands of ferries and what the packing list adds.
func (r *reader) readVehicles(f *fields) {
	for _, kv := range f.pairs("vehicles") {
		if name, ok := r.newName(kv[0], "vehicle", true); ok {
			r.job.Vehicles = append(r.job.Vehicles, r.vehicle(name, kv[0], r.open(kv[1], &vehicleSection, fmt.Sprintf("vehicle %q", name))))
		}
	}
	for _, v := range r.job.Vehicles {
		var others []string
		for _, o := range r.job.Vehicles {
			if o != v && o.TowedBy == "" {
				others = append(others, o.Name)
			}
		}
		if v.TowedBy != "" && !has(others, v.TowedBy) {
			r.faultAt(v.Pos, r.among(v.TowedBy, others, "declare it under `vehicles`"), "vehicle %q: towed by: no vehicle is called %s", v.Name, short(v.TowedBy))
		}
	}
	for _, kv := range f.pairs("carriage") {
		if name, ok := r.newName(kv[0], "rule", true); ok {
			g := r.open(kv[1], &carriageSection, fmt.Sprintf("carriage %q", name))
			c := lift.CarriageRule{Name: name, Class: g.line("class"), Most: g.value("most"), Unit: g.line("unit"), Heaviest: g.value("heaviest"),
				Tallest: g.value("tallest"), NotWith: texts(g.names("not with")), Says: g.line("says"), AskBefore: g.yes("ask")}
			if c.Unit == "" {
				c.Unit = "pieces"
			}
			if g.has("most") && c.Most == 0 {
				c.Most = -1
			}
			r.job.Carriage = append(r.job.Carriage, c)
		}
	}
	for _, kv := range f.pairs("driving") {
		if name, ok := r.newName(kv[0], "rule", true); ok {
			g := r.open(kv[1], &drivingSection, fmt.Sprintf("driving %q", name))
			r.job.Driving = append(r.job.Driving, lift.DutyRule{Name: name, Over: g.value("over"), Drive: g.value("drive"), DriveBreak: g.value("drive without break"),
				OnDuty: g.value("on duty"), RestBefore: g.value("rest before"), NotOwnTools: g.yes("not for own tools")})
		}
	}
	if n := f.node("packing"); n != nil {
		r.packing(r.open(n, &packingSection, "packing"))
	}
}

func has(list []string, word string) bool {
	for _, v := range list {
		if v == word {
			return true
		}
	}
	return false
}

func (r *reader) vehicle(name string, at *yaml.Node, f *fields) *tasks.Vehicle {
	v := &tasks.Vehicle{Pos: r.pos(at), Long: f.value("long"), High: f.value("high"), OwnTools: f.yes("own tools"),
		Bed: lift.Surface(f.choice("surface", "")), Edition: f.choice("strap edition", "") == "2003"}
	bed := f.sizes("bed", 2)
	v.Vehicle = lift.Vehicle{Name: name, Payload: f.value("payload"), Gross: f.value("gross"), Empty: f.value("empty"), Crew: f.count("crew", 0), Fuel: f.value("fuel"),
		Standing: f.value("standing load"), Length: bed[0], Width: bed[1], Height: bed[2], Overhang: f.value("overhang"), Trips: f.count("runs", 0),
		TowedBy: f.line("towed by"), Train: f.value("train"), Axle: f.value("axle"), Hitch: f.value("hitch")}
	if least, most := f.span("nose", &key{takes: anAmount, dim: quantity.Mass, low: 0, high: 1e4, example: "25 kg"}); least != nil || most != nil {
		if least != nil {
			v.NoseLeast = *least
		}
		if most != nil {
			v.NoseGreatest = *most
		}
	}
	v.Lashing = lift.Strap{STF: f.value("strap") / 10, Angle: f.value("strap angle")}
	if refs := r.people(f, "driver"); len(refs) > 0 {
		v.Driver = refs[0].text
	}
	if !f.tried("payload") && !(f.tried("gross") && f.tried("empty")) {
		f.fault("", "add `payload: 1100 kg`, or `gross` and `empty` from its papers", "nothing says how much it may carry")
	}
	return v
}

func (r *reader) packing(f *fields) {
	p := &r.job.Packing
	p.Allowance = f.amount("allowance", 0)
	for _, kv := range f.pairs("packs") {
		what, ok := r.newName(kv[0], "consumable", true)
		text, ok2 := r.text(kv[1], f.lead("packs"), "5 kg")
		if !ok || !ok2 {
			continue
		}
		size, err := packSize(text)
		if err != nil {
			r.advice(kv[1], f.lead("packs"), err, "write for instance 5 kg, 20 L, or 10 pieces")
			continue
		}
		if p.Packs == nil {
			p.Packs = map[string]float64{}
		}
		p.Packs[what] = size
	}
	for _, kv := range f.pairs("boxes") {
		if name, ok := r.newName(kv[0], "box", true); ok {
			g := r.open(kv[1], &boxSection, fmt.Sprintf("box %q", name))
			p.Boxes = append(p.Boxes, tasks.Box{Name: name, Pos: r.pos(kv[0]), Mass: g.value("mass"), Size: g.sizes("size", 3), Holds: texts(g.names("holds"))})
		}
	}
	for _, kv := range f.pairs("also") {
		if name, ok := r.newName(kv[0], "thing", true); ok {
			g := r.open(kv[1], &extraSection, fmt.Sprintf("packing: %q", name))
			e := tasks.Extra{Name: name, Pos: r.pos(kv[0]), Amount: g.line("amount"), Mass: g.value("mass"), Class: g.line("class"), Of: g.value("of it"),
				Stops: g.yes("stops"), Spare: g.line("spare"), Size: g.sizes("size", 3)}
			for _, ref := range g.names("for") {
				e.For = append(e.For, r.resolve(ref, g.lead("for"), nil, 0)...)
			}
			p.Also = append(p.Also, e)
		}
	}
}

// packSize reads the size of a pack in the unit that its consumable is counted in: kg, L or pieces.
func packSize(text string) (float64, error) {
	if n, ok := strings.CutSuffix(text, " pieces"); ok {
		return quantity.Parse(n, quantity.Number)
	}
	if v, err := quantity.Parse(text, quantity.Volume); err == nil {
		return v, nil
	}
	return quantity.Parse(text, quantity.Mass)
}

// carried reads what a trip's ferry says about vehicles.
func (r *reader) carried(t *tasks.Trip, f *fields) {
	for _, kv := range f.pairs("bands") {
		if name, ok := r.newName(kv[0], "band", true); ok {
			g := r.open(kv[1], &bandSection, fmt.Sprintf("%s: band %q", strings.TrimSuffix(f.lead(""), ": "), name))
			t.Bands = append(t.Bands, lift.Band{Name: name, Length: g.value("length"), Height: g.value("height")})
		}
	}
	t.Sea = map[string]lift.Sea{"A": lift.SeaA, "B": lift.SeaB, "C": lift.SeaC}[f.choice("sea", "")]
	for _, l := range t.Out {
		if l.What == "sail" && t.Sea == lift.NoSea {
			t.Sea = lift.SeaB
		}
	}
}
