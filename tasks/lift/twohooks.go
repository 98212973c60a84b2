package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// Pair is two hooks on one load, at A and B along x of the load.
type Pair struct {
	A, B       float64 // mm, where each hook holds, in the axes of the load
	RatedA     float64 // kg
	RatedB     float64 // kg
	Queensland bool    // at least 20 % over the share (Queensland code) in place of 75 % of rating (BS 7121-1)
	Tilt       float64 // degrees that it may go out of level
	Offset     float64 // mm of the centre of gravity square to the line of the hooks
}

// PairResult is a Result with the share of each hook, kg, at the worst tilt.
type PairResult struct {
	Result
	ShareA, ShareB float64
}

// TwoHooks judges a load on two hooks: each share by the distance of the centre of gravity from
// the other hook, more by tilt, with what codes keep in hand where two share a load.
//
//	share A = W (B - x) / (B - A); a tilt t moves offset x tan(t) / (B - A) of W from one to the other
//
// Special cases are:
//
//	a centre of gravity outside the hooks is refused: one hook would have to push
//
// Errors: hooks at one place, no ratings, numbers out of range.
func TwoHooks(l Load, p Pair) (PairResult, error) {
	if err := l.valid(); err != nil {
		return PairResult{}, err
	}
	if err := checkAll(check{"hook A's place", p.A, -maxLength, maxLength, "mm"}, check{"hook B's place", p.B, -maxLength, maxLength, "mm"},
		check{"hook A's rating", p.RatedA, tiny, maxMass, "kg"}, check{"hook B's rating", p.RatedB, tiny, maxMass, "kg"},
		check{"the tilt", p.Tilt, 0, 60, "degrees"}, check{"the offset", p.Offset, 0, maxLength, "mm"}); err != nil {
		return PairResult{}, err
	}
	span := p.B - p.A
	if math.Abs(span) < 1 {
		return PairResult{}, fault("hold it at two places", "both hooks are at %s mm", origin.Trim(p.A))
	}
	w := l.Hook()
	b := (l.CG[0] - p.A) / span
	if b < 0 || b > 1 {
		r := PairResult{Result: Result{Unit: "mm", Need: l.CG[0], Figure: w, Limit: w,
			Reason:  fmt.Sprintf("the centre of gravity at %s mm is outside the hooks at %s and %s mm", num(l.CG[0]), num(p.A), num(p.B)),
			Nearest: "hooks on both sides of the centre of gravity"}}
		return r, nil
	}
	shift := p.Offset * math.Tan(p.Tilt*math.Pi/180) / math.Abs(span)
	keep := origin.Recalled("kept in hand", 1/0.75, "", "BS 7121-1: 75 % of rating where not all can be assessed")
	if p.Queensland {
		keep = origin.Published("kept in hand", 1.2, "", "Queensland Mobile Crane Code of Practice 14.3.2, two cranes")
	}
	one := func(name string, part float64) (origin.Figure, origin.Figure) {
		part = math.Min(1, part+shift)
		share := origin.Worked("share of hook "+name, w.Value*part, "kg", "W x distance to the other hook / span, and tilt", w,
			given("span", math.Abs(span), "mm"), origin.Worked("moved by tilt", shift, "", "offset x tan(tilt) / span", given("offset", p.Offset, "mm"), given("tilt", p.Tilt, "deg")))
		return share, origin.Worked("hook "+name+" must be rated", share.Value*keep.Value, "kg", "share x kept in hand", share, keep)
	}
	shareA, needA := one("A", 1-b)
	shareB, needB := one("B", b)
	out := PairResult{ShareA: shareA.Value, ShareB: shareB.Value,
		Result: worst(judge{"hook A", needA, given("rating of hook A", p.RatedA, "kg")}, judge{"hook B", needB, given("rating of hook B", p.RatedB, "kg")})}
	out.Warnings = []string{"two hooks on one load: matching gear, one person who gives the signals, both up in step"}
	if p.Tilt == 0 {
		out.Warnings = append(out.Warnings, "the shares hold while it is level")
	}
	if !out.OK {
		out.Nearest = fmt.Sprintf("hooks rated %.0f kg (A) and %.0f kg (B), or hook places nearer to even shares", math.Ceil(needA.Value), math.Ceil(needB.Value))
	}
	return out, nil
}

// TurnOver judges turning a load over between two hooks: when it stands upright one hook carries
// all of it, so each hook and each lug is sized for the full weight.
//
// Errors: no ratings, numbers out of range.
func TurnOver(l Load, p Pair, lug float64) (Result, error) {
	if err := l.valid(); err != nil {
		return Result{}, err
	}
	if err := checkAll(check{"hook A's rating", p.RatedA, tiny, maxMass, "kg"}, check{"hook B's rating", p.RatedB, tiny, maxMass, "kg"},
		check{"the lug's WLL", lug, 0, maxMass, "kg"}); err != nil {
		return Result{}, err
	}
	w := l.Hook()
	all := origin.Worked("load on one hook when upright", w.Value, "kg", "all of it", w)
	list := []judge{{"hook A", all, given("rating of hook A", p.RatedA, "kg")}, {"hook B", all, given("rating of hook B", p.RatedB, "kg")}}
	if lug > 0 {
		list = append(list, judge{"a lug", all, given("WLL of a lug as stated", lug, "kg")})
	}
	r := worst(list...)
	r.Warnings = []string{
		"turning over: the lugs must take a pull out of their plane, as their designer states",
		"keep each hoist straight above its lug: no side pull; never hook a chain back on itself",
		"it may swing past the upright: hold it with a tag line and keep everybody clear",
	}
	if lug == 0 {
		r.Warnings = append(r.Warnings, "the lugs' capacity is not stated: ask their designer")
	}
	if !r.OK {
		r.Nearest = fmt.Sprintf("two hooks and lugs of %.0f kg each, or turn it on the ground", math.Ceil(all.Value))
	}
	return r, nil
}
