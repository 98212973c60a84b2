package problem

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

func TestActivitiesKeepTheBoundsOfTheirSteps(t *testing.T) {
	p := compiled(t, `tasks:
  home: {at: shop, hours: 1 h}
  site: {at: pier, hours: 1 h, not before: day 2 08:00, must be done by: day 3 17:00}
  wait: {at: pier, standing: 3 h}
  maybe: {at: pier, hours: 1 h, chance: 10 %}
  nothing: {at: pier, hours: 0 h}
  kept: {at: pier, standing: 3 h, keeps: {fitter: 1}}`)
	open, close := p.at(t, "04-05 07:00"), p.at(t, "04-09 19:00")
	same(t, "the problem begins with home work, and ends well after the window", []int{p.Open, p.Close, p.at(t, "03-29 08:00"), p.End}, []int{open, close, 0, close + 21*1440})
	for _, tc := range []struct {
		name     string
		from, by int
		site     bool
		length   int
	}{
		{"home", 0, Inf, false, 60}, {"site", p.at(t, "04-06 08:00"), p.at(t, "04-07 17:00"), true, 60}, {"wait", open, close, true, 180},
		{"maybe", 0, Inf, true, 0}, {"nothing", open, close, true, 0}, {"kept", open, close, true, 180},
	} {
		a := p.activity(t, tc.name)
		same(t, tc.name, []any{a.From, a.By, a.Site, a.Home, a.Modes[0].Time.Length()}, []any{tc.from, tc.by, tc.site, !tc.site, tc.length})
		if a.Label() != tc.name || a.Pos().Line == 0 {
			t.Errorf("%s is called %q, at %v", tc.name, a.Label(), a.Pos())
		}
	}
	if a := p.activity(t, "wait"); a.Modes[0].Time.Calendar() != nil || a.Modes[0].Crew != nil {
		t.Error("standing time needs neither hours nor people")
	}
	if a := p.activity(t, "kept"); p.crews(a) != "Tom" || a.Modes[0].Time.Start(p.at(t, "04-06 10:00")) != p.at(t, "04-06 12:30") {
		t.Error("standing time that keeps somebody lies in one opening, without a meal")
	}
	open2 := (&Act{Name: "a"}).Label()
	if open2 != "a" || (&Act{}).Pos().Given() {
		t.Error("an activity of an open instance has its own name and no place in a file")
	}
}

func TestFilmsOfAProblemCureOnItsOwnMinutes(t *testing.T) {
	p := compiled(t, "paints: {top: {kind: polyurethane, hard dry: {10 C: 20 h}}}", "tasks: {paint: {kind: coat, at: pier, hours: 1 h, coats: top}, next: {at: pier, hours: 1 h, after: paint}}")
	w := p.activity(t, "paint / hard dry").Modes[0].Time
	if s := p.at(t, "04-06 10:00"); w.Start(s) != s || w.Finish(s) != s+1200 {
		t.Errorf("begun at 10:00 it is dry by %s, want 20 h later", p.clock(w.Finish(s)))
	}
}

func TestKitRoomAndPower(t *testing.T) {
	p := compiled(t, `places:
  shop: {open: always, mains: 7.55 kVA}
  pier: {open: always, fire watch: 60 min, workfaces: {hinge: {people: 3}, deck: {}}}
  yard: {open: always}`, `kit:
  generator: {gives: 15 kVA}
  small set: {gives: 2 kVA, count: 2, at: shop}
  welder: {count: 2, draws: 7.45 kVA, stays: yes}
  gauge: {}`, "people: {Ines: {tickets: [fire watch]}, Tom: {tickets: [fire watch]}, Ann: {}}", `tasks:
  weld: {kind: weld, at: pier/hinge, hours: 1 h, kit: welder}
  grind: {at: pier/hinge, hours: 1 h, people: 2, kit: {welder: 2, gauge: 1}}
  shop: {at: shop, hours: 1 h, kit: welder}
  yard: {at: yard, hours: 1 h}
  maybe: {at: pier/hinge, hours: 1 h, chance: 10 %, kit: gauge}
  deck: {at: pier/deck, hours: 1 h}`)
	uses := func(a *Act) string {
		var out []string
		for _, u := range a.Uses {
			text := fmt.Sprintf("%d %s", u.Amount, p.Res[u.Res].Name)
			if u.Stays {
				text += " stays"
			}
			out = append(out, text)
		}
		return strings.Join(out, ", ")
	}
	for name, want := range map[string]string{
		"weld": "1 welder stays, 1 pier/hinge, 7450 power at pier", "grind": "2 welder stays, 1 gauge, 2 pier/hinge, 14900 power at pier",
		"shop": "1 welder stays, 7450 power at shop", "yard": "", "maybe": "", "deck": "",
	} {
		same(t, name, uses(p.activity(t, name)), want)
	}
	for _, r := range p.Res {
		want, known := map[string]int{"welder": 2, "gauge": 1, "pier/hinge": 3, "power at pier": 15000, "power at shop": 11550}[r.Name]
		if !known || r.Capacity != want || r.Pos.Line == 0 {
			t.Errorf("%s: %d of %d at %v", r.Name, r.Capacity, want, r.Pos)
		}
	}
	if a := p.activity(t, "weld"); a.WatchRoom == 0 || p.Res[a.WatchRoom-1].Name != "pier/hinge" {
		t.Errorf("whoever keeps its fire watch takes a place in the workface besides, got %d", a.WatchRoom)
	}
	if p.activity(t, "grind").WatchRoom != 0 {
		t.Error("without a watch there is none")
	}
	for name, want := range map[string]string{"pier": "15 true", "shop": "11.55 true", "yard": "0 false"} { // R7: what goes along counts at the window's place only
		kva, limited := Supply(p.Work, place(t, p, name))
		same(t, "supply at "+name, fmt.Sprint(kva, " ", limited), want)
	}
}

func TestWhatMustNotOverlap(t *testing.T) {
	const head = `places: {shop: {open: always}, pier: {open: always, fire watch: 0 min, workfaces: {hinge: {next to: deck}, deck: {}, far: {}}}, quay: {open: always, workfaces: {hinge: {}}}}`
	pair := func(p *Problem) string {
		var out []string
		for _, pr := range p.Pairs {
			out = append(out, p.Acts[pr.A].Name+" x "+p.Acts[pr.B].Name+": "+pr.Why)
		}
		return strings.Join(out, "; ")
	}
	for _, tc := range []struct{ what, tasks, more, want string }{
		{"hot work and a wet coat in one workface", "a: {kind: cut, at: pier/hinge, hours: 1 h}, b: {kind: coat, at: pier/hinge, hours: 1 h, coats: top}", "", "a / cut x b / coat 1: hot work and wet film at pier/hinge"},
		{"in neighbours, whoever declares it", "a: {kind: cut, at: pier/deck, hours: 1 h}, b: {kind: coat, at: pier/hinge, hours: 1 h, coats: top}", "", "a / cut x b / coat 1: hot work and wet film at pier/deck"},
		{"not further off", "a: {kind: cut, at: pier/far, hours: 1 h}, b: {kind: coat, at: pier/hinge, hours: 1 h, coats: top}", "", ""},
		{"not at another place", "a: {kind: cut, at: quay/hinge, hours: 1 h}, b: {kind: coat, at: pier/hinge, hours: 1 h, coats: top}", "", ""},
		{"not without a workface", "a: {kind: cut, at: pier, hours: 1 h}, b: {kind: coat, at: pier, hours: 1 h, coats: top}", "", ""},
		{"nobody under a load", "a: {kind: lift, at: pier/hinge, hours: 1 h}, b: {at: pier/deck, hours: 1 h}", "", "a / lift x b / plain: load overhead and people at pier/hinge"},
		{"people and people", "a: {at: pier/hinge, hours: 1 h}, b: {at: pier/hinge, hours: 1 h}", "", ""},
		{"steps of one task", "a: {kind: coat, at: pier/hinge, hours: 2 h, coats: [top, top], hot work: yes}", "", ""},
		{"dust on a wet coat", "a: {kind: surface prep, at: pier/hinge, hours: 1 h}, b: {kind: coat, at: pier/hinge, hours: 1 h, coats: top}", "", "a / surface prep x b / coat 1: grit and wet film at pier/hinge"},
		{"a pair switched off", "a: {kind: surface prep, at: pier/hinge, hours: 1 h}, b: {kind: coat, at: pier/hinge, hours: 1 h, coats: top}", "clashes: {drop: [[wet film, grit]]}", ""},
		{"a pair added", "a: {at: pier/hinge, hours: 1 h}, b: {at: pier/hinge, hours: 1 h, states: [noise]}", "clashes: {add: [[people, noise]]}", "a / plain x b / plain: people and noise at pier/hinge"},
		{"a maybe that does not happen", "a: {kind: lift, at: pier/hinge, hours: 1 h, chance: 10 %}, b: {at: pier/deck, hours: 1 h}", "", ""},
		{"lifting what another works on", "a: {kind: lift, at: pier, hours: 1 h, lifts: frame}, b: {kind: fit-up, at: shop, hours: 1 h, part: frame/base}", "", "a / lift x b / fit-up: frame is moved"},
		{"two lifts of one thing", "a: {kind: lift, at: pier, hours: 1 h, lifts: frame}, b: {kind: move, at: pier, hours: 1 h, lifts: frame}", "", "a / lift x b / move: frame is moved"},
		{"lifting something else", "a: {kind: lift, at: pier, hours: 1 h, lifts: mast}, b: {kind: fit-up, at: pier, hours: 1 h, part: frame/base}", "", ""},
	} {
		p := compiled(t, head, tc.more, "paints: {top: {kind: polyurethane}}", "people: {Ines: {tickets: [painter, slinger/signaller, fire watch]}, Tom: {}}",
			"assemblies: {frame: {mass: 90 kg, parts: {base: {item: 90 kg}}}, mast: {mass: 50 kg}}", "tasks: {"+tc.tasks+"}")
		same(t, tc.what, pair(p), tc.want)
	}
}

// A pair has the longest of its tails: whichever comes first must be clear of all of them.
func TestPairsLastUntilTheFilmIsGone(t *testing.T) {
	p := compiled(t, `places: {shop: {open: always}, pier: {open: always, fire watch: 30 min, workfaces: {hinge: {}}}}`,
		"paints: {top: {kind: polyurethane, touch dry: {10 C: 3 h}, hard dry: {10 C: 9 h}, solvent gone: {10 C: 20 h}}}", "people: {Ines: {tickets: [painter, slinger/signaller, fire watch]}, Tom: {}}",
		"assemblies: {frame: {mass: 90 kg}}", `tasks:
  coat: {kind: coat, at: pier/hinge, hours: 1 h, coats: top, surface: frame}
  cut: {kind: cut, at: pier/hinge, hours: 1 h, who: Tom}
  blast: {kind: surface prep, at: pier/hinge, hours: 1 h}
  lift: {kind: lift, at: pier, hours: 1 h, lifts: frame}
  over: {kind: lift, at: pier/hinge, hours: 1 h}`)
	tails := map[string]string{}
	for _, pr := range p.Pairs {
		tail := func(f func(int) int) int {
			if f == nil {
				return 0
			}
			return f(1000) - 1000
		}
		tails[p.Acts[pr.A].Step.Task.Name+" "+p.Acts[pr.B].Step.Task.Name] = fmt.Sprint(tail(pr.TailA), tail(pr.TailB), pr.Kind)
	}
	want := map[string]string{
		"coat cut":   "1200 30 0", // solvent gone; the hot work until its watch ends
		"coat blast": "180 0 0",   // touch dry
		"coat lift":  "540 0 1",   // hard dry: not moved before
		"coat over":  "0 0 0",     // people under a load
		"cut over":   "30 0 0",    // who keeps the watch is under the load
		"blast over": "0 0 0",
	}
	same(t, "tails in minutes", tails, want)
}

// A wait in open hours is counted minute by minute (R10).
func TestWaitsInOpenHours(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		open := make([]bool, 300)
		for i := range open {
			open[i] = i > 0 && open[i-1] != (rapid.IntRange(0, 9).Draw(t, "turn") == 0)
		}
		count := func(a, b int) (n int) {
			for i := a; i < b; i++ {
				if open[i] {
					n++
				}
			}
			return n
		}
		at, n := rapid.IntRange(0, 299).Draw(t, "from"), rapid.IntRange(1, 80).Draw(t, "wait")
		first, last := Inf, Inf
		for u := at; u <= len(open); u++ {
			if count(at, u) >= n && first == Inf {
				first = u
			}
			if u < len(open) && count(at, u+1) > n && last == Inf {
				last = u
			}
		}
		l := Link{Min: n, Max: n, Count: setOf(open), MaxCount: setOf(open)}
		if got := l.Earliest(at); got != first {
			t.Fatalf("%d working min after %d are over by %d, want %d", n, at, got, first)
		}
		if got := l.LastAt(at); got != last {
			t.Fatalf("at most %d working min after %d are over by %d, want %d", n, at, got, last)
		}
	})
}

func TestLinksOfAProblem(t *testing.T) {
	p := compiled(t, "paints: {top: {kind: polyurethane}}", `tasks:
  a: {at: shop, hours: 1 h}
  b: {at: shop, hours: 1 h, after: {a: {min: 2 working h, max: 6 working h}}}
  c: {at: shop, hours: 1 h, after start of: {a: {min: 30 min, max: 3 h}}}`)
	find := func(name string) *Link {
		for i := range p.Links {
			if p.Acts[p.Links[i].To].Step.Task.Name == name {
				return &p.Links[i]
			}
		}
		t.Fatal(name)
		return nil
	}
	b, c := find("b"), find("c")
	noon := p.at(t, "03-29 11:00")
	same(t, "2 working h after 11:00, over lunch, and 6 at most", []string{p.clock(b.Earliest(noon)), p.clock(b.LastAt(noon))}, []string{"03-29 13:30", "03-30 08:30"})
	same(t, "clock time", []int{c.Earliest(100), c.LastAt(100), int(c.FromEnd)}, []int{130, 280, int(tasks.Start)})
	free := Link{Min: expand.NoMin, Max: expand.NoMax}
	same(t, "no wait at all", []int{free.Earliest(5), free.LastAt(5)}, []int{-Inf, Inf})
	heat := Link{Last: func(t int) int { return t + 7 }, Max: 3}
	same(t, "a longest wait that shortens with heat", heat.LastAt(5), 12)
	w := expanded(t, yaml("tasks: {a: {at: shop, hours: 1 h}}"))
	w.Links = []expand.Link{{To: w.Steps[0], Min: 90, Max: expand.NoMax, MaxCure: &expand.MaxCure{Last: func(m hours.Minute) hours.Minute { return m + 60 }}}}
	q := Compile(w)
	same(t, "from the start of the plan, on the problem's minutes", []int{q.Links[0].From, q.Links[0].Earliest(0), q.Links[0].LastAt(10)}, []int{-1, 90, 70})
}

func TestOrdersOfAProblem(t *testing.T) {
	p := compiled(t, "paints: {top: {kind: polyurethane}}", "orders: [{either: [a before coats, coats before c]}]",
		"tasks: {a: {at: shop, hours: 1 h}, coats: {kind: coat, at: shop, hours: 2 h, coats: [top, top]}, c: {at: shop, hours: 1 h}}")
	var got []string
	for _, c := range p.Orders[0].Choices {
		for _, b := range c {
			got = append(got, p.Acts[b.First].Name+" before "+p.Acts[b.Then].Name)
		}
		got = append(got, "or")
	}
	same(t, "choices", strings.Join(got, ", "), "a / plain before coats / coat 1, a / plain before coats / coat 2, or, coats / coat 1 before c / plain, coats / coat 2 before c / plain, or")
}

func TestEqualJobsGiveEqualProblems(t *testing.T) {
	a, b := compiled(t), compiled(t)
	for i := range a.Acts {
		if len(a.Acts[i].Modes) != len(b.Acts[i].Modes) {
			t.Fatal("the modes differ")
		}
		for k, m := range a.Acts[i].Modes {
			if o := b.Acts[i].Modes[k]; !slices.Equal(m.Crew, o.Crew) || !slices.Equal(m.Time.Calendar(), o.Time.Calendar()) {
				t.Errorf("mode %d of %s differs", k, a.Acts[i].Name)
			}
		}
	}
	for i := range a.People {
		if a.People[i].Name != b.People[i].Name || !slices.Equal(a.People[i].Hours, b.People[i].Hours) {
			t.Errorf("hours of %s differ", a.People[i].Name)
		}
	}
}
