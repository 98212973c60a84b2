// Package problem is a job compiled for the solver: steps as activities with modes (who does
// it), timings, links, resources, states and order rules. Minutes are ints counted from Base.
// The same types hold the open scheduling instances, which have one mode with no crew each.
package problem

import (
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Problem is everything the solver may know. It does not change while it is solved.
type Problem struct {
	Work        *expand.Work // nil for an open instance
	Base        hours.Minute
	End         int // horizon: no step finishes after it
	Open, Close int // the window; Close is a hard end for Site steps unless the problem is carried past it

	Acts   []Act
	Links  []Link
	Res    []Resource
	People []Person
	Pairs  []Pair
	Orders []Order

	ground *ground // open hours by cause, for explanations; nil for an open instance
}

// Act is one activity.
type Act struct {
	Name      string
	Step      *expand.Step // nil for an open instance
	Modes     []Mode       // at least one, unless Hopeless says why there is none
	Times     []*Timing    // the distinct timings of Modes
	Tried     []*Timing    // of teams for whom no start is possible
	Hopeless  string       // why no mode exists: "no opening is long enough", "nobody has the ticket"
	Cut       bool         // there are more choices of people than Modes holds: bounds must not rest on who is in them
	Uses      []Use
	WatchRoom int  // 1 + the resource that is the room of its workface, where a fire watch takes a place in it; 0 none
	From      int  // not before
	By        int  // latest finish, Inf if free
	Site      bool // counts for the site finish
	Home      bool // at a home place
}

// Mode is one choice of people for an activity, with the calendar that follows from it.
type Mode struct {
	Crew    []int       // people in the order of the step's needs; nil for standing time
	Watch   []bool      // by place in Crew: only watches hot work
	Relief  []int       // a second team that takes turns, nil for most
	First   hours.Set   // with Relief: when the first team is at work
	Keepers []int       // who may keep the fire watch after stops, own people first; nil if there is none
	Stay    []hours.Set // by keeper: when they can keep it, on shift (meals included) with the workface in reach
	Time    *Timing
}

// Use is an amount of a resource. A use that stays is held from start to finish, another only
// in the hands-on pieces.
type Use struct {
	Res, Amount int
	Stays       bool
}

// ResourceKind tells what a resource stands for.
type ResourceKind uint8

// The kinds of resources.
const (
	Kit ResourceKind = iota
	Room
	Power // in VA
	Plain // of an open instance
)

// Resource is something with a capacity at every minute.
type Resource struct {
	Name     string
	Kind     ResourceKind
	Capacity int
	Taken    []Taken // what is not there at some hours: hired generators outside their slots
	Pos      tasks.Pos
}

// Taken is an amount of a resource that is not there from From to To.
type Taken struct{ From, To, Amount int }

// Person is somebody with the shifts fixed before planning (R15).
type Person struct {
	Name    string
	Outside bool
	Shifts  map[*tasks.Place]hours.Set // on shift at the place
	Hours   hours.Set                  // all shifts, wherever
}

// Link is a wait: the end To comes at least Min and at most Max after the end From. From -1 is
// minute 0.
type Link struct {
	From, To       int
	FromEnd, ToEnd tasks.LinkEnd
	Min, Max       int             // expand.NoMin, expand.NoMax where there is none
	Count          hours.Set       // for a working wait: the hours that count for Min; nil is clock time
	MaxCount       hours.Set       // the same for Max
	Last           func(t int) int // for a max that shortens with heat; nil if plain
	Step           *expand.Link
}

// Pair is two activities that never overlap from start to finish plus a tail.
type Pair struct {
	A, B         int
	TailA, TailB func(finish int) int // nil: no tail; monotone, >= finish
	Why          string               // "hot work and solvent at pier/hinge"
	Kind         PairKind
}

// PairKind tells what keeps two activities apart.
type PairKind uint8

// The kinds of pairs.
const (
	Clashing PairKind = iota // workface states
	Moving                   // one moves what the other works on
)

// Order says that at least one of the choices holds; a choice is a list of pairs of which all hold.
type Order struct {
	Choices [][]Before
	Text    string
	Pos     tasks.Pos
}

// Before says that activity First is finished before activity Then starts.
type Before struct{ First, Then int }

// Timings gives the distinct timings of the activity's modes.
func (a *Act) Timings() []*Timing {
	if a.Times == nil {
		seen := map[*Timing]bool{}
		for _, m := range a.Modes {
			if !seen[m.Time] {
				seen[m.Time] = true
				a.Times = append(a.Times, m.Time)
			}
		}
	}
	return a.Times
}

// Earliest gives the earliest minute at which the later end of l may be, given the earlier end at t.
func (l *Link) Earliest(t int) int {
	if l.Min <= expand.NoMin {
		return -Inf
	}
	if l.Count != nil && l.Min > 0 {
		return after(l.Count, t, l.Min)
	}
	return t + l.Min
}

// LastAt gives the last minute at which the later end of l may be, given the earlier end at t; it is monotone.
func (l *Link) LastAt(t int) int {
	switch {
	case l.Last != nil:
		return l.Last(t)
	case l.Max >= expand.NoMax:
		return Inf
	case l.MaxCount != nil:
		return afterLast(l.MaxCount, t, l.Max)
	}
	return t + l.Max
}

// after gives the first minute by which n minutes of set have passed since t, Inf if they never do.
func after(set hours.Set, t, n int) int {
	for i := range set {
		s := set[i]
		if int(s.To) <= t {
			continue
		}
		from := max(t, int(s.From))
		if room := int(s.To) - from; room >= n {
			return from + n
		} else {
			n -= room
		}
	}
	return Inf
}

// afterLast gives the last minute u such that no more than n minutes of set lie in [t, u).
func afterLast(set hours.Set, t, n int) int {
	for i := range set {
		s := set[i]
		if int(s.To) <= t {
			continue
		}
		from := max(t, int(s.From))
		if room := int(s.To) - from; room > n {
			return from + n
		} else {
			n -= room
		}
	}
	return Inf
}

// Label names the activity's task as it is printed.
func (a *Act) Label() string {
	if a.Step == nil {
		return a.Name
	}
	return a.Step.Task.Label()
}

// Pos is the place in the job file of the activity's task.
func (a *Act) Pos() tasks.Pos {
	if a.Step == nil {
		return tasks.Pos{}
	}
	return a.Step.Task.Pos
}
