package jobfile

import (
	"slices"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// way puts legs end to end, forwards from a moment or backwards to it.
type way struct {
	legs []tasks.Leg
}

// after adds legs that follow each other from the minute at, and gives the end.
func (w *way) after(at hours.Minute, list ...tasks.Leg) hours.Minute {
	for _, l := range list {
		if n := l.To; n > 0 { // To holds the minutes
			w.legs = append(w.legs, tasks.Leg{What: l.What, From: at, To: at + n, Pos: l.Pos})
			at += n
		}
	}
	return at
}

// before puts legs so that the last ends at the minute at, and gives the start.
func (w *way) before(at hours.Minute, list ...tasks.Leg) hours.Minute {
	for _, l := range list {
		at -= l.To
	}
	w.after(at, list...)
	return at
}

// leg gives the leg under a key, its length in To, rounded up.
func (f *fields) leg(name, what string) tasks.Leg {
	n := quantity.Clock(f.value(name)).Whole()
	return tasks.Leg{What: what, To: hours.Minute(n), Pos: f.pos(name)}
}

// legs works out the times of a trip from its keys.
func (r *reader) legs(f *fields, t *tasks.Trip) {
	out := r.open(f.node("out"), &outSection, f.what+": out")
	back := r.open(f.node("back"), &backSection, f.what+": back")
	t.OutKeys, t.BackKeys = out.keys(), back.keys()
	site := t.Place.Zone
	zones := [4]zoneOf{out.legsZone("sail zone", r.home), out.legsZone("land zone", site), back.legsZone("sail zone", site), back.legsZone("land zone", r.home)}
	if slices.Contains(zones[:], nil) {
		return // reported
	}
	ok1, crossing := r.wayOut(t, out, zones[0], zones[1])
	if !ok1 {
		return
	}
	ok2 := r.wayBack(t, back, out, zones[2], zones[3], crossing)
	if ok2 && t.Departs < t.Arrives {
		r.fault(back.at, "look at the dates", "%sleaves the site %s, before it arrives there %s", back.lead(""),
			t.Departs.In(site).Format("2006-01-02 15:04"), t.Arrives.In(site).Format("2006-01-02 15:04"))
	}
}

// boat says whether the way goes by boat, and reports keys that do not go together.
func (f *fields) boat(land bool) (boat, ok bool) {
	sails := f.tried("sail") || f.tried("land") && land
	drives := f.tried("leave") || f.tried("arrive")
	switch {
	case sails && drives:
		f.fault("", "keep `sail`, or `leave` or `arrive`", "it sails and drives: with a boat the way is counted from its sailing")
	case !sails && !drives:
		f.fault("", "add `sail: 2027-04-05 10:15`, or without a boat `leave: 2027-04-05 06:00`", "nothing says when")
	case sails && land && !(f.has("sail") && f.has("land")):
		f.fault("", "give both", "`sail` and `land` go together")
	default:
		return sails, true
	}
	return false, false
}

const stampForm = "2006-01-02 15:04 MST"

// wayOut fills in the legs out. Crossing is the time at sea.
func (r *reader) wayOut(t *tasks.Trip, f *fields, here, there zoneOf) (ok bool, crossing hours.Minute) {
	boat, ok := f.boat(true)
	w := &way{}
	drive, site, unload := f.leg("drive", "drive"), f.leg("drive to site", "drive to site"), f.leg("unload", "unload")
	checkIn := f.leg("check in", "check in")
	switch {
	case !ok:
		return false, 0
	case boat:
		sail, ok1 := f.fixed("sail", here)
		land, ok2 := f.fixed("land", there)
		if !ok1 || !ok2 {
			return false, 0
		}
		if crossing = land - sail; !f.crosses(sail, land, here, there) {
			return false, 0
		}
		t.Leaves = w.before(sail, drive, checkIn)
		w.legs = append(w.legs, tasks.Leg{What: "sail", From: sail, To: land, Pos: f.pos("sail")})
		t.Arrives = w.after(land, site)
	default:
		if t.Leaves, t.Arrives, ok = f.road(w, here, there, drive, site); !ok {
			return false, 0
		}
	}
	t.Opens = w.after(t.Arrives, unload)
	t.Out = w.legs
	return true, crossing
}

// crosses checks the time at sea.
func (f *fields) crosses(sail, land hours.Minute, here, there zoneOf) bool {
	switch n := int(land - sail); {
	case n <= 0:
		f.fault("land", "both are local times where they happen: look at the dates and at `sail zone` and `land zone`", "it lands %s, %s before it sails %s",
			land.In(there).Format(stampForm), quantity.Span(-n), sail.In(here).Format(stampForm))
	case n > maxAtSea:
		f.fault("land", "look at the dates", "it is at sea for %s", quantity.Span(n))
	default:
		return true
	}
	return false
}

// road works out a way without a boat: from leave, or to arrive; with both the drive must fit.
func (f *fields) road(w *way, from, to zoneOf, drives ...tasks.Leg) (leave, arrive hours.Minute, ok bool) {
	f.nothing("check in")
	leave, ok1 := f.fixed("leave", from)
	arrive, ok2 := f.fixed("arrive", to)
	switch {
	case f.has("leave") && !ok1 || f.has("arrive") && !ok2:
		return 0, 0, false
	case !f.has("arrive"):
		return leave, w.after(leave, drives...), true
	case !f.has("leave"):
		return w.before(arrive, drives...), arrive, true
	}
	end := w.after(leave, drives...)
	if end > arrive {
		f.fault("arrive", "look at the dates, or leave one of the two out", "it arrives %s, %s before the drive from %s can end", arrive.In(to).Format(stampForm),
			quantity.Span(int(end-arrive)), leave.In(from).Format(stampForm))
		return 0, 0, false
	}
	w.after(end, tasks.Leg{What: "break", To: arrive - end, Pos: f.pos("arrive")})
	return leave, arrive, true
}

// nothing reports a key that has no meaning without a boat.
func (f *fields) nothing(name string) {
	if f.has(name) {
		f.fault(name, "leave it out, or give `sail`", "there is no boat")
	}
}

// wayBack fills in the legs back.
func (r *reader) wayBack(t *tasks.Trip, f, out *fields, there, here zoneOf, crossing hours.Minute) bool {
	boat, ok := f.boat(false)
	if !ok {
		return false
	}
	w := &way{}
	load, toBoat, checkIn := f.leg("load", "load"), f.leg("drive to boat", "drive to boat"), f.leg("check in", "check in")
	home := f.leg("drive home", "drive home")
	switch {
	case f.has("drive"):
		home = f.leg("drive", "drive home")
		if f.has("drive home") {
			f.fault("drive", "keep `drive home`", "the same is said twice")
		}
	case !f.has("drive home"):
		home.To, home.Pos = out.leg("drive", "").To, out.pos("drive")
	}
	if boat {
		sail, ok := f.fixed("sail", there)
		if !ok {
			return false
		}
		land := sail + crossing
		if f.has("land") {
			if land, ok = f.fixed("land", here); !ok || !f.crosses(sail, land, there, here) {
				return false
			}
		} else if crossing == 0 {
			f.fault("", "add `land: 2027-04-14 17:20`", "it is not known how long it is at sea")
			return false
		} else {
			r.note(f.pos("sail"), "%s: lands %s: as long at sea as on the way out", f.what, land.In(here).Format("2006-01-02 15:04"))
		}
		t.Departs = w.before(sail, toBoat, checkIn)
		w.legs = append(w.legs, tasks.Leg{What: "sail", From: sail, To: land, Pos: f.pos("sail")})
		t.Home = w.after(land, home)
	} else {
		f.nothing("drive to boat")
		if t.Departs, t.Home, ok = f.road(w, there, here, home); !ok {
			return false
		}
	}
	loading := &way{}
	t.Closes = loading.before(t.Departs, load)
	t.Back = append(loading.legs, w.legs...)
	return true
}
