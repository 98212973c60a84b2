package check

import (
	"testing"

	"sailby/tasks"
)

// TestToTheMinute: what just holds is no breach, and a minute less is: ends of the window, of an
// opening up and clearing up, of a watch, of a wait, of a deadline.
func TestToTheMinute(t *testing.T) {
	for _, tc := range []struct {
		name, rule string
		build      func(f *fix)
		spoil      func(f *fix) // one minute
	}{
		{"the close of the window", "R2", func(f *fix) { f.put(f.work("a", tasks.Plain, nil, 60, need("fitter")), "Tom", "04-09 16:00-17:00") },
			func(f *fix) { f.move(0, "04-09 16:01-17:01") }},
		{"opening up", "R5", func(f *fix) {
			f.pier.OpeningUp.Value = 30
			f.put(f.work("a", tasks.Plain, nil, 60, need("fitter")), "Tom", "04-06 08:30-09:30")
		}, func(f *fix) { f.move(0, "04-06 08:29-09:29") }},
		{"clearing up", "R5", func(f *fix) {
			f.pier.ClearingUp.Value = 30
			f.put(f.work("a", tasks.Plain, nil, 60, need("fitter")), "Tom", "04-06 16:30-17:30")
		}, func(f *fix) { f.move(0, "04-06 16:31-17:31") }},
		{"a fire watch", "R13", func(f *fix) { f.weldAtHinge() },
			func(f *fix) { f.p.Steps[0].Watches[1].To-- }},
		{"a wait", "R10", func(f *fix) {
			twoFits(f)
			f.link(f.w.Steps[0], f.w.Steps[1], 60, 60)
		}, func(f *fix) { f.move(1, "04-06 09:59-10:59") }},
		{"a longest wait", "R10", func(f *fix) {
			twoFits(f)
			f.link(f.w.Steps[0], f.w.Steps[1], 60, 60)
		}, func(f *fix) { f.move(1, "04-06 10:01-11:01") }},
		{"a meal", "R6", func(f *fix) {
			s := f.work("a", tasks.Test, nil, 60, need("fitter"))
			s.InOneGo, s.OverMeals = true, true
			f.pier.Open = week(f.t, "Mon-Sat 08:00-12:00 14:00-18:00")
			f.put(s, "Tom", "04-06 11:30-12:00", "04-06 14:00-14:30")
		}, func(f *fix) {
			f.pier.Open = week(f.t, "Mon-Sat 08:00-12:00 14:01-18:00")
			f.move(0, "04-06 11:30-12:00", "04-06 14:01-14:31")
		}},
	} {
		t.Run(tc.name, func(t *testing.T) {
			f := newFix(t)
			tc.build(f)
			f.wants("")
			tc.spoil(f)
			f.wants(tc.rule)
		})
	}
}
