package sheets

import (
	"strings"
	"testing"

	"sailby/report/fixture"
)

// Names that the fonts lack are told once, by their lines; Latin, Greek and Cyrillic are printed.
func TestNamesThatCannotBePrinted(t *testing.T) {
	says := func(titles ...string) string {
		r := fixture.Report()
		for i, s := range titles {
			r.Job.Tasks[i].Title = s
			r.Job.Tasks[i].Pos.Line = 41 + i
		}
		var b strings.Builder
		for _, it := range packed(t, r, Options{}).Pages[0].Items {
			b.WriteString(it.Text + " ")
		}
		return strings.Join(strings.Fields(b.String()), " ")
	}
	const head = "no letters for; they are printed as \"?\": "
	if got := says("Łódź", "Ωμέγα", "Иван", "why?"); strings.Contains(got, "no letters for") {
		t.Errorf("told of names that are printed:\n%s", got)
	}
	if got := says("plate", "漢字", "hook \U0001FA9D"); !strings.Contains(got, head+"the task of line 42, the task of line 43 in the job file.") {
		t.Errorf("names that cannot be printed are not told:\n%s", got)
	}
	if got := says("一", "二", "三", "四", "五", "六", "七", "八"); !strings.Contains(got, "the task of line 46, and 2 more in the job file.") {
		t.Errorf("many names:\n%s", got)
	}
}
