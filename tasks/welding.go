package tasks

import "sailby/weld"

// Welding is what a job says of all its welds; what it leaves out is the house's.
type Welding struct {
	Rates      weld.Rates
	Activities map[string]Amount // rates of preparing jobs by name, in their own units (m/h, kg/h, min each)
	ByParts    bool              // hands-on time from its parts, not from the operating factor
	Preheat    string            // "EN 1011-2 A", "EN 1011-2 B", "AWS D1.1", or "": that of the contract's standard
	Hold       Amount            // hours before final NDT; weld.None for none
	NoOverweld bool              // exactly what is drawn is laid
	Steels     []*Steel
	Chart      []weld.ChartReading // read from the charts of EN 1011-2 method A
	Cutting    []*CutTable
}

// CutTable is the house's own table of cutting speeds, by name.
type CutTable struct {
	weld.CutTable
	Pos Pos
}

// HoldsFor is what a procedure is for: joints that name none are welded by the one procedure
// that holds for them. What is left empty holds for all.
type HoldsFor struct {
	Pos       Pos
	Joints    []string // "fillet", "butt" or a joint's own name
	Positions []weld.Position
	Thickness [2]float64 // mm of the thinner part, from and to; zero is all
	Leg       [2]float64 // mm, of fillets and laps
	Places    []string
	People    []string // where the task names its people, all of them are among these
}

// Steel is a steel of the job file, by name.
type Steel struct {
	weld.Steel
	Name string
	Pos  Pos
}

// Steel gives the steel that is meant by a word: one declared by that name, else a grade.
func (w Welding) Steel(word string) weld.Steel {
	for _, s := range w.Steels {
		if s.Name == word {
			return s.Steel
		}
	}
	return weld.Steel{Grade: word}
}

// PersonRates is a procedure as one person welds it.
type PersonRates struct {
	Person string
	weld.Procedure
	Pos Pos
}

// Welds gives the seams that a weld task works on: its own, or those of the weld that it repairs.
func (t *Task) Welds() []Seam {
	if t.Repairs != nil {
		return t.Repairs.Seams
	}
	return t.Seams
}

// BadAccess says whether access to any of the seams is said to be bad.
func BadAccess(seams []Seam) bool {
	for _, s := range seams {
		if s.Access > 1 {
			return true
		}
	}
	return false
}
