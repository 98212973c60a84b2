package weld

import (
	"math"
	"testing"
)

// Equal tubes meet in two halves of an ellipse with half axes r and r times the root of two; its
// quarter is r x root 2 x E(1/2), and E(1/2) = 1.3506438810 stands in tables of elliptic integrals
// (Abramowitz and Stegun, table 17.1). On a very large run the seam is as on a plate.
func TestSaddle(t *testing.T) {
	near(t, "equal tubes", saddle(100, 100), 4*50*math.Sqrt2*1.3506438810, 1e-5)
	near(t, "as on a plate", saddle(60.3, 1e6), math.Pi*60.3, 1e-6)
	for _, bad := range [][2]float64{{100, 90}, {0, 90}, {-1, 90}, {math.NaN(), 90}, {50, math.NaN()}} {
		if v := saddle(bad[0], bad[1]); !math.IsNaN(v) {
			t.Errorf("%v: %v", bad, v)
		}
	}
	last := math.Inf(1)
	for run := 100.0; run < 2000; run *= 1.3 {
		v := saddle(100, run)
		if v > last || v < math.Pi*100 {
			t.Errorf("run %v: %v after %v", run, v, last)
		}
		last = v
	}
}

// The seam of a branch takes the saddle's length, twice for two branches, and says so.
func TestBranch(t *testing.T) {
	e, err := Work([]Seam{{Joint: Joint{Type: Fillet, Leg: 5, Diameter: 114.3, Onto: 219.1, Count: 2}}}, Circumstances{NoOverweld: true})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "metal of two branches", e.Metal, 12.5*2*saddle(114.3, 219.1)*7850/1e9, 1e-9)
	for what, j := range map[string]Joint{
		"diameter": {Type: Fillet, Leg: 5, Onto: 219.1, Length: 500},
		"onto":     {Type: Fillet, Leg: 5, Diameter: 219.1, Onto: 114.3},
		"length":   {Type: Fillet, Leg: 5, Diameter: 114.3, Onto: 219.1, Length: 500},
	} {
		_, err := Work([]Seam{{Joint: j}}, Circumstances{})
		we, ok := err.(*Error)
		if !ok || we.Field != what {
			t.Errorf("%s: %v", what, err)
		}
	}
}
