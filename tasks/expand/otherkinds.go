package expand

import (
	"errors"
	"fmt"
	"math"
	"strings"

	"sailby/tasks"
	"sailby/tasks/coat"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
	"sailby/weld"
)

// area gives the surface of a prep or coat task in m2: its own area, else that of what it is on.
func (x *expander) area(t *tasks.Task) (origin.Figure, error) {
	if t.Patch.Pos.Given() {
		return patch(t), nil
	}
	whole, err := x.wholeArea(t)
	if err != nil {
		return whole, err
	}
	return bared(t, whole)
}

// wholeArea is area without the strips left bare.
func (x *expander) wholeArea(t *tasks.Task) (origin.Figure, error) {
	if t.Area.Pos.Given() {
		return origin.Written("area", t.Area.Value, "m2", t.Area.Pos.Origin("area")), nil
	}
	var from []origin.Figure
	sum := 0.0
	for _, name := range t.Surface {
		m, err := x.massOf(name)
		if err != nil {
			return origin.Figure{}, err
		}
		if m.Surface <= 0 {
			return origin.Figure{}, fmt.Errorf("nothing says how large the surface of %q is", name)
		}
		from = append(from, origin.Worked("surface of "+name, m.Surface, "m2", "outside surface of its parts"))
		sum += m.Surface
	}
	if len(from) == 0 {
		return origin.Figure{}, errors.New("it has no surface, no area and no hours")
	}
	return origin.Worked("area", sum, "m2", "sum of the surfaces", from...), nil
}

// parts lists the parts of an assembly, or the one part named after a slash.
func (x *expander) parts(name string) []lift.Part {
	asm, part, single := strings.Cut(name, "/")
	var out []lift.Part
	for _, a := range x.w.Job.Assemblies {
		for _, p := range a.Parts {
			if a.Name == asm && (!single || p.Name == part) {
				out = append(out, p.Part)
			}
		}
	}
	return out
}

// massOf weighs an assembly or one of its parts ("frame", "frame/base").
func (x *expander) massOf(name string) (lift.Total, error) {
	asm, _, single := strings.Cut(name, "/")
	for _, a := range x.w.Job.Assemblies {
		if a.Name != asm {
			continue
		}
		parts := x.parts(name)
		if !single && a.Mass.Pos.Given() && len(parts) == 0 {
			return lift.Total{Mass: a.Mass.Value, Heavy: a.Mass.Value, Figure: origin.Written("mass", a.Mass.Value, "kg", a.Mass.Pos.Origin("mass"))}, nil
		}
		total, err := lift.Mass(parts)
		if err == nil && !single && a.Mass.Pos.Given() {
			total.Mass, total.Heavy = a.Mass.Value, math.Max(a.Mass.Value, a.Mass.Value*1)
			total.Figure = origin.Written("mass", a.Mass.Value, "kg", a.Mass.Pos.Origin("mass, "+a.How))
		}
		return total, err
	}
	return lift.Total{}, fmt.Errorf("there is no assembly %q", name)
}

// prep estimates surface preparation.
func (x *expander) prep(t *tasks.Task) hands {
	h := hands{people: 1, noisy: true, grit: true}
	area, unknown := x.area(t)
	if unknown != nil {
		area.Value = 1 // the nature of the work does not hang on its size
	}
	grade := t.Grade
	if grade == "" {
		grade = usualGrade(t.Method)
	}
	p, err := coat.Prepare(coat.Prep{Area: area.Value, Grade: grade, Method: t.Method, State: t.Condition, Surface: t.Shape, Site: x.atSite(t)})
	if err != nil {
		h.fault, h.hint = err, "write for instance grade: St 3, method: power tool"
		return h
	}
	h.people = max(p.People, t.People, x.crewSize(t))
	h.noisy, h.grit = p.Noise, p.Dust
	h.least = leastPiece
	if unknown != nil {
		h.fault, h.hint = unknown, "name its surface (an assembly), or give area: 4 m2 or hours"
		return h
	}
	h.share(p.Range, p.Hours, h.people/p.People, t) // blasting takes two at a nozzle
	h.est.Notes = p.Warnings
	h.est.Facts = append(h.est.Facts, area)
	if p.Abrasive > 0 {
		h.est.Facts = append(h.est.Facts, p.Kilos)
		h.est.Consumables = append(h.est.Consumables, Consumable{What: "abrasive", Amount: p.Abrasive, Unit: "kg", Spare: p.Abrasive * 0.1})
	}
	if p.MaxWait > 0 {
		h.est.Facts = append(h.est.Facts, p.Wait)
	}
	return h
}

// usualGrade is the grade of a method where the job file gives none.
func usualGrade(method string) string {
	switch method {
	case "blast":
		return "Sa 2 1/2"
	case "solvent wipe":
		return "solvent clean"
	case "wash":
		return "fresh-water wash"
	}
	return "St 3"
}

// share divides the minutes of one person, or of one pair, between several.
func (h *hands) share(one quantity.Range, figure origin.Figure, between int, t *tasks.Task) {
	n := float64(max(1, between))
	h.minutes, h.est.Figure = one.Scale(1/n), figure
	if n > 1 {
		h.est.Figure = origin.Worked("hands-on time", figure.Value/n, "min", "time of one, shared", figure,
			origin.Written("shared by", n, "", t.Pos.Origin("people")))
	}
}

// fitUp estimates fitting parts together after the method of Farkas and Jarmai.
func (x *expander) fitUp(t *tasks.Task) hands {
	h := hands{people: 2, least: leastPiece}
	if t.People > 0 {
		h.people = t.People
	}
	count, kg := 0, 0.0
	for _, name := range t.Parts {
		m, err := x.massOf(name)
		if err != nil {
			h.fault, h.hint = err, "declare it under assemblies, or give hours"
			return h
		}
		kg += m.Mass
		for _, p := range m.Parts {
			count += max(1, p.Count)
		}
	}
	if count < 2 || kg <= 0 {
		h.fault = fmt.Errorf("nothing says how long fitting takes")
		h.hint = "give hours or man-hours, or part: [assemblies] with parts of known mass"
		return h
	}
	difficulty := 2.0
	if x.atSite(t) {
		difficulty = 3
	}
	man := difficulty * math.Sqrt(float64(count)*kg)
	n := float64(max(h.people, x.crewSize(t)))
	h.minutes = spread(man / n)
	h.est.Figure = origin.Worked("hands-on time", man/n, "min", "difficulty x root of (parts x mass), over the people",
		origin.Recalled("method", 1, "", "Farkas and Jarmai: T = C x difficulty x sqrt(parts x kg) min, C = 1"),
		origin.House("difficulty", difficulty, "", "1 easy to 4 hard: 2 in the shop, 3 on site"),
		origin.Worked("parts", float64(count), "", "count of the parts named"),
		origin.Worked("mass", kg, "kg", "mass of the parts named"),
		origin.Written("people", n, "", t.Pos.Origin("people")))
	return h
}

// testWords are the test methods that have hours of their own, by the words of the job file.
var testWords = [][2]string{{"visual", "visual"}, {"dye penetrant", "penetrant"}, {"penetrant", "penetrant"}, {"magnetic particle", "magnetic"},
	{"magnetic", "magnetic"}, {"vacuum box", "vacuum box"}, {"air", "air"}, {"hose", "hose"}}

// TestMethods names the test methods that have hours of their own.
func TestMethods() []string {
	return []string{"visual", "dye penetrant", "magnetic particle", "vacuum box", "air", "hose"}
}

// test estimates a test from its method and the length of the seams it follows.
func (x *expander) test(t *tasks.Task) hands {
	h := hands{people: 1}
	if t.Hours.Pos.Given() || t.ManHours.Pos.Given() {
		return h
	}
	by := t.By
	if by == "" {
		by = t.Method
	}
	if by == "" {
		by = "visual"
	}
	method := ""
	for _, w := range testWords {
		if w[0] == by {
			method = w[1]
		}
	}
	if method == "" {
		h.fault = fmt.Errorf("a test by %q has no hours of its own", by)
		h.hint = "give hours, or test by one of: " + strings.Join(TestMethods(), ", ")
		return h
	}
	length := 0.0
	for _, l := range t.Links {
		w := x.byName[l.Task]
		if w != nil && w.Repairs != nil && !x.absent[w] {
			length += x.repairLength(w)
		}
		if w != nil && w.Kind == tasks.Weld {
			for _, s := range w.Seams {
				length += s.Joint.Length
			}
		}
	}
	if t.Length.Pos.Given() {
		length = t.Length.Value
	}
	if length <= 0 && x.onlyAfterAbsent(t) {
		h.minutes, h.est.Figure = quantity.Sure(0), origin.Worked("hands-on time", 0, "min", "nothing was repaired, nothing is tested again")
		return h
	}
	if length <= 0 {
		h.fault = fmt.Errorf("nothing says what length of seam it tests")
		h.hint = "put it after a weld with joints, or give length: 2 m, or hours"
		return h
	}
	at := t.Length.Pos.Origin("")
	if t.Dwell.Pos.Given() {
		at = t.Dwell.Pos.Origin("")
	}
	celsius := x.steel(t.Place)
	if t.Warm.Pos.Given() {
		celsius = t.Warm.Value
	}
	l, err := weld.Test{Method: method, Length: length, Temperature: notZero(celsius), Dwell: t.Dwell.Value, Pressure: t.Pressure.Value,
		Site: x.atSite(t), Origin: at}.Work()
	if err != nil {
		return h.failed(err)
	}
	// The dwell is waited out at the work: it is part of the test's hands-on time.
	total := float64(l.HandsOn) + float64(l.Standing)
	h.minutes = spread(total)
	h.est.Figure, h.est.Notes = l.Hours, l.Warnings
	if l.Standing > 0 {
		h.est.Figure = origin.Worked("hands-on time", total, "min", "work + dwell, waited out at the work", l.Hours, l.Wait)
	}
	return h
}

// coatHours estimates coat number k of a coat task.
func (x *expander) coatHours(t *tasks.Task, p *tasks.Paint, k int) hands {
	h := hands{people: 1}
	h.people = max(1, t.People, x.crewSize(t))
	area, err := x.area(t)
	if err != nil {
		h.fault, h.hint = err, "name its surface (an assembly), or give area: 4 m2 or hours"
		x.overrule(t, &h)
		return h
	}
	j := x.coatJob(t, p, k, area.Value)
	a, err := coat.Apply(j)
	if err != nil {
		h.fault, h.hint = err, "give hours, or complete the paint"
		x.overrule(t, &h)
		return h
	}
	h.share(a.Range, a.Hours, h.people, t)
	h.stands(p, a.Induction)
	h.est.Notes = a.Warnings
	h.est.Facts = append(h.est.Facts, area, a.Volume)
	mixed(&h, p, a, j.Celsius)
	h.est.Consumables = append(h.est.Consumables, Consumable{What: "paint " + p.Name, Amount: a.Litres, Unit: "L", Spare: a.Litres * 0.1})
	if a.Thinner+a.Cleaner > 0 {
		h.est.Consumables = append(h.est.Consumables, Consumable{What: "thinner for " + p.Name, Amount: a.Thinner + a.Cleaner, Unit: "L"})
	}
	x.overrule(t, &h)
	return h
}

// steel gives the steel temperature that a place is planned with, °C.
func (x *expander) steel(p *tasks.Place) float64 {
	if p.Steel.Pos.Given() {
		return p.Steel.Value
	}
	return DefaultSteel
}

// notZero keeps freezing point apart from a temperature that is not given.
func notZero(celsius float64) float64 {
	if celsius == 0 {
		return 0.01
	}
	return celsius
}

// DefaultSteel is the steel temperature, °C, where a place does not give one.
const DefaultSteel = 10
