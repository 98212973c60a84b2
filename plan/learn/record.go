package learn

import (
	"bufio"
	"errors"
	"fmt"
	"io"
	"slices"
)

// record writes down what a search learns, and why, in the form that package plan/proof replays. Of the reasons
// that the conflict analysis has asked for it writes those that lead to the clause. What holds at level 0 is
// derived when something needs it, once. It keeps one name for each variable and one bit for
// each raise of level 0; all else goes to the writer.
type record struct {
	m      *model
	w      *bufio.Writer
	names  []string         // by variable
	titles map[int32]string // by rule: what its lemmas are called
	notes  []note           // of the contradiction at hand
	facts  []fact           // their facts
	shown  []bool           // by entry of level 0: it is in the log
	want   []int32          // scratch, by side: the value that some note needs
	have   []int32          // scratch, by side: the value that is given
	next   int32            // number of the next clause
	order  map[pair]int     // by forced pair: where it stands in model.forced
	orders []bool           // by forced pair: it is in the log
	ended  bool
	lost   error // what cannot be said
}

// note is a reason: these facts, and not f, cannot all hold; f.s < 0: the facts alone.
type note struct {
	at       int32 // entry that it explains, or the length of the trail
	f        fact
	why      why
	from, to int // in facts
}

// witness is a rule that can name its lemmas: the stretch of time that the facts behind f are about.
type witness interface {
	witness(f fact, w why, behind []fact) (from, to int32)
}

// version of the log's form; plan/proof refuses others.
const version = 1

func newRecord(w io.Writer) *record {
	if w == nil {
		return nil
	}
	return &record{w: bufio.NewWriter(w), titles: map[int32]string{}, next: 1}
}

// listen begins the log of a model.
func (r *record) listen(m *model) {
	r.m, m.log = m, r
	r.line("sailby refutation %d", version)
	r.line("job %d activities %d links %d resources %d people horizon %d", len(m.p.Acts), len(m.p.Links), len(m.p.Res), len(m.p.People), m.p.End)
}

func (r *record) line(format string, args ...any) { fmt.Fprintf(r.w, format+"\n", args...) }

// close ends the log: with the bound, where the search has not gone to the end.
func (r *record) close(res Result) Result {
	if r == nil {
		return res
	}
	if !r.ended {
		if e := r.m.engine; !e.dead && r.m.start != nil {
			v := e.now[r.m.end]
			r.show(e.entry(fact{r.m.end, v}))
			r.line("bound %d", v)
		} else {
			res.LogErr = errors.New("the search has ended without a word to the log")
		}
	}
	if r.lost != nil {
		res.LogErr = r.lost
	}
	if err := r.w.Flush(); err != nil {
		res.LogErr = err
	}
	return res
}

// begin forgets the reasons of the last contradiction.
func (r *record) begin() { r.notes, r.facts = r.notes[:0], r.facts[:0] }

// clash notes what a rule says that has filled the clash itself.
func (r *record) clash() {
	e := r.m.engine
	if e.fell == nobody {
		return
	}
	r.begin()
	r.note(int32(len(e.list)), fact{s: -1}, e.fell, e.clash)
	e.fell = nobody
}

// note keeps a reason.
func (r *record) note(at int32, f fact, w why, behind []fact) {
	if w.kind == whyRoot || w.kind == whyChoice {
		return
	}
	n := len(r.facts)
	r.facts = append(r.facts, behind...)
	r.notes = append(r.notes, note{at, f, w, n, len(r.facts)})
}

// size gives the number of reasons noted; void takes one back that has led nowhere. Both may be asked of no log.
func (r *record) size() int {
	if r == nil {
		return 0
	}
	return len(r.notes)
}

func (r *record) void(k int) {
	if r != nil && k < len(r.notes) {
		r.notes[k].at = -1
	}
}

// learnt writes a clause with the reasons behind it and gives its number.
func (r *record) learnt(clause []fact) int32 {
	against := make([]fact, len(clause))
	for i, f := range clause {
		against[i] = f.not()
	}
	r.flush(r.m.clash, against)
	id := int32(0)
	if len(clause) > 1 {
		id = r.next
		r.next++
	}
	r.so(id, against)
	return id
}

// none ends the log: the facts of level 0 contradict each other.
func (r *record) none() {
	if r.ended {
		return
	}
	r.flush(r.m.clash, nil)
	r.line("none")
	r.ended = true
}

func (r *record) drop(id int32) {
	if id > 0 {
		r.line("drop %d", id)
	}
}

// flush writes those of the reasons that lead from the given facts to the clash, in the order in which they
// can be taken.
func (r *record) flush(clash, given []fact) {
	e := r.m.engine
	for len(r.want) < len(e.now) {
		r.want, r.have = append(r.want, -far), append(r.have, -far)
	}
	for _, f := range given {
		r.have[f.s] = f.v
	}
	slices.SortStableFunc(r.notes, func(a, b note) int { return int(b.at) - int(a.at) })
	wish := func(fs []fact) {
		for _, f := range fs {
			if r.have[f.s] < f.v && r.rootEntry(f) < 0 {
				r.want[f.s] = max(r.want[f.s], f.v)
			}
		}
	}
	wish(clash)
	kept := r.notes[:0]
	for _, n := range r.notes {
		if n.at < 0 {
			break // void
		}
		if n.from > 0 { // the first says what the contradiction is
			if r.want[n.f.s] == -far || r.want[n.f.s] > n.f.v {
				continue
			}
			r.want[n.f.s] = -far
		}
		wish(r.facts[n.from:n.to])
		kept = append(kept, n)
	}
	for _, f := range clash {
		r.want[f.s] = -far
		r.root(f)
	}
	for _, n := range kept {
		for _, f := range r.facts[n.from:n.to] {
			r.want[f.s] = -far
			r.root(f)
		}
		r.prepare(n.why)
	}
	for _, f := range given {
		r.have[f.s] = -far
	}
	for k := len(kept) - 1; k >= 0; k-- {
		n := kept[k]
		r.reason(n.f, n.why, r.facts[n.from:n.to])
	}
	r.begin()
}

// root derives a fact that holds at level 0; others are left.
func (r *record) root(f fact) {
	if i := r.rootEntry(f); i >= 0 {
		r.show(i)
	}
}

// rootEntry gives the entry of level 0 that made f true, -1 if there is none.
func (r *record) rootEntry(f fact) int32 {
	e := r.m.engine
	if e.holds(f) {
		if i := e.entry(f); e.list[i].level == 0 {
			return i
		}
	}
	return -1
}

// show derives entry i of level 0 from those before it.
func (r *record) show(i int32) {
	e := r.m.engine
	for len(r.shown) <= int(i) {
		r.shown = append(r.shown, false)
	}
	if r.shown[i] {
		return
	}
	r.shown[i] = true
	x := e.list[i]
	if e.step[i].prev < 0 || x.why.kind == whyRoot {
		return // the problem says it, or the log does already
	}
	f := fact{x.s, e.step[i].v}
	behind := e.because(f, x.why, i, nil)
	for _, g := range behind {
		r.show(e.entry(g))
	}
	r.prepare(x.why)
	r.reason(f, x.why, behind)
	r.so(0, []fact{f.not()})
}
