package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"time"

	"sailby/plan"
	"sailby/plan/learn"
	"sailby/plan/problem"
	"sailby/plan/proof"
	"sailby/plan/settle"
)

// logFile is the proof of one instance being written; nil: nobody wants it.
type logFile struct{ file *os.File }

// replay is what came of a proof.
type replay struct {
	bytes   int64
	clauses int
	lemmas  int
	seconds float64
}

func (r *replay) String() string {
	if r == nil {
		return ""
	}
	return fmt.Sprintf("proof=%dkB clauses=%d lemmas=%d proof_s=%.3f ", r.bytes/1000, r.clauses, r.lemmas, r.seconds)
}

// openLog makes the file of an instance's proof in a folder, which is made if need be; no folder, no log.
func openLog(folder, name string) (*logFile, error) {
	if folder == "" {
		return nil, nil
	}
	if err := os.MkdirAll(folder, 0o777); err != nil {
		return nil, err
	}
	file, err := os.Create(filepath.Join(folder, name+".log"))
	if err != nil {
		return nil, err
	}
	return &logFile{file}, nil
}

func (l *logFile) writer() io.Writer {
	if l == nil {
		return nil
	}
	return l.file
}

// replay has the proof verified: it must show the bound that the search gives, and for an instance without a plan
// that there is none.
func (l *logFile) replay(p *problem.Problem, got learn.Result) (*replay, error) {
	if l == nil {
		return nil, nil
	}
	defer l.file.Close()
	if got.LogErr != nil {
		return nil, got.LogErr
	}
	size, err := l.file.Seek(0, io.SeekCurrent)
	if err == nil {
		_, err = l.file.Seek(0, io.SeekStart)
	}
	if err != nil {
		return nil, err
	}
	begin := time.Now()
	shown, err := proof.Replay(p, l.file)
	if err != nil {
		return nil, fmt.Errorf("the proof is refused: %w", err)
	}
	want := got.Bound
	if got.Status == learn.Infeasible {
		want = problem.Inf
	}
	if shown.Finish < want {
		return nil, fmt.Errorf("the proof shows no finish before %d, not %d", shown.Finish, want)
	}
	return &replay{size, shown.Clauses, shown.Lemmas, time.Since(begin).Seconds()}, nil
}

// refuteJob writes why an answer to a job claims what it does, and has it verified; nil where no refutation was found, or no
// folder is given.
func refuteJob(ctx context.Context, folder, name string, a *plan.Answer) (*replay, error) {
	log, err := openLog(folder, name)
	if log == nil || err != nil {
		return nil, err
	}
	defer log.file.Close()
	begin := time.Now()
	got, err := settle.Refute(ctx, a, log.file)
	if errors.Is(err, settle.ErrNoRefutation) {
		return nil, os.Remove(log.file.Name())
	}
	if err != nil {
		return nil, err
	}
	size, err := log.file.Seek(0, io.SeekEnd)
	return &replay{size, got.Clauses, got.Lemmas, time.Since(begin).Seconds()}, err
}

// tellReplays prints how many proofs were replayed, if any were asked for.
func tellReplays(out io.Writer, rows []*row) {
	n, settled, bytes, slowest := 0, 0, int64(0), 0.0
	for _, r := range rows {
		if r.replay == nil {
			continue
		}
		n++
		bytes += r.replay.bytes
		slowest = max(slowest, r.replay.seconds)
		if r.settled() {
			settled++
		}
	}
	if n > 0 {
		fmt.Fprintf(out, "         %d proofs replayed, %d of them of settled instances; %.1f MB in all; slowest %.1f s\n", n, settled, float64(bytes)/1e6, slowest)
	}
}
