package jobfile

// JSON schemas of values that have a form of their own.
const (
	anyText      = `{"type":["string","number"]}`
	anyList      = `{"type":"array"}`
	textOrList   = `{"anyOf":[{"type":["string","number"]},{"type":"array","items":{"type":["string","number"]},"minItems":1}]}`
	pairOfText   = `{"type":"array","items":{"type":["string","number"]},"minItems":2,"maxItems":3}`
	datesShape   = `{"anyOf":[{"type":["string","number"]},{"type":"array","items":{"type":"string"},"minItems":1},{"type":"object","additionalProperties":{"type":["string","number"]}}]}`
	reachShape   = `{"anyOf":[{"type":"string"},{"type":"array","items":{"type":"string"},"minItems":1},{"type":"object","properties":{"file":{"type":"string"}},"required":["file"],"additionalProperties":false}]}`
	moneyShape   = `{"type":"object","additionalProperties":{"type":"string","pattern":"^[0-9.]+ [A-Z]{3}$"}}`
	massShape    = `{"type":"object","additionalProperties":{"type":"string"}}`
	pointsShape  = `{"type":"object","additionalProperties":{"type":"string"},"minProperties":1}`
	limitsShape  = `{"type":"object","properties":{"min":{"type":["string","number"]},"max":{"type":["string","number"]}},"additionalProperties":false}`
	nextShape    = `{"type":"object","additionalProperties":{"type":"object","additionalProperties":` + limitsShape + `}}`
	needsShape   = `{"type":"object","additionalProperties":{"type":"integer","minimum":1}}`
	kitShape     = `{"anyOf":[{"type":"string"},{"type":"array","items":{"type":"string"}},{"type":"object","additionalProperties":{"type":"integer","minimum":1}}]}`
	linkShape    = `{"anyOf":[{"type":"string"},{"type":"array","items":{"type":"string"},"minItems":1},{"type":"object","additionalProperties":{"anyOf":[{"type":"string"},{"type":"object","properties":{"min":{"type":"string"},"max":{"type":"string"},"state":{"type":"string"}},"additionalProperties":false}]}}]}`
	pairsShape   = `{"type":"array","items":{"type":"array","items":{"type":"string"},"minItems":2,"maxItems":2}}`
	setShape     = `{"type":"object","minProperties":1}`
	ticketShape  = `{"anyOf":[{"type":"string"},{"$ref":"#/$defs/Weld-ticket"}]}`
	ticketsShape = `{"anyOf":[` + ticketShape + `,{"type":"array","items":` + ticketShape + `,"minItems":1}]}`
)
