package clean

import "strings"

// units are what may stand behind a number without being parted from it.
var units = map[string]bool{"h": true, "min": true, "d": true, "mm": true, "m": true, "kg": true, "g": true, "t": true, "%": true,
	"°C": true, "C": true, "L": true, "m2": true, "kVA": true, "um": true, "m/s": true, "K": true, "kJ/mm": true, "A": true, "V": true}

// Words splits text at blanks for wrapping, but keeps a number with the unit behind it.
func Words(text string) []string {
	var out []string
	for _, w := range strings.Fields(text) {
		if n := len(out); n > 0 && units[strings.TrimRight(w, ".,;:)]")] {
			if last := out[n-1]; last[len(last)-1] >= '0' && last[len(last)-1] <= '9' {
				out[n-1] += " " + w
				continue
			}
		}
		out = append(out, w)
	}
	return out
}
