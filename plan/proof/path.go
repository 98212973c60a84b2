package proof

import (
	"fmt"
	"strconv"
	"strings"

	"sailby/tasks"
	"sailby/tasks/expand"
)

// path verifies that lags from start to start, one after the other, do not agree with the bounds: of the first
// and the last start, or, round a circle, of nothing. A step is minK or maxK, a wait of link K; or the name of an
// order variable, with ! where its second activity goes first.
func (c *checker) path(steps []string, v view) error {
	if len(steps) == 0 {
		return fmt.Errorf("a path of no steps")
	}
	begin, at, sum := -1, -1, int64(0)
	for _, text := range steps {
		from, to, w, err := c.step(text, v)
		if err != nil {
			return err
		}
		if at >= 0 && from != at {
			return fmt.Errorf("step %s begins at activity %d, not at %d", text, from, at)
		}
		if at < 0 {
			begin = from
		}
		at, sum = to, sum+int64(w)
	}
	if begin == at && sum > 0 {
		return nil
	}
	first, _ := v.act(begin)
	last, _ := v.act(at)
	if int64(first.lo)+sum <= int64(last.hi) {
		return fmt.Errorf("activity %d can start at %d, %d after activity %d", at, last.hi, sum, begin)
	}
	return nil
}

// step gives a step's activities and the least from the start of one to that of the other.
func (c *checker) step(text string, v view) (from, to int, w int32, err error) {
	if x, ok := c.vars[strings.TrimPrefix(text, "!")]; ok && c.means[x].kind == "order" {
		m := c.means[x]
		if text[0] == '!' {
			m.a, m.b = m.b, m.a
			if v.of(x).hi > 0 {
				return 0, 0, 0, fmt.Errorf("%s is not said to be 0", text[1:])
			}
		} else if v.of(x).lo < 1 {
			return 0, 0, 0, fmt.Errorf("%s is not said to be 1", text)
		}
		return m.a, m.b, c.rigid[m.a], nil
	}
	bad := fmt.Errorf("%q is no step", text)
	if len(text) < 4 {
		return 0, 0, 0, bad
	}
	k, err := strconv.Atoi(text[3:])
	if err != nil || k < 0 || k >= len(c.p.Links) {
		return 0, 0, 0, bad
	}
	l := &c.p.Links[k]
	if l.From < 0 || c.rigid[l.From] < 0 || c.rigid[l.To] < 0 {
		return 0, 0, 0, fmt.Errorf("%s is no lag of fixed length", text)
	}
	shift := int32(0)
	if l.FromEnd == tasks.Finish {
		shift += c.rigid[l.From]
	}
	if l.ToEnd == tasks.Finish {
		shift -= c.rigid[l.To]
	}
	switch {
	case text[:3] == "min" && l.Min > expand.NoMin && l.Min < furthest && (l.Count == nil || l.Min <= 0):
		return l.From, l.To, int32(l.Min) + shift, nil
	case text[:3] == "max" && l.Max < furthest && l.Max > -furthest && l.Last == nil && l.MaxCount == nil:
		return l.To, l.From, -int32(l.Max) - shift, nil
	}
	return 0, 0, 0, fmt.Errorf("%s is no lag of fixed length", text)
}
