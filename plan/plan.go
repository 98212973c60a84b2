// Package plan holds what a plan and a verdict are: types only. Times are UTC minutes, spans
// half-open. A plan names tasks and steps, never positions in the solver's own tables.
package plan

import (
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Plan says when every step runs and who does it.
type Plan struct {
	Basis expand.Basis
	Steps []Step // in the order of the work's steps
}

// Step is one step of a plan.
type Step struct {
	Task, Step    string
	Start, Finish hours.Minute
	Pieces        []hours.Span // when hands are on it, breaks left out; for standing time one span
	People        []string     // in the order of the step's needs (a need of two takes two places)
	// Relief is the second team of a step that may change hands, in the same order; nil if none.
	Relief  []string
	Shifts  []int   // for each piece: 0 worked by People, 1 by Relief; nil is all 0
	Watches []Watch // fire watch after pieces (R13)
}

// Watch is a fire watch kept by one person.
type Watch struct {
	hours.Span
	Person string
}

// Verdict is what can be said about a window.
type Verdict uint8

// The three verdicts.
const (
	Unsettled Verdict = iota
	Fits
	CannotFit
)

// String gives the verdict's word in machine output.
func (v Verdict) String() string {
	return [...]string{"unsettled", "fits", "cannot-fit"}[v]
}
