package main

import (
	"bytes"
	"context"
	"errors"
	"fmt"

	"github.com/spf13/cobra"

	"sailby/report/pdf"
	"sailby/report/sheets"
)

type sheetsOptions struct {
	*globals
	which
	out    string
	letter bool
	site   bool
}

func newSheets(g *globals, st streams) *cobra.Command {
	o := &sheetsOptions{globals: g}
	c := &cobra.Command{
		Use:   "sheets JOB -o FILE.pdf",
		Short: "The pack to print: cover, a sheet for each shift, lists and cautions",
		Long: "Writes the pack as a PDF: cover, one sheet a shift, handover, weld list, paint log, lift sheets, packing list and\n" +
			"cautions. The file is written whole or not at all.",
		Example:           "  sailby sheets slip/job.yaml -o slip.pdf\n  sailby sheets slip/job.yaml -o slip.pdf --letter",
		Args:              takes(false, "JOB"),
		ValidArgsFunction: jobFiles,
		RunE:              func(c *cobra.Command, args []string) error { return runSheets(c.Context(), o, st, args) },
	}
	f := c.Flags()
	f.StringVarP(&o.out, "out", "o", "", "the file to write")
	f.BoolVar(&o.letter, "letter", false, "US Letter in place of A4")
	f.BoolVar(&o.site, "site", false, "only what is done at the site: no shifts, welds, coats and lifts at home")
	o.which.flags(f)
	return c
}

func runSheets(ctx context.Context, o *sheetsOptions, st streams, args []string) error {
	switch {
	case o.out == "":
		return misuse(fmt.Sprintf("sailby sheets %s -o pack.pdf", args[0]), "nothing says which file to write")
	case o.which.check() != nil:
		return o.which.check()
	}
	job, err := o.read(args[0])
	if err != nil {
		return err
	}
	r, err := o.ask(ctx, st, job)
	if err != nil {
		return err
	}
	doc, err := sheets.Pack(r, sheets.Options{Letter: o.letter, SiteOnly: o.site, Maybes: o.maybes, End: o.end()})
	if errors.Is(err, sheets.ErrNoPlan) {
		return &advice{err, fmt.Sprintf("sailby fits %s, which says why", args[0])}
	}
	if err != nil {
		return err
	}
	var b bytes.Buffer
	if err := pdf.Write(&b, doc); err != nil {
		return err
	}
	if ctx.Err() != nil {
		return errStopped
	}
	if err := writeWhole(o.out, b.Bytes()); err != nil {
		return err
	}
	st.say("wrote %s, %s", o.out, counted(len(doc.Pages), "page"))
	return nil
}
