package jobfile

import (
	"bytes"
	"encoding/json"
	"errors"
	"flag"
	"fmt"
	"os"
	"strings"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"gopkg.in/yaml.v3"

	"sailby/tasks"
)

var update = flag.Bool("update", false, "write the tables of keys in JOBFILE.md anew")

const (
	manualFile  = "../../JOBFILE.md"
	manualBegin = "<!-- KEYS -->\n"
	manualEnd   = "<!-- END OF KEYS -->\n"
)

// The manual's tables are made from the tables of the reader.
func TestManualIsCurrent(t *testing.T) {
	data, err := os.ReadFile(manualFile)
	if err != nil {
		t.Fatal(err)
	}
	head, rest, ok := strings.Cut(string(data), manualBegin)
	if !ok {
		t.Fatalf("JOBFILE.md has no line %s", manualBegin)
	}
	old, tail, ok := strings.Cut(rest, manualEnd)
	if !ok {
		t.Fatalf("JOBFILE.md has no line %s", manualEnd)
	}
	want := "\n" + manual()
	if old == want {
		return
	}
	if !*update {
		t.Fatal("the tables in JOBFILE.md are not those of the reader; run go test ./tasks/jobfile -update")
	}
	if err := os.WriteFile(manualFile, []byte(head+manualBegin+want+manualEnd+tail), 0o644); err != nil {
		t.Fatal(err)
	}
}

// Every key says what it means and has an example of its own.
func TestKeysAreDescribed(t *testing.T) {
	for _, s := range sections() {
		if s.says == "" || s.where == "" {
			t.Errorf("section %s is not described", s.name)
		}
		for _, k := range s.keys {
			if k.says == "" || k.example == "" {
				t.Errorf("%s / %s: has no meaning or no example", s.name, k.name)
			}
			if k.takes == itsOwn && (k.form == "" || k.shape == "") {
				t.Errorf("%s / %s: has no form or no schema", s.name, k.name)
			}
			if k.takes == aWord && len(k.words) == 0 || (k.takes == keysOf || k.takes == namedOf || k.takes == listOf) && k.sub == nil {
				t.Errorf("%s / %s: lacks its words or keys", s.name, k.name)
			}
		}
	}
}

// exampleJob puts the example of a key into the example job of its section.
func exampleJob(t *testing.T, s *section, k *key) []byte {
	t.Helper()
	host := s.host
	if k.host != "" {
		host = k.host
	}
	file, path, ok := strings.Cut(host, ":")
	if !ok {
		file, path = "host", host
	}
	if s == &topSection {
		file, path = "minimal", ""
	}
	data, err := os.ReadFile("testdata/" + file + ".yaml")
	if err != nil {
		t.Fatal(err)
	}
	doc, _, err := decode(data)
	if err != nil {
		t.Fatal(err)
	}
	at := doc.Content[0]
	for path != "" {
		i, rest, ok := step(at, path)
		if !ok {
			t.Fatalf("section %s: testdata/%s.yaml has nothing under %s", s.name, file, path)
		}
		at, path = at.Content[i], rest
	}
	drop := func(name string) {
		for i := 0; i+1 < len(at.Content); i += 2 {
			if at.Content[i].Value == name {
				at.Content = append(at.Content[:i:i], at.Content[i+2:]...)
				return
			}
		}
	}
	for _, name := range strings.Fields(k.without) {
		if name == "*joint" {
			for _, j := range seamSection.keys {
				if j.sub == &jointSection {
					drop(j.name)
				}
			}
		}
		drop(strings.ReplaceAll(name, "_", " "))
	}
	set := func(text string) {
		var more yaml.Node
		if err := yaml.Unmarshal([]byte(text), &more); err != nil {
			t.Fatalf("%s / %s: %q: %v", s.name, k.name, text, err)
		}
		for i := 0; i+1 < len(more.Content[0].Content); i += 2 {
			drop(more.Content[0].Content[i].Value)
			at.Content = append(at.Content, more.Content[0].Content[i], more.Content[0].Content[i+1])
		}
	}
	set(k.name + ": " + k.example)
	if k.beside != "" {
		set("{" + k.beside + "}")
	}
	out, err := yaml.Marshal(doc)
	if err != nil {
		t.Fatal(err)
	}
	return out
}

// Every example of the manual stands in a job that reads without a fault, and in the schema.
func TestExamples(t *testing.T) {
	schema := compiled(t)
	for _, s := range sections() {
		for i := range s.keys {
			k := &s.keys[i]
			t.Run(s.name+"/"+k.name, func(t *testing.T) {
				data := exampleJob(t, s, k)
				if _, err := ReadBytes("job.yaml", data, os.DirFS("testdata")); err != nil {
					t.Fatalf("%v", err)
				}
				if err := schema.Validate(asJSON(t, data)); err != nil {
					t.Errorf("the schema refuses it: %v", err)
				}
			})
		}
	}
}

// A key with a value that cannot be is reported at the value, with a way out. "{{" cannot be
// anything, a list of lists neither.
func TestEveryKeyIsRead(t *testing.T) {
	for _, s := range sections() {
		for i := range s.keys {
			k := s.keys[i]
			good := exampleJob(t, s, &k)
			k.example = "[[[\"?\"], [\"?\"]], [[\"?\"]]]"
			k.beside = s.keys[i].beside
			bad := exampleJob(t, s, &k)
			if bytes.Equal(good, bad) {
				t.Errorf("%s / %s: the test changes nothing", s.name, k.name)
			}
			job, err := ReadBytes("job.yaml", bad, os.DirFS("testdata"))
			var all tasks.Faults
			if !errors.As(err, &all) || job != nil {
				t.Errorf("%s / %s: a list of lists is taken: the key is not read", s.name, k.name)
				continue
			}
			for _, f := range all {
				if f.Pos.Line < 1 || f.Pos.Col < 1 || f.Hint == "" || f.Text == "" {
					t.Errorf("%s / %s: fault without place or way out: %+v", s.name, k.name, f)
				}
			}
		}
	}
}

func compiled(t *testing.T) *jsonschema.Schema {
	t.Helper()
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(Schema()))
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	c.DefaultDraft(jsonschema.Draft2020)
	if err := c.AddResource("job.json", doc); err != nil {
		t.Fatal(err)
	}
	s, err := c.Compile("job.json")
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// asJSON gives a YAML text as an editor's schema check sees it: YAML 1.2, dates are text.
func asJSON(t *testing.T, data []byte) any {
	t.Helper()
	doc, _, err := decode(data)
	if err != nil {
		t.Fatal(err)
	}
	text, err := json.Marshal(plain(doc.Content[0]))
	if err != nil {
		t.Fatal(err)
	}
	v, err := jsonschema.UnmarshalJSON(bytes.NewReader(text))
	if err != nil {
		t.Fatal(err)
	}
	return v
}

func plain(n *yaml.Node) any {
	switch n.Kind {
	case yaml.MappingNode:
		out := map[string]any{}
		for i := 0; i+1 < len(n.Content); i += 2 {
			out[n.Content[i].Value] = plain(n.Content[i+1])
		}
		return out
	case yaml.SequenceNode:
		out := []any{}
		for _, c := range n.Content {
			out = append(out, plain(c))
		}
		return out
	}
	switch n.Tag {
	case "!!int", "!!float":
		return json.Number(n.Value)
	case "!!bool":
		return n.Value == "true"
	}
	return n.Value
}

func TestSchemaTakesJobs(t *testing.T) {
	schema := compiled(t)
	for _, name := range []string{"sketch", "minimal", "closure", "host"} {
		data, err := os.ReadFile("testdata/" + name + ".yaml")
		if err != nil {
			t.Fatal(err)
		}
		if err := schema.Validate(asJSON(t, data)); err != nil {
			t.Errorf("%s: %v", name, err)
		}
	}
}

func TestSchemaRefuses(t *testing.T) {
	schema := compiled(t)
	base, err := os.ReadFile("testdata/minimal.yaml")
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range [][2]string{{"hours: 2 h", "length: 2 h"}, {"zone:", "zoen:"}, {"hours: 2 h", "chance: 35"},
		{"kind: weld", "kind: wled"}, {"people: 2", "people: two"}, {"standing: 12 h", "standing: 12 mm"}, {"job: Small job", ""}} {
		data := strings.Replace(string(base), c[0], c[1], 1)
		if err := schema.Validate(asJSON(t, []byte(data))); err == nil {
			t.Errorf("%s in place of %s is taken", c[1], c[0])
		}
	}
}

func ExampleSchema() {
	fmt.Println(strings.Contains(string(Schema()), "json-schema.org/draft/2020-12"))
	// Output: true
}
