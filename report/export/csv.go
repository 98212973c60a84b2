package export

import (
	"encoding/csv"
	"io"
	"strconv"
	"time"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks/hours"
)

// Head is the first row of the CSV file.
var Head = []string{"start", "finish", "minutes", "person", "with", "task", "title", "step", "kind", "place", "workface", "what", "fire watch"}

// CSV writes the plan as comma-separated values with a head row, in UTF-8, lines ended by CR LF:
// start and finish as RFC 3339 with the place's offset, minutes of clock time between them. The
// error is ErrNoPlan or that of writing.
func CSV(w io.Writer, r *plan.Report, o Options) error {
	a, list, err := items(r, o)
	if err != nil {
		return err
	}
	c := csv.NewWriter(w)
	c.UseCRLF = true
	if err := c.Write(Head); err != nil {
		return err
	}
	for _, it := range list {
		if err := c.Write(it.fields(a)); err != nil {
			return err
		}
	}
	c.Flush()
	return c.Error()
}

func (it item) fields(a *plan.Answer) []string {
	zone := agenda.Zone(a.Work, it.task.Place)
	at := func(m hours.Minute) string { return m.In(zone).Format(time.RFC3339) }
	step, face, what, watch := "", "", "", ""
	if it.step != nil {
		step, what = it.step.Name, agenda.Amount(it.step)
	}
	if it.task.Face != nil {
		face = it.task.Face.Name
	}
	if it.watch {
		watch = "yes"
	}
	text := []string{it.person, it.names(), it.task.Name, it.title(a.Work), step, string(it.task.Kind), it.task.Place.Name, face, what, watch}
	out := []string{at(it.From), at(it.To), strconv.Itoa(it.Len())}
	for _, s := range text {
		out = append(out, clean.Cell(s))
	}
	return out
}
