package expand

import (
	"fmt"
	"math"
	"sort"

	"sailby/tasks"
	"sailby/tasks/coat"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
	"sailby/tasks/site"
)

// coatSteps makes the steps of a coat task: coat 1, dry 1, coat 2, ...
func (x *expander) coatSteps(t *tasks.Task) {
	var before *Step
	var last *tasks.Paint
	for k, name := range t.Coats {
		p := x.paint(name)
		if p == nil {
			x.fault(t.Pos, "declare it under paints", "task %q: there is no paint %q", t.Name, name)
			return
		}
		if t.Face.Floods() && len(p.ImmersionMin) == 0 && (t.Covered == nil || !*t.Covered) {
			x.fault(t.Pos, "add immersion min: {10 C: 24 h} to the paint from its sheet, or write may be covered: yes on the task",
				"task %q: the tide covers %s/%s, and paint %q does not say when it may go under water", t.Name, t.Place.Name, t.Face.Name, p.Name)
		}
		h := x.coatHours(t, p, k)
		if n := len(t.Coats); n > 1 && (t.Hours.Pos.Given() || t.ManHours.Pos.Given()) {
			h.minutes = h.minutes.Scale(1 / float64(n)) // the hours given are for all coats
			h.est.Figure = origin.Worked("hands-on time", h.minutes.Likely, "min", "hours given over the coats", h.est.Figure)
			h.est.Range = [3]int{whole(h.minutes.Low), whole(h.minutes.Likely), whole(h.minutes.High)}
		}
		var striped *Step
		if k == 0 {
			striped = x.stripe(t, p)
		}
		s := x.handsStep(t, fmt.Sprintf("coat %d", k+1), h)
		s.Paint = p
		x.filmStates(t, s, p)
		x.afterStripe(striped, s, p)
		if before != nil {
			x.recoat(t, before, s, last, p, k)
		}
		before, last = s, p
	}
	if len(t.Coats) == 0 {
		x.fault(t.Pos, "write for instance coats: [primer]", "task %q: it has no coats", t.Name)
	}
}

func (x *expander) paint(name string) *tasks.Paint {
	for _, p := range x.w.Job.Paints {
		if p.Name == name {
			return p
		}
	}
	return nil
}

// film is one curing time of a paint at one place.
type film struct {
	x      *expander
	curve  coat.Curve
	paint  *tasks.Paint
	steady float64      // steel temperature where there is no series, °C
	series *site.Series // weather by hour; nil for steady steel
	sum    []float64    // cure gathered since the span's start, by minute; nil for steady steel
	rate   float64
}

func (x *expander) film(curve coat.Curve, p *tasks.Paint, t *tasks.Task) *film {
	f := &film{x: x, curve: curve, paint: p, steady: x.steel(t.Place), series: t.Place.Hourly(t.Face)}
	if f.series == nil {
		f.rate = f.at(f.steady, math.NaN())
		return f
	}
	f.rate = math.NaN()
	f.sum = make([]float64, x.w.Span.Len()+1)
	hour, r := int64(math.MinInt64), 0.0
	for i := range f.sum[1:] {
		m := x.w.Span.From + hours.Minute(i)
		if h := (int64(m) - f.series.Start) / 60; h != hour {
			hour, r = h, f.minute(m)
		}
		f.sum[i+1] = f.sum[i] + r
	}
	return f
}

// at gives the rate at a steel temperature and the humidity there, 0 below the paint's least of either;
// a humidity that is not known does not count.
func (f *film) at(celsius, humidity float64) float64 {
	if celsius < f.paint.ApplyMin || f.paint.RHMin > 0 && humidity < f.paint.RHMin {
		return 0
	}
	return f.curve.Rate(celsius)
}

// minute gives the rate of the minute that begins at m.
func (f *film) minute(m hours.Minute) float64 {
	if w, ok := f.series.At(int64(m)); ok {
		return f.at(w.Steel, coat.SteelHumidity(w.Air, w.RH, w.Steel))
	}
	return f.at(f.steady, math.NaN())
}

// Rate gives the share of the cure that the minute beginning at m adds.
func (f *film) Rate(m hours.Minute) float64 {
	if f.sum == nil {
		return f.rate
	}
	return f.minute(m)
}

// finish gives the first minute by which a film begun at m is cured (R11), hours.Far if never.
func (f *film) finish(m hours.Minute) hours.Minute {
	if f.sum == nil {
		if f.rate <= 0 {
			return hours.Far
		}
		return m + hours.Minute(math.Ceil(1/f.rate-1e-6))
	}
	i := int(m - f.x.w.Span.From)
	if i < 0 || i >= len(f.sum) {
		return hours.Far
	}
	want := f.sum[i] + 1 - 1e-9
	n := sort.Search(len(f.sum)-i, func(k int) bool { return f.sum[i+k] >= want })
	if i+n >= len(f.sum) {
		return hours.Far
	}
	return m + hours.Minute(n)
}

// filmStates puts the film's states and tails on a coat step (R12).
func (x *expander) filmStates(t *tasks.Task, s *Step, p *tasks.Paint) {
	for _, st := range []struct {
		state, film string
	}{{tasks.WetFilm, "touch dry"}, {tasks.SoftFilm, "hard dry"}, {tasks.Solvent, "solvent gone"}} {
		curve, ok := p.State(st.film)
		if !ok {
			if curve, ok = p.State("hard dry"); !ok {
				continue
			}
		}
		f := x.film(curve, p, t)
		s.States = append(s.States, State{Name: st.state, Tail: f.finish,
			What: fmt.Sprintf("%s at %s", st.film, x.steelWords(t))})
	}
}

func temperature(c float64) string { return origin.Trim(c) + " °C" }

// dry adds a drying step after a coat step: the film reaches the state of the curve.
func (x *expander) dry(t *tasks.Task, after *Step, name string, curve coat.Curve, p *tasks.Paint) *Step {
	s := x.step(t, name)
	s.Class = Cure
	f := x.film(curve, p, t)
	s.Rate = f.Rate
	minutes, fig, err := curve.Time(x.steel(t.Place))
	if err == nil {
		s.Estimate.Figure = fig
		s.Estimate.Range = [3]int{whole(minutes), whole(minutes), whole(minutes)}
	}
	if f.sum != nil {
		s.Estimate.Notes = append(s.Estimate.Notes, "cures by the steel of each hour; the time at a steady "+temperature(x.steel(t.Place))+" stands here to compare")
	}
	if f.sum == nil && f.rate <= 0 {
		x.fault(t.Pos, "warm the place, or take a paint that cures in the cold",
			"task %q: paint %q does not cure at %s", t.Name, p.Name, temperature(x.steel(t.Place)))
	}
	x.tie(after, s, name+" of "+p.Name)
	return s
}

// recoat adds the drying between two coats, and the longest wait.
func (x *expander) recoat(t *tasks.Task, a, b *Step, p, q *tasks.Paint, k int) {
	window, err := p.Next(q.Paint)
	if err != nil {
		x.fault(t.Pos, fmt.Sprintf("add next coat: {%s: {10 C: {min: 16 h}}} to the paint", q.Name), "task %q: %v", t.Name, err)
		return
	}
	s := x.dry(t, a, fmt.Sprintf("dry %d", k), window.Min, p)
	if least, _, err := p.Window(q.Paint, x.steel(t.Place)); err == nil {
		s.Estimate.Figure = least
	}
	// steps are kept in the order coat, dry, coat
	x.swapLast(t, s, b)
	x.w.Links = append(x.w.Links, Link{From: s, To: b, Min: 0, Max: NoMax, Pos: t.Pos, ToEnd: tasks.Start, Why: "recoat of " + p.Name})
	if len(window.Max) > 0 {
		x.longest(t, a, b, p, window.Max)
	}
}

// swapLast puts step s before step b in the task's order; both are its last two.
func (x *expander) swapLast(t *tasks.Task, s, b *Step) {
	for _, list := range []*[]*Step{&x.w.Steps} {
		l := *list
		n := len(l)
		if n >= 2 && l[n-1] == s && l[n-2] == b {
			l[n-1], l[n-2] = b, s
			b.Index, s.Index = n-1, n-2
		}
	}
	l := x.first[t]
	if n := len(l); n >= 2 && l[n-1] == s && l[n-2] == b {
		l[n-1], l[n-2] = b, s
	}
}

// longest adds the longest wait for the next coat, from start to start and from finish to
// finish (R10), shortening with heat (R11).
func (x *expander) longest(t *tasks.Task, a, b *Step, p *tasks.Paint, max coat.Curve) {
	if x.mendable(t, a, b, p) {
		return
	}
	why := "longest recoat of " + p.Name
	if r := x.rescue(a); r != "" {
		why += " (missed: " + r + ")"
	}
	x.bound(t, a, b, p, max, why)
}

// bound adds a longest wait between two coats.
func (x *expander) bound(t *tasks.Task, a, b *Step, p *tasks.Paint, max coat.Curve, why string) {
	series := t.Place.WarmHourly(t.Face)
	add := func(l Link) {
		for _, end := range []tasks.LinkEnd{tasks.Start, tasks.Finish} {
			l.From, l.To, l.FromEnd, l.ToEnd, l.Min, l.Pos, l.Why = a, b, end, end, NoMin, p.Pos, why
			x.w.Links = append(x.w.Links, l)
		}
	}
	if series == nil {
		cap, _, err := max.Life(x.steel(t.Place))
		if err == nil {
			add(Link{Max: int(cap)})
		}
		return
	}
	add(Link{Max: NoMax, MaxCure: &MaxCure{Last: x.lastRecoat(max, series, x.steel(t.Place))}})
}

// lastRecoat gives the last minute u after a start such that u - start is at most the longest wait
// for the hottest steel from start to u: coat.LastRecoat, hour by hour.
func (x *expander) lastRecoat(max coat.Curve, series *site.Series, steady float64) func(hours.Minute) hours.Minute {
	span := x.w.Span
	life := func(celsius float64) float64 {
		v, _, err := max.Life(celsius)
		if err != nil {
			return 0
		}
		return v * (1 + 1e-9)
	}
	lives := map[float64]float64{}
	steel := func(m hours.Minute) float64 {
		if w, ok := series.At(int64(m)); ok {
			return w.Steel
		}
		return steady
	}
	for m := span.From; m < span.To; m += 60 {
		lives[steel(m)] = 0
	}
	lives[steel(span.To)], lives[steady] = 0, 0
	for c := range lives {
		lives[c] = life(c)
	}
	return func(start hours.Minute) hours.Minute {
		hottest, most := math.Inf(-1), math.Inf(1)
		for m := start; m <= span.To; {
			if t := steel(m); t > hottest {
				hottest = t
				v, known := lives[t]
				if !known {
					v = life(t)
				}
				most = v
			}
			next := m + 60 - hours.Minute(((int64(m)-series.Start)%60+60)%60)
			if over := start + hours.Minute(math.Min(math.Floor(most), 1e9)) + 1; over < next {
				if over < m {
					over = m
				}
				if over > start {
					over--
				}
				return min(over, span.To)
			}
			m = next
		}
		if start > span.To {
			return start
		}
		return span.To
	}
}

// underWater adds the longest time that a coat may wait to go under water, to the start of the
// task that waits for `immersion`.
func (x *expander) underWater(f, t *tasks.Task) {
	coats := x.handsOf(f)
	p := x.paint(f.Coats[len(f.Coats)-1])
	if len(coats) == 0 || p == nil || len(p.ImmersionMax) == 0 {
		return
	}
	l := Link{From: coats[len(coats)-1], To: x.first[t][0], ToEnd: tasks.Start, Min: NoMin, Max: NoMax, Pos: p.Pos, Why: "longest wait of " + p.Name + " to go under water"}
	if series := f.Place.WarmHourly(f.Face); series != nil {
		l.MaxCure = &MaxCure{Last: x.lastRecoat(p.ImmersionMax, series, x.steel(f.Place))}
	} else if cap, _, err := p.ImmersionMax.Life(x.steel(f.Place)); err == nil {
		l.Max = int(cap)
	}
	x.w.Links = append(x.w.Links, l)
}

// filmState gives the step whose finish is a film state of a coat task, made when first asked for.
func (x *expander) filmState(t *tasks.Task, state string, next *tasks.Paint) (*Step, error) {
	key := t.Name + " / " + state
	if next != nil {
		key += " for " + next.Name
	}
	if s, ok := x.states[key]; ok {
		return s, nil
	}
	coats := x.handsOf(t)
	p := x.paint(t.Coats[len(t.Coats)-1])
	if p == nil || len(coats) == 0 {
		return nil, fmt.Errorf("task %q has no coat", t.Name)
	}
	after := coats[len(coats)-1]
	name := state
	var curve coat.Curve
	switch {
	case state == "applied":
		x.states[key] = after
		return after, nil
	case next != nil:
		window, err := p.Next(next.Paint)
		if err != nil {
			return nil, err
		}
		curve, name = window.Min, "recoat"
	default:
		word := state
		if word == "cured" {
			word = "service"
		}
		if word == "immersion" {
			word = "immersion min"
		}
		c, ok := p.State(word)
		if !ok {
			return nil, fmt.Errorf("paint %q does not say when it is %s", p.Name, state)
		}
		curve = c
	}
	s := x.dry(t, after, name, curve, p)
	word := map[string]string{"cured": "service", "immersion": "immersion min"}[state]
	if word == "" {
		word = state
	}
	if next == nil {
		if _, f, err := p.Wait(word, x.steel(t.Place)); err == nil {
			s.Estimate.Figure = f
		}
	} else if least, _, err := p.Window(next.Paint, x.steel(t.Place)); err == nil {
		s.Estimate.Figure = least
	}
	if state == "cured" || state == "service" {
		s.Deadline = hours.Far
		s.Site = false
	}
	x.states[key] = s
	return s, nil
}
