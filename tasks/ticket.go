package tasks

import "strings"

// Covers says whether somebody who holds t may do what need asks for. A need without a name asks
// for nobody in particular. Names are equal but for capitals. A weld ticket also covers the need's
// process, positions, joints and thickness; an empty field of the need asks nothing of them, and
// an empty field of the ticket allows any. A need of one thickness leaves ThickTo at zero.
func (t Ticket) Covers(need Ticket) bool {
	if need.Name == "" {
		return true
	}
	if !strings.EqualFold(t.Name, need.Name) {
		return false
	}
	if !strings.EqualFold(need.Name, "weld") {
		return true
	}
	return (need.Process == "" || t.Process == "" || strings.EqualFold(t.Process, need.Process)) &&
		listed(t.Positions, need.Positions) && listed(t.Joints, need.Joints) && t.coversThickness(need)
}

// listed says whether all words asked for are held; an empty list, or "all" in it, holds any.
func listed(held, asked []string) bool {
	for _, a := range asked {
		ok := len(held) == 0
		for _, h := range held {
			ok = ok || strings.EqualFold(h, a) || strings.EqualFold(h, "all")
		}
		if !ok {
			return false
		}
	}
	return true
}

func (t Ticket) coversThickness(need Ticket) bool {
	thickest := max(need.ThickFrom, need.ThickTo)
	if thickest == 0 {
		return true
	}
	thinnest := need.ThickFrom
	if thinnest == 0 {
		thinnest = thickest
	}
	return thinnest >= t.ThickFrom && (t.ThickTo == 0 || thickest <= t.ThickTo)
}
