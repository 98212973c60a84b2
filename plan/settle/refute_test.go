package settle

import (
	"context"
	"errors"
	"io"
	"os"
	"path/filepath"
	"strconv"
	"testing"

	"sailby/plan"
	"sailby/plan/random"
	"sailby/tasks/jobfile"
)

// paper is a log in memory.
type paper struct {
	text []byte
	at   int
}

func (p *paper) Write(b []byte) (int, error) { p.text = append(p.text, b...); return len(b), nil }

func (p *paper) Truncate(n int64) error { p.text = p.text[:n]; return nil }

func (p *paper) Read(b []byte) (int, error) {
	if p.at == len(p.text) {
		return 0, io.EOF
	}
	n := copy(b, p.text[p.at:])
	p.at += n
	return n, nil
}

func (p *paper) Seek(at int64, _ int) (int64, error) { p.at = int(at); return at, nil }

// TestRandomJobsAreRefuted has every verdict on random jobs written out and replayed: no log is refused, and
// all but a few bounds and all "cannot fit" can be shown.
func TestRandomJobsAreRefuted(t *testing.T) {
	rounds, from := 32, 0
	if n, err := strconv.Atoi(os.Getenv("SAILBY_JOBS")); err == nil {
		rounds, from = n, 5000
	}
	none, bounds, missing, lemmas := 0, 0, 0, 0
	for i := range rounds {
		k := random.Knobs{Size: 8 + i%12, Seed: uint64(900 + from + i), Class: random.Classes()[i%4]}
		job, err := jobfile.ReadBytes("job.yaml", []byte(random.Job(k)), nil)
		if err != nil {
			t.Fatal(err)
		}
		rep, err := Ask(context.Background(), job, Options{Only: true, Ticks: 30_000})
		if err != nil {
			t.Fatal(err)
		}
		var log paper
		r, err := Refute(context.Background(), rep.Likely, &log)
		switch {
		case errors.Is(err, ErrNoRefutation):
			missing++
			t.Logf("job %d (%v): %v; bound because %s", i, k.Class, err, rep.Likely.BoundWhy)
			continue
		case err != nil:
			if dir := os.Getenv("SAILBY_KEEP"); dir != "" {
				_ = os.WriteFile(filepath.Join(dir, "refused.log"), log.text, 0o666)
				_ = os.WriteFile(filepath.Join(dir, "refused.yaml"), []byte(random.Job(k)), 0o666)
			}
			t.Fatalf("job %d (%v): %v", i, k.Class, err)
		}
		lemmas += r.Lemmas
		if rep.Likely.Verdict == plan.CannotFit {
			none++
		} else {
			bounds++
		}
	}
	if none < rounds/5 || bounds < rounds/5 || missing > rounds/20 {
		t.Errorf("%d cannot fit, %d bounds, %d not shown: too few of a kind, or too many not shown", none, bounds, missing)
	}
	t.Logf("%d cannot fit, %d bounds, %d not shown, %d lemmas", none, bounds, missing, lemmas)
}
