package sheets

import (
	"fmt"
	"strings"

	"sailby/report/agenda"
	"sailby/tasks/expand"
	"sailby/tasks/quantity"
)

// stopped prints what else could be done if the work has to stop.
func (k *pack) stopped(s *agenda.Shift, steps []*expand.Step, tight bool) {
	p := k.p
	spare := agenda.Spare(k.a, s, 4)
	lead := ""
	if tight {
		p.skip(1.5)
		lead = "If you have to stop."
	} else {
		p.heading("If you have to stop", 3*lineHeight(body))
	}
	p.para(joined(" ", lead, "Make it safe, write down the time and why, tell the lead hand.", k.emergencyLine(s)), body, false)
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
		if !tight {
			p.para("Nothing planned for later is ready to be brought forward.", body, false)
		}
		return
	}
	p.para("Work planned for later that is ready; look first at reach, hire and who is free:", body, false)
	for _, sp := range spare {
		when := ""
		if sp.From > s.From {
			when = "from " + agenda.Clock(sp.From, s.Zone) + " on"
		}
		p.point("-", joined(", ", agenda.StepLabel(k.work, sp.Step), where(s, sp.Step), quantity.Hours(sp.Step.Working), when), false)
	}
}

// begun has the boxes to fill in before work begins: permits first.
func (k *pack) begun(s *agenda.Shift, tight bool) {
	p := k.p
	if tight {
		p.skip(1)
	} else {
		p.heading("Before work begins", boxHeight+2*lineHeight(body))
	}
	for _, g := range agenda.Permits(k.work, s) {
		p.fields(3, field{label: upper(g.Name) + " no."}, field{label: "Valid", value: agenda.Opens(g, s.Zone)}, field{label: "Issued at, by"})
	}
	p.fields(4, field{label: "Brief held, initials"}, field{label: "Tools and gear seen"}, field{label: "Forecast, wind"}, field{label: "Gas, tests"})
}

// emergencyLine says at the site whom to call and where to go, as far as the job file says; the
// cover has boxes for the rest.
func (k *pack) emergencyLine(s *agenda.Shift) string {
	if !s.Site {
		return ""
	}
	e := k.job.Emergency
	known := joined("; ", prefixed("telephone ", e.Phone), prefixed("radio ", e.Radio), prefixed("muster at ", e.Muster),
		prefixed("emergency department: ", e.Hospital), prefixed("boat: ", e.Boat))
	if known == "" {
		return "In an emergency: as on the cover."
	}
	return "In an emergency: " + known + "."
}

// closing has the boxes for the end of the shift. The box for notes takes what is left of the page;
// where little is left it stands beside the signature.
func (k *pack) closing(tight, watched bool) {
	const least, most = 25.0, 80.0
	p := k.p
	sign := []field{{label: "Lead hand, name and signature", units: 2}, {label: "Time"}}
	if watched {
		sign = append(sign, field{label: "Last fire watch ended"})
	}
	below := 1 + lineHeight(body) + boxHeight + 1.6
	beside := lineHeight(body) + boxHeight + 1.5 + lineHeight(body) + boxHeight
	head := 2.5 + lineHeight(strong) + 0.8
	if tight || p.y+head+lineHeight(body)+least+below > p.bottom && p.y+2+beside <= p.bottom {
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
