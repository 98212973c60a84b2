package jobfile

import (
	"strings"
	"testing"
	"testing/fstest"

	"sailby/tasks"
)

// TestDroppedKey: a setting without a value takes the key away; one that leads nowhere does nothing.
func TestDroppedKey(t *testing.T) {
	data := []byte("job: x\nplaces: {pier: {open: always}}\npeople: {Ines: {off: [2027-04-10], trade: welder}}\n")
	for _, tc := range []struct{ path, want string }{
		{"people/Ines/off", "job: x\nplaces: {pier: {open: always}}\npeople: {Ines: {trade: welder}}\n"},
		{"people/Tom/off", string(data)},
		{"places", "job: x\npeople: {Ines: {off: [2027-04-10], trade: welder}}\n"},
	} {
		got, err := Apply(data, []tasks.Setting{{Path: strings.Split(tc.path, "/")}})
		if err != nil || string(got) != tc.want {
			t.Errorf("%s: %q, want %q (%v)", tc.path, got, tc.want, err)
		}
	}
}

// TestSettingOfALibrary: a setting whose place is in a library changes that, and nothing of the job file.
func TestSettingOfALibrary(t *testing.T) {
	fsys := fstest.MapFS{"house.yaml": {Data: []byte("people: {Tom: {trade: fitter}}\n")}}
	job := []byte("job: x\nzone: UTC\nuse: house.yaml\nplaces: {pier: {open: always}}\nwindow: {place: pier, opens: 2027-04-05 08:00, closes: 2027-04-06 17:00}\ntasks: {a: {at: pier, hours: 1 h, who: Tom}}\n")
	got, err := ReadBytesChanged("job.yaml", job, fsys, []tasks.Setting{{Path: []string{"people", "Tom", "trade"}, Value: "rigger", Pos: tasks.Pos{File: "house.yaml"}}})
	if err != nil || got.People[0].Trade != "rigger" {
		t.Fatalf("%v, %v", got, err)
	}
}
