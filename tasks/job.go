// Package tasks is the job as data: places, people, kit, trips, assemblies, procedures, paints,
// tasks and the links between them, as a job file gives them, each with its place in the file.
// Times are UTC minutes or wall-clock moments not yet resolved; durations are minutes, lengths
// millimetres, masses kilograms, temperatures degrees Celsius. Nothing is computed here.
package tasks

import (
	"time"

	"sailby/tasks/coat"
	"sailby/tasks/hours"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
	"sailby/tasks/site"
	"sailby/weld"
)

// Pos is a place in a job file; the zero Pos is "nowhere, a default".
type Pos struct {
	File      string
	Line, Col int
}

// Origin makes the origin of a figure that stands at p; for the zero Pos it is house judgement.
func (p Pos) Origin(what string) origin.Origin {
	if p.Line == 0 {
		return origin.Origin{Kind: origin.Judgement, Source: what}
	}
	return origin.Origin{Kind: origin.Given, Source: what, File: p.File, Line: p.Line, Col: p.Col}
}

// Keys are the places of the values of a mapping of the job file, by key.
type Keys map[string]Pos

// At gives the place of a key's value; other where the key is left out.
func (k Keys) At(key string, other Pos) Pos {
	if p, ok := k[key]; ok {
		return p
	}
	return other
}

// Given says whether the job file says it (rather than a default).
func (p Pos) Given() bool { return p.Line > 0 }

// Amount is one number of the job file, in the base unit of its dimension, with its place.
type Amount struct {
	Value float64
	Pos   Pos
}

// Job is one job file, read and checked.
type Job struct {
	Name    string
	Client  string
	Drawing string // drawing number and revision, printed on the weld list
	Pos     Pos
	File    string // as the user named it
	Zone    *time.Location

	Places     []*Place
	Trips      []*Trip // empty where Window is given
	Window     *Closure
	People     []*Person
	Kit        []*Kit // hire included (Slots not nil)
	Procedures []*Procedure
	Paints     []*Paint
	Assemblies []*Assembly
	Tasks      []*Task // file order, repeated blocks written out
	Begin      *Moment // home work may begin; nil: two weeks before leaving
	Orders     []Order
	Clashes    []Clash // added to the default ones
	NoClash    []Clash // defaults switched off

	Duty      Amount // longest duty, minutes; default 12 h
	Rest      Amount // least rest between duties, minutes; default 11 h
	Execution string // "EN 1090-2", "AWS D1.1" or "": the standard the contract is to
	Steel     string // default: a grade, or a name under Welding.Steels
	Welding   Welding
	Emergency Emergency
	Changes   []Change // named sets of changes that the file keeps beside the plan
	Notes     []Note   // what the reader wants said: repeated hours, defaults taken

	Vehicles []*Vehicle
	Carriage []lift.CarriageRule
	Driving  []lift.DutyRule
	Packing  Packing
}

// Note is something worth saying about the job file that is no fault.
type Note struct {
	Pos  Pos
	Text string
}

// Emergency is what a sheet prints in its emergency block; empty fields print as blanks.
type Emergency struct {
	GridRef, Phone, Radio, Hospital, Muster, Boat string
}

// Place is somewhere work happens.
type Place struct {
	Name, Title string
	Pos         Pos
	Keys        Keys
	Zone        *time.Location
	Lat, Lon    float64 // degrees, north and east positive
	HasAt       bool

	Open       hours.Pattern
	OpenPos    Pos
	AlsoOpen   []Slot                // openings beyond the pattern
	Closed     map[hours.Date]string // closed days with the reason
	Noisy      hours.Pattern         // nil: noisy work at any open hour
	Permits    []Permit
	OpeningUp  Amount // minutes at the start of every opening, meals not counted as openings
	ClearingUp Amount // minutes at the end of every opening
	FaceFactor Amount // share of the remaining hours at the face, 0.1 to 1
	FireWatch  Amount // minutes of watch after hot work; 0 in a designated hot-work area
	Steel      Amount // steel temperature for cure, °C, where no climate is given
	Mains      Amount // kVA of a fixed supply; 0 is "no limit stated"
	Climate    *Climate
	Tide       *site.TideTable
	Sea        Sea
	Workfaces  []*Workface
}

// Climate is the weather that a place is planned with: the poor day by hour, and what is usual.
type Climate struct {
	Pos     Pos
	Hourly  *site.Series // steel and air by hour; nil where only the Steel figure stands
	Month   time.Month   // that the figures are of; 0 is not said
	WetDays int          // days with rain in that month; 0 is not said
	Weather
}

// Workface is a part of a place.
type Workface struct {
	Name                  string
	Place                 *Place
	Pos                   Pos
	Keys                  Keys
	People                int // room for so many at work at once; 0 is no limit
	NextTo                []string
	Level                 Amount // m on the tide table's datum; Pos.Given tells whether there is one
	CoversAt              Amount // m on the same datum: work ends at this height of tide; Level where not given
	WayOff                Amount // minutes clear of the water before it covers
	Reach                 []Slot // given intervals in which it can be reached; nil: always
	ReachPos              Pos
	Light                 bool   // needs daylight
	Closed                bool   // closed space
	Water                 bool   // over water
	Tidal                 bool   // between tides
	OpeningUp, ClearingUp Amount // minutes at each reach
	Dry                   []Slot // given dry and warm hours; nil: not limited
	FaceNature
}

// Permit is a daily permit: work of kind For only in its hours, after Issue minutes of them.
type Permit struct {
	Name, For string // For: a state ("hot work", "closed space", "load overhead") or a task kind
	Valid     hours.Pattern
	Issue     Amount
	Pos       Pos
}

// Trip is one booking that could be made.
type Trip struct {
	Name              string
	Pos               Pos
	Keys              Keys
	OutKeys, BackKeys Keys
	Place             *Place
	Booked            bool
	Out               []Leg
	Back              []Leg
	People            []string // who goes; nil: everybody who is not tied to another place
	Prices            []Price
	Bands             []lift.Band // lengths and heights that the ferry books vehicles by
	Sea               lift.Sea    // of the crossing

	Leaves  hours.Minute // home, for the site
	Arrives hours.Minute // at the site, before unloading
	Opens   hours.Minute // unloaded
	Closes  hours.Minute // loading begins
	Departs hours.Minute // from the site, loaded
	Home    hours.Minute
}

// Leg is one part of the way, in order.
type Leg struct {
	What     string // "drive", "check in", "sail", "drive to site", "unload", "load", ...
	From, To hours.Minute
	Pos      Pos
}

// Price is one line of a booking's price.
type Price struct {
	What     string
	Amount   float64
	Currency string
}

// Closure is a plain window.
type Closure struct {
	Place         *Place
	Opens, Closes hours.Minute
	Pos           Pos
	Keys          Keys
}

// Moment is a wall-clock time of the job file: absolute, or on a day of the window.
type Moment struct {
	Text    string
	Pos     Pos
	Date    hours.Date // absolute where Day is 0 and Weekday is false
	Day     int        // day of the window from 1; 0 if absolute
	Weekday time.Weekday
	ByName  bool // Weekday counts
	Minute  int  // after midnight
	Zone    *time.Location
}

// Slot is a span between two moments.
type Slot struct {
	From, To Moment
	Pos      Pos
}

// Person is somebody who works.
type Person struct {
	Name    string
	Pos     Pos
	Keys    Keys
	Tickets []Ticket
	Hours   hours.Pattern // nil: as the place is open
	From    *Moment       // there from
	Until   *Moment       // there until
	Off     map[hours.Date]bool
	Places  []string // works only at these; nil: anywhere
	Outside bool     // client or inspector: comes when booked, makes no second person
	Booked  []Slot   // for Outside: when they are there, at Places[0]
	Trade   string   // printed on the sheets
}

// Ticket is what somebody may do. A zero range or list means any.
type Ticket struct {
	Name      string // "weld", "fitter", "slinger/signaller", ...
	Process   string // ISO 4063 number, for "weld"
	Positions []string
	Joints    []string // "fillet", "butt"
	ThickFrom float64  // mm
	ThickTo   float64  // mm; 0 is no upper limit
	Pos       Pos
}

// Need is so many people with a ticket, or a named person.
type Need struct {
	Ticket Ticket   // Name "" is anybody
	Also   []Ticket // further tickets that the same person must hold
	Who    []string // one of these by name; nil: anybody with the ticket
	Count  int
	Watch  bool // watches hot work: may watch several works in one workface
	Pos    Pos
}

// Kit is things there are only so many of; with Slots it is hired.
type Kit struct {
	Name    string
	Pos     Pos
	Keys    Keys
	Count   int
	Gives   float64 // kVA
	Draws   float64 // kVA while used
	Stays   bool    // held from start to finish of its task, pauses included
	At      *Place  // nil: goes along
	Slots   []Slot  // hire: only then; nil: always
	Rated   Amount  // kg
	Speed   Amount  // m/min of hook or chain, 0 default
	Chart   []ChartPoint
	Gust    Amount   // m/s
	Kind    lift.Way // what it is for a lift; zero where it is none
	HasKind bool
	Mass    Amount             // kg, for packing
	Set     weld.Procedure     // of a welding set: its rating plate and cables, with their origins
	Hangs   map[string]float64 // what it hangs from and its rating, kg
	Closed  Amount             // mm from the anchor to the hook when fully up
	HungAt  Amount             // mm of the anchor above the floor
	Stowing
}

// ChartPoint is one line of a crane's chart.
type ChartPoint struct{ Radius, Mass float64 } // m, kg

// Procedure is how a weld is made, with its place in the file.
type Procedure struct {
	weld.Procedure
	Pos Pos
	Kit string        // the set it runs on, for kVA and count; ""
	By  []PersonRates // people who weld it at rates of their own
	For *HoldsFor     // joints that need not name it; nil: only those that do
}

// Paint is a paint of the job file.
type Paint struct {
	coat.Paint
	Pos Pos
}

// Assembly is what is built, fitted or moved.
type Assembly struct {
	Name  string
	Pos   Pos
	Steel string
	Axes  string
	Parts []*Part
	Mass  Amount // stated, kg; Pos.Given tells whether
	How   string // weighed, drawn, guessed
	Old   bool   // sits in place: stuck until a task has proved it free
	Stowing
}

// Part is one named part of an assembly.
type Part struct {
	Name string
	Pos  Pos
	lift.Part
}

// Order is a rule on the order itself: at least one of the choices holds. Each choice says
// that Before is finished before After starts.
type Order struct {
	Pos     Pos
	Text    string
	Choices []Before
}

// Before names two tasks: First is finished before Then starts.
type Before struct{ First, Then string }

// Clash is a pair of workface states that never overlap in one workface or in neighbours.
type Clash struct {
	A, B string
	Pos  Pos
}

// Change is one alternative that the job file keeps by name, for what-if.
type Change struct {
	Name string
	Pos  Pos
	Text string
	Sets []Setting
}

// Setting replaces one value of the job file: Path is the keys down to it. Without a Value the key is taken away. A Pos
// with a file and no line is in that library.
type Setting struct {
	Path  []string
	Value string
	Pos   Pos
}

// Range is an uncertain amount of the job file with its place.
type Range struct {
	quantity.Range
	Pos Pos
}
