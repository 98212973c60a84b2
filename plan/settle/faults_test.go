package settle

import (
	"os"
	"strings"
	"testing"

	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// A task that no opening of its place has room for is told as a fault, with its message at the
// end of the file; the opening's first and last minutes are taken off once, not at every meal.
func TestLongerThanAnyOpening(t *testing.T) {
	const file = "../../testdata/faults/longer-than-any-opening.yaml"
	data, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	_, want, _ := strings.Cut(string(data), "# The fault:\n")
	job, err := jobfile.Read(file)
	if err != nil {
		t.Fatal(err)
	}
	faults := Faults(job, expand.Basis{})
	got := ""
	for _, f := range faults {
		f.Pos.File = "longer-than-any-opening.yaml"
		for _, line := range strings.Split(f.Error(), "\n") {
			got += "# " + line + "\n"
		}
	}
	if got != want {
		t.Errorf("got\n%swant\n%s", got, want)
	}
}

// Five hours after the meal are open in one stretch: opening up was before it.
func TestOpeningThatIsJustLongEnough(t *testing.T) {
	data, err := os.ReadFile("../../testdata/faults/longer-than-any-opening.yaml")
	if err != nil {
		t.Fatal(err)
	}
	text := strings.Replace(string(data), "hours: 4 h, in one go", "hours: 3.5 h, in one go", 1)
	job, err := jobfile.ReadBytes("job.yaml", []byte(text), nil)
	if err != nil {
		t.Fatal(err)
	}
	if f := Faults(job, expand.Basis{}); len(f) != 0 { // 210 min / 0.7 = 300 min
		t.Errorf("faults for a task that fits exactly: %v", f)
	}
}
