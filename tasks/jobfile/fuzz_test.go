package jobfile

import (
	"errors"
	"os"
	"path/filepath"
	"reflect"
	"testing"

	"sailby/tasks"
)

// Whatever the text: no panic; a fault has a place and a way out and goes with no job; a job that
// is read is the same when it is read again.
func FuzzReadBytes(f *testing.F) {
	for _, pattern := range []string{"testdata/*.yaml", faultsFolder + "/*.yaml"} {
		files, err := filepath.Glob(pattern)
		if err != nil {
			f.Fatal(err)
		}
		for _, file := range files {
			data, err := os.ReadFile(file)
			if err != nil {
				f.Fatal(err)
			}
			f.Add(data)
		}
	}
	for _, s := range []string{"", "a", "[[[[[[[[[[[[[[[[[[[[[[[[[[[[[[", "&a [*a, *a]", "job: &a [*a]", "{{{", "? [a]\n: b", "job: |\n  x", "- a\n- b",
		"job: x\nrepeat: {b: {count: 500, tasks: {a: {}, b: {}, c: {}}}}", "job: x\ntasks: {a: {after: {b: }}}", "\x00", "a: !!binary aGk="} {
		f.Add([]byte(s))
	}
	fsys := os.DirFS("testdata")
	f.Fuzz(func(t *testing.T, data []byte) {
		job, err := ReadBytes("job.yaml", data, fsys)
		if err != nil {
			var all tasks.Faults
			if job != nil || !errors.As(err, &all) || len(all) == 0 {
				t.Fatalf("job %v with error %v", job, err)
			}
			last := tasks.Pos{}
			for _, x := range all {
				if x.Pos.File == "" || x.Pos.Line < 1 || x.Pos.Col < 1 || x.Text == "" || x.Hint == "" {
					t.Fatalf("a fault lacks its place, its text or a way out: %+v", x)
				}
				if x.Pos.File == last.File && (x.Pos.Line < last.Line || x.Pos.Line == last.Line && x.Pos.Col < last.Col) {
					t.Fatalf("faults are not in order: %v", all)
				}
				last = x.Pos
			}
			return
		}
		again, err := ReadBytes("job.yaml", data, fsys)
		if err != nil || !reflect.DeepEqual(job, again) {
			t.Fatalf("reading again gives another job (%v)", err)
		}
	})
}

// What a change puts in is read as if it had been written.
func FuzzApply(f *testing.F) {
	data, err := os.ReadFile("testdata/minimal.yaml")
	if err != nil {
		f.Fatal(err)
	}
	f.Add("tasks/resin/standing", "1 h")
	f.Add("trips/a/out/drive", "3 h")
	f.Add("trips/1/name", "x")
	f.Add("tasks", "{a: {at: shop, hours: 2}}")
	f.Add("", "&a [*a]")
	f.Add("people/Tom/tickets", "[fitter, painter]")
	f.Fuzz(func(t *testing.T, path, value string) {
		set := []tasks.Setting{{Path: []string{path}, Value: value}}
		out, err := Apply(data, set)
		if err != nil {
			if out != nil {
				t.Fatal("text beside an error")
			}
			return
		}
		a, errA := ReadBytesChanged("job.yaml", data, nil, set)
		b, errB := ReadBytes("job.yaml", out, nil)
		if (errA == nil) != (errB == nil) {
			t.Fatalf("read with the change: %v; the changed text: %v\n%s", errA, errB, out)
		}
		if errA == nil && len(a.Tasks) != len(b.Tasks) {
			t.Fatalf("%d tasks with the change, %d in the changed text", len(a.Tasks), len(b.Tasks))
		}
	})
}
