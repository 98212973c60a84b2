package weld

import (
	"fmt"
	"math"
	"testing"
)

// Densities that the published tables were made with.
const (
	handbookDensity = 7833.0 // the kg/m table: 0.283 lb/in3
	inch            = 25.4
	pound           = 0.45359237
	lbPerFoot       = 1.48816394 // kg/m
)

func bare(j Joint) Joint {
	j.Length, j.Cap = 1000, None
	if j.RootGap == 0 {
		j.RootGap = None
	}
	return j
}

func areaOf(t *testing.T, j Joint, pos Position) Section {
	t.Helper()
	s, err := j.Section(pos, false)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// TestVTable is the ESAB electrode consumption table for V joints: drawn volume (cm3/m = mm2) at 50,
// 60, 70, 80 deg and deposited kg/m by position, each within its own rounding.
func TestVTable(t *testing.T) {
	volumes := map[float64][4]float64{4: {11.5, 13, 15, 17.5}, 6: {23, 27, 31, 36}, 8: {42, 49, 57, 65.5}, 10: {66.5, 77.5, 90, 104},
		12: {91, 107, 125, 145}, 15: {135, 160, 188, 219}, 16: {151, 180, 211, 247}, 18: {189, 223, 263, 308}, 20: {227, 271, 320, 376}, 25: {341, 411, 488, 577}}
	for _, c := range []struct{ thick, gap, flat50, flat60, pc, pf, over float64 }{
		{4, 1, .09, .10, .11, .13, .14}, {6, 1, .17, .20, .24, .29, .30}, {8, 1.5, .31, .37, .44, .47, .55}, {10, 2, .49, .57, .64, .76, .86},
		{12, 2, .65, .77, .89, 1.05, 1.23}, {15, 2, .97, 1.15, 1.34, 1.55, 1.81}, {16, 2, 1.04, 1.23, 1.46, 1.75, 2.02},
		{18, 2, 1.33, 1.60, 1.83, 2.17, 2.51}, {20, 2, 1.63, 1.94, 2.21, 2.62, 3.11}, {25, 2, 2.46, 2.94, 3.34, 4.00, 4.76}} {
		j := bare(Joint{Type: SingleV, Thickness: c.thick, RootGap: c.gap})
		for i, cell := range []struct {
			angle, kg float64
			pos       Position
		}{{50, c.flat50, PA}, {60, c.flat60, PA}, {60, c.pc, PC}, {70, c.pf, PF}, {80, c.over, PE}} {
			j.Angle = cell.angle
			s := areaOf(t, j, cell.pos)
			near(t, fmt.Sprintf("V %v mm %v %v kg/m", c.thick, cell.angle, cell.pos), Metal(s.Area, 1000, 0), cell.kg, 0.005)
			tol := 0.51
			if c.thick == 18 && cell.angle == 50 || c.thick == 25 && cell.angle == 80 {
				tol = 2.7 // printed 189 and 577; gap and faces give 187.1 and 574.4
			}
			near(t, fmt.Sprintf("V %v mm %v deg mm2", c.thick, cell.angle), s.Drawn, volumes[c.thick][[5]int{0, 1, 1, 2, 3}[i]], tol)
			if cell.angle != 50 { // the preparation the position has by default
				d := Joint{Type: SingleV, Thickness: c.thick, Length: 1000}
				near(t, fmt.Sprintf("V %v mm as %v has it", c.thick, cell.pos), Metal(areaOf(t, d, cell.pos).Area, 1000, 0), cell.kg, 0.005)
			}
		}
	}
	// Two cells of the print are misprints beside their own volumes: 5 mm PF 0.16 with 24.5 cm3/m
	// (0.19), 14 mm PC 1.17 with 159 cm3/m (1.25).
	near(t, "5 mm PF", Metal(areaOf(t, Joint{Type: SingleV, Thickness: 5, RootGap: 1, Length: 1}, PF).Area, 1000, 0), 0.19, 0.015)
	near(t, "14 mm PC", Metal(areaOf(t, Joint{Type: SingleV, Thickness: 14, Length: 1}, PC).Area, 1000, 0), 1.17, 0.02)
}

// TestMetalPerMetre is the ESAB Filler Metal Handbook's kg/m table by element, at its density. Its
// misprinted cells are recomputed, not copied.
func TestMetalPerMetre(t *testing.T) {
	for _, c := range []struct{ leg, kg float64 }{{3.18, .040}, {4.76, .089}, {6.35, .158}, {7.94, .247}, {9.53, .356}, {12.70, .632}, {15.88, .988},
		{14.29, .800}} { // prints 0.671
		s := areaOf(t, bare(Joint{Type: Fillet, Leg: c.leg}), PB)
		near(t, fmt.Sprintf("fillet %v", c.leg), Metal(s.Area, 1000, handbookDensity), c.kg, 0.0008)
	}
	for _, c := range []struct{ angle, thick, kg float64 }{{30, 12.70, .365}, {22.5, 12.70, .262}, {15, 12.70, .170}, {10, 12.70, .112}, {5, 12.70, .055},
		{22.5, 11.11, .200}} { // prints 0.192
		s := areaOf(t, bare(Joint{Type: SingleBevel, Thickness: c.thick, Angle: c.angle}), PA)
		near(t, fmt.Sprintf("half V %v deg", c.angle), Metal(s.Area, 1000, handbookDensity), c.kg, 0.0008)
	}
	for _, c := range []struct{ thick, gap, kg float64 }{{12.70, 6.35, .632}, {12.70, 3.175, .315}, {12.70, 1.588, .158},
		{19.05, 9.525, 1.421}, {7.94, 9.525, .592}} { // print 1.481 and 0.580
		s := areaOf(t, bare(Joint{Type: Square, Thickness: c.thick, RootGap: c.gap}), PA)
		near(t, fmt.Sprintf("gap %v x %v", c.thick, c.gap), Metal(s.Area, 1000, handbookDensity), c.kg, 0.0011)
	}
	// A cap 12.70 wide, 1.59 and 3.18 high: 0.106 and 0.210 kg/m (7.94 wide, 3.18 high is 0.1315;
	// prints 1.315). The cap here is 3 mm wider than the groove, so a gap of 9.70 has it.
	for _, c := range []struct{ wide, high, kg float64 }{{12.70, 1.59, .106}, {12.70, 3.18, .210}, {7.94, 3.18, .1315}} {
		flush := areaOf(t, bare(Joint{Type: Square, Thickness: 6, RootGap: c.wide - 3}), PA)
		j := bare(Joint{Type: Square, Thickness: 6, RootGap: c.wide - 3})
		j.Cap = c.high
		near(t, fmt.Sprintf("cap %v x %v", c.wide, c.high), Metal(areaOf(t, j, PA).Area-flush.Area, 1000, handbookDensity), c.kg, 0.0011)
	}
	// Handbook text: a half-inch fillet has 0.424 lb/ft.
	near(t, "1/2 in fillet", Metal(areaOf(t, bare(Joint{Type: Fillet, Leg: inch / 2}), PB).Area, 1000, handbookDensity)/lbPerFoot, 0.424, 0.003)
	// TWI Job Knowledge 95: area z^2/2 = a^2; unequal z1 z2 / 2.
	near(t, "a^2", areaOf(t, bare(Joint{Type: Fillet, Throat: 5}), PB).Area, 25, 1e-9)
	near(t, "z1 z2 / 2", areaOf(t, bare(Joint{Type: Fillet, Leg: 6, Leg2: 10}), PB).Area, 30, 1e-9)
}

// TestStubCorrection is the table of electrode efficiency for 51, 76, 102 and 127 mm stubs of
// ESAB AWTC Lesson 9, figure 5; printed to a tenth, some cut off instead of rounded.
func TestStubCorrection(t *testing.T) {
	for _, c := range []struct {
		long, eff float64
		want      [4]float64
	}{{12, .60, [4]float64{50, 45, 40, 35}}, {12, .70, [4]float64{58.3, 52.5, 46.6, 40.8}}, {14, .65, [4]float64{55.7, 51.1, 46.4, 41.8}},
		{14, .70, [4]float64{60, 55, 50, 45}}, {18, .75, [4]float64{66.6, 62.5, 58.3, 54.2}}} {
		for i, want := range c.want {
			p := Procedure{Efficiency: c.eff, ElectrodeLength: c.long * inch, StubLength: float64(2+i) * inch}
			d, _ := processData(111)
			near(t, fmt.Sprintf("%v in, %v, stub %d in", c.long, c.eff, 2+i), p.used(d, 4).Value*100, want, 0.11)
		}
	}
	// CIGWELD Deposition Data: 4.0 x 380, 150 g deposited of 188 g less 24.7 g of stub.
	near(t, "efficiency without stubs", 150/(188-24.7)*100, 91.9, 0.05)
}

// TestWireMetres is the ESAB MIG Handbook p. 7-10 for steel; its figures are within 1.5 % of geometry.
func TestWireMetres(t *testing.T) {
	for d, want := range map[float64]float64{0.030: 276.9, 0.035: 203.9, 0.045: 122.7, 1.0 / 16: 64.4} {
		near(t, fmt.Sprint(d), WireMetres(d*inch, 0), want, want*0.015)
	}
}

// TestDepositionRates: points and ranges printed by ESAB, CIGWELD, a wire's data sheet and TWI Job Knowledge 97, Table 1.
func TestDepositionRates(t *testing.T) {
	rate := func(p Procedure) float64 {
		d, ok := processData(p.Process)
		if !ok {
			t.Fatal(p.Process)
		}
		f, _ := p.rate(d, PA, steelDensity)
		return f.Value
	}
	// ESAB cost worksheet p. 8: E7018 4.8 mm 250 A 5.4 lb/h; E71T-1 1.6 mm 300 A 10.2 lb/h.
	near(t, "111 4.8", rate(Procedure{Process: 111, ElectrodeDiameter: 4.8, Current: 250})/pound, 5.4, 0.01)
	near(t, "136 1.6", rate(Procedure{Process: 136, WireDiameter: 1.6, Current: 300})/pound, 10.2, 0.01)
	// ESAB AWTC Lesson 9 s. 9.8: solid wire 7.4 lb/h.
	near(t, "135 250 A", rate(Procedure{Process: 135, Current: 250})/pound, 7.4, 0.02)
	// Maker's data for self-shielded wire of 2.0 mm: 200 and 240 in/min give 9.9 and 12.1 lb/h.
	near(t, "114 slow", rate(Procedure{Process: 114, WireDiameter: 2, WireFeed: 200 * 0.0254})/pound, 9.9, 0.3)
	near(t, "114 fast", rate(Procedure{Process: 114, WireDiameter: 2, WireFeed: 240 * 0.0254})/pound, 12.1, 0.3)
	for p, r := range map[Process][2]float64{111: {0.4, 5.5}, 135: {0.6, 12}, 136: {1, 15}, 121: {3, 16}} {
		if v := rate(Procedure{Process: p}); v < r[0] || v > r[1] {
			t.Errorf("%v usual rate %v outside %v", p, v, r)
		}
	}
	// CIGWELD Deposition Data, method: a plate of 2.000 kg weighs 2.095 after 60 s: 5.7 kg/h (W5).
	v, err := Weighed(2.000, 2.095, 60)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "W5", v, 5.7, 1e-9)
}

// TestAWSLimits is AWS D1.1:2020 Table 5.1.
func TestAWSLimits(t *testing.T) {
	inf := math.Inf(1)
	for _, c := range []struct {
		p    Process
		pos  Position
		want Limits
	}{
		{111, PA, Limits{10, 10, 5, 8}}, {111, PB, Limits{8, 8, 5, 6.4}}, {111, PF, Limits{12, 12, 5, 4.8}}, {111, PE, Limits{8, 8, 5, 4.8}},
		{136, PA, Limits{12, 10, 6, 3.2}}, {136, PB, Limits{10, 8, 6, 3.2}}, {135, PF, Limits{12, 12, 6, 2.4}}, {136, PD, Limits{8, 8, 6, 2}},
		{121, PA, Limits{Fillet: inf, Fill: 6}}, {121, PB, Limits{Fillet: 8, Fill: 6}},
	} {
		if got, ok := c.p.Limits(c.pos); !ok || got != c.want {
			t.Errorf("%v %v: %+v, want %+v", c.p, c.pos, got, c.want)
		}
	}
	if _, ok := Process(121).Limits(PE); ok {
		t.Error("submerged arc overhead has limits")
	}
	// Minimum fillet size table (inch form printed): 1/8, 3/16, 1/4, 5/16 in.
	for thick, in := range map[float64]float64{6: 1.0 / 8, 12: 3.0 / 16, 20: 1.0 / 4, 25: 5.0 / 16} {
		near(t, fmt.Sprint(thick), MinFillet(thick), in*inch, 0.4)
	}
	// AISC Steel Interchange: 5/16 in is the largest usual single-run horizontal fillet.
	near(t, "single run", singleLeg(136, PB), 5.0/16*inch, 0.1)
}

// TestPreheatAWS is AWS D1.1:2015 Table 3.3, as TI 809-26 Table 3-1 prints it too; category C in
// Fahrenheit 50, 150, 225, 300.
func TestPreheatAWS(t *testing.T) {
	for thick, want := range map[float64][3]float64{3: {0, 0, 10}, 20: {0, 0, 10}, 21: {65, 10, 65}, 38: {65, 10, 65}, 39: {110, 65, 110}, 65: {110, 65, 110}, 66: {150, 110, 150}} {
		for i, cat := range []string{"A", "B", "c"} {
			f, err := PreheatAWS(cat, thick)
			if err != nil {
				t.Fatal(err)
			}
			near(t, fmt.Sprint(cat, thick), f.Value, want[i], 0)
		}
	}
	for i, fahrenheit := range []float64{50, 150, 225, 300} {
		f, _ := PreheatAWS("C", []float64{10, 30, 50, 80}[i])
		near(t, "F", f.Value, (fahrenheit-32)/1.8, 3)
	}
}

// TestHoldTable is EN 1090-2:2008 Table 23.
func TestHoldTable(t *testing.T) {
	for _, c := range []struct{ size, heat, low, high float64 }{
		{6, 1, 0, 24}, {6, 5, 0, 24}, {6.1, 3, 8, 24}, {12, 3, 8, 24}, {12, 3.1, 16, 40}, {6.1, 4, 16, 40}, {12.1, 3, 16, 40}, {40, 1, 16, 40}, {12.1, 3.1, 40, 48}, {30, 4, 40, 48},
	} {
		for yield, want := range map[float64]float64{235: c.low, 420: c.low, 460: c.high, 690: c.high} {
			f, err := HoldBeforeNDT(c.size, c.heat, yield)
			if err != nil {
				t.Fatal(err)
			}
			near(t, fmt.Sprint(c, yield), f.Value, want, 0)
		}
	}
}

// TestHeatEfficiency is EN 1011-1 Table 1 as TWI slides and the SSAB Welding Handbook print it.
func TestHeatEfficiency(t *testing.T) {
	for p, want := range map[Process]float64{121: 1, 111: .8, 114: .8, 131: .8, 135: .8, 136: .8, 138: .8, 141: .6} {
		d, _ := processData(p)
		near(t, p.String(), d.heat.Value, want, 0)
	}
}

// TestPowerAndCable: set makers' manuals and a page on leads.
func TestPowerAndCable(t *testing.T) {
	// 400 A at 25 % is 282.8 A at 50 % (manual of a 400 A set).
	s := Set{RatedCurrent: 400, DutyCycle: 0.25}
	near(t, "50 %", s.CurrentAt(0.5), 282.8, 0.05)
	near(t, "back", s.Share(282.8), 0.5, 0.0005)
	// 200 A x 25 V / 0.85 = 5.9 kW (maker's page).
	near(t, "kW", Set{}.InputPower(25, 200), 5.9, 0.02)
	// A generator of 1.35 x the set's most (manuals).
	near(t, "generator", Generator(10), 13.5, 1e-9)
	// 20 m of 0.75 mm2 at 20 A lose 18.6 V (page on electric tools).
	v, err := VoltageDrop(20, 0.75, 20, false)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "volts", v, 18.6, 0.05)
	// Ten-minute period: 60 % is 6 minutes in 10 (AWS glossary).
	near(t, "rated", Set{RatedCurrent: 300, DutyCycle: 0.6}.Share(300)*10, 6, 1e-9)
}

// TestCuttingAndGouging: maker's manual of a 40 A plasma set, clean-cut speeds; handbook of air
// carbon-arc.
func TestCuttingAndGouging(t *testing.T) {
	for thick, want := range map[float64]float64{3: 3150, 4: 1900, 6: 1050, 8: 650, 10: 390, 12: 310, 15: 180, 20: 70, 25: 50} {
		f, _, err := Cut{Method: "plasma", Thickness: thick}.speed()
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprint(thick), f.Value, want, 1e-9)
	}
	for depth, want := range map[float64]float64{5: 6.5, 9: 8, 12: 9.5, 16: 12.7} {
		if c, ok := GougeWith(depth); !ok || c.Diameter != want {
			t.Errorf("groove %v mm: %+v, want %v mm", depth, c, want)
		}
	}
}

// TestGasFlow is the ESAB Filler Metal Handbook p. 8-7 in cubic feet an hour.
func TestGasFlow(t *testing.T) {
	const cfh = 28.316846592 / 60
	solid, _ := processData(135)
	cored, _ := processData(136)
	if f := solid.flow / cfh; f < 25 || f > 30 {
		t.Errorf("solid wire %v cfh, handbook 25 to 30", f)
	}
	near(t, "cored", cored.flow/cfh, 35, 0.1)
}
