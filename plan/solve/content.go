package solve

import (
	"fmt"
	"slices"
	"sort"
	"strings"

	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// Load is a set of activities that only some people, or one kit or workface, can carry, and the
// minutes in which those are there for them: the work content argument.
type Load struct {
	Who    string // "Ines and Tom", "kit mig set", "room at pier/hinge"
	Scope  string // "", or what the activities have in common: "at pier/hinge"
	People []int  // indices into Problem.People; nil where it is a resource
	Res    int    // then the index into Problem.Res
	acts   []int
	need   []int       // minutes each activity needs of the group, set-up once included, by all of those it needs
	count  []int       // by activity: how many of the group it needs at once
	avail  []hours.Set // by person (or one set, Capacity times)
	times  int         // how often avail counts
	sum    []int32     // minutes available before each minute
}

// Overload is a load that does not fit between two minutes: the proof that no plan does.
type Overload struct {
	Load        *Load
	From, To    int
	Acts        []int // all that must be done between the two
	Need        []int
	Total, Have int
}

// All gives the minutes that the k-th of the overload's activities needs of the load in all.
func (o *Overload) All(k int) int {
	return o.Load.need[slices.Index(o.Load.acts, o.Acts[k])]
}

// Loads collects the loads of a problem: for every set of people that a need leaves the choice
// among, all of their work, and their work in each workface; for every kit and workface the work
// that uses it. Fire watches, which may be shared, are left out.
func Loads(p *problem.Problem) []*Load {
	b := &loadBuilder{p: p, seen: map[string]*Load{}}
	for i := range p.Acts {
		b.groups(i)
	}
	b.unions()
	b.fill()
	b.resources()
	return b.loads
}

type loadBuilder struct {
	p     *problem.Problem
	seen  map[string]*Load
	sets  map[*Load][]int
	loads []*Load
}

// needSet is one need of an activity: who could fill it, and how many of them it takes.
type needSet struct {
	who   []int
	count int
}

// needs gives the needs of activity i that are not watches.
func (b *loadBuilder) needs(i int) []needSet {
	a := &b.p.Acts[i]
	if a.Step == nil || a.Step.Absent || a.Cut || a.Modes[0].Time.Calendar() == nil {
		return nil
	}
	var out []needSet
	k := 0
	for _, n := range a.Step.Needs {
		who := map[int]bool{}
		for m := range a.Modes {
			md := &a.Modes[m]
			for c := k; c < k+n.Count && c < len(md.Crew); c++ {
				who[md.Crew[c]] = true
				if md.Relief != nil {
					who[md.Relief[c]] = true
				}
			}
		}
		k += n.Count
		if n.Watch {
			continue
		}
		list := make([]int, 0, len(who))
		for p := range who {
			list = append(list, p)
		}
		sort.Ints(list)
		out = append(out, needSet{list, n.Count})
	}
	return out
}

// groups opens a load for every set of people that fills a need of activity i.
func (b *loadBuilder) groups(i int) {
	if b.sets == nil {
		b.sets = map[*Load][]int{}
	}
	for _, n := range b.needs(i) {
		scopes := []string{""}
		if f := b.p.Acts[i].Step.Face; f != nil {
			scopes = append(scopes, "at "+f.Place.Name+"/"+f.Name)
		}
		for _, scope := range scopes {
			key := fmt.Sprint(n.who, scope)
			if b.seen[key] != nil {
				continue
			}
			l := &Load{Who: b.names(n.who), Scope: scope, People: n.who, times: 1}
			b.seen[key] = l
			b.sets[l] = n.who
			b.loads = append(b.loads, l)
		}
	}
}

// mostUnions is how many loads of two sets together are opened.
const mostUnions = 24

// unions opens loads for two sets of people taken together.
func (b *loadBuilder) unions() {
	sets := make([][]int, 0, len(b.loads))
	for _, l := range b.loads {
		if l.Scope == "" {
			sets = append(sets, b.sets[l])
		}
	}
	left := mostUnions
	for i := range sets {
		for j := range i {
			both := slices.Concat(sets[i], sets[j])
			slices.Sort(both)
			both = slices.Compact(both)
			if key := fmt.Sprint(both, ""); b.seen[key] == nil && left > 0 {
				left--
				l := &Load{Who: b.names(both), People: both, times: 1}
				b.seen[key], b.sets[l] = l, both
				b.loads = append(b.loads, l)
			}
		}
	}
}

func (b *loadBuilder) names(who []int) string {
	var out []string
	for _, p := range who {
		out = append(out, b.p.People[p].Name)
	}
	if n := len(out); n > 1 {
		return strings.Join(out[:n-1], ", ") + " and " + out[n-1]
	}
	return strings.Join(out, "")
}

// fill gives every load the activities that need its people and nobody else, and the minutes
// in which each of them could work on these.
func (b *loadBuilder) fill() {
	for i := range b.p.Acts {
		needs := b.needs(i)
		if len(needs) == 0 {
			continue
		}
		a := &b.p.Acts[i]
		where := ""
		if f := a.Step.Face; f != nil {
			where = "at " + f.Place.Name + "/" + f.Name
		}
		for _, l := range b.loads {
			if l.Scope != "" && l.Scope != where {
				continue
			}
			count := 0
			for _, n := range needs {
				if within(n.who, b.sets[l]) {
					count += n.count
				}
			}
			if count > 0 {
				l.add(i, count, a.Step.Working+a.Step.SetUp)
			}
		}
	}
	for _, l := range b.loads {
		l.avail = make([]hours.Set, len(b.sets[l]))
		for k, person := range b.sets[l] {
			l.avail[k] = b.calendars(l.acts, person)
		}
		l.tally(b.p.End)
	}
}

func within(a, b []int) bool {
	for _, x := range a {
		k := sort.SearchInts(b, x)
		if k == len(b) || b[k] != x {
			return false
		}
	}
	return true
}

// calendars is the union of the calendars of the activities in the modes with the person (any
// mode for person -1).
func (b *loadBuilder) calendars(acts []int, person int) hours.Set {
	var spans []hours.Span
	for _, i := range acts {
		seen := map[*problem.Timing]bool{}
		for _, m := range b.p.Acts[i].Modes {
			if seen[m.Time] || person >= 0 && !hasPerson(m.Crew, person) && !hasPerson(m.Relief, person) {
				continue
			}
			seen[m.Time] = true
			spans = append(spans, m.Time.Calendar()...)
		}
	}
	return hours.NewSet(spans...)
}

func hasPerson(list []int, p int) bool {
	for _, x := range list {
		if x == p {
			return true
		}
	}
	return false
}

// add gives the load an activity that needs so many of the group for so many minutes.
func (l *Load) add(i, count, minutes int) {
	l.acts, l.count, l.need = append(l.acts, i), append(l.count, count), append(l.need, count*minutes)
}

// resources adds loads for each kit, each workface with room for so many, and the power of each place.
func (b *loadBuilder) resources() {
	for r := range b.p.Res {
		res := &b.p.Res[r]
		switch res.Kind {
		case problem.Power:
			for k := 1; k <= atOnce; k++ {
				b.power(r, k)
			}
		case problem.Kit:
			b.resource(r, "kit "+res.Name, res.Capacity, func(amount int) int { return amount })
		case problem.Room:
			b.resource(r, "room at "+res.Name, res.Capacity, func(amount int) int { return amount })
		}
	}
}

// atOnce is up to how many things at once the power of a place is counted by.
const atOnce = 4

// power adds the load of what draws more than a share of the power: of things that draw more than one part in k+1 no
// more than k run at once, and one that draws more than twice that counts twice (a dual feasible function, Fekete
// and Schepers 2001).
func (b *loadBuilder) power(r, k int) {
	res := &b.p.Res[r]
	if res.Capacity <= 0 {
		return
	}
	b.resource(r, fmt.Sprintf("%s, %d at once of what draws more than %.3g kVA", res.Name, k, float64(res.Capacity)/float64(k+1)/1000), k,
		func(amount int) int { return (amount*(k+1)+res.Capacity-1)/res.Capacity - 1 })
}

// resource adds the load of a resource, with the amounts weighed.
func (b *loadBuilder) resource(r int, who string, capacity int, weigh func(amount int) int) {
	l := &Load{Who: who, Res: r, times: capacity}
	for i := range b.p.Acts {
		a := &b.p.Acts[i]
		for _, u := range a.Uses {
			if n := weigh(u.Amount); u.Res == r && n > 0 && !a.Cut && a.Modes[0].Time.Calendar() != nil {
				l.add(i, n, a.Step.Working+a.Step.SetUp)
			}
		}
	}
	if len(l.acts) == 0 {
		return
	}
	l.avail = []hours.Set{b.calendars(l.acts, -1)}
	l.tally(b.p.End)
	b.loads = append(b.loads, l)
}

// tally sums up the minutes available.
func (l *Load) tally(end int) {
	l.sum = make([]int32, end+2)
	for _, set := range l.avail {
		for _, s := range set {
			for t := max(0, int(s.From)); t < min(end, int(s.To)); t++ {
				l.sum[t+1] += int32(l.times)
			}
		}
	}
	for t := 1; t < len(l.sum); t++ {
		l.sum[t] += l.sum[t-1]
	}
}

func (l *Load) have(a, b int) int {
	n := len(l.sum) - 1
	a, b = min(max(a, 0), n), min(max(b, 0), n)
	return int(l.sum[b] - l.sum[a])
}

// FindOverload looks for a load with more work between two minutes than minutes there; nil if
// none. Cost: O(loads x acts^2).
func FindOverload(loads []*Load, b network.Bounds) *Overload {
	var best *Overload
	for _, l := range loads {
		order := make([]int, len(l.acts))
		for k := range order {
			order[k] = k
		}
		sort.SliceStable(order, func(x, y int) bool { return b.Last[l.acts[order[x]]] < b.Last[l.acts[order[y]]] })
		for _, first := range l.acts {
			from, total := b.Start[first], 0
			var in []int
			for _, k := range order {
				i := l.acts[k]
				if b.Start[i] < from {
					continue
				}
				total += l.need[k]
				in = append(in, k)
				if to := b.Last[i]; total > l.have(from, to) && (best == nil || total-l.have(from, to) > best.Total-best.Have) {
					best = &Overload{Load: l, From: from, To: to, Total: total, Have: l.have(from, to)}
					best.Acts = append([]int(nil), in...)
				}
			}
		}
	}
	if best != nil {
		best.name()
	}
	return best
}

// name turns positions in the load into activities.
func (o *Overload) name() {
	for k, at := range o.Acts {
		o.Need = append(o.Need, o.Load.need[at])
		o.Acts[k] = o.Load.acts[at]
	}
}

// ContentBound gives the earliest minute by which all the site work of the loads can be done,
// and the load that sets it; 0 and nil without loads.
func ContentBound(p *problem.Problem, loads []*Load, b network.Bounds) (finish int, why *Overload) {
	for _, l := range loads {
		for _, first := range l.acts {
			from, total := b.Start[first], 0
			var in, need []int
			for k, i := range l.acts {
				if p.Acts[i].Site && b.Start[i] >= from {
					total += l.need[k]
					in, need = append(in, i), append(need, l.need[k])
				}
			}
			if total == 0 {
				continue
			}
			t := sort.Search(len(l.sum), func(t int) bool { return t >= from && l.have(from, t) >= total })
			if t < len(l.sum) && t > finish {
				finish, why = t, &Overload{Load: l, From: from, To: t, Acts: in, Need: need, Total: total, Have: total}
			}
		}
	}
	return finish, why
}
