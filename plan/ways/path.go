package ways

import (
	"fmt"
	"strings"
	"time"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
)

// taskPath gives the keys down to a task: one of a block is changed in its block, and so in every round.
func taskPath(t *tasks.Task) []string {
	if t.Block == "" {
		return []string{"tasks", t.Name}
	}
	return []string{"repeat", t.Block, "tasks", base(t)}
}

// base is the name of a task of a block without its block and round.
func base(t *tasks.Task) string {
	return strings.TrimSuffix(t.Name, fmt.Sprintf(" %s %d", t.Block, t.Round))
}

// named names a task in a sentence; of a block, every round of it.
func named(t *tasks.Task) string {
	if t.Block != "" {
		return fmt.Sprintf("%q (every round of %s)", base(t), t.Block)
	}
	return fmt.Sprintf("%q", t.Label())
}

func span(minutes int) string { return quantity.Hours(minutes) }

// length writes minutes as the job file reads them.
func length(minutes int) string { return quantity.Hours(minutes) }

// stamp writes a minute as the job file reads it.
func stamp(m hours.Minute, zone *time.Location) string { return m.In(zone).Format("2006-01-02 15:04") }

// when writes a minute for people.
func when(m hours.Minute, zone *time.Location) string { return m.In(zone).Format("Mon 2 Jan 15:04") }

// quoted writes a text as a YAML value.
func quoted(s string) string { return `"` + strings.NewReplacer(`\`, `\\`, `"`, `\"`).Replace(s) + `"` }

// list writes texts as a YAML list.
func list(items []string) string {
	out := make([]string, len(items))
	for i, s := range items {
		out[i] = quoted(s)
	}
	return "[" + strings.Join(out, ", ") + "]"
}

// slot writes a span as the job file reads it.
func slot(s hours.Span, zone *time.Location) string {
	return stamp(s.From, zone) + " to " + stamp(s.To, zone)
}

// pattern writes opening hours as a YAML list.
func pattern(p hours.Pattern) string {
	var out []string
	for _, r := range p {
		out = append(out, r.String())
	}
	return list(out)
}
