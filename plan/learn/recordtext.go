package learn

import (
	"fmt"
	"strconv"
)

// reason writes one reason.
func (r *record) reason(f fact, w why, behind []fact) {
	switch w.kind {
	case whyClause:
		r.line("by %d", r.m.store.facts[w.id-1].v)
	case whyArc, whyOff:
		l := r.m.arcs.label[w.id]
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
