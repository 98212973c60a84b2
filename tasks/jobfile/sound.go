package jobfile

import (
	"io/fs"
	"slices"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
)

// Sound gives the job of a file that has faults with those of its tasks alone whose hours can be worked out all
// the same, so that what only hours show can be told together with the faults of reading. It is nil where the
// file has no fault, where a fault lies outside the tasks, or where nothing is left. No plan can be made of it:
// links to other tasks may lead nowhere.
func Sound(path string) *tasks.Job {
	job, _ := withFolder(path, func(data []byte, fsys fs.FS) (*tasks.Job, error) {
		return soundBytes(path, data, fsys), nil
	})
	return job
}

func soundBytes(name string, data []byte, fsys fs.FS) *tasks.Job {
	r := newReader(name, fsys)
	root := r.parse(name, data)
	if root == nil || len(r.faults) > 0 {
		return nil
	}
	r.read(root)
	if len(r.faults) == 0 || r.unsaid > 0 {
		return nil
	}
	bad := map[string]bool{}
	for _, f := range r.faults {
		inTask := false
		for _, d := range r.drafts {
			if f.Pos.File == d.t.Pos.File && f.Pos.Line >= d.t.Pos.Line && f.Pos.Line <= lastLine(d.f.at) {
				inTask, bad[d.t.Name] = true, true
			}
		}
		if !inTask {
			return nil
		}
	}
	for again := true; again; { // a test goes by what it tests
		again = false
		for _, d := range r.drafts {
			if d.t.Kind == tasks.Test && !bad[d.t.Name] && slices.ContainsFunc(d.t.Links, func(l tasks.Link) bool { return bad[l.Task] }) {
				bad[d.t.Name], again = true, true
			}
		}
	}
	r.job.Tasks = nil
	for _, d := range r.drafts {
		if t := d.t; !bad[t.Name] && t.Place != nil && t.Lifting == nil && t.Kind != tasks.Lift && t.Kind != tasks.Move {
			r.job.Tasks = append(r.job.Tasks, t)
		}
	}
	if len(r.job.Tasks) == 0 {
		return nil
	}
	return r.job
}

// lastLine gives the last line on which something of a node stands.
func lastLine(n *yaml.Node) int {
	last := n.Line
	for _, c := range n.Content {
		last = max(last, lastLine(c))
	}
	return last
}
