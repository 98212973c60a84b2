package weld

import (
	"math"
	"testing"
)

func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol) {
		t.Errorf("%s: got %.6g, want %.6g within %.3g", what, got, want, tol)
	}
}

// TestVectorV1 is 12 m of 8 mm fillet, PB, 136 at 2.9 kg/h, factor 0.40, efficiency 0.86,
// 16.5 L/min, worked by hand.
func TestVectorV1(t *testing.T) {
	p := &Procedure{Process: 136, Position: PB, Deposition: 2.9, OperatingFactor: 0.40, Efficiency: 0.86, GasFlow: 16.5}
	e, err := Work([]Seam{{Joint: Joint{Type: Fillet, Leg: 8, Length: 12000}, Procedure: p}}, Circumstances{NoOverweld: true, FittedUp: true})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "kg", e.Metal, 3.014, 0.0005)
	near(t, "arc", float64(e.Arc), 62.4, 0.05)
	near(t, "welding", float64(e.Seams[0].Welding), 155.9, 0.05)
	near(t, "wire", e.Consumables[0].Amount, 3.505, 0.0005)
	near(t, "gas", e.Consumables[1].Amount, 1029, 0.5)
}
