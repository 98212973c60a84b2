package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// Bearing judges a load set down on area m2 of a floor that may carry capacity kN/m2; a capacity
// of 0 is not known, and the Result then only gives the pressure.
func Bearing(l Load, area, capacity float64) (Result, error) {
	if err := l.valid(); err != nil {
		return Result{}, err
	}
	if err := checkAll(check{"the area under it", area, 1e-6, 1e5, "m2"}, optional("what the floor may carry", capacity, 0.01, 1e5, "kN/m2")); err != nil {
		return Result{}, err
	}
	heavy := l.Heavy()
	need := origin.Worked("pressure", heavy.Value*Gravity/1000/area, "kN/m2", "mass x 9.81 / area", heavy, given("area", area, "m2"))
	if capacity == 0 {
		return Result{OK: true, Need: need.Value, Unit: need.Unit, Figure: need, Limit: given("not known", 0, "kN/m2"),
			Reason: "it presses with " + need.Amount(), Warnings: []string{"ask what the floor may carry"}}, nil
	}
	r := worst(judge{"the floor", need, given("the floor may carry", capacity, "kN/m2")})
	if !r.OK {
		r.Nearest = fmt.Sprintf("packing that spreads it over %.2f m2", math.Ceil(heavy.Value*Gravity/10/capacity)/100)
	}
	return r, nil
}

// Exclusion gives how far around a lift nobody may be, mm: a third of the height plus the length
// of the load, at least 3 m.
func Exclusion(height, length float64) (origin.Figure, error) {
	if err := checkAll(check{"the height of the lift", height, 0, 1e6, "mm"}, check{"the load's length", length, 0, maxLength, "mm"}); err != nil {
		return origin.Figure{}, err
	}
	var from []origin.Figure // what is not known is not shown as given
	if height > 0 {
		from = append(from, given("height", height, "mm"))
	}
	if length > 0 {
		from = append(from, given("length", length, "mm"))
	}
	third := origin.Recalled("share of the height", 1.0/3, "", "lift planners' habit")
	least := origin.Recalled("at least", 3000, "mm", "lift planners' habit")
	return origin.Worked("keep clear by", math.Max(height*third.Value+length, least.Value), "mm", "height / 3 + length, at least 3 m",
		append(from, third, least)...), nil
}

// Crew names the tickets that a move needs, one person each; nobody is below in any case.
func Crew(w Way) []string {
	switch w {
	case ByLoaderCrane:
		return []string{"crane operator", "slinger/signaller", "lift supervisor"}
	case ByChainHoist, ByLeverHoist, ByGantry:
		return []string{"slinger/signaller", "lift supervisor"}
	case ByJack:
		return []string{"lift supervisor"}
	}
	return nil
}

// Afloat judges whether an assembly floats in water of a density in kg/m3 (0 is sea water), wholly
// under: the water that it pushes aside against its heavy mass. Sealed bores stay dry.
func Afloat(t Total, water float64) (Result, error) {
	rho := densities["sea water"]
	if water != 0 {
		rho = given("density of the water", water, "kg/m3")
	}
	if err := checkAll(check{"the assembly's mass", t.Heavy, tiny, maxMass, "kg"}, check{"the water it displaces", t.Displaced, 0, maxMass, "L"},
		check{"the density of the water", rho.Value, 900, 1300, "kg/m3"}); err != nil {
		return Result{}, err
	}
	lift := origin.Worked("water displaced", t.Displaced/1000*rho.Value, "kg", "volume x density", given("volume", t.Displaced, "L"), rho)
	r := worst(judge{"afloat", origin.Worked("mass with allowance", t.Heavy, "kg", "sum of the parts with their allowances", t.Figure), lift})
	if r.OK {
		r.Reason = fmt.Sprintf("it floats: %s of water against %s", lift.Amount(), r.Figure.Amount())
	} else {
		r.Reason = fmt.Sprintf("it sinks, and weighs %.0f kg under water", r.Need-r.Have)
		r.Nearest = fmt.Sprintf("%.0f litres of buoyancy", math.Ceil((r.Need-r.Have)/rho.Value*1000))
	}
	if t.Flooded > 0 {
		r.Warnings = append(r.Warnings, fmt.Sprintf("open bores hold %.0f litres: %.0f kg more when it comes out full", t.Flooded, t.Flooded/1000*rho.Value))
	}
	return r, nil
}
