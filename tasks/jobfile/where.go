package jobfile

import (
	"fmt"
	"slices"
	"strings"

	"sailby/tasks"
)

// partNames reads names of assemblies, or of their parts as frame/base.
func (r *reader) partNames(f *fields, name string) []string {
	var out []string
	for _, ref := range f.names(name) {
		asm, part, single := strings.Cut(ref.text, "/")
		i := slices.IndexFunc(r.job.Assemblies, func(a *tasks.Assembly) bool { return a.Name == asm })
		if i < 0 {
			var all []string
			for _, a := range r.job.Assemblies {
				all = append(all, a.Name)
			}
			r.unknown(ref.pos, f.lead(name), "assembly", asm, all)
			continue
		}
		if a := r.job.Assemblies[i]; single {
			var all []string
			for _, p := range a.Parts {
				all = append(all, p.Name)
			}
			if !slices.Contains(all, part) {
				r.faultAt(ref.pos, r.among(part, all, "declare it under `parts`"), "%sassembly %q has no part %s", f.lead(name), asm, short(part))
				continue
			}
		}
		out = append(out, ref.text)
	}
	return out
}

// look finds the place and workface of "pier" or "pier/hinge"; nil place if there is none.
func (r *reader) look(text string) (*tasks.Place, *tasks.Workface) {
	place, face, single := strings.Cut(text, "/")
	p := r.placeOf[place]
	if p == nil || !single {
		return p, nil
	}
	for _, w := range p.Workfaces {
		if w.Name == face {
			return p, w
		}
	}
	return p, nil
}

// where is look with faults.
func (r *reader) where(ref ref, lead string) (*tasks.Place, *tasks.Workface) {
	p, w := r.look(ref.text)
	place, face, single := strings.Cut(ref.text, "/")
	switch {
	case p == nil:
		hint := r.among(place, r.placeNames(), "declare it under `places`")
		for _, q := range r.job.Places {
			for _, w := range q.Workfaces {
				if w.Name == ref.text {
					hint = fmt.Sprintf("write %s/%s", q.Name, w.Name)
				}
			}
		}
		r.faultAt(ref.pos, hint, "%sno place is called %s", lead, short(place))
	case single && w == nil:
		var all []string
		for _, x := range p.Workfaces {
			all = append(all, x.Name)
		}
		r.faultAt(ref.pos, r.among(face, all, "declare it under `workfaces` of the place"), "%splace %q has no workface %s", lead, place, short(face))
	}
	return p, w
}
