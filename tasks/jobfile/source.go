package jobfile

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"regexp"
	"strconv"
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
)

const (
	maxBytes  = 1 << 20 // a job of 5,000 tasks is half of this
	maxDepth  = 24      // the deepest job file known goes down 9 levels
	maxFaults = 500     // faults told; beyond them only how many more
)

// parse turns the text of one file into nodes and reports what no job file may contain; nil if
// there is nothing to read on with.
func (r *reader) parse(file string, data []byte) *yaml.Node {
	at := func(line, col int, hint, format string, args ...any) *yaml.Node {
		r.faultAt(tasks.Pos{File: file, Line: line, Col: col}, hint, format, args...)
		return nil
	}
	switch {
	case len(data) > maxBytes:
		return at(1, 1, "move drawings and long texts out of it", "the file has %d kB, at most %d kB are read", len(data)>>10, maxBytes>>10)
	case bytes.HasPrefix(data, []byte{0xff, 0xfe}), bytes.HasPrefix(data, []byte{0xfe, 0xff}):
		return at(1, 1, "save it again as UTF-8", "the file is saved as UTF-16")
	}
	data = bytes.TrimPrefix(data, []byte("\ufeff"))
	if line, col, what := badRune(data); what != "" {
		return at(line, col, "save it as plain UTF-8 text, and retype this spot", "there is %s here", what)
	}
	doc, line, err := decode(data)
	if err != nil {
		col := 1
		if m := aliasName.FindStringSubmatch(err.Error()); m != nil {
			line, col = findAlias(data, m[1])
		}
		if tab := tabLine(data); tab > 0 && (line == 0 || line >= tab) {
			return at(tab, 1, "indent with spaces", "the line begins with a tab")
		}
		if key := longKey(data, line); key > 0 {
			return at(key, 1, "give it a short name, and write the long text under `title` or `note`", "a key of more than %d letters: YAML reads none so long", longestKey)
		}
		hint, text := plainSyntax(err.Error())
		return at(max(line, 1), max(col, 1), hint, "%s", text)
	}
	if doc == nil || len(doc.Content) == 0 || doc.Content[0].Kind == yaml.ScalarNode && doc.Content[0].Tag == "!!null" {
		return at(1, 1, "begin with `job: ` and its name", "the file is empty")
	}
	root := doc.Content[0]
	if !r.tidy(file, root, 0) {
		return nil
	}
	return root
}

// decode reads the one document there may be. Line is that of an error, 0 if not known.
func decode(data []byte) (doc *yaml.Node, line int, err error) {
	defer func() { // the scanner panics on some broken input
		if p := recover(); p != nil {
			doc, err = nil, fmt.Errorf("yaml: cannot be read: %v", p)
		}
	}()
	dec := yaml.NewDecoder(bytes.NewReader(data))
	var first, second yaml.Node
	switch err := dec.Decode(&first); {
	case errors.Is(err, io.EOF):
		return nil, 0, nil
	case err != nil:
		return nil, errorLine(err), err
	}
	switch err := dec.Decode(&second); {
	case errors.Is(err, io.EOF):
		return &first, 0, nil
	case err != nil:
		return nil, errorLine(err), err
	}
	return nil, max(second.Line, 1), errors.New("second document")
}

var (
	lineNumber = regexp.MustCompile(`^yaml: line (\d+): `)
	aliasName  = regexp.MustCompile(`^yaml: unknown anchor '([^']*)'`)
)

func errorLine(err error) int {
	if m := lineNumber.FindStringSubmatch(err.Error()); m != nil {
		n, _ := strconv.Atoi(m[1])
		return n
	}
	return 0
}

// findAlias gives the place of an alias without its anchor, whose line the scanner does not tell.
func findAlias(data []byte, name string) (line, col int) {
	i := bytes.Index(data, []byte("*"+name))
	if i < 0 {
		return 0, 0
	}
	start := bytes.LastIndexByte(data[:i], '\n') + 1
	return bytes.Count(data[:i], []byte("\n")) + 1, utf8.RuneCount(data[start:i]) + 1
}

// longestKey is how long a key on one line may be (YAML 1.2.2, 7.4.2: implicit keys).
const longestKey = 1024

// longKey gives the line, near one that the scanner complains of, whose key is too long for it; 0 if there is none.
func longKey(data []byte, near int) int {
	for n, l := range bytes.Split(data, []byte("\n")) {
		if n+1 < near-1 || n+1 > near+1 {
			continue
		}
		if i := bytes.IndexByte(l, ':'); i > 0 && utf8.RuneCount(bytes.TrimLeft(l[:i], " ")) > longestKey {
			return n + 1
		}
	}
	return 0
}

// plainSyntax puts the scanner's complaint into plain words with a way out.
func plainSyntax(message string) (hint, text string) {
	has := func(s string) bool { return strings.Contains(message, s) }
	switch {
	case message == "second document":
		return "keep one job in a file: remove the line `---` and what follows it", "a second document begins here"
	case has("unknown anchor"):
		return "quote a text that begins with *", "* stands for an alias here, and those are not used"
	case has("mapping values are not allowed"):
		return "quote the text, or begin a new line", "there is a second colon where only a text may stand (near this line)"
	case has("did not find expected key"), has("did not find expected '-' indicator"):
		return "give keys of one mapping the same indentation, and close brackets and quotes", "the indentation or a bracket is wrong near this line"
	case has("did not find expected ',' or"):
		return "put a comma between the items, and close { and [ with } and ]", "a list or mapping in brackets is not closed, or lacks a comma, near this line"
	case has("could not find expected ':'"):
		return "write `key: value`, with a blank after the colon", "a key without its colon near this line"
	case has("unexpected end of stream"), has("quoted scalar"):
		return "close the quote", "a quoted text does not end, from near this line on"
	case has("cannot start any token"):
		return "quote a text that begins with @ ` or %, and indent with spaces", "a sign that no text may begin with, near this line"
	case has("unknown escape character"):
		return "write \\\\ for a backslash, or use single quotes", "an unknown \\ sign in a quoted text near this line"
	case has("exceeded max depth"):
		return "no job needs brackets in brackets that deep", "brackets are nested too deep"
	}
	text = lineNumber.ReplaceAllString(message, "")
	return "compare with the example in JOBFILE.md", "cannot be read as YAML: " + strings.TrimPrefix(text, "yaml: ")
}

// badRune finds the first thing in the text that no editor would show as it is.
func badRune(data []byte) (line, col int, what string) {
	line, col = 1, 0
	for i := 0; i < len(data); {
		c, size := utf8.DecodeRune(data[i:])
		col++
		switch {
		case c == utf8.RuneError && size < 2:
			return line, col, fmt.Sprintf("a byte that is not UTF-8 (0x%02x)", data[i])
		case c == '\n':
			line, col = line+1, 0
		case c == '\r':
			if i+1 == len(data) || data[i+1] != '\n' {
				return line, col, "a carriage return without a line feed"
			}
		case c != '\t' && hidden(c):
			return line, col, fmt.Sprintf("a hidden sign (U+%04X)", c)
		}
		i += size
	}
	return 0, 0, ""
}

// hidden says whether c is a control, a line separator, or turns the direction of writing.
func hidden(c rune) bool {
	switch {
	case c < 0x20, c >= 0x7f && c <= 0x9f, c == 0xfeff, c == 0x061c, c == 0x200e, c == 0x200f:
		return true
	}
	return c >= 0x2028 && c <= 0x202e || c >= 0x2066 && c <= 0x2069 || c >= 0xfff9 && c <= 0xffff || c >= 0xe0000 && c <= 0xe007f
}

// tabLine gives the first line that begins with a tab, 0 if none.
func tabLine(data []byte) int {
	for i, line := range strings.Split(string(data), "\n") {
		if strings.HasPrefix(strings.TrimLeft(line, " "), "\t") && strings.TrimSpace(line) != "" {
			return i + 1
		}
	}
	return 0
}
