package proof

import (
	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// tail is one of the two tails of a pair.
type tail struct {
	pair  int
	first bool
}

// passed gives the first minute by which n minutes of set have passed since t, with more = 1 the last one before
// which no more than n have passed.
func passed(set hours.Set, t, n, more int) int64 {
	for _, s := range set {
		from := max(t, int(s.From))
		if from >= int(s.To) {
			continue
		}
		if room := int(s.To) - from; room >= n+more {
			return int64(from + n)
		} else {
			n -= room
		}
	}
	return problem.Inf
}

// heat gives, for each minute t, the last minute that a longest wait which shortens with heat allows for any
// start of it up to t.
func (b *book) heat(l *problem.Link) []int32 {
	if b.curves[l] == nil {
		list := make([]int32, b.p.End+1)
		most := int32(-problem.Inf)
		for t := range list {
			most = max(most, int32(l.Last(t)))
			list[t] = most
		}
		b.curves[l] = list
	}
	return b.curves[l]
}

// clear gives, for each minute t, the first minute at which the tail of a pair's first or second activity is
// over, for any finish of it from t on.
func (b *book) clear(k tail) []int32 {
	if b.tails[k] == nil {
		over := b.p.Pairs[k.pair].TailA
		if !k.first {
			over = b.p.Pairs[k.pair].TailB
		}
		list := make([]int32, b.p.End+1)
		least := int32(problem.Inf)
		for t := b.p.End; t >= 0; t-- {
			n := t
			if over != nil {
				n = over(t)
			}
			least = min(least, int32(n))
			list[t] = least
		}
		b.tails[k] = list
	}
	return b.tails[k]
}
