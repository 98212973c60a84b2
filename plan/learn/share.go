package learn

import "math/rand/v2"

// The search has four means and gives each a share of its ticks: a free run for the proof and for
// plans; slices of the best plan; new schedules; and low runs that refute finishes near the bound. The
// shares of those that only find plans sink while they find none.
type means uint8

const (
	freely means = iota
	slicing
	breeding
	lowly
	allMeans
)

var shares = [allMeans]float64{freely: 1, slicing: 1, breeding: 0.6, lowly: 0.3}

// least is what is left of the share of slicing and breeding in the end. Where the bound is far below the
// best plan of an open problem, no proof is near: then the means that find plans keep half of theirs, and
// the others have farShare of theirs.
const (
	least    = 0.12
	farLeast = 0.5
	farShare = 0.3
	farParts = 10 // far: more than one part in so many
)

// purse keeps account of the ticks.
type purse struct {
	spent [allMeans]float64 // ticks over shares
	since [allMeans]float64 // ticks since the last better plan
	able  [allMeans]bool
}

// next gives the means that has had the least for its share.
func (p *purse) next() means {
	best := freely
	for m := freely; m < allMeans; m++ {
		if p.able[m] && p.spent[m] < p.spent[best] {
			best = m
		}
	}
	return best
}

// pay notes what a turn has cost; patience is the number of ticks after which a means that has found
// nothing has half of its share left.
func (p *purse) pay(m means, ticks int64, better, far bool, patience float64) {
	if better {
		p.since = [allMeans]float64{}
	}
	share, keep := shares[m], least
	if far {
		keep = farLeast
	}
	switch {
	case m == slicing || m == breeding:
		p.since[m] += float64(ticks)
		share *= max(keep, patience/(patience+p.since[m]))
	case far:
		share *= farShare
	}
	p.spent[m] += float64(ticks) / share
}

// minimise looks for the best plan.
func (s *search) minimise() Result {
	if !s.begin() {
		return s.result()
	}
	var b *breeder
	if h := newShop(s.model); h != nil {
		b = newBreeder(h, s.opt.Seed)
	}
	var f *fitter
	if b == nil {
		f = newFitter(s.model, s.opt.Seed)
	}
	c := &slicer{rnd: rand.New(rand.NewPCG(s.opt.Seed, 29)), size: firstSlice}
	var p purse
	p.able[freely] = true
	turn, limit, low := 0, int64(firstRun), lowRun{step: 1, limit: firstRun}
	for round := 0; ; round++ {
		p.able[slicing] = len(s.base) > 0
		p.able[breeding] = b != nil || f != nil && (len(s.base) == 0 || f.attempts < fitInAll)
		p.able[lowly] = s.now[s.end] < s.value-2
		m := p.next()
		if p.able[breeding] && round == 0 {
			m = breeding
		}
		ticks, value := s.ticks, s.value
		var o outcome
		switch m {
		case freely:
			turn++
			if o = s.run(nil, limit, turn%earlyEvery == 2); o == tired {
				limit += limit / growth
			}
		case slicing:
			o = s.elsewhere(c, b)
		case breeding:
			if b != nil {
				o = s.breed(b)
			} else {
				o = s.fit(f)
			}
		case lowly:
			o = low.run(s)
		}
		if o == over || o == stopped {
			return s.result()
		}
		if b != nil && m != breeding && s.value < value {
			b.welcome(s.starts)
			if b.best.end < s.value && !s.adopt(b.best) {
				return s.result()
			}
		}
		far := b != nil && (s.value-s.now[s.end])*farParts > s.value
		p.pay(m, s.ticks-ticks, s.value < value, far, patience*float64(len(s.start)))
		if int64(len(s.refs)) > s.room {
			s.reduce()
			s.room += keptStep
		}
	}
}

// earlyEvery: one in so many free runs branches on the starts in the order of time. One in two closed PSP37 of
// RCPSP/max j30 in 4.8 s, one in sixteen in 2.8 s.
const earlyEvery = 8

// patience is the number of ticks for each activity after which half of a share is left.
const patience = 200_000

// lowRun is the search for a higher bound, in steps that double while they succeed. It goes with and
// without the energy rules: whichever has had fewer ticks for each unit by which it raised the bound.
type lowRun struct {
	step  int32
	limit int64
	spent [2]int64 // ticks: without, with the energy rules
	won   [2]int64 // units of the bound
}

func (l *lowRun) run(s *search) outcome {
	with := 0
	if l.spent[1]*(l.won[0]+1) < l.spent[0]*(l.won[1]+1) {
		with = 1
	}
	s.energize(with == 1)
	ticks, bound := s.ticks, s.now[s.end]
	target := min(bound+l.step-1, s.value-2)
	o := s.run([]fact{{s.end ^ 1, -target}}, l.limit, false)
	s.energize(false)
	l.spent[with] += s.ticks - ticks
	l.won[with] += int64(s.now[s.end] - bound)
	switch o {
	case refused:
		l.step = min(2*l.step, 1<<20)
	case tired:
		if l.step == 1 {
			l.limit += l.limit / growth
		}
		l.step = max(1, l.step/2)
	}
	return o
}
