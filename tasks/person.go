package tasks

import "strings"

// Holds says whether the person has the ticket asked for; a ticket without a name asks only for
// somebody who is not from outside.
func (p *Person) Holds(need Ticket) bool {
	if need.Name == "" {
		return !p.Outside
	}
	for _, t := range p.Tickets {
		if t.Covers(need) {
			return true
		}
	}
	return false
}

// HoldsAll says whether the person has every ticket of the list.
func (p *Person) HoldsAll(needs []Ticket) bool {
	for _, n := range needs {
		if !p.Holds(n) {
			return false
		}
	}
	return true
}

// String writes a ticket as the sheets do: "weld 136 PF fillet", "fitter".
func (t Ticket) String() string {
	words := []string{t.Name}
	if t.Process != "" {
		words = append(words, t.Process)
	}
	if len(t.Positions) > 0 {
		words = append(words, strings.Join(t.Positions, "/"))
	}
	if len(t.Joints) > 0 {
		words = append(words, strings.Join(t.Joints, "/"))
	}
	return strings.Join(words, " ")
}

// Covers gives the height of tide, in metres on the table's datum, at which the workface is
// covered: its own, else its level, less the allowance for pressure and surge where the job file
// gives one (R26).
func (f *Workface) Covers() float64 {
	level := f.Level.Value
	if f.CoversAt.Pos.Given() {
		level = f.CoversAt.Value
	}
	if f.Place != nil && f.Place.Sea.AllowPos.Given() {
		if low, err := f.Place.Sea.Allow.Level(true, level); err == nil {
			return low.Value
		}
	}
	return level
}
