package jobfile

import (
	"fmt"
	"strings"
)

// maxGuesses bounds the words looked through for suggestions in one file: a file with thousands
// of faults must not take minutes.
const maxGuesses = 400_000

// nearest gives the option most like word: the same but for case, or few edits away. Ties go to
// the earlier option.
func (r *reader) nearest(word string, options []string) (string, bool) {
	r.guesses += len(options)
	if r.guesses > maxGuesses {
		return "", false
	}
	low := []rune(strings.ToLower(strings.Join(strings.Fields(word), " ")))
	if len(low) > 80 {
		return "", false
	}
	best, least := "", max(1, min(3, len(low)/3))+1
	for _, o := range options {
		if d := edits(low, []rune(strings.ToLower(o)), least); d < least {
			best, least = o, d
		}
	}
	return best, best != ""
}

// edits counts the insertions, deletions, changes and swaps of neighbours between a and b, up to
// limit. O(len a x len b).
func edits(a, b []rune, limit int) int {
	if len(a)-len(b) >= limit || len(b)-len(a) >= limit {
		return limit
	}
	two, one, row := make([]int, len(b)+1), make([]int, len(b)+1), make([]int, len(b)+1)
	for j := range one {
		one[j] = j
	}
	for i := 1; i <= len(a); i++ {
		row[0] = i
		for j := 1; j <= len(b); j++ {
			cost := 1
			if a[i-1] == b[j-1] {
				cost = 0
			}
			row[j] = min(one[j]+1, row[j-1]+1, one[j-1]+cost)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				row[j] = min(row[j], two[j-2]+1)
			}
		}
		two, one, row = one, row, two
	}
	return min(one[len(b)], limit)
}

// among makes the hint for a word that is none of options: the nearest, or what there is.
func (r *reader) among(word string, options []string, none string) string {
	if len(options) == 0 {
		return none
	}
	if o, ok := r.nearest(word, options); ok {
		return fmt.Sprintf("did you mean %q?", o)
	}
	return "known here: " + list(options, 12)
}

// list joins words for a message, at most so many.
func list(options []string, most int) string {
	if len(options) > most {
		return strings.Join(options[:most], ", ") + fmt.Sprintf(" and %d more", len(options)-most)
	}
	return strings.Join(options, ", ")
}

// short quotes the person's own word, cut if it is very long.
func short(text string) string {
	const most = 60
	if r := []rune(text); len(r) > most {
		text = string(r[:most]) + "..."
	}
	return fmt.Sprintf("%q", text)
}
