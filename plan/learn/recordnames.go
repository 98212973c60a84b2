package learn

import (
	"fmt"
	"strconv"
)

// What the model tells the log while it is filled: what its variables, arcs and rules stand for.

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
