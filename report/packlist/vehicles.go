package packlist

import (
	"cmp"
	"fmt"
	"math"
	"slices"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
)

// Vehicle is one run of one vehicle, with what is in it in the order of loading.
type Vehicle struct {
	Name    string
	Run     int
	Goods   []Stowed
	Mass    float64 // kg
	Payload float64 // kg left for goods
	Nose    float64 // kg on the hitch, trailers only
	Straps  []Straps
}

// Stowed is one thing in a vehicle: x runs from the headboard to the tail, y from the left.
type Stowed struct {
	What    string
	Mass    float64
	X, Y, Z float64 // mm
	Loose   bool    // without sizes: anywhere
}

// Straps says how a load is tied down.
type Straps struct {
	What    string
	Count   int
	Governs string
	Edition string // of EN 12195-1
	Notes   []string
}

// heavyGoods is the mass from which straps are counted, kg (house judgement).
const heavyGoods = 50

// vehicles finds what goes in which vehicle on which run, and flags what rules say of it.
func (m *maker) vehicles() {
	m.driving()
	m.bands()
	if len(m.job.Vehicles) == 0 {
		return
	}
	goods, from := m.goods()
	if len(goods) == 0 {
		return
	}
	var list []lift.Vehicle
	for _, v := range m.job.Vehicles {
		list = append(list, v.Vehicle)
	}
	p, err := lift.LoadVehicles(goods, list)
	if err != nil {
		m.list.OK, m.list.Reason = false, "no load plan: "+err.Error()
		return
	}
	m.list.OK, m.list.Reason, m.list.Nearest, m.list.Proved = p.OK, p.Reason, p.Nearest, p.Proved
	m.list.Notes = append(m.list.Notes, p.Warnings...)
	if !p.OK {
		m.inMoreRuns(goods, list)
		return
	}
	for _, breach := range lift.CheckLoads(goods, list, p.Trips) {
		m.list.OK = false
		m.list.Flags = append(m.list.Flags, "the load plan does not hold: "+breach)
	}
	m.list.Vehicles = m.stow(goods, p.Trips)
	for _, t := range p.Trips {
		v := m.job.Vehicles[t.Vehicle]
		where := v.Name
		if v.Trips > 1 {
			where = fmt.Sprintf("%s, run %d", v.Name, t.Number)
		}
		for _, s := range t.Stowed {
			from[s.Goods](where)
		}
	}
	m.carriage(goods, p.Trips)
	m.costOfRuns(goods, p.Trips)
}

// carriage flags what the rules of carriage say of each run.
func (m *maker) carriage(goods []lift.Goods, trips []lift.Trip) {
	for _, t := range trips {
		for _, f := range lift.Carriage(goods, t, m.job.Carriage) {
			m.flag(m.job.Vehicles[t.Vehicle].Name + ": " + f)
		}
	}
}

// stow writes runs of vehicles out, with the straps of what is heavy.
func (m *maker) stow(goods []lift.Goods, trips []lift.Trip) []Vehicle {
	var list []Vehicle
	for _, t := range trips {
		v := m.job.Vehicles[t.Vehicle]
		out := Vehicle{Name: v.Name, Run: t.Number, Mass: roundUp(t.Mass), Payload: math.Floor(t.Payload), Nose: t.Nose}
		for _, s := range t.Stowed {
			g := goods[s.Goods]
			out.Goods = append(out.Goods, Stowed{What: g.Name, Mass: g.Mass, X: s.X, Y: s.Y, Z: s.Z, Loose: s.Loose})
			if g.Mass >= heavyGoods && s.On < 0 {
				out.Straps = append(out.Straps, m.straps(g, v))
			}
		}
		list = append(list, out)
	}
	return list
}

func (m *maker) flag(s string) {
	if !slices.Contains(m.list.Flags, s) {
		m.list.Flags = append(m.list.Flags, s)
	}
}

// goods writes the list as things to stow: boxes, and what is loose. from marks where a thing went.
func (m *maker) goods() (goods []lift.Goods, from []func(where string)) {
	rank := m.ranks()
	m.over = map[string]float64{}
	boxed := map[string]int{}
	for i := range m.items {
		it := &m.items[i]
		mark := func(where string) {
			if !slices.Contains(it.Where, where) {
				it.Where = append(it.Where, where)
			}
		}
		if it.Box != "" {
			at, ok := boxed[it.Box]
			if !ok {
				at = len(goods)
				boxed[it.Box] = at
				b := m.job.Packing.Boxes[slices.IndexFunc(m.job.Packing.Boxes, func(b tasks.Box) bool { return b.Name == it.Box })]
				goods = append(goods, lift.Goods{Name: "box " + b.Name, Mass: max(b.Mass, 0.1), Length: b.Size[0], Width: b.Size[1], Height: b.Size[2], Needed: rank[it.Day], Stack: true})
				from = append(from, func(where string) {
					for k := range m.list.Boxes {
						if m.list.Boxes[k].Name == b.Name {
							m.list.Boxes[k].Where = where
						}
					}
				})
			}
			goods[at].Mass += it.Mass
			goods[at].Needed = min(goods[at].Needed, rank[it.Day])
			if it.stow.Class != "" && goods[at].Class == "" {
				goods[at].Class, goods[at].Amount = it.stow.Class, it.stow.Of
			}
			before := from[at]
			from[at] = func(where string) { before(where); mark(where) }
			continue
		}
		if it.Mass <= 0 {
			continue // not known, or nothing: in a corner
		}
		n := max(it.pieces, 1)
		for k := range n {
			name := it.What
			if n > 1 {
				name = fmt.Sprintf("%s %d", it.What, k+1)
			}
			s := it.stow
			goods = append(goods, lift.Goods{Name: name, Mass: it.Mass / float64(n), Length: s.Size[0], Width: s.Size[1], Height: s.Size[2],
				Needed: rank[it.Day], Stack: s.Stack, Class: s.Class, Amount: s.Of})
			m.over[name] = it.over
			from = append(from, mark)
		}
	}
	return goods, from
}

// ranks numbers the moments at which things are first needed, in order; what has no moment is
// needed last.
func (m *maker) ranks() map[hours.Minute]int {
	var days []hours.Minute
	for _, it := range m.items {
		if it.Day != 0 && !slices.Contains(days, it.Day) {
			days = append(days, it.Day)
		}
	}
	slices.SortFunc(days, func(a, b hours.Minute) int { return cmp.Compare(a, b) })
	m.days = days
	out := map[hours.Minute]int{0: len(days) + 1}
	for i, d := range days {
		out[d] = i + 1
	}
	return out
}

// straps counts the straps over one load: with the weight allowance of how an assembly's mass is known; what else is
// taken has its mass from its plate.
func (m *maker) straps(g lift.Goods, v *tasks.Vehicle) Straps {
	c := lift.Cargo{On: v.Bed, Old: v.Edition}
	if m.w.Trip != nil {
		c.Sea = m.w.Trip.Sea
	}
	res, err := lift.Secure(lift.Load{Name: g.Name, Mass: g.Mass, Allowance: max(1, m.over[g.Name]), Length: g.Length, Width: g.Width, Height: g.Height}, c, v.Lashing)
	if err != nil {
		return Straps{What: g.Name, Notes: []string{"straps not counted: " + err.Error()}}
	}
	return Straps{What: g.Name, Count: res.Straps, Governs: res.Governs, Edition: res.Edition, Notes: res.Warnings}
}

// bands finds the ferry's band for each vehicle, with its trailer.
func (m *maker) bands() {
	if m.w.Trip == nil || len(m.w.Trip.Bands) == 0 {
		return
	}
	for _, v := range m.job.Vehicles {
		if v.TowedBy != "" {
			continue
		}
		long, high, name := v.Long, v.High, v.Name
		for _, t := range m.job.Vehicles {
			if t.TowedBy == v.Name {
				long, high, name = long+t.Long, max(high, t.High), v.Name+" with "+t.Name
			}
		}
		if v.Long == 0 || v.High == 0 {
			m.flag(v.Name + ": its length and height over all are not known (keys `long` and `high`): no ferry band")
			continue
		}
		b, err := lift.BookingBand(m.w.Trip.Bands, long, high)
		if err != nil {
			m.flag(name + ": " + err.Error())
			continue
		}
		m.list.Notes = append(m.list.Notes, fmt.Sprintf("%s, %s m long and %s m high, books as %q", name, origin.Trim(long/1000), origin.Trim(high/1000), b.Name))
	}
}
