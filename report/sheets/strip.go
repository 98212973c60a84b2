package sheets

import (
	"time"

	"sailby/report/agenda"
	"sailby/tasks/hours"
)

// bar is a stretch of time on a strip with a word on it, if there is room.
type bar struct {
	hours.Span
	word  string
	watch bool // a fire watch: drawn with a broken outline
}

// lane is one line of a strip.
type lane struct {
	name string
	open hours.Set // grey: there, on shift, open
	bars []bar
}

const (
	laneLabel = 38.0 // mm for the names
	barHeight = 6.4
	tickRoom  = 11.5 // least distance of clock labels, mm
	axisEnd   = 6.0  // mm kept free for half of the last label
)

// strip draws lanes over a time axis with a tick for each hour. A strip longer than a page goes
// on on the next with its axis.
func (p *pen) strip(span hours.Span, zone *time.Location, lanes []lane) {
	if span.Len() == 0 || len(lanes) == 0 {
		return
	}
	from, to := wholeHours(span, zone)
	scale := (p.wide() - laneLabel - axisEnd) / float64(to-from)
	x := func(m hours.Minute) float64 {
		return p.left + laneLabel + float64(min(max(m, from), to)-from)*scale
	}
	axis := func() {
		step := hours.Minute(60)
		for float64(step)*scale < tickRoom {
			step *= 2
		}
		base, free := p.y+ascent*body*mmPerPoint, p.left
		for m := from; m <= to; m += 60 {
			on := (m-from)%step == 0
			short := 1.2
			if on {
				s := agenda.Clock(m, zone)
				w := width(s, body, false)
				if left := x(m) - w/2; left >= free && left+w <= p.right {
					p.run(left, base, s, body, false)
					free = left + w + 1
				}
				short = 2
			}
			if float64(60)*scale >= 2 || on {
				p.put(Item{Kind: Rule, X: x(m), Y: p.y + lineHeight(body) + 2 - short, H: short, Stroke: thin})
			}
		}
		p.y += lineHeight(body) + 2
		p.put(Item{Kind: Rule, X: p.left + laneLabel, Y: p.y, W: p.wide() - laneLabel - axisEnd, Stroke: thin})
	}
	p.room(lineHeight(body) + 2 + 2*(barHeight+2.4))
	axis()
	p.repeat = axis
	for _, l := range lanes {
		p.lane(l, x)
	}
	p.repeat = nil
	p.y += 1.5
}

// lane draws one line of a strip.
func (p *pen) lane(l lane, x func(hours.Minute) float64) {
	names := wrapText(l.name, body, false, laneLabel-2)
	if len(names) > 3 {
		names = append(names[:2:2], fitted(names[2]+"...", body, false, laneLabel-2))
	}
	h := max(barHeight+1.6, float64(len(names))*lineHeight(body)+0.6)
	p.room(h)
	for i, s := range names {
		top := p.y + (h-float64(len(names))*lineHeight(body))/2
		p.run(p.left, top+float64(i)*lineHeight(body)+ascent*body*mmPerPoint, s, body, false)
	}
	top := p.y + (h-barHeight)/2
	for _, s := range l.open {
		if w := x(s.To) - x(s.From); w > 0 {
			p.put(Item{Kind: Shade, X: x(s.From), Y: top, W: w, H: barHeight, Grey: 0.86})
		}
	}
	for _, b := range l.bars {
		w := x(b.To) - x(b.From)
		if w <= 0 {
			continue
		}
		p.put(Item{Kind: Shade, X: x(b.From), Y: top, W: w, H: barHeight, Grey: 1})
		p.put(Item{Kind: Box, X: x(b.From), Y: top, W: w, H: barHeight, Stroke: 0.4, Dash: b.watch})
		if ww := width(b.word, body, true); ww+0.8 <= w {
			p.run(x(b.From)+(w-ww)/2, top+barHeight/2+0.36*body*mmPerPoint, b.word, body, true)
		}
	}
	p.y += h
	p.put(Item{Kind: Rule, X: p.left + laneLabel, Y: p.y, W: p.wide() - laneLabel - axisEnd, Stroke: 0.1})
}

// wholeHours widens a span to whole hours of the wall clock.
func wholeHours(s hours.Span, zone *time.Location) (from, to hours.Minute) {
	from = s.From - hours.Minute(hours.MinuteOfDay(s.From, zone)%60)
	to = s.To
	if n := hours.MinuteOfDay(s.To, zone) % 60; n > 0 {
		to += hours.Minute(60 - n)
	}
	return from, max(to, from+60)
}

// windowStrip draws the window on one axis of days: what is worked at the site, the planned
// finish, and the time in hand.
func (p *pen) windowStrip(span hours.Span, finish hours.Minute, worked hours.Set, zone *time.Location) {
	if span.Len() == 0 {
		return
	}
	end := max(span.To, finish)
	scale := p.wide() / float64(end-span.From)
	x := func(m hours.Minute) float64 { return p.left + float64(min(max(m, span.From), end)-span.From)*scale }
	p.room(24)
	base := p.y + ascent*body*mmPerPoint
	free := p.left // the next day's name goes right of this
	first := hours.DateOf(span.From.In(zone))
	for d := first; ; d = d.Add(1) {
		at, _ := hours.Instant(d, 0, zone)
		if at >= end {
			break
		}
		at = max(at, span.From)
		p.put(Item{Kind: Rule, X: x(at), Y: p.y, H: lineHeight(body) + 11, Stroke: thin})
		name := time.Date(d.Year, d.Month, d.Day, 12, 0, 0, 0, time.UTC).Format("Mon 2")
		next, _ := hours.Instant(d.Add(1), 0, zone)
		if w := width(name, body, false); x(at)+0.8 >= free && x(at)+0.8+w <= min(p.right, x(min(next, end))+0.01) {
			p.run(x(at)+0.8, base, name, body, false)
			free = x(at) + 1.6 + w
		}
	}
	p.y += lineHeight(body) + 1
	const h = 8.0
	p.put(Item{Kind: Box, X: p.left, Y: p.y, W: x(span.To) - p.left, H: h, Stroke: thick})
	for _, s := range worked {
		if w := x(s.To) - x(s.From); w > 0 {
			p.put(Item{Kind: Shade, X: x(s.From), Y: p.y + 1.2, W: w, H: h - 2.4, Grey: 0.35})
		}
	}
	if finish > span.From {
		p.put(Item{Kind: Rule, X: x(finish), Y: p.y - 1.5, H: h + 3, Stroke: 1})
	}
	p.y += h + 2.5
}
