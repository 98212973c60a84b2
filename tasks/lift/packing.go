package lift

import (
	"math"
	"sort"
)

// The bed is packed by setting things down one by one, last wanted first, each as near the
// headboard and then as far left as it goes, turned or not, on the bed or on something that
// carries it (one layer, no more); O(n^3) for n things. Several orders of setting down are tried. It may miss a packing
// that exists; what it finds is one.

// gap is the play that rounding may take between two things, mm.
const gap = 1e-6

// pack stows the goods with the given indices on a bed; ok is false where no order of setting
// down works.
func pack(goods []Goods, which []int, v Vehicle) (out []Stowed, ok bool) {
	sizes := []func(g Goods) float64{
		func(g Goods) float64 { return g.Length * g.Width },
		func(g Goods) float64 { return math.Max(g.Length, g.Width) },
		func(g Goods) float64 { return g.Mass },
	}
	for _, size := range sizes {
		order := append([]int(nil), which...)
		sort.SliceStable(order, func(i, k int) bool {
			a, b := goods[order[i]], goods[order[k]]
			switch {
			case a.Needed != b.Needed:
				return a.Needed > b.Needed
			case a.Stack != b.Stack:
				return a.Stack
			}
			return size(a) > size(b)
		})
		if out, ok = setDown(goods, order, v); ok {
			return out, true
		}
	}
	return nil, false
}

// setDown stows goods in the given order.
func setDown(goods []Goods, order []int, v Vehicle) ([]Stowed, bool) {
	var out []Stowed
	for _, i := range order {
		g := goods[i]
		if g.Length == 0 || g.Width == 0 {
			out = append(out, Stowed{Goods: i, On: -1, Loose: true})
			continue
		}
		s, ok := place(goods, out, i, v)
		if !ok {
			return nil, false
		}
		out = append(out, s)
	}
	return out, true
}

// place finds the spot for one of the goods: least x, then least y, the bed before a stack.
func place(goods []Goods, down []Stowed, i int, v Vehicle) (Stowed, bool) {
	best, found := Stowed{}, false
	try := func(s Stowed) {
		if found && (s.Z > best.Z || s.Z == best.Z && (s.X > best.X+gap || s.X >= best.X-gap && s.Y >= best.Y-gap)) {
			return
		}
		if fits(goods, down, s, v) {
			best, found = s, true
		}
	}
	g := goods[i]
	for turn := range 2 {
		l, w := g.Length, g.Width
		if turn == 1 {
			if g.Fixed || l == w {
				break
			}
			l, w = w, l
		}
		try(Stowed{Goods: i, Length: l, Width: w, On: -1})
		for _, d := range down {
			if d.Loose || d.On >= 0 {
				continue
			}
			for _, at := range [][2]float64{{d.X + d.Length, d.Y}, {d.X, d.Y + d.Width}, {d.X + d.Length, 0}, {0, d.Y + d.Width}} {
				try(Stowed{Goods: i, X: at[0], Y: at[1], Length: l, Width: w, On: -1})
			}
		}
		for _, d := range down {
			if !d.Loose && d.On < 0 && goods[d.Goods].Stack && goods[d.Goods].Height > 0 {
				for _, x := range stops(down, d, true) {
					for _, y := range stops(down, d, false) {
						try(Stowed{Goods: i, X: x, Y: y, Z: d.Z + goods[d.Goods].Height, Length: l, Width: w, On: d.Goods})
					}
				}
			}
		}
	}
	return best, found
}

// stops gives where something may begin on top of base, along or across.
func stops(down []Stowed, base Stowed, along bool) []float64 {
	out := []float64{base.Y}
	if along {
		out[0] = base.X
	}
	for _, d := range down {
		if d.On != base.Goods || d.Loose {
			continue
		}
		if along {
			out = append(out, d.X+d.Length)
		} else {
			out = append(out, d.Y+d.Width)
		}
	}
	return out
}

// fits says whether s may stand there with what is down already.
func fits(goods []Goods, down []Stowed, s Stowed, v Vehicle) bool {
	g := goods[s.Goods]
	if s.X+s.Length > v.Length+v.Overhang+gap || s.Y+s.Width > v.Width+gap {
		return false
	}
	if v.Height > 0 && s.Z+g.Height > v.Height+gap {
		return false
	}
	for _, d := range down {
		if d.Loose {
			continue
		}
		if d.Goods == s.On && !carries(goods, down, d, s) {
			return false
		}
		if apart(goods, d, s) && !blocks(goods, d, s) && !blocks(goods, s, d) {
			continue
		}
		if d.Goods != s.On {
			return false
		}
	}
	return true
}

// carries says whether s may stand on base: wholly over it, no heavier than it with all that is
// on it already, and wanted no later.
func carries(goods []Goods, down []Stowed, base, s Stowed) bool {
	over := s.X >= base.X-gap && s.Y >= base.Y-gap && s.X+s.Length <= base.X+base.Length+gap && s.Y+s.Width <= base.Y+base.Width+gap
	on := goods[s.Goods].Mass
	for _, d := range down {
		if d.On == base.Goods && !d.Loose && d.Goods != s.Goods {
			on += goods[d.Goods].Mass
		}
	}
	return over && goods[base.Goods].Stack && base.Z+goods[base.Goods].Height <= s.Z+gap &&
		on <= goods[base.Goods].Mass && goods[s.Goods].Needed <= goods[base.Goods].Needed
}

// tall gives the height of g, which is never nothing.
func tall(g Goods) float64 { return math.Max(g.Height, 1) }

// apart says whether two things do not stand in one another.
func apart(goods []Goods, a, b Stowed) bool {
	return a.X+a.Length <= b.X+gap || b.X+b.Length <= a.X+gap || a.Y+a.Width <= b.Y+gap || b.Y+b.Width <= a.Y+gap ||
		a.Z+tall(goods[a.Goods]) <= b.Z+gap || b.Z+tall(goods[b.Goods]) <= a.Z+gap
}

// blocks says whether a stands between b and the tail though b is wanted first.
func blocks(goods []Goods, a, b Stowed) bool {
	if goods[b.Goods].Needed >= goods[a.Goods].Needed {
		return false
	}
	sideways := a.Y < b.Y+b.Width-gap && b.Y < a.Y+a.Width-gap
	return sideways && a.X+gap >= b.X+b.Length
}
