package weld

import (
	"math"

	"sailby/tasks/origin"
)

// Day is how many metres a welder finishes in a day of hours with a face factor, all in: the
// figure by which the trade checks an estimate. Common practice on site: about 5 to 8 m of 6 to
// 8 mm fillet in ten hours. It is hours x 60 x face factor over the hands-on minutes of a metre,
// set-up left out (opening up and clearing up stand outside the face hours too).
//
// Errors: those of Work, and hours outside 1 to 24 or a face factor outside 0.05 to 1.
func Day(seam Seam, c Circumstances, hours, face float64) (origin.Figure, error) {
	if err := first(within("hours", hours, 1, 24, "h"), within("face factor", face, 0.05, 1, "")); err != nil {
		return origin.Figure{}, err
	}
	e, err := Work([]Seam{seam}, c)
	if err != nil {
		return origin.Figure{}, err
	}
	s := e.Seams[0]
	total := s.Length / math.Max(seam.Joint.share(), 1e-9) / 1000
	per := origin.Worked("hands-on a metre", e.Hours.Value/total, "min", "hands-on time / metres of seam", renamed(e.Hours, "hands-on time"),
		origin.Written("metres of seam", total, "m", seam.Joint.Origin))
	return origin.Worked("metres a day", hours*60*face/per.Value, "m", "hours x 60 x face factor / hands-on a metre",
		origin.Written("hours", hours, "h", origin.Origin{}), origin.House("face factor", face, "", "share of the open hours at the face"), per), nil
}

// SiteDay gives a day on site as Day does for a fillet of a leg in mm, horizontal, with usual
// settings of a process: ten hours, face factor 0.7.
func SiteDay(p Process, leg float64) (origin.Figure, error) {
	return Day(Seam{Joint: Joint{Type: Fillet, Leg: leg, Length: 1000}, Position: PB, Procedure: &Procedure{Process: p}}, Circumstances{Site: true}, 10, 0.7)
}
