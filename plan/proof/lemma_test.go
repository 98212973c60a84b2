package proof

import (
	"strings"
	"testing"

	"sailby/plan/problem"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

// yard is a problem with one of everything, small enough to be worked out by hand: its site work, activities 0 and 1,
// is over at 16 at the earliest, and is then with 2 from 10 to 34 and 3 from 37 to 44. The calendar is open
// from 10 to 20, from 30 to 40 and from 41 to 50; the first stop is a night, the second a meal.
func yard() *problem.Problem {
	open := hours.Set{{From: 10, To: 20}, {From: 30, To: 40}, {From: 41, To: 50}}
	worked := func(work, setUp int) *problem.Timing {
		return problem.Worked(open, open.Joined(1, nil), problem.Rules{Work: work, SetUp: setUp, Least: 2})
	}
	late := hours.Set{{From: 30, To: 60}}
	p := &problem.Problem{End: 100, Close: 90, People: make([]problem.Person, 3),
		Res: []problem.Resource{{Capacity: 1}, {Capacity: 3}}}
	p.Acts = []problem.Act{
		{By: problem.Inf, Site: true, Modes: []problem.Mode{{Time: problem.Fixed(5)}}, Uses: []problem.Use{{Res: 0, Amount: 1}, {Res: 1, Amount: 2}}},
		{By: 80, From: 3, Site: true, Modes: []problem.Mode{{Time: problem.Fixed(7)}}, Uses: []problem.Use{{Res: 0, Amount: 1}, {Res: 1, Amount: 2, Stays: true}}},
		{By: problem.Inf, Modes: []problem.Mode{{Crew: []int{0}, Time: worked(12, 1)}, {Crew: []int{1}, Time: worked(12, 1)}}, Uses: []problem.Use{{Res: 1, Amount: 1}}},
		{By: problem.Inf, Modes: []problem.Mode{{Crew: []int{0}, Time: worked(6, 0)}}},
		{By: problem.Inf, Modes: []problem.Mode{{Crew: []int{2}, Time: worked(4, 0)}, {Crew: []int{1}, Time: problem.Worked(late, late, problem.Rules{Work: 4})}}},
		{By: problem.Inf, Modes: []problem.Mode{{Time: problem.Fixed(0)}}},
		{By: problem.Inf, Modes: []problem.Mode{{Time: problem.Curing([]float64{0.5, 0.5, 0.5, 0.5, 0.5, 0.5, 0.5, 0.5, 0.5, 0.5})}}},
		{By: problem.Inf, Modes: []problem.Mode{{Crew: []int{0}, Time: worked(4, 0)}, {Crew: []int{1}, Time: worked(4, 0)}}},
	}
	p.Links = []problem.Link{
		{From: 0, To: 1, ToEnd: tasks.Start, FromEnd: tasks.Finish, Min: 4, Max: 20},                                             // from finish to start
		{From: 2, To: 3, ToEnd: tasks.Start, FromEnd: tasks.Finish, Min: 3, Count: open, Max: expand.NoMax},                      // working wait
		{From: 2, To: 3, ToEnd: tasks.Start, FromEnd: tasks.Finish, Min: expand.NoMin, Max: 5, MaxCount: open},                   // at most, working
		{From: 0, To: 6, ToEnd: tasks.Start, FromEnd: tasks.Start, Min: 0, Max: 9, Last: func(t int) int { return t + 9 - t/2 }}, // shortens
		{From: -1, To: 3, ToEnd: tasks.Start, Min: 12, Max: expand.NoMax},
	}
	p.Pairs = []problem.Pair{{A: 2, B: 3, TailA: func(f int) int { return f + 2 }}, {A: 2, B: 5}}
	p.Orders = []problem.Order{{Choices: [][]problem.Before{{{First: 0, Then: 3}}, {{First: 3, Then: 0}, {First: 1, Then: 0}}}}}
	return p
}

const head = "sailby refutation 1\njob 8 activities 5 links 2 resources 3 people horizon 100\n"

// TestLemmas has each kind of lemma verified where it just holds, and refused where it just does not.
func TestLemmas(t *testing.T) {
	for _, c := range []struct{ name, before, holds, not string }{
		{"fixed wait", "", "link 0 : s0>=10 s1<=18", "link 0 : s0>=10 s1<=19"},           // 10 + 5 + 4 = 19
		{"longest wait", "", "link 0 : s0<=10 s1>=36", "link 0 : s0<=10 s1>=35"},         // 10 + 5 + 20 = 35
		{"working wait", "", "link 1 : f2>=19 s3<=31", "link 1 : f2>=19 s3<=32"},         // 1 min to 20, 2 from 30 on
		{"working wait at most", "", "link 2 : f2<=18 s3>=34", "link 2 : f2<=18 s3>=33"}, // 2 to 20, 3 more to 33, none over it
		{"working wait at most, to closing time", "", "link 2 : f2<=15 s3>=31", "link 2 : f2<=15 s3>=30"},
		{"shortening wait", "", "link 3 : s0<=4 s6>=12", "link 3 : s0<=4 s6>=11"}, // 4 + 9 - 2 = 11
		{"from minute 0", "", "link 4 : s3<=11", "link 4 : s3<=12"},
		{"two pieces", "", "hours 2 : s2>=11 f2<=34", "hours 2 : s2>=11 f2<=35"},           // set-up and 8 to 20, set-up and 4 from 30
		{"over a meal", "", "hours 3 : s3>=36 f3<=42", "hours 3 : s3>=36 f3<=43"},          // 4 to 40, 2 from 41
		{"too short an opening", "", "hours 2 : s2>=18 s2<=29", "hours 2 : s2>=17 s2<=29"}, // set-up and least piece want 3
		{"film", "", "hours 6 : s6>=3 f6<=4", "hours 6 : s6>=3 f6<=5"},
		{"one mode's hours", "var x1 mode 4 1\n", "hours 4 : x1>=1 s4<=29", "hours 4 : x1>=0 s4<=29"},
		{"finish of the whole", "", "end 0 : s0>=11 e<=15", "end 0 : s0>=11 e<=16"},
		{"home does not count", "", "end 0 : s0>=11 e<=15", "end 2 : f2>=31 e<=30"},
		{"order", "var x1 order 0 1\n", "apart x1 : x1>=1 s0>=10 s1<=14", "apart x1 : x1>=1 s0>=10 s1<=15"},
		{"other order", "var x1 order 0 1\n", "apart x1 : x1<=0 s1>=10 s0<=16", "apart x1 : x1<=0 s1>=10 s0<=17"},
		{"no order", "var x1 order 0 1\n", "apart x1 : x1<=0 s1>=10 s0<=16", "apart x1 : s1>=10 s0<=16"},
		{"pair with a tail", "var x1 pair 0\n", "apart x1 : x1>=1 f2>=30 s3<=31", "apart x1 : x1>=1 f2>=30 s3<=32"},
		{"pair without one", "var x1 pair 0\n", "apart x1 : x1<=0 f3>=30 s2<=29", "apart x1 : x1<=0 f3>=30 s2<=30"},
		{"order rule", "var x1 choice 0 1\n", "rule 0 1 : x1>=1 s1>=10 s0<=16", "rule 0 1 : x1>=1 s1>=10 s0<=17"},
		{"choice that is not said", "var x1 choice 0 1\n", "rule 0 1 : x1>=1 s1>=10 s0<=16", "rule 0 1 : s1>=10 s0<=16"},
		{"some choice", "var x1 choice 0 1\nvar x2 choice 0 0\n", "some 0 : x1<=0 x2<=0", "some 0 : x1<=0"},
		{"some mode", "var x1 mode 4 0\nvar x2 mode 4 1\n", "modes 4 : x1<=0 x2<=0", "modes 4 : x1<=0"},
		{"mode and timing", "var x1 mode 4 0\nvar x2 timing 4 0\n", "modes 4 : x1>=1 x2<=0", "modes 4 : x1<=0 x2<=0"},
		{"mode and part", "var x1 mode 4 0\nvar x2 part 4 2 0 0\n", "modes 4 : x1>=1 x2<=0", "modes 4 : x1<=0 x2<=0"},
		{"another's part", "var x1 mode 4 0\nvar x2 part 4 1 1 0\n", "modes 4 : x1>=1 x2>=1", "modes 4 : x1<=0 x2>=1"},
		{"at an instant", "", "use 0 12 13 : s0>=8 s0<=12 s1>=6 s1<=12", "use 0 12 13 : s0>=7 s0<=12 s1>=6 s1<=12"},
		{"in an interval", "", "use 0 10 21 : s0>=10 s0<=16 s1>=10 s1<=14", "use 0 10 22 : s0>=10 s0<=17 s1>=10 s1<=15"}, // 5 + 7 in 11
		{"several units each", "", "use 1 30 36 : s0>=30 s0<=31 s1>=29 s1<=30", "use 1 30 36 : s0>=30 s1>=29 s1<=30"},
		{"at work for certain", "", "use 1 32 33 : s2<=25 f2>=33 s1>=27 s1<=31 s0>=28 s0<=32", "use 1 25 26 : s2<=24 f2>=33 s0>=21 s0<=25"}, // a night
		{"one of two", "", "crew 0,1 12 13 : s2<=12 f2>=13 s3<=12 f3>=13 s7<=12 f7>=13", "crew 0,1 12 13 : s2<=12 f2>=13 s3<=12 f3>=13 s4<=12 f4>=13"},
		{"all work in its hours", "", "crew 0,1 10 20 : s2>=10 f2<=20 s3>=10 f3<=20", "crew 0,1 10 40 : s2>=10 f2<=40 s3>=10 f3<=40"},
		{"one person", "var x1 mode 2 0\n", "person 0 12 13 : x1>=1 s2<=12 f2>=13 s3<=12 f3>=13", "person 0 12 13 : x1<=0 s2<=12 f2>=13 s3<=12 f3>=13"},
		{"round a circle", "var x1 order 0 1\n", "path min0 !x1 : x1<=0", "path min0 x1 : x1>=1"},
		{"along a path", "var x1 order 0 1\n", "path min0 : s0>=10 s1<=18", "path min0 : s0>=10 s1<=19"},
		{"back along a longest wait", "", "path max0 : s1>=36 s0<=10", "path max0 : s1>=35 s0<=10"},
	} {
		for _, x := range []struct {
			text string
			ok   bool
		}{{c.holds, true}, {c.not, false}} {
			_, err := Replay(yard(), strings.NewReader(head+c.before+x.text+"\nso 1 :"+strings.SplitN(x.text, " :", 2)[1]+"\nbound 0\n"))
			if strings.Count(x.text, "=") == 1 { // one fact is a root fact and has no number
				_, err = Replay(yard(), strings.NewReader(head+c.before+x.text+"\nso :"+strings.SplitN(x.text, " :", 2)[1]+"\nbound 0\n"))
			}
			if (err == nil) != x.ok {
				t.Errorf("%s: %q gives %v, want it to hold: %v", c.name, x.text, err, x.ok)
			}
		}
	}
}

// TestWhatVariablesMean refuses variables that stand for nothing in the problem.
func TestWhatVariablesMean(t *testing.T) {
	for _, c := range []struct {
		line string
		ok   bool
	}{
		{"var x1 order 0 1", true},
		{"var x1 order 0 2", false}, // 2 of 3 and 1 of 3: both at once
		{"var x1 order 0 0", false},
		{"var x1 order 0 9", false},
		{"var x1 order 0 5", false}, // takes no time
		{"var x1 pair 0", true},
		{"var x1 pair 1", false}, // with an activity that need not take any time
		{"var x1 pair 2", false},
		{"var x1 choice 0 1", true},
		{"var x1 choice 0 2", false},
		{"var x1 choice 1 0", false},
		{"var x1 mode 2 1", true},
		{"var x1 mode 9 0", false},
		{"var x1 mode 2", false},
		{"var x1 colour 2 1", false},
		{"var s1 mode 2 1", false},
		{"var e mode 2 1", false},
	} {
		_, err := Replay(yard(), strings.NewReader(head+c.line+"\nbound 0\n"))
		if (err == nil) != c.ok {
			t.Errorf("%q gives %v, want it to hold: %v", c.line, err, c.ok)
		}
	}
}

// TestRoomForBoth has no order for two activities that there is just enough for.
func TestRoomForBoth(t *testing.T) {
	p := yard()
	p.Res[0].Capacity, p.Res[1].Capacity = 2, 4
	if _, err := Replay(p, strings.NewReader(head+"var x1 order 0 1\nbound 0\n")); err == nil {
		t.Error("an order for two that can be worked at once")
	}
}
