package jobfile

import (
	"fmt"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks"
)

// feasible looks for times by relaxation (Bellman and Ford): tasks last a minute, links are waits of at
// least Min. Only a circle with a length above nothing has none.
func feasible(list []*tasks.Task) bool {
	at := map[string][2]int{}
	for _, t := range list {
		at[t.Name] = [2]int{0, 1}
	}
	for range 2*len(list) + 2 {
		moved := false
		for _, t := range list {
			own := at[t.Name]
			for _, l := range t.Links {
				from, ok := at[l.Task]
				if !ok {
					continue
				}
				need := from[1] + l.Min.Minutes
				if l.From == tasks.Start {
					need = from[0] + l.Min.Minutes
				}
				end := 0
				if l.To == tasks.Finish {
					end = 1
				}
				if own[end] < need {
					own[end] = need
					moved = true
				}
			}
			if own[1] < own[0]+1 {
				own[1] = own[0] + 1
				moved = true
			}
			at[t.Name] = own
		}
		if !moved {
			return true
		}
	}
	return false
}

// Circles are told exactly where no times exist.
func TestCirclesLaw(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r := newReader("job.yaml", nil)
		n := rapid.IntRange(1, 6).Draw(t, "tasks")
		for i := range n {
			r.job.Tasks = append(r.job.Tasks, &tasks.Task{Name: fmt.Sprint(i)})
		}
		for i := range rapid.IntRange(0, 8).Draw(t, "links") {
			x := r.job.Tasks[rapid.IntRange(0, n-1).Draw(t, "to")]
			x.Links = append(x.Links, tasks.Link{Task: fmt.Sprint(rapid.IntRange(0, n-1).Draw(t, "from")), From: tasks.LinkEnd(rapid.IntRange(0, 1).Draw(t, "a")),
				To: tasks.LinkEnd(rapid.IntRange(0, 1).Draw(t, "b")), Min: tasks.Wait{Minutes: rapid.IntRange(0, 1).Draw(t, "min")}, Pos: tasks.Pos{File: "job.yaml", Line: i + 1, Col: 1}})
		}
		r.judgeCycles()
		if want := feasible(r.job.Tasks); (len(r.faults) == 0) != want {
			t.Fatalf("times exist: %v, faults %v", want, r.faults)
		}
	})
}

func TestLongCircle(t *testing.T) {
	var b strings.Builder
	for i := range 1000 {
		fmt.Fprintf(&b, "  t%d: {at: pier, hours: 1, after: t%d}\n", i+1, i)
	}
	_, err := ReadBytes("job.yaml", text(t, b.String(), "resin: {at: pier, standing: 12 h}", "t0: {at: pier, standing: 12 h, after: t1000}"), nil)
	if err == nil || !strings.Contains(err.Error(), `"t0" after "t1000"`) || !strings.Contains(err.Error(), "(989 more links)") || len(err.Error()) > 1000 {
		t.Errorf("%v", err)
	}
}

func TestNames(t *testing.T) {
	for name, says := range map[string]string{
		"' x'": "begins or ends with a blank", "''": "has no name", "'--'": "has no letter", "\"a\\nb\"": "line break", "[a]": "a key is a list", "'" + strings.Repeat("ä", 81) + "'": "has 81 letters",
		"previous x": `"previous" stands before names in links`, "every x": `"every" stands before names`,
	} {
		_, err := ReadBytes("job.yaml", text(t, "  ? "+name+"\n  : {at: pier, hours: 1}\n"), nil)
		if err == nil || !strings.Contains(err.Error(), says) {
			t.Errorf("%s: %v, want %q", name, err, says)
		}
	}
	job := read(t, text(t, "  '2027-04-05': {at: pier, hours: 1}\n  no: {at: pier, hours: 1}\n  1.5: {at: pier, hours: 1, after: [no, 2027-04-05]}\n  Schweißen / Ø 3: {at: pier, hours: 1}\n  "+strings.Repeat("ä", 80)+": {at: pier, hours: 1}\n"))
	same(t, "names", line(job.Tasks[4].Name, job.Tasks[5].Name, job.Tasks[6].Name, job.Tasks[6].Links[0].Task, job.Tasks[6].Links[1].Task, job.Tasks[7].Name), "2027-04-05 no 1.5 no 2027-04-05 Schweißen / Ø 3")
}

// An uncertain amount written out, in every way it can be wrong.
func TestThreePoints(t *testing.T) {
	job := read(t, text(t, "", "hours: 3}", "hours: {low: 3, high: 5 h}}"))
	same(t, "hours", task(t, job, "weld lugs").Hours.Range, "{180 240 300}")
	for value, says := range map[string]string{
		"{low: 3 h}": "high is missing", "{high: 3 h, likely: 2 h}": "low is missing", "{low: 3 h, high: 5 kg}": "is not a unit", "{low: 3 h, high: 9000 h}": "outside 0 min to", "{low: 3 h, high: 5 h, mean: 4 h}": "is not a key here",
		"3 to 9000 h": "outside 0 min to", "[3 h]": "expected one value", "-3 h": "outside 0 min to",
	} {
		refused(t, text(t, "", "hours: 3}", "hours: "+value+"}"), says)
	}
}

// What stands in a library or a table is told with its own file and line.
func TestFaultsOfTables(t *testing.T) {
	dir := t.TempDir()
	write := func(name, data string) {
		t.Helper()
		if err := writeFile(dir+"/"+name, data); err != nil {
			t.Fatal(err)
		}
	}
	write("reach.csv", "# zone: Europe/London\nfrom,to\n2027-04-06 12:00,2027-04-06 08:00\n")
	write("job.yaml", string(text(t, "", "{people: 2}", "{reach: {file: reach.csv}}")))
	_, err := Read(dir + "/job.yaml")
	if err == nil || !strings.Contains(err.Error(), "reach.csv:3:18: ") {
		t.Errorf("%v", err)
	}
	write("job.yaml", string(text(t, "", "{people: 2}", "{reach: {file: .}}")))
	if _, err := Read(dir + "/job.yaml"); err == nil || !strings.Contains(err.Error(), "outside the folder") {
		t.Errorf("%v", err)
	}
	write("job.yaml", string(text(t, "")))
	job, err := ReadChanged(dir+"/job.yaml", []tasks.Setting{{Path: []string{"tasks", "resin", "standing"}, Value: "1 h"}})
	if err != nil || task(t, job, "resin").Standing.Likely != 60 {
		t.Errorf("%v", err)
	}
}
