package lift

import "fmt"

// CheckLoads judges a load plan afresh, without the search's own bookkeeping: every thing once,
// payload, train weight, bed, no two things in one another, stacks that carry, everything
// reachable in the order of use. It lists every breach; none is a plan that holds.
func CheckLoads(goods []Goods, vehicles []Vehicle, trips []Trip) []string {
	var out []string
	add := func(format string, args ...any) { out = append(out, fmt.Sprintf(format, args...)) }
	times := make([]int, len(goods))
	train := map[[2]int]float64{}
	for _, t := range trips {
		if t.Vehicle < 0 || t.Vehicle >= len(vehicles) || t.Number < 1 || t.Number > vehicles[t.Vehicle].trips() {
			add("a trip of no vehicle: %d, trip %d", t.Vehicle, t.Number)
			continue
		}
		v := vehicles[t.Vehicle]
		mass := 0.0
		bad := false
		for _, s := range t.Stowed {
			if s.Goods < 0 || s.Goods >= len(goods) {
				add("%s trip %d: nothing has number %d", v.Name, t.Number, s.Goods)
				bad = true
				continue
			}
			times[s.Goods]++
			mass += goods[s.Goods].Mass
		}
		if bad {
			continue
		}
		if room := v.forGoods().Value; mass > room+1e-6 {
			add("%s trip %d: %.1f kg in %.1f kg", v.Name, t.Number, mass, room)
		}
		train[[2]int{t.Vehicle, t.Number}] += mass
		checkBed(goods, v, t, add)
	}
	for i, n := range times {
		if n != 1 {
			add("%q is stowed %d times", goods[i].Name, n)
		}
	}
	checkTrains(vehicles, train, add)
	return out
}

// checkBed judges one bed, thing by thing and pair by pair.
func checkBed(goods []Goods, v Vehicle, t Trip, add func(string, ...any)) {
	for i, s := range t.Stowed {
		g := goods[s.Goods]
		if s.Loose {
			if g.Length > 0 && g.Width > 0 {
				add("%q has sizes but no place", g.Name)
			}
			continue
		}
		asIs, turned := s.Length == g.Length && s.Width == g.Width, s.Length == g.Width && s.Width == g.Length
		if !asIs && (!turned || g.Fixed) {
			add("%q stands as %.0f x %.0f mm", g.Name, s.Length, s.Width)
		}
		if s.X < -gap || s.Y < -gap || s.X+s.Length > v.Length+v.Overhang+gap || s.Y+s.Width > v.Width+gap ||
			v.Height > 0 && s.Z+g.Height > v.Height+gap {
			add("%q stands off the bed of %s", g.Name, v.Name)
		}
		held := s.On < 0 && s.Z == 0
		on := g.Mass
		for k, d := range t.Stowed {
			if k == i || d.Loose {
				continue
			}
			h := goods[d.Goods]
			if s.On >= 0 && d.On == s.On {
				on += h.Mass
			}
			flat := s.X < d.X+d.Length-gap && d.X < s.X+s.Length-gap
			side := s.Y < d.Y+d.Width-gap && d.Y < s.Y+s.Width-gap
			up := s.Z < d.Z+max(h.Height, 1)-gap && d.Z < s.Z+max(g.Height, 1)-gap
			if k > i && flat && side && up {
				add("%q and %q stand in one another", g.Name, h.Name)
			}
			if side && g.Needed < h.Needed && d.X >= s.X+s.Length-gap {
				add("%q is wanted before %q but stands behind it", g.Name, h.Name)
			}
		}
		for _, d := range t.Stowed {
			if d.Loose || d.Goods != s.On {
				continue
			}
			h := goods[d.Goods]
			held = h.Stack && d.On < 0 && on <= h.Mass && g.Needed <= h.Needed && s.Z >= d.Z+h.Height-gap &&
				s.X >= d.X-gap && s.X+s.Length <= d.X+d.Length+gap && s.Y >= d.Y-gap && s.Y+s.Width <= d.Y+d.Width+gap
		}
		if !held {
			add("%q stands on nothing that carries it", g.Name)
		}
	}
}

// checkTrains judges each vehicle with its trailers.
func checkTrains(vehicles []Vehicle, mass map[[2]int]float64, add func(string, ...any)) {
	for i, v := range vehicles {
		if v.Train == 0 || v.TowedBy != "" { // the train weight is the puller's
			continue
		}
		for n := 1; n <= maxTrips; n++ {
			total := laden(v) + mass[[2]int{i, n}]
			any := mass[[2]int{i, n}] > 0
			for k, w := range vehicles {
				if k != i && w.TowedBy == v.Name {
					total += laden(w) + mass[[2]int{k, n}]
					any = any || mass[[2]int{k, n}] > 0
				}
			}
			if any && total > v.Train+1e-6 {
				add("%s trip %d: the train weighs %.0f kg of %.0f", v.Name, n, total, v.Train)
			}
		}
	}
}
