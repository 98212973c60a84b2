package sheets

import (
	"fmt"
	"math"
	"strings"

	"sailby/report/agenda"
	"sailby/report/packlist"
	"sailby/tasks/origin"
)

// packing prints the packing list, the one that `sailby pack` gives, with boxes for out and back.
func (k *pack) packing() {
	l := packlist.Make(k.a)
	if l == nil {
		return
	}
	p := k.p
	p.begin("Packing list", "packing", true)
	p.big("Packing list")
	p.para("Every thing is seen by somebody before it is ticked. The job stops without what is marked so: it is used on the chain that sets the finish, or there is only one. House list: no task names it; strike out what is not wanted.", body, false)
	p.skip(2)
	t := p.table(column{"Out", 15}, column{"What", 84}, column{"Amount", 34}, column{"First needed", 28}, column{"Back", 15})
	group := packlist.Group("")
	for _, it := range l.Items {
		if it.Group != group {
			group = it.Group
			t.row(say(""), loud(strings.ToUpper(string(group)[:1])+string(group)[1:]), say(""), say(""), say(""))
		}
		day := ""
		if it.Day != 0 {
			day = agenda.When(it.Day, agenda.Zone(k.work, k.work.Window.Place))
		}
		t.row(write(), whatOf(it), amountCell(it), say(day), write())
	}
	for i := range 3 { // room for what the list does not know
		if i > 0 && p.y+3*boxHeight+8*lineHeight(body) > p.bottom {
			break
		}
		t.row(write(), cell{blank: true}, cell{blank: true}, cell{blank: true}, write())
	}
	t.end()
	if l.Mass > 0 {
		text := fmt.Sprintf("Together %s kg, as far as masses are known.", origin.Trim(math.Ceil(l.Mass)))
		if len(l.Unknown) > 0 {
			text += " Without a mass: " + strings.Join(l.Unknown, ", ") + "."
		}
		p.para(text+" Gas, fuel and paint have rules of their own on ferries and roads: ask the carrier.", body, false)
	}
	k.vehicleLoads(l)
	p.skip(2)
	p.fields(3, field{label: "Packed and seen by", units: 2}, field{label: "Date"})
}

// whatOf says what it is, for what, and what stands in for it.
func whatOf(it packlist.Item) cell {
	c := loud(it.What)
	if len(it.For) > 0 {
		c.lines = append(c.lines, line{text: "for " + strings.Join(it.For, ", ")})
	}
	if it.Stops {
		c.lines = append(c.lines, line{"Job stops without it.", true})
	}
	switch {
	case it.Spare != "":
		c.lines = append(c.lines, line{text: "spare: " + it.Spare})
	case it.Stops && it.Group != packlist.Papers && it.Group != packlist.Loads:
		c.lines = append(c.lines, line{text: "spare: none named"})
	}
	if where := joined("; ", prefixed("in box ", it.Box), strings.Join(it.Where, ", ")); where != "" {
		c.lines = append(c.lines, line{text: where})
	}
	return c
}

func amountCell(it packlist.Item) cell {
	c := say(it.Amount)
	if it.Mass > 0 {
		c.lines = append(c.lines, line{text: origin.Trim(it.Mass) + " kg in all"})
	}
	return c
}

// vehicleLoads prints boxes, what goes in which vehicle in the order of loading, straps and flags.
func (k *pack) vehicleLoads(l *packlist.List) {
	p := k.p
	if len(l.Boxes) > 0 {
		p.heading("Boxes", 2*lineHeight(body))
		for _, b := range l.Boxes {
			p.point("-", joined("; ", fmt.Sprintf("%s, %s kg: %s", b.Name, origin.Trim(b.Mass), strings.Join(b.Items, ", ")), b.Where), false)
		}
	}
	if len(l.Vehicles) > 0 || l.Reason != "" {
		p.heading("Vehicles", 3*lineHeight(body))
		p.para(joined("; ", l.Reason, prefixed("would do: ", l.Nearest)), body, !l.OK)
		for _, v := range l.Vehicles {
			p.para(v.Line()+", in the order of loading:", body, true)
			for n, g := range v.Goods {
				at := "in a corner"
				if !g.Loose {
					at = fmt.Sprintf("%s m from the headboard, %s m from the left", origin.Trim(g.X/1000), origin.Trim(g.Y/1000))
				}
				p.point(fmt.Sprintf("%d", n+1), fmt.Sprintf("%s, %s kg: %s", g.What, origin.Trim(g.Mass), at), false)
			}
			for _, s := range v.Straps {
				p.point("-", s.Line(), false)
			}
		}
	}
	if len(l.Flags) > 0 {
		p.heading("To be asked: flagged, not decided", 2*lineHeight(body))
		for _, f := range l.Flags {
			p.point("!", f, true)
		}
	}
	for _, n := range l.Notes {
		p.point("-", n, false)
	}
}
