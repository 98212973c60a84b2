package jobfile

import (
	"bytes"
	"fmt"
	"io"
	"math"
	"slices"
	"strings"
	"time"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
	"sailby/tasks/site"
)

var climateSection = section{name: "Climate", where: "places / NAME / climate", host: "places/pier/climate", says: "The weather there: what is usual, and what is foreseen or measured. With `months` every hour has its weather, and coats and surface prep wait for it (R25).", keys: []key{
	{name: "month", takes: aWord, words: monthNames(), example: "April", says: "the month that `wet days` is of"},
	{name: "wet days", takes: aCount, low: 0, high: 31, example: "14", says: "days with rain in that month"},
	{name: "months", takes: namedOf, sub: &monthSection, example: "{April: {air: {min: 4 C, max: 11 C}, dew point: 4 C, wind: 6 m/s, wet days: 14}}", says: "long-run normals of the months; the place needs its position under `at`"},
	{name: "poor day", takes: anAmount, dim: quantity.Percent, low: 0.001, high: 0.5, usual: "20 %: one day in five", example: "20 %", says: "chance that a day is worse than the day that is planned with"},
	{name: "spread", takes: itsOwn, form: "kelvin", shape: anyText, usual: "2.5 K (house judgement)", example: "2.5 K", says: "standard deviation of a day's air about the normal; 4 to 6 K inland in winter"},
	{name: "clear night", takes: itsOwn, form: "kelvin", shape: anyText, usual: "5 K", example: "5 K", says: "how much colder than the air the steel is in the poor day's clear night"},
	{name: "steel in the sun", takes: itsOwn, form: "kelvin", shape: anyText, usual: "20 K (house judgement)", example: "20 K", says: "how much hotter than the air the steel is on the warm day, with the sun overhead"},
	{name: "steel follows in", takes: anAmount, dim: quantity.Time, low: 0, high: 48 * 60, usual: "2 h (house judgement)", example: "2 h", says: "time in which 63 % of a change of the air has reached the steel"},
	{name: "forecast", takes: itsOwn, form: "file", shape: anyText, example: "forecast.csv", says: "CSV with `# zone:` in its head and the columns time, air C, rh % or dew C, and where known steel C, wind m/s, gust m/s, wet or rain mm; in place of the normals in the hours that it covers"},
	{name: "readings", takes: itsOwn, form: "file", shape: anyText, example: "readings.csv", says: "what was measured there, in the same form; in place of normals and forecast"},
}}

var monthSection = section{name: "Month", where: "places / NAME / climate / months / NAME", host: "places/pier/climate/months/April", says: "Long-run normals of one month.", keys: []key{
	{name: "air", takes: itsOwn, form: "{min, max}", shape: limitsShape, need: true, example: "{min: 4 C, max: 11 C}", says: "means of the coldest and of the hottest moment of each day"},
	{name: "dew point", takes: anAmount, dim: quantity.Temperature, low: -60, high: 60, need: true, example: "4 C", says: "mean"},
	{name: "wind", takes: anAmount, dim: quantity.Speed, low: 0, high: 40, need: true, example: "6 m/s", says: "mean"},
	{name: "wet days", takes: aNumber, low: 0, high: 31, usual: "0", example: "14", says: "days with 1 mm or more"},
}}

var airKey = &key{takes: anAmount, dim: quantity.Temperature, low: -45, high: 60, example: "4 C"}

// climate is a place's weather as it was read, to be laid out when the windows are known.
type climate struct {
	p                  *tasks.Place
	f                  *fields
	normals            site.Climate
	forecast, readings *site.Forecast
}

// climate reads the weather of a place.
func (r *reader) climate(p *tasks.Place, f *fields) {
	p.Climate = &tasks.Climate{Pos: r.pos(f.at), WetDays: f.count("wet days", 0)}
	p.Climate.Month = time.Month(slices.Index(monthNames(), f.choice("month", "")) + 1)
	c := climate{p: p, f: f, normals: site.Climate{Poor: f.value("poor day")}}
	c.normals.Spread, _ = f.kelvin("spread", 15)
	c.normals.Steel = f.steelRule()
	c.forecast, c.readings = f.weatherFile("forecast", site.ReadForecast), f.weatherFile("readings", site.ReadReadings)
	if !f.tried("months") {
		for _, k := range []string{"poor day", "spread", "clear night", "steel in the sun", "steel follows in", "forecast", "readings"} {
			if f.has(k) {
				f.fault(k, "add `months: {April: {air: {min: 4 C, max: 11 C}, dew point: 4 C, wind: 6 m/s, wet days: 14}}`", "there are no normals for the hours that nothing else covers")
				return
			}
		}
		return
	}
	if !p.HasAt {
		f.fault("months", "add `at: [57.6 N, 7.2 W]` to the place", "the hours of the day need the position of the place")
		return
	}
	faults := len(r.faults)
	c.normals.Months = map[time.Month]site.Normal{}
	for _, kv := range f.pairs("months") {
		m := time.Month(slices.Index(monthNames(), kv[0].Value) + 1)
		if m == 0 {
			r.fault(kv[0], r.among(kv[0].Value, monthNames(), ""), "%s%s is not a month", f.lead("months"), short(kv[0].Value))
			continue
		}
		g := r.open(kv[1], &monthSection, f.what+": "+kv[0].Value)
		n := site.Normal{Dew: g.value("dew point"), Wind: g.value("wind")}
		if g.has("wet days") {
			n.WetDays = g.value("wet days")
		}
		if least, most := g.span("air", airKey); least != nil && most != nil {
			n.AirLeast, n.AirGreatest = *least, *most
			if n.Dew > n.AirGreatest && g.has("dew point") {
				g.fault("dew point", "give the mean dew point in C", "%s C is above the greatest air, %s C", trim(n.Dew), trim(n.AirGreatest))
			}
		} else if g.has("air") {
			g.fault("air", "write {min: 4 C, max: 11 C}", "both least and greatest are wanted")
		}
		c.normals.Months[m] = n
	}
	if len(r.faults) == faults && len(c.normals.Months) == 0 {
		f.fault("months", "write for instance {April: {air: {min: 4 C, max: 11 C}, dew point: 4 C, wind: 6 m/s, wet days: 14}}", "there is no month")
	}
	if len(r.faults) == faults {
		r.climates = append(r.climates, c)
	}
}

// kelvin reads a difference of temperature, 0 if it is left out.
func (f *fields) kelvin(name string, most float64) (float64, bool) {
	s, ok := f.word(name)
	if !ok {
		return 0, false
	}
	v, err := quantity.Parse(strings.TrimSpace(strings.TrimSuffix(s, "K")), quantity.Number)
	if !strings.HasSuffix(s, "K") || err != nil || !(v >= 0 && v <= most) {
		f.fault(name, fmt.Sprintf("write a difference in kelvin from 0 to %s, for instance 3 K", trim(most)), "%s is not a difference of temperature", short(s))
		return 0, false
	}
	return v, true
}

// steelRule reads how the steel departs from the air; nil is the usual rule.
func (f *fields) steelRule() *site.SteelRule {
	night, n := f.kelvin("clear night", 15)
	sun, s := f.kelvin("steel in the sun", 60)
	if !n && !s && !f.has("steel follows in") {
		return nil
	}
	rule := site.UsualSteel()
	if n {
		rule.NightPoor, rule.NightAverage = night, min(night, rule.NightAverage)
	}
	if s {
		rule.SunWarm, rule.SunAverage = sun, min(sun, rule.SunAverage)
	}
	if f.has("steel follows in") {
		rule.Lag = f.value("steel follows in") / 60
	}
	return &rule
}

// weatherFile reads a forecast or readings.
func (f *fields) weatherFile(name string, read func(string, io.Reader) (*site.Forecast, error)) *site.Forecast {
	file, ok := f.word(name)
	if !ok {
		return nil
	}
	data, shown, ok := f.beside(name, file)
	if !ok {
		return nil
	}
	w, err := read(shown, bytes.NewReader(data))
	if err != nil {
		f.sheetFaults(name, err)
		return nil
	}
	for _, n := range w.Notes {
		f.r.note(f.pos(name), "%s", n)
	}
	return w
}

// Days laid out around the windows: home work begins two weeks before leaving where the job does not
// say, late plans are carried on three weeks and as long as the window lasts, and what is put on
// must stay dry after that.
const (
	daysBefore, daysAfter = 16, 23
	mostDays              = 366
)

// layOut gives the time that any plan of the job may cover, windows alone in the second span.
func (r *reader) layOut() (all, windows hours.Span) {
	all = hours.Span{From: hours.Far, To: hours.Never}
	windows = all
	take := func(w window, from, to hours.Minute) {
		windows.From, windows.To = min(windows.From, from), max(windows.To, to)
		if r.job.Begin != nil {
			if at, _, n := w.at(r.job.Begin); n == 1 && r.job.Begin.Zone != nil {
				all.From = min(all.From, at-2*1440)
			}
		}
		all.From = min(all.From, from-daysBefore*1440)
		all.To = max(all.To, to+max(daysAfter*1440, w.closes-w.opens+2*1440))
	}
	for i, w := range r.windows {
		from, to := w.opens, w.closes
		if i < len(r.job.Trips) {
			from, to = min(from, r.job.Trips[i].Leaves), max(to, r.job.Trips[i].Home)
		}
		take(w, from, to)
	}
	return all, windows
}

// nature lays weather and predicted tides out over the time that plans may cover.
func (r *reader) nature() {
	if len(r.windows) == 0 || len(r.climates)+len(r.predicted) == 0 {
		return
	}
	all, windows := r.layOut()
	if all.Len() > mostDays*1440 {
		r.faultAt(r.job.Pos, "make two jobs of it, or let `begin` be later", "weather and tide are worked out for a year at most: this job runs over %d days", all.Len()/1440)
		return
	}
	for _, p := range r.predicted {
		r.predict(p, all)
	}
	for _, c := range r.climates {
		r.hourly(c, all, windows)
	}
}

// hourly lays out a place's weather by hour.
func (r *reader) hourly(c climate, all, windows hours.Span) {
	var missing []string
	filled := map[time.Month]time.Month{}
	for d := hours.DateOf(all.From.In(time.UTC)); !hours.DateOf(all.To.In(time.UTC)).Before(d); d = d.Add(1) {
		if _, ok := c.normals.Months[d.Month]; !ok {
			filled[d.Month] = nearestMonth(c.normals.Months, d.Month)
		}
		m, _ := hours.Instant(d, 0, time.UTC)
		say := "those of " + filled[d.Month].String() + " for " + d.Month.String()
		if filled[d.Month] > 0 && m >= windows.From-daysBefore*1440 && m < windows.To && !slices.Contains(missing, say) {
			missing = append(missing, say)
		}
	}
	given := c.normals.Months
	c.normals.Months = map[time.Month]site.Normal{}
	for m := time.January; m <= time.December; m++ {
		if near, ok := filled[m]; ok {
			c.normals.Months[m] = given[near]
		} else if n, ok := given[m]; ok {
			c.normals.Months[m] = n
		}
	}
	if len(missing) > 0 {
		r.note(c.p.Climate.Pos, "place %q: months that are not given have the normals of the nearest: %s", c.p.Name, strings.Join(missing, ", "))
	}
	out, err := c.normals.Hourly(int64(all.From), int64(all.To), c.p.Lat, c.p.Lon)
	if err != nil {
		r.advice(c.f.at, c.f.lead(""), err, "look at the normals")
		return
	}
	for _, w := range []*site.Forecast{c.forecast, c.readings} {
		if w == nil {
			continue
		}
		out.Poor, out.Average, out.Warm = out.Poor.With(w), out.Average.With(w), out.Warm.With(w)
		r.covers(c, w, windows)
	}
	c.p.Climate.Hourly, c.p.Climate.Average, c.p.Climate.Warm = &out.Poor, &out.Average, &out.Warm
	c.p.Climate.Assumed = c.normals.Figures()
}

// covers notes what part of the windows a forecast covers.
func (r *reader) covers(c climate, w *site.Forecast, windows hours.Span) {
	minutes := hours.Minute(0)
	for _, s := range w.Covers() {
		minutes += max(0, min(hours.Minute(s.To), windows.To)-max(hours.Minute(s.From), windows.From))
	}
	kind := "forecast"
	if w.Readings {
		kind = "readings"
	}
	r.note(c.p.Climate.Pos, "place %q: %s %s covers %s of the %s from leaving to the end; the rest is planned on the poor day", c.p.Name, kind, w.Name,
		quantity.Hours(int(minutes)), quantity.Hours(windows.Len()))
}

// nearestMonth gives the month of the table that is nearest round the year, the earlier of two.
func nearestMonth(table map[time.Month]site.Normal, m time.Month) time.Month {
	best, away := m, math.MaxInt
	for k := time.January; k <= time.December; k++ {
		if _, ok := table[k]; !ok {
			continue
		}
		d := int(k - m)
		if d < 0 {
			d = -d
		}
		if d = min(d, 12-d); d < away {
			best, away = k, d
		}
	}
	return best
}
