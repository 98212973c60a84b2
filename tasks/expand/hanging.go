package expand

import (
	"slices"
	"strings"

	"sailby/tasks"
)

// stager knows what hangs together.
type stager struct {
	job   *tasks.Job
	site  *tasks.Place
	loose map[string]bool // parts that are not on their assembly from the start: a `joins` brings them on
	off   map[string]bool // things that some task takes off
	by    map[string]*tasks.Task
	after map[[2]string]bool // known answers of before
}

func newStager(job *tasks.Job, site *tasks.Place) *stager {
	s := &stager{job: job, site: site, loose: map[string]bool{}, off: map[string]bool{}, by: map[string]*tasks.Task{}, after: map[[2]string]bool{}}
	for _, t := range job.Tasks {
		s.by[t.Name] = t
		for _, n := range t.TakesOff {
			s.off[n.Name] = true
		}
	}
	for _, t := range job.Tasks {
		for _, n := range t.Joins {
			if strings.Contains(n.Name, "/") && !s.onAtFirst(n.Name) {
				s.loose[n.Name] = true
			}
		}
	}
	return s
}

// onAtFirst says whether a part that a `joins` names was on before: some task takes it off, and none joins
// it before that.
func (s *stager) onAtFirst(part string) bool {
	for _, off := range s.job.Tasks {
		if !names(off.TakesOff, part) {
			continue
		}
		joined := slices.ContainsFunc(s.job.Tasks, func(t *tasks.Task) bool { return names(t.Joins, part) && s.before(t, off) })
		if !joined {
			return true
		}
	}
	return false
}

func names(list []tasks.Named, name string) bool {
	return slices.ContainsFunc(list, func(n tasks.Named) bool { return n.Name == name })
}

// before says whether links, or the trip, put the finish of a before the start of b.
func (s *stager) before(a, b *tasks.Task) bool {
	if a.Place != s.site && b.Place == s.site {
		return true
	}
	key := [2]string{a.Name, b.Name}
	if known, ok := s.after[key]; ok {
		return known
	}
	seen := map[string]bool{}
	var look func(t *tasks.Task) bool
	look = func(t *tasks.Task) bool {
		for _, l := range t.Links {
			if l.To != tasks.Start || l.From != tasks.Finish || seen[l.Task] {
				continue
			}
			seen[l.Task] = true
			if next := s.by[l.Task]; l.Task == a.Name || next != nil && look(next) {
				return true
			}
		}
		return false
	}
	s.after[key] = look(b)
	return s.after[key]
}

// pieces lists the pieces that a name stands for: an assembly without those that come onto it
// later, or a part.
func (s *stager) pieces(name string) []string {
	if strings.Contains(name, "/") {
		return []string{name}
	}
	var out []string
	for _, p := range s.all(name) {
		if !s.loose[p] {
			out = append(out, p)
		}
	}
	return out
}

// all lists every piece of an assembly, or the one part.
func (s *stager) all(name string) []string {
	if strings.Contains(name, "/") {
		return []string{name}
	}
	var out []string
	for _, a := range s.job.Assemblies {
		if a.Name != name {
			continue
		}
		if len(a.Parts) == 0 {
			return []string{name}
		}
		for _, p := range a.Parts {
			out = append(out, name+"/"+p.Name)
		}
	}
	return out
}

// whole is pieces; of an assembly whose every part is named by some `joins` it is those that these tasks have joined.
func (s *stager) whole(name string, joined []Join) []string {
	out := s.pieces(name)
	if len(out) > 0 || strings.Contains(name, "/") {
		return out
	}
	for _, p := range s.all(name) {
		if slices.ContainsFunc(joined, func(j Join) bool { return !j.Off && slices.Contains(j.Things, p) }) {
			out = append(out, p)
		}
	}
	return out
}

// edges gives the groups of pieces that hang together when these tasks have joined and taken off: the
// assemblies as they are from the start, and what each joining task joins.
func (s *stager) edges(joined []Join) [][]string {
	var out [][]string
	for _, a := range s.job.Assemblies {
		if len(a.Parts) == 0 {
			continue
		}
		var on []string
		for _, p := range s.whole(a.Name, joined) {
			if !takenOff(joined, p) {
				on = append(on, p)
			}
		}
		out = append(out, on)
	}
	for _, j := range joined {
		if j.Off {
			continue
		}
		var edge []string
		for _, t := range j.Things {
			if strings.Contains(t, "/") {
				edge = append(edge, t)
				continue
			}
			for _, p := range s.whole(t, joined) { // what is off by then does not come on with the rest
				if p == t || !takenOff(joined, p) {
					edge = append(edge, p)
				}
			}
		}
		for _, o := range joined {
			if !o.Off || s.before(o.Task, j.Task) {
				continue
			}
			for _, x := range o.Things {
				edge = s.less(edge, x, slices.Contains(j.Things, asm(x)))
			}
		}
		out = append(out, edge)
	}
	return out
}

// takenOff says whether a part is among what these tasks take off.
func takenOff(joined []Join, part string) bool {
	return slices.ContainsFunc(joined, func(o Join) bool { return o.Off && slices.Contains(o.Things, part) })
}

// less takes a thing out of what hangs together: a part where it hangs on others of its assembly, or was joined as part
// of the whole of it; an assembly where it hangs on others.
func (s *stager) less(edge []string, thing string, asWhole bool) []string {
	mine := s.all(thing)
	whole := asm(thing)
	rest := slices.DeleteFunc(slices.Clone(edge), func(p string) bool { return slices.Contains(mine, p) })
	others := asWhole && len(rest) > 0 || slices.ContainsFunc(rest, func(p string) bool { return !strings.Contains(thing, "/") || asm(p) == whole })
	if len(rest) == len(edge) || !others {
		return edge
	}
	return rest
}

// hanging gives all pieces that are taken up with a thing when these tasks have joined, in the order
// of the job's assemblies.
func (s *stager) hanging(thing string, joined []Join) []string {
	on := map[string]bool{}
	for _, p := range s.whole(thing, joined) {
		if p == thing || !takenOff(joined, p) {
			on[p] = true
		}
	}
	edges := s.edges(joined)
	if strings.Contains(thing, "/") && !s.off[thing] { // a part named by itself is that part, though its assembly is whole
		edges = edges[s.wholes():]
	}
	for grown := true; grown; {
		grown = false
		for _, e := range edges {
			if !slices.ContainsFunc(e, func(p string) bool { return on[p] }) {
				continue
			}
			for _, p := range e {
				if !on[p] {
					on[p], grown = true, true
				}
			}
		}
	}
	var out []string
	for _, a := range s.job.Assemblies {
		if on[a.Name] {
			out = append(out, a.Name)
		}
		for _, p := range a.Parts {
			if name := a.Name + "/" + p.Name; on[name] {
				out = append(out, name)
			}
		}
	}
	return out
}

// wholes counts the assemblies with parts: so many of the edges are they themselves.
func (s *stager) wholes() int {
	n := 0
	for _, a := range s.job.Assemblies {
		if len(a.Parts) > 0 {
			n++
		}
	}
	return n
}
