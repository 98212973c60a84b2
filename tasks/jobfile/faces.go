package jobfile

import (
	"fmt"
	"slices"
	"time"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

var faceSection = section{name: "Workface", where: "places / NAME / workfaces / NAME", host: "places/pier/workfaces/hinge", says: "A part of a place; tasks name it as `pier/hinge`.", keys: []key{
	{name: "people", takes: aCount, low: 1, high: 100, usual: "no limit", example: "2", says: "room for so many at work at once"},
	{name: "next to", takes: names, example: "[deck]", says: "workfaces of the same place whose states clash with those here (R12)"},
	{name: "level", takes: anAmount, dim: quantity.Length, low: -30e3, high: 30e3, example: "1.1 m", says: "height on the datum of the place's tide table; below the water it cannot be reached"},
	{name: "covers at", takes: anAmount, dim: quantity.Length, low: -30e3, high: 30e3, usual: "its level", example: "1.4 m", says: "the height of tide at which work there ends, where waves or staging make it another than the level"},
	{name: "way off before", takes: anAmount, dim: quantity.Time, low: 0, high: 480, usual: "0 min", example: "30 min", says: "people are clear this long before it covers"},
	{name: "reach", takes: itsOwn, form: "slots, or {file: CSV file}", shape: reachShape, example: "[2027-04-06 08:00-12:00, day 4 09:00-13:00]", without: "level", says: "the only times in which it can be reached"},
	{name: "daylight", takes: yesNo, usual: "no", example: "yes", says: "work there needs daylight"},
	{name: "closed space", takes: yesNo, usual: "no", example: "yes", says: "a tank or another closed space (R14)"},
	{name: "over water", takes: yesNo, usual: "no", example: "yes", says: "over water (R14)"},
	{name: "between tides", takes: yesNo, usual: "yes with a level", example: "yes", says: "between the tides (R14)"},
	{name: "dry hours", takes: slots, usual: "not limited", example: "[2027-04-06 08:00-18:00]", says: "the only times in which it is dry and warm enough for what needs that"},
	{name: "indoors", takes: yesNo, usual: "no", example: "yes", says: "the place's weather does not hold there: its steel has the place's `steel temperature` (R25)"},
	{name: "sheltered", takes: yesNo, usual: "no", example: "yes", says: "rain and wind are kept off, cold and damp are not (R25)"},
	{name: "wash", takes: anAmount, dim: quantity.Time, low: 0, high: 480, usual: "15 min where water covers it (house judgement)", example: "20 min", says: "fresh-water wash and drying at every start of a weld or coat there (R26)"},
	{name: "opening up", takes: anAmount, dim: quantity.Time, low: 0, high: 240, usual: "0 min", example: "15 min", says: "at the start of every reach, not working time"},
	{name: "clearing up", takes: anAmount, dim: quantity.Time, low: 0, high: 240, usual: "0 min", example: "15 min", says: "at the end of every reach, not working time"},
}}

var fileSection = section{name: "File", where: "reach written as a file", says: "times in a file", keys: []key{
	{name: "file", takes: itsOwn, form: "file", shape: anyText, need: true, example: "hinge.csv", says: "CSV with `# zone:` in its head and rows `from,to`"},
}}

func (r *reader) face(p *tasks.Place, name string, at, n *yaml.Node) *tasks.Workface {
	f := r.open(n, &faceSection, fmt.Sprintf("workface %q", p.Name+"/"+name))
	w := &tasks.Workface{Name: name, Place: p, Pos: r.pos(at), Keys: f.keys(), People: f.count("people", 0)}
	w.NextTo = texts(f.names("next to"))
	w.Level = f.metres("level")
	w.CoversAt = f.metres("covers at")
	if !f.has("covers at") {
		w.CoversAt = w.Level
	}
	w.WayOff = f.amount("way off before", 0)
	w.Light, w.Closed, w.Water = f.yes("daylight"), f.yes("closed space"), f.yes("over water")
	w.Tidal = f.yes("between tides")
	if b := f.yesOrNot("between tides"); b == nil && (f.has("level") || f.has("covers at")) {
		w.Tidal = true
	}
	w.Reach, w.ReachPos = r.reach(p, f), f.pos("reach")
	w.Dry = f.slots("dry hours", p.Zone)
	w.OpeningUp, w.ClearingUp = f.amount("opening up", 0), f.amount("clearing up", 0)
	w.Indoors, w.Sheltered, w.Wash = f.yes("indoors"), f.yes("sheltered"), f.amount("wash", 0)
	r.faceMakesSense(p, w, f)
	return w
}

// faceMakesSense checks what the keys of a workface need of each other.
func (r *reader) faceMakesSense(p *tasks.Place, w *tasks.Workface, f *fields) {
	wet := f.has("level") || f.has("covers at")
	switch {
	case wet && p.Tide == nil && !r.tideTried[p]:
		f.fault("level", "add `tide: {table: tide.csv}` to the place, whose head states zone and datum", "a level needs the tide table of the place")
	case f.has("level") && f.has("covers at") && w.CoversAt.Value < w.Level.Value:
		f.fault("covers at", "give a height of tide not below the level", "it would cover at %s m, below its level of %s m", trim(w.CoversAt.Value), trim(w.Level.Value))
	case f.yes("between tides") && !wet && !f.has("reach"):
		f.fault("between tides", "add its `level`, or the times of its `reach`", "nothing says when the water leaves it free")
	case f.has("way off before") && !wet && !f.has("reach"):
		f.fault("way off before", "add its `level`, or the times of its `reach`", "nothing says when it covers")
	}
	if w.Light && !p.HasAt {
		f.fault("daylight", "add `at: [57.6 N, 7.2 W]` to the place", "daylight needs the position of the place")
	}
}

// metres reads a length and gives it in metres.
func (f *fields) metres(name string) tasks.Amount {
	a := f.amount(name, 0)
	a.Value /= 1000
	return a
}

// reach reads slots, or a file of them.
func (r *reader) reach(p *tasks.Place, f *fields) []tasks.Slot {
	n := f.node("reach")
	if n == nil {
		return nil
	}
	if n.Kind != yaml.MappingNode {
		return f.slots("reach", p.Zone)
	}
	g := r.open(n, &fileSection, f.what+": reach")
	access := r.reachFile(g)
	var out []tasks.Slot
	for _, s := range access {
		out = append(out, tasks.Slot{From: utcMoment(s[0], g.pos("file")), To: utcMoment(s[1], g.pos("file")), Pos: g.pos("file")})
	}
	return out
}

// utcMoment writes an instant as a moment of the job file.
func utcMoment(m hours.Minute, p tasks.Pos) tasks.Moment {
	t := m.In(time.UTC)
	return tasks.Moment{Text: t.Format("2006-01-02 15:04") + " UTC", Pos: p, Date: hours.DateOf(t), Minute: hours.MinuteOfDay(m, time.UTC), Zone: time.UTC}
}

// neighbours checks the names under next to, and makes them hold both ways.
func (r *reader) neighbours(p *tasks.Place, f *fields) {
	var all []string
	for _, w := range p.Workfaces {
		all = append(all, w.Name)
	}
	for _, w := range p.Workfaces {
		for _, name := range slices.Clone(w.NextTo) {
			i := slices.Index(all, name)
			switch {
			case name == w.Name:
				r.faultAt(w.Pos, "name another workface", "workface %q: next to: it is next to itself", p.Name+"/"+w.Name)
			case i < 0:
				r.faultAt(w.Pos, r.among(name, all, ""), "workface %q: next to: %s has no workface %s", p.Name+"/"+w.Name, p.Name, short(name))
			case !slices.Contains(p.Workfaces[i].NextTo, w.Name):
				p.Workfaces[i].NextTo = append(p.Workfaces[i].NextTo, w.Name)
			}
		}
	}
}
