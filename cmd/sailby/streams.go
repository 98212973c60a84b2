package main

import (
	"bytes"
	"fmt"
	"io"
	"os"

	"golang.org/x/term"
)

// streams are where a command reads and writes, and what is known about them.
type streams struct {
	out, err io.Writer
	width    int  // columns of out if it is a terminal, else 0
	outTerm  bool // out is a terminal, and so is the input
	errTerm  bool // err is a terminal
}

// terminal gives the streams of the process.
func terminal() streams {
	is := func(f *os.File) bool { return term.IsTerminal(int(f.Fd())) }
	st := streams{out: os.Stdout, err: os.Stderr, outTerm: is(os.Stdout) && is(os.Stdin), errTerm: is(os.Stderr)}
	if is(os.Stdout) {
		if w, _, err := term.GetSize(int(os.Stdout.Fd())); err == nil {
			st.width = w
		}
	}
	return st
}

// print hands write a buffer and writes it to out in one go, so that an error leaves no half of it.
func (st streams) print(write func(io.Writer) error) error {
	var b bytes.Buffer
	if err := write(&b); err != nil {
		return err
	}
	if _, err := st.out.Write(b.Bytes()); err != nil {
		return fmt.Errorf("the result could not be written: %w", err)
	}
	return nil
}

// say writes a line of talk to err.
func (st streams) say(format string, args ...any) {
	fmt.Fprintf(st.err, "sailby: "+format+"\n", args...)
}

// progress gives a function that shows one line of progress on a terminal, and one that takes it
// away again. Without a terminal both do nothing.
func (st streams) progress() (show func(string), done func()) {
	if !st.errTerm {
		return nil, func() {}
	}
	return func(text string) { fmt.Fprintf(st.err, "\r\x1b[Kworking on %.60s ...", text) }, func() { fmt.Fprint(st.err, "\r\x1b[K") }
}
