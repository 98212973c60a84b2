package agenda

import (
	"fmt"
	"strings"

	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
	"sailby/weld"
)

// Amount says how much of what a step is, from the job file's own figures: "3.2 m of 6 mm
// fillet", "9.6 m2, primer", "frame, 410 kg"; "" where the file gives only hours.
func Amount(s *expand.Step) string {
	t := s.Task
	var parts []string
	add := func(format string, args ...any) { parts = append(parts, fmt.Sprintf(format, args...)) }
	switch t.Kind {
	case tasks.Weld:
		for _, seam := range t.Seams {
			add("%s", SeamWords(seam))
		}
	case tasks.Cut:
		if t.Length.Value > 0 {
			add("%s", metres(t.Length.Value))
		}
		if t.Thickness.Value > 0 {
			add("%s mm thick", origin.Trim(t.Thickness.Value))
		}
		if t.By != "" {
			add("by %s", t.By)
		}
	case tasks.Prep, tasks.Coat:
		if a, ok := Fact(s, "area"); ok {
			add("%s m2", origin.Trim(a.Value))
		} else if t.Area.Value > 0 {
			add("%s m2", origin.Trim(t.Area.Value))
		}
		if n := coatNumber(s); n > 0 && n <= len(t.Coats) {
			add("%s", t.Coats[n-1])
		}
		if len(t.Surface) > 0 {
			add("on %s", strings.Join(t.Surface, ", "))
		}
		if t.Grade != "" && t.Kind == tasks.Prep {
			add("to %s", t.Grade)
		}
	case tasks.Lift, tasks.Move:
		if t.Lifts != "" {
			add("%s", t.Lifts)
		}
		if m, ok := Fact(s, "mass"); ok {
			add("%s", m.Amount())
		} else if t.Mass.Value > 0 {
			add("%s kg", origin.Trim(t.Mass.Value))
		}
		if t.By != "" {
			add("by %s", t.By)
		}
		if t.To != nil {
			add("to %s", PlaceLabel(t.To))
		}
	case tasks.FitUp:
		if t.Joints > 0 {
			add("%d joints", t.Joints)
		}
	case tasks.Test:
		if t.By != "" {
			add("%s", t.By)
		}
	}
	return clean.Line(strings.Join(parts, ", "))
}

// SeamWords describes a seam as "3.2 m of 6 mm fillet PF".
func SeamWords(s tasks.Seam) string {
	j := s.Joint
	var what string
	switch {
	case j.Type == weld.Fillet && j.Leg > 0:
		what = origin.Trim(j.Leg) + " mm fillet"
	case j.Type == weld.Fillet && j.Throat > 0:
		what = "fillet a" + origin.Trim(j.Throat)
	case j.Thickness > 0:
		what = fmt.Sprintf("%s, %s mm", j.Type, origin.Trim(j.Thickness))
	default:
		what = j.Type.String()
	}
	if s.Position != 0 {
		what += " " + s.Position.String()
	}
	if j.BothSides {
		what += " both sides"
	}
	if j.Length > 0 {
		what = metres(j.Length) + " of " + what
	}
	return what
}

// Packs counts packages: "1 spool of 15 kg", "3 bottles of 10 m3".
func Packs(n int, packed string) string {
	if n == 1 {
		first, rest, _ := strings.Cut(packed, " ")
		packed = strings.TrimSpace(strings.TrimSuffix(first, "s") + " " + rest)
	}
	return fmt.Sprintf("%d %s", n, packed)
}

func metres(mm float64) string {
	if mm >= 1000 {
		return origin.Trim(mm/1000) + " m"
	}
	return origin.Trim(mm) + " mm"
}

// coatNumber gives the coat of a step named "coat 2", 0 for other steps.
func coatNumber(s *expand.Step) int {
	var n int
	if _, err := fmt.Sscanf(s.Name, "coat %d", &n); err != nil {
		return 0
	}
	return n
}

// CoatNumber gives the number of the coat that the step lays on, from 1; 0 if it lays none.
func CoatNumber(s *expand.Step) int {
	if s.Task.Kind != tasks.Coat || s.Class != expand.Hands {
		return 0
	}
	return coatNumber(s)
}

// Fact finds a figure of the step's estimate whose name begins with the word, first in the
// facts, then in the tree of its hours.
func Fact(s *expand.Step, word string) (found origin.Figure, ok bool) {
	visit := func(f origin.Figure, _ int) {
		if !ok && strings.HasPrefix(strings.ToLower(f.Name), word) {
			found, ok = f, true
		}
	}
	for _, f := range s.Estimate.Facts {
		f.Walk(visit)
	}
	s.Estimate.Figure.Walk(visit)
	return found, ok
}

// HandsOn writes the step's hands-on minutes with its range where it has one: "5 h 36 min (4 h
// to 6 h 40 min)".
func HandsOn(s *expand.Step) string {
	n := s.HandsOn
	if s.Class == expand.Clock {
		n = s.Clock
	}
	out := quantity.Hours(n)
	if r := s.Estimate.Range; r[0] != r[2] {
		out += fmt.Sprintf(" (%s to %s)", quantity.Hours(r[0]), quantity.Hours(r[2]))
	}
	return out
}
