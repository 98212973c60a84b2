package jobfile

import (
	"testing"

	"sailby/tasks"
	"sailby/tasks/lift"
)

// What the file says of a lift arrives in the base units of the job.
func TestLiftingIsRead(t *testing.T) {
	job, err := Read("../../testdata/jobs/sluice/job.yaml")
	if err != nil {
		t.Fatal(err)
	}
	by := map[string]*tasks.Task{}
	for _, task := range job.Tasks {
		by[task.Name] = task
	}
	l := by["hang gate"].Lifting
	if l == nil || l.Slings == nil || len(l.Slings.Lugs) != 2 || l.Slings.Rise != 900 || l.Slings.Size != 7 || l.Slings.LugWLL != 700 || l.Tackle.Value != 9 {
		t.Fatalf("slings: %+v", l)
	}
	if l.Floor.Value != 200 || l.Lands.Value != 0.06 || l.Body != lift.BoxBody || l.Measures != "Brede" || l.Hangs != "weir gantry" {
		t.Errorf("floor %v kN/m2 on %v m2, body %v, measured by %q, hangs from %q", l.Floor.Value, l.Lands.Value, l.Body, l.Measures, l.Hangs)
	}
	if l.Secured == nil || l.Secured.Name != "pin gate" || by["old gate out"].Lifting.Proved.Name != "jack old gate" {
		t.Error("what secures and what frees is not read")
	}
	if out := by["old gate out"].Lifting.Slings; out.Datum != lift.FromHorizontal || out.Angle != 60 || out.LegLength != 1200 {
		t.Errorf("angle: %+v", out)
	}
	if n := by["braces on"].Joins; len(n) != 2 || n[1].Name != "gate/braces" || !n[0].Pos.Given() {
		t.Errorf("joins: %v", n)
	}
	v := job.Vehicles[0]
	if v.Gross != 3500 || v.Standing != 190 || v.Length != 3300 || v.Height != 1900 || v.Long != 5990 || v.Driver != "Brede" || !v.OwnTools || v.Bed != lift.SteelOnPly {
		t.Errorf("van: %+v", v)
	}
	if tr := job.Vehicles[1]; tr.TowedBy != "van" || tr.Payload != 500 || tr.Height != 0 {
		t.Errorf("trailer: %+v", tr)
	}
	if c := job.Carriage[0]; c.Class != "gas" || c.Most != 2 || !c.AskBefore {
		t.Errorf("carriage: %+v", c)
	}
	if d := job.Driving[0]; d.Drive != 540 || d.DriveBreak != 270 || d.OnDuty != 660 {
		t.Errorf("driving: %+v", d)
	}
	if trip := job.Trips[0]; len(trip.Bands) != 2 || trip.Bands[1].Length != 11000 || trip.Sea != lift.SeaA {
		t.Errorf("trip: %+v %v", trip.Bands, trip.Sea)
	}
	if p := job.Packing; p.Allowance.Value != 0.1 || len(p.Boxes) != 2 || len(p.Also) != 2 || !p.Also[0].Stops || p.Also[1].Of != 3 {
		t.Errorf("packing: %+v", p)
	}
	if k := job.Kit[0]; k.Closed.Value != 380 || k.HungAt.Value != 4200 || k.Spare == "" {
		t.Errorf("hoist: %+v", k)
	}
}

// Rounds of a block each have what secures their own lift.
func TestSecuredInRounds(t *testing.T) {
	job, err := ReadBytes("job.yaml", []byte(`job: Bays
zone: Europe/London
places: {shop: {open: always}, pier: {open: always}}
window: {place: pier, opens: 2027-04-05 08:00, closes: 2027-04-09 18:00}
people: {Tom: {tickets: [slinger/signaller]}, Ann: {}}
kit: {chain hoist: {rated: 1 t}}
repeat:
  bay:
    count: 2
    tasks:
      up: {kind: lift, at: pier, mass: 100 kg, by: chain hoist, secured by: pin}
      pin: {at: pier, hours: 1 h}
`), nil)
	if err != nil {
		t.Fatal(err)
	}
	for i, want := range []string{"pin bay 1", "", "pin bay 2"} {
		task := job.Tasks[i]
		if want == "" {
			if len(task.Links) != 1 || task.Links[0].Task != "up bay 1" {
				t.Errorf("%s comes after %v", task.Name, task.Links)
			}
			continue
		}
		if task.Lifting.Secured == nil || task.Lifting.Secured.Name != want {
			t.Errorf("%s is secured by %v, want %s", task.Name, task.Lifting.Secured, want)
		}
	}
}
