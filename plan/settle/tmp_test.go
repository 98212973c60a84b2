package settle

import (
	"pgregory.net/rapid"
	"sailby/tasks/expand"
	"testing"
)

func TestTmp(t *testing.T) {
	bad := 0
	rapid.Check(t, func(rt *rapid.T) {
		s := drawSmall(rt, 30, 6)
		job, ok := s.read(t)
		if !ok {
			bad++
			if bad > 8 {
				rt.Fatalf("many")
			}
			return
		}
		w, f := expand.Expand(job, expand.Basis{})
		if len(f) > 0 {
			t.Log(f, s.yaml())
		}
		if w != nil {
			for _, st := range w.Steps {
				if st.Working%30 != 0 || st.SetUp%30 != 0 || st.LeastPiece%30 != 0 || st.SafeStop%30 != 0 || st.Clock%30 != 0 {
					t.Log(st.Key(), st.Working, st.SetUp, st.LeastPiece, st.SafeStop, st.Clock)
				}
			}
		}
	})
}
