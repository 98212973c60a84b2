package jobfile

import (
	"bytes"
	"encoding/json"
	"strings"

	"sailby/tasks"
	"sailby/tasks/quantity"
)

// sections lists every section in the order of the manual.
func sections() []*section {
	out := []*section{&topSection, &placeSection, &faceSection, &permitSection, &tideSection, &craftSection, &climateSection, &monthSection,
		&tripSection, &outSection, &backSection, &windowSection, &personSection, &ticketSection, &kitSection, &hireSection,
		&procedureSection, &byPersonSection, &forSection, &setSection, &cableSection, &ratesSection, &cuttingSection, &readingSection, &steelSection, &paintSection, &assemblySection, &partSection, &taskSection, &stopSection, &linkSection, &slingsSection, &secondSection, &handsSection, &nioshSection, &pushSection}
	out = append(out, kindSections()...)
	return append(out, &seamSection, &jointSection, &blockSection, &orderSection, &clashSection, &dutySection, &emergencySection, &vehicleSection, &carriageSection, &drivingSection, &bandSection, &packingSection, &boxSection, &extraSection, &changeSection)
}

// object is a JSON object; encoding/json writes its keys in order.
type object = map[string]any

// Schema gives the JSON schema (draft 2020-12) of the job file, for editors. It accepts every job
// file that Read accepts; Read checks more than a schema can say.
func Schema() []byte {
	defs := object{}
	for _, s := range sections() {
		if s != &topSection {
			defs[s.def()] = s.schema()
		}
	}
	any := []object{}
	for i, s := range kindSections() {
		kind := string(tasks.Kinds()[i])
		cond := object{"required": []string{"kind"}, "properties": object{"kind": object{"const": kind}}}
		if kind == string(tasks.Plain) {
			cond = object{"properties": object{"kind": object{"const": kind}}}
		}
		any = append(any, object{"allOf": []object{cond, {"$ref": reference(s)}}})
	}
	defs[taskSection.def()] = object{"title": "Task", "description": taskSection.says, "anyOf": any}
	out := topSection.schema()
	out["$schema"] = "https://json-schema.org/draft/2020-12/schema"
	out["title"] = "Sailby job file"
	out["$defs"] = defs
	var b bytes.Buffer
	enc := json.NewEncoder(&b)
	enc.SetEscapeHTML(false)
	enc.SetIndent("", "  ")
	if err := enc.Encode(out); err != nil {
		panic("jobfile: schema: " + err.Error()) // the tables hold broken JSON: every test meets it
	}
	return b.Bytes()
}

// def names a section in the schema: without blanks, because references are URIs.
func (s *section) def() string { return strings.ReplaceAll(s.name, " ", "-") }

func reference(s *section) string { return "#/$defs/" + s.def() }

// schema gives the JSON schema of a section, the keys it extends included.
func (s *section) schema() object {
	props := object{}
	need := []string{}
	for at := s; at != nil; at = at.more {
		for i := range at.keys {
			k := &at.keys[i]
			if _, has := props[k.name]; !has {
				props[k.name] = k.schema()
				if k.need {
					need = append(need, k.name)
				}
			}
		}
	}
	out := object{"type": "object", "description": s.says, "properties": props, "additionalProperties": false}
	if len(need) > 0 {
		out["required"] = need
	}
	return out
}

// schema gives the JSON schema of a key's value.
func (k *key) schema() object {
	out := k.valueSchema()
	says := k.says
	if k.usual != "" {
		says += " (usual: " + k.usual + ")"
	}
	out["description"] = says
	out["examples"] = []string{k.name + ": " + k.example}
	return out
}

var scalarType = []string{"string", "number"}

func (k *key) valueSchema() object {
	low, high := k.limits()
	list := func(item object) object {
		return object{"anyOf": []object{item, {"type": "array", "items": item, "minItems": 1}}}
	}
	switch k.takes {
	case aText, aNote, aName:
		return object{"type": []string{"string", "number", "boolean"}}
	case names:
		return list(object{"type": scalarType})
	case yesNo:
		return object{"enum": []any{true, false, "yes", "no"}}
	case aCount:
		return object{"type": "integer", "minimum": low, "maximum": high}
	case aNumber:
		return object{"anyOf": []object{{"type": "number", "minimum": low, "maximum": high}, {"type": "string", "pattern": "^[0-9]+/[0-9]+$"}}}
	case anAmount:
		return object{"type": "string", "pattern": amountPattern(k.dim)}
	case aRange, hourly:
		any := []object{{"type": "string", "pattern": strings.TrimSuffix(amountPattern(k.dim), "$")}, rangeSection.schema()}
		if k.takes == hourly {
			any[0] = object{"type": scalarType}
		}
		return object{"anyOf": any}
	case aWord:
		return object{"enum": k.words}
	case words:
		return list(object{"enum": k.words})
	case aMoment:
		return object{"type": "string", "pattern": " [0-9]{1,2}:[0-9]{2}$"}
	case slots:
		return list(object{"type": "string", "pattern": "[0-9]{1,2}:[0-9]{2}"})
	case weekly:
		return list(object{"type": "string"})
	case keysOf:
		return object{"$ref": reference(k.sub)}
	case namedOf:
		return object{"type": "object", "additionalProperties": object{"$ref": reference(k.sub)}}
	case listOf:
		item := object{"$ref": reference(k.sub)}
		if k.sub == &seamSection {
			item = object{"type": "object"} // the shop's other words for a joint are keys as well
		}
		return object{"type": "array", "items": item}
	}
	var out object
	if err := json.Unmarshal([]byte(k.shape), &out); err != nil {
		panic("jobfile: shape of " + k.name + ": " + err.Error())
	}
	return out
}

// amountPattern matches an amount of a dimension as quantity.Parse takes it, roughly: what it
// refuses, Parse refuses.
func amountPattern(d quantity.Dim) string {
	var units []string
	for _, u := range d.Units() {
		units = append(units, strings.ReplaceAll(u, "/", "\\/"))
	}
	return `^\s*[-+]?[0-9.]+.*(` + strings.Join(units, "|") + `)\s*$`
}
