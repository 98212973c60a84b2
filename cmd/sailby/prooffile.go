package main

import (
	"context"
	"errors"
	"fmt"
	"os"
	"path/filepath"

	"sailby/plan"
	"sailby/plan/settle"
	"sailby/report/agenda"
	"sailby/tasks/hours"
)

// writeProof writes the refutation behind an answer to a file, whole or not at all, has it replayed, and says what that
// has shown. Where there is none it says so, and writes nothing.
func writeProof(ctx context.Context, path string, a *plan.Answer) (string, error) {
	temp, err := os.CreateTemp(filepath.Dir(path), ".sailby-*")
	if err != nil {
		return "", &os.PathError{Op: "write", Path: path, Err: errors.Unwrap(err)}
	}
	defer os.Remove(temp.Name())
	r, err := settle.Refute(ctx, a, temp)
	if err == nil {
		err = temp.Sync()
	}
	err = errors.Join(err, temp.Close())
	switch {
	case errors.Is(err, settle.ErrNoRefutation):
		return fmt.Sprintf("%v: %s is not written.", err, path), nil
	case err != nil:
		return "", err
	}
	if info, err := os.Stat(path); err == nil && !info.Mode().IsRegular() {
		return "", &os.PathError{Op: "write", Path: path, Err: errors.New("it is no file that can be replaced")}
	}
	if err := os.Chmod(temp.Name(), 0o644); err != nil {
		return "", err
	}
	if err := os.Rename(temp.Name(), path); err != nil {
		return "", err
	}
	what := "no plan fits"
	if r.Finish < hours.Far {
		what = "no plan can finish before " + agenda.Moment(a, r.Finish)
	}
	return fmt.Sprintf("Refutation of %d clauses and %d lemmas, written to %s and replayed by the second program: it holds, %s.", r.Clauses, r.Lemmas, path, what), nil
}
