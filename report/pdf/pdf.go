// Package pdf inks the drawing list of a pack as a PDF with embedded Go fonts. It is the only
// package that knows gofpdf. Equal documents give equal bytes: dates are fixed, catalogs sorted.
package pdf

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"
	"time"

	"github.com/jung-kurt/gofpdf"
	"golang.org/x/image/font/gofont/gobold"
	"golang.org/x/image/font/gofont/goregular"

	"sailby/report/clean"
	"sailby/report/sheets"
)

// family is the name of the font in the file.
const family = "go"

// stamp stands for every date in the file, so that equal input gives equal bytes.
var stamp = time.Date(2001, time.January, 1, 0, 0, 0, 0, time.UTC)

// Write inks the document. The error says that the document has no pages, on which page inking
// failed, or is that of writing; nothing is written before the whole document is inked.
func Write(w io.Writer, d *sheets.Document) error {
	if d == nil || len(d.Pages) == 0 {
		return errors.New("the pack has no pages")
	}
	if !(d.Width > 0 && d.Width < 5000 && d.Height > 0 && d.Height < 5000) {
		return fmt.Errorf("a page of %v by %v mm cannot be printed; use A4 or Letter", d.Width, d.Height)
	}
	size := gofpdf.SizeType{Wd: d.Width, Ht: d.Height}
	f := gofpdf.NewCustom(&gofpdf.InitType{OrientationStr: "P", UnitStr: "mm", Size: size})
	f.SetCatalogSort(true)
	f.SetCreationDate(stamp)
	f.SetModificationDate(stamp)
	f.SetProducer("Sailby", true)
	f.SetTitle(clean.Paper(d.Title, nil), true)
	f.SetCompression(true)
	f.SetAutoPageBreak(false, 0)
	f.SetMargins(0, 0, 0)
	f.SetCellMargin(0)
	// The library writes into the font's bytes: each document has its own.
	f.AddUTF8FontFromBytes(family, "", slices.Clone(goregular.TTF))
	f.AddUTF8FontFromBytes(family, "B", slices.Clone(gobold.TTF))
	for i, page := range d.Pages {
		f.AddPageFormat("P", size)
		for _, it := range page.Items {
			ink(f, it)
		}
		if err := f.Error(); err != nil {
			return fmt.Errorf("page %d (%s): %w", i+1, page.Name, err)
		}
	}
	var b bytes.Buffer
	if err := f.Output(&b); err != nil {
		return err
	}
	_, err := w.Write(b.Bytes())
	return err
}

// ink draws one item.
func ink(f *gofpdf.Fpdf, it sheets.Item) {
	switch it.Kind {
	case sheets.Text:
		style := ""
		if it.Bold {
			style = "B"
		}
		f.SetFont(family, style, it.Size)
		f.Text(it.X, it.Y, drawable(it.Text))
	case sheets.Rule:
		f.SetDrawColor(0, 0, 0)
		f.SetLineWidth(it.Stroke)
		f.Line(it.X, it.Y, it.X+it.W, it.Y+it.H)
	case sheets.Box, sheets.Blank:
		f.SetDrawColor(0, 0, 0)
		f.SetLineWidth(it.Stroke)
		if it.Dash {
			f.SetDashPattern([]float64{1.2, 0.8}, 0)
		}
		f.Rect(it.X, it.Y, it.W, it.H, "D")
		if it.Dash {
			f.SetDashPattern([]float64{}, 0)
		}
	case sheets.Shade:
		g := int(255*min(max(it.Grey, 0), 1) + 0.5)
		f.SetFillColor(g, g, g)
		f.Rect(it.X, it.Y, it.W, it.H, "F")
	}
}

// drawable keeps what the library can draw without failing: the layout has cleaned its text, and
// a document made elsewhere may not have.
func drawable(s string) string {
	return strings.Map(func(r rune) rune {
		if r > 0xFFFF || r == 0xFFFD {
			return '?'
		}
		return r
	}, strings.ToValidUTF8(s, "?"))
}
