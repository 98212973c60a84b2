package proof_test

import (
	"bytes"
	"math/rand/v2"
	"testing"

	"sailby/plan/learn"
	"sailby/plan/proof"
)

// BenchmarkReplay replays a log of some thousand lemmas.
func BenchmarkReplay(b *testing.B) {
	p := randomInstance(rand.New(rand.NewPCG(6, 9)), 24)
	var log bytes.Buffer
	r := learn.Solve(p, learn.Options{Ticks: 2_000_000, Log: &log})
	if r.LogErr != nil {
		b.Fatal(r.LogErr)
	}
	b.SetBytes(int64(log.Len()))
	b.ReportMetric(float64(r.Conflicts), "conflicts")
	b.ResetTimer()
	for b.Loop() {
		if _, err := proof.Replay(p, bytes.NewReader(log.Bytes())); err != nil {
			b.Fatal(err)
		}
	}
}
