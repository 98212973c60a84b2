package jobfile

import (
	"fmt"
	"strings"

	"sailby/tasks"
)

// judgeCycles reports links that go round in a circle. Every task is two points, start before
// finish; every link leads from one point to another. A circle that passes through a task (from its start to
// its finish), or that has a least wait, can hold for no times; circles of starts alone without a
// wait are allowed. One circle of each connected part is told. Cost: O(tasks + links).
func (r *reader) judgeCycles() {
	n := len(r.job.Tasks)
	index := make(map[string]int, n)
	for i, t := range r.job.Tasks {
		index[t.Name] = i
	}
	g := circle{out: make([][]arc, 2*n)}
	for i, t := range r.job.Tasks {
		g.out[2*i] = append(g.out[2*i], arc{to: 2*i + 1, strict: true})
		for j := range t.Links {
			l := &t.Links[j]
			from, ok := index[l.Task]
			if !ok {
				continue
			}
			a, b := 2*from, 2*i
			if l.From == tasks.Finish {
				a++
			}
			if l.To == tasks.Finish {
				b++
			}
			g.out[a] = append(g.out[a], arc{to: b, link: l, task: t, strict: l.Min.Minutes > 0})
		}
	}
	told := map[int]bool{}
	part := g.parts()
	for i := range g.out {
		for _, a := range g.out[i] {
			if p := part[i]; a.strict && part[a.to] == p && !told[p] {
				told[p] = true
				r.tellCircle(append([]arc{a}, g.path(a.to, i, part)...))
			}
		}
	}
}

// arc leads from one point to another; link is nil from a task's start to its finish.
type arc struct {
	to     int
	link   *tasks.Link
	task   *tasks.Task // that has the link
	strict bool
}

type circle struct{ out [][]arc }

// parts numbers the strongly connected parts of the points (Tarjan 1972, without recursion: jobs
// have long chains).
func (g circle) parts() []int {
	n := len(g.out)
	part, low, num := make([]int, n), make([]int, n), make([]int, n)
	next := make([]int, n)
	count, parts := 0, 0
	var stack, path []int
	onStack := make([]bool, n)
	for root := range g.out {
		if num[root] != 0 {
			continue
		}
		path = append(path, root)
		for len(path) > 0 {
			v := path[len(path)-1]
			if num[v] == 0 {
				count++
				num[v], low[v] = count, count
				stack = append(stack, v)
				onStack[v] = true
			}
			if next[v] < len(g.out[v]) {
				w := g.out[v][next[v]].to
				next[v]++
				if num[w] == 0 {
					path = append(path, w)
				} else if onStack[w] {
					low[v] = min(low[v], num[w])
				}
				continue
			}
			path = path[:len(path)-1]
			if len(path) > 0 {
				low[path[len(path)-1]] = min(low[path[len(path)-1]], low[v])
			}
			if low[v] == num[v] {
				parts++
				for w := -1; w != v; {
					w = stack[len(stack)-1]
					stack = stack[:len(stack)-1]
					onStack[w] = false
					part[w] = parts
				}
			}
		}
	}
	return part
}

// path gives the fewest arcs from one point to another of the same part.
func (g circle) path(from, to int, part []int) []arc {
	type hop struct {
		arc  arc
		from int
	}
	came := map[int]hop{}
	queue := []int{from}
	for len(queue) > 0 && from != to {
		at := queue[0]
		queue = queue[1:]
		for _, a := range g.out[at] {
			if _, been := came[a.to]; been || a.to == from || part[a.to] != part[from] {
				continue
			}
			came[a.to] = hop{a, at}
			queue = append(queue, a.to)
		}
		if _, ok := came[to]; ok {
			break
		}
	}
	var out []arc
	for at := to; at != from; at = came[at].from {
		out = append([]arc{came[at].arc}, out...)
	}
	return out
}

// longestCircle is how many links of a circle are printed.
const longestCircle = 12

// tellCircle prints a circle in the file's words, from the link that stands first in the file.
func (r *reader) tellCircle(path []arc) {
	var links []arc
	for _, a := range path {
		if a.link != nil {
			links = append(links, a)
		}
	}
	first := 0
	for i, a := range links {
		if p, q := a.link.Pos, links[first].link.Pos; p.Line < q.Line || p.Line == q.Line && p.Col < q.Col {
			first = i
		}
	}
	var words []string
	for i := range links {
		a := links[(first+len(links)-i)%len(links)]
		words = append(words, fmt.Sprintf("%q %s %q", a.task.Name, linkWord(a.link), a.link.Task))
	}
	if n := len(words); n > longestCircle {
		words = append(append(words[:longestCircle/2:longestCircle/2], fmt.Sprintf("(%d more links)", n-longestCircle)), words[n-longestCircle/2:]...)
	}
	r.faultAt(links[first].link.Pos, "take one of these links out", "links go round in a circle: %s", strings.Join(words, ", "))
}

func linkWord(l *tasks.Link) string {
	for _, k := range linkKeys {
		if k.from == l.From && k.to == l.To {
			if k.name == "finish after" || k.name == "finish after start of" {
				return strings.Replace(k.name, "finish", "finishes", 1)
			}
			return k.name
		}
	}
	return "after"
}
