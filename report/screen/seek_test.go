package screen

import (
	"context"
	"testing"

	"github.com/gdamore/tcell/v2"

	"sailby/plan"
	"sailby/report/fixture"
)

// finder is a planner that looks for ways until it is let go, or its context ends.
type finder struct {
	slow
	way chan *plan.Ways
}

func (f *finder) Ways(ctx context.Context, r *plan.Report) *plan.Ways {
	f.started.Add(1)
	defer f.ended.Add(1)
	select {
	case w := <-f.way:
		return w
	case <-ctx.Done():
		return nil
	}
}

// TestWaysBesideTheScreen: the verdict is there at once, the ways come when they are found, and leaving does not wait
// for them.
func TestWaysBesideTheScreen(t *testing.T) {
	for _, found := range []bool{true, false} {
		f := &finder{way: make(chan *plan.Ways)}
		r := fixture.Report()
		r.Likely = r.High
		u := &user{t: t, s: &watched{SimulationScreen: tcell.NewSimulationScreen("UTF-8")}, done: make(chan error, 1)}
		go func() {
			_, err := Run(t.Context(), r, f, Options{Screen: u.s})
			u.done <- err
		}()
		u.see("The window at a glance")
		if found {
			f.way <- &plan.Ways{List: []plan.Way{{Text: "a second hoist"}}, Tried: 1}
			u.press(tcell.KeyEnd)
			u.see("with a second hoist: fits")
		}
		u.press(tcell.KeyCtrlC)
		u.left()
		if f.started.Load() != 1 || f.ended.Load() != 1 {
			t.Errorf("looked for %d times, ended %d times", f.started.Load(), f.ended.Load())
		}
	}
}
