package lift

import (
	"fmt"

	"sailby/tasks/origin"
)

// leg gives what one leg may carry along itself: the rating less hitch, choke, edge and heat.
func (r Rig) leg(table slingTable, row slingRow) (origin.Figure, error) {
	one := given("WLL of one leg, from its tag", r.WLL, "kg")
	if row.one > 0 && (r.WLL == 0 || row.one < r.WLL) {
		one = origin.Published(fmt.Sprintf("WLL of one leg, %s %s", num(row.size), table.unit), row.one, "kg", table.source)
	}
	if one.Value <= 0 {
		return one, fault("read the WLL on the sling's tag, or name its table and size", "the sling has no rating")
	}
	from := []origin.Figure{one}
	v := one.Value
	apply := func(f origin.Figure) {
		v *= f.Value
		from = append(from, f)
	}
	if r.Hitch == Choked || r.Hitch == Endless {
		f := origin.Published("choke", table.choked, "", table.source)
		if table.choked == 0.75 {
			f = origin.Published("choke", 0.75, "", "sling makers' choker table: 0.75 of vertical for wire and web")
		}
		if r.Hitch == Endless && table.endles > 0 {
			f = origin.Published("endless sling, choked", table.endles, "", table.source)
		}
		apply(f)
		if f := chokeAngle(r.ChokeAngle); f.Value < 1 {
			apply(f)
		}
	}
	if f := edge(r.Edge); f.Value < 1 {
		apply(f)
	}
	heat, err := heating(r.Heat, table)
	if err != nil {
		return one, err
	}
	if heat.Value < 1 {
		apply(heat)
	}
	out := origin.Worked("what a leg may carry", v, "kg", "WLL of one leg x factors", from...)
	if row.loop > 0 && (r.Hitch == Endless) == (table.endles > 0) && r.Hitch != Straight && r.Hitch != Basket {
		if cap := row.loop * v / (row.one * from[1].Value); cap < out.Value { // the table's own rounded figure, same later factors
			out = origin.Worked("what a leg may carry", cap, "kg", "rating choked x factors",
				append([]origin.Figure{origin.Published("rating choked", row.loop, "kg", table.source)}, from[2:]...)...)
		}
	}
	return out, nil
}

// chokeAngle gives what remains of a choker's rating by the angle in the bight.
func chokeAngle(deg float64) origin.Figure {
	const source = "lifting gear hirers' user guide, 2018, choke angle table"
	for _, r := range [][2]float64{{30, 0.49}, {60, 0.62}, {90, 0.74}} {
		if deg != 0 && deg < r[0] {
			return origin.Published("choke angle", r[1], "", source)
		}
	}
	if deg != 0 && deg <= 120 {
		return origin.Published("choke angle", 0.87, "", source)
	}
	return origin.Published("choke angle", 1, "", source)
}

// edge gives what remains over an edge by bend radius over diameter.
func edge(ratio float64) origin.Figure {
	const source = "chain sling technical information, edge load factors"
	switch {
	case ratio == 0 || ratio > 2:
		return origin.Published("edge", 1, "", source)
	case ratio > 1:
		return origin.Published("edge", 0.7, "", source)
	}
	return origin.Published("edge", 0.5, "", source)
}

// heating gives what remains of a chain's rating by temperature, C.
func heating(c float64, table slingTable) (origin.Figure, error) {
	const source = "EN 818-4 grade 8, derating by temperature"
	switch {
	case c <= 80:
		return origin.Published("temperature", 1, "", source), nil
	case !table.heat:
		return origin.Figure{}, fault("use chain, or let it cool", "%s C is too hot for %s: only chain is rated hot here", origin.Trim(c), table.name)
	case c <= 200:
		return origin.Published("temperature", 1, "", source), nil
	case c <= 300:
		return origin.Published("temperature", 0.9, "", source), nil
	case c <= 400:
		return origin.Published("temperature", 0.75, "", source), nil
	}
	return origin.Figure{}, fault("let it cool", "%s C is past 400 C, where a chain may not be used", origin.Trim(c))
}
