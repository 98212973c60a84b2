// Command mutants proves that the tests of the planner can fail: it changes one line of the
// generator, the network, the compiled problem or the checker at a time, in a copy of the module, and runs
// the tests that are there for it. A change that no test notices survives, and the command ends
// with status 1; so it does where a line to change is not there just once, or the changed module
// does not build.
//
//	go run ./plan/mutants            all of them
//	go run ./plan/mutants 3 17       only these
package main

import (
	"bytes"
	"context"
	"errors"
	"flag"
	"fmt"
	"io"
	"io/fs"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"sync"
	"time"
)

// limit is how long the tests of one mutant may run; a mutant that runs on is noticed.
const limit = 3 * time.Minute

func main() {
	root := flag.String("root", ".", "folder of the module")
	workers := flag.Int("workers", 2, "how many are tried at once")
	flag.Parse()
	if err := run(*root, *workers, flag.Args(), os.Stdout); err != nil {
		fmt.Fprintln(os.Stderr, "mutants:", err)
		os.Exit(1)
	}
}

// run tries mutants and reports on them; the error counts what went wrong.
func run(root string, workers int, only []string, out io.Writer) error {
	picked, err := pick(only)
	if err != nil {
		return err
	}
	for _, k := range picked {
		if _, err := mutants[k].apply(root); err != nil {
			return fmt.Errorf("mutant %d: %w", k+1, err)
		}
	}
	if err := baseline(root, picked); err != nil {
		return err
	}
	jobs := make(chan int)
	var lock sync.Mutex
	var failed []string
	var group sync.WaitGroup
	for range max(1, workers) {
		dir, err := copied(root)
		if err != nil {
			return err
		}
		defer os.RemoveAll(dir)
		group.Add(1)
		go func() {
			defer group.Done()
			for k := range jobs {
				began := time.Now()
				verdict, detail := mutants[k].try(dir)
				lock.Lock()
				fmt.Fprintf(out, "%3d %-10s %5.1f s  %s: %s\n", k+1, verdict, time.Since(began).Seconds(), mutants[k].file, strings.TrimSpace(mutants[k].now))
				if verdict != noticed {
					failed = append(failed, fmt.Sprint(k+1))
					fmt.Fprintln(out, detail)
				}
				lock.Unlock()
			}
		}()
	}
	for _, k := range picked {
		jobs <- k
	}
	close(jobs)
	group.Wait()
	fmt.Fprintf(out, "%d mutants, %d not noticed\n", len(picked), len(failed))
	if len(failed) > 0 {
		return fmt.Errorf("not noticed: %s", strings.Join(failed, ", "))
	}
	return nil
}

func pick(only []string) ([]int, error) {
	var out []int
	for _, text := range only {
		k, err := strconv.Atoi(text)
		if err != nil || k < 1 || k > len(mutants) {
			return nil, fmt.Errorf("%q: there are mutants 1 to %d", text, len(mutants))
		}
		out = append(out, k-1)
	}
	if len(only) == 0 {
		for k := range mutants {
			out = append(out, k)
		}
	}
	return out, nil
}

// What can become of a mutant.
const (
	noticed  = "noticed"
	survived = "SURVIVED"
	broken   = "BROKEN" // it does not build, or its tests cannot be run
)

// apply gives the changed file.
func (m *mutant) apply(root string) ([]byte, error) {
	text, err := os.ReadFile(filepath.Join(root, m.file))
	if err != nil {
		return nil, err
	}
	if n := bytes.Count(text, []byte(m.was)); n != 1 {
		return nil, fmt.Errorf("%s: %q stands there %d times, not once", m.file, m.was, n)
	}
	return bytes.Replace(text, []byte(m.was), []byte(m.now), 1), nil
}

// try changes the copy of the module, runs the tests, and changes it back.
func (m *mutant) try(dir string) (verdict, detail string) {
	path := filepath.Join(dir, m.file)
	before, err := os.ReadFile(path)
	if err != nil {
		return broken, err.Error()
	}
	after, err := m.apply(dir)
	if err != nil {
		return broken, err.Error()
	}
	if err := os.WriteFile(path, after, 0o644); err != nil {
		return broken, err.Error()
	}
	defer os.WriteFile(path, before, 0o644)
	for _, test := range m.tests {
		text, late, err := tested(dir, test)
		switch {
		case err == nil && !late:
			continue
		case bytes.Contains(text, []byte("[build failed]")) || bytes.Contains(text, []byte("[setup failed]")):
			return broken, string(text)
		}
		return noticed, ""
	}
	return survived, strings.Join(m.tests, "\n")
}

// tested runs tests in a folder; late says that they ran into the limit.
func tested(dir, test string) (text []byte, late bool, err error) {
	ctx, cancel := context.WithTimeout(context.Background(), limit)
	defer cancel()
	cmd := exec.CommandContext(ctx, "go", append([]string{"test", "-failfast", "-count=1"}, strings.Fields(test)...)...)
	cmd.Dir = dir
	cmd.WaitDelay = time.Second
	text, err = cmd.CombinedOutput()
	return text, errors.Is(ctx.Err(), context.DeadlineExceeded), err
}

// baseline makes sure that the tests pass where nothing is changed: else every mutant would seem
// to be noticed.
func baseline(root string, picked []int) error {
	dir, err := copied(root)
	defer os.RemoveAll(dir)
	if err != nil {
		return err
	}
	done := map[string]bool{}
	for _, k := range picked {
		for _, test := range mutants[k].tests {
			if done[test] {
				continue
			}
			done[test] = true
			if text, _, err := tested(dir, test); err != nil {
				return fmt.Errorf("without any change go test %s fails: %w\n%s", test, err, text)
			}
		}
	}
	return nil
}

// copied makes a copy of the module's Go files and what their tests read in a folder for itself.
func copied(root string) (string, error) {
	dir, err := os.MkdirTemp("", "mutants")
	if err != nil {
		return "", err
	}
	for _, name := range []string{"go.mod", "go.sum", "plan", "tasks", "weld", "testdata"} {
		from := filepath.Join(root, name)
		info, err := os.Stat(from)
		switch {
		case errors.Is(err, fs.ErrNotExist):
		case err != nil:
			return dir, err
		case info.IsDir():
			err = os.CopyFS(filepath.Join(dir, name), os.DirFS(from))
		default:
			var text []byte
			if text, err = os.ReadFile(from); err == nil {
				err = os.WriteFile(filepath.Join(dir, name), text, 0o644)
			}
		}
		if err != nil && !errors.Is(err, fs.ErrNotExist) {
			return dir, err
		}
	}
	return dir, nil
}
