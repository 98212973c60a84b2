package jobfile

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"sailby/tasks/hours"
	"sailby/tasks/lift"
	"sailby/weld"
)

// near wants a number that was worked out by hand.
func near(t *testing.T, what string, got, want float64) {
	t.Helper()
	if math.Abs(got-want) > 1e-9*math.Max(1, math.Abs(want)) {
		t.Errorf("%s is %v, want %v", what, got, want)
	}
}

// line writes values with a blank between each two.
func line(v ...any) string { return strings.TrimSpace(fmt.Sprintln(v...)) }

func same(t *testing.T, what string, got, want any) {
	t.Helper()
	if fmt.Sprint(got) != fmt.Sprint(want) {
		t.Errorf("%s is %v, want %v", what, got, want)
	}
}

func TestPlace(t *testing.T) {
	job := read(t, text(t, "", "pier: {open: daily 08:00-18:00, workfaces: {deck: {people: 2}}}", `pier:
    title: Tarskay pier
    at: [57.6 N, 7.2 W]
    open: [Mon-Fri 08:00-12:00 13:00-18:00, Sat 08:00-13:00]
    also open: [2027-04-11 08:00-12:00, day 3 18:00-20:00]
    closed: {2027-04-09: pier fair}
    noisy work: Mon-Fri 09:00-17:00
    permits: {hot work: {valid: Mon-Sat 08:00-16:30, issue: 30 min}, tank: {for: closed space, valid: always}}
    opening up: 20 min
    clearing up: 1/4 h
    face factor: 0.6
    fire watch: 90 min
    steel temperature: 50 F
    mains: 12 kVA
    climate: {month: April, wet days: 14}
    tide: {table: tide.csv}
    workfaces:
      deck: {people: 2, next to: hinge, daylight: yes, over water: yes}
      hinge: {level: 1.1 m, covers at: 1.4 m, way off before: 30 min, opening up: 10 min, clearing up: 5 min, closed space: yes}
      slip: {reach: {file: hinge.csv}, between tides: yes, dry hours: [day 1 08:00-18:00]}
`))
	p := job.Places[1]
	same(t, "title", p.Title, "Tarskay pier")
	near(t, "latitude", p.Lat, 57.6)
	near(t, "longitude", p.Lon, -7.2)
	same(t, "opening rules", len(p.Open), 2)
	same(t, "on Sunday", len(p.Open.On(hours.Date{Year: 2027, Month: 4, Day: 11})), 0)
	same(t, "also open", line(p.AlsoOpen[1].From.Day, p.AlsoOpen[1].From.Minute, p.AlsoOpen[1].To.Minute), "3 1080 1200")
	same(t, "closed", p.Closed, map[hours.Date]string{{Year: 2027, Month: 4, Day: 9}: "pier fair"})
	same(t, "permits", line(p.Permits[0].For, p.Permits[0].Issue.Value, p.Permits[1].For), "hot work 30 closed space")
	for what, c := range map[string][2]float64{"opening up": {p.OpeningUp.Value, 20}, "clearing up": {p.ClearingUp.Value, 15}, "face factor": {p.FaceFactor.Value, 0.6},
		"fire watch": {p.FireWatch.Value, 90}, "steel": {p.Steel.Value, 10}, "mains": {p.Mains.Value, 12}, "wet days": {float64(p.Climate.WetDays), 14}, "month": {float64(p.Climate.Month), 4}} {
		near(t, what, c[0], c[1])
	}
	deck, hinge, slip := p.Workfaces[0], p.Workfaces[1], p.Workfaces[2]
	same(t, "next to", line(deck.NextTo, hinge.NextTo), "[hinge] [deck]")
	same(t, "deck", line(deck.People, deck.Light, deck.Water, deck.Closed, deck.Tidal), "2 true true false false")
	same(t, "hinge", line(hinge.Level.Value, hinge.CoversAt.Value, hinge.WayOff.Value, hinge.OpeningUp.Value, hinge.ClearingUp.Value, hinge.Closed, hinge.Tidal), "1.1 1.4 30 10 5 true true")
	same(t, "reach", line(len(slip.Reach), slip.Reach[0].From.Text, slip.Tidal, len(slip.Dry)), "2 2027-04-06 07:00 UTC true 1")

	shop := job.Places[0] // what holds where nothing is said
	same(t, "the shop", line(shop.FaceFactor.Value, shop.FireWatch.Value, shop.Steel.Value, shop.Steel.Pos.Given(), shop.Noisy == nil, shop.HasAt), "0.85 0 10 false true false")
	plain := read(t, text(t, "")).Places[1]
	same(t, "a site", line(plain.FaceFactor.Value, plain.FireWatch.Value), "0.7 60")

	open := "open: daily 08:00-18:00"
	for value, says := range map[string]string{
		"at: [57.6 N]": "a latitude and a longitude", "at: [97.6 N, 7.2 W]": "is not degrees N or S", "at: [57.6, 7.2]": "is not degrees", "zone: GMT+1": "is not a zone by region",
		"zone: Local": "is not a zone by region", "zone: Europe/../Berlin": "is not known", "permits: {x: {valid: always}}": "what it is for is not known", "permits: {hot work: {}}": "valid is missing",
		"closed: [2027-04-09, 2027-04-09]": "stands twice", "closed: [9 April]": "is not a date", "face factor: 70 %": "expected a plain number", "face factor: 1.5": "outside 0.1 to 1",
		"steel temperature: 10": "has no unit", "climate: {month: Apr}": "is not one of", "workfaces: {deck: {next to: deck}}": "next to itself", "workfaces: {deck: {next to: quay}}": "has no workface",
		"workfaces: {deck: {between tides: yes}}": "nothing says when the water", "workfaces: {deck: {way off before: 1 h}}": "nothing says when it covers", "noisy work: Mon": "has days but no hours",
	} {
		if strings.HasPrefix(value, "workfaces: {deck") {
			refused(t, text(t, "", "workfaces: {deck: {people: 2}}", value), says)
		} else {
			refused(t, text(t, "", open, open+", "+value), says)
		}
	}
}

func TestPerson(t *testing.T) {
	job := read(t, text(t, "", "Tom: {tickets: [fitter]}", `Tom: {tickets: [fitter]}
  Ines:
    tickets: [{weld: flux-cored, positions: [3G, PA], joints: butt, thickness: 3 to 20 mm}, weld 111 PB fillet]
    trade: welder
    hours: Mon-Thu 08:00-16:00
    from: 2027-04-07 08:00
    until: day 8 12:00
    off: [2027-04-10, 2027-04-11]
    places: [pier, shop]
  Inspector: {outside: yes, places: pier, booked: [day 3 10:00-12:00]}`))
	p := job.People[1]
	w := p.Tickets[0]
	same(t, "ticket", line(w.Process, w.Positions, w.Joints, w.ThickFrom, w.ThickTo), "136 [PF PA] [butt] 3 20")
	same(t, "second ticket", p.Tickets[1].String(), "weld 111 PB fillet")
	same(t, "person", line(p.Trade, len(p.Hours), p.From.Date, p.From.Zone, p.Until.Day, len(p.Off), p.Places), "welder 1 2027-04-07 Europe/London 8 2 [pier shop]")
	same(t, "inspector", line(job.People[2].Outside, len(job.People[2].Booked)), "true 1")
	for value, says := range map[string]string{
		"tickets: [{weld: 137}]": "is not a welding process", "tickets: [{weld: 136, positions: [PX]}]": "is not a welding position", "tickets: [{weld: 136, joints: [lap]}]": "neither fillet nor butt",
		"tickets: [{weld: 136, thickness: 3 to 20}]": "has no unit", "tickets: [{positions: PF}]": "weld is missing", "tickets: [weld 136 up]": "neither a process nor a position",
		"places: [dock]": "no place is called", "booked: [day 1 14:00-15:00]": "only for somebody from outside", "outside: yes, booked: [day 2 08:00-09:00]": "has no place", "off: [Friday]": "is not a date",
	} {
		refused(t, text(t, "", "Tom: {tickets: [fitter]}", "Tom: {tickets: [fitter]}\n  Ann: {"+value+"}"), says)
	}
	refused(t, text(t, "", "Tom:", "Ann or Bob: {tickets: [fitter]}\n  Tom:"), "join names in needs")
}

func TestKit(t *testing.T) {
	job := read(t, text(t, `kit:
  generator: {gives: 15 kVA, at: pier}
  mig set: {count: 2, draws: 9 kVA, stays: yes, mass: 24 kg}
  blue hoist: {kind: chain hoist, rated: 1 t, speed: 1.2 m/min, hangs from: {shop beam: 1.5 t}}
hire:
  loader crane: {at: pier, slots: [2027-04-06 08:00-12:00, day 4 13:00-17:00], chart: {6 m: 1.5 t, 4 m: 2.4 t}, gust limit: 35 km/h}
`, "hours: 1,", "hours: 1, kit: {mig set: 2, blue hoist: 1},"))
	for i, want := range []string{"generator 1 15 0 false pier", "mig set 2 0 9 true -", "blue hoist 1 0 0 false -", "loader crane 1 0 0 false pier"} {
		k := job.Kit[i]
		at := "-"
		if k.At != nil {
			at = k.At.Name
		}
		same(t, "kit", line(k.Name, k.Count, k.Gives, k.Draws, k.Stays, at), want)
	}
	hoist, crane := job.Kit[2], job.Kit[3]
	same(t, "hoist", line(hoist.HasKind, hoist.Kind, hoist.Rated.Value, hoist.Speed.Value, hoist.Hangs), "true chain hoist 1000 1.2 map[shop beam:1500]")
	same(t, "crane", line(crane.HasKind, crane.Kind, len(crane.Slots), crane.Chart), "true loader crane 2 [{4 2400} {6 1500}]")
	near(t, "gust limit", crane.Gust.Value, 35/3.6)
	uses := task(t, job, "load").Kit
	same(t, "uses", line(len(uses), uses[0].Count, uses[1].Kit.Name), "2 2 blue hoist")
	for value, says := range map[string]string{
		"kit: {x: {count: 0}}": "outside 1 to 1000", "kit: {x: {kind: crab}}": "is not one of", "kit: {x: {at: dock}}": "no place", "hire: {x: {at: pier}}": "slots is missing",
		"hire: {x: {slots: day 2 08:00-12:00, chart: {4: 2 t}}}": "has no unit", "kit: {x: {rated: 1}}": "has no unit", "kit: [x]": "expected names with values",
		"kit: {x: {}}\nhire: {x: {slots: day 2 08:00-12:00}}": "kit of that name",
	} {
		refused(t, text(t, value+"\n"), says)
	}
}

func TestProcedureAndSeams(t *testing.T) {
	job := read(t, text(t, `kit: {set: {}}
procedures:
  a: {process: stick, position: 3G, electrode: 3.2 mm, current: 120 A, volts: 24 V, travel: 10 cm/min, deposition: 1.2 kg/h, efficiency: 60 %, operating factor: 20 %,
      bead area: 30 mm2, preheat: none, interpass: 200 C, heat input: {min: 0.6 kJ/mm, max: 2 kJ/mm}, kit: set, set: {rated: 200 A, duty cycle: 35 %, efficiency: 80 %}}
`, "kind: weld, at: pier/deck, hours: 3", `kind: weld, at: pier/deck, joints: [
      {fillet: {leg: 6 mm, second leg: 8 mm, both sides: yes, bead: 50 mm, pitch: 150 mm, gap: none}, length: 1.2 m each, count: 4, position: 2F, procedure: a, name: W1},
      {V butt: {thickness: 1/2 in, root gap: none, cap: none, angle: 60 deg, back gouge: yes}, length: 1.9 m in all, turns: 1, access: 1.3},
      {fillet: {throat: 4 mm, diameter: 48.3 mm}, count: 2}]`, "[fitter]", "[fitter, weld]"))
	p := job.Procedures[0]
	same(t, "procedure", line(int(p.Process), p.Position, p.ElectrodeDiameter, p.Travel, p.Deposition, p.Efficiency, p.OperatingFactor, p.Preheat == weld.None, p.Interpass, p.MinHeatInput, p.MaxHeatInput, p.Kit),
		"111 PF 3.2 100 1.2 0.6 0.2 true 200 0.6 2 set")
	near(t, "bead area", p.BeadArea, 30)
	same(t, "set", p.Set, "{200 0.35 0 0.8 0}")
	same(t, "origins", line(p.Origins["current"].Line, p.Origins["set efficiency"].Line, p.Origins["efficiency"].Line, p.Origins["volts"].File), "21 22 21 job.yaml")
	s := task(t, job, "weld lugs").Seams
	same(t, "fillet", line(s[0].Joint.Leg, s[0].Joint.Leg2, s[0].Joint.BothSides, s[0].Joint.Bead, s[0].Joint.Pitch, s[0].Joint.Gap == weld.None, s[0].Joint.Length, s[0].Joint.Count, s[0].Position, s[0].Name, s[0].Procedure),
		"6 8 true 50 150 true 4800 4 PB W1 a")
	same(t, "its procedure", s[0].Seam.Procedure == &p.Procedure, true)
	same(t, "butt", line(s[1].Joint.Type, s[1].Joint.Thickness, s[1].Joint.RootGap == weld.None, s[1].Joint.Cap == weld.None, s[1].Joint.BackGouge, s[1].Joint.Length, s[1].Turns, s[1].Access), "single V 12.7 true true true 1900 1 1.3")
	same(t, "tube", line(s[2].Joint.Throat, s[2].Joint.Diameter, s[2].Joint.Length, s[2].Joint.Count), "4 48.3 0 2")
	for value, says := range map[string]string{
		"{fillet: {leg: 6 mm}, lap: {leg: 6 mm}, length: 1 m}": "is both fillet and lap", "{fillet: {}, length: 1 m}": "the fillet has no size", "{fillet: {leg: 6 mm}}": "the fillet has no length",
		"{fillet: {leg: 90 mm}, length: 1 m}": "outside 1 mm to 60 mm", "{filet: {leg: 6 mm}, length: 1 m}": "is not a key here", "{fillet: {leg: 6 mm}, length: 1}": "has no unit",
		"{fillet: {leg: 6 mm, throat: 6 mm}, length: 1 m}": "are not the same fillet", "{V: {root gap: wide, thickness: 10 mm}, length: 1 m}": "expected a length", "12 mm": "expected keys with values",
	} {
		data := text(t, "", "kind: weld, at: pier/deck, hours: 3", "kind: weld, at: pier/deck, joints: ["+value+"]", "[fitter]", "[fitter, weld]")
		if strings.HasPrefix(value, "{filet") { // the missing joint is a second fault
			if _, err := ReadBytes("job.yaml", data, nil); err == nil || !strings.Contains(err.Error(), `did you mean "fillet"?`) {
				t.Errorf("%v", err)
			}
			continue
		}
		refused(t, data, says)
	}
	for value, says := range map[string]string{"process: 137": "not a welding process", "set: {rated: 200 A}": "go together", "kit: saw": "no kit", "heat input: {min: 2 kJ/mm, max: 1 kJ/mm}": "is more than max",
		"preheat: warm": "expected a temperature", "efficiency: 0.8": "has no unit", "wire: 12 mm": "outside 0.6 mm to 6.4 mm"} {
		refused(t, text(t, "procedures: {a: {"+value+"}}\n"), says)
	}
}

func TestPaint(t *testing.T) {
	job := read(t, text(t, `paints:
  p: {kind: epoxy, volume solids: 65 %, dft: 4 mil, pot life: {10 C: 4 h, 20 C: 2 h}, apply: {min: 41 F, max: 35 C}, humidity: {max: 80 %}, above dew point: 4 K, wind: {airless: 6 m/s},
      next coat: {p: {5 C: {min: 36 h, max: 30 d}, 20 C: {min: 8 h, max: 14 d}}, any: {10 C: {min: 20 h}}}, never: {alkyd: it lifts}, hard dry: {10 C: 20 h, 20 C: 7 h},
      stays dry: 6 h, packs: [5 L, 1 US gal], mix: "3:1", induction: 10 min, thinner: 5 %, isocyanate: no}
`, "load: {kind: lift, at: pier, hours: 1", "paint: {kind: coat, at: shop, area: 4 m2, coats: [p, p], method: airless, shape: lattice}\n  load: {kind: lift, at: pier, hours: 1"))
	p := job.Paints[0]
	for what, c := range map[string][2]float64{"solids": {p.VolumeSolids, 0.65}, "film": {p.DFT, 101.6}, "apply min": {p.ApplyMin, 5}, "apply max": {p.ApplyMax, 35}, "humidity": {p.RHMax, 0.8},
		"dew": {p.DewSpread, 4}, "wind": {p.WindMax["airless"], 6}, "dry hours": {p.DryHours, 6}, "gallon": {p.PackSizes[1], 3.785411784}, "mix": {p.MixRatio[0], 3}, "induction": {p.Induction, 10}, "thinner": {p.Thinner, 0.05}} {
		near(t, what, c[0], c[1])
	}
	same(t, "next coat", line(p.NextCoat["p"].Min, p.NextCoat["p"].Max), "[{5 2160 0} {20 480 0}] [{5 43200 0} {20 20160 0}]")
	same(t, "kind and rest", line(p.Kind, p.Never["alkyd"], p.HardDry, p.Sources["hard dry"].Line, len(p.Service) > 0, p.Isocyanate), "two-pack epoxy it lifts [{10 1200 0} {20 420 0}] 19 true false")
	x := task(t, job, "paint")
	same(t, "coat", line(x.Coats, x.Method, x.Shape, x.Area.Value), "[p p] airless lattice 4")
	for value, says := range map[string]string{
		"dft: 100": "has no unit", "hard dry: {10: 20 h}": "has no unit", "hard dry: [10 C]": "expected names with values", "above dew point: 3 C": "not a difference of temperature", "wind: {spray: 6 m/s}": "not a way to apply",
		"mix: \"4\"": "not a mixing ratio", "packs: [5 kg]": "is not a unit for a volume", "apply: {min: 30 C, max: 5 C}": "is more than max", "next coat: {p: {5 C: {max: 30 d}}}": "there is no least wait",
		"next coat: {p: {5 C: 36 h}}": "expected keys with values", "hard dry: {10 C: 20 h, 10 C: 7 h}": "stands twice", "volume solids: 120 %": "outside 5 % to 100 %",
	} {
		refused(t, text(t, "paints: {p: {kind: epoxy, "+value+"}}\n"), says)
	}
	refused(t, text(t, "paints: {p: {dft: 100 um}}\n"), "kind is missing")
}

// The plate by hand: 2.4 x 0.8 x 0.012 m of 7850 kg/m3 is 180.864 kg.
func TestAssembly(t *testing.T) {
	job := read(t, text(t, `steel: S275
assemblies:
  frame:
    axes: z up
    parts:
      base: {plate: [2400 mm, 800 mm, 12 mm], at: [0, 0, -12 mm]}
      posts: {section: SHS 100x100x6, length: 6.4 m in all, count: 4, along: -z, at: [[0, 0, 0], [1 m, 0, 0], [0, 1 m, 0], [1 m, 1 m, 0]], sealed: yes}
      pins: {bolts: [20 mm, 70 mm], count: 8}
      motor: {item: 35 kg, area: 0.8 m2, known: weighed, middle: yes, material: cast iron}
  pontoon: {mass: 1.2 t, known: drawn, steel: 316L}
`, "load: {kind: lift, at: pier, hours: 1", "load: {kind: lift, at: pier, lifts: frame/base, height: 1.2 m, travel: 3 m, radius: 4 m, by: hands"))
	a := job.Assemblies[0]
	base, posts, pins, motor := a.Parts[0], a.Parts[1], a.Parts[2], a.Parts[3]
	total, err := lift.Mass([]lift.Part{base.Part})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "mass of the plate", total.Mass, 180.864)
	same(t, "base", line(base.Shape.Kind, base.At, base.Material), "plate [0 0 -12] S275")
	same(t, "posts", line(posts.Length, posts.Count, posts.Along, posts.Places[3], posts.Shape.Sealed), "1600 4 [0 0 -1] [1000 1000 0] true")
	same(t, "pins", line(pins.Shape.Kind, pins.Shape.Thread, pins.Length, pins.Count), "bolt set 20 70 8")
	same(t, "motor", line(motor.Stated, motor.Shape.Area, motor.Known, motor.Middle, motor.Material), "35 0.8 weighed true cast iron")
	same(t, "pontoon", line(job.Assemblies[1].Mass.Value, job.Assemblies[1].How, job.Assemblies[1].Steel), "1200 drawn 316L")
	x := task(t, job, "load")
	same(t, "lift", line(x.Lifts, x.Height.Value, x.Travel.Value, x.Radius.Value, x.By), "frame/base 1200 3000 4000 hands")
	for value, says := range map[string]string{
		"{}": "neither parts nor a mass", "{parts: {a: {count: 2}}}": "nothing says what it is", "{parts: {a: {plate: [1 m, 1 m, 6 mm], item: 3 kg}}}": "is both plate and item",
		"{parts: {a: {section: SHS 100x100x6}}}": "the section has no length", "{parts: {a: {plate: [1 m, 1 m, 6 mm], length: 2 m}}}": "a length goes with a section", "{parts: {a: {plate: [1 m, 1 m, 6]}}}": "has no unit",
		"{parts: {a: {item: 3 kg, at: [0, 0]}}}": "a position has x, y and z", "{parts: {a: {item: 3 kg, at: [0, 0, 5]}}}": "has no unit", "{parts: {a: {item: 3 kg, count: 2, at: [[0, 0, 0]]}}}": "1 positions for 2 pieces",
		"{parts: {a: {item: 3 kg, along: up}}}": "is not a direction", "{parts: {a: {plate: [1 m, 1 m, 6 mm], material: cheese}}}": "is not a material", "{parts: {a: {plate: [1 m, 1 m, 6 mm], holes: 2 m2}}}": "",
	} {
		refused(t, text(t, "assemblies: {frame: "+value+"}\n"), says)
	}
	refused(t, text(t, "assemblies: {frame: {mass: 1 t}}\n", "kind: lift, at: pier, hours: 1", "kind: lift, at: pier, lifts: frame/base"), `assembly "frame" has no part "base"`)
}

func TestTaskKeys(t *testing.T) {
	data := text(t, "clashes: {add: [[dust, wet film]], drop: [[grit, wet film]]}\n", "load: {kind: lift, at: pier, hours: 1, after: weld lugs}", `load:
    kind: lift
    at: pier/deck
    title: Swing it over
    drawing: RH-04
    note: |
      two tag lines
      no wind
    man-hours: {low: 3 h, likely: 3.5, high: 5 h}
    needs: {fitter: 1, Tom or Ann: 1, weld 136 PF and fitter: 1}
    standing: 20 to 40 min
    why: grout sets
    keeps: {fire watch: 1}
    may stop: {not before: 90 min, least piece: 30 min}
    set-up: 25 min
    may change hands: yes
    chance: 35 %
    hot work: no
    noisy: yes
    fire watch: 0 min
    alone: yes
    states: [dust, grit]`, "Tom: {tickets: [fitter]}", "Tom: {tickets: [fitter, fire watch]}\n  Ann: {tickets: [weld 136, fitter]}")
	job := read(t, data)
	x := task(t, job, "load")
	same(t, "task", line(x.Label(), x.Where(), x.Drawing, strings.Count(x.Note, "\n"), x.ManHours.Range, x.Standing.Range, x.Why), "Swing it over pier/deck RH-04 1 {180 210 300} {20 30 40} grout sets")
	same(t, "needs", line(len(x.Needs), x.Needs[0].Ticket, x.Needs[1].Who, x.Needs[2].Ticket, x.Needs[2].Also, x.Keeps[0].Watch), "3 fitter [Tom Ann] weld 136 PF [fitter] true")
	same(t, "stops", line(x.SafeStop.Value, x.SafeStop.Pos.Given(), x.LeastPiece.Value, x.SetUp.Value, x.MayChangeHands), "90 true 30 25 true")
	same(t, "rest", line(x.Chance, *x.HotWork, *x.Noisy, x.FireWatch.Value, x.FireWatch.Pos.Given(), *x.Lone, x.States, x.InOneGo == nil), "0.35 false true 0 true false [dust grit] true")
	same(t, "clashes", line(job.Clashes[0].A, job.NoClash[0].B), "dust wet film")

	weld := "weld lugs: {kind: weld, at: pier/deck, hours: 3"
	for value, says := range map[string]string{
		"states: [mud]": "no state is called", "needs: [fitter]": "expected tickets with how many", "needs: {fitter: 0}": "outside 1 to 50", "keeps: {fitter: 1}": "no standing time", "why: x": "no standing time",
		"may stop: {not before: root run}": "expected a time", "may stop: never": "expected keys with values", "group: a": "only maybes are in a group", "in one go: no, may pause over meals: yes": "pauses anyway",
		"needs light: yes": "needs the position of the place", "people: 1, needs: {fitter: 1, anybody: 1}": "it needs 2 by their tickets", "who: [Tom], people: 0": "but 1 are named", "after: [prime deck, prime deck]": "stands twice",
		"starts with: {load: {min: 1 h}}": "takes names, not waits", "after: {prime deck: {min: 1}}": "has no unit", "after start of: {prime deck: cooled}": "the start of", "title: [a]": "expected one value", "kind: plain": "stands twice here",
		"hours: 4": "stands twice here", "joints: 4": "expected a list of joints", "note: " + strings.Repeat("x", 2001): "at most 2000",
	} {
		refused(t, text(t, "", weld, weld+", "+value), says)
	}
	for kind, says := range map[string]string{"weld": "neither joints nor hours", "cut": "how much is cut", "surface prep": "how large the surface", "lift": "what it lifts", "move": "what it moves", "plain": "how long it takes"} {
		refused(t, text(t, "", "hours: 3}", "hours: 3}\n  new: {kind: "+kind+", at: pier}"), says)
	}
	for value, says := range map[string]string{"surface prep, area: 4 m2, grade: Sa 9": "is not a grade", "surface prep, area: 4 m2, grade: Sa 2, method: wash": "is not reached by",
		"lift, mass: 40 kg, by: crain": "no kit is called", "move, mass: 4 kg, to: dock": "no place is called"} {
		refused(t, text(t, "", "hours: 3}", "hours: 3}\n  new: {kind: "+value+", at: pier}"), says)
	}
}
