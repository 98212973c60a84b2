package problem

import (
	"fmt"
	"slices"
	"strings"
	"testing"
	"testing/fstest"
	"time"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/jobfile"
)

// The job of these tests, section by section: a shop, and a pier to go to for four days from Monday 5
// April 2027 on. All clocks are London's, an hour ahead of UTC. Tests put sections of their own in place.
var usual = []string{
	"job: Test",
	"zone: Europe/London",
	`places:
  shop: {open: [Mon-Fri 08:00-12:00 12:30-17:00], face factor: 1}
  pier: {open: [daily 07:00-12:00 12:30-19:00], face factor: 1, workfaces: {hinge: {}, deck: {}}}`,
	"window: {place: pier, opens: 2027-04-05 07:00, closes: 2027-04-09 19:00}",
	"begin: 2027-03-29 08:00",
	`people:
  Ines: {tickets: [weld 136, fire watch]}
  Tom: {tickets: [fitter, fire watch, slinger/signaller]}`,
	"tasks: {fit: {at: pier, hours: 2 h}}",
}

// tide is easily reckoned: 5 m at 06:00 and 18:00 summer time, 1 m at noon and midnight, for the days of the window.
func tide() []byte {
	text := "# zone: UTC\n# datum: chart\n"
	for day := 5; day <= 9; day++ {
		text += fmt.Sprintf("2027-04-%02d 05:00,5.0,HW\n2027-04-%02d 11:00,1.0,LW\n2027-04-%02d 17:00,5.0,HW\n2027-04-%02d 23:00,1.0,LW\n", day, day, day, day)
	}
	return []byte(text)
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

// tb is what testing.T and rapid.T share.
type tb interface {
	Helper()
	Fatalf(format string, args ...any)
}

func expanded(t tb, text string) *expand.Work {
	t.Helper()
	job, err := jobfile.ReadBytes("job.yaml", []byte(text), fstest.MapFS{"tide.csv": {Data: tide()}})
	if err != nil {
		t.Fatalf("%v\n%s", err, text)
	}
	w, faults := expand.Expand(job, expand.Basis{})
	if len(faults) > 0 {
		t.Fatalf("%v\n%s", faults, text)
	}
	return w
}

func compiled(t tb, sections ...string) *Problem {
	t.Helper()
	return Compile(expanded(t, yaml(sections...)))
}

// activity finds an activity by task name, or by task and step: "prime / coat 1".
func (p *Problem) activity(t tb, name string) *Act {
	t.Helper()
	for i := range p.Acts {
		if p.Acts[i].Name == name || p.Acts[i].Step.Task.Name == name {
			return &p.Acts[i]
		}
	}
	t.Fatalf("no activity %q", name)
	return nil
}

// at gives the minute of the problem at a London time "04-06 15:00" of 2027.
func (p *Problem) at(t tb, text string) int {
	t.Helper()
	zone, err := time.LoadLocation("Europe/London")
	if err != nil {
		t.Fatalf("%v", err)
	}
	v, err := time.ParseInLocation("2006-01-02 15:04", "2027-"+text, zone)
	if err != nil {
		t.Fatalf("%v", err)
	}
	return int(hours.Of(v) - p.Base)
}

// clock writes a minute of the problem as London's clock shows it.
func (p *Problem) clock(m int) string {
	zone, _ := time.LoadLocation("Europe/London")
	return (p.Base + hours.Minute(m)).In(zone).Format("01-02 15:04")
}

// spans writes a set as London's clock shows it: "04-05 07:00-12:00", within the day that it begins on.
func (p *Problem) spans(set hours.Set) string {
	var out []string
	for _, s := range set {
		a, b := p.clock(int(s.From)), p.clock(int(s.To))
		out = append(out, a+"-"+strings.TrimPrefix(b, a[:6]))
	}
	return strings.Join(out, ", ")
}

// calendar writes when the first mode of an activity can be worked in the two days from from on.
func (p *Problem) calendar(t tb, name, from string) string {
	t.Helper()
	a := p.activity(t, name)
	if len(a.Modes) == 0 {
		return "hopeless: " + a.Hopeless
	}
	at := hours.Minute(p.at(t, from))
	return p.spans(a.Modes[0].Time.Calendar().Within(hours.Span{From: at, To: at + 2*1440}))
}

// crews writes the modes of an activity by names.
func (p *Problem) crews(a *Act) string {
	var out []string
	name := func(list []int) string {
		var names []string
		for _, c := range list {
			names = append(names, p.People[c].Name)
		}
		return strings.Join(names, "+")
	}
	for _, m := range a.Modes {
		s := name(m.Crew)
		if m.Relief != nil {
			s += "/" + name(m.Relief)
		}
		out = append(out, s)
	}
	return strings.Join(out, ", ")
}

func same(t *testing.T, what string, got, want any) {
	t.Helper()
	if g, w := fmt.Sprint(got), fmt.Sprint(want); g != w {
		t.Errorf("%s:\n got  %s\n want %s", what, g, w)
	}
}

func place(t tb, p *Problem, name string) *tasks.Place {
	t.Helper()
	for _, pl := range p.Work.Job.Places {
		if pl.Name == name {
			return pl
		}
	}
	t.Fatalf("no place %q", name)
	return nil
}
