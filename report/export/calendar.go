package export

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"io"
	"strings"
	"time"

	ics "github.com/arran4/golang-ical"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/clean"
	"sailby/tasks/hours"
)

// Calendar writes the plan as an iCalendar file: times in UTC, lines ended by CR LF. An event's
// UID depends on the job's file and name, the task, the step, the piece and the person, so that a
// new plan replaces the old one where it is imported again. The error is ErrNoPlan or that of
// writing.
func Calendar(w io.Writer, r *plan.Report, o Options) error {
	a, list, err := items(r, o)
	if err != nil {
		return err
	}
	stamp := o.Stamp
	if stamp == 0 {
		stamp = a.Work.Window.Opens
	}
	cal := ics.NewCalendarFor("Sailby")
	cal.SetProductId("-//Sailby//Sailby//EN")
	cal.SetMethod(ics.MethodPublish)
	cal.SetName(line(r.Job.Name))
	for _, it := range list {
		e := cal.AddEvent(uid(a, it))
		e.SetDtStampTime(utc(stamp))
		e.SetStartAt(utc(it.From))
		e.SetEndAt(utc(it.To))
		title := it.title(a.Work)
		if it.person != "" {
			title = clean.Line(it.person) + ": " + title
		}
		e.SetSummary(line(title))
		e.SetLocation(line(it.where()))
		e.SetDescription(line(it.description(a)))
	}
	return cal.SerializeTo(w, ics.WithNewLineWindows)
}

// description says who works together, how much of what, and by when.
func (it item) description(a *plan.Answer) string {
	var parts []string
	if n := it.names(); n != "" {
		parts = append(parts, n)
	}
	if it.step != nil && !it.watch {
		if s := agenda.Amount(it.step); s != "" {
			parts = append(parts, s)
		}
		if it.step.Deadline < hours.Far && it.task.Deadline != nil {
			parts = append(parts, "must be done by "+agenda.When(it.step.Deadline, agenda.Zone(a.Work, it.task.Place)))
		}
	}
	if a.Late {
		parts = append(parts, "this plan is late")
	}
	return strings.Join(append(parts, agenda.Care), ". ")
}

// uid names an event by what it is, not by when.
func uid(a *plan.Answer, it item) string {
	step := ""
	if it.step != nil {
		step = it.step.Name
	}
	sum := sha256.Sum256([]byte(fmt.Sprintf("%q %q %q %q %d %q %v", a.Work.Job.File, a.Work.Job.Name, it.task.Name, step, it.piece, it.person, it.watch)))
	return hex.EncodeToString(sum[:12]) + "@sailby"
}

func utc(m hours.Minute) time.Time { return m.In(time.UTC) }

// line gives text without breaks of any kind.
func line(s string) string { return strings.ReplaceAll(clean.Line(s), "\r", "") }
