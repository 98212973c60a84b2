// Package expand turns the tasks of a job into steps with minutes: what has to be scheduled.
// It is the one place where a task becomes activities, and it calls weld, coat, lift and site for
// the hours. Times are UTC minutes; hands-on minutes are before the face factor.
package expand

import (
	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
)

// End picks a value out of every range of hours.
type End uint8

// The three values of a range.
const (
	Likely End = iota
	Low
	High
)

// String names the end as the outputs do.
func (e End) String() string {
	return [...]string{"likely hours", "low end of the hours", "high end of the hours"}[e]
}

// Basis is the question a plan answers: which window, which hours, which maybes.
type Basis struct {
	Trip   string // "" is the booked trip, else the first
	End    End
	Maybes bool // every maybe happens

	Rescue  []string // longest waits that are mended, by Rescue.Key
	Unbound bool     // longest waits that may be mended do not hold and are not mended: for proofs, too kind to the job
	Washed  bool     // starts that may share one wash do not pay for it: for proofs, too kind to the job (R26)
}

// Work is a job written out for one basis: what plan/problem compiles and what plan/check
// judges a plan against.
type Work struct {
	Job     *tasks.Job
	Basis   Basis
	Trip    *tasks.Trip // nil for a plain window
	Window  Window
	Span    hours.Span // the minutes planned over: first possible work at home to well past the window
	Carried bool       // stays at the site are carried on past the window's close (R18)

	Steps     []*Step
	Links     []Link
	Orders    []Order
	Presence  map[string][]Stay       // by person: where they are, disjoint, in order; stays at home places have Place nil
	Travel    map[string][]hours.Span // by person: legs of the trip, which count as duty
	Deadlines []Deadline
	Shared    bool         // starts pay for a wash that they may share with others in the same tide (R26)
	Notes     []tasks.Note // what is worth saying that is no fault
	Winds     []tasks.Note // of those: lifts that no forecast tells the gusts of, beside the verdict (R25)
	Rescues   []Rescue     // longest waits that may be mended, in file order
}

// Window is when the site can be worked.
type Window struct {
	Place         *tasks.Place
	Opens, Closes hours.Minute
	Pos           tasks.Pos
}

// Stay says that a person is at the site (Site true) or at the home places in a span.
type Stay struct {
	hours.Span
	Site bool
}

// Class is what passes while a step runs.
type Class uint8

const (
	Hands Class = iota // hands-on minutes at open hours, by people or kit
	Clock              // clock minutes, nobody works (Needs may keep a person: then in one go on shift)
	Cure               // film: a sum of hourly rates reaches one (R11)
)

// Step is one activity of a task.
type Step struct {
	Index int
	Task  *tasks.Task
	Name  string // "weld", "coat 1", "dry 1", "hard dry", "hold before NDT", ...; unique in its task
	Class Class
	Place *tasks.Place
	Face  *tasks.Workface

	HandsOn int                        // hands-on minutes, rounded up once (R4); 0 for an absent maybe
	Working int                        // HandsOn over the place's face factor, rounded up: minutes of open hours (R5)
	Clock   int                        // for Clock: minutes
	Rate    func(hours.Minute) float64 // for Cure: share of the cure a minute beginning there adds

	SetUp       int  // working minutes paid by every piece after a night or access pause, and the first (R8)
	LeastPiece  int  // working minutes, set-up not counted
	SafeStop    int  // working minutes done before the first such pause, set-up not counted
	InOneGo     bool // no night or access pause
	OverMeals   bool // may pause over a meal (only asked where InOneGo)
	ChangeHands bool

	Needs   []tasks.Need // distinct persons (R9)
	Watch   int          // minutes of fire watch after each piece that ends in a night or access pause and after the last (R13)
	Watcher *tasks.Need  // who may keep that watch beside the people of the step: a ticket
	Kit     []Use
	Power   float64 // kVA while working
	Room    int     // people counted against the workface's room (usually len of needs)
	States  []State // what it puts its workface in (R12)
	Lone    bool    // never leaves one person at the place (R14)
	Hot     bool
	Noisy   bool
	Light   bool
	Moves   string       // assembly that it moves: exclusive with all other work on it
	Works   []string     // assemblies it works on
	Wants   []string     // permits wanted, by Permit.Name
	Paint   *tasks.Paint // of a coat, a stripe or a tack coat; nil for all others
	Mends   bool         // mends a longest wait that is not kept (R11): a tack coat, or abrading where it has no Paint

	NotBefore hours.Minute // hours.Never if free
	Deadline  hours.Minute // hours.Far if free; includes the window for site work
	Site      bool         // counts for the site finish (R19)
	Absent    bool         // a maybe that does not happen on this basis

	Estimate Estimate
	Rigging  *Rigging      // of a lift or move
	Gust     origin.Figure // m/s at 10 m above which a lift is not worked (R25); without a name: none

	welders  int      // of a weld: who shares the metal
	warnings []string // of its notes, those that tell of something to change
}

// Use is so many of a kit, held through pauses if Stays.
type Use struct {
	Kit   *tasks.Kit
	Count int
	Stays bool
}

// State is a state of the workface from the step's start to its finish and a tail after it.
type State struct {
	Name string
	Tail func(finish hours.Minute) hours.Minute // nil: none; monotone
	What string                                 // why the tail: "hard dry at 8 °C"
}

// Estimate tells where a step's minutes come from.
type Estimate struct {
	Figure      origin.Figure // hands-on or clock minutes with all they were made from
	Range       [3]int        // low, likely, high minutes
	Overruled   bool          // the job file gives the hours
	Notes       []string      // warnings and cautions from the estimate
	Consumables []Consumable
	Facts       []origin.Figure // other figures worth asking for: weld metal, heat input, area, mass
}

// Consumable is something the step uses up.
type Consumable struct {
	What   string
	Amount float64
	Unit   string
	Spare  float64
	Each   float64 // how much of Unit one package holds; 0 where that is not known
	Packed string  // what the packages are: "spools of 15 kg", "bottles of 10 m3", "electrodes"
}

// Link is a wait between two ends of steps. A nil From is the start of the plan.
type Link struct {
	From, To   *Step
	FromEnd    tasks.LinkEnd
	ToEnd      tasks.LinkEnd
	Min        int  // minutes; may be negative only for NoMin
	Max        int  // minutes; NoMax if none
	Working    bool // counted in open hours of To's place
	MaxWorking bool
	MaxCure    *MaxCure // a max wait that shortens with heat (R11); nil if plain
	Pos        tasks.Pos
	Why        string // in the job's words: "recoat of primer", "after cut lugs"
}

// NoMax and NoMin mark a link without that wait.
const (
	NoMax = int(1 << 29)
	NoMin = -int(1 << 29)
)

// MaxCure gives the last minute at which the later end may come after the earlier end at t.
type MaxCure struct {
	Last func(t hours.Minute) hours.Minute
}

// Order is a rule on the order itself: at least one choice holds (R17).
type Order struct {
	Choices []Before
	Pos     tasks.Pos
	Text    string
	Made    bool // made by a lift (R24), not written under `orders`
}

// Before says that every step of First is finished before any step of Then starts; both lists
// hold the hands-on steps of one task.
type Before struct{ First, Then []*Step }

// Deadline is a time by which a task must be finished.
type Deadline struct {
	Task *tasks.Task // nil: the window itself
	Step *Step       // the step whose finish counts; nil: the site finish
	By   hours.Minute
	Pos  tasks.Pos
}

// Minutes gives the step's length as the schedule counts it: working minutes for Hands (set-up
// not included), clock minutes for Clock; 0 for Cure and for absent steps.
func (s *Step) Minutes() int {
	switch {
	case s.Absent:
		return 0
	case s.Class == Hands:
		return s.Working
	case s.Class == Clock:
		return s.Clock
	}
	return 0
}

// Key names the step in a plan: task and step name.
func (s *Step) Key() string { return s.Task.Name + " / " + s.Name }
