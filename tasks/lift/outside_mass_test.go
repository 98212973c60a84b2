package lift

import "testing"

// massRows are kg/m and m2/m of section tables.
func massRows(t *testing.T) []outside {
	const (
		ipe = "EN 10365 IPE, section property tables"
		hea = "DIN EN 10034 section tables"
		upn = "DIN 1026 UPN section tables"
		bar = "steel merchant's bar tables"
	)
	var out []outside
	mass := func(word, source string, m mark, want, tol float64) {
		out = append(out, outside{"section masses", word + ", kg/m", source, m, sect(t, word).LineMass, want, tol, "the digits that are printed", false})
	}
	// I sections by their sizes, not by the row of the table that the package holds
	sized := func(family string, size, want float64, source string) {
		for _, f := range families {
			for _, r := range f.rows {
				if f.name == family && r.size == size && r.sizes.web > 0 {
					out = append(out, outside{"section masses", named("%s %v by its sizes, kg/m", family, size), source, seen, lineMass(r.sizes.area()), want, .051 + .0045*want*float64(btoi(want >= 105)), "the digits that are printed", false})
				}
			}
		}
	}
	for size, want := range map[float64]float64{80: 6.0, 100: 8.1, 120: 10.4, 140: 12.9, 160: 15.8, 180: 18.8, 200: 22.4, 220: 26.2, 240: 30.7, 270: 36.1, 300: 42.2, 330: 49.1, 360: 57.1, 400: 66.3, 450: 77.6, 500: 90.7, 550: 106, 600: 122} {
		mass(named("IPE %v", size), ipe, seen, want, 1e-6)
		sized("IPE", size, want, ipe)
	}
	for size, want := range map[float64][2]float64{100: {16.7, .56}, 120: {19.9, .68}, 140: {24.7, .79}, 160: {30.4, .91}, 180: {35.5, 1.02}, 200: {42.3, 1.14}, 220: {50.5, 1.26}, 240: {60.3, 1.37}, 260: {68.2, 1.48}, 280: {76.4, 1.60},
		300: {88.3, 1.72}, 320: {97.6, 1.76}, 340: {104.8, 1.79}, 360: {112.1, 1.83}, 400: {124.8, 1.91}} {
		mass(named("HEA %v", size), hea, seen, want[0], 1e-6)
		sized("HEA", size, want[0], hea)
		out = append(out, outside{"section masses", named("HEA %v, m2/m", size), hea, seen, sect(t, named("HEA %v", size)).Surface, want[1], .0061, "printed to hundredths", false})
	}
	for size, want := range map[float64]float64{80: 8.64, 100: 10.6, 120: 13.4, 140: 16.0, 160: 18.8, 180: 22.0, 200: 25.3, 220: 29.4, 240: 33.2, 260: 37.9, 280: 41.8, 300: 46.2} {
		mass(named("UPN %v", size), upn, seen, want, 1e-6)
	}
	mass("FL 40x5", bar, seen, 1.57, digits(2))
	mass("SB 20", bar, seen, 3.14, digits(2))
	mass("RB 10", bar, seen, .6165, digits(3))
	mass("HEX 50", bar, seen, 17.0, digits(1))
	mass("OCT 80", bar, seen, 41.6, digits(1))
	out = append(out, outside{"section masses", "L 20x20x4 with R 3.5 and r 1.2, kg/m", bar, seen, lineMass(angleArea(20, 20, 4, 3.5, 1.2)), 1.15, digits(2), "", false})
	for word, want := range map[string]float64{"L 40x40x4": 2.42, "L 50x50x5": 3.77, "L 60x60x6": 5.42} {
		mass(word, "EN 10056-1", recalled, want, digits(2))
	}
	mass("L 100x100x10", "EN 10056-1", recalled, 15.0, digits(1))
	return out
}

func btoi(b bool) int {
	if b {
		return 1
	}
	return 0
}

// plateRows are floor plate and densities.
func plateRows(t *testing.T) []outside {
	var out []outside
	for thick, want := range map[float64]float64{4.5: 36.9, 6: 48.7, 8: 64.4, 10: 80.1, 12.5: 99.7} {
		out = append(out, outside{"floor plate", named("%v mm on plain, kg/m2", thick), "raised-pattern floor plate, design tables", seen, sect(t, named("floor plate %v", thick)).AreaMass, want, digits(1), "", false})
	}
	const gere = "Gere, table of densities"
	const metals = "published table of metals"
	for word, c := range map[string]struct {
		source string
		want   float64
	}{"steel": {gere, 7850}, "aluminium 6061": {gere, 2700}, "concrete": {gere, 2300}, "reinforced concrete": {gere, 2400}, "lead": {metals, 11340}, "zinc": {metals, 7135}, "copper": {metals, 8930}, "titanium": {metals, 4500}, "304": {"stainless weight table, its factor 0.00793", 7930}} {
		f, err := Density(word)
		if err != nil {
			t.Fatal(err)
		}
		out = append(out, outside{"densities", word + ", kg/m3", c.source, seen, f.Value, c.want, digits(0), "", false})
	}
	return out
}
