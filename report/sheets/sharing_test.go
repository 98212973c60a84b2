package sheets

import (
	"strings"
	"testing"

	"sailby/report/fixture"
)

// A day takes as few pages as in the closest form, keeps its room where that costs no page, and says in each
// form all that it must.
func TestADayKeepsToFewPages(t *testing.T) {
	saved := 0
	for extra := range 9 {
		r := fixture.Report()
		crowd(r, extra, "tidy the deck")
		d := packed(t, r, Options{})
		k := newPack(&Document{Width: 210, Height: 297, Left: 15, Right: 12, Top: 17, Bottom: 10}, r, r.Likely, Options{})
		for _, s := range k.shifts {
			if !s.Site {
				continue
			}
			open, _ := k.trial(s, loose)
			closest, _ := k.trial(s, dense)
			pages := 0
			for _, p := range d.Pages {
				if p.Name == "shift "+s.Date.String() {
					pages++
				}
			}
			if pages > closest {
				t.Errorf("%d more tasks, %s: %d pages, %d when drawn together", extra, s.Date, pages, closest)
			}
			if how := k.formOf(s); open == closest && how != loose {
				t.Errorf("%d more tasks, %s: drawn together, and no page is saved", extra, s.Date)
			}
			saved += open - closest
		}
		s := flat(d, "shift 2027-04-07")
		for _, must := range []string{"Fire watch 16:00-17:00: Tom", "Hot work permit", "Brief held, initials", "Issued at, by", "Lifting: weight known, nobody below",
			"Lead hand", "Found, changed, stopped, and why", "In an emergency", "never alone", "Started", "Hours left", "ake it safe"} {
			if !strings.Contains(s, must) {
				t.Errorf("%d more tasks: the sheet does not say %q:\n%s", extra, must, s)
			}
		}
		for _, f := range faults(d) {
			t.Errorf("%d more tasks: %s", extra, f)
		}
	}
	if saved == 0 {
		t.Error("drawing together saves no page, and the test has days that want it")
	}
}

// A form that is drawn closer is not taller.
func TestFormsGetCloser(t *testing.T) {
	r := fixture.Report()
	doc := &Document{Title: "x", Width: 210, Height: 900, Left: 15, Right: 12, Top: 17, Bottom: 10}
	k := newPack(doc, r, r.Likely, Options{})
	if len(k.shifts) == 0 {
		t.Fatal("no shifts")
	}
	for _, s := range k.shifts {
		_, open := k.trial(s, loose)
		_, drawn := k.trial(s, compact)
		if drawn > open+1 {
			t.Errorf("%s: %.0f mm drawn together, %.0f mm with room", s.Date, drawn, open)
		}
	}
}
