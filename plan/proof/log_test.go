package proof_test

import (
	"bytes"
	"fmt"
	"math/rand/v2"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"sailby/plan/instance"
	"sailby/plan/learn"
	"sailby/plan/problem"
	"sailby/plan/proof"
	"sailby/plan/random"
	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// logged is a problem with the log of its refutation, and what that shows.
type logged struct {
	p     *problem.Problem
	lines []string
	shown int
}

// someLogs are those of random jobs and of random instances whose best finish is known.
func someLogs(t *testing.T) []logged {
	t.Helper()
	var all []logged
	add := func(p *problem.Problem, o learn.Options) {
		var log bytes.Buffer
		o.Log = &log
		r := learn.Solve(p, o)
		shown, err := proof.Replay(p, bytes.NewReader(log.Bytes()))
		if r.LogErr != nil || err != nil {
			t.Fatalf("%v, %v", r.LogErr, err)
		}
		lines := strings.Split(strings.TrimSpace(log.String()), "\n")
		if r.Status != learn.Feasible && r.Status != learn.Unknown && len(lines) < 600 {
			all = append(all, logged{p, lines, shown.Finish})
		}
	}
	for i := range 8 {
		job, err := jobfile.ReadBytes("job.yaml", []byte(random.Job(random.Knobs{Size: 5 + i%4, Seed: uint64(70 + i), Class: random.Classes()[i%4]})), nil)
		if err != nil {
			t.Fatal(err)
		}
		work, faults := expand.Expand(job, expand.Basis{})
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		add(problem.Compile(work), learn.Options{Ticks: 3_000_000})
	}
	r := rand.New(rand.NewPCG(6, 2))
	for range 12 {
		add(randomInstance(r, 8), learn.Options{Ticks: 3_000_000})
	}
	return all
}

// randomInstance makes activities of fixed length with waits both ways on two resources.
func randomInstance(r *rand.Rand, n int) *problem.Problem {
	in := instance.Instance{Name: "random", Capacity: []int{3 + r.IntN(3), 2 + r.IntN(3)}}
	for i := 0; i < n; i++ {
		in.Length = append(in.Length, 1+r.IntN(9))
		in.Demand = append(in.Demand, []int{r.IntN(in.Capacity[0] + 1), r.IntN(in.Capacity[1] + 1)})
		for k := r.IntN(2); k > 0 && i > 0; k-- {
			j := r.IntN(i)
			in.Lags = append(in.Lags, instance.Lag{From: j, To: i, Min: r.IntN(in.Length[j] + 2)})
			if r.IntN(3) == 0 {
				in.Lags = append(in.Lags, instance.Lag{From: i, To: j, Min: -in.Length[j] - 4 - r.IntN(12)})
			}
		}
	}
	return in.Problem()
}

var number = regexp.MustCompile(`(>=|<=)(-?\d+)`)

// weaken makes the first fact of a line that says something hold more often.
func weaken(line string, by int) string {
	done := false
	return number.ReplaceAllStringFunc(line, func(s string) string {
		n, _ := strconv.Atoi(s[2:])
		if done {
			return s
		}
		done = true
		if s[:2] == ">=" {
			return fmt.Sprintf(">=%d", n-by)
		}
		return fmt.Sprintf("<=%d", n+by)
	})
}

// TestTampering changes a log in one place, in each of the ways in which somebody might. It may not show more than the
// untouched log does, which is the truth; and what changes the argument is refused, most of it at once.
func TestTampering(t *testing.T) {
	type way struct {
		name string
		do   func(l []string, at int) []string // nil: there is nothing to change
		must float64                           // share that is refused at least: some changes leave an argument
	}
	change := func(is func(string) bool, to func(string) string) func(l []string, at int) []string {
		return func(l []string, at int) []string {
			if at < 2 || !is(l[at]) {
				return nil
			}
			out := append([]string(nil), l...)
			if out[at] = to(l[at]); out[at] == l[at] {
				return nil
			}
			return out
		}
	}
	lemma := func(s string) bool {
		return strings.Contains(s, " :") && !strings.HasPrefix(s, "so")
	}
	starts := func(what string) func(string) bool {
		return func(s string) bool { return strings.HasPrefix(s, what) }
	}
	next := regexp.MustCompile(`^(\w+) (\d+)`)
	ways := []way{
		{"a lemma left out", func(l []string, at int) []string {
			if at < 2 || !lemma(l[at]) {
				return nil
			}
			return append(append([]string(nil), l[:at]...), l[at+1:]...)
		}, 0.9},
		{"a clause left out", func(l []string, at int) []string {
			if at < 2 || !strings.HasPrefix(l[at], "so") {
				return nil
			}
			return append(append([]string(nil), l[:at]...), l[at+1:]...)
		}, 0.6}, // what has led to it may lead to the next as well
		{"a fact of a lemma weakened", change(lemma, func(s string) string { return weaken(s, 1000) }), 0.9},
		{"a clause made to say more", change(starts("so"), func(s string) string { return weaken(s, 1000) }), 0.95},
		{"another resource or activity", change(lemma, func(s string) string {
			return next.ReplaceAllStringFunc(s, func(x string) string {
				w := strings.Fields(x)
				n, _ := strconv.Atoi(w[1])
				return w[0] + " " + strconv.Itoa(n+1)
			})
		}), 0.8},
		{"an earlier end claimed", change(starts("until"), func(s string) string {
			n, _ := strconv.Atoi(strings.Fields(s)[1])
			return fmt.Sprintf("until %d", n+40)
		}), 0.5},
		{"a bound claimed", func(l []string, at int) []string {
			if at < len(l)-1 {
				return nil
			}
			return append(append([]string(nil), l[:at]...), "bound 100000")
		}, 0.9},
		{"cut off", func(l []string, at int) []string { return l[:at:at] }, 1},
	}
	logs := someLogs(t)
	r := rand.New(rand.NewPCG(2, 2))
	for _, w := range ways {
		tried, refused := 0, 0
		for _, l := range logs {
			if w.name == "a bound claimed" && l.shown >= 100_000 {
				continue // nothing fits at all: then it is true
			}
			var where []int
			for at := range l.lines {
				if w.do(l.lines, at) != nil {
					where = append(where, at)
				}
			}
			for k := 0; k < 8 && len(where) > 0; k++ {
				at := where[r.IntN(len(where))]
				changed := w.do(l.lines, at)
				tried++
				got, err := proof.Replay(l.p, strings.NewReader(strings.Join(changed, "\n")))
				switch {
				case err != nil:
					refused++
				case got.Finish > l.shown:
					t.Fatalf("%s, line %d: shows that nothing finishes before %d, and %d is the best", w.name, at+1, got.Finish, l.shown)
				}
			}
		}
		if tried < 20 || float64(refused) < w.must*float64(tried) {
			t.Errorf("%s: %d of %d refused, want a share of %g", w.name, refused, tried, w.must)
		}
	}
}

// TestOpenInstances replays what the search says of a share of the published sets, where they are at hand.
func TestOpenInstances(t *testing.T) {
	dir := os.Getenv("SAILBY_SHARED")
	if dir == "" {
		dir = filepath.Join("..", "..", "..", "shared")
	}
	n, settled := 0, 0
	for _, set := range []struct {
		glob  string
		every int
	}{{"psplib/j30/*.sm", 20}, {"psplib/j60/*.sm", 40}, {"rcpspmax/j10/*.[sS][cC][hH]", 9}, {"rcpspmax/j30/*.[sS][cC][hH]", 15}, {"rcpspmax/ubo10/*.[sS][cC][hH]", 4}, {"rcpspmax/ubo50/*.[sS][cC][hH]", 9}} {
		files, _ := filepath.Glob(filepath.Join(dir, "data", set.glob))
		for k := 0; k < len(files); k += set.every {
			in, err := instance.Read(files[k])
			if err != nil {
				t.Fatal(err)
			}
			p := in.Problem()
			var log bytes.Buffer
			r := learn.Solve(p, learn.Options{Ticks: 3_000_000, Log: &log})
			got, err := proof.Replay(p, &log)
			want := r.Bound
			if r.Status == learn.Infeasible {
				want = problem.Inf
			}
			if err != nil || r.LogErr != nil || got.Finish < want {
				t.Errorf("%s: %v, %v; shown that nothing finishes before %d, the search says %d", in.Name, r.LogErr, err, got.Finish, want)
			}
			n++
			if r.Status == learn.Optimal || r.Status == learn.Infeasible {
				settled++
			}
		}
	}
	if n == 0 {
		t.Skip("the open instances are not beside the project; SAILBY_SHARED says where they are")
	}
	if settled < n*3/4 {
		t.Errorf("%d of %d settled: too few to tell", settled, n)
	}
}
