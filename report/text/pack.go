package text

import (
	"fmt"
	"io"
	"slices"
	"strings"
	"time"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/report/packlist"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
)

// Pack prints what to take: by group, with boxes to tick, then boxes, vehicles and what the rules
// flag.
func Pack(w io.Writer, r *plan.Report, o Options) error {
	l := packlist.Make(o.pick(r))
	p := newPage(w, o)
	p.para("", "What to take: "+l.Job)
	p.para("", "The job stops without what is marked !. [ ] out and [ ] back are ticked by whoever has seen it. House list: house judgement, strike out what is not wanted.")
	group := packlist.Group("")
	for _, it := range l.Items {
		if it.Group != group {
			group = it.Group
			p.gap()
			p.para("", strings.ToUpper(string(group)[:1])+string(group)[1:])
		}
		p.item(it, l.Zone)
	}
	p.gap()
	p.para("", "Together "+origin.Trim(l.Mass)+" kg, as far as masses are known.")
	if len(l.Unknown) > 0 {
		p.para("", "Without a mass: "+strings.Join(l.Unknown, ", ")+".")
	}
	p.boxesAndVehicles(l)
	for i, f := range l.Flags {
		if i == 0 {
			p.gap()
			p.para("", "Flagged, to be asked and decided by whoever may (nothing here decides it)")
		}
		p.para("  ! ", f)
	}
	for i, n := range l.Notes {
		if i == 0 {
			p.gap()
		}
		p.para("note: ", n)
	}
	p.gap()
	p.para("", agenda.Care)
	return p.err
}

// item prints one thing with the boxes to tick.
func (p *page) item(it packlist.Item, zone *time.Location) {
	lead := "  [ ] [ ]   "
	if it.Stops {
		lead = "  [ ] [ ] ! "
	}
	s := it.What + ": " + it.Amount
	if it.Mass > 0 {
		s += ", " + origin.Trim(it.Mass) + " kg"
	}
	if it.Day != 0 && zone != nil {
		s += ", by " + agenda.When(it.Day, zone)
	}
	if it.Box != "" {
		s += "; in box " + it.Box
	}
	if len(it.Where) > 0 {
		s += "; " + strings.Join(it.Where, ", ")
	}
	p.para(lead, s)
	if len(it.For) > 0 {
		p.para("            ", "for "+strings.Join(it.For, ", "))
	}
	if it.Spare != "" {
		p.para("            ", "spare: "+it.Spare)
	} else if it.Stops && it.Group != packlist.Papers && it.Group != packlist.Loads {
		p.para("            ", "spare: none named")
	}
}

func (p *page) boxesAndVehicles(l *packlist.List) {
	for i, b := range l.Boxes {
		if i == 0 {
			p.gap()
			p.para("", "Boxes")
		}
		p.para("  - ", joinedWords("; ", fmt.Sprintf("%s, %s kg: %s", b.Name, origin.Trim(b.Mass), strings.Join(b.Items, ", ")), b.Where))
	}
	if len(l.Vehicles) == 0 && l.Reason == "" {
		return
	}
	p.gap()
	p.para("", "Vehicles")
	if l.Reason != "" {
		p.para("  ", l.Reason)
	}
	if l.Nearest != "" {
		p.para("  ", "would do: "+l.Nearest)
	}
	if l.Runs != "" {
		p.para("  ", l.Runs)
	}
	for _, v := range append(slices.Clone(l.Vehicles), l.Split...) {
		p.para("  ", v.Line())
		for n, g := range v.Goods {
			at := "in a corner"
			if !g.Loose {
				at = fmt.Sprintf("%s m from the headboard, %s m from the left", origin.Trim(g.X/1000), origin.Trim(g.Y/1000))
				if g.Z > 0 {
					at += fmt.Sprintf(", %s m up", origin.Trim(g.Z/1000))
				}
			}
			p.para(fmt.Sprintf("    %2d  ", n+1), fmt.Sprintf("%s, %s kg: %s", g.What, origin.Trim(g.Mass), at))
		}
		for _, s := range v.Straps {
			p.para("    - ", s.Line())
		}
	}
}

func joinedWords(sep string, parts ...string) string {
	var out []string
	for _, s := range parts {
		if s != "" {
			out = append(out, s)
		}
	}
	return strings.Join(out, sep)
}

type packItem struct {
	Group  string   `json:"group"`
	What   string   `json:"what"`
	Amount string   `json:"amount"`
	Mass   float64  `json:"mass_kg,omitempty"`
	Needed string   `json:"first_needed,omitempty"`
	For    []string `json:"for"`
	Stops  bool     `json:"stops"`
	Spare  string   `json:"spare,omitempty"`
	House  bool     `json:"house_judgement"`
	Box    string   `json:"box,omitempty"`
	Where  []string `json:"vehicles,omitempty"`
}

type packGoods struct {
	What string  `json:"what"`
	Mass float64 `json:"mass_kg"`
	X    float64 `json:"x_mm"`
	Y    float64 `json:"y_mm"`
	Z    float64 `json:"z_mm"`
	Lose bool    `json:"anywhere"`
}

type packVehicle struct {
	Name    string      `json:"name"`
	Run     int         `json:"run"`
	Mass    float64     `json:"mass_kg"`
	Payload float64     `json:"payload_kg"`
	Nose    float64     `json:"nose_kg,omitempty"`
	Goods   []packGoods `json:"goods"`
	Straps  []string    `json:"straps"`
}

type packBox struct {
	Name  string   `json:"name"`
	Mass  float64  `json:"mass_kg"`
	Items []string `json:"items"`
	Where string   `json:"vehicle,omitempty"`
}

type packForm struct {
	Job      string        `json:"job"`
	Items    []packItem    `json:"items"`
	Boxes    []packBox     `json:"boxes"`
	Mass     float64       `json:"mass_kg"`
	Unknown  []string      `json:"without_mass"`
	Fits     bool          `json:"fits_the_vehicles"`
	Reason   string        `json:"load_plan,omitempty"`
	Nearest  string        `json:"would_do,omitempty"`
	Proved   bool          `json:"proved,omitempty"`
	Vehicles []packVehicle `json:"vehicles"`
	Split    []packVehicle `json:"split,omitempty"`
	Runs     string        `json:"runs,omitempty"`
	Flags    []string      `json:"flags"`
	Notes    []string      `json:"notes"`
	Care     string        `json:"care"`
}

// PackJSON is Pack for machines.
func PackJSON(w io.Writer, r *plan.Report, o Options) error {
	l := packlist.Make(o.pick(r))
	f := packForm{Job: clean.Line(l.Job), Items: []packItem{}, Boxes: []packBox{}, Mass: l.Mass, Unknown: lines(l.Unknown), Fits: l.OK, Reason: clean.Line(l.Reason),
		Nearest: clean.Line(l.Nearest), Proved: l.Proved, Vehicles: []packVehicle{}, Flags: lines(l.Flags), Notes: lines(l.Notes), Care: agenda.Care}
	for _, it := range l.Items {
		f.Items = append(f.Items, packItem{string(it.Group), clean.Line(it.What), clean.Line(it.Amount), it.Mass, needed(it.Day, l.Zone), lines(it.For),
			it.Stops, clean.Line(it.Spare), it.House, clean.Line(it.Box), it.Where})
	}
	for _, b := range l.Boxes {
		f.Boxes = append(f.Boxes, packBox{clean.Line(b.Name), b.Mass, lines(b.Items), b.Where})
	}
	f.Runs, f.Vehicles, f.Split = clean.Line(l.Runs), vehicleForms(l.Vehicles), vehicleForms(l.Split)
	return writeJSON(w, f)
}

func vehicleForms(list []packlist.Vehicle) []packVehicle {
	all := []packVehicle{}
	for _, v := range list {
		out := packVehicle{clean.Line(v.Name), v.Run, v.Mass, v.Payload, v.Nose, []packGoods{}, []string{}}
		for _, g := range v.Goods {
			out.Goods = append(out.Goods, packGoods{clean.Line(g.What), g.Mass, g.X, g.Y, g.Z, g.Loose})
		}
		for _, s := range v.Straps {
			out.Straps = append(out.Straps, clean.Line(s.Line()))
		}
		all = append(all, out)
	}
	return all
}

// PackCSV is Pack as a table.
func PackCSV(w io.Writer, r *plan.Report, o Options) error {
	return packlist.Make(o.pick(r)).CSV(w)
}

func needed(m hours.Minute, zone *time.Location) string {
	if m == 0 || zone == nil {
		return ""
	}
	return m.In(zone).Format(time.RFC3339)
}

func lines(list []string) []string {
	out := []string{}
	for _, s := range list {
		out = append(out, clean.Line(s))
	}
	return out
}
