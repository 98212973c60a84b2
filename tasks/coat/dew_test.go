package coat

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"
)

// Dew points worked out with the npm package psychrolib 1.1.1, GetTDewPointFromRelHum in SI units.
// Below 0 C that package gives the frost point, over ice.
var psychrolib = map[float64][8]float64{ // at 50, 60, 70, 75, 80, 85, 90 and 95 % humidity
	5:  {-4.03, -1.87, -0.01, 0.94, 1.84, 2.69, 3.50, 4.27},
	8:  {-1.57, 0.72, 2.87, 3.84, 4.76, 5.64, 6.46, 7.25},
	10: {0.06, 2.60, 4.79, 5.78, 6.71, 7.60, 8.44, 9.24},
	12: {1.91, 4.48, 6.70, 7.71, 8.66, 9.56, 10.41, 11.22},
	15: {4.67, 7.31, 9.58, 10.61, 11.58, 12.50, 13.37, 14.21},
	20: {9.27, 12.01, 14.37, 15.44, 16.45, 17.40, 18.31, 19.17},
	25: {13.86, 16.70, 19.15, 20.26, 21.31, 22.30, 23.24, 24.14},
	30: {18.45, 21.39, 23.93, 25.08, 26.17, 27.20, 28.18, 29.11},
}

func TestDewPointAgainstPsychrolib(t *testing.T) {
	for air, row := range psychrolib {
		for i, rh := range []float64{0.50, 0.60, 0.70, 0.75, 0.80, 0.85, 0.90, 0.95} {
			name, dew := fmt.Sprintf("%v C, %v %%", air, rh*100), DewPoint(air, rh)
			if row[i] >= 0 {
				near(t, name, dew, row[i], 0.025) // the two formulas differ by 0.02, the table is rounded
			} else {
				near(t, name+", frost point", frostPoint(dew), row[i], 0.03)
			}
		}
	}
	near(t, "0 C, 80 %, frost point", frostPoint(DewPoint(0, 0.80)), -2.68, 0.03)
	near(t, "0 C, 40 %, frost point", frostPoint(DewPoint(0, 0.40)), -10.69, 0.03)
}

// Saturation pressure in Pa from the same package, within the difference of the two formulas.
func TestSaturationAgainstPsychrolib(t *testing.T) {
	for c, want := range map[float64]float64{0: 611.15, 5: 872.49, 10: 1228.0, 20: 2338.8, 30: 4246.0} {
		near(t, amount(c, "C"), saturation(c)*100/want, 1, 0.003)
	}
	for c, want := range map[float64]float64{0: 611.20, 5: 871.74, 10: 1226.0, 20: 2332.6, 30: 4233.7} {
		near(t, amount(c, "C")+" by the same formula", saturation(c)*100, want, 0.06)
	}
}

// Printed dew points. The first chart is in whole F and cut, not rounded: a degree is allowed.
func TestDewPointAgainstCharts(t *testing.T) {
	f := func(v float64) float64 { return (v - 32) / 1.8 }
	for _, c := range []struct {
		source              string
		airF, rh, dewF, tol float64
	}{
		{"dew point calculation chart, with its least steel of 62 F", 70, 0.65, 57, 1},
		{"the same chart", 60, 0.80, 54, 1},
		{"the same chart", 50, 0.70, 40, 1},
		{"the same chart", 80, 0.50, 59, 1},
		{"the same chart", 70, 0.85, 65, 1},
		{"the same chart", 90, 0.60, 74, 1},
		{"a maker's page on the dew point: 30 C and 55 % give 20 C", 86, 0.55, 68, 0.1},
		{"a second page: 24 C and 35 % give 7 C, cut", 75.2, 0.35, 44.6, 1.8},
	} {
		near(t, c.source, DewPoint(f(c.airF), c.rh)*1.8+32, c.dewF, c.tol)
	}
	if least := DewPoint(f(70), 0.65)*1.8 + 32 + 5; math.Abs(least-62) > 1 {
		t.Errorf("least steel at 70 F and 65 %% is %.1f F, the chart says 62", least)
	}
}

// A guide to testing zinc silicate: air at 30 C and 85 %, steel at 40 C, "just below 50 %" at the steel.
// NACE 6A192/SSPC-TR 3: surface humidity by the spread of steel over dew point, at 70 F.
func TestSteelHumidity(t *testing.T) {
	if got := SteelHumidity(30, 0.85, 40); got >= 0.50 || got < 0.48 {
		t.Errorf("humidity at the steel is %.3f, want just below 0.50", got)
	}
	for _, c := range []struct{ spreadF, low, high float64 }{{5, 0.82, 0.86}, {15, 0.54, 0.62}, {20, 0.43, 0.51}, {25, 0.34, 0.42}, {30, 0.27, 0.35}} {
		steel := (70.0 - 32) / 1.8
		dew := steel - c.spreadF/1.8
		if got := SteelHumidity(dew, 1, steel); got < c.low-0.005 || got > c.high+0.005 {
			t.Errorf("spread of %v F: %.3f, printed %v to %v", c.spreadF, got, c.low, c.high)
		}
	}
	if got := SteelHumidity(20, 0.9, 15); got <= 1 {
		t.Errorf("steel below the dew point reads %.2f, want above 1", got)
	}
}

func TestAirSpecialCases(t *testing.T) {
	nan := math.NaN()
	for _, c := range []struct{ air, rh float64 }{{nan, 0.5}, {20, nan}, {20, 0}, {20, -1}, {20, 1.01}, {20, 50}, {-46, 0.5}, {61, 0.5}, {math.Inf(1), 0.5}} {
		if d := DewPoint(c.air, c.rh); !math.IsNaN(d) {
			t.Errorf("dew point of %v C, %v is %v", c.air, c.rh, d)
		}
		if d := SteelHumidity(c.air, c.rh, 10); !math.IsNaN(d) {
			t.Errorf("humidity at the steel for %v C, %v is %v", c.air, c.rh, d)
		}
	}
	if !math.IsNaN(SteelHumidity(20, 0.5, nan)) || !math.IsNaN(RelativeHumidity(nan, 5)) || !math.IsNaN(RelativeHumidity(5, nan)) {
		t.Error("a reading that is not a number gives a humidity")
	}
	if RelativeHumidity(10, 12) != 1 || DewPoint(12.3, 1) != 12.3 {
		t.Error("full air is not full")
	}
}

// Dew point and humidity are each other's inverse; the dew point rises with both.
func TestDewPointLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		air, rh := rapid.Float64Range(-40, 59).Draw(t, "air"), rapid.Float64Range(0.05, 0.99).Draw(t, "rh")
		d := DewPoint(air, rh)
		if back := RelativeHumidity(air, d); math.Abs(back-rh) > 1e-9 {
			t.Fatalf("%v C, %v: dew point %v gives back %v", air, rh, d, back)
		}
		if d >= air || DewPoint(air, rh+0.005) <= d || DewPoint(air+0.5, rh) <= d {
			t.Fatalf("%v C, %v: dew point %v does not rise with air and humidity", air, rh, d)
		}
		if f := frostPoint(d); d < 0 && (f <= d || f > 0) || d >= 0 && f != d {
			t.Fatalf("dew point %v, frost point %v", d, f)
		}
	})
}
