package lift

import (
	"fmt"
	"math"
)

// trips gives the search's answer, each bed packed and a trailer's load moved for its nose.
func (s *stowing) trips() []Trip {
	var out []Trip
	for k, list := range s.load {
		if len(list) == 0 {
			continue
		}
		t := s.slots[k]
		v := s.vehicles[t.vehicle]
		stowed, _ := pack(s.goods, list, v)
		trip := Trip{Vehicle: t.vehicle, Number: t.number, Stowed: stowed, Mass: s.mass[k], Payload: t.room}
		balance(s.goods, &trip, v)
		out = append(out, trip)
	}
	return out
}

// balance moves all of a trailer's load towards the tail until the nose is within its greatest.
func balance(goods []Goods, t *Trip, v Vehicle) {
	if v.Axle == 0 {
		return
	}
	t.Nose = nose(goods, *t, v)
	if v.NoseGreatest == 0 || t.Nose <= v.NoseGreatest {
		return
	}
	free := v.Length
	mass := 0.0
	for _, s := range t.Stowed {
		if !s.Loose {
			free = math.Min(free, v.Length-s.X-s.Length)
			mass += goods[s.Goods].Mass
		}
	}
	if free <= 0 || mass <= 0 {
		return
	}
	by := math.Min(free, (t.Nose-v.NoseGreatest)*(v.Axle+v.Hitch)/mass+1)
	for i := range t.Stowed {
		if !t.Stowed[i].Loose {
			t.Stowed[i].X += by
		}
	}
	t.Nose = nose(goods, *t, v)
}

// nose gives what the goods put on the hitch, kg: moments about the axle. Loose things count over it.
func nose(goods []Goods, t Trip, v Vehicle) float64 {
	sum := 0.0
	for _, s := range t.Stowed {
		if !s.Loose {
			sum += goods[s.Goods].Mass * (v.Axle - s.X - s.Length/2)
		}
	}
	return sum / (v.Axle + v.Hitch)
}

// warn lists what the plan leaves to look at.
func (s *stowing) warn(trips []Trip) []string {
	var out []string
	loose := 0
	for _, t := range trips {
		v := s.vehicles[t.Vehicle]
		for _, d := range t.Stowed {
			if d.Loose {
				loose++
			} else if over := d.X + d.Length - v.Length; over > 1000+gap {
				out = append(out, fmt.Sprintf("%q stands out %.0f mm behind %s: over 1 m must be marked, over 2 m has further rules", s.goods[d.Goods].Name, over, v.Name))
			}
		}
		if v.Axle > 0 {
			least := math.Max(v.NoseLeast, 25)
			if t.Nose < least || v.NoseGreatest > 0 && t.Nose > v.NoseGreatest {
				out = append(out, fmt.Sprintf("%s trip %d: the goods put %.0f kg on the hitch, wanted %.0f to %s; move them by hand", v.Name, t.Number, t.Nose, least, limitWord(v.NoseGreatest)))
			}
		}
	}
	if loose > 0 {
		words := "%d things have no sizes: their room is not checked"
		if loose == 1 {
			words = "%d thing has no sizes: its room is not checked"
		}
		out = append(out, fmt.Sprintf(words, loose))
	}
	if !s.strict {
		out = append(out, "some things wanted early travel on a later trip: no split in the order of use was found")
	}
	return out
}

func limitWord(v float64) string {
	if v == 0 {
		return "what car and hitch allow"
	}
	return fmt.Sprintf("%.0f kg", v)
}
