package text

import (
	"bytes"
	"encoding/json"
	"strings"
	"testing"

	"sailby/tasks/origin"
)

// Each figure has its line; what was explained above is named and not explained again.
func TestSteps(t *testing.T) {
	length := origin.Written("length", 2400, "mm", origin.Origin{Source: "command line"})
	metal := origin.Worked("metal", 0.46, "kg", "area x length", origin.House("area", 24.5, "mm2", "guessed"), length)
	arc := origin.Worked("arc time", 9.5, "min", "metal / rate", metal, origin.Published("rate", 2.9, "kg/h", "a table"))
	var b bytes.Buffer
	if err := Steps(&b, []string{"a seam"}, []origin.Figure{metal, arc}, []string{"mind the gap"}, Options{}); err != nil {
		t.Fatal(err)
	}
	got, _, _ := strings.Cut(b.String(), "The plan is arithmetic")
	want := `a seam

metal: 0.46 kg [formula: area x length]
  area: 24.5 mm2 [house judgement: guessed] (default)
  length: 2400 mm [given: command line]
arc time: 9.5 min [formula: metal / rate]
  metal: 0.46 kg [as above]
  rate: 2.9 kg/h [published: a table]

note: mind the gap

(default): no evidence stands behind it; give your own figure.

`
	if got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
	b.Reset()
	if err := Steps(&b, nil, []origin.Figure{length}, nil, Options{}); err != nil || strings.Contains(b.String(), "default") {
		t.Errorf("%v, %s", err, &b)
	}
	b.Reset()
	if err := StepsJSON(&b, []string{"a seam"}, []origin.Figure{arc}, nil); err != nil {
		t.Fatal(err)
	}
	var form struct {
		Steps []struct {
			Name string
			From []struct{ Name string }
		}
		Notes []string
	}
	if err := json.Unmarshal(b.Bytes(), &form); err != nil || len(form.Steps) != 1 || form.Steps[0].From[0].Name != "metal" || form.Notes == nil {
		t.Errorf("%v, %s", err, &b)
	}
}
