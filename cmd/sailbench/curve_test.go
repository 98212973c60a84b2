package main

import (
	"bytes"
	"context"
	"strings"
	"testing"
	"time"
)

// TestCurve: a row for each size, with an answer and memory.
func TestCurve(t *testing.T) {
	var out bytes.Buffer
	if err := curve(context.Background(), settings{limit: 20 * time.Second, random: randomJobs{seed: 1}}, []int{4, 8}, &out); err != nil {
		t.Fatal(err)
	}
	rows := strings.Split(strings.TrimSpace(out.String()), "\n")
	if len(rows) != 4 {
		t.Fatalf("rows %q", rows)
	}
	for _, r := range rows[2:] {
		if n := strings.Count(r, "|"); n != 8 || strings.Contains(r, "| 0 MB") {
			t.Errorf("row %q", r)
		}
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if err := curve(ctx, settings{limit: time.Second}, []int{4}, &out); err == nil {
		t.Error("a curve that is stopped is no error")
	}
}

// TestHeapIsWatched: what is held while it is watched is told.
func TestHeapIsWatched(t *testing.T) {
	top := watchHeap()
	held := make([]byte, 64<<20)
	for i := range held {
		held[i] = 1
	}
	if most := top(); most < 64<<20 {
		t.Errorf("most %d bytes, and %d were held", most, len(held))
	}
}
