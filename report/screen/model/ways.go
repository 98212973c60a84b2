package model

import (
	"sailby/plan"
	"sailby/report/agenda"
)

// Looking says that what would make the job of the file fit is being looked for.
func (m *Model) Looking() { m.looking = true }

// Ways sets what would make the job of the file fit; nil if nothing was found out.
func (m *Model) Ways(w *plan.Ways) {
	m.looking = false
	m.file.Ways = w
}

// waysLines says what would make the job shown fit, on likely hours.
func (m *Model) waysLines(n int) []line {
	w := m.shown.Ways
	if m.basis != likely {
		return nil
	}
	if w == nil {
		if m.looking && m.shown == m.file {
			return []line{{}, {"What would make it fit is being looked for ...", Faint, nil}}
		}
		return nil
	}
	out := []line{{}, {agenda.WaysHead, Head, nil}}
	for _, x := range w.List {
		out = append(out, para(n, "- ", agenda.Way(x)+inFile(agenda.At(x.Pos)), Plain, nil)...)
		if s := agenda.WayWrite(x); s != "" {
			out = append(out, para(n, "    ", s, Faint, nil)...)
		}
	}
	for _, s := range agenda.WaysEnd(w) {
		out = append(out, para(n, "", s, Plain, nil)...)
	}
	return out
}
