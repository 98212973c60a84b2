package weld

import (
	"fmt"
	"math"

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
	Ambient         float64        // C, of air and steel; zero is 20: give 0.01 for freezing point
	Execution       string         // "EN 1090-2", "AWS D1.1" or nothing
	PreheatStandard string         // "EN 1011-2 A", "EN 1011-2 B", "AWS D1.1" or nothing; AWS work defaults to its own
	Chart           []ChartReading // what the user read from method A's charts
	Steel           Steel
	NoOverweld      bool    // lay exactly what is drawn; default: legs 1 mm over, caps 1.5 mm
	FittedUp        bool    // fit-up and tacks are a task of their own
	ByParts         bool    // hands-on time from its parts, not from the operating factor
	Hold            float64 // hours before final NDT, where no standard says; None for none
	Rates           Rates
	Origins         map[string]origin.Origin // by field: "hold", "ambient"
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
	Combined, Scale                                      origin.Figure // EN 1011-2 method A: combined thickness, and the hydrogen scale as a word
	SetUp, SafeStop, Soak, Cooling, BeforeNDT            origin.Figure
	Power, Generator, Drop, SupplyDrop                   origin.Figure // Generator: kVA that a generator for the set gives; drops in V
}

// SeamEstimate is one seam's part in an Estimate.
type SeamEstimate struct {
	Title     string // "8 mm fillet PB, 136 flux-cored"
	Section   Section
	Position  Position
	Process   Process
	Length    float64 // mm welded, one side
	Metal     float64 // kg
	Passes    int     // all sides
	Arc       quantity.Arc
	HandsOn   quantity.HandsOn
	Welding   quantity.HandsOn // of HandsOn: what the operating factor or the parts give
	HeatInput float64          // kJ/mm
	Preheat   float64          // C at least, 0 for none
	Hours     origin.Figure
	Runs      []Run
}

// Work gives hours, heat and consumables for the seams of one task, welded one after the other
// by one welder.
//
// Special cases are:
//   - no seam is an error, and so is a figure outside what is welded (see Error);
//   - a seam without procedure is welded with 111 on site and 135 in the shop, usual settings; where only
//     an electrode is given, with 111;
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
	for _, r := range c.Chart {
		if err := r.check(); err != nil {
			return err
		}
	}
	return first(
		optional("ambient", c.Ambient, -40, 60, "C"),
		optional("hold", hold, 0, 1000, "h"),
		c.Steel.check(), c.Rates.check())
}

func (c Circumstances) ambient() origin.Figure {
	o := c.Origins["ambient"]
	if o.Line == 0 && o.Source == "" {
		o.Source = "circumstances"
	}
	return origin.Written("ambient", c.Ambient, "C", o)
}

// seamWork is one seam on its way to an estimate.
type seamWork struct {
	seam    Seam
	joint   shape
	proc    Procedure
	data    process
	pos     Position
	section Section
	runs    runs
	length  float64 // mm welded on a side
	density float64 // kg/m3
	share   origin.Figure

	size, rate, bead, current, volts, travel, heat origin.Figure
	metal, arc, welding, fitUp, hours              origin.Figure
	heatTo, soak, setUp, safe, standBy, cool, hold origin.Figure
	combined, scale                                origin.Figure
	cooling                                        CoolingTime
	power, generator, drop, supplyDrop             origin.Figure
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
		if c.Site || e.proc.ElectrodeDiameter > 0 {
			e.proc.Process = 111
		}
	}
	e.data, _ = processData(e.proc.Process)
	if err := e.proc.fits(e.data); err != nil {
		return nil, err
	}
	e.pos = s.Position
	if e.pos == 0 {
		e.pos = e.proc.Position
	}
	e.pos = UsualPosition(s.Joint.Type, e.pos)
	if e.proc.Process == 121 && e.pos > PC {
		return nil, fault("position", "PA, PB or PC, or another process", "submerged arc does not weld in %s: flux and pool run off", e.pos)
	}
	if p := UsualPosition(s.Joint.Type, e.proc.Position); e.proc.Position != 0 && p != e.pos {
		e.warnf("the procedure %sis for %s, the seam is in %s", spaced(e.proc.Name), e.proc.Position, e.pos)
	}
	var err error
	if e.joint, err = s.Joint.filled(e.pos, !c.NoOverweld); err != nil {
		return nil, err
	}
	if e.section, err = e.joint.section(e.pos, !c.NoOverweld); err != nil {
		return nil, err
	}
	if d := c.Steel.Density; d > 0 && d < 4000 && e.data.number != 131 && e.data.number != 141 {
		e.warnf("%.0f kg/m3 is no steel: a light metal is welded with 131 MIG or 141 TIG, not with %s", d, e.proc.Process)
	}
	e.data.size = usualSize(e.data, e.joint.Thickness)
	e.deposit(c)
	if err := e.heating(c); err != nil {
		return nil, err
	}
	e.times(c)
	return e, nil
}

// usualSize is the wire or electrode where none is given: the process's own, smaller in sheet
// and thin plate (house judgement).
func usualSize(d process, thick float64) float64 {
	switch {
	case d.stick && thick < 6:
		return 3.2
	case d.number == 135 && thick < 3:
		return 0.8
	}
	return d.size
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
		size = origin.Trim(round(e.joint.Leg, 0.05)) + " mm "
	case e.joint.Type == Plug || e.joint.Type == Slot:
		size = origin.Trim(e.joint.Diameter) + " mm "
	default:
		size = origin.Trim(round(e.joint.Thickness, 0.05)) + " mm "
		if e.joint.PartialDepth < e.joint.Thickness {
			return fmt.Sprintf("%s%s %s mm deep %s, %s", size, e.joint.Type, origin.Trim(round(e.joint.PartialDepth, 0.05)), e.pos, e.proc.Process)
		}
	}
	return fmt.Sprintf("%s%s %s, %s", size, e.joint.Type, e.pos, e.proc.Process)
}

func round(v, step float64) float64 { return math.Round(v/step) * step }
