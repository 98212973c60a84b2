package screen

import (
	"context"
	"errors"
	"sync"

	"github.com/gdamore/tcell/v2"
	"github.com/rivo/tview"

	"sailby/plan"
	"sailby/report/screen/model"
	"sailby/tasks"
)

// Planner plans the job again with some values of its file replaced; the file is not written to.
type Planner interface {
	Replan(ctx context.Context, sets []tasks.Setting) (*plan.Report, error)
}

// Teller is a Planner that says how far it is; tell may be called from any goroutine.
type Teller interface {
	Planner
	ReplanTelling(ctx context.Context, sets []tasks.Setting, tell func(string)) (*plan.Report, error)
}

// Seeker is a Planner that finds what would make a report's job fit; nil where it fits, or nothing was found out. The
// report is not changed.
type Seeker interface {
	Planner
	Ways(ctx context.Context, r *plan.Report) *plan.Ways
}

// Options say how the screen is shown. The zero value opens the terminal, with colours.
type Options struct {
	Screen   tcell.Screen // already made, not started; nil: the terminal
	NoColour bool         // weight, line and reversal only
}

// ErrNoTerminal is given where there is no terminal to draw on.
var ErrNoTerminal = errors.New("this is not a terminal that can be drawn on")

// Run shows the report until the user leaves or ctx ends, and gives the changes that were tried
// and are in no file, one line each. A nil planner leaves what-if without an answer. The error
// wraps ErrNoTerminal, or is nil.
func Run(ctx context.Context, r *plan.Report, p Planner, o Options) (tried []string, err error) {
	s := o.Screen
	if s == nil {
		if s, err = tcell.NewScreen(); err != nil {
			return nil, errors.Join(ErrNoTerminal, err)
		}
	}
	if err := s.Init(); err != nil {
		return nil, errors.Join(ErrNoTerminal, err)
	}
	ctx, cancel := context.WithCancel(ctx)
	seeker, seeks := p.(Seeker)
	seeks = seeks && r.Likely != nil && r.Likely.Verdict != plan.Fits && r.Ways == nil
	d := &driver{ctx: ctx, m: model.New(r), planner: p, app: tview.NewApplication()}
	if seeks {
		d.m.Looking()
	}
	d.app.SetScreen(started{s}).EnablePaste(true).SetRoot(newView(d.m, !o.NoColour, d.do), true)
	d.app.SetInputCapture(func(e *tcell.EventKey) *tcell.EventKey {
		if e.Key() == tcell.KeyCtrlC { // tview would stop by itself
			d.do(d.m.Press(model.Key{Code: model.Away}))
			return nil
		}
		return e
	})
	var once sync.Once
	d.app.SetAfterDrawFunc(func(tcell.Screen) { // before the first drawing Stop would be lost
		once.Do(func() {
			d.wait.Add(1)
			go func() {
				defer d.wait.Done()
				<-ctx.Done()
				d.app.Stop()
			}()
			if seeks { // the verdict is on the screen
				d.wait.Add(1)
				go func() {
					defer d.wait.Done()
					asked := *r
					w := seeker.Ways(ctx, &asked)
					d.post(func() { d.m.Ways(w) })
				}()
			}
		})
	})
	err = d.app.Run()
	d.end()
	cancel()
	d.wait.Wait()
	return d.m.Tried(), err
}

// started is a screen that has been started: tview starts the one it is given once more, and does
// not look at the error; a terminal started twice has two sizes.
type started struct{ tcell.Screen }

// Init does nothing.
func (started) Init() error { return nil }

// driver runs what the keys ask for. Its methods are called on tview's goroutine unless they say
// otherwise.
type driver struct {
	ctx     context.Context
	m       *model.Model
	planner Planner
	app     *tview.Application
	cancel  context.CancelFunc // of the run that goes on; nil if none
	wait    sync.WaitGroup     // for the goroutines that are to end before Run does

	lock  sync.Mutex
	ended bool
}

// do does what a key asked for.
func (d *driver) do(a model.Ask) {
	switch {
	case a.Leave:
		d.app.Stop()
	case a.Plan:
		d.halt()
		d.plan(a)
	case a.Stop:
		d.halt()
	}
}

func (d *driver) halt() {
	if d.cancel != nil {
		d.cancel()
		d.cancel = nil
	}
}

// plan starts a run of the planner beside the screen.
func (d *driver) plan(a model.Ask) {
	if d.planner == nil {
		d.m.Planned(a.Run, nil, errors.New("there is nothing here to plan with"))
		return
	}
	ctx, cancel := context.WithCancel(d.ctx)
	d.cancel = cancel
	d.wait.Add(1)
	go func() {
		defer d.wait.Done()
		defer cancel()
		var r *plan.Report
		var err error
		if t, ok := d.planner.(Teller); ok {
			r, err = t.ReplanTelling(ctx, a.Sets, func(text string) { d.post(func() { d.m.Progress(a.Run, text) }) })
		} else {
			r, err = d.planner.Replan(ctx, a.Sets)
		}
		d.post(func() { d.m.Planned(a.Run, r, err) })
	}()
}

// post has f run on tview's goroutine and the screen drawn; it may be called from any other. It
// does not wait: a queued update never returns once the loop has ended.
func (d *driver) post(f func()) {
	d.lock.Lock()
	defer d.lock.Unlock()
	if !d.ended {
		go d.app.QueueUpdateDraw(f)
	}
}

// end says that the loop has ended.
func (d *driver) end() {
	d.lock.Lock()
	d.ended = true
	d.lock.Unlock()
}
