package text

import (
	"sailby/plan"
	"sailby/report/agenda"
)

// orders says which orders the plan takes because a lift is allowed in no other (R24).
func (p *page) orders(a *plan.Answer) {
	if a == nil || a.Work == nil {
		return
	}
	first := true
	for _, o := range a.Work.Orders {
		if !o.Made {
			continue
		}
		if first {
			p.gap()
			p.raw("Order held for lifts (no other is allowed)")
			first = false
		}
		p.para("  - ", o.Text+inFile(agenda.At(o.Pos)))
	}
}
