package tasks

// DefaultClashes lists the pairs of workface states that never overlap in one workface or in
// neighbours, unless the job file switches them off (R12).
func DefaultClashes() []Clash {
	return []Clash{
		{A: HotWorkState, B: Solvent},
		{A: HotWorkState, B: WetFilm},
		{A: Grit, B: WetFilm},
		{A: LoadOverhead, B: PeopleState},
	}
}
