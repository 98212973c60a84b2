package sheets

import (
	"slices"
	"strings"

	"sailby/report/agenda"
)

// form is how a shift is laid out: with room, drawn together, drawn together as far as can still
// be read, or so and below another.
type form int

const (
	loose form = iota
	compact
	dense
	followed
)

// between is the room in mm that two shifts on one page keep between them.
const between = 9.0

// allShifts prints a sheet for each shift. Short days at home follow each other on one page.
func (k *pack) allShifts() {
	list := slices.Clone(k.shifts)
	if k.opt.SiteOnly {
		list = slices.DeleteFunc(list, func(s *agenda.Shift) bool { return !s.Site })
	}
	for i := 0; i < len(list); {
		n, used := 1, k.height(list[i], compact)
		for i+n < len(list) && !list[i].Site && !list[i+n].Site {
			more := between + k.height(list[i+n], followed)
			if used+more > k.p.bottom-k.p.doc.Top-headRoom {
				break
			}
			used += more
			n++
		}
		k.shared(list[i : i+n])
		i += n
	}
}

// shared prints shifts on one page; a single one may run on, and is drawn together where that
// saves a page.
func (k *pack) shared(list []*agenda.Shift) {
	var heads, names []string
	for _, s := range list {
		heads, names = append(heads, dayName(s)), append(names, s.Date.String())
	}
	head := heads[0]
	if s := list[0]; s.Site {
		head += ", " + agenda.DayOf(k.work, s)
	} else if len(list) > 1 {
		head += " to " + heads[len(heads)-1]
	}
	k.p.begin(head, "shift "+strings.Join(names, ", "), true)
	how := k.formOf(list[0])
	if len(list) > 1 {
		how = compact
	}
	for i, s := range list {
		if i > 0 {
			how = followed
			k.p.y += between / 2
			k.p.rule(thick)
			k.p.y += between / 2
		}
		k.shift(s, how)
	}
}

// formOf gives the roomiest form in which a shift takes no more pages than in the tightest.
func (k *pack) formOf(s *agenda.Shift) form {
	least, _ := k.trial(s, dense)
	for _, how := range []form{loose, compact} {
		if n, _ := k.trial(s, how); n <= least {
			return how
		}
	}
	return dense
}

// height gives the height of a shift drawn together in mm, more than a page where it takes more
// than one.
func (k *pack) height(s *agenda.Shift, how form) float64 {
	pages, h := k.trial(s, how)
	if pages > 1 {
		return k.p.doc.Height
	}
	return h
}

// trial lays a shift out on paper that is thrown away and gives the pages it takes and the height
// in mm on the last.
func (k *pack) trial(s *agenda.Shift, how form) (pages int, height float64) {
	t := *k
	doc := *k.p.doc
	doc.Pages = nil
	t.p = newPen(&doc)
	t.p.begin("", "", true)
	top := t.p.y
	t.shift(s, how)
	return len(doc.Pages), t.p.y - top
}
