package plan

import (
	"sailby/tasks"
	"sailby/tasks/expand"
)

// LimitKind is the kind of a limit of the job: something that could be otherwise, and that a proof may rest on.
type LimitKind uint8

// The kinds of limits, in the order in which a proof lists them.
const (
	LimitOther        LimitKind = iota
	LimitLength                 // how long Step takes
	LimitStanding               // standing time or drying of Step
	LimitMinWait                // Link: what comes before what, with its least wait
	LimitMaxWait                // Link: its longest wait
	LimitOrder                  // an order rule
	LimitClash                  // Step and Other may not be at once
	LimitKit                    // there are only so many of Kit
	LimitRoom                   // Face has room for so many
	LimitPower                  // power at Place
	LimitNeed                   // Need of Step can be filled by some only
	LimitPerson                 // Person does one thing at a time
	LimitLone                   // Step is not done alone (R14)
	LimitWatch                  // fire watch of Step (R13)
	LimitInOneGo                // Step goes in one go
	LimitPersonHours            // own hours of Person
	LimitPersonOff              // days off of Person
	LimitPersonFrom             // Person is there from
	LimitPersonUntil            // Person is there until
	LimitBooked                 // Person from outside is there in slots
	LimitPersonPlaces           // Person works only at some places
	LimitRest                   // longest duty and rest (R15)
	LimitHours                  // opening hours of Place
	LimitClosed                 // closed days of Place
	LimitUp                     // opening up and clearing up at Place
	LimitReach                  // when Face can be reached: slots or tide
	LimitDry                    // dry hours of Face
	LimitDaylight               // Step needs daylight
	LimitWeather                // weather and water at Place
	LimitNoisy                  // noisy-work hours of Place
	LimitPermit                 // hours of Permit
	LimitHire                   // slots of Kit
	LimitBegin                  // home work begins
	LimitNotBefore              // Step is not before
	LimitOpens                  // the window opens
	LimitLeaves                 // the trip leaves
	LimitDeadline               // Step must be done by
	LimitCloses                 // the window closes
)

// Limit says what a member of a proof limits, for those who would change it. Only what belongs to its
// kind is set.
type Limit struct {
	Kind   LimitKind
	Step   *expand.Step
	Other  *expand.Step
	Link   *expand.Link
	Place  *tasks.Place
	Face   *tasks.Workface
	Person *tasks.Person
	Kit    *tasks.Kit
	Permit *tasks.Permit
	Need   *tasks.Need
}
