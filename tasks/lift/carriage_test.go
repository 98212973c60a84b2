package lift

import (
	"strings"
	"testing"
)

// A ferry operator's published conditions for maintenance gases: one acetylene up to 35 kg gross
// and under 1 m high, then no solvent paint in that vehicle; the job file gives them as rules.
func TestCarriage(t *testing.T) {
	rules := []CarriageRule{
		{Name: "ferry, gases", Class: "acetylene", Most: 1, Unit: "bottles", Heaviest: 35, Tallest: 1000, NotWith: []string{"solvent paint"}, Says: "declare 24 h ahead"},
		{Name: "ferry, paint", Class: "Solvent Paint", Most: 10, Unit: "L", AskBefore: true}, {Name: "other ferry", Class: "petrol", Most: -1},
	}
	goods := []Goods{{Name: "acetylene 1", Mass: 40, Height: 1050, Class: "acetylene", Amount: 1}, {Name: "acetylene 2", Mass: 30, Class: "acetylene", Amount: 1},
		{Name: "primer", Mass: 20, Class: "solvent paint", Amount: 12}, {Name: "can", Mass: 15, Class: "petrol", Amount: 20}, {Name: "steel", Mass: 300}}
	all := Trip{}
	for i := range goods {
		all.Stowed = append(all.Stowed, Stowed{Goods: i})
	}
	got := strings.Join(Carriage(goods, all, rules), "\n")
	for _, want := range []string{"2 bottles of acetylene is over 1 bottles", "of 40 kg is over 35 kg", "of 1050 mm is over 1000 mm", "acetylene and solvent paint in one vehicle", "declare 24 h ahead",
		"12 L of Solvent Paint is over 10 L", "ask the operator", "petrol is not carried at all", "ask, do not assume"} {
		if !strings.Contains(got, want) {
			t.Errorf("no %q in\n%s", want, got)
		}
	}
	if got := Carriage(goods, Trip{Stowed: []Stowed{{Goods: 4}}}, rules); len(got) != 0 {
		t.Error(got)
	}
}

func TestBookingBand(t *testing.T) {
	bands := []Band{{"short", 5000, 1850}, {"short, high", 5000, 2400}, {"van", 6000, 3000}, {"freight", 12000, 0}}
	for _, c := range []struct {
		l, h float64
		want string
	}{{4800, 1800, "short"}, {4800, 1900, "short, high"}, {5001, 1800, "van"}, {6000, 3100, "freight"}} {
		if b, err := BookingBand(bands, c.l, c.h); err != nil || b.Name != c.want {
			t.Errorf("%v: %v (%v)", c, b, err)
		}
	}
	if _, err := BookingBand(bands, 12001, 2000); err == nil || !strings.Contains(err.Error(), "12000") {
		t.Error(err)
	}
	if _, err := BookingBand(bands, -1, 2000); err == nil {
		t.Error("a length below nothing passed")
	}
}

// GB and EU driving limits as the government's pages give them, here as rules of a job file.
func TestDriving(t *testing.T) {
	rules := []DutyRule{{Name: "EU rules", Over: 3500, Drive: 540, DriveBreak: 270, RestBefore: 660, NotOwnTools: true}, {Name: "GB domestic", Drive: 600, OnDuty: 660}}
	small := Driving(Duty{Driver: "Tom", Drive: 560, LongestDrive: 300, OnDuty: 780, Gross: 3500}, rules)
	if len(small) != 1 || !strings.Contains(small[0], "GB domestic: Tom is on duty 780 min against 660 min") {
		t.Error(small)
	}
	big := Driving(Duty{Driver: "Tom", Drive: 560, LongestDrive: 300, OnDuty: 600, Gross: 4250, RestBefore: 600, OwnWorkTools: true}, rules)
	if len(big) != 3 || !strings.Contains(big[0], "exemption for own work equipment may apply") {
		t.Error(big)
	}
}
