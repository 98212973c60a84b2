package ways

import (
	"sailby/plan"
	"sailby/tasks"
)

// dial is one thing of the job file that can be changed, by more or less.
type dial struct {
	kind    plan.LimitKind
	keys    []string // of the limits that it relaxes; nil: tried whatever the proof says
	relaxes bool     // it only ever leaves more room: what refuses it refuses the job as it is
	trip    string   // another trip of the job
	pos     tasks.Pos
	was     string
	steps   []int // amounts, rising
	says    func(n int) string
	writes  func(n int) string
	sets    func(n int) ([]tasks.Setting, bool)
}

// minuteSteps are amounts of time that somebody would ask for: a quarter of an hour apart up to 4 h, half an hour up to 12 h, an hour
// up to two days, then half days and days up to a fortnight.
func minuteSteps(most int) []int {
	var out []int
	for t := 15; t <= most; {
		out = append(out, t)
		switch {
		case t < 4*60:
			t += 15
		case t < 12*60:
			t += 30
		case t < 48*60:
			t += 60
		case t < 4*1440:
			t += 720
		default:
			t += 1440
		}
	}
	return out
}

// counts are 1 to most.
func counts(most int) []int {
	out := make([]int, most)
	for i := range out {
		out[i] = i + 1
	}
	return out
}

// probes gives the amounts tried first, by index: the greatest, and for what may be too much of a good thing
// (earlier hours may cost later ones, R15) some between.
func (d *dial) probes() []int {
	last := len(d.steps) - 1
	if d.relaxes || last < 4 {
		return []int{last}
	}
	return []int{last, last / 2, last / 4}
}

// rank orders ways by what they commonly ask of others, least first: what the crew can settle by itself, then kit
// and people, then what others set.
func rank(k plan.LimitKind) int {
	switch k {
	case plan.LimitOther: // the file's own changes and trips
		return 0
	case plan.LimitNotBefore, plan.LimitBegin, plan.LimitMaxWait:
		return 1
	case plan.LimitPersonHours, plan.LimitPersonOff, plan.LimitPersonFrom, plan.LimitPersonUntil:
		return 2
	case plan.LimitHours, plan.LimitClosed, plan.LimitDaylight:
		return 3
	case plan.LimitReach, plan.LimitRoom:
		return 4
	case plan.LimitKit, plan.LimitPower, plan.LimitHire:
		return 5
	case plan.LimitPerson:
		return 6
	case plan.LimitLength:
		return 7
	case plan.LimitNoisy, plan.LimitPermit, plan.LimitBooked:
		return 8
	case plan.LimitDeadline:
		return 9
	}
	return 10
}

// set is one setting; where the thing stands in a library it is changed there.
func set(job *tasks.Job, at tasks.Pos, value string, path ...string) tasks.Setting {
	s := tasks.Setting{Path: path, Value: value}
	if at.File != "" && at.File != job.File {
		s.Pos.File = at.File
	}
	return s
}
