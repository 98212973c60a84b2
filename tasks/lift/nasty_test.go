package lift

import (
	"math"
	"reflect"
	"strings"
	"testing"

	"pgregory.net/rapid"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// nasty are numbers that a hurried hand or a broken sum may give.
var nasty = []float64{0, 1, -1, 0.5, 10, 45, 60, 90, 100, 1000, 2500, 1e5, 1e7, 1e12, 1e300, 1e-9, math.NaN(), math.Inf(1), math.Inf(-1), math.MaxFloat64, math.SmallestNonzeroFloat64}

// fill sets every exported field of v to something, mostly sensible, sometimes nasty.
func fill(t *rapid.T, v reflect.Value) {
	switch v.Kind() {
	case reflect.Float64:
		if rapid.IntRange(0, 40).Draw(t, "which") != 17 {
			v.SetFloat(rapid.SampledFrom([]float64{1, 2, 0, 1.5, 30, 500, 1000}).Draw(t, "sensible"))
		} else {
			v.SetFloat(rapid.SampledFrom(nasty).Draw(t, "nasty"))
		}
	case reflect.Int:
		v.SetInt(int64(rapid.SampledFrom([]int{1, 2, 3, 0, 1, 2, 3, 4, 0, 1, 2, -1}).Draw(t, "int")))
	case reflect.Uint8:
		v.SetUint(uint64(rapid.IntRange(0, 7).Draw(t, "word")))
	case reflect.String:
		v.SetString(rapid.SampledFrom([]string{"", "", "steel", "EN 818-4 grade 8", "EN 1492-1 webbing", "steel on plywood"}).Draw(t, "string"))
	case reflect.Bool:
		v.SetBool(rapid.Bool().Draw(t, "bool"))
	case reflect.Array:
		for i := range v.Len() {
			fill(t, v.Index(i))
		}
	case reflect.Slice:
		v.Set(reflect.MakeSlice(v.Type(), rapid.IntRange(0, 4).Draw(t, "len"), 4))
		for i := range v.Len() {
			fill(t, v.Index(i))
		}
	case reflect.Struct:
		if v.Type() == reflect.TypeOf(origin.Figure{}) || v.Type() == reflect.TypeOf(origin.Origin{}) {
			return
		}
		for i := range v.NumField() {
			fill(t, v.Field(i))
		}
	}
}

func filled[T any](t *rapid.T) T {
	var x T
	fill(t, reflect.ValueOf(&x).Elem())
	return x
}

// holds checks that an answer is finite and its figure whole, or that the error has a way out.
func holds(t *rapid.T, r Result, err error) {
	if err != nil {
		if quantity.Hint(err) == "" || r.OK {
			t.Fatalf("%v has no way out, or came with an answer", err)
		}
		return
	}
	for _, v := range []float64{r.Need, r.Have} {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			t.Fatalf("%+v", r)
		}
	}
	if r.Reason == "" || !r.OK && r.Nearest == "" || r.OK && r.Need > r.Have*(1+1e-6) && r.Have > 0 {
		t.Fatalf("%+v", r)
	}
	sound(t, r.Figure)
	sound(t, r.Limit)
}

// sound checks every figure of a tree: named, finite, and with a source where it is not given.
func sound(t *rapid.T, f origin.Figure) {
	f.Walk(func(g origin.Figure, _ int) {
		if g.Name == "" || math.IsNaN(g.Value) || math.IsInf(g.Value, 0) {
			t.Fatalf("figure %+v", g)
		}
		if g.Origin.Kind != origin.Given && g.Origin.Source == "" || strings.Contains(g.Origin.Source, "http") {
			t.Fatalf("figure %q has no source: %+v", g.Name, g.Origin)
		}
		if g.Origin.Kind == origin.Table && len(g.From) > 0 {
			t.Fatalf("figure %q is both published and worked out", g.Name)
		}
	})
}

// No input makes any of the judgements panic, give a number that is none, or refuse without a way out.
func TestNastyInput(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		l := filled[Load](t)
		s, err := Slings(l, filled[Rig](t))
		if err != nil || len(s.Legs) > 0 || s.Reason != "" {
			holds(t, s.Result, err)
		}
		for _, g := range s.Legs {
			if math.IsNaN(g.Tension) || math.IsInf(g.Tension, 0) {
				t.Fatalf("%+v", s.Legs)
			}
		}
		for by := ByHands; by <= ByJack; by++ {
			g := filled[Gear](t)
			g.By = by
			r, err := Fit(l, g)
			holds(t, r, err)
		}
		n, err := NIOSH(l, filled[[]NIOSHLift](t)...)
		holds(t, n.Result, err)
		p := filled[Pair](t)
		two, err := TwoHooks(l, p)
		holds(t, two.Result, err)
		r, err := TurnOver(l, p, rapid.SampledFrom(nasty).Draw(t, "lug"))
		holds(t, r, err)
		w, err := Gust(l, filled[Wind](t))
		if err != nil || w.Need > 0 {
			holds(t, w.Result, err)
		}
		r, err = Bearing(l, rapid.SampledFrom(nasty).Draw(t, "area"), rapid.SampledFrom(nasty).Draw(t, "capacity"))
		holds(t, r, err)
		if c, err := Secure(l, filled[Cargo](t), filled[Strap](t)); err == nil && (c.Straps < 2 || c.Straps > maxStraps || c.Edition == "") {
			t.Fatalf("%+v", c)
		}
		if e, err := Times(filled[Move](t)); err == nil {
			if v := float64(e.HandsOn); math.IsNaN(v) || math.IsInf(v, 0) || v < 0 {
				t.Fatalf("%+v", e)
			}
			sound(t, e.Hours)
		}
	})
}

// No parts make Mass panic or give a mass that is none; names have no influence.
func TestNastyParts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		parts := filled[[]Part](t)
		m, err := Mass(parts)
		if err != nil {
			if quantity.Hint(err) == "" || m.Mass != 0 {
				t.Fatalf("%v, %+v", err, m)
			}
			return
		}
		if !(m.Mass > 0) || math.IsInf(m.Mass, 0) || !(m.Heavy >= m.Mass*(1-1e-9)) || len(m.Parts) != len(parts) {
			t.Fatalf("%+v", m)
		}
		for i := range 3 {
			if math.IsNaN(m.CG[i]) || m.CG[i] < m.Low[i]-1 || m.CG[i] > m.High[i]+1 {
				t.Fatalf("centre %v in %v to %v", m.CG, m.Low, m.High)
			}
		}
		sound(t, m.Figure)
		holds2 := m.Load("x")
		if err := holds2.valid(); err != nil && m.Mass >= tiny && holds2.Length < maxLength {
			t.Fatalf("its own load is refused: %v", err)
		}
	})
}

// No goods or vehicles make the search panic, and what it plans passes the check.
func TestNastyLoads(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		goods, vehicles := filled[[]Goods](t), filled[[]Vehicle](t)
		for i := range vehicles {
			vehicles[i].Name, vehicles[i].TowedBy = string(rune('a'+i)), ""
			if i > 0 && rapid.Bool().Draw(t, "towed") {
				vehicles[i].TowedBy = "a"
			}
		}
		p, err := LoadVehicles(goods, vehicles)
		if err != nil {
			if quantity.Hint(err) == "" || strings.Contains(err.Error(), "did not pass its check") {
				t.Fatal(err)
			}
			return
		}
		if p.OK == (p.Nearest != "") || p.Reason == "" {
			t.Fatalf("%+v", p)
		}
		if faults := CheckLoads(goods, vehicles, p.Trips); p.OK && len(faults) > 0 {
			t.Fatal(faults)
		}
	})
}
