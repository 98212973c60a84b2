package model

import (
	"errors"
	"slices"
	"strings"
	"testing"
	"unicode"

	"pgregory.net/rapid"

	"sailby/plan"
	"sailby/report/fixture"
	"sailby/tasks/hours"
)

// better is the fixture with every step at the site two hours earlier, from the second day on.
func better() *plan.Report {
	r := fixture.Report()
	a := r.Likely
	for i := range a.Plan.Steps {
		s := &a.Plan.Steps[i]
		if s.Start < fixture.Site(7, "00:00") {
			continue
		}
		s.Start, s.Finish = s.Start-120, s.Finish-120
		for k := range s.Pieces {
			s.Pieces[k] = hours.Span{From: s.Pieces[k].From - 120, To: s.Pieces[k].To - 120}
		}
	}
	a.Finish, a.InHand = a.Finish-120, a.InHand+120
	a.Deadlines[0].InHand += 120
	return r
}

// TestRowsLaw: whatever was pressed, the screen has exactly the rows asked for, none too wide,
// nothing hidden in them, and at most one row chosen.
func TestRowsLaw(t *testing.T) {
	pool := keys("<up><down><down><down><left><right><pgup><pgdn><home><end><enter><enter><enter><esc><tab><backtab><erase><del>1234566aw 3h[]")
	rapid.Check(t, func(t *rapid.T) {
		m := New(fixture.Report())
		for _, i := range rapid.SliceOfN(rapid.IntRange(0, len(pool)-1), 0, 25).Draw(t, "keys") {
			w, h := rapid.IntRange(1, 160).Draw(t, "width"), rapid.IntRange(1, 50).Draw(t, "height")
			rows := m.Rows(w, h)
			if len(rows) != h {
				t.Fatalf("%d rows, want %d", len(rows), h)
			}
			chosen := 0
			for _, r := range rows {
				if width(r.Text) > w {
					t.Fatalf("%d columns in %d: %q", width(r.Text), w, r.Text)
				}
				if strings.ContainsFunc(r.Text, func(c rune) bool { return unicode.IsControl(c) || c == '\u202e' }) {
					t.Fatalf("hidden characters in %q", r.Text)
				}
				if r.Mark == Chosen {
					chosen++
					if !strings.HasPrefix(r.Text, ">") {
						t.Fatalf("chosen without >: %q", r.Text)
					}
				}
			}
			if chosen > 1 {
				t.Fatalf("%d rows chosen", chosen)
			}
			if x, y, shown := m.Cursor(); shown && (x < 0 || x >= w || y < 3 || y >= h) {
				t.Fatalf("cursor at %d, %d of %d by %d", x, y, w, h)
			}
			ask := m.Press(pool[i])
			if ask.Plan && rapid.Bool().Draw(t, "answers") {
				m.Planned(ask.Run, better(), nil)
			}
		}
	})
}

// TestKeysShown: on every page the row of keys fits 80 columns and tells the way back.
func TestKeysShown(t *testing.T) {
	for _, script := range []string{"", "2", "3", "3lugs", "3<enter>", "4", "5", "5<enter>", "5<down><enter>", "5<enter><enter>", "<esc>", "5<down><enter><enter>"} {
		m := New(fixture.Report())
		press(m, script, 80, 24)
		rows := m.Rows(80, 24)
		last := rows[len(rows)-1].Text
		if strings.Contains(last, "…") || !strings.Contains(last, "Esc") {
			t.Errorf("after %q the keys are %q", script, last)
		}
	}
}

// TestEscGoesBack: from anywhere Esc leads to the window and then to the question; Esc there stays.
func TestEscGoesBack(t *testing.T) {
	for _, script := range []string{"2<enter>", "3lugs<tab><right><enter><end><enter>", "4<enter>", "5<enter><enter>9", "5<down><down><enter><enter>"} {
		m := New(fixture.Report())
		press(m, script, 80, 24)
		for i := 0; len(m.stack) > 1; i++ {
			if i > 8 {
				t.Fatalf("after %q Esc does not come back from %q", script, m.top().title())
			}
			press(m, "<esc>", 80, 24)
		}
		if ask := press(m, "<esc>", 80, 24); ask.Leave || m.top().title() != "Leave?" {
			t.Errorf("after %q Esc at the window gives %v, %q", script, ask, m.top().title())
		}
		if ask := press(m, "<esc>", 80, 24); ask.Leave || m.top().title() != "The window at a glance" {
			t.Errorf("after %q Esc at the question gives %v, %q", script, ask, m.top().title())
		}
		if ask := press(m, "<esc><enter>", 80, 24); !ask.Leave {
			t.Errorf("after %q Enter at the question does not leave", script)
		}
	}
	if ask := press(New(fixture.Report()), "3x<ctrl-c>", 80, 24); !ask.Leave {
		t.Error("Ctrl-C does not leave while typing")
	}
}

// TestDigitsWhileTyping: a digit is part of a search that has begun, else it turns the page.
func TestDigitsWhileTyping(t *testing.T) {
	m := New(fixture.Report())
	press(m, "3bay 2", 80, 24)
	if got := m.top().(*listPage).search.text(); got != "bay 2" {
		t.Errorf("search is %q", got)
	}
	press(m, "<esc>2", 80, 24)
	if _, ok := m.top().(*daysPage); !ok {
		t.Errorf("2 turned to %q", m.top().title())
	}
}

// TestStaleRun: the result of a run that was stopped or replaced is left aside.
func TestStaleRun(t *testing.T) {
	m := New(fixture.Report())
	first := press(m, "5<down><enter><enter>", 80, 24)
	if !first.Plan || len(first.Sets) != 1 || !m.what.running {
		t.Fatalf("the change asks for %+v", first)
	}
	second := press(m, "<home><down><enter><down><enter>", 80, 24)
	if !second.Plan || len(second.Sets) != 2 || second.Run == first.Run {
		t.Fatalf("the second change asks for %+v", second)
	}
	m.Planned(first.Run, better(), nil)
	if m.tried != nil || !m.what.running {
		t.Error("the result of the replaced run was taken")
	}
	if ask := press(m, "<esc>", 80, 24); !ask.Stop || len(m.stack) != 2 {
		t.Errorf("Esc gives %+v on page %q", ask, m.top().title())
	}
	m.Planned(second.Run, better(), nil)
	if m.tried != nil || m.what.running {
		t.Error("the result of the stopped run was taken")
	}
}

// TestTakeBack: without changes the plan of the file is shown again and the run ends.
func TestTakeBack(t *testing.T) {
	m := New(fixture.Report())
	ask := press(m, "5<down><enter><enter>", 80, 24)
	m.Planned(ask.Run, better(), nil)
	press(m, "<down><enter>", 80, 24)
	if m.shown != m.tried || m.tried == nil {
		t.Fatal("the tried plan is not shown")
	}
	if ask := press(m, "<up><enter>", 80, 24); !ask.Stop || ask.Plan || m.shown != m.file || m.tried != nil || len(m.Tried()) != 0 {
		t.Errorf("taking the change back gives %+v, tried %v", ask, m.Tried())
	}
}

// TestPlannedNothing: a planner that gives neither a plan nor an error is told as an error.
func TestPlannedNothing(t *testing.T) {
	m := New(fixture.Report())
	ask := press(m, "5<down><enter><enter>", 80, 24)
	m.Planned(ask.Run, &plan.Report{}, nil)
	if m.what.err == nil || m.tried != nil {
		t.Error("an empty report was taken")
	}
	ask = press(m, "<down><enter>", 80, 24) // plan again
	if !ask.Plan {
		t.Fatalf("plan again asks for %+v", ask)
	}
	m.Planned(ask.Run, nil, errors.New("no \x1b[31mdisk"))
	if s := shot(m.Rows(80, 24)); !strings.Contains(s, "Could not plan again: no disk") {
		t.Errorf("the error is not told:\n%s", s)
	}
}

// TestBasis: 6 goes through the answers that the report holds, and back to the first.
func TestBasis(t *testing.T) {
	m := New(fixture.Report())
	var got []string
	for range 4 {
		got = append(got, m.basis.String())
		press(m, "6", 80, 24)
	}
	if want := []string{"likely", "every maybe", "high end", "likely"}; !slices.Equal(got, want) {
		t.Errorf("6 gives %q, want %q", got, want)
	}
	r := fixture.Report()
	r.Maybes, r.High = nil, nil
	m = New(r)
	if press(m, "6", 80, 24); m.basis != likely {
		t.Errorf("6 gives %s where there is one answer", m.basis)
	}
}

// TestOutsiderJoinsTheDay: a shift that is part of another is put into it, with its people.
func TestOutsiderJoinsTheDay(t *testing.T) {
	m := New(fixture.Report())
	for i, s := range m.shifts() {
		for k, o := range m.shifts() {
			if i != k && s.Site == o.Site && holds(s, o) {
				t.Errorf("shift %d is part of shift %d", k, i)
			}
		}
	}
}
