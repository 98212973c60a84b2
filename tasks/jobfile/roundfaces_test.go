package jobfile

import (
	"strings"
	"testing"
)

const bays = `job: three bays
zone: Europe/London
places:
  yard: {open: "Mon-Fri 08:00-17:00"}
  bridge: {open: always, workfaces: {north: {people: 2}, mid: {people: 2}, south: {people: 2}}}
window: {place: bridge, opens: 2027-06-04 21:00, closes: 2027-06-07 01:00}
people: {A: {tickets: [fitter]}}
repeat:
  bay:
    count: 3
    workfaces: [north, mid, south]
    tasks:
      strip: {kind: plain, at: bridge, hours: 1 h}
      sweep: {kind: plain, at: bridge/mid, hours: 1 h}
`

// Each round of a block is in its own workface, but what names a workface stays there.
func TestWorkfaceOfEachRound(t *testing.T) {
	job, err := ReadBytes("job.yaml", []byte(bays), nil)
	if err != nil {
		t.Fatal(err)
	}
	want := map[string]string{"strip bay 1": "bridge/north", "strip bay 2": "bridge/mid", "strip bay 3": "bridge/south",
		"sweep bay 1": "bridge/mid", "sweep bay 3": "bridge/mid"}
	for _, task := range job.Tasks {
		if w, ok := want[task.Name]; ok && task.Where() != w {
			t.Errorf("%s is at %s, want %s", task.Name, task.Where(), w)
		}
	}
}

func TestWorkfacesThatDoNotMatchTheRounds(t *testing.T) {
	for text, want := range map[string]string{
		"[north, mid]":        "2 workfaces for 3 rounds",
		"[north, nid, south]": "no workface is called \"nid\"",
	} {
		_, err := ReadBytes("job.yaml", []byte(strings.Replace(bays, "[north, mid, south]", text, 1)), nil)
		if err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%s: got %v, want %s", text, err, want)
		}
	}
}
