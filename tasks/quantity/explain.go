package quantity

import (
	"fmt"
	"math"
	"strings"
)

func example(d Dim) string {
	if d == Number {
		return "write a number, for instance 3"
	}
	ex := map[Dim]string{Time: "4 h", Temperature: "10 C", Percent: "35 %", Length: "6 mm", Mass: "410 kg", Film: "100 um"}[d]
	if ex == "" {
		ex = "3 " + d.Base()
	}
	return fmt.Sprintf("write the unit after the number, for instance %s (units: %s)", ex, d.UnitList())
}

// explain says what is wrong with s as an amount of dimension d.
func explain(s string, d Dim) error {
	if i, thousands := comma(s); i > 0 {
		hint := "write " + s[:i] + "." + s[i+1:]
		if thousands {
			hint = fmt.Sprintf("write %s, or %s if a decimal is meant", s[:i]+s[i+1:], s[:i]+"."+s[i+1:])
		}
		return fault(ErrComma, hint, "%q has a decimal comma", s)
	}
	n, rest, ok := takeNumber(s)
	if !ok {
		return fault(nil, example(d), "expected %s, found %q", d, s)
	}
	rest = strings.TrimSpace(rest)
	if rest == "" {
		return fault(ErrNoUnit, example(d), "%q has no unit; expected %s in %s", s, d, d.UnitList())
	}
	if math.Abs(n) > maxMagnitude {
		return fault(nil, "", "%q is out of all proportion", s)
	}
	if d == Number {
		return fault(ErrUnit, "write a number alone", "expected a plain number, found %q", s)
	}
	if r := strings.TrimLeft(rest, "-–—"); r != rest && r != "" && numberEnd(strings.TrimSpace(r)) > 0 {
		return fault(ErrUnit, fmt.Sprintf("write a range with the word to: %s to %s", strings.TrimSpace(s[:len(s)-len(rest)]), strings.TrimSpace(r)), "%q has a dash between two numbers", s)
	}
	if u, ok := likeUnit(rest, d); ok {
		return fault(ErrUnit, fmt.Sprintf("did you mean %s?", strings.TrimSpace(s[:len(s)-len(rest)])+" "+u), "%q is not a unit for %s; expected %s", rest, d, d.UnitList())
	}
	return fault(ErrUnit, example(d), "%q is not a unit for %s; expected %s", rest, d, d.UnitList())
}

// comma finds the first comma between digits, 0 if there is none. Three digits and no more behind it
// may be thousands.
func comma(s string) (at int, thousands bool) {
	digit := func(i int) bool { return i >= 0 && i < len(s) && s[i] >= '0' && s[i] <= '9' }
	for i := range len(s) {
		if s[i] == ',' && digit(i-1) && digit(i+1) {
			return i, digit(i+2) && digit(i+3) && !digit(i+4)
		}
	}
	return 0, false
}
