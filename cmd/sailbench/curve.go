package main

import (
	"context"
	"fmt"
	"io"
	"runtime"
	"runtime/metrics"
	"sync"
	"time"

	"sailby/plan/learn"
	"sailby/plan/random"
	"sailby/tasks/jobfile"
)

// curveSizes are the sizes of the jobs that a curve is made of, in activities.
var curveSizes = []int{20, 60, 200, 600, 2000}

// curve asks a random job of each size and prints a table of time and memory against size.
func curve(ctx context.Context, o settings, sizes []int, out io.Writer) error {
	class := random.Slack
	if o.random.class != "" {
		k, err := randomJobs{count: 1, size: 2, class: o.random.class}.knobs()
		if err != nil {
			return err
		}
		class = k[0].Class
	}
	fmt.Fprintf(out, "| activities | answer | first plan | answered after | finish above the bound, of the open minutes to it | most memory | for each activity |\n|---|---|---|---|---|---|---|\n")
	for _, size := range sizes {
		if ctx.Err() != nil {
			return fmt.Errorf("stopped before the end")
		}
		k := random.Knobs{Size: size, Seed: o.random.seed, Class: class}
		job, err := jobfile.ReadBytes("job.yaml", []byte(random.Job(k)), nil)
		if err != nil {
			return err
		}
		runtime.GC()
		top := watchHeap()
		r := solveJob(ctx, fmt.Sprintf("%s-%d-%d", k.Class, k.Size, k.Seed), job, o)
		most := top()
		if r.wrong != "" {
			return fmt.Errorf("%s: %s", r.name, r.wrong)
		}
		gap, first := "-", "-"
		if r.checked {
			gap, first = fmt.Sprintf("%.1f %%", r.openGap), fmt.Sprintf("%.2f s", r.first)
		}
		fmt.Fprintf(out, "| %d | %s | %s | %.1f s | %s | %.0f MB | %.0f kB |\n", r.activities, jobWords[r.status], first, r.proof, gap,
			float64(most)/1e6, float64(most)/1e3/float64(max(1, r.activities)))
	}
	return nil
}

// jobWords says how a job came out.
var jobWords = map[learn.Status]string{learn.Optimal: "fits, proved best", learn.Feasible: "fits", learn.Infeasible: "cannot fit", learn.Unknown: "open"}

// watchHeap watches the bytes of live and not yet collected objects; the function that it gives
// stops it and tells the most that there were.
func watchHeap() func() uint64 {
	const name = "/memory/classes/heap/objects:bytes"
	look := func() uint64 {
		s := []metrics.Sample{{Name: name}}
		metrics.Read(s)
		return s[0].Value.Uint64()
	}
	var most uint64
	var wg sync.WaitGroup
	stop := make(chan struct{})
	wg.Go(func() {
		for {
			most = max(most, look())
			select {
			case <-stop:
				return
			case <-time.After(10 * time.Millisecond):
			}
		}
	})
	return func() uint64 {
		close(stop)
		wg.Wait()
		return max(most, look())
	}
}
