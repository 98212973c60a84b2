package tasks

// The states that a step puts its workface in (R12).
const (
	HotWorkState = "hot work"
	Grit         = "grit"
	WetFilm      = "wet film"
	SoftFilm     = "soft film"
	Solvent      = "solvent"
	LoadOverhead = "load overhead"
	PeopleState  = "people"
)

// ClashTable tells which pairs of states never overlap.
type ClashTable map[[2]string]bool

// ClashTable gives the default pairs with those that the job file adds and without those that
// it drops.
func (j *Job) ClashTable() ClashTable {
	t := ClashTable{}
	for _, c := range append(DefaultClashes(), j.Clashes...) {
		t[[2]string{c.A, c.B}] = true
	}
	for _, c := range j.NoClash {
		delete(t, [2]string{c.A, c.B})
		delete(t, [2]string{c.B, c.A})
	}
	return t
}

// Has says whether a and b clash, in either order.
func (t ClashTable) Has(a, b string) bool { return t[[2]string{a, b}] || t[[2]string{b, a}] }
