package tasks

import (
	"sailby/weld"
)

// Kind is the kind of a task.
type Kind string

// The kinds of tasks.
const (
	Weld    Kind = "weld"
	Cut     Kind = "cut"
	Prep    Kind = "surface prep"
	Coat    Kind = "coat"
	Lift    Kind = "lift"
	FitUp   Kind = "fit-up"
	Test    Kind = "test"
	Move    Kind = "move"
	SignOff Kind = "sign-off"
	Plain   Kind = "plain"
)

// Kinds lists the kinds in the order of the manual.
func Kinds() []Kind {
	return []Kind{Weld, Cut, Prep, Coat, Lift, FitUp, Test, Move, SignOff, Plain}
}

// Task is something somebody must do or wait for.
type Task struct {
	Name    string // unique; repeated blocks add the number of the round: "cut bay 2"
	Title   string // printed; "" is Name
	Kind    Kind
	Pos     Pos
	Keys    Keys
	Place   *Place
	Face    *Workface // nil: the place as a whole
	Drawing string    // joint or drawing number
	Note    string    // printed on the sheet

	Links []Link

	Hours    Range // elapsed minutes with the people named; overrules the estimate
	ManHours Range // man-minutes, divided by the people
	People   int   // how many work; 0 is the kind's default
	Needs    []Need
	Who      []string // named people, each of whom works on it
	Kit      []Use
	Factor   float64 // time factor of a repeated block's round; 0 is 1
	Round    int     // of a repeated block, from 1; 0 if not repeated
	Block    string  // name of the repeated block

	Standing Range  // clock minutes that the plan keeps: alone, or after the hands-on part
	Why      string // what the standing time is ("resin set")
	Keeps    []Need // people that the standing time keeps

	InOneGo        *bool  // nil: the kind's default
	OverMeals      *bool  // may pause over a meal though in one go; nil: the kind's default
	SafeStop       Amount // hands-on minutes before the first stop; Pos.Given overrules the estimate
	LeastPiece     Amount // least hands-on minutes in a piece
	SetUp          Amount // hands-on minutes at each start; Pos.Given overrules the estimate
	MayChangeHands bool

	NotBefore *Moment
	Deadline  *Moment // must be done by
	Chance    float64 // 0 is certain; else the task is a maybe
	Group     string  // maybes of one group: exactly one happens
	HotWork   *bool
	Noisy     *bool
	FireWatch Amount   // minutes after; Pos.Given overrules
	States    []string // states it puts its workface in, beyond the kind's own
	Lone      *bool    // false: may be done alone although the kind is listed
	Light     bool

	// By kind.
	Seams     []Seam    // weld
	Repairs   *Task     // weld: of this one, what testing may find
	Steel     string    // weld: a grade, or a name under Welding.Steels; "" is that of its part, else of the job
	Hold      Amount    // weld: hours before final NDT; Pos.Given overrules the job's, weld.None for none
	Overweld  *bool     // weld: nil is as for the job
	Advise    bool      // weld: an order of its seams that keeps shrinkage in balance is worked out
	By        string    // cut: plasma, oxy-fuel, ...; lift: a kit or "hands"; test: method
	Length    Amount    // mm: cut
	Thickness Amount    // mm: cut
	Bevel     Amount    // deg off square: cut
	Pierces   int       // starts inside the plate: cut
	Current   Amount    // A of a plasma set: cut
	Speed     Amount    // mm/min of the torch or disc: cut
	CutBy     *CutTable // the house's own speeds: cut; nil: the usual ones
	Second    Amount    // mm4, second moment of area of what is welded, for the bow: weld
	Count     int       // holes or tacks: cut
	Dwell     Amount    // minutes, as the test's procedure says: test
	Pressure  Amount    // bar: test
	Warm      Amount    // °C of the steel: test; else that of the place
	Surface   []string  // surface prep, coat: assemblies or assembly/part
	Area      Amount    // m2: overrules the surface
	Grade     string    // surface prep, coat
	Method    string    // surface prep, coat: how
	Shape     string    // surface prep, coat: flat, sections or lattice; "" is sections
	Condition string    // surface prep: new, light rust, heavy rust or painted; "" is new
	Coats     []string  // coat: paints in order
	Rescue    *bool     // coat: whether a longest wait before it may be mended; nil: it may
	Behind    []string  // coat: assemblies or assembly/part whose other face it is, or that are close beside it
	Lifts     string    // lift, move: assembly (or assembly/part)
	Mass      Amount    // kg: stated
	Height    Amount    // mm of hook travel
	Travel    Amount    // mm on the level
	Radius    Amount    // mm, crane
	To        *Place    // move
	Parts     []string  // cut, fit-up, weld: assembly/part it works on
	Joints    int       // fit-up: count of joints; 0 unknown
	Lifting   *Lifting  // lift, move
	Joins     []Named   // fit-up, weld: assemblies or parts that hang together from its finish on
	TakesOff  []Named   // cut, fit-up, plain: assemblies or parts that hang on nothing else from its finish on
	FitProved []string  // fit-up: survey, template or trial fit that proves that it fits
	TaskNature
	SentOut string // plain: galvanizing, machining, profile cutting or other work sent out
}

// Use is so many of a kit.
type Use struct {
	Kit   *Kit
	Count int
	Pos   Pos
}

// Seam is one weld of a weld task with its place in the file.
type Seam struct {
	weld.Seam
	Procedure string
	Picked    string // why this procedure, where the joint names none; "" where it does
	Name      string // joint number on the weld list
	At        [3]float64
	HasAt     bool // At is its middle, mm in the assembly's axes
	Pos       Pos
}

// LinkEnd is the start or the finish of a task, or a state that its finish leads to.
type LinkEnd uint8

// The ends of a task that a link can hold on to.
const (
	Finish LinkEnd = iota
	Start
)

// Link says that this task's end To comes at least Min and at most Max after From's end.
type Link struct {
	Task  string // the earlier task
	State string // "" or a state: "touch dry", "hard dry", "cured", "cooled", "ready for NDT", ...
	From  LinkEnd
	To    LinkEnd
	Min   Wait
	Max   *Wait
	Pos   Pos
}

// Wait is a length of time between two ends.
type Wait struct {
	Minutes int
	Working bool // open hours of the later task's place, not clock time
	Pos     Pos
}

// Label gives the text that is printed for the task.
func (t *Task) Label() string {
	if t.Title != "" {
		return t.Title
	}
	return t.Name
}

// Where names the place, and the workface if there is one: "pier/hinge".
func (t *Task) Where() string {
	if t.Face != nil {
		return t.Place.Name + "/" + t.Face.Name
	}
	return t.Place.Name
}

// Maybe says whether the task only happens with a given chance.
func (t *Task) Maybe() bool { return t.Chance > 0 && t.Chance < 1 }
