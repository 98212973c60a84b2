package main

import "strings"

// nearest gives the option most like word: at most a third of its letters (and at least one)
// differ. Ties go to the earlier option; "" if none is near.
func nearest(word string, options []string) string {
	word = strings.ToLower(word)
	best, least := "", max(1, len(word)/3)+1
	for _, o := range options {
		if d := edits(word, strings.ToLower(o)); d < least {
			best, least = o, d
		}
	}
	return best
}

// edits counts the letters to add, drop or change, and neighbours to swap, to make b from a.
// O(len a x len b); letters beyond 60 are left out.
func edits(a, b string) int {
	a, b = a[:min(len(a), 60)], b[:min(len(b), 60)]
	rows := make([][]int, len(a)+1)
	for i := range rows {
		rows[i] = make([]int, len(b)+1)
		rows[i][0] = i
		for j := range b {
			rows[0][j+1] = j + 1
		}
	}
	for i := 1; i <= len(a); i++ {
		for j := 1; j <= len(b); j++ {
			change := rows[i-1][j-1]
			if a[i-1] != b[j-1] {
				change++
			}
			rows[i][j] = min(rows[i-1][j]+1, rows[i][j-1]+1, change)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				rows[i][j] = min(rows[i][j], rows[i-2][j-2]+1)
			}
		}
	}
	return rows[len(a)][len(b)]
}
