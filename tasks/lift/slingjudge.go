package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// maxTilt is the tilt of a hung load up to which it counts as level, degrees.
var maxTilt = origin.Published("greatest tilt in rigging design", 2, "deg", "Guidelines for Marine Lifting and Lowering Operations 0027/ND Rev 11")

// fromLugs finds the legs from the lugs to a hook over the centre of gravity.
func (r Rig) fromLugs(l Load, w origin.Figure) (legs []Leg, refused *Result, warnings []string, err error) {
	top := math.Inf(-1)
	for i, lug := range r.Lugs {
		top = math.Max(top, lug[2])
		for _, other := range r.Lugs[:i] {
			if norm(sub(lug, other)) < 1 {
				return nil, nil, nil, fault("give each leg a lug of its own", "two legs are on the same lug")
			}
		}
	}
	if r.Rise <= 0 {
		return nil, nil, nil, fault("give the height of the hook above the highest lug", "the hook's height above the lugs is not known")
	}
	hook := [3]float64{l.CG[0], l.CG[1], top + r.Rise}
	if len(r.Lugs) <= 2 {
		off, below := r.offLine(l.CG)
		if below <= 0 && len(r.Lugs) == 2 || below < 0 {
			res := worst(judge{"the load would roll over: its centre of gravity is above the lugs",
				origin.Worked("centre of gravity above the lugs", -below, "mm", "from the lugs and the centre of gravity"), given("it must hang below them", 0, "mm")})
			res.OK, res.Nearest = false, "lugs above the centre of gravity, or four legs on lugs around it"
			return nil, &res, nil, nil
		}
		if tilt := math.Atan2(off, below) * 180 / math.Pi; tilt > maxTilt.Value {
			warnings = append(warnings, fmt.Sprintf("the load will hang tilted by %.0f degrees: its centre of gravity is %.0f mm beside the lugs", tilt, off))
		}
		if len(r.Lugs) == 1 { // the load swings until the lug is over its centre of gravity
			hook[0], hook[1] = r.Lugs[0][0], r.Lugs[0][1]
		}
	}
	legs, ok := statics(w.Value, r.Lugs, hook, r.Equalised)
	if !ok {
		res := Result{Unit: "mm", Reason: "the centre of gravity is outside the lugs: one leg would have to push",
			Figure: w, Limit: w, Nearest: "lugs on both sides of the centre of gravity"}
		return nil, &res, nil, nil
	}
	if len(r.Lugs) > 2 && l.CG[2] > top {
		warnings = append(warnings, "the centre of gravity is above the lugs: the load can tip over if a leg slips or the hook is low")
	}
	for _, g := range legs {
		if g.Angle > MaxSling+1e-9 {
			return legs, tooFlat(g.Angle, g.Length), warnings, nil
		}
	}
	return legs, nil, warnings, nil
}

// offLine gives how far the centre of gravity lies beside the line through the lugs (level), and
// how far below it (positive is below).
func (r Rig) offLine(cg [3]float64) (off, below float64) {
	a := r.Lugs[0]
	d := sub(cg, a)
	if len(r.Lugs) == 1 {
		return math.Hypot(d[0], d[1]), -d[2]
	}
	line := sub(r.Lugs[1], a)
	flat := [3]float64{line[0], line[1], 0}
	if norm(flat) < 1 {
		return math.Hypot(d[0], d[1]), -d[2]
	}
	k := (d[0]*flat[0] + d[1]*flat[1]) / dot(flat, flat)
	foot := scale(line, k)
	rest := sub(d, foot)
	return math.Hypot(rest[0], rest[1]), -rest[2]
}

// judge puts the legs against their ratings.
func (r Rig) judge(w origin.Figure, legs []Leg, table slingTable, row slingRow) (SlingResult, error) {
	rating, err := r.leg(table, row)
	if err != nil {
		return SlingResult{}, err
	}
	n := r.legs()
	var top Leg
	flat := 0.0
	for i := range legs {
		if r.Hitch == Basket { // two parts to the hook
			legs[i].Tension /= 2
		}
		if legs[i].Tension > top.Tension {
			top = legs[i]
		}
		flat = math.Max(flat, legs[i].Angle)
	}
	pull := origin.Worked("pull in the heaviest leg", top.Tension, "kg", "share of the weight / cos(angle from the vertical)",
		w, given("its share", top.Share, "kg"), given("its angle from the vertical", top.Angle, "deg"))
	list := []judge{{"the heaviest leg", pull, rating}}
	rule := rating.Name
	at, _ := table.band(flat)
	parts := n
	if r.Hitch == Basket {
		parts = 2
	}
	if (n > 1 || r.Hitch == Basket) && !(r.Hitch == Basket && flat <= parallel) {
		carried := top.Share
		for _, g := range legs {
			carried = math.Max(carried, g.Share)
		}
		set := table.set(row, rating.Value, parts, at)
		counted := float64(min(parts, 3))
		if r.Hitch == Basket {
			counted = 1
		}
		need := origin.Worked("weight as the set sees it", carried*counted, "kg", "heaviest share x legs that count", w, given("heaviest share", carried, "kg"), given("legs that count", counted, ""))
		list = append(list, judge{"the sling set", need, set})
		rule = fmt.Sprintf("%s, up to %s degrees from the vertical", set.Name, origin.Trim(table.bands[at].upTo))
	}
	for _, c := range []struct {
		what string
		kg   float64
	}{{"lug", r.LugWLL}, {"coupling", r.Coupling}} {
		if c.kg > 0 {
			list = append(list, judge{"the " + c.what, pull, given("WLL of the "+c.what+" as stated", c.kg, "kg")})
		}
	}
	return SlingResult{Result: worst(list...), Legs: legs, Rule: rule}, nil
}

// parallel is the angle up to which the two parts of a basket count as parallel, degrees
// (EN 1492-1, from memory).
const parallel = 7

// warn lists what to look at though the numbers pass.
func (r Rig) warn(legs []Leg, table slingTable) []string {
	var out []string
	steep, flat := 90.0, 0.0
	for _, g := range legs {
		steep, flat = math.Min(steep, g.Angle), math.Max(flat, g.Angle)
	}
	if len(legs) == 4 && !r.Equalised {
		out = append(out, "four legs on a rigid load: two may carry all, so each is given its worst")
	}
	if len(legs) > 1 && (steep < 15-1e-9 || flat-steep > 15+1e-9) {
		out = append(out, fmt.Sprintf("legs at %.0f to %.0f degrees do not count as symmetric (EN 818-6, from memory: all at least 15 degrees, within 15 of each other)", steep, flat))
	}
	if r.LugWLL == 0 && r.Hitch == Straight {
		out = append(out, "the lugs' capacity at this angle is not stated: ask their designer")
	}
	if r.Coupling == 0 {
		out = append(out, "shackles, hooks and rings: check that each is rated for the leg")
	}
	if table.soft && r.Edge == 0 {
		out = append(out, "webbing: protect it from every edge")
	}
	return out
}

// nearest names what would do: the next size of the table, or the rating that it takes.
func (r Rig) nearest(w origin.Figure, legs []Leg, table slingTable, over float64) string {
	pull := 0.0
	for _, g := range legs {
		pull = math.Max(pull, g.Tension)
	}
	for _, c := range []struct {
		what string
		kg   float64
	}{{"lugs", r.LugWLL}, {"couplings", r.Coupling}} {
		if c.kg > 0 && pull > c.kg {
			return fmt.Sprintf("%s rated %.0f kg along the leg (ask their designer), or slings nearer the vertical", c.what, math.Ceil(pull))
		}
	}
	for _, row := range table.rows {
		if row.one <= r.WLL && r.WLL > 0 || row.size <= r.Size {
			continue
		}
		bigger := r
		bigger.WLL, bigger.Size = 0, row.size
		try := append([]Leg(nil), legs...)
		if r.Hitch == Basket {
			for i := range try {
				try[i].Tension *= 2
			}
		}
		if res, err := bigger.judge(w, try, table, row); err == nil && res.OK {
			return fmt.Sprintf("%s, %s %s", table.name, num(row.size), table.unit)
		}
	}
	base := r.WLL
	if row, err := table.row(r.Size); err == nil && (base == 0 || row.one < base) {
		base = row.one
	}
	return fmt.Sprintf("slings of WLL %.0f kg a leg, or nearer the vertical", math.Ceil(base*over))
}
