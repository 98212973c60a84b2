package hours

import (
	"slices"
	"testing"

	"pgregory.net/rapid"
)

const width = 64 // minutes of a bitmap

// bits is a set of minutes written out one by one.
type bits [width]bool

func spansGen(name string) *rapid.Generator[[]Span] {
	return rapid.Custom(func(t *rapid.T) []Span {
		var out []Span
		for range rapid.IntRange(0, 7).Draw(t, name+" spans") {
			from := Minute(rapid.IntRange(0, width-1).Draw(t, "from"))
			to := min(width, from+Minute(rapid.IntRange(-2, 14).Draw(t, "length"))) // empty and turned round ones too
			out = append(out, Span{from, to})
		}
		return out
	})
}

func filled(spans []Span) (b bits) {
	for _, s := range spans {
		for t := s.From; t < s.To; t++ {
			b[t] = true
		}
	}
	return b
}

// holds wants a set of sorted spans that do not touch and have just the minutes of b.
func holds(t *rapid.T, what string, got Set, b bits) {
	t.Helper()
	for i, s := range got {
		if s.Len() == 0 || i > 0 && s.From <= got[i-1].To {
			t.Fatalf("%s: spans are empty, unsorted or touch: %v", what, got)
		}
	}
	if filled(got) != b {
		t.Fatalf("%s: %v has other minutes than %v", what, got, b)
	}
}

func TestSetsAreWhatTheirMinutesAre(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		sa, sb := spansGen("a").Draw(t, "a"), spansGen("b").Draw(t, "b")
		a, b := NewSet(sa...), NewSet(sb...)
		ma, mb := filled(sa), filled(sb)
		var and, or, less bits
		for i := range ma {
			and[i], or[i], less[i] = ma[i] && mb[i], ma[i] || mb[i], ma[i] && !mb[i]
		}
		holds(t, "NewSet", a, ma)
		holds(t, "And", a.And(b), and)
		holds(t, "Or", a.Or(b), or)
		holds(t, "Less", a.Less(b), less)
		w := Span{Minute(rapid.IntRange(0, width).Draw(t, "from")), Minute(rapid.IntRange(0, width).Draw(t, "to"))}
		var within bits
		n, all := 0, 0
		for i := range ma {
			if ma[i] {
				all++
			}
			if within[i] = ma[i] && w.Has(Minute(i)); within[i] {
				n++
			}
			if a.Has(Minute(i)) != ma[i] {
				t.Fatalf("Has(%d) of %v is %v", i, a, !ma[i])
			}
		}
		holds(t, "Within", a.Within(w), within)
		if a.Total() != all || a.Count(w) != n || a.Covers(w) != (n == w.Len()) {
			t.Fatalf("Total %d want %d, Count(%v) %d want %d, Covers %v", a.Total(), all, w, a.Count(w), n, a.Covers(w))
		}
	})
}

func TestNextIsTheFirstMinuteAtOrAfter(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		spans := spansGen("a").Draw(t, "a")
		a, m := NewSet(spans...), filled(spans)
		from := rapid.IntRange(0, width-1).Draw(t, "from")
		want := slices.Index(m[from:], true)
		at, ok := a.Next(Minute(from))
		switch {
		case ok != (want >= 0):
			t.Fatalf("Next(%d) of %v: ok %v", from, a, ok)
		case ok && at != Minute(from+want), !ok && at != Far:
			t.Fatalf("Next(%d) of %v is %d, want %d", from, a, at, from+want)
		}
	})
}

// A gap is closed if it is short enough and if all of it is allowed; nothing else changes.
func TestJoinedClosesShortAllowedGaps(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		spans, allow := spansGen("a").Draw(t, "a"), spansGen("allowed").Draw(t, "allowed")
		gap := rapid.IntRange(0, 9).Draw(t, "gap")
		any := rapid.Bool().Draw(t, "every gap")
		a, m, may := NewSet(spans...), filled(spans), filled(allow)
		allowed := NewSet(allow...)
		if any {
			allowed = nil
		} else if allowed == nil {
			allowed = Set{}
		}
		want := m
		last := -1 // last minute of the set before i
		for i := range m {
			if !m[i] {
				continue
			}
			if n := i - last - 1; last >= 0 && n > 0 && n <= gap {
				free := true
				for k := last + 1; k < i; k++ {
					free = free && (any || may[k])
				}
				for k := last + 1; k < i && free; k++ {
					want[k] = true
				}
			}
			last = i
		}
		before := slices.Clone(a)
		holds(t, "Joined", a.Joined(gap, allowed), want)
		if !slices.Equal(a, before) {
			t.Fatal("Joined changed the set that it was asked of")
		}
	})
}

func TestSpansAreHalfOpen(t *testing.T) {
	s := Span{10, 20}
	for _, tc := range []struct {
		what string
		got  bool
		want bool
	}{
		{"the first minute is in", s.Has(10), true},
		{"the last is the one before the end", s.Has(19), true},
		{"the end is out", s.Has(20), false},
		{"spans that touch do not overlap", s.Overlaps(Span{20, 30}), false},
		{"one shared minute is an overlap", s.Overlaps(Span{19, 30}), true},
		{"an empty span overlaps nothing", s.Overlaps(Span{15, 15}), false},
		{"a span turned round overlaps nothing", Span{18, 12}.Overlaps(s), false},
		{"an empty span is covered by nothing at all", Set(nil).Covers(Span{5, 5}), true},
	} {
		if tc.got != tc.want {
			t.Errorf("%s: %v", tc.what, tc.got)
		}
	}
	if n := (Span{20, 10}).Len(); n != 0 {
		t.Errorf("a span turned round has %d minutes", n)
	}
	if joined := NewSet(Span{0, 5}, Span{5, 9}); len(joined) != 1 || joined[0] != (Span{0, 9}) {
		t.Errorf("spans that touch are one: %v", joined)
	}
}
