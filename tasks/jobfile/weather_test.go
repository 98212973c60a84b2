package jobfile

import (
	"os"
	"strings"
	"testing"
	"time"

	"sailby/tasks"
	"sailby/tasks/hours"
)

const weatherJob = `job: Weather
zone: Europe/London
places:
  pier:
    at: [57.6 N, 7.2 W]
    open: daily 07:00-19:00
    climate:
      poor day: 10 %
      spread: 3 K
      clear night: 4 K
      steel in the sun: 15 K
      steel follows in: 90 min
      months: {April: {air: {min: 4 C, max: 11 C}, dew point: 3 C, wind: 6 m/s, wet days: 15}}
      forecast: forecast.csv
      readings: readings.csv
    tide: {constants: constants.csv, pressure: {min: 985 hPa, max: 1030 hPa}, surge: 20 cm, craft: {needs: 3.2 m, comes in: day 1 09:00, off by: day 2 09:00}}
    workfaces: {sill: {level: 1.5 m, covers at: 1.7 m, wash: 10 min, sheltered: yes}, shed: {indoors: yes}}
window: {place: pier, opens: 2027-04-05 07:00, closes: 2027-04-07 19:00}
people: {Ann: {tickets: [painter]}}
paints: {primer: {kind: two-pack epoxy}}
tasks:
  burn: {kind: cut, at: pier/sill, hours: 1 h, paint off first: yes}
  grind: {kind: surface prep, at: pier/sill, patch: 9 m, grade: St 3, holds: 26 h, may be covered: yes}
  paint: {kind: coat, at: pier/sill, area: 3 m2, stripe: 12 m, leave bare: 4 m, profile: 60 um, coats: primer, after: grind}
`

func weatherRead(t *testing.T, text string) *tasks.Job {
	t.Helper()
	job, err := ReadBytes("job.yaml", []byte(text), os.DirFS("testdata"))
	if err != nil {
		t.Fatal(err)
	}
	return job
}

func TestWeatherIsLaidOutByTheHour(t *testing.T) {
	job := weatherRead(t, weatherJob)
	p := job.Places[0]
	c := p.Climate
	zone, _ := time.LoadLocation("Europe/London")
	minute := func(text string) int64 {
		v, err := time.ParseInLocation("2006-01-02 15:04", "2027-"+text, zone)
		if err != nil {
			t.Fatal(err)
		}
		return int64(hours.Of(v))
	}
	if c == nil || c.Hourly == nil || c.Average == nil || c.Warm == nil || len(c.Assumed) == 0 {
		t.Fatalf("climate %+v", c)
	}
	if c.Hourly.Start > minute("03-22 07:00") || c.Hourly.End() < minute("04-29 19:00") {
		t.Error("the weather does not cover what plans may cover: two weeks before, three weeks after")
	}
	for _, h := range []struct {
		at, basis string
		steel     float64 // -100: not asked
	}{
		{"04-05 08:30", "readings readings.csv", 5.625}, // readings 5 and 10 C four hours apart, at the middle of the hour
		{"04-05 14:30", "forecast forecast.csv", -100},
		{"04-08 10:30", "climate, poor day (one in 10)", -100},
	} {
		w, ok := c.Hourly.At(minute(h.at))
		if !ok || w.Basis != h.basis || h.steel > -100 && (w.Steel < h.steel-1e-9 || w.Steel > h.steel+1e-9) {
			t.Errorf("%s: %+v, want %s, steel %g", h.at, w, h.basis, h.steel)
		}
	}
	poor, _ := c.Hourly.At(minute("04-08 12:30"))
	mean, _ := c.Average.At(minute("04-08 12:30"))
	warm, _ := c.Warm.At(minute("04-08 12:30"))
	if !(poor.Air < mean.Air && mean.Air < warm.Air && poor.Wind > mean.Wind) {
		t.Errorf("poor %+v, average %+v, warm %+v", poor, mean, warm)
	}
	notes := ""
	for _, n := range job.Notes {
		notes += n.Text + "\n"
	}
	for _, want := range []string{"those of April for March", "readings readings.csv covers", "forecast forecast.csv covers", "predicted from constants: not for safety"} {
		if !strings.Contains(notes, want) {
			t.Errorf("no note %q in\n%s", want, notes)
		}
	}
	if strings.Contains(notes, "May") {
		t.Error("months after the window are nobody's business")
	}
}

func TestTideAndFaces(t *testing.T) {
	p := weatherRead(t, weatherJob).Places[0]
	if p.Tide == nil || !p.Tide.NotForSafety || p.Tide.Datum != "chart" {
		t.Fatalf("tide %+v", p.Tide)
	}
	sea := p.Sea
	if sea.Allow.LeastPressure != 985 || sea.Allow.GreatestPressure != 1030 || sea.Allow.Surge != 0.2 || !sea.AllowPos.Given() {
		t.Errorf("allowance %+v", sea.Allow)
	}
	if sea.Craft == nil || sea.Craft.Needs.Value != 3.2 || sea.Craft.In.Day != 1 || sea.Craft.By.Day != 2 {
		t.Errorf("craft %+v", sea.Craft)
	}
	sill, shed := p.Workfaces[0], p.Workfaces[1]
	if !sill.Sheltered || sill.Wash.Value != 10 || !shed.Indoors || !sill.Floods() || shed.Floods() {
		t.Errorf("workfaces %+v, %+v", sill.FaceNature, shed.FaceNature)
	}
	if got := sill.Covers(); got < 1.2199 || got > 1.2201 { // 1.7 m less 28 cm for 985 hPa and 20 cm
		t.Errorf("covers at %g m, want 1.22", got)
	}
	if p.Hourly(sill) != p.Climate.Hourly || p.Hourly(shed) != nil || p.WarmHourly(nil) != p.Climate.Warm {
		t.Error("the weather of the wrong workface")
	}
	plain := weatherRead(t, strings.Replace(weatherJob, ", pressure: {min: 985 hPa, max: 1030 hPa}, surge: 20 cm", "", 1))
	notes := ""
	for _, n := range plain.Notes {
		notes += n.Text
	}
	if plain.Places[0].Workfaces[0].Covers() != 1.7 || !strings.Contains(notes, "no allowance for pressure and surge") {
		t.Error("without an allowance the level stands, and it is said")
	}
}

func TestCoatKeys(t *testing.T) {
	job := weatherRead(t, weatherJob)
	burn, grind, paint := job.Tasks[0], job.Tasks[1], job.Tasks[2]
	if !burn.PaintOff || grind.HoldsFor.Value != 26*60 || grind.Patch.Value != 9000 || grind.Covered == nil || !*grind.Covered {
		t.Errorf("burn %+v, grind %+v", burn.TaskNature, grind.TaskNature)
	}
	if paint.Stripe.Value != 12000 || paint.Bare.Value != 4000 || paint.Profile.Value != 60 || paint.Covered != nil {
		t.Errorf("paint %+v", paint.TaskNature)
	}
}

func TestWeatherFaults(t *testing.T) {
	for _, c := range []struct{ old, new, says string }{
		{"window: {place", "begin: 2026-03-05 08:00\nwindow: {place", "worked out for a year at most"},
		{"forecast: forecast.csv", "forecast: tide.csv", "tide.csv"},
		{"constants: constants.csv", "constants: forecast.csv", "forecast.csv"},
		{"air: {min: 4 C, max: 11 C}", "air: {min: 4 C}", "both least and greatest are wanted"},
		{"poor day: 10 %", "poor day: 60 %", "outside 0.1 % to 50 %"},
		{"pressure: {min: 985 hPa", "pressure: {min: 700 hPa", "outside"},
		{"needs: 3.2 m, ", "", "needs is missing"},
	} {
		_, err := ReadBytes("job.yaml", []byte(strings.Replace(weatherJob, c.old, c.new, 1)), os.DirFS("testdata"))
		if err == nil || !strings.Contains(err.Error(), c.says) {
			t.Errorf("%s: %v, want %q", c.new, err, c.says)
		}
	}
	resin := strings.Replace(weatherJob, "  paint: {", "  resin: {at: pier/sill, standing: 6 h, may be covered: no}\n  paint: {", 1)
	if _, err := ReadBytes("job.yaml", []byte(resin), os.DirFS("testdata")); err == nil || !strings.Contains(err.Error(), "standing time alone cannot choose its tide") {
		t.Errorf("resin alone: %v", err)
	}
}
