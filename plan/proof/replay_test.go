package proof

import (
	"errors"
	"strings"
	"testing"

	"sailby/plan/problem"
)

// TestLines replays short logs about the yard: where each is refused, and for what.
func TestLines(t *testing.T) {
	const order = "var x1 order 0 1\n"
	for _, c := range []struct {
		name, log string
		line      int // where it is refused; 0: it holds
		why       string
		finish    int
	}{
		{"nothing shown", head + "bound 0\n", 0, "", 0},
		{"empty", "", 0, "before it has shown anything", -1},
		{"no end", head, 2, "before it has shown anything", 0},
		{"other form", "sailby refutation 2\n", 1, `want "sailby refutation 1"`, 0},
		{"another job", "sailby refutation 1\njob 8 activities 5 links 2 resources 3 people horizon 101\n", 2, "want \"job", 0},
		{"a bound", head + "until 14\nend 1 : s1>=8 e<=14\nso : s1>=8\nlink 0 : s1<=7 s0>=0\nso : s0>=0\nnone\n", 0, "", 15},
		{"the same without its lemma", head + "until 14\nso : s1>=8\nlink 0 : s1<=7 s0>=0\nso : s0>=0\nnone\n", 4, "lead to no contradiction", 0},
		{"the same for a later finish", head + "until 17\nend 1 : s1>=8 e<=14\nso : s1>=8\nlink 0 : s1<=7 s0>=0\nso : s0>=0\nnone\n", 5, "lead to no contradiction", 0},
		{"until goes up", head + "until 14\nuntil 15\n", 4, "no later than before", 0},
		{"until goes down", head + "until 14\nuntil 13\nbound 0\n", 0, "", 0},
		{"a finish that is not shown", head + "bound 11\n", 3, "no finish before 0 is shown, not 11", 0},
		{"a finish that is shown", head + "end 1 : s1>=3 e<=9\nso : e<=9\nbound 10\n", 0, "", 10},
		{"a finish beyond until", head + "until 20\nend 1 : s1>=3 e<=9\nso : e<=9\nbound 11\n", 6, "no finish before 10 is shown, not 11", 0},
		{"words after the end", head + "bound 0\nbound 0\n", 4, "has come to its end", 0},
		{"two facts open", head + order + "apart x1 : x1>=1 s0>=10 s1<=14\nso 3 : s1<=14 e<=1\n", 5, "leaves two facts open", 0},
		{"clause and its use", head + order + "apart x1 : x1>=1 s0>=10 s1<=14\nso 3 : x1>=1 s0>=10 s1<=14\nby 3\nso 4 : x1>=1 s0>=11 s1<=13\nbound 0\n", 0, "", 0},
		{"clause used too far", head + order + "apart x1 : x1>=1 s0>=10 s1<=14\nso 3 : x1>=1 s0>=10 s1<=14\nby 3\nso 4 : x1>=1 s0>=9 s1<=14\nbound 0\n", 7, "lead to no contradiction", 0},
		{"a clause's number twice", head + order + "apart x1 : x1>=1 s0>=10 s1<=14\nso 3 : x1>=1 s0>=10 s1<=14\nby 3\nso 3 : x1>=1 s0>=11 s1<=13\n", 7, "there is a clause 3 already", 0},
		{"a clause that has gone", head + order + "apart x1 : x1>=1 s0>=10 s1<=14\nso 3 : x1>=1 s0>=10 s1<=14\ndrop 3\nby 3\n", 7, "there is no clause 3", 0},
		{"a clause that never was", head + "by 3\n", 3, "there is no clause 3", 0},
		{"dropped twice", head + "drop 3\n", 3, "there is no clause 3", 0},
		{"no number", head + order + "apart x1 : x1>=1 s0>=10 s1<=14\nso : x1>=1 s0>=10 s1<=14\n", 5, "has no number", 0},
		{"facts that contradict each other", head + "so 1 : s0>=10 s0<=9\nbound 0\n", 0, "", 0},
		{"nothing by that name", head + "link 0 : s9>=1\n", 3, `nothing is called "s9"`, 0},
		{"a finish of fixed length", head + "link 0 : f0>=1\n", 3, `nothing is called "f0"`, 0},
		{"no bound", head + "link 0 : s0=1\n", 3, `"s0=1" is no bound`, 0},
		{"no minute", head + "link 0 : s0>=1x\n", 3, `"1x" is no minute`, 0},
		{"too large a minute", head + "link 0 : s0>=99999999999999999999\n", 3, "is no minute", 0},
		{"no link", head + "link 5 : s0>=1\n", 3, "number 5 is beyond what there is", 0},
		{"a number too many", head + "link 0 0 : s0>=1\n", 3, "want 1 numbers and have 2", 0},
		{"below 0", head + "use -1 0 1 : s0>=1\n", 3, `"-1" is no number`, 0},
		{"beyond the horizon", head + "use 0 0 102 : s0>=1\n", 3, "number 102 is beyond what there is", 0},
		{"people twice", head + "crew 1,1 0 1 : s0>=1\n", 3, "by rising numbers", 0},
		{"nobody", head + "crew 4 0 1 : s0>=1\n", 3, "by rising numbers", 0},
		{"not a kind", head + "hope 4 : s0>=1\n", 3, `"hope" is no kind of lemma`, 0},
		{"not a line", head + "hope\n", 3, `"hope" is nothing that a log says`, 0},
		{"takes more than there is", head + "excess 0 0 :\n", 3, "takes 1 of resource 0, and there is 1", 0},
		{"has openings", head + "shut 2 :\n", 3, "has possible starts", 0},
		{"steps that do not meet", head + "path min0 min0 : s0>=1\n", 3, "begins at activity 0, not at 1", 0},
		{"a step that bends", head + "path min1 : s2>=1\n", 3, "no lag of fixed length", 0},
		{"no steps", head + "path : s2>=1\n", 3, "a path of no steps", 0},
	} {
		r, err := Replay(yard(), strings.NewReader(c.log))
		var e *Error
		switch {
		case c.why == "" && (err != nil || r.Finish != c.finish):
			t.Errorf("%s: %v, no finish before %d; want %d", c.name, err, r.Finish, c.finish)
		case c.why != "" && (!errors.As(err, &e) || e.Line != c.line || !strings.Contains(e.Why, c.why)):
			t.Errorf("%s: %v, want line %d and %q", c.name, err, c.line, c.why)
		}
	}
}

// TestNoPlan shows that there is none where the problem's own bounds or a lemma without facts say so.
func TestNoPlan(t *testing.T) {
	for _, c := range []struct {
		name   string
		change func(p *problem.Problem)
		log    string
	}{
		{"a window too short", func(p *problem.Problem) { p.Acts[1].By = 9 }, "none\n"},
		{"one too many", func(p *problem.Problem) { p.Acts[0].Uses[0].Amount = 2 }, "excess 0 0 :\nnone\n"},
		{"no opening", func(p *problem.Problem) {
			p.Acts[2].Tried, p.Acts[2].Modes, p.Acts[2].Times = []*problem.Timing{problem.Worked(nil, nil, problem.Rules{Work: 1})}, nil, nil
		}, "shut 2 :\nnone\n"},
		{"waits that contradict each other", func(p *problem.Problem) { p.Links[0].Max = 3 }, "path min0 max0 :\nnone\n"},
		{"a rule that leaves no choice", func(p *problem.Problem) { p.Orders[0].Choices = nil }, "rule 0 0 :\nnone\n"},
	} {
		p := yard()
		p.Links[0].Max = 4 // just what is least
		if _, err := Replay(p, strings.NewReader(head+c.log)); err == nil {
			t.Errorf("%s: shown though it is not so", c.name)
		}
		c.change(p)
		if r, err := Replay(p, strings.NewReader(head+c.log)); err != nil || r.Finish != problem.Inf {
			t.Errorf("%s: %v, no finish before %d", c.name, err, r.Finish)
		}
	}
}

func FuzzReplay(f *testing.F) {
	f.Add(head + "until 14\nend 1 : s1>=8 e<=14\nso : s1>=8\nlink 0 : s1<=7 s0>=0\nso : s0>=0\nnone\n")
	f.Add(head + "var x1 order 0 1\nvar x2 choice 0 1\nvar x3 part 4 2 0 0\napart x1 : x1>=1 s0>=10 s1<=14\nso 3 : x1>=1 s0>=10 s1<=14\nby 3\ndrop 3\nbound 0\n")
	f.Add(head + "use 0 10 21 : s0>=10 s0<=16 s1>=10 s1<=14\ncrew 0,1 10 20 : s2>=10 f2<=20 s3>=10 f3<=20\npath min0 !x1 : x1<=0\nhours 2 : s2>=11 f2<=34\n")
	p := yard()
	f.Fuzz(func(t *testing.T, log string) {
		r, err := Replay(p, strings.NewReader(log))
		if err == nil && r.Finish > 16 { // there is a plan that finishes at 16
			t.Errorf("%q shows that nothing finishes before %d", log, r.Finish)
		}
		if err != nil && r != (Result{}) {
			t.Errorf("%q: an error and a result", log)
		}
	})
}
