package site

import (
	"bytes"
	"fmt"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/quantity"
)

// boston is NOAA tide tables, Table 1, Boston, 19 April 2004, as printed: EST, feet above MLLW.
const boston = `# zone: UTC-5
# datum: MLLW
time,height ft,water
2004-04-19 04:56,-0.1,LW
2004-04-19 11:11,10.0,HW
2004-04-19 17:10,0.5,LW
2004-04-19 23:22,10.4,HW
`

// port is an invented port: Z0 2.6 m, M2 1.40/30, S2 0.50/70, K1 0.12/180, O1 0.10/20; waters of
// 13 to 19 April 2026 as an independent harmonic sum gives them (within a minute, 3 mm).
const port = `# zone: UTC
# datum: chart
2026-04-13 04:34,1.775,LW
2026-04-13 10:32,3.658,HW
2026-04-13 16:57,1.191,LW
2026-04-13 23:25,3.895,HW
2026-04-14 05:29,1.564,LW
2026-04-14 11:27,3.869,HW
2026-04-14 17:46,0.975,LW
2026-04-15 00:10,4.109,HW
2026-04-15 06:14,1.345,LW
2026-04-15 12:13,4.079,HW
2026-04-15 18:30,0.792,LW
2026-04-16 00:50,4.285,HW
2026-04-16 06:54,1.148,LW
2026-04-16 12:54,4.256,HW
2026-04-16 19:09,0.666,LW
2026-04-17 01:27,4.409,HW
2026-04-17 07:31,0.993,LW
2026-04-17 13:33,4.377,HW
2026-04-17 19:47,0.611,LW
2026-04-18 02:02,4.471,HW
2026-04-18 08:07,0.891,LW
2026-04-18 14:11,4.431,HW
2026-04-18 20:23,0.632,LW
2026-04-19 02:37,4.468,HW
2026-04-19 08:43,0.849,LW
2026-04-19 14:49,4.411,HW
2026-04-19 21:00,0.730,LW
`

func table(t testing.TB, text string) *TideTable {
	t.Helper()
	tt, err := ReadTideTable("port.csv", strings.NewReader(text))
	if err != nil {
		t.Fatal(err)
	}
	return tt
}

func TestPublishedTable(t *testing.T) {
	tt := table(t, boston)
	if tt.Datum != "MLLW" || tt.Zone != "UTC-5" || len(tt.Waters) != 4 || tt.NotForSafety {
		t.Fatalf("head or rows wrong: %+v", tt)
	}
	if h, ok := tt.Height(utc(t, "2004-04-19 16:11")); !ok || math.Abs(h-3.048) > 1e-9 { // 11:11 EST, 10.0 ft
		t.Errorf("high water %.4f m, want 10.0 ft = 3.048 m", h)
	}
	// Half time is half height by the cosine and by the rule of twelfths alike: 5.25 ft.
	if h, _ := tt.Height(utc(t, "2004-04-19 19:10")); math.Abs(h/0.3048-5.25) > 0.05 {
		t.Errorf("half tide %.2f ft, want 5.25", h/0.3048)
	}
}

func TestSubordinatePort(t *testing.T) {
	// Rainsford Island from NOAA Table 2: heights x 0.95, high water +0, low water +2 min. Published
	// worked example: 14:00, about three hours after high water, 5.0 ft by twelfths; the cosine on
	// the same waters gives 5.4 ft (arithmetic), as 14:00 is only 2 h 49 min after it.
	tt := table(t, "# zone: UTC-5\n# datum: MLLW\n2004-04-19 11:11,9.5 ft,HW\n2004-04-19 17:12,0.475 ft,LW\n")
	h, ok := tt.Height(utc(t, "2004-04-19 19:00"))
	if ft := h / 0.3048; !ok || math.Abs(ft-5.4) > 0.05 {
		t.Errorf("14:00 %.2f ft, want 5.4", ft)
	}
	if h, _ := tt.Height(utc(t, "2004-04-19 19:11")); math.Abs(h/0.3048-5.0) > 0.05 {
		t.Errorf("three hours after high water %.2f ft, twelfths say 5.0", h/0.3048)
	}
}

func TestTwelfths(t *testing.T) {
	// Rule of twelfths, cumulative 1, 3, 6, 9, 11, 12 twelfths in the six sixths of a tide; half a cosine
	// gives .067 .25 .5 .75 .933 1.
	tt := table(t, "# zone: UTC\n# datum: chart\n2026-04-13 00:00,0,LW\n2026-04-13 06:00,1,HW\n")
	twelfths := []float64{1, 3, 6, 9, 11, 12}
	cosine := []float64{.067, .25, .5, .75, .933, 1}
	for i := range twelfths {
		h, ok := tt.Height(utc(t, "2026-04-13") + Minute(i+1)*60)
		if !ok || math.Abs(h-cosine[i]) > 0.0005 || math.Abs(h-twelfths[i]/12) > 0.017 {
			t.Errorf("hour %d: %.4f, cosine %.3f, twelfths %.3f", i+1, h, cosine[i], twelfths[i]/12)
		}
	}
}

func TestAccessWindow(t *testing.T) {
	// One tide of 12.42 h, mean 2.6 m, amplitude 2.0 m, is at or above 4.0 m for
	// 12.42/180 x acos((4.0-2.6)/2.0) in degrees = 3.145 h (arithmetic).
	tt := table(t, "# zone: UTC\n# datum: chart\n2026-04-13 00:00,0.6,LW\n2026-04-13 06:13,4.6,HW\n2026-04-13 12:25,0.6,LW\n")
	from, to := utc(t, "2026-04-13"), utc(t, "2026-04-13 12:25")
	open, err := tt.Reach(false, 4.0, from, to)
	if err != nil || len(open) != 1 {
		t.Fatalf("want one window, have %v, %v", open, err)
	}
	if got := float64(open[0].To-open[0].From) / 60; got > 3.145 || got < 3.145-2.0/60-0.003 {
		t.Errorf("window %.3f h, want 3.145 h less the broken minutes at the ends", got)
	}
	below, _ := tt.Reach(true, 4.0, from, to)
	if len(below) != 2 || below[0].To > open[0].From || open[0].From-below[0].To > 1 || below[1].From-open[0].To > 1 {
		t.Errorf("below %v does not meet above %v within a minute", below, open)
	}
}

func TestReachAtTheEdges(t *testing.T) {
	tt := table(t, port)
	first, last := tt.Waters[0].At, tt.Waters[len(tt.Waters)-1].At
	if open, err := tt.Reach(true, 9, first, last); err != nil || len(open) != 1 || open[0] != (Span{From: first, To: last}) {
		t.Errorf("never covered: want the whole span, have %v, %v", open, err)
	}
	if open, err := tt.Reach(true, 0, first, last); err != nil || open != nil {
		t.Errorf("always covered: want nothing, have %v, %v", open, err)
	}
	shut, _ := tt.Shut(true, 0, first, last)
	if len(shut) != 1 || shut[0].Why != "water up to 4.47 m, must be below 0.00 m" {
		t.Errorf("reason: %v", shut)
	}
	if shut, _ := tt.Shut(false, 4.2, first, first+day); len(shut) != 1 || shut[0].Why != "water down to 1.19 m, must be 4.20 m or more" {
		t.Errorf("reason: %v", shut)
	}
	for _, s := range [][2]Minute{{first - 1, last}, {first, last + 1}, {last + 10, last + 20}, {first - 20, first - 10}} {
		_, err := tt.Reach(true, 1, s[0], s[1])
		if err == nil || !strings.Contains(err.Error(), "it runs from 2026-04-13 04:34 UTC to 2026-04-19 21:00 UTC") {
			t.Errorf("span %v beyond the table: %v", s, err)
		}
	}
	for _, level := range []float64{math.NaN(), math.Inf(1)} {
		if _, err := tt.Reach(true, level, first, last); err == nil {
			t.Errorf("took level %v", level)
		}
	}
	if _, err := tt.Reach(true, 1, last, first); err == nil {
		t.Error("took a span that runs backwards")
	}
	if _, err := (&TideTable{}).Reach(true, 1, 0, 10); err == nil {
		t.Error("an empty table answered")
	}
}

func TestHoleInTheTable(t *testing.T) {
	lines := strings.SplitAfter(port, "\n")
	tt := table(t, strings.Join(append(lines[:8:8], lines[11:]...), "")) // 14 April 11:27 up to 15 April 12:13 missing between
	if len(tt.Notes) != 1 || !strings.Contains(tt.Notes[0], "nothing is known of the 24 h 46 min before") {
		t.Fatalf("notes %q", tt.Notes)
	}
	hole := utc(t, "2026-04-14 20:00")
	if _, ok := tt.Height(hole); ok || tt.Clear(true, 99, hole) {
		t.Error("a height in the hole")
	}
	_, err := tt.Reach(true, 1, tt.Waters[0].At, tt.Waters[len(tt.Waters)-1].At)
	if err == nil || !strings.Contains(err.Error(), "no water between 2026-04-14 11:27 UTC and 2026-04-15 12:13 UTC") {
		t.Errorf("the hole is not named: %v", err)
	}
	if _, err := tt.Reach(true, 1, tt.Waters[0].At, utc(t, "2026-04-14 11:27")); err != nil {
		t.Errorf("before the hole: %v", err)
	}
}

func TestReachLaws(t *testing.T) {
	tt := table(t, port)
	rapid.Check(t, func(t *rapid.T) {
		level := rapid.Float64Range(0, 5).Draw(t, "level")
		below := rapid.Bool().Draw(t, "below")
		last := tt.Waters[len(tt.Waters)-1].At
		from := rapid.Int64Range(tt.Waters[0].At, last-1).Draw(t, "from")
		to := rapid.Int64Range(from+1, last).Draw(t, "to")
		open, err := tt.Reach(below, level, from, to)
		if err != nil {
			t.Fatal(err)
		}
		shut, _ := tt.Shut(below, level, from, to)
		inside := make([]int, to-from)
		for k, spans := range [][]Span{open, shut} {
			for i, s := range spans {
				if i > 0 && spans[i-1].To >= s.From {
					t.Fatalf("spans touch: %v", spans)
				}
				for m := s.From; m < s.To; m++ {
					inside[m-from] += 1 + 10*k
				}
			}
		}
		for m := from; m < to; m++ {
			want := 10 + 1
			if tt.Clear(below, level, m) {
				want = 1
			}
			if inside[m-from] != want {
				t.Fatalf("minute %d is in %d, want %d (1 open, 11 shut)", m, inside[m-from], want)
			}
		}
	})
}

func TestHeightBetweenNeighbours(t *testing.T) {
	tt := table(t, port)
	rapid.Check(t, func(t *rapid.T) {
		i := rapid.IntRange(1, len(tt.Waters)-1).Draw(t, "i")
		a, b := tt.Waters[i-1], tt.Waters[i]
		m := rapid.Int64Range(a.At, b.At).Draw(t, "m")
		h, ok := tt.Height(m)
		if !ok || h < min(a.Metres, b.Metres)-1e-12 || h > max(a.Metres, b.Metres)+1e-12 {
			t.Fatalf("height %v outside %v and %v", h, a, b)
		}
	})
}

func TestHeightFigure(t *testing.T) {
	tt := table(t, boston)
	f, err := tt.Figure(utc(t, "2004-04-19 19:00"))
	if err != nil || len(f.From) != 2 || f.From[0].Origin.String() != "port.csv:5" || f.From[1].Origin.Line != 6 {
		t.Errorf("figure %+v, %v", f, err)
	}
	if _, err := tt.Figure(0); err == nil {
		t.Error("a figure outside the table")
	}
}

func TestTideFaults(t *testing.T) {
	const head = "# zone: UTC\n# datum: chart\n"
	for _, c := range []struct{ why, text, want string }{
		{"no zone", "# datum: chart\n2026-04-13 04:34,1.8,LW\n", `port.csv:1:1: does not state its zone`},
		{"no datum", "# zone: UTC\n2026-04-13 04:34,1.8,LW\n", `port.csv:1:1: does not state its datum`},
		{"empty datum", "# zone: UTC\n# datum:\n2026-04-13 04:34,1.8,LW\n", `port.csv:2:9: datum "" says nothing`},
		{"short zone", "# zone: BST\n# datum: chart\n", `port.csv:1:9: zone "BST" is not known`},
		{"two zones", "# zone: UTC\n# zone: UTC+1\n# datum: chart\n", `port.csv:2:9: zone is stated a second time, first in line 1`},
		{"zone below", "# datum: chart\n2026-04-13 04:34,1.8,LW\n# zone: UTC\n", `port.csv:3:9: zone stands below the first row`},
		{"comma", head + "2026-04-13 04:34,1,8,LW\n", `port.csv:3:22: 4 fields where 3 was expected`},
		{"semicolons", head + "2026-04-13 04:34;1,8;LW\n", `commas between and points in numbers`},
		{"date", head + "13/04/2026 04:34,1.8,LW\n", `port.csv:3:1: "13/04/2026 04:34" is not a date and time`},
		{"height", head + "2026-04-13 04:34,deep,LW\n", `port.csv:3:18: "deep" is not a height`},
		{"feet as metres", head + "2026-04-13 04:34,  38.2,HW\n", `port.csv:3:20: height "38.2" is beyond any tide`},
		{"word", head + "2026-04-13 04:34,1.8,ebb\n", `port.csv:3:22: "ebb" is neither HW nor LW`},
		{"order", head + "2026-04-13 04:34,1.8,LW\n2026-04-13 04:34,3.8,HW\n", `port.csv:4:1: "2026-04-13 04:34" is not after the water before it (line 3)`},
		{"twice", head + "2026-04-13 04:34,1.8,LW\n2026-04-13 16:34,1.7,LW\n", `port.csv:4:22: LW follows LW (line 3)`},
		{"upside down", head + "2026-04-13 04:34,1.8,LW\n2026-04-13 10:34,1.7,HW\n", `port.csv:4:18: HW of 1.700 m does not fit the LW of 1.800 m`},
		{"column", head + "time,depth,water\n", `port.csv:3:6: column "depth" is not height m`},
		{"one row", head + "2026-04-13 04:34,1.8,LW\n", `port.csv:3:1: 1 waters make no tide`},
		{"skipped hour", "# zone: Europe/London\n# datum: chart\n2026-03-29 01:30,1.8,LW\n", `clocks go forward over it`},
		{"bytes", "\xff\xfe", `port.csv:1:1: is not plain UTF-8 text`},
		{"size", strings.Repeat("#", maxBytes+1), `port.csv:1:1: is larger than 1024 kB`},
		{"empty", "", `port.csv:1:1: does not state its zone`},
	} {
		tt, err := ReadTideTable("port.csv", strings.NewReader(c.text))
		if tt != nil || err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: want %q in\n%v", c.why, c.want, err)
		}
	}
	_, err := ReadTideTable("p", strings.NewReader("# zone: BST\n2026-04-13 04:34,x,LW\ny,1,LW\n"))
	if fs, ok := err.(Faults); !ok || len(fs) != 4 || fs[3].Line != 3 || fs[1].Hint != zoneHint {
		t.Errorf("want four faults in order of line, have %v", err)
	}
	if fs := err.(Faults); quantity.Hint(fs[1]) != zoneHint {
		t.Errorf("no way out in %v", fs[1])
	}
	_, err = ReadTideTable("p", strings.NewReader("# zone: UTC\n# datum: x\n"+strings.Repeat("long ", 1000)+",1,HW\n"))
	if s := err.Error(); len(s) > 200 || !strings.Contains(s, `long ..."`) {
		t.Errorf("a long word is not cut: %s", s)
	}
	_, err = ReadTideTable("p", strings.NewReader(strings.Repeat("x\n", 100)))
	if fs := err.(Faults); len(fs) != maxFaults+1 || fs[maxFaults].Problem != "and 82 more faults" {
		t.Errorf("want the faults cut, have %d, last %v", len(fs), fs[len(fs)-1])
	}
	_, err = ReadTideTable("p", strings.NewReader(strings.Repeat("x\n", maxRows+2)))
	if err == nil {
		t.Error("took more rows than the limit")
	}
}

func TestTideZones(t *testing.T) {
	for _, c := range []struct{ zone, local, want string }{
		{"UTC", "2026-04-13 04:34", "2026-04-13 04:34"},
		{"gmt", "2026-04-13 04:34", "2026-04-13 04:34"},
		{"UTC+1", "2026-04-13 04:34", "2026-04-13 03:34"},
		{"UTC -03:30", "2026-04-13 04:34", "2026-04-13 08:04"},
		{"UTC+0530", "2026-04-13T04:34", "2026-04-12 23:04"},
		{"Europe/London", "2026-04-13 04:34", "2026-04-13 03:34"},
		{"Europe/London", "2026-10-25 01:30", "2026-10-25 00:30"}, // happens twice: the earlier
		{"Europe/London", "2026-03-29 00:59", "2026-03-29 00:59"},
		{"Pacific/Auckland", "2026-04-13 04:34", "2026-04-12 16:34"},
		{"Africa/Monrovia", "1950-01-01 00:00", "1950-01-01 00:44"}, // then 44 min 30 s behind
	} {
		text := "# zone: " + c.zone + "\n# datum: chart\n" + c.local + ",1.8,LW\n2026-12-01 04:00,2,HW\n"
		tt := table(t, text)
		if tt.Waters[0].At != utc(t, c.want) {
			t.Errorf("%s %s is %s, want %s", c.local, c.zone, moment(tt.Waters[0].At), c.want)
		}
		if strings.HasPrefix(c.local, "2026-10-25") && !strings.Contains(tt.Notes[0], "port.csv:3: 2026-10-25 01:30 happens twice") {
			t.Errorf("no note for the repeated hour: %q", tt.Notes)
		}
	}
}

func TestWriteReadAgain(t *testing.T) {
	tt := table(t, boston)
	var b bytes.Buffer
	if err := tt.Write(&b); err != nil {
		t.Fatal(err)
	}
	again := table(t, b.String())
	for i, w := range again.Waters {
		w.Line = tt.Waters[i].Line
		if w != tt.Waters[i] {
			t.Errorf("%v came back as %v", tt.Waters[i], w)
		}
	}
}

func FuzzReadTideTable(f *testing.F) {
	f.Add(boston)
	f.Add(port)
	f.Add("# zone: Europe/London\n# datum: x\n\"2026-10-25 01:30\", -1 ft ,hw\r\n2026-10-25 09:00,-2.5 m,LW")
	f.Add("# zone: UTC+24\n# datum: ?\n,,,\n;;\n")
	f.Fuzz(func(t *testing.T, text string) {
		tt, err := ReadTideTable("f.csv", strings.NewReader(text))
		if err != nil {
			if fs, ok := err.(Faults); tt != nil || !ok || fs[0].Line < 1 || fs[0].Col < 1 || fs[0].Problem == "" {
				t.Fatalf("table %v with error %v", tt, err)
			}
			return
		}
		var b bytes.Buffer
		if err := tt.Write(&b); err != nil {
			t.Fatal(err)
		}
		again, err := ReadTideTable("f.csv", strings.NewReader(b.String()))
		if err != nil || len(again.Waters) != len(tt.Waters) || again.Datum != tt.Datum {
			t.Fatalf("does not read again: %v\n%s", err, b.String())
		}
		for i, w := range tt.Waters {
			v := again.Waters[i]
			if v.At != w.At || v.High != w.High || fmt.Sprintf("%.3f", v.Metres) != fmt.Sprintf("%.3f", w.Metres) {
				t.Fatalf("%v became %v", w, v)
			}
		}
		tt.Height(tt.Waters[0].At + 1)
	})
}
