package jobfile

import (
	"bytes"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
	"sailby/tasks/site"
)

var tideSection = section{name: "Tide", where: "places / NAME / tide", host: "places/pier/tide", says: "The tide at a place: a table, or constants to predict one from (R26).", keys: []key{
	{name: "table", takes: itsOwn, form: "file", shape: anyText, example: "tide.csv", says: "high and low waters: a CSV file whose head states `# zone:` and `# datum:`"},
	{name: "constants", takes: itsOwn, form: "file", shape: anyText, without: "table", example: "constants.csv", says: "harmonic constants: a CSV file whose head states `# zone: UTC`, `# datum:` and `# mean:`, with rows of name, amplitude and phase; not for safety"},
	{name: "pressure", takes: itsOwn, form: "{min, max}", shape: limitsShape, example: "{min: 985 hPa, max: 1030 hPa}", says: "least and greatest air pressure to be allowed for: 1 cm of water for each hPa from 1013"},
	{name: "surge", takes: anAmount, dim: quantity.Length, low: 0, high: 5000, example: "0.2 m", says: "to be allowed for wind and waves, either way"},
	{name: "craft", takes: keysOf, sub: &craftSection, example: "{needs: 3.2 m, comes in: 2027-04-05 14:30}", says: "what comes in on one tide and must get off again; the verdict says whether it is neaped"},
}}

var craftSection = section{name: "Craft", where: "places / NAME / tide / craft", host: "places/pier/tide/craft", says: "A boat or float that settles there.", keys: []key{
	{name: "needs", takes: anAmount, dim: quantity.Length, low: -30e3, high: 30e3, need: true, example: "3.2 m", says: "height of tide at which it floats there: sill or blocks, draught and margin, on the table's datum"},
	{name: "comes in", takes: aMoment, usual: "when the window opens", example: "2027-04-05 14:30", says: "afloat there"},
	{name: "off by", takes: aMoment, usual: "when the window closes", example: "2027-04-14 12:00", says: "must be off by then"},
}}

var pressureKey = &key{takes: anAmount, dim: quantity.Pressure, low: 0.87, high: 1.085, example: "985 hPa"}

// prediction is a tide to be predicted when the windows are known.
type prediction struct {
	p *tasks.Place
	f *fields
	h *site.Harmonic
}

// tide reads what is known of the water at a place.
func (r *reader) tide(p *tasks.Place, f *fields) {
	r.tideTried[p] = true
	switch {
	case f.has("table") && f.has("constants"):
		f.fault("constants", "keep the table", "there is a table as well")
	case f.has("table"):
		r.tideTable(p, f)
	case f.has("constants"):
		r.constants(p, f)
	case !f.tried("table") && !f.tried("constants"):
		f.fault("", "add `table: tide.csv`, whose head states zone and datum", "neither a table nor constants are given")
	}
	if least, most := f.span("pressure", pressureKey); least != nil || most != nil {
		p.Sea.AllowPos = f.pos("pressure")
		if least != nil {
			p.Sea.Allow.LeastPressure = *least * 1000
		}
		if most != nil {
			p.Sea.Allow.GreatestPressure = *most * 1000
		}
	}
	if f.has("surge") {
		p.Sea.AllowPos, p.Sea.Allow.Surge = f.pos("surge"), f.metres("surge").Value
	}
	if n := f.node("craft"); n != nil {
		g := r.open(n, &craftSection, f.what+": craft")
		p.Sea.Craft = &tasks.Craft{Pos: r.pos(n), Needs: g.metres("needs"), In: g.moment("comes in", p.Zone), By: g.moment("off by", p.Zone)}
	}
}

func (r *reader) tideTable(p *tasks.Place, f *fields) {
	file, ok := f.word("table")
	if !ok {
		return
	}
	data, shown, ok := f.beside("table", file)
	if !ok {
		return
	}
	t, err := site.ReadTideTable(shown, bytes.NewReader(data))
	if err != nil {
		f.sheetFaults("table", err)
		return
	}
	p.Tide = t
	for _, n := range t.Notes {
		r.note(f.pos("table"), "%s", n)
	}
}

func (r *reader) constants(p *tasks.Place, f *fields) {
	file, ok := f.word("constants")
	if !ok {
		return
	}
	data, shown, ok := f.beside("constants", file)
	if !ok {
		return
	}
	h, err := site.ReadHarmonic(shown, bytes.NewReader(data))
	if err != nil {
		f.sheetFaults("constants", err)
		return
	}
	r.predicted = append(r.predicted, prediction{p, f, h})
}

// predict makes the table of a place that has constants.
func (r *reader) predict(p prediction, all hours.Span) {
	t, err := p.h.Table(int64(all.From), int64(all.To))
	if err != nil {
		r.advice(p.f.vals["constants"], p.f.lead("constants"), err, "look at the constants")
		return
	}
	p.p.Tide = t
	r.note(p.f.pos("constants"), "place %q: its tide is predicted from constants: not for safety; put the authority's table in its place", p.p.Name)
	for _, n := range t.Notes {
		r.note(p.f.pos("constants"), "%s", n)
	}
}

// judgeSea notes levels that stand without an allowance.
func (r *reader) judgeSea() {
	for _, p := range r.job.Places {
		if p.Tide == nil || p.Sea.AllowPos.Given() {
			continue
		}
		for _, w := range p.Workfaces {
			if w.Level.Pos.Given() || w.CoversAt.Pos.Given() {
				r.note(p.Pos, "place %q: no allowance for pressure and surge is taken off its levels: name the least pressure and the surge (`tide: {pressure: {min: 985 hPa}, surge: 0.2 m}`)", p.Name)
				break
			}
		}
	}
}
