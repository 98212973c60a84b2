package random

import "fmt"

// tasks draws tasks until there are as many activities as are wanted, those at home first.
func (m *maker) tasks() {
	for made := 0; made < m.Size; {
		home := !m.Lattice && len(m.work) < m.Size/6 && len(m.work) == m.homes && !m.one(4)
		if home {
			m.homes++
		}
		made += m.task(home)
	}
}

// drawn is the kinds of tasks as often as they come.
var drawn = []string{"fit-up", "fit-up", "fit-up", "fit-up", "weld", "weld", "weld", "weld", "weld", "cut", "cut",
	"prep", "coat", "coat", "lift", "test", "sign-off", "plain", "plain", "plain", "plain", "standing"}

// task draws one task and says how many activities it is, about.
func (m *maker) task(home bool) int {
	i := len(m.work)
	t := task{name: fmt.Sprint("t", i), home: home, links: map[string][]string{}}
	key := func(format string, args ...any) { t.keys = append(t.keys, fmt.Sprintf(format, args...)) }
	kind := drawn[m.rng.IntN(len(drawn))]
	if kind == "prep" && m.Lattice { // it holds for so long from its finish
		kind = "fit-up"
	}
	at := "pier/" + faces[m.rng.IntN(len(faces))]
	if at == "pier/"+faces[0] && (m.one(2) || kind == "sign-off" || kind == "lift") { // the tide leaves no room for all of it
		at = "pier/" + faces[1]
	}
	if home {
		kind = m.of("fit-up", "weld", "plain", "cut")
		at = "shop"
		if kind != "plain" && m.one(2) {
			key("part: %s", m.of("frame", "ramp"))
		}
	} else if m.one(8) {
		at = "pier"
	}
	key("at: %s", at)
	steps := 1
	if kind == "standing" {
		long := m.mins(60, 480)
		key("standing: %d min", long)
		m.chain = append(m.chain, float64(long)/2)
	} else {
		steps = m.hands(kind, home, at == "pier/"+faces[0], key)
	}
	m.links(&t, i)
	if !home {
		switch {
		case m.one(25):
			t.late = min(0.99, max(0.5, m.chain[i]/m.longest())+0.35+0.3*m.rng.Float64())
		case m.one(20):
			t.soon = 0.4 * m.rng.Float64()
		}
	}
	m.work = append(m.work, t)
	return steps
}

// hands draws a task that people do.
func (m *maker) hands(kind string, home, tidal bool, key func(string, ...any)) int {
	long, people, steps := m.mins(30, 330), 1, 1
	if tidal {
		long = m.mins(30, 120)
	}
	extra := func(in int, text string) {
		if !m.Lattice && m.one(in) {
			key("%s", text)
		}
	}
	setUp := func() {
		if m.Lattice || tidal {
			key("set-up: 0 min")
			return
		}
		if m.one(2) {
			key("set-up: %d min", m.mins(0, 30))
		}
	}
	stop := func() {
		if m.Lattice || tidal {
			key("may stop: {not before: 0 min, least piece: 0 min}")
		} else if m.one(2) {
			key("may stop: {not before: %d min, least piece: %d min}", m.mins(0, 45), m.mins(10, 30))
		}
	}
	switch kind {
	case "weld":
		key("kind: weld")
		key("needs: {weld 136: 1}")
		key("kit: {set: 1}")
		setUp()
		stop()
		extra(10, "may change hands: yes")
	case "cut":
		key("kind: cut")
		key("by: disc")
		key("kit: {grinder: 1}")
		setUp()
		stop()
	case "prep":
		long = m.mins(30, 120)
		key("kind: surface prep")
		key("method: power tool")
		key("kit: {grinder: 1}")
		setUp()
		stop()
	case "coat":
		long = m.mins(30, 90)
		if m.one(2) {
			key("coats: [primer, primer]")
			long, steps = 2*long, 3
		} else {
			key("coats: [primer]")
		}
		key("kind: coat")
		key("area: 1 m2")
		key("set-up: 0 min")
	case "lift":
		long, people = m.mins(30, 120), 2
		key("kind: lift")
		key("lifts: %s", m.of("frame", "ramp"))
		key("by: %s", m.of("hoist", "crane"))
		key("set-up: 0 min")
	case "test":
		long = m.mins(30, 120)
		key("kind: test")
		key("by: visual")
		key("set-up: 0 min")
	case "sign-off":
		long = 30
		key("kind: sign-off")
		key("who: [Inspector]")
		key("set-up: 0 min")
	default:
		people = 1 + m.rng.IntN(5)/3
		key("kind: %s", kind)
		key("people: %d", people)
		if !home && m.one(6) {
			key("kit: {staging: 1}")
		}
		setUp()
		switch {
		case m.one(10):
			long = m.mins(30, 120)
			key("in one go: yes")
		default:
			stop()
		}
		extra(10, "may change hands: yes")
	}
	if kind != "coat" && kind != "cut" && !tidal && m.one(10) {
		key("noisy: yes")
	}
	key("hours: %d min", long)
	m.chain = append(m.chain, float64(long)*1.2)
	if !home && kind != "sign-off" {
		m.manMins += long * people
	}
	return steps
}

// links draws the links of task i from those before it.
func (m *maker) links(t *task, i int) {
	seen := map[int]bool{}
	own := m.chain[i]
	for range []int{0, 0, 1, 1, 1, 2}[m.rng.IntN(6)] {
		j := i - 1 - m.rng.IntN(10)
		if j < 0 || seen[j] || t.home && !m.work[j].home {
			continue
		}
		seen[j] = true
		on := "after"
		if m.one(8) {
			on = m.of("after start of", "finish after", "finish after start of")
		}
		wait, least, most := "", 0, m.of("30 h", "48 h", "72 h", "96 h")
		switch m.rng.IntN(18) {
		case 0, 1:
			least = m.mins(30, 300)
			wait = fmt.Sprintf("min: %d min", least)
		case 2:
			least = 60 * (1 + m.rng.IntN(5))
			wait = fmt.Sprintf("min: %d working h", least/60)
		case 3:
			least = m.mins(0, 120)
			wait = fmt.Sprintf("min: %d min, max: %s", least, most)
			if m.Lattice {
				on = "after start of"
			}
		}
		m.chain[i] = max(m.chain[i], own+float64(least)/2+m.chain[j])
		t.links[on] = append(t.links[on], fmt.Sprintf("t%d: {%s}", j, wait))
	}
}

// longest gives the longest chain so far, in minutes of open hours.
func (m *maker) longest() float64 {
	long := 1.0
	for _, c := range m.chain {
		long = max(long, c)
	}
	return long
}
