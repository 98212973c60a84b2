package site

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// bostonConstants are the National Ocean Service's for station 8443970 (metres, degrees on Greenwich);
// mean level above MLLW 1.586 m.
var bostonConstants = Harmonic{Name: "Boston", Datum: "MLLW", Mean: 1.586, Constituents: []Constituent{
	{"M2", 1.371, 109.2}, {"S2", .208, 146.2}, {"N2", .305, 76.7}, {"K1", .143, 205.6}, {"O1", .116, 187.1}, {"P1", .047, 204.8},
	{"K2", .059, 146.1}, {"Q1", .019, 172.1}, {"M4", .023, 29.0}, {"MS4", .009, 74}, {"NU2", .066, 84}, {"SA", .049, 136.3}, {"SSA", .022, 97.5}}}

// invented is the invented port of the table in tide_test.go.
var invented = Harmonic{Name: "invented port", Datum: "chart", Mean: 2.6, Constituents: []Constituent{
	{"M2", 1.40, 30}, {"S2", .50, 70}, {"K1", .12, 180}, {"O1", .10, 20}}}

func compare(t *testing.T, got, want []Water, minutes Minute, metres float64) {
	t.Helper()
	if len(got) != len(want) {
		t.Fatalf("%d waters, want %d: %v", len(got), len(want), got)
	}
	for i, w := range want {
		g := got[i]
		if off := g.At - w.At; g.High != w.High || off > minutes || off < -minutes || math.Abs(g.Metres-w.Metres) > metres+slack {
			t.Errorf("%v, want %v within %d min and %.3f m", g, w, minutes, metres)
		}
	}
}

func TestHarmonicAgainstPublishedBoston(t *testing.T) {
	// NOAA tide tables, Table 1, Boston, 19 April 2004. With 13 of 37 constituents the tolerance is
	// 5 min and 5 cm; one-term node factors come to 6 min and 9 cm.
	want := table(t, boston)
	got, err := bostonConstants.Table(want.Waters[0].At-60, want.Waters[3].At+60)
	if err != nil {
		t.Fatal(err)
	}
	compare(t, got.Between(want.Waters[0].At-60, want.Waters[3].At+60), want.Waters, 5, 0.05)
	if !got.NotForSafety || len(got.Notes) != 1 || !strings.Contains(got.Notes[0], "not for safety") {
		t.Error("not marked as not for safety")
	}
}

func TestHarmonicInventedPort(t *testing.T) {
	want := table(t, port)
	first, last := want.Waters[0].At, want.Waters[len(want.Waters)-1].At
	got, err := invented.Table(first, last)
	if err != nil {
		t.Fatal(err)
	}
	compare(t, got.Between(first-2, last+3), want.Waters, 1, 0.003)
}

func TestHarmonicMoonOnly(t *testing.T) {
	// M2 alone, H 1, g 0, on 15 April 2026, by an independent sum: L 04:27:56, H 10:40:33, L 16:53:10, H 23:05:46,
	// +/-0.9666 m.
	h := Harmonic{Name: "moon", Datum: "mean", Constituents: []Constituent{{"M2", 1, 0}}}
	from := utc(t, "2026-04-15")
	got, err := h.Table(from, from+day)
	if err != nil {
		t.Fatal(err)
	}
	var want []Water
	for i, text := range []string{"04:27:56", "10:40:33", "16:53:10", "23:05:46"} {
		want = append(want, Water{At: Minute(math.Round(exact(t, "2026-04-15 "+text))), Metres: []float64{-.9666, .9666}[i%2], High: i%2 == 1})
	}
	compare(t, got.Between(from, from+day), want, 1, 0.001)
}

func TestSpeedsAndArguments(t *testing.T) {
	// Published speeds, degrees an hour (table of constituents, National Ocean Service).
	for name, want := range map[string]float64{"M2": 28.984104, "S2": 30, "N2": 28.43973, "K1": 15.041069, "O1": 13.943035,
		"P1": 14.958931, "Q1": 13.398661, "K2": 30.082138, "M4": 57.968208, "MS4": 58.984104, "NU2": 28.512583, "SA": 0.0410686} {
		near(t, "speed of "+name, arguments[name].speed(), want, 0.000006)
	}
	// An independent sum at 2026-04-15 00:00 UTC.
	m := float64(utc(t, "2026-04-15"))
	l := longitudesAt(m)
	turn := func(v float64) float64 { return math.Mod(math.Mod(v, 360)+360, 360) }
	for name, v := range map[string][2]float64{"s": {l.s, 358.31}, "h": {l.h, 23.17}, "p": {l.p, 72.88}, "N": {l.n, 336.66}, "p1": {l.p1, 283.39}} {
		near(t, name, turn(v[0]), v[1], 0.6)
	}
	for name, want := range map[string]float64{"M2": 49.7, "K1": 113.2, "O1": 296.6} {
		near(t, "V0 of "+name, turn(arguments[name].at(m, l)), want, 0.1)
	}
	// One-term node factors (f 1.009 + 0.187 cos N and so on) differ from the full ones by 0.01 and a degree.
	for k, want := range map[family][2]float64{moon2: {.966, .83}, k1: {1.112, 3.5}, lunar1: {1.181, -4.3}, steady: {1, 0}} {
		f, u := k.node(orbitAt(l))
		near(t, "node factor", f, want[0], 0.011)
		near(t, "node shift", u, want[1], 1)
	}
}

func TestHarmonicLaws(t *testing.T) {
	names := ConstituentNames()
	rapid.Check(t, func(t *rapid.T) {
		h := Harmonic{Name: "drawn", Datum: "d", Mean: 3, Constituents: []Constituent{{"M2", rapid.Float64Range(0.5, 4).Draw(t, "m2"), rapid.Float64Range(0, 360).Draw(t, "g2")}}}
		sum := h.Constituents[0].Amplitude
		for _, n := range rapid.SliceOfNDistinct(rapid.SampledFrom(names), 0, 8, rapid.ID[string]).Draw(t, "names") {
			if n != "M2" {
				c := Constituent{n, rapid.Float64Range(0, 0.8).Draw(t, "H"), rapid.Float64Range(-180, 360).Draw(t, "g")}
				h.Constituents, sum = append(h.Constituents, c), sum+c.Amplitude
			}
		}
		from := rapid.Int64Range(0, 70*366*day).Draw(t, "from")
		tt, err := h.Table(from, from+3*day)
		if err != nil {
			return // a tide that hardly turns may be refused; it must not be wrong
		}
		for i, w := range tt.Waters {
			if math.Abs(w.Metres-3) > 1.45*sum+0.001 {
				t.Fatalf("%v is higher than all constituents together, %v", w, sum)
			}
			if i > 0 && (w.High == tt.Waters[i-1].High || w.At <= tt.Waters[i-1].At || w.High != (w.Metres > tt.Waters[i-1].Metres)) {
				t.Fatalf("waters out of turn: %v after %v", w, tt.Waters[i-1])
			}
		}
		if tt.Waters[0].At > from || tt.Waters[len(tt.Waters)-1].At < from+3*day {
			t.Fatal("the table does not reach over the time asked for")
		}
	})
}

func TestHarmonicRefuses(t *testing.T) {
	nan := math.NaN()
	with := func(f func(*Harmonic)) Harmonic {
		h := invented
		h.Constituents = append([]Constituent(nil), invented.Constituents...)
		f(&h)
		return h
	}
	from := utc(t, "2026-04-15")
	for i, h := range []Harmonic{{}, with(func(h *Harmonic) { h.Datum = "" }), with(func(h *Harmonic) { h.Mean = nan }),
		with(func(h *Harmonic) { h.Constituents[0].Name = "M9" }), with(func(h *Harmonic) { h.Constituents[0].Name = "S2" }),
		with(func(h *Harmonic) { h.Constituents[0].Amplitude = -1 }), with(func(h *Harmonic) { h.Constituents[0].Phase = nan })} {
		if _, err := h.Table(from, from+day); err == nil || !math.IsNaN(h.Height(from)) {
			t.Errorf("case %d taken", i)
		}
	}
	for _, to := range []Minute{from, from - 1, from + 3*366*day, math.MaxInt64} {
		if _, err := invented.Table(from, to); err == nil {
			t.Errorf("took the end %d", to)
		}
	}
	still := Harmonic{Name: "lake", Datum: "d", Constituents: []Constituent{{"M2", 0.001, 0}}}
	if _, err := still.Table(from, from+day); err == nil || !strings.Contains(err.Error(), "no tide to speak of") {
		t.Errorf("a lake: %v", err)
	}
}

func TestWigglesAreLeftOut(t *testing.T) {
	w := func(m Minute, h float64, high bool) Water { return Water{At: m, Metres: h, High: high} }
	var out []Water
	for _, x := range []Water{w(0, 1, false), w(300, 4, true), w(340, 3.99, false), w(380, 4.005, true), w(700, 1.2, false),
		w(720, 1.21, true), w(740, 1.195, false), w(1100, 4.1, true)} {
		out = addWater(out, x)
	}
	want := []Water{w(0, 1, false), w(380, 4.005, true), w(740, 1.195, false), w(1100, 4.1, true)}
	compare(t, out, want, 0, 0)
}
