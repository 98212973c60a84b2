package hours

import (
	"reflect"
	"testing"

	"pgregory.net/rapid"
)

func TestNewSet(t *testing.T) {
	got := NewSet(Span{5, 9}, Span{1, 3}, Span{3, 4}, Span{8, 12}, Span{20, 20}, Span{30, 25})
	if want := (Set{{1, 4}, {5, 12}}); !reflect.DeepEqual(got, want) {
		t.Errorf("%v, want %v", got, want)
	}
	if NewSet() != nil || NewSet(Span{3, 3}) != nil {
		t.Error("a set of nothing is not nil")
	}
}

func TestSpan(t *testing.T) {
	s := Span{10, 20}
	if s.Len() != 10 || (Span{20, 10}).Len() != 0 || !s.Has(10) || s.Has(20) || !s.Overlaps(Span{19, 30}) || s.Overlaps(Span{20, 30}) || s.Overlaps(Span{15, 15}) {
		t.Error("a span is not half-open")
	}
}

func TestSetAsks(t *testing.T) {
	s := Set{{10, 20}, {30, 40}, {45, 50}}
	if s.Total() != 25 || s.Count(Span{15, 35}) != 10 || s.Count(Span{20, 30}) != 0 || s.Count(Span{0, 100}) != 25 || s.Count(Span{35, 15}) != 0 {
		t.Error("minutes are miscounted")
	}
	if !s.Covers(Span{12, 18}) || s.Covers(Span{18, 22}) || !s.Covers(Span{25, 25}) {
		t.Error("Covers is wrong")
	}
	for at, want := range map[Minute]Minute{0: 10, 10: 10, 19: 19, 20: 30, 44: 45, 49: 49} {
		if got, ok := s.Next(at); !ok || got != want {
			t.Errorf("next of %d is %d (%v), want %d", at, got, ok, want)
		}
	}
	if got, ok := s.Next(50); ok || got != Far {
		t.Errorf("after the end there is %d", got)
	}
	if got, want := s.Joined(5, nil), (Set{{10, 20}, {30, 50}}); !reflect.DeepEqual(got, want) {
		t.Errorf("joined over 5 min: %v, want %v", got, want)
	}
	if got, want := s.Joined(10, Set{{20, 30}}), (Set{{10, 40}, {45, 50}}); !reflect.DeepEqual(got, want) {
		t.Errorf("joined where allowed: %v, want %v", got, want)
	}
}

// bits gives the minutes 0 to 63 of a set.
func bits(s Set) (b uint64) {
	for m := range 64 {
		if s.Has(Minute(m)) {
			b |= 1 << m
		}
	}
	return b
}

func draw(t *rapid.T, name string) Set {
	var spans []Span
	for range rapid.IntRange(0, 5).Draw(t, name) {
		a := rapid.IntRange(0, 63).Draw(t, "from")
		spans = append(spans, Span{Minute(a), Minute(min(64, a+rapid.IntRange(0, 12).Draw(t, "length")))})
	}
	return NewSet(spans...)
}

// Sets of minutes behave as sets of minutes: every operation agrees with the same on 64 bits, and its
// result is sorted, disjoint and does not touch.
func TestSetLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a, b := draw(t, "a"), draw(t, "b")
		x, y := bits(a), bits(b)
		for what, c := range map[string]struct {
			got  Set
			want uint64
		}{"and": {a.And(b), x & y}, "or": {a.Or(b), x | y}, "less": {a.Less(b), x &^ y}, "within": {a.Within(Span{10, 30}), x & (1<<30 - 1<<10)}} {
			if bits(c.got) != c.want {
				t.Fatalf("%v %s %v is %v", a, what, b, c.got)
			}
			for i, s := range c.got {
				if s.Len() == 0 || i > 0 && s.From <= c.got[i-1].To {
					t.Fatalf("%v is not in order", c.got)
				}
			}
		}
		w := Span{Minute(rapid.IntRange(0, 63).Draw(t, "w")), Minute(rapid.IntRange(0, 63).Draw(t, "v"))}
		if a.Count(w) != a.Within(w).Total() {
			t.Fatalf("%v has %d minutes in %v", a, a.Count(w), w)
		}
	})
}
