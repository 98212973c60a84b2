package jobfile

import (
	"fmt"
	"slices"
	"strings"
	"time"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

var placeSection = section{name: "Place", where: "places / NAME", host: "places/pier", says: "Somewhere work happens.", keys: []key{
	{name: "title", takes: aText, example: "Home workshop", usual: "the name", says: "printed in place of the name"},
	{name: "zone", takes: itsOwn, form: "time zone", shape: anyText, example: "Europe/London", usual: "the job's zone", says: "its time zone, by region and city"},
	{name: "at", takes: itsOwn, form: "[latitude, longitude]", shape: pairOfText, example: "[57.6 N, 7.2 W]", says: "position in degrees, for daylight"},
	{name: "open", takes: weekly, need: true, example: "[Mon-Fri 07:30-12:00 12:30-17:30, Sat 08:00-13:00]", says: "opening hours"},
	{name: "also open", takes: slots, example: "[2027-04-11 08:00-12:00]", says: "openings beyond the usual hours"},
	{name: "closed", takes: itsOwn, form: "dates: a list, or {date: reason}", shape: datesShape, example: "{2027-04-09: pier fair}", says: "days on which it is closed"},
	{name: "closed on holidays", takes: yesNo, usual: "no", example: "yes", beside: "", says: "closed on the public holidays of the job's `holidays`"},
	{name: "noisy work", takes: weekly, usual: "at any open hour", example: "[Mon-Fri 08:00-18:00, Sat 08:00-13:00]", says: "when noisy work is allowed"},
	{name: "permits", takes: namedOf, sub: &permitSection, example: "{hot work: {valid: Mon-Sat 08:00-16:30, issue: 30 min}}", says: "daily permits that some work needs"},
	{name: "opening up", takes: anAmount, dim: quantity.Time, low: 0, high: 240, usual: "0 min", example: "20 min", says: "at the start of every opening, not working time"},
	{name: "clearing up", takes: anAmount, dim: quantity.Time, low: 0, high: 240, usual: "0 min", example: "20 min", says: "at the end of every opening, not working time"},
	{name: "face factor", takes: aNumber, low: 0.1, high: 1, usual: "0.7 at the window's place, 0.85 elsewhere (house judgement)", example: "0.7", says: "share of the remaining hours that is hands-on"},
	{name: "fire watch", takes: anAmount, dim: quantity.Time, low: 0, high: 480, usual: "60 min at the window's place, 0 min elsewhere", example: "60 min", says: "watch after hot work (R13); 0 min in a designated hot-work area"},
	{name: "steel temperature", takes: anAmount, dim: quantity.Temperature, low: -30, high: 60, usual: "10 C (house judgement)", example: "8 C", says: "of the steel while paint cures"},
	{name: "mains", takes: anAmount, dim: quantity.Power, low: 0, high: 1000, usual: "no limit", example: "15 kVA", says: "fixed supply that everything in use there shares"},
	{name: "climate", takes: keysOf, sub: &climateSection, example: "{month: April, wet days: 14}", says: "the weather that is usual"},
	{name: "tide", takes: keysOf, sub: &tideSection, example: "{table: tide.csv}", says: "the tide there"},
	{name: "workfaces", takes: namedOf, sub: &faceSection, example: "{hinge: {people: 2, level: 1.1 m}, deck: {people: 4}}", says: "parts of the place with room and limits of their own"},
}}

var permitSection = section{name: "Permit", where: "places / NAME / permits / NAME", host: "places/pier/permits/hot work", says: "A daily permit (R23).", keys: []key{
	{name: "for", takes: aWord, words: permitWords(), usual: "the permit's name", example: "hot work", says: "work that needs it: a state, a kind of task, or how a workface lies"},
	{name: "valid", takes: weekly, need: true, example: "Mon-Sat 08:00-16:30", says: "when it holds"},
	{name: "issue", takes: anAmount, dim: quantity.Time, low: 0, high: 240, usual: "0 min", example: "30 min", says: "until it is handed out, at the start of each validity"},
}}

func monthNames() []string {
	var out []string
	for m := time.January; m <= time.December; m++ {
		out = append(out, m.String())
	}
	return out
}

func permitWords() []string {
	out := append(slices.Clone(stateNames), "closed space", "over water", "between tides")
	for _, k := range tasks.Kinds() {
		out = append(out, string(k))
	}
	return out
}

const maxPlaces = 100

// readPlaces reads the places; what depends on the window is filled in by placeDefaults.
func (r *reader) readPlaces(f *fields) {
	list := f.pairs("places")
	if f.has("places") && len(list) == 0 && f.vals["places"].Kind == yaml.MappingNode || len(list) > maxPlaces {
		f.fault("places", "declare the shop and the site", "%d places are declared, 1 to %d are taken", len(list), maxPlaces)
		return
	}
	for _, kv := range list {
		if name, ok := r.newName(kv[0], "place", false); ok {
			p := r.place(name, kv[0], kv[1])
			r.job.Places = append(r.job.Places, p)
			r.placeOf[name] = p
		}
	}
}

func (r *reader) place(name string, at, n *yaml.Node) *tasks.Place {
	what := fmt.Sprintf("place %q", name)
	f := r.open(n, &placeSection, what)
	p := &tasks.Place{Name: name, Title: f.line("title"), Pos: r.pos(at), Keys: f.keys(), Zone: r.home}
	if f.has("zone") {
		p.Zone = f.zone("zone")
	} else if r.home == nil && !r.zoneTried {
		f.fault("", "add `zone: Europe/London` at the top of the file, or here", "its time zone is not known")
	}
	p.Lat, p.Lon, p.HasAt = f.position("at")
	p.Open, p.OpenPos = f.weekly("open"), f.pos("open")
	p.AlsoOpen = f.slots("also open", p.Zone)
	p.Closed = f.closed("closed")
	if f.has("noisy work") {
		p.Noisy = f.weekly("noisy work")
	}
	for _, kv := range f.pairs("permits") {
		p.Permits = append(p.Permits, r.permit(what, kv)...)
	}
	p.OpeningUp, p.ClearingUp = f.amount("opening up", 0), f.amount("clearing up", 0)
	p.FaceFactor, p.FireWatch = f.amount("face factor", 0), f.amount("fire watch", 0)
	p.Steel = f.amount("steel temperature", 10)
	p.Mains = f.amount("mains", 0)
	if f.has("climate") {
		r.climate(p, r.open(f.node("climate"), &climateSection, what+": climate"))
	}
	if f.has("tide") {
		r.tide(p, r.open(f.node("tide"), &tideSection, what+": tide"))
	}
	if f.yes("closed on holidays") {
		r.onHolidays = append(r.onHolidays, p)
	}
	for _, kv := range f.pairs("workfaces") {
		if name, ok := r.newName(kv[0], "workface", false); ok {
			p.Workfaces = append(p.Workfaces, r.face(p, name, kv[0], kv[1]))
		}
	}
	r.neighbours(p, f)
	return p
}

func (r *reader) permit(what string, kv [2]*yaml.Node) []tasks.Permit {
	name, ok := r.newName(kv[0], "permit", true)
	if !ok {
		return nil
	}
	f := r.open(kv[1], &permitSection, fmt.Sprintf("%s: permit %q", what, name))
	p := tasks.Permit{Name: name, For: f.choice("for", name), Valid: f.weekly("valid"), Issue: f.amount("issue", 0), Pos: r.pos(kv[0])}
	if !f.has("for") && !slices.Contains(permitWords(), name) {
		r.fault(kv[0], "add `for: hot work`; "+r.among(name, permitWords(), ""), "%swhat it is for is not known", f.lead(""))
	}
	return []tasks.Permit{p}
}

// weekly reads opening hours, one line or a list of lines.
func (f *fields) weekly(name string) hours.Pattern {
	var out hours.Pattern
	for _, n := range f.items(name) {
		s, ok := f.r.text(n, f.lead(name), f.key(name).example)
		if !ok {
			continue
		}
		rule, err := hours.ParseRule(s)
		if err != nil {
			f.r.fault(n, "write for instance Mon-Fri 07:30-12:00 12:30-17:30", "%s%s", f.lead(name), err)
			continue
		}
		out = append(out, rule)
	}
	return out
}

// position reads [57.6 N, 7.2 W].
func (f *fields) position(name string) (lat, lon float64, ok bool) {
	if !f.has(name) {
		return 0, 0, false
	}
	list := f.items(name)
	if len(list) != 2 {
		f.fault(name, "write for instance [57.6 N, 7.2 W]", "a position is a latitude and a longitude")
		return 0, 0, false
	}
	if lat, ok = f.degrees(name, list[0], "N", "S", 90); ok {
		lon, ok = f.degrees(name, list[1], "E", "W", 180)
	}
	return lat, lon, ok
}

func (f *fields) degrees(name string, n *yaml.Node, plus, minus string, most float64) (float64, bool) {
	s, ok := f.r.text(n, f.lead(name), f.key(name).example)
	if !ok {
		return 0, false
	}
	num, sign := s, 0.0
	if rest, ok := strings.CutSuffix(s, plus); ok {
		num, sign = rest, 1
	} else if rest, ok := strings.CutSuffix(s, minus); ok {
		num, sign = rest, -1
	}
	v, err := quantity.Parse(strings.TrimRight(strings.TrimSpace(num), "°"), quantity.Number)
	if sign == 0 || err != nil || v < 0 || v > most {
		f.r.fault(n, "latitude first, then longitude: [57.6 N, 7.2 W]", "%s%s is not degrees %s or %s", f.lead(name), short(s), plus, minus)
		return 0, false
	}
	return sign * v, true
}

// closed reads days as a list of dates or as dates with reasons.
func (f *fields) closed(name string) map[hours.Date]string {
	n := f.node(name)
	if n == nil {
		return nil
	}
	out := map[hours.Date]string{}
	add := func(at *yaml.Node, why string) {
		d, ok := f.r.date(at, f.lead(name))
		if _, twice := out[d]; ok && twice {
			f.r.fault(at, "name it once", "%s%s stands twice", f.lead(name), d)
		} else if ok {
			out[d] = why
		}
	}
	if n.Kind == yaml.MappingNode {
		for _, kv := range f.pairs(name) {
			why, _ := f.r.text(kv[1], f.lead(name), "{2027-04-09: pier fair}")
			add(kv[0], why)
		}
		return out
	}
	for _, n := range f.items(name) {
		add(n, "closed")
	}
	return out
}

// date reads one calendar day.
func (r *reader) date(n *yaml.Node, lead string) (hours.Date, bool) {
	s, ok := r.text(n, lead, "2027-04-09")
	if !ok {
		return hours.Date{}, false
	}
	var m tasks.Moment
	if _, ok := parseDate(s); !ok {
		r.fault(n, "write year, month and day, for instance 2027-04-09", "%s%s is not a date", lead, short(s))
		return hours.Date{}, false
	}
	if err := parseDay([]string{s}, &m); err != nil {
		r.advice(n, lead, err, "")
		return hours.Date{}, false
	}
	return m.Date, true
}
