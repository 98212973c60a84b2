package lift

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// ParseSection reads the name of a section. Millimetres are meant unless the word ends in "in".
//
//	SHS 100x100x6, RHS 120x80x5 hot, CHS 48.3x3.2   hollow; cold formed unless "hot" is said
//	IPE 200, HEA 160, HEB 200, UPN 200, UPE 160      by table
//	UB 203x133x25, UC 152x152x23, PFC 200x75x23      the last number is kg/m
//	W 8x31, C 8x11.5, MC, S, HP, M                   inches x lb/ft
//	HSS 4x4x1/4                                      inches
//	L 60x60x6, L 60x6                                angle
//	FL 80x10, RB 20, SB 20, HEX 24, OCT 80           flat, round, square, hexagon, octagon
//	plate 12, floor plate 6                          by the square metre
//
// Errors: an unknown family or size, sizes that cannot be; the hint names the nearest that are.
func ParseSection(word string) (Section, error) {
	if len(word) > 100 {
		return Section{}, fault("write a section such as SHS 100x100x6", "a section of %d letters is not one", len(word))
	}
	w, err := splitSection(word)
	if err != nil {
		return Section{}, err
	}
	if f, ok := tableFamily(w.family); ok {
		return lookUp(f, w)
	}
	m, ok := makers[w.family]
	if !ok {
		return Section{}, fault("known are "+near(w.family, familyWords())+"; or state the part's kg/m as its mass", "%q is not a section known here", word)
	}
	if len(w.n) < m.least || len(w.n) > m.most {
		return Section{}, fault("write "+m.like, "%q has %d sizes, %s takes %s", word, len(w.n), w.family, takes(m.least, m.most))
	}
	for _, n := range w.n {
		if !(n >= 0.1 && n <= 10000) {
			return Section{}, fault("write "+m.like, "%q: %s is not a size of a section in mm", word, num(n))
		}
	}
	return m.build(w)
}

func takes(least, most int) string {
	if least == most {
		return strconv.Itoa(least)
	}
	return fmt.Sprintf("%d or %d", least, most)
}

// sectionWord is a section's name taken apart.
type sectionWord struct {
	said   string
	family string
	n      []float64 // mm, or as the family has it
	hot    bool
}

// maker builds the sections of one family.
type maker struct {
	least, most int
	like        string
	build       func(sectionWord) (Section, error)
}

var makers map[string]maker

func init() {
	hollowMaker := maker{2, 3, "for instance SHS 100x100x6 or RHS 120x80x5 hot", buildHollow}
	named := maker{3, 3, "for instance UB 203x133x25, with kg/m last", buildMetricNamed}
	pound := maker{2, 2, "for instance W 8x31, with lb/ft last", buildPoundNamed}
	makers = map[string]maker{
		"SHS": hollowMaker, "RHS": hollowMaker,
		"HSS": {2, 3, "for instance HSS 4x4x1/4, in inches", buildHSS},
		"CHS": {2, 2, "for instance CHS 48.3x3.2", func(w sectionWord) (Section, error) { return tube(w.n[0], w.n[1]) }},
		"L":   {2, 3, "for instance L 60x60x6", buildAngle},
		"FL":  {2, 2, "for instance FL 80x10", buildFlat},
		"RB":  {1, 1, "for instance RB 20", buildRound},
		"SB":  {1, 1, "for instance SB 20", buildSquare},
		"HEX": {1, 1, "for instance HEX 24, across flats", buildHexagon},
		"OCT": {1, 1, "for instance OCT 80, across flats", buildOctagon},
		"UB":  named, "UC": named, "UBP": named, "PFC": named,
		"W": pound, "S": pound, "C": pound, "MC": pound, "HP": pound, "M": pound,
		"PLATE":       {1, 1, "for instance plate 12", buildPlate},
		"FLOOR PLATE": {1, 1, "for instance floor plate 6", buildFloorPlate},
	}
}

// sameFamily gives other words for a family.
var sameFamily = map[string]string{
	"BOX": "RHS", "TUBE": "CHS", "PIPE": "CHS", "ROR": "CHS", "EA": "L", "UA": "L", "RSA": "L", "ANGLE": "L", "LE": "L",
	"FLAT": "FL", "FB": "FL", "FLAT BAR": "FL", "ROUND": "RB", "ROUND BAR": "RB", "ROD": "RB", "SQ": "SB", "SQUARE": "SB",
	"SQUARE BAR": "SB", "HEXAGON": "HEX", "OCTAGON": "OCT", "UNP": "UPN", "U": "UPN", "HE A": "HEA", "HE B": "HEB", "PL": "PLATE",
	"SHEET": "PLATE", "CHEQUER PLATE": "FLOOR PLATE", "TREAD PLATE": "FLOOR PLATE", "CHECKER PLATE": "FLOOR PLATE",
}

// splitSection takes "RHS 120 x 80 x 5 hot" apart.
func splitSection(word string) (sectionWord, error) {
	w := sectionWord{said: word}
	s := strings.ToUpper(strings.NewReplacer("×", "x", "*", "x", "Ø", "", "ø", "").Replace(word))
	s = strings.Join(strings.Fields(s), " ")
	scale := 1.0
	for cut := true; cut; {
		cut = false
		for _, end := range []string{" HOT FORMED", " COLD FORMED", " HOT", " COLD", " FORMED", " HF", " CF", " MM", "MM", " IN"} {
			if rest, ok := strings.CutSuffix(s, end); ok && rest != "" {
				s, cut = rest, true
				w.hot = w.hot || strings.HasPrefix(end, " HO") || end == " HF"
				if end == " IN" {
					scale = 25.4
				}
			}
		}
	}
	i := strings.IndexAny(s, "0123456789.")
	if i < 0 {
		return w, fault("write a family and its sizes, for instance SHS 100x100x6 or UPN 200", "%q has no sizes", word)
	}
	w.family = strings.TrimSpace(s[:i])
	if f, ok := sameFamily[w.family]; ok {
		w.family = f
	}
	for _, part := range strings.Split(s[i:], "X") {
		n, ok := sizeNumber(strings.TrimSpace(part))
		if !ok {
			hint := "write sizes with a point and an x between them, for instance CHS 48.3x3.2"
			return w, fault(hint, "%q: %q is not a size", word, strings.ToLower(part))
		}
		w.n = append(w.n, math.Round(n*scale*1000)/1000)
	}
	return w, nil
}

// sizeNumber reads "6.3", "1/4" and "1-1/2" or "1 1/2".
func sizeNumber(s string) (float64, bool) {
	whole := 0.0
	if i := strings.IndexAny(s, "- "); i > 0 && strings.Contains(s[i:], "/") {
		v, ok := decimal(s[:i])
		if !ok {
			return 0, false
		}
		whole, s = v, s[i+1:]
	}
	top, bottom, two := strings.Cut(s, "/")
	a, ok := decimal(top)
	if !ok {
		return 0, false
	}
	if two {
		b, ok := decimal(bottom)
		if !ok || b == 0 {
			return 0, false
		}
		a /= b
	}
	return whole + a, true
}

// decimal reads plain digits with at most one point: no sign, exponent, "inf" or "nan".
func decimal(s string) (float64, bool) {
	if s == "" || len(s) > 12 || strings.Trim(s, "0123456789.") != "" {
		return 0, false
	}
	v, err := strconv.ParseFloat(s, 64)
	return v, err == nil
}

func tableFamily(name string) (family, bool) {
	for _, f := range families {
		if f.name == name {
			return f, true
		}
	}
	return family{}, false
}

func familyWords() []string {
	var out []string
	for _, f := range families {
		out = append(out, f.name)
	}
	return append(out, "SHS", "RHS", "CHS", "L", "FL", "RB", "SB", "HEX", "OCT", "UB", "UC", "PFC", "W", "C", "HSS", "PLATE", "FLOOR PLATE")
}

// lookUp finds one size of a table family, or names the sizes on both sides.
func lookUp(f family, w sectionWord) (Section, error) {
	if len(w.n) != 1 {
		return Section{}, fault("write "+f.name+" and its height alone, for instance "+f.name+" 200", "%q has %d sizes, %s takes 1", w.said, len(w.n), f.name)
	}
	below, above := math.Inf(-1), math.Inf(1)
	for _, r := range f.rows {
		if r.size == w.n[0] {
			return f.section(r), nil
		}
		if r.size < w.n[0] {
			below = r.size
		} else if math.IsInf(above, 1) {
			above = r.size
		}
	}
	var sizes []string
	for _, v := range []float64{below, above} {
		if !math.IsInf(v, 0) {
			sizes = append(sizes, f.name+" "+num(v))
		}
	}
	return Section{}, fault("nearest are "+strings.Join(sizes, " and "), "%q is not in the table of %s", w.said, f.name)
}
