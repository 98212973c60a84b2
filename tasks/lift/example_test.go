package lift_test

import (
	"fmt"

	"sailby/tasks/lift"
)

// A frame of two channels and a plate: what it weighs and where it balances.
func ExampleMass() {
	side, err := lift.ParseSection("UPN 200")
	if err != nil {
		fmt.Println(err)
		return
	}
	total, err := lift.Mass([]lift.Part{
		{Name: "sides", Shape: lift.Shape{Section: side}, Length: 4000, Places: [][3]float64{{0, 0, 0}, {0, 1000, 0}}},
		{Name: "deck", Shape: lift.Shape{Kind: lift.Plate, Width: 1000, Thick: 8}, Length: 2000},
		{Name: "weld", Shape: lift.Shape{Kind: lift.Weld}},
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%.1f kg, plan with %.1f kg, balances at x = %.0f mm, %.2f m2 to paint\n", total.Mass, total.Heavy, total.CG[0], total.Surface)
	// Output:
	// 332.9 kg, plan with 366.2 kg, balances at x = 1617 mm, 9.34 m2 to paint
}

// Two legs of 8 mm grade 8 chain on an off-centre load.
func ExampleSlings() {
	load := lift.Load{Name: "frame", Mass: 1000, CG: [3]float64{1200, 0, -200}, Allowance: 1.03, Dynamic: 1.1}
	r, err := lift.Slings(load, lift.Rig{Table: "EN 818-4 grade 8", Size: 8, Rise: 1500, Lugs: [][3]float64{{0, 0, 0}, {2000, 0, 0}}})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, leg := range r.Legs {
		fmt.Printf("%.0f kg at %.0f degrees\n", leg.Tension, leg.Angle)
	}
	fmt.Println(r.OK, r.Reason)
	// Output:
	// 580 kg at 39 degrees
	// 770 kg at 28 degrees
	// true the sling set: 1360 kg is within 2800 kg (rating of two legs)
}

// A flat sling is refused with the leg that would do.
func ExampleSlings_refused() {
	r, _ := lift.Slings(lift.Load{Mass: 200}, lift.Rig{WLL: 1000, Legs: 2, Angle: 20, Datum: lift.FromHorizontal})
	fmt.Println(r.OK, r.Reason)
	fmt.Println("try:", r.Nearest)
	_, err := lift.Slings(lift.Load{Mass: 200}, lift.Rig{WLL: 1000, Legs: 2, Angle: 20})
	fmt.Println(err)
	// Output:
	// false the slings lie too flat: 70 deg exceeds 60 deg (greatest angle from the vertical)
	// try: longer slings or a spreader beam, so that no leg is more than 45 degrees from the vertical
	// a sling angle of 20 degrees has no datum
}

// A lift of half a tonne by 1.2 m on a chain hoist, the first of its kind.
func ExampleTimes() {
	e, err := lift.Times(lift.Move{Mass: 500, Height: 1200, Travel: 3000, By: lift.ByChainHoist, First: true, Site: true})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("rig %.0f, trial %.1f, travel %.1f, land %.0f, make fast %.0f, unhook %.0f: %d min\n",
		e.Rig, e.TrialLift, e.Travel, e.Land, e.MakeFast, e.Unhook, e.HandsOn.Whole())
	// Output:
	// rig 28, trial 7.5, travel 2.3, land 15, make fast 15, unhook 5: 73 min
}

// Two people, knuckle height: the guideline for a team is two thirds of the sum.
func ExampleHands() {
	r, err := lift.Hands(lift.Load{Mass: 34, Allowance: 1}, lift.Handling{Men: 2, Through: []lift.Reach{{Zone: lift.Knuckle}}})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(r.OK, r.Reason)
	fmt.Println("try:", r.Nearest)
	// Output:
	// false lift by hand: 34 kg exceeds 33.33 kg (guideline for 2)
	// try: 3 people, or a hoist or trolley rated 250 kg
}

// Straps for a tonne on plywood, road and sea area B.
func ExampleSecure() {
	r, err := lift.Secure(lift.Load{Mass: 1000, Allowance: 1}, lift.Cargo{On: lift.SteelOnPly, Sea: lift.SeaB}, lift.Strap{STF: 400, LC: 2500, Angle: 60})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(r.Straps, r.Governs, r.Edition)
	// Output:
	// 2 the practical least EN 12195-1:2010
}

// A van that is 40 kg over, and the two trips that do it.
func ExampleLoadVehicles() {
	goods := []lift.Goods{{Name: "frame", Mass: 640}, {Name: "generator", Mass: 240}, {Name: "plates", Mass: 160}}
	van := lift.Vehicle{Name: "van", Payload: 1000, Length: 3300, Width: 1700, Height: 1800}
	once, _ := lift.LoadVehicles(goods, []lift.Vehicle{van})
	fmt.Println(once.OK, once.Reason)
	fmt.Println("try:", once.Nearest)
	van.Trips = 2
	twice, _ := lift.LoadVehicles(goods, []lift.Vehicle{van})
	for _, t := range twice.Trips {
		fmt.Printf("trip %d: %.0f of %.0f kg\n", t.Number, t.Mass, t.Payload)
	}
	// Output:
	// false 1040 kg of goods is 40 kg over the 1000 kg that all runs take
	// try: another run or vehicle for at least 40 kg, or send "plates" (160 kg) ahead
	// trip 1: 880 of 1000 kg
	// trip 2: 160 of 1000 kg
}
