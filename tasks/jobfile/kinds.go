package jobfile

import (
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/coat"
	"sailby/tasks/quantity"
	"sailby/weld"
)

func activityNames() string {
	var names []string
	for _, a := range weld.Activities() {
		names = append(names, a.Name)
	}
	return strings.Join(names, ", ")
}

var stateNames = []string{tasks.HotWorkState, tasks.Grit, tasks.WetFilm, tasks.SoftFilm, tasks.Solvent, tasks.LoadOverhead, tasks.PeopleState}

var (
	byKey      = key{name: "by", takes: aText}
	lengthKey  = key{name: "length", takes: anAmount, dim: quantity.Length, low: 0, high: 1e7, example: "1.9 m"}
	surfaceKey = key{name: "surface", takes: names, example: "frame", says: "assemblies, or parts as frame/base"}
	areaKey    = key{name: "area", takes: anAmount, dim: quantity.Area, low: 0.01, high: 1e5, usual: "that of the surface", example: "4 m2", says: "overrules that of the surface"}
	gradeKey   = key{name: "grade", takes: aText, example: "Sa 2 1/2", says: "grade of preparation: Sa 1 to Sa 3, St 2, St 3, an SSPC name, bare metal, solvent clean, fresh-water wash"}
	patchKey   = key{name: "patch", takes: anAmount, dim: quantity.Length, low: 0, high: 1e7, without: "area", example: "9.6 m", says: "in place of a surface: the strips, 50 mm to each side, of so much seam that was left bare"}
	offKey     = key{name: "paint off first", takes: yesNo, usual: "no", example: "yes", says: "where it is hot work on what is coated, the paint is taken off first (R27)"}
	shapeKey   = key{name: "shape", takes: aWord, words: coat.Surfaces(), usual: "sections", example: "lattice", says: "how the surface slows the work"}
	partKey    = key{name: "part", takes: names, example: "frame/base", says: "assembly or part it works on"}
	liftsKey   = key{name: "lifts", takes: aName, example: "frame", says: "assembly or part"}
	massKey    = key{name: "mass", takes: anAmount, dim: quantity.Mass, low: 0.1, high: 1e6, usual: "that of the assembly", example: "410 kg", says: "stated mass"}
)

func with(k key, example, says string) key {
	k.example, k.says = example, says
	return k
}

// The keys that only some kinds of task have.
var (
	weldKeys = section{name: "Weld", where: "tasks / NAME of kind weld", host: "tasks/weld lugs", says: "a weld", more: &taskSection, keys: []key{
		{name: "joints", takes: listOf, sub: &seamSection, example: "[{fillet: {leg: 6 mm}, length: 9.6 m in all, position: PB}]", says: "the seams"},
		with(partKey, "[frame/base, frame/posts]", "assembly or parts it joins"),
		{name: "steel", takes: aText, usual: "that of its assembly, else the job's", example: "S355", says: "grade, or a name under `steels`"},
		holdKey,
		{name: "overweld", takes: yesNo, usual: "as for the job", example: "no", says: "more is laid than is drawn"},
		{name: "advise order", takes: yesNo, usual: "no", example: "yes", says: "advise an order of its joints that keeps shrinkage in balance; each joint says `at`"},
		{name: "second moment", takes: anAmount, dim: quantity.SecondMoment, low: 1, high: 1e15, example: "2400 cm4", says: "second moment of area of the whole about the axis it bows about: the advice then says the bow"},
		offKey,
		{name: "repair of", takes: aName, example: "weld frame", without: "joints", says: "a weld task: this one is what testing may find to repair; hours, `chance` and wait are worked out from it"},
	}}
	cutKeys = section{name: "Cut", where: "tasks / NAME of kind cut", host: "tasks/cut lugs", says: "a cut", more: &taskSection, keys: []key{
		with(byKey, "oxy-fuel", "plasma, oxy-fuel, disc, saw; a table under `cutting`; a preparing job as under `rates` ("+activityNames()+"); or another way with hours"),
		with(lengthKey, "1.9 m", "length of cut, or of edge prepared"),
		{name: "count", takes: aCount, low: 1, high: 1e5, example: "12", says: "holes to drill, or tacks"},
		{name: "mass", takes: anAmount, dim: quantity.Mass, low: 0.01, high: 1e4, example: "4 kg", says: "metal to grind away"},
		{name: "bevel", takes: anAmount, dim: quantity.Angle, low: 0, high: 70, usual: "0 deg", example: "30 deg", says: "off square: the cut goes through the longer way"},
		{name: "pierces", takes: aCount, low: 0, high: 1e5, usual: "0", example: "4", says: "starts inside the plate"},
		{name: "current", takes: anAmount, dim: quantity.Current, low: 15, high: 1000, usual: "40 A", example: "65 A", says: "of a plasma set: it cuts so much and no more; of gouging: by air carbon-arc"},
		{name: "speed", takes: anAmount, dim: quantity.Travel, low: 5, high: 20000, usual: "by way and thickness", example: "400 mm/min", says: "cutting speed, in place of the table's"},
		{name: "thickness", takes: anAmount, dim: quantity.Length, low: 0.1, high: 500, example: "16 mm", says: "thickness cut"},
		partKey, offKey,
	}}
	prepKeys = section{name: "Surface prep", where: "tasks / NAME of kind surface prep", host: "tasks/blast", says: "a surface prep", more: &taskSection, keys: []key{
		surfaceKey, areaKey, gradeKey, shapeKey,
		patchKey,
		{name: "holds", takes: anAmount, dim: quantity.Time, low: 1, high: 30 * 1440, usual: "4 h at the window's place, 8 h elsewhere (R25)", example: "24 h", says: "longest wait to the start of the first coat"},
		{name: "method", takes: aWord, words: []string{"blast", "power tool", "hand tool", "needle gun", "solvent wipe", "wash"}, usual: "that of the grade", example: "blast", says: "how"},
		{name: "condition", takes: aWord, words: []string{"new", "light rust", "heavy rust", "painted"}, usual: "new", example: "light rust", says: "the steel before"},
	}}
	coatKeys = section{name: "Coat", where: "tasks / NAME of kind coat", host: "tasks/prime", says: "a coat", more: &taskSection, keys: []key{
		surfaceKey, areaKey, gradeKey, shapeKey,
		{name: "method", takes: aWord, words: coat.Methods(), usual: "brush", example: "airless", says: "how"},
		patchKey,
		{name: "stripe", takes: anAmount, dim: quantity.Length, low: 0, high: 1e7, example: "12 m", says: "edges and welds striped by brush before the first full coat, with a wait of its own (R11)"},
		{name: "leave bare", takes: anAmount, dim: quantity.Length, low: 0, high: 1e7, example: "9.6 m", says: "seams kept bare and taped, 50 mm to each side: taken off the area of the surface (R27)"},
		{name: "rescue", takes: yesNo, usual: "yes", example: "no", says: "where the longest wait to one of its coats cannot be kept, a tack coat or abrading may mend it (R11)"},
		{name: "behind", takes: names, example: "frame/base", says: "assemblies or parts behind or close beside what it coats, of which it is the other face: hot work on them burns it (R27)"},
		{name: "profile", takes: anAmount, dim: quantity.Film, low: 0, high: 150, usual: "0 um", example: "60 um", says: "of blasted steel, Rz, that the first coat fills"},
		{name: "coats", takes: names, need: true, example: "[primer, primer]", says: "paints in order"},
	}}
	liftKeys = section{name: "Lift", where: "tasks / NAME of kind lift", host: "tasks/load", says: "a lift", more: &taskSection, keys: []key{
		liftsKey, massKey, with(byKey, "chain hoist", "a kit, or hands"),
		{name: "height", takes: anAmount, dim: quantity.Length, low: 0, high: 2e5, usual: "1.5 m", example: "1.2 m", says: "hook travel"},
		{name: "travel", takes: anAmount, dim: quantity.Length, low: 0, high: 1e6, usual: "0 m", example: "3 m", says: "on the level"},
		{name: "radius", takes: anAmount, dim: quantity.Length, low: 0, high: 2e5, example: "4 m", says: "of a crane"},
	}}
	fitKeys = section{name: "Fit-up", where: "tasks / NAME of kind fit-up", host: "tasks/fit frame", says: "a fit-up", more: &taskSection, keys: []key{
		partKey,
		{name: "joints", takes: aCount, low: 0, high: 10000, example: "8", says: "how many joints"},
	}}
	testKeys = section{name: "Test", where: "tasks / NAME of kind test", host: "tasks/MT", says: "a test", more: &taskSection, keys: []key{
		with(byKey, "magnetic particle", "visual, dye penetrant, magnetic particle, vacuum box, air, hose; or another, as ultrasonic or load, with hours"),
		with(lengthKey, "1.9 m", "length of seam tested"), partKey,
		{name: "dwell", takes: anAmount, dim: quantity.Time, low: 1, high: 1440, usual: "by method; penetrant doubled below 10 C", example: "30 min", says: "time that penetrant stands or pressure is held, as a written procedure says; then penetrant is also used below 5 C"},
		{name: "steel temperature", takes: anAmount, dim: quantity.Temperature, low: -40, high: 150, usual: "that of the place", example: "15 C", says: "of the steel, warmed for the test"},
		{name: "pressure", takes: anAmount, dim: quantity.Pressure, low: 0.01, high: 100, usual: "air 0.15 bar, at most 0.2; hose at least 2 bar", example: "0.15 bar", says: "of an air or hose test"},
	}}
	moveKeys = section{name: "Move", where: "tasks / NAME of kind move", host: "tasks/to the gate", says: "a move", more: &taskSection, keys: []key{
		liftsKey, massKey, with(byKey, "trolley", "a kit, or hands"),
		{name: "to", takes: aName, example: "pier", says: "the place it goes to"},
		{name: "travel", takes: anAmount, dim: quantity.Length, low: 0, high: 1e6, example: "30 m", says: "on the level"},
		{name: "height", takes: anAmount, dim: quantity.Length, low: 0, high: 2e5, usual: "1.5 m", example: "1 m", says: "up or down"},
	}}
	signKeys  = section{name: "Sign-off", where: "tasks / NAME of kind sign-off", host: "tasks/open again", says: "a sign-off", more: &taskSection}
	plainKeys = section{name: "Plain", where: "tasks / NAME of kind plain", host: "tasks/resin", says: "a plain task", more: &taskSection}
)

// kindSections lists the sections of the kinds in the order of the manual.
func kindSections() []*section {
	return []*section{&weldKeys, &cutKeys, &prepKeys, &coatKeys, &liftKeys, &fitKeys, &testKeys, &moveKeys, &signKeys, &plainKeys}
}

func kindSection(k tasks.Kind) *section {
	return kindSections()[slices.Index(tasks.Kinds(), k)]
}

// byKind reads the keys of the task's kind.
func (r *reader) byKind(t *tasks.Task, f *fields) {
	has := func(name string) bool { return f.sec.find(name) != nil }
	timed := f.tried("hours") || f.tried("man-hours")
	if has("by") {
		t.By = f.line("by")
	}
	if has("length") {
		t.Length = f.amount("length", 0)
	}
	if has("part") {
		t.Parts = r.partNames(f, "part")
	}
	if has("surface") {
		t.Surface = r.partNames(f, "surface")
		t.Area, t.Grade, t.Shape = f.amount("area", 0), f.line("grade"), f.choice("shape", "")
		t.Method = f.choice("method", "")
		r.grade(t, f)
		t.Patch = f.amount("patch", 0)
		if f.has("patch") && f.has("area") {
			f.fault("patch", "keep one of the two", "an area is given as well")
		}
		if !f.tried("surface") && !f.tried("area") && !f.tried("patch") && !timed {
			f.fault("", "add `surface: frame` (an assembly), `area: 4 m2`, or `hours`", "nothing says how large the surface is")
		}
	}
	if has("lifts") {
		t.Lifts = strings.Join(r.partNames(f, "lifts"), "")
		t.Mass, t.Height, t.Travel = f.amount("mass", 0), f.amount("height", 0), f.amount("travel", 0)
		if !f.tried("lifts") && !f.tried("mass") && !timed {
			f.fault("", "add `lifts: frame` (an assembly), `mass: 410 kg`, or `hours`", "nothing says what it %ss", t.Kind)
		}
		r.liftedBy(t, f)
	}
	switch t.Kind {
	case tasks.Weld:
		t.Seams = r.seams(f)
		t.PaintOff = f.yes("paint off first")
		t.Steel, t.Hold, t.Overweld, t.Advise = f.line("steel"), f.hold(), f.yesOrNot("overweld"), f.yes("advise order")
		if f.tried("repair of") && f.tried("joints") {
			f.fault("repair of", "leave the joints out", "the joints are those of the weld that is repaired")
		}
		if !f.tried("joints") && !timed && !f.tried("repair of") {
			f.fault("", "add `joints: [{fillet: {leg: 6 mm}, length: 2 m, position: PB}]`, or `hours`", "it has neither joints nor hours")
		}
		t.Second = f.amount("second moment", 0)
	case tasks.Cut:
		t.Thickness, t.PaintOff = f.amount("thickness", 0), f.yes("paint off first")
		t.Bevel, t.Current, t.Speed, t.Mass = f.amount("bevel", 0), f.amount("current", 0), f.amount("speed", 0), f.amount("mass", 0)
		t.Pierces, t.Count = f.count("pierces", 0), f.count("count", 0)
		r.cutBy(t, f)
		if !timed && !f.tried("part") && !(f.tried("length") && f.tried("thickness")) && !weld.IsActivity(t.By) {
			f.fault("", "add `length: 1.9 m` and `thickness: 16 mm`, `part: frame/base`, or `hours`", "nothing says how much is cut")
		}
	case tasks.Prep:
		t.Condition, t.HoldsFor = f.choice("condition", ""), f.amount("holds", 0)
	case tasks.Coat:
		r.coats(t, f)
		t.Rescue = f.yesOrNot("rescue")
		t.Behind = r.partNames(f, "behind")
		t.Stripe, t.Bare, t.Profile = f.amount("stripe", 0), f.amount("leave bare", 0), f.amount("profile", 0)
	case tasks.Lift:
		t.Radius = f.amount("radius", 0)
	case tasks.Test:
		t.Dwell, t.Pressure, t.Warm = f.amount("dwell", 0), f.amount("pressure", 0), f.amount("steel temperature", 0)
	case tasks.FitUp:
		t.Joints = f.count("joints", 0)
	case tasks.Move:
		t.To = f.place("to")
	}
}

// grade checks a grade of preparation against those known.
func (r *reader) grade(t *tasks.Task, f *fields) {
	if t.Grade == "" {
		return
	}
	p := coat.Prep{Area: 1, Grade: t.Grade}
	if t.Kind == tasks.Prep {
		p.Method = t.Method
	}
	if _, err := coat.Prepare(p); err != nil {
		r.advice(f.vals["grade"], f.lead("grade"), err, "write for instance Sa 2 1/2 or St 3")
	}
}

// coats checks the paints, and that each may follow the one before it.
func (r *reader) coats(t *tasks.Task, f *fields) {
	var last *tasks.Paint
	for _, ref := range f.names("coats") {
		i := slices.IndexFunc(r.job.Paints, func(p *tasks.Paint) bool { return p.Name == ref.text })
		if i < 0 {
			var all []string
			for _, p := range r.job.Paints {
				all = append(all, p.Name)
			}
			r.unknown(ref.pos, f.lead("coats"), "paint", ref.text, all)
			last = nil
			continue
		}
		p := r.job.Paints[i]
		if last != nil && len(p.NextCoat)+len(last.NextCoat) > 0 {
			if _, err := last.Next(p.Paint); err != nil {
				hint := quantity.Hint(err)
				r.faultAt(ref.pos, hint, "%s%v", f.lead("coats"), err)
			}
		}
		last = p
		t.Coats = append(t.Coats, ref.text)
	}
}

// liftedBy adds the kit named under `by`, if it is one, and checks what it may lift.
func (r *reader) liftedBy(t *tasks.Task, f *fields) {
	k := r.kitOf[t.By]
	if k == nil {
		if t.By != "" && t.By != "hands" && t.By != "by hand" && !f.tried("hours") && !f.tried("man-hours") && !slices.Contains(kitWays, t.By) {
			r.faultAt(f.pos("by"), r.among(t.By, append(r.kitNames(), "hands"), "declare it under `kit`, or write by: hands"), "%sno kit is called %s", f.lead("by"), short(t.By))
		}
		return
	}
	if !slices.ContainsFunc(t.Kit, func(u tasks.Use) bool { return u.Kit == k }) {
		t.Kit = append(t.Kit, tasks.Use{Kit: k, Count: 1, Pos: f.pos("by")})
	}
	if t.Mass.Pos.Given() && k.Rated.Pos.Given() && t.Mass.Value > k.Rated.Value*float64(k.Count) {
		f.fault("mass", "take stronger gear, or lift it in parts", "%s kg is more than %q is rated for, %s kg", trim(t.Mass.Value), k.Name, trim(k.Rated.Value*float64(k.Count)))
	}
}
