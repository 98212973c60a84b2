package settle

import (
	"context"
	"errors"
	"fmt"
	"os"
	"runtime"
	"slices"
	"testing"
	"time"

	"sailby/plan"
	"sailby/plan/network"
	"sailby/plan/problem"
	"sailby/plan/random"
	"sailby/plan/solve"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// BenchmarkFile asks the job file that SAILBY_BENCH_JOB names.
func BenchmarkFile(b *testing.B) {
	path := os.Getenv("SAILBY_BENCH_JOB")
	if path == "" {
		b.Skip("set SAILBY_BENCH_JOB to a job file")
	}
	benchFile(b, path)
}

// BenchmarkDemo is the whole answer to the island pier: likely hours, every maybe, the high end.
func BenchmarkDemo(b *testing.B) { benchFile(b, "../../testdata/jobs/tarskay/job.yaml") }

func benchFile(b *testing.B, path string) {
	job, err := jobfile.Read(path)
	if err != nil {
		b.Fatal(err)
	}
	bench(b, job, Options{})
}

// bench asks a job and reports what came of it: steps, minutes between finish and bound, bytes live
// at the end.
func bench(b *testing.B, job *tasks.Job, o Options) {
	var rep *plan.Report
	var err error
	for b.Loop() {
		if rep, err = Ask(context.Background(), job, o); err != nil {
			b.Fatal(err)
		}
	}
	a := rep.Likely
	b.ReportMetric(float64(len(a.Work.Steps)), "steps")
	if a.Plan != nil {
		b.ReportMetric(float64(a.Finish-a.Bound), "min-gap")
	}
	runtime.GC()
	var m runtime.MemStats
	runtime.ReadMemStats(&m)
	b.ReportMetric(float64(m.HeapAlloc)/1e6, "MB-live")
	runtime.KeepAlive(rep)
	b.Logf("%v, best %v, late %v", a.Verdict, a.Best, a.Late)
}

// BenchmarkRefit asks refits of growing length, on likely hours.
func BenchmarkRefit(b *testing.B) {
	for _, n := range []int{50, 100, 200, 850, 1700} {
		b.Run(fmt.Sprint(n, " tasks"), func(b *testing.B) { bench(b, refitJob(b, n), Options{Only: true}) })
	}
}

// BenchmarkParts times the parts of an answer by themselves, at a thousand activities and at two
// thousand.
func BenchmarkParts(b *testing.B) {
	for _, n := range []int{850, 1700} {
		w, faults := expand.Expand(refitJob(b, n), expand.Basis{})
		if len(faults) > 0 {
			b.Fatal(faults)
		}
		p := problem.Compile(w)
		bounds, _ := network.Propagate(p, network.Off{})
		name := func(part string) string { return fmt.Sprint(len(w.Steps), " activities/", part) }
		b.Run(name("compile"), func(b *testing.B) {
			for b.Loop() {
				problem.Compile(w)
			}
		})
		b.Run(name("network"), func(b *testing.B) {
			for b.Loop() {
				network.Propagate(p, network.Off{})
			}
		})
		b.Run(name("content"), func(b *testing.B) {
			for b.Loop() {
				solve.FindOverload(solve.Loads(p), bounds)
			}
		})
		carry := problem.Compile(w.Carry())
		free, _ := undated(carry)
		b.Run(name("schedules"), func(b *testing.B) {
			for b.Loop() {
				solve.Find(carry, free, solve.Options{Ticks: 1})
			}
		})
	}
}

// BenchmarkBytes gives the bytes that are live for each activity of a random job once it is laid out as a problem, and
// those that are allocated for each while it is asked.
func BenchmarkBytes(b *testing.B) {
	for _, size := range []int{60, 200, 1000} {
		b.Run(fmt.Sprint(size), func(b *testing.B) {
			job, err := jobfile.ReadBytes("job.yaml", []byte(random.Job(random.Knobs{Size: size, Seed: 1, Class: random.Slack})), nil)
			if err != nil {
				b.Fatal(err)
			}
			live := func() float64 {
				runtime.GC()
				var m runtime.MemStats
				runtime.ReadMemStats(&m)
				return float64(m.HeapAlloc)
			}
			before := live()
			w, faults := expand.Expand(job, expand.Basis{})
			if len(faults) > 0 {
				b.Fatal(faults)
			}
			p := problem.Compile(w)
			n := float64(len(p.Acts))
			laid := live() - before
			runtime.KeepAlive(p)
			var m0, m1 runtime.MemStats
			runtime.ReadMemStats(&m0)
			for b.Loop() {
				if _, err := Ask(context.Background(), job, Options{Only: true, Ticks: 20_000}); err != nil {
					b.Fatal(err)
				}
			}
			runtime.ReadMemStats(&m1)
			b.ReportMetric(laid/n, "bytes/activity")
			b.ReportMetric(float64(m1.TotalAlloc-m0.TotalAlloc)/n/float64(b.N), "allocated/activity")
		})
	}
}

// BenchmarkCancel cancels a hundred answers to a job of two thousand activities, each after
// another while, and reports how long they took to return: the 50th, the 99th and the longest of a hundred, in
// milliseconds; and how long the work that was given up ran on unseen, at most.
func BenchmarkCancel(b *testing.B) {
	job := refitJob(b, 1700)
	const cancels = 100
	for b.Loop() {
		var waits []float64
		steps, linger := 0, 0.0
		for k := range cancels {
			idle := runtime.NumGoroutine()
			ctx, cancel := context.WithCancel(context.Background())
			var at time.Time
			after := time.AfterFunc(time.Duration(k*k)*time.Millisecond/2, func() { at = time.Now(); cancel() })
			rep, err := Ask(ctx, job, Options{})
			back := time.Now()
			if err != nil && !errors.Is(err, ErrStopped) {
				b.Fatal(err)
			}
			after.Stop()
			if ctx.Err() != nil {
				waits = append(waits, float64(back.Sub(at).Microseconds())/1000)
			}
			if rep != nil {
				steps = len(rep.Likely.Work.Steps)
			}
			cancel()
			for runtime.NumGoroutine() > idle && time.Since(back) < time.Minute {
				time.Sleep(time.Millisecond)
			}
			linger = max(linger, float64(time.Since(back).Milliseconds()))
		}
		slices.Sort(waits)
		b.ReportMetric(float64(steps), "activities")
		b.ReportMetric(float64(len(waits)), "cancels")
		b.ReportMetric(waits[len(waits)/2], "ms-median")
		b.ReportMetric(waits[(len(waits)*99+99)/100-1], "ms-p99")
		b.ReportMetric(waits[len(waits)-1], "ms-most")
		b.ReportMetric(linger, "ms-linger")
	}
}
