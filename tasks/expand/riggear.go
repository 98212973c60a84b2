package expand

import (
	"fmt"
	"math"

	"sailby/tasks"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
)

// byGear judges the load on its gear.
func (r *Rigging) byGear(j *Judgement) {
	l := r.lifting()
	name := r.Way.String()
	if r.Kit != nil {
		name = r.Kit.Name
	}
	if l.Proved != nil && r.Kit != nil {
		if rated := r.rating(r.Kit); rated > 0 {
			j.CutOff, _ = lift.CutOff(j.Load, rated)
		}
	}
	if l.Second != nil && l.Second.Kit != nil {
		r.twoHooks(j, name)
		return
	}
	if r.Kit == nil && r.Way != lift.ByHands {
		j.Ask = append(j.Ask, "which "+r.Way.String()+", and what it is rated for")
		return
	}
	g, missing := r.gearOf(r.Kit, r.Way)
	if missing != "" {
		j.Ask = append(j.Ask, missing)
		return
	}
	res, err := lift.Fit(j.Load, g)
	j.add(name, r.Way == lift.ByHands || r.Way == lift.ByTrolley, res, err)
	if rated := r.rating(r.Kit); r.Way == lift.ByTrolley && rated > 0 {
		j.add(name+", its rating", false, simple(name, j.Load.Heavy(), rated), nil)
	}
}

// byPeople works out the revised NIOSH equation, and floating, where the file asks for them.
func (r *Rigging) byPeople(j *Judgement) {
	l := r.lifting()
	if l.NIOSH != nil {
		res, err := lift.NIOSH(j.Load, *l.NIOSH)
		j.add("by the revised NIOSH equation, one person", true, res.Result, err)
	}
	if l.InWater {
		res, err := lift.Afloat(j.Total, 0)
		j.add("floating in sea water", true, res, err)
	}
}

// simple compares a load with a rating.
func simple(name string, need origin.Figure, rated float64) lift.Result {
	res := lift.Result{OK: need.Value <= rated*(1+1e-9), Need: need.Value, Have: rated, Unit: "kg", Figure: need,
		Limit: origin.Figure{Name: "rated", Value: rated, Unit: "kg", Origin: origin.Origin{Kind: origin.Given}}}
	verb := "is within"
	if !res.OK {
		verb = "exceeds"
		res.Nearest = fmt.Sprintf("one rated for %.0f kg", math.Ceil(need.Value))
	}
	res.Reason = fmt.Sprintf("%s: %s %s %s (rated)", name, need.Amount(), verb, res.Limit.Amount())
	return res
}

// rating gives what one of a kit may lift at the task's radius, kg; 0 is not known.
func (r *Rigging) rating(k *tasks.Kit) float64 {
	if k == nil {
		return 0
	}
	for _, c := range k.Chart {
		if c.Radius*1000 >= r.Task.Radius.Value-1e-6 {
			return c.Mass
		}
	}
	return k.Rated.Value
}

// gearOf writes a kit as gear for this task; missing says what the file does not tell.
func (r *Rigging) gearOf(k *tasks.Kit, way lift.Way) (g lift.Gear, missing string) {
	t, l := r.Task, r.lifting()
	g.By = way
	if k != nil {
		g.Name = k.Name
	}
	under := l.Tackle.Value
	for _, p := range l.Under {
		under += p.Mass
	}
	switch way {
	case lift.ByHands:
		g.Name = "hands"
		g.Hands = lift.Handling{Men: min(r.crew, 8)}
		if l.Hands != nil {
			g.Hands = *l.Hands
			if g.Hands.Men+g.Hands.Women == 0 {
				g.Hands.Men = r.crew
			}
		}
		g.Hands.Carry = t.Travel.Value
	case lift.ByTrolley:
		g.Push = lift.Push{Men: r.crew}
		if l.Push != nil {
			g.Push = *l.Push
			if g.Push.Men+g.Push.Women == 0 {
				g.Push.Men = r.crew
			}
		}
		g.Push.Own, g.Push.Rated, g.Push.Distance = k.Mass.Value, 0, t.Travel.Value
	case lift.ByJack:
		g.Jacks, g.Jack = r.Count, k.Rated.Value
	case lift.ByLoaderCrane:
		return g, r.craneOf(&g, k)
	default:
		g.Hoist = lift.Hoist{WLL: k.Rated.Value, Own: k.Mass.Value, Tackle: under, Pull: l.SidePull.Value, Marine: l.SeaAir, Closed: k.Closed.Value,
			Over: k.HungAt.Value, Lug: l.LugHeight.Value, Raise: t.Height.Value, Rigging: r.slingHeight()}
		g.Hoist.Hangs, g.Hoist.Anchor = anchor(k, l.Hangs)
	}
	if way != lift.ByHands && way != lift.ByTrolley && !k.Rated.Pos.Given() {
		return g, "what " + k.Name + " is rated for"
	}
	return g, ""
}

// craneOf fills in a crane.
func (r *Rigging) craneOf(g *lift.Gear, k *tasks.Kit) (missing string) {
	t, l := r.Task, r.lifting()
	c := &g.Crane
	*c = lift.CraneLift{Radius: t.Radius.Value, HookAt: l.HookHeight.Value, Rigging: r.slingHeight(), BoomClear: l.BoomClear.Value,
		Pad: l.Pad.Value, PadLoad: l.PadLoad.Value, Ground: l.Ground.Value}
	if l.LugHeight.Pos.Given() && t.Height.Pos.Given() {
		c.Raise = l.LugHeight.Value + t.Height.Value
	}
	if l.Tackle.Value > 0 {
		c.Deduct = append(c.Deduct, lift.Piece{Name: "slings and shackles", Mass: l.Tackle.Value})
	}
	c.Deduct = append(c.Deduct, l.Under...)
	for _, p := range k.Chart {
		c.Chart = append(c.Chart, lift.ChartRow{Radius: p.Radius * 1000, Mass: p.Mass})
	}
	switch {
	case len(k.Chart) == 0 && k.Rated.Pos.Given():
		c.Chart = []lift.ChartRow{{Radius: math.Max(t.Radius.Value, 1000), Mass: k.Rated.Value}}
		c.Radius = math.Max(c.Radius, 1000)
	case len(k.Chart) == 0:
		return "the chart of " + k.Name
	case c.Radius == 0:
		return "at what radius " + k.Name + " lifts it"
	}
	return ""
}

// slingHeight gives the height of the slings: stated, else by their shape.
func (r *Rigging) slingHeight() float64 {
	l := r.lifting()
	switch s := l.Slings; {
	case l.SlingHeight.Pos.Given():
		return l.SlingHeight.Value
	case s == nil:
		return 0
	case s.Rise > 0:
		return s.Rise
	case s.LegLength > 0 && s.Datum == lift.FromVertical:
		return s.LegLength * math.Cos(s.Angle*math.Pi/180)
	case s.LegLength > 0 && s.Datum == lift.FromHorizontal:
		return s.LegLength * math.Sin(s.Angle*math.Pi/180)
	default:
		return s.LegLength
	}
}

// anchor gives what a hoist hangs from: the thing named, else the weakest.
func anchor(k *tasks.Kit, name string) (what string, kg float64) {
	for n, v := range k.Hangs {
		if name == n {
			return n, v
		}
		if name == "" && (what == "" || v < kg || v == kg && n < what) {
			what, kg = n, v
		}
	}
	return what, kg
}

// twoHooks judges a load on two hooks, or turned over between them.
func (r *Rigging) twoHooks(j *Judgement, name string) {
	s := r.lifting().Second
	p := lift.Pair{A: s.A, B: s.B, RatedA: r.rating(r.Kit), RatedB: r.rating(s.Kit), Tilt: s.Tilt, Offset: s.Off}
	names := name + " and " + s.Kit.Name
	if p.RatedA == 0 || p.RatedB == 0 {
		j.Ask = append(j.Ask, "what "+names+" are rated for")
		return
	}
	if s.Turns {
		lug := 0.0
		if rig := r.lifting().Slings; rig != nil {
			lug = rig.LugWLL
		}
		res, err := lift.TurnOver(j.Load, p, lug)
		j.add("turning over between "+names, false, res, err)
		return
	}
	res, err := lift.TwoHooks(j.Load, p)
	j.add(names, false, res.Result, err)
}

// bySlings judges the slings, where the file gives them.
func (r *Rigging) bySlings(j *Judgement) {
	s := r.lifting().Slings
	if s == nil {
		if r.Way != lift.ByHands && r.Way != lift.ByTrolley && r.Way != lift.ByJack {
			j.Ask = append(j.Ask, "slings: legs, angle, rating")
		}
		return
	}
	res, err := lift.Slings(j.Load, *s)
	if err == nil {
		j.Legs, j.Rule = res.Legs, res.Rule
	}
	j.add("slings", false, res.Result, err)
}

// onFloor judges the landing place.
func (r *Rigging) onFloor(j *Judgement) {
	if l := r.lifting(); l.Lands.Pos.Given() {
		if !l.Floor.Pos.Given() {
			res, err := lift.Bearing(j.Load, l.Lands.Value, 0)
			if err == nil {
				j.Ask = append(j.Ask, "does the landing place carry "+res.Figure.Amount()+"?")
			}
			return
		}
		res, err := lift.Bearing(j.Load, l.Lands.Value, l.Floor.Value)
		j.add("landing place", false, res, err)
	}
}

// inWind works out the gust at which to stop. A forecast above it warns: the day may be another.
func (r *Rigging) inWind(j *Judgement) {
	inside := r.Task.Face != nil && r.Task.Face.Indoors
	if inside || r.Way != lift.ByLoaderCrane && !r.site && r.Task.Place.Hourly(r.Task.Face) == nil || r.Way == lift.ByHands || r.Way == lift.ByTrolley || r.Way == lift.ByJack {
		return
	}
	l := r.lifting()
	res, known, err := r.wind(j.Load)
	if !known {
		j.Ask = append(j.Ask, "sail area of the load, for the gust at which to stop")
		return
	}
	if err == nil {
		j.Wind = &res
	}
	if l.Measures == "" {
		j.Ask = append(j.Ask, "who measures the gust, with what, and where")
	}
	if l.Gust.Pos.Given() {
		j.add("wind", true, res.Result, err)
	}
}

// wind judges the gust that a load may have; known is false where nothing tells its sail.
func (r *Rigging) wind(load lift.Load) (res lift.WindResult, known bool, err error) {
	l := r.lifting()
	w := lift.Wind{Area: l.Sail.Value, Body: l.Body, Tip: l.Tip.Value, Gust: l.Gust.Value, May: l.MayGust.Value}
	if r.Kit != nil {
		w.Limit = r.Kit.Gust.Value
	}
	if w.Area == 0 && w.May > 0 && load.Length*load.Height+load.Length*load.Width == 0 {
		w.Area = 0.01 // it does not count
	}
	if w.Area == 0 && load.Length*load.Height+load.Length*load.Width == 0 {
		return res, false, nil
	}
	res, err = lift.Gust(load, w)
	return res, true, err
}

// others names the gear of the job that would carry a load that is refused.
func (r *Rigging) others(j *Judgement) {
	for _, k := range r.gear {
		if k == r.Kit {
			continue
		}
		way := wayOf(k)
		if way == lift.ByTrolley || way == lift.ByJack {
			continue
		}
		g, missing := r.gearOf(k, way)
		if missing != "" {
			continue
		}
		carry, _, err := lift.Choose(j.Load, []lift.Gear{g})
		if err == nil && len(carry) > 0 {
			j.Others = append(j.Others, k.Name+" carries it ("+carry[0].Result.Reason+")")
		}
	}
}
