package sheets

import (
	"fmt"
	"math"

	"sailby/tasks/expand"
	"sailby/tasks/lift"
	"sailby/tasks/origin"
)

// The sketch of a lift: the assembly from the front, x to the right and z up, to scale, with its
// centre of gravity, the hook over it and the slings; where the file gives the lugs, also from above, y up the
// page, at the same scale. What it is drawn from stands beside it.

const (
	sketchWide = 104.0 // mm
	sketchTall = 84.0  // mm, at most
	planTall   = 104.0 // mm, at most, for both views
	viewGap    = 9.0   // mm between the views
	markSize   = 2.2   // mm from the middle of the mark of the centre of gravity to its edge
)

// scales are those that a drawing may have.
var scales = []float64{1, 2, 5, 10, 15, 20, 25, 30, 40, 50, 75, 100, 150, 200, 250, 500, 1000, 2000, 5000}

// sketch is a lift in its own millimetres.
type sketch struct {
	boxes     []expand.Outline
	cg        [3]float64
	hook      [2]float64 // x, z
	lugs      [][2]float64
	legs      []lift.Leg
	assumed   bool // lugs are not given: drawn at the ends
	low, high [2]float64
	plan      bool       // drawn from above as well
	lugsY     []float64  // of the lugs
	deep      [2]float64 // y from and to
}

// sketchOf collects what is drawn; ok is false where nothing has sizes.
func sketchOf(r *expand.Rigging, j expand.Judgement) (sketch, bool) {
	s := sketch{boxes: r.Outlines(j.Pieces), cg: j.Load.CG, legs: j.Legs}
	if len(s.boxes) == 0 {
		return s, false
	}
	s.low, s.high = [2]float64{math.Inf(1), math.Inf(1)}, [2]float64{math.Inf(-1), math.Inf(-1)}
	for _, b := range s.boxes {
		s.reach(b.Low[0], b.Low[2])
		s.reach(b.High[0], b.High[2])
	}
	if j.Total.Low == j.Total.High { // a stated mass has no shape of its own
		for i := range s.cg {
			s.cg[i] = (s.boxes[0].Low[i] + s.boxes[0].High[i]) / 2
		}
	}
	s.rigged(r.Slung())
	s.reach(s.cg[0], s.cg[2])
	s.fromAbove()
	return s, s.high[0]-s.low[0] > 0 && s.high[1]-s.low[1] > 0
}

// fromAbove readies the view from above, where the lugs are known.
func (s *sketch) fromAbove() {
	if len(s.lugsY) == 0 {
		return
	}
	s.plan, s.deep = true, [2]float64{s.cg[1], s.cg[1]}
	for _, y := range s.lugsY {
		s.deep = [2]float64{min(s.deep[0], y), max(s.deep[1], y)}
	}
	for _, b := range s.boxes {
		s.deep = [2]float64{min(s.deep[0], b.Low[1]), max(s.deep[1], b.High[1])}
	}
}

func (s *sketch) reach(x, z float64) {
	s.low[0], s.low[1] = min(s.low[0], x), min(s.low[1], z)
	s.high[0], s.high[1] = max(s.high[0], x), max(s.high[1], z)
}

// rigged puts hook and lugs where the slings of the file have them.
func (s *sketch) rigged(rig *lift.Rig) {
	if rig == nil || len(s.legs) == 0 {
		return
	}
	top, left, right := s.high[1], s.low[0], s.high[0]
	s.hook[0] = s.cg[0]
	if len(rig.Lugs) > 0 {
		for _, l := range rig.Lugs {
			s.lugs, s.lugsY = append(s.lugs, [2]float64{l[0], l[2]}), append(s.lugsY, l[1])
			s.hook[1] = max(s.hook[1], l[2]+rig.Rise)
		}
	} else {
		s.assumed = true
		angle := s.legs[0].Angle * math.Pi / 180
		out := min(s.cg[0]-left, right-s.cg[0])
		if s.legs[0].Length > 0 {
			out = min(out, s.legs[0].Length*math.Sin(angle))
		}
		if len(s.legs) == 1 {
			out = 0
		}
		up := (right - left) / 2
		if out > 0 && angle > 0.02 {
			up = out / math.Tan(angle)
		}
		s.hook[1] = top + up
		s.lugs = [][2]float64{{s.cg[0] - out, top}, {s.cg[0] + out, top}}
		if out == 0 {
			s.lugs = s.lugs[:1]
		}
	}
	s.reach(s.hook[0], s.hook[1])
	for _, l := range s.lugs {
		s.reach(l[0], l[1])
	}
}

// scale gives the first scale at which the sketch has room, and its height on paper.
func (s sketch) scale() (n, tall float64) {
	wide, high := s.high[0]-s.low[0], s.high[1]-s.low[1]
	most, gap := sketchTall-8, 0.0
	if s.plan {
		high += s.deep[1] - s.deep[0]
		most, gap = planTall-8-viewGap, viewGap
	}
	for _, n := range scales {
		if wide/n <= sketchWide-8 && high/n <= most {
			return n, high/n + 8 + gap
		}
	}
	n = math.Ceil(max(wide/(sketchWide-8), high/most))
	return n, high/n + 8 + gap
}

// draw lays the sketch at the left of the page with words beside it.
func (s sketch) draw(p *pen, words []string) {
	n, tall := s.scale()
	var lines []string
	room := p.wide() - sketchWide - 4
	view := "from the front: x to the right, z up."
	if s.plan {
		view = "from the front: x to the right, z up; below it from above: y up the page."
	}
	words = append([]string{fmt.Sprintf("To scale 1 : %s, %s", origin.Trim(n), view)}, words...)
	for _, w := range words {
		lines = append(lines, wrapText(w, body, false, room)...)
	}
	h := max(tall, float64(len(lines))*lineHeight(body))
	p.room(min(h, p.bottom-p.doc.Top-20))
	top := p.y
	x0 := p.left + (sketchWide-(s.high[0]-s.low[0])/n)/2
	at := func(x, z float64) (float64, float64) { return x0 + (x-s.low[0])/n, top + 4 + (s.high[1]-z)/n }
	for _, b := range s.boxes {
		x, y := at(b.Low[0], b.High[2])
		w, t := (b.High[0]-b.Low[0])/n, (b.High[2]-b.Low[2])/n
		p.put(Item{Kind: Shade, X: x, Y: y, W: max(w, 0.3), H: max(t, 0.3), Grey: 0.88})
	}
	for _, b := range s.boxes {
		x, y := at(b.Low[0], b.High[2])
		w, t := max((b.High[0]-b.Low[0])/n, 0.3), max((b.High[2]-b.Low[2])/n, 0.3)
		for _, l := range [][4]float64{{x, y, w, 0}, {x, y + t, w, 0}, {x, y, 0, t}, {x + w, y, 0, t}} {
			p.put(Item{Kind: Rule, X: l[0], Y: l[1], W: l[2], H: l[3], Stroke: thin})
		}
	}
	hx, hy := at(s.hook[0], s.hook[1])
	for _, l := range s.lugs {
		x, y := at(l[0], l[1])
		p.line(x, y, hx, hy, thick)
	}
	if len(s.lugs) > 0 {
		p.line(hx-1.5, hy, hx+1.5, hy, thick)
		p.line(hx, hy-3, hx, hy, thick)
	}
	cx, cy := at(s.cg[0], s.cg[2])
	p.cross(cx, cy)
	if s.plan {
		s.drawPlan(p, n, x0, top+4+(s.high[1]-s.low[1])/n+viewGap)
	}
	y := top
	for _, l := range lines {
		if y+lineHeight(body) > p.bottom {
			break
		}
		p.run(p.left+sketchWide+4, y+ascent*body*mmPerPoint, l, body, false)
		y += lineHeight(body)
	}
	p.y = min(top+h+1, p.bottom)
}

// drawPlan draws the view from above; x0 is the paper's x of the sketch's least x, top the paper's y of its greatest y.
func (s sketch) drawPlan(p *pen, n, x0, top float64) {
	at := func(x, y float64) (float64, float64) { return x0 + (x-s.low[0])/n, top + (s.deep[1]-y)/n }
	for _, b := range s.boxes {
		x, y := at(b.Low[0], b.High[1])
		w, t := max((b.High[0]-b.Low[0])/n, 0.3), max((b.High[1]-b.Low[1])/n, 0.3)
		p.put(Item{Kind: Shade, X: x, Y: y, W: w, H: t, Grey: 0.88})
	}
	for _, b := range s.boxes {
		x, y := at(b.Low[0], b.High[1])
		w, t := max((b.High[0]-b.Low[0])/n, 0.3), max((b.High[1]-b.Low[1])/n, 0.3)
		for _, l := range [][4]float64{{x, y, w, 0}, {x, y + t, w, 0}, {x, y, 0, t}, {x + w, y, 0, t}} {
			p.put(Item{Kind: Rule, X: l[0], Y: l[1], W: l[2], H: l[3], Stroke: thin})
		}
	}
	cx, cy := at(s.cg[0], s.cg[1])
	for i, l := range s.lugs {
		x, y := at(l[0], s.lugsY[i])
		p.line(x, y, cx, cy, thick)
		p.run(x-0.8, y-1.2, fmt.Sprint(i+1), body, true)
	}
	p.cross(cx, cy)
}

// cross marks a centre of gravity.
func (p *pen) cross(cx, cy float64) {
	p.line(cx-markSize, cy, cx+markSize, cy, thick)
	p.line(cx, cy-markSize, cx, cy+markSize, thick)
	for _, d := range [][4]float64{{-1, 0, 0, -1}, {0, -1, 1, 0}, {1, 0, 0, 1}, {0, 1, -1, 0}} {
		const r = markSize * 0.7
		p.line(cx+d[0]*r, cy+d[1]*r, cx+d[2]*r, cy+d[3]*r, thin)
	}
}

// line draws a straight line between two points.
func (p *pen) line(x1, y1, x2, y2, stroke float64) {
	if x2 < x1 {
		x1, y1, x2, y2 = x2, y2, x1, y1
	}
	p.put(Item{Kind: Rule, X: x1, Y: y1, W: x2 - x1, H: y2 - y1, Stroke: stroke})
}
