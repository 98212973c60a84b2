package sheets

import (
	"context"
	"strings"
	"testing"

	"sailby/plan/settle"
	"sailby/tasks/jobfile"
)

// paged gives all text of the pages whose name holds the word, joined.
func paged(d *Document, word string) string {
	var b strings.Builder
	for _, p := range d.Pages {
		if !strings.Contains(p.Name, word) {
			continue
		}
		for _, it := range p.Items {
			if it.Kind == Text {
				b.WriteString(it.Text + " ")
			}
		}
	}
	return b.String()
}

func corner(t *testing.T, file string) *Document {
	t.Helper()
	job, err := jobfile.Read("../../testdata/jobs/corners/" + file)
	if err != nil {
		t.Fatal(err)
	}
	r, err := settle.Ask(context.Background(), job, settle.Options{Ticks: 20_000})
	if err != nil {
		t.Fatal(err)
	}
	d := packed(t, r, Options{})
	for _, f := range faults(d) {
		t.Error(f)
	}
	return d
}

func TestWeatherAndWaterOnTheSheets(t *testing.T) {
	for _, c := range []struct {
		job, page string
		want      []string
	}{
		{"evening-dew.yaml", "shift 2027-06-08", []string{"Weather and water", "Planned with forecast", "Quick by brush closed 07:00-08:00: steel", "must stay dry for 8 h", "steel at least 5 °C", "Dew point °C", "Above dew, K"}},
		{"evening-dew.yaml", "paint log", []string{"Planned with: air 15 °C; dew point 8 °C; steel 14 °C; steel above dew point 6 K"}},
		{"covered-coat.yaml", "shift 2027-06-08", []string{"Foot: way off by 13:07, covered 13:07-18:53", "is not fit for water before it is covered at Tue 13:07"}},
		{"neaped.yaml", "cover", []string{"Getting off again at slip: neaped"}},
	} {
		text := paged(corner(t, c.job), c.page)
		for _, want := range c.want {
			if !strings.Contains(text, want) {
				t.Errorf("%s, %s: no %q in\n%s", c.job, c.page, want, text)
			}
		}
	}
	if text := paged(corner(t, "neaped.yaml"), "shift 2027-06-08"); strings.Contains(text, "Weather and water") {
		t.Error("where nothing bears on the shift nothing is said")
	}
}
