// Package agenda turns a plan into what people read: shifts with who does what, standing time
// running, tides and hire slots, and the words for times, steps and causes. Text, sheets and
// exports all draw on it, so that they say the same. Times are UTC minutes until they are
// written, and are then local to the place.
package agenda

import (
	"fmt"
	"time"

	"sailby/plan"
	"sailby/report/clean"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// Care is the line that ends every verdict and every pack.
const Care = "The plan is arithmetic, not a permit, a procedure qualification or a competent person's decision."

// When writes m as "Tue 6 Apr 09:20" in zone; in an hour that the clocks repeat the zone's
// letters follow. Times that stand for "never" or "unknown" give "-".
func When(m hours.Minute, zone *time.Location) string {
	if unknown(m) {
		return "-"
	}
	return ShortDay(m, zone) + " " + Clock(m, zone)
}

// Clock writes m as "09:20" in zone, with the zone's letters in a repeated hour.
func Clock(m hours.Minute, zone *time.Location) string {
	if unknown(m) {
		return "-"
	}
	t := m.In(or(zone))
	s := t.Format("15:04")
	if _, c := hours.Instant(hours.DateOf(t), t.Hour()*60+t.Minute(), or(zone)); c == hours.Repeated {
		s += " " + t.Format("MST")
	}
	return s
}

// ShortDay writes the day of m as "Tue 6 Apr".
func ShortDay(m hours.Minute, zone *time.Location) string { return m.In(or(zone)).Format("Mon 2 Jan") }

// LongDay writes a date as "Tuesday 6 April 2027".
func LongDay(d hours.Date) string {
	return time.Date(d.Year, d.Month, d.Day, 12, 0, 0, 0, time.UTC).Format("Monday 2 January 2006")
}

// Between writes a span as "09:20-12:30", with the day of the end where it is another one.
func Between(s hours.Span, zone *time.Location) string {
	if hours.DateOf(s.From.In(or(zone))) == hours.DateOf(s.To.In(or(zone))) || Clock(s.To, zone) == "00:00" && s.Len() <= 1440 {
		to := Clock(s.To, zone)
		if to == "00:00" {
			to = "24:00"
		}
		return Clock(s.From, zone) + "-" + to
	}
	return Clock(s.From, zone) + "-" + When(s.To, zone)
}

// Within writes a span of a shift: as Between does, but without the day of an end that the night alone parts
// from its start.
func Within(s hours.Span, zone *time.Location) string {
	if s.Len() < 12*60 {
		to := Clock(s.To, zone)
		if to == "00:00" {
			to = "24:00"
		}
		return Clock(s.From, zone) + "-" + to
	}
	return Between(s, zone)
}

func unknown(m hours.Minute) bool { return m >= hours.Far || m <= hours.Never }

func or(z *time.Location) *time.Location {
	if z == nil {
		return time.UTC
	}
	return z
}

// Zone is the time zone of a place, that of the job where it has none.
func Zone(w *expand.Work, p *tasks.Place) *time.Location {
	if p != nil && p.Zone != nil {
		return p.Zone
	}
	if w != nil && w.Job != nil {
		return or(w.Job.Zone)
	}
	return time.UTC
}

// TaskLabel is the task's printed name.
func TaskLabel(t *tasks.Task) string {
	if t == nil {
		return "the window"
	}
	return clean.Line(t.Label())
}

// PlaceLabel is the place's printed name.
func PlaceLabel(p *tasks.Place) string {
	if p == nil {
		return "home"
	}
	if p.Title != "" {
		return clean.Line(p.Title)
	}
	return clean.Line(p.Name)
}

// StepLabel is the task's printed name, with the step's where it would not be clear which step of
// the task is meant: the only one that people work on goes by the task's name alone.
func StepLabel(w *expand.Work, s *expand.Step) string {
	all, hands := 0, 0
	for _, o := range w.Steps {
		if o.Task == s.Task && !o.Absent {
			all++
			if o.Class == expand.Hands {
				hands++
			}
		}
	}
	if all < 2 || hands == 1 && s.Class == expand.Hands {
		return TaskLabel(s.Task)
	}
	return TaskLabel(s.Task) + ": " + clean.Line(s.Name)
}

// Where is "pier/hinge" in printed form: the place and its workface.
func Where(s *expand.Step) string {
	if s.Face != nil {
		return PlaceLabel(s.Place) + " / " + clean.Line(s.Face.Name)
	}
	return PlaceLabel(s.Place)
}

// At writes a place in a file as "job.yaml:42"; "" where there is none.
func At(p tasks.Pos) string {
	if p.Line == 0 {
		return ""
	}
	return fmt.Sprintf("%s:%d", clean.Line(p.File), p.Line)
}

var causeWords = map[plan.CauseKind]string{
	plan.ByLink: "what comes before it", plan.ByPerson: "a person", plan.ByKit: "kit", plan.ByRoom: "room at the workface",
	plan.ByState: "the state of the workface", plan.ByHours: "opening hours", plan.ByReach: "reach of the workface",
	plan.ByHire: "a hire slot", plan.ByNotBefore: "its not-before time", plan.ByPower: "power", plan.ByOrder: "the order asked for",
	plan.ByMaxWait: "a longest wait", plan.ByStart: "the start of the plan", plan.ByRest: "rest", plan.ByPermit: "a permit's hours",
	plan.ByConditions: "dry and warm hours",
}

// CauseKind names the kind of a cause for machines: "link", "person", "hours".
func CauseKind(k plan.CauseKind) string {
	names := [...]string{"link", "person", "kit", "room", "state", "hours", "reach", "hire", "not-before", "power", "order",
		"max-wait", "start", "rest", "permit", "conditions"}
	if int(k) < len(names) {
		return names[k]
	}
	return "other"
}

// CauseText says what sets a date in the job's words: the cause's own text, else its kind, what
// it is and which step it comes from.
func CauseText(w *expand.Work, c plan.Cause) string {
	if c.Text != "" {
		return clean.Line(c.Text)
	}
	s := causeWords[c.Kind]
	if c.Name != "" {
		s += " (" + clean.Line(c.Name) + ")"
	}
	if c.Other >= 0 && c.Other < len(w.Steps) && (c.Kind != plan.ByStart) {
		s += ", after " + StepLabel(w, w.Steps[c.Other])
	}
	return s
}
