package coat

import (
	"math"
	"sort"
)

const (
	leastPack   = 0.05  // L
	largestPack = 250.0 // L, a drum
	packUnit    = 0.005 // L: sizes are reckoned in whole steps of this, rounded down
	mostLitres  = 1e6
)

// Tin is a number of tins or kits of one size in litres.
type Tin struct {
	Count int
	Size  float64
}

// Tins picks whole tins for so many litres: least paint left over, then fewest tins; the bulk in
// the largest size. Add up the litres of all coats of a paint first. Cost: O(largest size x sizes).
// Errors: litres not above 0, no sizes, a size outside 0.05 to 250 L.
func Tins(litres float64, sizes []float64) ([]Tin, error) {
	if err := within("paint to buy", litres, 0, mostLitres, "L", "look at the area and the film"); err != nil {
		return nil, err
	}
	if len(sizes) == 0 {
		return nil, fault("give `pack sizes`, for instance 5 L", "there are no pack sizes")
	}
	byUse := append([]float64(nil), sizes...)
	sort.Sort(sort.Reverse(sort.Float64Slice(byUse)))
	units := make([]int, len(byUse))
	for i, s := range byUse {
		if err := within("a pack", s, leastPack, largestPack, "L", "give the litres of one tin or kit"); err != nil {
			return nil, err
		}
		units[i] = int(math.Floor(s/packUnit + 1e-6)) // a tin never holds more than it says
	}
	want := int(math.Ceil(litres/packUnit - 1e-6))
	largest := units[0]
	bulk := max(0, want/largest-2)
	counts := fill(want-bulk*largest, units)
	counts[0] += bulk
	var out []Tin
	for i, n := range counts {
		if n > 0 {
			out = append(out, Tin{n, byUse[i]})
		}
	}
	return out, nil
}

// fill finds the least sum of units that reaches want, with the fewest units.
func fill(want int, units []int) []int {
	const none = math.MaxInt32
	top := want + units[0]
	fewest, last := make([]int, top+1), make([]int, top+1)
	for v := 1; v <= top; v++ {
		fewest[v] = none
		for i, u := range units {
			if u <= v && fewest[v-u] != none && fewest[v-u]+1 < fewest[v] {
				fewest[v], last[v] = fewest[v-u]+1, i
			}
		}
	}
	counts := make([]int, len(units))
	for v := want; v <= top; v++ {
		if fewest[v] == none {
			continue
		}
		for v > 0 {
			counts[last[v]]++
			v -= units[last[v]]
		}
		break
	}
	return counts
}

// held gives the litres in tins.
func held(tins []Tin) float64 {
	sum := 0.0
	for _, t := range tins {
		sum += float64(t.Count) * t.Size
	}
	return sum
}
