package lift

import "fmt"

// Gear is one way that is at hand to move a load: what goes with By is filled, the rest is empty.
type Gear struct {
	Name  string
	By    Way
	Hands Handling  // ByHands
	Hoist Hoist     // ByChainHoist, ByLeverHoist, ByGantry; its By is taken from Gear
	Crane CraneLift // ByLoaderCrane
	Push  Push      // ByTrolley
	Jacks int       // ByJack: how many; 0 is 4
	Jack  float64   // ByJack: kg WLL of each
}

// Fit judges a load on one piece of gear by the rules of its kind: Hands, Hang, Crane, Trolley or
// Jacks.
//
// Errors: those of the kind, with the gear's name in front.
func Fit(l Load, g Gear) (Result, error) {
	var r Result
	var err error
	switch g.By {
	case ByHands:
		r, err = Hands(l, g.Hands)
	case ByChainHoist, ByLeverHoist, ByGantry:
		h := g.Hoist
		h.By = g.By
		r, err = Hang(l, h)
	case ByLoaderCrane:
		r, err = Crane(l, g.Crane)
	case ByTrolley:
		r, err = Trolley(l, g.Push)
	case ByJack:
		n := g.Jacks
		if n == 0 {
			n = 4
		}
		r, err = Jacks(l, n, g.Jack)
	default:
		return Result{}, fault("use hands, chain hoist, lever hoist, loader crane, gantry, trolley or jack", "gear %q: the way of moving is not a known one", g.Name)
	}
	if err != nil {
		return Result{}, fmt.Errorf("gear %q: %w", g.Name, err)
	}
	return r, nil
}

// Choice is how one piece of gear does with a load.
type Choice struct {
	Gear   int // index in the list given
	Result Result
}

// Choose judges a load on every piece of gear at hand, in the order given. It gives those that
// carry it and those that do not, so that a refusal can name what would do instead.
//
// Errors: those of Fit, for the first piece of gear that cannot be judged.
func Choose(l Load, gear []Gear) (carry, refuse []Choice, err error) {
	for i, g := range gear {
		r, err := Fit(l, g)
		if err != nil {
			return nil, nil, err
		}
		if r.OK {
			carry = append(carry, Choice{i, r})
		} else {
			refuse = append(refuse, Choice{i, r})
		}
	}
	return carry, refuse, nil
}
