package model

import (
	"fmt"

	"sailby/tasks"
)

// Code says which key was pressed.
type Code uint8

// The keys that do something. Letter is any key that writes a character.
const (
	None Code = iota
	Letter
	Up
	Down
	Left
	Right
	PageUp
	PageDown
	Home
	End
	Enter
	Back // Esc
	Next // Tab
	Prev // Shift-Tab
	Erase
	Delete
	Away // Ctrl-C
)

// Key is one key pressed.
type Key struct {
	Code   Code
	Letter rune // for Letter
}

// Ask is what a key asks of the driver. The zero Ask is nothing.
type Ask struct {
	Leave bool
	Plan  bool            // plan again with Sets, in place of any run that goes on
	Sets  []tasks.Setting // empty: the job as it is in the file
	Run   int             // number of the run, handed back with its result
	Stop  bool            // end the run that goes on
}

// count writes "1 row", "3 rows".
func count(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}
