package model

import (
	"strings"
	"testing"

	"sailby/plan"
	"sailby/report/fixture"
)

// TestWaysOnTheWindow: they stand on the window's page once they are found, and a line says that they are looked for before.
func TestWaysOnTheWindow(t *testing.T) {
	r := fixture.Report()
	r.Likely = r.High // its proof says that it cannot fit
	m := New(r)
	page := func() string {
		_, lines := m.stack[0].lay(100)
		var out []string
		for _, l := range lines {
			out = append(out, l.text)
		}
		return strings.Join(out, "\n")
	}
	if s := page(); strings.Contains(s, "What would make it fit") {
		t.Errorf("before anything was asked:\n%s", s)
	}
	m.Looking()
	if s := page(); !strings.Contains(s, "is being looked for") {
		t.Errorf("nothing says that it is looked for:\n%s", s)
	}
	m.Ways(&plan.Ways{Tried: 3, List: []plan.Way{{Text: "the window at pier closing 2 h later", Write: "closes: 2027-04-06 19:00", InHand: 90}}, Not: []string{"the fire watch (R13)"}})
	s := page()
	for _, want := range []string{"- with the window at pier closing 2 h later: fits, with 1 h 30 min in hand", "write closes: 2027-04-06 19:00", "Not offered: the fire watch (R13)."} {
		if !strings.Contains(s, want) {
			t.Errorf("%q is not on the page:\n%s", want, s)
		}
	}
	if strings.Contains(s, "looked for") {
		t.Error("it is still looked for")
	}
	m.Ways(&plan.Ways{Tried: 3})
	if s := page(); !strings.Contains(s, "No single change is enough: 3 changes were tried by themselves.") {
		t.Errorf("none is not said:\n%s", s)
	}
}
