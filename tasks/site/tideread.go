package site

import (
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"
	"time"

	"sailby/tasks/quantity"
)

const datumHint = `state it in the head, for instance "# datum: chart"`

// ReadTideTable reads a table of high and low waters: a head that states "# zone: UTC" and
// "# datum: chart" (any words for the datum), then rows "2027-04-05 10:33,3.66,HW" in order of
// time, HW and LW in turn. A row "time,height m,water" with the columns' names may come first;
// "height ft" there makes plain numbers feet. A height may carry its own unit. Heights are kept
// to the millimetre. Up to 10,000 rows and one megabyte; tides more than 16 h apart leave a hole
// and a note.
//
// Errors: Faults, all of the file's at once. No zone or no datum is always one.
func ReadTideTable(name string, r io.Reader) (*TideTable, error) {
	s := readSheet(name, r, "zone", "datum")
	z, zoned := s.zone()
	datum, _ := s.need("datum", datumHint)
	t := &TideTable{Name: name, Datum: datum.text, Zone: z.name}
	rows, unit := s.tideColumns()
	if !zoned {
		z = zone{"UTC", time.UTC} // to find the other faults
	}
	for _, r := range rows {
		w, note, ok := s.water(r, z, unit)
		if !ok {
			continue
		}
		if n := len(t.Waters); n > 0 && !s.follows(r, t.Waters[n-1], w) {
			continue
		}
		if note != "" {
			t.Notes = append(t.Notes, fmt.Sprintf("%s:%d: %s", name, r.line, note))
		}
		if n := len(t.Waters); n > 0 && w.At-t.Waters[n-1].At > longestTide {
			t.Notes = append(t.Notes, fmt.Sprintf("%s:%d: nothing is known of the %s before this water", name, r.line,
				quantity.Hours(int(w.At-t.Waters[n-1].At))))
		}
		t.Waters = append(t.Waters, w)
	}
	if len(t.Waters) < 2 && len(s.faults) == 0 {
		s.fault(max(s.last, 1), 1, "give a high and a low water at least", "%d waters make no tide", len(t.Waters))
	}
	if err := s.err(); err != nil {
		return nil, err
	}
	return t, nil
}

// tideColumns takes a first row of column names off, and gives the unit of plain heights.
func (s *sheet) tideColumns() (rows []row, unit string) {
	if len(s.rows) == 0 || !strings.EqualFold(s.rows[0].cells[0].text, "time") {
		return s.rows, "m"
	}
	unit = "m"
	if head := s.rows[0]; s.columns(head, 3, 3, "time,height m,water") {
		switch c := head.cells[1]; strings.ToLower(strings.Join(strings.Fields(c.text), " ")) {
		case "height", "height m":
		case "height ft":
			unit = "ft"
		default:
			s.fault(head.line, c.col, "call the columns time,height m,water or time,height ft,water",
				"column %s is not height m", short(c.text))
		}
		switch c := head.cells[2]; strings.ToLower(c.text) {
		case "water", "hw|lw", "hw/lw":
		default:
			s.fault(head.line, c.col, "call the columns time,height m,water", "column %s is not water", short(c.text))
		}
	}
	return s.rows[1:], unit
}

// water reads one row.
func (s *sheet) water(r row, z zone, unit string) (w Water, note string, ok bool) {
	if !s.columns(r, 3, 3, "time,height,HW or LW") {
		return w, "", false
	}
	at, note, problem := z.minute(r.cells[0].text)
	ok = true
	if problem != "" {
		s.fault(r.line, r.cells[0].col, timeHint, "%s", problem)
		ok = false
	}
	h, good := s.metres(r.line, r.cells[1], unit)
	high := strings.EqualFold(r.cells[2].text, "HW")
	if !high && !strings.EqualFold(r.cells[2].text, "LW") {
		s.fault(r.line, r.cells[2].col, "write HW for high water, LW for low water", "%s is neither HW nor LW",
			short(r.cells[2].text))
		ok = false
	}
	return Water{At: at, Metres: h, High: high, Line: r.line}, note, ok && good
}

// metres reads a height, plain numbers in the given unit.
func (s *sheet) metres(line int, c cell, unit string) (float64, bool) {
	mm, err := quantity.Parse(c.text, quantity.Length)
	if plain(c.text) {
		mm, err = quantity.Parse(c.text+" "+unit, quantity.Length)
	}
	if err != nil {
		s.fault(line, c.col, "write metres with a point, for instance 3.66", "%s is not a height", short(c.text))
		return 0, false
	}
	if m := math.Round(mm) / 1000; math.Abs(m) <= highest {
		return m + 0, true // + 0 turns a negative zero into zero
	}
	s.fault(line, c.col, "plain numbers are metres; write 12 ft for feet, 366 cm for centimetres",
		"height %s is beyond any tide (%g m)", short(c.text), highest)
	return 0, false
}

// plain says whether text is a decimal number without unit.
func plain(text string) bool {
	if strings.Trim(text, "+-.0123456789") != "" {
		return false
	}
	_, err := strconv.ParseFloat(text, 64)
	return err == nil
}

// follows checks that w may stand after the water before it.
func (s *sheet) follows(r row, last, w Water) bool {
	word := func(high bool) string {
		if high {
			return "HW"
		}
		return "LW"
	}
	switch rise := w.Metres - last.Metres; {
	case w.At <= last.At:
		s.fault(r.line, r.cells[0].col, "sort the rows by time; is the year or month right?",
			"%s is not after the water before it (line %d)",
			short(r.cells[0].text), last.Line)
	case w.At-last.At > longestTide:
		return true // a hole: what came before does not matter
	case w.High == last.High:
		s.fault(r.line, r.cells[2].col, fmt.Sprintf("add the %s between them", word(!w.High)), "%s follows %s (line %d)",
			word(w.High), word(last.High), last.Line)
	case w.High && rise < leastTide/2 || !w.High && rise > -leastTide/2:
		s.fault(r.line, r.cells[1].col, "check both heights and which is HW",
			"%s of %.3f m does not fit the %s of %.3f m before it (line %d)",
			word(w.High), w.Metres, word(last.High), last.Metres, last.Line)
	default:
		return true
	}
	return false
}

// Write writes the table as ReadTideTable reads it, in UTC and metres.
func (t *TideTable) Write(w io.Writer) error {
	var b strings.Builder
	if t.NotForSafety {
		b.WriteString("# not for safety: predicted from constants, not by an authority\n")
	}
	fmt.Fprintf(&b, "# zone: UTC\n# datum: %s\ntime,height m,water\n", t.Datum)
	for _, x := range t.Waters {
		kind := "LW"
		if x.High {
			kind = "HW"
		}
		fmt.Fprintf(&b, "%s,%.3f,%s\n", time.Unix(x.At*60, 0).UTC().Format("2006-01-02 15:04"), x.Metres, kind)
	}
	_, err := io.WriteString(w, b.String())
	return err
}
