package export

import (
	"bytes"
	"encoding/csv"
	"errors"
	"strings"
	"testing"
	"time"
	"unicode/utf8"

	ics "github.com/arran4/golang-ical"

	"sailby/report/agenda"
	"sailby/report/fixture"
	"sailby/tasks/expand"
)

func calendar(t *testing.T, o Options) string {
	t.Helper()
	var b bytes.Buffer
	if err := Calendar(&b, fixture.Report(), o); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

func TestCalendarIsLawful(t *testing.T) {
	s := calendar(t, Options{})
	if strings.Count(s, "\n") != strings.Count(s, "\r\n") {
		t.Error("a line does not end with CR LF")
	}
	for _, l := range strings.Split(s, "\r\n") {
		if len(l) > 75 || !utf8.ValidString(l) {
			t.Errorf("line of %d octets, valid UTF-8 %v: %q", len(l), utf8.ValidString(l), l) // RFC 5545, 3.1
		}
		if strings.ContainsAny(l, "\r\n\x1b\u202e") {
			t.Errorf("control character in %q", l)
		}
	}
}

func TestCalendarHoldsEveryPiece(t *testing.T) {
	r := fixture.Report()
	want := 0
	for _, e := range agenda.Worked(r.Likely) {
		want += max(len(e.People), 1)
	}
	cal, err := ics.ParseCalendar(strings.NewReader(calendar(t, Options{})))
	if err != nil {
		t.Fatal(err)
	}
	uids := map[string]bool{}
	for _, e := range cal.Events() {
		uids[e.Id()] = true
	}
	if len(cal.Events()) != want || len(uids) != want {
		t.Fatalf("%d events, %d UIDs, want %d of each", len(cal.Events()), len(uids), want)
	}
}

// TestCalendarTimes: Oslo is at UTC+2 and the pier at UTC+1 in April.
func TestCalendarTimes(t *testing.T) {
	s := calendar(t, Options{Person: "Ines"})
	for _, want := range []string{
		"DTSTART:20270401T060000Z", // cut plate, 08:00 in Oslo
		"DTSTART:20270406T073000Z", // cut out old lugs, 08:30 at the pier
		"SUMMARY:Ines: cut out old lugs",
		"LOCATION:Tarskay pier\\, hinge",
		"DTSTAMP:20270406T060000Z", // the window opens
	} {
		if !strings.Contains(s, want+"\r\n") {
			t.Errorf("no %q in the calendar", want)
		}
	}
	if strings.Contains(s, "SUMMARY:Tom") {
		t.Error("Tom is in Ines's calendar")
	}
}

func TestCalendarByTask(t *testing.T) {
	cal, err := ics.ParseCalendar(strings.NewReader(calendar(t, Options{Tasks: true})))
	if err != nil {
		t.Fatal(err)
	}
	// 14 tasks, of which "rot found" does not happen on likely hours.
	if n := len(cal.Events()); n != 13 {
		t.Errorf("%d events, want 13", n)
	}
	for _, e := range cal.Events() {
		if p := e.GetProperty(ics.ComponentPropertySummary); strings.Contains(p.Value, "weld lugs") {
			from, _ := e.GetStartAt()
			to, _ := e.GetEndAt()
			if !from.Equal(time.Date(2027, 4, 7, 8, 30, 0, 0, time.UTC)) || !to.Equal(time.Date(2027, 4, 8, 8, 40, 0, 0, time.UTC)) {
				t.Errorf("weld lugs from %v to %v", from, to)
			}
		}
	}
}

func TestSameBytes(t *testing.T) {
	first, second := calendar(t, Options{}), calendar(t, Options{})
	if first != second {
		t.Error("two exports differ")
	}
	moved := fixture.Report()
	for i := range moved.Likely.Plan.Steps {
		for k := range moved.Likely.Plan.Steps[i].Pieces {
			moved.Likely.Plan.Steps[i].Pieces[k].From += 5
		}
	}
	var b bytes.Buffer
	if err := Calendar(&b, moved, Options{}); err != nil {
		t.Fatal(err)
	}
	uids := func(s string) (out []string) {
		for _, l := range strings.Split(s, "\r\n") {
			if strings.HasPrefix(l, "UID:") {
				out = append(out, l)
			}
		}
		return out
	}
	if got, want := strings.Join(uids(b.String()), " "), strings.Join(uids(calendar(t, Options{})), " "); got != want {
		t.Error("a plan five minutes later has other UIDs: it would stand beside the old one")
	}
}

func TestCSV(t *testing.T) {
	r := fixture.Report()
	for _, task := range r.Job.Tasks {
		if task.Name == "drill anchors" {
			task.Name, task.Title = "=2+5", "@SUM(1)\r\n-1"
		}
	}
	var b bytes.Buffer
	if err := CSV(&b, r, Options{}); err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(&b).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	found := false
	for i, row := range rows {
		if len(row) != len(Head) {
			t.Fatalf("row %d has %d fields, want %d", i, len(row), len(Head))
		}
		for _, f := range row {
			if f != "" && strings.ContainsRune("=+-@\t\r", rune(f[0])) {
				t.Errorf("row %d: field %q would run as a formula", i, f)
			}
		}
		if row[5] == "'=2+5" && row[6] == "'@SUM(1) -1" && row[0] == "2027-04-06T07:50:00+01:00" && row[2] == "280" {
			found = true
		}
	}
	if !found {
		t.Error("the piece of 07:50 to 12:30 is not there as it should be")
	}
}

func TestCSVMarksWatches(t *testing.T) {
	var b bytes.Buffer
	if err := CSV(&b, fixture.Report(), Options{Person: "Tom"}); err != nil {
		t.Fatal(err)
	}
	if want := "2027-04-06T11:00:00+01:00,2027-04-06T12:00:00+01:00,60,Tom,Tom,cut out old lugs,fire watch after cut out old lugs,cut,cut,pier,hinge,\"1.9 m, 16 mm thick, by oxy-fuel\",yes\r\n"; !strings.Contains(b.String(), want) {
		t.Errorf("no row %q in\n%s", want, b.String())
	}
}

func TestNoPlan(t *testing.T) {
	for name, err := range map[string]error{
		"calendar at the high end": Calendar(&bytes.Buffer{}, fixture.Report(), Options{End: expand.High}),
		"CSV at the high end":      CSV(&bytes.Buffer{}, fixture.Report(), Options{End: expand.High}),
		"no report":                CSV(&bytes.Buffer{}, nil, Options{}),
	} {
		if !errors.Is(err, ErrNoPlan) {
			t.Errorf("%s: %v, want ErrNoPlan", name, err)
		}
	}
}

type full struct{}

func (full) Write([]byte) (int, error) { return 0, errors.New("disk full") }

func TestWriteErrors(t *testing.T) {
	if err := CSV(full{}, fixture.Report(), Options{}); err == nil {
		t.Error("CSV hides that the disk is full")
	}
	if err := Calendar(full{}, fixture.Report(), Options{}); err == nil {
		t.Error("the calendar hides that the disk is full")
	}
}
