package jobfile

import (
	"gopkg.in/yaml.v3"
)

// tidy checks the nodes of one file for what YAML allows and a job file does not: aliases, anchors,
// tags, merge keys, keys that are no text, keys that stand twice. It notes the file of every node
// that is not of the job file itself. False means that reading on makes no sense.
func (r *reader) tidy(file string, n *yaml.Node, depth int) bool {
	if file != r.name {
		r.files[n] = file
	}
	switch {
	case depth > maxDepth:
		r.fault(n, "no job needs brackets in brackets that deep", "mappings and lists are nested more than %d deep", maxDepth)
		return false
	case n.Kind == yaml.AliasNode:
		r.fault(n, "write the value again, or declare it once by name and refer to the name", "*%s is an alias; those are not used", n.Value)
		return false
	case n.Anchor != "":
		r.fault(n, "declare it once by name and refer to the name; quote a text that begins with &", "&%s is an anchor; those are not used", n.Anchor)
		return false
	case n.Style&yaml.TaggedStyle != 0:
		r.fault(n, "leave the tag out; quote a text that begins with !", "%q is a tag; those are not used", n.Tag)
		return false
	case n.Kind == yaml.ScalarNode:
		return r.visible(n)
	}
	ok := true
	if n.Kind == yaml.MappingNode {
		joinCommas(n)
		ok = r.distinct(n)
	}
	for _, c := range n.Content {
		ok = r.tidy(file, c, depth+1) && ok
	}
	return ok
}

// joinCommas puts numbers together again that YAML took apart at a decimal comma: in braces
// `{length: 2,4 m}` is the key length and a key "4 m" without a value. So the person is told of the
// comma, and not of a key that they never wrote.
func joinCommas(n *yaml.Node) {
	digit := func(c byte) bool { return c >= '0' && c <= '9' }
	for i := 2; i+1 < len(n.Content); {
		v, k := n.Content[i-1], n.Content[i]
		if v.Kind == yaml.ScalarNode && v.Style == 0 && v.Value != "" && digit(v.Value[len(v.Value)-1]) && k.Kind == yaml.ScalarNode && k.Value != "" && digit(k.Value[0]) &&
			n.Content[i+1].Tag == "!!null" && n.Content[i+1].Value == "" && k.Line == v.Line && k.Column == v.Column+len(v.Value)+1 {
			v.Value += "," + k.Value
			v.Tag = "!!str"
			n.Content = append(n.Content[:i:i], n.Content[i+2:]...)
			continue
		}
		i += 2
	}
}

// visible refuses hidden signs that an escape put into a text.
func (r *reader) visible(n *yaml.Node) bool {
	for _, c := range n.Value {
		if c != '\n' && hidden(c) {
			r.fault(n, "leave it out", "the text has a hidden sign (U+%04X)", c)
			return false
		}
	}
	return true
}

// distinct checks the keys of one mapping.
func (r *reader) distinct(n *yaml.Node) bool {
	ok := true
	seen := map[string]*yaml.Node{}
	for i := 0; i+1 < len(n.Content); i += 2 {
		k := n.Content[i]
		switch {
		case k.Kind == yaml.ScalarNode && k.Tag == "!!merge":
			r.fault(k, "write the keys out", "<< merges another mapping; that is not used")
			ok = false
		case k.Kind == yaml.ScalarNode && k.Tag == "!!null":
			r.fault(k, "write a name before the colon", "a key is empty")
			ok = false
		case k.Kind == yaml.AliasNode: // reported by tidy
		case k.Kind != yaml.ScalarNode:
			r.fault(k, "write a text before the colon", "a key is a list or a mapping")
			ok = false
		case seen[k.Value] != nil:
			r.fault(k, "rename or remove one of them", "%s stands twice here, first in line %d", short(k.Value), seen[k.Value].Line)
		default:
			seen[k.Value] = k
		}
	}
	return ok
}
