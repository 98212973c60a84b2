package site

import (
	"io"
	"strings"
	"time"

	"sailby/tasks/quantity"
)

// ReadHarmonic reads a port's constants: a head that states "# zone: UTC" (phase lags must be on
// Greenwich), "# datum: chart" and "# mean: 2.6 m" (mean level above the datum, Z0), then a row for each
// constituent "M2,1.40,30": name, amplitude in metres, phase lag in degrees. A row
// "name,amplitude m,phase" may come first.
//
// Errors: Faults, all of the file's at once. No zone, datum or mean is always one.
func ReadHarmonic(name string, r io.Reader) (*Harmonic, error) {
	s := readSheet(name, r, "zone", "datum", "mean")
	if z, ok := s.zone(); ok && z.loc != time.UTC {
		s.fault(s.lines["zone"], s.head["zone"].col, "convert them: add the speed times the hours of the zone",
			"phase lags on %s, not on Greenwich (UTC)", z.name)
	}
	datum, _ := s.need("datum", datumHint)
	h := &Harmonic{Name: name, Datum: datum.text}
	if mean, ok := s.need("mean", `state it in the head, for instance "# mean: 2.6 m"`); ok {
		h.Mean, _ = s.metres(s.lines["mean"], mean, "m")
	}
	rows := s.rows
	if len(rows) > 0 && strings.EqualFold(rows[0].cells[0].text, "name") {
		rows = rows[1:]
	}
	for _, r := range rows {
		if !s.columns(r, 3, 3, "name,amplitude,phase") {
			continue
		}
		c := Constituent{Name: strings.ToUpper(r.cells[0].text)}
		if _, ok := arguments[c.Name]; !ok {
			s.fault(r.line, r.cells[0].col, "leave it out if it is small; known are "+strings.Join(ConstituentNames(), " "),
				"constituent %s is not known here", short(r.cells[0].text))
			continue
		}
		var ok bool
		if c.Amplitude, ok = s.metres(r.line, r.cells[1], "m"); !ok {
			continue
		}
		phase, err := quantity.Parse(strings.TrimSuffix(strings.TrimSuffix(r.cells[2].text, "°"), " deg"), quantity.Number)
		if err != nil || !(phase >= -360 && phase <= 360) {
			s.fault(r.line, r.cells[2].col, "write degrees on Greenwich, for instance 109.2",
				"phase %s is not an angle in degrees", short(r.cells[2].text))
			continue
		}
		c.Phase = phase
		h.Constituents = append(h.Constituents, c)
		if err := h.check(); err != nil && len(s.faults) == 0 {
			s.fault(r.line, r.cells[0].col, quantity.Hint(err), "%v", err)
			break
		}
	}
	if len(h.Constituents) == 0 && len(s.faults) == 0 {
		s.fault(max(s.last, 1), 1, "give M2 and S2 at least", "no constituents")
	}
	if err := s.err(); err != nil {
		return nil, err
	}
	return h, nil
}
