package random

import (
	"fmt"
	"testing"

	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// TestValid: whatever the knobs, the job file has no fault, and it has about as many activities as were asked for.
func TestValid(t *testing.T) {
	for _, size := range []int{2, 4, 6, 20, 60, 200, 600} {
		for _, c := range Classes() {
			for seed := range uint64(max(1, min(12, 240/size))) {
				for _, lattice := range []bool{false, true} {
					k := Knobs{Size: size, Seed: seed, Class: c, Lattice: lattice}
					text := Job(k)
					job, err := jobfile.ReadBytes("job.yaml", []byte(text), nil)
					if err != nil {
						t.Fatalf("%+v: %v\n%s", k, err, text)
					}
					w, faults := expand.Expand(job, expand.Basis{})
					if len(faults) > 0 {
						t.Fatalf("%+v: %v\n%s", k, faults, text)
					}
					if n := len(w.Steps); n < size || n > size+size/4+8 {
						t.Errorf("%+v: %d activities", k, n)
					}
				}
			}
		}
	}
}

// TestEqualKnobs: equal knobs give equal bytes, other seeds other jobs.
func TestEqualKnobs(t *testing.T) {
	a := Knobs{Size: 60, Seed: 7, Class: Tight}
	b := a
	b.Seed++
	first, again := Job(a), Job(a)
	if first != again {
		t.Error("the same knobs give two jobs")
	}
	if first == Job(b) {
		t.Error("another seed gives the same job")
	}
}

// TestEverythingIsIn: within a few dozen jobs each thing that a job can have is met.
func TestEverythingIsIn(t *testing.T) {
	var all string
	for seed := range uint64(40) {
		all += Job(Knobs{Size: 60, Seed: seed, Class: Classes()[seed%4]})
	}
	for _, want := range []string{"reach:", "Europe/Oslo", "trips:", "window:", "weld 136", "draws:", "mains:", "next to:", "kind: coat", "kind: lift", "kind: surface prep",
		"working h", ", max:", "must be done by:", "not before:", "hire:", "stays: yes", "permits:", "orders:", "may change hands", "noisy work", "outside: yes", "over water", "closed:", "off:", "from:", "standing:"} {
		if !contains(all, want) {
			t.Errorf("no job has %q", want)
		}
	}
}

func contains(s, sub string) bool {
	for i := 0; i+len(sub) <= len(s); i++ {
		if s[i:i+len(sub)] == sub {
			return true
		}
	}
	return false
}

func ExampleClass() {
	fmt.Println(Classes())
	// Output: [slack snug tight over]
}
