package settle

import (
	"context"
	"fmt"
	"os"
	"testing"

	"sailby/tasks/jobfile"
)

func BenchmarkFile(b *testing.B) {
	path := os.Getenv("SAILBY_BENCH_JOB")
	if path == "" {
		b.Skip("set SAILBY_BENCH_JOB to a job file")
	}
	job, err := jobfile.Read(path)
	if err != nil {
		b.Fatal(err)
	}
	for b.Loop() {
		rep, err := Ask(context.Background(), job, Options{Only: true})
		if err != nil {
			b.Fatal(err)
		}
		if os.Getenv("V") != "" {
			fmt.Println(rep.Likely.Verdict, rep.Likely.InHand)
		}
	}
}
