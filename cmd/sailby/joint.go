package main

import (
	"errors"
	"fmt"
	"io"
	"math"
	"strings"

	"github.com/spf13/cobra"

	"sailby/report/agenda"
	"sailby/report/text"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
	"sailby/weld"
)

type jointOptions struct {
	amounts map[string]*string
	yes     map[string]*bool
	words   map[string]*string
	json    bool
}

func newJoint(st streams) *cobra.Command {
	o := &jointOptions{amounts: map[string]*string{}, yes: map[string]*bool{}, words: map[string]*string{}}
	c := &cobra.Command{
		Use:   "joint TYPE",
		Short: "What one welded joint takes, every step with its origin",
		Long: "Works out one joint: metal, runs, arc time, hands-on time, heat, preheat and waits, power, what to take along.\nTYPE is one of " +
			strings.Join(weld.JointTypes(), ", ") + ".\nAmounts carry their units; what is left out has the usual value, and is marked so.",
		Example: "  sailby joint fillet --leg 6mm --length 2.4m --position PF --process 136 --wire 1.2mm --current 210A --site\n" +
			"  sailby joint \"single V\" --thickness 20mm --length 4m --position PF --to-standard \"EN 1090-2\"",
		Args:              takes(true, "TYPE"),
		ValidArgsFunction: jointNames,
		RunE:              func(_ *cobra.Command, args []string) error { return runJoint(o, st, args) },
	}
	f := c.Flags()
	for _, a := range jointAmounts {
		o.amounts[a.name] = f.String(a.name, "", a.says)
	}
	for _, y := range jointYes {
		o.yes[y[0]] = f.Bool(y[0], false, y[1])
	}
	for _, w := range jointWords {
		o.words[w[0]] = f.String(w[0], "", w[1])
	}
	f.BoolVar(&o.json, "json", false, "print for machines")
	return c
}

func jointNames(_ *cobra.Command, args []string, _ string) ([]string, cobra.ShellCompDirective) {
	if len(args) > 0 {
		return nil, cobra.ShellCompDirectiveNoFileComp
	}
	return weld.JointTypes(), cobra.ShellCompDirectiveNoFileComp
}

func runJoint(o *jointOptions, st streams, args []string) error {
	word := strings.Join(args, " ")
	in := jointInput{proc: weld.Procedure{Origins: map[string]origin.Origin{}}}
	in.c.Origins = map[string]origin.Origin{}
	in.c.Rates.Origins = map[string]origin.Origin{}
	var ok bool
	if in.seam.Joint.Type, ok = weld.ParseJointType(word); !ok {
		hint := "one of: " + strings.Join(weld.JointTypes(), ", ")
		if n := nearest(word, weld.JointTypes()); n != "" {
			hint = fmt.Sprintf("sailby joint %q", n)
		}
		return misuse(hint, "there is no joint %q", word)
	}
	if err := in.read(o); err != nil {
		return err
	}
	in.seam.Procedure = &in.proc
	e, err := weld.Work([]weld.Seam{in.seam}, in.c)
	if err != nil {
		return jointError(err)
	}
	head, steps, notes := jointTold(e, in)
	return st.print(func(w io.Writer) error {
		if o.json {
			return text.StepsJSON(w, head, steps, notes)
		}
		return text.Steps(w, head, steps, notes, text.Options{Width: st.width})
	})
}

// jointError turns an error of the reckoning into one of the command line: the field is a flag.
func jointError(err error) error {
	var we *weld.Error
	if !errors.As(err, &we) {
		return err
	}
	name := strings.ReplaceAll(we.Field, " ", "-")
	for _, a := range jointAmounts {
		if a.field == we.Field || a.field == "" && a.name == name {
			return misuse(we.Hint, "--%s: %s", a.name, we.Problem)
		}
	}
	return misuse(we.Hint, "%s", we.Problem)
}

// jointTold gives what is printed: lines that sum it up, the steps, and what to mind.
func jointTold(e weld.Estimate, in jointInput) (head []string, steps []origin.Figure, notes []string) {
	s := e.Seams[0]
	metres := s.Length * float64(s.Section.Sides) / 1000
	head = []string{
		fmt.Sprintf("%s, %s", s.Title, welded(in.seam.Joint, metres)),
		fmt.Sprintf("%s kg of metal in %d %s; arc time %s; hands-on time %s, and %s of set-up at every start",
			origin.Trim(e.Metal), e.Passes, plural("run", e.Passes), span(float64(e.Arc)), span(float64(e.HandsOn)), span(float64(e.SetUp)+float64(e.Soak))),
	}
	air := in.c.Ambient
	if air == 0 {
		air = 20
	}
	if e.Why.Preheat.Value > air {
		head = append(head, fmt.Sprintf("Preheat to %s C or more", origin.Trim(math.Ceil(e.Why.Preheat.Value-1e-6))))
	}
	var waits []string
	if e.Cooling > 0 {
		waits = append(waits, span(float64(e.Cooling))+" of cooling")
	}
	if e.BeforeNDT > 0 {
		waits = append(waits, span(float64(e.BeforeNDT))+" before final testing")
	}
	if len(waits) > 0 {
		head = append(head, "Standing time: "+strings.Join(waits, ", "))
	}
	head = append(head, fmt.Sprintf("Draws %s kVA; a generator for the set gives %s kVA or more", origin.Trim(roundTo(e.Power, 0.1)), origin.Trim(roundTo(e.Why.Generator.Value, 0.1))))
	var take []string
	for _, n := range e.Consumables {
		w := fmt.Sprintf("%s: %s %s", n.Name, amount(n.Amount+n.Spare), n.Unit)
		if n.Pieces > 0 {
			w += " (" + agenda.Packs(n.Pieces, n.Packed) + ")"
		}
		take = append(take, w)
	}
	head = append(head, "Take along, spare included: "+strings.Join(take, "; "))

	perMetre := origin.Worked("weld metal a metre", e.Metal/math.Max(s.Length, 1e-9)*1000, "kg/m", "weld metal / length welded", e.Why.Metal,
		origin.Worked("length welded", s.Length/1000, "m", "length, of an intermittent weld its welded part"))
	steps = []origin.Figure{s.Section.Why,
		origin.Worked("width of the weld", s.Section.Width, "mm", "across the face"),
		origin.Worked("height of the weld", s.Section.Height, "mm", "throat of a fillet, thickness with caps of a butt")}
	for i, f := range e.Steps() {
		if f.Value != 0 || f.Text != "" { // nothing to wait for: nothing said
			steps = append(steps, f)
		}
		if i == 0 {
			steps = append(steps, perMetre)
		}
		if f.Name == e.Hours.Name {
			for _, r := range s.Runs {
				steps = append(steps, r.Arc, r.Welding)
			}
		}
	}
	face := 0.85
	if in.c.Site {
		face = 0.7
	}
	if day, err := weld.Day(in.seam, in.c, 10, face); err == nil {
		steps = append(steps, day)
		if in.c.Site && in.seam.Joint.Type == weld.Fillet {
			steps = append(steps, origin.Word("a ten-hour day on site", "5 to 8 m of 6 to 8 mm fillet a welder, all in", origin.Origin{Kind: origin.Practice, Source: "to hold the figure above against"}))
		}
	}
	r := e.Repair(in.c, in.seam.Access > 1)
	steps = append(steps, origin.House("chance of a repair", roundTo(r.Chance*100, 0.1), "%", "at least one repair of 150 mm, by the share of the length below"))
	if r.Hours.Name != "" {
		f := r.Hours
		f.Name = "hands-on time of a repair"
		steps = append(steps, f)
	}
	if in.c.Site {
		w := s.Process.Weather()
		if w.MaxWind > 0 {
			steps = append(steps, w.Why)
		}
		if air < coldAir {
			steps = append(steps, origin.Published("least air temperature", w.MinAir, "C", "AWS D1.1: no welding below 0 F, or on wet steel"))
		}
		notes = append(notes, w.Stops(0, in.c.Ambient, false)...)
	}
	return head, steps, append(e.Warnings, notes...)
}

const coldAir = 5.0 // C below which the least air temperature is worth a line

// welded says how much is welded: metres of seam, or how many plugs or slots.
func welded(j weld.Joint, metres float64) string {
	if n := max(1, j.Count); j.Type == weld.Plug || j.Type == weld.Slot {
		return fmt.Sprintf("%d %s", n, plural(j.Type.String(), n))
	}
	return origin.Trim(metres) + " m welded"
}

// amount rounds what is taken along to a tenth; a little is not nothing.
func amount(v float64) string { return origin.Trim(math.Max(roundTo(v, 0.1), 0.1)) }

func plural(word string, n int) string {
	if n == 1 {
		return word
	}
	return word + "s"
}

func span(minutes float64) string { return quantity.Hours(int(math.Ceil(minutes - 1e-6))) }

func roundTo(v, step float64) float64 { return math.Round(v/step) * step }
