package coat

import "sailby/tasks/origin"

// The generic figures below are remembered from many sheets of each kind, at a usual film, and may
// be half or half as much again: defaults until the paint's own sheet is written into the job.
const generic = "usual figures for this kind of paint, +/- 50 %"

const (
	hour = 60.0
	day  = 1440.0
)

// at makes a curve from temperature, time pairs, with times in unit (minutes).
func at(unit float64, pairs ...float64) Curve {
	var c Curve
	for i := 0; i+1 < len(pairs); i += 2 {
		c = append(c, Point{Celsius: pairs[i], Min: pairs[i+1] * unit})
	}
	return c
}

// five makes a curve at 5, 10, 15, 20 and 30 C, in hours.
func five(a, b, c, d, e float64) Curve { return at(hour, 5, a, 10, b, 15, c, 20, d, 30, e) }

// polyurethaneMax and polyurethaneMin are the recoat window of polyurethane over itself in
// UFGS-09971, table "RECOAT WINDOWS": bands of the highest steel temperature between the coats.
// Both ends of each band are points, so that the curve is flat within a band.
var (
	polyurethaneMin = at(hour, 16, 8, 21, 8, 22, 6, 27, 6, 28, 4, 32, 4, 33, 3, 38, 3, 39, 2, 43, 2, 44, 1, 49, 1)
	polyurethaneMax = at(hour, 16, 48, 21, 48, 22, 48, 27, 48, 28, 36, 32, 36, 33, 24, 38, 24, 39, 12, 43, 12, 44, 2, 49, 2)
	tackCoatMin     = at(hour, 16, 24, 21, 24, 22, 24, 27, 24, 28, 16, 32, 16, 33, 12, 38, 12, 39, 10, 43, 10, 44, 8, 49, 8)
	tackCoatMax     = at(hour, 16, 96, 21, 96, 22, 72, 27, 72, 28, 48, 32, 48, 33, 36, 38, 36, 39, 24, 43, 24, 44, 16, 49, 16)
)

const (
	recoatWindows = `UFGS-09971, table "RECOAT WINDOWS"`
	potLifeEpoxy  = "UFGS-09971 3.7.1.3, at 21 C and 50 % humidity"
	potLifePU     = "UFGS-09970 3.10.1.3, at 21 C and 50 % humidity"
	lifts         = "its solvents lift it"
)

// kinds names every kind with its other usual names.
var kinds = []struct {
	name  string
	other []string
	make  func() Paint
}{
	{"alkyd", []string{"alkyd primer", "one pack primer"}, alkyd},
	{"two-pack epoxy", []string{"epoxy", "epoxy primer", "two pack epoxy primer"}, epoxy},
	{"epoxy tie coat", []string{"tie coat"}, tieCoat},
	{"polyurethane", []string{"polyurethane topcoat", "two pack polyurethane", "pu"}, polyurethane},
	{"zinc-rich epoxy", []string{"zinc epoxy", "zinc rich primer"}, zincEpoxy},
	{"zinc ethyl silicate", []string{"zinc silicate", "inorganic zinc"}, zincSilicate},
	{"self-polishing antifouling", []string{"antifouling"}, selfPolishing},
	{"chlorinated rubber antifouling", []string{"chlorinated rubber", "vinyl antifouling"}, chlorinatedRubber},
	{"bitumen", []string{"blacking", "bitumen blacking"}, bitumen},
}

// Kinds lists the kinds of paint that have defaults.
func Kinds() []string {
	var out []string
	for _, k := range kinds {
		out = append(out, k.name)
	}
	return out
}

// kindName gives the one name of a kind that has several; other words come back as compared words.
func kindName(s string) string {
	s = word(s)
	for _, k := range kinds {
		if s == word(k.name) {
			return s
		}
		for _, o := range k.other {
			if s == o {
				return word(k.name)
			}
		}
	}
	return s
}

// Defaults gives the generic paint of a kind, by any of its usual names. Its Origin is Memory; the
// few figures that stand in a published text have their own entry in Sources. False if the kind is
// not known; see Kinds. The maps are new at each call and may be changed.
func Defaults(kind string) (Paint, bool) {
	for _, k := range kinds {
		if word(k.name) != kindName(kind) {
			continue
		}
		p := k.make()
		p.Kind = k.name
		p.Origin = origin.Origin{Kind: origin.Memory, Source: generic}
		if p.Sources == nil {
			p.Sources = map[string]origin.Origin{}
		}
		p.DewSpread = usualSpread
		p.Sources["dew spread"] = table(spreadSource)
		if p.RHMax == 0 {
			p.RHMax = 0.85
			p.Sources["humidity"] = table("85 %: US federal specification and ISO 12944-7")
		}
		p.ApplyMax = 40
		p.WindMax = map[string]float64{}
		for m, v := range usualWind {
			p.WindMax[m] = v
		}
		if p.SolventGone == nil {
			p.SolventGone = p.HardDry.times(solventFactor)
			p.Sources["solvent gone"] = origin.Origin{Kind: origin.Judgement, Source: "three times the time to hard dry"}
		}
		p.DryHours = 8
		p.Sources["dry hours"] = origin.Origin{Kind: origin.Judgement, Source: "8 h dry and above the least temperature, as one antifouling label asks"}
		return p, true
	}
	return Paint{}, false
}

// solventFactor: house judgement, no published time was found for hot work near fresh film.
const solventFactor = 3.0

func (c Curve) times(k float64) Curve {
	out := append(Curve(nil), c...)
	for i := range out {
		out[i].Min *= k
	}
	return out
}

func table(source string) origin.Origin { return origin.Origin{Kind: origin.Table, Source: source} }

// onKinds gives the same window for several following kinds.
func onKinds(r Recoat, names ...string) map[string]Recoat {
	m := map[string]Recoat{}
	for _, n := range names {
		m[n] = r
	}
	return m
}

func onePackSizes() []float64 { return []float64{1, 2.5, 5, 20} }

func kitSizes() []float64 { return []float64{5, 20} }

func alkyd() Paint {
	dry := five(36, 24, 18, 12, 8)
	return Paint{
		VolumeSolids: 0.45, DFT: 50, ApplyMin: 5, PackSizes: onePackSizes(),
		TouchDry: five(6, 4, 3, 2, 1), HardDry: five(24, 18, 12, 8, 5),
		NextCoat: onKinds(Recoat{Min: dry}, "alkyd"),
		Never:    map[string]string{"two-pack epoxy": lifts, "epoxy tie coat": lifts, "polyurethane": lifts, "zinc-rich epoxy": lifts, "zinc ethyl silicate": "it needs blasted steel"},
	}
}

func epoxy() Paint {
	dry := five(36, 20, 12, 7, 4)
	window := Recoat{Min: dry, Max: at(day, 20, 7)}
	return Paint{
		VolumeSolids: 0.60, DFT: 75, ApplyMin: 5, PackSizes: kitSizes(), MixRatio: [2]float64{4, 1}, Induction: 15,
		PotLife: at(hour, 21, 4), TouchDry: five(8, 5, 4, 2, 1), HardDry: dry,
		Service:      at(day, 10, 14, 15, 10, 20, 7, 30, 4),
		ImmersionMin: at(day, 10, 14, 15, 10, 20, 7, 30, 4),
		NextCoat:     onKinds(window, "two-pack epoxy", "epoxy tie coat", "polyurethane"),
		Sources:      map[string]origin.Origin{"pot life": table(potLifeEpoxy)},
	}
}

func tieCoat() Paint {
	window := Recoat{Min: five(12, 8, 6, 5, 3), Max: at(day, 5, 7, 10, 5, 15, 4, 20, 3, 30, 1)}
	return Paint{
		VolumeSolids: 0.55, DFT: 100, ApplyMin: 5, PackSizes: kitSizes(), MixRatio: [2]float64{4, 1}, Induction: 15,
		PotLife: at(hour, 21, 4), TouchDry: five(8, 5, 4, 2, 1), HardDry: five(36, 20, 12, 7, 4),
		Service:  at(day, 10, 14, 15, 10, 20, 7, 30, 4),
		NextCoat: onKinds(window, "self-polishing antifouling", "chlorinated rubber antifouling"),
		Sources:  map[string]origin.Origin{"pot life": table(potLifeEpoxy)},
	}
}

func polyurethane() Paint {
	cold := at(hour, 5, 30, 10, 18, 15, 12) // UFGS-09971 starts at 16 C
	return Paint{
		VolumeSolids: 0.50, DFT: 50, ApplyMin: 5, RHMax: 0.80, PackSizes: kitSizes(), MixRatio: [2]float64{4, 1}, Isocyanate: true,
		PotLife: at(hour, 21, 2), TouchDry: five(8, 5, 3.5, 2.5, 1.5), HardDry: five(30, 18, 12, 8, 4),
		Service:  at(day, 10, 14, 20, 7),
		NextCoat: map[string]Recoat{"polyurethane": {Min: append(cold, polyurethaneMin...), Max: append(Curve(nil), polyurethaneMax...)}},
		Sources: map[string]origin.Origin{"pot life": table(potLifePU), "next coat max": table(recoatWindows),
			"next coat": {Kind: origin.Memory, Source: recoatWindows + " from 16 C up, usual figures below"}},
	}
}

func zincEpoxy() Paint {
	dry := five(12, 8, 5, 3, 1.5)
	return Paint{
		VolumeSolids: 0.55, DFT: 60, ApplyMin: 5, PackSizes: kitSizes(), MixRatio: [2]float64{4, 1},
		PotLife: at(hour, 21, 4), TouchDry: five(1.5, 1, 0.7, 0.5, 0.3), HardDry: dry,
		NextCoat: onKinds(Recoat{Min: dry}, "zinc-rich epoxy", "two-pack epoxy"),
		Sources:  map[string]origin.Origin{"pot life": table(potLifeEpoxy)},
	}
}

func zincSilicate() Paint {
	dry := five(48, 36, 24, 18, 10)
	return Paint{
		VolumeSolids: 0.60, DFT: 75, ApplyMin: 5, RHMin: 0.50, RHMax: 0.95, PackSizes: kitSizes(), MixRatio: [2]float64{3, 1},
		PotLife: at(hour, 20, 6), TouchDry: five(1, 0.75, 0.5, 0.5, 0.3), HardDry: dry,
		NextCoat: onKinds(Recoat{Min: dry}, "two-pack epoxy"),
		Never:    map[string]string{"zinc ethyl silicate": "it does not hold on itself: use zinc-rich epoxy for repairs"},
	}
}

func selfPolishing() Paint {
	dry := five(12, 9, 7, 6, 4)
	return Paint{
		VolumeSolids: 0.50, DFT: 125, ApplyMin: 5, PackSizes: onePackSizes(),
		TouchDry: five(2, 1.5, 1, 1, 0.5), HardDry: dry,
		ImmersionMin: five(24, 18, 14, 12, 9), ImmersionMax: at(day, 30, 90),
		NextCoat: onKinds(Recoat{Min: dry}, "self-polishing antifouling"),
	}
}

func chlorinatedRubber() Paint {
	dry := five(12, 8, 7, 6, 4)
	return Paint{
		VolumeSolids: 0.35, DFT: 75, ApplyMin: 0, PackSizes: onePackSizes(),
		TouchDry: five(1, 0.75, 0.5, 0.5, 0.3), HardDry: dry,
		ImmersionMin: five(24, 18, 12, 12, 8), ImmersionMax: at(day, 30, 7),
		NextCoat: onKinds(Recoat{Min: dry}, "chlorinated rubber antifouling"),
	}
}

func bitumen() Paint {
	dry := five(48, 36, 30, 24, 12)
	never := map[string]string{}
	for _, k := range []string{"two-pack epoxy", "epoxy tie coat", "polyurethane", "zinc-rich epoxy", "zinc ethyl silicate", "alkyd"} {
		never[k] = "bitumen bleeds through and stays soft"
	}
	return Paint{
		VolumeSolids: 0.45, DFT: 100, ApplyMin: 5, PackSizes: onePackSizes(),
		TouchDry: five(6, 4, 3, 2, 1.5), HardDry: dry,
		ImmersionMin: five(72, 48, 48, 36, 24),
		NextCoat:     onKinds(Recoat{Min: dry}, "bitumen"), Never: never,
	}
}
