package model

import (
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"sailby/report/fixture"
	"sailby/tasks"
)

var update = flag.Bool("update", false, "write the golden screens anew")

// keys are the keys of a script: words in angle brackets, else letters.
func keys(script string) []Key {
	names := map[string]Code{"up": Up, "down": Down, "left": Left, "right": Right, "pgup": PageUp, "pgdn": PageDown, "home": Home,
		"end": End, "enter": Enter, "esc": Back, "tab": Next, "backtab": Prev, "erase": Erase, "del": Delete, "ctrl-c": Away}
	var out []Key
	for script != "" {
		if name, rest, ok := strings.Cut(script, ">"); ok && script[0] == '<' {
			if code, known := names[name[1:]]; known {
				out, script = append(out, Key{Code: code}), rest
				continue
			}
		}
		r := []rune(script)[0]
		out, script = append(out, Key{Letter, r}), script[len(string(r)):]
	}
	return out
}

// press presses the keys of a script, drawing in between as a screen does, and gives the last ask
// that asked for something.
func press(m *Model, script string, w, h int) Ask {
	var last Ask
	m.Rows(w, h)
	for _, k := range keys(script) {
		if a := m.Press(k); a.Leave || a.Plan || a.Stop {
			last = a
		}
		m.Rows(w, h)
	}
	return last
}

// shot writes the rows as text; rows that stand out are marked at their end.
func shot(rows []Row) string {
	var b strings.Builder
	for _, r := range rows {
		b.WriteString(strings.TrimRight(r.Text, " ") + "\n")
	}
	return b.String()
}

// TestScreens holds whole screens against the golden ones.
func TestScreens(t *testing.T) {
	for _, c := range []struct {
		name, script string
		w, h         int
	}{
		{"window", "", 80, 24},
		{"window-end", "<end>", 80, 24},
		{"window-wide", "", 140, 40},
		{"window-late", "6", 80, 24},
		{"window-proof", "66<pgdn>", 80, 24},
		{"days", "2", 80, 24},
		{"days-next", "2<right><down><down>", 80, 24},
		{"days-wide", "2<right>", 140, 40},
		{"days-of-no-plan", "662", 80, 24},
		{"tasks", "3", 80, 24},
		{"tasks-wide", "3", 140, 40},
		{"tasks-search", "3lugs", 80, 24},
		{"tasks-filter", "3<tab><tab><right><right>", 80, 24},
		{"tasks-none", "3zz", 80, 24},
		{"task", "3weld lugs<enter>", 80, 24},
		{"task-end", "3weld lugs<enter><end>", 80, 24},
		{"task-wide", "3weld lugs<enter>", 140, 40},
		{"governs", "4", 80, 24},
		{"governs-late", "46", 80, 24},
		{"governs-proof", "466", 80, 24},
		{"what-if", "5", 80, 24},
		{"what-if-whom", "5<down><enter>", 80, 24},
		{"what-if-hours", "5<enter>weld lugs<enter>3 to 5 h", 80, 24},
		{"what-if-hours-wrong", "5<enter>weld lugs<enter>3 bananas<enter>", 80, 24},
		{"what-if-running", "5<down><enter><enter>", 80, 24},
		{"leave", "<esc>", 80, 24},
		{"leave-with-changes", "5<down><enter><enter><esc><esc><esc>", 80, 24},
		{"small", "3", 40, 12},
		{"too-small", "3", 39, 5},
	} {
		t.Run(c.name, func(t *testing.T) {
			m := New(fixture.Report())
			press(m, c.script, c.w, c.h)
			golden(t, c.name, shot(m.Rows(c.w, c.h)))
		})
	}
}

// TestOutcomes holds the what-if page with its results against the golden ones.
func TestOutcomes(t *testing.T) {
	for _, c := range []struct {
		name, script string
		finish       func(m *Model, run int)
	}{
		{"outcome-better", "", func(m *Model, run int) { m.Planned(run, better(), nil) }},
		{"outcome-shown", "<down><enter>1", func(m *Model, run int) { m.Planned(run, better(), nil) }},
		{"outcome-no-plan", "", func(m *Model, run int) {
			r := fixture.Report()
			r.Likely = r.High
			m.Planned(run, r, nil)
		}},
		{"outcome-faults", "", func(m *Model, run int) {
			m.Planned(run, nil, tasks.Faults{{Text: `tickets: nobody has the ticket "weld"`, Hint: "give somebody this ticket under `people`"}})
		}},
		{"outcome-stopped", "<esc>", func(*Model, int) {}},
	} {
		t.Run(c.name, func(t *testing.T) {
			m := New(fixture.Report())
			ask := press(m, "5<down><enter><enter>", 80, 24)
			c.finish(m, ask.Run)
			press(m, c.script, 80, 24)
			golden(t, c.name, shot(m.Rows(80, 24)))
		})
	}
}

func golden(t *testing.T, name, got string) {
	t.Helper()
	path := filepath.Join("testdata", name+".txt")
	if *update {
		if err := os.WriteFile(path, []byte(got), 0o644); err != nil {
			t.Fatal(err)
		}
		return
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if got != string(want) {
		t.Errorf("the screen is\n%s\nwant\n%s\n(go test ./report/screen/model -update writes it anew)", got, want)
	}
}
