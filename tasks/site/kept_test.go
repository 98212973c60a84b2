package site_test

import (
	"os"
	"strconv"
	"strings"
	"testing"

	"sailby/tasks/site"
)

// row is a line of a file of reference values kept in testdata.
type row struct {
	t     *testing.T
	cells []string
}

func (r row) number(i int) float64 {
	r.t.Helper()
	v, err := strconv.ParseFloat(r.cells[i], 64)
	if err != nil {
		r.t.Fatal(err)
	}
	return v
}

// kept reads such a file; its head names the command that made it, which is asked for here.
func kept(t *testing.T, file string) (out []row) {
	t.Helper()
	data, err := os.ReadFile("testdata/" + file)
	if err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(string(data), "# npm install ") || !strings.Contains(string(data), " > "+file) {
		t.Errorf("%s does not say how it was made", file)
	}
	lines := strings.Split(strings.TrimSpace(string(data)), "\n")
	for _, line := range lines[3:] { // two of remarks, one of names
		out = append(out, row{t, strings.Split(line, ",")})
	}
	return out
}

// constituents reads names, amplitudes and phases in turn.
func constituents(text string) (out []site.Constituent) {
	f := strings.Fields(text)
	for i := 0; i+2 < len(f); i += 3 {
		a, _ := strconv.ParseFloat(f[i+1], 64)
		g, _ := strconv.ParseFloat(f[i+2], 64)
		out = append(out, site.Constituent{Name: f[i], Amplitude: a, Phase: g})
	}
	return out
}
