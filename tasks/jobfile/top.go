package jobfile

import (
	"strings"

	"sailby/tasks"
	"sailby/tasks/quantity"
)

var topSection = section{name: "Job", where: "top of the file", host: "", says: "The whole file.", keys: []key{
	{name: "job", takes: aText, need: true, example: "Ramp hinge and fender frame", says: "its name"},
	{name: "client", takes: aText, example: "Tarskay Harbour Trust", says: "printed on the sheets"},
	{name: "drawing", takes: aText, example: "RH-01 rev C", says: "number and revision, printed on the weld list"},
	{name: "zone", takes: itsOwn, form: "time zone", shape: anyText, usual: "none: each place states its own", example: "Europe/London", says: "time zone of home, and of the places that state none"},
	{name: "use", takes: names, example: "[house.yaml]", says: "libraries: files with procedures, rates, cutting, steels, paints, people, kit, hire and clashes; later ones win, the job file's own win over all"},
	{name: "places", takes: namedOf, sub: &placeSection, need: true, example: "{shop: {open: Mon-Fri 07:30-17:30}, pier: {open: always, workfaces: {deck: {people: 2}}}}", says: "where work happens"},
	{name: "trips", takes: listOf, sub: &tripSection, example: "[{name: a, place: pier, out: {leave: 2027-04-05 06:00}, back: {leave: 2027-04-06 18:00}}]", says: "bookings that could be made; in place of `window`"},
	{name: "window", takes: keysOf, sub: &windowSection, example: "{place: pier, opens: 2027-04-05 08:00, closes: 2027-04-14 20:00}", without: "trips", says: "a plain window; in place of `trips`"},
	{name: "begin", takes: aMoment, usual: "two weeks before leaving", example: "2027-03-22 07:30", says: "home work may begin; local to home"},
	{name: "people", takes: namedOf, sub: &personSection, example: "{Ines: {tickets: [fitter]}}", says: "who works"},
	{name: "kit", takes: namedOf, sub: &kitSection, example: "{generator: {gives: 15 kVA}}", says: "things there are only so many of"},
	{name: "hire", takes: namedOf, sub: &hireSection, example: "{loader crane: {slots: [2027-04-06 08:00-12:00]}}", says: "kit that is there only in slots"},
	{name: "procedures", takes: namedOf, sub: &procedureSection, example: "{site fillet: {process: 136}}", says: "how welds are made"},
	{name: "rates", takes: keysOf, sub: &ratesSection, example: "{fit-up: 8 min/m, set-up: 15 min}", says: "the crew's own rates for welding"},
	{name: "cutting", takes: namedOf, sub: &cuttingSection, example: "{small plasma: {by: plasma, speeds: {6 mm: 1400 mm/min, 12 mm: 450 mm/min}}}", says: "the house's own cutting speeds, by set or torch"},
	{name: "steels", takes: namedOf, sub: &steelSection, example: "{S355 plate: {grade: S355J2, C: 0.17 %, Mn: 1.45 %}}", says: "steels with what their certificates say"},
	{name: "paints", takes: namedOf, sub: &paintSection, example: "{primer: {kind: two-pack epoxy}}", says: "paints, as their sheets describe them"},
	{name: "assemblies", takes: namedOf, sub: &assemblySection, example: "{frame: {mass: 410 kg}}", says: "what is built, fitted or moved"},
	{name: "tasks", takes: namedOf, sub: &taskSection, example: "{fit frame: {kind: fit-up, at: shop, hours: 3 h}}", says: "what must be done or waited for"},
	{name: "repeat", takes: namedOf, sub: &blockSection, example: "{bay: {count: 3, tasks: {grind: {at: pier, hours: 1 h}}}}", says: "work that is done several times"},
	{name: "orders", takes: listOf, sub: &orderSection, example: "[{either: [weld lugs before resin, load before resin]}]", says: "rules on the order itself (R17)"},
	{name: "clashes", takes: keysOf, sub: &clashSection, example: "{add: [[people, soft film]]}", says: "pairs of workface states (R12)"},
	{name: "duty", takes: keysOf, sub: &dutySection, example: "{longest: 12 h, rest: 11 h}", says: "shifts and rest (R15)"},
	{name: "to standard", takes: aWord, words: []string{"EN 1090-2", "AWS D1.1"}, usual: "none", example: "EN 1090-2", says: "the standard that the contract is to"},
	{name: "steel", takes: aText, usual: "S355", example: "S355", says: "grade where an assembly states none, or a name under `steels`"},
	{name: "preheat by", takes: aWord, words: []string{"EN 1011-2 A", "EN 1011-2 B", "AWS D1.1"}, usual: "AWS D1.1 where the contract is to it, else as the procedures say", example: "EN 1011-2 B", says: "the standard that preheat is worked out by where a procedure says none"},
	{name: "preheat readings", takes: listOf, sub: &readingSection, example: "[{CE: 0.45, hydrogen scale: C, combined thickness: 80 mm, heat input: 1.2 kJ/mm, preheat: 75 C}]", says: "what you read from the charts of EN 1011-2 method A; the least of those that hold for a seam is taken"},
	holdKey,
	{name: "overweld", takes: yesNo, usual: "yes", example: "no", says: "more is laid than is drawn: legs 1 mm, caps 1.5 mm"},
	{name: "emergency", takes: keysOf, sub: &emergencySection, example: "{phone: 01 555 0102}", says: "the emergency block of the sheets"},
	{name: "changes", takes: namedOf, sub: &changeSection, example: "{faster resin: {set: {tasks/resin/standing: 1 h}}}", says: "alternatives kept beside the plan"},
	{name: "holidays", takes: words, usual: "none", example: "gb-sct", says: "regions whose public holidays close the places that say `closed on holidays: yes`"},
}}

func init() { topSection.find("holidays").words = regionCodes() }

var dutySection = section{name: "Duty", where: "duty", host: "duty", says: "Shifts and rest (R15).", keys: []key{
	{name: "longest", takes: anAmount, dim: quantity.Time, low: 60, high: 24 * 60, usual: "12 h", example: "13 h", says: "longest duty, driving and check-in included"},
	{name: "rest", takes: anAmount, dim: quantity.Time, low: 0, high: 48 * 60, usual: "11 h", example: "10 h", says: "least rest between duties"},
}}

var emergencySection = section{name: "Emergency", where: "emergency", host: "emergency", says: "Printed on every sheet; what is left out prints as a blank.", keys: []key{
	{name: "grid ref", takes: aText, example: "NF 784 512", says: "grid reference or position"},
	{name: "phone", takes: aText, example: "01 555 0102", says: "telephone"},
	{name: "radio", takes: aText, example: "VHF 12, callsign Tarskay", says: "radio"},
	{name: "hospital", takes: aText, example: "Tarskay cottage hospital, 9 km", says: "nearest emergency department"},
	{name: "muster", takes: aText, example: "head of the pier", says: "where to meet"},
	{name: "boat", takes: aText, example: "harbour launch, VHF 12", says: "boat cover"},
}}

// readTop reads what stands at the top of the file and depends on nothing.
func (r *reader) readTop(f *fields) {
	j := r.job
	j.Name, j.Client, j.Drawing, j.Steel = f.line("job"), f.line("client"), f.line("drawing"), f.line("steel")
	r.zoneTried = f.tried("zone")
	r.home = f.zone("zone")
	j.Execution = f.choice("to standard", "")
	r.readWelding(f)
	j.Duty, j.Rest = tasks.Amount{Value: 12 * 60}, tasks.Amount{Value: 11 * 60}
	if n := f.node("duty"); n != nil {
		g := r.open(n, &dutySection, "duty")
		j.Duty, j.Rest = g.amount("longest", 12*60), g.amount("rest", 11*60)
	}
	if n := f.node("emergency"); n != nil {
		g := r.open(n, &emergencySection, "emergency")
		j.Emergency = tasks.Emergency{GridRef: g.line("grid ref"), Phone: g.line("phone"), Radio: g.line("radio"),
			Hospital: g.line("hospital"), Muster: g.line("muster"), Boat: g.line("boat")}
	}
}

// library keys are those that a file under `use` may have.
var librarySection = section{name: "Library", where: "a file under use", says: "a library", keys: libraryKeys()}

func libraryKeys() []key {
	var out []key
	for _, name := range []string{"people", "kit", "hire", "procedures", "rates", "cutting", "steels", "paints", "clashes"} {
		k := *topSection.find(name)
		out = append(out, k)
	}
	return out
}

// readLibraries opens the files under `use`, in order.
func (r *reader) readLibraries(f *fields) []*fields {
	var out []*fields
	for _, ref := range f.names("use") {
		if !strings.HasSuffix(ref.text, ".yaml") && !strings.HasSuffix(ref.text, ".yml") {
			r.faultAt(ref.pos, "name a YAML file that lies beside the job file", "use: %s is not a .yaml file", short(ref.text))
			continue
		}
		data, shown, ok := f.beside("use", ref.text)
		if !ok {
			continue
		}
		if root := r.parse(shown, data); root != nil {
			r.change(root, r.settingsOf(shown))
			out = append(out, r.open(root, &librarySection, ""))
		}
	}
	return out
}
