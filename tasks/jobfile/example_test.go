package jobfile_test

import (
	"fmt"

	"sailby/tasks/jobfile"
)

func ExampleReadBytes() {
	_, err := jobfile.ReadBytes("gate.yaml", []byte(`job: Gate hinge
zone: Europe/London
places: {slip: {open: daily 07:00-19:00}}
window: {place: slip, opens: 2027-05-11 07:00, closes: 2027-05-13 19:00}
people: {Maro: {tickets: [weld]}}
tasks:
  weld lugs: {kind: weld, at: slip, joints: [{fillet: {leg: 6}, length: 2,4 m}], aftre: fit lugs}
`), nil)
	fmt.Println(err)
	// Output:
	// gate.yaml:7:61: task "weld lugs": joint 1: fillet: leg: "6" has no unit; expected a length in mm, cm, m, km, in or ft
	//   try: write the unit after the number, for instance 6 mm (units: mm, cm, m, km, in or ft)
	// gate.yaml:7:73: task "weld lugs": joint 1: length: "2,4 m" has a decimal comma
	//   try: write 2.4 m
	// gate.yaml:7:82: task "weld lugs": "aftre" is not a key here
	//   try: did you mean "after"?
}
