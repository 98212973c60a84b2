package screen

import (
	"context"
	"errors"
	"strings"
	"sync"
	"sync/atomic"
	"testing"
	"time"

	"github.com/gdamore/tcell/v2"

	"sailby/plan"
	"sailby/report/fixture"
	"sailby/report/screen/model"
	"sailby/tasks"
)

// simulation gives a screen of a size that draws into memory.
func simulation(t *testing.T, w, h int) tcell.SimulationScreen {
	t.Helper()
	s := tcell.NewSimulationScreen("UTF-8")
	if err := s.Init(); err != nil {
		t.Fatal(err)
	}
	s.SetSize(w, h)
	return s
}

// text gives what a screen shows, row by row.
func text(s tcell.SimulationScreen) []string {
	cells, w, h := s.GetContents()
	rows := make([]string, h)
	for y := range rows {
		var b strings.Builder
		for x := 0; x < w; x++ {
			if r := cells[y*w+x].Runes; len(r) > 0 {
				b.WriteString(string(r))
			}
		}
		rows[y] = strings.TrimRight(b.String(), " ")
	}
	return rows
}

// TestDrawsTheRows: the screen shows the rows of the model, with and without colours, and no
// colour is used where none is wanted.
func TestDrawsTheRows(t *testing.T) {
	for _, colours := range []bool{true, false} {
		for _, size := range [][2]int{{80, 24}, {140, 40}, {30, 5}} {
			m := model.New(fixture.Report())
			s := simulation(t, size[0], size[1])
			v := newView(m, colours, func(model.Ask) {})
			for _, page := range "12345" {
				m.Press(model.Key{Code: model.Letter, Letter: page})
				v.SetRect(0, 0, size[0], size[1])
				v.Draw(s)
				s.Show()
				got := text(s)
				for y, row := range m.Rows(size[0], size[1]) {
					if want := strings.TrimRight(row.Text, " "); got[y] != want {
						t.Errorf("page %c, %d columns, row %d is %q, want %q", page, size[0], y, got[y], want)
					}
				}
				cells, _, _ := s.GetContents()
				for _, c := range cells {
					if fg, bg, _ := c.Style.Decompose(); !colours && (fg != tcell.ColorDefault || bg != tcell.ColorDefault) {
						t.Fatalf("a colour on page %c: %v on %v", page, fg, bg)
					}
				}
			}
			s.Fini()
		}
	}
}

// TestMarksShow: the row that Enter acts on is set off by more than its sign.
func TestMarksShow(t *testing.T) {
	m := model.New(fixture.Report())
	m.Press(model.Key{Code: model.Letter, Letter: '3'})
	s := simulation(t, 80, 24)
	defer s.Fini()
	v := newView(m, false, func(model.Ask) {})
	v.SetRect(0, 0, 80, 24)
	v.Draw(s)
	s.Show()
	cells, w, _ := s.GetContents()
	for y, row := range text(s) {
		_, _, a := cells[y*w+4].Style.Decompose()
		if chosen := strings.HasPrefix(row, ">"); chosen != (a&tcell.AttrReverse != 0 && y > 0 && y < 23) {
			t.Errorf("row %d %q has attributes %v", y, row, a)
		}
	}
}

// TestKeys: the keys of the terminal are those of the model.
func TestKeys(t *testing.T) {
	for _, c := range []struct {
		e    *tcell.EventKey
		want model.Key
	}{
		{tcell.NewEventKey(tcell.KeyRune, 'å', 0), model.Key{Code: model.Letter, Letter: 'å'}},
		{tcell.NewEventKey(tcell.KeyRune, 'x', tcell.ModAlt), model.Key{}},
		{tcell.NewEventKey(tcell.KeyEscape, 0, 0), model.Key{Code: model.Back}},
		{tcell.NewEventKey(tcell.KeyBackspace2, 0, 0), model.Key{Code: model.Erase}},
		{tcell.NewEventKey(tcell.KeyF5, 0, 0), model.Key{}},
	} {
		if got := keyOf(c.e); got != c.want {
			t.Errorf("%v gives %v, want %v", c.e.Name(), got, c.want)
		}
	}
}

// slow is a planner that waits for its context or for go, and counts its runs.
type slow struct {
	started, ended atomic.Int32
	free           chan struct{}
}

func (p *slow) Replan(ctx context.Context, sets []tasks.Setting) (*plan.Report, error) {
	return p.ReplanTelling(ctx, sets, func(string) {})
}

func (p *slow) ReplanTelling(ctx context.Context, sets []tasks.Setting, tell func(string)) (*plan.Report, error) {
	p.started.Add(1)
	defer p.ended.Add(1)
	tell("trying orders of work")
	select {
	case <-ctx.Done():
		return nil, ctx.Err()
	case <-p.free:
		return fixture.Report(), nil
	}
}

// watched is a screen that keeps what it last showed, for another goroutine to look at.
type watched struct {
	tcell.SimulationScreen
	lock sync.Mutex
	rows []string
}

// Show is called where the screen is drawn.
func (w *watched) Show() {
	w.SimulationScreen.Show()
	rows := text(w.SimulationScreen)
	w.lock.Lock()
	w.rows = rows
	w.lock.Unlock()
}

func (w *watched) seen() string {
	w.lock.Lock()
	defer w.lock.Unlock()
	return strings.Join(w.rows, "\n")
}

// user runs the screen and looks at it as a user does.
type user struct {
	t    *testing.T
	s    *watched
	done chan error
	out  []string
}

func start(ctx context.Context, t *testing.T, p Planner) *user {
	u := &user{t: t, s: &watched{SimulationScreen: tcell.NewSimulationScreen("UTF-8")}, done: make(chan error, 1)}
	go func() {
		out, err := Run(ctx, fixture.Report(), p, Options{Screen: u.s})
		u.out = out
		u.done <- err
	}()
	u.see("The window at a glance")
	return u
}

// see waits until the screen shows the words.
func (u *user) see(words string) {
	u.t.Helper()
	for end := time.Now().Add(20 * time.Second); ; time.Sleep(5 * time.Millisecond) {
		rows := u.s.seen()
		if strings.Contains(rows, words) {
			return
		}
		if time.Now().After(end) {
			u.t.Fatalf("%q does not come up; the screen is\n%s", words, rows)
		}
	}
}

func (u *user) press(keys ...tcell.Key) {
	for _, k := range keys {
		u.s.InjectKey(k, 0, 0)
	}
}

func (u *user) write(s string) {
	for _, r := range s {
		u.s.InjectKey(tcell.KeyRune, r, 0)
	}
}

// left waits until the screen has been left.
func (u *user) left() []string {
	u.t.Helper()
	select {
	case err := <-u.done:
		if err != nil {
			u.t.Fatal(err)
		}
	case <-time.After(20 * time.Second):
		u.t.Fatal("the screen is not left")
	}
	return u.out
}

// TestWhatIf: a change plans beside the screen, which goes on answering; Esc ends the run, another
// one comes to its end, and leaving tells what was tried.
func TestWhatIf(t *testing.T) {
	p := &slow{free: make(chan struct{})}
	u := start(t.Context(), t, p)
	u.write("5")
	u.see("Tried now")
	u.press(tcell.KeyDown, tcell.KeyEnter)
	u.see("The work without whom?")
	u.press(tcell.KeyEnter)
	u.see("trying orders of work")
	u.write("2") // the screen answers while it plans
	u.see("The days: 5 of 8")
	u.see("planning again (trying orders of work)")
	u.write("5")
	u.see("Esc stops it")
	u.press(tcell.KeyEscape)
	u.see("Stopped before it was planned.")
	u.press(tcell.KeyDown, tcell.KeyEnter) // plan again
	u.see("trying orders of work")
	p.free <- struct{}{}
	u.see("with the changes")
	if n := p.started.Load(); n != 2 {
		t.Errorf("%d runs, want 2", n)
	}
	u.press(tcell.KeyEscape)
	u.see("The window at a glance")
	u.press(tcell.KeyEscape)
	u.see("Leave Sailby")
	u.press(tcell.KeyEnter)
	if out := u.left(); len(out) != 1 || !strings.HasPrefix(out[0], "people/Ines/until: ") {
		t.Errorf("tried %q", out)
	}
}

// TestLeaving: Ctrl-C and the end of the context leave at once, and end a run that goes on.
func TestLeaving(t *testing.T) {
	for _, byKey := range []bool{true, false} {
		ctx, cancel := context.WithCancel(t.Context())
		p := &slow{free: make(chan struct{})}
		u := start(ctx, t, p)
		u.write("5")
		u.see("Tried now")
		u.press(tcell.KeyDown, tcell.KeyEnter, tcell.KeyEnter)
		u.see("trying orders of work")
		if byKey {
			u.press(tcell.KeyCtrlC)
		} else {
			cancel()
		}
		if out := u.left(); len(out) != 1 {
			t.Errorf("tried %q", out)
		}
		if p.started.Load() != p.ended.Load() {
			t.Error("a run goes on after the screen was left")
		}
		cancel()
	}
}

// TestResize: the screen is drawn anew in another size.
func TestResize(t *testing.T) {
	u := start(t.Context(), t, nil)
	u.s.SetSize(140, 40)
	if err := u.s.PostEvent(tcell.NewEventResize(140, 40)); err != nil {
		t.Fatal(err)
	}
	u.see(strings.Repeat("─", 100))
	u.s.SetSize(30, 8)
	if err := u.s.PostEvent(tcell.NewEventResize(30, 8)); err != nil {
		t.Fatal(err)
	}
	u.see("Make the window larger")
	u.press(tcell.KeyCtrlC)
	u.left()
}

// TestNoPlanner: without a planner what-if says so.
func TestNoPlanner(t *testing.T) {
	u := start(t.Context(), t, nil)
	u.write("5")
	u.see("Tried now")
	u.press(tcell.KeyDown, tcell.KeyEnter, tcell.KeyEnter)
	u.see("there is nothing here to plan with")
	u.press(tcell.KeyCtrlC)
	u.left()
}

// counted is a screen that counts its starts.
type counted struct {
	tcell.SimulationScreen
	starts int
}

func (c *counted) Init() error {
	c.starts++
	return c.SimulationScreen.Init()
}

// TestStartedOnce: a terminal that is started twice keeps the size that its description gives, and
// is never drawn to the end in another.
func TestStartedOnce(t *testing.T) {
	s := &counted{SimulationScreen: tcell.NewSimulationScreen("UTF-8")}
	ctx, cancel := context.WithTimeout(t.Context(), 20*time.Millisecond)
	defer cancel()
	if _, err := Run(ctx, fixture.Report(), nil, Options{Screen: s}); err != nil || s.starts != 1 {
		t.Errorf("%d starts, %v", s.starts, err)
	}
}

// broken is a screen that cannot be opened.
type broken struct{ tcell.Screen }

func (broken) Init() error { return errors.New("no such device") }

func TestNoTerminal(t *testing.T) {
	if _, err := Run(t.Context(), fixture.Report(), nil, Options{Screen: broken{}}); !errors.Is(err, ErrNoTerminal) {
		t.Errorf("the error is %v", err)
	}
}
