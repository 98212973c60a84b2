package coat

import (
	"fmt"

	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// Prep is one surface to prepare.
type Prep struct {
	Area     float64 // m2, up to 100000
	Grade    string  // "Sa 2 1/2", "St 3", an SSPC name, "bare metal", "solvent clean" or "fresh-water wash"
	Method   string  // "blast", "power tool", "hand tool", "needle gun", "solvent wipe", "wash"; empty is the grade's usual one
	State    string  // "new", "light rust", "heavy rust" or "painted", or a rust grade A to D; empty is "new"
	Surface  string  // Flat, Sections or Lattice; empty is Sections
	Abrasive string  // for blasting; empty is garnet
	Nozzle   float64 // mm bore, 6.35 to 12.7; 0 is 9.5 mm
	Hose     float64 // mm bore of the blast hose, 19 to 32; 0 is a hose without loss
	Site     bool    // out of doors or at sea, where bare steel turns sooner
	Rate     float64 // own rate in m2/h; 0 is the table's
}

// Preparation is what it takes. Minutes are one person's hands-on minutes without face factor.
type Preparation struct {
	Minutes  quantity.HandsOn
	Range    quantity.Range // minutes: low, likely, high
	Grade    string         // ISO 8501-1 name with its SSPC twin
	Method   string
	Abrasive float64        // kg, 0 without blasting
	People   int            // hands needed at once: blasting needs one at the nozzle and one at the pot
	Dry      quantity.Clock // clock minutes to dry after washing or wiping; 0 for the others
	Dust     bool           // grit and dust: no wet film and no open bearings in the workface and beside it
	Noise    bool           // noisy work hours bind it
	Sparks   bool           // keep it 6 m from spraying, and treat it as hot work near solvent
	MaxWait  quantity.Clock // to the start of the first coat; 0 is none
	Warnings []string
	Hours    origin.Figure // Minutes, with what it was made from
	Kilos    origin.Figure // Abrasive
	Wait     origin.Figure // MaxWait
}

// Prepare reckons one preparation. Errors name what is not known or out of range, or a grade that the
// method does not reach.
func Prepare(p Prep) (Preparation, error) {
	g, err := findGrade(p.Grade)
	if err != nil {
		return Preparation{}, err
	}
	usual := g.methods[0]
	if p.Method, err = choose("method", p.Method, usual, []string{blasting, powerTool, handTool, needleGun, wiping, washing}); err != nil {
		return Preparation{}, err
	}
	if !contains(g.methods, p.Method) {
		return Preparation{}, fault("take "+oneOf(g.methods)+", or another grade", "%s is not reached by %s", g.name, p.Method)
	}
	if p.Surface, err = choose("surface", p.Surface, Sections, Surfaces()); err != nil {
		return Preparation{}, err
	}
	for _, err := range []error{
		within("the area", p.Area, 0.01, 1e5, "m2", "add up the faces to be prepared"),
		within("the rate", p.Rate, 0, 1000, "m2/h", "give one person's own rate"),
	} {
		if err != nil {
			return Preparation{}, err
		}
	}
	out := Preparation{Grade: g.name, Method: p.Method, People: 1, Dry: drying[g.name]}
	if g.twin != "" {
		out.Grade += " (" + g.twin + ")"
	}
	if p.Method == blasting {
		err = p.blast(g, &out)
	} else {
		err = p.hand(g, &out)
	}
	if err != nil {
		return Preparation{}, err
	}
	out.Minutes = quantity.HandsOn(out.Range.Likely)
	p.wait(g, &out)
	return out, nil
}

// drying is clock time until the surface is dry again after water or solvent; house judgement.
var drying = map[string]quantity.Clock{"fresh-water wash": 120, "solvent clean": 15}

func contains(list []string, s string) bool {
	for _, l := range list {
		if l == s {
			return true
		}
	}
	return false
}

// findGrade reads a grade in any usual spelling.
func findGrade(name string) (grade, error) {
	w := word(name)
	if len(w) > 5 && w[:5] == "sspc " {
		w = w[5:]
	}
	short := squeeze(w)
	var names []string
	for _, g := range grades {
		names = append(names, g.name)
		if squeeze(word(g.name)) == short {
			return g, nil
		}
		for _, o := range g.other {
			if squeeze(o) == short {
				return g, nil
			}
		}
	}
	return grade{}, fault("write "+oneOf(names), "%q is not a grade of preparation that is known here", name)
}

// squeeze takes the spaces out, so that "Sa2 1/2" and "SP10" are found.
func squeeze(s string) string {
	out := make([]byte, 0, len(s))
	for i := 0; i < len(s); i++ {
		if s[i] != ' ' {
			out = append(out, s[i])
		}
	}
	return string(out)
}

// findState reads the state of the steel: its place in states.
func findState(name string) (int, error) {
	w := word(name)
	if w == "" {
		return 0, nil
	}
	var names []string
	for i, s := range states {
		names = append(names, s.name)
		if s.name == w || contains(s.other, w) {
			return i, nil
		}
	}
	return 0, fault("write "+oneOf(names), "%q is not a state of steel that is known here", name)
}

// wait sets the longest wait to the first coat and the cautions that go with it.
func (p Prep) wait(g grade, out *Preparation) {
	var f origin.Figure
	switch {
	case g.methods[0] == wiping || g.methods[0] == washing:
		out.Wait = origin.Word("longest wait to the first coat", "none of its own", origin.Origin{Kind: origin.Judgement, Source: "the grade before it counts"})
		return
	case p.Site:
		f = origin.Published("longest wait to the first coat", 4*hour, "min", "UFGS-09971 3.7.2.6: zinc-rich primer within 4 h of preparation")
	case p.Method == blasting:
		f = origin.Recalled("longest wait to the first coat", 8*hour, "min", "same shift, as bridge specifications ask; a published limit is 24 h")
	default:
		f = origin.Recalled("longest wait to the first coat", 8*hour, "min", "same day after hand and power tools")
	}
	out.Wait = f
	out.MaxWait = quantity.Clock(f.Value)
	out.Warnings = append(out.Warnings, fmt.Sprintf("prepare only while the steel is %s above the dew point, and again to %s if any rust forms, however short the wait", amount(usualSpread, "K"), g.name))
}
