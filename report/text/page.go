// Package text prints answers as plain text for a terminal and as JSON for machines: what `fits`,
// `days` and `why` show. Text is wrapped to the width asked for, without colour; times are local
// to the place, in JSON as RFC 3339 with the place's offset; durations in JSON are whole minutes
// in fields that end in _min.
package text

import (
	"io"
	"strings"

	"github.com/rivo/uniseg"

	"sailby/plan"
	"sailby/report/clean"
	"sailby/tasks/expand"
)

// Options says how to print. The zero value prints the plan for likely hours, 80 columns wide.
type Options struct {
	Width  int        // columns, 40 to 400; 0 is 80
	Maybes bool       // days, why: the plan with every maybe
	End    expand.End // days, why: High for the plan at the high end of the hours
}

// pick gives the answer that the options ask for.
func (o Options) pick(r *plan.Report) *plan.Answer {
	switch {
	case o.Maybes && r.Maybes != nil:
		return r.Maybes
	case o.End == expand.High && r.High != nil:
		return r.High
	}
	return r.Likely
}

// page writes wrapped lines; the first error sticks.
type page struct {
	w     io.Writer
	width int
	err   error
}

func newPage(w io.Writer, o Options) *page {
	width := o.Width
	if width == 0 {
		width = 80
	}
	return &page{w: w, width: min(max(width, 40), 400)}
}

func (p *page) raw(s string) {
	if p.err == nil {
		_, p.err = io.WriteString(p.w, strings.TrimRight(s, " ")+"\n")
	}
}

func (p *page) gap() { p.raw("") }

// para writes text behind lead, wrapped, its later lines indented to the end of lead.
func (p *page) para(lead, text string) {
	indent := uniseg.StringWidth(lead)
	for i, l := range wrap(text, max(p.width-indent, 16)) {
		if i > 0 {
			lead = strings.Repeat(" ", indent)
		}
		p.raw(lead + l)
	}
}

// row writes cells side by side in columns of the given widths, each wrapped; the last column
// takes what is left of the line.
func (p *page) row(widths []int, cells ...string) {
	cols := make([][]string, len(cells))
	tall := 0
	used := 0
	for i, c := range cells {
		w := p.width - used
		if i < len(widths) {
			w = widths[i] - 1
			used += widths[i]
		}
		cols[i] = wrap(c, max(w, 8))
		tall = max(tall, len(cols[i]))
	}
	for n := range tall {
		var b strings.Builder
		for i := range cells {
			s := ""
			if n < len(cols[i]) {
				s = cols[i][n]
			}
			b.WriteString(s)
			if i < len(widths) && i < len(cells)-1 {
				b.WriteString(strings.Repeat(" ", max(widths[i]-uniseg.StringWidth(s), 0)))
			}
		}
		p.raw(b.String())
	}
}

// wrap breaks cleaned text into lines of at most width columns, at blanks where it can.
func wrap(text string, width int) []string {
	text = clean.Line(text)
	var out []string
	line, used := "", 0
	for _, word := range clean.Words(text) {
		n := uniseg.StringWidth(word)
		if line != "" && used+1+n > width {
			out = append(out, line)
			line, used = "", 0
		}
		for n > width { // a word longer than the line is cut between characters
			head, rest := cut(word, width)
			out = append(out, head)
			word, n = rest, uniseg.StringWidth(rest)
		}
		if word == "" {
			continue
		}
		if line != "" {
			line += " "
			used++
		}
		line += word
		used += n
	}
	if line != "" || len(out) == 0 {
		out = append(out, line)
	}
	return out
}

// cut splits a word after at most width columns, at least one character in.
func cut(word string, width int) (head, rest string) {
	g := uniseg.NewGraphemes(word)
	at, used := 0, 0
	for g.Next() {
		w := g.Width()
		_, to := g.Positions()
		if at > 0 && used+w > width {
			break
		}
		used += w
		at = to
	}
	return word[:at], word[at:]
}
