package expand

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// What is lifted grows with the work (R24): a stage is the set of pieces that hang together by then.
// A piece is a part of an assembly, or an assembly without parts.

// Join is a task that makes things hang together from its start on, or takes things off from its finish on.
type Join struct {
	Task   *tasks.Task
	Things []string // assemblies, or parts as frame/base
	Off    bool     // they come off what they hung on
}

// joinsOf gives what a task joins and takes off; nothing for most.
func joinsOf(t *tasks.Task) []Join {
	var out []Join
	if len(t.TakesOff) > 0 {
		off := Join{Task: t, Off: true}
		for _, n := range t.TakesOff {
			off.Things = append(off.Things, n.Name)
		}
		out = append(out, off)
	}
	if t.Kind != tasks.FitUp && t.Kind != tasks.Weld {
		return out
	}
	j := Join{Task: t}
	for _, n := range t.Joins {
		j.Things = append(j.Things, n.Name)
	}
	if len(j.Things) == 0 {
		by := map[string][]string{}
		for _, p := range t.Parts {
			if a, _, single := strings.Cut(p, "/"); single {
				by[a] = append(by[a], p)
			}
		}
		if len(by) == 1 {
			for _, list := range by {
				j.Things = list
			}
		}
	}
	if len(j.Things) > 1 {
		out = append(out, j)
	}
	return out
}

// Stage is what a lift takes up at one stage of the work.
type Stage struct {
	Pieces []string // parts as frame/base, or assemblies without parts
	Total  lift.Total
	Load   lift.Load
	Notes  []string
}

// stage weighs the pieces that a lift takes up. The task's own stated mass stands for the thing
// that it names; a stated mass of an assembly is that of all its parts, less those not on.
func (s *stager) stage(t *tasks.Task, joined []Join) (Stage, error) {
	st := Stage{Pieces: s.hanging(t.Lifts, joined)}
	if t.Lifts == "" {
		st.Total = stated(t.Mass, lift.Guessed, t.Mass.Value)
		st.Load = st.Total.Load("the load")
		return s.allowed(t, st), nil
	}
	var from []origin.Figure
	var sum lift.Total
	own := map[string]bool{}
	for _, p := range s.whole(t.Lifts, joined) {
		own[p] = true
	}
	replaced := false
	for _, a := range s.job.Assemblies {
		parts, all := s.of(a, st.Pieces)
		if len(all) == 0 {
			continue
		}
		given := t.Mass.Pos.Given() && own[all[0]]
		one, err := s.weigh(a, parts, given, t)
		if err != nil {
			return st, err
		}
		replaced = replaced || given
		if len(from) > 0 && one.Mass > 0 {
			st.Notes = append(st.Notes, fmt.Sprintf("the centre of gravity is that of %s alone: %s has axes of its own", asm(t.Lifts), a.Name))
		}
		sum = plus(sum, one, a.Name == asm(t.Lifts))
		f := one.Figure
		f.Name, f.Value, f.Unit = "mass of "+a.Name, one.Mass, "kg"
		from = append(from, f)
	}
	if len(from) == 0 || sum.Mass <= 0 {
		if len(st.Pieces) == 0 {
			return st, s.nothing(t.Lifts)
		}
		return st, fmt.Errorf("nothing says what %q weighs", t.Lifts)
	}
	sum.Allowance = sum.Heavy / sum.Mass
	if len(from) == 1 {
		sum.Figure = from[0]
		sum.Figure.Name = "mass of " + t.Lifts
	} else {
		sum.Figure = origin.Worked("mass of "+t.Lifts+" with what hangs on it", sum.Mass, "kg", "sum of what is joined by then", from...)
	}
	st.Total, st.Load = sum, s.sized(sum.Load(t.Lifts), t, st.Pieces)
	return s.allowed(t, st), nil
}

// nothing says why a name takes up nothing: it is no assembly, or each of its parts is brought on by a joining
// task that names it by itself.
func (s *stager) nothing(name string) error {
	for _, a := range s.job.Assemblies {
		if a.Name != name || len(a.Parts) == 0 {
			continue
		}
		first := a.Name + "/" + a.Parts[0].Name
		return &quantity.Error{Problem: fmt.Sprintf("before its parts are joined %q is nothing: `joins` names each of them by itself", name),
			Hint: fmt.Sprintf("name the part that is lifted, `lifts: %s`, or the whole among what is joined, `joins: [%s, %s/PART]`, or put the joining before the lift", first, a.Name, a.Name)}
	}
	return fmt.Errorf("there is no assembly %q", name)
}

// sized gives a load the `size` of its assembly where that is larger than what its parts span, as parts
// without positions do: for the sail and for the room to keep clear. It holds for the whole assembly alone.
func (s *stager) sized(l lift.Load, t *tasks.Task, pieces []string) lift.Load {
	face := func(x, y, z float64) float64 { return math.Max(x*y, math.Max(x*z, y*z)) }
	for _, a := range s.job.Assemblies {
		if a.Name != t.Lifts || face(a.Size[0], a.Size[1], a.Size[2]) <= face(l.Length, l.Width, l.Height) {
			continue
		}
		if _, all := s.of(a, pieces); len(all) == max(1, len(a.Parts)) {
			l.Length, l.Width, l.Height = a.Size[0], a.Size[1], a.Size[2]
		}
	}
	return l
}

// allowed puts the task's own factors on a stage's load.
func (s *stager) allowed(t *tasks.Task, st Stage) Stage {
	if l := t.Lifting; l != nil {
		if l.Allowance.Pos.Given() {
			st.Load.Allowance = l.Allowance.Value
		}
		if l.Water != lift.Onshore {
			if f, err := lift.DynamicFactor(st.Load.Mass, l.Water); err == nil {
				st.Load.Dynamic = f.Value
			} else {
				st.Notes = append(st.Notes, err.Error())
			}
		}
	}
	return st
}

// of gives the parts of an assembly that are among the pieces, and their names.
func (s *stager) of(a *tasks.Assembly, pieces []string) (parts []lift.Part, all []string) {
	if slices.Contains(pieces, a.Name) {
		return nil, []string{a.Name}
	}
	for _, p := range a.Parts {
		if name := a.Name + "/" + p.Name; slices.Contains(pieces, name) {
			parts, all = append(parts, p.Part), append(all, name)
		}
	}
	return parts, all
}

// weigh gives the mass of what is there of an assembly.
func (s *stager) weigh(a *tasks.Assembly, parts []lift.Part, given bool, t *tasks.Task) (lift.Total, error) {
	var total lift.Total
	if len(parts) > 0 {
		var err error
		if total, err = lift.Mass(parts); err != nil {
			return total, err
		}
	}
	switch {
	case given:
		return restated(total, stated(t.Mass, lift.Guessed, t.Mass.Value)), nil
	case !a.Mass.Pos.Given():
		return total, nil
	case len(parts) == len(a.Parts):
		return restated(total, stated(a.Mass, known(a.How), a.Mass.Value)), nil
	}
	whole := make([]lift.Part, 0, len(a.Parts))
	for _, p := range a.Parts {
		whole = append(whole, p.Part)
	}
	all, err := lift.Mass(whole)
	left := a.Mass.Value - (all.Mass - total.Mass)
	if err != nil || strings.Contains(t.Lifts, "/") || left <= 0 {
		return total, err
	}
	return restated(total, stated(a.Mass, known(a.How), left)), nil
}

func known(how string) lift.Known {
	switch how {
	case "weighed":
		return lift.Weighed
	case "drawn":
		return lift.Drawn
	}
	return lift.Guessed
}

// stated makes a total of a mass that somebody states.
func stated(a tasks.Amount, k lift.Known, kg float64) lift.Total {
	total, err := lift.Mass([]lift.Part{{Name: "stated mass", Shape: lift.Shape{Kind: lift.Item}, Stated: kg, Known: k}})
	if err != nil {
		return lift.Total{}
	}
	total.Figure = origin.Written("mass, "+k.String(), kg, "kg", a.Pos.Origin("mass, "+k.String()))
	total.Low, total.High = [3]float64{}, [3]float64{}
	return total
}

// restated puts a stated mass in place of what sizes give, and keeps the shape.
func restated(shape, mass lift.Total) lift.Total {
	shape.Mass, shape.Heavy, shape.Allowance, shape.Figure = mass.Mass, mass.Heavy, mass.Allowance, mass.Figure
	return shape
}

// plus adds two totals; shape says that b gives the axes.
func plus(a, b lift.Total, shape bool) lift.Total {
	if a.Mass == 0 {
		return b
	}
	out := a
	if shape {
		out = b
	}
	out.Mass, out.Heavy = a.Mass+b.Mass, a.Heavy+b.Heavy
	out.Surface = a.Surface + b.Surface
	out.Parts = append(slices.Clone(a.Parts), b.Parts...)
	out.Allowance = out.Heavy / math.Max(out.Mass, 1e-9)
	return out
}

// Piece is what hangs together of an assembly when it leaves for the site.
type Piece struct {
	Name  string // its parts: "posts, rails"
	Parts []string
	Total lift.Total
}

// Travels gives an assembly as it leaves for the site: in one piece, or in those that only tasks at
// the site join.
func Travels(w *Work, a *tasks.Assembly) []Piece {
	s := newStager(w.Job, w.Window.Place)
	var joined []Join
	absent := map[*tasks.Task]bool{}
	for _, st := range w.Steps {
		absent[st.Task] = absent[st.Task] || st.Absent
	}
	for _, t := range w.Job.Tasks {
		if !absent[t] && t.Place != w.Window.Place {
			joined = append(joined, joinsOf(t)...)
		}
	}
	if len(a.Parts) == 0 {
		total, err := s.weigh(a, nil, false, &tasks.Task{Lifts: a.Name})
		if err != nil {
			return nil
		}
		return []Piece{{Name: a.Name, Parts: []string{a.Name}, Total: total}}
	}
	done := map[string]bool{}
	var out []Piece
	for i := -1; i < len(a.Parts); i++ {
		thing := a.Name
		if i >= 0 {
			thing = a.Name + "/" + a.Parts[i].Name
			if done[thing] {
				continue
			}
		}
		hang := s.hanging(thing, joined)
		parts, all := s.of(a, hang)
		if len(parts) == 0 {
			continue
		}
		var names []string
		for _, p := range all {
			done[p] = true
			names = append(names, strings.TrimPrefix(p, a.Name+"/"))
		}
		total, err := s.weigh(a, parts, false, &tasks.Task{Lifts: thing})
		if err != nil {
			continue
		}
		out = append(out, Piece{Name: strings.Join(names, ", "), Parts: all, Total: total})
	}
	return out
}
