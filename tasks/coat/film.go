package coat

import (
	"math"

	"sailby/tasks/origin"
)

// WetFilm gives the wet film in um that dries to dft um: dft (1 + thinner) / solids, with solids the
// volume solids of the unthinned paint and thinner its share of the paint's volume.
// Source: the definition of volume solids; thinned solids are solids/(1+thinner).
// Special cases are: NaN for solids not in (0, 1], a negative dft or a negative thinner.
func WetFilm(dft, solids, thinner float64) float64 {
	if !(solids > 0 && solids <= 1 && dft >= 0 && thinner >= 0) {
		return math.NaN()
	}
	return dft * (1 + thinner) / solids
}

// Spreading gives the theoretical spreading rate in m2/L of unthinned paint: 1000 solids / dft.
// Special cases are: NaN for solids not in (0, 1] or dft not above 0.
func Spreading(dft, solids float64) float64 {
	if !(solids > 0 && solids <= 1 && dft > 0) {
		return math.NaN()
	}
	return 1000 * solids / dft
}

const (
	lossTable  = "loss by method of application, in a published table of paint consumption"
	otherTable = "further losses, in a published table of paint consumption"
	recalled   = "usual losses of paint"
)

// loss is the share of paint that does not reach the steel: low, likely and high.
type loss struct {
	low, likely, high float64
	from              func(name string, value float64) origin.Figure
}

func published(name string, v float64) origin.Figure { return origin.Published(name, v, "", lossTable) }

// losses by method and surface. The published table gives brush and roller 10-15 %, airless 30 %,
// air spray up to 50 %; open steelwork by airless is recalled as 40-60 %; the rest is judged from these.
func methodLoss(method, surface string) loss {
	house := func(name string, v float64) origin.Figure {
		return origin.House(name, v, "", "open steelwork, judged from the published loss on plates")
	}
	memory := func(name string, v float64) origin.Figure { return origin.Recalled(name, v, "", recalled) }
	switch {
	case method == Airless && surface == Lattice:
		return loss{0.40, 0.50, 0.60, memory}
	case method == AirSpray && surface == Lattice:
		return loss{0.50, 0.60, 0.70, house}
	case method == Airless:
		return loss{0.30, 0.30, 0.30, published}
	case method == AirSpray:
		return loss{0.30, 0.50, 0.50, published}
	case surface == Lattice:
		return loss{0.15, 0.15, 0.20, house}
	}
	return loss{0.10, 0.125, 0.15, published}
}

// windLoss is the further loss of spray out of doors: 5-30 % in the published table.
var windLoss = loss{0.05, 0.10, 0.30, func(name string, v float64) origin.Figure {
	return origin.Published(name, v, "", otherTable)
}}

// deadVolume holds dry paint in L/m2 that fills a blast profile of Rz um before any film stands on
// its peaks; from memory, as usual in the trade.
var deadVolume = [][2]float64{{0, 0}, {30, 0.02}, {45, 0.03}, {60, 0.04}, {75, 0.05}, {90, 0.06}, {150, 0.10}}

// profileVolume gives the dead volume of a profile in L/m2 of dry paint, on straight lines between rows.
func profileVolume(rz float64) float64 {
	for i := 1; i < len(deadVolume); i++ {
		a, b := deadVolume[i-1], deadVolume[i]
		if rz <= b[0] {
			return a[1] + (b[1]-a[1])*(rz-a[0])/(b[0]-a[0])
		}
	}
	return deadVolume[len(deadVolume)-1][1]
}

// need gives the litres of unthinned paint for an area: theoretical litres and profile filling, over
// what is left after losses. The two conventions differ: a loss of 23 % is a factor of 1.30.
func need(area, dft, solids, profile, lost float64) float64 {
	return area * (dft/1000 + profileVolume(profile)) / solids / (1 - lost)
}
