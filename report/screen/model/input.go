package model

import (
	"strings"

	"github.com/rivo/uniseg"

	"sailby/report/clean"
)

// longestInput is the most characters that one line of typing takes.
const longestInput = 200

// input is one line that is being typed; at counts characters before the cursor.
type input struct {
	chars []string
	at    int
}

// set replaces the text, the cursor at its end.
func (in *input) set(s string) {
	in.chars, in.at = nil, 0
	in.write(s)
}

// write puts text at the cursor, cleaned; what is too long is left out.
func (in *input) write(s string) {
	lead, tail := "", ""
	if strings.HasPrefix(s, " ") {
		lead = " " // a blank being typed; clean.Line would drop it
	}
	if len(s) > 1 && strings.HasSuffix(s, " ") {
		tail = " "
	}
	s = lead + clean.Line(s) + tail
	g := uniseg.NewGraphemes(s)
	var add []string
	for g.Next() && len(in.chars)+len(add) < longestInput {
		add = append(add, g.Str())
	}
	in.chars = append(in.chars[:in.at:in.at], append(add, in.chars[in.at:]...)...)
	in.at += len(add)
}

// press edits for a key; false means that the key does nothing here.
func (in *input) press(k Key) bool {
	switch k.Code {
	case Letter:
		in.write(string(k.Letter))
	case Erase:
		if in.at > 0 {
			in.chars = append(in.chars[:in.at-1:in.at-1], in.chars[in.at:]...)
			in.at--
		}
	case Delete:
		if in.at < len(in.chars) {
			in.chars = append(in.chars[:in.at:in.at], in.chars[in.at+1:]...)
		}
	case Left:
		in.at = max(in.at-1, 0)
	case Right:
		in.at = min(in.at+1, len(in.chars))
	case Home:
		in.at = 0
	case End:
		in.at = len(in.chars)
	default:
		return false
	}
	return true
}

// text gives what was typed.
func (in *input) text() string { return strings.Join(in.chars, "") }

// shown gives the part of the text that fits n columns with the cursor in it, and the cursor's
// column there.
func (in *input) shown(n int) (text string, x int) {
	from := in.at
	used := 1 // the cursor's own column
	for from > 0 && used+width(in.chars[from-1]) <= n {
		from--
		used += width(in.chars[from])
	}
	text, _ = split(strings.Join(in.chars[from:], ""), n)
	return text, width(strings.Join(in.chars[from:in.at], ""))
}
