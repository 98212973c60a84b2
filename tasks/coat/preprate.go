package coat

import (
	"math"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

const blastSpread = 0.25 // house judgement: published rates are for plates and a fresh nozzle

// blast sets minutes and abrasive of blasting.
func (p Prep) blast(g grade, out *Preparation) error {
	var names []string
	for _, a := range abrasives {
		names = append(names, a.name)
	}
	name, err := choose("abrasive", p.Abrasive, names[0], names)
	if err != nil {
		return err
	}
	i, err := findState(p.State)
	if err != nil {
		return err
	}
	nozzle, err := p.nozzle()
	if err != nil {
		return err
	}
	hose, err := p.hose()
	if err != nil {
		return err
	}
	a := abrasives[0]
	for _, b := range abrasives {
		if b.name == name {
			a = b
		}
	}
	effort := origin.House("rate of "+g.name+" against Sa 2 1/2", g.blast, "", "ease of the grade")
	state := origin.House("rate on "+states[i].name+" against new steel", states[i].blast, "", "state of the steel")
	shape := slowingFigure(p.Surface)
	base := origin.Published("rate with "+name, a.rate, "m2/h", abrasiveTable)
	rate := origin.Worked("rate", a.rate*g.blast*states[i].blast*shape.Value*nozzle.Value*hose.Value, "m2/h", "table x grade x state x surface x nozzle x hose",
		base, effort, state, shape, nozzle, hose)
	if p.Rate > 0 {
		rate = given("own rate", p.Rate, "m2/h")
	}
	minutes := p.Area / rate.Value * 60
	out.Range = quantity.Range{Low: minutes, Likely: minutes, High: minutes}
	if p.Rate == 0 {
		out.Range.Low, out.Range.High = minutes*(1-blastSpread), minutes*(1+blastSpread)
	}
	out.Hours = origin.Worked("hands-on", minutes, "min", "area / rate", given("area", p.Area, "m2"), rate)
	use := origin.Published("use of "+name, a.use, "kg/m2", abrasiveTable)
	out.Abrasive = p.Area * a.use / (g.blast * states[i].blast * shape.Value)
	out.Kilos = origin.Worked("abrasive", out.Abrasive, "kg", "area x use / (grade x state x surface)", given("area", p.Area, "m2"), use, effort, state, shape)
	out.Dust, out.Noise, out.Sparks, out.People = true, true, true, 2
	if a.silica {
		out.Warnings = append(out.Warnings, name+" holds free silica, and its dust kills slowly: dry blasting with it is forbidden in many countries; take another abrasive")
	}
	return nil
}

// slowingFigure is the share of the flat rate that is left on a surface, as for painting.
func slowingFigure(surface string) origin.Figure {
	return origin.House("share of the flat rate left on "+surface, slowing[surface], "", "as for painting: halve or worse")
}

// nozzle is the rate against the 9.5 mm nozzle of the table, by abrasive flow.
func (p Prep) nozzle() (origin.Figure, error) {
	const name = "rate of the nozzle against 9.5 mm"
	if p.Nozzle == 0 {
		return origin.Published(name, 1, "", nozzleTable), nil
	}
	if err := within("the nozzle", p.Nozzle, 6.3, 12.7, "mm", "give its bore: 6.35 mm to 12.7 mm (1/4 in to 1/2 in)"); err != nil {
		return origin.Figure{}, err
	}
	return origin.Published(name, between(nozzles, p.Nozzle)/between(nozzles, 9.525), "", nozzleTable+", straight lines between bores"), nil
}

// hose is the share of the rate that the blast hose leaves.
func (p Prep) hose() (origin.Figure, error) {
	if p.Hose == 0 {
		return origin.House("share left by the hose", 1, "", "no loss in the hose"), nil
	}
	if err := within("the hose", p.Hose, 19, 60, "mm", "give its bore: 19 mm (3/4 in) or more"); err != nil {
		return origin.Figure{}, err
	}
	return origin.Published("share left by the hose", 1-between(hoses, p.Hose), "", hoseTable), nil
}

// between reads a table on straight lines, its ends kept outside.
func between(rows [][2]float64, x float64) float64 {
	x = math.Max(rows[0][0], math.Min(rows[len(rows)-1][0], x))
	for i := 1; i < len(rows); i++ {
		if a, b := rows[i-1], rows[i]; x <= b[0] {
			return a[1] + (b[1]-a[1])*(x-a[0])/(b[0]-a[0])
		}
	}
	return rows[len(rows)-1][1]
}

// hand sets the minutes of work with hand and power tools, solvent and water.
func (p Prep) hand(g grade, out *Preparation) error {
	i, err := findState(p.State)
	if err != nil {
		return err
	}
	rates := byHand[g.name]
	if p.Method == needleGun {
		rates = needleRate
	}
	low, high := rates[0], rates[1]
	if states[i].heavy {
		low, high = rates[2], rates[3]
	}
	shape := slowingFigure(p.Surface)
	if g.methods[0] == washing || g.methods[0] == wiping {
		shape.Value = math.Sqrt(shape.Value) // water and cloth go round corners better than tools do
		shape.Origin.Source = "wiping and washing go round corners better than tools"
	}
	if p.Rate > 0 {
		minutes := p.Area / p.Rate * 60
		out.Range = quantity.Sure(minutes)
		out.Hours = origin.Worked("hands-on", minutes, "min", "area / own rate", given("area", p.Area, "m2"), given("own rate", p.Rate, "m2/h"))
	} else {
		quick, slow := p.Area/(high*shape.Value)*60, p.Area/(low*shape.Value)*60
		o := handSource()
		out.Range = quantity.Range{Low: quick, Likely: (quick + slow) / 2, High: slow}
		out.Hours = origin.Worked("hands-on", out.Range.Likely, "min", "area / rate, middle of slow and quick", given("area", p.Area, "m2"),
			origin.Figure{Name: "slow rate", Value: low, Unit: "m2/h", Origin: o}, origin.Figure{Name: "quick rate", Value: high, Unit: "m2/h", Origin: o}, shape)
	}
	tools := p.Method == powerTool || p.Method == needleGun
	out.Noise, out.Sparks = tools, tools
	out.Dust = tools || p.Method == handTool
	return nil
}
