package jobfile

import (
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
	"sailby/weld"
)

var setSection = section{name: "Welding set", where: "procedures / NAME / set (and kit / NAME / set)", host: "procedures/site fillet/set", says: "The rating plate of a welding set (IEC 60974-1).", keys: []key{
	{name: "rated", takes: anAmount, dim: quantity.Current, low: 10, high: 2000, example: "200 A", says: "current that it holds for its duty cycle"},
	{name: "duty cycle", takes: anAmount, dim: quantity.Percent, low: 0.05, high: 1, example: "35 %", says: "share of ten minutes at the rated current"},
	{name: "most", takes: anAmount, dim: quantity.Current, low: 10, high: 2000, usual: "rated", example: "250 A", says: "the most current that it gives"},
	{name: "efficiency", takes: anAmount, dim: quantity.Percent, low: 0.3, high: 1, usual: "85 %", example: "85 %", says: "power out over power in"},
	{name: "power factor", takes: aNumber, low: 0.3, high: 1, usual: "0.7", example: "0.7", says: "power factor"},
}}

var cableSection = section{name: "Cable", where: "procedures / NAME / welding cable or supply cable (and under kit)", host: "procedures/site fillet/supply cable", says: "A copper cable: to the arc, or from the supply to the set. Volts lost are reckoned there and back.", keys: []key{
	{name: "length", takes: anAmount, dim: quantity.Length, low: 100, high: 2e6, example: "40 m", beside: "section: 2.5 mm2", says: "one way"},
	{name: "section", takes: anAmount, dim: quantity.Section, low: 0.5, high: 500, example: "50 mm2", beside: "length: 40 m", says: "of one conductor"},
	{name: "volts", takes: anAmount, dim: quantity.Voltage, low: 24, high: 1000, usual: "230 V, three phases 400 V", example: "110 V", says: "of a supply"},
	{name: "phases", takes: aCount, low: 1, high: 3, usual: "1", example: "3", says: "of a supply: 1 or 3"},
}}

func setKeys() []key {
	return []key{
		{name: "set", takes: keysOf, sub: &setSection, example: "{rated: 200 A, duty cycle: 35 %}", says: "rating plate of the welding set"},
		{name: "welding cable", takes: keysOf, sub: &cableSection, example: "{length: 30 m, section: 50 mm2}", says: "from the set to the arc"},
		{name: "supply cable", takes: keysOf, sub: &cableSection, example: "{length: 40 m, section: 2.5 mm2, volts: 230 V}", says: "from the supply to the set"},
	}
}

func init() {
	procedureSection.keys = append(procedureSection.keys, setKeys()...)
	kitSection.keys = append(kitSection.keys, setKeys()...)
}

// setOf reads a welding set and its cables into p.
func (f *fields) setOf(p *weld.Procedure) {
	if p.Origins == nil {
		p.Origins = map[string]origin.Origin{}
	}
	if f.has("set") {
		g := f.r.open(f.node("set"), &setSection, f.what+": set")
		p.Set = weld.Set{RatedCurrent: g.value("rated"), DutyCycle: g.value("duty cycle"), MaxCurrent: g.value("most"), Efficiency: g.value("efficiency"), PowerFactor: g.value("power factor")}
		for name, word := range map[string]string{"rated": "rated current", "duty cycle": "duty cycle", "most": "most current", "efficiency": "set efficiency", "power factor": "power factor"} {
			if g.has(name) {
				p.Origins[word] = g.pos(name).Origin("")
			}
		}
		if (p.Set.RatedCurrent > 0) != (p.Set.DutyCycle > 0) {
			f.fault("set", "the rating plate has both, for instance {rated: 200 A, duty cycle: 35 %}", "rated current and duty cycle go together")
		}
	}
	f.cable("welding cable", &p.Cable, p.Origins)
	f.cable("supply cable", &p.Supply, p.Origins)
}

func (f *fields) cable(name string, c *weld.Cable, origins map[string]origin.Origin) {
	if !f.has(name) {
		return
	}
	g := f.r.open(f.node(name), &cableSection, f.what+": "+name)
	*c = weld.Cable{Length: g.value("length") / 1000, Section: g.value("section"), Volts: g.value("volts"), Phases: g.count("phases", 0)}
	origins[name] = f.pos(name).Origin("")
	switch {
	case g.tried("length") != g.tried("section"):
		f.fault(name, "write for instance {length: 30 m, section: 50 mm2}", "a cable has a length and a section")
	case c.Phases == 2:
		g.fault("phases", "write phases: 1, or phases: 3", "a supply has one phase or three")
	}
}

// byPersonSection has the keys of a procedure that a person's hand makes other.
var byPersonSection = section{name: "By person", where: "procedures / NAME / by person / NAME", host: "procedures/site fillet/by person/Ines", says: "What is another for one person; the rest is as in the procedure."}

func init() {
	for _, name := range []string{"operating factor", "current", "volts", "travel", "wire feed", "deposition", "bead area"} {
		byPersonSection.keys = append(byPersonSection.keys, *procedureSection.find(name))
	}
	procedureSection.keys = append(procedureSection.keys, key{name: "by person", takes: namedOf, sub: &byPersonSection, example: "{Ines: {operating factor: 28 %}}",
		says: "people who weld it at rates of their own: with `who` theirs hold, else the slowest of those who may weld it"})
}
