package agenda

import (
	"fmt"
	"strings"

	"sailby/plan"
	"sailby/report/clean"
	"sailby/tasks/quantity"
)

// WaysHead begins the list of ways.
const WaysHead = "What would make it fit, each by itself, on likely hours"

// Way says one way in a sentence.
func Way(w plan.Way) string {
	hand := "with " + quantity.Hours(w.InHand) + " in hand"
	if w.InHand == 0 {
		hand = "with nothing in hand"
	}
	return clean.Line("with " + w.Text + ": fits, " + hand)
}

// WayWrite says what to write for a way, and where; "" where that is not known.
func WayWrite(w plan.Way) string {
	if w.Write == "" {
		return ""
	}
	s := "write " + w.Write
	if w.Was != "" {
		s += " (now " + w.Was + ")"
	}
	return clean.Line(s)
}

// WaysEnd says how far the ways go: how many changes were tried, and what is never offered.
func WaysEnd(w *plan.Ways) []string {
	var out []string
	tried := fmt.Sprintf("%d changes were tried by themselves", w.Tried)
	if w.Tried == 1 {
		tried = "1 change was tried by itself"
	}
	switch {
	case len(w.List) == 0 && w.Left == 0:
		out = append(out, "No single change is enough: "+tried+".")
	case len(w.List) == 0:
		out = append(out, fmt.Sprintf("No single change was found; %s, %d were left for want of time.", tried, w.Left))
	case w.Left > 0:
		out = append(out, fmt.Sprintf("There may be more: %d changes were left untried for want of time.", w.Left))
	}
	if len(w.Not) > 0 {
		out = append(out, clean.Line("Not offered: "+strings.Join(w.Not, "; ")+"."))
	}
	return out
}
