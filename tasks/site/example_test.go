package site_test

import (
	"fmt"
	"strings"
	"time"

	"sailby/tasks/site"
)

func minute(text string) site.Minute {
	t, err := time.Parse("2006-01-02 15:04", text)
	if err != nil {
		panic(err)
	}
	return t.Unix() / 60
}

func clock(m site.Minute) string { return time.Unix(m*60, 0).UTC().Format("Mon 15:04") }

func ExampleSun() {
	d, _ := site.Sun(57.6, -7.2, minute("2027-04-05 00:00"))
	fmt.Println("light", clock(d.CivilDawn), "to", clock(d.CivilDusk))
	fmt.Println("sun  ", clock(d.Rise), "to", clock(d.Set))
	// Output:
	// light Mon 05:07 to Mon 19:57
	// sun   Mon 05:48 to Mon 19:17
}

func ExampleTideTable_Reach() {
	const file = `# zone: UTC+1
# datum: chart
2027-04-05 04:40, 0.7, LW
2027-04-05 10:50, 4.4, HW
2027-04-05 17:05, 0.9, LW
2027-04-05 23:20, 4.2, HW
`
	table, err := site.ReadTideTable("tarskay-april.csv", strings.NewReader(file))
	if err != nil {
		fmt.Println(err)
		return
	}
	// The hinge is covered at 1.4 m; 0.3 m are kept for pressure and surge.
	level, _ := site.Allowance{}.Level(true, 1.4)
	from, to := minute("2027-04-05 05:00"), minute("2027-04-05 22:00")
	open, _ := table.Reach(true, level.Value, from, to)
	for _, s := range site.WayOff(open, 30, to) {
		fmt.Println("work", clock(s.From), "to", clock(s.To))
	}
	shut, _ := table.Shut(true, level.Value, from, to)
	fmt.Println("shut", clock(shut[0].From), "to", clock(shut[0].To)+":", shut[0].Why)
	// Output:
	// work Mon 15:08 to Mon 16:34
	// shut Mon 05:00 to Mon 15:08: water up to 4.40 m, must be below 1.10 m
}

func ExampleSeries_Closed() {
	april := site.Climate{Months: map[time.Month]site.Normal{
		time.April: {AirLeast: 5, AirGreatest: 12, Dew: 4, Wind: 5, WetDays: 12},
	}}
	from := minute("2027-04-05 00:00")
	outlook, _ := april.Hourly(from, from+24*60, 57.6, -7.2)
	coat := site.Limits{Steel: site.AtLeast(5), Spread: site.AtLeast(3)}
	for _, s := range outlook.Average.Closed(coat, from, from+24*60) {
		fmt.Println(clock(s.From), "to", clock(s.To)+":", s.Why)
	}
	// Output:
	// Mon 00:00 to Mon 02:00: steel above dew point 1.4 K, at least 3 K needed (worst of 2 h)
	// Mon 02:00 to Mon 07:00: steel 3.5 C, at least 5 C needed; steel above dew point -0.5 K, at least 3 K needed (worst of 5 h)
	// Mon 07:00 to Mon 09:00: steel above dew point 1.3 K, at least 3 K needed (worst of 2 h)
	// Mon 23:00 to Tue 00:00: steel above dew point 2.8 K, at least 3 K needed
}
