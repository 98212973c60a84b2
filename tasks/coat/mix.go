package coat

import (
	"math"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// House judgement on mixing and tools.
const (
	potShare    = 0.8  // of the pot life that is used: the last fifth drags and will not level
	leastUse    = 10.0 // minutes: a mix that lasts less is no use
	leastMix    = 0.1  // L: less cannot be measured by volume on site
	faceSite    = 0.7  // share of the hour at the face, as in the plan's default for a site
	faceShop    = 0.85 // and in the shop
	mixTwoPack  = 10.0 // minutes to stir both parts, put together, stir and pour
	stirOnePack = 3.0  // minutes a tin
	stirAtOnce  = 5.0  // L in one tin
	mostBatches = 10000
	maskRate    = 40.0 // m of edge in an hour, tape on and off
)

// onePass is the wet film in um that a method usually leaves in one pass; house judgement.
var onePass = map[string]float64{Brush: 120, Roller: 120, AirSpray: 150, Airless: 400}

// load is how much more work a thick film is than one pass: its share over one pass, at least 1.
func load(method string, wet float64) float64 { return math.Max(1, wet/onePass[method]) }

// speed is one painter's rate on large flat areas in m2 an hour: from, likely, to. Recalled as
// m2 in a day of 8 h; the low end for a brush is a published base case for ordinary plant.
type speed struct{ low, high float64 }

var speeds = map[string]speed{Brush: {9.3, 11.6}, Roller: {23, 46}, AirSpray: {46, 93}, Airless: {93, 139}}

// slowing is the share of the flat rate that is left on other surfaces: "halve or worse" for sections.
var slowing = map[string]float64{Flat: 1, Sections: 0.5, Lattice: 0.35}

// toolMinutes is setting up and cleaning of the tools of one coat.
func toolMinutes(method string) origin.Figure {
	m := map[string]float64{Brush: 20, Roller: 20, AirSpray: 40, Airless: 55}[method]
	return origin.House("setting up and cleaning", m, "min", "tools of one coat by "+method)
}

// cleaner is the solvent for tools in litres: for the coat, and for each mix.
var cleaner = map[string][2]float64{Brush: {0.5, 0.25}, Roller: {0.75, 0.25}, AirSpray: {2, 0.5}, Airless: {5, 1}}

// pace is the application alone: minutes of one painter at the low and high rate, and its figure.
type pace struct {
	fast, slow float64 // minutes
	figure     origin.Figure
}

func (p pace) likely() float64 { return (p.fast + p.slow) / 2 }

// pace reckons the minutes to apply the coat.
func (j Job) pace(wet float64) pace {
	n := load(j.Method, wet)
	if j.Rate > 0 {
		m := j.Area / j.Rate * 60
		return pace{m, m, origin.Worked("applying", m, "min", "area / own rate", given("area", j.Area, "m2"), given("rate", j.Rate, "m2/h"))}
	}
	s, k := speeds[j.Method], slowing[j.Surface]
	p := pace{fast: j.Area * n / (s.high * k) * 60, slow: j.Area * n / (s.low * k) * 60}
	low := origin.Recalled("slow rate on flat areas", s.low, "m2/h", "usual output of one painter")
	if j.Method == Brush {
		low = origin.Published("slow rate on flat areas", s.low, "m2/h", "Process Engineering magazine, 2000: base case of ordinary plant painting, one coat")
	}
	from := []origin.Figure{given("area", j.Area, "m2"), low, origin.Recalled("quick rate on flat areas", s.high, "m2/h", "usual output of one painter")}
	if j.Surface == Sections {
		from = append(from, origin.Recalled("share left on sections", k, "", "halve or worse"))
	} else if j.Surface == Lattice {
		from = append(from, origin.House("share left on open steelwork", k, "", "worse than half"))
	}
	if n > 1 {
		from = append(from, origin.Worked("thick film", n, "", "wet film / what one pass leaves", origin.Worked("wet film", wet, "um", "dft (1 + thinner) / volume solids"),
			origin.House("wet film of one pass", onePass[j.Method], "um", "what "+j.Method+" usually leaves")))
	}
	p.figure = origin.Worked("applying", p.likely(), "min", "area x thick film / rate, middle of slow and quick", from...)
	return p
}

// mixes sets the batches of a two-pack paint so that each is used up before it goes off.
// The clock runs on while the painter is not at the face, and induction eats into the pot life.
func (j Job) mixes(a *Application, work pace) error {
	p := j.Paint
	a.Induction = quantity.Clock(p.Induction)
	if !p.TwoPack() {
		return nil
	}
	life, _, err := p.Pot(j.Celsius)
	if err != nil {
		return err
	}
	a.UseWithin = quantity.Clock(life * potShare)
	use := life*potShare - p.Induction
	if use < leastUse {
		return fault("keep the paint in the shade and cool, or ask for a slower hardener",
			"paint %s: at %s the mix lasts %s, of which %s are left to use it after %s of standing, at least %s are needed", called(p),
			amount(j.Celsius, "C"), amount(life, "min"), amount(math.Max(0, use), "min"), amount(p.Induction, "min"), amount(leastUse, "min"))
	}
	face := faceShop
	if j.Site {
		face = faceSite
	}
	elapsed := work.slow / face
	a.clock = origin.Worked("clock time of applying", elapsed, "min", "time at the slow rate / hands-on share of it",
		given("applying at the slow rate", work.slow, "min"), origin.House("hands-on share", face, "", "0.85 in a shop, 0.7 out of doors"))
	n := math.Ceil(elapsed/use - 1e-9)
	if n > mostBatches {
		return fault("divide the area into tasks, or spray", "the coat would take %s mixes, at most %d are reckoned", amount(n, ""), mostBatches)
	}
	a.Batches = max(1, int(n))
	a.BatchLitres = a.Litres / float64(a.Batches)
	if a.Batches > 1 && a.BatchLitres < leastMix {
		return fault("take a faster method or more painters", "each mix would be only %s before it goes off", amount(a.BatchLitres, "L"))
	}
	return nil
}

// Pot gives the pot life in minutes of a mix at celsius. Between the paint's points it interpolates
// as Curve.Time does; outside it halves for +10 C and doubles for -10 C (UFGS-09971 3.7.1.3), longer
// for at most 10 C. Errors: no pot life, celsius out of range.
func (p Paint) Pot(celsius float64) (minutes float64, figure origin.Figure, err error) {
	if len(p.PotLife) == 0 {
		return 0, figure, fault("give `pot life`, for instance 20 C: 4 h", "paint %s has no pot life", called(p))
	}
	return p.PotLife.figure("pot life", celsius, toPot, p.source("pot life"))
}

// hours sets the minutes of the whole coat and their tree.
func (j Job) hours(a *Application, work pace) {
	tools := toolMinutes(j.Method)
	mixing := j.mixing(*a)
	from := []origin.Figure{work.figure, mixing, tools}
	fixed := tools.Value + mixing.Value
	if j.Mask > 0 {
		rate := origin.House("masking", maskRate, "m/h", "tape on and off")
		mask := origin.Worked("masking", j.Mask/maskRate*60, "min", "length / rate", given("length", j.Mask, "m"), rate)
		from, fixed = append(from, mask), fixed+mask.Value
	}
	a.Range = quantity.Range{Low: fixed + work.fast, Likely: fixed + work.likely(), High: fixed + work.slow}
	a.Minutes = quantity.HandsOn(a.Range.Likely)
	a.Hours = origin.Worked("hands-on", a.Range.Likely, "min", "sum of the parts", from...)
	c := cleaner[j.Method]
	a.Cleaner = c[0] + c[1]*float64(max(0, a.Batches-1))
}

// mixing reckons the minutes to mix or stir all paint of the coat.
func (j Job) mixing(a Application) origin.Figure {
	if j.Paint.TwoPack() {
		_, life, _ := j.Paint.Pot(j.Celsius)
		n := origin.Worked("mixes", float64(a.Batches), "", "clock time of applying / usable pot life, rounded up", a.clock, life,
			origin.House("usable share of the pot life", potShare, "", "the last fifth drags"),
			j.Paint.fig("induction", j.Paint.Induction, "min"))
		return origin.Worked("mixing", mixTwoPack*float64(a.Batches), "min", "mixes x minutes a mix", n,
			origin.House("one mix", mixTwoPack, "min", "stir both parts, put together, stir, pour"))
	}
	n := math.Ceil(a.Litres/stirAtOnce - 1e-9)
	return origin.Worked("stirring", stirOnePack*n, "min", "tins x minutes a tin",
		origin.Worked("tins", n, "", "litres / 5 L, rounded up"), origin.House("one tin", stirOnePack, "min", "stir to the bottom"))
}
