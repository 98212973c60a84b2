package sheets

import (
	"fmt"
	"math"
	"strings"

	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
	"sailby/weld"
)

// handover is one page to give the work over: to the next crew, or to the client.
func (k *pack) handover() {
	p := k.p
	p.begin("Handover", "handover", true)
	p.big("Handover")
	p.para("Filled in by who goes, gone through face to face, checked at the work by who comes. Copy it for every handover.", body, false)
	p.skip(2)
	p.fields(4, field{label: "Date, time"}, field{label: "Place", value: agenda.PlaceLabel(k.work.Window.Place), units: 2}, field{label: "Shift ended"})
	const big = 22.0
	for _, s := range []string{"Done", "Open, and how far", "Permits and isolations still live", "Temporary works and lifting gear left in place",
		"Wet film, cure and standing time running, until when", "Condition of machines, gas, fuel, paint left", "What the next must know, and what others near by are doing"} {
		p.room(big + lineHeight(body) + 1)
		p.run(p.left, p.y+ascent*body*mmPerPoint, paper(s), body, false)
		p.y += lineHeight(body)
		p.put(Item{Kind: Blank, X: p.left, Y: p.y, W: p.wide() - gutter, H: big, Stroke: thin})
		p.y += big + 1
	}
	p.fields(2, field{label: "Handed over by, name and signature"}, field{label: "Taken over by, name and signature"})
}

// weldList has a row for each joint with the planned values and boxes for what was done.
func (k *pack) weldList() {
	steps := k.taskSteps(tasks.Weld)
	if len(steps) == 0 {
		return
	}
	p := k.p
	p.begin("Weld list", "weld list", true)
	p.big("Weld list")
	if of := joined(", ", prefixed("drawing ", k.job.Drawing), prefixed("execution ", k.job.Execution), prefixed("steel ", k.job.Steel)); of != "" {
		p.para(of+".", body, false)
	}
	done := map[*tasks.Task]bool{}
	for _, s := range steps {
		if done[s.Task] {
			continue
		}
		done[s.Task] = true
		p.heading(agenda.TaskLabel(s.Task), 45)
		ps := k.planned(s)
		p.para(joined("; ", agenda.Where(s), k.span(s), "planned: "+strings.Join(names(ps.People, ps.Relief), ", "),
			prefixed("drawing ", or(s.Task.Drawing, k.job.Drawing)), heatWords(s), holdWords(k.work, s)), body, false)
		t := p.table(column{"Joint", 62}, column{"Welder", 21}, column{"Batch", 21}, column{"Heat no.", 21}, column{"Visual", 19}, column{"NDT", 19}, column{"Repair", 20})
		for i, seam := range s.Task.Seams {
			t.row(k.joint(i, seam), write(), write(), write(), write(), write(), write())
		}
		if len(s.Task.Seams) == 0 {
			t.row(loud("all joints", agenda.HandsOn(s)), write(), write(), write(), write(), write(), write())
		}
		t.end()
	}
	p.skip(3)
	p.fields(3, field{label: "Inspected by, name and signature", units: 2}, field{label: "Date"})
}

func or(s, other string) string {
	if s != "" {
		return s
	}
	return other
}

// joint gives a seam's number, what it is and its procedure.
func (k *pack) joint(i int, s tasks.Seam) cell {
	c := loud(or(s.Name, fmt.Sprintf("joint %d", i+1)), agenda.SeamWords(s))
	for _, q := range k.job.Procedures {
		if q.Name != s.Procedure {
			continue
		}
		c.lines = append(c.lines, line{text: joined(", ", "procedure "+q.Name, processWords(q.Process), preheat(q.Preheat))})
		return c
	}
	if s.Procedure != "" {
		c.lines = append(c.lines, line{text: "procedure " + s.Procedure})
	}
	return c
}

func processWords(p weld.Process) string {
	if p == 0 {
		return ""
	}
	return p.String()
}

func preheat(c float64) string {
	if c <= 0 {
		return ""
	}
	return "preheat " + origin.Trim(c) + " °C"
}

// heatWords gives preheat and heat input where the work preheats.
func heatWords(s *expand.Step) string {
	f, ok := agenda.Fact(s, "preheat")
	if !ok || f.Value <= 0 {
		return ""
	}
	words := "preheat to " + origin.Trim(f.Value) + " °C at least"
	if soak, ok := agenda.Fact(s, "soak"); ok && soak.Value > 0 {
		words += ", soak " + origin.Trim(math.Ceil(soak.Value)) + " min"
	}
	if q, ok := agenda.Fact(s, "heat input"); ok {
		words += ", heat input planned " + origin.Trim(q.Value) + " kJ/mm"
	}
	return words
}

// holdWords says how long to wait before testing, where the plan keeps such a time.
func holdWords(w *expand.Work, s *expand.Step) string {
	for _, o := range w.Steps {
		if o.Task == s.Task && strings.Contains(o.Name, "NDT") && o.Class == expand.Clock && o.Clock > 0 {
			return o.Name + " " + agenda.HandsOn(o)
		}
	}
	return ""
}

// paintLog has a block of boxes for each coat, with the planned values filled in.
func (k *pack) paintLog() {
	var coats []*expand.Step
	for _, s := range k.taskSteps(tasks.Coat) {
		if agenda.CoatNumber(s) > 0 || s.Paint != nil {
			coats = append(coats, s)
		}
	}
	if len(coats) == 0 {
		return
	}
	p := k.p
	p.begin("Paint log", "paint log", true)
	p.big("Paint log")
	p.para("Take the four readings before starting and again every four hours, or when the weather turns.", body, false)
	for _, s := range coats {
		k.coatBlock(s)
	}
}

func (k *pack) coatBlock(s *expand.Step) {
	p := k.p
	n := agenda.CoatNumber(s)
	name := ""
	if s.Paint != nil {
		name = s.Paint.Name
	} else if n > 0 && n <= len(s.Task.Coats) {
		name = s.Task.Coats[n-1]
	}
	p.heading(agenda.StepLabel(k.work, s), 105)
	p.para(joined("; ", agenda.Where(s), k.span(s), "planned: "+strings.Join(names(k.planned(s).People), ", "), signs(agenda.Amount(s)), prefixed("surface ", s.Task.Grade)), body, false)
	film := ""
	for _, q := range k.job.Paints {
		if q.Name != name {
			continue
		}
		film = origin.Trim(q.DFT) + " µm"
		if s.Mends { // a thin wet film, no coat of its own
			film = "-"
		}
		var limits []string
		for _, f := range q.Limits(s.Method()) {
			limits = append(limits, f.Name+" "+signs(f.Amount()))
		}
		if len(limits) > 0 {
			p.para("Limits: "+strings.Join(limits, "; ")+".", body, false)
		}
	}
	var with []string
	if h := k.plannedHour(s); h != "" {
		with = append(with, h)
	}
	for _, f := range s.Estimate.Facts {
		if name := strings.ToLower(f.Name); strings.Contains(name, "wet film") || strings.Contains(name, "pot life") {
			amount := f.Amount()
			if f.Unit == "min" && f.Text == "" {
				amount = quantity.Hours(int(f.Value))
			}
			with = append(with, signs(f.Name)+" "+signs(amount))
		}
	}
	if len(with) > 0 {
		p.para("Planned with: "+strings.Join(with, "; ")+".", body, false)
	}
	p.fields(5, field{label: "Paint", value: name}, field{label: "Base batch"}, field{label: "Hardener batch"}, field{label: "Thinner %"}, field{label: "Mixed at"},
		field{label: "First read at"}, field{label: "Air °C"}, field{label: "Humidity %"}, field{label: "Dew point °C"}, field{label: "Steel °C"},
		field{label: "Then read at"}, field{label: "Air °C"}, field{label: "Humidity %"}, field{label: "Dew point °C"}, field{label: "Steel °C"},
		field{label: "Grade and profile"}, field{label: "Since cleaning, h"}, field{label: "Since last coat, h"}, field{label: "Started"}, field{label: "Finished"},
		field{label: "Wet film, µm"}, field{label: "Dry film wanted", value: film}, field{label: "Dry film, least"}, field{label: "Dry film, mean"}, field{label: "Painter signs"})
}
