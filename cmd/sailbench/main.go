// Command sailbench solves open scheduling instances under a time limit and says how well:
// proved, gap to the best known finish, time to the first plan, to the best and to the proof.
package main

import (
	"context"
	"flag"
	"fmt"
	"io"
	"os"
	"os/signal"
	"time"
)

func main() {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt)
	err := run(ctx, os.Args[1:], os.Stdout, os.Stderr)
	stop()
	if err != nil {
		fmt.Fprintln(os.Stderr, "sailbench:", err)
		os.Exit(1)
	}
}

// settings are the flags.
type settings struct {
	limit   time.Duration
	workers int
	csv     string
	every   int
	offset  int
	verbose bool
	random  randomJobs
	curve   bool
	proofs  string
	cpu     bool
}

// run reads the flags, solves the instances and prints the rows and the summary. A wrong answer
// is an error.
func run(ctx context.Context, args []string, out, talk io.Writer) error {
	var o settings
	fl := flag.NewFlagSet("sailbench", flag.ContinueOnError)
	fl.SetOutput(talk)
	fl.Usage = func() {
		fmt.Fprintln(talk, "usage: sailbench [flags] PATH...    files or folders of .sm, .sch or .rcp instances")
		fl.PrintDefaults()
	}
	fl.DurationVar(&o.limit, "limit", 30*time.Second, "most time for one instance")
	fl.IntVar(&o.workers, "workers", 1, "instances solved at the same time")
	fl.StringVar(&o.csv, "csv", "", "write the rows to this file")
	fl.IntVar(&o.every, "every", 1, "take one in so many instances of each folder")
	fl.IntVar(&o.offset, "from", 0, "the first one taken, counted from 0")
	fl.BoolVar(&o.verbose, "v", false, "print each row when it is done")
	fl.BoolVar(&o.cpu, "cpu", false, "count processor time in place of the clock's; with one worker")
	fl.IntVar(&o.random.count, "jobs", 0, "make so many jobs at random and solve these; no PATH")
	fl.IntVar(&o.random.size, "size", 60, "activities of a random job, about")
	fl.Uint64Var(&o.random.seed, "seed", 1, "seed of the first random job; the next have the next numbers")
	fl.StringVar(&o.random.class, "class", "", "one class of random jobs: slack, snug, tight or over; else all in turn")
	fl.BoolVar(&o.random.lattice, "lattice", false, "random jobs in which every time is a half hour")
	fl.StringVar(&o.proofs, "proof", "", "write the proof of each instance to this folder, and replay it")
	fl.BoolVar(&o.curve, "curve", false, "print a table of time and memory against the size of random jobs; no PATH")
	if err := fl.Parse(args); err != nil {
		return err
	}
	if o.limit <= 0 || o.workers < 1 || o.every < 1 || o.offset < 0 {
		return fmt.Errorf("-limit, -workers and -every must be above 0, -from at least 0")
	}
	if _, ok := processor(); o.cpu && (!ok || o.workers > 1) {
		return fmt.Errorf("-cpu wants one worker, and a system that tells processor time")
	}
	if o.curve {
		return curve(ctx, o, curveSizes, out)
	}
	if o.random.count != 0 {
		if o.random.count < 0 || fl.NArg() > 0 {
			return fmt.Errorf("-jobs %d: want a number above 0, and no PATH beside it", o.random.count)
		}
		return benchJobs(ctx, o, out, talk)
	}
	if fl.NArg() == 0 {
		fl.Usage()
		return fmt.Errorf("no instances given")
	}
	folders, err := gather(fl.Args(), o)
	if err != nil {
		return err
	}
	return bench(ctx, folders, o, out, talk)
}
