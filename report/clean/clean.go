// Package clean makes text from a job file safe to show: on a terminal, on paper, in a CSV file.
// A name in a job file may hold anything a text file can; here what could move the cursor, turn
// the reading direction, hide, or run as a formula is taken out, and what was written stays
// readable. Equal input gives equal output, and cleaning twice changes nothing more.
package clean

import (
	"regexp"
	"strings"
	"unicode"
	"unicode/utf8"

	"golang.org/x/text/unicode/norm"
)

// maxMarks is the number of combining marks kept on one letter: no written language needs more
// than three; towers of them cover the lines above.
const maxMarks = 3

// sequence is a terminal's control sequence (ECMA-48): CSI with its parameters, or a string
// command with its text and end.
var sequence = regexp.MustCompile("(\x1b\\[|\u009b)[0-?]*[ -/]*[@-~]|\x1b[\\]P^_X][^\x07\x1b]*(\x07|\x1b\\\\)")

// Line gives s as one line for a terminal: bad UTF-8 as "?", line breaks and tabs as a blank,
// runs of blanks as one, without control sequences and control characters, direction
// controls, invisible characters and towers of marks.
func Line(s string) string {
	var b strings.Builder
	b.Grow(len(s))
	marks, blank := 0, true // true drops blanks at the start
	s = sequence.ReplaceAllString(valid(s), "")
	for _, r := range s {
		switch {
		case r == '\n' || r == '\r' || r == '\t' || r == '\v' || r == '\f' || r == '\u0085' || unicode.Is(unicode.Zs, r) || r == '\u2028' || r == '\u2029':
			if !blank {
				b.WriteByte(' ')
			}
			blank, marks = true, 0
			continue
		case hidden(r):
			continue
		case unicode.Is(unicode.M, r):
			if marks++; marks > maxMarks || blank && b.Len() == 0 {
				continue
			}
		default:
			marks = 0
		}
		blank = false
		b.WriteRune(r)
	}
	return strings.TrimRight(b.String(), " ")
}

// Lines gives s line by line, each as Line gives it; empty lines are left out.
func Lines(s string) []string {
	var out []string
	for _, l := range strings.FieldsFunc(s, func(r rune) bool { return r == '\n' || r == '\r' || r == '\u2028' || r == '\u2029' }) {
		if l = Line(l); l != "" {
			out = append(out, l)
		}
	}
	return out
}

// valid replaces each run of bytes that are not UTF-8 by "?".
func valid(s string) string {
	if utf8.ValidString(s) {
		return s
	}
	return strings.ToValidUTF8(s, "?")
}

// hidden says whether r takes no place or does something: controls, direction controls,
// zero-width characters, tags, variation selectors, code points that are no characters.
func hidden(r rune) bool {
	switch {
	case unicode.Is(unicode.Cc, r) || unicode.Is(unicode.Cf, r): // bidi controls, zero-width joiners, soft hyphen, tags
		return true
	case unicode.Is(unicode.Variation_Selector, r) || unicode.Is(unicode.Noncharacter_Code_Point, r):
		return true
	case r == '\u115f' || r == '\u1160' || r == '\u3164' || r == '\uffa0' || r == '\u034f' || r == '\u2800':
		return true // fillers that draw nothing
	}
	return unicode.Is(unicode.Co, r) || unicode.Is(unicode.Cs, r)
}

// Paper gives s as one line that can be drawn with a font: as Line, and every character that
// the font has not (or that lies beyond U+FFFF) as its nearest text, else "?". A nil has takes
// every character up to U+FFFF.
func Paper(s string, has func(rune) bool) string {
	s = norm.NFC.String(Line(s))
	if has == nil {
		has = func(rune) bool { return true }
	}
	ok := func(r rune) bool { return r <= 0xFFFF && has(r) }
	var b strings.Builder
	b.Grow(len(s))
	for _, r := range s {
		if r < utf8.RuneSelf || ok(r) {
			b.WriteRune(r)
			continue
		}
		b.WriteString(near(r, ok))
	}
	return b.String()
}

// nearText is what is drawn for signs of the trade that a text font may lack.
var nearText = map[rune]string{
	'⌀': "Ø", '∅': "Ø", '☐': "[ ]", '☑': "[x]", '☒': "[x]", '✓': "yes", '✔': "yes", '✗': "no", '✘': "no",
	'→': "->", '←': "<-", '↑': "up", '↓': "down", '≤': "<=", '≥': ">=", '≠': "not", '≈': "about", '±': "+/-",
	'−': "-", '‐': "-", '‑': "-", '‒': "-", '–': "-", '—': "-", '―': "-", '…': "...", '•': "-", '‣': "-",
	'‘': "'", '’': "'", '‚': ",", '“': "\"", '”': "\"", '„': "\"", '′': "'", '″': "\"", '×': "x", '∙': ".",
	'℃': "°C", '℉': "°F", 'Ω': "Ohm", 'µ': "u", 'μ': "u", '№': "No.", '⚠': "!", '½': "1/2", '¼': "1/4", '¾': "3/4",
	'ß': "ss", 'ẞ': "SS", 'ð': "d", 'Ð': "D", 'þ': "th", 'Þ': "Th", 'đ': "d", 'Đ': "D", 'ł': "l", 'Ł': "L", 'ħ': "h", 'ı': "i", 'ŋ': "ng",
	'ø': "o", 'Ø': "O", 'æ': "ae", 'Æ': "AE", 'œ': "oe", 'Œ': "OE", '€': "EUR", '£': "GBP", '²': "2", '³': "3", '°': "deg ",
}

// near gives the nearest text to r that the font can draw: a known stand-in, else its
// compatibility parts without accents, else "?". Marks that stand alone vanish.
func near(r rune, ok func(rune) bool) string {
	if s, known := nearText[r]; known {
		if fits(s, ok) {
			return s
		}
	}
	if unicode.Is(unicode.M, r) {
		return ""
	}
	parts := norm.NFKD.String(string(r))
	if parts == string(r) {
		return "?"
	}
	var b strings.Builder
	for _, p := range parts {
		switch {
		case unicode.Is(unicode.M, p):
		case p < utf8.RuneSelf || ok(p):
			b.WriteRune(p)
		default:
			if s, known := nearText[p]; known && fits(s, ok) {
				b.WriteString(s)
				continue
			}
			return "?"
		}
	}
	return Line(b.String())
}

func fits(s string, ok func(rune) bool) bool {
	for _, r := range s {
		if r >= utf8.RuneSelf && !ok(r) {
			return false
		}
	}
	return true
}

// Cell gives s as the text of one CSV field: as Line, and where a spreadsheet would take it for
// a formula (it begins with = + - @ or their wide forms, blanks and quotes skipped) with an
// apostrophe in front. Numbers that the program writes itself do not go through it.
func Cell(s string) string {
	s = Line(s)
	head := strings.TrimLeft(s, " \"'")
	if r, _ := utf8.DecodeRuneInString(head); strings.ContainsRune("=+-@|%＝＋－＠−﹢﹣﹦﹫", r) && head != "" {
		if !strings.HasPrefix(s, "'") {
			return "'" + s
		}
	}
	return s
}
