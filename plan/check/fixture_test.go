package check

import (
	"strings"
	"testing"
	"time"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// fix is a small job with a plan, built by hand: a shop and a yard at home, a pier to go to on
// Monday 5 April 2027, and the people below. All clocks are London's: UTC+1 from 28 March on.
type fix struct {
	t                        testing.TB
	job                      *tasks.Job
	w                        *expand.Work
	p                        *plan.Plan
	shop, pier               *tasks.Place
	hinge, deck, slip        *tasks.Workface
	ines, tom, mate, visitor *tasks.Person
}

func london(t testing.TB) *time.Location {
	zone, err := time.LoadLocation("Europe/London")
	if err != nil {
		t.Fatal(err)
	}
	return zone
}

// at reads "04-06 15:00", a day of 2027 on London's clock.
func at(t testing.TB, text string) hours.Minute {
	v, err := time.ParseInLocation("2006-01-02 15:04", "2027-"+text, london(t))
	if err != nil {
		t.Fatal(err)
	}
	return hours.Of(v)
}

// span reads "04-06 15:00-18:00"; an end not after the start is on the next day.
func span(t testing.TB, text string) hours.Span {
	day, clock, _ := strings.Cut(text, " ")
	from, to, _ := strings.Cut(clock, "-")
	s := hours.Span{From: at(t, day+" "+from), To: at(t, day+" "+to)}
	if s.To <= s.From {
		next := hours.DateOf(s.From.In(london(t))).Add(1)
		s.To = at(t, next.String()[5:]+" "+to)
	}
	return s
}

func week(t testing.TB, rules ...string) hours.Pattern {
	var p hours.Pattern
	for _, r := range rules {
		rule, err := hours.ParseRule(r)
		if err != nil {
			t.Fatal(err)
		}
		p = append(p, rule)
	}
	return p
}

func moment(t testing.TB, text string) *tasks.Moment {
	d := at(t, text).In(london(t))
	return &tasks.Moment{Date: hours.DateOf(d), Minute: d.Hour()*60 + d.Minute(), Zone: london(t)}
}

func slot(t testing.TB, text string) tasks.Slot {
	s := span(t, text)
	word := func(m hours.Minute) tasks.Moment { return *moment(t, m.In(london(t)).Format("01-02 15:04")) }
	return tasks.Slot{From: word(s.From), To: word(s.To)}
}

func ticket(names ...string) []tasks.Ticket {
	var out []tasks.Ticket
	for _, n := range names {
		out = append(out, tasks.Ticket{Name: n})
	}
	return out
}

func newFix(t testing.TB) *fix {
	zone := london(t)
	given := tasks.Pos{File: "job.yaml", Line: 1, Col: 1}
	f := &fix{t: t, p: &plan.Plan{}}
	f.shop = &tasks.Place{Name: "shop", Zone: zone, Open: week(t, "Mon-Fri 08:00-12:00 12:30-17:00")}
	f.pier = &tasks.Place{Name: "pier", Zone: zone, Open: week(t, "Mon-Sat 08:00-12:00 12:30-18:00"),
		Lat: 57.6, Lon: -7.2, HasAt: true, FireWatch: tasks.Amount{Value: 60}}
	f.hinge = &tasks.Workface{Name: "hinge", Place: f.pier, People: 3, NextTo: []string{"deck"}}
	f.deck = &tasks.Workface{Name: "deck", Place: f.pier}
	f.slip = &tasks.Workface{Name: "slip", Place: f.pier}
	f.pier.Workfaces = []*tasks.Workface{f.hinge, f.deck, f.slip}
	f.ines = &tasks.Person{Name: "Ines", Tickets: []tasks.Ticket{{Name: "weld", Process: "136", Positions: []string{"PA", "PB", "PF"}}}}
	f.tom = &tasks.Person{Name: "Tom", Tickets: ticket("fitter", "fire watch")}
	f.mate = &tasks.Person{Name: "Ruaridh", Tickets: ticket("fitter", "fire watch", "painter")}
	f.visitor = &tasks.Person{Name: "Ms Reid", Outside: true, Tickets: ticket("inspector"), Places: []string{"pier"},
		Booked: []tasks.Slot{slot(t, "04-06 10:00-11:00")}}
	trip := &tasks.Trip{Name: "week", Place: f.pier, Booked: true,
		Leaves: at(t, "04-05 05:00"), Arrives: at(t, "04-05 07:00"), Opens: at(t, "04-05 08:00"),
		Closes: at(t, "04-09 17:00"), Departs: at(t, "04-09 18:00"), Home: at(t, "04-09 20:00")}
	leg := func(what string, a, b hours.Minute) tasks.Leg { return tasks.Leg{What: what, From: a, To: b} }
	trip.Out = []tasks.Leg{leg("drive", trip.Leaves, trip.Arrives), leg("unload", trip.Arrives, trip.Opens)}
	trip.Back = []tasks.Leg{leg("load", trip.Closes, trip.Departs), leg("drive", trip.Departs, trip.Home)}
	f.job = &tasks.Job{Name: "hinge", Zone: zone, Places: []*tasks.Place{f.shop, f.pier}, Trips: []*tasks.Trip{trip},
		People: []*tasks.Person{f.ines, f.tom, f.mate, f.visitor},
		Duty:   tasks.Amount{Value: 720, Pos: given}, Rest: tasks.Amount{Value: 660, Pos: given}}
	f.w = &expand.Work{Job: f.job, Trip: trip, Window: expand.Window{Place: f.pier, Opens: trip.Opens, Closes: trip.Closes},
		Span: hours.Span{From: at(t, "03-25 00:00"), To: at(t, "04-20 00:00")}}
	return f
}

// task adds a task.
func (f *fix) task(name string, kind tasks.Kind, place *tasks.Place, face *tasks.Workface) *tasks.Task {
	t := &tasks.Task{Name: name, Kind: kind, Place: place, Face: face, Pos: tasks.Pos{File: "job.yaml", Line: 10 + len(f.job.Tasks), Col: 3}}
	f.job.Tasks = append(f.job.Tasks, t)
	return t
}

// step adds a hands-on step of so many working minutes to a task.
func (f *fix) step(t *tasks.Task, name string, minutes int, needs ...tasks.Need) *expand.Step {
	s := &expand.Step{Index: len(f.w.Steps), Task: t, Name: name, Place: t.Place, Face: t.Face, HandsOn: minutes, Working: minutes,
		Needs: needs, NotBefore: hours.Never, Deadline: hours.Far, Site: t.Place == f.pier}
	f.w.Steps = append(f.w.Steps, s)
	return s
}

// work adds a task of one step.
func (f *fix) work(name string, kind tasks.Kind, face *tasks.Workface, minutes int, needs ...tasks.Need) *expand.Step {
	return f.step(f.task(name, kind, f.pier, face), string(kind), minutes, needs...)
}

// standing adds a step of clock time.
func (f *fix) standing(t *tasks.Task, name string, minutes int) *expand.Step {
	s := f.step(t, name, 0)
	s.Class, s.Clock = expand.Clock, minutes
	return s
}

// film adds a step that cures at a constant rate of one over minutes.
func (f *fix) film(t *tasks.Task, name string, minutes int) *expand.Step {
	s := f.step(t, name, 0)
	s.Class, s.Rate = expand.Cure, func(hours.Minute) float64 { return 1 / float64(minutes) }
	return s
}

// put plans a step: its people, then its pieces as span reads them.
func (f *fix) put(s *expand.Step, people string, pieces ...string) *plan.Step {
	p := plan.Step{Task: s.Task.Name, Step: s.Name}
	if people != "" {
		p.People = strings.Split(people, ",")
	}
	for _, text := range pieces {
		p.Pieces = append(p.Pieces, span(f.t, text))
	}
	if n := len(p.Pieces); n > 0 {
		p.Start, p.Finish = p.Pieces[0].From, p.Pieces[n-1].To
	}
	f.p.Steps = append(f.p.Steps, p)
	return &f.p.Steps[len(f.p.Steps)-1]
}

// move plans the i-th step anew.
func (f *fix) move(i int, pieces ...string) {
	old := f.p.Steps[i]
	p := f.put(f.w.Steps[i], strings.Join(old.People, ","), pieces...)
	p.Watches, p.Relief = old.Watches, old.Relief
	f.p.Steps[i] = *p
	f.p.Steps = f.p.Steps[:len(f.p.Steps)-1]
}

// watch adds a fire watch to a planned step.
func (f *fix) watch(p *plan.Step, who string, texts ...string) {
	for _, text := range texts {
		p.Watches = append(p.Watches, plan.Watch{Span: span(f.t, text), Person: who})
	}
}

// link makes to wait for from, finish to start.
func (f *fix) link(from, to *expand.Step, least, most int) *expand.Link {
	f.w.Links = append(f.w.Links, expand.Link{From: from, To: to, FromEnd: tasks.Finish, ToEnd: tasks.Start, Min: least, Max: most, Why: "test"})
	return &f.w.Links[len(f.w.Links)-1]
}

func need(name string) tasks.Need { return tasks.Need{Ticket: tasks.Ticket{Name: name}, Count: 1} }

// rules gives the rules that the plan breaks, each once, in order of the breaches.
func (f *fix) rules() (rules []string, all []Breach) {
	all = Plan(f.w, f.p)
	for _, b := range all {
		if !strings.Contains(strings.Join(rules, " ")+" ", b.Rule+" ") {
			rules = append(rules, b.Rule)
		}
	}
	return rules, all
}

// wants fails the test unless the plan breaks just the one rule; "" is none.
func (f *fix) wants(rule string) {
	f.t.Helper()
	rules, all := f.rules()
	if got := strings.Join(rules, " "); got != rule {
		f.t.Errorf("breaks %q, want %q", got, rule)
		for _, b := range all {
			f.t.Logf("  %s", b)
		}
	}
}

// weldAtHinge adds 300 working minutes of hot work with 20 of set-up, stopped over a night: the
// watcher leaves at 18:00, so work stops at 17:00 (220 minutes done), and goes on from 8:00.
func (f *fix) weldAtHinge() (*expand.Step, *plan.Step) {
	weld := f.work("weld", tasks.Weld, f.hinge, 300,
		tasks.Need{Ticket: tasks.Ticket{Name: "weld", Process: "136", Positions: []string{"PF"}}, Count: 1},
		tasks.Need{Ticket: tasks.Ticket{Name: "fire watch"}, Count: 1, Watch: true})
	weld.SetUp, weld.LeastPiece, weld.SafeStop, weld.Watch, weld.Hot, weld.Lone = 20, 30, 60, 60, true, true
	p := f.put(weld, "Ines,Tom", "04-06 13:00-17:00", "04-07 08:00-09:40")
	f.watch(p, "Tom", "04-06 17:00-18:00", "04-07 09:40-10:40")
	return weld, p
}
