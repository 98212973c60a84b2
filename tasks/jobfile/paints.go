package jobfile

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/coat"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

const pointForm = "{steel temperature: time}"

func points(name, example, says string) key {
	return key{name: name, takes: itsOwn, form: pointForm, shape: pointsShape, usual: "that of its kind", example: example, says: says}
}

var paintSection = section{name: "Paint", where: "paints / NAME", host: "paints/primer", says: "One paint as its own sheet describes it. What is left out is that of its kind, recalled and not from a sheet.", keys: []key{
	{name: "kind", takes: itsOwn, form: "kind of paint", shape: anyText, need: true, example: "two-pack epoxy", says: "one of: " + strings.Join(coat.Kinds(), ", ")},
	{name: "volume solids", takes: anAmount, dim: quantity.Percent, low: 0.05, high: 1, usual: "that of its kind", example: "65 %", says: "of the mix, unthinned"},
	{name: "dft", takes: anAmount, dim: quantity.Film, low: 5, high: 3000, usual: "that of its kind", example: "100 um", says: "dry film of one coat"},
	points("pot life", "{10 C: 4 h, 20 C: 2 h}", "of the mix; points by its temperature"),
	{name: "apply", takes: itsOwn, form: "{min, max} of steel temperature", shape: limitsShape, usual: "that of its kind", example: "{min: 5 C, max: 40 C}", says: "steel between which it may go on; no cure below the least"},
	{name: "humidity", takes: itsOwn, form: "{min, max}", shape: limitsShape, usual: "85 % at most", example: "{max: 85 %}", says: "of the air"},
	{name: "above dew point", takes: itsOwn, form: "kelvin", shape: anyText, usual: "3 K", example: "3 K", says: "how much warmer the steel must be than the dew point"},
	{name: "wind", takes: itsOwn, form: "{method: speed}", shape: massShape, usual: "by method", example: "{airless: 8 m/s}", says: "greatest wind; methods: " + strings.Join(coat.Methods(), ", ")},
	{name: "next coat", takes: itsOwn, form: "{paint, kind or any: {steel temperature: {min, max}}}", shape: nextShape, usual: "that of its kind", example: "{primer: {5 C: {min: 36 h, max: 30 d}, 20 C: {min: 8 h, max: 14 d}}}", says: "wait before the coat that follows (R10, R11)"},
	{name: "never", takes: itsOwn, form: "{kind: reason}", shape: datesShape, usual: "that of its kind", example: "{alkyd: its solvents lift it}", says: "what must not follow"},
	points("touch dry", "{10 C: 6 h, 20 C: 3 h}", "dust may settle: no longer wet film"),
	points("hard dry", "{10 C: 20 h, 20 C: 7 h}", "may be walked on, handled, slung: no longer soft film"),
	points("solvent gone", "{10 C: 48 h, 20 C: 20 h}", "hot work may be nearby"),
	points("service", "{10 C: 14 d, 20 C: 7 d}", "full cure"),
	points("immersion min", "{10 C: 24 h}", "before it may go under water"),
	points("immersion max", "{10 C: 90 d}", "the longest it may wait to go under water"),
	{name: "stays dry", takes: anAmount, dim: quantity.Time, low: 0, high: 14 * 1440, usual: "8 h", example: "8 h", says: "after the coat it must be dry for so long"},
	{name: "limits until", takes: aWord, words: coat.Untils(), usual: "touch dry (house judgement)", example: "hard dry", says: "what its limits of cold, dew point, humidity and wind hold until (R25)"},
	{name: "packs", takes: itsOwn, form: "volumes", shape: textOrList, usual: "that of its kind", example: "[5 L, 20 L]", says: "mixed paint in one tin or kit"},
	{name: "mix", takes: itsOwn, form: "base to hardener by volume", shape: anyText, usual: "that of its kind", example: "\"4:1\"", says: "mixing ratio"},
	{name: "induction", takes: anAmount, dim: quantity.Time, low: 0, high: 240, usual: "that of its kind", example: "15 min", says: "the mix stands before use"},
	{name: "thinner", takes: anAmount, dim: quantity.Percent, low: 0, high: 1, usual: "that of its kind", example: "5 %", says: "share of the paint's volume"},
	{name: "isocyanate", takes: yesNo, usual: "that of its kind", example: "no", says: "has isocyanates"},
}}

func (r *reader) readPaints(f *fields) {
	for i, kv := range f.pairs("paints") {
		if i == maxDeclared {
			f.fault("paints", "leave out what is not used", "more than %d paints", maxDeclared)
			return
		}
		name, ok := r.newName(kv[0], "paint", true)
		if !ok {
			continue
		}
		p := r.paint(name, kv[0], r.open(kv[1], &paintSection, fmt.Sprintf("paint %q", name)))
		if j := slices.IndexFunc(r.job.Paints, func(q *tasks.Paint) bool { return q.Name == name }); j >= 0 {
			r.job.Paints[j] = p
			continue
		}
		r.job.Paints = append(r.job.Paints, p)
	}
}

func (r *reader) paint(name string, at *yaml.Node, f *fields) *tasks.Paint {
	p := &tasks.Paint{Pos: r.pos(at)}
	faults := len(r.faults)
	if kind, ok := f.word("kind"); ok {
		base, known := coat.Defaults(kind)
		if !known {
			f.fault("kind", r.among(kind, coat.Kinds(), ""), "%s is not a kind of paint known here", short(kind))
		}
		p.Paint = base
	}
	if p.Sources == nil {
		p.Sources = map[string]origin.Origin{}
	}
	p.Name = name
	set := func(key string, into *float64, source string) {
		if f.has(key) {
			*into = f.value(key)
			p.Sources[source] = f.pos(key).Origin("")
		}
	}
	set("volume solids", &p.VolumeSolids, "volume solids")
	set("dft", &p.DFT, "dft")
	set("induction", &p.Induction, "induction")
	set("thinner", &p.Thinner, "thinner")
	if set("stays dry", &p.DryHours, "dry hours"); f.has("stays dry") {
		p.DryHours /= 60
	}
	if b := f.yesOrNot("isocyanate"); b != nil {
		p.Isocyanate = *b
	}
	if u := f.choice("limits until", ""); u != "" {
		p.LimitsUntil = u
		p.Sources["limits until"] = f.pos("limits until").Origin("")
	}
	f.paintLimits(p)
	for _, c := range []struct {
		key  string
		into *coat.Curve
	}{{"pot life", &p.PotLife}, {"touch dry", &p.TouchDry}, {"hard dry", &p.HardDry}, {"solvent gone", &p.SolventGone},
		{"service", &p.Service}, {"immersion min", &p.ImmersionMin}, {"immersion max", &p.ImmersionMax}} {
		if f.has(c.key) {
			*c.into = f.curve(c.key)
			p.Sources[c.key] = f.pos(c.key).Origin("")
		}
	}
	f.nextCoats(p)
	f.mixing(p)
	if len(r.faults) == faults && p.Kind != "" {
		if err := p.Paint.Validate(); err != nil {
			r.advice(at, "", err, "look at the paint's sheet")
		}
	}
	return p
}

// paintLimits reads the limits of application.
func (f *fields) paintLimits(p *tasks.Paint) {
	if lo, hi := f.span("apply", &key{takes: anAmount, dim: quantity.Temperature, low: -40, high: 120, example: "5 C"}); lo != nil || hi != nil {
		if lo != nil {
			p.ApplyMin = *lo
		}
		if hi != nil {
			p.ApplyMax = *hi
		}
		p.Sources["apply"] = f.pos("apply").Origin("")
	}
	if lo, hi := f.span("humidity", &key{takes: anAmount, dim: quantity.Percent, low: 0, high: 1, example: "85 %"}); lo != nil || hi != nil {
		if lo != nil {
			p.RHMin = *lo
		}
		if hi != nil {
			p.RHMax = *hi
		}
		p.Sources["humidity"] = f.pos("humidity").Origin("")
	}
	if s, ok := f.word("above dew point"); ok {
		v, err := quantity.Parse(strings.TrimSpace(strings.TrimSuffix(s, "K")), quantity.Number)
		if !strings.HasSuffix(s, "K") || err != nil || v < 0 || v > 30 {
			f.fault("above dew point", "write a difference in kelvin from 0 to 30, for instance 3 K", "%s is not a difference of temperature", short(s))
		} else {
			p.DewSpread = v
			p.Sources["dew spread"] = f.pos("above dew point").Origin("")
		}
	}
	for _, kv := range f.pairs("wind") {
		m := kv[0].Value
		if !slices.Contains(coat.Methods(), m) {
			f.r.fault(kv[0], f.r.among(m, coat.Methods(), ""), "%s%s is not a way to apply paint", f.lead("wind"), short(m))
			continue
		}
		if v, ok := f.r.amount(kv[1], f.lead("wind"), &key{takes: anAmount, dim: quantity.Speed, low: 0.1, high: 40, example: "8 m/s"}); ok {
			if p.WindMax == nil {
				p.WindMax = map[string]float64{}
			}
			p.WindMax[m] = v
			p.Sources["wind"] = f.pos("wind").Origin("")
		}
	}
}

var (
	celsiusKey = &key{takes: anAmount, dim: quantity.Temperature, low: -40, high: 120, example: "10 C"}
	waitKey    = &key{takes: anAmount, dim: quantity.Time, low: 1, high: 2 * 525600, example: "20 h"}
)

// curve reads points {10 C: 20 h, 20 C: 7 h}.
func (f *fields) curve(name string) coat.Curve {
	var out coat.Curve
	for _, kv := range f.pairs(name) {
		c, ok1 := f.r.amount(kv[0], f.lead(name), celsiusKey)
		t, ok2 := f.r.amount(kv[1], f.lead(name), waitKey)
		if ok1 && ok2 {
			out = append(out, coat.Point{Celsius: c, Min: t})
		}
	}
	return out
}

// nextCoats reads {primer: {5 C: {min: 36 h, max: 30 d}}} and what must never follow.
func (f *fields) nextCoats(p *tasks.Paint) {
	lead := f.lead("next coat")
	for _, kv := range f.pairs("next coat") {
		var rc coat.Recoat
		for _, point := range f.r.pairs(kv[1], lead+kv[0].Value+": ", "{5 C: {min: 36 h, max: 30 d}}") {
			c, ok := f.r.amount(point[0], lead, celsiusKey)
			if !ok {
				continue
			}
			what := strings.TrimSuffix(lead, ": ") + ": " + kv[0].Value + " at " + point[0].Value
			least, most := f.r.span(point[1], what, waitKey)
			if least != nil {
				rc.Min = append(rc.Min, coat.Point{Celsius: c, Min: *least})
			} else if point[1].Kind == yaml.MappingNode && most != nil {
				f.r.fault(point[1], "add min", "%s: there is no least wait", what)
			}
			if most != nil {
				rc.Max = append(rc.Max, coat.Point{Celsius: c, Min: *most})
			}
		}
		if p.NextCoat == nil {
			p.NextCoat = map[string]coat.Recoat{}
		}
		p.NextCoat[kv[0].Value] = rc
		p.Sources["next coat"], p.Sources["next coat max"] = f.pos("next coat").Origin(""), f.pos("next coat").Origin("")
	}
	for _, kv := range f.pairs("never") {
		if why, ok := f.r.text(kv[1], f.lead("never"), "its solvents lift it"); ok {
			if p.Never == nil {
				p.Never = map[string]string{}
			}
			p.Never[kv[0].Value] = why
		}
	}
}

// mixing reads packs and mixing ratio.
func (f *fields) mixing(p *tasks.Paint) {
	if f.has("packs") {
		p.PackSizes = nil
		for _, n := range f.items("packs") {
			if v, ok := f.r.amount(n, f.lead("packs"), &key{takes: anAmount, dim: quantity.Volume, low: 0.05, high: 1000, example: "5 L"}); ok {
				p.PackSizes = append(p.PackSizes, v)
			}
		}
		p.Sources["packs"] = f.pos("packs").Origin("")
	}
	if s, ok := f.word("mix"); ok {
		a, b, two := strings.Cut(s, ":")
		x, err1 := strconv.ParseFloat(strings.TrimSpace(a), 64)
		y, err2 := strconv.ParseFloat(strings.TrimSpace(b), 64)
		if !two || err1 != nil || err2 != nil || !(x > 0 && x <= 1000) || !(y > 0 && y <= 1000) {
			f.fault("mix", "write base to hardener by volume, for instance 4:1", "%s is not a mixing ratio", short(s))
			return
		}
		p.MixRatio = [2]float64{x, y}
		p.Sources["mix"] = f.pos("mix").Origin("")
	}
}
