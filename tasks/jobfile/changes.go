package jobfile

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
)

var changeSection = section{name: "Change", where: "changes / NAME", host: "changes/faster resin", says: "An alternative that the file keeps beside the plan, for what-if.", keys: []key{
	{name: "says", takes: aText, example: "resin with hardener B", says: "what the change is"},
	{name: "set", takes: itsOwn, form: "{path: value}", shape: setShape, need: true, example: "{tasks/resin/standing: 1 h}", says: "values put in place of those under the path: keys down to it, joined by slashes; items of lists by their name or number"},
}}

const maxChanges = 50

// readChanges reads the named alternatives.
func (r *reader) readChanges(f *fields) {
	for i, kv := range f.pairs("changes") {
		if i == maxChanges {
			f.fault("changes", "keep those that are still open", "more than %d changes", maxChanges)
			return
		}
		name, ok := r.newName(kv[0], "change", true)
		if !ok {
			continue
		}
		g := r.open(kv[1], &changeSection, fmt.Sprintf("change %q", name))
		c := tasks.Change{Name: name, Pos: r.pos(kv[0]), Text: g.line("says")}
		for _, kv := range g.pairs("set") {
			value, err := flow(kv[1])
			if err != nil {
				r.fault(kv[1], "write the value in one line", "%sthe value cannot be taken over", g.lead("set"))
				continue
			}
			c.Sets = append(c.Sets, tasks.Setting{Path: strings.Split(kv[0].Value, "/"), Value: value, Pos: r.pos(kv[0])})
		}
		if g.has("set") && len(c.Sets) == 0 {
			g.fault("set", "write for instance {tasks/resin/standing: 1 h}", "it changes nothing")
		}
		r.job.Changes = append(r.job.Changes, c)
	}
}

// flow writes a node as YAML in one line.
func flow(n *yaml.Node) (string, error) {
	c := *n
	c.HeadComment, c.LineComment, c.FootComment = "", "", ""
	if c.Kind != yaml.ScalarNode {
		c.Style = yaml.FlowStyle
	}
	out, err := yaml.Marshal(&c)
	return strings.TrimSpace(string(out)), err
}

// tryChange reads the job with one change, so that a change that does not work is told at once.
func (r *reader) tryChange(name string, data []byte, fsys fs.FS, c tasks.Change) error {
	_, err := ReadBytesChanged(name, data, fsys, c.Sets)
	var all tasks.Faults
	if !errors.As(err, &all) {
		return err
	}
	out := make(tasks.Faults, len(all))
	for i, f := range all {
		out[i] = f
		out[i].Text = fmt.Sprintf("change %q: %s", c.Name, f.Text)
	}
	return out
}

// change replaces values among the nodes of the job file.
func (r *reader) change(root *yaml.Node, sets []tasks.Setting) {
	for _, s := range sets {
		if s.Value == "" {
			drop(root, strings.Join(s.Path, "/"))
			continue
		}
		value, err := parseValue(s)
		if err != nil {
			r.faultAt(r.setPos(s), "write a value as it would stand in the file", "%s: %s is no value", strings.Join(s.Path, "/"), short(s.Value))
			continue
		}
		if !r.tidy(r.setPos(s).File, value, 0) {
			continue
		}
		if reached, rest := put(root, strings.Join(s.Path, "/"), value); reached != nil {
			word, _, _ := strings.Cut(rest, "/")
			r.faultAt(r.setPos(s), r.among(word, keysAt(reached), "write the keys down to the value, for instance tasks/resin/standing"),
				"the job has nothing under %s (looked for %s)", short(strings.Join(s.Path, "/")), short(word))
		}
	}
}

// settingsOf gives the settings that are for one file: the job file, unless they say that they stand in a library.
func (r *reader) settingsOf(file string) []tasks.Setting {
	var out []tasks.Setting
	for _, s := range r.sets {
		whose := r.name
		if s.Pos.Line == 0 && s.Pos.File != "" {
			whose = s.Pos.File
		}
		if whose == file {
			out = append(out, s)
		}
	}
	return out
}

func (r *reader) setPos(s tasks.Setting) tasks.Pos {
	if s.Pos.Line == 0 {
		return tasks.Pos{File: r.name, Line: 1, Col: 1}
	}
	return s.Pos
}

// parseValue reads the value of a setting; its nodes stand where the setting stands.
func parseValue(s tasks.Setting) (*yaml.Node, error) {
	doc, _, err := decode([]byte(s.Value))
	if err != nil {
		return nil, err
	}
	if doc == nil || len(doc.Content) == 0 {
		return nil, errors.New("no value")
	}
	place(doc.Content[0], s.Pos.Line, s.Pos.Col, 0)
	return doc.Content[0], nil
}

func place(n *yaml.Node, line, col, depth int) {
	n.Line, n.Column = line, col
	if depth > maxDepth {
		return // reported by tidy
	}
	for _, c := range n.Content {
		place(c, line, col, depth+1)
	}
}

// keysAt lists what a path may go on with.
func keysAt(n *yaml.Node) []string {
	var out []string
	for i := 0; n.Kind == yaml.MappingNode && i+1 < len(n.Content); i += 2 {
		out = append(out, n.Content[i].Value)
	}
	return out
}

// put sets the value under a path; the last key may be new. A value that stands nowhere (line 0)
// takes the place of what it replaces, or of the mapping that it is added to. Where the path leads nowhere it gives
// the node that it reached and the rest.
func put(at *yaml.Node, path string, value *yaml.Node) (reached *yaml.Node, rest string) {
	for {
		i, rest, found := step(at, path)
		switch {
		case found && rest == "":
			if value.Line == 0 {
				place(value, at.Content[i].Line, at.Content[i].Column, 0)
			}
			at.Content[i] = value
			return nil, ""
		case found:
			at, path = at.Content[i], rest
		case at.Kind == yaml.MappingNode && path != "" && !strings.Contains(path, "/"):
			if value.Line == 0 {
				place(value, at.Line, at.Column, 0)
			}
			key := &yaml.Node{Kind: yaml.ScalarNode, Value: path, Line: value.Line, Column: value.Column}
			at.Content = append(at.Content, key, value)
			return nil, ""
		default:
			return at, path
		}
	}
}

// drop takes a key of a mapping and its value away, if they are there.
func drop(at *yaml.Node, path string) {
	for {
		i, rest, found := step(at, path)
		switch {
		case !found:
			return
		case rest == "" && at.Kind == yaml.MappingNode:
			at.Content = append(at.Content[:i-1:i-1], at.Content[i+1:]...)
			return
		case rest == "":
			return
		}
		at, path = at.Content[i], rest
	}
}

// step finds the child that path begins with: the longest key of a mapping, the item of a list by
// its name or number.
func step(n *yaml.Node, path string) (index int, rest string, ok bool) {
	best := -1
	consider := func(i int, key string) {
		if path != key && !strings.HasPrefix(path, key+"/") || len(key) <= best || key == "" {
			return
		}
		index, best, ok = i, len(key), true
		rest = strings.TrimPrefix(path[len(key):], "/")
	}
	switch n.Kind {
	case yaml.MappingNode:
		for i := 0; i+1 < len(n.Content); i += 2 {
			consider(i+1, n.Content[i].Value)
		}
	case yaml.SequenceNode:
		for i, c := range n.Content {
			consider(i, strconv.Itoa(i+1))
			for j := 0; c.Kind == yaml.MappingNode && j+1 < len(c.Content); j += 2 {
				if c.Content[j].Value == "name" {
					consider(i, c.Content[j+1].Value)
				}
			}
		}
	}
	return index, rest, ok
}

// Apply gives the text of a job file with some of its values replaced. Comments stay, lines may move:
// use ReadChanged to plan with a change. Errors: tasks.Faults where the text cannot be read or a
// path leads nowhere.
func Apply(data []byte, changes []tasks.Setting) ([]byte, error) {
	r := newReader("job.yaml", nil)
	if len(changes) > 0 && changes[0].Pos.File != "" {
		r.name = changes[0].Pos.File
	}
	root := r.parse(r.name, data)
	if root != nil {
		r.change(root, changes)
	}
	if len(r.faults) > 0 {
		return nil, r.sorted()
	}
	var out bytes.Buffer
	enc := yaml.NewEncoder(&out)
	enc.SetIndent(2)
	if err := enc.Encode(root); err != nil {
		return nil, fmt.Errorf("the changed job cannot be written: %w", err)
	}
	return out.Bytes(), enc.Close()
}
