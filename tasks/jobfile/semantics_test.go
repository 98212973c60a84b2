package jobfile

import (
	"errors"
	"fmt"
	"os"
	"reflect"
	"strings"
	"testing"
	"testing/fstest"
	"time"

	"sailby/tasks"
	"sailby/tasks/hours"
)

// text gives testdata/minimal.yaml with some of its words replaced and more lines at its end.
func text(t *testing.T, more string, pairs ...string) []byte {
	t.Helper()
	data, err := os.ReadFile("testdata/minimal.yaml")
	if err != nil {
		t.Fatal(err)
	}
	s := string(data)
	for i := 0; i+1 < len(pairs); i += 2 {
		if !strings.Contains(s, pairs[i]) {
			t.Fatalf("minimal.yaml has no %q", pairs[i])
		}
		s = strings.Replace(s, pairs[i], pairs[i+1], 1)
	}
	return []byte(s + more)
}

func read(t *testing.T, data []byte) *tasks.Job {
	t.Helper()
	job, err := ReadBytes("job.yaml", data, os.DirFS("testdata"))
	if err != nil {
		t.Fatalf("%v\n%s", err, data)
	}
	return job
}

// refused wants one fault that says so.
func refused(t *testing.T, data []byte, says string) {
	t.Helper()
	job, err := ReadBytes("job.yaml", data, os.DirFS("testdata"))
	var all tasks.Faults
	if !errors.As(err, &all) || job != nil {
		t.Errorf("taken, want %q", says)
		return
	}
	if len(all) != 1 || !strings.Contains(all[0].Text, says) || all[0].Hint == "" {
		t.Errorf("got %v, want one fault with %q and a way out", err, says)
	}
}

func task(t *testing.T, job *tasks.Job, name string) *tasks.Task {
	t.Helper()
	for _, x := range job.Tasks {
		if x.Name == name {
			return x
		}
	}
	t.Fatalf("no task %q", name)
	return nil
}

func utcOf(t time.Time) hours.Minute { return hours.Of(t) }

func utc(s string) hours.Minute {
	at, err := time.Parse("2006-01-02 15:04", s)
	if err != nil {
		panic(err)
	}
	return hours.Of(at)
}

// The legs of the sketch's trip, by hand: sails 10:15 summer time is 09:15 UTC; 45 min check-in and
// 3 h 30 min drive before; 40 min drive and 1 h unloading after landing.
func TestTripWithBoat(t *testing.T) {
	job, err := Read("testdata/sketch.yaml")
	if err != nil {
		t.Fatal(err)
	}
	trip := job.Trips[0]
	for _, c := range []struct {
		what string
		got  hours.Minute
		want string
	}{
		{"leaves", trip.Leaves, "2027-04-05 05:00"}, {"arrives", trip.Arrives, "2027-04-05 12:45"},
		{"opens", trip.Opens, "2027-04-05 13:45"}, {"closes", trip.Closes, "2027-04-14 10:35"},
		{"departs", trip.Departs, "2027-04-14 12:05"}, {"home", trip.Home, "2027-04-14 19:50"},
	} {
		if c.got != utc(c.want) {
			t.Errorf("%s %s UTC, want %s", c.what, c.got.In(time.UTC).Format("2006-01-02 15:04"), c.want)
		}
	}
	var words []string
	for _, l := range append(trip.Out, trip.Back...) {
		words = append(words, l.What)
	}
	if got := strings.Join(words, ", "); got != "drive, check in, sail, drive to site, unload, load, drive to boat, check in, sail, drive home" {
		t.Errorf("legs are %s", got)
	}
	for _, legs := range [][]tasks.Leg{trip.Out, trip.Back} {
		for i := 1; i < len(legs); i++ {
			if legs[i].From != legs[i-1].To {
				t.Errorf("%s begins %d min after %s ends", legs[i].What, legs[i].From-legs[i-1].To, legs[i-1].What)
			}
		}
	}
	if len(job.Notes) != 2 || !strings.Contains(job.Notes[0].Text, "as long at sea as on the way out") || !strings.Contains(job.Notes[1].Text, "no allowance for pressure and surge") {
		t.Errorf("notes: %v", job.Notes)
	}
}

// Sailing times are local to where they happen. London to Oslo in summer: the clocks show an hour more than
// passes. The night of 2027-10-31, when the clocks go back at 01:00 UTC: they show an hour less.
func TestTripOverZonesAndClocks(t *testing.T) {
	for _, c := range []struct {
		site, out, back     string
		atSea               hours.Minute
		opens, closes, home string
	}{
		{"Europe/Oslo", "sail: 2027-04-05 10:00, land: 2027-04-05 20:00, unload: 30 min", "sail: 2027-04-14 20:00", 540,
			"2027-04-05 18:30", "2027-04-14 18:00", "2027-04-15 05:00"},
		{"Europe/London", "sail: 2027-10-30 22:30, land: 2027-10-31 07:00", "sail: 2027-11-05 20:00, land: 2027-11-06 05:00", 570,
			"2027-10-31 07:00", "2027-11-05 20:00", "2027-11-06 07:00"},
		{"Europe/Oslo", "sail: 2027-04-05 10:00, land: 2027-04-05 20:00, land zone: Europe/London", "sail: 2027-04-14 20:00, sail zone: UTC", 600,
			"2027-04-05 19:00", "2027-04-14 20:00", "2027-04-15 08:00"},
	} {
		job := read(t, text(t, "", "pier: {open", "pier: {zone: "+c.site+", open",
			"out: {leave: 2027-04-05 06:00, drive: 2 h}", "out: {drive: 2 h, "+c.out+"}", "back: {leave: 2027-04-14 12:00, drive: 2 h}", "back: {"+c.back+"}"))
		trip := job.Trips[0]
		for _, l := range trip.Out {
			if n := l.To - l.From; l.What == "sail" && n != c.atSea {
				t.Errorf("%s: %d min at sea, want %d", c.out, n, c.atSea)
			}
		}
		if trip.Opens != utc(c.opens) || trip.Closes != utc(c.closes) || trip.Home != utc(c.home) {
			t.Errorf("%s: opens %v, closes %v, home %v", c.out, trip.Opens.In(time.UTC), trip.Closes.In(time.UTC), trip.Home.In(time.UTC))
		}
	}
}

func TestTripOnTheRoad(t *testing.T) {
	job := read(t, text(t, "", "out: {leave: 2027-04-05 06:00, drive: 2 h}", "out: {arrive: 2027-04-05 09:00, drive: 2 h, drive to site: 15 min, unload: 20 min}",
		"back: {leave: 2027-04-14 12:00, drive: 2 h}", "back: {load: 30 min, leave: 2027-04-14 12:00, arrive: 2027-04-14 15:00, drive home: 2 h}"))
	trip := job.Trips[0]
	if trip.Leaves != utc("2027-04-05 05:45") || trip.Opens != utc("2027-04-05 08:20") || trip.Closes != utc("2027-04-14 10:30") || trip.Home != utc("2027-04-14 14:00") {
		t.Errorf("leaves %v opens %v closes %v home %v", trip.Leaves.In(time.UTC), trip.Opens.In(time.UTC), trip.Closes.In(time.UTC), trip.Home.In(time.UTC))
	}
	if last := trip.Back[len(trip.Back)-1]; last.What != "break" || last.To-last.From != 60 {
		t.Errorf("the last leg is %+v, want a break of an hour", last)
	}
	refused(t, text(t, "", "back: {leave: 2027-04-14 12:00, drive: 2 h}", "back: {leave: 2027-04-14 12:00, arrive: 2027-04-14 13:00, drive: 2 h}"), "1 h before the drive")
}

// R4: of a local time that happens twice the earlier is meant, and a note says so.
func TestClockChanges(t *testing.T) {
	job := read(t, text(t, "begin: 2027-10-31 01:30\n"))
	if len(job.Notes) != 1 || !strings.Contains(job.Notes[0].Text, "2027-10-31 01:30 happens twice in Europe/London; the earlier is meant") {
		t.Errorf("notes: %v", job.Notes)
	}
	refused(t, text(t, "begin: 2027-03-28 01:30\n"), "the clocks jump over it")
	refused(t, text(t, "", "out: {leave: 2027-04-05 06:00", "out: {leave: 2027-03-28 01:15"), "the clocks jump over it")
}

func TestRounds(t *testing.T) {
	job := read(t, text(t, `repeat:
  bay:
    count: 3
    first times: [1.5, 1.2]
    tasks:
      grind: {at: pier/deck, hours: 1 h, title: Grind out, after: [previous weld up, weld lugs]}
      weld up: {at: pier/deck, hours: 2 h, after: {grind: {min: 30 min}}}
`, "resin: {at: pier, standing: 12 h}", "resin: {at: pier, standing: 12 h, after: every weld up bay, finish after: grind bay 2}"))
	links := func(name string) string {
		var out []string
		for _, l := range task(t, job, name).Links {
			out = append(out, fmt.Sprintf("%s %d", l.Task, l.Min.Minutes))
		}
		return strings.Join(out, ", ")
	}
	for name, want := range map[string]string{
		"grind bay 1": "weld lugs 0", "grind bay 2": "weld up bay 1 0, weld lugs 0", "grind bay 3": "weld up bay 2 0, weld lugs 0",
		"weld up bay 2": "grind bay 2 30", "resin": "weld up bay 1 0, weld up bay 2 0, weld up bay 3 0, grind bay 2 0",
	} {
		if got := links(name); got != want {
			t.Errorf("%s is linked to %q, want %q", name, got, want)
		}
	}
	for i, want := range []float64{1.5, 1.2, 1.2} {
		x := task(t, job, fmt.Sprintf("grind bay %d", i+1))
		if x.Factor != want || x.Round != i+1 || x.Block != "bay" || x.Title != fmt.Sprintf("Grind out, bay %d", i+1) {
			t.Errorf("round %d: factor %v round %d block %q title %q", i+1, x.Factor, x.Round, x.Block, x.Title)
		}
	}
	refused(t, text(t, "repeat:\n  bay: {count: 2, tasks: {load: {at: pier, hours: 1}}}\n"), "is declared outside it as well")
	refused(t, text(t, "repeat:\n  bay: {count: 2, tasks: {a: {at: pier, hours: 1}}}\n", "weld lugs: {kind: weld", "a bay 2: {at: pier, hours: 1}\n  weld lugs: {kind: weld"), `two tasks are called "a bay 2"`)
	refused(t, text(t, "repeat:\n  bay: {count: 2, tasks: {a: {at: pier, hours: 1, after: previous b}}}\n"), `no task is called "previous b"`)
}

func TestLinkForms(t *testing.T) {
	job := read(t, text(t, "", "prime deck: {kind: plain, at: pier/deck, hours: 2 h}",
		"prime deck: {at: pier/deck, hours: 2 h, after start of: {load: {min: 2 working h, max: 1 d}}, finish after: load, finish after start of: weld lugs, starts with: resin}"))
	zero, day := tasks.Wait{}, 1440
	for i, want := range []struct {
		task     string
		from, to tasks.LinkEnd
		min      tasks.Wait
		max      *int
	}{
		{"load", tasks.Start, tasks.Start, tasks.Wait{Minutes: 120, Working: true}, &day},
		{"load", tasks.Finish, tasks.Finish, zero, nil},
		{"weld lugs", tasks.Start, tasks.Finish, zero, nil},
		{"resin", tasks.Start, tasks.Start, zero, new(int)},
	} {
		l := task(t, job, "prime deck").Links[i]
		l.Min.Pos = tasks.Pos{}
		if l.Task != want.task || l.From != want.from || l.To != want.to || l.Min != want.min || (l.Max == nil) != (want.max == nil) || l.Max != nil && l.Max.Minutes != *want.max {
			t.Errorf("link %d is %+v, want %+v", i+1, l, want)
		}
	}
}

// Starts that go with each other both ways are no contradiction; anything through a task is.
func TestCircles(t *testing.T) {
	read(t, text(t, "", "resin: {at: pier, standing: 12 h}", "resin: {at: pier, standing: 12 h, starts with: prime deck}", "prime deck: {kind: plain, at: pier/deck, hours: 2 h}", "prime deck: {at: pier/deck, hours: 2 h, starts with: resin}"))
	refused(t, text(t, "", "hours: 3}", "hours: 3, after start of: load}"), `links go round in a circle: "weld lugs" after start of "load", "load" after "weld lugs"`)
	refused(t, text(t, "", "hours: 3}", "hours: 3, after start of: {prime deck: {min: 5 min}}}", "prime deck: {kind: plain, at: pier/deck, hours: 2 h}",
		"prime deck: {at: pier/deck, hours: 2 h, after start of: weld lugs}"), "links go round in a circle")
}

func TestOrders(t *testing.T) {
	job := read(t, text(t, "orders:\n  - {either: [weld lugs before resin, load before resin], why: keep it dry}\n  - {not both: [weld lugs, prime deck], before: load}\n"))
	want := [][]tasks.Before{{{First: "weld lugs", Then: "resin"}, {First: "load", Then: "resin"}}, {{First: "load", Then: "weld lugs"}, {First: "load", Then: "prime deck"}}}
	for i, o := range job.Orders {
		if !reflect.DeepEqual(o.Choices, want[i]) {
			t.Errorf("order %d: %v, want %v", i+1, o.Choices, want[i])
		}
	}
	if job.Orders[0].Text != "keep it dry" || job.Orders[1].Text != "load before weld lugs, or load before prime deck" {
		t.Errorf("texts %q, %q", job.Orders[0].Text, job.Orders[1].Text)
	}
}

// By the calendar of 2027: Easter Sunday is 28 March; 2 January is a Saturday, so that Scotland's second
// day is kept on Monday the 4th; the Mondays of August begin with the 2nd and end with the 30th; 4 July is a Sunday.
func TestHolidays(t *testing.T) {
	closed := func(code string) map[hours.Date]string {
		job := read(t, text(t, "holidays: "+code+"\n", "shop: {open", "shop: {closed on holidays: yes, closed: [2027-04-09], open"))
		if len(job.Places[1].Closed) != 0 {
			t.Error("a place that does not say so is closed on holidays")
		}
		return job.Places[0].Closed
	}
	for _, c := range []struct {
		code string
		m    time.Month
		day  int
		want bool
	}{
		{"gb", 3, 29, true}, {"gb-sct", 3, 29, false}, {"gb", 8, 30, true}, {"gb-sct", 8, 30, false}, {"gb-sct", 8, 2, true},
		{"gb", 1, 4, false}, {"gb-sct", 1, 4, true}, {"gb", 3, 26, true}, {"gb-sct", 3, 26, true}, {"no", 5, 17, true}, {"us", 7, 5, true}, {"us", 7, 4, true},
		{"gb", 4, 9, true},
	} {
		if _, got := closed(c.code)[hours.Date{Year: 2027, Month: c.m, Day: c.day}]; got != c.want {
			t.Errorf("%s %d-%d: closed %v, want %v", c.code, c.m, c.day, got, c.want)
		}
	}
}

func TestLibraries(t *testing.T) {
	fsys := fstest.MapFS{
		"crew/one.yaml": {Data: []byte("procedures:\n  a: {process: 111}\n  b: {process: 111}\npaints:\n  p: {kind: bitumen}\nkit:\n  set: {count: 2}\n")},
		"two.yaml":      {Data: []byte("procedures:\n  b: {process: 135}\n  c: {process: 135}\n")},
		"bad.yaml":      {Data: []byte("tasks: {}\nprocedures:\n  b: {proces: 135}\n")},
	}
	data := text(t, "use: [crew/one.yaml, two.yaml]\nprocedures:\n  c: {process: 136}\nkit:\n  set: {count: 3}\n")
	job, err := ReadBytes("jobs/job.yaml", data, fsys)
	if err != nil {
		t.Fatal(err)
	}
	var got []string
	for _, p := range job.Procedures {
		got = append(got, fmt.Sprintf("%s %d %s", p.Name, int(p.Process), p.Pos.File))
	}
	if want := "a 111 jobs/crew/one.yaml, b 135 jobs/two.yaml, c 136 jobs/job.yaml"; strings.Join(got, ", ") != want {
		t.Errorf("procedures %v, want %s", got, want)
	}
	if len(job.Kit) != 1 || job.Kit[0].Count != 3 {
		t.Errorf("kit %+v", job.Kit)
	}
	_, err = ReadBytes("jobs/job.yaml", text(t, "use: bad.yaml\n"), fsys)
	var all tasks.Faults
	if !errors.As(err, &all) || len(all) != 2 || all[0].Pos != (tasks.Pos{File: "jobs/bad.yaml", Line: 1, Col: 1}) || all[1].Pos != (tasks.Pos{File: "jobs/bad.yaml", Line: 3, Col: 7}) {
		t.Errorf("faults of a library: %v", err)
	}
	for file, says := range map[string]string{"../up.yaml": "outside the folder", "/etc/x.yaml": "outside the folder", "a\\b.yaml": "backslash", "none.yaml": "no such file", "crew.txt": "not a .yaml file"} {
		refused(t, text(t, "use: ['"+file+"']\n"), says)
	}
}

// A link out of the folder is not followed.
func TestNoWayOutOfTheFolder(t *testing.T) {
	dir := t.TempDir()
	inside := dir + "/in"
	if err := os.Mkdir(inside, 0o755); err != nil {
		t.Fatal(err)
	}
	for file, data := range map[string]string{dir + "/house.yaml": "procedures: {a: {process: 111}}\n", inside + "/job.yaml": string(text(t, "use: link.yaml\n"))} {
		if err := os.WriteFile(file, []byte(data), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	if err := os.Symlink(dir+"/house.yaml", inside+"/link.yaml"); err != nil {
		t.Skip("no links here")
	}
	if job, err := Read(inside + "/job.yaml"); job != nil || err == nil || !strings.Contains(err.Error(), "link.yaml") {
		t.Errorf("job %v, error %v", job, err)
	}
}

func TestWeekdaysAndDays(t *testing.T) {
	job := read(t, text(t, "", "back: {leave: 2027-04-14 12:00", "back: {leave: 2027-04-10 12:00", "hours: 3}", "hours: 3, not before: Wed 10:15, must be done by: day 5 18:00}"))
	x := task(t, job, "weld lugs")
	if !x.NotBefore.ByName || x.NotBefore.Weekday != time.Wednesday || x.NotBefore.Minute != 615 || x.Deadline.Day != 5 || x.Deadline.Zone.String() != "Europe/London" {
		t.Errorf("not before %+v, deadline %+v", x.NotBefore, x.Deadline)
	}
	refused(t, text(t, "", "hours: 3}", "hours: 3, not before: day 4 08:00, must be done by: day 3 18:00}"), "it may not start before")
}

func TestApplyAndReadChanged(t *testing.T) {
	data := text(t, "# keep me\n")
	set := []tasks.Setting{{Path: []string{"tasks", "resin", "standing"}, Value: "1 h"}, {Path: []string{"trips/a/out/drive"}, Value: "3 h"},
		{Path: []string{"tasks", "load", "needs"}, Value: "{fitter: 1}"}}
	out, err := Apply(data, set)
	if err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(string(out), "# keep me") {
		t.Error("the comment is lost")
	}
	a := read(t, out)
	b, err := ReadBytesChanged("job.yaml", data, os.DirFS("testdata"), set)
	if err != nil {
		t.Fatal(err)
	}
	for _, job := range []*tasks.Job{a, b} {
		if task(t, job, "resin").Standing.Likely != 60 || job.Trips[0].Arrives != utc("2027-04-05 08:00") || len(task(t, job, "load").Needs) != 1 {
			t.Error("a change is not taken over")
		}
	}
	if got, want := task(t, b, "resin").Standing.Pos, task(t, read(t, data), "resin").Standing.Pos; got != want {
		t.Errorf("the changed value stands at %v, want %v", got, want)
	}
	if got, want := task(t, b, "prime deck").Pos, task(t, read(t, data), "prime deck").Pos; got != want {
		t.Errorf("a change moved a task from %v to %v", want, got)
	}
	if _, err := Apply(data, []tasks.Setting{{Path: []string{"tasks", "resim", "standing"}, Value: "1 h"}}); err == nil || !strings.Contains(err.Error(), `did you mean "resin"?`) {
		t.Errorf("error %v", err)
	}
}

func writeFile(name, data string) error { return os.WriteFile(name, []byte(data), 0o644) }
