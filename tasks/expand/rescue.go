package expand

import (
	"fmt"
	"slices"

	"sailby/tasks"
	"sailby/tasks/coat"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Rescue is a longest wait between two coats, and what mends it where it cannot be kept (R11): a tack coat or abrading,
// before the coat that would come too late.
type Rescue struct {
	Key    string       // of the coat that would come too late, as Step.Key gives it; for Basis.Rescue
	Task   *tasks.Task  // of that coat
	Paint  *tasks.Paint // over which it would come too late
	Name   string       // "tack coat" or "abrade and wipe"
	Mended bool         // it is in this work, in place of the longest wait
	Step   *Step        // where it is

	below, above *Step
	rescue       coat.Rescue
}

// abradedHolds is how long an abraded coat may wait for the next, minutes: dust and grease settle (house judgement).
const abradedHolds = 24 * 60

// sheets of abrasive paper and litres of solvent for a square metre that is abraded and wiped; house judgement.
const (
	sheetsEach = 1.0
	wipeEach   = 0.1
)

// mendable keeps a longest wait as one that may be mended, and says whether it is on this basis: then the wait itself
// does not hold.
func (x *expander) mendable(t *tasks.Task, a, b *Step, p *tasks.Paint) bool {
	if t.Rescue != nil && !*t.Rescue || a.Absent || b.Absent {
		return false
	}
	area, err := x.area(a.Task)
	if err != nil {
		return false
	}
	r, err := coat.Missed(x.coatJob(a.Task, p, 1, area.Value))
	if err != nil {
		return false
	}
	m := Rescue{Key: b.Key(), Task: t, Paint: p, Name: r.Name, below: a, above: b, rescue: r, Mended: slices.Contains(x.w.Basis.Rescue, b.Key())}
	x.w.Rescues = append(x.w.Rescues, m)
	return m.Mended || x.w.Basis.Unbound
}

// mend puts in the rescues of this basis: a step of its own before the coat that would come too late, and before its
// stripe, from the end of the least wait on.
func (x *expander) mend() {
	for i := range x.w.Rescues {
		m := &x.w.Rescues[i]
		if !m.Mended {
			continue
		}
		t, p, r := m.Task, m.Paint, m.rescue
		area, _ := x.area(m.below.Task)
		h := hands{people: max(1, t.People, x.crewSize(t))}
		h.share(r.Range, r.Hours, h.people, t)
		if r.Wet > 0 {
			h.stands(p, quantity.Clock(p.Induction))
		}
		h.est.Range = [3]int{whole(h.minutes.Low), whole(h.minutes.Likely), whole(h.minutes.High)}
		h.est.Notes = []string{"the longest wait of " + p.Name + " is not kept: " + r.Words}
		h.est.Facts = []origin.Figure{area}
		if r.Litres > 0 {
			h.est.Consumables = []Consumable{{What: "paint " + p.Name, Amount: r.Litres, Unit: "L", Spare: r.Litres * 0.1},
				{What: "thinner for " + p.Name, Amount: r.Litres*r.Thinner + wipeEach*area.Value, Unit: "L"}}
		} else {
			h.est.Consumables = []Consumable{{What: "abrasive paper, 150 to 200 grit", Amount: sheetsEach * area.Value, Unit: "sheets"},
				{What: "thinner for " + p.Name, Amount: wipeEach * area.Value, Unit: "L"}}
		}
		before := m.above
		if m.below.Task != t {
			before = x.first[t][0] // its stripe
		}
		s := x.handsStep(t, r.Name+" before "+before.Name, h)
		s.Mends, m.Step = true, s
		if r.Wet > 0 {
			s.Paint = p
			x.filmStates(t, s, p)
		} else {
			s.InOneGo, s.OverMeals = false, true
			s.States = append(s.States, State{Name: tasks.Grit})
		}
		x.rescued(m, s, before)
	}
}

// rescued ties a rescue in: what the coat waited for the rescue waits for, and the coat follows it in time.
func (x *expander) rescued(m *Rescue, s, before *Step) {
	for i := range x.w.Links {
		if l := &x.w.Links[i]; l.To == before && l.ToEnd == tasks.Start && l.From != s {
			l.To = s
		}
	}
	x.moveBefore(m.Task, s, before)
	why := fmt.Sprintf("%s over %s", m.rescue.Name, m.Paint.Name)
	link := Link{From: s, To: before, FromEnd: tasks.Finish, ToEnd: tasks.Start, Min: int(m.rescue.Wait), Max: NoMax, Pos: m.Task.Pos, Why: why}
	if m.rescue.Wet == 0 {
		link.Max = abradedHolds
		link.Why += ", which holds for " + quantity.Hours(abradedHolds)
	}
	x.w.Links = append(x.w.Links, link)
	if w, err := m.Paint.Next(m.above.Paint.Paint); err == nil && len(w.Max) > 0 && m.rescue.Wet > 0 {
		x.bound(m.Task, s, m.above, m.Paint, w.Max, "longest recoat of the tack coat of "+m.Paint.Name)
	}
}

// moveBefore puts a step that was made last before another of its task, in the work and in the task.
func (x *expander) moveBefore(t *tasks.Task, s, before *Step) {
	move := func(list []*Step) []*Step {
		list = slices.DeleteFunc(list, func(o *Step) bool { return o == s })
		return slices.Insert(list, slices.Index(list, before), s)
	}
	x.w.Steps, x.first[t] = move(x.w.Steps), move(x.first[t])
	for i, o := range x.w.Steps {
		o.Index = i
	}
}
