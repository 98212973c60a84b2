package expand

import (
	"math"
	"strings"
	"testing"
)

// find gives a check of a judgement.
func (j Judgement) find(t *testing.T, what string) Check {
	t.Helper()
	for _, c := range j.Checks {
		if c.What == what {
			return c
		}
	}
	t.Fatalf("no check %q in %+v", what, j.Checks)
	return Check{}
}

// The revised NIOSH equation through a job file: 23 kg x HM .625 x VM .835 x DM .895 x AM .856 x FM .94 x CM .95 is
// 8.212 kg (multipliers of NIOSH 94-110, product by hand). It warns and refuses nothing.
func TestNIOSHOnRequest(t *testing.T) {
	w := likely(t, `tasks:
  up: {kind: lift, at: pier/hinge, mass: 20 kg, by: hands, hands: {men: 1, NIOSH: {out: 400 mm, up: 200 mm, travel: 600 mm, turn: 45 deg, per minute: 1, grip: fair}}}`)
	j, err := w.step(t, "up / lift").Rigging.Judge(nil)
	if err != nil {
		t.Fatal(err)
	}
	c := j.find(t, "by the revised NIOSH equation, one person")
	if math.Abs(c.Result.Have-8.212) > 0.01 || c.Result.OK || !c.Filter || !j.OK {
		t.Errorf("limit %v kg, OK %v, filter %v, lift allowed %v", c.Result.Have, c.Result.OK, c.Filter, j.OK)
	}
}

// A sealed tube pushes aside more water than it weighs; the same open does not.
func TestFloating(t *testing.T) {
	for sealed, floats := range map[string]bool{"yes": true, "no": false} {
		w := likely(t, "assemblies: {pontoon: {parts: {tube: {section: CHS 323.9x5, length: 6 m, sealed: "+sealed+"}}}}",
			"tasks: {up: {kind: lift, at: pier/hinge, lifts: pontoon, by: chain hoist, in water: yes}}")
		j, err := w.step(t, "up / lift").Rigging.Judge(nil)
		if err != nil {
			t.Fatal(err)
		}
		if c := j.find(t, "floating in sea water"); c.Result.OK != floats || !j.OK {
			t.Errorf("sealed %s: floats %v (%s)", sealed, c.Result.OK, c.Result.Reason)
		}
	}
}

// Water and silt in an old part weigh: 40 L of water are 40 kg.
func TestWaterInAnOldPart(t *testing.T) {
	mass := func(more string) float64 {
		w := likely(t, "assemblies: {sill: {parts: {tube: {section: CHS 323.9x5, length: 2 m"+more+"}}}}",
			"tasks: {up: {kind: lift, at: pier/hinge, lifts: sill, by: chain hoist}}")
		j, err := w.step(t, "up / lift").Rigging.Judge(nil)
		if err != nil {
			t.Fatal(err)
		}
		return j.Load.Mass
	}
	if d := mass(", water: 40 L") - mass(""); math.Abs(d-40) > 1.5 { // sea or fresh
		t.Errorf("40 L of water weigh %v kg", d)
	}
	if mass(", silt: 10 L") <= mass("")+9 || mass(", rust: 2 mm") <= mass("") {
		t.Error("silt and rust weigh nothing")
	}
}

// Two hooks share by the distance of the centre of gravity: 100 kg at the middle is 50 and 50; the hook that is
// too weak for its share refuses.
func TestTwoHooks(t *testing.T) {
	job := []string{"assemblies: {beam: {parts: {bar: {plate: [4 m, 1 m, 10 mm]}}}}", "kit: {chain hoist: {rated: 500 kg}, small: {kind: chain hoist, rated: 300 kg}}"}
	const up = "tasks: {up: {kind: lift, at: pier/hinge, lifts: beam, by: chain hoist, second hook: {by: small, at: [0, AT]}}}"
	lifted := func(at string) []string { return append(job[:2:2], strings.Replace(up, "AT", at, 1)) }
	w := likely(t, lifted("4 m")...) // 314 kg in the middle: 190 kg each with allowances, of 75 % of a rating (BS 7121-1): 253 kg
	j, err := w.step(t, "up / lift").Rigging.Judge(nil)
	if err != nil {
		t.Fatal(err)
	}
	if c := j.find(t, "chain hoist and small"); !c.Result.OK || math.Abs(c.Result.Need-253.3) > 0.1 {
		t.Errorf("%+v", c.Result)
	}
	_, faults := Expand(read(t, lifted("2.2 m")...), Basis{}) // nearly all on the second
	if len(faults) != 1 {
		t.Errorf("%v", faults)
	}
}
