package main

import (
	"fmt"
	"io"
	"math"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"sailby/report/text"
	"sailby/tasks/coat"
	"sailby/tasks/origin"
	"sailby/tasks/quantity"
)

// coatAmounts are the flags of sailby coat that take an amount, each with its limits' dimension.
var coatAmounts = []struct {
	name, says string
	dim        quantity.Dim
}{
	{"area", "steel to coat, both faces, for instance 12m2", quantity.Area},
	{"steel", "temperature of steel and paint (10 C)", quantity.Temperature},
	{"dft", "dry film of the coat, for instance 100um", quantity.Film},
	{"solids", "volume solids of the unthinned mix, for instance 65%", quantity.Percent},
	{"thinner", "share of the paint's volume, for instance 5%", quantity.Percent},
	{"loss", "own loss, share of the paint", quantity.Percent},
	{"stripe", "edges and welds to stripe by brush, for instance 12m", quantity.Length},
	{"leave-bare", "seams kept bare and taped, for instance 4m", quantity.Length},
	{"profile", "blast profile Rz that the coat fills, for instance 60um", quantity.Film},
	{"air", "air temperature, with --rh: may it go on?", quantity.Temperature},
	{"rh", "relative humidity, with --air", quantity.Percent},
	{"wind", "wind, with --air", quantity.Speed},
}

type coatOptions struct {
	amounts                                     map[string]*string
	method, surface, next, grade, state, prepBy string
	site, json                                  bool
}

func newCoat(st streams) *cobra.Command {
	o := &coatOptions{amounts: map[string]*string{}}
	c := &cobra.Command{
		Use:   "coat KIND",
		Short: "What one coat of paint takes, every step with its origin",
		Long: "Works out one coat: film, paint and tins, mixes, hands-on time, waits at the steel's temperature, recoat, what a\nmissed recoat costs, and with --air and --rh whether it may go on. KIND is one of " +
			strings.Join(coat.Kinds(), ", ") + ".\nThe paint is the usual one of its kind where no flag says otherwise, and is marked so; its own sheet comes first.",
		Example:           "  sailby coat \"two-pack epoxy\" --area 12m2 --method roller --steel 8C --stripe 20m --next polyurethane\n  sailby coat alkyd --area 4m2 --air 9C --rh 82% --wind 6m/s --steel 7C",
		Args:              takes(true, "KIND"),
		ValidArgsFunction: coatKinds,
		RunE:              func(_ *cobra.Command, args []string) error { return runCoat(o, st, args) },
	}
	f := c.Flags()
	for _, a := range coatAmounts {
		o.amounts[a.name] = f.String(a.name, "", a.says)
	}
	f.StringVar(&o.method, "method", coat.Brush, strings.Join(coat.Methods(), ", "))
	f.StringVar(&o.surface, "surface", coat.Sections, strings.Join(coat.Surfaces(), ", "))
	f.StringVar(&o.next, "next", "", "kind of the coat that follows (the same)")
	f.StringVar(&o.grade, "grade", "", "also the preparation to this grade, for instance \"Sa 2 1/2\"")
	f.StringVar(&o.state, "condition", "", "of the steel before preparation: new, light rust, heavy rust, painted")
	f.StringVar(&o.prepBy, "prepare-by", "", "way of preparation: blast, power tool, hand tool, needle gun, solvent wipe, wash")
	f.BoolVar(&o.site, "site", false, "out of doors, away from the shop")
	f.BoolVar(&o.json, "json", false, "print for machines")
	return c
}

func coatKinds(_ *cobra.Command, args []string, _ string) ([]string, cobra.ShellCompDirective) {
	if len(args) > 0 {
		return nil, cobra.ShellCompDirectiveNoFileComp
	}
	return coat.Kinds(), cobra.ShellCompDirectiveNoFileComp
}

// coatInput is what the flags say.
type coatInput struct {
	job           coat.Job
	next          coat.Paint
	air, rh, wind float64
	aired         bool
	bare          float64 // m2 left out
	given         map[string]bool
	prepare       *coat.Preparation
}

func runCoat(o *coatOptions, st streams, args []string) error {
	in, err := readCoat(o, strings.Join(args, " "))
	if err != nil {
		return err
	}
	a, err := coat.Apply(in.job)
	if err != nil {
		return coatError(err)
	}
	head, steps, notes := coatTold(a, in)
	return st.print(func(w io.Writer) error {
		if o.json {
			return text.StepsJSON(w, head, steps, notes)
		}
		return text.Steps(w, head, steps, notes, text.Options{Width: st.width})
	})
}

func coatError(err error) error { return misuse(quantity.Hint(err), "%s", err.Error()) }

// readCoat makes the coat that the flags describe.
func readCoat(o *coatOptions, kind string) (coatInput, error) {
	in := coatInput{given: map[string]bool{}}
	p, err := coatPaint(kind, "sailby coat %q")
	if err != nil {
		return in, err
	}
	v := map[string]float64{"steel": 10}
	for _, a := range coatAmounts {
		s := *o.amounts[a.name]
		if s == "" {
			continue
		}
		x, err := quantity.Parse(s, a.dim)
		if err != nil {
			return in, misuse(quantity.Hint(err), "--%s: %s", a.name, err.Error())
		}
		v[a.name], in.given[a.name] = x, true
	}
	given := func(flag string) origin.Origin { return origin.Origin{Kind: origin.Given, Source: "--" + flag} }
	for _, f := range []struct {
		flag, source string
		into         *float64
	}{{"dft", "dft", &p.DFT}, {"solids", "volume solids", &p.VolumeSolids}, {"thinner", "thinner", &p.Thinner}} {
		if in.given[f.flag] {
			*f.into, p.Sources[f.source] = v[f.flag], given(f.flag)
		}
	}
	in.next = p
	if o.next != "" {
		if in.next, err = coatPaint(o.next, "--next %q"); err != nil {
			return in, err
		}
	}
	if !in.given["area"] {
		return in, misuse("for instance --area 12m2", "--area: nothing says how much is coated")
	}
	if !(v["area"] > 0) {
		return in, misuse("give the steel to coat, both faces, for instance --area 12m2", "--area: %s m2 is no area to coat", origin.Trim(v["area"]))
	}
	in.bare = v["leave-bare"] / 1000 * 0.1
	if in.bare >= v["area"] {
		return in, misuse("give the seams in the area alone", "--leave-bare: strips of 50 mm to each side are %s m2, the area is %s m2", origin.Trim(in.bare), origin.Trim(v["area"]))
	}
	in.job = coat.Job{Paint: p, Area: v["area"] - in.bare, Method: o.method, Surface: o.surface, Celsius: v["steel"], Site: o.site,
		Stripe: v["stripe"] / 1000, Mask: 2 * v["leave-bare"] / 1000, Profile: v["profile"], Loss: v["loss"], NoLoss: in.given["loss"] && v["loss"] == 0}
	if in.given["air"] != in.given["rh"] {
		return in, misuse("for instance --air 9C --rh 82%", "--air and --rh go together")
	}
	switch {
	case in.given["wind"] && !in.given["air"]:
		return in, misuse("for instance --air 9C --rh 82% --wind 6m/s", "--wind: it is judged together with --air and --rh")
	case in.given["wind"] && !(v["wind"] >= 0 && v["wind"] < 200):
		return in, misuse("from 0 to 200 m/s", "--wind: %s m/s is no wind", origin.Trim(v["wind"]))
	case in.given["rh"] && !(v["rh"] > 0 && v["rh"] <= 1):
		return in, misuse("above 0 % and at most 100 %", "--rh: %s %% is no humidity", origin.Trim(v["rh"]*100))
	case in.given["air"] && math.IsNaN(coat.DewPoint(v["air"], v["rh"])):
		return in, misuse("from -45 C to 60 C", "--air: %s C is outside what the formula of the dew point holds for", origin.Trim(v["air"]))
	case in.given["air"] && math.IsNaN(coat.SteelHumidity(v["air"], v["rh"], v["steel"])):
		return in, misuse("from -45 C to 120 C", "--steel: %s C is outside what the humidity at the steel can be worked out for", origin.Trim(v["steel"]))
	}
	in.air, in.rh, in.wind, in.aired = v["air"], v["rh"], v["wind"], in.given["air"]
	if o.grade != "" || o.prepBy != "" {
		prep, err := coat.Prepare(coat.Prep{Area: v["area"], Grade: o.grade, Method: o.prepBy, State: o.state, Surface: o.surface, Site: o.site})
		if err != nil {
			return in, coatError(err)
		}
		in.prepare = &prep
	}
	return in, nil
}

// coatPaint gives the usual paint of a kind.
func coatPaint(kind, way string) (coat.Paint, error) {
	p, ok := coat.Defaults(kind)
	if !ok {
		hint := "one of: " + strings.Join(coat.Kinds(), ", ")
		if n := nearest(kind, coat.Kinds()); n != "" {
			hint = fmt.Sprintf(way, n)
		}
		return p, misuse(hint, "there is no paint of the kind %q", kind)
	}
	p.Name = p.Kind
	return p, nil
}

// coatTold gives what is printed: lines that sum it up, the steps, and what to mind.
func coatTold(a coat.Application, in coatInput) (head []string, steps []origin.Figure, notes []string) {
	j, p := in.job, in.job.Paint
	head = []string{
		fmt.Sprintf("%s by %s, %s m2 at %s C", p.Kind, j.Method, origin.Trim(j.Area), origin.Trim(j.Celsius)),
		fmt.Sprintf("Hands-on time %s; %s L of paint; wet film %s um", span(float64(a.Minutes)), origin.Trim(roundTo(a.Litres, 0.01)), origin.Trim(math.Round(a.Wet))),
	}
	if c := j.Celsius; c < p.ApplyMin {
		head = append(head, fmt.Sprintf("It may not go on at %s C, and does not cure: its least is %s C", origin.Trim(c), origin.Trim(p.ApplyMin)))
	} else if c > p.ApplyMax {
		head = append(head, fmt.Sprintf("It may not go on at %s C: its greatest is %s C", origin.Trim(c), origin.Trim(p.ApplyMax)))
	}
	if a.Batches > 0 {
		head = append(head, fmt.Sprintf("%d %s of %s L, used within %s of mixing; %s L base and %s L hardener in all; stands %s first", a.Batches, mixWord(a.Batches),
			origin.Trim(roundTo(a.BatchLitres, 0.01)), span(math.Floor(float64(a.UseWithin)+1e-9)), origin.Trim(roundTo(a.Base, 0.01)), origin.Trim(roundTo(a.Hardener, 0.01)), span(float64(a.Induction))))
	}
	if len(a.Tins) > 0 {
		var tins []string
		for _, t := range a.Tins {
			tins = append(tins, fmt.Sprintf("%d of %s L", t.Count, origin.Trim(t.Size)))
		}
		head = append(head, "Tins to open: "+strings.Join(tins, ", "))
	}
	head = append(head, fmt.Sprintf("Thinner: %s L into the paint, %s L to clean the tools", origin.Trim(roundTo(a.Thinner, 0.01)), origin.Trim(roundTo(a.Cleaner, 0.01))))
	if in.prepare != nil {
		head = append(head, fmt.Sprintf("Preparation to %s by %s: hands-on time %s", in.prepare.Grade, in.prepare.Method, span(float64(in.prepare.Minutes))))
		in.prepare.Hours.Name = "preparation"
		steps = append(steps, in.prepare.Hours, in.prepare.Kilos, in.prepare.Wait)
		notes = append(notes, in.prepare.Warnings...)
	}
	if in.bare > 0 {
		steps = append(steps, origin.Worked("area left bare", in.bare, "m2", "seams x 50 mm to each side"))
	}
	a.Hours.Name = "hands-on time"
	steps = append(steps, a.Volume, origin.Worked("wet film", a.Wet, "um", "dft (1 + thinner) / volume solids"),
		origin.Worked("theoretical spreading rate", a.Spreading, "m2/L", "1000 volume solids / dft"), a.Hours)
	if a.Stripe != nil {
		steps = append(steps, a.Stripe.Hours)
		if a.Stripe.Wait > 0 {
			head = append(head, "Stripe coat first: "+span(float64(a.Stripe.Minutes))+", then "+span(float64(a.Stripe.Wait))+" until it is touch dry")
		}
	}
	told, said := coatWaits(in)
	steps, notes = append(steps, told...), append(notes, said...)
	if in.aired {
		h, s, n := coatAir(in)
		head, steps, notes = append(head, h), append(steps, s...), append(notes, n...)
	}
	steps = slices.DeleteFunc(steps, func(f origin.Figure) bool { return f.Name == "" })
	return head, append(steps, p.Limits(j.Method)...), append(a.Warnings, notes...)
}

func mixWord(n int) string {
	if n == 1 {
		return "mix"
	}
	return "mixes"
}

// coatWaits gives the times of the film, the window of the next coat and its rescue.
func coatWaits(in coatInput) (steps []origin.Figure, notes []string) {
	p, c := in.job.Paint, in.job.Celsius
	for _, state := range coat.States() {
		if _, ok := p.State(state); !ok {
			continue
		}
		if _, f, err := p.Wait(state, c); err != nil {
			notes = append(notes, state+": "+err.Error())
		} else {
			f.Name = "time to " + state
			steps = append(steps, f)
		}
	}
	least, most, err := p.Window(in.next, c)
	if err != nil {
		return steps, append(notes, "next coat: "+err.Error())
	}
	least.Name, most.Name = "least wait to "+in.next.Kind, "longest wait to "+in.next.Kind
	steps = append(steps, least, most)
	if most.Value > 0 {
		if r, err := coat.Missed(in.job); err == nil {
			f := r.Hours
			f.Name = "missed: " + r.Name
			steps, notes = append(steps, f), append(notes, "a missed longest wait costs "+r.Name+": "+r.Words)
		}
	}
	return steps, notes
}

// coatAir says whether the coat may go on in the air of the moment.
func coatAir(in coatInput) (head string, steps []origin.Figure, notes []string) {
	p, c := in.job.Paint, in.job.Celsius
	dew := coat.DewPoint(in.air, in.rh)
	from := []origin.Figure{origin.Written("air", in.air, "C", origin.Origin{Kind: origin.Given, Source: "--air"}),
		origin.Written("humidity", in.rh*100, "%", origin.Origin{Kind: origin.Given, Source: "--rh"})}
	steps = []origin.Figure{
		origin.Worked("dew point", dew, "C", "Magnus, coefficients of the World Meteorological Organization", from...),
		origin.Worked("steel above the dew point", c-dew, "K", "steel - dew point"),
		origin.Worked("humidity at the steel", coat.SteelHumidity(in.air, in.rh, c)*100, "%", "vapour of the air over saturation at the steel"),
	}
	ok, reasons := coat.MayApply(p, in.air, c, in.rh, in.wind, in.job.Method)
	if ok {
		return "In this air it may go on", steps, nil
	}
	return "In this air it may not go on: " + strings.Join(reasons, "; "), steps, nil
}
