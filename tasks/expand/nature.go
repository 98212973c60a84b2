package expand

import (
	"strings"

	"sailby/tasks"
	"sailby/tasks/hours"
)

// nature sets what kind of work the step is: hot, noisy, in need of light or of company.
func (x *expander) nature(t *tasks.Task, s *Step, h hands) {
	s.Hot, s.Noisy, s.Light = h.hot, h.noisy, t.Light
	if t.HotWork != nil {
		s.Hot = *t.HotWork
	}
	if t.Noisy != nil {
		s.Noisy = *t.Noisy
	}
	s.Lone = mayNotBeAlone(t, s.Hot)
	if t.Kind == tasks.Lift || t.Kind == tasks.Move {
		s.Moves = asm(t.Lifts)
	}
	for _, n := range t.Joins {
		if !has(t.Parts, n.Name) {
			s.Works = append(s.Works, asm(n.Name))
		}
	}
	for _, list := range [][]string{t.Parts, t.Surface} {
		for _, p := range list {
			s.Works = append(s.Works, asm(p))
		}
	}
}

// mayNotBeAlone says whether R14 lists the work, and its author has not said that it may be done alone.
func mayNotBeAlone(t *tasks.Task, hot bool) bool {
	if t.Lone != nil && !*t.Lone {
		return false
	}
	f := t.Face
	return hot || t.Kind == tasks.Lift || f != nil && (f.Closed || f.Water || f.Tidal)
}

// permits lists the permits that the step wants (R23).
func (x *expander) permits(t *tasks.Task, s *Step) {
	for _, p := range t.Place.Permits {
		if permitFor(p.For, t, s) {
			s.Wants = append(s.Wants, p.Name)
		}
	}
}

func asm(name string) string {
	a, _, _ := strings.Cut(name, "/")
	return a
}

func permitFor(what string, t *tasks.Task, s *Step) bool {
	f := t.Face
	switch what {
	case "all", "", string(t.Kind):
		return true
	case "closed space":
		return f != nil && f.Closed
	case "over water":
		return f != nil && f.Water
	case "between tides":
		return f != nil && f.Tidal
	}
	for _, st := range s.States {
		if st.Name == what {
			return true
		}
	}
	return what == tasks.HotWorkState && s.Hot
}

// statesOf sets the states of the step's kind (R12).
func (x *expander) statesOf(t *tasks.Task, s *Step, h hands) {
	var watched func(hours.Minute) hours.Minute
	if s.Watch > 0 { // until the fire watch ends a spark may glow, and whoever keeps it is there (R13)
		watch := hours.Minute(s.Watch)
		watched = func(finish hours.Minute) hours.Minute { return finish + watch }
	}
	if s.Hot {
		s.States = append(s.States, State{Name: tasks.HotWorkState, Tail: watched, What: "fire watch"})
	}
	if h.grit && t.Kind == tasks.Prep {
		s.States = append(s.States, State{Name: tasks.Grit})
	}
	if t.Kind == tasks.Lift {
		s.States = append(s.States, State{Name: tasks.LoadOverhead})
	} else {
		s.States = append(s.States, State{Name: tasks.PeopleState, Tail: watched, What: "fire watch"})
	}
	for _, name := range t.States {
		s.States = append(s.States, State{Name: name})
	}
}
