package tasks

import (
	"sailby/tasks/hours"
	"sailby/tasks/origin"
	"sailby/tasks/site"
)

// Weather is what a climate with normals gives beside the hours that are planned with.
type Weather struct {
	Average *site.Series    // the average day, shown beside the poor one
	Warm    *site.Series    // for what heat shortens: longest waits, pot life
	Assumed []origin.Figure // what the outlook assumes beyond the normals
}

// Sea is what is known of the water at a place beside its table.
type Sea struct {
	Allow    site.Allowance // for pressure and surge
	AllowPos Pos            // Pos.Given tells whether the job file says any
	Craft    *Craft
}

// Craft is what comes in on one tide and must get off again.
type Craft struct {
	Pos   Pos
	Needs Amount  // m on the tide table's datum
	In    *Moment // afloat then; nil: when the window opens
	By    *Moment // off again; nil: when the window closes
}

// FaceNature is how weather and water bear on a workface.
type FaceNature struct {
	Indoors   bool   // the place's weather does not hold there
	Sheltered bool   // rain and wind are kept off
	Wash      Amount // minutes at every start of a weld or coat; Pos.Given overrules the default
}

// TaskNature is what a prep, a coat or hot work says about film, water and bare steel.
type TaskNature struct {
	Covered  *bool  // may be covered by water before it is done; nil: a coat by its immersion min, others yes
	PaintOff bool   // hot work: the paint is taken off first
	HoldsFor Amount // surface prep: minutes to the first coat; Pos.Given overrules
	Stripe   Amount // coat: mm of edges and welds striped before the first full coat
	Bare     Amount // coat: mm of seam left bare, 50 mm to each side
	Patch    Amount // surface prep, coat: mm of seam whose bare strips it takes
	Profile  Amount // coat: um of blast profile that the first coat fills
}

// Floods says whether water covers the workface, by its level and a tide table, or by its reach.
func (f *Workface) Floods() bool {
	if f == nil {
		return false
	}
	return (f.Level.Pos.Given() || f.CoversAt.Pos.Given()) && f.Place != nil && f.Place.Tide != nil || f.Tidal && f.Reach != nil
}

// Hourly gives the weather that work at a place and workface is planned with; nil where none holds.
func (p *Place) Hourly(f *Workface) *site.Series {
	if p == nil || p.Climate == nil || f != nil && f.Indoors {
		return nil
	}
	return p.Climate.Hourly
}

// WarmHourly gives the weather of the warm day; the planned one where there is no other.
func (p *Place) WarmHourly(f *Workface) *site.Series {
	s := p.Hourly(f)
	if s != nil && p.Climate.Warm != nil {
		return p.Climate.Warm
	}
	return s
}

// UsualWash is the wash and drying of what the water has covered before a weld or coat, minutes
// (house judgement).
const UsualWash = 15

// WashTime gives the minutes of wash and drying at a workface, 0 where no water comes.
func (f *Workface) WashTime() origin.Figure {
	if !f.Floods() {
		return origin.Figure{}
	}
	if f.Wash.Pos.Given() {
		return origin.Written("fresh-water wash and drying", f.Wash.Value, "min", f.Wash.Pos.Origin("wash"))
	}
	return origin.House("fresh-water wash and drying", UsualWash, "min", "salt and damp off what the tide has covered")
}

// Resolve gives when the craft comes in and when it must be off, in a window.
func (c *Craft) Resolve(at func(Moment) (hours.Minute, bool), opens, closes hours.Minute) (in, by hours.Minute) {
	in, by = opens, closes
	if c.In != nil {
		if m, ok := at(*c.In); ok {
			in = m
		}
	}
	if c.By != nil {
		if m, ok := at(*c.By); ok {
			by = m
		}
	}
	return in, by
}
