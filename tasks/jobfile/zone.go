package jobfile

import (
	"fmt"
	"strings"
	"time"
	_ "time/tzdata" // laptops without a zone database
)

// usualZones are offered where a zone is misspelt.
var usualZones = []string{
	"Europe/London", "Europe/Dublin", "Europe/Lisbon", "Europe/Paris", "Europe/Madrid", "Europe/Brussels", "Europe/Amsterdam",
	"Europe/Berlin", "Europe/Copenhagen", "Europe/Oslo", "Europe/Stockholm", "Europe/Helsinki", "Europe/Warsaw", "Europe/Rome",
	"Europe/Vienna", "Europe/Zurich", "Europe/Athens", "Europe/Tallinn", "Europe/Riga", "Europe/Vilnius", "Atlantic/Reykjavik",
	"Atlantic/Faroe", "Atlantic/Azores", "Atlantic/Canary", "America/New_York", "America/Chicago", "America/Denver",
	"America/Los_Angeles", "America/Anchorage", "America/Halifax", "America/St_Johns", "America/Toronto", "America/Vancouver",
	"America/Sao_Paulo", "Africa/Johannesburg", "Asia/Singapore", "Asia/Tokyo", "Australia/Sydney", "Australia/Brisbane",
	"Australia/Perth", "Australia/Adelaide", "Pacific/Auckland", "UTC",
}

// zone reads a time zone; nil if there is none or it is not known.
func (f *fields) zone(name string) *time.Location {
	s, ok := f.word(name)
	if !ok {
		return nil
	}
	if s != "UTC" && !strings.Contains(s, "/") || strings.HasPrefix(s, "Etc/") {
		f.fault(name, "write region and city, for instance Europe/London", "%s is not a zone by region and city: short names and offsets do not tell when clocks change", short(s))
		return nil
	}
	loc, err := time.LoadLocation(s)
	if err != nil {
		hint := "write region and city, for instance Europe/London"
		if z, ok := f.r.nearest(s, usualZones); ok {
			hint = fmt.Sprintf("did you mean %q?", z)
		}
		f.fault(name, hint, "the time zone %s is not known", short(s))
		return nil
	}
	return loc
}
