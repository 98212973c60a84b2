// Package screen shows a job's plan in a terminal: the window at a glance, the days, the tasks,
// one task in full, what governs the finish, and what-if. Package model says what is shown; here
// it is drawn with tview, keys are handed on, and what-if is planned beside the screen.
package screen

import (
	"strings"

	"github.com/gdamore/tcell/v2"
	"github.com/rivo/uniseg"

	"sailby/report/clean"
)

// cell writes text into one row from x on, at most w columns of it. All text of the screen goes
// through here: control sequences and hidden characters are taken out, blanks stay, and brackets
// are brackets. It writes the cells itself, since tview's own printing takes words in brackets
// for styles, and its Escape leaves some of them (links) as they are.
func cell(s tcell.Screen, x, y, w int, text string, style tcell.Style) {
	end := x + w
	g := uniseg.NewGraphemes(spaced(text))
	for g.Next() {
		n, runes := g.Width(), g.Runes()
		if n == 0 {
			continue
		}
		if x+n > end {
			break
		}
		s.SetContent(x, y, runes[0], runes[1:], style)
		x += n
	}
	for ; x < end; x++ {
		s.SetContent(x, y, ' ', nil, style)
	}
}

// spaced cleans the words between blanks, so that columns stay where they are.
func spaced(s string) string {
	parts := strings.Split(s, " ")
	for i, p := range parts {
		parts[i] = clean.Line(p)
	}
	return strings.Join(parts, " ")
}
