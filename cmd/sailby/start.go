package main

import (
	"context"
	_ "embed"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"

	"github.com/spf13/cobra"
)

//go:embed starter.yaml
var starter []byte

func newStart(st streams) *cobra.Command {
	return &cobra.Command{
		Use:     "start DIR",
		Short:   "Write a starter job that runs as it is",
		Long:    "Writes DIR/job.yaml, a small job to change into your own. The folder is made where it is not there;\na job file that is there is never overwritten.",
		Example: "  sailby start slip\n  sailby fits slip/job.yaml",
		Args:    takes(false, "DIR"),
		RunE:    func(c *cobra.Command, args []string) error { return runStart(c.Context(), st, args) },
	}
}

func runStart(ctx context.Context, st streams, args []string) error {
	dir := args[0]
	if err := os.MkdirAll(dir, 0o777); err != nil {
		return err
	}
	path := filepath.Join(dir, "job.yaml")
	if err := ctx.Err(); err != nil {
		return errStopped
	}
	err := writeNew(path, starter)
	if errors.Is(err, fs.ErrExist) {
		return &advice{fmt.Errorf("%s is there already, and is left as it is", path), "sailby start with another folder"}
	}
	if err != nil {
		return err
	}
	return st.print(func(w io.Writer) error {
		_, err := fmt.Fprintf(w, "wrote %s\nnext: sailby fits %s\n", path, path)
		return err
	})
}
