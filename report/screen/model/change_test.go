package model

import (
	"os"
	"strings"
	"testing"

	"sailby/report/fixture"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// changeJob has a task of each way to give hours, and a repeated block.
const changeJob = `job: changes
zone: Europe/London
places:
  shop: {open: daily 07:00-17:00}
  pier: {open: daily 07:00-17:00}
window: {place: pier, opens: 2027-05-11 07:00, closes: 2027-05-20 19:00}
people:
  Maro: {tickets: [{weld: 111, positions: [PA, PF], joints: [fillet], thickness: 3 mm to 20 mm}, fire watch]}
  Liss: {tickets: fitter}
tasks:
  drill: {at: pier, hours: 2 h}
  shim: {at: pier, man-hours: 4 h, people: 2}
  resin: {at: pier, standing: 9 h}
  fit: {kind: fit-up, at: pier, hours: 1 h, needs: {fitter: 1}}
repeat:
  bay:
    count: 2
    tasks:
      grind: {at: pier, hours: 1 h}
`

func read(t *testing.T, sets ...tasks.Setting) *tasks.Job {
	t.Helper()
	job, err := jobfile.ReadBytesChanged("job.yaml", []byte(changeJob), nil, sets)
	if err != nil {
		t.Fatalf("with %v: %v", sets, err)
	}
	return job
}

func taskOf(t *testing.T, job *tasks.Job, name string) *tasks.Task {
	t.Helper()
	for _, x := range job.Tasks {
		if x.Name == name {
			return x
		}
	}
	t.Fatalf("no task %q", name)
	return nil
}

// TestHoursChange: the change of a task's hours is one that the reader takes, whichever way the
// file gives them; of a repeated block every round changes.
func TestHoursChange(t *testing.T) {
	job := read(t)
	likely := func(x *tasks.Task) float64 {
		return map[string]float64{"hours": x.Hours.Likely, "man": x.ManHours.Likely, "standing": x.Standing.Likely}[map[bool]string{true: "hours"}[x.Hours.Likely > 0]+
			map[bool]string{true: "man"}[x.ManHours.Likely > 0]+map[bool]string{true: "standing"}[x.Standing.Likely > 0]]
	}
	for _, c := range []struct {
		task, typed, text string
		minutes           float64
	}{
		{"drill", "3", "hours of drill: 3 h", 180},
		{"drill", " 2 to 4 h ", "hours of drill: 2 to 4 h", 180},
		{"shim", "6 h", "man-hours of shim: 6 h", 360},
		{"resin", "90 min", "standing of resin: 90 min", 90},
		{"grind bay 2", "5 h", "hours of grind in every round of bay: 5 h", 300},
	} {
		got, err := hoursChange(taskOf(t, job, c.task), c.typed)
		if err != nil || got.text != c.text {
			t.Errorf("%s, %q: %q, %v; want %q", c.task, c.typed, got.text, err, c.text)
			continue
		}
		if m := likely(taskOf(t, read(t, got.sets...), c.task)); m != c.minutes {
			t.Errorf("%s, %q: the changed job has %v min, want %v", c.task, c.typed, m, c.minutes)
		}
	}
	changed, _ := hoursChange(taskOf(t, job, "grind bay 2"), "5 h")
	if m := likely(taskOf(t, read(t, changed.sets...), "grind bay 1")); m != 300 {
		t.Errorf("the other round has %v min, want 300", m)
	}
	for _, typed := range []string{"", "  ", "-1 h", "3 m", "2,5 h", "{a: 1}", "5 to 3 h", "]["} {
		if _, err := hoursChange(taskOf(t, job, "drill"), typed); err == nil {
			t.Errorf("%q is taken as hours", typed)
		}
	}
}

// TestLeaveOut: somebody left out is nowhere at any time; the others stay.
func TestLeaveOut(t *testing.T) {
	w, faults := expand.Expand(read(t), expand.Basis{})
	if faults != nil {
		t.Fatal(faults)
	}
	c := leaveOut(w, w.Job.People[1])
	changed, faults := expand.Expand(read(t, c.sets...), expand.Basis{})
	if faults != nil {
		t.Fatal(faults)
	}
	if n := len(changed.Presence["Liss"]); n != 0 {
		t.Errorf("Liss has %d stays", n)
	}
	if len(changed.Presence["Maro"]) == 0 {
		t.Error("Maro is gone too")
	}
}

// TestTickets: tickets written back are read as they were; two given to one person are one value.
func TestTickets(t *testing.T) {
	job := read(t)
	maro, liss := job.People[0], job.People[1]
	open := tickets(job, liss)
	if len(open) != 2 || ticketWords(open[0]) != "weld 111 PA PF fillet 3 to 20 mm" || ticketWords(open[1]) != "fire watch" {
		t.Fatalf("Liss may take %v", open)
	}
	list := []change{giveTicket(liss, open[0]), {sets: []tasks.Setting{{Path: []string{"tasks", "drill", "hours"}, Value: "1 h"}}}, giveTicket(liss, open[1])}
	sets := settings(job, list)
	if len(sets) != 2 {
		t.Fatalf("%d values, want one for the tickets and one for the hours: %v", len(sets), sets)
	}
	got := read(t, sets...).People[1].Tickets
	want := []tasks.Ticket{liss.Tickets[0], maro.Tickets[0], maro.Tickets[1]}
	if len(got) != len(want) {
		t.Fatalf("%d tickets, want %d", len(got), len(want))
	}
	for i := range got {
		if ticketValue(got[i]) != ticketValue(want[i]) || got[i].ThickTo != want[i].ThickTo || got[i].Process != want[i].Process {
			t.Errorf("ticket %d is %+v, want %+v", i, got[i], want[i])
		}
	}
}

// TestStarterChanges: every task of the starter job takes other hours, everybody may be left out
// or given any ticket, and the reader takes the changes.
func TestStarterChanges(t *testing.T) {
	data, err := os.ReadFile("../../../testdata/jobs/starter/job.yaml")
	if err != nil {
		t.Fatal(err)
	}
	job, err := jobfile.ReadBytes("job.yaml", data, nil)
	if err != nil {
		t.Fatal(err)
	}
	w, faults := expand.Expand(job, expand.Basis{})
	if faults != nil {
		t.Fatal(faults)
	}
	var all []change
	for _, x := range job.Tasks {
		c, err := hoursChange(x, "1 to 2 h")
		if err != nil {
			t.Errorf("%s: %v", x.Name, err)
		}
		all = append(all, c)
	}
	for _, p := range job.People {
		all = append(all, leaveOut(w, p))
		for _, ticket := range tickets(job, p) {
			all = append(all, giveTicket(p, ticket))
		}
	}
	for _, c := range all {
		if _, err := jobfile.ReadBytesChanged("job.yaml", data, nil, settings(job, []change{c})); err != nil {
			t.Errorf("%s: %v", c.text, err)
		}
	}
	if len(all) < len(job.Tasks)+2*len(job.People) {
		t.Errorf("only %d changes", len(all))
	}
}

// TestTried: what is printed on leaving names the keys of the job file.
func TestTried(t *testing.T) {
	m := New(fixture.Report())
	press(m, "5<enter>weld lugs<enter>3 h<enter>", 80, 24)
	if got := strings.Join(m.Tried(), "\n"); got != `tasks/weld lugs/hours: "3 h"` {
		t.Errorf("tried %q", got)
	}
	press(m, "<home><enter>weld lugs<enter>4 h<enter>", 80, 24) // the same task again
	if got := strings.Join(m.Tried(), "\n"); got != `tasks/weld lugs/hours: "4 h"` {
		t.Errorf("tried %q", got)
	}
}
