package jobfile

import (
	"errors"
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
	"sailby/weld"
)

var cuttingSection = section{name: "Cutting table", where: "cutting / NAME", host: "cutting/small plasma", says: "The house's own speeds of a cutting set or torch. A cut `by` its name is timed by it, and so is a cut by its way where it is the only table for it. It cuts nothing thicker than its last row.", keys: []key{
	{name: "by", takes: aWord, words: []string{"plasma", "oxy-fuel", "disc"}, need: true, example: "plasma", says: "the way to cut"},
	{name: "speeds", takes: itsOwn, form: "{thickness: speed}", shape: pointsShape, need: true, example: "{6 mm: 1400 mm/min, 12 mm: 450 mm/min}", says: "cutting speed by thickness cut; straight between two rows"},
	{name: "current", takes: anAmount, dim: quantity.Current, low: 15, high: 400, example: "45 A", says: "of a plasma set: a cut that asks for another current is not timed by it"},
	{name: "share", takes: anAmount, dim: quantity.Percent, low: 0.02, high: 1, usual: "30 % on site, 40 % in the shop", example: "35 %", says: "cutting over hands-on time; marking, guides, dross and moving are the rest"},
	{name: "piercing", takes: anAmount, dim: quantity.Time, low: 0.01, high: 30, usual: "20 s", example: "15 s", says: "each start inside the plate"},
	{name: "from", takes: aText, example: "timed in May", says: "where the speeds were taken from"},
}}

// readCutting reads the tables of cutting speeds of a file; later ones of a name win.
func (r *reader) readCutting(f *fields) {
	for i, kv := range f.pairs("cutting") {
		if i == maxDeclared {
			f.fault("cutting", "leave out what is not used", "more than %d tables", maxDeclared)
			return
		}
		name, ok := r.newName(kv[0], "cutting table", true)
		if !ok {
			continue
		}
		if slices.Contains([]string{"plasma", "oxy-fuel", "disc", "saw"}, name) || weld.IsActivity(name) {
			r.fault(kv[0], "call it after the set: small plasma", "a cutting table cannot be called %s: that is a way to work", short(name))
			continue
		}
		g := r.open(kv[1], &cuttingSection, "cutting table "+short(name))
		t := &tasks.CutTable{Pos: r.pos(kv[0])}
		t.CutTable = weld.CutTable{Name: name, Method: g.choice("by", ""), Current: g.value("current"), Share: g.value("share"), Pierce: g.value("piercing"), From: g.line("from"),
			Origins: map[string]origin.Origin{"cutting share": g.pos("share").Origin("share"), "piercing": g.pos("piercing").Origin("piercing")}}
		faults := len(r.faults)
		t.Rows = g.cutRows("speeds")
		if err := t.Check(); err != nil && len(r.faults) == faults && g.has("speeds") {
			var we *weld.Error
			if errors.As(err, &we) {
				g.fault("speeds", we.Hint, "%s", we.Problem)
			}
		}
		list := &r.job.Welding.Cutting
		if j := slices.IndexFunc(*list, func(o *tasks.CutTable) bool { return o.Name == name }); j >= 0 {
			(*list)[j] = t
			continue
		}
		*list = append(*list, t)
	}
}

func (f *fields) cutRows(name string) []weld.CutRow {
	thick := &key{takes: anAmount, dim: quantity.Length, low: 0.5, high: 500, example: "6 mm"}
	speed := &key{takes: anAmount, dim: quantity.Travel, low: 5, high: 20000, example: "1400 mm/min"}
	var out []weld.CutRow
	for _, kv := range f.pairs(name) {
		a, ok1 := f.r.amount(kv[0], f.lead(name), thick)
		b, ok2 := f.r.amount(kv[1], f.lead(name), speed)
		if ok1 && ok2 {
			out = append(out, weld.CutRow{Thickness: a, Speed: b, Origin: f.r.pos(kv[1]).Origin("")})
		}
	}
	slices.SortStableFunc(out, func(a, b weld.CutRow) int {
		switch {
		case a.Thickness < b.Thickness:
			return -1
		case a.Thickness > b.Thickness:
			return 1
		}
		return 0
	})
	return out
}

// cutBy finds the table that a cut is timed by: the one that `by` names, else the only one for
// its way and current. Several are a fault.
func (r *reader) cutBy(t *tasks.Task, f *fields) {
	var fit []*tasks.CutTable
	for _, c := range r.job.Welding.Cutting {
		if c.Name == t.By {
			t.CutBy, t.By = c, c.Method
			return
		}
		if c.Method == t.By && (c.Current == 0 || !t.Current.Pos.Given() || c.Current == t.Current.Value) {
			fit = append(fit, c)
		}
	}
	switch {
	case len(fit) == 1:
		t.CutBy = fit[0]
	case len(fit) > 1 && !t.Speed.Pos.Given() && !f.tried("hours") && !f.tried("man-hours"):
		var all []string
		for _, c := range fit {
			all = append(all, short(c.Name))
		}
		f.fault("by", "name the one it is cut with, for instance by: "+fit[0].Name, "several tables under `cutting` are for %s: %s", t.By, strings.Join(all, ", "))
	}
}

var readingSection = section{name: "Preheat reading", where: "preheat readings / item", host: "preheat readings/1", says: "One reading of a chart of EN 1011-2 method A. It holds for seams that ask for no more: CE and combined thickness not above it, hydrogen scale not worse, heat input not below.", keys: []key{
	{name: "CE", takes: aNumber, low: 0.05, high: 2, need: true, example: "0.45", says: "carbon equivalent CE(IIW), percent"},
	{name: "hydrogen scale", takes: aWord, words: []string{"A", "B", "C", "D", "E"}, need: true, example: "C", says: "A above 15 ml/100 g, B to 15, C to 10, D to 5, E to 3"},
	{name: "combined thickness", takes: anAmount, dim: quantity.Length, low: 1, high: 1000, need: true, example: "80 mm", says: "sum of what leads heat away: two parts at a butt, three at a T"},
	{name: "heat input", takes: anAmount, dim: quantity.HeatInput, low: 0.05, high: 20, need: true, example: "1.2 kJ/mm", says: "heat input"},
	{name: "preheat", takes: itsOwn, form: "temperature, or `none`", shape: anyText, need: true, example: "75 C", says: "what the chart gives there"},
}}

// readings reads what was read from method A's charts.
func (r *reader) readings(f *fields) []weld.ChartReading {
	var out []weld.ChartReading
	for i, n := range f.items("preheat readings") {
		if i == maxDeclared {
			f.fault("preheat readings", "leave out what is not used", "more than %d readings", maxDeclared)
			break
		}
		g := r.open(n, &readingSection, "preheat reading")
		c := weld.ChartReading{CE: g.value("CE"), Scale: g.choice("hydrogen scale", ""), Combined: g.value("combined thickness"), Heat: g.value("heat input"), Origin: r.pos(n).Origin("")}
		c.Preheat = g.orNone("preheat", &key{takes: anAmount, dim: quantity.Temperature, low: 5, high: 400, example: "75 C"})
		out = append(out, c)
	}
	return out
}
