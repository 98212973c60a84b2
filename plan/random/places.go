package random

import (
	"fmt"
	"strings"
)

// faces are the workfaces of the site; those of the shop are bench and floor.
var faces = []string{"hinge", "deck", "stern", "bow"}

// crew draws the people, the zones and the site's hours: what the length of the window rests on.
func (m *maker) crew() {
	m.zones = [2]string{"Europe/London", "Europe/London"}
	if m.one(2) {
		m.zones[1] = m.of("Europe/Oslo", "Europe/Dublin", "Europe/Helsinki")
	}
	m.trip = !m.Lattice && m.one(3)
	hours := []struct {
		text string
		n    float64
	}{{"Mon-Sat 07:00-12:30 13:00-18:30", 9.5}, {"daily 07:00-12:00 12:30-17:00", 9.5}, {"daily 06:00-18:00", 12}, {"Mon-Fri 07:30-12:00 13:00-17:30, Sat 08:00-13:00", 8}}
	h := hours[m.rng.IntN(len(hours))]
	m.open, m.hours = h.text, h.n
	names := strings.Fields("Ann Bob Cid Dot Eva Finn Gus Hal Ivy Jon Lou Mia Ned Oda Pip Ron")
	n := min(len(names), 2+m.rng.IntN(2)+min(2, m.Size/25)+m.Size/100)
	for i := range n {
		p := person{name: names[i]}
		switch {
		case i == 0:
			p.tickets = "{weld: 136, positions: all}, fitter, fire watch, painter, slinger/signaller"
		case i == 1:
			p.tickets = "{weld: 136, positions: all}, fitter, fire watch, slinger/signaller"
		default:
			p.tickets = m.of("fitter, fire watch", "fitter, painter, fire watch", "{weld: 136, positions: all}, fire watch",
				"fitter, slinger/signaller", "{weld: 136, positions: all}, fitter, fire watch")
		}
		if i > 0 {
			switch m.rng.IntN(8) {
			case 0:
				p.rest = func(*maker) string { return ", hours: [daily 08:00-15:00]" }
			case 1:
				p.rest = func(*maker) string { return ", hours: [daily 10:00-20:00]" }
			case 2:
				p.rest = func(m *maker) string { return ", from: " + m.date(min(1, m.days-1)) + " 08:00" }
			case 3:
				p.rest = func(m *maker) string { return ", off: [" + m.date(m.days/2) + "]" }
			}
		}
		m.people = append(m.people, p)
	}
	m.people = append(m.people, person{name: "Inspector", tickets: "NDT", rest: func(m *maker) string {
		var slots []string
		for d := range m.days {
			if d%2 == 1 || d == m.days-1 {
				slots = append(slots, m.date(d)+" 09:00-16:00")
			}
		}
		return ", outside: yes, places: [pier], booked: [" + strings.Join(slots, ", ") + "]"
	}})
}

// places writes the shop and the site.
func (m *maker) places(line func(string, ...any)) {
	line("places:")
	line("  shop: {open: [Mon-Fri 07:30-12:00 12:30-17:30, Sat 08:00-13:00], face factor: 1, steel temperature: 15 C, mains: 20 kVA}")
	line("  pier:")
	line("    zone: %s", m.zones[1])
	line("    open: [%s]", m.open)
	line("    steel temperature: 10 C")
	if m.Lattice {
		line("    face factor: 1")
		line("    fire watch: 0 min")
	} else {
		line("    face factor: %s", m.of("1", "0.8", "0.7"))
		line("    fire watch: %s", m.of("0 min", "30 min", "60 min"))
		if m.one(3) {
			line("    opening up: 15 min")
			line("    clearing up: 15 min")
		}
	}
	if m.one(3) {
		line("    noisy work: [daily 08:00-16:00]")
	}
	if m.one(3) {
		line("    permits: {hot work: {valid: [daily 07:30-16:30], issue: %s}}", m.of("0 min", "30 min"))
	}
	if m.one(3) {
		line("    mains: 5 kVA")
	}
	if m.one(6) && m.days > 3 {
		line("    closed: [%s]", m.date(m.days/3))
	}
	line("    workfaces:")
	for i, f := range faces {
		var keys []string
		if m.one(2) {
			keys = append(keys, fmt.Sprint("people: ", 2+m.rng.IntN(3)))
		}
		if i == 0 {
			keys = append(keys, "reach: ["+m.tides()+"]")
			if !m.Lattice && m.one(2) {
				keys = append(keys, "way off before: 20 min")
			}
		}
		if i > 0 && m.one(3) {
			keys = append(keys, "next to: ["+faces[i-1]+"]")
		}
		if i == 3 && m.one(3) {
			keys = append(keys, "over water: yes")
		}
		line("      %s: {%s}", f, strings.Join(keys, ", "))
	}
}

// tides writes the low waters of the window as slots: some five hours twice a day, each day
// fifty minutes later (an hour on the lattice).
func (m *maker) tides() string {
	drift, start, long := 50, m.mins(0, 700), m.mins(240, 360)
	if m.Lattice {
		drift = 60
	}
	var out []string
	for d := range m.days {
		for _, at := range []int{(start + d*drift) % 1440, (start + d*drift + 740) % 1440} {
			if m.Lattice {
				at = at / 30 * 30
			}
			if at+long < 1440 {
				out = append(out, fmt.Sprintf("%s %02d:%02d-%02d:%02d", m.date(d), at/60, at%60, (at+long)/60, (at+long)%60))
			}
		}
	}
	return strings.Join(out, ", ")
}

// window writes the trip or the window.
func (m *maker) window(line func(string, ...any)) {
	last := m.date(m.days - 1)
	if m.trip {
		line("trips: [{name: trip, place: pier, out: {drive: 1 h, check in: 45 min, sail: %s 05:00, land: %s 09:00, unload: 1 h}, back: {load: 1 h, check in: 30 min, sail: %s 19:00, land: %s 23:00, drive: 1 h}}]",
			m.date(0), m.date(0), last, last)
		return
	}
	line("window: {place: pier, opens: %s 07:00, closes: %s %s}", m.date(0), last, m.of("18:00", "18:30", "17:00"))
}

// things writes kit, hire, paints, assemblies, clashes and duty.
func (m *maker) things(line func(string, ...any)) {
	if m.Lattice {
		line("duty: {longest: 24 h, rest: 5 h}")
	} else if m.one(3) {
		line("duty: {longest: %s, rest: %s}", m.of("9 h", "10 h", "13 h"), m.of("8 h", "11 h"))
	}
	stays := m.of("", ", stays: yes")
	line("kit:")
	line("  set: {count: %d, draws: 8 kVA}", 1+m.rng.IntN(2)+m.Size/60)
	line("  grinder: {count: 2, draws: 2.5 kVA}")
	line("  hoist: {rated: 1 t, at: pier}")
	line("  staging: {count: 2, at: pier%s}", stays)
	line("  gen: {gives: %d kVA, at: pier}", []int{10, 15, 25}[m.rng.IntN(3)]+m.Size/20)
	var slots []string
	for d := range m.days {
		if d%3 == 0 || d == m.days-1 {
			slots = append(slots, m.date(d)+" 08:00-15:00")
		}
	}
	line("hire: {crane: {kind: loader crane, rated: 2 t, at: pier, slots: [%s]}}", strings.Join(slots, ", "))
	line("paints: {primer: {kind: alkyd, touch dry: {5 C: 60 min, 10 C: 30 min, 15 C: 30 min}, hard dry: {5 C: 4 h, 10 C: 2 h, 15 C: 2 h}, solvent gone: {5 C: 5 h, 10 C: 3 h, 15 C: 3 h}," +
		" service: {5 C: 20 h, 10 C: 10 h, 15 C: 10 h}, next coat: {any: {5 C: {min: 6 h}, 10 C: {min: 3 h}, 15 C: {min: 3 h}}}}}")
	line("assemblies: {frame: {mass: 300 kg, known: weighed}, ramp: {mass: 420 kg, known: weighed}}")
	if m.one(2) {
		line("clashes: {add: [[people, soft film]]}")
	}
}
