package jobfile

import (
	"errors"
	"fmt"
	"strings"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/quantity"
	"sailby/weld"
)

func mm(name string, low, high float64, example, usual, says string) key {
	return key{name: name, takes: anAmount, dim: quantity.Length, low: low, high: high, example: example, usual: usual, says: says}
}

func mmOrNone(name, example, usual, says string) key {
	return key{name: name, takes: itsOwn, form: "length, or `none`", shape: anyText, example: example, usual: usual, says: says}
}

// jointSection has the keys of the joint itself, under the name of its type.
var jointSection = section{name: "Joint", where: "tasks / NAME / joints / item / fillet (or another type)", host: "tasks/weld lugs/joints/1/single V", says: "One joint as drawn. Types: " + strings.Join(weld.JointTypes(), ", ") + ".", keys: []key{
	mm("leg", 1, 60, "6 mm", "", "fillet: leg length z"),
	mm("second leg", 1, 60, "8 mm", "leg", "the other leg of an unequal fillet"),
	mm("throat", 0.7, 60, "4.2 mm", "leg over root 2", "fillet: throat a, in place of the leg"),
	mm("thickness", 0.5, 400, "12 mm", "fillets: leg over 0.7", "of the thinner part"),
	mm("second thickness", 0.5, 400, "12 mm", "thickness", "of the other part"),
	mmOrNone("root gap", "2 mm", "by type and thickness", "gap between the edges"),
	mmOrNone("root face", "1 mm", "none; 3 mm for U and J", "blunt part of the edge"),
	{name: "angle", takes: anAmount, dim: quantity.Angle, low: 1, high: 120, usual: "by type and position", example: "60 deg", says: "included angle of the preparation"},
	{name: "second angle", takes: anAmount, dim: quantity.Angle, low: 1, high: 120, usual: "angle", example: "60 deg", says: "of the second side"},
	mm("first depth", 0.5, 400, "10 mm", "half of it", "height of the preparation on the first side of a double joint"),
	mm("radius", 1, 40, "6 mm", "6 mm for U, 8 mm for J", "of a U or J"),
	mm("depth", 0.5, 400, "8 mm", "all through", "depth of a weld of partial penetration; of a double joint both sides together"),
	mmOrNone("cap", "1.5 mm", "1.5 mm", "height above flush"),
	{name: "backing", takes: yesNo, usual: "no", example: "yes", says: "welded on a strip that stays"},
	{name: "back gouge", takes: yesNo, usual: "no", example: "yes", says: "root gouged from behind and welded again"},
	mmOrNone("gap", "1 mm", "none", "fit-up gap beyond the drawing"),
	{name: "both sides", takes: yesNo, usual: "no", example: "yes", says: "the same again on the other side (fillet, square, lap)"},
	mm("bead", 5, 1e7, "50 mm", "", "intermittent: each weld; slot: its length"),
	{name: "pitch", takes: anAmount, dim: quantity.Length, low: 5, high: 1e7, example: "150 mm", beside: "bead: 50 mm", says: "intermittent: start to start"},
	mm("diameter", 3, 1e5, "48.3 mm", "", "of a tube, a plug's hole, a slot's width"),
	{name: "onto", takes: anAmount, dim: quantity.Length, low: 3, high: 1e5, example: "114.3 mm", beside: "diameter: 48.3 mm", says: "a branch: outside diameter of the tube that it stands on, square; the seam is the saddle between them, in place of a length"},
}}

var seamSection = section{name: "Seam", where: "tasks / NAME / joints / item", host: "tasks/weld lugs/joints/1", says: "One seam of a weld task: one joint type with its keys, and these.", keys: []key{
	{name: "length", takes: itsOwn, form: "length, `... in all` or `... each`", shape: anyText, usual: "once round a tube, times its count", example: "9.6 m in all", says: "length of the seam, or of all of them; `1.2 m each` is taken times the count"},
	{name: "count", takes: aCount, low: 1, high: 1e5, usual: "1", example: "4", says: "how many seams the length is made of"},
	{name: "position", takes: itsOwn, form: "ISO 6947 position", shape: anyText, usual: "PB for fillets and laps, else PA", example: "PF", says: "welding position"},
	{name: "process", takes: itsOwn, form: "process, by ISO 4063 number or its usual name", shape: anyText, usual: "that of the procedure", example: "136", says: "the process, where no procedure is named: one that is for the joint is taken, else usual settings"},
	{name: "procedure", takes: aName, usual: "the one that is for such joints, else the usual settings of the process", example: "site fillet", says: "how it is made"},
	{name: "name", takes: aText, example: "W1", says: "joint number on the weld list"},
	{name: "turns", takes: aCount, low: 0, high: 100, usual: "0", example: "1", says: "how often the part is turned over while it is welded"},
	{name: "access", takes: aNumber, low: 1, high: 5, usual: "1", example: "1.3", says: "hands-on time times this where access is bad: ladder or rope 1.3 to 1.5, closed space 1.3 to 1.6"},
	{name: "at", takes: itsOwn, form: "[x, y, z]", shape: anyList, example: "[600 mm, 0, 12 mm]", says: "its middle in the axes of the assembly, for `advise order`"},
}}

func init() { // the keys that a single V lacks stand in other joints of the example job
	const fillet, lugs = "tasks/weld frame/joints/1/fillet", "tasks/weld lugs/joints/"
	for name, host := range map[string]string{"leg": fillet, "second leg": fillet, "both sides": fillet, "bead": lugs + "4/slot", "pitch": fillet,
		"throat": fillet, "second angle": lugs + "2/double V", "first depth": lugs + "2/double V", "radius": lugs + "3/single U", "onto": lugs + "5/fillet"} {
		jointSection.find(name).host = host
	}
	jointSection.find("throat").without = "leg"
}

func init() { // a key for each type of joint
	for _, name := range weld.JointTypes() {
		seamSection.keys = append(seamSection.keys, key{name: name, takes: keysOf, sub: &jointSection, example: "{thickness: 12 mm}", without: "*joint", says: "the joint"})
	}
	for name, example := range map[string]string{"fillet": "{leg: 6 mm}", "double U": "{thickness: 40 mm}", "double J": "{thickness: 40 mm}",
		"plug": "{thickness: 10 mm, diameter: 20 mm}", "slot": "{thickness: 10 mm, diameter: 20 mm, bead: 60 mm}"} {
		seamSection.find(name).example = example
	}
}

const maxSeams = 500

func (r *reader) seams(f *fields) []tasks.Seam {
	n := f.node("joints")
	if n == nil {
		return nil
	}
	if n.Kind != yaml.SequenceNode {
		f.fault("joints", "write a list: joints: [{fillet: {leg: 6 mm}, length: 2 m}]", "expected a list of joints, found %s", kindOf(n))
		return nil
	}
	var out []tasks.Seam
	for i, n := range f.items("joints") {
		if i == maxSeams {
			r.fault(n, "put seams of one kind together: length in all, and count", "%smore than %d joints", f.lead(""), maxSeams)
			break
		}
		if s, ok := r.seam(n, fmt.Sprintf("%s: joint %d", f.what, i+1)); ok {
			out = append(out, s)
		}
	}
	return out
}

// seamMapping lets the shop's other words for a joint stand for the ISO one.
func (r *reader) seamMapping(n *yaml.Node) *yaml.Node {
	if n.Kind != yaml.MappingNode {
		return n
	}
	c := *n
	c.Content = append([]*yaml.Node(nil), n.Content...)
	for i := 0; i+1 < len(c.Content); i += 2 {
		k := c.Content[i]
		if t, ok := weld.ParseJointType(k.Value); ok && seamSection.find(k.Value) == nil {
			named := *k
			named.Value = t.String()
			c.Content[i] = &named
			if file, ok := r.files[k]; ok {
				r.files[&named] = file
			}
		}
	}
	if file, ok := r.files[n]; ok {
		r.files[&c] = file
	}
	return &c
}

func (r *reader) seam(n *yaml.Node, what string) (tasks.Seam, bool) {
	faults := len(r.faults)
	f := r.open(r.seamMapping(n), &seamSection, what)
	s := tasks.Seam{Name: f.line("name"), Pos: r.pos(n)}
	var typed []string
	for _, name := range weld.JointTypes() {
		if f.has(name) {
			typed = append(typed, name)
		}
	}
	switch {
	case n.Kind != yaml.MappingNode:
		return s, false
	case len(typed) == 0:
		f.fault("", "write for instance {fillet: {leg: 6 mm}, length: 2 m}; types: "+strings.Join(weld.JointTypes(), ", "), "it has no joint type with its sizes")
		return s, false
	case len(typed) > 1:
		f.fault(typed[1], "write two joints", "one joint is both %s and %s", typed[0], typed[1])
		return s, false
	}
	s.Joint = r.joint(r.open(f.node(typed[0]), &jointSection, what+": "+typed[0]))
	s.Joint.Type, _ = weld.ParseJointType(typed[0])
	s.Joint.Count = f.count("count", 1)
	s.Joint.Length = f.length(s.Joint.Count)
	s.Joint.Origin = s.Pos.Origin("")
	s.Position = f.weldPosition("position")
	s.Turns, s.Access = f.count("turns", 0), f.value("access")
	if f.has("at") {
		s.At, s.HasAt = f.point(f.node("at"))
	}
	process := f.process("process")
	if process != 0 {
		s.Seam.Procedure = &weld.Procedure{Process: process}
	}
	if ref, ok := f.name("procedure"); ok {
		s.Procedure = ref.text
		if p := r.procedureOf(ref.text); p != nil {
			s.Seam.Procedure = &p.Procedure
			if process != 0 && p.Process != 0 && process != p.Process {
				f.fault("process", "leave one of the two out", "the joint is to be %s, procedure %q is %s", process, p.Name, p.Process)
			}
		} else {
			r.unknown(ref.pos, f.lead("procedure"), "procedure", ref.text, r.procedureNames())
		}
	}
	if len(r.faults) > faults {
		return s, false
	}
	if _, err := s.Joint.Section(s.Position, true); err != nil {
		var we *weld.Error
		if errors.As(err, &we) {
			r.fault(n, we.Hint, "%s%s", f.lead(""), we.Problem)
		} else {
			r.advice(n, f.lead(""), err, "look at the drawing")
		}
	}
	return s, true
}

func (r *reader) joint(f *fields) weld.Joint {
	none := func(name string, high float64) float64 {
		return f.orNone(name, &key{takes: anAmount, dim: quantity.Length, low: 0, high: high, example: "2 mm"})
	}
	return weld.Joint{
		Leg: f.value("leg"), Leg2: f.value("second leg"), Throat: f.value("throat"), Thickness: f.value("thickness"), Thickness2: f.value("second thickness"),
		RootGap: none("root gap", 40), RootFace: none("root face", 400), Angle: f.value("angle"), Angle2: f.value("second angle"),
		Radius: f.value("radius"), PartialDepth: f.value("depth"), FirstDepth: f.value("first depth"), Cap: none("cap", 10), Backing: f.yes("backing"), BackGouge: f.yes("back gouge"),
		Gap: none("gap", 40), BothSides: f.yes("both sides"), Bead: f.value("bead"), Pitch: f.value("pitch"), Diameter: f.value("diameter"), Onto: f.value("onto"),
	}
}

// length reads "9.6 m", "9.6 m in all" or "1.2 m each", which is taken times the count.
func (f *fields) length(count int) float64 {
	s, ok := f.word("length")
	if !ok {
		return 0
	}
	n, times := s, 1.0
	if rest, ok := strings.CutSuffix(s, " in all"); ok {
		n = rest
	} else if rest, ok := strings.CutSuffix(s, " each"); ok {
		n, times = rest, float64(count)
	}
	v, ok := f.r.measure(f.vals["length"], f.lead("length"), n, &key{dim: quantity.Length, low: 0.1, high: 1e7, example: f.key("length").example}, quantity.Length)
	if !ok {
		return 0
	}
	return v * times
}

func (r *reader) procedureOf(name string) *tasks.Procedure {
	for _, p := range r.job.Procedures {
		if p.Name == name {
			return p
		}
	}
	return nil
}

func (r *reader) procedureNames() []string {
	var out []string
	for _, p := range r.job.Procedures {
		out = append(out, p.Name)
	}
	return out
}
