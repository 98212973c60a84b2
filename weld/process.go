package weld

import "sailby/tasks/origin"

// process holds what is usual for one process. Shares are from 0 to 1, sizes millimetres.
type process struct {
	number Process
	name   string
	words  []string // the number first

	heat       origin.Figure // k of EN 1011-1
	shop, site origin.Figure // operating factor: arc time over hands-on welding time
	efficiency origin.Figure // deposited over bought, stub excluded
	size       float64       // usual wire or electrode
	clean      float64       // minutes of slag and interpass cleaning a metre and run
	flow       float64       // shielding gas, litres a minute; 0 is none
	cored      float64       // mass of the wire over that of a solid one
	stick      bool
	slope      [2]float64 // load voltage: a + b x current
}

const (
	en1011    = "EN 1011-1 Table 1"
	houseOF   = "arc over hands-on welding time; holds slag, electrode changes, moving along, looking; never fit-up, tacks, preheat, gouging, moving leads or staging"
	handbook  = "ESAB Filler Metal Handbook p. 8-3 (row label from memory)"
	tungstenK = 0.6
)

func k(v float64) origin.Figure { return origin.Published("heat efficiency", v, "", en1011) }
func factor(v float64, where string) origin.Figure {
	return origin.House("operating factor", v, "", where+": "+houseOF)
}
func recalledFactor(v float64, where string) origin.Figure {
	return origin.Recalled("operating factor", v, "", where+": "+houseOF)
}
func yield(v float64) origin.Figure {
	return origin.Recalled("deposition efficiency", v, "", handbook)
}

// processes in the order of ISO 4063. Shop factors: 111 20 to 30 %, 135 and 136 30 to 45 %, 121
// 50 to 70 %, from memory; site factors are house judgement within 10 to 20 % (111) and 15 to
// 30 % (flux-cored), at the top for 111 because fit-up and moving are counted apart here.
var processes = []process{
	{number: 111, name: "stick", words: []string{"111", "stick", "mma", "smaw", "manual metal arc", "mmaw", "covered electrode"},
		heat: k(0.8), shop: recalledFactor(0.25, "shop"), site: factor(0.20, "site"),
		efficiency: origin.Recalled("deposition efficiency", 0.72, "", "deposition tables for low-hydrogen electrodes, 3.2 mm at 120 A, stub excluded"),
		size:       4.0, clean: 1.0, stick: true, slope: [2]float64{20, 0.04}},
	{number: 114, name: "self-shielded flux-cored", words: []string{"114", "self shielded", "self shielded flux cored", "fcaw s", "fcaw gasless", "gasless"},
		heat: k(0.8), shop: recalledFactor(0.35, "shop"), site: factor(0.20, "site"), efficiency: yield(0.78),
		size: 1.8, clean: 0.6, cored: 0.775, slope: [2]float64{14, 0.05}},
	{number: 121, name: "submerged arc", words: []string{"121", "submerged arc", "saw", "sub arc"},
		heat: k(1.0), shop: recalledFactor(0.55, "shop"), site: factor(0.35, "site"), efficiency: yield(0.99),
		size: 3.2, clean: 0.6, cored: 1, slope: [2]float64{20, 0.04}},
	{number: 131, name: "MIG", words: []string{"131", "131 mig", "mig argon"},
		heat: k(0.8), shop: recalledFactor(0.40, "shop"), site: factor(0.20, "site"), efficiency: yield(0.98),
		size: 1.2, clean: 0.2, flow: 15, cored: 1, slope: [2]float64{14, 0.05}},
	{number: 135, name: "MAG", words: []string{"135", "mag", "mig", "gmaw", "mig mag", "solid wire"},
		heat: k(0.8), shop: recalledFactor(0.40, "shop"), site: factor(0.20, "site"), efficiency: yield(0.96),
		size: 1.2, clean: 0.2, flow: 13, cored: 1, slope: [2]float64{14, 0.05}},
	{number: 136, name: "flux-cored", words: []string{"136", "flux cored", "fcaw", "fcaw g", "cored wire"},
		heat: k(0.8), shop: recalledFactor(0.40, "shop"), site: factor(0.20, "site"), efficiency: yield(0.86),
		size: 1.2, clean: 0.5, flow: 16.5, cored: 0.83, slope: [2]float64{14, 0.05}},
	{number: 138, name: "metal-cored", words: []string{"138", "metal cored", "mcaw"},
		heat: k(0.8), shop: recalledFactor(0.40, "shop"), site: factor(0.20, "site"), efficiency: yield(0.93),
		size: 1.2, clean: 0.2, flow: 16.5, cored: 0.9, slope: [2]float64{14, 0.05}},
	{number: 141, name: "TIG", words: []string{"141", "tig", "gtaw", "wig"},
		heat: k(tungstenK), shop: recalledFactor(0.30, "shop"), site: factor(0.15, "site"),
		efficiency: origin.House("deposition efficiency", 0.90, "", "rod ends thrown away"),
		size:       2.4, clean: 0.1, flow: 10, cored: 1, slope: [2]float64{10, 0.04}},
}

// processData finds the process p.
func processData(p Process) (process, bool) {
	for _, d := range processes {
		if d.number == p {
			return d, true
		}
	}
	return process{}, false
}

// gasShielded says whether wind takes the shielding away.
func (d process) gasShielded() bool { return d.flow > 0 }
