package weld

import (
	"fmt"
	"math"
	"strings"

	"sailby/tasks/origin"
)

// HoldBeforeNDT gives the least hours between the end of welding and final testing of EN
// 1090-2:2008 Table 23, for a size in mm (throat of a fillet, depth or thickness of a butt),
// heat input in kJ/mm and the steel's yield strength in N/mm2. 0 is: as soon as it has cooled.
//
// Errors: a *Error for a size, heat input or yield that is no number or not above zero.
func HoldBeforeNDT(size, heat, yield float64) (origin.Figure, error) {
	err := first(within("size", size, 0.1, maxThick, "mm"), within("heat input", heat, 0.05, 20, "kJ/mm"), within("yield", yield, 100, 1500, "N/mm2"))
	if err != nil {
		return origin.Figure{}, err
	}
	row := 0
	switch {
	case size <= 6:
	case size <= 12 && heat <= 3:
		row = 1
	case size <= 12 || heat <= 3:
		row = 2
	default:
		row = 3
	}
	// rows: to 6 mm; to 12 and to 3 kJ/mm; to 12 above 3, and above 12 to 3; above both
	hours := [4][2]float64{{0, 24}, {8, 24}, {16, 40}, {40, 48}}[row]
	col, steel := 0, "S235 to S420"
	if yield > 420 {
		col, steel = 1, "S460 and above"
	}
	f := origin.Published("time before NDT", hours[col], "h", fmt.Sprintf("EN 1090-2:2008 Table 23, %s (the 2018 edition keeps it, from memory)", steel))
	f.From = []origin.Figure{origin.Written("size", size, "mm", origin.Origin{}), origin.Written("heat input", heat, "kJ/mm", origin.Origin{})}
	return f, nil
}

// holding decides the time before final testing: the job's own, else the contract standard's.
func (e *seamWork) holding(c Circumstances) {
	std := strings.ToUpper(strings.ReplaceAll(c.Execution, " ", ""))
	var f origin.Figure
	asked := 0.0
	if strings.HasPrefix(std, "EN1090") {
		f, _ = HoldBeforeNDT(e.section.Size, math.Min(math.Max(e.heat.Value, 0.05), 20), c.Steel.yield())
		asked = f.Value
	}
	if asked > 0 && (c.Hold == None || c.Hold > 0 && c.Hold < asked) {
		e.warnf("the time before NDT is given as %.3g h, EN 1090-2:2008 Table 23 asks for %.0f h: what is given governs, ask who is to test", math.Max(c.Hold, 0), asked)
	}
	switch {
	case c.Hold == None:
		return
	case c.Hold > 0:
		f = origin.Written("time before NDT", c.Hold, "h", c.Origins["hold"])
	case strings.HasPrefix(std, "EN1090"):
		f.From = []origin.Figure{origin.Written("size", e.section.Size, "mm", e.joint.Origin), e.heat}
	case strings.HasPrefix(std, "AWSD1.1") && c.Steel.quenched():
		f = origin.Recalled("time before NDT", 48, "h", "AWS D1.1: quenched and tempered plate, at least 48 h")
	}
	if f.Value == 0 && f.Name == "" {
		return
	}
	e.hold = origin.Worked("wait before NDT", f.Value*60, "min", "time before NDT x 60", f)
}

// Weather is what a process can stand at the weld, after AWS D1.1.
type Weather struct {
	MaxWind float64 // m/s at the arc; 0: wind alone does not stop it
	MinAir  float64 // C around the joint
	Why     origin.Figure
}

// Weather gives the limits: 5 mph (2.2 m/s) for gas-shielded arcs, -20 C, and never wet steel.
// Steel below 0 C is warmed to 20 C first.
func (p Process) Weather() Weather {
	d, _ := processData(p)
	w := Weather{MinAir: -20, Why: origin.Published("least air temperature", -20, "C", "AWS D1.1: no welding below 0 F, or on wet steel")}
	if d.gasShielded() {
		w.MaxWind = 5 * 0.44704
		w.Why = origin.Published("most wind at the arc", w.MaxWind, "m/s", "AWS D1.1: 5 mph for gas-shielded processes, else a shelter")
	}
	return w
}

// Stops lists why welding must wait in wind (m/s at the arc), air temperature (C) and wet.
// Nothing listed means that the weather allows it.
func (w Weather) Stops(wind, air float64, wet bool) []string {
	var why []string
	if w.MaxWind > 0 && !(wind <= w.MaxWind) {
		why = append(why, fmt.Sprintf("wind %.1f m/s at a gas-shielded arc, limit %.1f m/s: put up a shelter", wind, w.MaxWind))
	}
	if !(air >= w.MinAir) {
		why = append(why, fmt.Sprintf("%.0f C at the joint, limit %.0f C: warm a shelter", air, w.MinAir))
	}
	if wet {
		why = append(why, "wet steel: dry it and keep it dry")
	}
	return why
}
