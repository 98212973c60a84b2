package quantity

import (
	"fmt"
	"math"
)

// Arc is time with the arc burning, in minutes.
type Arc float64

// HandsOn is time that people work at the face, in minutes: arc time, cleaning, handling.
type HandsOn float64

// Clock is elapsed time that runs through nights, in minutes: cure, cooling, time before NDT.
type Clock float64

// Whole gives the minutes rounded up to the next whole one; a rounding error of less than a
// millionth of a minute is not rounded up.
func (h HandsOn) Whole() int { return int(math.Ceil(float64(h) - 1e-6)) }

// Whole gives the minutes rounded up, as for HandsOn.
func (c Clock) Whole() int { return int(math.Ceil(float64(c) - 1e-6)) }

// Span writes minutes as people say them: "45 min", "3 h", "1 h 30 min", "2 d 4 h".
// Negative spans have a leading minus. Days are used from 48 h on.
func Span(minutes int) string {
	if minutes < 0 {
		return "-" + Span(-minutes)
	}
	d, h, m := 0, minutes/60, minutes%60
	if minutes >= 48*60 {
		d, h = h/24, h%24
	}
	out := ""
	add := func(n int, u string) {
		if n == 0 {
			return
		}
		if out != "" {
			out += " "
		}
		out += fmt.Sprintf("%d %s", n, u)
	}
	add(d, "d")
	add(h, "h")
	add(m, "min")
	if out == "" {
		return "0 min"
	}
	return out
}

// Hours writes minutes as hours and minutes without days: "76 h 30 min".
func Hours(minutes int) string {
	if minutes < 0 {
		return "-" + Hours(-minutes)
	}
	h, m := minutes/60, minutes%60
	switch {
	case h == 0:
		return fmt.Sprintf("%d min", m)
	case m == 0:
		return fmt.Sprintf("%d h", h)
	}
	return fmt.Sprintf("%d h %d min", h, m)
}
