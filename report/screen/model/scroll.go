package model

// scroll is the place in a list of lines that is longer than the screen: the line chosen, and the
// first one shown. A chosen line out of sight is not drawn and Enter does nothing.
type scroll struct {
	at, top int
	lines   []line // as last shown
	tall    int    // rows they were shown in
}

// show takes over the lines and the rows there are for them, and keeps the place inside them.
func (s *scroll) show(lines []line, tall int) {
	s.lines, s.tall = lines, max(tall, 1)
	s.top = max(min(s.top, len(lines)-s.tall), 0)
	if s.at >= len(lines) {
		s.at = len(lines) - 1
	}
	if s.chosen() < 0 {
		if first := s.find(s.top, s.top+s.tall, 1); first >= 0 {
			s.at = first
		}
	}
}

// chosen gives the line that Enter acts on, -1 if none is in sight.
func (s *scroll) chosen() int {
	if s.at < s.top || s.at >= s.top+s.tall || s.at < 0 || s.at >= len(s.lines) || s.lines[s.at].do == nil {
		return -1
	}
	return s.at
}

// find gives the first line from i towards end (not reached) that Enter acts on, else -1.
func (s *scroll) find(i, end, step int) int {
	for ; i != end && i >= 0 && i < len(s.lines); i += step {
		if s.lines[i].do != nil {
			return i
		}
	}
	return -1
}

// press moves for a key; false means that the key is none of these.
func (s *scroll) press(k Key) bool {
	switch k.Code {
	case Down:
		s.step(1)
	case Up:
		s.step(-1)
	case PageDown:
		s.page(s.tall - 1)
	case PageUp:
		s.page(1 - s.tall)
	case Home:
		s.top, s.at = 0, max(s.find(0, len(s.lines), 1), 0)
		if s.at >= s.tall {
			s.at = 0
		}
	case End:
		s.top = max(len(s.lines)-s.tall, 0)
		s.at = s.find(len(s.lines)-1, -1, -1)
	default:
		return false
	}
	return true
}

// step goes to the next line in sight that Enter acts on; where there is none, it scrolls.
func (s *scroll) step(d int) {
	from, end := max(s.at+1, s.top), min(s.top+s.tall, len(s.lines))
	if d < 0 {
		from, end = min(s.at-1, s.top+s.tall-1), s.top-1
	}
	if (end-from)*d > 0 {
		if i := s.find(from, end, d); i >= 0 {
			s.at = i
			return
		}
	}
	if top := s.top + d; top >= 0 && top+s.tall <= len(s.lines) {
		s.top = top
		edge := top
		if d > 0 {
			edge = top + s.tall - 1
		}
		if s.lines[edge].do != nil {
			s.at = edge
		}
	}
}

// page moves by n lines, the chosen line with it.
func (s *scroll) page(n int) {
	if n == 0 {
		n = 1
	}
	s.top = max(min(s.top+n, len(s.lines)-s.tall), 0)
	want := max(min(s.at+n, len(s.lines)-1), 0)
	want = max(min(want, s.top+s.tall-1), s.top)
	if i := s.find(want, s.top+s.tall, 1); i >= 0 {
		s.at = i
	} else if i := s.find(want, s.top-1, -1); i >= 0 {
		s.at = i
	}
}

// enter does what the chosen line does.
func (s *scroll) enter() Ask {
	if i := s.chosen(); i >= 0 {
		return s.lines[i].do()
	}
	return Ask{}
}

// rows draws the lines in sight in n columns, the chosen one behind ">"; always tall rows.
func (s *scroll) rows(n int) []Row {
	out := make([]Row, 0, s.tall)
	for i := s.top; i < s.top+s.tall; i++ {
		if i >= len(s.lines) {
			out = append(out, Row{})
			continue
		}
		l := s.lines[i]
		lead, mark := "  ", l.mark
		if i == s.chosen() {
			lead, mark = "> ", Chosen
		}
		out = append(out, Row{cut(lead+l.text, n), mark})
	}
	return out
}

// more says what lies out of sight: "12 rows above, 3 below"; "" if nothing.
func (s *scroll) more() string {
	above, below := s.top, max(len(s.lines)-s.top-s.tall, 0)
	switch {
	case above > 0 && below > 0:
		return count(above, "row") + " above, " + count(below, "row") + " below"
	case above > 0:
		return count(above, "row") + " above"
	case below > 0:
		return count(below, "row") + " below"
	}
	return ""
}
