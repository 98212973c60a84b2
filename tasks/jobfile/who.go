package jobfile

import (
	"slices"
)

// people gives the names of declared people under a key; they are checked once people are read.
func (r *reader) people(f *fields, name string) []ref {
	refs := f.names(name)
	for _, p := range refs {
		r.personRefs = append(r.personRefs, personRef{p, f.lead(name)})
	}
	return refs
}

type personRef struct {
	ref
	lead string
}

// judgePeople checks the names of people that stand before people are declared.
func (r *reader) judgePeople() {
	var all []string
	for _, p := range r.job.People {
		all = append(all, p.Name)
	}
	for _, p := range r.personRefs {
		if !slices.Contains(all, p.text) {
			r.unknown(p.pos, p.lead, "person", p.text, all)
		}
	}
}
