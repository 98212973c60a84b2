package expand

import (
	"math"
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Rigging is a lift or move with everything that the job file says about it. It judges any stage of
// the work; which one the plan makes of it, the plan says.
type Rigging struct {
	Task  *tasks.Task
	Way   lift.Way
	Kit   *tasks.Kit // nil: hands, or gear that the file does not declare
	Count int        // of the kit
	Joins []Join     // tasks that hang things together, those that happen, in the order of the file
	site  bool
	s     *stager
	crew  int
	gear  []*tasks.Kit // all gear of the job, for the nearest that would do
}

// Check is one thing that was looked at.
type Check struct {
	What   string
	Result lift.Result
	Filter bool // exceeding it warns and refuses nothing
}

// Judgement is what one stage of a lift comes to.
type Judgement struct {
	Stage
	OK      bool // nothing that the file states is exceeded
	Checks  []Check
	Refused *Check   // the first that refuses it
	Others  []string // gear of the job that would carry it, with its numbers; only where it is refused
	Ask     []string // what is not known
	Legs    []lift.Leg
	Rule    string
	Wind    *lift.WindResult
	Clear   origin.Figure // mm that nobody is within; empty where it is not known
	CutOff  origin.Figure // kg at which to stop pulling at an old part
	Crew    []string      // tickets that such a lift asks for
}

// rigging collects what is known about a lift or move.
func (x *expander) rigging(t *tasks.Task) *Rigging {
	r := &Rigging{Task: t, Way: lift.ByChainHoist, s: x.stager, site: x.atSite(t), crew: max(2, t.People, x.crewSize(t))}
	by := x.kitNamed(t.By)
	if by != nil && !by.HasKind && by.Chart == nil {
		by = nil
	}
	for _, u := range t.Kit {
		if (u.Kit.HasKind || u.Kit.Chart != nil) && (by == nil || u.Kit == by) {
			r.Kit, r.Count = u.Kit, u.Count
		}
	}
	if r.Kit == nil && by != nil {
		r.Kit, r.Count = by, 1
	}
	switch {
	case t.By == "hands" || t.By == "by hand":
		r.Way, r.Kit = lift.ByHands, nil
	case r.Kit != nil:
		r.Way = wayOf(r.Kit)
	default:
		w, err := lift.ParseWay(t.By)
		switch {
		case err == nil:
			r.Way = w
		case t.By != "" && x.kitNamed(t.By) == nil:
			x.fault(t.Pos, "name a kit or hire, or write hands, chain hoist, lever hoist, loader crane, gantry, trolley or jack",
				"task %q: by %q: no kit or hire is called that, and it is no way to lift", t.Name, t.By)
		}
	}
	for _, u := range x.w.Job.Tasks {
		if !x.absent[u] && u != t {
			r.Joins = append(r.Joins, joinsOf(u)...)
		}
	}
	r.near()
	for _, k := range x.w.Job.Kit {
		if (k.HasKind || k.Chart != nil) && (k.At == nil || k.At == t.Place) {
			r.gear = append(r.gear, k)
		}
	}
	return r
}

// near leaves out the joining tasks that have nothing to do with what is lifted, whatever is joined.
func (r *Rigging) near() {
	all := map[string]bool{}
	var only []Join
	for _, j := range r.Joins {
		if !j.Off {
			only = append(only, j)
		}
	}
	for _, p := range r.s.hanging(r.Task.Lifts, only) {
		all[p] = true
	}
	var out []Join
	for _, j := range r.Joins {
		if slices.ContainsFunc(j.Things, func(t string) bool {
			return slices.ContainsFunc(r.s.all(t), func(p string) bool { return all[p] })
		}) {
			out = append(out, j)
		}
	}
	r.Joins = out
}

func wayOf(k *tasks.Kit) lift.Way {
	if k.HasKind {
		return k.Kind
	}
	return lift.ByLoaderCrane
}

// lifting gives what the file says beyond mass and gear; never nil.
func (r *Rigging) lifting() *tasks.Lifting {
	if r.Task.Lifting != nil {
		return r.Task.Lifting
	}
	return &tasks.Lifting{}
}

// Among picks, of the joining tasks, those for which begun holds, and of those that take off, those for
// which done holds.
func (r *Rigging) Among(begun, done func(*tasks.Task) bool) []Join {
	var out []Join
	for _, j := range r.Joins {
		if !j.Off && begun(j.Task) || j.Off && done(j.Task) {
			out = append(out, j)
		}
	}
	return out
}

// Pieces lists what is taken up when these tasks have joined.
func (r *Rigging) Pieces(joined []Join) []string { return r.s.hanging(r.Task.Lifts, joined) }

// Judge judges the lift when these tasks have joined. An error says that nothing tells its mass.
func (r *Rigging) Judge(joined []Join) (Judgement, error) {
	st, err := r.s.stage(r.Task, joined)
	if err != nil {
		return Judgement{}, err
	}
	j := Judgement{Stage: st, OK: true, Crew: lift.Crew(r.Way)}
	r.byGear(&j)
	r.byPeople(&j)
	r.bySlings(&j)
	r.onFloor(&j)
	r.inWind(&j)
	height := r.Task.Height.Value
	if !r.Task.Height.Pos.Given() {
		height = 1500
	}
	if r.Way != lift.ByHands && r.Way != lift.ByTrolley {
		j.Clear, _ = lift.Exclusion(height, math.Max(j.Load.Length, j.Load.Width))
	}
	for i := range j.Checks {
		c := &j.Checks[i]
		if !c.Result.OK && !c.Filter {
			j.OK = false
			if j.Refused == nil {
				j.Refused = c
			}
		}
	}
	if !j.OK {
		r.others(&j)
	}
	j.Ask = append(j.Ask, st.Notes...)
	return j, nil
}

// add puts one result on the judgement; an error is something not known.
func (j *Judgement) add(what string, filter bool, res lift.Result, err error) {
	if err != nil {
		text := err.Error()
		if h := quantity.Hint(err); h != "" {
			text += " (" + h + ")"
		}
		j.Ask = append(j.Ask, what+" not judged: "+text)
		return
	}
	j.Checks = append(j.Checks, Check{What: what, Result: res, Filter: filter})
	for _, w := range res.Warnings {
		if !slices.Contains(j.Ask, w) {
			j.Ask = append(j.Ask, w)
		}
	}
}

// Hint tells the ways out of a refusal.
func (j Judgement) Hint() string {
	var out []string
	if j.Refused != nil && j.Refused.Result.Nearest != "" {
		out = append(out, j.Refused.Result.Nearest)
	}
	out = append(out, j.Others...)
	out = append(out, "or lift it in parts, or before something is joined")
	return strings.Join(out, "; ")
}

// Outline is one piece of what is lifted as a box, mm, in the axes of its assembly.
type Outline struct {
	Name      string
	Low, High [3]float64
}

// Outlines gives the pieces of the assembly that the lift names, those that hang on it at a stage,
// for a sketch; nothing where the file gives no sizes.
func (r *Rigging) Outlines(pieces []string) []Outline {
	var out []Outline
	for _, a := range r.s.job.Assemblies {
		if a.Name != asm(r.Task.Lifts) {
			continue
		}
		for _, p := range a.Parts {
			if !slices.Contains(pieces, a.Name+"/"+p.Name) {
				continue
			}
			places := p.Places
			if len(places) == 0 {
				places = [][3]float64{p.At}
			}
			for _, at := range places {
				one := p.Part
				one.At, one.Places, one.Count = at, nil, 1
				if t, err := lift.Mass([]lift.Part{one}); err == nil {
					out = append(out, Outline{p.Name, t.Low, t.High})
				}
			}
		}
		if len(a.Parts) == 0 && a.Size[0]*a.Size[2] > 0 {
			out = append(out, Outline{a.Name, [3]float64{}, a.Size})
		}
	}
	return out
}

// Slung gives the slings of the lift, nil where the file says nothing of them.
func (r *Rigging) Slung() *lift.Rig { return r.lifting().Slings }

// Said gives what the file says of the lift beyond mass and gear; never nil.
func (r *Rigging) Said() *tasks.Lifting { return r.lifting() }
