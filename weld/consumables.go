package weld

import (
	"fmt"
	"math"
	"sort"

	"sailby/tasks/origin"
)

// Consumable is something to take along: what the work uses up and what to take beyond it.
type Consumable struct {
	Name   string // "basic electrodes 4 mm", "cored wire 1.2 mm", "shielding gas"
	Amount float64
	Unit   string  // "kg", "L", "pieces"
	Spare  float64 // in the same unit, beyond Amount
	Mass   float64 // kg to carry of Amount and Spare; 0 for gas, whose bottles count
	Pieces int     // electrodes, spools or bottles that Amount and Spare fill; 0 where it does not apply
	Packed string  // what Pieces are: "electrodes", "spools of 15 kg", "bottles of 10 m3"
	Each   float64 // how much of Unit one of the Pieces holds; 0 where it does not apply
	Why    origin.Figure
	Count  origin.Figure // electrodes without Spare, of one seam; else it has no name
}

const (
	SpareShare = 0.15    // taken beyond the reckoned amount (house judgement)
	spoolMass  = 15.0    // kg (common practice)
	bottleGas  = 10000.0 // L in a 50 L bottle at 200 bar (common practice)
	siteGas    = 1.25    // more gas on site: 20 to 30 % (from memory)
	coating    = 1.6     // electrode over its core by mass, from counts a kilogram (from memory)
	thinCoat   = 1.5     // the same to 2.5 mm
	discMetres = 20.0    // metres of run that a grinding disc cleans (house judgement)
)

// bought is the filler bought: metal over efficiency, stubs included.
func (e *seamWork) bought() origin.Figure {
	eff := e.proc.used(e.data, e.size.Value)
	return origin.Worked("filler bought", e.metal.Value/eff.Value, "kg", "weld metal / "+eff.Name, e.metal, eff)
}

// electrodes is the count of electrodes: filler over the mass of one, core and coating.
func (e *seamWork) electrodes() origin.Figure {
	length, _ := e.proc.electrode(e.size.Value)
	over := coating
	if e.size.Value <= 2.5 {
		over = thinCoat
	}
	one := math.Pi * e.size.Value * e.size.Value / 4 * length.Value * steelDensity / 1e9 * over
	each := origin.Worked("mass of an electrode", one, "kg", "pi x electrode^2 / 4 x electrode length x 7850 / 1000000000 x coating",
		renamed(e.size, "electrode"), length, origin.Recalled("coating", over, "", "electrode over its core by mass"))
	b := e.bought()
	return origin.Worked("electrodes", math.Ceil(b.Value/one), "", "ceil(filler bought / mass of an electrode)", b, each)
}

// flow is the gas in use: as given, else usual, with a quarter more on site.
func (e *seamWork) flow(c Circumstances) origin.Figure {
	if e.proc.GasFlow > 0 {
		return e.proc.given("gas flow", e.proc.GasFlow, "L/min")
	}
	v := e.data.flow
	src := "ESAB Filler Metal Handbook p. 8-7: 25 to 30 cfh solid wire, 35 cfh cored wire to 1.6 mm"
	if e.data.number == 136 && e.size.Value >= 2 {
		v = 20
	}
	usual := origin.Published("usual flow", v, "L/min", src)
	if e.data.number == 141 || e.data.number == 131 {
		usual = origin.Recalled("usual flow", v, "L/min", "TIG 8 to 12, about 10 x wire diameter")
	}
	more := origin.Recalled("site factor on gas", bySite(c.Site, siteGas, 1), "", "20 to 30 % more on site")
	return origin.Worked("gas flow", v*more.Value, "L/min", "usual flow x site factor on gas", usual, more)
}

// consumables of one seam, without spares.
func (e *seamWork) consumables(c Circumstances) []Consumable {
	b := e.bought()
	dia := origin.Trim(e.size.Value)
	var list []Consumable
	switch {
	case e.data.stick:
		n := e.electrodes()
		list = append(list, Consumable{Name: "electrodes " + dia + " mm", Amount: b.Value, Unit: "kg", Packed: "electrodes", Pieces: int(n.Value), Why: b, Count: n})
	case e.data.number == 141:
		list = append(list, Consumable{Name: "filler rods " + dia + " mm", Amount: b.Value, Unit: "kg", Why: b})
	default:
		kind := "solid wire "
		switch e.data.number {
		case 114:
			kind = "self-shielded cored wire "
		case 136:
			kind = "flux-cored wire "
		case 138:
			kind = "metal-cored wire "
		}
		list = append(list, Consumable{Name: kind + dia + " mm", Amount: b.Value, Unit: "kg", Packed: "spools of 15 kg", Why: b})
	}
	if e.data.flow > 0 {
		flow := e.flow(c)
		gas := origin.Worked("shielding gas", flow.Value*e.arc.Value, "L", "gas flow x arc time", flow, e.arc)
		list = append(list, Consumable{Name: "shielding gas for " + e.data.name, Amount: gas.Value, Unit: "L", Packed: "bottles of 10 m3", Why: gas})
	}
	if e.data.number == 121 {
		flux := origin.Worked("flux", b.Value, "kg", "filler bought x flux to wire", b, origin.House("flux to wire", 1, "", "about as much flux as wire"))
		list = append(list, Consumable{Name: "flux", Amount: flux.Value, Unit: "kg", Why: flux})
	}
	if f, ok := e.propane(c); ok {
		list = append(list, Consumable{Name: "propane for preheat", Amount: f.Value, Unit: "kg", Why: f})
	}
	m := float64(e.runs.count) * e.length / 1000
	if e.joint.BackGouge {
		m += 5 * e.length / 1000 // grinding the gouge clean wears a disc as five runs do
	}
	disc := origin.House("grinding discs", m/discMetres, "", fmt.Sprintf("one for %.0f m of run; a gouge counts five runs", discMetres))
	return append(list, Consumable{Name: "grinding discs 125 mm", Amount: disc.Value, Unit: "pieces", Why: disc})
}

// gather adds up the seams' consumables by name and sets spares, pieces and mass.
func gather(parts []*seamWork, c Circumstances) []Consumable {
	at := map[string]int{}
	var list []Consumable
	for _, e := range parts {
		for _, n := range e.consumables(c) {
			i, ok := at[n.Name]
			if !ok {
				at[n.Name] = len(list)
				list = append(list, n)
				continue
			}
			l := &list[i]
			l.Amount += n.Amount
			l.Pieces += n.Pieces
			l.Count = origin.Figure{}
			if l.Why.Name != "all seams" {
				l.Why = origin.Figure{Name: "all seams", Unit: l.Unit, Origin: origin.Origin{Kind: origin.Formula, Source: "seam 1"}, From: []origin.Figure{renamed(l.Why, "seam 1")}}
			}
			name := fmt.Sprintf("seam %d", len(l.Why.From)+1)
			l.Why.From = append(l.Why.From, renamed(n.Why, name))
			l.Why.Origin.Source += " + " + name
			l.Why.Value = l.Amount
		}
	}
	for i := range list {
		list[i].spares()
	}
	sort.SliceStable(list, func(a, b int) bool { return rank(list[a].Unit) < rank(list[b].Unit) })
	return list
}

func rank(unit string) int {
	switch unit {
	case "kg":
		return 0
	case "L":
		return 1
	}
	return 2
}

// spares rounds to what can be taken: whole pieces, whole bottles, half kilograms of filler.
func (n *Consumable) spares() {
	with := n.Amount * (1 + SpareShare)
	switch {
	case n.Unit == "pieces":
		n.Amount = math.Max(1, math.Ceil(n.Amount-1e-9))
		n.Spare = math.Max(1, math.Ceil(n.Amount*SpareShare-1e-9))
		n.Mass = (n.Amount + n.Spare) * 0.2
	case n.Packed == "electrodes":
		one := n.Amount / math.Max(1, float64(n.Pieces))
		n.Each = one
		n.Pieces = int(math.Ceil(float64(n.Pieces)*(1+SpareShare) - 1e-9))
		n.Spare = n.Amount * SpareShare
		n.Mass = float64(n.Pieces) * one
	case n.Packed == "spools of 15 kg":
		n.Spare = n.Amount * SpareShare
		n.Each = spoolMass
		n.Pieces = int(math.Ceil(with/spoolMass - 1e-9))
		n.Mass = with
	case n.Unit == "L":
		n.Spare = n.Amount * SpareShare
		n.Each = bottleGas
		n.Pieces = int(math.Ceil(with/bottleGas - 1e-9))
	default:
		n.Spare = n.Amount * SpareShare
		n.Mass = with
	}
}

// GasPerKilogram gives litres of shielding gas for a kilogram of metal: 60 x flow / rate, for a
// flow in L/min and a deposition rate in kg/h. Special case: a rate of 0 gives +Inf.
func GasPerKilogram(flow, rate float64) float64 { return 60 * flow / rate }

// propane is the gas that preheats the seam once: the band's heat over what a torch leaves in the
// plate, at 46 MJ/kg.
func (e *seamWork) propane(c Circumstances) (origin.Figure, bool) {
	rise := e.heatTo.Value - c.Ambient
	if e.heatTo.Name == "" || rise <= 0 {
		return origin.Figure{}, false
	}
	t := e.thicker().Value
	kg := bandMass(t, c.Steel.density()) * e.joint.Length
	kept := origin.House("kept in the plate", 0.3, "", "of the flame's heat")
	burns := origin.House("heat of propane", 46000, "kJ/kg", "heating value")
	return origin.Worked("propane", kg*heatHeld*rise/kept.Value/burns.Value, "kg", "band mass x 0.49 x (preheat - ambient) / kept in the plate / heat of propane",
		origin.Worked("band mass", kg, "kg", "2 x 75 x thickness x density x length / 1000000000", e.thicker(),
			densityFigure(c.Steel.density()), origin.Written("length", e.joint.Length, "mm", e.joint.Origin)),
		e.heatTo, c.ambient(), kept, burns), true
}
