package model

import (
	"slices"
	"strings"
	"testing"
	"time"

	"pgregory.net/rapid"

	"sailby/report/fixture"
	"sailby/tasks/hours"
)

// TestStripFill: the columns filled are those that hold the span; one column is the least.
func TestStripFill(t *testing.T) {
	base := newStrip(hours.Span{From: fixture.Site(6, "07:20"), To: fixture.Site(6, "12:40")}, time.FixedZone("", 3600), 24)
	if base.step != 15 || len(base.cells) != 24 {
		t.Fatalf("%d columns of %d min, want 24 of 15 (07:00 to 13:00)", len(base.cells), base.step)
	}
	for _, c := range []struct{ from, to, want string }{
		{"07:00", "08:00", "====                    "},
		{"08:00", "08:05", "    =                   "}, // too short for a column: one all the same
		{"07:05", "07:55", "====                    "}, // a column of which half or more is taken
		{"07:10", "07:50", " ==                     "}, // less than half of the first and of the last
		{"12:45", "13:00", "                       ="},
		{"05:00", "07:30", "==                      "},
		{"12:30", "15:00", "                      =="},
		{"14:00", "15:00", "                        "},
	} {
		s := base.blank()
		s.fill(hours.Span{From: fixture.Site(6, c.from), To: fixture.Site(6, c.to)}, '=')
		if s.String() != c.want {
			t.Errorf("%s to %s gives %q, want %q", c.from, c.to, s, c.want)
		}
	}
}

// TestRulerOverClockChange: Europe/London goes from 02:00 back to 01:00 on 31 October 2027, so the
// ruler has 01 twice.
func TestRulerOverClockChange(t *testing.T) {
	zone, err := time.LoadLocation("Europe/London")
	if err != nil {
		t.Fatal(err)
	}
	from := hours.Of(time.Date(2027, 10, 31, 0, 0, 0, 0, zone))
	s := newStrip(hours.Span{From: from, To: from + 5*60}, zone, 20)
	if got, want := s.ruler(zone), "00  01  01  02  03  "; got != want {
		t.Errorf("ruler is %q, want %q", got, want)
	}
}

// TestMarksKeepApart: marks that fall into one column stand side by side, none is lost.
func TestMarksKeepApart(t *testing.T) {
	s := newStrip(hours.Span{From: 0, To: 600}, time.UTC, 10)
	for _, r := range "ABC" {
		s.point(300, r)
	}
	if got, want := s.String(), "   CBA    "; got != want {
		t.Errorf("marks are %q, want %q", got, want)
	}
}

func TestScroll(t *testing.T) {
	do := func() Ask { return Ask{Leave: true} }
	text := make([]line, 20) // lines 2, 3 and 15 do something
	for i := range text {
		text[i].text = string(rune('a' + i))
	}
	text[2].do, text[3].do, text[15].do = do, do, do
	var s scroll
	s.show(text, 5)
	step := func(k Code, at, top int) {
		t.Helper()
		s.press(Key{Code: k})
		s.show(text, 5)
		if s.chosen() != at || s.top != top {
			t.Fatalf("line %d chosen, %d at the top; want %d, %d", s.chosen(), s.top, at, top)
		}
	}
	if s.chosen() != 2 || !s.enter().Leave {
		t.Fatalf("line %d is chosen at first", s.chosen())
	}
	step(Down, 3, 0)
	step(Down, 3, 1) // nothing more in sight: the text moves
	step(Down, 3, 2)
	step(Down, 3, 3)
	step(Down, -1, 4) // out of sight
	if s.enter().Leave {
		t.Fatal("Enter acts on a line out of sight")
	}
	step(Up, 3, 3)
	step(PageDown, -1, 7)
	step(PageDown, 15, 11)
	step(End, 15, 15)
	step(Home, 2, 0)
	if got := s.more(); got != "15 rows below" {
		t.Errorf("more says %q", got)
	}
	s.show(text[:1], 5)
	if s.chosen() != -1 || s.top != 0 || s.more() != "" {
		t.Errorf("with one line: chosen %d, top %d, %q", s.chosen(), s.top, s.more())
	}
}

// TestListMoves: where every line does something the choice moves by one, and a page by a page.
func TestListMoves(t *testing.T) {
	list := make([]line, 12)
	for i := range list {
		list[i].do = func() Ask { return Ask{} }
	}
	var s scroll
	s.show(list, 4)
	var got []int
	for _, k := range []Code{Down, Down, Down, Down, PageDown, PageDown, Down, PageUp, Up, Home, Up} {
		s.press(Key{Code: k})
		s.show(list, 4)
		got = append(got, s.chosen())
	}
	if want := []int{1, 2, 3, 4, 7, 10, 11, 8, 7, 0, 0}; !slices.Equal(got, want) {
		t.Errorf("chosen %v, want %v", got, want)
	}
}

func TestInput(t *testing.T) {
	for _, c := range []struct{ script, want string }{
		{"3 h", "3 h"},
		{"3 hh<erase>", "3 h"},
		{"h<home>3 <end>!", "3 h!"},
		{"ab<left><del>c", "ac"},
		{"ab<left><left><left>x", "xab"},
		{"<erase><del>a", "a"},
		{"\x1b\u202eå", "å"},
	} {
		var in input
		for _, k := range keys(c.script) {
			in.press(k)
		}
		if in.text() != c.want {
			t.Errorf("%q gives %q, want %q", c.script, in.text(), c.want)
		}
	}
}

// TestInputLaw: the part shown fits, and the cursor is in it.
func TestInputLaw(t *testing.T) {
	pool := keys("<left><right><home><end><erase><del>aå漢 3")
	rapid.Check(t, func(t *rapid.T) {
		var in input
		for _, i := range rapid.SliceOfN(rapid.IntRange(0, len(pool)-1), 0, 300).Draw(t, "keys") {
			in.press(pool[i])
		}
		n := rapid.IntRange(3, 60).Draw(t, "room")
		text, x := in.shown(n)
		if width(text) > n || x < 0 || x >= n || len(in.chars) > longestInput {
			t.Fatalf("%q, cursor %d in %d columns", text, x, n)
		}
	})
}

func TestWrap(t *testing.T) {
	for _, c := range []struct {
		text string
		n    int
		want []string
	}{
		{"", 10, []string{""}},
		{"weld  lugs today", 10, []string{"weld lugs", "today"}},
		{"Wojciechowska", 6, []string{"Wojcie", "chowsk", "a"}},
		{"漢字漢字 x", 5, []string{"漢字", "漢字", "x"}},
	} {
		if got := wrap(c.text, c.n); !slices.Equal(got, c.want) {
			t.Errorf("wrap(%q, %d) = %q, want %q", c.text, c.n, got, c.want)
		}
	}
	if got := columns(20, []int{8, 6}, "weld new", "\x1bpier", "Ines and Tom"); got != "weld n… pier  Ines …" {
		t.Errorf("columns give %q", got)
	}
}

// TestFilters: each filter lets through the tasks that are so, and no others.
func TestFilters(t *testing.T) {
	for _, c := range []struct {
		script string
		want   int // tasks
		name   string
	}{
		{"3", 14, "all"},
		{"3<right>", 4, "shop"},
		{"3<right><right><right>", 4, "pier/deck: workfaces follow the places"},
		{"3<left>", 5, "pier/hinge: the last value from all"},
		{"3<tab><right><right>", 6, "Tom"},
		{"3<tab><tab><right>", 2, "cut"},
		{"3<backtab><right>", 2, "Thursday 1 April"},
		{"3ines weld", 2, "every word of the search"},
		{"3<right>ines", 2, "filter and search together"},
		{"3TP-104", 1, "by drawing"},
		{"3<right>ines<esc>", 14, "Esc clears both"},
	} {
		m := New(fixture.Report())
		press(m, c.script, 80, 40)
		if got := len(m.top().place().lines); got != c.want {
			t.Errorf("%q (%s) leaves %d tasks, want %d:\n%s", c.script, c.name, got, c.want, strings.TrimSpace(shot(m.Rows(80, 40))))
		}
	}
}
