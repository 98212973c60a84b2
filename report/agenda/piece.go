package agenda

import (
	"fmt"
	"slices"
	"strings"
	"time"

	"sailby/tasks/hours"
)

// A remnant is a piece of work that is shorter than remnant minutes: nobody sets out for that. Where it
// is parted from the rest of its step by a pause of at most meal minutes, the two are written as one.
const (
	remnant = 5
	meal    = 120
)

// Merged joins remnants with the piece of the same step before or after them in one shift, over a pause
// in which nobody of them works on anything else: 12:28-12:30 and 13:00-14:10 become 12:28-14:10 with
// the pause 12:30-13:00. Starts and ends are never moved, so that no time is later than a deadline or
// earlier than a wait allows. Entries keep their order; what is given is not changed.
func Merged(list []Entry) []Entry {
	out := make([]Entry, 0, len(list))
	for _, e := range list {
		into := -1
		for i := range out {
			if joins(out[i], e, list) {
				into = i
			}
		}
		if into < 0 {
			out = append(out, e)
			continue
		}
		o := &out[into]
		o.Pauses = append(slices.Clone(o.Pauses), hours.Span{From: o.To, To: e.From})
		o.To, o.Piece, o.Last = e.To, e.Piece, e.Last
	}
	return out
}

// joins says whether e goes on what o is, with one of them a remnant.
func joins(o, e Entry, list []Entry) bool {
	gap := hours.Span{From: o.To, To: e.From}
	long := o.Len()
	for _, p := range o.Pauses {
		long -= p.Len()
	}
	if o.Step != e.Step || o.Watch || e.Watch || e.Piece != o.Piece+1 || gap.Len() <= 0 || gap.Len() > meal ||
		long >= remnant && e.Len() >= remnant || !slices.Equal(o.People, e.People) {
		return false
	}
	return !slices.ContainsFunc(list, func(x Entry) bool {
		return x.Overlaps(gap) && slices.ContainsFunc(x.People, func(who string) bool { return slices.Contains(e.People, who) })
	})
}

// Sliver says of a piece that is shorter than remnant minutes, parted from the rest of its step by the end of a shift, how
// short it is: "only 2 min here". It is printed as it is planned, since what comes after it may wait for it; "" for
// any other piece.
func Sliver(e Entry) string {
	if e.Watch || !e.From0 && !e.Goes || e.Len() >= remnant {
		return ""
	}
	return fmt.Sprintf("only %d min here", e.Len())
}

// Breaks writes the pauses of a merged entry: "break 12:30-13:00"; "" where there are none.
func Breaks(e Entry, zone *time.Location) string {
	var parts []string
	for _, p := range e.Pauses {
		parts = append(parts, Within(p, zone))
	}
	if len(parts) == 0 {
		return ""
	}
	return "break " + strings.Join(parts, " and ")
}
