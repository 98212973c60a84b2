// Package random writes job files made at random, for tests and measurement: valid jobs with
// calendars, tides as intervals, two zones, tickets, kit, power, workfaces and their states, waits both ways and
// deadlines. Equal knobs give equal bytes.
package random

import (
	"fmt"
	"math/rand/v2"
	"strings"
	"time"
)

// Class says how the window stands to the work that is to be done in it.
type Class uint8

// The classes, from a window that is long enough for any order of the work to one that is too
// short for most.
const (
	Slack Class = iota
	Snug
	Tight
	Over
)

// Classes lists the classes.
func Classes() []Class { return []Class{Slack, Snug, Tight, Over} }

// String names the class as the tables do.
func (c Class) String() string { return [...]string{"slack", "snug", "tight", "over"}[c] }

// days is the length of the window as a share of the days that the work takes a crew that is busy
// for the usual part of them.
func (c Class) days() float64 { return [...]float64{1.9, 1.25, 0.95, 0.6}[c] }

// Knobs say which job is made.
type Knobs struct {
	Size    int    // activities, about: 2 to 3,000; at least so many and a few more
	Seed    uint64 // equal seeds give equal jobs
	Class   Class
	Lattice bool // every time is a half hour, and what would take the best plan off it is left out (fire watches, waits at most that run from a finish)
}

// Job writes a job file. It has no fault; whether its tasks fit the window is for the planner to find out.
func Job(k Knobs) string {
	m := &maker{Knobs: k, rng: rand.New(rand.NewPCG(k.Seed, uint64(k.Size)<<8|uint64(k.Class)))}
	m.first = time.Date(2027, 4, 5, 0, 0, 0, 0, time.UTC).AddDate(0, 0, 7*m.rng.IntN(20))
	m.crew()
	m.tasks()
	m.length()
	return m.file()
}

// maker holds a job while it is made.
type maker struct {
	Knobs
	rng     *rand.Rand
	first   time.Time // the window's first day
	days    int       // of the window
	before  int       // days at home before it
	people  []person
	work    []task
	homes   int       // tasks at home, the first ones
	manMins int       // hands-on minutes at the site times people
	chain   []float64 // by task: the longest chain of work and waits that ends with it, minutes of open hours
	zones   [2]string
	trip    bool
	open    string  // the site's hours
	hours   float64 // how many of them a day
}

type person struct {
	name, tickets string
	rest          func(m *maker) string // keys that need the window's days
}

type task struct {
	name  string
	home  bool
	keys  []string
	links map[string][]string // by key: "t3: {min: 2 h}"
	late  float64             // a deadline at so much of the window, 0 for none
	soon  float64             // not before so much of the window, 0 for none
}

// one is true once in so many draws.
func (m *maker) one(in int) bool { return m.rng.IntN(in) == 0 }

func (m *maker) of(from ...string) string { return from[m.rng.IntN(len(from))] }

// mins draws a time of lo to hi minutes, a half hour on the lattice, else a multiple of five.
func (m *maker) mins(lo, hi int) int {
	step := 5
	if m.Lattice {
		step = 30
	}
	lo = (lo + step - 1) / step
	return step * (lo + m.rng.IntN(max(1, hi/step-lo+1)))
}

// date writes a day of the window, 0 the first.
func (m *maker) date(day int) string { return m.first.AddDate(0, 0, day).Format("2006-01-02") }

// length sets the days of the window from the work and the class.
func (m *maker) length() {
	const busy = 0.62 // of a crew's open minutes, between waits, tides and each other's way (judgement, from such jobs)
	need := float64(m.manMins) / (60 * m.hours * busy * float64(min(len(m.people)-1, 2+m.Size/10)))
	long := m.longest() / (60 * m.hours)
	m.days = max(2, int(need*m.Class.days()+0.999), int(long*max(1.45, m.Class.days())+2))
	m.before = 3 + m.homes
}

// file writes the job.
func (m *maker) file() string {
	var b strings.Builder
	line := func(format string, args ...any) { fmt.Fprintf(&b, format+"\n", args...) }
	line("job: Random %s job of %d, seed %d", m.Class, m.Size, m.Seed)
	line("zone: %s", m.zones[0])
	line("begin: %s 06:00", m.date(-m.before))
	m.places(line)
	m.window(line)
	line("people:")
	for _, p := range m.people {
		rest := ""
		if p.rest != nil {
			rest = p.rest(m)
		}
		line("  %s: {tickets: [%s]%s}", p.name, p.tickets, rest)
	}
	m.things(line)
	line("tasks:")
	for _, t := range m.work {
		line("  %s: {%s}", t.name, strings.Join(append(t.keys, m.dates(&t)...), ", "))
	}
	if n := len(m.work); n >= 8 && m.one(3) {
		c := m.homes + m.rng.IntN(n-m.homes)
		if c >= 2 {
			a := m.rng.IntN(c - 1)
			line("orders: [{either: [%s before %s, %s before %s]}]", m.work[a].name, m.work[c].name, m.work[a+1].name, m.work[c].name)
		}
	}
	return b.String()
}

// dates writes the links and dates of a task.
func (m *maker) dates(t *task) []string {
	var out []string
	for _, key := range []string{"after", "after start of", "finish after", "finish after start of"} {
		if len(t.links[key]) > 0 {
			out = append(out, key+": {"+strings.Join(t.links[key], ", ")+"}")
		}
	}
	day := func(part float64) int { return min(m.days-1, int(part*float64(m.days))) }
	if t.soon > 0 {
		out = append(out, "not before: "+m.date(day(t.soon))+" "+m.of("10:30", "11:00", "13:00"))
	}
	if t.late > 0 { // the window's last day ends before half past five
		out = append(out, "must be done by: "+m.date(day(t.late))+" "+m.of("12:00", "15:00", "16:30"))
	}
	return out
}
