// Package sheets lays out the pack that is printed and taken along: cover, a sheet for each
// shift, handover, weld list, paint log, lift sheets, packing list and cautions. The result is a
// list of things to draw, which tests can examine and package pdf inks.
//
// Lengths are millimetres from the top left corner of the page, font sizes points. Every text is
// at least 11 points high and every box to write in at least 9 mm, for wet paper and gloves.
package sheets

import (
	"fmt"
	"strings"
)

// Kind is the kind of thing to draw.
type Kind uint8

// The kinds of things to draw.
const (
	Text  Kind = iota // a run of text, its baseline at Y
	Rule              // a straight line from (X, Y) to (X+W, Y+H)
	Box               // an outline
	Blank             // an outline to write in
	Shade             // a filled area without outline
)

// String names the kind in drawing lists.
func (k Kind) String() string { return [...]string{"text", "rule", "box", "blank", "shade"}[k] }

// Item is one thing to draw.
type Item struct {
	Kind       Kind
	X, Y, W, H float64 // mm; for Text X and Y are the left end of the baseline and W the width
	Text       string
	Bold       bool
	Size       float64 // pt, for Text
	Stroke     float64 // mm, for Rule, Box and Blank
	Grey       float64 // 0 black to 1 white, for Shade
	Dash       bool    // a broken outline
}

// Top and Bottom give the item's vertical extent; that of text is the font's whole height.
func (it Item) Top() float64 {
	if it.Kind == Text {
		return it.Y - ascent*it.Size*mmPerPoint
	}
	return min(it.Y, it.Y+it.H)
}

// Bottom gives the item's lower edge.
func (it Item) Bottom() float64 {
	if it.Kind == Text {
		return it.Y + descent*it.Size*mmPerPoint
	}
	return max(it.Y, it.Y+it.H)
}

// Page is one page: Name tells what it is, for instance "shift 2027-04-06".
type Page struct {
	Name  string
	Items []Item
}

// Document is a pack ready to be inked.
type Document struct {
	Title  string
	Width  float64 // mm
	Height float64
	Left   float64 // the margins: nothing is drawn outside
	Right  float64
	Top    float64
	Bottom float64
	Pages  []*Page
}

// List writes the page as text, one line for each item, for comparing.
func (p *Page) List() string {
	var b strings.Builder
	fmt.Fprintf(&b, "page %s\n", p.Name)
	for _, it := range p.Items {
		fmt.Fprintf(&b, "%-5s %6.1f %6.1f %6.1f", it.Kind, it.X, it.Y, it.W)
		switch it.Kind {
		case Text:
			weight := ""
			if it.Bold {
				weight = " bold"
			}
			fmt.Fprintf(&b, " %g%s %q\n", it.Size, weight, it.Text)
		case Shade:
			fmt.Fprintf(&b, " %6.1f grey %g\n", it.H, it.Grey)
		default:
			dash := ""
			if it.Dash {
				dash = " dash"
			}
			fmt.Fprintf(&b, " %6.1f stroke %g%s\n", it.H, it.Stroke, dash)
		}
	}
	return b.String()
}
