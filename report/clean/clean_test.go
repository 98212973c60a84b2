package clean

import (
	"strings"
	"testing"
	"unicode"
	"unicode/utf8"
)

func TestLine(t *testing.T) {
	for _, c := range []struct{ what, in, want string }{
		{"plain", "weld lugs", "weld lugs"},
		{"accents stay", "Séamus Ó Dónaill, Łódź", "Séamus Ó Dónaill, Łódź"},
		{"escape sequence", "\x1b[31mred\x1b[0m", "red"},
		{"window title", "a\x1b]0;pwned\x07b", "ab"},
		{"sequence in a sequence", "\x1b\x1b[1m[31mx", "[31mx"},
		{"sequence not ended", "\x1b]0;x", "]0;x"},
		{"C1 control introducer", "a\u009b2Jb", "ab"},
		{"right-to-left override", "cut \u202egul", "cut gul"},
		{"isolates", "\u2066x\u2069", "x"},
		{"zero width", "a\u200bb\ufeffc\u00add", "abcd"},
		{"line breaks are blanks", "one\r\ntwo\u2028three\tfour", "one two three four"},
		{"bad bytes", "a\xff\xfeb", "a?b"},
		{"tags", "x\U000e0041\U000e0042y", "xy"},
		{"tower of marks", "e" + strings.Repeat("\u0301", 40), "e\u0301\u0301\u0301"},
		{"mark without a letter", "\u0301a", "a"},
		{"private use", "a\ue000b", "ab"},
		{"blanks", "  a \u00a0 b  ", "a b"},
		{"bell and backspace", "a\a\b\x7fb", "ab"},
		{"empty", "\x00\x01", ""},
	} {
		if got := Line(c.in); got != c.want {
			t.Errorf("%s: Line(%q) = %q, want %q", c.what, c.in, got, c.want)
		}
	}
}

func TestLines(t *testing.T) {
	got := Lines("one\n\n two\x1b\r\nthree\u2029four\n")
	if want := "one|two|three|four"; strings.Join(got, "|") != want {
		t.Errorf("Lines = %q, want %q", got, want)
	}
}

func TestPaper(t *testing.T) {
	latin := func(r rune) bool { return r < 0x180 && r != 'ł' }
	for _, c := range []struct{ what, in, want string }{
		{"diameter sign", "⌀20 hole", "Ø20 hole"},
		{"ballot box", "☐ done", "[ ] done"},
		{"check mark", "✓", "yes"},
		{"joined up accent", "e\u0301", "é"},
		{"accent the font lacks", "ở", "o"},
		{"letter without parts", "ł", "l"},
		{"wide letters", "ＡＢ", "AB"},
		{"ligature", "ﬁt", "fit"},
		{"beyond the plane", "weld 🔥 here", "weld ? here"},
		{"mathematical bold", "𝐀", "A"},
		{"other script", "船", "?"},
		{"arrow", "a→b", "a->b"},
		{"roman numeral", "Ⅳ", "IV"},
	} {
		if got := Paper(c.in, latin); got != c.want {
			t.Errorf("%s: Paper(%q) = %q, want %q", c.what, c.in, got, c.want)
		}
	}
	if got := Paper("船 🔥", nil); got != "船 ?" {
		t.Errorf("without a font: %q", got)
	}
}

func TestCell(t *testing.T) {
	for in, want := range map[string]string{
		"=1+1":               "'=1+1",
		"+44 20":             "'+44 20",
		"-2":                 "'-2",
		"@SUM(A1)":           "'@SUM(A1)",
		"\t=cmd|' /C calc'!": "'=cmd|' /C calc'!",
		" \"=x":              "'\"=x",
		"＝1":                 "'＝1",
		"\u200b=1":           "'=1",
		"'=1":                "'=1",
		"cut = weld":         "cut = weld",
		"M20 x 60":           "M20 x 60",
		"":                   "",
	} {
		if got := Cell(in); got != want {
			t.Errorf("Cell(%q) = %q, want %q", in, got, want)
		}
	}
}

func FuzzClean(f *testing.F) {
	for _, s := range []string{"weld", "\xff", "=1", "e\u0301\u0301\u0301\u0301", "\u202e", "🔥", "ﬁ", "\u1160", "ŉ", "＝"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		l := Line(s)
		if !utf8.ValidString(l) || Line(l) != l {
			t.Fatalf("Line(%q) = %q is not settled (%q)", s, l, Line(l))
		}
		for _, r := range l {
			if unicode.IsControl(r) || unicode.Is(unicode.Cf, r) || r == '\u2028' || r == '\u2029' {
				t.Fatalf("Line(%q) keeps %U", s, r)
			}
		}
		latin := func(r rune) bool { return r < 0x180 }
		p := Paper(s, latin)
		for _, r := range p {
			if r >= 0x180 {
				t.Fatalf("Paper(%q) = %q keeps %U", s, p, r)
			}
		}
		c := Cell(s)
		if Cell(c) != c {
			t.Fatalf("Cell(%q) = %q is not settled (%q)", s, c, Cell(c))
		}
		if c != "" && strings.ContainsRune("=+-@", rune(c[0])) {
			t.Fatalf("Cell(%q) = %q would run", s, c)
		}
	})
}
