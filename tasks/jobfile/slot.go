package jobfile

import (
	"strings"
	"time"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/hours"
)

const slotHint = "write `2027-04-06 08:00-12:00`, `day 2 08:00-12:00`, or `2027-04-06 20:00 to 2027-04-07 06:00`"

// parseSlot reads a span between two moments.
func parseSlot(text string) (from, to tasks.Moment, err error) {
	if a, b, two := strings.Cut(text, " to "); two {
		if from, err = parseMoment(strings.TrimSpace(a)); err == nil {
			to, err = parseMoment(strings.TrimSpace(b))
		}
		return from, to, err
	}
	words := strings.Fields(text)
	if len(words) < 2 {
		return from, to, advise(slotHint, "%s is not a slot", short(text))
	}
	a, b, ok := strings.Cut(words[len(words)-1], "-")
	if !ok {
		return from, to, advise(slotHint, "%s is not a slot: it has no end", short(text))
	}
	from.Text, to.Text = text, text
	if err = parseDay(words[:len(words)-1], &from); err != nil {
		return from, to, err
	}
	to = from
	if from.Minute, err = hours.ParseClock(a); err == nil {
		to.Minute, err = hours.ParseClock(b)
	}
	if err != nil {
		return from, to, advise(slotHint, "%s", err)
	}
	if to.Minute <= from.Minute {
		to.Minute += 1440
	}
	return from, to, nil
}

// slots reads a slot or a list of slots in zone.
func (f *fields) slots(name string, zone *time.Location) []tasks.Slot {
	var out []tasks.Slot
	for _, n := range f.items(name) {
		if s, ok := f.r.slot(n, f.lead(name), f.key(name).example, zone); ok {
			out = append(out, s)
		}
	}
	return out
}

func (r *reader) slot(n *yaml.Node, lead, example string, zone *time.Location) (tasks.Slot, bool) {
	text, ok := r.text(n, lead, example)
	if !ok {
		return tasks.Slot{}, false
	}
	from, to, err := parseSlot(text)
	if err != nil {
		r.advice(n, lead, err, slotHint)
		return tasks.Slot{}, false
	}
	s := &tasks.Slot{From: from, To: to, Pos: r.pos(n)}
	s.From.Pos, s.From.Zone, s.To.Pos, s.To.Zone = s.Pos, zone, s.Pos, zone
	r.moments = append(r.moments, pending{&s.From, lead}, pending{&s.To, lead})
	if same := from.ByName == to.ByName && (from.Day == 0) == (to.Day == 0) && !from.ByName; same {
		a, _ := hours.Instant(from.Date.Add(from.Day), from.Minute, time.UTC)
		b, _ := hours.Instant(to.Date.Add(to.Day), to.Minute, time.UTC)
		if b <= a {
			r.fault(n, "write the earlier time first", "%s%s ends before it begins", lead, short(text))
			return tasks.Slot{}, false
		}
	}
	return *s, true
}
