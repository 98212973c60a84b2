package weld

import "sailby/tasks/quantity"

// ArcByTravel gives the arc time of runs of a length in mm laid one after the other at speeds in
// mm/min: the sum of length over speed.
//
// Errors: a *Error for no speed, or a length or speed outside what seams are welded at.
func ArcByTravel(length float64, speeds ...float64) (quantity.Arc, error) {
	if err := within("length", length, 0.1, maxLength, "mm"); err != nil {
		return 0, err
	}
	if len(speeds) == 0 {
		return 0, fault("travel", "give the speed of each run", "no travel speed")
	}
	total := 0.0
	for _, v := range speeds {
		if err := within("travel", v, 20, 5000, "mm/min"); err != nil {
			return 0, err
		}
		total += length / v
	}
	return quantity.Arc(total), nil
}

// Weighed gives a deposition rate in kg/h from a plate weighed before and after welding for some
// seconds of arc, kilograms.
//
// Errors: a *Error where the plate did not gain, or no time passed.
func Weighed(before, after, seconds float64) (float64, error) {
	if err := first(within("mass before", before, 0.001, 1e5, "kg"), within("mass after", after, 0.001, 1e5, "kg"), within("seconds", seconds, 1, 1e5, "s")); err != nil {
		return 0, err
	}
	if after <= before {
		return 0, fault("mass after", "weigh again, slag off", "the plate went from %.4g to %.4g kg: nothing was laid", before, after)
	}
	return (after - before) / seconds * 3600, nil
}
