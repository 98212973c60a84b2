package learn

import (
	"slices"

	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// Hot work that stops on the way, for the night or the tide, leaves a fire watch behind (R13). Who keeps
// those is settled at the leaf, when starts and people are: for each stop somebody of its mode who can
// stay the watch out, does nothing else meanwhile, and finds room. If there is nobody, the clash names
// a set of stops none of which can be left out, and for each who might keep one what they are doing: each stop by the
// starts with which the work stops then, each piece of work by a minute in which it stands in the way.
//
// Cost: the search for keepers, at most mostTries steps; once more for each stop after a failure.

// stop is a fire watch after a piece that ends in a stop on the way.
type stop struct {
	act, from, to int
	mode          *problem.Mode
}

// mostTries bounds the search for keepers of the watches on the way; beyond it they are taken to
// be found.
const mostTries = 20_000

// begun is work with a timing from a start.
type begun struct {
	time *problem.Timing
	at   int32
}

// onTheWay gives the stops of work that begins at a minute, the finish left out.
func (m *model) onTheWay(w *problem.Timing, at int32) []int {
	key := begun{w, at}
	ends, known := m.stops[key]
	if !known {
		ends = w.Stops(int(at))
		ends = ends[:max(0, len(ends)-1)]
		m.stops[key] = ends
	}
	return ends
}

// watchStops finds somebody for every watch on the way. If there is no way to, the clash is filled.
func (h *holdings) watchStops() bool {
	var stops []stop
	for i := range h.p.Acts {
		md := &h.p.Acts[i].Modes[h.chosen(i)]
		if h.acts[i].watch == 0 || len(md.Keepers) == 0 {
			continue
		}
		for _, e := range h.onTheWay(md.Time, h.now[h.start[i]]) {
			stops = append(stops, stop{i, e, e + md.Time.Watch(), md})
		}
	}
	if h.assign(stops) {
		return true
	}
	h.clash = h.clash[:0]
	if h.crowded { // who is in a room changes with who keeps its watches
		for i := range h.p.Acts {
			h.place(i)
		}
		return false
	}
	for k := 0; k < len(stops); {
		without := append(append([]stop(nil), stops[:k]...), stops[k+1:]...)
		if h.tries = 0; h.possible(without) {
			k++
		} else {
			stops = without
		}
	}
	for _, s := range stops {
		h.blame(s)
	}
	return false
}

// possible is assign of which nothing stays.
func (h *holdings) possible(stops []stop) bool {
	var people, res []int
	for p := range h.people {
		people = append(people, len(h.people[p]))
	}
	for k := range h.res {
		res = append(res, len(h.res[k]))
	}
	yes := h.assign(stops)
	for p, n := range people {
		h.people[p] = h.people[p][:n]
	}
	for k, n := range res {
		h.res[k] = h.res[k][:n]
	}
	return yes
}

func (h *holdings) assign(stops []stop) bool {
	if len(stops) == 0 || h.tries > mostTries {
		return true
	}
	s := stops[0]
	room := h.p.Acts[s.act].WatchRoom - 1
	for n, p := range s.mode.Keepers {
		h.tries++
		if !s.stays(n) || h.busy(p, s) != nil {
			continue
		}
		old := len(h.people[p])
		h.watch(s.act, p, int32(s.from), int32(s.to))
		if h.roomy(room, s) && h.assign(stops[1:]) {
			return true
		}
		h.people[p] = h.people[p][:old]
		if room >= 0 {
			h.res[room] = h.res[room][:len(h.res[room])-1]
		}
	}
	return false
}

// stays says whether the n-th keeper of the mode can stay the watch out.
func (s *stop) stays(n int) bool {
	return s.mode.Stay[n].Covers(hours.Span{From: hours.Minute(s.from), To: hours.Minute(s.to)})
}

// busy gives what else p does during a watch, nil if nothing.
func (h *holdings) busy(p int, s stop) *holding {
	for k := range h.people[p] {
		x := &h.people[p][k]
		if int(x.from) < s.to && int(x.to) > s.from && x.from < x.to && x.team != h.team[s.act] {
			return x
		}
	}
	return nil
}

// roomy says whether the room of a workface is enough during a watch in it.
func (h *holdings) roomy(room int, s stop) bool {
	if room < 0 {
		return true
	}
	var near []holding
	for _, x := range h.res[room] {
		if int(x.from) < s.to && int(x.to) > s.from {
			near = append(near, x)
		}
	}
	if h.within(near, clip(h.p.Res[room].Capacity), nobody) {
		return true
	}
	h.crowded = true
	return false
}

// blame adds to the clash why the work stops then, and what keeps each who might keep the watch from it.
func (h *holdings) blame(s stop) {
	h.stopped(s)
	for n, p := range s.mode.Keepers {
		if s.stays(n) {
			if x := h.busy(p, s); x != nil {
				h.inTheWay(x, s)
			}
		}
	}
}

// mostShift is how many minutes to either side are looked at for starts that lead to the same stop.
const mostShift = 300

// stopped adds the facts for which the work stops then, whatever its start among theirs.
func (h *holdings) stopped(s stop) {
	x, w := h.start[s.act], s.mode.Time
	at := int(h.now[x])
	same := func(u int) bool {
		if w.Start(u) != u {
			return true // it cannot start then
		}
		return slices.Contains(h.onTheWay(w, int32(u)), s.from)
	}
	lo, hi := at, at
	for at-lo < mostShift && lo > 0 && same(lo-1) {
		lo--
	}
	for hi-at < mostShift && hi < h.p.End && same(hi+1) {
		hi++
	}
	h.clash = append(h.clash, fact{x, int32(lo)}, fact{x ^ 1, int32(-hi)})
	h.byMode(s.act)
}

// byMode adds to the clash who does activity i.
func (h *holdings) byMode(i int) {
	if x := &h.acts[i]; len(x.modes) > 0 {
		h.clash = append(h.clash, fact{x.modes[h.chosen(i)], 1})
	}
}

// inTheWay adds the facts for which x is in the way of the watch: that it covers a minute of it.
func (h *holdings) inTheWay(x *holding, s stop) {
	md := &h.p.Acts[x.act].Modes[h.chosen(x.act)]
	t := h.steady[md.Time].firstFrom(max(x.from, int32(s.from)))
	if x.after || md.Relief != nil || t >= min(x.to, int32(s.to)) {
		h.place(x.act)
		return
	}
	u := h.user(x.act, 1)
	h.clash = append(h.clash, u.startBy(t), u.finishFrom(t+1))
	h.byMode(x.act)
}
