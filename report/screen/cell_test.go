package screen

import (
	"strings"
	"testing"

	"github.com/gdamore/tcell/v2"

	"sailby/report/clean"
)

// printed gives what a row of a screen shows of the text.
func printed(t testing.TB, text string) string {
	s := tcell.NewSimulationScreen("UTF-8")
	if err := s.Init(); err != nil {
		t.Fatal(err)
	}
	defer s.Fini()
	s.SetSize(300, 1)
	cell(s, 0, 0, 300, text, tcell.StyleDefault)
	s.Show()
	cells, w, _ := s.GetContents()
	var b strings.Builder
	for _, c := range cells[:w] {
		b.WriteString(string(c.Runes))
	}
	return strings.TrimRight(b.String(), " ")
}

// TestCell: brackets of every kind come out as they went in, control sequences not at all.
func TestCell(t *testing.T) {
	for _, c := range []struct{ in, want string }{
		{"weld [red]lugs[white]", "weld [red]lugs[white]"},
		{"[::b]bold[::-]", "[::b]bold[::-]"},
		{`["region"]text[""]`, `["region"]text[""]`},
		{"[[red]]", "[[red]]"},
		{"[red[]", "[red[]"},
		{"[]", "[]"},
		{"[:::http://x]link[:::-]", "[:::http://x]link[:::-]"},
		{"a [not shown to be needed] b", "a [not shown to be needed] b"},
		{"\x1b[31mred\x1b[0m", "red"},
		{"  two  blanks   kept", "  two  blanks   kept"},
		{"turned\u202e round\u200b", "turned round"},
	} {
		if got := printed(t, c.in); got != c.want {
			t.Errorf("%q is shown as %q, want %q", c.in, got, c.want)
		}
	}
}

// FuzzCell: what is shown is what is left of the text when it is cleaned.
func FuzzCell(f *testing.F) {
	for _, s := range []string{"[red]", "[[red]]", "[a[b]c]", "[:::http://x]", "[\"a\"]", "[-:-:-]", "[#ff0000]", "a[", "]", "[[[]]]", "[,;]"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		s = clean.Line(s)
		for _, r := range s {
			if r > 0x2ff {
				t.Skip("wide and joined characters take the screen's own way")
			}
		}
		if len(s) > 250 {
			t.Skip("longer than the line")
		}
		if got := printed(t, s); got != s {
			t.Errorf("%q is shown as %q", s, got)
		}
	})
}
