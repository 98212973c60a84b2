package lift

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// Sea is the sea area of a crossing, by the greatest wave height that it is known for.
type Sea uint8

// The sea areas of the IMO guidelines; NoSea is road only.
const (
	NoSea Sea = iota
	SeaA      // up to 8 m: Baltic, Mediterranean, Black Sea
	SeaB      // 8 to 12 m: North Sea, English Channel, Skagerrak
	SeaC      // unrestricted
)

// String names the sea area; NoSea is "road".
func (s Sea) String() string { return [...]string{"road", "sea A", "sea B", "sea C"}[min(s, SeaC)] }

// Strap is how a load is tied down over its top.
type Strap struct {
	STF   float64 // daN, pretension of the ratchet (S_TF on its label); 0 is 400
	LC    float64 // daN, lashing capacity; 0 is 2500
	Angle float64 // degrees from the bed, 30 to 90; 0 is 90
}

// Cargo is a load as it stands on a bed.
type Cargo struct {
	On       Surface // "" is the worst of the table
	Friction float64 // in place of that of On
	Blocked  bool    // held against the headboard: no straps needed forward
	Sea      Sea
	Old      bool // EN 12195-1 of 2003 in place of 2010
}

// Direction is what one direction of the trip asks.
type Direction struct {
	Name   string  // "forward, road"
	G      float64 // share of the weight that it pushes with
	Slide  int     // straps over the top against sliding
	Tip    int     // straps against tipping
	Figure origin.Figure
}

// SecureResult is how many straps of one kind a load takes over its top.
type SecureResult struct {
	Straps     int // the greatest of all directions, at least 2
	Governs    string
	Edition    string // of EN 12195-1, which changes the number up to fifteen times
	Directions []Direction
	HoldsMost  float64 // daN that one strap over the top holds back at most
	Figure     origin.Figure
	Warnings   []string
}

// fewestStraps is the practical least over any load.
const fewestStraps = 2

// Secure counts the straps over the top of a load by EN 12195-1.
//
//	2010: n >= fs (c - mu cz) m g / (2 mu sin a S_TF)
//	2003: n >= (c - mu cz) m g / (1.5 mu_D sin a S_TF), mu_D = 0.7 mu
//
// Tipping: the moment of c m g about the edge, less that of cz m g, over what a strap holds down
// at half the width. At sea cz is 1 sideways and less lengthwise.
//
// Special cases are:
//
//	friction that holds by itself: 0 by the sum, 2 in practice
//	no sizes of the load: tipping is not checked, and a warning says so
//
// Errors: numbers out of range, an unknown surface or sea area.
func Secure(l Load, c Cargo, s Strap) (SecureResult, error) {
	if err := l.valid(); err != nil {
		return SecureResult{}, err
	}
	s = s.filled()
	if err := checkAll(check{"the strap's S_TF", s.STF, 1, 1e5, "daN"}, check{"the strap's LC", s.LC, 1, 1e6, "daN"},
		check{"the strap's angle", s.Angle, 30, 90, "degrees from the bed"}, check{"the friction", c.Friction, 0, 1.5, ""}); err != nil {
		return SecureResult{}, err
	}
	if c.Sea > SeaC {
		return SecureResult{}, fault("sea areas are A, B and C", "the sea area is not a known one")
	}
	mu, err := c.friction()
	if err != nil {
		return SecureResult{}, err
	}
	out := SecureResult{Straps: fewestStraps, Governs: "the practical least", Edition: "EN 12195-1:2010"}
	k := 2.0
	if c.Old {
		out.Edition, k = "EN 12195-1:2003", 1.5
		dyn := origin.Published("dynamic share of friction", 0.7, "", "EN 12195-1:2003")
		mu = origin.Worked("dynamic friction", mu.Value*dyn.Value, "", "friction x 0.7", mu, dyn)
	}
	out.HoldsMost = k * mu.Value * math.Sin(s.Angle*math.Pi/180) * s.STF
	top := given("the practical least", fewestStraps, "straps")
	for _, d := range c.pushes() {
		dir, err := d.straps(l, mu, s, k, c.Old)
		if err != nil {
			return SecureResult{}, err
		}
		out.Directions = append(out.Directions, dir)
		if n := max(dir.Slide, dir.Tip); n > out.Straps {
			out.Straps, out.Governs, top = n, dir.Name, dir.Figure
		}
	}
	out.Figure = origin.Worked("straps over the top", float64(out.Straps), "", out.Edition+", the worst direction", top)
	out.Warnings = c.warn(l, s)
	return out, nil
}

func (s Strap) filled() Strap {
	if s.STF == 0 {
		s.STF = 400
	}
	if s.LC == 0 {
		s.LC = 2500
	}
	if s.Angle == 0 {
		s.Angle = 90
	}
	return s
}

// pushed is one direction with its accelerations in shares of the weight.
type pushed struct {
	name     string
	c, cz    origin.Figure
	fs       float64
	sideways bool
}

// pushes lists the directions of a trip.
func (c Cargo) pushes() []pushed {
	const road = "EN 12195-1, road"
	const sea = "CTU Code chapter 5, sea"
	one := origin.Published("weight that stays on the bed", 1, "", road)
	out := []pushed{
		{"backward, road", origin.Recalled("backward", 0.5, "", road), one, 1.1, false},
		{"sideways, road", origin.Published("sideways", 0.5, "", road), one, 1.1, true},
	}
	if !c.Blocked {
		out = append([]pushed{{"forward, road", origin.Published("forward", 0.8, "", road), one, 1.25, false}}, out...)
	}
	if c.Sea != NoSea {
		i := c.Sea - 1
		side := [...]float64{0.5, 0.7, 0.8}[i]
		long, stays := [...]float64{0.3, 0.3, 0.4}[i], [...]float64{0.5, 0.3, 0.2}[i]
		out = append(out,
			pushed{"sideways, " + c.Sea.String(), origin.Recalled("sideways", side, "", sea), origin.Recalled("weight that stays on the bed", 1, "", sea), 1.1, true},
			pushed{"lengthwise, " + c.Sea.String(), origin.Recalled("lengthwise", long, "", sea), origin.Recalled("weight that stays on the bed", stays, "", sea), 1.1, false})
	}
	return out
}

// maxStraps is where a count stops meaning anything.
const maxStraps = 100000

// straps counts what one direction takes.
func (d pushed) straps(l Load, mu origin.Figure, s Strap, k float64, old bool) (Direction, error) {
	fs := origin.Published("safety factor", d.fs, "", "EN 12195-1:2010 examples")
	if d.fs != 1.1 {
		fs = origin.Recalled("safety factor", d.fs, "", "EN 12195-1:2010")
	}
	if old {
		fs = origin.Figure{Name: "safety factor", Value: 1, Origin: origin.Origin{Kind: origin.Memory, Source: "EN 12195-1:2003: in the pretension factor"}}
	}
	heavy := l.Heavy()
	sin := math.Sin(s.Angle * math.Pi / 180)
	force := heavy.Value * Gravity / 10 // daN
	slide := fs.Value * (d.c.Value - mu.Value*d.cz.Value) * force / (k * mu.Value * sin * s.STF)
	out := Direction{Name: d.name, G: d.c.Value, Slide: countUp(slide)}
	stf, ang := given("S_TF", s.STF, "daN"), given("strap angle from the bed", s.Angle, "deg")
	out.Figure = origin.Worked("straps against sliding "+d.name, math.Max(0, slide), "", "fs (c - mu cz) m g / (k mu sin a S_TF)",
		heavy, d.c, d.cz, mu, fs, stf, ang, given("k", k, ""))
	if tip, ok := d.tip(l, s, force, fs.Value, sin); ok {
		out.Tip = countUp(tip)
		if out.Tip > out.Slide {
			out.Figure = origin.Worked("straps against tipping "+d.name, math.Max(0, tip), "", "fs m g (c h - cz b) / (w sin a F)",
				heavy, d.c, d.cz, fs, stf, ang, given("height of the centre of gravity", l.high(), "mm"))
		}
	}
	if out.Slide > maxStraps || out.Tip > maxStraps {
		return out, fault("block it, or tie it directly", "%s it would take more straps than there are", d.name)
	}
	return out, nil
}

// countUp rounds a number of straps up; what friction holds takes none.
func countUp(n float64) int {
	if n <= 0 {
		return 0
	}
	return int(math.Ceil(math.Min(n, maxStraps+1) - 1e-9))
}

// high gives the height of the centre of gravity above the bed: half of the height, as the
// centre of gravity is in the axes of the parts and not of the bed.
func (l Load) high() float64 { return l.Height / 2 }

// tip gives the straps against tipping about the edge of the load; ok is false without its sizes.
// Sideways on the road the harsher of 0.5 g with S_TF and 0.6 g with half of LC counts (EN 12195-1).
func (d pushed) tip(l Load, s Strap, force, fs, sin float64) (float64, bool) {
	width := l.Length
	if d.sideways {
		width = l.Width
	}
	if width <= 0 || l.Height <= 0 {
		return 0, false
	}
	count := func(c, f float64) float64 {
		return fs * force * (c*l.high() - d.cz.Value*width/2) / (width * sin * f)
	}
	n := count(d.c.Value, s.STF)
	if d.sideways && d.name == "sideways, road" {
		n = math.Max(n, count(0.6, 0.5*s.LC))
	}
	return n, true
}

// warn lists what the count leaves open.
func (c Cargo) warn(l Load, s Strap) []string {
	out := []string{fmt.Sprintf("straps over the top, S_TF %s daN; a strap tied directly holds up to its LC of %s daN", origin.Trim(s.STF), origin.Trim(s.LC))}
	if l.Width <= 0 || l.Height <= 0 || l.Length <= 0 {
		out = append(out, "tipping not checked: the load's sizes are not known")
	} else {
		out = append(out, "tipping checked with the centre of gravity at half of the height")
	}
	if c.On == "" && c.Friction == 0 {
		out = append(out, "surfaces not named: the worst friction of the table is taken; a rubber mat changes the count")
	}
	if c.Sea != NoSea {
		out = append(out, "sea leg: straps work loose in a swell; tighten them before sailing, and ask the ferry for lashing rings")
	}
	return out
}
