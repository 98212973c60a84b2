package sheets

import (
	"fmt"
	"strings"

	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks"
)

// mostUnprinted is how many names that cannot be printed are told one by one.
const mostUnprinted = 6

// unprinted says which names of the job have signs that the fonts of the sheets lack, by their lines in the job file, since
// their names cannot be written here.
func (k *pack) unprinted() []string {
	var list []string
	look := func(what, name string, at tasks.Pos) {
		if !lacking(name) {
			return
		}
		s := what
		if at.Line > 0 {
			s += fmt.Sprintf(" of line %d", at.Line)
		}
		list = append(list, s)
	}
	look("the job's own name", k.job.Name, tasks.Pos{})
	for _, pl := range k.job.Places {
		look("the place", agenda.PlaceLabel(pl), pl.Pos)
		for _, f := range pl.Workfaces {
			look("the workface", f.Name, f.Pos)
		}
	}
	for _, p := range k.job.People {
		look("the name", p.Name, p.Pos)
	}
	for _, t := range k.job.Tasks {
		look("the task", agenda.TaskLabel(t), t.Pos)
	}
	if len(list) == 0 {
		return nil
	}
	more := ""
	if n := len(list) - mostUnprinted; n > 0 {
		list, more = list[:mostUnprinted], fmt.Sprintf(", and %d more", n)
	}
	return []string{"Some names have signs that these sheets have no letters for; they are printed as \"?\": " + strings.Join(list, ", ") + more +
		" in the job file. Give tasks and places a `title` in Latin, Greek or Cyrillic letters; write people's names so."}
}

// lacking says whether a name has signs that are printed as "?".
func lacking(name string) bool {
	return strings.Count(paper(name), "?") > strings.Count(clean.Line(name), "?")
}
