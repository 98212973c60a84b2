package weld

import (
	"strings"

	"sailby/tasks/origin"
)

// Procedure is how a weld is made: a WPS or a house habit. Every field may be left at zero; what
// is given governs, and calculation stands beside it as a check.
type Procedure struct {
	Name     string
	Process  Process
	Position Position // the position its figures hold for; zero: current and feed as set, a given deposition is that in PA

	WireDiameter      float64 // mm
	ElectrodeDiameter float64 // mm, 111
	ElectrodeLength   float64 // mm; default 350, 450 from 4 mm on
	StubLength        float64 // mm thrown away; default 50
	Current           float64 // A
	Volts             float64 // V
	Travel            float64 // mm/min
	WireFeed          float64 // m/min
	Deposition        float64 // kg/h with the arc burning
	Efficiency        float64 // deposited over bought, 0 to 1, stub included unless StubLength is given
	OperatingFactor   float64 // arc over hands-on welding time, 0 to 1
	HeatEfficiency    float64 // k of EN 1011-1
	BeadArea          float64 // mm2 that one run lays

	Preheat      float64 // C at least; None for none whatever the standard says
	Interpass    float64 // C at most; default 250
	MinHeatInput float64 // kJ/mm
	MaxHeatInput float64 // kJ/mm

	GasFlow  float64 // L/min
	Hydrogen float64 // of the weld metal, ml in 100 g; default the steel's, else 5 or 10 by process

	Set    Set   // the welding set it is made with
	Cable  Cable // from the set to the arc
	Supply Cable // from the supply to the set

	Origins map[string]origin.Origin // by field in plain words: "current", "wire", "duty cycle"
}

// given makes the figure of a field of the procedure.
func (p Procedure) given(key string, v float64, unit string) origin.Figure {
	o := p.Origins[key]
	if o.Line == 0 && o.Source == "" {
		o.Source = strings.TrimSpace("procedure " + p.Name)
	}
	return origin.Written(key, v, unit, o)
}

// check refuses figures that no weld is made with.
func (p Procedure) check() error {
	if p.Process != 0 {
		if _, ok := processData(p.Process); !ok {
			return fault("process", "the processes here are 111, 114, 121, 131, 135, 136, 138 and 141", "process %d is not known here", int(p.Process))
		}
	}
	if p.Position > lastPosition {
		return fault("position", "PA to PG, PH, PJ or H-L045", "no such position")
	}
	preheat := p.Preheat
	if preheat == None {
		preheat = 0
	}
	err := first(
		optional("wire", p.WireDiameter, 0.6, 6.4, "mm"),
		optional("electrode", p.ElectrodeDiameter, 1.6, 8, "mm"),
		optional("electrode length", p.ElectrodeLength, 200, 1000, "mm"),
		optional("stub", p.StubLength, 10, 200, "mm"),
		optional("current", p.Current, 10, 1500, "A"),
		optional("volts", p.Volts, 8, 60, "V"),
		optional("travel", p.Travel, 20, 5000, "mm/min"),
		optional("wire feed", p.WireFeed, 0.5, 30, "m/min"),
		optional("deposition", p.Deposition, 0.1, 30, "kg/h"),
		optional("efficiency", p.Efficiency, 0.2, 1, ""),
		optional("operating factor", p.OperatingFactor, 0.01, 1, ""),
		optional("heat efficiency", p.HeatEfficiency, 0.3, 1, ""),
		optional("bead area", p.BeadArea, 2, 400, "mm2"),
		optional("preheat", preheat, 5, 400, "C"),
		optional("interpass", p.Interpass, 40, 500, "C"),
		optional("least heat input", p.MinHeatInput, 0.05, 20, "kJ/mm"),
		optional("most heat input", p.MaxHeatInput, 0.05, 20, "kJ/mm"),
		optional("gas flow", p.GasFlow, 3, 60, "L/min"),
		optional("hydrogen", p.Hydrogen, 0.5, 60, "ml/100 g"),
		p.Cable.check("welding cable"), p.Supply.check("supply cable"))
	if err != nil {
		return err
	}
	if p.MaxHeatInput > 0 && p.MinHeatInput > p.MaxHeatInput {
		return fault("heat input", "write the smaller first", "heat input from %.4g to %.4g kJ/mm runs from more to less", p.MinHeatInput, p.MaxHeatInput)
	}
	if p.StubLength > 0 && p.ElectrodeLength > 0 && p.StubLength >= p.ElectrodeLength/2 {
		return fault("stub", "50 mm is usual", "a stub of %.4g mm is half the electrode of %.4g mm", p.StubLength, p.ElectrodeLength)
	}
	return p.Set.check()
}

// fits refuses a wire for stick welding, and a stick electrode for the rest.
func (p Procedure) fits(d process) error {
	switch {
	case d.stick && p.WireDiameter > 0:
		return fault("wire", "give electrode, or the process of the wire", "%s has electrodes, no wire of %.3g mm", p.Process, p.WireDiameter)
	case d.stick && p.WireFeed > 0:
		return fault("wire feed", "give current or deposition, or the process of the wire", "%s has no wire feed", p.Process)
	case !d.stick && p.ElectrodeDiameter > 0:
		return fault("electrode", "give wire, or process 111", "%s has wire, no stick electrode of %.3g mm", p.Process, p.ElectrodeDiameter)
	}
	return nil
}

// size gives the wire or electrode in use.
func (p Procedure) size(d process) origin.Figure {
	switch {
	case p.ElectrodeDiameter > 0:
		return p.given("electrode", p.ElectrodeDiameter, "mm")
	case p.WireDiameter > 0:
		return p.given("wire", p.WireDiameter, "mm")
	case d.stick:
		return origin.House("electrode", d.size, "mm", "usual size")
	}
	return origin.House("wire", d.size, "mm", "usual size")
}

// electrode gives length and stub of the electrodes in use.
func (p Procedure) electrode(size float64) (length, stub origin.Figure) {
	length, stub = origin.House("electrode length", 350, "mm", "usual length; 450 mm from 4 mm on"), origin.House("stub", 50, "mm", "thrown away")
	if size >= 4 {
		length.Value = 450
	}
	if p.ElectrodeLength > 0 {
		length = p.given("electrode length", p.ElectrodeLength, "mm")
	}
	if p.StubLength > 0 {
		stub = p.given("stub", p.StubLength, "mm")
	}
	return length, stub
}

// used is deposited over bought, stub included.
func (p Procedure) used(d process, size float64) origin.Figure {
	if p.Efficiency > 0 && (!d.stick || p.StubLength == 0) {
		return p.given("efficiency", p.Efficiency, "")
	}
	eff := d.efficiency
	if p.Efficiency > 0 {
		eff = p.given("deposition efficiency", p.Efficiency, "")
	}
	if !d.stick {
		return eff
	}
	length, stub := p.electrode(size)
	return stubLoss(eff, length, stub)
}

// stubLoss corrects a deposition efficiency that leaves stubs out: efficiency x (length - stub)
// / length (ESAB AWTC Lesson 9, figure 5).
func stubLoss(efficiency, length, stub origin.Figure) origin.Figure {
	return origin.Worked("efficiency with stubs", efficiency.Value*(length.Value-stub.Value)/length.Value, "",
		"deposition efficiency x (electrode length - stub) / electrode length", efficiency, length, stub)
}
