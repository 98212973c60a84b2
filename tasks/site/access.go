package site

import (
	"fmt"
	"io"
	"strings"
	"time"

	"sailby/tasks/quantity"
)

// Access is a list of times in which a place can be reached, as a harbour master, a road
// authority or somebody with local knowledge gives it. Outside the times it is shut: so a list must
// run to the end of the job.
type Access struct {
	Name  string
	Zone  string
	Open  []Span // sorted, not overlapping
	Notes []string
}

// ReadReach reads access times given as they are: a head that states "# zone: Europe/London",
// then rows "from,to" with date and time, in order. A row "from,to" with the columns' names may
// come first, and a third field may say why in words (a tide, a name). Up to 10,000 rows.
//
// Errors: Faults, all of the file's at once. No zone is always one.
func ReadReach(name string, r io.Reader) (*Access, error) {
	s := readSheet(name, r, "zone")
	z, zoned := s.zone()
	if !zoned {
		z = zone{"UTC", time.UTC} // to find the other faults
	}
	a := &Access{Name: name, Zone: z.name}
	rows := s.rows
	if len(rows) > 0 && strings.EqualFold(rows[0].cells[0].text, "from") {
		rows = rows[1:]
	}
	for _, r := range rows {
		if !s.columns(r, 2, 3, "from,to") {
			continue
		}
		var ends [2]Minute
		good := true
		for i := range ends {
			m, note, problem := z.minute(r.cells[i].text)
			if problem != "" {
				s.fault(r.line, r.cells[i].col, timeHint, "%s", problem)
				good = false
			}
			if note != "" {
				a.Notes = append(a.Notes, fmt.Sprintf("%s:%d: %s", name, r.line, note))
			}
			ends[i] = m
		}
		if !good {
			continue
		}
		a.add(s, r, ends)
	}
	if len(a.Open) == 0 && len(s.faults) == 0 {
		s.fault(max(s.last, 1), 1, "give a row for each access time, from,to", "no access time")
	}
	if err := s.err(); err != nil {
		return nil, err
	}
	return a, nil
}

func (a *Access) add(s *sheet, r row, ends [2]Minute) {
	from, to := ends[0], ends[1]
	if from >= to {
		s.fault(r.line, r.cells[1].col, "write the earlier time first; a night ends on the next date", "%s is not after %s",
			short(r.cells[1].text), short(r.cells[0].text))
		return
	}
	span := Span{From: from, To: to}
	if len(r.cells) == 3 {
		span.Why = r.cells[2].text
	}
	if n := len(a.Open); n > 0 && from < a.Open[n-1].To {
		s.fault(r.line, r.cells[0].col, "sort the rows by time and join times that overlap",
			"%s is before the end of the access before it, %s later",
			short(r.cells[0].text), quantity.Span(int(a.Open[n-1].To-from)))
		return
	}
	a.Open = append(a.Open, span)
}

// Reach gives the access times within [from, to).
func (a *Access) Reach(from, to Minute) []Span { return clip(a.Open, from, to) }

// Shut gives the rest of [from, to), each span with the reason in words; beyond either end of
// the list the reason says so.
func (a *Access) Shut(from, to Minute) []Span {
	if len(a.Open) == 0 || from >= to {
		return nil
	}
	first, last := a.Open[0].From, a.Open[len(a.Open)-1].To
	return gaps(a.Open, from, to, func(from, to Minute) string {
		switch {
		case to <= first:
			return fmt.Sprintf("before the first access time in %s (%s)", a.Name, moment(first))
		case from >= last:
			return fmt.Sprintf("after the last access time in %s (%s)", a.Name, moment(last))
		}
		return "no access by " + a.Name
	})
}
