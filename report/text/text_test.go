package text

import (
	"bytes"
	"errors"
	"flag"
	"io"
	"os"
	"strings"
	"testing"
	"unicode"

	"github.com/rivo/uniseg"
	"pgregory.net/rapid"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/report/fixture"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

var update = flag.Bool("update", false, "write the golden texts anew")

// outputs are the three texts of the package.
var outputs = map[string]func(w io.Writer, r *plan.Report, o Options) error{
	"fits": Fits,
	"days": Days,
	"why":  func(w io.Writer, r *plan.Report, o Options) error { return Why(w, r, "weld lugs", o) },
}

func printed(t *testing.T, name string, r *plan.Report, o Options) string {
	t.Helper()
	var b bytes.Buffer
	if err := outputs[name](&b, r, o); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

func TestGolden(t *testing.T) {
	for name := range outputs {
		got := printed(t, name, fixture.Report(), Options{})
		file := "testdata/" + name + ".golden"
		if *update {
			if err := os.WriteFile(file, []byte(got), 0o644); err != nil {
				t.Fatal(err)
			}
		}
		want, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		if got != string(want) {
			t.Errorf("%s is\n%s\nwant\n%s", name, got, want)
		}
	}
}

// TestWidth: no line is wider than asked for, nothing escapes, nothing but spaces ends a line.
func TestWidth(t *testing.T) {
	name := rapid.OneOf(rapid.StringN(0, 60, 300), rapid.SampledFrom([]string{strings.Repeat("W", 200), "\x1b[2J\u202ex", strings.Repeat("船", 60), "a\nb", ""}))
	rapid.Check(t, func(t *rapid.T) {
		r := fixture.Report()
		r.Job.Name = name.Draw(t, "job")
		for _, task := range r.Job.Tasks {
			task.Title = name.Draw(t, "title")
		}
		r.High.Proof.Summary = name.Draw(t, "proof")
		r.Job.Notes = []tasks.Note{{Text: name.Draw(t, "note")}}
		width := rapid.IntRange(60, 140).Draw(t, "width")
		for out, print := range outputs {
			var b bytes.Buffer
			if err := print(&b, r, Options{Width: width}); err != nil {
				t.Fatal(err)
			}
			for _, l := range strings.Split(b.String(), "\n") {
				if w := uniseg.StringWidth(l); w > width {
					t.Fatalf("%s: %d columns, more than %d: %q", out, w, width, l)
				}
				if strings.ContainsFunc(l, func(c rune) bool { return unicode.IsControl(c) || unicode.Is(unicode.Cf, c) }) {
					t.Fatalf("%s: control characters in %q", out, l)
				}
			}
		}
	})
}

// words joins a text's lines, so that wrapping does not matter.
func words(s string) string { return strings.Join(strings.Fields(s), " ") }

func TestFitsSays(t *testing.T) {
	r := fixture.Report()
	r.Job.Notes = []tasks.Note{{Text: "01:30 comes twice on 25 October: the earlier is meant", Pos: tasks.Pos{File: fixture.File, Line: 9, Col: 2}}}
	got := words(printed(t, "fits", r, Options{}))
	if !strings.HasPrefix(got, words(r.Job.Name)+" Fits: on likely hours") {
		t.Errorf("the verdict does not come first: %.120s", got)
	}
	if !strings.HasSuffix(got, agenda.Care) {
		t.Error("the line of care does not come last")
	}
	for _, want := range []string{
		"verdict fits not settled cannot fit",
		"time in hand 5 h 2 h 10 min late -",
		"earliest possible Fri 9 Apr 09:25 Fri 9 Apr 15:15 Fri 9 Apr 19:20",
		"open again Thu 8 Apr 17:30 Thu 8 Apr 16:00 1 h 30 min",
		"last start that still makes it: Thu 8 Apr 16:30",
		"1 clear up starts Fri 9 Apr 09:00: after coat lugs (tarskay/job.yaml:",
		"test lugs, 1 h 30 min (tarskay/job.yaml:50) [not shown to be needed]",
		"01:30 comes twice on 25 October: the earlier is meant (tarskay/job.yaml:9)",
	} {
		if !strings.Contains(got, want) {
			t.Errorf("no %q in\n%s", want, got)
		}
	}
	r.Maybes, r.High = nil, nil
	if got := words(printed(t, "fits", r, Options{})); !strings.Contains(got, "verdict fits the same the same") {
		t.Errorf("without maybes and ranges:\n%s", got)
	}
	r.Likely.Best = true
	if got := words(printed(t, "fits", r, Options{})); !strings.Contains(got, "(this plan: the earliest, proved)") || strings.Contains(got, "No plan can finish before") {
		t.Errorf("a best plan:\n%s", got)
	}
}

func TestNoPlanAtAll(t *testing.T) {
	r := fixture.Report()
	r.Likely = r.High
	r.LowToo = true
	if got := words(printed(t, "fits", r, Options{})); !strings.Contains(got, "Cannot fit: proved, even at the low end of every range") ||
		!strings.Contains(got, "Why it cannot fit at the high end of the hours, and at the low end of every range") || strings.Contains(got, "What sets the finish") {
		t.Errorf("fits:\n%s", got)
	}
	if got := words(printed(t, "days", r, Options{})); !strings.Contains(got, "There is no plan to show.") {
		t.Errorf("days:\n%s", got)
	}
	if got := words(printed(t, "why", r, Options{})); !strings.Contains(got, "5 h 36 min (4 h 50 min to 6 h 40 min) hands-on") || strings.Contains(got, "planned") {
		t.Errorf("why:\n%s", got)
	}
}

func TestDaysPicksTheBasis(t *testing.T) {
	got := words(printed(t, "days", fixture.Report(), Options{Maybes: true}))
	if !strings.Contains(got, "The plan below is late") {
		t.Errorf("the late plan does not say so:\n%.300s", got)
	}
	if got := words(printed(t, "days", fixture.Report(), Options{End: expand.High})); !strings.Contains(got, "no plan to show") {
		t.Error("days at the high end shows a plan")
	}
}

func TestWhyNames(t *testing.T) {
	var b bytes.Buffer
	if err := Why(&b, fixture.Report(), "open", Options{}); err != nil || !strings.HasPrefix(b.String(), "open again: sign-off at pier/deck") {
		t.Errorf("an only part of a name: %v, %.60s", err, b.String())
	}
	if !strings.Contains(words(b.String()), "Must be done by Thu 8 Apr 17:30") || !strings.Contains(words(b.String()), "1 h 30 min in hand; last start that still makes it Thu 8 Apr 16:30") {
		t.Errorf("the deadline is missing:\n%s", b.String())
	}
	for ask, want := range map[string]string{
		"weld logs": `there is no task "weld logs"; the closest are "weld lugs", `,
		"weld":      `there is no task "weld"; the closest are "weld lugs", "weld frame"`,
		"":          `there is no task ""; the closest are "`,
	} {
		err := Why(io.Discard, fixture.Report(), ask, Options{})
		var unknown *UnknownTask
		if !errors.As(err, &unknown) || !strings.HasPrefix(err.Error(), want) {
			t.Errorf("%q: %v, want %s...", ask, err, want)
		}
	}
}

func TestWhyTellsDefaultsAndMaybes(t *testing.T) {
	got := words(printed(t, "why", fixture.Report(), Options{}))
	for _, want := range []string{
		"operating factor: 0.2 [house judgement: site: arc over hands-on welding time] (default)",
		"density: 7850 kg/m3 [from memory: usual for structural steel] (default)",
		"section area: 18 mm2 [published: ISO 2553, fillet of leg 6 mm] length", // published: not marked
		"face factor 0.7",
		"(default): no evidence stands behind it",
		"leeway 20 min, shared with hang frame; latest finish Thu 8 Apr 10:00",
		"set by Tom is on hang frame until 09:30",
	} {
		if !strings.Contains(got, want) {
			t.Errorf("no %q in\n%s", want, got)
		}
	}
	var b bytes.Buffer
	if err := Why(&b, fixture.Report(), "rot found", Options{}); err != nil {
		t.Fatal(err)
	}
	if got := words(b.String()); !strings.Contains(got, "it happens with a chance of 35 %") || !strings.Contains(got, "Does not happen on likely hours.") || strings.Contains(got, "(default)") {
		t.Errorf("a maybe:\n%s", got)
	}
}

func TestWrapKeepsUnits(t *testing.T) {
	got := wrap("it takes 12 h 30 min of 4.5 kg and 3 km", 14)
	want := "it takes 12 h|30 min of|4.5 kg and 3|km"
	if strings.Join(got, "|") != want {
		t.Errorf("got %q, want %q", strings.Join(got, "|"), want)
	}
	rapid.Check(t, func(t *rapid.T) {
		s, w := rapid.String().Draw(t, "s"), rapid.IntRange(2, 40).Draw(t, "w")
		lines := wrap(s, w)
		if a, b := strings.Join(strings.Fields(strings.Join(lines, "")), ""), strings.Join(strings.Fields(clean.Line(s)), ""); a != b {
			t.Fatalf("wrapped %q, was %q", a, b)
		}
		for _, l := range lines {
			if uniseg.StringWidth(l) > w && uniseg.GraphemeClusterCount(l) > 1 {
				t.Fatalf("%q is wider than %d", l, w)
			}
		}
	})
}

type full struct{ left int }

func (f *full) Write(p []byte) (int, error) {
	if f.left -= len(p); f.left < 0 {
		return 0, errors.New("disk full")
	}
	return len(p), nil
}

func TestWriteErrors(t *testing.T) {
	r := fixture.Report()
	for name, print := range outputs {
		if err := print(&full{left: 200}, r, Options{}); err == nil || !strings.Contains(err.Error(), "disk full") {
			t.Errorf("%s hides that the disk is full: %v", name, err)
		}
	}
}

func TestUnknownDeadlinesDoNotPrintYearsAhead(t *testing.T) {
	r := fixture.Report()
	r.Likely.Deadlines[0].LastStart = hours.Far
	r.Likely.Rows[5].Latest = hours.Far
	for name := range outputs {
		if got := printed(t, name, r, Options{}); strings.Contains(got, "2092") || strings.Contains(got, "4060") {
			t.Errorf("%s prints a far moment:\n%s", name, got)
		}
	}
}
