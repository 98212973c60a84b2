package main

import (
	"io"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"sailby/report/text"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

type slingOptions struct {
	amounts   map[string]*string
	words     map[string]*string
	legs      int
	equalised bool
	json      bool
	way       wayFlags
}

func newSling(st streams) *cobra.Command {
	o := &slingOptions{amounts: map[string]*string{}, words: map[string]*string{}}
	c := &cobra.Command{
		Use:   "sling --mass MASS",
		Short: "One lift: hands, trolley, slings, hoist and anchor, crane, two hooks, wind; every step with its origin",
		Long: "Works out one lift from flags: the load with its allowances, the pull in each leg of the slings against their rating,\n" +
			"and, where they are given, the hoist and what it hangs from, the crane by its chart, the gust and the landing place;\n" +
			"or a lift by hands (HSE guideline figures, the NIOSH equation on request), on a trolley, on jacks, or on two hooks.\n" +
			"An angle is given with its datum. What is refused names the number that fails and the nearest gear that would do; then\n" +
			"the exit status is 3. It does not stand for the decision of a competent person. Slings are known by their tag, or by\n" +
			strings.Join(lift.SlingTables(), ", ") + ".",
		Example: "  sailby sling --mass 410kg --legs 2 --angle \"40 deg from horizontal\" --span 1.8m --rated 1t\n" +
			"  sailby sling --mass 1.2t --known weighed --span 2m --cg 1.2m --hook-above 1.5m --table \"EN 818-4 grade 8\" --size 8mm --by crane --chart \"4m: 2.4t, 6m: 1.5t\" --radius 5m\n" +
			"  sailby sling --mass 30kg --known weighed --by hands --men 2 --through \"floor, knuckle to elbow\"\n" +
			"  sailby sling --mass 400kg --by trolley --men 2 --ramp \"1 in 12\"\n" +
			"  sailby sling --mass 1t --hoist 1t --second-hook 1t --span 3m --cg 1.2m --tilt 3deg --off 200mm",
		Args: takes(false),
		RunE: func(*cobra.Command, []string) error { return runSling(o, st) },
	}
	f := c.Flags()
	for _, a := range append(slices.Clone(slingAmounts), wayAmounts...) {
		o.amounts[a.name] = f.String(a.name, "", a.says)
	}
	for _, w := range append(slices.Clone(slingWords), wayWords...) {
		o.words[w[0]] = f.String(w[0], "", w[1])
	}
	f.IntVar(&o.legs, "legs", 0, "how many legs, 1 to 4")
	f.BoolVar(&o.equalised, "equalised", false, "four legs are made to share")
	o.way.add(f)
	f.BoolVar(&o.json, "json", false, "print for machines")
	return c
}

// slingTold is what is printed of one lift.
type slingTold struct {
	head, notes []string
	steps       []origin.Figure
	refused     bool
}

func runSling(o *slingOptions, st streams) error {
	in := slingInput{}
	if err := in.read(o); err != nil {
		return err
	}
	t, err := in.judge()
	if err != nil {
		return misuse(quantity.Hint(err), "%v", err)
	}
	err = st.print(func(w io.Writer) error {
		if o.json {
			return text.StepsJSON(w, t.head, t.steps, t.notes)
		}
		return text.Steps(w, t.head, t.steps, t.notes, text.Options{Width: st.width})
	})
	if err == nil && t.refused {
		return errNotShown
	}
	return err
}

// judge makes every check that the flags give the numbers for.
func (i *slingInput) judge() (slingTold, error) {
	hook := i.load.Hook()
	first := hook
	if (i.way.byHands || i.way.byTrolley) && !i.slung && !i.hung && !i.craned {
		first = i.load.Heavy()
	}
	t := slingTold{steps: append([]origin.Figure{first}, i.shapes...)}
	tell := func(r lift.Result, err error, within, over string) error {
		if err != nil {
			return err
		}
		line := r.Reason
		if r.OK {
			line = within + line
		} else {
			line, t.refused = over+line, true
		}
		t.head = append(t.head, line)
		for _, o := range r.Others {
			if o.OK {
				t.head = append(t.head, within+o.Reason)
			} else {
				t.head = append(t.head, over+o.Reason)
			}
		}
		if !r.OK && r.Nearest != "" {
			t.head = append(t.head, "would do: "+r.Nearest)
		}
		if r.Need > 0 { // no gust, for instance, is none that was given
			t.steps = append(t.steps, r.Figure)
		}
		t.steps = append(t.steps, r.Limit)
		for _, o := range r.Others {
			t.steps = append(t.steps, o.Figure, o.Limit)
		}
		t.notes = append(t.notes, r.Warnings...)
		return nil
	}
	add := func(r lift.Result, err error) error { return tell(r, err, "within: ", "REFUSED: ") }
	guide := func(r lift.Result, err error) error {
		return tell(r, err, "within the guideline: ", "OVER THE GUIDELINE: ")
	}
	if err := i.byPeopleAndPairs(&t, add, guide); err != nil {
		return t, err
	}
	if i.slung {
		r, err := lift.Slings(i.load, i.rig)
		if err := add(r.Result, err); err != nil {
			return t, err
		}
		if r.Rule != "" {
			t.head = append(t.head, "rated by: "+r.Rule)
		}
		for n, l := range r.Legs {
			t.head = append(t.head, legLine(n, l))
			t.steps = append(t.steps, origin.Worked("pull in leg "+string(rune('1'+n)), l.Tension, "kg", "share of the weight / cos(angle from the vertical)",
				origin.Worked("share of the weight", l.Share, "kg", "by statics over the lugs, or evenly over the legs that carry", hook),
				origin.Worked("angle from the vertical", l.Angle, "deg", "by the shape of the slings")))
		}
	}
	if i.hung {
		if err := add(lift.Hang(i.load, i.hoist)); err != nil {
			return t, err
		}
	}
	if i.craned {
		c := i.crane
		if i.hoist.Tackle > 0 {
			c.Deduct = []lift.Piece{{Name: "block, slings and shackles", Mass: i.hoist.Tackle}}
		}
		if err := add(lift.Crane(i.load, c)); err != nil {
			return t, err
		}
	}
	if i.air {
		r, err := lift.Gust(i.load, i.wind)
		if err := add(r.Result, err); err != nil {
			return t, err
		}
	}
	if i.pads > 0 {
		if err := add(lift.Bearing(i.load, i.pads, i.floor)); err != nil {
			return t, err
		}
	}
	if len(t.head) == 0 {
		t.head = []string{"load on the hook: " + hook.Amount()}
		t.notes = append(t.notes, "nothing says what carries it: give the slings (--legs, --angle, --rated), the hoist (--hoist) or the crane (--chart, --radius)")
	}
	if i.given["span"] && !i.given["lugs-above"] && !i.way.two {
		t.notes = append(t.notes, "the lugs are taken to be above the centre of gravity: a load hung below it rolls over (--lugs-above)")
	}
	if i.way.byHands || i.way.byTrolley {
		t.notes = append(t.notes, "the figures are filters, no limits: over them look closer, or use gear")
	} else if clear, err := lift.Exclusion(i.crane.Raise, max(i.load.Length, i.load.Width, i.span)); err == nil {
		t.steps = append(t.steps, clear)
	}
	t.notes = append(t.notes, "planned, supervised and carried out as a competent person decides; nobody below the load")
	return t, nil
}
