package model

// leavePage asks before the screen is left.
type leavePage struct {
	m  *Model
	at scroll
}

func (p *leavePage) title() string  { return "Leave?" }
func (p *leavePage) place() *scroll { return &p.at }
func (p *leavePage) keys() string   { return "Enter leave   Esc stay" }

func (p *leavePage) lay(n int) ([]Row, []line) {
	body := []line{{}, {text: "Leave Sailby", do: func() Ask { return Ask{Leave: true} }}, {}}
	body = append(body, para(n, "", "Nothing was written to the job file, and nothing needs saving.", Plain, nil)...)
	if len(p.m.what.changes) > 0 {
		body = append(body, para(n, "", "The changes tried in What if are printed when you leave, so that you can put them into the job file:", Plain, nil)...)
		for _, t := range p.m.Tried() {
			body = append(body, para(n, "  - ", t, Plain, nil)...)
		}
	}
	return nil, body
}

func (p *leavePage) press(Key) (Ask, bool) { return Ask{}, false }
