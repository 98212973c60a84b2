package sheets

import (
	"strings"
	"sync"

	"golang.org/x/image/font"
	"golang.org/x/image/font/gofont/gobold"
	"golang.org/x/image/font/gofont/goregular"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"

	"sailby/report/clean"
)

const (
	mmPerPoint = 25.4 / 72
	ascent     = 0.945 // of the Go fonts, in ems (hhea 1935 of 2048)
	descent    = 0.211 // 432 of 2048
	leading    = 1.25  // from line to line, in ems: more than ascent and descent together
)

// face measures one font. Widths are looked up once for each rune.
type face struct {
	font *sfnt.Font
	mu   sync.Mutex
	buf  sfnt.Buffer
	ems  map[rune]float64 // width in ems; below 0: not in the font
}

var faces = sync.OnceValue(func() [2]*face {
	load := func(ttf []byte) *face {
		f, err := sfnt.Parse(ttf)
		if err != nil {
			panic("sheets: embedded font: " + err.Error()) // the font is part of the program
		}
		return &face{font: f, ems: map[rune]float64{}}
	}
	return [2]*face{load(goregular.TTF), load(gobold.TTF)}
})

func faceOf(bold bool) *face {
	if bold {
		return faces()[1]
	}
	return faces()[0]
}

// em gives the width of r in ems, negative if the font lacks it.
func (f *face) em(r rune) float64 {
	f.mu.Lock()
	defer f.mu.Unlock()
	if w, ok := f.ems[r]; ok {
		return w
	}
	w := -1.0
	if g, err := f.font.GlyphIndex(&f.buf, r); err == nil && g != 0 {
		if a, err := f.font.GlyphAdvance(&f.buf, g, fixed.I(1000), font.HintingNone); err == nil {
			w = float64(a) / 64 / 1000
		}
	}
	f.ems[r] = w
	return w
}

// drawable says whether both fonts have the rune, and whether it takes room.
func drawable(r rune) bool { return faceOf(false).em(r) > 0 && faceOf(true).em(r) > 0 }

// paper cleans text for drawing: one line, only signs that the fonts have.
func paper(s string) string { return clean.Paper(s, drawable) }

// width measures text that paper has cleaned, in mm.
func width(s string, size float64, bold bool) float64 {
	f, w := faceOf(bold), 0.0
	for _, r := range s {
		w += max(f.em(r), 0)
	}
	return w * size * mmPerPoint
}

// lineHeight is the distance from line to line in mm.
func lineHeight(size float64) float64 { return leading * size * mmPerPoint }

// wrapText cleans text and breaks it into lines of at most w mm, at blanks where it can, and
// between letters where one word is longer than the line.
func wrapText(s string, size float64, bold bool, w float64) []string {
	var out []string
	line := ""
	for _, word := range clean.Words(paper(s)) {
		if line != "" && width(line+" "+word, size, bold) > w {
			out = append(out, line)
			line = ""
		}
		for width(word, size, bold) > w {
			head, rest := cutWord(word, size, bold, w)
			if rest == "" {
				break
			}
			out = append(out, head)
			word = rest
		}
		if line != "" {
			line += " "
		}
		line += word
	}
	if line != "" || len(out) == 0 {
		out = append(out, line)
	}
	return out
}

// cutWord splits a word after what fits into w mm, at least one letter in.
func cutWord(word string, size float64, bold bool, w float64) (head, rest string) {
	for i := range word {
		if i > 0 && width(word[:i], size, bold) > w {
			last := 0
			for j := range word[:i] {
				last = j
			}
			if last == 0 {
				last = i
			}
			return word[:last], word[last:]
		}
	}
	for j := range word {
		rest = word[j:]
	}
	if len(rest) == len(word) {
		return word, ""
	}
	return word[:len(word)-len(rest)], rest
}

// fitted shortens text to w mm, with "..." where something is left out.
func fitted(s string, size float64, bold bool, w float64) string {
	s = paper(s)
	if width(s, size, bold) <= w {
		return s
	}
	for i := len(s) - 1; i > 0; i-- {
		if head := strings.TrimRight(strings.ToValidUTF8(s[:i], ""), " ") + "..."; width(head, size, bold) <= w {
			return head
		}
	}
	return ""
}
