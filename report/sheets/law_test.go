package sheets

import (
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/report/fixture"
)

// TestLawsHoldForAnyNames: whatever the job file's names are, nothing is cut, nothing overlaps,
// nothing is drawn that the fonts lack.
func TestLawsHoldForAnyNames(t *testing.T) {
	word := rapid.OneOf(
		rapid.StringN(0, 40, 400),
		rapid.SampledFrom([]string{"", " ", "Ø", strings.Repeat("W", 150), strings.Repeat("weld it ", 60), "🔥🔥", "e\u0301\u0301\u0301", "\xff\xfe",
			strings.Repeat("船", 80), "\u202egnp", "a\nb\r\nc", "½ ⌀20 ☐", strings.Repeat("i", 500)}))
	rapid.Check(t, func(t *rapid.T) {
		r := fixture.Report()
		job := r.Job
		job.Name, job.Client, job.Drawing = word.Draw(t, "job"), word.Draw(t, "client"), word.Draw(t, "drawing")
		job.Emergency.Hospital, job.Emergency.Boat = word.Draw(t, "hospital"), word.Draw(t, "boat")
		job.Places[1].Title = word.Draw(t, "place")
		for _, k := range job.Kit {
			k.Name = word.Draw(t, "kit")
		}
		for _, task := range job.Tasks {
			task.Title, task.Note = word.Draw(t, "title"), word.Draw(t, "note")
		}
		rename := map[string]string{}
		for i, p := range job.People {
			rename[p.Name] = word.Draw(t, "person") + string(rune('A'+i))
		}
		for _, p := range job.People {
			r.Likely.Work.Presence[rename[p.Name]] = r.Likely.Work.Presence[p.Name]
			p.Name = rename[p.Name]
		}
		for i := range r.Likely.Plan.Steps {
			s := &r.Likely.Plan.Steps[i]
			for k, n := range s.People {
				s.People[k] = rename[n]
			}
			for k := range s.Watches {
				s.Watches[k].Person = rename[s.Watches[k].Person]
			}
		}
		crowd(r, rapid.IntRange(0, 5).Draw(t, "more tasks"), word.Draw(t, "title of them"))
		d, err := Pack(r, Options{Letter: rapid.Bool().Draw(t, "letter")})
		if err != nil {
			t.Fatal(err)
		}
		if f := faults(d); len(f) > 0 {
			t.Fatalf("%d faults, the first: %s", len(f), f[0])
		}
		k := newPack(&Document{Width: 210, Height: 297, Left: 15, Right: 12, Top: 17, Bottom: 10}, r, r.Likely, Options{})
		for _, s := range k.shifts { // drawn as close as can be, whatever form the pack takes
			k.p.begin("", "", true)
			k.shift(s, dense)
		}
		if f := faults(k.p.doc); len(f) > 0 {
			t.Fatalf("%d faults in close form, the first: %s", len(f), f[0])
		}
	})
}

// TestWrapping: lines fit, and nothing but blanks is lost.
func TestWrapping(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.String().Draw(t, "text")
		w := rapid.Float64Range(6, 150).Draw(t, "width")
		bold := rapid.Bool().Draw(t, "bold")
		lines := wrapText(s, body, bold, w)
		for _, l := range lines {
			if width(l, body, bold) > w+1e-9 && len([]rune(l)) > 1 {
				t.Fatalf("line %q is %.2f mm wide, more than %.2f", l, width(l, body, bold), w)
			}
		}
		bare := func(s string) string { return strings.Join(strings.Fields(s), "") }
		if got, want := bare(strings.Join(lines, "")), bare(paper(s)); got != want {
			t.Fatalf("wrapped %q, was %q", got, want)
		}
	})
}

func TestFitted(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, w := rapid.String().Draw(t, "text"), rapid.Float64Range(3, 100).Draw(t, "width")
		if got := fitted(s, body, false, w); width(got, body, false) > w+1e-9 {
			t.Fatalf("%q is wider than %.2f", got, w)
		}
	})
	if got := fitted("weld lugs", body, false, 100); got != "weld lugs" {
		t.Errorf("text that fits became %q", got)
	}
}

// TestGlyphs: what the trade writes is in the fonts or has a near word.
func TestGlyphs(t *testing.T) {
	for in, want := range map[string]string{
		"Ø20": "Ø20", "⌀20": "Ø20", "8 °C": "8 °C", "Łódź": "Łódź", "½": "½", "a ≤ 6": "a ≤ 6", "m²": "m²", "±2": "±2", "☐": "[ ]", "✓": "yes", "weld – cut": "weld – cut",
	} {
		if got := paper(in); got != want {
			t.Errorf("paper(%q) = %q, want %q", in, got, want)
		}
	}
}
