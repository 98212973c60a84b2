package site

import (
	"fmt"
	"io"
	"slices"
	"strings"
	"unicode/utf8"

	"sailby/tasks/quantity"
)

const (
	maxBytes  = 1 << 20 // a tide table of 10,000 rows is a third of this
	maxRows   = 10000
	maxFaults = 20 // more than this is the wrong kind of file
)

// Fault is one thing wrong in a file: where it stands, what is wrong in the writer's own words,
// and a way out (Hint).
type Fault struct {
	File          string
	Line, Col     int // from 1; columns count characters
	Problem, Hint string
}

// Unwrap gives the fault without its place, for quantity.Hint.
func (f *Fault) Unwrap() error { return &quantity.Error{Problem: f.Problem, Hint: f.Hint} }

// Error gives "file:line:col: problem", and the way out on a second line.
func (f *Fault) Error() string {
	s := fmt.Sprintf("%s:%d:%d: %s", f.File, f.Line, f.Col, f.Problem)
	if f.Hint != "" {
		s += "\n  try: " + f.Hint
	}
	return s
}

// Faults are all the things wrong in one file, sorted by position.
type Faults []*Fault

// Error gives each fault on its own lines.
func (fs Faults) Error() string {
	lines := make([]string, len(fs))
	for i, f := range fs {
		lines[i] = f.Error()
	}
	return strings.Join(lines, "\n")
}

// cell is one field of a row, with the column it starts at.
type cell struct {
	text string
	col  int
}

type row struct {
	line  int
	cells []cell
}

// sheet is a small CSV file: head lines "# key: value", then rows. Fields hold no commas, so
// that quotes are only stripped.
type sheet struct {
	name   string
	head   map[string]cell
	lines  map[string]int // line of each head key
	rows   []row
	faults Faults
	last   int // number of the last line
}

func (s *sheet) fault(line, col int, hint, format string, args ...any) {
	s.faults = append(s.faults, &Fault{s.name, line, col, fmt.Sprintf(format, args...), hint})
}

// err gives the faults found so far, sorted, or nil.
func (s *sheet) err() error {
	if len(s.faults) == 0 {
		return nil
	}
	slices.SortStableFunc(s.faults, func(a, b *Fault) int {
		if a.Line != b.Line {
			return a.Line - b.Line
		}
		return a.Col - b.Col
	})
	if n := len(s.faults); n > maxFaults {
		s.faults = s.faults[:maxFaults]
		s.fault(s.faults[maxFaults-1].Line, 1, "mend these first; perhaps it is another kind of file",
			"and %d more faults", n-maxFaults)
	}
	return s.faults
}

// readSheet reads the head keys asked for and all rows; other "#" lines are comments. It stops
// at a megabyte or 10,000 rows.
func readSheet(name string, r io.Reader, keys ...string) *sheet {
	s := &sheet{name: name, head: map[string]cell{}, lines: map[string]int{}}
	data, err := io.ReadAll(io.LimitReader(r, maxBytes+1))
	switch {
	case err != nil:
		s.fault(1, 1, "", "cannot be read: %v", err)
		return s
	case len(data) > maxBytes:
		s.fault(1, 1, "cut it down to the weeks of the job", "is larger than %d kB", maxBytes>>10)
		return s
	case !utf8.Valid(data):
		s.fault(1, 1, "save it again as plain text (CSV, UTF-8)", "is not plain UTF-8 text")
		return s
	}
	text := strings.TrimPrefix(string(data), "\ufeff")
	for i, line := range strings.Split(text, "\n") {
		n := i + 1
		line = strings.TrimRight(line, "\r")
		trim := strings.TrimSpace(line)
		if trim == "" {
			continue
		}
		s.last = n
		if strings.HasPrefix(trim, "#") {
			s.headLine(n, line, keys)
			continue
		}
		if len(s.rows) == maxRows+1 {
			s.fault(n, 1, "cut it down to the weeks of the job", "more than %d rows", maxRows)
			return s
		}
		s.rows = append(s.rows, row{n, cells(line)})
	}
	return s
}

func (s *sheet) headLine(n int, line string, keys []string) {
	body := line[strings.IndexByte(line, '#')+1:]
	key, value, ok := strings.Cut(body, ":")
	key = strings.ToLower(strings.TrimSpace(key))
	if !ok || !slices.Contains(keys, key) {
		return
	}
	col := utf8.RuneCountInString(line[:len(line)-len(strings.TrimLeft(value, " \t"))]) + 1
	if at, dup := s.lines[key]; dup {
		s.fault(n, col, "", "%s is stated a second time, first in line %d", key, at)
		return
	}
	if len(s.rows) > 0 {
		s.fault(n, col, "move it above the rows", "%s stands below the first row", key)
	}
	s.head[key], s.lines[key] = cell{strings.TrimSpace(value), col}, n
}

func cells(line string) []cell {
	var out []cell
	at := 1
	for _, f := range strings.Split(line, ",") {
		text := strings.TrimSpace(f)
		col := at + utf8.RuneCountInString(f) - utf8.RuneCountInString(strings.TrimLeft(f, " \t"))
		if len(text) > 1 && text[0] == '"' && text[len(text)-1] == '"' {
			text, col = strings.TrimSpace(text[1:len(text)-1]), col+1
		}
		out = append(out, cell{text, col})
		at += utf8.RuneCountInString(f) + 1
	}
	return out
}

// need gives a head value that must be there.
func (s *sheet) need(key, hint string) (cell, bool) {
	c, ok := s.head[key]
	switch {
	case !ok:
		s.fault(1, 1, hint, "does not state its %s", key)
	case c.text == "" || strings.ContainsAny(c.text, "?") || strings.EqualFold(c.text, "unknown"):
		s.fault(s.lines[key], c.col, hint, "%s %q says nothing", key, c.text)
		ok = false
	}
	return c, ok
}

// columns checks that a row has from least to most fields.
func (s *sheet) columns(r row, least, most int, what string) bool {
	n := len(r.cells)
	if n >= least && n <= most {
		return true
	}
	hint := "write " + what
	switch {
	case strings.Contains(r.cells[0].text, ";"):
		hint += ", with commas between and points in numbers"
	case n > most:
		hint += "; numbers have a point, not a comma"
	}
	s.fault(r.line, r.cells[min(n, most+1)-1].col, hint, "%d fields where %s was expected", n, fieldCount(least, most))
	return false
}

func fieldCount(least, most int) string {
	if least == most {
		return fmt.Sprintf("%d", least)
	}
	return fmt.Sprintf("%d to %d", least, most)
}

// short quotes the person's own word, cut if it is very long.
func short(text string) string {
	const most = 40
	if r := []rune(text); len(r) > most {
		text = string(r[:most]) + "..."
	}
	return fmt.Sprintf("%q", text)
}
