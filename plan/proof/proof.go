// Package proof replays refutations: it reads the log of a search that has found no plan, and
// verifies every line of it against the problem, with its own arithmetic and nothing of the search.
// Minutes count from the problem's base.
//
// # The log
//
// A log is lines of text: words separated by single blanks. It speaks of variables: s5 and f5 are start and finish of
// activity 5 (where every timing has one length, only the start), e is the finish of the whole: the site's activities with
// their fire watches, all activities where none is at the site. Other variables are declared; they are 0 or 1. A fact is
// a bound, s5>=40 or s5<=39. Activities, links, resources and people go by their number in the problem, from 0 on.
//
//	sailby refutation 1
//	job 4 activities 3 links 1 resources 0 people horizon 200
//	                        the problem that it is about
//	until 57                from here on only plans that finish by 57 are spoken of; later ones may say less
//	var x7 order 0 1        x7 is 1 where activity 0 is over before activity 1 starts, 0 where it is the other
//	                        way round: they overfill a resource together and hold it without a pause
//	var x8 pair 2           the same for the activities of pair 2, tails included
//	var x9 choice 3 0       x9 is 1 where choice 0 of order rule 3 holds
//	var x10 mode 5 1        x10 is 1 where activity 5 is done in mode 1; "timing 5 0": in a mode with its timing 0;
//	                        "part 5 2 0 1": in one with that timing, without a relief, in which person 2 only
//	                        watches (0: works); "keep 5 2": person 2 keeps the watch that follows it
//
// A lemma says that its facts cannot all hold, for a reason that is verified at once:
//
//	link 2 : s0>=4 s1<=8    the waits of link 2
//	hours 5 : s5>=4 f5<=9   no possible start of activity 5 lies, and leads to a finish, within these, in none of the
//	                        modes that agree with the facts
//	end 5 : f5>=50 e<=49    the whole is not over before activity 5
//	apart x7 : x7>=1 ...    what x7 means
//	rule 3 0 : x9>=1 ...    choice 0 of order rule 3
//	some 3 : x9<=0 ...      some choice of it holds
//	modes 5 : x10<=0 ...    no mode of activity 5 agrees
//	keepers 5 : x11<=0 ...  somebody keeps the watch that follows activity 5
//	stay x11 : x11>=1 ...   who keeps it stays it out
//	path min2 max4 x7 !x8 : ...  links and orders (!: with the second first) from a start to a start add up to more
//	use 0 30 31 : ...       resource 0 from minute 30 to 31: the least that activities use within these facts
//	                        is more than there is
//	crew 0,3 30 90 : ...    the same for people 0 and 3
//	person 2 30 31 : ...    the same for what person 2 does in all modes that agree with the facts
//	excess 0 5 :            activity 5 takes more of resource 0 than there is
//	shut 5 :                activity 5 has no possible start at all
//
// Lemmas and known clauses ("by 12") are collected until a line that they lead to:
//
//	so 14 : s0>=4 x7<=0     clause 14: these cannot all hold. Taking them as true, each of the collected
//	                        lines leaves one fact open at most, whose contrary then holds, until there is a contradiction
//	so : s0<=3              the same for one fact: its contrary holds from here on
//	drop 14                 clause 14 is not spoken of any more
//	none                    the end: what is collected contradicts itself. There is no plan (by the minute of until)
//	bound 58                the end: no plan finishes before 58 (or the minute after that of until, if that is earlier)
package proof

import (
	"bufio"
	"errors"
	"fmt"
	"io"

	"sailby/plan/problem"
)

// Result is what a log has shown.
type Result struct {
	Finish  int // no plan finishes before it; problem.Inf: there is no plan
	Clauses int // clauses and root facts derived
	Lemmas  int // lemmas verified
}

// Error says which line of a log was refused, and why.
type Error struct {
	Line int // from 1 on
	Why  string
}

func (e *Error) Error() string { return fmt.Sprintf("line %d: %s", e.Line, e.Why) }

// longestLine bounds what is read at once.
const longestLine = 1 << 22

// Replay verifies a log against a problem. What it returns without an error has been shown, whoever wrote the
// log. Errors: an *Error for a line that is refused; what r returns. Cost: for each line that of its
// own facts; the tables of a timing's starts are made once, when a lemma first speaks of it.
func Replay(p *problem.Problem, r io.Reader) (Result, error) {
	if p.End < 0 || p.End > furthest {
		return Result{}, fmt.Errorf("a horizon of %d min is not replayed", p.End)
	}
	c := newChecker(p)
	in := bufio.NewScanner(r)
	in.Buffer(nil, longestLine)
	for in.Scan() {
		c.line++
		if err := c.read(in.Text()); err != nil {
			return Result{}, &Error{c.line, err.Error()}
		}
	}
	if err := in.Err(); errors.Is(err, bufio.ErrTooLong) {
		return Result{}, &Error{c.line + 1, "too long"}
	} else if err != nil {
		return Result{}, err
	}
	if !c.over {
		return Result{}, &Error{c.line, "the log ends before it has shown anything"}
	}
	return c.result, nil
}
