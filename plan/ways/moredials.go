package ways

import (
	"fmt"
	"slices"
	"strings"

	"sailby/plan"
	"sailby/plan/problem"
	"sailby/tasks"
)

// more adds kit, room in a workface, or power.
func (d *dialer) more(l plan.Limit) {
	switch l.Kind {
	case plan.LimitKit:
		k := l.Kit
		where := "kit"
		if k.Slots != nil {
			where = "hire"
		}
		d.add(l, dial{relaxes: true, pos: k.Keys.At("count", k.Pos), was: fmt.Sprintf("count: %d", max(k.Count, 1)), steps: counts(mostMore),
			says: func(n int) string {
				return fmt.Sprintf("%d more of %s: %d in place of %d", n, k.Name, k.Count+n, k.Count)
			},
			writes: func(n int) string { return fmt.Sprintf("count: %d", k.Count+n) },
			sets: func(n int) ([]tasks.Setting, bool) {
				return one(set(d.job, k.Pos, fmt.Sprint(k.Count+n), where, k.Name, "count"))
			}})
	case plan.LimitRoom:
		f := l.Face
		if f.People == 0 {
			return
		}
		d.add(l, dial{relaxes: true, pos: f.Keys.At("people", f.Pos), was: fmt.Sprintf("people: %d", f.People), steps: counts(mostMore),
			says: func(n int) string {
				return fmt.Sprintf("room for %d at %s/%s in place of %d", f.People+n, f.Place.Name, f.Name, f.People)
			},
			writes: func(n int) string { return fmt.Sprintf("people: %d", f.People+n) },
			sets: func(n int) ([]tasks.Setting, bool) {
				return one(set(d.job, f.Pos, fmt.Sprint(f.People+n), "places", f.Place.Name, "workfaces", f.Name, "people"))
			}})
	case plan.LimitPower:
		d.power(l)
	}
}

// power raises the mains of a place, else its first generator, by kVA.
func (d *dialer) power(l plan.Limit) {
	p := l.Place
	have, pos, path, what := p.Mains.Value, p.Pos, []string{"places", p.Name, "mains"}, "the mains at "+p.Name
	if !p.Mains.Pos.Given() {
		i := slices.IndexFunc(d.job.Kit, func(k *tasks.Kit) bool {
			return k.Gives > 0 && (k.At == p || k.At == nil && p == d.a.Work.Window.Place)
		})
		if i < 0 {
			return
		}
		k := d.job.Kit[i]
		where := "kit"
		if k.Slots != nil {
			where = "hire"
		}
		have, pos, path, what = k.Gives, k.Pos, []string{where, k.Name, "gives"}, k.Name
	}
	var steps []int
	for n := 1; n <= 40; n++ {
		steps = append(steps, n)
	}
	key := path[len(path)-1]
	d.add(l, dial{relaxes: true, pos: pos, was: fmt.Sprintf("%s: %g kVA", key, have), steps: steps,
		says:   func(n int) string { return fmt.Sprintf("%d kVA more from %s: %g kVA", n, what, have+float64(n)) },
		writes: func(n int) string { return fmt.Sprintf("%s: %g kVA", key, have+float64(n)) },
		sets: func(n int) ([]tasks.Setting, bool) {
			return one(set(d.job, pos, fmt.Sprintf("%g kVA", have+float64(n)), path...))
		}})
}

// person adds somebody who is like one of the people that a limit is about, with all of the place's hours. For a need
// by ticket that is everybody who can fill it, for company anybody.
func (d *dialer) person(l plan.Limit) {
	switch l.Kind {
	case plan.LimitPerson:
		d.like(l.Person)
	case plan.LimitLone:
		d.hand(nil, "", nil)
	case plan.LimitNeed:
		if l.Need == nil || l.Need.Who != nil {
			return
		}
		found := false
		for _, p := range d.job.People {
			if problem.CanFill(p, l.Need) {
				found = true
				d.like(p)
			}
		}
		if !found {
			d.hand(append([]tasks.Ticket{l.Need.Ticket}, l.Need.Also...), "", nil)
		}
	}
}

func (d *dialer) like(p *tasks.Person) {
	if !p.Outside {
		d.hand(p.Tickets, p.Name, p.Places)
	}
}

// hand makes the dial that adds people with some tickets.
func (d *dialer) hand(tickets []tasks.Ticket, like string, places []string) {
	var words, values []string
	for _, t := range tickets {
		words, values = append(words, t.String()), append(values, ticket(t))
	}
	slices.Sort(words)
	words = slices.Compact(words)
	id := "person/" + strings.Join(words, ",") + "/" + strings.Join(places, ",")
	if d.seen[id] {
		return
	}
	d.seen[id] = true
	what := "somebody without tickets"
	if len(words) > 0 {
		what = "somebody with " + strings.Join(words, ", ")
	}
	if like != "" && len(words) > 1 {
		what = "somebody like " + like + " (" + strings.Join(words, ", ") + ")"
	}
	body := "tickets: [" + strings.Join(values, ", ") + "]"
	if len(places) > 0 {
		body += ", places: " + list(places)
	}
	d.out = append(d.out, dial{kind: plan.LimitPerson, keys: d.helped(tickets, places), pos: d.peoplePos(), steps: counts(mostMore),
		says: func(n int) string {
			if n == 1 {
				return "one more in the crew: " + what
			}
			return fmt.Sprintf("%d more in the crew: each %s", n, what)
		},
		writes: func(n int) string { return fmt.Sprintf("under people: one more %d: {%s}", n, body) },
		sets:   func(n int) ([]tasks.Setting, bool) { return d.crew(n, body), true }})
}

// helped gives the keys of the limits that somebody with these tickets helps with.
func (d *dialer) helped(tickets []tasks.Ticket, places []string) []string {
	out := []string{}
	who := &tasks.Person{Tickets: tickets, Places: places}
	for _, s := range d.a.Work.Steps {
		out = append(out, keyOf(plan.Limit{Kind: plan.LimitLone, Step: s}))
		for i := range s.Needs {
			if s.Needs[i].Who == nil && problem.CanFill(who, &s.Needs[i]) {
				out = append(out, keyOf(plan.Limit{Kind: plan.LimitNeed, Step: s}))
			}
		}
	}
	for _, p := range d.job.People {
		for _, k := range []plan.LimitKind{plan.LimitPerson, plan.LimitPersonHours, plan.LimitPersonFrom, plan.LimitPersonUntil, plan.LimitPersonOff} {
			out = append(out, keyOf(plan.Limit{Kind: k, Person: p}))
		}
	}
	return append(out, keyOf(plan.Limit{Kind: plan.LimitRest}))
}

func (d *dialer) peoplePos() tasks.Pos {
	for _, p := range d.job.People {
		if p.Pos.File == d.job.File {
			return p.Pos
		}
	}
	return d.job.Pos
}

// crew writes n more people, and lets them come along where a trip names who does.
func (d *dialer) crew(n int, body string) []tasks.Setting {
	own := slices.ContainsFunc(d.job.People, func(p *tasks.Person) bool { return p.Pos.File == d.job.File })
	var sets []tasks.Setting
	var names, all []string
	for i := 1; i <= n; i++ {
		name := fmt.Sprintf("one more %d", i)
		names = append(names, name)
		all = append(all, quoted(name)+": {"+body+"}")
		if own {
			sets = append(sets, tasks.Setting{Path: []string{"people", name}, Value: "{" + body + "}"})
		}
	}
	if !own {
		sets = append(sets, tasks.Setting{Path: []string{"people"}, Value: "{" + strings.Join(all, ", ") + "}"})
	}
	if t := d.a.Work.Trip; t != nil && t.People != nil {
		sets = append(sets, tasks.Setting{Path: []string{"trips", t.Name, "people"}, Value: list(append(append([]string{}, t.People...), names...))})
	}
	return sets
}

// ticket writes a ticket as the job file reads it.
func ticket(t tasks.Ticket) string {
	if !strings.EqualFold(t.Name, "weld") {
		return quoted(t.Name)
	}
	process := t.Process
	if process == "" {
		process = "all"
	}
	out := "{weld: " + quoted(process)
	if len(t.Positions) > 0 {
		out += ", positions: " + list(t.Positions)
	}
	if len(t.Joints) > 0 {
		out += ", joints: " + list(t.Joints)
	}
	if t.ThickFrom > 0 || t.ThickTo > 0 {
		to := t.ThickTo
		if to == 0 {
			to = 1000
		}
		out += fmt.Sprintf(", thickness: %g mm to %g mm", t.ThickFrom, to)
	}
	return out + "}"
}
