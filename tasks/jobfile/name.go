package jobfile

import (
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
)

// ref is the name of something, with its place in the file.
type ref struct {
	text string
	pos  tasks.Pos
}

// newName checks the name that something is declared by. No slash is taken where slashes join
// names ("pier/hinge").
func (r *reader) newName(n *yaml.Node, what string, slash bool) (string, bool) {
	if n.Kind != yaml.ScalarNode {
		r.fault(n, "write a name", "the name of a %s is %s", what, kindOf(n))
		return "", false
	}
	s := n.Value
	switch {
	case strings.TrimSpace(s) == "":
		r.fault(n, "give it a name", "a %s has no name", what)
	case strings.TrimSpace(s) != s:
		r.fault(n, "remove it", "the name of %s %s begins or ends with a blank", what, short(s))
	case utf8.RuneCountInString(s) > longestName:
		r.fault(n, "use a short name here, and `title` or `note` for the rest", "the name of %s %s has %d letters, at most %d are taken", what, short(s), utf8.RuneCountInString(s), longestName)
	case strings.ContainsFunc(s, unicode.IsControl):
		r.fault(n, "write the name in one line", "the name of %s %s has a line break or a control sign", what, short(s))
	case !slash && strings.Contains(s, "/"):
		r.fault(n, "leave the slash out: it stands between a place and its workface, an assembly and its part", "the name of %s %s has a slash", what, short(s))
	case !strings.ContainsFunc(s, func(c rune) bool { return unicode.IsLetter(c) || unicode.IsDigit(c) }):
		r.fault(n, "use a letter or a digit", "the name of %s %s has no letter", what, short(s))
	default:
		return s, true
	}
	return "", false
}

// name gives the name that a key refers to.
func (f *fields) name(name string) (ref, bool) {
	s, ok := f.word(name)
	if !ok {
		return ref{}, false
	}
	return ref{s, f.pos(name)}, true
}

// names gives the names that a key refers to: one, or a list. One that stands twice is reported.
func (f *fields) names(name string) []ref {
	var out []ref
	seen := map[string]bool{}
	for _, n := range f.items(name) {
		s, ok := f.r.text(n, f.lead(name), f.key(name).example)
		switch {
		case !ok:
		case seen[s] && name != "coats" && name != "workfaces":
			f.r.fault(n, "name it once", "%s%s stands twice", f.lead(name), short(s))
		default:
			seen[s] = true
			out = append(out, ref{s, f.r.pos(n)})
		}
	}
	return out
}

// unknown reports a name that is not declared.
func (r *reader) unknown(p tasks.Pos, lead, kind, word string, options []string) {
	section := map[string]string{"person": "people", "place": "places", "paint": "paints", "procedure": "procedures",
		"assembly": "assemblies", "kit": "kit", "task": "tasks"}[kind]
	r.faultAt(p, r.among(word, options, fmt.Sprintf("declare it under `%s`", section)), "%sno %s is called %s", lead, kind, short(word))
}

func texts(refs []ref) []string {
	var out []string
	for _, r := range refs {
		out = append(out, r.text)
	}
	return out
}
