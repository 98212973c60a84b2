package jobfile

import (
	"fmt"
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/quantity"
	"sailby/weld"
)

var forSection = section{name: "For", where: "procedures / NAME / for", host: "procedures/site fillet/for", says: "What the procedure is for. A joint that names no procedure is welded by the one that is for it; where several are, the joint must name one. What is left out is not asked about.", keys: []key{
	{name: "joints", takes: itsOwn, form: "name or list of names", shape: textOrList, usual: "all", example: "[fillet, butt]", says: "fillet (laps too), butt (all with a groove), or types of joint by name"},
	{name: "positions", takes: itsOwn, form: "ISO 6947 positions", shape: textOrList, usual: "all", example: "[PF, PB]", says: "positions"},
	{name: "thickness", takes: itsOwn, form: "range", shape: anyText, usual: "all", example: "3 mm to 20 mm", says: "of the thinner part; asked only where the joint gives it"},
	{name: "leg", takes: itsOwn, form: "range", shape: anyText, usual: "all", example: "4 mm to 8 mm", says: "of a fillet"},
	{name: "at", takes: names, usual: "everywhere", example: "pier", says: "places"},
	{name: "who", takes: names, usual: "everybody", example: "Ines", says: "people: the task names its people with `who`, and all of them are among these"},
}}

func init() {
	procedureSection.keys = append(procedureSection.keys, key{name: "for", takes: keysOf, sub: &forSection, usual: "only joints that name it", example: "{joints: fillet, positions: [PB, PF], leg: 4 mm to 8 mm}",
		says: "what it is for: joints that name no procedure are welded by it"})
}

// holdsFor reads what a procedure is for.
func (r *reader) holdsFor(p *tasks.Procedure, f *fields) {
	if !f.has("for") {
		return
	}
	g := r.open(f.node("for"), &forSection, f.what+": for")
	h := &tasks.HoldsFor{Pos: f.pos("for"), Thickness: g.fromTo("thickness"), Leg: g.fromTo("leg")}
	for _, ref := range g.names("joints") {
		word := ref.text
		if t, ok := weld.ParseJointType(word); ok && word != "butt" {
			word = t.String()
		} else if word != "butt" {
			r.faultAt(ref.pos, "write fillet, butt, or one of: "+strings.Join(weld.JointTypes(), ", "), "%s%s is no joint", g.lead("joints"), short(ref.text))
			continue
		}
		h.Joints = append(h.Joints, word)
	}
	for _, ref := range g.names("positions") {
		pos, ok := weld.ParsePosition(ref.text)
		if !ok {
			r.faultAt(ref.pos, "write PA, PB, PC, PD, PE, PF, PG, PH, PJ or H-L045", "%s%s is not a welding position", g.lead("positions"), short(ref.text))
			continue
		}
		h.Positions = append(h.Positions, pos)
	}
	for _, ref := range g.names("at") {
		if r.placeOf[ref.text] == nil {
			var all []string
			for _, q := range r.job.Places {
				all = append(all, q.Name)
			}
			r.unknown(ref.pos, g.lead("at"), "place", ref.text, all)
			continue
		}
		h.Places = append(h.Places, ref.text)
	}
	for _, ref := range r.people(g, "who") {
		h.People = append(h.People, ref.text)
	}
	p.For = h
	if p.Position == 0 && len(h.Positions) == 1 { // what is for one position has the figures of that
		p.Position = h.Positions[0]
		for i := range p.By {
			p.By[i].Position = p.Position
		}
	}
}

// fromTo reads a range of lengths, from and to.
func (f *fields) fromTo(name string) [2]float64 {
	s, ok := f.word(name)
	if !ok {
		return [2]float64{}
	}
	rg, err := quantity.ParseRange(s, quantity.Length)
	if err != nil {
		f.r.advice(f.vals[name], f.lead(name), err, "write for instance "+f.key(name).example)
		return [2]float64{}
	}
	if rg.Low < 0 || rg.High <= 0 {
		f.fault(name, "write for instance "+f.key(name).example, "a size is above zero")
	}
	return [2]float64{rg.Low, rg.High}
}

// pickProcedures gives every joint that names no procedure the one that is for it. Several are
// a fault; none is said, where there are procedures to be picked.
func (r *reader) pickProcedures() {
	if !slices.ContainsFunc(r.job.Procedures, func(p *tasks.Procedure) bool { return p.For != nil }) {
		return
	}
	for _, d := range r.drafts {
		for i := range d.t.Seams {
			if s := &d.t.Seams[i]; s.Procedure == "" {
				r.pick(d, i, s)
			}
		}
	}
}

func (r *reader) pick(d *draft, i int, s *tasks.Seam) {
	var fit []*tasks.Procedure
	for _, p := range r.job.Procedures {
		if p.For != nil && r.isFor(p, d.t, s) {
			fit = append(fit, p)
		}
	}
	what := jointWords(s)
	switch len(fit) {
	case 0:
		r.note(s.Pos, "%s: joint %d: no procedure is for a %s: it is welded with usual settings", d.f.what, i+1, what)
	case 1:
		p := fit[0]
		s.Seam.Procedure, s.Procedure = &p.Procedure, p.Name
		s.Picked = "the only procedure that is for a " + what
	default:
		var all []string
		for _, p := range fit {
			all = append(all, short(p.Name))
		}
		r.faultAt(s.Pos, "name one in the joint, for instance procedure: "+fit[0].Name+"; or say more narrowly what they are `for`",
			"%s: joint %d: several procedures are for a %s: %s", d.f.what, i+1, what, strings.Join(all, ", "))
	}
}

// jointWords names a joint by what procedures are picked by: size, type, position, process.
func jointWords(s *tasks.Seam) string {
	out := s.Joint.Type.String() + " in " + seamPosition(s).String()
	switch {
	case s.Joint.Leg > 0:
		out = trim(s.Joint.Leg) + " mm " + out
	case s.Joint.Throat > 0:
		out = trim(s.Joint.Throat) + " mm throat " + out
	case s.Joint.Thickness > 0:
		out = trim(s.Joint.Thickness) + " mm " + out
	}
	if p := s.Seam.Procedure; p != nil && p.Process != 0 {
		out += fmt.Sprintf(" with %s", p.Process)
	}
	return out
}

// seamPosition is the position that the joint is welded in: PB and PA where none is given, and
// fillets in fillet positions.
func seamPosition(s *tasks.Seam) weld.Position {
	return weld.UsualPosition(s.Joint.Type, s.Position)
}

// isFor says whether a procedure is for a joint: joint, position, size, process, place, people,
// and the current of the set that the task has.
func (r *reader) isFor(p *tasks.Procedure, t *tasks.Task, s *tasks.Seam) bool {
	h, j := p.For, s.Joint
	kind := func(word string) bool {
		switch word {
		case "fillet":
			return j.Type == weld.Fillet || j.Type == weld.Lap
		case "butt":
			return j.Type >= weld.Square && j.Type <= weld.DoubleJ
		}
		return word == j.Type.String()
	}
	pos := seamPosition(s)
	inside := func(span [2]float64, v float64) bool {
		return span[1] == 0 || v == 0 || v >= span[0]-1e-6 && v <= span[1]+1e-6
	}
	leg := max(j.Leg, j.Leg2, j.Throat*1.41421356)
	if !j.Type.HasLegs() {
		leg = 0
	}
	own := s.Seam.Procedure
	switch {
	case len(h.Joints) > 0 && !slices.ContainsFunc(h.Joints, kind),
		len(h.Positions) > 0 && !slices.ContainsFunc(h.Positions, func(q weld.Position) bool { return weld.UsualPosition(j.Type, q) == pos }),
		!inside(h.Thickness, j.Thickness), !inside(h.Leg, leg), h.Leg[1] > 0 && leg == 0,
		len(h.Places) > 0 && (t.Place == nil || !slices.Contains(h.Places, t.Place.Name)),
		own != nil && own.Process != 0 && p.Process != 0 && own.Process != p.Process,
		len(h.People) > 0 && (len(t.Who) == 0 || slices.ContainsFunc(t.Who, func(w string) bool { return !slices.Contains(h.People, w) })):
		return false
	}
	for _, u := range t.Kit { // a set that does not give the current
		if most := max(u.Kit.Set.Set.MaxCurrent, u.Kit.Set.Set.RatedCurrent); p.Kit == "" && most > 0 && p.Current > most {
			return false
		}
	}
	return true
}
