package weld

import (
	"fmt"
	"math"
	"strings"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Seam is one joint with how it is welded.
type Seam struct {
	Joint     Joint
	Position  Position   // default PB for fillets and laps, PA for the rest
	Procedure *Procedure // default: the process of the place with usual settings
	Turns     int        // how often the part is turned over while this seam is welded
	Access    float64    // hands-on minutes times this where access is bad; default 1 (ladder or rope 1.3 to 1.5, closed space 1.3 to 1.6: house judgement)
}

// Circumstances is what surrounds the welding. The zero value is a shop at 20 C with overweld
// on and no contract standard.
type Circumstances struct {
	Site            bool
	Ambient         float64 // C, of air and steel; zero is 20: give 0.01 for freezing point
	Execution       string  // "EN 1090-2", "AWS D1.1" or nothing
	PreheatStandard string  // "EN 1011-2 A", "EN 1011-2 B", "AWS D1.1" or nothing; AWS work defaults to its own
	Steel           Steel
	NoOverweld      bool    // lay exactly what is drawn; default: legs 1 mm over, caps 1.5 mm
	FittedUp        bool    // fit-up and tacks are a task of their own
	ByParts         bool    // hands-on time from its parts, not from the operating factor
	Hold            float64 // hours before final NDT, where no standard says; None for none
	Rates           Rates
	Origins         map[string]origin.Origin // by field: "hold"
}

// Estimate is what welding takes. Figures in Why hold the same numbers with their origin.
type Estimate struct {
	Metal     float64          // kg deposited
	Passes    int              // runs of the seam with the most
	Arc       quantity.Arc     // arc burning
	HandsOn   quantity.HandsOn // everything at the face but SetUp, fit-up included unless FittedUp
	SetUp     quantity.HandsOn // paid at the first start and again after every stop
	SafeStop  quantity.HandsOn // from the start, without SetUp, before which no stop over closing
	Soak      quantity.Clock   // preheat soaking, each time it is taken up
	Interpass quantity.Clock   // waiting between runs; already in HandsOn, the welder stands by
	Cooling   quantity.Clock   // after the last run, before visual or the next step
	BeforeNDT quantity.Clock   // from the last run to final testing; 0: cooling only
	HeatInput float64          // kJ/mm, the most of any seam
	Power     float64          // kVA drawn, the most of any seam

	Consumables []Consumable
	Warnings    []string
	Hours       origin.Figure // the tree of HandsOn
	Why         Figures
	Seams       []SeamEstimate
}

// Figures are the other numbers of an Estimate with where they come from. A figure that does not
// apply has no name.
type Figures struct {
	Metal, Arc, Passes, HeatInput, Preheat, CE, CET, T85 origin.Figure
	SetUp, SafeStop, Cooling, BeforeNDT, Power           origin.Figure
}

// SeamEstimate is one seam's part in an Estimate.
type SeamEstimate struct {
	Title     string // "8 mm fillet PB, 136 flux-cored"
	Section   Section
	Position  Position
	Length    float64 // mm welded, one side
	Metal     float64 // kg
	Passes    int     // all sides
	Arc       quantity.Arc
	HandsOn   quantity.HandsOn
	Welding   quantity.HandsOn // of HandsOn: what the operating factor or the parts give
	HeatInput float64          // kJ/mm
	Preheat   float64          // C at least, 0 for none
	Hours     origin.Figure
}

// Work gives hours, heat and consumables for the seams of one task, welded one after the other
// by one welder.
//
// Special cases are:
//   - no seam is an error, and so is a figure outside what is welded (see Error);
//   - a seam without procedure is welded with 111 on site and 135 in the shop, usual settings;
//   - what contradicts without stopping the work is in Warnings, each once, in order of seams.
func Work(seams []Seam, c Circumstances) (Estimate, error) {
	if len(seams) == 0 {
		return Estimate{}, fault("joints", "give at least one joint with its length", "nothing to weld")
	}
	if err := c.check(); err != nil {
		return Estimate{}, err
	}
	if c.Ambient == 0 {
		c.Ambient = 20
	}
	parts := make([]*seamWork, 0, len(seams))
	for i, s := range seams {
		e, err := workSeam(s, c)
		if err != nil {
			return Estimate{}, inSeam(err, i, len(seams))
		}
		parts = append(parts, e)
	}
	return sum(parts, c), nil
}

// inSeam tells which seam an error is about, where there are several.
func inSeam(err error, i, n int) error {
	if e, ok := err.(*Error); ok && n > 1 {
		return &Error{Field: e.Field, Problem: fmt.Sprintf("joint %d: %s", i+1, e.Problem), Hint: e.Hint}
	}
	return err
}

func (c Circumstances) check() error {
	hold := c.Hold
	if hold == None {
		hold = 0
	}
	return first(
		optional("ambient", c.Ambient, -40, 60, "C"),
		optional("hold", hold, 0, 1000, "h"),
		c.Steel.check(), c.Rates.check())
}

// seamWork is one seam on its way to an estimate.
type seamWork struct {
	seam    Seam
	joint   Joint // filled
	proc    Procedure
	data    process
	pos     Position
	section Section
	runs    runs
	length  float64 // mm welded on a side
	share   origin.Figure

	size, rate, bead, current, volts, travel, heat origin.Figure
	metal, arc, welding, fitUp, hours              origin.Figure
	heatTo, soak, setUp, safe, standBy, cool, hold origin.Figure
	cooling                                        CoolingTime
	power                                          origin.Figure
	warn                                           []string
}

func (e *seamWork) warnf(format string, args ...any) {
	e.warn = append(e.warn, fmt.Sprintf(format, args...))
}

// workSeam takes one seam through metal, rate, runs, heat and hours.
func workSeam(s Seam, c Circumstances) (*seamWork, error) {
	e := &seamWork{seam: s}
	if s.Procedure != nil {
		e.proc = *s.Procedure
	}
	if err := first(e.proc.check(), optional("access", s.Access, 1, 10, ""), within("turns", float64(s.Turns), 0, 1000, "")); err != nil {
		return nil, err
	}
	if s.Position > lastPosition {
		return nil, fault("position", "PA to PG, PH, PJ or H-L045", "no such position")
	}
	if e.proc.Process == 0 {
		e.proc.Process = 135
		if c.Site {
			e.proc.Process = 111
		}
	}
	e.data, _ = processData(e.proc.Process)
	e.pos = s.Position
	if e.pos == 0 {
		e.pos = e.proc.Position
	}
	e.pos = usualPosition(s.Joint.Type, e.pos)
	if p := usualPosition(s.Joint.Type, e.proc.Position); e.proc.Position != 0 && p != e.pos {
		e.warnf("the procedure %sis for %s, the seam is in %s", spaced(e.proc.Name), e.proc.Position, e.pos)
	}
	var err error
	if e.joint, err = s.Joint.filled(e.pos, !c.NoOverweld); err != nil {
		return nil, err
	}
	if e.section, err = e.joint.section(e.pos, !c.NoOverweld); err != nil {
		return nil, err
	}
	e.deposit(c)
	if err := e.heating(c); err != nil {
		return nil, err
	}
	e.times(c)
	return e, nil
}

func spaced(s string) string {
	if s == "" {
		return ""
	}
	return s + " "
}

// title names the seam as a weld list does.
func (e *seamWork) title() string {
	size := ""
	switch {
	case e.joint.Type == Fillet || e.joint.Type == Lap:
		size = origin.Trim(round(e.joint.Leg, 0.1)) + " mm "
	case e.joint.Type == Plug || e.joint.Type == Slot:
		size = origin.Trim(e.joint.Diameter) + " mm "
	default:
		size = origin.Trim(round(e.joint.PartialDepth, 0.1)) + " mm "
	}
	return fmt.Sprintf("%s%s %s, %s", size, e.joint.Type, e.pos, e.proc.Process)
}

func round(v, step float64) float64 { return math.Round(v/step) * step }

// deposit works out metal, rate, runs and arc time.
func (e *seamWork) deposit(c Circumstances) {
	density := c.Steel.density()
	j, p := e.joint, e.proc
	e.size = p.size(e.data)
	rate, warn := p.rate(e.data, e.pos, density)
	e.rate, e.warn = rate, append(e.warn, warn...)
	e.bead = p.bead(e.data, e.pos, e.size, e.rate, density)
	e.runs = p.runsFor(j, e.section, e.data, e.pos, e.bead)
	e.warn = append(e.warn, e.runs.warn...)
	e.length = j.Length * j.share()

	length := origin.Written("length", j.Length, "mm", j.Origin)
	if j.Pitch > 0 {
		length = origin.Worked("length welded", e.length, "mm", "length x bead / pitch", length,
			origin.Written("bead", j.Bead, "mm", j.Origin), origin.Written("pitch", j.Pitch, "mm", j.Origin))
	}
	rho := origin.Published("density", density, "kg/m3", "7850 for steel unless given")
	kg := Metal(e.section.Area, e.length, density)
	expr := "area laid x " + length.Name + " x density / 1000000000"
	from := []origin.Figure{e.section.Why, length, rho}
	if j.BackGouge {
		back := backRun(e.pos, j.Thickness)
		kg += back.Value * e.length / 1000
		expr += " + backing run x " + length.Name + " / 1000"
		from = append(from, back)
	}
	e.metal = origin.Worked("weld metal", kg, "kg", expr, from...)
	e.arcTime()
	if strings.HasPrefix(c.Execution, "AWS") && (j.Type == Fillet) && j.Leg < MinFillet(math.Max(j.Thickness, j.Thickness2))-0.05 && s0(e) {
		e.warnf("a leg of %.3g mm is below the %.0f mm that AWS D1.1:2020 wants on %.3g mm", j.Leg, MinFillet(math.Max(j.Thickness, j.Thickness2)), math.Max(j.Thickness, j.Thickness2))
	}
}

// s0 says whether the thickness was given, not assumed from the leg.
func s0(e *seamWork) bool { return e.seam.Joint.Thickness > 0 }

// arcTime is metal over rate; where a fillet's travel speed is given, length over travel as
// well, and the longer of both, with a warning where they disagree by more than routesApart.
func (e *seamWork) arcTime() {
	byMetal := origin.Worked("arc time by metal", e.metal.Value/e.rate.Value*60, "min", "weld metal / deposition rate x 60", e.metal, e.rate)
	if !e.runs.travel {
		e.arc = byMetal
		e.arc.Name = "arc time"
		return
	}
	v := e.proc.given("travel", e.proc.Travel, "mm/min")
	byTravel := origin.Worked("arc time by travel", float64(e.runs.count)*e.length/v.Value, "min", "runs x length welded / travel",
		e.runs.why, origin.Written("length welded", e.length, "mm", e.joint.Origin), v)
	e.arc = origin.Worked("arc time", math.Max(byMetal.Value, byTravel.Value), "min", "max(arc time by metal, arc time by travel)", byMetal, byTravel)
	if r := byTravel.Value / byMetal.Value; r > 1+routesApart || r < 1/(1+routesApart) {
		leg := math.Sqrt(2 * e.bead.Value)
		e.warnf("travel and metal disagree: %.3g min by travel, %.3g min by metal; at %.0f mm/min a run has %.3g mm2, a leg of %.2g mm: check travel against deposition, or what is really laid", byTravel.Value, byMetal.Value, v.Value, e.bead.Value, leg)
	}
}

const routesApart = 0.15 // between the travel and the metal route: what setting a speed by hand is good for
