package coat

import "math"

// Magnus coefficients of the World Meteorological Organization, valid from -45 to 60 C.
const (
	magnusBase          = 6.112 // hPa at 0 C
	waterA, waterB      = 17.62, 243.12
	iceA, iceB          = 22.46, 272.62
	coldestAir, hottest = -45.0, 60.0
)

// saturation is the vapour pressure over water at t C, in hPa.
func saturation(t float64) float64 { return magnusBase * math.Exp(waterA*t/(waterB+t)) }

// DewPoint gives the dew point in C of air at airC with relative humidity rh (a share), over water,
// by the Magnus formula with the coefficients of the World Meteorological Organization.
// Special cases are: NaN for rh not in (0, 1], and for airC outside -45 to 60.
func DewPoint(airC, rh float64) float64 {
	if !(rh > 0 && rh <= 1 && airC >= coldestAir && airC <= hottest) {
		return math.NaN()
	}
	if rh == 1 {
		return airC
	}
	g := math.Log(rh) + waterA*airC/(waterB+airC)
	return waterB * g / (waterA - g)
}

// frostPoint is the temperature at which frost settles from air with the dew point dew; it lies
// above a dew point below 0 C, by about a tenth of it.
func frostPoint(dew float64) float64 {
	if !(dew < 0) {
		return dew
	}
	g := waterA * dew / (waterB + dew)
	return iceB * g / (iceA - g)
}

// FrostPoint gives the temperature in C at which frost settles from air with the dew point dew; the dew
// point itself where that is not below 0 C.
func FrostPoint(dew float64) float64 { return frostPoint(dew) }

// RelativeHumidity gives the share for air at airC whose dew point is dewC.
// Special cases are: 1 where the dew point is above the air; NaN outside -45 to 60 C for the air and
// below -90 C for the dew point.
func RelativeHumidity(airC, dewC float64) float64 {
	if !(airC >= coldestAir && airC <= hottest && dewC >= -90 && dewC <= hottest) {
		return math.NaN()
	}
	return math.Min(1, saturation(dewC)/saturation(airC))
}

// SteelHumidity gives the relative humidity of the air that touches steel at steelC, away from it
// airC and rh; above 1 the steel is wet. NaN as for DewPoint, and for steel outside -45 to 120 C.
func SteelHumidity(airC, rh, steelC float64) float64 {
	if math.IsNaN(DewPoint(airC, rh)) || !(steelC >= coldestAir && steelC <= highCelsius) {
		return math.NaN()
	}
	return rh * saturation(airC) / saturation(steelC)
}
