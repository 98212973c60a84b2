package packlist

import (
	"encoding/csv"
	"fmt"
	"io"
	"strconv"
	"strings"

	"sailby/report/clean"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
)

// Day writes when an item is first needed: "2027-04-06 09:20" local to the site, "" where it is not
// known.
func (l *List) Day(m hours.Minute) string {
	if m == 0 || l.Zone == nil {
		return ""
	}
	return m.In(l.Zone).Format("2006-01-02 15:04")
}

var head = []string{"out", "group", "what", "amount", "mass kg", "first needed", "for", "job stops without it", "spare", "box", "vehicle", "house judgement", "back"}

// CSV writes the list as RFC 4180, one line for each item with columns to tick going out and
// coming back. Cells that a spreadsheet would take for a formula get a leading apostrophe.
func (l *List) CSV(w io.Writer) error {
	c := csv.NewWriter(w)
	c.UseCRLF = true
	if err := c.Write(head); err != nil {
		return err
	}
	for _, it := range l.Items {
		row := []string{"", string(it.Group), it.What, it.Amount, kilos(it.Mass), l.Day(it.Day), strings.Join(it.For, "; "),
			yes(it.Stops), it.Spare, it.Box, strings.Join(it.Where, "; "), yes(it.House), ""}
		for i := range row {
			row[i] = safe(clean.Line(row[i]))
		}
		if err := c.Write(row); err != nil {
			return err
		}
	}
	c.Flush()
	return c.Error()
}

func kilos(v float64) string {
	if v == 0 {
		return ""
	}
	return strconv.FormatFloat(v, 'f', 1, 64)
}

func yes(b bool) string {
	if b {
		return "yes"
	}
	return ""
}

func safe(s string) string {
	if s != "" && strings.ContainsRune("=+-@\t", rune(s[0])) {
		return "'" + s
	}
	return s
}

// Line writes what a vehicle's run comes to: "van, run 1: 840 kg of 890 kg".
func (v Vehicle) Line() string {
	s := fmt.Sprintf("%s, run %d: %s kg of %s kg", v.Name, v.Run, origin.Trim(v.Mass), origin.Trim(v.Payload))
	if v.Nose > 0 {
		s += fmt.Sprintf(", %s kg on the hitch", origin.Trim(v.Nose))
	}
	return s
}

// Line writes how a load is tied: "gate: 3 straps, sideways at sea governs (EN 12195-1:2010)".
func (s Straps) Line() string {
	if s.Count == 0 {
		return s.What + ": " + strings.Join(s.Notes, "; ")
	}
	return fmt.Sprintf("%s: %d straps over the top, %s governs (%s)", s.What, s.Count, s.Governs, s.Edition)
}
