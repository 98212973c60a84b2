package weld

import (
	"fmt"
	"math"
)

// Placed is a seam at a known place in an assembly, for the order of welding.
type Placed struct {
	Name string
	Area float64 // mm2 laid, all runs
	Y, Z float64 // mm from the assembly's neutral axes to the seam
}

// Order is advice on which seam to weld first; drawing, WPS and jig come before it. Moments are
// weld area times lever arm, mm3, to which the bow is in proportion.
type Order struct {
	Sequence      []int     // indices of the seams, first to last
	Before, After []float64 // running imbalance after each seam, as listed and as advised
	PeakBefore    float64   // the largest of Before
	PeakAfter     float64
}

const exactOrder = 14 // up to so many seams the order is the best there is

// OrderOf gives an order that keeps the largest running moment of shrinkage about the neutral axis
// small. Up to 14 seams it is the smallest possible (subsets, O(2^n n)); beyond, at each step the
// seam is taken that leaves the least imbalance (O(n^2)). Ties go by the given order.
//
// Errors: a *Error for an area or lever arm that is no number.
func OrderOf(seams []Placed) (Order, error) {
	if len(seams) == 0 {
		return Order{}, fault("joints", "give the seams with their place", "no seams to put in order")
	}
	for _, s := range seams {
		if err := first(within("area of "+s.Name, s.Area, 0.1, 1e6, "mm2"), within("place of "+s.Name, s.Y, -1e6, 1e6, "mm"), within("place of "+s.Name, s.Z, -1e6, 1e6, "mm")); err != nil {
			return Order{}, err
		}
	}
	listed := make([]int, len(seams))
	for i := range listed {
		listed[i] = i
	}
	o := Order{}
	if len(seams) <= exactOrder {
		o.Sequence = bestOrder(seams)
	} else {
		o.Sequence = greedyOrder(seams)
	}
	o.Before, o.PeakBefore = running(seams, listed)
	o.After, o.PeakAfter = running(seams, o.Sequence)
	if o.PeakAfter >= o.PeakBefore*(1-1e-9) {
		o.Sequence, o.After, o.PeakAfter = listed, o.Before, o.PeakBefore
	}
	return o, nil
}

func running(seams []Placed, order []int) (each []float64, peak float64) {
	var y, z float64
	for _, i := range order {
		y += seams[i].Area * seams[i].Y
		z += seams[i].Area * seams[i].Z
		m := math.Hypot(y, z)
		each = append(each, m)
		peak = math.Max(peak, m)
	}
	return each, peak
}

// bestOrder finds, for every subset welded, the least peak with which the rest can follow, and
// then goes from the empty set by the least of them.
func bestOrder(seams []Placed) []int {
	n := len(seams)
	size := 1 << n
	ahead, moment := make([]float64, size), make([]float64, size)
	for set := size - 1; set >= 0; set-- {
		var y, z float64
		ahead[set] = math.Inf(1)
		for i := range seams {
			if set&(1<<i) != 0 {
				y += seams[i].Area * seams[i].Y
				z += seams[i].Area * seams[i].Z
				continue
			}
			next := set | 1<<i
			ahead[set] = math.Min(ahead[set], math.Max(moment[next], ahead[next]))
		}
		moment[set] = math.Hypot(y, z)
		if set == size-1 {
			ahead[set] = 0
		}
	}
	var order []int
	for set := 0; set != size-1; {
		best, least := -1, math.Inf(1)
		for i := range seams {
			next := set | 1<<i
			if m := math.Max(moment[next], ahead[next]); next != set && m < least {
				best, least = i, m
			}
		}
		order = append(order, best)
		set |= 1 << best
	}
	return order
}

func greedyOrder(seams []Placed) []int {
	var order []int
	used := make([]bool, len(seams))
	var y, z float64
	for range seams {
		best, least := -1, math.Inf(1)
		for i, s := range seams {
			if m := math.Hypot(y+s.Area*s.Y, z+s.Area*s.Z); !used[i] && m < least {
				best, least = i, m
			}
		}
		used[best] = true
		y += seams[best].Area * seams[best].Y
		z += seams[best].Area * seams[best].Z
		order = append(order, best)
	}
	return order
}

// Bow gives the bow in mm of a member of a length in mm with a second moment of area in mm4 from
// an unbalanced moment in mm3: 0.005 A d L^2 / I (Blodgett, Design of Welded Structures, from
// memory; it holds in any one unit of length).
//
// Errors: a *Error for a length or second moment that is no number above zero.
func Bow(moment, length, second float64) (float64, error) {
	if err := first(within("moment", moment, 0, 1e12, "mm3"), within("length", length, 1, maxLength, "mm"), within("second moment of area", second, 1, 1e15, "mm4")); err != nil {
		return 0, err
	}
	return 0.005 * moment * length * length / second, nil
}

// String gives the order as a line: "3, 1, 2 (imbalance at most 1200 mm3, as listed 4100)".
func (o Order) String() string {
	s := ""
	for i, n := range o.Sequence {
		if i > 0 {
			s += ", "
		}
		s += fmt.Sprint(n + 1)
	}
	return fmt.Sprintf("%s (imbalance at most %.0f mm3, as listed %.0f)", s, o.PeakAfter, o.PeakBefore)
}
