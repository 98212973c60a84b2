package model

import (
	"slices"
	"time"

	"sailby/report/clean"
	"sailby/tasks/hours"
)

// filter narrows the list of tasks to one value; at 0 it lets all through.
type filter struct {
	name   string
	at     int // 0 is all, else the value at-1
	values []string
	from   func(m *Model, all []item) []string
	takes  func(m *Model, it item, value string) bool
}

func (f *filter) value() string {
	if f.at < 1 || f.at > len(f.values) {
		return "all"
	}
	return f.values[f.at-1]
}

// turn goes to another value, round and round.
func (f *filter) turn(d int) {
	n := len(f.values) + 1
	f.at = ((f.at+d)%n + n) % n
}

// newFilters gives the filters in the order in which they stand on the screen. Values come from
// the tasks there are.
func newFilters() []*filter {
	return []*filter{
		{name: "Place", from: func(_ *Model, all []item) []string {
			var out []string
			for _, it := range all {
				out = add(out, clean.Line(it.task.Place.Name))
			}
			for _, it := range all {
				if it.task.Face != nil {
					out = add(out, clean.Line(it.task.Where()))
				}
			}
			return out
		}, takes: func(_ *Model, it item, v string) bool {
			return clean.Line(it.task.Place.Name) == v || clean.Line(it.task.Where()) == v
		}},
		{name: "Person", from: func(m *Model, _ []item) []string {
			var out []string
			for _, p := range m.work().Job.People {
				out = add(out, clean.Line(p.Name))
			}
			return out
		}, takes: func(_ *Model, it item, v string) bool {
			return slices.ContainsFunc(it.people, func(who string) bool { return clean.Line(who) == v })
		}},
		{name: "Kind", from: func(_ *Model, all []item) []string {
			var out []string
			for _, it := range all {
				out = add(out, string(it.task.Kind))
			}
			return out
		}, takes: func(_ *Model, it item, v string) bool { return string(it.task.Kind) == v }},
		{name: "Day", from: func(_ *Model, all []item) []string {
			var days []hours.Date
			for _, it := range all {
				for _, d := range it.days {
					if !slices.Contains(days, d) {
						days = append(days, d)
					}
				}
			}
			slices.SortFunc(days, func(x, y hours.Date) int {
				if x.Before(y) {
					return -1
				}
				return 1
			})
			var out []string
			for _, d := range days {
				out = append(out, dayName(d))
			}
			return out
		}, takes: func(_ *Model, it item, v string) bool {
			return slices.ContainsFunc(it.days, func(d hours.Date) bool { return dayName(d) == v })
		}},
	}
}

func add(list []string, v string) []string {
	if slices.Contains(list, v) {
		return list
	}
	return append(list, v)
}

func dayName(d hours.Date) string {
	return time.Date(d.Year, d.Month, d.Day, 12, 0, 0, 0, time.UTC).Format("Mon 2 Jan")
}
