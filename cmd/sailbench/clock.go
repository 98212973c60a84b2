package main

import "time"

// watch starts a stopwatch in seconds: of the clock, or of the processor time of this process.
func watch(cpu bool) func() float64 {
	if cpu {
		from, _ := processor()
		return func() float64 {
			now, _ := processor()
			return (now - from).Seconds()
		}
	}
	from := time.Now()
	return func() float64 { return time.Since(from).Seconds() }
}
