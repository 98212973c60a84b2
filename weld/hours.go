package weld

import (
	"math"
	"strings"

	"sailby/tasks/origin"
)

// Rates override the house's own minutes. Zero keeps the default, None is none at all.
type Rates struct {
	OperatingFactor float64 // arc over hands-on welding time, for procedures without their own
	FitUp           float64 // min a metre: pulling up, tacks; default 12 on site, 3 in the shop
	Moving          float64 // min a metre and side: leads, feeder, staging, wind shelter; default site 5 (111), 12 (with a feeder), 18 (gas-shielded); shop 1
	Cleaning        float64 // min a metre and run, by parts; default by process
	ElectrodeChange float64 // s each, by parts; default 15
	Starting        float64 // min a metre and run, by parts: getting to the seam, hood, looking; default 4 on site, 2 in the shop
	Gouging         float64 // m/h of back-gouging and grinding clean, all in; default 3
	SetUp           float64 // min to lead out and make ready; default 20 on site, 10 in the shop
	Turn            float64 // min to turn the part once; default 10

	Origins map[string]origin.Origin // by field: "fit-up", "moving", ...
}

func (r Rates) check() error {
	for _, f := range []struct {
		name   string
		v, max float64
	}{{"operating factor", r.OperatingFactor, 1}, {"fit-up", r.FitUp, 600}, {"moving", r.Moving, 600}, {"cleaning", r.Cleaning, 100},
		{"electrode change", r.ElectrodeChange, 600}, {"starting", r.Starting, 100}, {"gouging", r.Gouging, 100}, {"set-up", r.SetUp, 1440}, {"turn", r.Turn, 1440}} {
		lo := 0.0
		switch {
		case f.name == "operating factor" || f.name == "gouging": // none of it would never end
			lo = 0.01
		case f.v == None:
			continue
		}
		if err := optional(f.name, f.v, lo, f.max, ""); err != nil {
			return err
		}
	}
	return nil
}

// pick gives the rate in use as a figure: the override or the house default.
func (r Rates) pick(name string, v, usual float64, unit, note string) origin.Figure {
	switch v {
	case 0:
		return origin.House(name, usual, unit, note)
	case None:
		v = 0
	}
	return origin.Written(name, v, unit, r.Origins[name])
}

func bySite(site bool, onSite, inShop float64) float64 {
	if site {
		return onSite
	}
	return inShop
}

// factor gives the operating factor: the procedure's, the crew's, or that of process and place.
func (e *seamWork) factor(c Circumstances) origin.Figure {
	switch {
	case e.proc.OperatingFactor > 0:
		return e.proc.given("operating factor", e.proc.OperatingFactor, "")
	case c.Rates.OperatingFactor > 0:
		return origin.Written("operating factor", c.Rates.OperatingFactor, "", c.Rates.Origins["operating factor"])
	case c.Site:
		return e.data.site
	}
	return e.data.shop
}

// times turns arc time into hands-on time and adds what stands apart from it.
func (e *seamWork) times(c Circumstances) {
	e.weldingTime(c)
	e.coolingTimes(c)
	metres := origin.Written("metres of seam", e.joint.Length/1000, "m", e.joint.Origin)
	sides := origin.Written("sides", float64(e.section.Sides), "", e.joint.Origin)
	r := c.Rates

	parts := []origin.Figure{e.welding}
	if !c.FittedUp {
		per := r.pick("fit-up", r.FitUp, bySite(c.Site, 12, 3), "min/m", "pulling up and tacks, a metre of seam")
		e.fitUp = origin.Worked("fit-up and tacks", per.Value*metres.Value, "min", "fit-up x metres of seam", per, metres)
		parts = append(parts, e.fitUp)
	}
	moves := bySite(c.Site, 5, 1)
	switch {
	case c.Site && e.data.gasShielded():
		moves = 18
	case c.Site && !e.data.stick:
		moves = 12
	}
	per := r.pick("moving", r.Moving, moves, "min/m", "leads and staging; on site also the feeder, and with gas-shielded arcs the wind shelter")
	parts = append(parts, origin.Worked("leads and staging", per.Value*metres.Value*sides.Value, "min", "moving x metres of seam x sides", per, metres, sides))
	if e.joint.BackGouge {
		rate := r.pick("gouging", r.Gouging, 3, "m/h", "back-gouge and grind clean, all in: 2 to 4 m/h")
		parts = append(parts, origin.Worked("back-gouging and grinding", metres.Value/rate.Value*60, "min", "metres of seam / gouging x 60", metres, rate))
	}
	if e.seam.Turns > 0 {
		turn := r.pick("turn", r.Turn, 10, "min", "turning the part once")
		n := origin.Written("turns", float64(e.seam.Turns), "", e.joint.Origin)
		parts = append(parts, origin.Worked("turning the part", turn.Value*n.Value, "min", "turn x turns", turn, n))
	}
	if along, ok := e.preheating(c); ok {
		parts = append(parts, along)
	}
	if e.standBy.Value > 0 {
		parts = append(parts, e.standBy)
	}
	e.hours = total("hands-on time", parts)
	e.safeStop(c)
}

// weldingTime is arc time over the tighter of operating factor and duty cycle, never their
// product: the set cools while the welder does other things. By parts it is the sum of what is
// done, and not less than the duty cycle allows.
func (e *seamWork) weldingTime(c Circumstances) {
	duty := e.proc.share(e.current)
	slow := origin.House("access", 1, "", "free access; ladder or rope 1.3 to 1.5")
	if e.seam.Access > 0 {
		slow = origin.Written("access", e.seam.Access, "", e.joint.Origin)
	}
	if c.ByParts {
		e.byParts(c, duty, slow)
		return
	}
	of := e.factor(c)
	e.share = origin.Worked("arc share", math.Min(of.Value, duty.Value), "", "min(operating factor, duty cycle at this current)", of, duty)
	if e.proc.Set.RatedCurrent == 0 {
		e.share = renamed(of, "operating factor")
	}
	if duty.Value < of.Value {
		e.warnf("the welding set governs: at %.0f A it holds %.0f %% of ten minutes, the welder would weld %.0f %% of them", e.current.Value, duty.Value*100, of.Value*100)
	}
	e.welding = origin.Worked("welding", e.arc.Value/e.share.Value*slow.Value, "min", "arc time / "+e.share.Name+" x access", e.arc, e.share, slow)
}

func (e *seamWork) byParts(c Circumstances, duty, slow origin.Figure) {
	r := c.Rates
	runMetres := origin.Worked("metres of run", float64(e.runs.count)*e.length/1000, "m", "runs x length welded / 1000",
		e.runs.why, origin.Written("length welded", e.length, "mm", e.joint.Origin))
	clean := r.pick("cleaning", r.Cleaning, e.data.clean, "min/m", "slag and interpass cleaning, a metre of run")
	start := r.pick("starting", r.Starting, bySite(c.Site, 4, 2), "min/m", "getting to the seam, hood, looking, a metre of run")
	parts := []origin.Figure{e.arc,
		origin.Worked("slag and interpass cleaning", clean.Value*runMetres.Value, "min", "cleaning x metres of run", clean, runMetres),
		origin.Worked("starts", start.Value*runMetres.Value, "min", "starting x metres of run", start, runMetres)}
	if e.data.stick {
		n := e.electrodes()
		each := r.pick("electrode change", r.ElectrodeChange, 15, "s", "10 to 20 s each")
		parts = append(parts, origin.Worked("electrode changes", n.Value*each.Value/60, "min", "electrodes x electrode change / 60", n, each))
	}
	done := total("what is done", parts)
	e.share = duty
	v := math.Max(done.Value*slow.Value, e.arc.Value/duty.Value)
	if e.arc.Value/duty.Value > done.Value*slow.Value {
		e.warnf("the welding set governs: at %.0f A it holds only %.0f %% of ten minutes", e.current.Value, duty.Value*100)
	}
	e.welding = origin.Worked("welding", v, "min", "max(what is done x access, arc time / duty cycle at this current)", done, slow, e.arc, duty)
}

// total adds figures under their names.
func total(name string, parts []origin.Figure) origin.Figure {
	v, names := 0.0, make([]string, len(parts))
	for i, f := range parts {
		v += f.Value
		names[i] = f.Name
	}
	unit := "min"
	if len(parts) > 0 {
		unit = parts[0].Unit
	}
	return origin.Worked(name, v, unit, strings.Join(names, " + "), parts...)
}

// safeStop is the earliest point at which the seam may be left over closing: in seams of more
// than two runs the root and the second run all along, or a third of the thickness, whichever is
// later; in seams of one or two runs a third of the length at full size (house judgement).
// Tacks alone never carry a lift or a tide.
func (e *seamWork) safeStop(Circumstances) {
	each := float64(e.runs.count) / float64(e.section.Sides)
	part := 1.0 / 3
	note := "a third of the length at full size: one or two runs"
	if each > 2 {
		third := 1.0 / 9 // of a triangle's area below a third of its height
		if e.joint.Type.groove() {
			third = e.thirdOf()
		}
		part = math.Min(1, math.Max(2/each, third))
		note = "root and second run all along, or a third of the thickness, whichever is later"
	}
	p := origin.House("part welded at the safe stop", part, "", note)
	v := e.welding.Value * part
	if e.fitUp.Name == "" {
		e.safe = origin.Worked("safe stop", v, "min", "welding x part welded at the safe stop", e.welding, p)
		return
	}
	e.safe = origin.Worked("safe stop", v+e.fitUp.Value, "min", "fit-up and tacks + welding x part welded at the safe stop", e.fitUp, e.welding, p)
}

// thirdOf is the part of a groove's area below a third of its depth.
func (e *seamWork) thirdOf() float64 {
	j := e.joint
	t := tanDeg(j.Angle / 2)
	if j.Type == SingleBevel || j.Type == DoubleBevel {
		t = tanDeg(j.Angle) / 2
	}
	h := j.PartialDepth
	if j.Type.twoSided() {
		h /= 2
	}
	g := j.RootGap + j.Gap
	whole := g*h + h*h*t
	if whole <= 0 {
		return 1.0 / 3
	}
	return (g*h/3 + h*h/9*t) / whole
}
