package site

import (
	"fmt"
	"strings"
	"time"
	_ "time/tzdata" // zones must not depend on the machine
)

// zone is the time zone that a file states in its head.
type zone struct {
	name string
	loc  *time.Location
}

const zoneHint = `state it in the head, for instance "# zone: UTC", "# zone: UTC+1" or "# zone: Europe/London"`

// zone reads the head's zone: UTC, GMT, UTC with an offset, or an IANA name. Short names such
// as BST or EST mean different things in different countries and are refused.
func (s *sheet) zone() (zone, bool) {
	c, ok := s.need("zone", zoneHint)
	if !ok {
		return zone{}, false
	}
	if loc := offsetZone(c.text); loc != nil {
		return zone{c.text, loc}, true
	}
	if strings.Contains(c.text, "/") {
		if loc, err := time.LoadLocation(c.text); err == nil {
			return zone{c.text, loc}, true
		}
	}
	s.fault(s.lines["zone"], c.col, zoneHint, "zone %s is not known", short(c.text))
	return zone{}, false
}

// offsetZone reads "UTC", "GMT", "UTC+1", "UTC-05:00" or "UTC+0530"; nil where it is none.
func offsetZone(text string) *time.Location {
	up := strings.ToUpper(strings.ReplaceAll(text, " ", ""))
	rest := strings.TrimPrefix(strings.TrimPrefix(up, "UTC"), "GMT")
	switch {
	case rest == up && up != "Z":
		return nil
	case rest == "" || up == "Z":
		return time.UTC
	}
	sign := map[byte]int{'+': 1, '-': -1}[rest[0]]
	digits := strings.Replace(rest[1:], ":", "", 1)
	if sign == 0 || len(digits) == 0 || len(digits) > 4 || strings.Trim(digits, "0123456789") != "" {
		return nil
	}
	n := 0
	for _, d := range digits {
		n = n*10 + int(d-'0')
	}
	h, m := n, 0
	if len(digits) > 2 {
		h, m = n/100, n%100
	}
	if h > 14 || m > 59 {
		return nil
	}
	return time.FixedZone(text, sign*(h*60+m)*60)
}

const timeHint = "write date and time as 2027-04-05 10:15"

// minute reads a local time. In an hour that clocks repeat the earlier is meant, and note says
// so; times that clocks skip, other notations, and dates before 1900 or from 2200 on are
// problems. At most one of note and problem is not empty.
func (z zone) minute(text string) (m Minute, note, problem string) {
	t, err := time.Parse("2006-01-02 15:04", strings.Replace(text, "T", " ", 1))
	if err != nil {
		return 0, "", fmt.Sprintf("%s is not a date and time", short(text))
	}
	wall := t.Unix()
	if wall/60 < firstMinute+day || wall/60 > lastMinute-day {
		return 0, "", fmt.Sprintf("%s is not between 1900 and 2200", short(text))
	}
	found := 0
	for _, near := range []int64{wall - 86400, wall + 86400} {
		_, offset := time.Unix(near, 0).In(z.loc).Zone()
		at := wall - int64(offset)
		if _, back := time.Unix(at, 0).In(z.loc).Zone(); back != offset {
			continue
		}
		if m1 := floorMinute(at); found == 0 || m1 != m {
			if found == 0 || m1 < m {
				m = m1
			}
			found++
		}
	}
	switch found {
	case 0:
		return 0, "", fmt.Sprintf("%s does not exist in %s: clocks go forward over it", short(text), z.name)
	case 2:
		note = fmt.Sprintf("%s happens twice in %s; the earlier is meant", text, z.name)
	}
	return m, note, ""
}

// floorMinute drops seconds, which only historic local mean times have.
func floorMinute(seconds int64) Minute {
	if seconds < 0 {
		seconds -= 59
	}
	return seconds / 60
}
