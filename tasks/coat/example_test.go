package coat_test

import (
	"fmt"
	"math"

	"sailby/tasks/coat"
	"sailby/tasks/quantity"
)

// A primer on a frame in spring: how much, how long, and when the next coat may follow.
func Example() {
	primer, _ := coat.Defaults("two-pack epoxy")
	primer.Name = "primer"
	a, err := coat.Apply(coat.Job{Paint: primer, Area: 24, Method: "roller", Celsius: 12, Stripe: 30})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%.1f L in %v, %d mix, %s hands-on\n", a.Litres, a.Tins, a.Batches, quantity.Span(a.Minutes.Whole()))
	least, most, err := primer.Window(primer, 12)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("next coat after %s, before %s\n", quantity.Span(quantity.Clock(least.Value).Whole()), quantity.Span(int(most.Value)))
	ok, why := coat.MayApply(primer, 10, 8.5, 0.85, 2, "roller")
	fmt.Println(ok, why)
	// Output:
	// 3.4 L in [{1 5}], 1 mix, 2 h 8 min hands-on
	// next coat after 16 h 19 min, before 7 d
	// false [steel 8.5 C is only 0.9 K above the dew point 7.6 C; 3.0 K are wanted]
}

// A coat finished at four in the afternoon dries through a night that cools from 14 C to 4 C: below the
// paint's least 5 C nothing is added.
func ExampleCure() {
	primer, _ := coat.Defaults("two-pack epoxy")
	window, _ := primer.Next(primer)
	steel := func(minute int) float64 { return 9 + 5*math.Cos(2*math.Pi*float64(minute-15*60)/1440) }
	start := 16 * 60
	finish, ok := coat.Cure(start, window.Min, primer.ApplyMin, steel, 10*1440)
	fmt.Println(ok, quantity.Span(finish-start))
	fmt.Printf("%.0f %% at midnight\n", 100*coat.Cured(start, 24*60, window.Min, primer.ApplyMin, steel))
	// Output:
	// true 23 h 56 min
	// 41 % at midnight
}
