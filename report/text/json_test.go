package text

import (
	"bytes"
	"encoding/json"
	"strings"
	"testing"
	"time"

	"sailby/plan"
	"sailby/report/fixture"
	"sailby/tasks"
)

type object = map[string]any

func decode(t *testing.T, write func(b *bytes.Buffer) error) object {
	t.Helper()
	var b bytes.Buffer
	if err := write(&b); err != nil {
		t.Fatal(err)
	}
	var v object
	if err := json.Unmarshal(b.Bytes(), &v); err != nil {
		t.Fatal(err)
	}
	return v
}

// has checks that the fields are there and that times and minutes look like what they are.
func has(t *testing.T, where string, v object, fields ...string) {
	t.Helper()
	for _, f := range fields {
		if _, ok := v[f]; !ok {
			t.Errorf("%s has no %q", where, f)
		}
	}
	for k, x := range v {
		if strings.HasSuffix(k, "_min") && x != nil {
			if n, ok := x.(float64); !ok || n != float64(int(n)) {
				t.Errorf("%s.%s is %v, want whole minutes", where, k, x)
			}
		}
	}
}

func TestFitsJSON(t *testing.T) {
	v := decode(t, func(b *bytes.Buffer) error { return FitsJSON(b, fixture.Report()) })
	fields := []string{"verdict", "basis", "window", "finish", "earliest_possible", "in_hand_min", "deadlines", "governing", "proof"}
	has(t, "fits", v, append(fields, "with_maybes", "high_hours")...)
	maybes, high := v["with_maybes"].(object), v["high_hours"].(object)
	has(t, "with_maybes", maybes, fields...)
	has(t, "high_hours", high, fields...)
	has(t, "window", v["window"].(object), "place", "opens", "closes")
	deadline := v["deadlines"].([]any)[0].(object)
	has(t, "deadline", deadline, "task", "by", "finish", "in_hand_min")
	for _, c := range []struct {
		name      string
		got, want any
	}{
		{"verdict", v["verdict"], "fits"},
		{"basis", v["basis"], "likely"},
		{"with_maybes.verdict", maybes["verdict"], "unsettled"},
		{"with_maybes.late", maybes["late"], true},
		{"with_maybes.in_hand_min", maybes["in_hand_min"], -130.0},
		{"with_maybes.gap_min", maybes["gap_min"], 175.0}, // 16:00+2:10 less 15:15
		{"high_hours.verdict", high["verdict"], "cannot-fit"},
		{"high_hours.finish", high["finish"], nil},
		{"high_hours.in_hand_min", high["in_hand_min"], nil},
		{"window.opens", v["window"].(object)["opens"], "2027-04-06T07:00:00+01:00"},
		{"finish", v["finish"], "2027-04-09T11:00:00+01:00"},
		{"earliest_possible", v["earliest_possible"], "2027-04-09T09:25:00+01:00"},
		{"in_hand_min", v["in_hand_min"], 300.0},
		{"deadline.task", deadline["task"], "open again"},
		{"deadline.by", deadline["by"], "2027-04-08T17:30:00+01:00"},
		{"deadline.in_hand_min", deadline["in_hand_min"], 90.0},
		{"proof", v["proof"], nil},
		{"high proof over", high["proof"].(object)["over_min"], 200.0},
		{"high proof kind", high["proof"].(object)["kind"], "work"},
		{"governing", v["governing"].([]any)[1].(object)["kind"], "hours"},
		{"governing start", v["governing"].([]any)[3].(object)["start"], "2027-04-07T08:00:00+01:00"},
	} {
		if c.got != c.want {
			t.Errorf("%s is %v, want %v", c.name, c.got, c.want)
		}
	}
	same := fixture.Report()
	same.Maybes, same.High = nil, nil
	v = decode(t, func(b *bytes.Buffer) error { return FitsJSON(b, same) })
	if v["with_maybes"].(object)["verdict"] != "fits" || v["high_hours"].(object)["finish"] != v["finish"] {
		t.Error("without maybes and ranges the other answers are not those of the likely one")
	}
}

func findTask(t *testing.T, v object, id string) object {
	t.Helper()
	for _, x := range v["tasks"].([]any) {
		if x.(object)["id"] == id {
			return x.(object)
		}
	}
	t.Fatalf("no task %q", id)
	return nil
}

func TestDaysJSON(t *testing.T) {
	v := decode(t, func(b *bytes.Buffer) error { return DaysJSON(b, fixture.Report(), Options{}) })
	if n := len(v["tasks"].([]any)); n != 13 {
		t.Errorf("%d tasks, want 13 of the 14", n)
	}
	if l := v["left_out"].([]any); len(l) != 1 || l[0] != "rot found" {
		t.Errorf("left out: %v", l)
	}
	lugs := findTask(t, v, "weld lugs")
	has(t, "task", lugs, "id", "title", "kind", "place", "workface", "start", "finish", "pieces", "people", "kit", "latest_finish", "leeway_min", "set_by")
	pieces := lugs["pieces"].([]any)
	for _, c := range []struct {
		name      string
		got, want any
	}{
		{"title", lugs["title"], "weld lugs"},
		{"kind", lugs["kind"], "weld"},
		{"place", lugs["place"], "pier"},
		{"workface", lugs["workface"], "hinge"},
		{"start", lugs["start"], "2027-04-07T09:30:00+01:00"},
		{"finish", lugs["finish"], "2027-04-08T09:40:00+01:00"},
		{"pieces", len(pieces), 3},
		{"second piece", pieces[1].([]any)[0], "2027-04-07T13:00:00+01:00"},
		{"latest", lugs["latest_finish"], "2027-04-08T10:00:00+01:00"},
		{"leeway", lugs["leeway_min"], 20.0},
		{"set by", lugs["set_by"].([]any)[0].(object)["kind"], "person"},
		{"people", len(lugs["people"].([]any)), 2},
		{"kit", lugs["kit"].([]any)[0], "mig set"},
		{"watches", len(lugs["fire_watches"].([]any)), 2},
		{"home time has the home offset", findTask(t, v, "cut plate")["start"], "2027-04-01T08:00:00+02:00"},
		// A coat is finished with its last hands-on step; drying is standing time.
		{"coat finish", findTask(t, v, "coat lugs")["finish"], "2027-04-09T08:40:00+01:00"},
		{"coat leeway", findTask(t, v, "coat lugs")["leeway_min"], 60.0},
		{"pieces of a coat are hands-on alone", len(findTask(t, v, "coat lugs")["pieces"].([]any)), 2},
		{"standing time", findTask(t, v, "resin set")["finish"], "2027-04-06T23:10:00+01:00"},
	} {
		if c.got != c.want {
			t.Errorf("%s is %v, want %v", c.name, c.got, c.want)
		}
	}
	if n := len(v["shifts"].([]any)); n != 8 {
		t.Errorf("%d shifts, want 8", n)
	}
}

func TestWhyJSON(t *testing.T) {
	v := decode(t, func(b *bytes.Buffer) error { return WhyJSON(b, fixture.Report(), "weld lugs", Options{}) })
	step := v["steps"].([]any)[0].(object)
	tree := step["hours"].(object)
	if v["happens"] != true || tree["name"] != "hands-on time" || tree["value"] != 336.0 || tree["origin"] != "formula" {
		t.Errorf("tree %v", tree)
	}
	soft := 0
	var walk func(f object)
	walk = func(f object) {
		if f["default"] == true {
			soft++
		}
		list, _ := f["from"].([]any)
		for _, g := range list {
			walk(g.(object))
		}
	}
	walk(tree)
	if soft != 3 { // density, deposition rate, operating factor
		t.Errorf("%d soft defaults in the tree, want 3", soft)
	}
	v = decode(t, func(b *bytes.Buffer) error { return WhyJSON(b, fixture.Report(), "rot found", Options{}) })
	if v["happens"] != false || v["chance"] != 0.35 || v["id"] != "rot found" {
		t.Errorf("a maybe: %v", v)
	}
	none := fixture.Report()
	none.Likely = none.High
	v = decode(t, func(b *bytes.Buffer) error { return WhyJSON(b, none, "weld lugs", Options{}) })
	if v["start"] != nil || v["steps"].([]any)[0].(object)["hours"].(object)["value"] != 336.0 {
		t.Errorf("without a plan: start %v", v["start"])
	}
	if err := WhyJSON(&bytes.Buffer{}, fixture.Report(), "nothing like it", Options{}); err == nil {
		t.Error("an unknown task gives JSON")
	}
}

// TestTimesAreRFC3339 walks all JSON for strings that begin like a date.
func TestTimesAreRFC3339(t *testing.T) {
	n := 0
	var walk func(v any)
	walk = func(v any) {
		switch v := v.(type) {
		case object:
			for _, x := range v {
				walk(x)
			}
		case []any:
			for _, x := range v {
				walk(x)
			}
		case string:
			if strings.HasPrefix(v, "2027-") && strings.Contains(v, "T") {
				n++
				if m, err := time.Parse(time.RFC3339, v); err != nil || m.UTC().Format(time.RFC3339) == v {
					t.Errorf("%q is no local time with its offset (%v)", v, err)
				}
			}
		}
	}
	walk(decode(t, func(b *bytes.Buffer) error { return FitsJSON(b, fixture.Report()) }))
	walk(decode(t, func(b *bytes.Buffer) error { return DaysJSON(b, fixture.Report(), Options{}) }))
	if n < 100 {
		t.Errorf("only %d times seen", n)
	}
}

func TestHostileNamesInJSON(t *testing.T) {
	r := fixture.Report()
	r.Job.Name = "a\x1b[31m\u2028\xffb<c>"
	r.Job.Notes = []tasks.Note{{Text: "\u202ex"}}
	r.High.Proof.Kind = plan.BySearch
	v := decode(t, func(b *bytes.Buffer) error { return FitsJSON(b, r) })
	if v["job"] != "a ?b<c>" || v["notes"].([]any)[0].(object)["text"] != "x" {
		t.Errorf("job %q, note %v", v["job"], v["notes"])
	}
}
