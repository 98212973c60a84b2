package jobfile

import (
	"fmt"
	"slices"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/lift"
	"sailby/tasks/quantity"
)

var kitWays = []string{"chain hoist", "lever hoist", "loader crane", "gantry", "trolley", "jack"}

var kitSection = section{name: "Kit", where: "kit / NAME", host: "kit/chain hoist", says: "Things there are only so many of.", keys: []key{
	{name: "count", takes: aCount, low: 1, high: 1000, usual: "1", example: "2", says: "how many there are"},
	{name: "gives", takes: anAmount, dim: quantity.Power, low: 0.1, high: 10000, example: "15 kVA", says: "power that it gives to what is in use"},
	{name: "draws", takes: anAmount, dim: quantity.Power, low: 0, high: 10000, example: "9 kVA", says: "power that one of it takes while in use"},
	{name: "stays", takes: yesNo, usual: "no", example: "yes", says: "held from start to finish of its task, pauses included (R7)"},
	{name: "at", takes: aName, usual: "goes along", example: "shop", says: "the place where it stays"},
	{name: "kind", takes: aWord, words: kitWays, usual: "its name, if that is one of them", example: "chain hoist", says: "what it is for a lift"},
	{name: "rated", takes: anAmount, dim: quantity.Mass, low: 1, high: 1e6, example: "1 t", says: "what one of it may lift"},
	{name: "speed", takes: anAmount, dim: quantity.Travel, low: 1, high: 1e5, example: "1.2 m/min", says: "of the hook under load, as its maker says"},
	{name: "mass", takes: anAmount, dim: quantity.Mass, low: 0.1, high: 1e6, example: "24 kg", says: "of one, for packing"},
	{name: "hangs from", takes: itsOwn, form: "{what: what that may carry}", shape: massShape, example: "{shop beam: 1.5 t}", says: "what it hangs from"},
	{name: "chart", takes: itsOwn, form: "{radius: mass}", shape: massShape, example: "{4 m: 2.4 t, 6 m: 1.5 t}", says: "what a crane lifts at which radius"},
	{name: "gust limit", takes: anAmount, dim: quantity.Speed, low: 1, high: 40, usual: "9.8 m/s where wind counts (from memory)", example: "9.8 m/s", says: "no lifts in stronger gusts (R25)"},
}}

var hireSection = section{name: "Hire", where: "hire / NAME", host: "hire/loader crane", says: "Kit that is there only in its slots (R23); all keys of kit, and these.", more: &kitSection, keys: []key{
	{name: "slots", takes: slots, need: true, example: "[2027-04-06 08:00-12:00, 2027-04-12 13:00-17:00]", says: "when it is there; local to its place"},
}}

const maxKit = 500

func (r *reader) readKit(f *fields) {
	for _, what := range []string{"kit", "hire"} {
		sec := map[string]*section{"kit": &kitSection, "hire": &hireSection}[what]
		for _, kv := range f.pairs(what) {
			if len(r.job.Kit) >= maxKit {
				f.fault(what, "leave out what there is enough of", "more than %d things are declared as kit", maxKit)
				return
			}
			name, ok := r.newName(kv[0], what, true)
			if !ok {
				continue
			}
			k := r.kit(name, kv[0], r.open(kv[1], sec, fmt.Sprintf("%s %q", what, name)))
			old := r.kitOf[name]
			if old != nil && old.Pos.File == k.Pos.File {
				r.fault(kv[0], "rename one of them", "%s %q: kit of that name is declared in line %d", what, name, old.Pos.Line)
				continue
			}
			r.kitOf[name] = k
			if i := slices.Index(r.job.Kit, old); i >= 0 {
				r.job.Kit[i] = k
			} else {
				r.job.Kit = append(r.job.Kit, k)
			}
		}
	}
}

func (r *reader) kit(name string, at *yaml.Node, f *fields) *tasks.Kit {
	k := &tasks.Kit{Name: name, Pos: r.pos(at), Keys: f.keys(), Count: f.count("count", 1), Gives: f.value("gives"), Draws: f.value("draws"),
		Stays: f.yes("stays"), At: f.place("at"), Rated: f.amount("rated", 0), Speed: f.amount("speed", 0), Mass: f.amount("mass", 0)}
	k.Speed.Value /= 1000
	k.Closed, k.HungAt, k.Stowing = f.amount("closed height", 0), f.amount("hung at", 0), f.stowing()
	k.Chart, k.Gust = f.chart("chart"), f.amount("gust limit", 0)
	f.setOf(&k.Set)
	kind := name
	if f.has("kind") {
		kind = f.choice("kind", name)
	}
	if way, err := lift.ParseWay(kind); err == nil && kind != "hands" {
		k.Kind, k.HasKind = way, true
	}
	for _, kv := range f.pairs("hangs from") {
		if what, ok := r.newName(kv[0], "thing", true); ok {
			if v, ok := r.amount(kv[1], f.lead("hangs from"), &key{takes: anAmount, dim: quantity.Mass, low: 1, high: 1e7, example: "1.5 t"}); ok {
				if k.Hangs == nil {
					k.Hangs = map[string]float64{}
				}
				k.Hangs[what] = v
			}
		}
	}
	if f.sec == &hireSection {
		zone := r.home
		if r.site != nil {
			zone = r.site.Zone
		}
		if k.At != nil {
			zone = k.At.Zone
		}
		k.Slots = f.slots("slots", zone)
		if k.Slots == nil {
			k.Slots = []tasks.Slot{}
		}
	}
	return k
}

// chart reads what a crane lifts at which radius, nearest first.
func (f *fields) chart(name string) []tasks.ChartPoint {
	var out []tasks.ChartPoint
	radius := &key{takes: anAmount, dim: quantity.Length, low: 100, high: 2e5, example: "4 m"}
	mass := &key{takes: anAmount, dim: quantity.Mass, low: 1, high: 1e6, example: "2.4 t"}
	for _, kv := range f.pairs(name) {
		a, ok1 := f.r.amount(kv[0], f.lead(name), radius)
		b, ok2 := f.r.amount(kv[1], f.lead(name), mass)
		if !ok1 || !ok2 {
			continue
		}
		out = append(out, tasks.ChartPoint{Radius: a / 1000, Mass: b})
	}
	slices.SortStableFunc(out, func(a, b tasks.ChartPoint) int { return int(1000*a.Radius) - int(1000*b.Radius) })
	for i := 1; i < len(out); i++ {
		if out[i].Mass > out[i-1].Mass || out[i].Radius == out[i-1].Radius {
			f.fault(name, "look at the chart again", "at %s m it lifts %s kg, at %s m %s kg: a crane lifts less further out", trim(out[i-1].Radius), trim(out[i-1].Mass), trim(out[i].Radius), trim(out[i].Mass))
			break
		}
	}
	return out
}
