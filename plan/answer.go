package plan

import (
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Answer is all that was found out about one basis.
type Answer struct {
	Work      *expand.Work
	Verdict   Verdict
	Plan      *Plan        // checked; nil if none was found. Where deadlines do not hold it is the least late one
	Late      bool         // Plan breaks a deadline or the window: it is shown, never called fitting
	Finish    hours.Minute // site finish of Plan
	Bound     hours.Minute // earliest possible: no plan finishes before it
	BoundWhy  string       // what proves the bound, in the job's words
	Best      bool         // Finish is proved to be the earliest
	HandBest  bool         // no plan with this finish has more time in hand at the tightest of the deadlines other than the window: shown
	InHand    int          // minutes between Finish and the window's close; negative if late
	Deadlines []DeadlineResult
	Governing []Cause              // what sets the finish, step by step, last first
	Rows      []Row                // one for each step of Plan
	Proof     *Proof               // for CannotFit
	CutShort  bool                 // the time limit or a cancel ended the search
	NoPlan    string               // why there is no plan to show, not even a late one; "" if there is one
	Shifts    map[string]hours.Set // by person: from the start to the end of each shift, legs of the trip included (R15)
	Steps     int64                // search steps done
}

// DeadlineResult is one deadline with what the plan makes of it.
type DeadlineResult struct {
	expand.Deadline
	Name      string
	Finish    hours.Minute
	InHand    int          // minutes, negative if late
	LastStart hours.Minute // the last start of the task that still makes it; Far if unknown
}

// LeewaySteps is how many steps a plan may have for its leeway to be worked out (R20).
const LeewaySteps = 600

// Row is what is known about one planned step.
type Row struct {
	Latest hours.Minute // latest finish with every deadline still met, order and people kept (R20); its planned finish where Leeway is below 0
	Leeway int          // minutes; -1 where it is not known: standing time, or not worked out
	Shares []string     // tasks that the leeway is shared with
	SetBy  []Cause      // what sets its start (R21): remove these and it can start earlier
	Idle   int
}

// CauseKind is the kind of thing that sets a date.
type CauseKind uint8

// What can set a date.
const (
	ByLink CauseKind = iota
	ByPerson
	ByKit
	ByRoom
	ByState
	ByHours // opening hours, breaks, nights
	ByReach // tide or given access
	ByHire
	ByNotBefore
	ByPower
	ByOrder
	ByMaxWait
	ByStart // the window opens, or the job may begin
	ByRest
	ByPermit
	ByConditions
)

// Cause is one thing that sets the start of a step.
type Cause struct {
	Kind     CauseKind
	Step     int    // the step it sets, index in Work.Steps
	Other    int    // the step it comes from, -1 if none
	Name     string // the person, kit, workface, calendar
	Text     string // in the job's words
	Pos      tasks.Pos
	Together bool // sets the start only together with the others of its list
}

// ProofKind says what kind of argument proves that no plan fits.
type ProofKind uint8

// The kinds of proof.
const (
	ByChain     ProofKind = iota // too long even with unlimited people
	ByWork                       // more work than hours for a person, ticket, kit or workface
	BySearch                     // the search has shown it; Members is the set of limits that cannot all hold
	ByNoOpening                  // a step fits no opening at all
)

// Proof shows that no plan meets the window and the deadlines.
type Proof struct {
	Kind    ProofKind
	Even    bool // even at the low end of every range
	Summary string
	Lines   []ProofLine
	Over    int // minutes by which it does not fit
}

// ProofLine is one member of a proof: a limit that is needed for the contradiction.
type ProofLine struct {
	Text    string
	Minutes int
	Pos     tasks.Pos
	Needed  bool // shown to be needed: without it the others can hold
	Limit   Limit
}

// Report is the whole answer to a job: three bases side by side.
type Report struct {
	Job    *tasks.Job
	Likely *Answer
	Maybes *Answer // nil if the job has no maybes: the same as Likely
	High   *Answer // nil if no range has width: the same as Likely
	LowToo bool    // a CannotFit on likely hours holds at the low ends too
	Ways   *Ways   // what would make it fit, on likely hours; nil if it was not asked
}
