package settle

import (
	"context"
	"fmt"
	"os"
	"strings"
	"testing"

	"sailby/plan"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// missed is the corner in which a longest wait between two coats runs over a closed Sunday to the window's last day.
func missed(t *testing.T, changes ...string) *plan.Report {
	t.Helper()
	data, err := os.ReadFile("../../testdata/jobs/corners/missed-recoat.yaml")
	if err != nil {
		t.Fatal(err)
	}
	text := strings.NewReplacer(changes...).Replace(string(data))
	job, err := jobfile.ReadBytes("job.yaml", []byte(text), nil)
	if err != nil {
		t.Fatal(err)
	}
	rep, err := Ask(context.Background(), job, Options{Ticks: 20_000})
	if err != nil {
		t.Fatal(err)
	}
	return rep
}

func mendedKeys(a *plan.Answer) string {
	var keys []string
	for _, m := range a.Work.Rescues {
		if m.Mended {
			keys = append(keys, m.Key)
		}
	}
	return strings.Join(keys, ", ")
}

func TestMissedRecoatIsMended(t *testing.T) {
	const twoTasks = "coats: [quick, quick]}"
	for _, c := range []struct {
		what    string
		changes []string
		verdict plan.Verdict
		mended  string
	}{
		{"as it stands", nil, plan.Fits, "paint / coat 2"},
		{"its author does not want it", []string{"hours: 2 h,", "hours: 2 h, rescue: no,"}, plan.CannotFit, ""},
		{"the wait can be kept", []string{"max: 24 h", "max: 60 h"}, plan.Fits, ""},
		{"no room for it", []string{"closes: 2027-06-07 16:00", "closes: 2027-06-07 15:00"}, plan.CannotFit, ""},
		{"between two tasks", []string{twoTasks, "coats: quick}\n  again: {kind: coat, at: slip, area: 8 m2, hours: 1 h, coats: quick, after: paint}", "hours: 2 h", "hours: 1 h"}, plan.Fits, "again / coat 1"},
		{"a third coat needs none", []string{"[quick, quick]", "[quick, quick, last]", "tasks:", "  last: {kind: two-pack epoxy}\n\ntasks:", "{quick: {10 C: {min: 8 h, max: 24 h}}}",
			"{quick: {10 C: {min: 8 h, max: 24 h}}, last: {10 C: {min: 10 min, max: 24 h}}}", "hours: 2 h", "hours: 90 min"}, plan.Fits, "paint / coat 2"},
	} {
		t.Run(c.what, func(t *testing.T) {
			rep := missed(t, c.changes...)
			if a := rep.Likely; a.Verdict != c.verdict || mendedKeys(a) != c.mended {
				t.Errorf("%s with %q mended, want %s with %q", a.Verdict, mendedKeys(a), c.verdict, c.mended)
			}
			if rep.Likely.Verdict == plan.CannotFit && !rep.LowToo && c.what != "no room for it" {
				t.Error("cannot fit, but not at the low ends, which are the same")
			}
		})
	}
}

// Every choice of up to three, fewest first; of more, each, all of them, and all but one.
func TestChoices(t *testing.T) {
	for n, want := range map[int]string{1: "[[0]]", 2: "[[0] [1] [0 1]]", 3: "[[0] [1] [2] [0 1] [0 2] [1 2] [0 1 2]]", 4: "[[0] [1] [2] [3] [0 1 2 3] [1 2 3] [0 2 3] [0 1 3] [0 1 2]]",
		7: "[[0] [1] [2] [3] [4] [5] [0 1 2 3 4 5 6] [1 2 3 4 5 6] [0 2 3 4 5 6] [0 1 3 4 5 6] [0 1 2 4 5 6] [0 1 2 3 5 6] [0 1 2 3 4 6]]"} {
		list := make([]expand.Rescue, n)
		for i := range list {
			list[i].Key = fmt.Sprint(i)
		}
		if got := fmt.Sprint(choices(list)); got != want {
			t.Errorf("%d: %s, want %s", n, got, want)
		}
	}
}

// Four longest waits, of which two run over the closed Sunday: four tasks of two coats each, two of them with a wait
// that is long enough. Mended are the two that must be, no more.
func TestOfFourTheTwoThatMustBeAreMended(t *testing.T) {
	const plain = "  paint:    {kind: coat, at: slip, area: 8 m2, hours: 2 h, coats: [quick, quick]}"
	const slow = "  slow: {kind: two-pack epoxy, next coat: {slow: {10 C: {min: 8 h, max: 90 h}}}, hard dry: {10 C: 8 h}, touch dry: {10 C: 2 h}, solvent gone: {10 C: 8 h}}\n\ntasks:"
	rep := missed(t, plain, `  a: {kind: coat, at: slip, area: 2 m2, hours: 1 h, coats: [quick, quick], who: Bo}
  b: {kind: coat, at: slip, area: 2 m2, hours: 1 h, coats: [slow, slow], who: Cy}
  c: {kind: coat, at: slip, area: 2 m2, hours: 1 h, coats: [quick, quick], who: Di}
  d: {kind: coat, at: slip, area: 2 m2, hours: 1 h, coats: [slow, slow], who: Ed}`, "tasks:", slow, "people:", "people:\n  Cy: {tickets: [painter]}\n  Di: {tickets: [painter]}\n  Ed: {tickets: [painter]}")
	if got := mendedKeys(rep.Likely); rep.Likely.Verdict != plan.Fits || got != "a / coat 2, c / coat 2" {
		t.Errorf("%s with %q mended", rep.Likely.Verdict, got)
	}
}
