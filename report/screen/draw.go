package screen

import (
	"github.com/gdamore/tcell/v2"
	"github.com/rivo/tview"

	"sailby/report/screen/model"
)

// view draws the rows of the model over the whole screen and hands it the keys.
type view struct {
	*tview.Box
	m       *model.Model
	colours bool
	do      func(model.Ask) // called with what a key asks; must not wait for the drawing
}

func newView(m *model.Model, colours bool, do func(model.Ask)) *view {
	v := &view{Box: tview.NewBox(), m: m, colours: colours, do: do}
	v.SetBackgroundColor(tcell.ColorDefault)
	return v
}

// Draw writes the rows, and shows the text cursor where something is typed.
func (v *view) Draw(s tcell.Screen) {
	v.DrawForSubclass(s, v)
	x, y, w, h := v.GetInnerRect()
	for i, row := range v.m.Rows(w, h) {
		cell(s, x, y+i, w, row.Text, v.style(row.Mark))
	}
	if cx, cy, shown := v.m.Cursor(); shown && v.HasFocus() {
		s.ShowCursor(x+cx, y+cy)
	} else {
		s.HideCursor()
	}
}

// style sets a mark off; without colours by weight, line and reversal alone.
func (v *view) style(m model.Mark) tcell.Style {
	d := tcell.StyleDefault
	switch m {
	case model.Bar:
		return d.Reverse(true)
	case model.Head:
		return d.Bold(true)
	case model.Chosen:
		return d.Bold(true).Reverse(true)
	case model.Good:
		if v.colours {
			return d.Bold(true).Foreground(tcell.ColorGreen)
		}
		return d.Bold(true)
	case model.Bad:
		if v.colours {
			return d.Bold(true).Foreground(tcell.ColorMaroon)
		}
		return d.Bold(true)
	case model.Faint:
		return d.Dim(true)
	}
	return d
}

// InputHandler hands keys to the model.
func (v *view) InputHandler() func(*tcell.EventKey, func(tview.Primitive)) {
	return v.WrapInputHandler(func(e *tcell.EventKey, _ func(tview.Primitive)) {
		if k := keyOf(e); k.Code != model.None {
			v.do(v.m.Press(k))
		}
	})
}

// PasteHandler hands pasted text to the line being typed.
func (v *view) PasteHandler() func(string, func(tview.Primitive)) {
	return v.WrapPasteHandler(func(text string, _ func(tview.Primitive)) { v.m.Paste(text) })
}

var codes = map[tcell.Key]model.Code{
	tcell.KeyUp: model.Up, tcell.KeyDown: model.Down, tcell.KeyLeft: model.Left, tcell.KeyRight: model.Right,
	tcell.KeyPgUp: model.PageUp, tcell.KeyPgDn: model.PageDown, tcell.KeyHome: model.Home, tcell.KeyEnd: model.End,
	tcell.KeyEnter: model.Enter, tcell.KeyEscape: model.Back, tcell.KeyTab: model.Next, tcell.KeyBacktab: model.Prev,
	tcell.KeyBackspace: model.Erase, tcell.KeyBackspace2: model.Erase, tcell.KeyDelete: model.Delete, tcell.KeyCtrlC: model.Away,
}

func keyOf(e *tcell.EventKey) model.Key {
	if e.Key() == tcell.KeyRune {
		if e.Modifiers()&(tcell.ModAlt|tcell.ModMeta) != 0 {
			return model.Key{}
		}
		return model.Key{Code: model.Letter, Letter: e.Rune()}
	}
	return model.Key{Code: codes[e.Key()]}
}
