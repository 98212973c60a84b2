package proof

import (
	"fmt"
	"strconv"
	"strings"

	"sailby/plan/problem"
	"sailby/tasks/hours"
)

// version is the form of the log that is read.
const version = "1"

// read verifies one line.
func (c *checker) read(text string) error {
	if c.over {
		return fmt.Errorf("the log has come to its end before")
	}
	words := strings.Split(text, " ")
	if c.stage < 2 {
		c.stage++
		return c.head(text)
	}
	name, rest := words[0], words[1:]
	head, facts, colon := rest, []string(nil), false
	for k, w := range rest {
		if w == ":" {
			head, facts, colon = rest[:k], rest[k+1:], true
			break
		}
	}
	if !colon {
		return c.order(name, head)
	}
	fs := make([]fact, 0, len(facts))
	for _, w := range facts {
		f, err := c.fact(w)
		if err != nil {
			return err
		}
		fs = append(fs, f)
	}
	if name == "so" {
		n := 0
		if len(head) > 0 {
			list, err := numbers(head, 1)
			if err != nil {
				return err
			}
			n = list[0]
		}
		return c.so(n, fs)
	}
	if err := c.lemma(name, head, fs); err != nil {
		return err
	}
	c.result.Lemmas++
	c.steps = append(c.steps, fs)
	return nil
}

// head verifies the first two lines.
func (c *checker) head(text string) error {
	p := c.p
	want := "sailby refutation " + version
	if c.stage == 2 {
		want = fmt.Sprintf("job %d activities %d links %d resources %d people horizon %d", len(p.Acts), len(p.Links), len(p.Res), len(p.People), p.End)
	}
	if text != want {
		return fmt.Errorf("want %q", want)
	}
	return nil
}

// order obeys a line without facts.
func (c *checker) order(name string, args []string) error {
	switch name {
	case "var":
		if len(args) < 3 || !ownName(args[0]) {
			return fmt.Errorf("want var, a name of its own, and a meaning")
		}
		list, err := numbers(args[2:], -1)
		if err != nil {
			return err
		}
		return c.declare(args[0], args[1], list)
	case "by":
		list, err := numbers(args, 1)
		if err != nil {
			return err
		}
		fs, ok := c.clauses[list[0]]
		if !ok {
			return fmt.Errorf("there is no clause %d", list[0])
		}
		c.steps = append(c.steps, fs)
		return nil
	case "drop":
		list, err := numbers(args, 1)
		if err != nil {
			return err
		}
		if _, ok := c.clauses[list[0]]; !ok {
			return fmt.Errorf("there is no clause %d", list[0])
		}
		delete(c.clauses, list[0])
		return nil
	case "until":
		t, err := strconv.Atoi(strings.Join(args, " "))
		if err != nil || t < -1 || t > c.until {
			return fmt.Errorf("want a minute that is no later than before")
		}
		c.until = t
		x := c.vars["e"]
		c.root[x].narrow(fact{x, true, int32(t)})
		c.now[x] = c.root[x]
		c.dead = c.dead || c.root[x].lo > c.root[x].hi
		return nil
	case "none":
		if len(args) > 0 {
			return fmt.Errorf("%q is too much", args[0])
		}
		return c.end(-1)
	case "bound":
		list, err := numbers(args, 1)
		if err != nil {
			return err
		}
		return c.end(list[0])
	}
	return fmt.Errorf("%q is nothing that a log says", name)
}

// lemma verifies a lemma.
func (c *checker) lemma(name string, args []string, fs []fact) error {
	v, open := c.look(fs)
	p := c.p
	switch name {
	case "path":
		return c.path(args, v)
	case "apart", "stay":
		if len(args) != 1 {
			return fmt.Errorf("want the name of one variable")
		}
		x, ok := c.vars[args[0]]
		if !ok {
			return fmt.Errorf("nothing is called %q", args[0])
		}
		switch kind := c.means[x].kind; {
		case name == "apart" && kind != "order" && kind != "pair", name == "stay" && kind != "keep":
			return fmt.Errorf("%s does not mean what %q is about", args[0], name)
		case !open:
			return nil
		case name == "stay":
			return c.stay(x, v)
		}
		return c.apart(x, v)
	case "crew":
		return c.crewLemma(args, v, open)
	}
	shape, ok := map[string][]int{"link": {len(p.Links)}, "hours": {len(p.Acts)}, "end": {len(p.Acts)}, "shut": {len(p.Acts)},
		"rule": {len(p.Orders), furthest}, "excess": {len(p.Res), len(p.Acts)}, "use": {len(p.Res), p.End + 1, p.End + 1},
		"some": {len(p.Orders)}, "modes": {len(p.Acts)}, "keepers": {len(p.Acts)}, "person": {len(p.People), p.End + 1, p.End + 1}}[name]
	if !ok {
		return fmt.Errorf("%q is no kind of lemma", name)
	}
	list, err := numbers(args, len(shape))
	if err != nil {
		return err
	}
	for k, n := range list {
		if n >= shape[k] {
			return fmt.Errorf("number %d is beyond what there is", n)
		}
	}
	if !open {
		return nil
	}
	switch name {
	case "link":
		return c.link(list[0], v)
	case "hours":
		return c.hours(list[0], v)
	case "end":
		return c.ending(list[0], v)
	case "rule":
		return c.rule(list[0], list[1], v)
	case "excess":
		return c.excess(list[0], list[1])
	case "shut":
		return c.shut(list[0])
	case "some":
		return c.some(list[0], v)
	case "modes":
		return c.modes(list[0], v)
	case "keepers":
		return c.keepers(list[0], v)
	}
	win := hours.Span{From: hours.Minute(list[1]), To: hours.Minute(list[2])}
	if name == "person" {
		return c.person(list[0], win, v)
	}
	return c.use(list[0], win, v)
}

// crewLemma reads a lemma about people.
func (c *checker) crewLemma(args []string, v view, open bool) error {
	if len(args) != 3 {
		return fmt.Errorf("want people and two minutes")
	}
	who, err := numbers(strings.Split(args[0], ","), -1)
	if err != nil {
		return err
	}
	for k, q := range who {
		if q >= len(c.p.People) || k > 0 && q <= who[k-1] {
			return fmt.Errorf("want people by rising numbers")
		}
	}
	win, err := numbers(args[1:], 2)
	if err != nil {
		return err
	}
	if win[0] > c.p.End || win[1] > c.p.End {
		return fmt.Errorf("minutes beyond the horizon")
	}
	if !open {
		return nil
	}
	return c.crew(who, hours.Span{From: hours.Minute(win[0]), To: hours.Minute(win[1])}, v)
}

// fact reads a bound.
func (c *checker) fact(text string) (fact, error) {
	k := strings.IndexAny(text, "<>")
	if k < 1 || k+2 >= len(text) || text[k+1] != '=' {
		return fact{}, fmt.Errorf("%q is no bound", text)
	}
	x, ok := c.vars[text[:k]]
	if !ok {
		return fact{}, fmt.Errorf("nothing is called %q", text[:k])
	}
	n, err := strconv.Atoi(text[k+2:])
	if err != nil || n < -problem.Inf || n > problem.Inf {
		return fact{}, fmt.Errorf("%q is no minute", text[k+2:])
	}
	return fact{x, text[k] == '<', int32(n)}, nil
}

// ownName says whether a name is fit for a variable of the log's own.
func ownName(s string) bool {
	if len(s) < 2 || len(s) > 12 || s[0] != 'x' && s[0] != 'y' {
		return false
	}
	_, err := strconv.ParseUint(s[1:], 10, 32)
	return err == nil
}

// numbers reads whole numbers from 0 on: so many, or at least one where n is -1.
func numbers(words []string, n int) ([]int, error) {
	if n >= 0 && len(words) != n || len(words) == 0 {
		return nil, fmt.Errorf("want %d numbers and have %d", max(n, 1), len(words))
	}
	out := make([]int, len(words))
	for k, w := range words {
		x, err := strconv.ParseUint(w, 10, 31)
		if err != nil {
			return nil, fmt.Errorf("%q is no number", w)
		}
		out[k] = int(x)
	}
	return out, nil
}
