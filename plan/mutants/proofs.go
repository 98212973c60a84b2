package main

var (
	byProof   = []string{"./plan/proof"}
	byReasons = []string{"./plan/learn -run Refutations|TestReasons"}
	byRefuter = []string{"./plan/learn -run Refutations", "./plan/settle -run Refute"}
)

// proofMutants are those of the proof checker, of the reasons that the learning search gives, and of what writes
// them down.
var proofMutants = []mutant{
	{"plan/proof/replay.go", `			case open >= 0:`,
		`			case false:`, byProof},
	{"plan/proof/replay.go", `		return s.hi <= f.v, s.lo > f.v`,
		`		return s.hi <= f.v, s.lo >= f.v`, byProof},
	{"plan/proof/replay.go", `		return fact{f.x, false, f.v + 1}`,
		`		return fact{f.x, false, f.v + 2}`, byProof},
	{"plan/proof/replay.go", `		c.now[x] = c.root[x]
`, `		c.root[x] = c.now[x]
`, byProof},
	{"plan/proof/replay.go", `	c.steps = c.steps[:0]
`, ``, byProof},
	{"plan/proof/replay.go", `!c.dead && lo < bound {`,
		`!c.dead && lo < bound-1 {`, byProof},
	{"plan/proof/replay.go", `c.until+1)`,
		`c.until+2)`, byProof},
	{"plan/proof/read.go", `t < -1 || t > c.until {`,
		`t < -1 {`, byProof},
	{"plan/proof/read.go", `		delete(c.clauses, list[0])`,
		`		_ = c.clauses[list[0]]`, byProof},
	{"plan/proof/variables.go", `sum[0]+sum[1] > c.p.Res[r].Capacity {`,
		`sum[0]+sum[1] >= c.p.Res[r].Capacity {`, byProof},
	{"plan/proof/variables.go", `c.book.mayBeNothing(pr.A) || c.book.mayBeNothing(pr.B) {`,
		`c.book.mayBeNothing(pr.A) {`, byProof},
	{"plan/proof/variables.go", `			s.hi -= d`,
		`			s.hi -= d + 1`, byProof},
	{"plan/proof/lemma.go", `		if first > int64(to.hi) {`,
		`		if first >= int64(to.hi) {`, byProof},
	{"plan/proof/lemma.go", `	if int64(to.lo) > last {`,
		`	if int64(to.lo) >= last {`, byProof},
	{"plan/proof/lemma.go", `f.lo+c.book.watch(i) <= e.hi {`,
		`f.lo+c.book.watch(i) < e.hi {`, byProof},
	{"plan/proof/lemma.go", `	if over <= next.hi {`,
		`	if over < next.hi {`, byProof},
	{"plan/proof/lemma.go", `!ok || v.of(x).hi > 0 {`,
		`!ok || v.of(x).hi > 1 {`, byProof},
	{"plan/proof/lemma.go", `len(choices) > 1 && (!ok || v.of(x).lo < 1) {`,
		`len(choices) > 1 && (!ok || v.of(x).lo < 0) {`, byProof},
	{"plan/proof/curves.go", `room >= n+more {`,
		`room >= n {`, byProof},
	{"plan/proof/path.go", `	if begin == at && sum > 0 {`,
		`	if begin == at && sum >= 0 {`, byProof},
	{"plan/proof/path.go", `		if at >= 0 && from != at {`,
		`		if false {`, byProof},
	{"plan/proof/hours.go", `done > 0 && room < r.SetUp+max(r.Least, 1):`,
		`done > 0 && room < max(r.Least, 1):`, byProof},
	{"plan/proof/hours.go", `		take := r.SetUp + left`,
		`		take := left`, byProof},
	{"plan/proof/hours.go", `		if !t.skips[k] {`,
		`		if k >= 0 {`, byProof},
	{"plan/proof/use.go", `min(l.inside(s.lo, s.lo+d), l.inside(s.hi, s.hi+d))`,
		`l.inside(s.lo, s.lo+d)`, byProof},
	{"plan/proof/use.go", `		if n := count(t.at[k], t.end[k]); least < 0 || n < least {`,
		`		if n := count(t.at[k], t.end[k]); least < 0 {`, byProof},
	{"plan/proof/use.go", `		used, have = l.sum(), int64(c.p.Res[r].Capacity)*int64(win.Len())`,
		`		used, have = l.sum(), int64(c.p.Res[r].Capacity)*int64(win.Len())-1`, byProof},
	{"plan/proof/crew.go", `			if x := count(md, crew); n < 0 || x < n {`,
		`			if x := count(md, crew); n < 0 || x > n {`, byProof},
	{"plan/proof/modes.go", `	return is && s.hi > 0 || !is && s.lo < 1`,
		`	return is || s.lo < 1`, byProof},
	{"plan/proof/shut.go", `	if sum <= c.p.Res[r].Capacity {`,
		`	if sum < c.p.Res[r].Capacity {`, byProof},

	{"plan/learn/timereason.go", `		if k.amount <= spare && e.list[k.last].level > 0 {`,
		`		if k.amount <= spare+1 && e.list[k.last].level > 0 {`, byReasons},
	{"plan/learn/workreason.go", `		if k.amount <= spare && e.list[k.last].level > 0 {`,
		`		if k.amount <= spare+1 && e.list[k.last].level > 0 {`, byReasons},
	{"plan/learn/workreason.go", `!w.mask.has(t) ||`,
		``, byReasons},
	{"plan/learn/arc.go", `fact{a.from, a.least(1 - end)})`,
		`fact{a.from, a.least(1-end) - 1})`, byReasons},
	{"plan/learn/arc.go", `	return append(out, fact{a.from, a.least(f.v)})`,
		`	return append(out, fact{a.from, a.least(f.v) - 1})`, byReasons},
	{"plan/learn/grid.go", `		best = min(best, g.latest(f-1)+1)`,
		`		best = min(best, g.latest(f)+1)`, byReasons},
	{"plan/learn/analyse.go", `	if r.level == 0 {
		return true`, `	if r.level <= 1 {
		return true`, byRefuter},
	{"plan/learn/record.go", `			if r.have[f.s] < f.v && r.rootEntry(f) < 0 {`,
		`			if r.have[f.s] < f.v && r.rootEntry(f) < -1 {`, byRefuter},
	{"plan/learn/record.go", `		r.notes[k].at = -1`,
		`		_ = r.notes[k].at`, byRefuter},
	{"plan/learn/recordpath.go", `	path := longest(len(m.start), m.hops(k), p.a, p.b)`,
		`	path := longest(len(m.start), m.hops(0), p.a, p.b)`, byRefuter},
}

func init() { mutants = append(mutants, proofMutants...) }
