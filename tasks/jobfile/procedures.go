package jobfile

import (
	"fmt"
	"maps"
	"slices"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
	"sailby/weld"
)

var procedureSection = section{name: "Procedure", where: "procedures / NAME", host: "procedures/site fillet", says: "How a weld is made. What is left out has the usual value of its process.", keys: []key{
	{name: "process", takes: itsOwn, form: "process, by ISO 4063 number or its usual name", shape: anyText, usual: "111 on site, 135 in the shop", example: "136", says: "the process"},
	{name: "position", takes: itsOwn, form: "ISO 6947 position", shape: anyText, usual: "the one position under `for`; else a deposition is that in PA", example: "PF", says: "the position that its figures hold for"},
	{name: "wire", takes: anAmount, dim: quantity.Length, low: 0.6, high: 6.4, example: "1.2 mm", says: "wire diameter"},
	{name: "electrode", takes: anAmount, dim: quantity.Length, low: 1.6, high: 8, example: "3.2 mm", says: "electrode diameter"},
	{name: "electrode length", takes: anAmount, dim: quantity.Length, low: 200, high: 1000, usual: "350 mm, 450 mm from 4 mm on", example: "350 mm", says: "length of an electrode"},
	{name: "stub", takes: anAmount, dim: quantity.Length, low: 10, high: 200, usual: "50 mm", example: "50 mm", says: "what is thrown away of an electrode"},
	{name: "current", takes: anAmount, dim: quantity.Current, low: 10, high: 1500, example: "210 A", says: "current"},
	{name: "volts", takes: anAmount, dim: quantity.Voltage, low: 8, high: 60, example: "25 V", says: "arc voltage"},
	{name: "travel", takes: anAmount, dim: quantity.Travel, low: 20, high: 5000, example: "300 mm/min", says: "travel speed"},
	{name: "wire feed", takes: anAmount, dim: quantity.Feed, low: 0.5, high: 30, example: "9 m/min", says: "wire feed speed"},
	{name: "deposition", takes: anAmount, dim: quantity.Deposition, low: 0.1, high: 30, example: "2.4 kg/h", says: "metal laid while the arc burns"},
	{name: "efficiency", takes: anAmount, dim: quantity.Percent, low: 0.2, high: 1, example: "86 %", says: "metal laid over metal bought"},
	{name: "operating factor", takes: anAmount, dim: quantity.Percent, low: 0.01, high: 1, example: "25 %", says: "arc time over hands-on time"},
	{name: "heat efficiency", takes: aNumber, low: 0.3, high: 1, example: "0.8", says: "k of EN 1011-1"},
	{name: "bead area", takes: anAmount, dim: quantity.Area, low: 2e-6, high: 400e-6, example: "30 mm2", says: "cross-section that one run lays"},
	{name: "preheat", takes: itsOwn, form: "temperature, or `none`", shape: anyText, usual: "by the standard", example: "75 C", says: "least temperature before welding"},
	{name: "interpass", takes: anAmount, dim: quantity.Temperature, low: 40, high: 500, usual: "250 C", example: "250 C", says: "greatest temperature between runs"},
	{name: "heat input", takes: itsOwn, form: "{min, max}", shape: limitsShape, example: "{min: 0.6 kJ/mm, max: 2 kJ/mm}", says: "limits of the procedure"},
	{name: "gas flow", takes: anAmount, dim: quantity.Flow, low: 3, high: 60, example: "16 L/min", says: "shielding gas"},
	{name: "kit", takes: aName, example: "mig set", says: "the set that it runs on"},
	{name: "hydrogen", takes: anAmount, dim: quantity.Hydrogen, low: 0.5, high: 60, usual: "5 or 10 ml/100 g, by process", example: "5 ml/100 g", says: "diffusible hydrogen of the weld metal, for preheat"},
}}

const maxDeclared = 500 // procedures, paints or assemblies

func (r *reader) readProcedures(f *fields) {
	for i, kv := range f.pairs("procedures") {
		if i == maxDeclared {
			f.fault("procedures", "leave out what is not used", "more than %d procedures", maxDeclared)
			return
		}
		name, ok := r.newName(kv[0], "procedure", true)
		if !ok {
			continue
		}
		p := r.procedure(name, kv[0], r.open(kv[1], &procedureSection, fmt.Sprintf("procedure %q", name)))
		if j := slices.IndexFunc(r.job.Procedures, func(q *tasks.Procedure) bool { return q.Name == name }); j >= 0 {
			r.job.Procedures[j] = p
			continue
		}
		r.job.Procedures = append(r.job.Procedures, p)
	}
}

func (r *reader) procedure(name string, at *yaml.Node, f *fields) *tasks.Procedure {
	p := &tasks.Procedure{Pos: r.pos(at)}
	p.Procedure = weld.Procedure{
		Name: name, Process: f.process("process"), Position: f.weldPosition("position"),
		WireDiameter: f.value("wire"), ElectrodeDiameter: f.value("electrode"), ElectrodeLength: f.value("electrode length"),
		StubLength: f.value("stub"), Current: f.value("current"), Volts: f.value("volts"), Travel: f.value("travel"),
		WireFeed: f.value("wire feed"), Deposition: f.value("deposition"), Efficiency: f.value("efficiency"),
		OperatingFactor: f.value("operating factor"), HeatEfficiency: f.value("heat efficiency"), BeadArea: f.value("bead area") * 1e6,
		Preheat:   f.orNone("preheat", &key{takes: anAmount, dim: quantity.Temperature, low: 5, high: 400, example: "75 C"}),
		Interpass: f.value("interpass"), GasFlow: f.value("gas flow"), Hydrogen: f.value("hydrogen"), Origins: map[string]origin.Origin{},
	}
	least, most := f.span("heat input", &key{takes: anAmount, dim: quantity.HeatInput, low: 0.05, high: 20, example: "0.6 kJ/mm"})
	if least != nil {
		p.MinHeatInput = *least
	}
	if most != nil {
		p.MaxHeatInput = *most
	}
	if ref, ok := f.name("kit"); ok {
		p.Kit = ref.text
		if r.kitOf[ref.text] == nil {
			r.unknown(ref.pos, f.lead("kit"), "kit", ref.text, r.kitNames())
		}
	}
	for name := range f.vals {
		p.Origins[name] = f.pos(name).Origin("")
	}
	if f.has("heat input") {
		p.Origins["least heat input"], p.Origins["most heat input"] = p.Origins["heat input"], p.Origins["heat input"]
	}
	f.setOf(&p.Procedure)
	if k := r.kitOf[p.Kit]; k != nil {
		p.SetFrom(k.Set)
	}
	r.byPerson(p, f)
	r.holdsFor(p, f)
	return p
}

// byPerson reads the rates of single people; people are checked once all are read.
func (r *reader) byPerson(p *tasks.Procedure, f *fields) {
	for _, kv := range f.pairs("by person") {
		name, ok := r.newName(kv[0], "person", true)
		if !ok {
			continue
		}
		r.personRefs = append(r.personRefs, personRef{ref{name, r.pos(kv[0])}, f.lead("by person")})
		g := r.open(kv[1], &byPersonSection, f.what+": by person: "+name)
		own := tasks.PersonRates{Person: name, Procedure: p.Procedure, Pos: r.pos(kv[0])}
		own.Origins = maps.Clone(p.Origins)
		for name, to := range map[string]*float64{"operating factor": &own.OperatingFactor, "current": &own.Current, "volts": &own.Volts, "travel": &own.Travel,
			"wire feed": &own.WireFeed, "deposition": &own.Deposition, "bead area": &own.BeadArea} {
			if !g.has(name) {
				continue
			}
			if *to = g.value(name); name == "bead area" {
				*to *= 1e6
			}
			own.Origins[name] = g.pos(name).Origin("")
		}
		p.By = append(p.By, own)
	}
}

func (r *reader) kitNames() []string {
	var out []string
	for _, k := range r.job.Kit {
		out = append(out, k.Name)
	}
	return out
}

// process reads a welding process; zero if it is left out or faulty.
func (f *fields) process(name string) weld.Process {
	s, ok := f.word(name)
	if !ok {
		return 0
	}
	p, ok := weld.ParseProcess(s)
	if !ok {
		f.fault(name, "write its ISO 4063 number: 111, 114, 121, 131, 135, 136, 138 or 141", "%s is not a welding process known here", short(s))
	}
	return p
}

// weldPosition reads a welding position; zero if it is left out or faulty.
func (f *fields) weldPosition(name string) weld.Position {
	s, ok := f.word(name)
	if !ok {
		return 0
	}
	p, ok := weld.ParsePosition(s)
	if !ok {
		f.fault(name, "write PA, PB, PC, PD, PE, PF, PG, PH, PJ or H-L045", "%s is not a welding position", short(s))
	}
	return p
}

// orNone reads an amount by k, or the word none, which is not the same as leaving it out.
func (f *fields) orNone(name string, k *key) float64 {
	s, ok := f.word(name)
	if !ok {
		return 0
	}
	if s == "none" {
		return weld.None
	}
	v, ok := f.r.amount(f.vals[name], f.lead(name), k)
	if ok && v == 0 {
		return weld.None
	}
	return v
}
