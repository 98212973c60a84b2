package site

import (
	"fmt"
	"io"
	"math"
	"strings"
	"time"

	"sailby/tasks/coat"
	"sailby/tasks/quantity"
)

// ReadForecast reads a forecast: a head "# zone: UTC", a row of column names with their units, then
// rows in order of time, at most 6 h apart to count as one. Columns: time, air C, and
// dew C or rh %, in any order; steel C, wind m/s, gust m/s, and wet (yes or no) or rain mm
// where known. Temperatures may be in F, winds in km/h, mph or kn. A blank field says nothing.
// Up to 10,000 rows and one megabyte.
//
// Errors: Faults, all of the file's at once. No zone is always one.
func ReadForecast(name string, r io.Reader) (*Forecast, error) { return readWeather(name, r, false) }

// ReadReadings reads what was measured at the place, in the same form as a forecast; rows at most 4 h
// apart count as one.
func ReadReadings(name string, r io.Reader) (*Forecast, error) { return readWeather(name, r, true) }

// column is what one column of the file holds.
type column struct {
	name, unit string
	dim        quantity.Dim
	lo, hi     float64 // in the base unit
}

// columnKinds are the columns there may be, with the units that each may be in.
var columnKinds = []struct {
	name  string
	units []string
	dim   quantity.Dim
	lo    float64
	hi    float64
}{
	{"time", []string{""}, quantity.Number, 0, 0},
	{"air", []string{"C", "F"}, quantity.Temperature, -45, 60},
	{"dew", []string{"C", "F"}, quantity.Temperature, -80, 60},
	{"steel", []string{"C", "F"}, quantity.Temperature, -45, 90},
	{"rh", []string{"%"}, quantity.Percent, 0.01, 1},
	{"wind", []string{"m/s", "km/h", "mph", "kn"}, quantity.Speed, 0, 100},
	{"gust", []string{"m/s", "km/h", "mph", "kn"}, quantity.Speed, 0, 120},
	{"wet", []string{""}, quantity.Number, 0, 0},
	{"rain", []string{"mm"}, quantity.Length, 0, 500},
}

const columnHint = "name the columns with their units: time,air C,rh %,wind m/s,wet"

func readWeather(name string, r io.Reader, readings bool) (*Forecast, error) {
	s := readSheet(name, r, "zone")
	z, zoned := s.zone()
	if !zoned {
		z = zone{"UTC", time.UTC} // to find the other faults
	}
	f := &Forecast{Name: name, Readings: readings}
	if len(s.rows) == 0 {
		if len(s.faults) == 0 {
			s.fault(max(s.last, 1), 1, columnHint, "no rows")
		}
		return nil, s.err()
	}
	cols, ok := s.weatherColumns(s.rows[0])
	if !ok {
		return nil, s.err()
	}
	for _, r := range s.rows[1:] {
		o, note, ok := s.observation(r, cols, z)
		if !ok {
			continue
		}
		if n := len(f.rows); n > 0 && o.at <= f.rows[n-1].at {
			s.fault(r.line, 1, "sort the rows by time", "%s is not after the row before it", short(moment(o.at)))
			continue
		}
		if note != "" {
			f.Notes = append(f.Notes, fmt.Sprintf("%s:%d: %s", name, r.line, note))
		}
		f.rows = append(f.rows, o)
	}
	if len(f.rows) == 0 && len(s.faults) == 0 {
		s.fault(s.last, 1, "write a row for each hour", "no weather below the column names")
	}
	if err := s.err(); err != nil {
		return nil, err
	}
	return f, nil
}

// weatherColumns reads the row of column names.
func (s *sheet) weatherColumns(r row) ([]column, bool) {
	var cols []column
	seen := map[string]bool{}
	faults := len(s.faults)
	for _, c := range r.cells {
		word, unit, _ := strings.Cut(c.text, " ")
		word, unit = strings.ToLower(word), strings.TrimSpace(unit)
		col := column{}
		for _, k := range columnKinds {
			if k.name != word {
				continue
			}
			for _, u := range k.units {
				if strings.EqualFold(u, unit) {
					col = column{k.name, u, k.dim, k.lo, k.hi}
				}
			}
			if col.name == "" {
				s.fault(r.line, c.col, columnHint, "column %s has to be in %s", short(c.text), strings.Join(k.units,
					" or "))
			}
		}
		switch {
		case col.name != "" && seen[col.name]:
			s.fault(r.line, c.col, "leave one of them out", "column %s is there twice", col.name)
		case col.name == "" && len(s.faults) == faults:
			s.fault(r.line, c.col, columnHint, "column %s is not known", short(c.text))
		}
		seen[col.name] = true
		cols = append(cols, col)
	}
	for _, need := range [][]string{{"time"}, {"air"}, {"dew", "rh"}} {
		if !seen[need[0]] && !seen[need[len(need)-1]] {
			s.fault(r.line, 1, columnHint, "there is no column %s", strings.Join(need, " or "))
		}
	}
	for _, two := range [][]string{{"dew", "rh"}, {"wet", "rain"}} {
		if seen[two[0]] && seen[two[1]] {
			s.fault(r.line, 1, "leave one of them out", "both %s and %s are given", two[0], two[1])
		}
	}
	return cols, len(s.faults) == faults
}

// observation reads one row.
func (s *sheet) observation(r row, cols []column, z zone) (o observation, note string, ok bool) {
	if !s.columns(r, len(cols), len(cols), "a field for each column") {
		return o, "", false
	}
	nan := math.NaN()
	o = observation{air: nan, dew: nan, steel: nan, wind: nan, gust: nan}
	rh, airCol, ok := nan, 1, true
	into := map[string]*float64{"air": &o.air, "dew": &o.dew, "steel": &o.steel, "wind": &o.wind,
		"gust": &o.gust, "rh": &rh}
	for i, c := range r.cells {
		col := cols[i]
		switch col.name {
		case "time":
			at, n, problem := z.minute(c.text)
			if problem != "" {
				s.fault(r.line, c.col, timeHint, "%s", problem)
				ok = false
			}
			o.at, note = at, n
		case "wet":
			word := strings.ToLower(c.text)
			o.wet, o.wetKnown = word == "yes", word != ""
			if word != "" && word != "yes" && word != "no" {
				s.fault(r.line, c.col, "write yes or no", "%s is neither yes nor no", short(c.text))
				ok = false
			}
		default:
			v, good := s.amount(r.line, c, col)
			ok = ok && good
			if p := into[col.name]; p != nil {
				*p = v
			} else if good && !math.IsNaN(v) { // rain
				o.wet, o.wetKnown = v > 0, true
			}
			if col.name == "air" {
				airCol = c.col
			}
		}
	}
	if !ok {
		return o, note, false
	}
	if !math.IsNaN(rh) {
		o.dew = coat.DewPoint(o.air, min(rh, 1))
	}
	const rounding = 0.5 // both are often printed in whole degrees
	switch {
	case math.IsNaN(o.air) || math.IsNaN(o.dew):
		s.fault(r.line, airCol, "leave the row out, or fill it", "air, and dew point or humidity, must not be blank")
	case o.dew > o.air+rounding+slack:
		s.fault(r.line, airCol, "check both", "dew point %.1f C is above the air, %.1f C", o.dew, o.air)
	default:
		o.dew = min(o.dew, o.air)
		return o, note, true
	}
	return o, note, false
}

// amount reads one field of a column; NaN if it is blank.
func (s *sheet) amount(line int, c cell, col column) (float64, bool) {
	if c.text == "" {
		return math.NaN(), true
	}
	v, err := quantity.Parse(c.text+" "+col.unit, col.dim)
	if !plain(c.text) || err != nil {
		s.fault(line, c.col, fmt.Sprintf("write a number in %s, or leave the field blank", col.unit),
			"%s %s is not a number", col.name, short(c.text))
		return 0, false
	}
	if !(v >= col.lo-slack && v <= col.hi+slack) {
		s.fault(line, c.col, "check the number and the column's unit", "%s %s %s is out of range", col.name,
			short(c.text), col.unit)
		return 0, false
	}
	return v, true
}
