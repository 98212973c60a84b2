package lift

import (
	"fmt"
	"strings"
)

// CarriageRule is one limit on what a vehicle may carry, as the job file gives it for a ferry, a
// road or a tunnel. It is flagged, never decided: the operator's answer counts.
type CarriageRule struct {
	Name      string   // "ferry, maintenance gases"
	Class     string   // the goods that it is about, as in Goods.Class
	Most      float64  // greatest amount in one vehicle, in Unit; 0 is not limited, below 0 is none at all
	Unit      string   // "L", "bottles", "kg gross"
	Heaviest  float64  // kg of one piece; 0 is not limited
	Tallest   float64  // mm of one piece; 0 is not limited
	NotWith   []string // classes that may not be in the same vehicle
	Says      string   // what must be done: "declare 24 h ahead"
	AskBefore bool     // the operator must be asked in any case
}

// Band is one length and height band that a ferry books vehicles by.
type Band struct {
	Name   string
	Length float64 // mm, up to
	Height float64 // mm, up to; 0 is any
}

// Carriage flags what the goods of one trip break or touch of the rules. Every flag names the
// rule, both numbers, and leaves the decision to the operator or the law.
func Carriage(goods []Goods, trip Trip, rules []CarriageRule) []string {
	aboard := map[string]float64{}
	var list []Goods
	for _, s := range trip.Stowed {
		if s.Goods >= 0 && s.Goods < len(goods) && goods[s.Goods].Class != "" {
			g := goods[s.Goods]
			list = append(list, g)
			aboard[class(g.Class)] += g.Amount
		}
	}
	var out []string
	for _, r := range rules {
		amount, there := aboard[class(r.Class)]
		if !there {
			continue
		}
		flag := func(format string, args ...any) {
			out = append(out, r.Name+": "+fmt.Sprintf(format, args...)+"; ask, do not assume")
		}
		if r.Most < 0 {
			flag("%s is not carried at all", r.Class)
		} else if r.Most > 0 && amount > r.Most*(1+rounding) {
			flag("%s %s of %s is over %s %s", num(amount), r.Unit, r.Class, num(r.Most), r.Unit)
		}
		for _, g := range list {
			if class(g.Class) != class(r.Class) {
				continue
			}
			if r.Heaviest > 0 && g.Mass > r.Heaviest {
				flag("%q of %s kg is over %s kg", g.Name, num(g.Mass), num(r.Heaviest))
			}
			if r.Tallest > 0 && g.Height > r.Tallest {
				flag("%q of %s mm is over %s mm", g.Name, num(g.Height), num(r.Tallest))
			}
		}
		for _, other := range r.NotWith {
			if _, both := aboard[class(other)]; both && class(other) != class(r.Class) {
				flag("%s and %s in one vehicle", r.Class, other)
			}
		}
		if r.Says != "" {
			out = append(out, r.Name+": "+r.Says)
		}
		if r.AskBefore {
			out = append(out, r.Name+": ask the operator about "+r.Class+" before booking")
		}
	}
	return unique(out)
}

func class(s string) string { return strings.ToLower(strings.TrimSpace(s)) }

// BookingBand finds the first band of a ferry, in the order of the job file, that takes a vehicle
// of a length and height in mm.
//
// Errors: no band takes it; the message names the longest and the highest.
func BookingBand(bands []Band, length, height float64) (Band, error) {
	if err := checkAll(check{"the length over all", length, 1, 1e5, "mm"}, check{"the height over all", height, 1, 1e4, "mm"}); err != nil {
		return Band{}, err
	}
	long, high := 0.0, 0.0
	for _, b := range bands {
		if length <= b.Length && (b.Height == 0 || height <= b.Height) {
			return b, nil
		}
		long, high = max(long, b.Length), max(high, b.Height)
	}
	return Band{}, fault("ask the ferry, or take freight space", "no band takes %s mm long and %s mm high; the bands go to %s and %s mm", num(length), num(height), num(long), num(high))
}

// Duty is a driver's day, minutes.
type Duty struct {
	Driver       string
	Drive        float64 // at the wheel
	LongestDrive float64 // without a break of the length that the rule asks; 0 is not known
	OnDuty       float64 // from first to last work, driving and waiting
	Gross        float64 // kg of vehicle and trailer as their papers allow
	OwnWorkTools bool    // carries the driver's own tools and materials
	RestBefore   float64 // 0 is not known
}

// DutyRule is one limit of driving or duty hours as the job file gives it, minutes; 0 is no limit.
type DutyRule struct {
	Name        string
	Over        float64 // kg gross above which it applies; 0 is always
	Drive       float64
	DriveBreak  float64 // driving before a break
	OnDuty      float64
	RestBefore  float64
	NotOwnTools bool // may not apply to a driver with own tools: said, not decided
}

// Driving flags what a driver's day breaks of the rules; it decides nothing.
func Driving(d Duty, rules []DutyRule) []string {
	var out []string
	for _, r := range rules {
		if d.Gross <= r.Over && r.Over > 0 {
			continue
		}
		tail := ""
		if r.NotOwnTools && d.OwnWorkTools {
			tail = " (an exemption for own work equipment may apply: check its distance and conditions)"
		}
		flag := func(what string, v, limit float64, over bool) {
			if over {
				out = append(out, fmt.Sprintf("%s: %s %s %s min against %s min%s", r.Name, d.Driver, what, num(v), num(limit), tail))
			}
		}
		flag("drives", d.Drive, r.Drive, r.Drive > 0 && d.Drive > r.Drive)
		flag("drives without a break", d.LongestDrive, r.DriveBreak, r.DriveBreak > 0 && d.LongestDrive > r.DriveBreak)
		flag("is on duty", d.OnDuty, r.OnDuty, r.OnDuty > 0 && d.OnDuty > r.OnDuty)
		flag("has rested", d.RestBefore, r.RestBefore, d.RestBefore > 0 && d.RestBefore < r.RestBefore)
	}
	return out
}
