package expand

import (
	"fmt"
	"strings"

	"sailby/tasks"
	"sailby/tasks/origin"
)

// snags are what usually goes wrong with work that is sent out, by the word that it begins with
// (common practice in the trade).
var snags = []struct{ word, text string }{
	{"galvani", "vent and drain holes in every closed section, or it bursts in the bath; the bath's length; threads re-tapped and holes reamed after; flat plate warps; welding on it only after the zinc is off"},
	{"machin", "left thick where it is machined; datum faces marked; what it is held by; distortion after welding comes first"},
	{"profile", "edge hardness and taper where it is welded or bored; small holes drilled, not cut; nesting marks and orientation agreed"},
	{"cut", "edge hardness and taper where it is welded or bored; small holes drilled, not cut"},
	{"blast", "the time to the first coat runs from the blasting, carriage included"},
	{"paint", "dry to handle before it is loaded; packing between; touch-up paint of the same batch comes along"},
	{"bend", "spring-back and minimum bend radius; flats left at the ends"},
}

// provesFit are words by which a task is taken for one that looks whether things fit.
var provesFit = []string{"survey", "template", "trial", "gauge", "measure", "offer up", "mark out"}

// aside gathers what is worth saying about lifts that an order decides, work sent out, and site
// fit-ups that nothing has proved to fit.
func (x *expander) aside(add func(tasks.Pos, string, ...any)) {
	for _, o := range x.w.Orders {
		if o.Made {
			add(o.Pos, "the order is held: %s", o.Text)
		}
	}
	x.windNotes(add)
	for _, n := range x.late {
		add(n.Pos, "%s", n.Text)
	}
	for _, t := range x.w.Job.Tasks {
		switch {
		case x.absent[t]:
		case t.SentOut != "":
			add(t.Pos, "%s is sent out (%s, %s from leaving to collection)%s", t.Label(), t.SentOut, days(x.pick(t.Standing)), snag(t.SentOut))
		case t.Kind == tasks.FitUp && x.atSite(t) && len(t.FitProved) == 0 && x.fromHome(t) && !x.looked(t):
			add(t.Pos, "%s: nothing before it has proved that it fits: no survey, template or trial fit (`fit proved by` names one)", t.Label())
		}
	}
}

func days(minutes float64) string {
	if minutes >= 1440 {
		return origin.Trim(minutes/1440) + " d"
	}
	return origin.Trim(minutes/60) + " h"
}

func snag(word string) string {
	for _, s := range snags {
		if strings.HasPrefix(strings.ToLower(word), s.word) {
			return ": " + s.text
		}
	}
	return ""
}

// fromHome says whether what a site fit-up works on was worked on away from the site.
func (x *expander) fromHome(t *tasks.Task) bool {
	names := map[string]bool{}
	for _, p := range t.Parts {
		names[asm(p)] = true
	}
	for _, n := range t.Joins {
		names[asm(n.Name)] = true
	}
	for _, s := range x.w.Steps {
		if s.Site || s.Absent {
			continue
		}
		for _, a := range append(s.Works, s.Moves) {
			if a != "" && names[a] {
				return true
			}
		}
	}
	return false
}

// looked says whether some task before t, by links or because it is at home, goes by a name that
// says it looks whether things fit.
func (x *expander) looked(t *tasks.Task) bool {
	for _, u := range x.w.Job.Tasks {
		if u == t || x.absent[u] || !x.linkedBefore(u, t) {
			continue
		}
		name := strings.ToLower(fmt.Sprint(u.Name, " ", u.Title))
		for _, w := range provesFit {
			if strings.Contains(name, w) {
				return true
			}
		}
	}
	return false
}
