package weld

import (
	"math"

	"sailby/tasks/origin"
)

// Run is one kind of run of a seam with what a run of it takes.
type Run struct {
	Name    string        // "root", "fill", "backing"; "run" of a fillet, plug or slot
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
	if !e.joint.Type.groove() && e.joint.Type != Corner {
		list = append(list, Run{Name: "run", Count: count, Area: all / float64(count)})
	} else {
		root := math.Min(all/float64(sides), rootShare*e.bead.Value)
		list = append(list, Run{Name: "root", Count: sides, Area: root})
		if fills := count - sides; fills > 0 {
			list = append(list, Run{Name: "fill", Count: fills, Area: (all - root*float64(sides)) / float64(fills)})
		}
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
		name := "the " + r.Name + " run"
		if r.Name == "run" || r.Name == "fill" {
			name = map[string]string{"run": "a run", "fill": "a fill run"}[r.Name]
		}
		r.Arc = origin.Worked("arc time of "+name, r.Area/total.Value*e.arc.Value, "min", "area of the run / area of all runs x arc time", area, total, renamed(e.arc, "arc time"))
		r.Welding = origin.Worked("welding time of "+name, r.Area/total.Value*e.welding.Value, "min", "area of the run / area of all runs x welding", area, total, renamed(e.welding, "welding"))
	}
	return list
}
