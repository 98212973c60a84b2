package sheets

import (
	"slices"
	"strings"

	"sailby/report/agenda"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// caution is one hazard of the work with what is printed for it: short on a shift's sheet, in
// full on the page of cautions. Sources are common practice and the guidance named in the text;
// local rules and licensed practice come first.
type caution struct {
	name  string
	short string
	full  []string
	when  func(w *expand.Work, s *expand.Step) bool
}

var cautions = []caution{
	{"Hot work", "Hot work: permit, move or cover what burns, look behind and below, extinguisher at hand.",
		[]string{"Work to the site's hot-work permit; one permit for one job, one place, one day.",
			"Move or cover what burns; look at the other side of the plate, above, below, and into voids. Take paint off 100 mm to each side before heating.",
			"Nothing hot on or next to a tank or void until a competent person has tested and certified it.",
			"All welding fume needs control, mild steel too: work upwind, breathing protection outdoors as well. Zinc coatings come off before welding."},
		func(_ *expand.Work, s *expand.Step) bool { return s.Hot }},
	{"Fire watch", "Fire watch: the person named stays to the end and does nothing else.",
		[]string{"The watch runs during the work and after the last spark, as long as the sheet says; the site may ask for longer.",
			"The watcher knows the alarm, the extinguisher and the way out, looks at all sides of the work, and signs at the end."},
		func(_ *expand.Work, s *expand.Step) bool { return s.Watch > 0 }},
	{"Lifting", "Lifting: weight known, nobody below, one signaller, stop in wind.",
		[]string{"Every lift is planned by a competent person, supervised and carried out safely; the figures here do not replace that.",
			"Weight known and how; gear in date and marked; nobody under the load; one signaller; tag lines; stop at the wind limit, measured at the hook.",
			"Landing place ready before the load leaves the ground."},
		func(_ *expand.Work, s *expand.Step) bool {
			return s.Class == expand.Hands && (s.Task.Kind == tasks.Lift || s.Moves != "")
		}},
	{"Closed space", "Closed space: no entry without test, air, standby outside and rescue plan.",
		[]string{"Argon and carbon dioxide pool and give no warning. Test the air before and during; ventilate; a standby outside who never goes in.",
			"Never go in after somebody who has collapsed: call for the rescue. Take torch and gas hose out at every break."},
		func(_ *expand.Work, s *expand.Step) bool { return s.Face != nil && s.Face.Closed }},
	{"Over water", "Over water: rails or harness, lifejacket, boat or line ready.",
		[]string{"Rails first; where there are none, harness and anchor. Lifejacket on; one that fills by itself does not go with hot work.",
			"Somebody watches, with a line or a boat ready; radio tried in the morning."},
		func(_ *expand.Work, s *expand.Step) bool { return s.Face != nil && s.Face.Water }},
	{"Between tides", "Tide: know the last way out; wind and pressure change the tide.",
		[]string{"Predictions shift with wind and air pressure. Leave by the way-off time, earlier if the water says so; know a second way off.",
			"Everything comes out at every tide. See that the next high water does not reach what was left, and that openings are shut."},
		func(_ *expand.Work, s *expand.Step) bool { return s.Face != nil && s.Face.Tidal }},
	{"Isocyanate paint", "Isocyanate paint: no spraying without air-fed breathing gear; keep others away.",
		[]string{"Two-pack polyurethane gives asthma. Brush or roller where it can be; spraying only with air-fed breathing apparatus, others kept away, health surveillance.",
			"Read the maker's safety sheet for every paint; skin covered, eyes covered."},
		func(w *expand.Work, s *expand.Step) bool { return isocyanate(w, s) }},
	{"Solvent and epoxy", "Paint: no sparks near, air moving, gloves; read the safety sheet.",
		[]string{"Vapour burns and makes dizzy: no flame or grinding near until the solvent has gone, air moving, more so in corners and pits.",
			"Epoxy causes skin allergy: gloves, no bare arms. Steel at least 3 °C above the dew point, unless the paint's sheet says otherwise."},
		func(_ *expand.Work, s *expand.Step) bool {
			return s.Task.Kind == tasks.Coat && s.Class == expand.Hands
		}},
	{"Blasting and grinding", "Dust and grit: eyes, ears, breathing; nobody in line with the jet or wheel.",
		[]string{"Eye, ear and breathing protection; guard on; screens for others. Old paint may hold lead: test before it becomes dust.",
			"Silica sand is not blasted with. Grit and wheels throw sparks: the hot-work rules may hold."},
		func(_ *expand.Work, s *expand.Step) bool { return s.Task.Kind == tasks.Prep || hasState(s, "grit") }},
	{"Noise", "Noise: ears protected, only in the hours allowed.",
		[]string{"Ear protection for all near by; keep to the hours agreed with the neighbours."},
		func(_ *expand.Work, s *expand.Step) bool { return s.Noisy }},
	{"Electricity", "Electricity: residual current device, dry leads, return clamp close to the weld.",
		[]string{"On a wet site: residual current device on every circuit, leads up and whole. Return clamp close to the weld: no current through hinges, bearings or wire rope.",
			"Generator outside, exhaust away from people and air intakes; earth as its maker says."},
		func(_ *expand.Work, s *expand.Step) bool {
			return s.Power > 0 || s.Task.Kind == tasks.Weld && s.Class == expand.Hands
		}},
	{"Working alone", "Never alone at the tasks marked so: if the second person has to leave, that work stops.",
		[]string{"The plan keeps a second person at the place for such work. If that person has to leave, the work stops.",
			"Where somebody works alone at other things: agreed times to call in, and who comes if the call does not."},
		func(_ *expand.Work, s *expand.Step) bool { return s.Lone }},
	{"Tests", "Tests: as the written procedure says; keep people clear of what is under pressure or load.",
		[]string{"Penetrants and developers: air moving, gloves, no flame. Load and pressure tests: people clear, water rather than air, a relief valve.",
			"The time between welding and testing goes into the report."},
		func(_ *expand.Work, s *expand.Step) bool {
			return s.Task.Kind == tasks.Test && s.Class == expand.Hands
		}},
}

// always holds for every away job.
var always = caution{"Driving and tiredness", "Tired people make mistakes: keep the rest hours, do not drive home after a long shift.",
	[]string{"Driving and check-in are duty: the plan counts them. Drivers' hours rules may be stricter than the plan; they come first."}, nil}

func isocyanate(w *expand.Work, s *expand.Step) bool {
	n := agenda.CoatNumber(s)
	if n == 0 || n > len(s.Task.Coats) {
		return false
	}
	return slices.ContainsFunc(w.Job.Paints, func(p *tasks.Paint) bool { return p.Name == s.Task.Coats[n-1] && p.Isocyanate })
}

func hasState(s *expand.Step, name string) bool {
	return slices.ContainsFunc(s.States, func(st expand.State) bool { return st.Name == name })
}

// cautionsOf gives the cautions that any of the steps calls for.
func cautionsOf(w *expand.Work, steps []*expand.Step) []caution {
	var out []caution
	for _, c := range cautions {
		if slices.ContainsFunc(steps, func(s *expand.Step) bool { return !s.Absent && c.when(w, s) }) {
			out = append(out, c)
		}
	}
	return out
}

// cautionPage prints the cautions of the whole job in full.
func (k *pack) cautionPage() {
	p := k.p
	p.begin("Cautions", "cautions", false)
	p.big("Cautions")
	p.para("For the work in this job. Local rules, the permit and licensed practice come first.", body, false)
	for _, c := range append(cautionsOf(k.work, k.work.Steps), always) {
		p.skip(1)
		p.room(3 * lineHeight(body))
		p.para(c.name, body, true)
		p.para(strings.Join(c.full, " "), body, false)
	}
	var alone []string
	for _, t := range k.work.Job.Tasks {
		if t.Lone != nil && !*t.Lone {
			alone = append(alone, agenda.TaskLabel(t))
		}
	}
	if len(alone) > 0 {
		p.heading("Said to be safe alone", lineHeight(body))
		p.para("The job file says that these may be done alone: "+strings.Join(alone, ", ")+".", body, false)
	}
	p.skip(4)
	p.para(agenda.Care, body, true)
}
