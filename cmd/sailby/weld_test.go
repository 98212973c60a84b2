package main

import (
	"os"
	"path/filepath"
	"testing"

	"sailby/plan"
	"sailby/plan/settle"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// planned settles a job written here.
func planned(t *testing.T, text string) (*plan.Answer, map[string]int) {
	t.Helper()
	path := filepath.Join(t.TempDir(), "job.yaml")
	if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
	job, err := jobfile.Read(path)
	if err != nil {
		t.Fatal(err)
	}
	r, err := settle.Ask(t.Context(), job, settle.Options{Only: true})
	if err != nil || r.Likely == nil || r.Likely.Plan == nil {
		t.Fatalf("%v, %+v", err, r)
	}
	at := map[string]int{}
	for i, s := range r.Likely.Work.Steps {
		if s.Class == expand.Hands {
			at[s.Task.Name] = i
		}
	}
	return r.Likely, at
}

// TestSeamIsNotLeftBeforeItsSafePoint: mornings of four hours of which a first task takes part. The seam, which
// takes more than a morning, is begun only where set-up and safe stop fit before closing: after half an hour
// of other work on the first morning, after two hours on the second.
func TestSeamIsNotLeftBeforeItsSafePoint(t *testing.T) {
	for _, c := range []struct {
		first string
		day   int
	}{{"30 min", 0}, {"2 h", 1}} {
		a, at := planned(t, `
job: Morning seams
zone: Europe/London
places:
  yard: {open: Mon-Fri 08:00-17:00}
  slip: {open: daily 08:00-12:00, fire watch: 0 min, face factor: 1}
window: {place: slip, opens: 2027-05-11 08:00, closes: 2027-05-16 12:00}
people:
  Maro: {tickets: [{weld: all}]}
  Liss: {}
procedures: {p: {process: 136, deposition: 2 kg/h, position: PF, operating factor: 20 %}}
rates: {fit-up: none, moving: none, set-up: 10 min}
tasks:
  first: {at: slip, who: [Maro], hours: `+c.first+`}
  weld: {kind: weld, at: slip, joints: [{single V: {thickness: 12 mm}, length: 2.4 m, position: PF, procedure: p}], after: first}
`)
		i := at["weld"]
		s, p := a.Work.Steps[i], a.Plan.Steps[i]
		if s.SafeStop < 60 || s.Working <= 230 {
			t.Fatalf("the case shows nothing: safe stop %d of %d min", s.SafeStop, s.Working)
		}
		if len(p.Pieces) < 2 {
			t.Fatalf("no stop in %v", p.Pieces)
		}
		if got := p.Pieces[0].Len(); got < s.SetUp+s.SafeStop {
			t.Errorf("after %s the seam is left after %d min, set-up %d and safe stop %d", c.first, got, s.SetUp, s.SafeStop)
		}
		if day := int(p.Start-a.Work.Window.Opens) / 1440; day != c.day {
			t.Errorf("after %s the seam begins on day %d, want %d (safe stop %d min)", c.first, day, c.day, s.SafeStop)
		}
	}
}
