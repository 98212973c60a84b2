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

var assemblySection = section{name: "Assembly", where: "assemblies / NAME", host: "assemblies/frame", says: "What is built, fitted or moved; tasks name it, or a part of it as `frame/base`.", keys: []key{
	{name: "steel", takes: aText, usual: "the job's steel", example: "S355", says: "grade of its parts, or a name under `steels`"},
	{name: "axes", takes: aText, example: "origin at the hinge pin, x along the ramp, z up", says: "what the positions of its parts are measured from"},
	{name: "parts", takes: namedOf, sub: &partSection, example: "{base: {plate: [2400 mm, 800 mm, 12 mm]}}", says: "its parts"},
	{name: "mass", takes: anAmount, dim: quantity.Mass, low: 0.1, high: 1e6, usual: "that of its parts", example: "410 kg", says: "stated mass, overrules that of its parts"},
	{name: "known", takes: aWord, words: []string{"weighed", "drawn", "guessed"}, usual: "guessed", example: "weighed", says: "how the stated mass is known"},
}}

var partSection = section{name: "Part", where: "assemblies / NAME / parts / NAME", host: "assemblies/frame/parts/base", says: "One kind of piece: a plate, a length of section, bolts, or an item with its mass.", keys: []key{
	{name: "plate", takes: itsOwn, form: "[length, width, thickness]", shape: pairOfText, example: "[2400 mm, 800 mm, 12 mm]", says: "a plate"},
	{name: "section", takes: itsOwn, form: "section", shape: anyText, example: "SHS 100x100x6", beside: "length: 1.6 m", without: "plate", says: "a length of section"},
	{name: "length", takes: itsOwn, form: "length, `... each` or `... in all`", shape: anyText, example: "1.6 m each", beside: "section: SHS 100x100x6", without: "plate", says: "of each piece; in all is divided by the count"},
	{name: "item", takes: anAmount, dim: quantity.Mass, low: 0.001, high: 1e6, example: "35 kg", without: "plate", says: "something bought in, mass of each"},
	{name: "bolts", takes: itsOwn, form: "[thread, length]", shape: pairOfText, example: "[20 mm, 70 mm]", without: "plate", says: "bolts with nut and two washers"},
	{name: "count", takes: aCount, low: 1, high: 100000, usual: "1", example: "4", says: "how many"},
	{name: "material", takes: aText, usual: "the assembly's steel", example: "316L", says: "material, for its density"},
	{name: "at", takes: itsOwn, form: "[x, y, z], or one for each piece", shape: anyList, usual: "[0, 0, 0]", example: "[0, 0, 12 mm]", says: "where it is: a plate's corner, a bar's start"},
	{name: "along", takes: itsOwn, form: "x, y or z, with - for backwards", shape: anyText, usual: "x", example: "z", says: "direction of its length"},
	{name: "across", takes: itsOwn, form: "x, y or z, with - for backwards", shape: anyText, usual: "level, square to its length", example: "y", says: "direction of a plate's width"},
	{name: "middle", takes: yesNo, usual: "no", example: "yes", says: "`at` is the middle of the piece"},
	{name: "holes", takes: anAmount, dim: quantity.Area, low: 0, high: 1e4, example: "0.2 m2", says: "cut out of a plate"},
	{name: "mass", takes: anAmount, dim: quantity.Mass, low: 0.001, high: 1e6, example: "181 kg", says: "stated mass of each, overrules what is worked out"},
	{name: "known", takes: aWord, words: []string{"weighed", "drawn", "guessed"}, usual: "guessed for a stated mass, else drawn", example: "weighed", says: "how its mass is known"},
	{name: "area", takes: anAmount, dim: quantity.Area, low: 0, high: 1e5, example: "0.8 m2", without: "plate", beside: "item: 35 kg", says: "of an item: its surface to paint, each"},
	{name: "sealed", takes: yesNo, usual: "no", example: "yes", says: "a hollow section closed at both ends"},
}}

const maxParts = 2000

func (r *reader) readAssemblies(f *fields) {
	for i, kv := range f.pairs("assemblies") {
		if i == maxDeclared {
			f.fault("assemblies", "make another job file", "more than %d assemblies", maxDeclared)
			return
		}
		name, ok := r.newName(kv[0], "assembly", false)
		if !ok {
			continue
		}
		g := r.open(kv[1], &assemblySection, fmt.Sprintf("assembly %q", name))
		a := &tasks.Assembly{Name: name, Pos: r.pos(kv[0]), Steel: g.line("steel"), Axes: g.line("axes"),
			Mass: g.amount("mass", 0), How: g.choice("known", "")}
		a.Old, a.Stowing = g.yes("old"), g.stowing()
		if a.Steel == "" {
			a.Steel = r.job.Steel
		}
		parts := g.pairs("parts")
		if len(parts) > maxParts {
			g.fault("parts", "put equal pieces together with a count", "more than %d parts", maxParts)
			parts = parts[:maxParts]
		}
		for _, kv := range parts {
			if p := r.part(a, kv); p != nil {
				a.Parts = append(a.Parts, p)
			}
		}
		r.weigh(a, g)
		r.job.Assemblies = append(r.job.Assemblies, a)
	}
}

// weigh lets the parts be reckoned once, so that what is wrong with them is said here.
func (r *reader) weigh(a *tasks.Assembly, f *fields) {
	for _, p := range a.Parts {
		if _, err := lift.Mass([]lift.Part{p.Part}); err != nil && p.Shape.Kind != lift.Weld && p.Shape.Kind != lift.Paint {
			h := fmt.Sprintf("assembly %q: ", a.Name)
			hint := quantity.Hint(err)
			if hint == "" {
				hint = "look at the drawing"
			}
			r.faultAt(p.Pos, hint, "%s%v", h, err)
		}
	}
	if len(a.Parts) == 0 && !f.tried("mass") && !f.tried("parts") {
		f.fault("", "add `parts`, or `mass: 410 kg`", "it has neither parts nor a mass")
	}
}

func (r *reader) part(a *tasks.Assembly, kv [2]*yaml.Node) *tasks.Part {
	name, ok := r.newName(kv[0], "part", false)
	if !ok {
		return nil
	}
	faults := len(r.faults)
	f := r.open(kv[1], &partSection, fmt.Sprintf("part %q", a.Name+"/"+name))
	p := &tasks.Part{Name: name, Pos: r.pos(kv[0])}
	p.Part = lift.Part{Name: name, Count: f.count("count", 1), Material: f.line("material"), Stated: f.value("mass"),
		Known:  map[string]lift.Known{"weighed": lift.Weighed, "drawn": lift.Drawn, "guessed": lift.Guessed}[f.choice("known", "")],
		Middle: f.yes("middle"), Along: f.direction("along"), Across: f.direction("across"), Given: p.Pos.Origin("")}
	if p.Material == "" && a.Steel != "" {
		p.Material = a.Steel
		if _, err := lift.Density(a.Steel); err != nil {
			p.Material = "" // a grade without a density of its own is steel
		}
	}
	p.Water, p.Silt, p.Rust, p.Allowance = f.value("water"), f.value("silt"), f.value("rust"), f.value("weight allowance")
	f.shape(p)
	f.where(p)
	if len(r.faults) > faults {
		return nil
	}
	return p
}

// shape reads which of the kinds of piece it is.
func (f *fields) shape(p *tasks.Part) {
	var is []string
	for _, k := range []string{"plate", "section", "item", "bolts", "weld metal", "paint film"} {
		if f.tried(k) {
			is = append(is, k)
		}
	}
	switch {
	case len(is) == 0:
		f.fault("", "add `plate: [2400 mm, 800 mm, 12 mm]`, `section: SHS 100x100x6` with a length, `bolts`, or `item: 35 kg`", "nothing says what it is")
		return
	case len(is) > 1:
		f.fault(is[1], "make two parts of it", "it is both %s and %s", is[0], is[1])
		return
	}
	s := &p.Shape
	s.Holes, s.Area, s.Sealed = f.value("holes")*1e6, f.value("area"), f.yes("sealed")
	switch is[0] {
	case "plate":
		if v := f.lengths("plate", 3); v != nil {
			s.Kind, p.Length, s.Width, s.Thick = lift.Plate, v[0], v[1], v[2]
		}
	case "bolts":
		if v := f.lengths("bolts", 2); v != nil {
			s.Kind, s.Thread, p.Length = lift.Bolts, v[0], v[1]
		}
	case "weld metal":
		s.Kind = lift.Weld
		p.Stated = f.value("weld metal")
	case "paint film":
		s.Kind, s.Film = lift.Paint, f.value("paint film")
	case "item":
		s.Kind, s.Volume = lift.Item, f.value("displaces")
		p.Stated = f.value("item")
	case "section":
		word, _ := f.word("section")
		sec, err := lift.ParseSection(word)
		if err != nil {
			f.r.advice(f.vals["section"], f.lead("section"), err, "write for instance SHS 100x100x6")
		}
		s.Section = sec
		p.Length = f.barLength(p.Count)
	}
	if is[0] != "section" && f.has("length") {
		f.fault("length", "leave it out", "a length goes with a section")
	}
}

// barLength reads the length of each piece.
func (f *fields) barLength(count int) float64 {
	s, ok := f.word("length")
	if !ok {
		if !f.tried("length") {
			f.fault("", "add `length: 1.6 m each`", "the section has no length")
		}
		return 0
	}
	n, share := s, 1.0
	if rest, ok := strings.CutSuffix(s, " each"); ok {
		n = rest
	} else if rest, ok := strings.CutSuffix(s, " in all"); ok {
		n, share = rest, 1/float64(count)
	}
	v, _ := f.r.measure(f.vals["length"], f.lead("length"), n, &key{dim: quantity.Length, low: 1, high: 1e7, example: "1.6 m"}, quantity.Length)
	return v * share
}

// lengths reads a list of so many lengths above zero; nil if it is none.
func (f *fields) lengths(name string, want int) []float64 {
	list := f.items(name)
	if len(list) != want {
		f.fault(name, "write for instance "+f.key(name).example, "expected %d lengths, found %d", want, len(list))
		return nil
	}
	var out []float64
	for _, n := range list {
		v, ok := f.r.amount(n, f.lead(name), &key{takes: anAmount, dim: quantity.Length, low: 0.1, high: 1e6, example: "800 mm"})
		if !ok {
			return nil
		}
		out = append(out, v)
	}
	return out
}

// where reads one position, or one for each piece.
func (f *fields) where(p *tasks.Part) {
	n := f.node("at")
	if n == nil {
		return
	}
	if n.Kind == yaml.SequenceNode && len(n.Content) > 0 && n.Content[0].Kind == yaml.SequenceNode {
		for _, one := range n.Content {
			if at, ok := f.point(one); ok {
				p.Places = append(p.Places, at)
			}
		}
		if len(n.Content) != p.Count {
			f.fault("at", "give one position for each piece, or one for all", "%d positions for %d pieces", len(n.Content), p.Count)
		}
		return
	}
	p.At, _ = f.point(n)
}

// point reads [x, y, z]; a bare 0 needs no unit.
func (f *fields) point(n *yaml.Node) (at [3]float64, ok bool) {
	if n.Kind != yaml.SequenceNode || len(n.Content) != 3 {
		f.r.fault(n, "write for instance [0, 0, 12 mm]", "%sa position has x, y and z", f.lead("at"))
		return at, false
	}
	for i, c := range n.Content {
		if c.Kind == yaml.ScalarNode && c.Value == "0" {
			continue
		}
		v, ok := f.r.amount(c, f.lead("at"), &key{takes: anAmount, dim: quantity.Length, low: -1e6, high: 1e6, example: "12 mm"})
		if !ok {
			return at, false
		}
		at[i] = v
	}
	return at, true
}

// direction reads x, -y and the like.
func (f *fields) direction(name string) (d [3]float64) {
	s, ok := f.word(name)
	if !ok {
		return d
	}
	axis, sign := s, 1.0
	if rest, ok := strings.CutPrefix(s, "-"); ok {
		axis, sign = rest, -1
	}
	i := slices.Index([]string{"x", "y", "z"}, axis)
	if i < 0 {
		f.fault(name, "write x, y, z, -x, -y or -z", "%s is not a direction", short(s))
		return d
	}
	d[i] = sign
	return d
}
