package sheets

import (
	"fmt"
	"strings"

	"sailby/report/agenda"
	"sailby/tasks/expand"
	"sailby/tasks/quantity"
)

// stopped prints what else could be done if the work has to stop.
func (k *pack) stopped(s *agenda.Shift, steps []*expand.Step, how form) {
	p, drawn := k.p, how != loose
	spare := agenda.Spare(k.a, s, 4)
	lead := ""
	if drawn {
		p.skip(1.5)
		lead = "If you have to stop."
	} else {
		p.heading("If you have to stop", 3*lineHeight(body))
	}
	p.para(joined(" ", lead, "Make it safe, write down the time and why, tell the lead hand.", k.emergencyLine(s, how)), body, false)
	var whole, safe []string
	for i, st := range steps {
		if st.InOneGo {
			whole = append(whole, fmt.Sprint(i+1))
		} else if st.SafeStop > 0 {
			words := fmt.Sprintf("%d not before %s of it is done", i+1, quantity.Hours(st.SafeStop))
			if st.SetUp > 0 {
				words += ", and starting again takes " + quantity.Hours(st.SetUp)
			}
			safe = append(safe, words)
		}
	}
	if len(safe) > 0 {
		p.para("Stopping: "+strings.Join(safe, "; ")+".", body, false)
	}
	if len(whole) > 0 {
		p.para("In one go, not to be begun unless it can be finished: "+strings.Join(whole, ", ")+".", body, false)
	}
	if len(spare) == 0 {
		if !drawn {
			p.para("Nothing planned for later is ready to be brought forward.", body, false)
		}
		return
	}
	const ready = "Work planned for later that is ready; look first at reach, hire and who is free:"
	var items []string
	for _, sp := range spare {
		when := ""
		if sp.From > s.From {
			when = "from " + agenda.Clock(sp.From, s.Zone) + " on"
		}
		items = append(items, joined(", ", agenda.StepLabel(k.work, sp.Step), where(s, sp.Step), quantity.Hours(sp.Step.Working), when))
	}
	if how == dense {
		p.para(ready+" "+strings.Join(items, "; ")+".", body, false)
		return
	}
	p.room(2 * lineHeight(body))
	p.para(ready, body, false)
	for _, it := range items {
		p.point("-", it, false)
	}
}

// begun has the boxes to fill in before work begins: permits first.
func (k *pack) begun(s *agenda.Shift, how form) {
	p := k.p
	if how != loose {
		p.skip(1)
	} else {
		p.heading("Before work begins", boxHeight+2*lineHeight(body))
	}
	first := []field{{label: "Brief held, initials"}, {label: "Tools and gear seen"}, {label: "Forecast, wind"}, {label: "Gas, tests"}}
	permits := agenda.Permits(k.work, s)
	if how == dense && len(permits) > 0 { // one row for all, the hours as text
		var valid []string
		var boxes []field
		for _, g := range permits {
			valid = append(valid, upper(g.Name)+" valid "+agenda.Opens(g, s.Zone))
			boxes = append(boxes, field{label: upper(g.Name) + " no."}, field{label: "Issued at, by"})
		}
		p.para(strings.Join(valid, "; ")+".", body, false)
		p.fields(6, append(boxes, first...)...)
		return
	}
	for _, g := range permits {
		p.fields(3, field{label: upper(g.Name) + " no."}, field{label: "Valid", value: agenda.Opens(g, s.Zone)}, field{label: "Issued at, by"})
	}
	p.fields(4, first...)
}

// emergencyLine says at the site whom to call and where to go, as far as the job file says; the
// cover has boxes for the rest.
func (k *pack) emergencyLine(s *agenda.Shift, how form) string {
	if !s.Site {
		return ""
	}
	e := k.job.Emergency
	if first := joined("; ", prefixed("telephone ", e.Phone), prefixed("radio ", e.Radio), prefixed("muster at ", e.Muster)); how == dense && first != "" {
		return "In an emergency: " + first + "; the rest is on the cover."
	}
	known := joined("; ", prefixed("telephone ", e.Phone), prefixed("radio ", e.Radio), prefixed("muster at ", e.Muster),
		prefixed("emergency department: ", e.Hospital), prefixed("boat: ", e.Boat))
	if known == "" {
		return "In an emergency: as on the cover."
	}
	return "In an emergency: " + known + "."
}

// closing has the boxes for the end of the shift. The box for notes takes what is left of the page;
// where little is left it stands beside the signature.
func (k *pack) closing(how form, watched bool) {
	const least, most = 25.0, 80.0
	p := k.p
	sign := []field{{label: "Lead hand, name and signature", units: 2}, {label: "Time"}}
	if watched {
		sign = append(sign, field{label: "Last fire watch ended"})
	}
	if how == dense {
		sign[0].label = "Lead hand signs"
		if watched {
			sign[2] = field{label: "Watch ended", units: 1}
		}
		p.signRow(sign)
		return
	}
	below := 1 + lineHeight(body) + boxHeight + 1.6
	beside := lineHeight(body) + boxHeight + 1.5 + lineHeight(body) + boxHeight
	head := 2.5 + lineHeight(strong) + 0.8
	if how != loose || p.y+head+lineHeight(body)+least+below > p.bottom && p.y+2+beside <= p.bottom {
		p.skip(2)
		p.room(beside)
		w, top := p.wide()*0.55, p.y
		p.note(w-gutter, beside-lineHeight(body))
		end, left := p.y, p.left
		p.y, p.left = top, p.left+w
		p.fields(1, field{label: sign[0].label})
		p.fields(len(sign)-1, sign[1:]...)
		p.y, p.left = max(end, p.y)+0.1, left
		return
	}
	p.heading("At the end", lineHeight(body)+least+below)
	p.note(p.wide()-gutter, min(max(p.bottom-p.y-lineHeight(body)-below, least), most))
	p.y++
	p.fields(2+len(sign)-1, sign...)
}

// note draws the box for what was found, w mm wide and h mm high.
func (p *pen) note(w, h float64) {
	p.run(p.left, p.y+ascent*body*mmPerPoint, fitted("Found, changed, stopped, and why", body, false, w), body, false)
	p.y += lineHeight(body)
	p.put(Item{Kind: Blank, X: p.left, Y: p.y, W: w, H: h, Stroke: thin})
	p.y += h
}

// signRow draws the end of a shift in one row: the box for what was found takes the height that is left.
func (p *pen) signRow(sign []field) {
	const least, most, share = 12.0, 40.0, 0.38
	p.skip(1)
	total, head := 0, lineHeight(body)
	for _, f := range sign {
		total += max(f.units, 1)
	}
	unit := p.wide() * (1 - share) / float64(total)
	labels := make([][]string, len(sign))
	for i, f := range sign {
		labels[i] = wrapText(f.label, body, false, unit*float64(max(f.units, 1))-gutter)
		head = max(head, float64(len(labels[i]))*lineHeight(body))
	}
	p.room(head + least)
	top, x := p.y, p.left+p.wide()*share
	h := min(max(p.bottom-top-head, least), most)
	for i, f := range sign {
		y := top + head - float64(len(labels[i]))*lineHeight(body)
		for n, s := range labels[i] {
			p.run(x, y+float64(n)*lineHeight(body)+ascent*body*mmPerPoint, s, body, false)
		}
		w := unit * float64(max(f.units, 1))
		p.put(Item{Kind: Blank, X: x, Y: top + head, W: w - gutter, H: least, Stroke: thin})
		x += w
	}
	p.y = top + head - lineHeight(body)
	p.note(p.wide()*share-gutter, h)
}
