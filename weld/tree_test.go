package weld

import (
	"fmt"
	"math"
	"sort"
	"strconv"
	"strings"
	"testing"

	"sailby/tasks/origin"
)

// recompute works a formula's text out again from the figures it was made from, as a reader
// with a calculator would: names stand for values, angles are degrees.
func recompute(f origin.Figure) (float64, error) {
	names := make([]string, 0, len(f.From))
	vals := map[string]float64{}
	for _, g := range f.From {
		if old, ok := vals[g.Name]; ok && old != g.Value {
			return 0, fmt.Errorf("%q stands for two values", g.Name)
		}
		if _, ok := vals[g.Name]; !ok {
			names = append(names, g.Name)
		}
		vals[g.Name] = g.Value
	}
	sort.Slice(names, func(i, j int) bool { return len(names[i]) > len(names[j]) })
	p := &reader{s: f.Origin.Source, names: names, vals: vals}
	v := p.sum()
	p.blank()
	if p.err == nil && p.s != "" {
		p.err = fmt.Errorf("cannot read %q", p.s)
	}
	return v, p.err
}

type reader struct {
	s     string
	names []string
	vals  map[string]float64
	err   error
}

func (p *reader) blank() { p.s = strings.TrimLeft(p.s, " ") }

func (p *reader) take(tok string) bool {
	p.blank()
	if strings.HasPrefix(p.s, tok) {
		p.s = p.s[len(tok):]
		return true
	}
	return false
}

func (p *reader) sum() float64 {
	v := p.product()
	for {
		switch {
		case p.take("+ "):
			v += p.product()
		case p.take("- "):
			v -= p.product()
		default:
			return v
		}
	}
}

func (p *reader) product() float64 {
	v := p.power()
	for {
		switch {
		case p.take("x "):
			v *= p.power()
		case p.take("/ "):
			v /= p.power()
		default:
			return v
		}
	}
}

func (p *reader) power() float64 {
	v := p.atom()
	if p.take("^") {
		return math.Pow(v, p.atom())
	}
	return v
}

func (p *reader) atom() float64 {
	p.blank()
	for _, n := range p.names {
		if p.take(n) {
			return p.vals[n]
		}
	}
	for name, fn := range functions {
		if p.take(name + "(") {
			args := []float64{p.sum()}
			for p.take(",") {
				args = append(args, p.sum())
			}
			if !p.take(")") {
				p.err = fmt.Errorf("no closing bracket before %q", p.s)
			}
			return fn(args)
		}
	}
	if p.take("(") {
		v := p.sum()
		if !p.take(")") {
			p.err = fmt.Errorf("no closing bracket before %q", p.s)
		}
		return v
	}
	if p.take("pi") {
		return math.Pi
	}
	n := 0
	for n < len(p.s) && (p.s[n] >= '0' && p.s[n] <= '9' || p.s[n] == '.') {
		n++
	}
	v, err := strconv.ParseFloat(p.s[:n], 64)
	if err != nil {
		p.err, p.s = fmt.Errorf("no value at %q", p.s), ""
	}
	p.s = p.s[n:]
	return v
}

var functions = map[string]func([]float64) float64{
	"max":  func(a []float64) float64 { sort.Float64s(a); return a[len(a)-1] },
	"min":  func(a []float64) float64 { sort.Float64s(a); return a[0] },
	"ceil": func(a []float64) float64 { return math.Ceil(a[0] - 1e-9) },
	"sqrt": func(a []float64) float64 { return math.Sqrt(a[0]) },
	"tanh": func(a []float64) float64 { return math.Tanh(a[0]) },
	"tan":  func(a []float64) float64 { return math.Tan(a[0] * math.Pi / 180) },
	"sin":  func(a []float64) float64 { return math.Sin(a[0] * math.Pi / 180) },
	"cos":  func(a []float64) float64 { return math.Cos(a[0] * math.Pi / 180) },
}

// checkTree fails where any formula of a tree does not give its own value, and where a figure
// has no name or no origin in words.
func checkTree(t interface{ Errorf(string, ...any) }, top origin.Figure) {
	top.Walk(func(f origin.Figure, _ int) {
		if f.Name == "" || f.Origin.String() == "" {
			t.Errorf("a figure of %q has no name or no origin: %+v", top.Name, f)
		}
		if f.Origin.Kind != origin.Formula {
			return
		}
		v, err := recompute(f)
		if err != nil {
			t.Errorf("%s = %q: %v", f.Name, f.Origin.Source, err)
			return
		}
		if math.Abs(v-f.Value) > 1e-9*math.Max(1, math.Abs(f.Value)) {
			t.Errorf("%s = %v, but %q gives %v", f.Name, f.Value, f.Origin.Source, v)
		}
	})
}

func TestRecomputeReadsArithmetic(t *testing.T) {
	two := origin.Written("side", 2, "mm", origin.Origin{})
	three := origin.Written("side two", 3, "mm", origin.Origin{})
	for _, c := range []struct {
		text string
		want float64
	}{{"side + side two x 2", 8}, {"(side + side two) x 2", 10}, {"side^2 / 4", 1}, {"max(1, side, side two) - 1", 2}, {"tan(15 x side two)", 1}, {"1 - side two x side", -5}} {
		got, err := recompute(origin.Worked("x", 0, "", c.text, two, three))
		if err != nil || math.Abs(got-c.want) > 1e-12 {
			t.Errorf("%s = %v, %v; want %v", c.text, got, err, c.want)
		}
	}
	if _, err := recompute(origin.Worked("x", 0, "", "side + nonsense", two)); err == nil {
		t.Error("a name that stands for nothing was read")
	}
}
