package packlist

import (
	"math"
	"strings"
	"testing"

	"sailby/plan"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/jobfile"
)

// alone is the sluice job without its trailer.
func alone(t *testing.T) string {
	t.Helper()
	var kept []string
	for _, line := range strings.Split(textOf(t), "\n") {
		if !strings.HasPrefix(line, "  trailer:") {
			kept = append(kept, line)
		}
	}
	return strings.Join(kept, "\n")
}

func everyPayloadHolds(t *testing.T, list []Vehicle, all float64) {
	t.Helper()
	sum := 0.0
	for _, v := range list {
		goods := 0.0
		for _, g := range v.Goods {
			goods += g.Mass
		}
		if goods > v.Payload || math.Abs(goods-v.Mass) > 0.11 {
			t.Errorf("%s, run %d: %v kg of goods, %v kg said, %v kg of payload", v.Name, v.Run, goods, v.Mass, v.Payload)
		}
		sum += goods
	}
	if math.Abs(sum-all) > 0.2 {
		t.Errorf("the runs take %v kg, the list comes to %v kg", sum, all)
	}
}

// What is 40 kg over the van goes in two runs, and the answer says what goes on which and what the second
// asks for. By hand: back 30 + 45 + 100 + 150 min, there 150 + 45 + 100 + 30 + 45 min, at the wheel 360 min.
func TestFortyOverInTwoRuns(t *testing.T) {
	l := listOf(t, alone(t))
	if l.OK || len(l.Vehicles) != 0 || len(l.Split) != 2 || l.Split[1].Run != 2 || !strings.Contains(l.Nearest, "it goes in 2 runs") {
		t.Fatalf("%v %q %+v", l.OK, l.Nearest, l.Split)
	}
	everyPayloadHolds(t, l.Split, l.Mass)
	for _, want := range []string{"another 11 h 35 min back and there, 6 h of it at the wheel", "the ferry must be booked again", "the plan does not hold these hours"} {
		if !strings.Contains(l.Runs, want) {
			t.Errorf("nothing says %q: %s", want, l.Runs)
		}
	}
	told := strings.Join(l.Verdict(), "\n")
	if !strings.Contains(told, "40 kg over the 709 kg that all runs take (proved)") || !strings.Contains(told, "11 h 35 min") {
		t.Errorf("beside the verdict: %s", told)
	}
	allowed := listOf(t, strings.Replace(alone(t), "  van: {", "  van: {runs: 2, ", 1))
	if !allowed.OK || len(allowed.Vehicles) != 2 || allowed.Split != nil || allowed.Runs == "" {
		t.Fatalf("with two runs: %v %q", allowed.OK, allowed.Reason)
	}
	everyPayloadHolds(t, allowed.Vehicles, allowed.Mass)
	if both := listOf(t, textOf(t)); both.Runs != "" || both.Verdict() != nil {
		t.Errorf("van and trailer in one run: %q", both.Runs)
	}
}

const road = `job: Road
zone: Europe/London
places: {shop: {open: always}, pier: {open: daily 07:00-19:00}}
trips: [{name: road, place: pier, out: {drive: 3 h, leave: 2027-04-05 06:00, unload: 30 min}, back: {load: 1 h, leave: 2027-04-06 18:00, drive: 3 h}}]
people: {Tom: {}, Ines: {}}
driving: {house: {drive: 4 h, on duty: 11 h, rest before: 11 h}}
vehicles: {van: {payload: 500 kg, bed: [3 m, 2 m], driver: Tom}}
kit: {press: {mass: 300 kg}, pump: {mass: 290 kg}}
tasks:
  press in: {at: pier, hours: 2 h, who: Tom, kit: press}
  pump in: {at: pier, hours: 3 h, who: Tom, kit: pump, after: press in}
`

// With a plan: whether what goes second is there when it is wanted (by hand: 6 h 30 min after 09:30), the
// driver's day with the work around the drive, and the way back as well as the way out.
func TestRunsAndDutyWithAPlan(t *testing.T) {
	job, err := jobfile.ReadBytes("job.yaml", []byte(road), nil)
	if err != nil {
		t.Fatal(err)
	}
	w, faults := expand.Expand(job, expand.Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	opens := w.Window.Opens
	made := func(second, back hours.Minute) *List {
		p := &plan.Plan{Steps: []plan.Step{
			{Task: "press in", Start: opens, Finish: opens + 120, Pieces: []hours.Span{{From: opens, To: opens + 120}}, People: []string{"Tom"}},
			{Task: "pump in", Start: second, Finish: back, Pieces: []hours.Span{{From: second, To: second + 60}, {From: back - 60, To: back}}, People: []string{"Tom"}},
		}}
		return Make(&plan.Answer{Work: w, Plan: p})
	}
	late := made(opens+120, opens+180)
	if len(late.Split) != 2 || !strings.Contains(late.Runs, "is not there before Mon 5 Apr 16:00, 4 h 30 min too late") {
		t.Errorf("too late: %q", late.Runs)
	}
	next := opens + 22*60 // 07:30 on Tuesday
	early := made(next, w.Trip.Departs-60)
	if !strings.Contains(early.Runs, "it can be there by Mon 5 Apr 16:00") {
		t.Errorf("in time: %q", early.Runs)
	}
	flags := strings.Join(early.Flags, "\n")
	// Monday 06:00 to 11:30; Tuesday 07:30 to 21:00 with the drive home: 810 min; both runs in one day: 3 x 180 min
	for _, want := range []string{"Tom is on duty 810 min against 660 min on the way back", "Tom drives 540 min against 240 min with all runs in one day"} {
		if !strings.Contains(flags, want) {
			t.Errorf("nothing says %q:\n%s", want, flags)
		}
	}
	if strings.Contains(flags, "on the way out") {
		t.Errorf("5 h 30 min on the way out: %s", flags)
	}
}

// Straps over a weighed load of 760 kg on the most slippery bed, by hand to EN 12195-1:2010, forward:
// 1.25 x (0.8 - 0.2) x 760 x 1.03 x 9.81 / (2 x 0.2 x 4000 N) = 3.6; guessed, with a quarter more, 4.4.
func TestStrapsByHowTheMassIsKnown(t *testing.T) {
	for how, want := range map[string]int{"weighed": 4, "guessed": 5} {
		l := listOf(t, strings.Replace(strings.Replace(road, "payload: 500 kg", "payload: 2 t", 1), "kit: {press", "assemblies: {gate: {mass: 760 kg, known: "+how+", size: [2 m, 1 m, 300 mm]}}\nkit: {press", 1)+
			"  make: {kind: fit-up, at: shop, hours: 1 h, part: gate}\n  set: {kind: fit-up, at: pier, hours: 1 h, part: gate}\n")
		found := 0
		for _, v := range append(l.Vehicles, l.Split...) {
			for _, s := range v.Straps {
				if s.What == "gate" {
					found = s.Count
				}
			}
		}
		if found != want {
			t.Errorf("%s: %d straps, want %d (%s)", how, found, want, l.Reason)
		}
	}
}
