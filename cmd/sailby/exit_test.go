package main

import (
	"errors"
	"os/exec"
	"strconv"
)

// exitOf gives the exit status in an error of running a command.
func exitOf(err error) string {
	var e *exec.ExitError
	if errors.As(err, &e) {
		return strconv.Itoa(e.ExitCode())
	}
	return err.Error()
}
