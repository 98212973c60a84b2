package jobfile

import (
	"fmt"
	"slices"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/quantity"
)

const (
	longestTask = 1000 * 60.0  // minutes of hands-on work
	longestWait = 2 * 525600.0 // minutes of standing time: two years
	aDay        = 1440.0       // minutes
	linkForms   = "name, list, or {name: state}, {name: {min, max, state}}"
	linkExample = "{prime: hard dry, weld frame: {min: 4 h, max: 48 h}}"
)

// taskSection has the keys that every task may have; those of the kinds stand in kinds.go.
var taskSection = section{name: "Task", where: "tasks / NAME", host: "tasks/rot found", says: "Something somebody must do or wait for.", keys: []key{
	{name: "kind", takes: aWord, words: kindNames(), usual: "plain", example: "fit-up", says: "what it is; R6 says how each kind pauses"},
	{name: "at", takes: itsOwn, form: "place or place/workface", shape: anyText, need: true, example: "pier/hinge", says: "where"},
	{name: "title", takes: aText, usual: "the name", example: "Free the hinge pin", says: "printed in place of the name"},
	{name: "drawing", takes: aText, example: "RH-04 rev B", says: "joint or drawing number"},
	{name: "note", takes: aNote, example: "keep the old pin", says: "printed on the sheet"},
	link("after", "starts after the finish of these (R10 says which finish)"),
	startLink("after start of", "starts after the start of these"),
	link("finish after", "finishes after the finish of these"),
	startLink("finish after start of", "finishes after the start of these"),
	{name: "starts with", takes: names, example: "cut lugs", says: "starts at the same minute as these"},
	{name: "hours", takes: hourly, dim: quantity.Time, low: 0, high: longestTask, usual: "the estimate", example: "3 to 6 h", says: "hours with the people named; overrules the estimate; a bare number is hours"},
	{name: "man-hours", takes: hourly, dim: quantity.Time, low: 0, high: longestTask, usual: "the estimate", example: "6", without: "hours", says: "divided by the people; a bare number is hours"},
	{name: "people", takes: aCount, low: 0, high: 50, usual: "by kind", example: "2", says: "how many work on it"},
	{name: "who", takes: names, example: "[Ines, Tom]", without: "people", says: "named people, each of whom works on it"},
	{name: "needs", takes: itsOwn, form: "{ticket: how many}", shape: needsShape, usual: "by kind", example: "{weld 136 PF: 1, fitter: 1}", without: "people", says: "people by ticket; `Ines or Tom` is one of them, `anybody` needs no ticket, `fitter and painter` is one person with both"},
	{name: "kit", takes: itsOwn, form: "name, list of names, or {name: how many}", shape: kitShape, example: "{mig set: 1}", says: "what it uses"},
	{name: "standing", takes: aRange, dim: quantity.Time, low: 0, high: longestWait, example: "12 h", says: "clock time that the plan keeps: alone, or after the hands-on part"},
	{name: "why", takes: aText, example: "resin sets", beside: "standing: 12 h", says: "what the standing time is"},
	{name: "keeps", takes: itsOwn, form: "{ticket: how many}", shape: needsShape, example: "{fire watch: 1}", beside: "standing: 1 h", says: "people that the standing time keeps"},
	{name: "in one go", takes: yesNo, usual: "by kind (R6)", example: "yes", without: "may_stop", says: "no stop between its start and its finish"},
	{name: "may pause over meals", takes: yesNo, usual: "by kind (R6)", example: "yes", says: "though it goes in one go"},
	{name: "may stop", takes: keysOf, sub: &stopSection, example: "{not before: 90 min, least piece: 30 min}", says: "when it may be left and taken up again (R8)"},
	{name: "set-up", takes: anAmount, dim: quantity.Time, low: 0, high: aDay, usual: "the estimate", example: "30 min", says: "spent at every start (R8)"},
	{name: "may change hands", takes: yesNo, usual: "no", example: "yes", says: "two teams may take turns (R9)"},
	{name: "not before", takes: aMoment, example: "2027-04-07 08:00", says: "starts no earlier; local to its place"},
	{name: "must be done by", takes: aMoment, example: "2027-04-12 17:30", says: "a deadline (R18); local to its place"},
	{name: "chance", takes: anAmount, dim: quantity.Percent, low: 0.001, high: 1, usual: "it happens", example: "35 %", says: "a maybe (R16)"},
	{name: "group", takes: aText, example: "pin", beside: "chance: 40 %", says: "of the maybes of one group exactly one happens"},
	{name: "hot work", takes: yesNo, usual: "by kind", example: "yes", says: "it is hot work (R12, R13)"},
	{name: "noisy", takes: yesNo, usual: "by kind", example: "yes", says: "bound to the hours for noisy work"},
	{name: "fire watch", takes: anAmount, dim: quantity.Time, low: 0, high: 480, usual: "that of the place", example: "90 min", says: "watch after it (R13)"},
	{name: "alone", takes: yesNo, usual: "no", example: "yes", says: "its author says that it may be done alone (R14)"},
	{name: "needs light", takes: yesNo, usual: "no", example: "yes", says: "needs daylight"},
	{name: "may be covered", takes: yesNo, usual: "coats by their `immersion min`, others yes", example: "no", says: "by water before it is done, its standing time included (R26)"},
	{name: "states", takes: names, example: "[grit]", says: "states it puts its workface in, beyond those of its kind: " + list(stateNames, 20) + ", or others that `clashes` names"},
}}

func link(name, says string) key {
	return key{name: name, takes: itsOwn, form: linkForms, shape: linkShape, example: linkExample, says: says}
}

func startLink(name, says string) key {
	k := link(name, says)
	k.form, k.example = "name, list, or {name: {min, max}}", "{weld frame: {min: 30 min}}"
	return k
}

var stopSection = section{name: "Stop", where: "tasks / NAME / may stop", host: "tasks/rot found/may stop", says: "When a task may be left and taken up again.", keys: []key{
	{name: "not before", takes: itsOwn, form: "time, or `root and second run`", shape: anyText, usual: "the estimate: for welds root and second run", example: "90 min", says: "hands-on time before the first stop"},
	{name: "least piece", takes: anAmount, dim: quantity.Time, low: 0, high: aDay, usual: "the estimate", example: "30 min", says: "no piece is shorter"},
}}

func kindNames() []string {
	var out []string
	for _, k := range tasks.Kinds() {
		out = append(out, string(k))
	}
	return out
}

// draft is a task whose names are not resolved yet.
type draft struct {
	t     *tasks.Task
	links []linkDraft
	block *block
	base  string // name inside its block
	f     *fields
}

const maxTasks = 5000

func (r *reader) readTasks(f *fields) {
	list := f.pairs("tasks")
	if len(list) == 0 && f.has("tasks") {
		f.fault("tasks", "write for instance {fit frame: {kind: fit-up, at: shop, hours: 3 h}}", "there is no task")
	}
	if len(list) > maxTasks {
		f.fault("tasks", "make several jobs of it", "%d tasks, at most %d are taken", len(list), maxTasks)
		list = list[:maxTasks]
	}
	for _, kv := range list {
		if name, ok := r.taskName(kv[0]); ok {
			r.drafts = append(r.drafts, r.task(name, kv[0], kv[1]))
		}
	}
}

func (r *reader) taskName(n *yaml.Node) (string, bool) {
	name, ok := r.newName(n, "task", true)
	for _, word := range []string{"previous ", "every "} {
		if ok && len(name) > len(word) && name[:len(word)] == word {
			r.fault(n, "begin the name with another word", "task %s: %q stands before names in links", short(name), word[:len(word)-1])
			return name, false
		}
	}
	return name, ok
}

// task reads one task; its links are resolved later.
func (r *reader) task(name string, at, n *yaml.Node) *draft {
	what := fmt.Sprintf("task %q", name)
	kind := tasks.Plain
	if n.Kind == yaml.MappingNode {
		for i := 0; i+1 < len(n.Content); i += 2 {
			if k := tasks.Kind(n.Content[i+1].Value); n.Content[i].Value == "kind" && slices.Contains(tasks.Kinds(), k) {
				kind = k
				break
			}
		}
	}
	f := r.open(n, kindSection(kind), what)
	f.choice("kind", "plain")
	t := &tasks.Task{Name: name, Kind: kind, Pos: r.pos(at), Keys: f.keys(), Title: f.line("title"), Drawing: f.line("drawing"), Note: f.line("note")}
	r.taskPlace(t, f)
	zone := r.home
	if t.Place != nil {
		zone = t.Place.Zone
	} else if r.site != nil {
		zone = r.site.Zone
	}
	t.Hours, t.ManHours, t.People = f.uncertain("hours"), f.uncertain("man-hours"), f.count("people", 0)
	t.Who = texts(r.people(f, "who"))
	t.Needs, t.Keeps = r.needs(f, "needs"), r.needs(f, "keeps")
	t.Kit = r.uses(f)
	t.Standing, t.Why = f.uncertain("standing"), f.line("why")
	t.InOneGo, t.OverMeals = f.yesOrNot("in one go"), f.yesOrNot("may pause over meals")
	if f.has("may stop") {
		g := r.open(f.node("may stop"), &stopSection, what+": may stop")
		t.SafeStop, t.LeastPiece = g.safePoint(), g.amount("least piece", 0)
	}
	t.SetUp, t.MayChangeHands = f.amount("set-up", 0), f.yes("may change hands")
	t.NotBefore, t.Deadline = f.moment("not before", zone), f.moment("must be done by", zone)
	t.Chance, t.Group = f.value("chance"), f.line("group")
	t.HotWork, t.Noisy, t.FireWatch = f.yesOrNot("hot work"), f.yesOrNot("noisy"), f.amount("fire watch", 0)
	if b := f.yesOrNot("alone"); b != nil {
		lone := !*b
		t.Lone = &lone
	}
	t.Light = f.yes("needs light")
	t.States = texts(f.names("states"))
	t.Covered = f.yesOrNot("may be covered")
	r.byKind(t, f)
	r.liftingOf(t, f)
	d := &draft{t: t, f: f, links: r.linkDrafts(f)}
	r.taskMakesSense(t, f)
	return d
}

// taskMakesSense checks what the common keys need of each other.
func (r *reader) taskMakesSense(t *tasks.Task, f *fields) {
	switch {
	case f.has("hours") && f.has("man-hours"):
		f.fault("man-hours", "keep one of the two", "hours are given as well")
	case f.has("who") && f.has("people") && t.People < len(t.Who):
		f.fault("people", fmt.Sprintf("write people: %d, or leave it out", len(t.Who)), "%d people, but %d are named under who", t.People, len(t.Who))
	case f.has("needs") && f.has("people") && t.People < needed(t.Needs):
		f.fault("people", fmt.Sprintf("write people: %d, or leave it out", needed(t.Needs)), "%d people, but it needs %d by their tickets", t.People, needed(t.Needs))
	}
	if f.has("why") && !f.has("standing") {
		f.fault("why", "add `standing: 12 h`", "there is no standing time")
	}
	if f.has("keeps") && !f.has("standing") {
		f.fault("keeps", "add `standing: 1 h`", "there is no standing time")
	}
	if f.has("group") && !f.tried("chance") {
		f.fault("group", "add `chance: 50 %`", "only maybes are in a group")
	}
	if f.has("may pause over meals") && t.InOneGo != nil && !*t.InOneGo {
		f.fault("may pause over meals", "leave it out", "what does not go in one go pauses anyway")
	}
	if f.has("may stop") && t.InOneGo != nil && *t.InOneGo {
		f.fault("may stop", "keep one of the two", "it goes in one go")
	}
	if t.Light && t.Place != nil && !t.Place.HasAt {
		f.fault("needs light", fmt.Sprintf("add `at: [57.6 N, 7.2 W]` to place %s", t.Place.Name), "daylight needs the position of the place")
	}
	if f.has("may be covered") && (t.Face == nil || !t.Face.Floods() && !(t.Place != nil && r.tideTried[t.Place])) && t.Place != nil {
		f.fault("may be covered", "leave it out, or give the workface a `level`", "no water comes there")
	} else if t.Covered != nil && !*t.Covered && f.has("standing") && !f.tried("hours") && !f.tried("man-hours") && t.Kind == tasks.Plain {
		f.fault("may be covered", "put it on the task that the standing time follows, with this as its `standing`", "standing time alone cannot choose its tide")
	}
	if t.Kind == tasks.Plain && !f.tried("hours") && !f.tried("man-hours") && !f.tried("standing") {
		f.fault("", "add `hours: 2 h`, `man-hours: 3` or `standing: 4 h`", "nothing says how long it takes")
	}
}

// taskPlace finds the place and workface of a task.
func (r *reader) taskPlace(t *tasks.Task, f *fields) {
	if ref, ok := f.name("at"); ok {
		t.Place, t.Face = r.where(ref, f.lead("at"))
	}
}
