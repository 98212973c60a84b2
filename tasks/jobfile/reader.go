package jobfile

import (
	"fmt"
	"io/fs"
	"time"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/hours"
)

// reader holds what is known while one job file is read.
type reader struct {
	name  string // of the job file, as the user gave it
	fsys  fs.FS  // the folder of the job file; nil: nothing else is read
	files map[*yaml.Node]string
	job   *tasks.Job
	sets  []tasks.Setting // what is replaced in it and in its libraries

	faults  tasks.Faults
	unsaid  int // faults beyond maxFaults
	guesses int

	home        *time.Location
	peopleTried bool                  // somebody is declared, be it wrongly
	zoneTried   bool                  // the job states a zone, be it a faulty one
	site        *tasks.Place          // the window's place
	onHolidays  []*tasks.Place        // closed on public holidays
	tideTried   map[*tasks.Place]bool // a tide table is named, be it a faulty one
	climates    []climate             // to be laid out by hour when the windows are known
	predicted   []prediction          // tides to be predicted then
	windows     []window
	moments     []pending
	personRefs  []personRef
	drafts      []*draft
	ticketsLost bool // some ticket is at fault: who holds what is not known
	needRefs    []needRef
	taskSet     map[string]bool
	taskNames   []string
	blocks      []*block
	placeOf     map[string]*tasks.Place
	kitOf       map[string]*tasks.Kit
	tables      map[string]bool // files read beside the job file
}

func newReader(name string, fsys fs.FS) *reader {
	return &reader{name: name, fsys: fsys, files: map[*yaml.Node]string{}, job: &tasks.Job{},
		placeOf: map[string]*tasks.Place{}, kitOf: map[string]*tasks.Kit{}, tideTried: map[*tasks.Place]bool{}, tables: map[string]bool{}}
}

// pos gives the place of a node.
func (r *reader) pos(n *yaml.Node) tasks.Pos {
	if n == nil {
		return tasks.Pos{File: r.name, Line: 1, Col: 1}
	}
	file, ok := r.files[n]
	if !ok {
		file = r.name
	}
	return tasks.Pos{File: file, Line: max(n.Line, 1), Col: max(n.Column, 1)}
}

func (r *reader) fault(n *yaml.Node, hint, format string, args ...any) {
	r.faultAt(r.pos(n), hint, format, args...)
}

func (r *reader) faultAt(p tasks.Pos, hint, format string, args ...any) {
	if len(r.faults) >= maxFaults {
		r.unsaid++
		return
	}
	r.faults = append(r.faults, tasks.Fault{Pos: p, Text: fmt.Sprintf(format, args...), Hint: hint})
}

func (r *reader) note(p tasks.Pos, format string, args ...any) {
	r.job.Notes = append(r.job.Notes, tasks.Note{Pos: p, Text: fmt.Sprintf(format, args...)})
}

// sorted gives all faults by place.
func (r *reader) sorted() tasks.Faults {
	out := r.faults.Sorted()
	if r.unsaid > 0 {
		out = append(out, tasks.Fault{Pos: out[len(out)-1].Pos, Text: fmt.Sprintf("and %d more faults", r.unsaid), Hint: "mend these first"})
	}
	return out
}

// instant turns a local time into an instant, and reports a time that the clocks jump over or
// notes one that happens twice.
func (r *reader) instant(what string, p tasks.Pos, text string, d hours.Date, minute int, zone *time.Location) hours.Minute {
	m, clock := hours.Instant(d, minute, zone)
	switch clock {
	case hours.Gap:
		r.faultAt(p, fmt.Sprintf("the clocks go on at %s: give a time before or after", m.In(zone).Format("15:04")),
			"%s: %s does not exist in %s: the clocks jump over it", what, short(text), zone)
	case hours.Repeated:
		r.note(p, "%s: %s happens twice in %s; the earlier is meant", what, text, zone)
	}
	return m
}
