package weld

import (
	"fmt"
	"math"
	"sort"
	"strings"

	"sailby/tasks/origin"
)

// CutRow is one line of a table of cutting speeds.
type CutRow struct {
	Thickness float64 // mm
	Speed     float64 // mm/min
	Origin    origin.Origin
}

// CutTable is a house's own table of cutting speeds for one set or torch. It counts in place of
// the tables here, limit included: nothing thicker than its last row is cut with it.
type CutTable struct {
	Name    string
	Method  string   // "plasma", "oxy-fuel" or "disc"
	Current float64  // A of a plasma set; 0 where it does not matter
	Rows    []CutRow // by thickness, from thin to thick
	Share   float64  // cutting over hands-on time; default 0.3 on site, 0.4 in the shop
	Pierce  float64  // min a pierce; default 20 s
	From    string   // where it was taken from: "maker's card", "timed in May"

	Origins map[string]origin.Origin // by field: "cutting share", "piercing"
}

// Check refuses a table that cuts faster the thicker it gets, and one without rows.
//
// Errors: a *Error that names the two rows.
func (t CutTable) Check() error {
	if len(t.Rows) == 0 {
		return fault("speeds", "write for instance {6 mm: 1800 mm/min, 12 mm: 900 mm/min}", "%s has no speeds", t.Name)
	}
	if err := first(optional("cutting share", t.Share, 0.02, 1, ""), optional("piercing", t.Pierce, 0.01, 30, "min"), optional("current", t.Current, 15, 400, "A")); err != nil {
		return err
	}
	for i, r := range t.Rows {
		if err := first(within("thickness", r.Thickness, 0.5, 500, "mm"), within("speed", r.Speed, 5, 20000, "mm/min")); err != nil {
			return err
		}
		if i > 0 && (r.Thickness <= t.Rows[i-1].Thickness || r.Speed > t.Rows[i-1].Speed) {
			return fault("speeds", "look at the table again: thicker is not faster", "%s cuts %.4g mm at %.4g mm/min and %.4g mm at %.4g mm/min",
				t.Name, t.Rows[i-1].Thickness, t.Rows[i-1].Speed, r.Thickness, r.Speed)
		}
	}
	return nil
}

// or is the table's own figure, or the usual one.
func (t CutTable) or(name string, v float64, usual origin.Figure) origin.Figure {
	if v == 0 {
		return usual
	}
	return origin.Written(name, v, usual.Unit, t.Origins[name])
}

// speed reads the table: straight between two rows, the first row below it; the rows read stand
// in the figure.
func (t CutTable) speed(through origin.Figure) (origin.Figure, error) {
	if err := t.Check(); err != nil {
		return origin.Figure{}, err
	}
	x, last := through.Value, t.Rows[len(t.Rows)-1]
	if x > last.Thickness*(1+1e-9) {
		return origin.Figure{}, fault("thickness", "cut it by other means, or add what the set does there to the table",
			"%s ends at %.4g mm, the cut goes through %.4g mm", t.Name, last.Thickness, x)
	}
	i := sort.Search(len(t.Rows), func(i int) bool { return t.Rows[i].Thickness >= x*(1-1e-9) })
	row := func(i int) string {
		return fmt.Sprintf("%s mm at %s mm/min", origin.Trim(t.Rows[i].Thickness), origin.Trim(t.Rows[i].Speed))
	}
	b := t.Rows[i]
	v, read := b.Speed, "row "+row(i)
	if i > 0 && x < b.Thickness*(1-1e-9) {
		a := t.Rows[i-1]
		v = a.Speed + (b.Speed-a.Speed)*(x-a.Thickness)/(b.Thickness-a.Thickness)
		read = "between " + row(i-1) + " and " + row(i)
	}
	o := b.Origin
	o.Source = strings.Join(strings.Fields("table "+t.Name+", "+read), " ")
	if t.From != "" {
		o.Source += " (" + t.From + ")"
	}
	f := origin.Written("cutting speed", v, "mm/min", o)
	f.From = []origin.Figure{through}
	return f, nil
}

// What cutting uses up: all house judgement, no published figure was at hand.
const (
	plasmaLife  = 120.0   // min of arc that a nozzle and electrode last
	pierceWear  = 0.25    // min of that life that a pierce costs beyond its time
	discFace    = 10000.0 // mm2 of cut face that a 230 mm disc wears off on; a 125 mm one 4,000
	smallFace   = 4000.0
	smallReach  = 8.0  // mm cut with 125 mm discs
	fuelPerHour = 0.6  // kg of propane an hour of flame
	flameOver   = 1.5  // flame burning over cutting time
	heatOxygen  = 12.0 // L/min of oxygen for the flame
	fuelBottle  = 11.0 // kg (common practice)
)

// cuttingOxygen is what usual nozzles blow through the cut, L/min by mm of thickness.
var cuttingOxygen = []struct{ thick, flow float64 }{{3, 15}, {6, 25}, {12, 40}, {25, 65}, {50, 100}, {100, 180}}

// uses lists what a cut uses up.
func (c Cut) uses(burning origin.Figure) []Consumable {
	t := burning.Value
	piece := func(name string, n float64, note string, from ...origin.Figure) Consumable {
		f := origin.House(name, n, "", note)
		f.From = from
		return Consumable{Name: name, Amount: n, Unit: "pieces", Spare: n * SpareShare, Why: f}
	}
	method := c.Method
	if c.Table != nil {
		method = c.Table.Method
	}
	switch method {
	case "plasma":
		n := (t + float64(c.Pierces)*pierceWear) / plasmaLife
		return []Consumable{piece("plasma nozzles and electrodes", n, "one of each for two hours of arc; a pierce wears as much as 15 s of cutting", burning)}
	case "oxy-fuel":
		v := between(c.Thickness, len(cuttingOxygen), func(i int) (float64, float64) { return cuttingOxygen[i].thick, cuttingOxygen[i].flow })
		blow := origin.House("cutting oxygen", v, "L/min", fmt.Sprintf("usual nozzle for %s mm", origin.Trim(c.Thickness)))
		heat := origin.House("oxygen for the flame", heatOxygen, "L/min", "usual heating flame")
		over := origin.House("flame over cutting time", flameOver, "", "the flame burns while the torch is set up and moved")
		oxygen := origin.Worked("oxygen", (v+heatOxygen*flameOver)*t, "L", "(cutting oxygen + oxygen for the flame x flame over cutting time) x cutting time", blow, heat, over, burning)
		rate := origin.House("propane", fuelPerHour, "kg/h", "usual heating flame")
		fuel := origin.Worked("propane for cutting", fuelPerHour*flameOver*t/60, "kg", "propane x flame over cutting time x cutting time / 60", rate, over, burning)
		return []Consumable{
			{Name: "oxygen", Amount: oxygen.Value, Unit: "L", Spare: oxygen.Value * SpareShare, Packed: "bottles of 10 m3", Each: bottleGas, Why: oxygen},
			{Name: "propane for cutting", Amount: fuel.Value, Unit: "kg", Spare: fuel.Value * SpareShare, Mass: fuel.Value * (1 + SpareShare), Packed: "bottles of 11 kg", Each: fuelBottle, Why: fuel},
		}
	case "disc":
		way := c.Thickness / math.Cos(c.Bevel*math.Pi/180)
		if way <= smallReach {
			return []Consumable{piece("cutting discs 125 mm", way*c.Length/smallFace, "one for 4,000 mm2 of cut face")}
		}
		return []Consumable{piece("cutting discs 230 mm", way*c.Length/discFace, "one for 10,000 mm2 of cut face")}
	}
	return nil
}
