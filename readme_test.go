package sailby_test

import (
	"bytes"
	"errors"
	"flag"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"runtime"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "write the output in README.md anew")

// A pasted output stands between a marker that says how it is made and one that ends it:
//
//	<!-- sailby fits JOB -->              all of what it prints
//	<!-- sailby days JOB, 12 lines -->    the first 12 lines of it
//	<!-- file JOB -->                     the file itself
var pasted = regexp.MustCompile(`(?s)<!-- (sailby|file) ([^\n]*?)(?:, (\d+) lines)? -->\n.*?<!-- end -->`)

// Every output in the README is what the program prints today.
func TestReadme(t *testing.T) {
	old, err := os.ReadFile("README.md")
	if err != nil {
		t.Fatal(err)
	}
	program := build(t)
	count := 0
	text := pasted.ReplaceAllStringFunc(string(old), func(block string) string {
		count++
		m := pasted.FindStringSubmatch(block)
		out, lang := "", "text"
		if m[1] == "file" {
			data, err := os.ReadFile(m[2])
			if err != nil {
				t.Fatal(err)
			}
			out, lang = string(data), "yaml"
		} else {
			out = run(t, program, words(m[2]))
		}
		if m[3] != "" {
			out = head(t, out, m[3])
		}
		marker, _, _ := strings.Cut(block, "\n")
		return fmt.Sprintf("%s\n```%s\n%s\n```\n<!-- end -->", marker, lang, strings.TrimRight(out, "\n"))
	})
	if count < 4 {
		t.Fatalf("README.md has %d pasted outputs, at least 4 are wanted: are the markers whole?", count)
	}
	if text == string(old) {
		return
	}
	if *update {
		if err := os.WriteFile("README.md", []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
		return
	}
	a, b := strings.Split(string(old), "\n"), strings.Split(text, "\n")
	for i := range min(len(a), len(b)) {
		if a[i] != b[i] {
			t.Fatalf("README.md:%d says\n  %s\nthe program says\n  %s\nrun: go test . -update", i+1, a[i], b[i])
		}
	}
	t.Fatalf("README.md has %d lines, with today's output it has %d\nrun: go test . -update", len(a), len(b))
}

// The job that `sailby start` writes is the starter job of testdata.
func TestStarter(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "new")
	run(t, build(t), []string{"start", dir})
	got, err := os.ReadFile(filepath.Join(dir, "job.yaml"))
	if err != nil {
		t.Fatal(err)
	}
	want, err := os.ReadFile("testdata/jobs/starter/job.yaml")
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(got, want) {
		t.Error("`sailby start` writes another job: copy testdata/jobs/starter/job.yaml to cmd/sailby/starter.yaml")
	}
}

// build makes the program once for the test.
func build(t *testing.T) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), "sailby")
	if runtime.GOOS == "windows" {
		path += ".exe"
	}
	if out, err := exec.Command("go", "build", "-o", path, "./cmd/sailby").CombinedOutput(); err != nil {
		t.Fatalf("go build ./cmd/sailby: %v\n%s", err, out)
	}
	return path
}

// run gives what the program writes to standard output. That a job does not fit (status 3) is an answer, not a failure.
func run(t *testing.T, program string, args []string) string {
	t.Helper()
	cmd := exec.Command(program, args...)
	cmd.Env = append(os.Environ(), "NO_COLOR=1")
	var out, talk bytes.Buffer
	cmd.Stdout, cmd.Stderr = &out, &talk
	var exit *exec.ExitError
	if err := cmd.Run(); err != nil && !(errors.As(err, &exit) && exit.ExitCode() == 3) {
		t.Fatalf("sailby %s: %v\n%s%s", strings.Join(args, " "), err, out.Bytes(), talk.Bytes())
	}
	return out.String()
}

// words splits a command line at blanks, outside double quotes.
func words(line string) []string {
	var out []string
	for i, part := range strings.Split(line, `"`) {
		if i%2 == 1 {
			out = append(out, part)
		} else {
			out = append(out, strings.Fields(part)...)
		}
	}
	return out
}

// head gives the first lines of a text and says that there is more.
func head(t *testing.T, text, count string) string {
	var n int
	if _, err := fmt.Sscan(count, &n); err != nil {
		t.Fatal(err)
	}
	lines := strings.SplitAfter(text, "\n")
	if len(lines) <= n {
		t.Fatalf("%d lines are asked for, there are %d", n, len(lines))
	}
	return strings.Join(lines[:n], "") + "..."
}
