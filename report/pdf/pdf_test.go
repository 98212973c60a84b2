package pdf

import (
	"bytes"
	"errors"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"github.com/jung-kurt/gofpdf"
	"golang.org/x/image/font/gofont/gobold"
	"golang.org/x/image/font/gofont/goregular"

	"sailby/report/fixture"
	"sailby/report/sheets"
)

func pack(t *testing.T) *sheets.Document {
	t.Helper()
	d, err := sheets.Pack(fixture.Report(), sheets.Options{})
	if err != nil {
		t.Fatal(err)
	}
	return d
}

func inked(t *testing.T, d *sheets.Document) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := Write(&b, d); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

func TestEqualBytes(t *testing.T) {
	a, b := inked(t, pack(t)), inked(t, pack(t))
	if !bytes.Equal(a, b) {
		t.Fatal("two files from equal input differ")
	}
	if !bytes.HasPrefix(a, []byte("%PDF-1.")) || !bytes.Contains(a, []byte("%%EOF")) {
		t.Error("not a whole PDF")
	}
}

// TestFontsStayWhole: the library writes into the font's bytes it is given.
func TestFontsStayWhole(t *testing.T) {
	regular, bold := slices.Clone(goregular.TTF), slices.Clone(gobold.TTF)
	inked(t, pack(t))
	if !bytes.Equal(regular, goregular.TTF) || !bytes.Equal(bold, gobold.TTF) {
		t.Error("inking changed the embedded fonts: the next pack would differ")
	}
}

// TestWidths: the layout's own widths are those of the library, so nothing grows when inked.
func TestWidths(t *testing.T) {
	f := gofpdf.New("P", "mm", "A4", "")
	f.AddUTF8FontFromBytes(family, "", slices.Clone(goregular.TTF))
	f.AddUTF8FontFromBytes(family, "B", slices.Clone(gobold.TTF))
	n := 0
	for _, p := range pack(t).Pages {
		for _, it := range p.Items {
			if it.Kind != sheets.Text {
				continue
			}
			style := ""
			if it.Bold {
				style = "B"
			}
			f.SetFont(family, style, it.Size)
			if w := f.GetStringWidth(it.Text); w > it.W*1.004+0.05 || w < it.W*0.99-0.05 {
				t.Errorf("%q is %.2f mm wide in the file, %.2f in the layout", it.Text, w, it.W)
			}
			n++
		}
	}
	if n < 500 {
		t.Errorf("only %d texts seen", n)
	}
}

func squeezed(s string) string { return strings.Join(strings.Fields(s), "") }

// TestTextInTheFile reads the real file with pdftotext: every text of the layout must be there.
func TestTextInTheFile(t *testing.T) {
	tool, err := exec.LookPath("pdftotext")
	if err != nil {
		t.Skip("left out: pdftotext (Debian poppler-utils) is not installed")
	}
	d := pack(t)
	file := filepath.Join(t.TempDir(), "pack.pdf")
	if err := os.WriteFile(file, inked(t, d), 0o644); err != nil {
		t.Fatal(err)
	}
	out, err := exec.Command(tool, "-raw", "-enc", "UTF-8", file, "-").Output()
	if err != nil {
		t.Fatal(err)
	}
	pages := strings.Split(strings.TrimSuffix(string(out), "\f"), "\f")
	if len(pages) != len(d.Pages) {
		t.Fatalf("%d pages in the file, %d in the layout", len(pages), len(d.Pages))
	}
	for i, p := range d.Pages {
		got := squeezed(pages[i])
		for _, it := range p.Items {
			if it.Kind == sheets.Text && !strings.Contains(got, squeezed(it.Text)) {
				t.Errorf("page %d (%s) has no %q", i+1, p.Name, it.Text)
			}
		}
	}
	if all := squeezed(string(out)); !strings.Contains(all, "MrsØdegård") || !strings.Contains(all, "Søren-ŁukaszÓ") {
		t.Error("accents are lost in the file")
	}
}

// TestHostileDocument: text that no layout has cleaned must not make the library fail or panic.
func TestHostileDocument(t *testing.T) {
	d := &sheets.Document{Title: "t\U0001f525\xff", Width: 210, Height: 297, Pages: []*sheets.Page{{Name: "x"}}}
	for _, s := range []string{"\U0001f525 fire", "\xff\xfe", "", "\x00\x1b[31m", "(a) \\ (b", "\ufffd", "\uffff", strings.Repeat("W", 10000)} {
		d.Pages[0].Items = append(d.Pages[0].Items, sheets.Item{Kind: sheets.Text, X: 20, Y: 20, Text: s, Size: 11})
	}
	d.Pages[0].Items = append(d.Pages[0].Items, sheets.Item{Kind: sheets.Box, X: 1, Y: 1, W: 5, H: 5, Dash: true, Stroke: 0.3}, sheets.Item{Kind: sheets.Shade, W: 5, H: 5, Grey: 7})
	if n := len(inked(t, d)); n < 1000 {
		t.Errorf("only %d bytes", n)
	}
}

func TestRefusals(t *testing.T) {
	for name, d := range map[string]*sheets.Document{
		"nothing":  nil,
		"no pages": {Width: 210, Height: 297},
		"no size":  {Pages: []*sheets.Page{{}}},
		"too wide": {Width: 1e9, Height: 297, Pages: []*sheets.Page{{}}},
	} {
		var b bytes.Buffer
		if err := Write(&b, d); err == nil || b.Len() > 0 {
			t.Errorf("%s: error %v, %d bytes written", name, err, b.Len())
		}
	}
	if err := Write(full{}, pack(t)); err == nil {
		t.Error("a full disk is hidden")
	}
}

type full struct{}

func (full) Write([]byte) (int, error) { return 0, errors.New("disk full") }
