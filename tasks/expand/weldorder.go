package expand

import (
	"fmt"
	"math"
	"strings"

	"sailby/tasks"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
	"sailby/weld"
)

// advise works out an order of the seams in which the shrinkage moment about the assembly's
// axes stays small, where the task asks for it. Drawing, WPS and jig come first.
func (x *expander) advise(t *tasks.Task, e weld.Estimate, h *hands) {
	if !t.Advise {
		return
	}
	total, err := x.partsTotal(t)
	if err != nil {
		h.fault, h.hint = fmt.Errorf("advise order: %w", err), "name the assembly with its parts and their places under `part`"
		return
	}
	long := 0 // the axis along which the assembly is longest
	for i := range 3 {
		if total.High[i]-total.Low[i] > total.High[long]-total.Low[long] {
			long = i
		}
	}
	y, z := (long+1)%3, (long+2)%3
	longest := 0.0
	for _, s := range e.Seams {
		longest = math.Max(longest, s.Length)
	}
	var placed []weld.Placed
	for i, s := range t.Seams {
		if !s.HasAt {
			h.fault, h.hint = fmt.Errorf("advise order: joint %d has no place", i+1), "give each joint its middle in the axes of the assembly, for instance at: [600 mm, 0, 12 mm]"
			return
		}
		placed = append(placed, weld.Placed{Name: seamName(t, i), Area: e.Seams[i].Section.Area * e.Seams[i].Length / longest,
			Y: s.At[y] - total.CG[y], Z: s.At[z] - total.CG[z]})
	}
	o, err := weld.OrderOf(placed)
	if err != nil {
		h.fault, h.hint = err, "look at the places of the joints"
		return
	}
	var names []string
	for _, i := range o.Sequence {
		names = append(names, placed[i].Name)
	}
	h.est.Notes = append(h.est.Notes, fmt.Sprintf("order of welding, as advice (drawing, WPS and jig come first): %s", strings.Join(names, ", ")),
		fmt.Sprintf("imbalance of shrinkage after each joint, in 1000 mm3: as listed %s; as advised %s", thousands(o.Before), thousands(o.After)))
	from := "weld area x length over the longest x lever arm about the centre of mass, at most, after any joint"
	h.bow(t, o, longest)
	h.est.Facts = append(h.est.Facts, origin.Worked("imbalance as listed", o.PeakBefore, "mm3", from), origin.Worked("imbalance as advised", o.PeakAfter, "mm3", from))
}

// bow says how far the assembly bows, where its second moment of area is given: when all is
// welded, and at the worst moment of either order.
func (h *hands) bow(t *tasks.Task, o weld.Order, length float64) {
	if !t.Second.Pos.Given() {
		return
	}
	second := origin.Written("second moment of area", t.Second.Value, "mm4", t.Second.Pos.Origin("second moment"))
	for _, b := range []struct {
		name   string
		moment float64
	}{{"bow when all is welded", o.After[len(o.After)-1]}, {"most bow as listed", o.PeakBefore}, {"most bow as advised", o.PeakAfter}} {
		v, err := weld.Bow(b.moment, length, t.Second.Value)
		if err != nil {
			h.fault, h.hint = err, "look at the second moment of area"
			return
		}
		h.est.Facts = append(h.est.Facts, origin.Figure{Name: b.name, Value: v, Unit: "mm", Origin: origin.Origin{Kind: origin.Memory,
			Source: "0.005 x moment x length^2 / second moment of area (Blodgett, Design of Welded Structures)"},
			From: []origin.Figure{origin.Worked("moment", b.moment, "mm3", "weld area x lever arm about the centre of mass"), origin.Worked("length", length, "mm", "of the longest joint"), second}})
	}
}

func thousands(list []float64) string {
	var out []string
	for _, v := range list {
		out = append(out, origin.Trim(math.Round(v/100)/10))
	}
	return strings.Join(out, ", ")
}

func seamName(t *tasks.Task, i int) string {
	if n := t.Welds()[i].Name; n != "" {
		return n
	}
	return fmt.Sprintf("joint %d", i+1)
}

// partsTotal weighs what the weld joins.
func (x *expander) partsTotal(t *tasks.Task) (lift.Total, error) {
	var all []lift.Part
	for _, name := range t.Parts {
		all = append(all, x.parts(name)...)
	}
	if len(all) == 0 {
		return lift.Total{}, fmt.Errorf("nothing says what the joints stand on")
	}
	return lift.Mass(all)
}
