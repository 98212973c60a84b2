//go:build !unix

package main

import "time"

// processor says that this system tells no processor time.
func processor() (used time.Duration, ok bool) { return 0, false }
