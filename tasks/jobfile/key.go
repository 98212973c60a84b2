package jobfile

import (
	"slices"

	"sailby/tasks/quantity"
)

// takes says what the value of a key is.
type takes uint8

const (
	aText    takes = iota // one line of text
	aNote                 // text of several lines
	aName                 // the name of something declared
	names                 // a name or a list of names
	yesNo                 // yes, no, true or false
	aCount                // a whole number
	aNumber               // a plain number
	anAmount              // a number with its unit
	aRange                // an amount, "3 to 5 h" or {low, likely, high}
	hourly                // aRange of time in which a bare number is hours: the key says so
	aWord                 // one of the words
	words                 // a word or a list of words
	aMoment               // a local time
	slots                 // a slot or a list of slots
	weekly                // opening hours, a line or a list of lines
	keysOf                // a mapping with the keys of sub
	namedOf               // names, each with a mapping of the keys of sub
	listOf                // a list of mappings with the keys of sub
	itsOwn                // a form of its own: form says it, shape is its JSON schema
)

// key is one key of the job file: the reader, the schema and the manual are made from it.
type key struct {
	name      string
	takes     takes
	dim       quantity.Dim
	low, high float64  // least and greatest in the base unit; both zero is 0 and up
	usual     string   // what holds where the key is left out, in words; "" is nothing
	says      string   // what it means, one line
	example   string   // a value as YAML in one line
	need      bool     // may not be left out
	words     []string // for aWord and words
	sub       *section
	form      string // for itsOwn: what the value looks like
	shape     string // for itsOwn: JSON schema of the value
	beside    string // for the test of the example: "key: value" that must stand beside it
	without   string // and the key that must not
	host      string // where that example stands, if not with the section's
}

// section is a mapping of the job file with its keys.
type section struct {
	name  string // heading in the manual and name in the schema
	where string // how one gets there: "places / NAME"
	says  string
	keys  []key
	host  string // path of a mapping of this section in the example job of the tests
	more  *section
}

// find gives the key of that name, looking in the section and in the one it extends.
func (s *section) find(name string) *key {
	for at := s; at != nil; at = at.more {
		if i := slices.IndexFunc(at.keys, func(k key) bool { return k.name == name }); i >= 0 {
			return &at.keys[i]
		}
	}
	return nil
}

// names lists the keys in the order of the manual, those of the section itself first.
func (s *section) names() []string {
	var out []string
	for at := s; at != nil; at = at.more {
		for _, k := range at.keys {
			out = append(out, k.name)
		}
	}
	return out
}

// first gives the key to show as an example: one that must be given, else the first.
func (s *section) first() *key {
	var out *key
	for at := s; at != nil; at = at.more {
		for i := range at.keys {
			if k := &at.keys[i]; k.need {
				return k
			} else if out == nil {
				out = k
			}
		}
	}
	return out
}

// limits gives the least and the greatest value of the key.
func (k *key) limits() (low, high float64) {
	if k.low == 0 && k.high == 0 {
		return 0, 1e12
	}
	return k.low, k.high
}
