package jobfile

import (
	"fmt"
	"math"
	"slices"

	"sailby/tasks"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
	"sailby/weld"
)

func pace(name string, high float64, example, usual, says string) key {
	return key{name: name, takes: itsOwn, form: "time per length, or `none`", shape: anyText, dim: quantity.Pace, high: high, usual: usual, example: example, says: says}
}

var ratesSection = section{name: "Rates", where: "rates", host: "rates", says: "The crew's own rates for welding and what goes with it, in place of the house's.", keys: []key{
	{name: "operating factor", takes: anAmount, dim: quantity.Percent, low: 0.01, high: 1, usual: "by process, on site and in the shop", example: "22 %", says: "arc time over hands-on welding time, for procedures without their own"},
	{name: "hands-on by", takes: aWord, words: []string{"operating factor", "parts"}, usual: "operating factor", example: "parts", says: "hands-on welding time is arc time over the operating factor, or the sum of its parts: arc, cleaning, starts, electrode changes"},
	pace("fit-up", 600, "8 min/m", "12 min/m on site, 3 in the shop", "pulling up and tacks, where no fit-up task comes before"),
	pace("moving", 600, "10 min/m", "on site 5 min/m (111), 12 (with a feeder), 18 (gas-shielded); in the shop 1", "leads, feeder, staging, wind shelter; a metre of seam and side"),
	pace("cleaning", 100, "1 min/m", "by process", "slag and interpass cleaning a metre of run; by parts"),
	pace("starting", 100, "4 min/m", "4 min/m on site, 2 in the shop", "getting to the seam, hood, looking, a metre of run; by parts"),
	{name: "electrode change", takes: itsOwn, form: "time, or `none`", shape: anyText, dim: quantity.Time, high: 10, usual: "15 s", example: "12 s", says: "each; by parts"},
	{name: "gouging", takes: anAmount, dim: quantity.Travel, low: 0.01 * 1000 / 60, high: 100 * 1000 / 60.0, usual: "3 m/h", example: "2.5 m/h", says: "back-gouging and grinding clean, all in"},
	{name: "set-up", takes: itsOwn, form: "time, or `none`", shape: anyText, dim: quantity.Time, high: 1440, usual: "20 min on site, 10 min in the shop", example: "15 min", says: "leading out and making ready, at every start"},
	{name: "turn", takes: itsOwn, form: "time, or `none`", shape: anyText, dim: quantity.Time, high: 1440, usual: "10 min", example: "20 min", says: "turning the part over once"},
}}

func init() { // and the preparing jobs, each in its own unit
	for _, a := range weld.Activities() {
		k := key{name: a.Name, takes: anAmount, usual: origin.Trim(a.Rate) + " " + a.Unit, says: a.Note}
		switch a.Unit {
		case "m/h":
			k.dim, k.low, k.high, k.example = quantity.Travel, 0.01*1000/60, 1e6/60, origin.Trim(a.Rate*1.5)+" m/h"
		case "kg/h":
			k.dim, k.low, k.high, k.example = quantity.Deposition, 0.01, 1000, origin.Trim(a.Rate*1.5)+" kg/h"
		default:
			k.dim, k.low, k.high, k.example, k.usual = quantity.Time, 0.01, 600, origin.Trim(a.Rate*2)+" min", origin.Trim(a.Rate)+" min each"
		}
		ratesSection.keys = append(ratesSection.keys, k)
	}
}

func percent(name, says string) key {
	return key{name: name, takes: anAmount, dim: quantity.Percent, low: 0, high: 0.3, example: "0.2 %", says: says}
}

var steelSection = section{name: "Steel", where: "steels / NAME", host: "steels/S355 plate", says: "A steel with what its certificate says; `steel` of the job, an assembly or a weld task names it.", keys: []key{
	{name: "grade", takes: aText, usual: "its name", example: "S355J2", says: "the grade; times before NDT and preheat go by its strength"},
	{name: "yield", takes: anAmount, dim: quantity.Stress, low: 100, high: 1500, usual: "that of the grade", example: "355 N/mm2", says: "yield strength"},
	{name: "density", takes: anAmount, dim: quantity.Density, low: 1500, high: 12000, usual: "7850 kg/m3", example: "7850 kg/m3", says: "density of the weld metal"},
	percent("C", "carbon"), percent("Mn", "manganese"), percent("Mo", "molybdenum"), percent("Cr", "chromium"),
	percent("Cu", "copper"), percent("Ni", "nickel"), percent("V", "vanadium"),
	{name: "CEV", takes: aNumber, low: 0.05, high: 2, usual: "from the analysis", example: "0.43", says: "carbon equivalent CE(IIW) on the certificate, percent"},
	{name: "CET", takes: aNumber, low: 0.05, high: 2, usual: "from the analysis", example: "0.32", says: "carbon equivalent CET on the certificate, percent"},
}}

var holdKey = key{name: "hold before NDT", takes: itsOwn, form: "time, or `none`", shape: anyText, usual: "that of the contract's standard", example: "16 h", says: "from the end of welding to final testing; it governs, and a note says where the standard asks for more"}

const maxSteels = 200

// readSteels reads the steels of a file; later ones of a name replace earlier ones.
func (r *reader) readSteels(f *fields) {
	for i, kv := range f.pairs("steels") {
		if i == maxSteels {
			f.fault("steels", "leave out what is not used", "more than %d steels", maxSteels)
			return
		}
		name, ok := r.newName(kv[0], "steel", true)
		if !ok {
			continue
		}
		g := r.open(kv[1], &steelSection, fmt.Sprintf("steel %q", name))
		s := &tasks.Steel{Name: name, Pos: r.pos(kv[0])}
		s.Steel = weld.Steel{Grade: g.line("grade"), Yield: g.value("yield"), Density: g.value("density"), CEV: g.value("CEV"), Cet: g.value("CET"),
			C: g.value("C") * 100, Mn: g.value("Mn") * 100, Mo: g.value("Mo") * 100, Cr: g.value("Cr") * 100, Cu: g.value("Cu") * 100,
			Ni: g.value("Ni") * 100, V: g.value("V") * 100, Origin: s.Pos.Origin("")}
		if s.Grade == "" {
			s.Grade = name
		}
		if s.C == 0 && s.CEV == 0 && s.Cet == 0 && s.Mn+s.Mo+s.Cr+s.Cu+s.Ni+s.V > 0 {
			g.fault("", "add `C: 0.17 %`", "an analysis without carbon gives no carbon equivalent")
		}
		w := &r.job.Welding
		if j := slices.IndexFunc(w.Steels, func(o *tasks.Steel) bool { return o.Name == name }); j >= 0 {
			w.Steels[j] = s
			continue
		}
		w.Steels = append(w.Steels, s)
	}
}

// readRates reads the crew's rates; later files win, key by key.
func (r *reader) readRates(f *fields) {
	n := f.node("rates")
	if n == nil {
		return
	}
	g := r.open(n, &ratesSection, "rates")
	w := &r.job.Welding
	if w.Rates.Origins == nil {
		w.Rates.Origins, w.Activities = map[string]origin.Origin{}, map[string]tasks.Amount{}
	}
	set := func(name string, to *float64, v float64) {
		if g.has(name) {
			*to = v
			w.Rates.Origins[name] = g.pos(name).Origin("")
		}
	}
	bare := func(name string) float64 {
		k := *g.key(name)
		return g.orNone(name, &key{takes: anAmount, dim: k.dim, low: 0, high: k.high, example: k.example})
	}
	set("operating factor", &w.Rates.OperatingFactor, g.value("operating factor"))
	set("fit-up", &w.Rates.FitUp, bare("fit-up"))
	set("moving", &w.Rates.Moving, bare("moving"))
	set("cleaning", &w.Rates.Cleaning, bare("cleaning"))
	set("starting", &w.Rates.Starting, bare("starting"))
	change := bare("electrode change")
	if change != weld.None {
		change *= 60 // seconds
	}
	set("electrode change", &w.Rates.ElectrodeChange, change)
	set("gouging", &w.Rates.Gouging, g.value("gouging")*60/1000)
	set("set-up", &w.Rates.SetUp, bare("set-up"))
	set("turn", &w.Rates.Turn, bare("turn"))
	if g.has("hands-on by") {
		w.ByParts = g.choice("hands-on by", "operating factor") == "parts"
	}
	for _, a := range weld.Activities() {
		if !g.has(a.Name) {
			continue
		}
		v := g.amount(a.Name, 0)
		if a.Unit == "m/h" {
			v.Value *= 60.0 / 1000
		}
		w.Activities[a.Name] = v
	}
}

// readWelding reads what holds for all welds of the job.
func (r *reader) readWelding(f *fields) {
	w := &r.job.Welding
	w.Preheat = f.choice("preheat by", "")
	w.Hold = f.hold()
	w.Chart = r.readings(f)
	if lay := f.yesOrNot("overweld"); lay != nil {
		w.NoOverweld = !*lay
	}
}

// hold reads the hours before NDT, or none.
func (f *fields) hold() tasks.Amount {
	v := f.orNone("hold before NDT", &key{takes: anAmount, dim: quantity.Time, low: 0, high: 60000, example: "16 h"})
	if v != weld.None {
		v /= 60
	}
	return tasks.Amount{Value: v, Pos: f.pos("hold before NDT")}
}

// resolveRepairs finds the welds that repair tasks are about, and their chance where the file
// leaves it to the share of seams that usually needs repair.
func (r *reader) resolveRepairs() {
	byName := map[string]*tasks.Task{}
	for _, d := range r.drafts {
		byName[d.t.Name] = d.t
	}
	for _, d := range r.drafts {
		if d.t.Kind != tasks.Weld || !d.f.has("repair of") {
			continue
		}
		at, ok := d.f.name("repair of")
		if !ok {
			continue
		}
		lead := d.f.lead("repair of")
		list := r.resolve(at, lead, d.block, d.t.Round)
		if len(list) > 1 {
			r.faultAt(at.pos, "name one round", "%s%s means several tasks", lead, short(at.text))
		}
		if len(list) != 1 {
			continue
		}
		of := byName[list[0]]
		switch {
		case of == nil:
		case of.Kind != tasks.Weld || len(of.Seams) == 0:
			if of != d.t {
				r.faultAt(at.pos, "name a weld with its joints", "%s%s has no joints", lead, short(at.text))
			} else {
				r.faultAt(at.pos, "name the weld that is repaired", "%sit is no repair of itself", lead)
			}
		default:
			d.t.Repairs = of
			if d.t.Chance == 0 {
				d.t.Chance = r.repairChance(of)
			}
		}
	}
}

// repairChance is how likely testing finds something to repair (weld.Estimate.Repair).
func (r *reader) repairChance(of *tasks.Task) float64 {
	seams := make([]weld.Seam, len(of.Seams))
	for i, s := range of.Seams {
		seams[i] = s.Seam
	}
	c := weld.Circumstances{Site: of.Place == r.site}
	e, err := weld.Work(seams, c)
	if err != nil {
		return 0 // said where the weld is estimated
	}
	chance := e.Repair(c, tasks.BadAccess(of.Seams)).Chance
	return min(max(math.Round(chance*100)/100, 0.01), 0.99)
}
