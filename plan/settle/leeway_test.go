package settle

import (
	"slices"
	"testing"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"

	"pgregory.net/rapid"
)

// late makes the plan again with step i moved, minute by minute: the steps before it stay, those
// after it keep their order and people and move later only as far as they must. ok is false where a step
// finds no place before the end of the hours, or a wait or a deadline is broken.
func (r *replay) late(i int, moves func(o *option) bool) (ok bool) {
	order := r.order()
	done := make([]*option, len(r.all))
	rank := slices.IndexFunc(order, func(j int) bool { return slices.Contains(r.tied(i), j) })
	for _, j := range order[:rank] {
		done[j] = r.all[j]
	}
	for _, j := range order[rank:] {
		if done[j] == nil && !r.place(r.tied(j), done, func(o *option) bool { return o.s.Index != i || moves(o) }) {
			return false
		}
	}
	for j, x := range done {
		if !r.alone(x) {
			return false
		}
		for _, y := range done[:j] {
			if !r.linked(x, y, &nothing) || !r.linked(y, x, &nothing) {
				return false
			}
		}
	}
	return r.ordered(done)
}

// order gives the steps by start, then finish, then as they are written.
func (r *replay) order() []int {
	var out []int
	for i := range r.all {
		out = append(out, i)
	}
	slices.SortStableFunc(out, func(a, b int) int {
		if r.all[a].Start != r.all[b].Start {
			return int(r.all[a].Start - r.all[b].Start)
		}
		return int(r.all[a].Finish - r.all[b].Finish)
	})
	return out
}

// tied gives the steps that start with step i by links of no least and no longest wait, step i among them, as they are
// written.
func (r *replay) tied(i int) []int {
	in := map[int]bool{i: true}
	for again := true; again; {
		again = false
		for _, l := range r.w.Links {
			if l.From == nil || l.FromEnd != tasks.Start || l.ToEnd != tasks.Start || l.Min != 0 || l.Max != 0 || l.MaxWorking || l.MaxCure != nil {
				continue
			}
			if a, b := l.From.Index, l.To.Index; in[a] != in[b] {
				in[a], in[b], again = true, true, true
			}
		}
	}
	var out []int
	for _, j := range r.order() {
		if in[j] {
			out = append(out, j)
		}
	}
	return out
}

// place puts steps that start together at their first start, from their own on, at which all stand beside what is placed and
// after what they came after.
func (r *replay) place(group []int, done []*option, want func(o *option) bool) bool {
	for t := r.index(r.all[group[0]].Start); t < r.index(r.hi); t++ {
		if r.beside(group, t, done, want) {
			return true
		}
	}
	return false
}

// beside puts steps at start t beside what is placed.
func (r *replay) beside(group []int, t int, done []*option, want func(o *option) bool) bool {
	if len(group) == 0 {
		return true
	}
	own := r.all[group[0]]
	tries := r.tries(own, t, false)
	slices.SortStableFunc(tries, func(a, b option) int { return strangers(own, &a) - strangers(own, &b) })
	for _, x := range tries {
		if !want(&x) || !x.s.Site && x.Finish > r.w.Window.Closes && own.Finish <= r.w.Window.Closes {
			continue // home work is not put off until everybody is home again
		}
		fits := true
		for k, y := range done {
			if y == nil {
				continue
			}
			if !r.apart(&x, y, &nothing) || !r.linked(y, &x, &nothing) || !r.linked(&x, y, &nothing) || y.Finish > x.Start && r.rivals(r.all[k], own) {
				fits = false
				break
			}
		}
		if !fits {
			continue
		}
		done[group[0]] = &x
		if r.holds(done, &nothing) && r.beside(group[1:], t, done, want) {
			return true
		}
		done[group[0]] = nil
	}
	return false
}

// strangers counts the watches that a delay adds and that somebody else keeps than keeps the last of the plan's.
func strangers(own, x *option) (n int) {
	for k := len(own.Watches); k > 0 && k < len(x.Watches); k++ {
		if x.Watches[k].Person != own.Watches[len(own.Watches)-1].Person {
			n++
		}
	}
	return n
}

// rivals says whether y begins in the plan only after x has given up what both want: somebody, kit,
// room, power, a workface.
func (r *replay) rivals(x, y *option) bool {
	if x.Start == x.Finish || y.Start == y.Finish {
		return false
	}
	if x.Finish > y.Start {
		return false
	}
	people := slices.Concat(y.People, y.Relief)
	for _, w := range x.Watches {
		if w.To <= y.Start && slices.Contains(people, w.Person) {
			return true
		}
	}
	for _, a := range slices.Concat(x.People, x.Relief) {
		if slices.Contains(people, a) {
			return true
		}
	}
	a, b := *x, *y
	a.Start, a.Finish, a.Pieces = 0, 1, []hours.Span{{From: 0, To: 1}}
	b.Start, b.Finish, b.Pieces = 0, 1, []hours.Span{{From: 0, To: 1}}
	a.Shifts, b.Shifts, a.Watches, b.Watches = nil, nil, nil, nil
	pair := make([]*option, len(r.all))
	pair[x.s.Index], pair[y.s.Index] = &a, &b
	if x.s.Class != expand.Hands {
		a.Pieces = nil
	}
	if y.s.Class != expand.Hands {
		b.Pieces = nil
	}
	free := without{orders: true}
	return r.statesMeet(&a, &b) || r.moved(&a, &b) || r.moved(&b, &a) || !r.holds(pair, &free)
}

// TestLeeway: every delay up to the leeway works, and the next minute does not; the last start of
// a deadline works, and the next start does not (R20).
func TestLeeway(t *testing.T) {
	checks(t, 40)
	tried, limited := 0, 0
	rapid.Check(t, func(rt *rapid.T) {
		grain := rapid.SampledFrom([]int{30, 10}).Draw(rt, "grain")
		s := drawSmall(rt, grain, 5)
		s.orders = nil // which of the orders a plan keeps to is not said in it
		a := settled(rt, s)
		if a.Plan == nil || a.Late {
			return
		}
		r := newReplay(a, grain)
		for i, row := range a.Rows {
			o := r.all[i]
			if row.Leeway < 0 || o.Start == o.Finish || row.Latest > r.hi-1440 {
				continue
			}
			tried++
			by := func(l int) bool {
				return r.late(i, func(x *option) bool { return x.Finish >= o.Finish+hours.Minute(l) })
			}
			for _, l := range []int{0, 1, row.Leeway / 3, row.Leeway / 2, row.Leeway - 1, row.Leeway} {
				if l >= 0 && l <= row.Leeway && !by(l) {
					rt.Fatalf("%s has %d min of leeway, but %d later does not work:%s\n%s", o.s.Key(), row.Leeway, l, show(a.Work, a.Plan), s.yaml())
				}
			}
			if by(row.Leeway + 1) {
				rt.Fatalf("%s has %d min of leeway, but a minute more works:%s\n%s", o.s.Key(), row.Leeway, show(a.Work, a.Plan), s.yaml())
			}
			for _, d := range a.Deadlines {
				if d.Step != a.Work.Steps[i] {
					continue
				}
				limited++
				if !r.late(i, func(x *option) bool { return x.Start >= d.LastStart }) {
					rt.Fatalf("%s is said to make it from %d min after its start, but does not:%s\n%s", o.s.Key(), d.LastStart-o.Start, show(a.Work, a.Plan), s.yaml())
				}
				if r.late(i, func(x *option) bool { return x.Start > d.LastStart }) {
					rt.Fatalf("%s makes it from later than %d min after its start:%s\n%s", o.s.Key(), d.LastStart-o.Start, show(a.Work, a.Plan), s.yaml())
				}
			}
		}
	})
	t.Logf("%d steps, %d deadlines", tried, limited)
	if tried == 0 || limited == 0 && !testing.Short() {
		t.Error("no leeway, or no deadline, among all these plans")
	}
}

// TestTiedLeeway: two tasks of 2 h and 1 h that start together at 08:00, in a day that ends at 17:00 with a break from 12:00 to 13:00.
// By hand: the first may end at 17:00 (from 15:00), 7 h later; the second then ends at 16:00, and may by itself end at 16:00 too,
// since the first would be late after that. Written the other way round the leeway is the same.
func TestTiedLeeway(t *testing.T) {
	for _, text := range []string{
		"  long: {at: quay, hours: 2 h}\n  short: {at: quay, hours: 1 h, starts with: long}\n",
		"  short: {at: quay, hours: 1 h}\n  long: {at: quay, hours: 2 h, starts with: short}\n",
	} {
		a := handJob(t, text)
		if a.Verdict != plan.Fits {
			t.Fatalf("%v\n%s", a.Verdict, text)
		}
		for i, row := range a.Rows {
			other := map[string]string{"long": "short", "short": "long"}[a.Work.Steps[i].Task.Name]
			if row.Leeway != 7*60 || !slices.Equal(row.Shares, []string{other}) {
				t.Errorf("%s: %d min, shared with %v\n%s", a.Work.Steps[i].Key(), row.Leeway, row.Shares, text)
			}
		}
	}
}

// TestGoverning: the chain that is printed hangs together, from the last finish of the site back: each entry is of
// the step that the one before it came from, and ends with what comes from no other step.
func TestGoverning(t *testing.T) {
	checks(t, 60)
	longest := 0
	rapid.Check(t, func(rt *rapid.T) {
		s := drawLaw(rt)
		a := settled(rt, s)
		if a.Plan == nil || len(a.Governing) == 0 {
			return
		}
		at := a.Governing[0].Step
		if r := newReplay(a, 10); int(r.all[at].end) != int(a.Finish) && slices.ContainsFunc(a.Work.Steps, func(st *expand.Step) bool { return st.Site }) {
			rt.Fatalf("the chain begins with %s, which does not end last:%s\n%s", a.Work.Steps[at].Key(), show(a.Work, a.Plan), s.yaml())
		}
		steps := 1
		for k := 0; k < len(a.Governing); {
			next, pulled := -1, false
			for ; k < len(a.Governing) && a.Governing[k].Step == at; k++ {
				if o := a.Governing[k].Other; o >= 0 {
					next = o
				}
				pulled = pulled || a.Governing[k].Kind == plan.ByMaxWait // by what comes after it
			}
			if k == len(a.Governing) {
				break
			}
			if next < 0 || a.Governing[k].Step != next {
				rt.Fatalf("the chain goes from %s to %s, which is not what set it: %+v\n%s", a.Work.Steps[at].Key(), a.Work.Steps[a.Governing[k].Step].Key(), a.Governing, s.yaml())
			}
			if !pulled && a.Plan.Steps[next].Start > a.Plan.Steps[at].Finish {
				rt.Fatalf("the chain goes forward in time from %s to %s\n%s", a.Work.Steps[at].Key(), a.Work.Steps[next].Key(), s.yaml())
			}
			at = next
			steps++
		}
		longest = max(longest, steps)
	})
	if longest < 3 && !testing.Short() {
		t.Errorf("the longest chain has %d steps", longest)
	}
}
