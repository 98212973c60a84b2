package learn

import (
	"bufio"
	"errors"
	"fmt"
	"io"
	"slices"
	"strconv"
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

// label says what an arc stands for in the problem.
type label struct {
	kind uint8
	a, b int
}

const (
	forNothing = uint8(iota)
	forLink    // link a
	forHours   // start and finish of activity a
	forEnd     // finish of activity a and that of the whole
	forApart   // variable a says which of two goes first
	forForced  // activity a goes before activity b, as the links leave no choice
	forRule    // choice b of order rule a
	forModes   // what the mode of activity a brings with it
	forStay    // variable a says who keeps the watch after an activity
)

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

// called names a variable, told declares what it means and lets the arcs that follow stand for it.
func (m *model) called(s side, format string, args ...any) {
	if m.log == nil {
		return
	}
	for len(m.log.names) <= int(s/2) {
		m.log.names = append(m.log.names, "")
	}
	m.log.names[s/2] = fmt.Sprintf(format, args...)
}

func (m *model) told(s side, format string, args ...any) {
	m.label = label{forApart, int(s), 0}
	if m.log != nil {
		m.called(s, "x%d", s/2)
		m.log.line("var x%d "+format, append([]any{s / 2}, args...)...)
	}
}

// titled names the lemmas of the rule that is made next.
func (m *model) titled(format string, args ...any) {
	if m.log != nil {
		m.log.titles[int32(len(m.engine.rules))] = fmt.Sprintf(format, args...)
	}
}

func (m *model) titledCrew(who []int) {
	if m.log != nil {
		m.titled("crew %s", list(who))
	}
}

// list writes numbers with commas between them.
func list(numbers []int) string {
	var b []byte
	for k, n := range numbers {
		if k > 0 {
			b = append(b, ',')
		}
		b = strconv.AppendInt(b, int64(n), 10)
	}
	return string(b)
}

// never says that a lemma without facts makes an end of it.
func (m *model) never(format string, args ...any) {
	if m.log != nil {
		m.log.begin()
		m.clash = m.clash[:0]
		m.log.line(format+" :", args...)
	}
}

// given raises a side for what the arcs' label says of minute 0.
func (m *model) given(f fact) bool {
	if m.log != nil && !m.holds(f) {
		m.log.lemma(m.log.called(m.label), nil, f)
		m.log.so(0, []fact{f.not()})
	}
	return m.raise(f.s, f.v, why{kind: whyRoot})
}

// axiom adds a clause that the problem states, under the name of the lemma that says so.
func (m *model) axiom(fs []fact, format string, args ...any) bool {
	id := int32(0)
	if m.log != nil {
		against := make([]fact, len(fs))
		for i, f := range fs {
			against[i] = f.not()
		}
		m.log.lemma(fmt.Sprintf(format, args...), against, fact{s: -1})
		if len(fs) > 1 {
			id = m.log.next
			m.log.next++
		}
		m.log.so(id, against)
	}
	if !m.add(fs) {
		return false
	}
	if id > 0 {
		m.store.facts[m.refs[len(m.refs)-1]-1].v = id
	}
	return true
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
	if x.prev < 0 || x.why.kind == whyRoot {
		return // the problem says it, or the log does already
	}
	f := fact{x.s, x.v}
	behind := e.because(f, x.why, i, nil)
	for _, g := range behind {
		r.show(e.entry(g))
	}
	r.prepare(x.why)
	r.reason(f, x.why, behind)
	r.so(0, []fact{f.not()})
}

// reason writes one reason.
func (r *record) reason(f fact, w why, behind []fact) {
	switch w.kind {
	case whyClause:
		r.line("by %d", r.m.store.facts[w.id-1].v)
	case whyArc, whyOff:
		l := r.m.arcs.all[w.id].label
		if l.kind == forForced {
			r.forced(pair{l.a, l.b}, f, behind)
			return
		}
		r.lemma(r.called(l), behind, f)
	case whyLeaf:
		r.lemma(fmt.Sprintf("%s %d %d %d", [2]string{"person", "use"}[w.id], w.who, w.at, w.at+1), behind, f)
	case whyRule:
		text := r.titles[w.id]
		if x, ok := r.m.engine.rules[w.id].(witness); ok {
			from, to := x.witness(f, w, behind)
			text = fmt.Sprintf("%s %d %d", text, from, to)
		}
		r.lemma(text, behind, f)
	}
}

// called gives the name of the lemmas of an arc.
func (r *record) called(l label) string {
	switch l.kind {
	case forLink:
		return fmt.Sprintf("link %d", l.a)
	case forHours:
		return fmt.Sprintf("hours %d", l.a)
	case forEnd:
		return fmt.Sprintf("end %d", l.a)
	case forApart:
		return "apart " + r.names[l.a/2]
	case forRule:
		return fmt.Sprintf("rule %d %d", l.a, l.b)
	case forModes:
		return fmt.Sprintf("modes %d", l.a)
	case forStay:
		return "stay " + r.names[l.a/2]
	}
	return "nothing"
}

// lemma writes that the facts and not f cannot all hold, and so that the facts given cannot.
func (r *record) lemma(name string, behind []fact, f fact) {
	r.w.WriteString(name)
	r.w.WriteString(" :")
	for _, g := range behind {
		r.fact(g)
	}
	if f.s >= 0 {
		r.fact(f.not())
	}
	r.w.WriteByte('\n')
}

func (r *record) so(id int32, fs []fact) {
	r.w.WriteString("so")
	if id > 0 {
		r.w.WriteByte(' ')
		r.w.WriteString(strconv.Itoa(int(id)))
	}
	r.w.WriteString(" :")
	for _, f := range fs {
		r.fact(f)
	}
	r.w.WriteByte('\n')
}

func (r *record) fact(f fact) {
	if f.v <= 1-far {
		return // it holds anyway
	}
	r.w.WriteByte(' ')
	r.w.WriteString(r.names[f.s/2])
	if f.s&1 == 0 {
		r.w.WriteString(">=")
		r.w.WriteString(strconv.Itoa(int(f.v)))
		return
	}
	r.w.WriteString("<=")
	r.w.WriteString(strconv.Itoa(-int(f.v)))
}
