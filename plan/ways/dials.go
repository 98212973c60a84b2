package ways

import (
	"fmt"
	"slices"
	"strings"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// The furthest that a change goes: beyond it, it is another job.
const (
	mostLater  = 14 * 1440 // a date
	mostLonger = 12 * 60   // hours of a day, a slot, a reach
	mostWait   = 4 * 1440  // a longest wait
	mostMore   = 3         // people, kit, room
)

// dialer makes the dials of a job for its answer.
type dialer struct {
	job  *tasks.Job
	a    *plan.Answer
	out  []dial
	seen map[string]bool
}

// dials lists what can be changed, for every limit of the proof that can; without a proof that names its limits, for
// every limit that the job has.
func dials(job *tasks.Job, a *plan.Answer) []dial {
	d := &dialer{job: job, a: a, seen: map[string]bool{}}
	d.kept()
	d.trips()
	if keysOf(a.Proof) == nil {
		d.all()
		return d.out
	}
	for _, l := range a.Proof.Lines {
		d.limit(l.Limit)
	}
	return d.out
}

// kept are the changes that the job file keeps by name.
func (d *dialer) kept() {
	for _, c := range d.job.Changes {
		text := fmt.Sprintf("the change %q", c.Name)
		if c.Text != "" {
			text += " (" + c.Text + ")"
		}
		d.out = append(d.out, dial{pos: c.Pos, steps: []int{0}, says: func(int) string { return text },
			writes: func(int) string { return fmt.Sprintf("--with %q, or what stands under it", c.Name) },
			sets:   func(int) ([]tasks.Setting, bool) { return c.Sets, true }})
	}
}

// trips are the other bookings.
func (d *dialer) trips() {
	for _, t := range d.job.Trips {
		if d.a.Work.Trip == nil || t.Name == d.a.Work.Trip.Name {
			continue
		}
		d.out = append(d.out, dial{pos: t.Pos, steps: []int{0}, trip: t.Name, says: func(int) string { return fmt.Sprintf("the trip %q in place of %q", t.Name, d.a.Work.Trip.Name) },
			writes: func(int) string { return fmt.Sprintf("--trip %q", t.Name) },
			sets:   func(int) ([]tasks.Setting, bool) { return nil, true }})
	}
}

// all makes the dials of every limit of the job.
func (d *dialer) all() {
	w := d.a.Work
	add := func(l plan.Limit) { d.limit(l) }
	for _, s := range w.Steps {
		if s.Absent {
			continue
		}
		add(plan.Limit{Kind: plan.LimitNotBefore, Step: s})
		add(plan.Limit{Kind: plan.LimitDeadline, Step: s})
		if s.Class == expand.Hands {
			add(plan.Limit{Kind: plan.LimitLength, Step: s})
		}
		for k := range s.Needs {
			add(plan.Limit{Kind: plan.LimitNeed, Step: s, Need: &s.Needs[k]})
		}
	}
	for i := range w.Links {
		add(plan.Limit{Kind: plan.LimitMaxWait, Link: &w.Links[i]})
	}
	for _, p := range d.job.People {
		for _, k := range []plan.LimitKind{plan.LimitPerson, plan.LimitPersonHours, plan.LimitPersonFrom, plan.LimitPersonUntil, plan.LimitBooked} {
			add(plan.Limit{Kind: k, Person: p})
		}
	}
	for _, k := range d.job.Kit {
		add(plan.Limit{Kind: plan.LimitKit, Kit: k})
		add(plan.Limit{Kind: plan.LimitHire, Kit: k})
	}
	for _, p := range d.job.Places {
		for _, k := range []plan.LimitKind{plan.LimitHours, plan.LimitClosed, plan.LimitNoisy, plan.LimitPower} {
			add(plan.Limit{Kind: k, Place: p})
		}
		for i := range p.Permits {
			add(plan.Limit{Kind: plan.LimitPermit, Place: p, Permit: &p.Permits[i]})
		}
		for _, f := range p.Workfaces {
			add(plan.Limit{Kind: plan.LimitReach, Place: p, Face: f})
			add(plan.Limit{Kind: plan.LimitRoom, Place: p, Face: f})
		}
	}
	add(plan.Limit{Kind: plan.LimitBegin})
	add(plan.Limit{Kind: plan.LimitOpens})
	add(plan.Limit{Kind: plan.LimitCloses})
}

// limit makes the dials of one limit, once.
func (d *dialer) limit(l plan.Limit) {
	if k := keyOf(l); d.seen[k] {
		return
	} else {
		d.seen[k] = true
	}
	switch l.Kind {
	case plan.LimitLength:
		d.shorter(l)
	case plan.LimitMaxWait:
		d.wait(l)
	case plan.LimitKit, plan.LimitRoom, plan.LimitPower:
		d.more(l)
	case plan.LimitNeed, plan.LimitPerson, plan.LimitLone:
		d.person(l)
	case plan.LimitPersonHours, plan.LimitHours, plan.LimitNoisy, plan.LimitPermit:
		d.daily(l)
	case plan.LimitPersonFrom, plan.LimitPersonUntil, plan.LimitNotBefore, plan.LimitDeadline, plan.LimitBegin:
		d.date(l)
	case plan.LimitBooked, plan.LimitReach, plan.LimitHire:
		d.slots(l)
	case plan.LimitClosed, plan.LimitPersonOff, plan.LimitDaylight:
		d.freed(l)
	case plan.LimitOpens, plan.LimitCloses, plan.LimitLeaves:
		d.window(l)
	}
}

// add adds a dial of a limit.
func (d *dialer) add(l plan.Limit, x dial) {
	if len(x.steps) == 0 {
		return
	}
	x.kind = l.Kind
	if x.keys == nil {
		x.keys = []string{keyOf(l)}
	}
	d.out = append(d.out, x)
}

func one(s tasks.Setting) ([]tasks.Setting, bool) { return []tasks.Setting{s}, true }

// shorter lets a task take less time, down to half.
func (d *dialer) shorter(l plan.Limit) {
	t := l.Step.Task
	hands := 0
	for _, s := range d.a.Work.Steps {
		if s.Task == t && s.Class == expand.Hands && !s.Absent {
			hands++
		}
	}
	factor := t.Factor
	if factor == 0 {
		factor = 1
	}
	if hands != 1 || l.Step.HandsOn == 0 || factor != 1 {
		return // a task of several steps, or of rounds of several lengths: no single number says it
	}
	key, times, pos := "hours", 1, t.Keys.At("hours", t.Pos)
	if _, man := t.Keys["man-hours"]; man {
		key, pos = "man-hours", t.Keys.At("man-hours", t.Pos)
		for _, n := range l.Step.Needs {
			if !n.Watch {
				times += n.Count
			}
		}
		times = max(times-1, 1)
	}
	full := l.Step.HandsOn
	var steps []int
	steps = append(steps, minuteSteps(full/2)...)
	if len(steps) == 0 && full >= 10 {
		steps = []int{5}
	}
	d.add(l, dial{pos: pos, was: span(full * times), steps: steps,
		says: func(n int) string {
			return fmt.Sprintf("%s taking %s less: %s hands-on for %s", named(t), span(n), span(full-n), span(full))
		},
		writes: func(n int) string { return key + ": " + length((full-n)*times) },
		sets: func(n int) ([]tasks.Setting, bool) {
			return one(set(d.job, t.Pos, length((full-n)*times), append(taskPath(t), key)...))
		}})
}

// wait lets a longest wait be longer, where a task's own link gives it.
func (d *dialer) wait(l plan.Limit) {
	k := l.Link
	if k.From == nil || k.Max >= expand.NoMax || k.MaxCure != nil || k.From.Task == k.To.Task {
		return
	}
	t := k.To.Task
	var own *tasks.Link
	for i := range t.Links {
		if t.Links[i].Task == k.From.Task.Name && t.Links[i].Max != nil && t.Links[i].Max.Minutes == k.Max {
			own = &t.Links[i]
		}
	}
	if own == nil {
		return
	}
	words, unit := span, ""
	if k.MaxWorking {
		unit = " of opening hours"
	}
	value := func(n int) string {
		if k.MaxWorking {
			return fmt.Sprintf("%d working min", k.Max+n)
		}
		return length(k.Max + n)
	}
	d.add(l, dial{relaxes: true, pos: own.Pos, was: "max: " + value(0), steps: minuteSteps(mostWait),
		says: func(n int) string {
			return fmt.Sprintf("the longest wait of %s after %s %s longer: %s%s", named(t), named(k.From.Task), words(n), words(k.Max+n), unit)
		},
		writes: func(n int) string { return "max: " + value(n) },
		sets: func(n int) ([]tasks.Setting, bool) {
			return one(set(d.job, t.Pos, value(n), append(taskPath(t), linkKey(own), d.linkName(t, own), "max")...))
		}})
}

func linkKey(l *tasks.Link) string {
	switch {
	case l.From == tasks.Start && l.To == tasks.Start:
		return "after start of"
	case l.From == tasks.Finish && l.To == tasks.Finish:
		return "finish after"
	case l.From == tasks.Start:
		return "finish after start of"
	}
	return "after"
}

// linkName is how a task of a block names the earlier one: of the same round by its bare name, of the one before with `previous`.
func (d *dialer) linkName(t *tasks.Task, l *tasks.Link) string {
	for _, o := range d.job.Tasks {
		if o.Name != l.Task || o.Block == "" || o.Block != t.Block {
			continue
		}
		if o.Round == t.Round {
			return base(o)
		}
		return "previous " + base(o)
	}
	return l.Task
}

// refused lists what of a proof is never offered.
func refused(p *plan.Proof) []string {
	if p == nil {
		return nil
	}
	var out []string
	add := func(s string) {
		if !slices.Contains(out, s) {
			out = append(out, s)
		}
	}
	for _, l := range p.Lines {
		switch l.Limit.Kind {
		case plan.LimitMinWait:
			add("what comes before what, and how long after it at least")
		case plan.LimitStanding:
			add("drying, cooling and other standing time")
		case plan.LimitOrder:
			add("the rules on the order")
		case plan.LimitClash, plan.LimitLone, plan.LimitWatch, plan.LimitRest:
			add(map[plan.LimitKind]string{plan.LimitClash: "work that must not be near other work", plan.LimitLone: "that nobody is alone (R14)",
				plan.LimitWatch: "the fire watch (R13)", plan.LimitRest: "shifts and rest (R15)"}[l.Limit.Kind])
		case plan.LimitWeather, plan.LimitDry:
			add("weather, damp and cold")
		case plan.LimitInOneGo:
			add("what goes in one go")
		case plan.LimitMaxWait:
			if l.Limit.Link.MaxCure != nil {
				add("the longest wait that a paint allows")
			}
		case plan.LimitReach:
			if strings.Contains(l.Text, "off before the water") {
				add("the time to be off before the water")
			}
		}
	}
	return out
}

// zoneOf is the zone of the window's place, for stamps.
func (d *dialer) at(m tasks.Moment) (hours.Minute, bool) {
	at, _, ok := d.a.Work.Window.At(m)
	return at, ok
}
