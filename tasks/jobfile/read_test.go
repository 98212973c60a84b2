package jobfile

import (
	"testing"
)

func TestSketch(t *testing.T) {
	job, err := Read("testdata/sketch.yaml")
	if err != nil {
		t.Fatal(err)
	}
	trip := job.Trips[0]
	for _, n := range job.Notes {
		t.Log(n.Text)
	}
	t.Log(trip.Leaves.In(job.Zone), trip.Opens.In(job.Zone), trip.Closes.In(job.Zone), trip.Home.In(job.Zone))
}
