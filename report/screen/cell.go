// Package screen shows a job's plan in a terminal: the window at a glance, the days, the tasks,
// one task in full, what governs the finish, and what-if. Package model says what is shown; here
// it is drawn with tview, keys are handed on, and what-if is planned beside the screen.
package screen

import (
	"strings"

	"github.com/rivo/tview"

	"sailby/report/clean"
)

// cell makes text safe to hand to tview: control sequences and hidden characters are taken out,
// and brackets that would be read as a style stay brackets. Blanks at the start are kept.
func cell(s string) string {
	body := strings.TrimLeft(s, " ")
	return strings.Repeat(" ", len(s)-len(body)) + tview.Escape(spaced(body))
}

// spaced cleans the words between runs of blanks, so that columns stay where they are.
func spaced(s string) string {
	parts := strings.Split(s, " ")
	for i, p := range parts {
		parts[i] = clean.Line(p)
	}
	return strings.Join(parts, " ")
}
