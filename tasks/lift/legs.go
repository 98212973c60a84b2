package lift

import "math"

// Leg is what one leg of a sling carries.
type Leg struct {
	Share   float64 // kg, the part of the weight that it takes
	Tension float64 // kg, along the leg; of each part for a basket
	Angle   float64 // degrees from the vertical
	Length  float64 // mm, 0 where only the angle is known
}

// legAt makes the leg that takes share at an angle from the vertical: T = share / cos(angle).
func legAt(share, angle, length float64) Leg {
	return Leg{Share: share, Angle: angle, Length: length, Tension: share / math.Cos(angle*math.Pi/180)}
}

// even shares w equally over n legs at one angle. A fourth leg on a rigid load may hang slack, and
// the one across from it too: then two carry all.
func even(w float64, n int, angle, length float64, equalised bool) []Leg {
	carrying := n
	if n == 4 && !equalised {
		carrying = 2
	}
	legs := make([]Leg, n)
	for i := range legs {
		legs[i] = legAt(w/float64(carrying), angle, length)
	}
	return legs
}

// statics finds the legs from lugs to a hook, both mm, under a weight w whose centre of gravity
// hangs straight below the hook. The pulls along the legs must add up to the weight:
//
//	sum of T_i u_i = w (0, 0, 1), u_i from lug i to the hook, T_i >= 0
//
// One to three legs have one answer. With four, every three of them that can hold the weight
// alone are taken, and each leg is given its worst; equalised legs get the least-squares answer.
// ok is false where no pulls hold the weight: its centre of gravity is outside the lugs.
func statics(w float64, lugs [][3]float64, hook [3]float64, equalised bool) (legs []Leg, ok bool) {
	n := len(lugs)
	u := make([][3]float64, n)
	length := make([]float64, n)
	for i, lug := range lugs {
		d := sub(hook, lug)
		length[i] = norm(d)
		u[i] = scale(d, 1/length[i])
	}
	var t []float64
	switch {
	case n == 1:
		t, ok = []float64{w / u[0][2]}, true
	case n == 2:
		t, ok = pair(w, u)
	case n == 4 && equalised:
		if t, ok = leastSquares(w, u); ok {
			break
		}
		t, ok = triples(w, u)
	default:
		t, ok = triples(w, u)
	}
	if !ok {
		return nil, false
	}
	for i := range t {
		angle := math.Acos(math.Min(1, u[i][2])) * 180 / math.Pi
		legs = append(legs, Leg{Share: t[i] * u[i][2], Tension: t[i], Angle: angle, Length: length[i]})
	}
	return legs, true
}

// pair solves two legs in the upright plane through both lugs: T_A sin a = T_B sin b and
// T_A cos a + T_B cos b = w, with the sides that the legs lean to.
func pair(w float64, u [][3]float64) ([]float64, bool) {
	lean := sub(u[0], u[1]) // level direction from B's lean to A's
	lean[2] = 0
	if norm(lean) < 1e-12 {
		return []float64{w / 2 / u[0][2], w / 2 / u[1][2]}, true
	}
	lean = scale(lean, 1/norm(lean))
	a, b := dot(u[0], lean), dot(u[1], lean)
	det := u[0][2]*b - u[1][2]*a
	if math.Abs(det) < 1e-12 {
		return nil, false
	}
	t := []float64{w * b / det, -w * a / det}
	return clip(t, w)
}

// clip takes rounding off pulls that are nearly zero; a real push is no answer.
func clip(t []float64, w float64) ([]float64, bool) {
	for i, v := range t {
		if math.IsNaN(v) || math.IsInf(v, 0) || v < -1e-9*w {
			return nil, false
		}
		t[i] = math.Max(v, 0)
	}
	return t, true
}

// triples gives each leg its greatest pull over all sets of three legs that hold the weight.
func triples(w float64, u [][3]float64) ([]float64, bool) {
	worst := make([]float64, len(u))
	found := false
	for i := range u {
		for j := i + 1; j < len(u); j++ {
			for k := j + 1; k < len(u); k++ {
				t, ok := three([3]float64{0, 0, w}, u[i], u[j], u[k])
				if !ok {
					continue
				}
				if t, ok = clip(t, w); ok {
					found = true
					worst[i], worst[j], worst[k] = math.Max(worst[i], t[0]), math.Max(worst[j], t[1]), math.Max(worst[k], t[2])
				}
			}
		}
	}
	return worst, found
}

// three solves x a + y b + z c = f by Cramer's rule; ok is false where a, b, c are in one plane.
func three(f, a, b, c [3]float64) ([]float64, bool) {
	det := dot(a, cross(b, c))
	if math.Abs(det) < 1e-9 {
		return nil, false
	}
	return []float64{dot(f, cross(b, c)) / det, dot(a, cross(f, c)) / det, dot(a, cross(b, f)) / det}, true
}

// leastSquares gives the pulls of least sum of squares: t = U' (U U')^-1 f.
func leastSquares(w float64, u [][3]float64) ([]float64, bool) {
	var m [3][3]float64
	for _, v := range u {
		for i := range 3 {
			for j := range 3 {
				m[i][j] += v[i] * v[j]
			}
		}
	}
	x, ok := three([3]float64{0, 0, w}, m[0], m[1], m[2])
	if !ok {
		return nil, false
	}
	t := make([]float64, len(u))
	for i, v := range u {
		t[i] = dot(v, [3]float64{x[0], x[1], x[2]})
	}
	return clip(t, w)
}
