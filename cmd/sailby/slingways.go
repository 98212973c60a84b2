package main

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"github.com/spf13/pflag"

	"sailby/tasks/lift"
	"sailby/tasks/quantity"
)

// slingWay is a lift by hands, on wheels, on jacks or on two hooks, as the flags give it.
type slingWay struct {
	hands        lift.Handling
	push         lift.Push
	niosh        []lift.NIOSHLift
	jacks        int
	jack         float64 // kg
	pair         lift.Pair
	turn         bool
	byHands      bool
	byTrolley    bool
	byJack       bool
	two          bool
	asksPeople   bool
	asksTrolley  bool
	asksOneHands bool
}

// wayAmounts are the flags of these ways that take an amount.
var wayAmounts = []slingAmount{
	{name: "per-hour", dim: quantity.Number, to: func(i *slingInput) *float64 { return &i.way.hands.PerHour }, says: "hands: lifts an hour (default: up to 30)"},
	{name: "twist", dim: quantity.Angle, to: func(i *slingInput) *float64 { return &i.way.hands.Twist }, says: "hands: of the body"},
	{name: "carry", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.way.hands.Carry }, says: "hands: without setting it down"},
	{name: "distance", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.way.push.Distance }, says: "trolley: pushed or pulled so far"},
	{name: "trolley-mass", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.way.push.Own }, says: "of the trolley itself"},
	{name: "trolley-rated", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.way.push.Rated }, says: "what the trolley may carry"},
	{name: "jack-rated", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.way.jack }, says: "of each jack; --span is from jack to jack, --cg from the first"},
	{name: "second-hook", dim: quantity.Mass, to: func(i *slingInput) *float64 { return &i.way.pair.RatedB }, says: "rating of a second hook on the same load; --hoist is that of the first, --span between them, --cg from the first"},
	{name: "tilt", dim: quantity.Angle, to: func(i *slingInput) *float64 { return &i.way.pair.Tilt }, says: "two hooks: how far it may go out of level"},
	{name: "off", dim: quantity.Length, to: func(i *slingInput) *float64 { return &i.way.pair.Offset }, says: "two hooks: centre of gravity square to the line of the hooks"},
}

// wayWords are the flags of these ways that take a word.
var wayWords = [][2]string{{"through", "hands: zones that they pass through, as \"floor, knuckle to elbow\" (default: floor to knuckle)"},
	{"niosh", "hands: the revised NIOSH equation where the lift begins, as \"out 400mm, up 200mm, travel 600mm, turn 45deg, per minute 1, hours 1, grip fair\""},
	{"niosh-end", "hands: the same where it ends, if control is needed there"}, {"ramp", "trolley: \"1 in 12\", a share as 0.083, or degrees"}}

// wayFlags are the flags of these ways that count or only stand there.
type wayFlags struct {
	men, women, jacks           int
	far, slope, uneven, turning bool
}

func (w *wayFlags) add(f *pflag.FlagSet) {
	f.IntVar(&w.men, "men", 0, "hands or trolley: men among those who lift or push (default: one)")
	f.IntVar(&w.women, "women", 0, "hands or trolley: women among them")
	f.IntVar(&w.jacks, "jacks", 0, "how many jacks (default: 4)")
	f.BoolVar(&w.far, "far", false, "hands: at arm's length, not close to the body")
	f.BoolVar(&w.slope, "slope", false, "hands: on steps or a slope")
	f.BoolVar(&w.uneven, "uneven", false, "trolley: soft or uneven ground, small or worn wheels")
	f.BoolVar(&w.turning, "turn-over", false, "two hooks: the load is turned over between them")
}

// ways puts these flags into the input; by is the word of --by.
func (i *slingInput) ways(o *slingOptions, by string) error {
	w, f := &i.way, o.way
	if f.men < 0 || f.women < 0 || f.jacks < 0 {
		return misuse("a number from 0", "--men, --women, --jacks: a number below zero")
	}
	w.hands.Men, w.hands.Women, w.push.Men, w.push.Women = f.men, f.women, f.men, f.women
	w.hands.Slope, w.push.Uneven, w.turn, w.jacks = f.slope, f.uneven, f.turning, f.jacks
	if err := i.zones(*o.words["through"], f.far); err != nil {
		return err
	}
	for _, name := range []string{"niosh", "niosh-end"} {
		if text := *o.words[name]; text != "" {
			e, err := nioshOf(name, text)
			if err != nil {
				return err
			}
			w.niosh = append(w.niosh, e)
		}
	}
	if text := *o.words["ramp"]; text != "" {
		rise, err := rampOf(text)
		if err != nil {
			return err
		}
		w.push.Rise = rise
	}
	return i.whichWay(o, by)
}

// whichWay settles what is asked for, and refuses flags that do not go together.
func (i *slingInput) whichWay(o *slingOptions, by string) error {
	w, f := &i.way, o.way
	w.asksPeople = f.men+f.women > 0
	w.asksTrolley = f.uneven || *o.words["ramp"] != "" || i.any("distance", "trolley-mass", "trolley-rated")
	w.asksOneHands = f.far || f.slope || *o.words["through"] != "" || len(w.niosh) > 0 || i.any("per-hour", "twist", "carry")
	w.byTrolley = by == "trolley" || by == "" && w.asksTrolley
	w.byHands = by == "hands" || by == "" && !w.byTrolley && (w.asksPeople || w.asksOneHands)
	w.byJack = by == "jack" || by == "" && (f.jacks > 0 || i.any("jack-rated"))
	w.two = i.any("second-hook") || f.turning
	switch {
	case w.asksTrolley && !w.byTrolley:
		return misuse("--by trolley", "--ramp, --uneven, --distance and --trolley... are of a load on wheels, not by %q", by)
	case w.asksOneHands && !w.byHands:
		return misuse("--by hands", "--through, --far, --slope, --twist, --per-hour, --carry and --niosh are of a lift by hand, not by %q", by)
	case w.asksPeople && !w.byHands && !w.byTrolley:
		return misuse("--by hands or --by trolley", "--men, --women: who lifts by hand, or pushes?")
	case w.byJack && w.jack == 0:
		return misuse("--jack-rated 5t", "jacks: what each is rated for is not given")
	case w.two && (w.pair.RatedB == 0 || i.hoist.WLL == 0):
		return misuse("--hoist 1t --second-hook 1t", "two hooks: what each is rated for is not given")
	case w.two && !w.turn && !i.any("span"):
		return misuse("--span 2m --cg 900mm, between the hooks and from the first", "two hooks: how far apart they hold is not given")
	case w.two && i.any("anchor", "rated", "table", "angle", "leg-length", "hook-above"):
		return misuse("ask for each hook alone, with its share as --mass", "two hooks: slings and anchors are judged hook by hook")
	case !w.two && i.any("tilt", "off"):
		return misuse("--second-hook 1t", "--tilt, --off: of a load on which two hooks?")
	}
	return nil
}

// zones reads the zones that the hands pass through.
func (i *slingInput) zones(text string, far bool) error {
	for _, word := range strings.Split(text, ",") {
		word = strings.Join(strings.Fields(word), " ")
		if word == "" {
			continue
		}
		z, ok := lift.ParseZone(word)
		if !ok {
			return misuse("one or several of: "+strings.Join(lift.ZoneNames(), ", "), "--through: %q is not a zone of the hands", word)
		}
		i.way.hands.Through = append(i.way.hands.Through, lift.Reach{Zone: z, Far: far})
	}
	if far && len(i.way.hands.Through) == 0 {
		i.way.hands.Through = []lift.Reach{{Zone: lift.Floor, Far: true}, {Zone: lift.LowerLeg, Far: true}}
	}
	return nil
}

// nioshOf reads "out 400mm, up 200mm, travel 600mm, turn 45deg, per minute 1, hours 1, grip fair".
func nioshOf(name, text string) (e lift.NIOSHLift, err error) {
	const like = "out 400mm, up 200mm, travel 600mm, turn 45deg, per minute 1, hours 1, grip fair"
	list := []struct {
		word string
		dim  quantity.Dim
		to   *float64
	}{{"out", quantity.Length, &e.Out}, {"up", quantity.Length, &e.Up}, {"travel", quantity.Length, &e.Travel}, {"turn", quantity.Angle, &e.Turn},
		{"per minute", quantity.Number, &e.PerMinute}, {"hours", quantity.Number, &e.Hours}}
	given := map[string]bool{}
	for _, part := range strings.Split(text, ",") {
		part = strings.TrimSpace(part)
		if v, ok := strings.CutPrefix(part, "grip"); ok {
			g, known := map[string]lift.Coupling{"good": lift.GoodGrip, "fair": lift.FairGrip, "poor": lift.PoorGrip}[strings.Trim(v, ": ")]
			if !known {
				return e, misuse("grip good, grip fair or grip poor", "--%s: %q is not a grip", name, part)
			}
			e.Grip = g
			continue
		}
		known := false
		for _, k := range list {
			v, ok := strings.CutPrefix(part, k.word)
			if !ok {
				continue
			}
			if *k.to, err = quantity.Parse(strings.Trim(v, ": "), k.dim); err != nil {
				return e, misuse(quantity.Hint(err), "--%s: %s: %v", name, k.word, err)
			}
			known, given[k.word] = true, true
		}
		if !known {
			return e, misuse(like, "--%s: %q is not one of its terms", name, part)
		}
	}
	if !given["out"] || !given["up"] || !given["travel"] {
		return e, misuse(like, "--%s: out, up and travel must be given", name)
	}
	return e, nil
}

// rampOf reads "1 in 12", "1:12", a share or degrees.
func rampOf(text string) (float64, error) {
	t := strings.ReplaceAll(strings.ReplaceAll(text, " in ", ":"), " ", "")
	if a, b, ok := strings.Cut(t, ":"); ok {
		x, err1 := strconv.ParseFloat(a, 64)
		y, err2 := strconv.ParseFloat(b, 64)
		if r := x / y; err1 == nil && err2 == nil && r > 0 && r <= 1 {
			return r, nil
		}
	} else if d, err := quantity.Parse(text, quantity.Angle); err == nil && d > 0 && d <= 45 {
		return math.Tan(d * math.Pi / 180), nil
	} else if r, err := strconv.ParseFloat(t, 64); err == nil && r > 0 && r <= 1 {
		return r, nil
	}
	return 0, misuse("\"1 in 12\", 0.083 or 5deg", "--ramp: %q is not a ramp between level and 1 in 1", text)
}

// byPeopleAndPairs makes the checks of these ways.
func (i *slingInput) byPeopleAndPairs(t *slingTold, add, guide func(lift.Result, error) error) error {
	w := &i.way
	if w.byHands {
		if err := guide(lift.Hands(i.load, w.hands)); err != nil {
			return err
		}
		if len(w.niosh) > 0 {
			r, err := lift.NIOSH(i.load, w.niosh...)
			if err := guide(r.Result, err); err != nil {
				return err
			}
		}
	}
	if w.byTrolley {
		if err := guide(lift.Trolley(i.load, w.push)); err != nil {
			return err
		}
	}
	if w.byJack {
		n := w.jacks
		if n == 0 {
			n = 4
		}
		if err := add(lift.JacksAt(i.load, n, w.jack, i.span, i.cg)); err != nil {
			return err
		}
	}
	if !w.two {
		return nil
	}
	p := w.pair
	p.B, p.RatedA = i.span, i.hoist.WLL
	if w.turn {
		return add(lift.TurnOver(i.load, p, i.rig.LugWLL))
	}
	r, err := lift.TwoHooks(i.load, p)
	if err := add(r.Result, err); err != nil {
		return err
	}
	if r.ShareA+r.ShareB > 0 {
		t.head = append(t.head, fmt.Sprintf("hook A takes %.1f kg, hook B %.1f kg, each at the tilt that is worse for it", r.ShareA, r.ShareB))
	}
	return nil
}
