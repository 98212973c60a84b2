package sheets

import (
	"fmt"
	"math"
	"slices"
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
	p.para("Every thing is seen by somebody before it is ticked. ! The job stops without it: it is on the chain that sets the finish, or the only one. House list: no task names it; strike out what is not wanted.", body, false)
	p.skip(2)
	var named, rest []packlist.Item
	for _, it := range l.Items {
		if it.House || it.Group == packlist.Papers {
			rest = append(rest, it)
		} else {
			named = append(named, it)
		}
	}
	k.namedThings(named)
	k.otherThings(rest)
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

// namedThings lists what tasks name, with amounts, masses and the day on which it is first needed.
func (k *pack) namedThings(list []packlist.Item) {
	if len(list) == 0 {
		return
	}
	t := k.p.table(column{"Out", 12.5}, column{"What", 92}, column{"Amount", 42}, column{"Needed", 25}, column{"Back", 13})
	group := packlist.Group("")
	for _, it := range list {
		if it.Group != group {
			group = it.Group
			t.row(say(""), loud(upper(string(group))), say(""), say(""), say(""))
		}
		day := ""
		if it.Day != 0 {
			day = agenda.ShortDay(it.Day, agenda.Zone(k.work, k.work.Window.Place))
		}
		t.row(write(), whatOf(it), amountCell(it), say(day), write())
	}
	t.end()
}

// otherThings lists papers and the house list, two in a row, and has rows for what the list does not know.
func (k *pack) otherThings(list []packlist.Item) {
	p := k.p
	t := p.table(column{"Out", 12.5}, column{"What", 66.5}, column{"Back", 13}, column{"Out", 12.5}, column{"What", 66.5}, column{"Back", 13})
	row := func(cells ...cell) {
		for len(cells) < 6 {
			cells = append(cells, say(""))
		}
		t.row(cells...)
	}
	var cells []cell
	head := ""
	for _, it := range list {
		c := cell{}
		name := upper(string(it.Group))
		if it.House {
			name += ", house list"
		}
		if name != head { // the first of a group says which
			head = name
			c = loud(name + ":")
		}
		amount := it.Amount
		if amount == "1" || amount == "house list" {
			amount = ""
		}
		c.lines = append(c.lines, line{text: joined(": ", marked(it), amount)})
		if where := stowed(it); where != "" {
			c.lines = append(c.lines, line{text: where})
		}
		if cells = append(cells, write(), c, write()); len(cells) == 6 {
			row(cells...)
			cells = nil
		}
	}
	if len(cells) > 0 {
		row(cells...)
	}
	for i := range 3 { // room for what the list does not know
		if i > 0 && p.y+3*boxHeight+8*lineHeight(body) > p.bottom {
			break
		}
		row(write(), cell{blank: true}, write(), write(), cell{blank: true}, write())
	}
	t.end()
}

// marked is the thing's name, with the mark of what the job stops without.
func marked(it packlist.Item) string {
	if it.Stops {
		return "! " + it.What
	}
	return it.What
}

// stowed says which box and vehicle a thing goes in.
func stowed(it packlist.Item) string {
	return joined("; ", prefixed("in box ", it.Box), strings.Join(it.Where, ", "))
}

// whatOf says what it is, for what, what stands in for it, and where it goes.
func whatOf(it packlist.Item) cell {
	c := loud(marked(it))
	spare := ""
	switch {
	case it.Spare != "":
		spare = "spare: " + it.Spare
	case it.Stops && it.Group != packlist.Loads:
		spare = "no spare named"
	}
	if s := joined("; ", prefixed("for ", strings.Join(it.For, ", ")), spare, stowed(it)); s != "" {
		c.lines = append(c.lines, line{text: s})
	}
	return c
}

func amountCell(it packlist.Item) cell {
	mass := ""
	if it.Mass > 0 {
		mass = origin.Trim(it.Mass) + " kg in all"
	}
	if it.Amount == "1" {
		return say(joined(", ", it.Amount, strings.TrimSuffix(mass, " in all")))
	}
	return say(it.Amount, mass)
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
		if l.Runs != "" {
			p.para(l.Runs, body, true)
		}
		for _, v := range append(slices.Clone(l.Vehicles), l.Split...) {
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
