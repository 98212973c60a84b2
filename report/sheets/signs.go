package sheets

import "regexp"

var signList = []struct {
	in  *regexp.Regexp
	out string
}{
	{regexp.MustCompile(`(\d) C\b`), "$1 °C"},
	{regexp.MustCompile(`(\d) um\b`), "$1 µm"},
	{regexp.MustCompile(`(\d m|\d mm|\d cm)2\b`), "$1²"},
	{regexp.MustCompile(`(\d m|\d mm|\d cm)3\b`), "$1³"},
}

// signs writes the units of figures as print has them: "6 m²", "147 µm", "5 °C". It is for text that
// the program made, never for names.
func signs(s string) string {
	for _, g := range signList {
		s = g.in.ReplaceAllString(s, g.out)
	}
	return s
}
