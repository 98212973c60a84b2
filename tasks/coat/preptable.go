package coat

import "sailby/tasks/origin"

// grade is a preparation grade: its ISO 8501-1 name, its SSPC twin, how it is reached.
type grade struct {
	name, twin string
	other      []string // further spellings, as compared words
	methods    []string // the usual one first
	blast      float64  // blasting: rate against Sa 2 1/2
}

const (
	blasting  = "blast"
	powerTool = "power tool"
	handTool  = "hand tool"
	needleGun = "needle gun"
	wiping    = "solvent wipe"
	washing   = "wash"
)

// grades: ISO 8501-1 names with SSPC twins as published in a guide to specifying blasting. Rates of
// other grades against Sa 2 1/2 are house judgement.
var grades = []grade{
	{"Sa 1", "SSPC-SP 7", []string{"sp 7", "brush off"}, []string{blasting}, 3},
	{"Sa 2", "SSPC-SP 6", []string{"sp 6", "commercial"}, []string{blasting}, 1.5},
	{"Sa 2 1/2", "SSPC-SP 10", []string{"sp 10", "sa 2.5", "near white"}, []string{blasting}, 1},
	{"Sa 3", "SSPC-SP 5", []string{"sp 5", "white metal"}, []string{blasting}, 0.65},
	{"St 2", "SSPC-SP 2", []string{"sp 2"}, []string{handTool, powerTool, needleGun}, 0},
	{"St 3", "SSPC-SP 3", []string{"sp 3"}, []string{powerTool, needleGun}, 0},
	{"bare metal", "SSPC-SP 11", []string{"sp 11"}, []string{powerTool, needleGun}, 0},
	{"solvent clean", "SSPC-SP 1", []string{"sp 1", "degrease"}, []string{wiping}, 0},
	{"fresh-water wash", "", []string{"wash", "fresh water"}, []string{washing}, 0},
}

// states of steel before preparation, with the rust grades of ISO 8501-1.
var states = []struct {
	name  string
	other []string
	heavy bool
	blast float64 // rate against new steel; house judgement
}{
	{"new", []string{"a", "mill scale"}, false, 1},
	{"light rust", []string{"b", "rust"}, false, 1},
	{"heavy rust", []string{"c", "d", "pitted"}, true, 0.6},
	{"painted", []string{"old paint"}, true, 0.5},
}

// abrasive is one row of the published table for new steel to Sa 2 1/2 with a 9.5 mm nozzle at 7 bar.
type abrasive struct {
	name   string
	rate   float64 // m2/h
	use    float64 // kg/m2
	silica bool    // free silica
}

const abrasiveTable = "abrasive blasting handbook, table 6.3: new steel to Sa 2 1/2, 9.5 mm nozzle, 7 bar"

var abrasives = []abrasive{
	{"garnet", 20, 17.6, false}, // the usual one first
	{"sand", 26, 12.7, true},
	{"flint", 15, 17.6, true},
	{"staurolite", 27, 15.1, false},
	{"coal slag", 21, 15.1, false},
	{"copper slag", 24, 15.1, false},
	{"aluminium oxide", 25, 15.1, false},
	{"steel grit", 17, 26.8, false},
}

const nozzleTable = "blast nozzle chart at 100 psi"

// nozzles: bore in mm against abrasive flow in kg/h at 100 psi (published as lb/h for 1/4 to 1/2 in).
var nozzles = [][2]float64{{6.35, 494 * lb}, {7.9375, 812 * lb}, {9.525, 1152 * lb}, {11.1125, 1584 * lb}, {12.7, 2024 * lb}}

const lb = 0.45359237 // kg

// hoses: bore in mm against the share of production lost; published for 3/4, 1 and 1 1/4 in.
var hoses = [][2]float64{{19.05, 0.166}, {25.4, 0.036}, {31.75, 0.010}}

const hoseTable = "published pressure loss and production by blast hose bore"

// byHand holds rates without blasting in m2/h: light and heavy state, each low and high. From
// memory: no public number was found.
var byHand = map[string][4]float64{
	"St 2":             {2, 5, 1, 2},
	"St 3":             {3, 8, 1, 3},
	"bare metal":       {0.5, 2, 0.5, 1},
	"solvent clean":    {20, 40, 20, 40},
	"fresh-water wash": {50, 150, 50, 150},
}

var needleRate = [4]float64{0.5, 2, 0.5, 2} // m2/h, whatever the grade; from memory

func handSource() origin.Origin {
	return origin.Origin{Kind: origin.Memory, Source: "usual output of one person, low confidence"}
}
