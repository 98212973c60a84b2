// Command sailby plans the work of a mobile steel fabricator who builds an assembly at home and
// fits it somewhere else inside a window set by others.
package main

import (
	"context"
	"os"
	"os/signal"
	"syscall"
	_ "time/tzdata" // places' time zones on machines that have none
)

func main() { os.Exit(run(os.Args[1:], terminal())) }

// run carries out one command line and gives the exit status. Ctrl-C ends the context; a second
// one kills.
func run(args []string, st streams) int {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	defer stop()
	go func() {
		<-ctx.Done()
		stop() // from now on a signal does what it does by default
	}()
	return execute(ctx, args, st)
}

// execute carries out one command line and gives the exit status.
func execute(ctx context.Context, args []string, st streams) int {
	root := newRoot(st)
	root.SetArgs(args)
	return status(root.ExecuteContext(ctx), st.err)
}
