package settle

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// slot is the lattice of the outside model, minutes.
const slot = 30

// exported is a job on the lattice as testdata/oracle/job.mzn reads it: worked out from the text of
// JOBFILE.md, from what the job file says and from the minutes of its steps; nothing of the solver
// and nothing of the checker. Slots count from the window's opening.
type exported struct {
	t        testing.TB
	w        *expand.Work
	slots    int
	shift    map[*tasks.Person][]bool
	open     []bool
	calendar map[string]int // of working slots and openings, by what it holds
	rows     [][]bool       // by calendar
	runs     [][]int        // by calendar: the number of its opening for every slot, 0 where it is closed
}

func newExported(t testing.TB, w *expand.Work) *exported {
	x := &exported{t: t, w: w, slots: int(w.Window.Closes-w.Window.Opens) / slot, calendar: map[string]int{}, shift: map[*tasks.Person][]bool{}}
	place := w.Window.Place
	x.open = x.line(x.spans(place.Open, func(d hours.Date) bool { _, no := place.Closed[d]; return no }))
	for _, p := range w.Job.People {
		x.shift[p] = x.hours(p)
	}
	return x
}

func (x *exported) spans(p hours.Pattern, closed func(hours.Date) bool) hours.Set {
	wide := hours.Span{From: x.w.Window.Opens - 2*1440, To: x.w.Window.Closes + 2*1440}
	return p.Spans(x.w.Window.Place.Zone, wide, closed)
}

// line gives the slots that lie in a set; one that lies in it in part is a fault of the export.
func (x *exported) line(set hours.Set) []bool {
	out := make([]bool, x.slots)
	for i := range out {
		s := hours.Span{From: x.w.Window.Opens + hours.Minute(i*slot), To: x.w.Window.Opens + hours.Minute((i+1)*slot)}
		switch n := set.Count(s); n {
		case slot:
			out[i] = true
		case 0:
		default:
			x.t.Fatalf("slot %d of the lattice is open for %d min", i, n)
		}
	}
	return out
}

func and(a, b []bool) []bool {
	out := make([]bool, len(a))
	for i := range a {
		out[i] = a[i] && b[i]
	}
	return out
}

// hours gives the slots in which a person is on shift at the site (R1, R15; duty limits bind nobody in
// these jobs).
func (x *exported) hours(p *tasks.Person) []bool {
	if p.Outside {
		return x.line(x.w.Window.Slots(p.Booked))
	}
	out := x.open
	if p.Hours != nil {
		out = and(out, x.line(x.spans(p.Hours, nil)))
	}
	out = slices.Clone(out)
	from := hours.Never
	if p.From != nil {
		from, _, _ = x.w.Window.At(*p.From)
	}
	for i := range out {
		at := x.w.Window.Opens + hours.Minute(i*slot)
		if at < from || p.Off[hours.DateOf(at.In(x.w.Window.Place.Zone))] {
			out[i] = false
		}
	}
	return out
}

// access gives the slots in which all is open for a step but its place and its people (R5, R23).
func (x *exported) access(s *expand.Step) []bool {
	out := make([]bool, x.slots)
	for i := range out {
		out[i] = true
	}
	if s.Face != nil && s.Face.Reach != nil {
		out = and(out, x.line(x.w.Window.Slots(s.Face.Reach)))
	}
	if s.Noisy && s.Place.Noisy != nil {
		out = and(out, x.line(x.spans(s.Place.Noisy, nil)))
	}
	for _, u := range s.Kit {
		if u.Kit.Slots != nil {
			out = and(out, x.line(x.w.Window.Slots(u.Kit.Slots)))
		}
	}
	for _, pm := range s.Place.Permits {
		if !(pm.For == "hot work" && s.Hot) {
			continue
		}
		var set hours.Set
		for _, v := range x.spans(pm.Valid, func(d hours.Date) bool { _, no := s.Place.Closed[d]; return no }).Joined(0, nil) {
			v.From += hours.Minute(pm.Issue.Value)
			set = append(set, v)
		}
		out = and(out, x.line(set))
	}
	return out
}

// working gives the slots in which people work on a step (R5, R14).
func (x *exported) working(s *expand.Step, access []bool, crew []*tasks.Person) []bool {
	out := and(access, x.open)
	for _, p := range crew {
		out = and(out, x.shift[p])
	}
	if s.Lone {
		for i := range out {
			there := 0 // the crew counted
			for _, p := range x.w.Job.People {
				if !p.Outside && x.shift[p][i] {
					there++
				}
			}
			out[i] = out[i] && there >= 2
		}
	}
	return out
}

// calendarOf numbers the calendar of working slots with its openings: runs, joined over meals where the step may pause
// over them (R6); without inOneGo the openings do not matter.
func (x *exported) calendarOf(s *expand.Step, work, access []bool) int {
	runs := make([]int, len(work))
	run, last := 0, -1
	for i, on := range work {
		if !on {
			continue
		}
		meal := s.OverMeals && last >= 0 && (i-1-last)*slot <= 120
		for k := last + 1; k < i && meal; k++ {
			meal = access[k]
		}
		if last != i-1 && !meal || last < 0 {
			run++
		}
		runs[i], last = run, i
		if !s.InOneGo {
			runs[i] = 1
		}
	}
	key := fmt.Sprint(runs)
	if c, known := x.calendar[key]; known {
		return c
	}
	x.rows, x.runs = append(x.rows, work), append(x.runs, runs)
	x.calendar[key] = len(x.rows)
	return len(x.rows)
}

// crews lists the people that a step could be given (R9).
func (x *exported) crews(s *expand.Step) [][]*tasks.Person {
	var out [][]*tasks.Person
	for _, c := range (&brute{w: x.w}).choices(s) {
		var crew []*tasks.Person
		for _, name := range c.team {
			crew = append(crew, x.w.Job.People[slices.IndexFunc(x.w.Job.People, func(p *tasks.Person) bool { return p.Name == name })])
		}
		out = append(out, crew)
	}
	return out
}

// whole gives minutes in slots.
func (x *exported) whole(minutes int) int {
	if minutes%slot != 0 {
		x.t.Fatalf("%d min is no whole number of slots", minutes)
	}
	return minutes / slot
}

// data is a MiniZinc data file being written.
type data struct{ strings.Builder }

func (d *data) put(name string, v any) { fmt.Fprintf(d, "%s = %v;\n", name, v) }

// list writes a list of whole numbers.
func (d *data) list(name string, v []int) {
	d.put(name, strings.ReplaceAll(fmt.Sprint(v), " ", ","))
}

// table writes rows of equal length.
func (d *data) table(name string, rows [][]int) {
	var out []string
	for _, r := range rows {
		out = append(out, strings.Trim(strings.ReplaceAll(fmt.Sprint(r), " ", ","), "[]"))
	}
	d.put(name, "[|"+strings.Join(out, "|")+"|]")
}
