package jobfile

import (
	"fmt"
	"os"
	"strings"
	"testing"
	"time"

	"gopkg.in/yaml.v3"
	"pgregory.net/rapid"

	"sailby/tasks"
	"sailby/tasks/quantity"
)

func TestSource(t *testing.T) {
	good := string(text(t, ""))
	read(t, []byte("\ufeff"+good))
	read(t, []byte(strings.ReplaceAll(good, "\n", "\r\n")))
	read(t, []byte("---\n"+good+"...\n"))
	for _, c := range []struct{ data, says string }{
		{"\xff\xfej\x00o\x00", "UTF-16"},
		{"\xfe\xff\x00j", "UTF-16"},
		{"job: caf\xe9\n", "not UTF-8 (0xe9)"},
		{"job: a\rb\n", "carriage return"},
		{"job: a\u2028b\n", "U+2028"},
		{"job: \"a\\u202eb\"\n" + good[strings.Index(good, "zone"):], "U+202E"},
		{strings.Repeat("#", maxBytes+1), "at most 1024 kB"},
		{"job: " + strings.Repeat("[", 30) + strings.Repeat("]", 30) + "\n", "nested more than"},
		{"job: " + strings.Repeat("[", 20000), "nested too deep"},
		{"", "the file is empty"}, {"~", "the file is empty"}, {"[a]", "expected keys with values, found a list"}, {"just words", "expected keys with values"},
		{"? [a, b]\n: c\n", "a key is a list or a mapping"}, {"~: c\n", "a key is empty"},
		{"job: *x\n", "stands for an alias"}, {"job: &x y\n", "&x is an anchor"}, {"<<: {a: b}\n", "<< merges"}, {"job: !mine x\n", "is a tag"},
		{"job: \"open\n", "a quoted text does not end"}, {"job: x\n  zone: y\n", "a second colon"}, {"job: @x\n", "no text may begin with"},
		{"job: x\n---\njob: y\n", "a second document"}, {"job: x\ntasks:\n  " + strings.Repeat("k", 10000) + ": {hours: 1 h}\n", "3:1: a key of more than 1024 letters"}, {"a: b\n c\nd\n", "a key without its colon"}, {"job: \"\\q\"\n", "unknown \\ sign"},
	} {
		job, err := ReadBytes("job.yaml", []byte(c.data), nil)
		if job != nil || err == nil || !strings.Contains(err.Error(), c.says) {
			t.Errorf("%.40q: %v, want %q", c.data, err, c.says)
		}
	}
}

// All faults of a file come at once, in order, each at its own value.
func TestAllFaultsAtOnce(t *testing.T) {
	_, err := ReadBytes("job.yaml", text(t, "colour: red\n", "people: 2", "people: two", "drive: 2 h", "drive: 2", "hours: 3}", "hours: 3 mm, afer: load}", "standing: 12 h", "standing: 12"), nil)
	want := []string{"6:62", "8:66", "12:49", "12:55", "15:31", "16:1"}
	all := err.(tasks.Faults)
	var got []string
	for _, f := range all {
		got = append(got, fmt.Sprintf("%d:%d", f.Pos.Line, f.Pos.Col))
	}
	if strings.Join(got, " ") != strings.Join(want, " ") {
		t.Errorf("faults at %v, want %v:\n%v", got, want, err)
	}
}

// In braces YAML takes a decimal comma for the end of the value.
func TestDecimalCommas(t *testing.T) {
	for value, says := range map[string]string{"hours: 2,5 h": `hours: "2,5 h" has a decimal comma`, "hours: 2,5": "decimal comma", "hours: {low: 1,5 h, high: 2 h}": "decimal comma", "set-up: 0,5 h": "decimal comma",
		"after: {prime deck: {min: 1,5 h}}": "decimal comma", "standing: 2, 5 h": ""} {
		_, err := ReadBytes("job.yaml", text(t, "", "kind: weld, at: pier/deck, hours: 3", "at: pier/deck, "+value), nil)
		if err == nil || !strings.Contains(err.Error(), says) || says != "" && strings.Contains(err.Error(), "is not a key") {
			t.Errorf("%s: %v, want %q", value, err, says)
		}
	}
	read(t, text(t, "repeat: {b: {count: 2, first times: [1.5,1], tasks: {x: {at: pier, hours: 1}}}}\n"))
}

func TestFaultsAreCapped(t *testing.T) {
	var b strings.Builder
	for i := range 3 * maxFaults {
		fmt.Fprintf(&b, "  t%d: {at: peer, hours: 1}\n", i)
	}
	_, err := ReadBytes("job.yaml", text(t, b.String()), nil)
	all := err.(tasks.Faults)
	if last := all[len(all)-1]; len(all) != maxFaults+1 || last.Text != fmt.Sprintf("and %d more faults", 2*maxFaults) {
		t.Errorf("%d faults, the last %q", len(all), last.Text)
	}
}

func TestMoments(t *testing.T) {
	for s, want := range map[string]string{
		"2027-04-05 10:15": "2027-04-05 0 false 615", "day 3 10:15": "2000-00-00 3 false 615", "Wed 7:05": "2000-00-00 0 true 425", "wednesday 24:00": "2000-00-00 0 true 1440",
	} {
		m, err := parseMoment(s)
		date := "2000-00-00"
		if m.Date.Year != 0 {
			date = m.Date.String()
		}
		if got := fmt.Sprintf("%s %d %v %d", date, m.Day, m.ByName, m.Minute); err != nil || got != want {
			t.Errorf("%q: %s (%v), want %s", s, got, err, want)
		}
	}
	for s, says := range map[string]string{
		"2027-04-05": "has no time of day", "10:15": "not a local time", "2027-04-05T10:15:00Z": "not a local time as it is written here", "5/4/2027 10:15": "is not a day",
		"2027-02-29 10:15": "there is no day", "2027-13-01 10:15": "there is no day", "day 0 10:15": "not a day of the window", "day x 10:15": "not a day of the window",
		"Wed 25:00": "not a time of day", "2027-04-05 10.15": "not a time of day", "1999-04-05 10:15": "out of all proportion", "day 03 10:15": "not a day of the window", "": "not a local time",
	} {
		if _, err := parseMoment(s); err == nil || !strings.Contains(err.Error(), says) || quantity.Hint(err) == "" {
			t.Errorf("%q: %v, want %q and a way out", s, err, says)
		}
	}
}

func TestSlots(t *testing.T) {
	for s, want := range map[string][2]int{
		"2027-04-06 08:00-12:00": {480, 720}, "day 2 20:00-06:00": {1200, 360 + 1440}, "Tue 08:00-08:00": {480, 480 + 1440}, "day 2 00:00-24:00": {0, 1440},
		"2027-04-06 20:00 to 2027-04-07 06:00": {1200, 360}, "Tue 20:00 to Wed 06:00": {1200, 360},
	} {
		a, b, err := parseSlot(s)
		if err != nil || [2]int{a.Minute, b.Minute} != want {
			t.Errorf("%q: %d to %d (%v), want %v", s, a.Minute, b.Minute, err, want)
		}
	}
	for _, s := range []string{"", "Tue", "Tue 08:00", "08:00-12:00", "Tue 08:00-", "Tue 8-12", "Tue to Wed", "2027-04-06 08:00-12:00 13:00-14:00"} {
		if _, _, err := parseSlot(s); err == nil || quantity.Hint(err) == "" {
			t.Errorf("%q: %v, want an error with a way out", s, err)
		}
	}
}

func TestTickets(t *testing.T) {
	for s, want := range map[string]string{
		"fitter": "fitter", "slinger/signaller": "slinger/signaller", "weld": "weld", "weld 136 PF": "weld 136 PF", "weld stick 3F butt fillet": "weld 111 PF butt/fillet",
		"weld PF 136 12 mm": "weld 136 PF",
	} {
		got, err := parseTicket(s)
		if err != nil || got.String() != want {
			t.Errorf("%q: %q (%v), want %q", s, got.String(), err, want)
		}
	}
	if got, _ := parseTicket("weld 12 mm"); got.ThickFrom != 12 || got.ThickTo != 12 {
		t.Errorf("thickness %v to %v", got.ThickFrom, got.ThickTo)
	}
	if _, err := parseTicket("weld 137"); err == nil {
		t.Error("a process that is none is taken")
	}
}

func TestWaits(t *testing.T) {
	for s, want := range map[string]tasks.Wait{"4 h": {Minutes: 240}, "4 working h": {Minutes: 240, Working: true}, "30 d": {Minutes: 43200}, "1 h 30 min": {Minutes: 90}, "1.01 min": {Minutes: 2}} {
		if got, err := parseWait(s); err != nil || got != want {
			t.Errorf("%q: %+v (%v), want %+v", s, got, err, want)
		}
	}
	for _, s := range []string{"4", "four h", "-4 h", "3 y", "9000 d"} {
		if _, err := parseWait(s); err == nil {
			t.Errorf("%q is taken", s)
		}
	}
}

func TestEdits(t *testing.T) {
	for _, c := range []struct {
		a, b string
		want int
	}{{"", "", 0}, {"pier", "peir", 1}, {"deck", "dock", 1}, {"fit", "fitt", 1}, {"kitten", "sitting", 3}, {"abc", "", 3}, {"leg", "length", 3}} {
		if got := edits([]rune(c.a), []rune(c.b), 9); got != c.want {
			t.Errorf("%q to %q: %d, want %d", c.a, c.b, got, c.want)
		}
	}
	word := rapid.StringMatching(`[a-d]{0,7}`)
	rapid.Check(t, func(t *rapid.T) {
		a, b := []rune(word.Draw(t, "a")), []rune(word.Draw(t, "b"))
		n := edits(a, b, 99)
		if edits(b, a, 99) != n || (n == 0) != (string(a) == string(b)) || n > max(len(a), len(b)) || n < len(a)-len(b) {
			t.Fatalf("%q to %q is %d", string(a), string(b), n)
		}
		if edits(a, b, 3) != min(n, 3) {
			t.Fatalf("the limit changes %d to %d", n, edits(a, b, 3))
		}
	})
}

// A moment of a window is the same instant whether it is written as a date, a day or a weekday.
func TestMomentsAgree(t *testing.T) {
	zone, err := time.LoadLocation("Europe/London")
	if err != nil {
		t.Fatal(err)
	}
	rapid.Check(t, func(t *rapid.T) {
		start := time.Date(2027, 3, 20, 14, 0, 0, 0, zone).AddDate(0, 0, rapid.IntRange(0, 30).Draw(t, "start"))
		n := rapid.IntRange(0, 5).Draw(t, "day")
		w := window{"w", zone, utcOf(start), utcOf(start.AddDate(0, 0, 6))}
		day := start.AddDate(0, 0, n)
		clock := fmt.Sprintf(" %02d:%02d", rapid.IntRange(3, 23).Draw(t, "hour"), rapid.IntRange(0, 59).Draw(t, "minute"))
		var got []int64
		for _, s := range []string{day.Format("2006-01-02"), fmt.Sprintf("day %d", n+1), day.Format("Mon")} {
			m, err := parseMoment(s + clock)
			if err != nil {
				t.Fatal(err)
			}
			m.Zone = zone
			at, _, times := w.at(&m)
			if times != 1 {
				t.Fatalf("%s occurs %d times", s, times)
			}
			got = append(got, int64(at))
		}
		if got[0] != got[1] || got[1] != got[2] {
			t.Fatalf("%v", got)
		}
	})
}

// Five thousand tasks in a chain are read, and one more is refused.
func TestManyTasks(t *testing.T) {
	var b strings.Builder
	for i := range maxTasks - 4 {
		fmt.Fprintf(&b, "  t%d: {at: pier, hours: 1, after: t%d}\n", i+1, i)
	}
	data := text(t, b.String(), "resin: {at", "t0: {at")
	job := read(t, data)
	if len(job.Tasks) != maxTasks {
		t.Errorf("%d tasks", len(job.Tasks))
	}
	refused(t, append(data, "  more: {at: pier, hours: 1}\n"...), "at most 5000 are taken")
	refused(t, text(t, "repeat:\n  a: {count: 400, tasks: {x: {at: pier, hours: 1}}}\n  b: {count: 400, tasks: {y: {at: pier, hours: 1, after: every x a}}}\n"), "more than 50000 links")
	refused(t, text(t, "repeat: {b: {count: 500, tasks: {"+func() string {
		var s []string
		for i := range 10 {
			s = append(s, fmt.Sprintf("x%d: {at: pier, hours: 1}", i))
		}
		return strings.Join(s, ", ")
	}()+"}}}\n"), "written out these are 5004 tasks")
}

// What the messages call a value is what the person wrote.
func TestKindOf(t *testing.T) {
	for s, want := range map[string]string{"a: b": "keys with values", "[a]": "a list", "~": "nothing", "12 mm": `"12 mm"`, "'" + strings.Repeat("x", 100) + "'": `"` + strings.Repeat("x", 60) + `..."`} {
		var n yaml.Node
		if err := yaml.Unmarshal([]byte(s), &n); err != nil {
			t.Fatal(err)
		}
		if got := kindOf(n.Content[0]); got != want {
			t.Errorf("%s: %s, want %s", s, got, want)
		}
	}
}

func TestNoFile(t *testing.T) {
	if job, err := Read("testdata/none.yaml"); job != nil || !os.IsNotExist(err) {
		t.Errorf("job %v, error %v", job, err)
	}
}
