package jobfile

import (
	"slices"
	"strings"
	"time"

	"github.com/rickar/cal/v2"
	"github.com/rickar/cal/v2/at"
	"github.com/rickar/cal/v2/au"
	"github.com/rickar/cal/v2/be"
	"github.com/rickar/cal/v2/ca"
	"github.com/rickar/cal/v2/ch"
	"github.com/rickar/cal/v2/cz"
	"github.com/rickar/cal/v2/de"
	"github.com/rickar/cal/v2/dk"
	"github.com/rickar/cal/v2/es"
	"github.com/rickar/cal/v2/fr"
	"github.com/rickar/cal/v2/gb"
	"github.com/rickar/cal/v2/ie"
	"github.com/rickar/cal/v2/it"
	"github.com/rickar/cal/v2/lt"
	"github.com/rickar/cal/v2/lv"
	"github.com/rickar/cal/v2/nl"
	"github.com/rickar/cal/v2/no"
	"github.com/rickar/cal/v2/nz"
	"github.com/rickar/cal/v2/pl"
	"github.com/rickar/cal/v2/se"
	"github.com/rickar/cal/v2/us"

	"sailby/tasks/hours"
)

// regions are the public holidays by code. Scotland is put together here: its first weekend of
// the year has two days, its August holiday comes first in the month, and Easter Monday is a working day.
var regions = map[string][]*cal.Holiday{
	"at": at.Holidays, "au-nsw": au.HolidaysNSW, "au-qld": au.HolidaysQLD, "au-sa": au.HolidaysSA, "au-tas": au.HolidaysTAS,
	"au-vic": au.HolidaysVIC, "au-wa": au.HolidaysWA, "be": be.Holidays, "ca": ca.Holidays, "ch": ch.Holidays, "cz": cz.Holidays,
	"de": de.Holidays, "de-hb": de.HolidaysHB, "de-hh": de.HolidaysHH, "de-mv": de.HolidaysMV, "de-ni": de.HolidaysNI,
	"de-sh": de.HolidaysSH, "dk": dk.Holidays, "es": es.Holidays, "fr": fr.Holidays, "gb": gb.Holidays, "gb-sct": scotland(),
	"ie": ie.Holidays, "it": it.Holidays, "lt": lt.Holidays, "lv": lv.Holidays, "nl": nl.Holidays, "no": no.Holidays,
	"nz": nz.Holidays, "pl": pl.Holidays, "se": se.Holidays, "us": us.Holidays,
}

func scotland() []*cal.Holiday {
	second := &cal.Holiday{Name: "2nd January", Month: time.January, Day: 2, Func: cal.CalcDayOfMonth,
		Observed: []cal.AltDay{{Day: time.Saturday, Offset: 2}, {Day: time.Sunday, Offset: 2}, {Day: time.Monday, Offset: 1}}}
	andrew := &cal.Holiday{Name: "St Andrew's Day", Month: time.November, Day: 30, Func: cal.CalcDayOfMonth,
		Observed: []cal.AltDay{{Day: time.Saturday, Offset: 2}, {Day: time.Sunday, Offset: 1}}}
	return []*cal.Holiday{gb.NewYear, second, gb.GoodFriday, gb.EarlyMay, gb.SpringHoliday, gb.SummerHolidayScotland, andrew, gb.ChristmasDay, gb.BoxingDay}
}

func regionCodes() []string {
	var out []string
	for code := range regions {
		out = append(out, code)
	}
	slices.Sort(out)
	return out
}

// amongRegions makes the hint for an unknown code: those of the same country, else all.
func (r *reader) amongRegions(code string) string {
	all := regionCodes()
	same := slices.DeleteFunc(slices.Clone(all), func(c string) bool { return len(code) < 2 || !strings.HasPrefix(c, code[:2]) })
	if len(same) > 0 {
		return "known here: " + list(same, 12)
	}
	return "known here: " + list(all, 40)
}

// readHolidays closes the places that keep public holidays on those of the regions named, in the
// years of the windows. Both the day itself and the day that stands in for it are closed.
func (r *reader) readHolidays(f *fields) {
	var codes []string
	for _, ref := range f.names("holidays") {
		if code := strings.ToLower(ref.text); regions[code] != nil {
			codes = append(codes, code)
		} else {
			r.faultAt(ref.pos, r.amongRegions(code), "holidays: %s is not a region whose holidays are known here", short(ref.text))
		}
	}
	if len(codes) == 0 && len(r.onHolidays) > 0 && !f.tried("holidays") {
		p := r.onHolidays[0]
		r.faultAt(p.Pos, "add `holidays: gb` (or another region) at the top of the file", "place %q: closed on holidays: of which region is not said", p.Name)
	}
	if len(r.windows) == 0 {
		return
	}
	first, last := r.windows[0].dayOne().Year, r.windows[0].lastDay().Year
	for _, w := range r.windows {
		first, last = min(first, w.dayOne().Year), max(last, w.lastDay().Year)
	}
	for _, p := range r.onHolidays {
		if p.Closed == nil {
			p.Closed = map[hours.Date]string{}
		}
		for _, code := range codes {
			for year := first - 1; year <= last+1; year++ {
				for _, h := range regions[code] {
					actual, observed := h.Calc(year)
					for _, day := range []time.Time{actual, observed} {
						if d := hours.DateOf(day); !day.IsZero() && p.Closed[d] == "" {
							p.Closed[d] = h.Name
						}
					}
				}
			}
		}
	}
}
