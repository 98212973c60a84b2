package text

import (
	"io"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
)

// Ways prints only what would make the job fit. It gives the error of writing.
func Ways(w io.Writer, r *plan.Report, o Options) error {
	p := newPage(w, o)
	p.para("", r.Job.Name)
	p.gap()
	p.para("", agenda.Sentence(r.Likely, r.LowToo))
	p.ways(r.Ways)
	p.gap()
	p.para("", agenda.Care)
	return p.err
}

func (p *page) ways(w *plan.Ways) {
	if w == nil {
		return
	}
	p.gap()
	p.para("", agenda.WaysHead)
	for _, x := range w.List {
		p.para("  - ", agenda.Way(x)+inFile(agenda.At(x.Pos)))
		if s := agenda.WayWrite(x); s != "" {
			p.para("      ", s)
		}
	}
	for _, s := range agenda.WaysEnd(w) {
		p.para("  ", s)
	}
}

// waysForm are the ways for machines.
type waysForm struct {
	List  []wayForm `json:"list"`
	Tried int       `json:"tried"`
	Left  int       `json:"left_untried"`
	Not   []string  `json:"not_offered"`
}

type wayForm struct {
	Says   string        `json:"says"`
	Write  string        `json:"write"`
	At     string        `json:"at"`
	Set    []settingForm `json:"set"`
	Finish moment        `json:"finish"`
	InHand int           `json:"in_hand_min"`
}

type settingForm struct {
	Path  []string `json:"path"`
	Value string   `json:"value"`
}

func waysOf(r *plan.Report) *waysForm {
	if r.Ways == nil {
		return nil
	}
	f := &waysForm{List: []wayForm{}, Tried: r.Ways.Tried, Left: r.Ways.Left, Not: []string{}}
	for _, s := range r.Ways.Not {
		f.Not = append(f.Not, clean.Line(s))
	}
	for _, w := range r.Ways.List {
		x := wayForm{Says: agenda.Way(w), Write: clean.Line(w.Write), At: agenda.At(w.Pos), Set: []settingForm{}, Finish: siteMoment(r.Likely, w.Finish), InHand: w.InHand}
		for _, s := range w.Sets {
			x.Set = append(x.Set, settingForm{s.Path, s.Value})
		}
		f.List = append(f.List, x)
	}
	return f
}
