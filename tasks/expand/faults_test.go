package expand

import (
	"testing"

	"sailby/tasks"
)

// What only the estimate shows is told with the task's place in the file and a way out.
func TestFaultsOfTheEstimate(t *testing.T) {
	for _, tc := range []struct{ says, task string }{
		{"nothing says how long fitting takes", "kind: fit-up"},
		{"nothing says how long fitting takes", "kind: fit-up, part: mast"},
		{"nothing says what length of seam", "kind: test, by: visual"},
		{`a test by "leak" has no hours of its own`, "kind: test, by: leak"},
		{`cutting by "laser" has no hours of its own`, "kind: cut, by: laser, length: 1 m, thickness: 10 mm"},
		{"nothing says how large the surface", "kind: surface prep, surface: mast"},
		{"nothing says how large the surface", "kind: coat, coats: primer, surface: mast"},
	} {
		text := "tasks: {it: {at: shop, " + tc.task + "}}"
		refused(t, tc.says, text, "assemblies: {mast: {mass: 80 kg}}")
	}
}

// Faults that a file cannot have once it is read: a job made by hand still gets an answer.
func TestJobsMadeByHand(t *testing.T) {
	for _, tc := range []struct {
		says   string
		change func(*tasks.Job)
	}{
		{"needs its hours", func(j *tasks.Job) { j.Tasks[0].Hours = tasks.Range{} }},
		{"it has no joints and no hours", func(j *tasks.Job) { j.Tasks[0].Kind, j.Tasks[0].Hours = tasks.Weld, tasks.Range{} }},
		{"it needs length and thickness, or hours", func(j *tasks.Job) { j.Tasks[0].Kind, j.Tasks[0].Hours = tasks.Cut, tasks.Range{} }},
		{"nothing says what it lifts", func(j *tasks.Job) { j.Tasks[0].Kind, j.Tasks[0].Hours = tasks.Lift, tasks.Range{} }},
		{`there is no assembly "boat"`, func(j *tasks.Job) {
			j.Tasks[0].Kind, j.Tasks[0].Hours, j.Tasks[0].Lifts = tasks.Lift, tasks.Range{}, "boat"
		}},
		{`there is no assembly "boat"`, func(j *tasks.Job) {
			j.Tasks[0].Kind, j.Tasks[0].Hours, j.Tasks[0].Parts = tasks.FitUp, tasks.Range{}, []string{"boat"}
		}},
		{`there is no paint "red"`, func(j *tasks.Job) { j.Tasks[0].Kind, j.Tasks[0].Coats = tasks.Coat, []string{"red"} }},
		{"it has no coats", func(j *tasks.Job) { j.Tasks[0].Kind = tasks.Coat }},
		{`kit "bench" stays at shop and the task is at pier`, func(j *tasks.Job) {
			j.Tasks[0].Kit = []tasks.Use{{Kit: &tasks.Kit{Name: "bench", Count: 1, At: j.Places[0]}, Count: 1}}
		}},
		{"has no state", func(j *tasks.Job) { j.Tasks[1].Links[0].State = "cooled" }},
		{"does not say when it is", func(j *tasks.Job) {
			j.Tasks[0].Kind, j.Tasks[0].Coats = tasks.Coat, []string{"primer"}
			j.Tasks[1].Links[0].State = "blue"
		}},
		{"that weekday does not fall just once", func(j *tasks.Job) {
			j.Tasks[0].NotBefore = &tasks.Moment{Text: "Sun 10:00", ByName: true, Weekday: 0, Pos: j.Tasks[0].Pos}
		}},
		{`there is no paint "red"`, func(j *tasks.Job) { // and nothing of it to be due
			j.Tasks[0].Kind, j.Tasks[0].Coats = tasks.Coat, []string{"red"}
			j.Tasks[0].Deadline = &tasks.Moment{Day: 2, Minute: 600}
		}},
		{"the clocks go forward over it", func(j *tasks.Job) {
			j.Tasks[0].Deadline = &tasks.Moment{Text: "2027-03-28 01:30", Pos: j.Tasks[0].Pos, Minute: 90, Zone: j.Zone}
			j.Tasks[0].Deadline.Date.Year, j.Tasks[0].Deadline.Date.Month, j.Tasks[0].Deadline.Date.Day = 2027, 3, 28
		}},
	} {
		job := read(t, "tasks: {it: {at: pier, hours: 1 h}, next: {at: pier, hours: 1 h, after: it}}")
		tc.change(job)
		w, err := Expand(job, Basis{})
		faulty(t, w, err, tc.says)
	}
}

func TestAColdPaintNeverCures(t *testing.T) {
	cold := "places: {shop: {open: always, steel temperature: -5 C}, pier: {open: always}}"
	refused(t, "does not cure at -5 °C", cold, "tasks: {it: {kind: coat, at: shop, hours: 1 h, coats: primer}, next: {at: shop, hours: 1 h, after: it}}")
}

func TestAPairOfPaintsThatMustNotFollow(t *testing.T) {
	job := read(t, "tasks: {a: {kind: coat, at: shop, hours: 1 h, coats: top}, b: {kind: coat, at: shop, hours: 1 h, coats: primer, after: a}, c: {kind: coat, at: shop, hours: 1 h, coats: primer}}")
	for _, p := range job.Paints {
		p.Never = map[string]string{"two-pack epoxy": "it lifts"}
		p.NextCoat = nil
	}
	w, err := Expand(job, Basis{})
	faulty(t, w, err, `task "b"`)
	job.Tasks[1].Links = nil
	job.Tasks[2].Coats = []string{"top", "primer"}
	w, err = Expand(job, Basis{})
	faulty(t, w, err, `task "c"`)
}

func TestATripThatIsNotThere(t *testing.T) {
	job := read(t, trips, two, "tasks: {it: {at: pier, hours: 1 h}}")
	w, err := Expand(job, Basis{Trip: "next year"})
	faulty(t, w, err, `there is no trip "next year"`)
	plain := read(t, "tasks: {it: {at: pier, hours: 1 h}}")
	w, err = Expand(plain, Basis{Trip: "long"})
	faulty(t, w, err, `trip "long": the job has a plain window`)
}

func TestAllFaultsAreToldAtOnceInTheirOrder(t *testing.T) {
	job := read(t, "tasks:\n  a: {at: shop, kind: fit-up}\n  b: {at: shop, hours: 1 h}\n  c: {at: shop, kind: test, by: leak}")
	_, faults := Expand(job, Basis{})
	if len(faults) != 2 || faults[0].Pos.Line >= faults[1].Pos.Line {
		t.Errorf("got %v", faults)
	}
}
