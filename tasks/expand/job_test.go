package expand

import (
	"errors"
	"fmt"
	"slices"
	"strings"
	"testing"
	"time"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/jobfile"
)

// The job of these tests, section by section: a shop, and a pier to go to from Monday 5 April 2027 on.
// All clocks are London's, an hour ahead of UTC. Tests put sections of their own in place.
var usual = []string{
	"job: Test",
	"zone: Europe/London",
	`places:
  shop: {open: [Mon-Fri 08:00-12:00 12:30-17:00], steel temperature: 15 C}
  pier: {open: [daily 07:00-12:00 12:30-19:00], workfaces: {hinge: {}, deck: {}}}`,
	"window: {place: pier, opens: 2027-04-05 07:00, closes: 2027-04-09 19:00}",
	`people:
  Ines: {tickets: [{weld: all}, fire watch]}
  Tom: {tickets: [fitter, fire watch, slinger/signaller]}
  Ann: {tickets: [painter]}`,
	`assemblies:
  frame:
    parts:
      base: {plate: [2 m, 1 m, 10 mm]}
      posts: {section: SHS 100x100x6, length: 1.5 m each, count: 3}`,
	`paints:
  primer: {kind: two-pack epoxy, hard dry: {10 C: 20 h, 20 C: 7 h}, touch dry: {10 C: 6 h, 20 C: 3 h}, solvent gone: {10 C: 48 h, 20 C: 20 h}, next coat: {top: {10 C: {min: 16 h, max: 10 d}, 20 C: {min: 8 h, max: 5 d}}, primer: {10 C: {min: 12 h}, 20 C: {min: 6 h}}}}
  top: {kind: polyurethane}`,
}

// yaml writes a job file of the usual sections and those given, which begin with their key.
func yaml(sections ...string) string {
	key := func(s string) string { k, _, _ := strings.Cut(s, ":"); return k }
	out := slices.Clone(usual)
	for _, s := range sections {
		k := key(s)
		if k == "trips" { // in place of the window
			out = slices.DeleteFunc(out, func(o string) bool { return key(o) == "window" })
		}
		if i := slices.IndexFunc(out, func(o string) bool { return key(o) == k }); i >= 0 {
			out[i] = s
			continue
		}
		out = append(out, s)
	}
	return strings.Join(out, "\n") + "\n"
}

func read(t *testing.T, sections ...string) *tasks.Job {
	t.Helper()
	text := yaml(sections...)
	job, err := jobfile.ReadBytes("job.yaml", []byte(text), nil)
	if err != nil {
		t.Fatalf("%v\n%s", err, text)
	}
	return job
}

// on expands a job for a basis.
func on(t *testing.T, b Basis, sections ...string) *Work {
	t.Helper()
	w, faults := Expand(read(t, sections...), b)
	if len(faults) > 0 {
		t.Fatalf("%v\n%s", faults, yaml(sections...))
	}
	return w
}

// likely expands a job for the likely hours.
func likely(t *testing.T, sections ...string) *Work {
	t.Helper()
	return on(t, Basis{}, sections...)
}

// refused wants one fault that says so, with a way out.
func refused(t *testing.T, says string, sections ...string) {
	t.Helper()
	job := read(t, sections...)
	w, err := Expand(job, Basis{})
	faulty(t, w, err, says)
}

func faulty(t *testing.T, w *Work, err error, says string) {
	t.Helper()
	var all tasks.Faults
	if !errors.As(err, &all) || len(all) == 0 || w != nil {
		t.Errorf("taken, want %q", says)
		return
	}
	if len(all) != 1 || !strings.Contains(all[0].Text, says) || all[0].Hint == "" || !all[0].Pos.Given() {
		t.Errorf("got %v, want one fault with %q, its place and a way out", err, says)
	}
}

func (w *Work) step(t *testing.T, key string) *Step {
	t.Helper()
	var keys []string
	for _, s := range w.Steps {
		if s.Key() == key {
			return s
		}
		keys = append(keys, s.Key())
	}
	t.Fatalf("no step %q among %q", key, keys)
	return nil
}

func (w *Work) keys() string {
	var out []string
	for _, s := range w.Steps {
		out = append(out, s.Key())
	}
	return strings.Join(out, ", ")
}

// linksOf writes the links into a step: "fit / plain finish -> start 0 to any".
func (w *Work) linksOf(s *Step) string {
	var out []string
	for _, l := range w.Links {
		if l.To != s {
			continue
		}
		end := map[tasks.LinkEnd]string{tasks.Start: "start", tasks.Finish: "finish"}
		text := l.From.Key() + " " + end[l.FromEnd] + " -> " + end[l.ToEnd]
		unit := func(n int, working bool) string {
			if working {
				return fmt.Sprint(n, " working")
			}
			return fmt.Sprint(n)
		}
		if l.Min != 0 && l.Min > NoMin {
			text += " min " + unit(l.Min, l.Working)
		}
		if l.Max < NoMax {
			text += " max " + unit(l.Max, l.MaxWorking)
		}
		out = append(out, text)
	}
	slices.Sort(out)
	return strings.Join(out, "; ")
}

func states(s *Step) string {
	var out []string
	for _, st := range s.States {
		out = append(out, st.Name)
	}
	return strings.Join(out, ", ")
}

// people writes the needs of a step: "weld 136 PF x1, fire watch x1 (watch)".
func people(needs []tasks.Need) string {
	var out []string
	for _, n := range needs {
		text := n.Ticket.String()
		if n.Who != nil {
			text = strings.Join(n.Who, " or ")
		} else if text == "" {
			text = "anybody"
		}
		text += fmt.Sprintf(" x%d", n.Count)
		if n.Watch {
			text += " (watch)"
		}
		out = append(out, text)
	}
	return strings.Join(out, ", ")
}

// at gives the minute of a London time "04-06 15:00" of 2027.
func at(t *testing.T, text string) hours.Minute {
	t.Helper()
	return in(t, "Europe/London", text)
}

func in(t *testing.T, zone, text string) hours.Minute {
	t.Helper()
	z, err := time.LoadLocation(zone)
	if err != nil {
		t.Fatal(err)
	}
	v, err := time.ParseInLocation("2006-01-02 15:04", "2027-"+text, z)
	if err != nil {
		t.Fatal(err)
	}
	return hours.Of(v)
}

func same(t *testing.T, what string, got, want any) {
	t.Helper()
	if g, w := fmt.Sprint(got), fmt.Sprint(want); g != w {
		t.Errorf("%s:\n got  %s\n want %s", what, g, w)
	}
}

func hoursZone(t *testing.T) *time.Location {
	t.Helper()
	z, err := time.LoadLocation("Europe/London")
	if err != nil {
		t.Fatal(err)
	}
	return z
}
