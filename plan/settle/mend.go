package settle

import (
	"context"
	"math/bits"
	"slices"

	"sailby/plan"
	"sailby/tasks"
	"sailby/tasks/expand"
)

// Up to everyMended longest waits are tried in every choice, fewest first; of more, each by itself, all of them and all
// but one, and what then fits is left with as few as still fit.
const (
	everyMended = 3
	mostMended  = 6
)

// mended looks whether a job that does not fit would fit with longest waits between two coats mended (R11). The first
// choice that fits is the answer, and its work says what was mended; otherwise the first answer stands, as a proof
// only where every choice is refuted too.
//
// Cost: one answer with these waits left out, and one for each choice that is not refuted at once.
func mended(ctx context.Context, job *tasks.Job, first *plan.Answer, o Options, explain bool) (*plan.Answer, error) {
	list := first.Work.Rescues
	if first.Verdict == plan.Fits || len(list) == 0 || ctx.Err() != nil || o.left() {
		return first, nil
	}
	b := first.Work.Basis
	if impossible(ctx, job, b, o) {
		return first, nil
	}
	b.Unbound = true
	kind, err := alone(ctx, job, b, o, false)
	if err != nil || kind.Verdict == plan.CannotFit {
		return first, nil
	}
	b.Unbound = false
	refuted := len(list) <= everyMended
	for _, keys := range choices(list) {
		if ctx.Err() != nil || o.left() {
			return first, nil
		}
		b.Rescue = keys
		if cannot(ctx, job, b, o) {
			continue
		}
		refuted = false
		if kind.Verdict != plan.Fits {
			continue // not even without these waits was a plan found
		}
		a, err := alone(ctx, job, b, o, explain)
		if err != nil {
			return nil, err
		}
		if a.Verdict == plan.Fits {
			return fewer(ctx, job, a, b, o, explain)
		}
	}
	if first.Verdict == plan.CannotFit && !refuted {
		open := *first
		open.Verdict, open.Proof = plan.Unsettled, nil
		return &open, nil
	}
	return first, nil
}

// fewer leaves out of what is mended in an answer that fits, one by one, what it fits without too. Up to everyMended
// every smaller choice has been tried before.
func fewer(ctx context.Context, job *tasks.Job, a *plan.Answer, b expand.Basis, o Options, explain bool) (*plan.Answer, error) {
	if len(a.Work.Rescues) <= everyMended {
		return a, nil
	}
	for _, key := range slices.Clone(b.Rescue) {
		without := slices.DeleteFunc(slices.Clone(b.Rescue), func(k string) bool { return k == key })
		if len(without) == 0 || ctx.Err() != nil || o.left() {
			break
		}
		try := b
		try.Rescue = without
		if cannot(ctx, job, try, o) {
			continue
		}
		next, err := alone(ctx, job, try, o, explain)
		if err != nil {
			return nil, err
		}
		if next.Verdict == plan.Fits {
			a, b = next, try
		}
	}
	return a, nil
}

// choices lists what may be mended together, fewest first where every choice is tried.
func choices(list []expand.Rescue) (out [][]string) {
	n := len(list)
	if n > everyMended {
		var all []string
		for i, m := range list {
			all = append(all, m.Key)
			if i < mostMended {
				out = append(out, []string{m.Key})
			}
		}
		out = append(out, all)
		for i := 0; i < min(n, mostMended); i++ {
			out = append(out, slices.Delete(slices.Clone(all), i, i+1))
		}
		return out
	}
	for size := 1; size <= n; size++ {
		for set := 1; set < 1<<n; set++ {
			if bits.OnesCount(uint(set)) != size {
				continue
			}
			var keys []string
			for i, m := range list {
				if set&(1<<i) != 0 {
					keys = append(keys, m.Key)
				}
			}
			out = append(out, keys)
		}
	}
	return out
}

// impossible says whether a basis is proved impossible without a search, longest waits that may be mended and washes
// that may be shared left out.
func impossible(ctx context.Context, job *tasks.Job, b expand.Basis, o Options) bool {
	b.Unbound, b.Washed = true, true
	return cannot(ctx, job, b, o)
}
