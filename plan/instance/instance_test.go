package instance

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"sailby/plan/problem"
)

// Three small instances of our own in the three formats. One resource of 2; a (3 long, takes 2),
// b (2, takes 1) and c (2, takes 1) between a source and a sink; c follows a.
const smallSM = `************************************************************************
jobs (incl. supersource/sink ):  5
************************************************************************
PRECEDENCE RELATIONS:
jobnr.    #modes  #successors   successors
   1        1          2           2   3
   2        1          1           4
   3        1          1           5
   4        1          1           5
   5        1          0
************************************************************************
REQUESTS/DURATIONS:
jobnr. mode duration  R 1
------------------------------------------------------------------------
  1      1     0       0
  2      1     3       2
  3      1     2       1
  4      1     2       1
  5      1     0       0
************************************************************************
RESOURCEAVAILABILITIES:
  R 1
    2
************************************************************************
`

// The same, where c also starts at most 4 after a.
const smallMax = `3	1	0	0
0	1	2	1	2	[0]	[0]
1	1	1	3	[3]
2	1	1	4	[2]
3	1	2	4	1	[2]	[-4]
4	1	0
0	1	0	0
1	1	3	2
2	1	2	1
3	1	2	1
4	1	0	0
2
`

const smallRcp = "5 1\n2\n0 0 2 2 3\n3 2 1 4\n2 1 1 5\n2 1 1 5\n0 0 0\n"

func TestFormats(t *testing.T) {
	for ext, text := range map[string]string{".sm": smallSM, ".sch": smallMax, ".rcp": smallRcp} {
		in, err := Parse("small", ext, text)
		if err != nil {
			t.Errorf("%s: %v", ext, err)
			continue
		}
		if len(in.Length) != 5 || in.Length[1] != 3 || in.Demand[1][0] != 2 || in.Capacity[0] != 2 {
			t.Errorf("%s: read as %+v", ext, in)
		}
		lags := 5
		if ext == ".sch" {
			lags = 6
		}
		if len(in.Lags) != lags {
			t.Errorf("%s: %d lags, want %d", ext, len(in.Lags), lags)
		}
		if err := in.Check([]int{0, 0, 3, 3, 5}); err != nil {
			t.Errorf("%s: a good schedule is refused: %v", ext, err)
		}
		if h := in.Horizon(); h < 7 {
			t.Errorf("%s: horizon %d is below the finish of a schedule one after the other", ext, h)
		}
		p := in.Problem()
		if len(p.Acts) != 5 || len(p.Res) != 1 || len(p.Links) != lags || p.End != in.Horizon() {
			t.Errorf("%s: a problem with %d activities, %d resources, %d links", ext, len(p.Acts), len(p.Res), len(p.Links))
		}
		if f := p.Acts[1].Modes[0].Time.Finish(2); f != 5 || p.Acts[1].By > p.End || p.Acts[1].By < problem.Inf && p.Acts[1].By != p.End {
			t.Errorf("%s: activity 1 begun at 2 finishes at %d, want 5", ext, f)
		}
	}
}

func TestCheckRefuses(t *testing.T) {
	in, err := Parse("small", ".sch", smallMax)
	if err != nil {
		t.Fatal(err)
	}
	for want, starts := range map[string][]int{
		"resource 1 is used 3 times": {0, 0, 0, 3, 5},
		"wants 3 between":            {0, 0, 3, 2, 5},
		"wants -4 between":           {0, 0, 3, 5, 7},
		"before 0":                   {0, -1, 3, 3, 5},
		"3 starts for 5":             {0, 0, 3},
	} {
		if err := in.Check(starts); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%v: error %v, want one with %q", starts, err, want)
		}
	}
}

func TestFaults(t *testing.T) {
	for _, c := range []struct{ ext, text, want string }{
		{".txt", smallSM, "cannot read"},
		{".sm", "", "no activities"},
		{".sm", strings.Replace(smallSM, "  2      1     3", "  2      1    -3", 1), "length -3"},
		{".sm", strings.Replace(smallSM, "   2        1          1           4", "   2        1          2           4", 1), "successors"},
		{".sm", strings.Replace(smallSM, "  2      1     3       2", "  2      1     3       x", 1), "whole number"},
		{".sm", strings.Replace(smallSM, "           5\n", "           9\n", 1), "there are only"},
		{".sch", "", "empty"},
		{".sch", "3 1\n0 1 0\n", "lines"},
		{".sch", strings.Replace(smallMax, "[3]", "", 1), "as many lags"},
		{".sch", strings.Replace(smallMax, "[3]", "[999999999999]", 1), "out of reach"},
		{".rcp", "5 1 2 0", "too early"},
		{".rcp", "-4 1", "cannot be"},
		{".rcp", "two", "whole number"},
	} {
		in, err := Parse("bad", c.ext, c.text)
		if err == nil || in != nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: error %v, want one with %q and no instance", c.ext, err, c.want)
		}
	}
}

func FuzzParse(f *testing.F) {
	f.Add(".sm", smallSM)
	f.Add(".sch", smallMax)
	f.Add(".rcp", smallRcp)
	f.Fuzz(func(t *testing.T, ext, text string) {
		in, err := Parse("f", ext, text)
		if (err == nil) != (in != nil) {
			t.Fatal("an instance with an error, or neither")
		}
		if err == nil {
			in.Problem()
			in.Check(make([]int, len(in.Length)))
		}
	})
}

// TestOpenSets reads every instance of the published sets where they are at hand.
func TestOpenSets(t *testing.T) {
	dir := os.Getenv("SAILBY_SHARED")
	if dir == "" {
		dir = filepath.Join("..", "..", "..", "shared")
	}
	files, _ := filepath.Glob(filepath.Join(dir, "data", "*", "*", "*.s*"))
	upper, _ := filepath.Glob(filepath.Join(dir, "data", "*", "*", "*.SCH"))
	files = append(files, upper...)
	if len(files) == 0 {
		t.Skip("the open instances are not beside the project; SAILBY_SHARED says where they are")
	}
	for _, path := range files {
		in, err := Read(path)
		if err != nil {
			t.Errorf("%v", err)
			continue
		}
		if n := len(in.Length); n < 12 || in.Length[0] != 0 || in.Length[n-1] != 0 {
			t.Errorf("%s: %d activities, no source or no sink", path, n)
		}
	}
}
