package coat

import (
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Rescue is the task that a missed longest wait costs before the next coat may go on.
type Rescue struct {
	Name    string           // "abrade and wipe" or "tack coat"
	Words   string           // what to do
	Minutes quantity.HandsOn // likely, one person
	Range   quantity.Range   // minutes
	Wait    quantity.Clock   // from its finish to the next coat
	Wet     float64          // um of a tack coat; 0 without
	Thinner float64          // its share of thinner
	Litres  float64          // paint of a tack coat
	Hours   origin.Figure
}

// Missed gives the rescue for a coat j of which the longest wait to the next coat has passed: a
// thinned tack coat over epoxy, abrading over every other paint. It is a way out that the paint's
// maker must confirm. Errors: those of Apply.
func Missed(j Job) (Rescue, error) {
	j, err := j.checked()
	if err != nil {
		return Rescue{}, err
	}
	switch kindName(j.Paint.Kind) {
	case "two pack epoxy", "epoxy tie coat", "zinc rich epoxy":
		return tackCoat(j)
	}
	return abrade(j), nil
}

// tackCoat: UFGS-09971 asks 25 to 50 um wet, thinned by about a quarter; MIL-HDBK-1110 2.3.4
// about 2 mil wet and about 4 h until it is tacky, when the full coat follows.
func tackCoat(j Job) (Rescue, error) {
	const wet, thinner, toTack = 50.0, 0.25, 4 * hour
	p := j.Paint
	p.Thinner = thinner
	p.DFT = wet * p.VolumeSolids / (1 + thinner)
	j.Paint, j.Profile, j.Stripe = p, 0, 0
	a, err := Apply(j)
	if err != nil {
		return Rescue{}, err
	}
	return Rescue{
		Name:    "tack coat",
		Words:   "wipe with solvent; a thin wet film, thinned by a quarter; the next coat goes on while it is tacky; else abrade. Ask the paint's maker first",
		Minutes: a.Minutes, Range: a.Range, Wait: quantity.Clock(toTack), Wet: wet, Thinner: thinner, Litres: a.Litres,
		Hours: origin.Worked("tack coat", float64(a.Minutes), "min", "as a coat of its own", a.Hours,
			origin.Published("wet film", wet, "um", "UFGS-09971: 25 to 50 um, thinned about 25 %"),
			origin.Published("until tacky", toTack, "min", "MIL-HDBK-1110 2.3.4: about 4 h")),
	}, nil
}

// abrade: UFGS-09971 gives grit 150 to 200, a solvent wipe and a test of cure; the rates are judged.
func abrade(j Job) Rescue {
	low := origin.House("slow rate on flat areas", 5, "m2/h", "degloss by hand or sander, and wipe")
	high := origin.House("quick rate on flat areas", 12, "m2/h", "degloss by hand or sander, and wipe")
	shape := slowingFigure(j.Surface)
	quick, slow := j.Area/(high.Value*shape.Value)*60, j.Area/(low.Value*shape.Value)*60
	r := quantity.Range{Low: quick, Likely: (quick + slow) / 2, High: slow}
	return Rescue{
		Name:    "abrade and wipe",
		Words:   "degloss with 150 to 200 grit, wipe with solvent, test the cure on a patch. Ask the paint's maker first",
		Minutes: quantity.HandsOn(r.Likely), Range: r,
		Hours: origin.Worked("abrading", r.Likely, "min", "area / rate, middle of slow and quick", given("area", j.Area, "m2"), low, high, shape,
			origin.Word("method", "degloss, wipe, cure test", origin.Origin{Kind: origin.Table, Source: "UFGS-09971, missed recoat window"})),
	}
}
