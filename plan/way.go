package plan

import (
	"sailby/tasks"
	"sailby/tasks/hours"
)

// Way is one change to the job file with which the work fits: the job was read with it and planned, and the
// plan has passed the checker.
type Way struct {
	Kind   LimitKind
	Text   string // "the window at pier closing 2 h 15 min later"
	Write  string // what to write in the job file: "closes: 2027-04-06 19:15"
	Was    string // what stands there; "" where nothing does, or too much to repeat
	Pos    tasks.Pos
	Sets   []tasks.Setting
	Amount int // in the unit of its kind: minutes, or how many more; 0 where it has none
	Finish hours.Minute
	InHand int // minutes before the window's close
	Tried  []WayTrial
}

// WayTrial is one amount of a way that was tried, in the order of the amounts.
type WayTrial struct {
	Text    string // as Way.Text, with this amount
	Amount  int
	Verdict Verdict // on likely hours, in the time of a trial
}

// Ways are the single changes that turn a job that does not fit into one that does.
type Ways struct {
	List  []Way
	Tried int      // changes tried, by themselves
	Left  int      // changes that the limits of the search left untried, or tried in part
	Not   []string // what is never offered though the proof rests on it, in the job's words
}
