package expand

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"sailby/tasks"
	"sailby/tasks/coat"
	"sailby/tasks/hours"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// strip is the width of bare steel, mm, kept to each side of a seam that is still to be welded
// (common practice: 50 mm).
const strip = 50.0

// coatJob gives coat number k of a task to reckon with.
func (x *expander) coatJob(t *tasks.Task, p *tasks.Paint, k int, area float64) coat.Job {
	j := coat.Job{Paint: p.Paint, Area: area, Method: coatMethod(t), Surface: t.Shape, Celsius: x.mixTemperature(t), Site: x.atSite(t),
		Mask: 2 * t.Bare.Value / 1000}
	if k == 0 {
		j.Profile = t.Profile.Value
	}
	return j
}

func coatMethod(t *tasks.Task) string {
	if t.Method == "" {
		return coat.Brush
	}
	return t.Method
}

// mixTemperature gives the temperature of mixed paint, by which it goes off: that of the warm day's hottest
// air while the task may run, else of the place's steel.
func (x *expander) mixTemperature(t *tasks.Task) float64 {
	s := t.Place.WarmHourly(t.Face)
	if s == nil {
		return x.steel(t.Place)
	}
	from, to := x.w.Span.From, x.w.Window.Closes
	if x.atSite(t) {
		from = x.w.Window.Opens
	}
	hot := math.Inf(-1)
	for m := from; m < to; m += 60 {
		if w, ok := s.At(int64(m)); ok {
			hot = math.Max(hot, w.Air)
		}
	}
	if math.IsInf(hot, -1) {
		return x.steel(t.Place)
	}
	return hot
}

// steelWords says what steel a film cures on.
func (x *expander) steelWords(t *tasks.Task) string {
	if t.Place.Hourly(t.Face) != nil {
		return "the steel of the hour"
	}
	return temperature(x.steel(t.Place))
}

// bared takes the strips that stay bare off the area of a surface, m2; an area that the file gives is what is
// painted.
func bared(t *tasks.Task, area origin.Figure) (origin.Figure, error) {
	if !t.Bare.Pos.Given() || t.Area.Pos.Given() {
		return area, nil
	}
	off := t.Bare.Value / 1000 * 2 * strip / 1000
	left := area.Value - off
	if left <= 0 {
		return area, fmt.Errorf("the strips left bare, %s m2, are more than its surface of %s m2", origin.Trim(off), origin.Trim(area.Value))
	}
	return origin.Worked("area", left, "m2", "surface less strips of 50 mm to each side of the seams left bare", area,
		origin.Written("seams left bare", t.Bare.Value/1000, "m", t.Bare.Pos.Origin("leave bare"))), nil
}

// patch gives the area of the strips along seams that were left bare.
func patch(t *tasks.Task) origin.Figure {
	return origin.Worked("area", t.Patch.Value/1000*2*strip/1000, "m2", "seams x 50 mm to each side",
		origin.Written("seams", t.Patch.Value/1000, "m", t.Patch.Pos.Origin("patch")),
		origin.Figure{Name: "strip to each side", Value: strip, Unit: "mm", Origin: origin.Origin{Kind: origin.Practice, Source: "kept bare for welding"}})
}

// mixed writes what a coat takes beside its hours: film to measure, mixes, tins.
func mixed(h *hands, p *tasks.Paint, a coat.Application, temperatureOf float64) {
	h.est.Facts = append(h.est.Facts, origin.Worked("wet film", math.Round(a.Wet), "um", "dft (1 + thinner) / volume solids",
		origin.Worked("dft", p.DFT, "um", "one coat"), origin.Worked("volume solids", p.VolumeSolids*100, "%", "unthinned mix")))
	if a.Batches > 0 {
		if pot, fig, err := p.Pot(temperatureOf); err == nil {
			fig.Value = math.Floor(pot)
			h.est.Facts = append(h.est.Facts, fig)
		}
		note := fmt.Sprintf("%d mixes of %s", a.Batches, measured(a.BatchLitres))
		if a.Batches == 1 {
			note = "one mix of " + measured(a.BatchLitres)
		}
		note += fmt.Sprintf(", each used within %s of mixing at %s", quantity.Hours(int(a.UseWithin)), temperature(math.Round(temperatureOf*10)/10))
		if a.Hardener > 0 {
			note += fmt.Sprintf("; in all %s base, %s hardener", measured(a.Base), measured(a.Hardener))
		}
		if a.Induction > 0 {
			note += fmt.Sprintf("; stands %s before use", quantity.Hours(int(a.Induction)))
		}
		h.est.Notes = append(h.est.Notes, note)
	}
}

// stands adds the time that the first mix must stand before it is used, waited out at the work; later mixes stand
// while the one before is used.
func (h *hands) stands(p *tasks.Paint, induction quantity.Clock) {
	if !p.TwoPack() || induction <= 0 {
		return
	}
	wait := float64(induction)
	h.minutes = quantity.Range{Low: h.minutes.Low + wait, Likely: h.minutes.Likely + wait, High: h.minutes.High + wait}
	h.est.Figure = origin.Worked("hands-on time", h.minutes.Likely, "min", "work + standing of the first mix, waited out at the work", h.est.Figure,
		origin.Figure{Name: "induction", Value: wait, Unit: "min", Origin: p.From("induction")})
}

// tins says for every coat what tins all coats of its paint open: what is left of base and hardener in a tin is closed
// and kept for the next, so that they are picked for the sum, and not coat by coat.
func (x *expander) tins() {
	for _, p := range x.w.Job.Paints {
		sum, coats := 0.0, []*Step{}
		for _, s := range x.w.Steps {
			if s.Paint != p || s.Absent {
				continue
			}
			for _, c := range s.Estimate.Consumables {
				if c.What == "paint "+p.Name {
					sum += c.Amount
					coats = append(coats, s)
				}
			}
		}
		tins, err := coat.Tins(sum, p.PackSizes)
		if err != nil || len(tins) == 0 {
			continue
		}
		var words []string
		for _, t := range tins {
			words = append(words, fmt.Sprintf("%d of %s L", t.Count, origin.Trim(t.Size)))
		}
		note := "open " + strings.Join(words, " and ") + " of " + p.Name
		if len(coats) > 1 {
			note += fmt.Sprintf(" for all %d coats of it, %s L in all", len(coats), origin.Trim(math.Ceil(sum*100)/100))
		}
		if len(coats) > 1 && p.TwoPack() {
			note += "; a part-used tin of base or hardener is closed and kept, a mix is not"
		} else if len(coats) > 1 {
			note += "; a part-used tin is closed and kept"
		}
		for _, s := range coats {
			s.Estimate.Notes = append(s.Estimate.Notes, note)
		}
	}
}

// measured writes litres as somebody with a jug reads them: below one litre in millilitres.
func measured(litres float64) string {
	if ml := math.Round(litres * 1000); ml < 1000 {
		return fmt.Sprintf("%.0f ml", ml)
	}
	return fmt.Sprintf("%.2f L", litres)
}

// stripe makes the stripe coat of a task: a step of its own before the first full coat; nil
// without one.
func (x *expander) stripe(t *tasks.Task, p *tasks.Paint) *Step {
	if !t.Stripe.Pos.Given() || t.Stripe.Value <= 0 {
		return nil
	}
	j := x.coatJob(t, p, 0, 1)
	j.Stripe = t.Stripe.Value / 1000
	h := hands{people: max(1, t.People, x.crewSize(t))}
	a, err := coat.Apply(j)
	if err != nil {
		h.fault, h.hint = err, "complete the paint, or leave the stripe out"
	} else {
		h.share(spread(float64(a.Stripe.Minutes)), a.Stripe.Hours, h.people, t)
		h.stands(p, a.Induction)
		h.est.Range = [3]int{whole(h.minutes.Low), whole(h.minutes.Likely), whole(h.minutes.High)}
		h.est.Consumables = append(h.est.Consumables, Consumable{What: "paint " + p.Name, Amount: a.Stripe.Litres, Unit: "L", Spare: a.Stripe.Litres * 0.1})
		h.est.Notes = []string{"by brush: edges, welds, bolts, 25 mm to each side"}
	}
	s := x.handsStep(t, "stripe", h)
	s.Paint = p
	x.filmStates(t, s, p)
	return s
}

// afterStripe lets the full coat wait until the stripe is touch dry.
func (x *expander) afterStripe(striped, full *Step, p *tasks.Paint) {
	if striped == nil || striped.HandsOn == 0 {
		return
	}
	curve, ok := p.State("touch dry")
	if !ok {
		x.fault(striped.Task.Pos, "add touch dry: {10 C: 6 h, 20 C: 3 h} to the paint", "task %q: paint %q does not say when a stripe is touch dry", striped.Task.Name, p.Name)
		return
	}
	s := x.dry(striped.Task, striped, "stripe touch dry", curve, p)
	x.swapLast(striped.Task, s, full)
	x.w.Links = append(x.w.Links, Link{From: s, To: full, Max: NoMax, Pos: striped.Task.Stripe.Pos, ToEnd: tasks.Start, Why: "stripe of " + p.Name})
}

// firstCoat gives the first full coat of a coat task, its first step where there is none.
func (x *expander) firstCoat(t *tasks.Task) *Step {
	for _, s := range x.first[t] {
		if s.Class == Hands && s.Name == "coat 1" {
			return s
		}
	}
	return x.first[t][0]
}

// rescue says what a missed longest wait after a coat costs; "" where that cannot be said. It is noted
// on the coat.
func (x *expander) rescue(a *Step) string {
	if a.Paint == nil || a.Absent {
		return ""
	}
	area, err := x.area(a.Task)
	if err != nil {
		area.Value = 1
	}
	r, fault := coat.Missed(x.coatJob(a.Task, a.Paint, 1, area.Value))
	if fault != nil {
		return ""
	}
	note := "if the longest wait to the next coat is missed: " + r.Name
	if err == nil {
		note += ", " + quantity.Hours(whole(float64(r.Minutes))) + " of one person"
	}
	if r.Wait > 0 {
		note += ", then about " + quantity.Hours(int(r.Wait))
	}
	note += ": " + r.Words
	if !slices.Contains(a.Estimate.Notes, note) {
		a.Estimate.Notes = append(a.Estimate.Notes, note)
	}
	return r.Name
}

// preparation gives how a prep task is done; ok is false where that is at fault, which is
// reported elsewhere.
func (x *expander) preparation(t *tasks.Task) (coat.Preparation, bool) {
	grade := t.Grade
	if grade == "" {
		grade = usualGrade(t.Method)
	}
	p, err := coat.Prepare(coat.Prep{Area: 1, Grade: grade, Method: t.Method, State: t.Condition, Surface: t.Shape, Site: x.atSite(t)})
	return p, err == nil
}

// dryOff adds the drying after a wash or a wipe.
func (x *expander) dryOff(t *tasks.Task, main *Step) {
	p, ok := x.preparation(t)
	if !ok || p.Dry <= 0 || main.HandsOn == 0 {
		return
	}
	minutes := whole(float64(p.Dry))
	s := x.clock(t, "drying", minutes, origin.House("drying", float64(minutes), "min", "until the surface is dry again"))
	x.tie(main, s, "drying after "+p.Method)
}

// holds adds the longest waits from preparation to the first coat (R25).
func (x *expander) holds() {
	for _, t := range x.w.Job.Tasks {
		if t.Kind == tasks.Coat && !x.absent[t] && len(x.first[t]) > 0 {
			x.heldBy(t, t, map[*tasks.Task]bool{})
		}
	}
}

// heldBy looks for the preparations that the coat waits for, through washing, wiping, tests and sign-offs.
func (x *expander) heldBy(t, at *tasks.Task, seen map[*tasks.Task]bool) {
	for _, l := range at.Links {
		f := x.byName[l.Task]
		if f != nil && (f.Kind == tasks.Test || f.Kind == tasks.SignOff) && !x.absent[f] && !seen[f] && l.From != tasks.Start {
			seen[f] = true // a look at the steel in between changes nothing
			x.heldBy(t, f, seen)
			continue
		}
		if f == nil || f.Kind != tasks.Prep || x.absent[f] || seen[f] || l.From == tasks.Start || l.Max != nil || !sameSurface(f, t) {
			continue
		}
		seen[f] = true
		p, ok := x.preparation(f)
		if !ok {
			continue
		}
		if p.MaxWait <= 0 && !f.HoldsFor.Pos.Given() {
			x.heldBy(t, f, seen)
			continue
		}
		most := int(p.MaxWait)
		if f.HoldsFor.Pos.Given() {
			most = int(f.HoldsFor.Value)
		}
		x.notLeft(f, most)
		out := Link{From: x.lastHands(f), To: x.first[t][0], ToEnd: tasks.Start, Min: NoMin, Max: most, Pos: f.Pos,
			Why: f.Label() + " holds for " + quantity.Hours(most)}
		if bad := x.spoils(f); bad != nil {
			wait := hours.Minute(most)
			out.Max, out.MaxCure = NoMax, &MaxCure{Last: func(m hours.Minute) hours.Minute { return min(m+wait, max(m, bad(m))) }}
			out.Why += ", in dry air"
		}
		x.w.Links = append(x.w.Links, out)
	}
}

// notLeft keeps a preparation that takes no longer than it holds from being left half done: it goes in
// one go, meals apart. What takes longer is gone over again, which is said.
func (x *expander) notLeft(f *tasks.Task, most int) {
	s := x.lastHands(f)
	switch {
	case f.InOneGo != nil:
	case s.Working+s.SetUp <= most:
		s.InOneGo, s.OverMeals = true, true
	default:
		note := "takes longer than it holds (" + quantity.Hours(most) + "): after a stop go over again what was done before it, or divide the task"
		if !slices.Contains(s.Estimate.Notes, note) {
			s.Estimate.Notes = append(s.Estimate.Notes, note)
		}
	}
}

// sameSurface says whether a preparation may be that of a coat: their surfaces meet, or one does not say.
func sameSurface(f, t *tasks.Task) bool {
	return len(f.Surface) == 0 || len(t.Surface) == 0 || meet(f.Surface, t.Surface)
}

// meet says whether a part of one list is, or belongs to, one of the other.
func meet(a, b []string) bool {
	for _, p := range a {
		for _, q := range b {
			if p == q || asm(p) == asm(q) && (p == asm(p) || q == asm(q)) {
				return true
			}
		}
	}
	return false
}

// spoils gives the first minute from m on in which prepared steel does not keep its grade; nil where
// no weather is known.
func (x *expander) spoils(f *tasks.Task) func(hours.Minute) hours.Minute {
	closed := x.w.damp(f, x.w.Span)
	if closed == nil {
		return nil
	}
	return func(m hours.Minute) hours.Minute {
		for _, s := range closed {
			if hours.Minute(s.To) > m {
				return max(m, hours.Minute(s.From))
			}
		}
		return hours.Far
	}
}
