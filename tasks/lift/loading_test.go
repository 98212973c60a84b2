package lift

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
	"sailby/tasks/quantity"
)

func loads(t *testing.T, goods []Goods, vehicles ...Vehicle) LoadPlan {
	t.Helper()
	p, err := LoadVehicles(goods, vehicles)
	if err != nil {
		t.Fatal(err)
	}
	if p.OK {
		if faults := CheckLoads(goods, vehicles, p.Trips); len(faults) > 0 {
			t.Fatalf("%v", faults)
		}
	}
	return p
}

// van has 1000 kg left for goods: a payload of 1150 less two people.
var van = Vehicle{Name: "van", Payload: 1150, Crew: 2, Length: 3300, Width: 1700, Height: 1800}

// A list that is 40 kg over what the van takes in one trip, and the split over two that does it.
func TestFortyKilosOver(t *testing.T) {
	goods := []Goods{
		{Name: "frame", Mass: 410, Length: 2400, Width: 800, Height: 900, Needed: 2}, {Name: "plates", Mass: 330, Length: 1200, Width: 600, Height: 60, Needed: 2, Stack: true},
		{Name: "generator", Mass: 150, Length: 900, Width: 600, Height: 700, Needed: 1}, {Name: "welding set", Mass: 90, Length: 800, Width: 400, Height: 700, Needed: 1},
		{Name: "paint", Mass: 60, Length: 600, Width: 400, Height: 300, Needed: 3},
	}
	once := loads(t, goods, van)
	if once.OK || !once.Proved || !strings.Contains(once.Reason, "40 kg over") || !strings.Contains(once.Nearest, `send "paint" (60 kg) ahead`) || !near1(once.OneTrip.Need-once.OneTrip.Have, 40, 1e-9) {
		t.Errorf("%+v", once)
	}
	twice := van
	twice.Trips = 2
	p := loads(t, goods, twice)
	if !p.OK || len(p.Trips) != 2 || !strings.Contains(p.Reason, "40 kg over; it goes in 2 runs") || len(p.Warnings) != 0 {
		t.Errorf("%+v", p)
	}
	for _, s := range p.Trips[1].Stowed { // in the order of use: nothing of the first day on the second trip
		if goods[s.Goods].Needed == 1 {
			t.Errorf("%q travels on the second trip", goods[s.Goods].Name)
		}
	}
	trailer := Vehicle{Name: "trailer", Gross: 750, Empty: 250, Length: 2500, Width: 1250, TowedBy: "van", Axle: 1300, Hitch: 1300, NoseGreatest: 75}
	both := loads(t, goods, van, trailer)
	if !both.OK || len(both.Trips) > 2 || both.Trips[0].Number != 1 {
		t.Errorf("%+v", both)
	}
}

func TestOrderOnTheBed(t *testing.T) {
	goods := []Goods{{Name: "first", Mass: 10, Length: 1000, Width: 1700, Height: 500, Needed: 1}, {Name: "last", Mass: 10, Length: 1000, Width: 1700, Height: 500, Needed: 3},
		{Name: "second", Mass: 10, Length: 1000, Width: 1700, Height: 500, Needed: 2}}
	p := loads(t, goods, van)
	x := map[string]float64{}
	for _, s := range p.Trips[0].Stowed {
		x[goods[s.Goods].Name] = s.X
	}
	if !(x["last"] < x["second"] && x["second"] < x["first"]) {
		t.Errorf("%v", x)
	}
}

func TestLoadingLimits(t *testing.T) {
	long := []Goods{{Name: "beam", Mass: 100, Length: 4800, Width: 100, Height: 200}}
	if p := loads(t, long, van); p.OK || !p.Proved || !strings.Contains(p.Reason, `"beam"`) {
		t.Errorf("%+v", p)
	}
	open := van
	open.Height, open.Overhang = 0, 2000
	if p := loads(t, long, open); !p.OK || !strings.Contains(strings.Join(p.Warnings, "\n"), "must be marked") {
		t.Errorf("%+v", p)
	}
	flat := []Goods{{Name: "base", Mass: 200, Length: 3300, Width: 1700, Height: 50, Stack: true}, {Name: "box", Mass: 50, Length: 600, Width: 400, Height: 300}}
	p := loads(t, flat, van)
	if !p.OK || p.Trips[0].Stowed[1].On != 0 || p.Trips[0].Stowed[1].Z != 50 {
		t.Errorf("%+v", p)
	}
	flat[1].Mass = 201 // heavier than what would carry it
	if p := loads(t, flat, van); p.OK || p.Proved || !strings.Contains(p.Reason, "no way was found") {
		t.Errorf("%+v", p)
	}
	towing := van
	towing.Gross, towing.Empty, towing.Train = 3500, 2350, 3800
	trailer := Vehicle{Name: "trailer", Gross: 750, Empty: 250, Length: 2500, Width: 1250, TowedBy: "van"}
	heavy := []Goods{{Name: "a", Mass: 600}, {Name: "b", Mass: 600}}
	if p := loads(t, heavy, towing, trailer); p.OK {
		t.Errorf("a train of %v", p.Trips)
	}
	towing.Trips = 2
	if p := loads(t, heavy, towing, trailer); !p.OK || p.Trips[1].Number != 2 || !strings.Contains(strings.Join(p.Warnings, "\n"), "have no sizes") {
		t.Errorf("%+v", p)
	}
}

func TestNose(t *testing.T) {
	goods := []Goods{{Name: "block", Mass: 200, Length: 500, Width: 500, Height: 500}}
	trailer := Vehicle{Name: "trailer", Payload: 500, Length: 2500, Width: 1250, Axle: 1300, Hitch: 1300, NoseGreatest: 50}
	p := loads(t, goods, trailer)
	// moments about the axle: 200 (1300 - x - 250) / 2600, at most 50 kg, so x is at least 400
	if s := p.Trips[0].Stowed[0]; s.X < 400 || s.X > 402 || p.Trips[0].Nose > 50 || p.Trips[0].Nose < 49 {
		t.Errorf("%+v", p.Trips[0])
	}
}

func TestLoadFaults(t *testing.T) {
	g := []Goods{{Name: "g", Mass: 1}}
	for _, c := range []struct {
		goods    []Goods
		vehicles []Vehicle
		want     string
	}{
		{nil, []Vehicle{van}, "0 things"}, {g, nil, "0 vehicles"}, {[]Goods{{Mass: math.NaN()}}, []Vehicle{van}, "not a number"}, {[]Goods{{Mass: 1, Length: -1}}, []Vehicle{van}, "outside"},
		{g, []Vehicle{{Name: "x", Length: 1, Width: 1}}, "no payload"}, {g, []Vehicle{van, van}, "two vehicles"}, {g, []Vehicle{{Name: "t", Payload: 1, Length: 1, Width: 1, TowedBy: "y"}}, "not listed"},
		{g, []Vehicle{{Name: "t", Payload: 1, Length: 1, Width: 1, TowedBy: "t"}}, "pulls itself"},
		{g, []Vehicle{van, {Name: "t", Payload: 1, Length: 1, Width: 1, TowedBy: "van"}, {Name: "u", Payload: 1, Length: 1, Width: 1, TowedBy: "t"}}, "pulled by the trailer"}, {make([]Goods, 401), []Vehicle{van}, "401 things"},
	} {
		if p, err := LoadVehicles(c.goods, c.vehicles); err == nil || !strings.Contains(err.Error(), c.want) || quantity.Hint(err) == "" || p.OK {
			t.Errorf("%s: %v", c.want, err)
		}
	}
}

// The check finds what a broken plan does wrong.
func TestCheckLoads(t *testing.T) {
	goods := []Goods{{Name: "a", Mass: 600, Length: 1000, Width: 1000, Height: 500, Needed: 1}, {Name: "b", Mass: 300, Length: 1000, Width: 1000, Height: 500, Needed: 2}}
	at := func(i int, x, y, z float64, on int) Stowed {
		return Stowed{Goods: i, X: x, Y: y, Z: z, Length: 1000, Width: 1000, On: on}
	}
	for _, c := range []struct {
		name  string
		trips []Trip
		want  string
	}{
		{"fine", []Trip{{0, 1, []Stowed{at(1, 0, 0, 0, -1), at(0, 1000, 0, 0, -1)}, 0, 0, 0}}, ""},
		{"missing", []Trip{{0, 1, []Stowed{at(1, 0, 0, 0, -1)}, 0, 0, 0}}, `"a" is stowed 0 times`},
		{"twice", []Trip{{0, 1, []Stowed{at(1, 0, 0, 0, -1), at(0, 1000, 0, 0, -1), at(0, 2000, 0, 0, -1)}, 0, 0, 0}}, `"a" is stowed 2 times`},
		{"overlap", []Trip{{0, 1, []Stowed{at(1, 0, 0, 0, -1), at(0, 900, 0, 0, -1)}, 0, 0, 0}}, "in one another"},
		{"order", []Trip{{0, 1, []Stowed{at(0, 0, 0, 0, -1), at(1, 1000, 0, 0, -1)}, 0, 0, 0}}, "wanted before"},
		{"off", []Trip{{0, 1, []Stowed{at(1, 0, 0, 0, -1), at(0, 2400, 0, 0, -1)}, 0, 0, 0}}, "off the bed"},
		{"in the air", []Trip{{0, 1, []Stowed{at(1, 0, 0, 0, -1), at(0, 1000, 0, 500, -1)}, 0, 0, 0}}, "on nothing"},
		{"on what does not carry", []Trip{{0, 1, []Stowed{at(1, 0, 0, 0, -1), at(0, 0, 0, 500, 1)}, 0, 0, 0}}, "on nothing"},
		{"trip 2", []Trip{{0, 2, nil, 0, 0, 0}}, "no vehicle"},
		{"no such", []Trip{{0, 1, []Stowed{at(7, 0, 0, 0, -1)}, 0, 0, 0}}, "nothing has number"},
	} {
		got := strings.Join(CheckLoads(goods, []Vehicle{van}, c.trips), "\n")
		if c.want == "" && got != "" || !strings.Contains(got, c.want) {
			t.Errorf("%s: %q", c.name, got)
		}
	}
	heavy := []Goods{{Name: "a", Mass: 1001}}
	if got := CheckLoads(heavy, []Vehicle{van}, []Trip{{0, 1, []Stowed{{Goods: 0, On: -1, Loose: true}}, 0, 0, 0}}); len(got) != 1 || !strings.Contains(got[0], "1001.0 kg in 1000.0") {
		t.Error(got)
	}
}

// By mass alone the search agrees with trying every split of up to seven things over two trips.
func TestLoadsAgainstEverySplit(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 7).Draw(t, "things")
		goods := make([]Goods, n)
		for i := range goods {
			goods[i] = Goods{Name: "g", Mass: float64(rapid.IntRange(1, 900).Draw(t, "mass"))}
		}
		v := van
		v.Trips = 2
		want := false
		for split := range 1 << n {
			a, b := 0.0, 0.0
			for i, g := range goods {
				if split>>i&1 == 1 {
					a += g.Mass
				} else {
					b += g.Mass
				}
			}
			want = want || a <= 1000 && b <= 1000
		}
		p, err := LoadVehicles(goods, []Vehicle{v})
		if err != nil || p.OK != want {
			t.Fatalf("%v, want %v (%v)", p.OK, want, err)
		}
	})
}

// Every plan with sizes passes the check, and equal input gives an equal plan.
func TestLoadsWithSizes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		goods := make([]Goods, rapid.IntRange(1, 14).Draw(t, "things"))
		size := rapid.Float64Range(100, 1500)
		for i := range goods {
			goods[i] = Goods{Name: "g", Mass: rapid.Float64Range(1, 300).Draw(t, "mass"), Length: size.Draw(t, "l"), Width: size.Draw(t, "w"), Height: size.Draw(t, "h"),
				Needed: rapid.IntRange(0, 3).Draw(t, "needed"), Stack: rapid.Bool().Draw(t, "stack"), Fixed: rapid.Bool().Draw(t, "fixed")}
		}
		v := van
		v.Trips = 3
		p, err := LoadVehicles(goods, []Vehicle{v})
		q, _ := LoadVehicles(goods, []Vehicle{v})
		if err != nil || p.OK != q.OK || len(p.Trips) != len(q.Trips) || p.Reason != q.Reason {
			t.Fatalf("%+v, then %+v (%v)", p, q, err)
		}
		if faults := CheckLoads(goods, []Vehicle{v}, p.Trips); p.OK && len(faults) > 0 {
			t.Fatal(faults)
		}
	})
}
