package weld

import "strings"

// JointType is a kind of joint, named as in ISO 2553 and ISO 9692-1. The zero value is no joint.
type JointType uint8

// The joints. Fillet, Corner and Lap have legs; Plug and Slot are holes that are filled; the
// others are butt joints with a prepared groove.
const (
	Fillet JointType = iota + 1
	Square
	SingleV
	DoubleV
	SingleBevel
	DoubleBevel
	SingleU
	DoubleU
	SingleJ
	DoubleJ
	Plug
	Slot
	Corner
	Lap
	lastJoint = Lap
)

// jointWords has the ISO name first, then what the shop says.
var jointWords = [lastJoint + 1][]string{
	Fillet:      {"fillet", "fillet weld", "t fillet"},
	Square:      {"square butt", "square", "square preparation", "i", "square groove", "closed butt"},
	SingleV:     {"single V", "v", "single v butt", "v butt", "butt", "single v preparation", "v groove"},
	DoubleV:     {"double V", "x", "double v butt", "x butt", "double v preparation"},
	SingleBevel: {"single bevel", "bevel", "half v", "hv", "single bevel butt"},
	DoubleBevel: {"double bevel", "k", "double bevel butt", "k butt", "double half v"},
	SingleU:     {"single U", "u", "u butt", "single u preparation"},
	DoubleU:     {"double U", "double u preparation", "uu"},
	SingleJ:     {"single J", "j", "j butt", "single j preparation", "half u"},
	DoubleJ:     {"double J", "double j preparation", "jj", "double half u"},
	Plug:        {"plug", "plug weld", "plug welds"},
	Slot:        {"slot", "slot weld", "slot welds"},
	Corner:      {"corner", "outside corner", "corner joint", "open corner"},
	Lap:         {"lap", "lap joint", "lap fillet"},
}

// String gives the joint's ISO name in plain words: "fillet", "single V".
func (t JointType) String() string {
	if t == 0 || t > lastJoint {
		return "no joint"
	}
	return jointWords[t][0]
}

// JointTypes lists the joints' names in a fixed order, for suggestions.
func JointTypes() []string {
	var names []string
	for t := Fillet; t <= lastJoint; t++ {
		names = append(names, t.String())
	}
	return names
}

// ParseJointType reads a joint's name: the ISO word or the shop's, in any case, with spaces,
// hyphens or underscores between the parts.
func ParseJointType(word string) (JointType, bool) {
	w := plainWord(word)
	for t := Fillet; t <= lastJoint; t++ {
		for _, name := range jointWords[t] {
			if plainWord(name) == w {
				return t, true
			}
		}
	}
	return 0, false
}

// Process is a welding process by its number in ISO 4063: Process(136). Zero means the default
// of the place: 111 on site, 135 in the shop.
type Process int

// ParseProcess reads a process: its ISO 4063 number ("136") or what the shop and AWS call it
// ("flux-cored", "stick", "MAG", "SMAW").
func ParseProcess(word string) (Process, bool) {
	w := plainWord(word)
	for _, p := range processes {
		for _, name := range p.words {
			if name == w {
				return p.number, true
			}
		}
	}
	return 0, false
}

// String gives number and name: "136 flux-cored".
func (p Process) String() string {
	if d, ok := processData(p); ok {
		return d.words[0] + " " + d.name
	}
	return "no process"
}

// Position is a welding position after ISO 6947. Zero means not given: PB for fillets and laps,
// PA for everything else.
type Position uint8

// The positions, with their AWS twins: PA 1F 1G, PB 2F, PC 2G, PD 4F, PE 4G, PF 3F 3G upwards,
// PG the same downwards, PH 5G upwards (fixed pipe), PJ downwards, HL045 6G.
const (
	PA Position = iota + 1
	PB
	PC
	PD
	PE
	PF
	PG
	PH
	PJ
	HL045
	lastPosition = HL045
)

var positionWords = [lastPosition + 1][]string{
	PA:    {"PA", "1f", "1g", "flat", "downhand"},
	PB:    {"PB", "2f", "horizontal vertical", "horizontal fillet"},
	PC:    {"PC", "2g", "horizontal"},
	PD:    {"PD", "4f", "horizontal overhead", "overhead fillet"},
	PE:    {"PE", "4g", "overhead"},
	PF:    {"PF", "3f", "3g", "vertical", "vertical up", "upwards", "3f up", "3g up"},
	PG:    {"PG", "vertical down", "downwards", "3f down", "3g down"},
	PH:    {"PH", "5g", "pipe upwards", "5g up"},
	PJ:    {"PJ", "pipe downwards", "5g down"},
	HL045: {"H-L045", "6g", "hl045", "inclined pipe"},
}

// String gives the ISO 6947 symbol.
func (p Position) String() string {
	if p == 0 || p > lastPosition {
		return "no position"
	}
	return positionWords[p][0]
}

// ParsePosition reads a position: the ISO 6947 symbol, its AWS twin, or plain words.
// "vertical" is upwards; "horizontal" is PC, "horizontal fillet" PB.
func ParsePosition(word string) (Position, bool) {
	w := plainWord(word)
	for p := PA; p <= lastPosition; p++ {
		for _, name := range positionWords[p] {
			if plainWord(name) == w {
				return p, true
			}
		}
	}
	return 0, false
}

// plainWord lowers the word, and makes one space of hyphens, underscores, slashes and blanks.
func plainWord(word string) string {
	return strings.Join(strings.FieldsFunc(strings.ToLower(word), func(r rune) bool {
		return r == '-' || r == '_' || r == '/' || r == ' ' || r == '\t' || r == '\u00a0'
	}), " ")
}
