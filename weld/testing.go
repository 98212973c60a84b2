package weld

import (
	"fmt"
	"math"
	"strings"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Test is one test of finished seams, a task with people and standing time.
type Test struct {
	Method      string  // "visual", "penetrant", "magnetic", "vacuum box", "air" or "hose"
	Length      float64 // mm of seam
	Temperature float64 // C of the steel; zero is 20: give 0.01 for freezing point
	Dwell       float64 // min, as a written procedure says; also lets penetrant be used below 5 C
	Pressure    float64 // bar: air default 0.15 and at most 0.2; hose at least 2
	Site        bool
	Origin      origin.Origin
}

type testRate struct {
	ready, perMetre float64 // min
	dwell           float64 // min of clock
	note            string
}

var testRates = map[string]testRate{
	"visual":     {5, 2, 0, "light, gauge, notes"},
	"penetrant":  {10, 6, 20, "clean, spray, wipe, develop, look"},
	"magnetic":   {10, 4, 0, "contrast paint, yoke, look"},
	"vacuum box": {10, 8, 0, "soap, box, look, move on"},
	"air":        {40, 2, 60, "blanks, relief valve, gauge, soap, look"},
	"hose":       {15, 2, 0, "hose and pump, look from the dry side"},
}

const (
	airUsual, airMost = 0.15, 0.20 // bar (common practice)
	hoseLeast         = 2.0        // bar at the nozzle: 0.2 MPa from at most 1.5 m (class rules)
	penetrantLeast    = 5.0        // C
	penetrantCool     = 10.0       // C below which the dwell doubles
)

// Work gives the hands-on time and the dwell of a test. Rates are house judgement; penetrant
// stands at least 10 min and the developer as long (ASME V: from 10 min), both doubled between 5
// and 10 C; air pressure is held for an hour.
//
// Errors: a *Error for penetrant on steel below 5 C without a procedure's dwell, for air above
// 0.2 bar (compressed air stores energy), for a hose below 2 bar, and for an unknown test.
func (t Test) Work() (Labour, error) {
	method := plainWord(t.Method)
	r, ok := testRates[method]
	if !ok {
		return Labour{}, fault("test", "visual, penetrant, magnetic, vacuum box, air or hose", "no test %q", t.Method)
	}
	if t.Temperature == 0 {
		t.Temperature = 20
	}
	if err := first(within("length", t.Length, 0.1, maxLength, "mm"), within("temperature", t.Temperature, -40, 150, "C"),
		optional("dwell", t.Dwell, 1, 1440, "min"), optional("pressure", t.Pressure, 0.01, 100, "bar")); err != nil {
		return Labour{}, err
	}
	l := Labour{}
	wait := origin.House("dwell", r.dwell, "min", method+" test")
	switch method {
	case "penetrant":
		if t.Temperature < penetrantLeast && t.Dwell == 0 {
			return l, fault("temperature", "warm the steel to 5 C or more, or give the dwell of a procedure that covers the cold",
				"penetrant on steel at %.1f C: below %.0f C it shows nothing sure", t.Temperature, penetrantLeast)
		}
		cold := origin.House("cold factor", 1, "", "doubled from 5 to 10 C")
		if t.Temperature < penetrantCool {
			cold = origin.Published("cold factor", 2, "", "T.O. 33B-1-1: double the dwell from about 4 to 15 C")
		}
		wait = origin.Worked("dwell", 20*cold.Value, "min", "(penetrant + developer) x cold factor",
			origin.Published("penetrant", 10, "min", "ASME V: at least 10 min"), origin.Published("developer", 10, "min", "10 to 30 min"), cold)
	case "air":
		if t.Pressure > airMost {
			return l, fault("pressure", "0.15 bar is usual; where the rules ask for more, test with water", "an air test at %.3g bar is above %.2g bar", t.Pressure, airMost)
		}
		p := t.Pressure
		if p == 0 {
			p = airUsual
		}
		l.Warnings = append(l.Warnings, fmt.Sprintf("air test at %.3g bar: relief valve and two gauges on before the air, people clear while it rises", p))
	case "hose":
		if t.Pressure > 0 && t.Pressure < hoseLeast {
			return l, fault("pressure", "at least 2 bar at the nozzle, from not more than 1.5 m", "a hose test at %.3g bar is below %.0f bar", t.Pressure, hoseLeast)
		}
	}
	if t.Dwell > 0 {
		wait = origin.Written("dwell", t.Dwell, "min", t.Origin)
	}
	return t.labour(l, method, r, wait), nil
}

func (t Test) labour(l Labour, method string, r testRate, wait origin.Figure) Labour {
	metres := origin.Written("metres", t.Length/1000, "m", t.Origin)
	ready := origin.House("making ready", r.ready, "min", method+": "+r.note)
	per := origin.House("testing rate", r.perMetre, "min/m", method+": "+r.note)
	hard := origin.House("site factor", bySite(t.Site, 1.5, 1), "", "access on site")
	m := ready.Value + per.Value*metres.Value*hard.Value
	l.HandsOn = quantity.HandsOn(m)
	l.Hours = origin.Worked("hands-on time", m, "min", "making ready + testing rate x metres x site factor", ready, per, metres, hard)
	if wait.Value > 0 {
		l.Standing, l.Wait = quantity.Clock(wait.Value), wait
	}
	return l
}

// Repair is a maybe: what a repair found by testing would take, and how likely it is.
type Repair struct {
	Share    float64          // expected share of the length
	Chance   float64          // that there is any, 0 to 1
	Length   float64          // mm to repair if there is
	HandsOn  quantity.HandsOn // locate, gouge, grind, weld again
	Standing quantity.Clock   // the second wait before testing again
	Hours    origin.Figure
}

const (
	repairEffort = 4.0   // times the first welding a metre: 3 to 5 (house judgement)
	repairLength = 150.0 // mm of a usual repair (house judgement)
)

// Repair gives the repair to allow for after an estimate. The share of the length is published
// for structures (TWI survey 2011: other structures 1.0 %, mild steel 1.5 %); on site 4 %, in
// bad access 10 % (house judgement, practice 3 to 5 and 10). Submerged arc and TIG need half.
// The chance is that of a count (Poisson) of repairs of usual length with that share.
func (e Estimate) Repair(c Circumstances, badAccess bool) Repair {
	var length, share, per float64
	for _, s := range e.Seams {
		length += s.Length * float64(max(1, s.Section.Sides))
		per += float64(s.Welding)
	}
	if length <= 0 {
		return Repair{}
	}
	rate := origin.Published("repair share", 0.015, "", "TWI survey of repair rates 2011: mild steel, other structures, by length")
	switch {
	case badAccess:
		rate = origin.House("repair share", 0.10, "", "bad access: 10 % of the length")
	case c.Site:
		rate = origin.House("repair share", 0.04, "", "site: 3 to 5 % of the length")
	}
	easy := origin.House("process factor", easier(e), "", "submerged arc and TIG need half the repairs")
	share = rate.Value * easy.Value
	r := Repair{Share: share, Standing: max(e.BeforeNDT, e.Cooling)}
	r.Chance = 1 - math.Exp(-share*length/repairLength)
	r.Length = math.Min(length, share*length/r.Chance)
	minutes := per / length
	m := r.Length * minutes * repairEffort
	var seams []origin.Figure
	for _, s := range e.Seams {
		if len(s.Hours.From) > 0 {
			seams = append(seams, s.Hours.From[0])
		}
	}
	welding := origin.House("welding", per, "min", "of the estimate")
	if len(seams) > 0 {
		welding = renamed(joined("welding", seams), "welding")
	}
	r.HandsOn = quantity.HandsOn(m)
	r.Hours = origin.Worked("hands-on time", m, "min", "repair length x welding a millimetre x effort",
		origin.Worked("repair length", r.Length, "mm", "min(length, repair share x process factor x length / chance)", rate, easy,
			origin.Written("length", length, "mm", origin.Origin{Source: "all sides of the seams"}), origin.House("chance", r.Chance, "", "at least one repair of 150 mm, by the repair share")),
		origin.Worked("welding a millimetre", minutes, "min", "welding / length", welding, origin.Written("length", length, "mm", origin.Origin{Source: "all sides of the seams"})),
		origin.House("effort", repairEffort, "", "3 to 5 times the first welding: locate, gouge, grind, test, weld again"))
	return r
}

// easier is the process factor on repairs, the worst of all seams.
func easier(e Estimate) float64 {
	f := 0.5
	for _, s := range e.Seams {
		if !strings.Contains(s.Title, Process(121).String()) && !strings.Contains(s.Title, Process(141).String()) {
			f = 1
		}
	}
	return f
}
