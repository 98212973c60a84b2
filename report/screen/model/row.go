// Package model holds what the terminal screen shows, as rows of plain text for a given width and
// height, and what each key does to it. It draws nothing and runs nothing: a driver shows the
// rows, hands in keys, and plans again when a key asks for it. Widths are terminal columns; times
// shown are local to the place. Every row can be read without its mark.
package model

import (
	"strings"

	"github.com/rivo/uniseg"

	"sailby/report/clean"
)

// Mark is how a row may be set off, beyond what its text says already.
type Mark uint8

// The marks of rows.
const (
	Plain  Mark = iota
	Bar         // the rows at the edge: pages, keys
	Head        // a heading
	Chosen      // the row that Enter acts on; its text begins with ">"
	Good        // says that something fits
	Bad         // says that something does not
	Faint       // less important
)

// Row is one row of the screen.
type Row struct {
	Text string
	Mark Mark
}

// width counts the columns that s takes.
func width(s string) int { return uniseg.StringWidth(s) }

// cut gives at most n columns of s; where something is left out the last column is "…".
func cut(s string, n int) string {
	if n <= 0 {
		return ""
	}
	if width(s) <= n {
		return s
	}
	head, _ := split(s, n-1)
	return head + "…"
}

// split cuts s after at most n columns, between characters.
func split(s string, n int) (head, rest string) {
	g := uniseg.NewGraphemes(s)
	at, used := 0, 0
	for g.Next() {
		if used+g.Width() > n {
			break
		}
		used += g.Width()
		_, at = g.Positions()
	}
	return s[:at], s[at:]
}

// pad gives s in exactly n columns.
func pad(s string, n int) string {
	s = cut(s, n)
	return s + strings.Repeat(" ", max(n-width(s), 0))
}

// wrap breaks the cleaned text into lines of at most n columns, at blanks where it can.
func wrap(text string, n int) []string {
	n = max(n, 4)
	var out []string
	line := ""
	for _, word := range clean.Words(clean.Line(text)) {
		if line != "" && width(line)+1+width(word) > n {
			out, line = append(out, line), ""
		}
		for width(word) > n {
			head, rest := split(word, n)
			if head == "" {
				break
			}
			out, word = append(out, head), rest
		}
		if line != "" {
			line += " "
		}
		line += word
	}
	if line != "" || len(out) == 0 {
		out = append(out, line)
	}
	return out
}

// columns sets cells side by side, each cut to its width; the last one takes what is left of n.
func columns(n int, widths []int, cells ...string) string {
	var b strings.Builder
	used := 0
	for i, c := range cells {
		c = clean.Line(c)
		if i >= len(widths) || i == len(cells)-1 {
			b.WriteString(cut(c, n-used))
			break
		}
		b.WriteString(pad(c, widths[i]-1) + " ")
		used += widths[i]
	}
	return strings.TrimRight(cut(b.String(), n), " ")
}

// line is a row of a page that scrolls; do is what Enter does on it, nil for nothing.
type line struct {
	text string
	mark Mark
	do   func() Ask
}

// para gives text as lines behind lead, the later ones indented to its end; Enter on any does do.
func para(n int, lead, text string, mark Mark, do func() Ask) []line {
	indent := width(lead)
	var out []line
	for i, t := range wrap(text, n-indent) {
		if i > 0 {
			lead, do = strings.Repeat(" ", indent), nil
		}
		out = append(out, line{lead + t, mark, do})
	}
	return out
}
