package tasks

import "sailby/tasks/lift"

// Lifting is what the job file says about a lift or a move beyond its mass, gear and travel. What
// it does not say is not known, and asked for on the lift sheet.
type Lifting struct {
	Slings      *lift.Rig
	SlingsPos   Pos
	Tackle      Amount       // kg of slings, shackles and beam
	Under       []lift.Piece // what else hangs under the hook, kg: block, beam
	SlingHeight Amount       // mm from the lifting point up to the hook
	LugHeight   Amount       // mm of the lifting point above the floor before the lift
	HookHeight  Amount       // mm above the ground that a crane's hook reaches
	BoomClear   Amount       // mm between boom and load
	Pad         Amount       // m2 under an outrigger
	PadLoad     Amount       // kg on the heaviest outrigger
	Ground      Amount       // kN/m2 that the ground may carry
	Hangs       string       // which of the things that the hoist hangs from
	SidePull    Amount       // deg from the vertical
	SeaAir      bool         // the hoist stays in sea air
	Water       lift.Water
	Allowance   Amount // factor on the mass, in place of that of how it is known

	Sail     Amount // m2 that the load shows to the wind
	Body     lift.Body
	Tip      Amount // mm of the highest point of boom or load above the ground
	Gust     Amount // m/s, measured or forecast
	MayGust  Amount // m/s at the tip, up to which whoever plans the lift has it done
	Measures string // who measures the wind

	Hands   *lift.Handling  // nil: floor to knuckles, close, by the people of the task
	Push    *lift.Push      // nil: level, good wheels, the people of the task
	NIOSH   *lift.NIOSHLift // nil: not asked for
	Second  *SecondHook
	InWater bool   // wholly under when it is taken up
	Floor   Amount // kN/m2 that the landing place may carry
	Lands   Amount // m2 that it lands on

	Secured *Named  // the task that secures it: until then the gear is kept
	Proved  *Named  // the task that proves an old part free
	Stiff   []Named // parts that must be on before it is lifted
}

// Named is a name with its place in the file.
type Named struct {
	Name string
	Pos  Pos
}

// SecondHook is a second piece of gear on the same load.
type SecondHook struct {
	Kit   *Kit
	A, B  float64 // mm along x of the assembly where the first and the second hook hold
	Tilt  float64 // deg that it may go out of level
	Off   float64 // mm of the centre of gravity square to the line of the hooks
	Turns bool    // the load is turned over between the hooks
	Pos   Pos
}

// Vehicle is a van, truck or trailer of the job.
type Vehicle struct {
	lift.Vehicle
	Pos          Pos
	Long, High   float64 // mm over all, for the ferry's bands; 0 is not known
	Driver       string
	OwnTools     bool // carries the driver's own tools and materials
	Lashing      lift.Strap
	Bed          lift.Surface
	Edition      bool // EN 12195-1 of 2003
	LongestDrive float64
}

// Packing is what the job file says about packing.
type Packing struct {
	Allowance Amount             // share on consumables without a spare of their own
	Packs     map[string]float64 // pack size by the beginning of a consumable's name, in its own unit
	Boxes     []Box
	Also      []Extra
}

// Box is a box that things are packed in.
type Box struct {
	Name    string
	Pos     Pos
	Mass    float64    // kg, empty
	Size    [3]float64 // mm
	Vehicle string
	Holds   []string // kit, consumables and extras by name, or by the beginning of the name
}

// Extra is something to take that no task names.
type Extra struct {
	Name   string
	Pos    Pos
	Amount string
	Mass   float64 // kg in all
	Class  string
	Of     float64 // in the unit of the carriage rule
	Stops  bool    // the job stops without it
	Spare  string
	For    []string // tasks
	Size   [3]float64
}

// Stowing is how a piece of kit or an assembly travels.
type Stowing struct {
	Size  [3]float64 // mm: length, width, height; 0 takes no room on the bed
	Stack bool       // lighter things may stand on it
	Class string     // for carriage rules
	Of    float64    // in the unit of the carriage rule
	Spare string     // what stands in for it if it fails
}
