package main

import (
	"io"

	"github.com/spf13/cobra"

	"sailby/tasks/jobfile"
)

func newSchema(st streams) *cobra.Command {
	return &cobra.Command{
		Use:     "schema",
		Short:   "The JSON schema of the job file, for editors",
		Example: "  sailby schema > sailby.schema.json",
		Args:    takes(false),
		RunE:    func(*cobra.Command, []string) error { return runSchema(st) },
	}
}

func runSchema(st streams) error {
	return st.print(func(w io.Writer) error { _, err := w.Write(jobfile.Schema()); return err })
}
