//go:build unix

package main

import (
	"syscall"
	"time"
)

// processor gives the processor time that this process has used; ok is false where it is not told.
func processor() (used time.Duration, ok bool) {
	var u syscall.Rusage
	if syscall.Getrusage(syscall.RUSAGE_SELF, &u) != nil {
		return 0, false
	}
	return time.Duration(u.Utime.Nano() + u.Stime.Nano()), true
}
