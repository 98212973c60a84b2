package agenda_test

import (
	"strings"
	"testing"
	"time"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/jobfile"
)

const corners = "../../testdata/jobs/corners/"

func work(t *testing.T, file string) *expand.Work {
	t.Helper()
	job, err := jobfile.Read(corners + file)
	if err != nil {
		t.Fatal(err)
	}
	w, faults := expand.Expand(job, expand.Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return w
}

// span gives a time of June 2027 on London's clock.
func june(t *testing.T, day, from, to int) hours.Span {
	t.Helper()
	at := func(h int) hours.Minute { return hours.Of(time.Date(2027, 6, day, h, 0, 0, 0, london(t))) }
	return hours.Span{From: at(from), To: at(to)}
}

func TestTidesOfADay(t *testing.T) {
	w := work(t, "covered-coat.yaml")
	slip := w.Window.Place
	if got := agenda.Tides(w, slip, hours.Date{Year: 2027, Month: 6, Day: 8}); got != "high 04:00 4.00 m, low 10:00 1.00 m, high 16:00 4.00 m, low 22:00 1.00 m on chart" {
		t.Errorf("tides: %s", got)
	}
	if got := agenda.Tides(w, slip, hours.Date{Year: 2027, Month: 6, Day: 20}); got != "no tide known" {
		t.Errorf("past the table: %s", got)
	}
	if agenda.Tides(w, w.Job.Places[0], hours.Date{Year: 2027, Month: 6, Day: 8}) != "" {
		t.Error("a place without a table has no tides")
	}
	slip.Workfaces[0].WayOff.Value = 25
	got := agenda.Covers(w, slip.Workfaces[0], june(t, 7, 7, 20))
	if len(got) != 1 || got[0] != "way off by 12:42, covered 13:07-18:53" {
		t.Errorf("covered: %q", got)
	}
	if agenda.Covers(w, nil, june(t, 7, 7, 20)) != nil {
		t.Error("without a workface nothing is covered")
	}
}

func TestHoursThatNatureLeaves(t *testing.T) {
	w := work(t, "evening-dew.yaml")
	slip := w.Window.Place
	day := june(t, 8, 7, 19)
	if got := agenda.FitWords(w, slip, day); len(got) != 1 || got[0] != "quick by brush: 09:00-11:00" {
		t.Errorf("open: %q", got)
	}
	fit := agenda.Fit(w, slip, day)
	closed := strings.Join(agenda.ClosedWords(w, slip, fit[0]), "\n")
	for _, want := range []string{"07:00-08:00: steel 6.0 C is below", "08:00-09:00: steel 10.0 C is only 2.0 K above", "11:00-19:00", "must stay dry for 8 h: steel 6.0 C is below the dew point 8.0 C at Tue 19:00"} {
		if !strings.Contains(closed, want) {
			t.Errorf("no %q in\n%s", want, closed)
		}
	}
	if got := agenda.FitWords(w, slip, june(t, 8, 12, 19)); len(got) != 1 || !strings.HasPrefix(got[0], "quick by brush: no hour (must stay dry for 8 h") {
		t.Errorf("where no hour is open the reason stands: %q", got)
	}
	words := agenda.WeatherWords(slip, june(t, 8, 9, 18))
	if !strings.HasPrefix(words, "forecast ") || !strings.Contains(words, "air 15 °C, steel 14 °C, dew point 8 °C, wind up to 2 m/s, dry") {
		t.Errorf("weather: %s", words)
	}
	if got := agenda.WeatherWords(slip, june(t, 12, 9, 18)); !strings.Contains(got, "climate, poor day (one in 5)") || !strings.Contains(got, "climate, average day") {
		t.Errorf("past the forecast both days are shown: %s", got)
	}
	if got := agenda.DayWords(w, slip, hours.Date{Year: 2027, Month: 6, Day: 8}); len(got) != 3 || got[0] != "sun 04:39 to 22:00" {
		t.Errorf("the day: %q", got)
	}
	if agenda.DayWords(w, w.Job.Places[0], hours.Date{Year: 2027, Month: 6, Day: 8}) != nil {
		t.Error("nothing is said where neither tide nor weather is known")
	}
}

func TestGettingOffAgain(t *testing.T) {
	w := work(t, "neaped.yaml")
	a := &plan.Answer{Work: w}
	got := agenda.Getaways(a)
	if len(got) != 1 || !got[0].Neaped || !strings.Contains(got[0].Words, "neaped: 4.15 m needed to get off, the highest water before Tue 8 Jun 20:00 is 4.00 m (0.15 m short)") {
		t.Errorf("%+v", got)
	}
	craft := w.Window.Place.Sea.Craft
	craft.Needs.Value = 3.9
	if got := agenda.Getaways(a); got[0].Neaped || !strings.Contains(got[0].Words, "gets off at ") {
		t.Errorf("with 3.90 m: %+v", got)
	}
	a.Plan = &plan.Plan{Steps: make([]plan.Step, len(w.Steps))}
	a.Plan.Steps[0].Finish = june(t, 8, 9, 18).To // after the only tide that would do, at 05:00
	if got := agenda.Getaways(a); !got[0].Neaped || !strings.Contains(got[0].Words, "after the work is done at ") {
		t.Errorf("the work outlasts the tide: %+v", got)
	}
	a.Plan.Steps[0].Watches = []plan.Watch{{Span: june(t, 8, 18, 21)}}
	if got := agenda.Getaways(a); !got[0].Neaped || !strings.Contains(got[0].Words, "the work is done at Tue 8 Jun 21:00, it must be off by Tue 8 Jun 20:00") {
		t.Errorf("the fire watch counts: %+v", got)
	}
	a.Plan = nil
	craft.Needs.Value = 4.3 // it cannot have come in with 4.20 m
	if got := agenda.Getaways(a); !got[0].Neaped || !strings.Contains(got[0].Words, "cannot be said") {
		t.Errorf("with 4.30 m: %+v", got)
	}
	w.Window.Place.Sea.Craft = nil
	if agenda.Getaways(a) != nil {
		t.Error("no craft, nothing said")
	}
}

// The paintable hours of a day leave out those under water and the way off: at 2.6 m the slip is covered until 06:53 and from
// 13:07 (covered-coat.yaml), and a paint that may go under at once could be put on up to then.
func TestHoursUnderWaterAreNotPaintable(t *testing.T) {
	w := work(t, "covered-coat.yaml")
	slip := w.Window.Place
	got := agenda.FitWords(w, slip, june(t, 8, 5, 18))
	if len(got) != 1 || got[0] != "quick by brush at foot: 06:53-11:07" && got[0] != "quick by brush at foot: 06:52-11:07" {
		t.Errorf("two hours to the water: %q", got)
	}
	slip.Workfaces[0].WayOff.Value = 30
	for _, s := range w.Steps {
		if s.Task.Kind == tasks.Coat {
			yes := true
			s.Task.Covered = &yes
		}
	}
	fit := agenda.Fit(w, slip, june(t, 8, 5, 18))
	closed := strings.Join(agenda.ClosedWords(w, slip, fit[0]), "\n")
	if !strings.Contains(closed, "way off before the water") || !strings.Contains(closed, "covered by the water") {
		t.Errorf("closed: %s", closed)
	}
	if n := fit[0].Open.Total(); n < 343 || n > 345 { // 06:53 to 12:37
		t.Errorf("%d minutes open: %v", n, fit[0].Open)
	}
}
