package lift

import (
	"math"
	"sort"
)

// slot is one run of one vehicle.
type slot struct {
	vehicle, number int
	room            float64 // kg
}

// stowing is the search for a split of goods over slots.
type stowing struct {
	goods    []Goods
	vehicles []Vehicle
	slots    []slot // first trips of all vehicles, then second trips
	order    []int  // goods, largest share of a vehicle first
	puller   []int  // for each vehicle the one that pulls it, or -1
	strict   bool   // what is wanted first travels no later
	work     int    // done so far, in comparisons of two things
	load     [][]int
	mass     []float64
}

// maxWork bounds each search so that it ends within about a second; counted, not timed. Up to
// earlyPack things a bed is packed after every thing put on it, beyond that once all are assigned.
const (
	maxWork   = 10e6
	earlyPack = 30
)

func newStowing(goods []Goods, vehicles []Vehicle) *stowing {
	s := &stowing{goods: goods, vehicles: vehicles}
	big, area := 1.0, 1.0
	for n := 1; n <= maxTrips; n++ {
		for i, v := range vehicles {
			if n <= v.trips() && n <= pulls(vehicles, v) {
				s.slots = append(s.slots, slot{i, n, v.forGoods().Value})
			}
			big, area = math.Max(big, v.forGoods().Value), math.Max(area, v.Length*v.Width)
		}
	}
	for _, v := range vehicles {
		p := -1
		for i, w := range vehicles {
			if v.TowedBy != "" && w.Name == v.TowedBy {
				p = i
				break
			}
		}
		s.puller = append(s.puller, p)
	}
	share := func(g Goods) float64 { return math.Max(g.Mass/big, g.Length*g.Width/area) }
	for i := range goods {
		s.order = append(s.order, i)
	}
	sort.SliceStable(s.order, func(i, k int) bool { return share(goods[s.order[i]]) > share(goods[s.order[k]]) })
	return s
}

// pulls gives how often v can go for want of what pulls it.
func pulls(vehicles []Vehicle, v Vehicle) int {
	for _, w := range vehicles {
		if v.TowedBy != "" && w.Name == v.TowedBy {
			return w.trips()
		}
	}
	return maxTrips
}

// solve looks for a split over the first k slots, in the order of use between trips where that goes.
func (s *stowing) solve(k int) ([]Trip, bool) {
	need, room := 0.0, 0.0
	for _, g := range s.goods {
		need += g.Mass
	}
	for _, t := range s.slots[:k] {
		room += math.Max(0, t.room)
	}
	if need > room*(1+rounding) {
		return nil, false
	}
	ways := [][]int{s.order} // one trip: the order of use does not matter between trips
	if s.slots[k-1].number > 1 {
		byUse := append([]int(nil), s.order...)
		sort.SliceStable(byUse, func(i, j int) bool { return s.goods[byUse[i]].Needed < s.goods[byUse[j]].Needed })
		ways = [][]int{byUse, s.order, s.order}
	}
	share := s.order
	defer func() { s.order = share }()
	for n, order := range ways {
		s.order, s.strict, s.work = order, n < 2, 0
		s.load, s.mass = make([][]int, k), make([]float64, k)
		if s.put(0) {
			return s.trips(), true
		}
	}
	return nil, false
}

// put tries the n-th of the goods in every slot in turn.
func (s *stowing) put(n int) bool {
	if n == len(s.order) {
		for k := range s.load {
			if len(s.load[k]) > earlyPack && !s.packs(k) {
				return false
			}
		}
		return true
	}
	i := s.order[n]
	for k := range s.load {
		if s.work >= maxWork {
			return false
		}
		s.work += len(s.order)
		if !s.allowed(i, k) {
			continue
		}
		s.load[k] = append(s.load[k], i)
		s.mass[k] += s.goods[i].Mass
		if (len(s.load[k]) > earlyPack || s.packs(k)) && s.put(n+1) {
			return true
		}
		s.load[k] = s.load[k][:len(s.load[k])-1]
		s.mass[k] -= s.goods[i].Mass
	}
	return false
}

// packs says whether the bed of slot k has room for what is assigned to it.
func (s *stowing) packs(k int) bool {
	n := len(s.load[k])
	s.work += 8 * n * n * n
	_, ok := pack(s.goods, s.load[k], s.vehicles[s.slots[k].vehicle])
	return ok
}

// allowed says whether slot k may take i by mass, train, size and the order of use between trips.
func (s *stowing) allowed(i, k int) bool {
	g, t := s.goods[i], s.slots[k]
	if s.mass[k]+g.Mass > t.room*(1+rounding) || !s.vehicles[t.vehicle].takes(g) {
		return false
	}
	if !s.train(k, g.Mass) {
		return false
	}
	if !s.strict {
		return true
	}
	for other, list := range s.load {
		for _, j := range list {
			n, m := s.slots[other].number, t.number
			if g.Needed < s.goods[j].Needed && m > n || g.Needed > s.goods[j].Needed && m < n {
				return false
			}
		}
	}
	return true
}

// train says whether more kg in slot k keeps vehicle and trailer within the train weight.
func (s *stowing) train(k int, more float64) bool {
	t := s.slots[k]
	top := t.vehicle
	if p := s.puller[t.vehicle]; p >= 0 {
		top = p
	}
	limit := s.vehicles[top].Train
	if limit == 0 {
		return true
	}
	total := more
	for i, v := range s.vehicles {
		if i != top && s.puller[i] != top {
			continue
		}
		total += laden(v)
		for other := range s.load {
			if s.slots[other].vehicle == i && s.slots[other].number == t.number {
				total += s.mass[other]
			}
		}
	}
	return total <= limit*(1+rounding)
}

// laden is what a vehicle weighs with crew, fuel and tools, without goods, kg: what its papers
// allow in all less what is left for goods.
func laden(v Vehicle) float64 {
	if v.Gross > 0 {
		return v.Gross - v.forGoods().Value
	}
	pay := v
	pay.Gross, pay.Empty = 0, 0
	return v.Empty + v.Payload - pay.forGoods().Value
}
