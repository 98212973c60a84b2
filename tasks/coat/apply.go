package coat

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Job is one coat of one paint on one surface.
type Job struct {
	Paint   Paint
	Area    float64 // m2 of steel to coat, both faces counted, up to 100000
	Method  string  // Brush, Roller, Airless or AirSpray
	Surface string  // Flat, Sections or Lattice; empty is Sections
	Celsius float64 // temperature of paint and steel, C
	Site    bool    // out of doors: wind takes spray, and less of the hour is at the face
	Stripe  float64 // m of edges and welds to stripe by brush beforehand; 0 is none
	Mask    float64 // m of edge to tape, for instance of bare strips left for welds; 0 is none
	Profile float64 // blast profile Rz in um that this coat must fill, 0 to 150; 0 over another coat
	Rate    float64 // own rate in m2 an hour of one painter; 0 is the table's
	Loss    float64 // own loss, share of the paint; 0 is the table's
	NoLoss  bool    // nothing is lost: the theoretical spreading rate
}

// Application is what one coat takes. Minutes are one painter's hands-on minutes without face
// factor; waiting and drying are not in them.
type Application struct {
	Minutes     quantity.HandsOn // likely: setting up, masking, mixing, applying, cleaning
	Range       quantity.Range   // minutes: low, likely, high
	Wet         float64          // um, to be measured at once with a comb
	Spreading   float64          // theoretical, m2/L
	Loss        float64          // share
	Litres      float64          // unthinned paint, likely
	Base        float64          // L, of two-pack paint; else all of it
	Hardener    float64          // L
	Thinner     float64          // L into the paint
	Cleaner     float64          // L for tools
	Tins        []Tin            // for this coat alone; none without pack sizes
	Batches     int              // mixes, each used up within its pot life; 0 for one-pack paints
	BatchLitres float64          // of one mix
	UseWithin   quantity.Clock   // minutes from mixing, by the pot life
	Induction   quantity.Clock   // minutes the first mix stands before work can start
	Stripe      *Stripe          // nil without stripe coat
	Warnings    []string
	Hours       origin.Figure // Minutes, with what it was made from
	Volume      origin.Figure // Litres, with what it was made from

	clock origin.Figure // time of applying by the clock, of two-pack paint: what the mixes are counted by
}

// Stripe is the stripe coat that goes before the full coat: a task and a wait of its own.
type Stripe struct {
	Minutes quantity.HandsOn
	Litres  float64
	Wait    quantity.Clock // until it is touch dry at the job's temperature; 0 if the paint does not say
	Hours   origin.Figure
}

// Methods lists the ways to apply paint; Surfaces the shapes of surface.
func Methods() []string { return []string{Brush, Roller, Airless, AirSpray} }

// Surfaces lists the shapes of surface, from quick to slow.
func Surfaces() []string { return []string{Flat, Sections, Lattice} }

// Apply reckons one coat. Errors name the first fault of the job or its paint, or say that the
// pot life is too short for any useful mix.
func Apply(j Job) (Application, error) {
	j, err := j.checked()
	if err != nil {
		return Application{}, err
	}
	p := j.Paint
	a := Application{Wet: WetFilm(p.DFT, p.VolumeSolids, p.Thinner), Spreading: Spreading(p.DFT, p.VolumeSolids)}
	low, high := j.volume(&a)
	pace := j.pace(a.Wet)
	if err := j.mixes(&a, pace); err != nil {
		return Application{}, err
	}
	a.Base = a.Litres
	if p.TwoPack() {
		a.Base = a.Litres * p.MixRatio[0] / (p.MixRatio[0] + p.MixRatio[1])
		a.Hardener = a.Litres - a.Base
	}
	a.Thinner = a.Litres * p.Thinner
	if len(p.PackSizes) > 0 && a.Litres > 0 {
		if a.Tins, err = Tins(a.Litres, p.PackSizes); err != nil {
			return Application{}, err
		}
	}
	j.hours(&a, pace)
	if j.Stripe > 0 {
		a.Stripe = j.stripe()
	}
	a.Warnings = append(a.Warnings, j.warnings(a, low, high)...)
	return a, nil
}

// checked fills in what was left out and reports the first fault.
func (j Job) checked() (Job, error) {
	if err := j.Paint.Validate(); err != nil {
		return j, err
	}
	var err error
	if j.Method, err = choose("method", j.Method, Roller, Methods()); err != nil {
		return j, err
	}
	if j.Surface, err = choose("surface", j.Surface, Sections, Surfaces()); err != nil {
		return j, err
	}
	for _, err := range []error{
		within("the area", j.Area, 0.01, 1e5, "m2", "add up the faces to be coated"),
		within("the temperature", j.Celsius, lowCelsius, highCelsius, "C", "give the temperature of steel and paint"),
		within("the stripe coat", j.Stripe, 0, 1e5, "m", "give the length of edges and welds"),
		within("the masking", j.Mask, 0, 1e5, "m", "give the length of edge to tape"),
		within("the profile", j.Profile, 0, 150, "um", "give Rz in um, for instance 60 um; 0 over another coat"),
		within("the rate", j.Rate, 0, 1000, "m2/h", "give one painter's own rate"),
		share("the loss", j.Loss, 0, 0.9, "give the share of paint that is lost, for instance 30 %"),
	} {
		if err != nil {
			return j, err
		}
	}
	return j, nil
}

// choose finds a name in a list, however it was written; empty takes the usual one.
func choose(what, name, usual string, from []string) (string, error) {
	if word(name) == "" {
		return usual, nil
	}
	for _, f := range from {
		if word(f) == word(name) {
			return f, nil
		}
	}
	return "", fault("write "+oneOf(from), "%q is no %s that is known here", name, what)
}

// volume sets the litres, and gives the low and high ends for the range.
func (j Job) volume(a *Application) (low, high float64) {
	p := j.Paint
	l := methodLoss(j.Method, j.Surface)
	figs := []origin.Figure{l.from("loss by "+j.Method, l.likely)}
	if j.Loss > 0 || j.NoLoss {
		l = loss{j.Loss, j.Loss, j.Loss, nil}
		figs = []origin.Figure{{Name: "loss", Value: j.Loss, Origin: origin.Origin{Kind: origin.Given, Source: "own loss"}}}
	} else if spray(j.Method) && j.Site {
		w := windLoss
		figs = append(figs, w.from("loss to wind", w.likely))
		l = loss{1 - (1-l.low)*(1-w.low), 1 - (1-l.likely)*(1-w.likely), 1 - (1-l.high)*(1-w.high), nil}
	}
	need := func(lost float64) float64 { return need(j.Area, p.DFT, p.VolumeSolids, j.Profile, lost) }
	a.Loss, a.Litres = l.likely, need(l.likely)
	from := []origin.Figure{given("area", j.Area, "m2"), p.fig("dft", p.DFT, "um"), p.fig("volume solids", p.VolumeSolids, "")}
	if j.Profile > 0 {
		from = append(from, origin.Worked("dry paint in the profile", profileVolume(j.Profile), "L/m2", "straight line between rows",
			given("profile Rz", j.Profile, "um"), origin.Recalled("rows by Rz", 0.01, "L/m2 for each 15 um", "usual dead volume of blasted steel")))
	}
	a.Volume = origin.Worked("paint", a.Litres, "L", "area x (dft/1000 + profile) / volume solids / (1 - loss)", append(from, figs...)...)
	return need(l.low), need(l.high)
}

func given(name string, v float64, unit string) origin.Figure {
	return origin.Figure{Name: name, Value: v, Unit: unit, Origin: origin.Origin{Kind: origin.Given}}
}

func spray(method string) bool { return method == Airless || method == AirSpray }

// stripe reckons the stripe coat: a band of 25 mm to each side, as a US federal road specification
// asks at least, by brush.
func (j Job) stripe() *Stripe {
	const band = 0.05 // m, both sides
	p := j.Paint
	rate := origin.House("stripe by brush", 60, "m/h", "welds, edges and bolts of sections")
	reach := origin.Published("extent beyond the edge", 25, "mm", "US federal road specification: at least 1 in")
	minutes := j.Stripe/rate.Value*60 + toolMinutes(Brush).Value/2
	s := Stripe{
		Minutes: quantity.HandsOn(minutes),
		Litres:  need(j.Stripe*band, p.DFT, p.VolumeSolids, 0, methodLoss(Brush, Sections).likely),
		Hours: origin.Worked("stripe coat", minutes, "min", "length / rate, and half of a brush's setting up and cleaning",
			given("length", j.Stripe, "m"), rate, reach, toolMinutes(Brush)),
	}
	if t, _, err := p.Wait("touch dry", j.Celsius); err == nil {
		s.Wait = quantity.Clock(t)
	}
	return &s
}

// warnings says what a painter would say about the job.
func (j Job) warnings(a Application, low, high float64) []string {
	p := j.Paint
	var out []string
	add := func(format string, args ...any) { out = append(out, fmt.Sprintf(format, args...)) }
	if j.Celsius < p.ApplyMin {
		add("%s is colder than the paint's least %s: it may not go on, and does not cure", amount(j.Celsius, "C"), amount(p.ApplyMin, "C"))
	}
	if j.Celsius > p.ApplyMax {
		add("%s is hotter than the paint's greatest %s: it may not go on", amount(j.Celsius, "C"), amount(p.ApplyMax, "C"))
	}
	if load(j.Method, a.Wet) > 1 {
		add("a wet film of %s is more than %s usually leaves in one pass (%s): the work is counted in proportion, a further coat and its drying are not",
			amount(math.Round(a.Wet), "um"), j.Method, amount(onePass[j.Method], "um"))
	}
	if high > low*1.25 {
		add("losses may be anything from %s to %s of paint: take the tins for %s", amount(low, "L"), amount(high, "L"), amount(high, "L"))
	}
	if p.TwoPack() && a.Batches > 0 {
		for _, t := range a.Tins {
			if t.Size > a.BatchLitres+1e-9 && a.Batches > 1 {
				add("a kit of %s is more than one mix of %s: divide it by measured volume, both parts", amount(t.Size, "L"), amount(a.BatchLitres, "L"))
				break
			}
		}
	}
	if p.Isocyanate {
		add("isocyanate: the commonest cause of occupational asthma; while spray mist is about only air-fed breathing apparatus, others well away and upwind, health surveillance")
	}
	if j.Method == Airless {
		add("airless: paint injected under the skin is a hospital case at once, however small the hole")
	}
	return out
}
