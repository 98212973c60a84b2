package lift

import (
	"fmt"
	"math"
	"strings"

	"sailby/tasks/origin"
)

// chainRatings and leverRatings are the usual ratings of hand hoists, kg (from memory).
var (
	chainRatings = []float64{250, 500, 1000, 1500, 2000, 3000, 5000, 10000}
	leverRatings = []float64{250, 500, 750, 1000, 1500, 3000, 6000, 9000}
)

// nextRating gives the least rating of a series that carries v; past the series, v in whole tonnes.
func nextRating(series []float64, v float64) float64 {
	for _, r := range series {
		if v <= r*(1+rounding) {
			return r
		}
	}
	return math.Ceil(v/1000) * 1000
}

// Hoist is a chain hoist, lever hoist or gantry with hoist, and what it hangs from.
type Hoist struct {
	By      Way     // ByChainHoist, ByLeverHoist or ByGantry
	WLL     float64 // kg
	Own     float64 // kg of the hoist with its chain
	Tackle  float64 // kg of slings, shackles and beam below the hook
	Anchor  float64 // kg that what it hangs from may carry; 0 is not known
	Hangs   string  // what it hangs from
	Pull    float64 // degrees of the pull from the vertical
	Marine  bool    // in sea air
	Closed  float64 // mm from the anchor to the hook when fully up; 0 is not known
	Over    float64 // mm of the anchor above the floor
	Lug     float64 // mm of the load's lifting point above the floor before the lift
	Raise   float64 // mm that it must go up
	Rigging float64 // mm of slings between lifting point and hook
}

// maxSidePull is the pull from the vertical that still counts as straight up, degrees.
const maxSidePull = 2

// Hang judges a load on a hand hoist: the hoist, what it hangs from (load, hoist and hand effort),
// headroom, and that it pulls straight.
//
// Errors: no rating, another way than a hoist, numbers out of range.
func Hang(l Load, h Hoist) (Result, error) {
	if err := l.valid(); err != nil {
		return Result{}, err
	}
	if h.By != ByChainHoist && h.By != ByLeverHoist && h.By != ByGantry {
		return Result{}, fault("use chain hoist, lever hoist or gantry", "%s is not a hoist", h.By)
	}
	if err := checkAll(check{"the hoist's WLL", h.WLL, tiny, maxMass, "kg"}, check{"the hoist's own mass", h.Own, 0, maxMass, "kg"},
		check{"the tackle's mass", h.Tackle, 0, maxMass, "kg"}, check{"what the anchor may carry", h.Anchor, 0, maxMass, "kg"},
		check{"the pull", h.Pull, 0, 90, "degrees"}, check{"the closed height", h.Closed, 0, maxLength, "mm"},
		check{"the anchor's height", h.Over, 0, maxLength, "mm"}, check{"the lifting point's height", h.Lug, 0, maxLength, "mm"},
		check{"the height to raise", h.Raise, 0, maxLength, "mm"}, check{"the slings' height", h.Rigging, 0, maxLength, "mm"}); err != nil {
		return Result{}, err
	}
	load := l.Hook()
	if h.Tackle > 0 {
		load = origin.Worked("load and tackle", load.Value+h.Tackle, "kg", "load on the hook + tackle", load, given("tackle", h.Tackle, "kg"))
	}
	wll := given("WLL of the "+h.By.String(), h.WLL, "kg")
	list := []judge{{"the " + h.By.String(), load, wll}}
	anchor := h.onAnchor(load)
	if h.Anchor > 0 {
		list = append(list, judge{h.anchorName(), anchor, given(h.anchorName()+" may carry", h.Anchor, "kg")})
	}
	if h.By != ByLeverHoist && h.Pull > 0 {
		list = append(list, judge{"side pull", given("pull from the vertical", h.Pull, "deg"),
			origin.House("straight up within", maxSidePull, "deg", "no hoist is made for side pull")})
	}
	if h.Closed > 0 && h.Over > 0 && h.Lug+h.Rigging > 0 {
		need := origin.Worked("height that it takes", h.Lug+h.Raise+h.Rigging+h.Closed, "mm", "lifting point + raise + slings + closed hoist",
			given("lifting point", h.Lug, "mm"), given("raise", h.Raise, "mm"), given("slings", h.Rigging, "mm"), given("closed hoist", h.Closed, "mm"))
		list = append(list, judge{"headroom", need, given("height of the anchor", h.Over, "mm")})
	}
	r := worst(list...)
	r.Warnings = h.warn(load.Value, anchor)
	if !r.OK {
		r.Nearest = h.nearest(load, anchor)
	}
	return r, nil
}

func (h Hoist) anchorName() string {
	if h.Hangs != "" {
		return h.Hangs
	}
	if h.By == ByGantry {
		return "the gantry"
	}
	return "what it hangs from"
}

// effort gives the pull of the hands on the chain or lever, kgf, at rated load.
func (h Hoist) effort() origin.Figure {
	step := func(rows [][2]float64) float64 {
		for _, r := range rows {
			if h.WLL <= r[0] {
				return r[1]
			}
		}
		return rows[len(rows)-1][1]
	}
	if h.By == ByLeverHoist {
		return origin.Published("lever pull", step([][2]float64{{750, 21}, {1500, 27}, {3000, 39}, {6000, 45}}), "kgf", "a lever hoist maker's manual, pull at rated load")
	}
	return origin.Recalled("hand-chain pull", step([][2]float64{{500, 250 / Gravity}, {1000, 320 / Gravity}, {2000, 340 / Gravity}, {3000, 350 / Gravity}}), "kgf", "usual hand-chain pull at rated load, 250 to 350 N")
}

// onAnchor gives what the anchor carries: load, hoist and hand effort.
func (h Hoist) onAnchor(load origin.Figure) origin.Figure {
	effort := h.effort()
	return origin.Worked("load on the anchor", load.Value+h.Own+effort.Value, "kg", "load + hoist + hand effort", h.sum(load, effort)...)
}

// sum lists what hangs on the anchor; a hoist whose own mass is not known is not shown as given.
func (h Hoist) sum(load, effort origin.Figure) []origin.Figure {
	if h.Own == 0 {
		return []origin.Figure{load, effort}
	}
	return []origin.Figure{load, given("hoist", h.Own, "kg"), effort}
}

func (h Hoist) warn(load float64, anchor origin.Figure) []string {
	var out []string
	if h.Anchor == 0 {
		out = append(out, fmt.Sprintf("what the hoist hangs from is not rated: it must carry %.0f kg", math.Ceil(anchor.Value)))
	}
	if h.Own == 0 && h.By != ByGantry {
		out = append(out, "the hoist's own mass is not given: what it hangs from carries that as well")
	}
	share := 0.05
	if h.Marine {
		share = 0.10
	}
	if load < share*h.WLL && h.By != ByLeverHoist {
		out = append(out, fmt.Sprintf("common practice: at least %.0f kg on this hoist, or its brake may not hold", share*h.WLL))
	}
	if h.Closed > 0 && h.Over > 0 && h.Lug+h.Rigging == 0 {
		out = append(out, "headroom not checked: give the lifting point's height and that of the slings")
	}
	if h.Closed == 0 || h.Over == 0 {
		out = append(out, "headroom not checked: give the hoist's closed height and the anchor's height")
	}
	if h.By == ByGantry {
		out = append(out, "gantry: hard level floor, castors locked while lifting, moved loaded only if its maker says so")
	}
	if h.By == ByLeverHoist && h.Pull > maxSidePull {
		out = append(out, "the anchor and the lug must be rated for a pull at that angle")
	}
	return append(out, "trial lift of about 100 mm: wait and watch for brake creep")
}

// nearest names the gear that would do, for everything that fails.
func (h Hoist) nearest(load, anchor origin.Figure) string {
	series := chainRatings
	if h.By == ByLeverHoist {
		series = leverRatings
	}
	var out []string
	if load.Value > h.WLL*(1+rounding) {
		out = append(out, fmt.Sprintf("%s of %.0f kg", h.By, nextRating(series, load.Value)))
	}
	if h.Anchor > 0 && anchor.Value > h.Anchor*(1+rounding) {
		out = append(out, fmt.Sprintf("an anchor for %.0f kg, or a second one to share it", math.Ceil(anchor.Value)))
	}
	if h.By != ByLeverHoist && h.Pull > maxSidePull {
		out = append(out, "the hoist straight above the lifting point, or a second hoist to drift it")
	}
	if short := h.Lug + h.Raise + h.Rigging + h.Closed - h.Over; h.Closed > 0 && h.Over > 0 && h.Lug+h.Rigging > 0 && short > h.Over*rounding {
		out = append(out, fmt.Sprintf("%.0f mm less between lifting point and anchor: shorter slings, a shorter hoist or a higher anchor", math.Ceil(short)))
	}
	return strings.Join(out, "; and ")
}

// Jacks judges a load on n jacks of one rating: of four under a rigid load two may take all, so
// each of two or more is sized for half. That holds for two only if the centre of gravity is midway between
// them, which is not known here, and a warning says so: JacksAt knows it.
//
// Errors: no jack, numbers out of range.
func Jacks(l Load, n int, wll float64) (Result, error) { return JacksAt(l, n, wll, 0, 0) }

// JacksAt is Jacks with the centre of gravity at cg, mm from the first jack (or pair) along the span, mm, to the
// other: by statics the nearer side carries the greater share, max(cg, span-cg) / span. Of two jacks one takes
// that share; of three or more one may take all that is on its side. A span of 0 is not known.
//
// Errors: no jack, one jack with a span, a centre of gravity outside the span, numbers out of range.
func JacksAt(l Load, n int, wll, span, cg float64) (Result, error) {
	if err := l.valid(); err != nil {
		return Result{}, err
	}
	if err := checkAll(check{"the number of jacks", float64(n), 1, 20, ""}, check{"the jack's WLL", wll, tiny, maxMass, "kg"}); err != nil {
		return Result{}, err
	}
	share := origin.Recalled("share of one jack", 0.5, "", "two diagonals of four may take all of a rigid load")
	if n == 1 {
		share = origin.Figure{Name: "share of one jack", Value: 1, Origin: origin.Origin{Kind: origin.Formula, Source: "one jack"}}
	}
	if span > 0 {
		if n == 1 {
			return Result{}, fault("leave the span out, or give two jacks", "one jack has no span")
		}
		if err := checkAll(check{"the span of the jacks", span, tiny, maxLength, "mm"}, check{"the centre of gravity along the span", cg, 0, span, "mm"}); err != nil {
			return Result{}, err
		}
		share = origin.Worked("share of one jack", math.Max(cg, span-cg)/span, "", "greater distance of the centre of gravity / span: the nearer side carries it, by statics",
			given("span of the jacks", span, "mm"), given("centre of gravity from the first", cg, "mm"))
	}
	hook := l.Hook()
	r := worst(judge{"a jack", origin.Worked("load on a jack", hook.Value*share.Value, "kg", "load x share", hook, share), given("WLL of a jack", wll, "kg")})
	r.Warnings = []string{"a jack is never the sole support: pack as you go"}
	if n > 1 && span == 0 {
		r.Warnings = append(r.Warnings, "a jack is sized for half: the centre of gravity must be midway; off the middle the nearer side carries more than half")
	}
	if !r.OK {
		r.Nearest = fmt.Sprintf("jacks of %.0f kg each", nextRating([]float64{2000, 3000, 5000, 10000, 20000}, r.Need))
	}
	return r, nil
}

// CutOff gives the pull at which to stop, kg, when an old part may be stuck: the lower of its
// heavy weight by a tenth and the gear's rating. A part that does not move at it is not free.
func CutOff(l Load, rating float64) (origin.Figure, error) {
	if err := l.valid(); err != nil {
		return origin.Figure{}, err
	}
	if err := ranged("the gear's rating", rating, tiny, maxMass, "kg"); err != nil {
		return origin.Figure{}, err
	}
	heavy := l.Heavy()
	over := origin.House("over the weight", 1.1, "", "more than that says that something still holds it")
	return origin.Worked("stop pulling at", math.Min(heavy.Value*over.Value, rating), "kg", "lower of weight x 1.1 and the gear's rating", heavy, over, given("rating", rating, "kg")), nil
}
