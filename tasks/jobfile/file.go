package jobfile

import (
	"bytes"
	"errors"
	"io"
	"io/fs"
	"path"
	"strings"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// maxFiles bounds the files read beside one job file.
const maxFiles = 40

// beside reads a file named in the job file. It must lie in the job file's folder or below it.
// Shown is its name as messages give it.
func (f *fields) beside(name, file string) (data []byte, shown string, ok bool) {
	r := f.r
	clean := path.Clean(file)
	switch {
	case r.fsys == nil:
		f.fault(name, "read the job from a folder", "%s cannot be read: this job has no folder", short(file))
		return nil, "", false
	case strings.Contains(file, "\\"):
		f.fault(name, "write / between folders", "%s has a backslash", short(file))
		return nil, "", false
	case !fs.ValidPath(clean) || clean == ".":
		f.fault(name, "put the file into the folder of the job file, or below it, and write its name from there", "%s lies outside the folder of the job file", short(file))
		return nil, "", false
	}
	if r.tables[clean] = true; len(r.tables) > maxFiles {
		f.fault(name, "put tables and libraries together", "more than %d files are read beside the job file", maxFiles)
		return nil, "", false
	}
	shown = clean
	if dir := path.Dir(strings.ReplaceAll(r.name, "\\", "/")); dir != "." {
		shown = path.Join(dir, clean)
	}
	h, err := r.fsys.Open(clean)
	if err == nil {
		defer h.Close()
		var info fs.FileInfo
		if info, err = h.Stat(); err == nil && !info.Mode().IsRegular() {
			err = errors.New("it is no file")
		}
	}
	if err == nil {
		data, err = io.ReadAll(io.LimitReader(h, maxBytes+1))
	}
	if err != nil {
		var pe *fs.PathError
		why := err.Error()
		if errors.As(err, &pe) {
			why = pe.Err.Error()
		}
		if errors.Is(err, fs.ErrNotExist) {
			why = "there is no such file"
		}
		f.fault(name, "write the file's name as it stands beside the job file", "%s cannot be read: %s", short(file), why)
		return nil, "", false
	}
	return data, shown, true
}

// mostSheetFaults is how many faults of one table are told one by one.
const mostSheetFaults = 4

// sheetFaults takes over the faults of a table, or reports err at the key that names it.
func (f *fields) sheetFaults(name string, err error) {
	var all site.Faults
	if errors.As(err, &all) {
		for i, s := range all {
			if i == mostSheetFaults && len(all) > i+1 {
				f.r.faultAt(tasks.Pos{File: s.File, Line: s.Line, Col: s.Col}, "mend those above first", "and %d more lines like it", len(all)-i)
				return
			}
			hint := s.Hint
			if hint == "" {
				hint = "mend the file, or leave it out"
			}
			f.r.faultAt(tasks.Pos{File: s.File, Line: s.Line, Col: s.Col}, hint, "%s", s.Problem)
		}
		return
	}
	f.r.advice(f.vals[name], f.lead(name), err, "mend the file")
}

// reachFile reads a file of times in which a workface can be reached.
func (r *reader) reachFile(f *fields) [][2]hours.Minute {
	file, ok := f.word("file")
	if !ok {
		return nil
	}
	data, shown, ok := f.beside("file", file)
	if !ok {
		return nil
	}
	a, err := site.ReadReach(shown, bytes.NewReader(data))
	if err != nil {
		f.sheetFaults("file", err)
		return nil
	}
	for _, n := range a.Notes {
		r.note(f.pos("file"), "%s", n)
	}
	var out [][2]hours.Minute
	for _, s := range a.Open {
		out = append(out, [2]hours.Minute{hours.Minute(s.From), hours.Minute(s.To)})
	}
	return out
}
