// Command sidebyside runs general-purpose solvers and this project's engine on the same open
// instances, one after another in the same run, and prints what each closed, how fast, and the ratios. All times are
// those of whole processes, with starting and reading; the model of the others is plain.mzn.
//
//	go build -o /tmp/sailbench ./cmd/sailbench
//	npm install --prefix /tmp/mz minizinc@4.5.1
//	MINIZINC_DIST=/tmp/mz/node_modules/minizinc/dist go run ./cmd/sailbench/sidebyside -sailbench /tmp/sailbench -limit 30s -every 24 PATH...
//
// Gecode is Debian's package minizinc; the learning solver is Chuffed as WebAssembly inside the npm package minizinc, run
// under Node by wasm.mjs. A solver that is not there is left out, and the output says so.
package main

import (
	"bytes"
	"context"
	"encoding/csv"
	"flag"
	"fmt"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"time"

	"sailby/plan/instance"
)

func main() {
	if err := run(os.Args[1:], os.Stdout, os.Stderr); err != nil {
		fmt.Fprintln(os.Stderr, "sidebyside:", err)
		os.Exit(1)
	}
}

// answer is what one solver said of one instance.
type answer struct {
	status    string // optimal, feasible, infeasible, unknown
	finish    int
	wall, cpu float64 // seconds of the process
	err       string
}

func (a answer) proved() bool { return a.status == "optimal" || a.status == "infeasible" }

// solver runs one instance.
type solver struct {
	name string
	run  func(ctx context.Context, file, data string) answer
}

type flags struct {
	limit         time.Duration
	sailbench     string
	here          string
	every, offset int
	cpu           bool
}

func run(args []string, out, talk io.Writer) error {
	var o flags
	fl := flag.NewFlagSet("sidebyside", flag.ContinueOnError)
	fl.SetOutput(talk)
	fl.DurationVar(&o.limit, "limit", 30*time.Second, "most time of the clock for each solver and instance")
	fl.BoolVar(&o.cpu, "cpu", false, "the limit is one of processor time: for a machine that others use too")
	fl.StringVar(&o.sailbench, "sailbench", "sailbench", "this project's benchmark command")
	fl.StringVar(&o.here, "here", "cmd/sailbench/sidebyside", "the folder of plain.mzn and wasm.mjs")
	fl.IntVar(&o.every, "every", 1, "take one in so many instances of each folder")
	fl.IntVar(&o.offset, "from", 0, "the first one taken, counted from 0")
	if err := fl.Parse(args); err != nil {
		return err
	}
	if fl.NArg() == 0 || o.limit <= 0 || o.every < 1 || o.offset < 0 {
		return fmt.Errorf("want PATH..., -limit and -every above 0, -from at least 0")
	}
	files, err := gather(fl.Args(), o)
	if err != nil {
		return err
	}
	dir, err := os.MkdirTemp("", "sidebyside")
	if err != nil {
		return err
	}
	defer os.RemoveAll(dir)
	solvers := found(o, talk)
	all := make([][]answer, len(solvers))
	fmt.Fprintf(out, "instance,activities")
	for _, s := range solvers {
		fmt.Fprintf(out, ",%s,%s finish,%s s,%s cpu s", s.name, s.name, s.name, s.name)
	}
	fmt.Fprintln(out)
	for _, f := range files {
		in, err := instance.Read(f)
		if err != nil {
			return err
		}
		data := filepath.Join(dir, "data.dzn")
		if err := os.WriteFile(data, []byte(dataOf(in)), 0o666); err != nil {
			return err
		}
		fmt.Fprintf(out, "%s,%d", in.Name, len(in.Length)-2)
		for k, s := range solvers {
			ctx, cancel := context.WithTimeout(context.Background(), o.clock()+20*time.Second)
			a := s.run(ctx, f, data)
			cancel()
			if a.cpu >= o.limit.Seconds() { // ended by the limit
				a.err = ""
			}
			if a.err != "" {
				fmt.Fprintf(talk, "%s on %s: %s\n", s.name, in.Name, a.err)
			}
			if used := map[bool]float64{false: a.wall, true: a.cpu}[o.cpu]; used > o.limit.Seconds() && a.proved() { // too late
				a.status = map[string]string{"optimal": "feasible", "infeasible": "unknown"}[a.status]
			}
			all[k] = append(all[k], a)
			fmt.Fprintf(out, ",%s,%d,%.2f,%.2f", a.status, a.finish, a.wall, a.cpu)
		}
		fmt.Fprintln(out)
	}
	summary(out, solvers, all, o.limit.Seconds())
	return disagreements(solvers, all)
}

// clock is the most time of the clock that a solver gets: where processor time counts, so much that
// only that limits it.
func (o flags) clock() time.Duration {
	if o.cpu {
		return 100 * o.limit
	}
	return o.limit
}

// process runs a command within the limit and times it.
func (o flags) process(ctx context.Context, name string, args ...string) (string, answer) {
	if o.cpu { // the shell's limit is of whole seconds, and ends the process
		args = append([]string{"-c", fmt.Sprintf("ulimit -t %d; exec \"$@\"", int(o.limit.Seconds()+1)), "sh", name}, args...)
		name = "sh"
	}
	return process(ctx, name, args...)
}

// gather lists the instances of files and folders, each one taken as the flags say.
func gather(paths []string, o flags) ([]string, error) {
	var out []string
	for _, p := range paths {
		info, err := os.Stat(p)
		if err != nil {
			return nil, err
		}
		if !info.IsDir() {
			out = append(out, p)
			continue
		}
		var list []string
		for _, pattern := range []string{"*.sm", "*.SM", "*.sch", "*.SCH", "*.rcp", "*.RCP"} {
			more, _ := filepath.Glob(filepath.Join(p, pattern))
			list = append(list, more...)
		}
		slices.Sort(list)
		for k, f := range list {
			if k >= o.offset && (k-o.offset)%o.every == 0 {
				out = append(out, f)
			}
		}
	}
	if len(out) == 0 {
		return nil, fmt.Errorf("no .sm, .sch or .rcp files in %v", paths)
	}
	return out, nil
}

// found lists the solvers that are there.
func found(o flags, talk io.Writer) []solver {
	out := []solver{{"ours", o.ours}}
	if _, err := exec.LookPath("minizinc"); err == nil {
		out = append(out, solver{"gecode", func(ctx context.Context, _, data string) answer {
			return o.minizinc(ctx, "minizinc", "--solver", "gecode", "-i", "--time-limit", fmt.Sprint(o.clock().Milliseconds()), filepath.Join(o.here, "plain.mzn"), data)
		}})
	} else {
		fmt.Fprintln(talk, "left out: gecode (no command minizinc)")
	}
	_, err := exec.LookPath("node")
	if _, err2 := os.Stat(filepath.Join(os.Getenv("MINIZINC_DIST"), "minizinc-worker.js")); err == nil && err2 == nil {
		out = append(out, solver{"learning", func(ctx context.Context, _, data string) answer {
			return o.minizinc(ctx, "node", filepath.Join(o.here, "wasm.mjs"), "org.minizinc.chuffed", fmt.Sprint(o.clock().Seconds()), filepath.Join(o.here, "plain.mzn"), data, "-f")
		}})
	} else {
		fmt.Fprintln(talk, "left out: learning (no node, or MINIZINC_DIST is not the dist folder of the npm package minizinc)")
	}
	return out
}

// process runs a command and times it.
func process(ctx context.Context, name string, args ...string) (string, answer) {
	var text bytes.Buffer
	c := exec.CommandContext(ctx, name, args...)
	c.Stdout, c.Stderr = &text, &text
	begin := time.Now()
	err := c.Run()
	a := answer{status: "unknown", wall: time.Since(begin).Seconds()}
	if c.ProcessState != nil {
		a.cpu = (c.ProcessState.UserTime() + c.ProcessState.SystemTime()).Seconds()
	}
	if err != nil && ctx.Err() == nil && !killed(c) {
		a.err = fmt.Sprintf("%v: %.300s", err, text.String())
	}
	return text.String(), a
}

// killed says whether a process was ended by a signal, as by the limit on its processor time.
func killed(c *exec.Cmd) bool { return c.ProcessState != nil && c.ProcessState.ExitCode() < 0 }

// ours asks this project's engine through its benchmark command.
func (o flags) ours(ctx context.Context, file, _ string) answer {
	rows, err := os.CreateTemp("", "rows*.csv")
	if err != nil {
		return answer{status: "unknown", err: err.Error()}
	}
	rows.Close()
	defer os.Remove(rows.Name())
	_, a := o.process(ctx, o.sailbench, "-limit", o.limit.String(), fmt.Sprintf("-cpu=%v", o.cpu), "-csv", rows.Name(), file)
	f, err := os.Open(rows.Name())
	if err != nil {
		a.err = err.Error()
		return a
	}
	defer f.Close()
	list, err := csv.NewReader(f).ReadAll()
	if err != nil || len(list) != 2 {
		return a
	}
	a.status = list[1][2]
	a.finish, _ = strconv.Atoi(list[1][3])
	return a
}

var finishes = regexp.MustCompile(`finish=(\d+)`)

// minizinc asks a solver through MiniZinc, and reads what it prints or the runner's JSON.
func (o flags) minizinc(ctx context.Context, name string, args ...string) answer {
	text, a := o.process(ctx, name, args...)
	return read(text, a)
}

// read finds the last finish and the outcome in a solver's output.
func read(text string, a answer) answer {
	if m := finishes.FindAllStringSubmatch(text, -1); m != nil {
		a.finish, _ = strconv.Atoi(m[len(m)-1][1])
		a.status = "feasible"
	}
	switch {
	case strings.Contains(text, "UNSATISFIABLE"):
		a.status = "infeasible"
	case a.status == "feasible" && (strings.Contains(text, "==========") || strings.Contains(text, "OPTIMAL_SOLUTION")):
		a.status = "optimal"
	}
	return a
}

// dataOf writes an instance for plain.mzn.
func dataOf(in *instance.Instance) string {
	var b strings.Builder
	list := func(name string, v []int) {
		fmt.Fprintf(&b, "%s = %s;\n", name, strings.ReplaceAll(fmt.Sprint(v), " ", ","))
	}
	fmt.Fprintf(&b, "n = %d;\nm = %d;\nH = %d;\nL = %d;\n", len(in.Length), len(in.Capacity), in.Horizon(), len(in.Lags))
	list("length", in.Length)
	list("capacity", in.Capacity)
	b.WriteString("demand = [|")
	for k := range in.Capacity {
		for i := range in.Length {
			fmt.Fprintf(&b, "%d,", in.Demand[i][k])
		}
		b.WriteString("|")
	}
	b.WriteString("];\n")
	var from, to, lag []int
	for _, l := range in.Lags {
		from, to, lag = append(from, l.From+1), append(to, l.To+1), append(lag, l.Min)
	}
	list("from", from)
	list("to", to)
	list("lag", lag)
	return b.String()
}

// summary prints how many each solver proved and its median time to proof, over all instances: one that is not
// proved counts with the limit. The ratios are ours to each.
func summary(out io.Writer, solvers []solver, all [][]answer, limit float64) {
	count := func(list []answer) (proved int, wall, cpu float64) {
		var w, c []float64
		for _, a := range list {
			if a.proved() {
				proved++
				w, c = append(w, a.wall), append(c, a.cpu)
				continue
			}
			w, c = append(w, limit), append(c, limit)
		}
		return proved, median(w), median(c)
	}
	p0, w0, c0 := count(all[0])
	for k, s := range solvers {
		p, w, c := count(all[k])
		fmt.Fprintf(out, "%-9s proved %d of %d; median time to proof %.2f s, of the processor %.2f s", s.name, p, len(all[k]), w, c)
		failed := 0
		for _, a := range all[k] {
			if a.err != "" {
				failed++
			}
		}
		if failed > 0 {
			fmt.Fprintf(out, "; did not run on %d", failed)
		}
		if k > 0 && p > 0 {
			fmt.Fprintf(out, "; ours to it: %.2f on proofs, %.2f on time, %.2f on processor time", float64(p0)/float64(p), w0/max(w, 0.01), c0/max(c, 0.01))
		}
		fmt.Fprintln(out)
	}
}

func median(list []float64) float64 {
	if len(list) == 0 {
		return 0
	}
	s := slices.Sorted(slices.Values(list))
	return s[len(s)/2]
}

// disagreements is an error where two proofs contradict each other, or a plan a proof.
func disagreements(solvers []solver, all [][]answer) error {
	for i := range all[0] {
		for a := range solvers {
			for b := range solvers {
				x, y := all[a][i], all[b][i]
				if x.status == "optimal" && y.status != "unknown" && (y.status == "infeasible" || y.finish < x.finish) || x.status == "infeasible" && y.status == "feasible" {
					return fmt.Errorf("%s and %s contradict each other: %+v, %+v", solvers[a].name, solvers[b].name, x, y)
				}
			}
		}
	}
	return nil
}
