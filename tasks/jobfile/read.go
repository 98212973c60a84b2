// Package jobfile reads job files: YAML written by hand, every fault told at once with its line,
// its column and a way out. The tables of keys here are also the JSON schema and the manual.
//
// Amounts come out in the base units of package quantity, times as UTC minutes or as moments of
// the window, positions in degrees. Reading is deterministic and reads nothing outside the folder of the
// job file.
package jobfile

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
)

// Read reads a job file and what it uses. The error is tasks.Faults where the file is wrong (then the
// job is nil), else one of opening the file.
func Read(path string) (*tasks.Job, error) {
	return withFolder(path, func(data []byte, fsys fs.FS) (*tasks.Job, error) { return ReadBytes(path, data, fsys) })
}

// ReadChanged reads a job file with some of its values replaced, for what-if. Positions are those of
// the file as it is; a replaced value stands where its setting is written, or, where the setting
// has no place, where the value stood before. A setting whose place is in a library changes that. Errors as for Read.
func ReadChanged(path string, changes []tasks.Setting) (*tasks.Job, error) {
	return withFolder(path, func(data []byte, fsys fs.FS) (*tasks.Job, error) {
		return ReadBytesChanged(path, data, fsys, changes)
	})
}

func withFolder(path string, read func([]byte, fs.FS) (*tasks.Job, error)) (*tasks.Job, error) {
	f, err := os.Open(path)
	if err != nil {
		return nil, err
	}
	defer f.Close()
	data, err := io.ReadAll(io.LimitReader(f, maxBytes+1))
	if err != nil {
		return nil, fmt.Errorf("%s: %w", path, err)
	}
	root, err := os.OpenRoot(filepath.Dir(path)) // keeps every file read inside the folder, links too
	if err != nil {
		return nil, err
	}
	defer root.Close()
	return read(data, root.FS())
}

// ReadBytes reads a job file that is at hand; name is used in messages, fsys is its folder, nil if
// it has none. Errors as for Read.
func ReadBytes(name string, data []byte, fsys fs.FS) (*tasks.Job, error) {
	return ReadBytesChanged(name, data, fsys, nil)
}

// ReadBytesChanged is ReadBytes with some values replaced, as ReadChanged.
func ReadBytesChanged(name string, data []byte, fsys fs.FS, changes []tasks.Setting) (*tasks.Job, error) {
	r := newReader(name, fsys)
	root := r.parse(name, data)
	if root != nil {
		r.sets = changes
		r.change(root, r.settingsOf(name))
		r.read(root)
	}
	if len(r.faults) > 0 {
		return nil, r.sorted()
	}
	if len(changes) == 0 {
		var faults tasks.Faults
		for _, c := range r.job.Changes {
			if err := r.tryChange(name, data, fsys, c); errors.As(err, &faults) {
				r.faults = append(r.faults, faults...)
			} else if err != nil {
				return nil, err
			}
		}
		if len(r.faults) > 0 {
			return nil, r.sorted()
		}
	}
	return r.job, nil
}

// read reads the sections in the order in which they need each other.
func (r *reader) read(root *yaml.Node) {
	r.job.File = r.name
	r.job.Pos = r.pos(root)
	f := r.open(root, &topSection, "")
	if root.Kind != yaml.MappingNode {
		return
	}
	r.readTop(f)
	r.readPlaces(f)
	r.readWindow(f)
	r.settleHome(f)
	libs := append(r.readLibraries(f), f)
	for _, l := range libs {
		r.readPeople(l)
		r.readKit(l)
	}
	for _, l := range libs {
		r.readProcedures(l)
		r.readRates(l)
		r.readCutting(l)
		r.readSteels(l)
		r.readPaints(l)
		r.readClashes(l)
	}
	r.job.Begin = f.moment("begin", r.home)
	r.readAssemblies(f)
	r.readTasks(f)
	r.readRepeat(f)
	r.distinctTasks()
	for _, d := range r.drafts {
		r.job.Tasks = append(r.job.Tasks, d.t)
	}
	r.pickProcedures()
	r.resolveLinks()
	r.resolveRepairs()
	r.resolveLifting()
	r.readOrders(f)
	r.readVehicles(f)
	r.readChanges(f)
	r.readHolidays(f)
	r.nature()
	r.judge()
}

// settleHome gives home a time zone and the places what depends on the window.
func (r *reader) settleHome(f *fields) {
	atHome := 0
	for _, p := range r.job.Places {
		if p == r.site {
			continue
		}
		atHome++
		if r.home == nil && !r.zoneTried {
			r.home = p.Zone
		}
	}
	if r.home == nil && r.site != nil {
		r.home = r.site.Zone
	}
	r.job.Zone = r.home
	if f.has("trips") && r.site != nil && atHome == 0 && len(f.pairs("places")) == len(r.job.Places) {
		f.fault("places", "declare the shop: {shop: {open: Mon-Fri 07:30-17:30}}", "there is no home place: trips go to %q, and no other place is declared", r.site.Name)
	}
	for _, p := range r.job.Places {
		if !p.FaceFactor.Pos.Given() {
			p.FaceFactor.Value = 0.85
			if p == r.site {
				p.FaceFactor.Value = 0.7
			}
		}
		if !p.FireWatch.Pos.Given() && p == r.site {
			p.FireWatch.Value = 60
		}
	}
}
