package agenda_test

import (
	"strings"
	"testing"
	"time"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/fixture"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
	"sailby/tasks/site"
)

// The far north has days on which the sun does not set, and days on which it does not rise (npm suncalc 2.0.2 has no rise at
// 70 N 20 E on 21 June 2027 and none on 21 December).
func TestSunInTheFarNorth(t *testing.T) {
	at := func(lat float64, d hours.Date) string {
		return agenda.SunWords(&agenda.Shift{Place: &tasks.Place{HasAt: true, Lat: lat, Lon: 20}, Date: d, Zone: time.UTC})
	}
	for _, c := range []struct {
		lat  float64
		date hours.Date
		want string
	}{
		{70, hours.Date{Year: 2027, Month: 4, Day: 5}, "sun 03:26 to 18:02"},
		{70, hours.Date{Year: 2027, Month: 6, Day: 21}, "sun up all day"},
		{84, hours.Date{Year: 2027, Month: 12, Day: 21}, "sun not up all day, no light"},
	} {
		if got := at(c.lat, c.date); got != c.want {
			t.Errorf("%v N, %v: %q, want %q", c.lat, c.date, got, c.want)
		}
	}
	if got := at(70, hours.Date{Year: 2027, Month: 12, Day: 21}); !strings.HasPrefix(got, "sun not up all day, light enough to work from ") {
		t.Errorf("polar night: %q", got)
	}
	if agenda.SunWords(&agenda.Shift{Place: &tasks.Place{}, Zone: time.UTC}) != "" {
		t.Error("sun without a position")
	}
}

func london(t *testing.T) *time.Location {
	t.Helper()
	z, err := time.LoadLocation("Europe/London")
	if err != nil {
		t.Fatal(err)
	}
	return z
}

func pattern(t *testing.T, texts ...string) hours.Pattern {
	t.Helper()
	var p hours.Pattern
	for _, s := range texts {
		r, err := hours.ParseRule(s)
		if err != nil {
			t.Fatal(err)
		}
		p = append(p, r)
	}
	return p
}

// bridge is a closure from Fri 4 June 2027 21:00 to Mon 01:00 with one place open as given.
func bridge(t *testing.T, open string, people ...*tasks.Person) *expand.Work {
	z := london(t)
	at := func(day int, clock string) hours.Minute {
		n, _ := hours.ParseClock(clock)
		m, _ := hours.Instant(hours.Date{Year: 2027, Month: time.June, Day: day}, n, z)
		return m
	}
	pl := &tasks.Place{Name: "bridge", Zone: z, Open: pattern(t, open)}
	w := &expand.Work{Job: &tasks.Job{Name: "bridge", Zone: z, Places: []*tasks.Place{pl}, People: people},
		Window: expand.Window{Place: pl, Opens: at(4, "21:00"), Closes: at(7, "01:00")}, Presence: map[string][]expand.Stay{}}
	w.Span = hours.Span{From: at(1, "00:00"), To: at(10, "00:00")}
	for _, p := range people {
		w.Presence[p.Name] = []expand.Stay{{Span: hours.Span{From: w.Window.Opens, To: w.Window.Closes}, Site: true}}
	}
	return w
}

// TestDuty checks rule R15 against shifts worked out by hand.
func TestDuty(t *testing.T) {
	day, night := "daily 07:00-19:00", "daily 19:00-07:00"
	for _, c := range []struct {
		name, open, own, want string
		change                func(w *expand.Work, p *tasks.Person)
	}{
		{"round the clock: 12 h on, 11 h off", "always", "", "Fri 21:00-Sat 09:00, Sat 20:00-Sun 08:00, Sun 19:00-Mon 01:00", nil},
		{"day crew", "always", day, "Sat 07:00-Sat 19:00, Sun 07:00-Sun 19:00", nil},
		{"night crew", "always", night, "Fri 21:00-Sat 07:00, Sat 19:00-Sun 07:00, Sun 19:00-Mon 01:00", nil},
		{"a gap shorter than the rest does not end a shift", "daily 06:00-22:00", "", "Fri 21:00-Sat 09:00, Sat 20:00-Sun 08:00, Sun 19:00-Sun 22:00", nil},
		{"long opening is cut at 12 h", "Sat,Sun 06:00-22:00", "", "Sat 06:00-Sat 18:00, Sun 06:00-Sun 18:00", nil},
		{"meals do not end a shift", "daily 07:30-12:00 12:30-17:30", "", "Sat 07:30-Sat 17:30, Sun 07:30-Sun 17:30", nil},
		{"shorter rest from the file", "always", "", "Fri 21:00-Sat 09:00, Sat 18:00-Sun 06:00, Sun 15:00-Mon 01:00",
			func(w *expand.Work, p *tasks.Person) { w.Job.Rest.Value = 9 * 60 }},
		{"shorter duty from the file", "always", "", "Fri 21:00-Sat 05:00, Sat 16:00-Sun 00:00, Sun 11:00-Sun 19:00",
			func(w *expand.Work, p *tasks.Person) { w.Job.Duty.Value = 8 * 60 }},
		{"a day off", "always", day, "Sun 07:00-Sun 19:00",
			func(w *expand.Work, p *tasks.Person) {
				p.Off = map[hours.Date]bool{{Year: 2027, Month: time.June, Day: 5}: true}
			}},
		{"a closed day", "daily 07:00-19:00", "", "Sun 07:00-Sun 19:00",
			func(w *expand.Work, p *tasks.Person) {
				w.Job.Places[0].Closed = map[hours.Date]string{{Year: 2027, Month: time.June, Day: 5}: "regatta"}
			}},
		{"driving before counts as duty", "always", "", "Fri 15:00-Sat 03:00, Sat 14:00-Sun 02:00, Sun 13:00-Mon 01:00",
			func(w *expand.Work, p *tasks.Person) {
				w.Travel = map[string][]hours.Span{p.Name: {{From: w.Window.Opens - 360, To: w.Window.Opens}}}
			}},
		{"not at this place", "always", "", "", func(w *expand.Work, p *tasks.Person) { p.Places = []string{"shop"} }},
	} {
		p := &tasks.Person{Name: "Ada"}
		if c.own != "" {
			p.Hours = pattern(t, c.own)
		}
		w := bridge(t, c.open, p)
		if c.change != nil {
			c.change(w, p)
		}
		var got []string
		for _, s := range agenda.Duty(w, p) {
			z := w.Job.Zone
			got = append(got, s.From.In(z).Format("Mon 15:04")+"-"+s.To.In(z).Format("Mon 15:04"))
		}
		if g := strings.Join(got, ", "); g != c.want {
			t.Errorf("%s:\n got %s\nwant %s", c.name, g, c.want)
		}
	}
}

// TestNightBelongsToItsFirstDay: work at 02:00 of a night crew is on the sheet of the day before,
// apart from the day crew's.
func TestNightBelongsToItsFirstDay(t *testing.T) {
	day, night := &tasks.Person{Name: "Dee", Hours: pattern(t, "daily 07:00-19:00")}, &tasks.Person{Name: "Nan", Hours: pattern(t, "daily 19:00-07:00")}
	w := bridge(t, "always", day, night)
	task := &tasks.Task{Name: "cut", Place: w.Window.Place}
	w.Job.Tasks = []*tasks.Task{task}
	a := &plan.Answer{Work: w, Plan: &plan.Plan{}}
	add := func(who string, from hours.Minute, pieces ...int) {
		s := &expand.Step{Index: len(w.Steps), Task: task, Name: who, Place: w.Window.Place, Site: true}
		w.Steps = append(w.Steps, s)
		ps := plan.Step{Task: "cut", Step: who, People: []string{who}, Start: from}
		for _, n := range pieces {
			ps.Pieces = append(ps.Pieces, hours.Span{From: from, To: from + hours.Minute(n)})
			from += hours.Minute(n)
		}
		ps.Finish = from
		a.Plan.Steps = append(a.Plan.Steps, ps)
	}
	opens := w.Window.Opens        // Fri 21:00
	add("Nan", opens+29*60, 60)    // Sun 02:00
	add("Dee", opens+14*60, 60)    // Sat 11:00
	add("Dee", opens+12*60, 30)    // Sat 09:00
	add("Nan", opens+23*60+30, 60) // Sat 20:30
	var got []string
	for _, s := range agenda.Shifts(a) {
		var names []string
		for _, p := range s.People {
			names = append(names, p.Name)
		}
		got = append(got, agenda.Headline(w, s)+": "+strings.Join(names, "+"))
	}
	want := "Saturday 5 June 2027, day 2 of 4, bridge, 07:00-19:00: Dee|Saturday 5 June 2027, night, day 2 of 4, bridge, 19:00-Sun 6 Jun 07:00: Nan"
	if g := strings.Join(got, "|"); g != want {
		t.Errorf("shifts\n %s\nwant\n %s", g, want)
	}
}

func TestShiftsHoldEveryPieceOnce(t *testing.T) {
	r := fixture.Report()
	want := agenda.Worked(r.Likely)
	n, people := 0, 0
	for _, s := range agenda.Shifts(r.Likely) {
		n += len(s.Entries)
		for _, p := range s.People {
			people += len(p.Entries)
			for i := 1; i < len(p.Entries); i++ {
				if p.Entries[i].From < p.Entries[i-1].To {
					t.Errorf("%s does two things at once in the agenda", p.Name)
				}
			}
		}
	}
	each := 0
	for _, e := range want {
		each += len(e.People)
	}
	if n != len(want) || people != each {
		t.Errorf("%d pieces and %d people's pieces in the shifts, want %d and %d", n, people, len(want), each)
	}
	if agenda.Shifts(r.High) != nil {
		t.Error("shifts without a plan")
	}
}

func TestStandingAndFreePeople(t *testing.T) {
	shifts := agenda.Shifts(fixture.Report().Likely)
	first := shifts[4]
	if got := agenda.LongDay(first.Date); got != "Tuesday 6 April 2027" {
		t.Fatalf("fifth shift is %s", got)
	}
	if len(first.Standing) != 1 || first.Standing[0].Step.Task.Name != "resin set" {
		t.Errorf("standing time %v", first.Standing)
	}
	free := first.People[len(first.People)-1]
	if free.Name != fixture.LongName || len(free.Entries) != 0 || free.On.Len() != 630 {
		t.Errorf("the one without a task: %+v", free)
	}
}

func TestGates(t *testing.T) {
	r := fixture.Report()
	w := r.Likely.Work
	s := agenda.Shifts(r.Likely)[5] // Wed 7 April
	show := func(list []agenda.Gate) string {
		var out []string
		for _, g := range list {
			out = append(out, g.Name+" "+agenda.Opens(g, s.Zone))
		}
		return strings.Join(out, "; ")
	}
	if got := show(agenda.Reach(w, s)); got != "hinge 08:20-17:00" { // given 08:20-17:30 less 30 min way off
		t.Errorf("reach: %s", got)
	}
	if got := show(agenda.Hire(w, s)); got != "loader crane 08:00-12:00" {
		t.Errorf("hire: %s", got)
	}
	if got := show(agenda.Permits(w, s)); got != "hot work permit 08:00-17:00" {
		t.Errorf("permits: %s", got)
	}
	// By tide: low water at 10:00 UTC of 0 m between highs of 4 m at 04:00 and 16:00: below 2 m
	// from 07:00 to 13:00 by the cosine, 08:00 to 14:00 local, less 30 min way off.
	face := w.Window.Place.Workfaces[0]
	midnight, _ := hours.Instant(hours.Date{Year: 2027, Month: time.April, Day: 7}, 60, s.Zone) // 00:00 UTC
	table := &site.TideTable{Name: "t", Datum: "chart", Zone: "UTC"}
	for i := -6; i <= 6; i++ {
		h := 4.0
		if i%2 != 0 {
			h = 0
		}
		table.Waters = append(table.Waters, site.Water{At: int64(midnight) + int64(4+6*i)*60, Metres: h, High: h > 0})
	}
	w.Window.Place.Tide, face.Reach, face.Level = table, nil, tasks.Amount{Value: 2, Pos: tasks.Pos{Line: 1}}
	if got := show(agenda.Reach(w, s)); got != "hinge 08:01-13:30" { // the minute in which the water passes the level is not reached
		t.Errorf("reach by tide: %s", got)
	}
	if rise, set, ok := agenda.Sun(s); !ok || rise < "06:30" || rise > "06:55" || set < "20:10" || set > "20:35" {
		t.Errorf("sun %s to %s, %v", rise, set, ok)
	}
}

func TestSpareWork(t *testing.T) {
	r := fixture.Report()
	shifts := agenda.Shifts(r.Likely)
	var got []string
	for _, sp := range agenda.Spare(r.Likely, shifts[4], 9) {
		got = append(got, sp.Step.Task.Name+" "+agenda.Clock(sp.From, shifts[4].Zone))
	}
	// On Tuesday the lugs are cut out by 11:00, so their welding could begin; the frame waits for
	// the crane, the tests and coats for the welding.
	if g := strings.Join(got, ", "); g != "weld lugs 11:00" {
		t.Errorf("ready on Tuesday: %s", g)
	}
	for _, p := range r.Job.People {
		p.Tickets = nil
	}
	if list := agenda.Spare(r.Likely, shifts[4], 9); len(list) != 0 {
		t.Errorf("%s is ready, and nobody has the ticket", list[0].Step.Task.Name)
	}
}

// TestOutsidePeopleJoinTheCrew: an inspector booked for the afternoon stands on the crew's sheet.
func TestOutsidePeopleJoinTheCrew(t *testing.T) {
	r := fixture.Report()
	before := len(agenda.Shifts(r.Likely))
	slot := &r.Job.People[4].Booked[0]
	slot.From.Minute = 14*60 + 30
	shifts := agenda.Shifts(r.Likely)
	if len(shifts) != before {
		t.Fatalf("%d shifts, want %d", len(shifts), before)
	}
	for _, s := range shifts {
		for _, p := range s.People {
			if p.Name == fixture.Inspector && (len(p.Entries) != 2 || agenda.LongDay(s.Date) != "Thursday 8 April 2027") {
				t.Errorf("the inspector has %d pieces on %s", len(p.Entries), agenda.LongDay(s.Date))
			}
		}
	}
}

// TestABookingDoesNotStretchAShift: an inspector booked until late at night keeps
// neither the sheet's hours nor his own on it open beyond the crew's.
func TestABookingDoesNotStretchAShift(t *testing.T) {
	r := fixture.Report()
	var want hours.Span
	for _, s := range agenda.Shifts(r.Likely) {
		if s.Date.String() == "2027-04-08" && s.Site {
			want = s.Span
		}
	}
	slot := &r.Job.People[4].Booked[0]
	slot.To.Minute = 23*60 + 30
	for _, s := range agenda.Shifts(r.Likely) {
		if s.Date.String() != "2027-04-08" || !s.Site {
			continue
		}
		if s.Span != want {
			t.Errorf("the shift is %v, want %v", s.Span, want)
		}
		for _, p := range s.People {
			if p.On.From < s.From || p.On.To > s.To {
				t.Errorf("%s is on shift %v, outside the shift's %v", p.Name, p.On, s.Span)
			}
		}
	}
}

func TestStepLabels(t *testing.T) {
	w := fixture.Report().Likely.Work
	var got []string
	for _, s := range w.Steps {
		if s.Task.Name == "test lugs" || s.Task.Name == "coat lugs" {
			got = append(got, agenda.StepLabel(w, s))
		}
	}
	if g, want := strings.Join(got, "|"), "test lugs: cool|test lugs|coat lugs: coat 1|coat lugs: dry 1|coat lugs: coat 2|coat lugs: hard dry"; g != want {
		t.Errorf("got %s, want %s", g, want)
	}
}
