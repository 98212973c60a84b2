package weld

import (
	"math"

	"sailby/tasks/origin"
)

// saddle gives the length in mm of the seam once round a tube of outside diameter branch that
// stands square on a tube of outside diameter run, both in mm: the line in which the two cylinders
// meet. On a plate it would be pi x branch. For equal tubes it is that of an ellipse with half axes
// r and r times the root of two, 7.640 r.
//
// With r and R the radii, the height of the saddle at the angle a is R - sqrt(R^2 - r^2 sin^2 a); its
// line is measured in 4 x 2000 steps. Special case: a branch larger than the run, or a diameter
// not above zero, gives NaN.
func saddle(branch, run float64) float64 {
	r, big := branch/2, run/2
	if !(r > 0) || !(big >= r) {
		return math.NaN()
	}
	const steps = 2000
	h := math.Pi / 2 / steps
	sum := 0.0
	for i := range steps {
		sin, cos := math.Sincos((float64(i) + 0.5) * h)
		up := r * r * sin * cos / math.Sqrt(big*big-r*r*sin*sin)
		sum += math.Hypot(r, up) * h
	}
	return 4 * sum
}

// onRun is the length of the seams round a tube on a round run, count times.
func (j *shape) onRun() {
	j.Length = saddle(j.Diameter, j.Onto) * float64(j.Count)
	j.usual["length"] = origin.Origin{Kind: origin.Formula, Source: "line in which the two tubes meet x count"}
}
