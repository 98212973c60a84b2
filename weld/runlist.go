package weld

import (
	"math"
	"strings"

	"sailby/tasks/origin"
)

// Run is one kind of run of a seam with what a run of it takes.
type Run struct {
	Name    string        // "root", "fill", "backing", where sides are not alike "root of the first side"; "run" of a fillet
	Count   int           // of all sides
	Area    float64       // mm2 that one lays
	Arc     origin.Figure // min of arc of one, along the whole seam
	Welding origin.Figure // min hands-on of one, cleaning and electrode changes included
}

// runList tells the runs apart: a butt has a root on every side, then fills alike, and after
// back-gouging a backing run. Arc and hands-on time go by the metal of each.
func (e *seamWork) runList() []Run {
	sides := e.section.Sides
	all := e.section.Area
	count := e.runs.count
	var list []Run
	backing := 0.0
	if e.joint.BackGouge {
		backing = backRun(e.pos, e.joint.Thickness).Value / e.density * 1e6
		count--
	}
	switch {
	case !e.joint.Type.groove() && e.joint.Type != Corner && e.joint.Type != Plug && e.joint.Type != Slot:
		list = append(list, Run{Name: "run", Count: count, Area: all / float64(count)})
	case e.section.first.Name != "":
		a := e.section.first.Value
		list = append(e.sideRuns(a, 1, " of the first side"), e.sideRuns(all-a, 1, " of the second side")...)
	default:
		list = e.sideRuns(all/float64(sides), sides, "")
	}
	if backing > 0 {
		list = append(list, Run{Name: "backing", Count: 1, Area: backing})
	}
	total := origin.Worked("area of all runs", all+backing, "mm2", "area laid", e.section.Why)
	if backing > 0 {
		total.Origin.Source = "area laid + area of the backing run"
		total.From = append(total.From, origin.Worked("area of the backing run", backing, "mm2", "backing run / density x 1000000", backRun(e.pos, e.joint.Thickness), densityFigure(e.density)))
	}
	for i := range list {
		r := &list[i]
		area := origin.House("area of the run", r.Area, "mm2", "the root lays less, fills share what is left alike")
		name := "a " + r.Name
		switch {
		case strings.HasPrefix(r.Name, "fill"):
			name = "a fill run" + strings.TrimPrefix(r.Name, "fill")
		case r.Name != "run":
			first, rest, _ := strings.Cut(r.Name, " ")
			name = strings.TrimSpace("the " + first + " run " + rest)
		}
		r.Arc = origin.Worked("arc time of "+name, r.Area/total.Value*e.arc.Value, "min", "area of the run / area of all runs x arc time", area, total, renamed(e.arc, "arc time"))
		r.Welding = origin.Worked("welding time of "+name, r.Area/total.Value*e.welding.Value, "min", "area of the run / area of all runs x welding", area, total, renamed(e.welding, "welding"))
	}
	return list
}

// sideRuns are root and fills of a side with an area, times so many sides alike.
func (e *seamWork) sideRuns(area float64, sides int, of string) []Run {
	root := math.Min(area, rootShare*e.bead.Value)
	list := []Run{{Name: "root" + of, Count: sides, Area: root}}
	if fills := math.Ceil((area-root)/e.bead.Value - 1e-9); fills > 0 {
		list = append(list, Run{Name: "fill" + of, Count: int(fills) * sides, Area: (area - root) / fills})
	}
	return list
}
