package jobfile

import (
	"fmt"
	"strings"
)

// manual writes the tables of keys for JOBFILE.md.
func manual() string {
	var b strings.Builder
	for _, s := range sections() {
		fmt.Fprintf(&b, "### %s\n`%s`. %s", s.name, s.where, capital(s.says))
		if !strings.HasSuffix(s.says, ".") {
			b.WriteString(".")
		}
		if s.more != nil && s.more != &kitSection {
			b.WriteString(" All keys of Task")
			if len(s.keys) > 0 {
				b.WriteString(", and these")
			}
			b.WriteString(".")
		}
		b.WriteString("\n\n")
		if len(s.keys) == 0 {
			continue
		}
		b.WriteString("| key | value | if left out | meaning | example |\n|---|---|---|---|---|\n")
		for i := range s.keys {
			k := &s.keys[i]
			usual := k.usual
			if k.need {
				usual = "must be given"
			}
			fmt.Fprintf(&b, "| `%s` | %s | %s | %s | `%s: %s` |\n", k.name, cell(k.describe()), cell(usual), cell(k.says), k.name, cell(k.example))
		}
		b.WriteString("\n")
	}
	return b.String()
}

func cell(s string) string { return strings.ReplaceAll(s, "|", "\\|") }

func capital(s string) string { return strings.ToUpper(s[:1]) + s[1:] }

// describe says in words what a key's value is, with its range.
func (k *key) describe() string {
	switch k.takes {
	case aText:
		return "text"
	case aNote:
		return "text, also of several lines"
	case aName:
		return "name"
	case names:
		return "name or list of names"
	case yesNo:
		return "yes or no"
	case aCount:
		return fmt.Sprintf("whole number, %g to %g", k.low, k.high)
	case aNumber:
		return fmt.Sprintf("number, %g to %g", k.low, k.high)
	case anAmount:
		return k.dim.String() + k.bounds()
	case aRange:
		return k.dim.String() + ", may be a range" + k.bounds()
	case hourly:
		return "hours, may be a range" + k.bounds()
	case aWord:
		if len(k.words) > 12 {
			return "one word, see the meaning"
		}
		return "one of: " + strings.Join(k.words, ", ")
	case words:
		return "one or several of: " + strings.Join(k.words, ", ")
	case aMoment:
		return "local time"
	case slots:
		return "slot or list of slots"
	case weekly:
		return "opening hours"
	case keysOf:
		return "keys of " + k.sub.name
	case namedOf:
		return "names, each with the keys of " + k.sub.name
	case listOf:
		return "list, each with the keys of " + k.sub.name
	}
	return k.form
}

// bounds writes the range of an amount.
func (k *key) bounds() string {
	if k.low == 0 && k.high == 0 {
		return ", from 0"
	}
	return ", " + show(k.low, k.dim) + " to " + show(k.high, k.dim)
}
