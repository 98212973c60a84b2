package quantity_test

import (
	"fmt"

	"sailby/tasks/quantity"
)

func ExampleParse() {
	leg, _ := quantity.Parse("1/4 in", quantity.Length)
	_, err := quantity.Parse("6", quantity.Length)
	fmt.Println(leg, quantity.Length.Base())
	fmt.Println(err)
	fmt.Println("try:", quantity.Hint(err))
	// Output:
	// 6.35 mm
	// "6" has no unit; expected a length in mm, cm, m, km, in or ft
	// try: write the unit after the number, for instance 6 mm (units: mm, cm, m, km, in or ft)
}

func ExampleParseRange() {
	r, _ := quantity.ParseRange("3 to 5 h", quantity.Time)
	fmt.Println(r.Low, r.Likely, r.High)
	// Output: 180 240 300
}
