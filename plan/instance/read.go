package instance

import (
	"fmt"
	"os"
	"path/filepath"
	"strconv"
	"strings"
)

// Largest number of activities, lags and units that a file may hold: far above any published
// set, so that a damaged file is refused instead of filling the memory.
const (
	mostActivities = 100_000
	mostUnits      = 1 << 28
)

// Read reads a `.sm`, `.sch` or `.rcp` file, told apart by the ending.
func Read(path string) (*Instance, error) {
	data, err := os.ReadFile(path)
	if err != nil {
		return nil, err
	}
	base := filepath.Base(path)
	ext := strings.ToLower(filepath.Ext(base))
	name := strings.TrimSuffix(base, filepath.Ext(base))
	return Parse(name, ext, string(data))
}

// Parse reads the text of an instance whose file ends in ext (".sm", ".sch", ".rcp"). On an
// error the result is nil and the message says where.
func Parse(name, ext, text string) (*Instance, error) {
	in := &Instance{Name: name}
	var err error
	switch ext {
	case ".sm":
		err = in.parseSM(text)
	case ".sch":
		err = in.parseSch(text)
	case ".rcp":
		err = in.parseRcp(text)
	default:
		return nil, fmt.Errorf("%s: cannot read %q files: give a .sm, .sch or .rcp file", name, ext)
	}
	if err == nil {
		err = in.sound()
	}
	if err != nil {
		return nil, fmt.Errorf("%s%s: %w", name, ext, err)
	}
	return in, nil
}

// sound says whether the numbers make an instance.
func (in *Instance) sound() error {
	n := len(in.Length)
	if n == 0 {
		return fmt.Errorf("no activities")
	}
	total := 0
	for i, d := range in.Length {
		if d < 0 || d > mostUnits {
			return fmt.Errorf("activity %d: length %d is not between 0 and %d", i, d, mostUnits)
		}
		if len(in.Demand[i]) != len(in.Capacity) {
			return fmt.Errorf("activity %d: %d demands for %d resources", i, len(in.Demand[i]), len(in.Capacity))
		}
		for k, r := range in.Demand[i] {
			if r < 0 || r > mostUnits {
				return fmt.Errorf("activity %d: demand %d for resource %d is not between 0 and %d", i, r, k+1, mostUnits)
			}
		}
		total += d
	}
	for k, c := range in.Capacity {
		if c < 0 || c > mostUnits {
			return fmt.Errorf("resource %d: capacity %d is not between 0 and %d", k+1, c, mostUnits)
		}
	}
	for _, l := range in.Lags {
		if l.From < 0 || l.From >= n || l.To < 0 || l.To >= n {
			return fmt.Errorf("a lag runs from activity %d to %d, but there are only 0 to %d", l.From, l.To, n-1)
		}
		if l.Min < -mostUnits || l.Min > mostUnits {
			return fmt.Errorf("a lag of %d from activity %d to %d is out of reach", l.Min, l.From, l.To)
		}
	}
	if h := in.Horizon(); total > mostUnits || h > mostUnits {
		return fmt.Errorf("the lengths and lags add up to %d, more than %d", h, mostUnits)
	}
	return nil
}

// numbers reads the whole numbers of a line, with everything else a fault.
func numbers(line string) ([]int, error) {
	var out []int
	for _, w := range strings.Fields(line) {
		v, err := strconv.Atoi(w)
		if err != nil {
			return nil, fmt.Errorf("%q is not a whole number", w)
		}
		out = append(out, v)
	}
	return out, nil
}
