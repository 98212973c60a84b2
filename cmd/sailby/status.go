package main

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"strings"

	"sailby/report/clean"
	"sailby/tasks"
)

// The exit statuses.
const (
	statusDone     = 0
	statusFault    = 1 // fault in the file or the system
	statusUsage    = 2 // wrong command line
	statusNotShown = 3 // the work was not shown to fit
)

// errNotShown ends fits where the work was not shown to fit; what there is to say was printed.
var errNotShown = errors.New("the work was not shown to fit")

// errTold ends a command that has printed its faults as its result.
var errTold = errors.New("the faults were printed")

// advice is an error with a way out.
type advice struct {
	err  error
	hint string
}

func (a *advice) Error() string { return a.err.Error() }
func (a *advice) Unwrap() error { return a.err }

// usage is a wrong command line.
type usage struct{ text, hint string }

func (u *usage) Error() string { return u.text }

// misuse makes the error of a wrong command line, with a way out.
func misuse(hint, format string, args ...any) error {
	return &usage{fmt.Sprintf(format, args...), hint}
}

// status prints an error with its way out and gives the exit status for it.
func status(err error, w io.Writer) int {
	var faults tasks.Faults
	var u *usage
	switch {
	case err == nil:
		return statusDone
	case errors.Is(err, errNotShown):
		return statusNotShown
	case errors.Is(err, errTold):
		return statusFault
	case errors.As(err, &faults):
		for _, f := range faults {
			tell(w, f.Error())
		}
		return statusFault
	case errors.As(err, &u):
		tell(w, "sailby: "+u.text)
		if u.hint != "" {
			tell(w, "  try: "+u.hint)
		}
		return statusUsage
	}
	tell(w, "sailby: "+plain(err))
	var a *advice
	if errors.As(err, &a) && a.hint != "" {
		tell(w, "  try: "+a.hint)
	}
	return statusFault
}

// tell writes text line by line, cleaned, the indentation kept.
func tell(w io.Writer, text string) {
	for _, l := range strings.Split(text, "\n") {
		body := strings.TrimLeft(l, " ")
		fmt.Fprintln(w, l[:len(l)-len(body)]+clean.Line(body))
	}
}

// plain puts errors of the file system into plain words.
func plain(err error) string {
	var pe *fs.PathError
	if !errors.As(err, &pe) {
		return err.Error()
	}
	why := pe.Err.Error()
	switch {
	case errors.Is(err, fs.ErrNotExist):
		why = "there is no such file or folder"
	case errors.Is(err, fs.ErrPermission):
		why = "you may not read or write it"
	case errors.Is(err, fs.ErrExist):
		why = "it is there already"
	}
	return pe.Path + ": " + why
}
