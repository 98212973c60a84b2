package jobfile

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"time"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

var tripSection = section{name: "Trip", where: "trips / item", host: "trips/1", says: "One booking that could be made. Legs are worked out from the sailings; times are local to where they happen.", keys: []key{
	{name: "name", takes: aText, need: true, example: "nine days", says: "its name"},
	{name: "place", takes: aName, need: true, example: "pier", says: "where it goes: the window's place"},
	{name: "booked", takes: yesNo, usual: "no", example: "yes", says: "this one is booked and is judged"},
	{name: "out", takes: keysOf, sub: &outSection, need: true, example: "{drive: 3.5 h, check in: 45 min, sail: 2027-04-05 10:15, land: 2027-04-05 13:05, unload: 1 h}", says: "the way there"},
	{name: "back", takes: keysOf, sub: &backSection, need: true, example: "{load: 1.5 h, leave: 2027-04-14 12:00, drive: 3.5 h}", says: "the way home"},
	{name: "people", takes: names, usual: "everybody who is not tied to another place", example: "[Ines, Tom]", says: "who goes"},
	{name: "price", takes: itsOwn, form: "{what: amount with its currency}", shape: moneyShape, example: "{vehicle: 412 GBP, person: 38 GBP}", says: "what it costs"},
}}

const longestDrive = 72 * 60.0 // minutes

func leg(name, example, says string) key {
	return key{name: name, takes: anAmount, dim: quantity.Time, low: 0, high: longestDrive, usual: "0 min", example: example, says: says}
}

var outSection = section{name: "Way out", where: "trips / item / out", host: "trips/1/out", says: "The way there: with a boat `sail` and `land`, without one `leave` or `arrive`.", keys: []key{
	leg("drive", "3.5 h", "from home to the boat, or to the site"),
	leg("check in", "45 min", "before sailing"),
	{name: "sail", takes: aMoment, example: "2027-04-05 10:15", says: "sails, local to the harbour here"},
	{name: "land", takes: aMoment, example: "2027-04-05 13:05", says: "lands, local to the harbour there"},
	leg("drive to site", "40 min", "from the harbour there"),
	leg("unload", "1 h", "before work can begin"),
	{name: "leave", takes: aMoment, example: "2027-04-05 06:00", without: "sail land check_in", says: "leaves home, where there is no boat"},
	{name: "arrive", takes: aMoment, example: "2027-04-05 13:45", without: "sail land check_in drive_to_site", says: "arrives at the site, where there is no boat"},
	{name: "sail zone", takes: itsOwn, form: "time zone", shape: anyText, usual: "the job's zone", example: "Europe/London", says: "zone of `sail`"},
	{name: "land zone", takes: itsOwn, form: "time zone", shape: anyText, usual: "the site's zone", example: "Europe/London", says: "zone of `land`"},
}}

var backSection = section{name: "Way back", where: "trips / item / back", host: "trips/1/back", says: "The way home: with a boat `sail`, without one `leave` (from the site) or `arrive` (at home).", keys: []key{
	leg("load", "1.5 h", "the window closes when loading begins"),
	leg("drive to boat", "40 min", "from the site to the harbour there"),
	leg("check in", "45 min", "before sailing"),
	{name: "sail", takes: aMoment, example: "2027-04-14 14:30", says: "sails, local to the harbour there"},
	{name: "land", takes: aMoment, usual: "as long at sea as on the way out", example: "2027-04-14 17:20", says: "lands, local to the harbour here"},
	{name: "drive home", takes: anAmount, dim: quantity.Time, low: 0, high: longestDrive, usual: "as long as the drive out", example: "3.5 h", says: "from the harbour here, or from the site"},
	{name: "drive", takes: anAmount, dim: quantity.Time, low: 0, high: longestDrive, usual: "as `drive home`", example: "3.5 h", without: "drive_home", says: "the same as `drive home`"},
	{name: "leave", takes: aMoment, example: "2027-04-14 12:00", without: "sail land check_in drive_to_boat", says: "leaves the site, where there is no boat"},
	{name: "arrive", takes: aMoment, example: "2027-04-14 18:00", without: "sail land check_in drive_to_boat", says: "arrives at home, where there is no boat"},
	{name: "sail zone", takes: itsOwn, form: "time zone", shape: anyText, usual: "the site's zone", example: "Europe/London", says: "zone of `sail`"},
	{name: "land zone", takes: itsOwn, form: "time zone", shape: anyText, usual: "the job's zone", example: "Europe/London", says: "zone of `land`"},
}}

var windowSection = section{name: "Window", where: "window", host: "closure:window", says: "A plain window, in place of trips.", keys: []key{
	{name: "place", takes: aName, need: true, example: "bridge", says: "where"},
	{name: "opens", takes: aMoment, need: true, example: "2027-06-04 21:00", says: "local to the place"},
	{name: "closes", takes: aMoment, need: true, example: "2027-06-07 01:00", says: "local to the place"},
}}

const (
	maxTrips   = 60
	maxWindow  = 366 * 1440 // minutes
	maxAtSea   = 14 * 1440
	maxPriceAt = 1e9
)

// readWindow reads the trips or the plain window, and with them the window's place.
func (r *reader) readWindow(f *fields) {
	switch {
	case f.tried("trips") && f.tried("window"):
		f.fault("window", "keep one of the two", "trips make the window; it cannot be given as well")
		return
	case !f.tried("trips") && !f.tried("window"):
		f.fault("", "add `trips`, or `window: {place: bridge, opens: 2027-06-04 21:00, closes: 2027-06-07 01:00}`", "nothing says when the site can be worked")
		return
	}
	if n := f.node("window"); n != nil {
		r.plainWindow(r.open(n, &windowSection, "window"))
	}
	seen := map[string]bool{}
	booked := ""
	for i, n := range f.items("trips") {
		if i == maxTrips {
			r.fault(n, "keep those that could be booked", "trips: more than %d are listed", maxTrips)
			break
		}
		t := r.trip(i, n)
		switch {
		case t == nil:
			continue
		case seen[t.Name]:
			r.fault(n, "rename one of them", "two trips are called %s", short(t.Name))
		case t.Booked && booked != "":
			r.fault(n, "mark only one", "trip %q: booked: so is %q", t.Name, booked)
		case t.Booked:
			booked = t.Name
		}
		seen[t.Name] = true
		r.job.Trips = append(r.job.Trips, t)
	}
}

// place gives the place that a key names; nil if there is none.
func (f *fields) place(name string) *tasks.Place {
	ref, ok := f.name(name)
	if !ok {
		return nil
	}
	p := f.r.placeOf[ref.text]
	if p == nil {
		f.r.unknown(ref.pos, f.lead(name), "place", ref.text, f.r.placeNames())
	}
	return p
}

func (r *reader) placeNames() []string {
	var out []string
	for _, p := range r.job.Places {
		out = append(out, p.Name)
	}
	return out
}

func (r *reader) plainWindow(f *fields) {
	p := f.place("place")
	if p == nil {
		return
	}
	r.site = p
	a, ok1 := f.fixed("opens", p.Zone)
	b, ok2 := f.fixed("closes", p.Zone)
	if !ok1 || !ok2 {
		return
	}
	w := window{"the window", p.Zone, a, b}
	if r.windowStands(w, f.pos("closes")) {
		r.job.Window = &tasks.Closure{Place: p, Opens: a, Closes: b, Pos: r.pos(f.at), Keys: f.keys()}
		r.windows = append(r.windows, w)
	}
}

// windowStands checks that a window has a length, and not too much of it.
func (r *reader) windowStands(w window, p tasks.Pos) bool {
	stamp := func(m hours.Minute) string { return m.In(w.zone).Format("2006-01-02 15:04") }
	switch n := int(w.closes - w.opens); {
	case n <= 0:
		r.faultAt(p, "look at the dates, the unloading and the loading", "%s closes %s, before it opens %s (%s)", w.what, stamp(w.closes), stamp(w.opens), quantity.Span(-n))
	case n > maxWindow:
		r.faultAt(p, "look at the year", "%s is %s long, at most a year is planned", w.what, quantity.Span(n))
	default:
		return true
	}
	return false
}

func (r *reader) trip(i int, n *yaml.Node) *tasks.Trip {
	f := r.open(n, &tripSection, fmt.Sprintf("trip %d", i+1))
	name := f.line("name")
	if f.has("name") && name != "" {
		r.newName(f.vals["name"], "trip", true)
		f.what = fmt.Sprintf("trip %q", name)
	}
	t := &tasks.Trip{Name: name, Pos: r.pos(n), Keys: f.keys(), Booked: f.yes("booked"), Place: f.place("place")}
	t.People = texts(r.people(f, "people"))
	t.Prices = f.prices("price")
	if t.Place == nil {
		return nil
	}
	if r.site == nil {
		r.site = t.Place
	}
	if r.site != t.Place {
		f.fault("place", "make a job file for each", "it goes to %q, another trip to %q: one job has one window's place", t.Place.Name, r.site.Name)
		return nil
	}
	if !f.has("out") || !f.has("back") || t.Place.Zone == nil || r.home == nil {
		return nil
	}
	faults := len(r.faults)
	r.legs(f, t)
	r.carried(t, f)
	if len(r.faults) > faults {
		return nil
	}
	w := window{fmt.Sprintf("the window of trip %q", t.Name), t.Place.Zone, t.Opens, t.Closes}
	if r.windowStands(w, f.pos("back")) {
		r.windows = append(r.windows, w)
	}
	return t
}

// prices reads amounts of money.
func (f *fields) prices(name string) []tasks.Price {
	var out []tasks.Price
	for _, kv := range f.pairs(name) {
		s, ok := f.r.text(kv[1], f.lead(name), "412 GBP")
		if !ok {
			continue
		}
		num, cur, _ := strings.Cut(s, " ")
		v, err := strconv.ParseFloat(num, 64)
		if strings.Trim(num, "0123456789.") != "" || err != nil || v > maxPriceAt || math.IsNaN(v) || len(cur) != 3 || strings.ToUpper(cur) != cur || strings.Trim(cur, "ABCDEFGHIJKLMNOPQRSTUVWXYZ") != "" {
			f.r.fault(kv[1], "write the amount and the currency's three letters, for instance 412 GBP", "%s%s is not an amount of money", f.lead(name), short(s))
			continue
		}
		if what, ok := f.r.newName(kv[0], "price", true); ok {
			out = append(out, tasks.Price{What: what, Amount: v, Currency: cur})
		}
	}
	return out
}

// legsZone gives the zone of a key, or usual.
func (f *fields) legsZone(name string, usual *time.Location) *time.Location {
	if f.has(name) {
		return f.zone(name)
	}
	return usual
}
