package jobfile

import (
	"fmt"
	"slices"
	"strings"
	"time"

	"gopkg.in/yaml.v3"

	"sailby/tasks"
	"sailby/tasks/hours"
	"sailby/tasks/quantity"
	"sailby/weld"
)

// zoneOf is a time zone, nil where it is at fault.
type zoneOf = *time.Location

var personSection = section{name: "Person", where: "people / NAME", host: "people/Tom", says: "Somebody who works.", keys: []key{
	{name: "tickets", takes: itsOwn, form: "list of tickets: words, or keys of a weld ticket", shape: ticketsShape, example: "[{weld: 136, positions: [PF, PA], joints: [fillet, butt], thickness: 3 mm to 20 mm}, fitter, fire watch]", says: "what they may do"},
	{name: "trade", takes: aText, example: "welder", says: "printed on the sheets"},
	{name: "hours", takes: weekly, usual: "as the place is open", example: "Mon-Fri 08:00-16:00", says: "when they work at all"},
	{name: "from", takes: aMoment, usual: "from the start", example: "2027-04-07 08:00", says: "there from then on; local to their first place, else to the window's place"},
	{name: "until", takes: aMoment, usual: "to the end", example: "2027-04-12 17:00", says: "there until then"},
	{name: "off", takes: itsOwn, form: "date or list of dates", shape: datesShape, example: "[2027-04-10]", says: "days off"},
	{name: "places", takes: names, usual: "everywhere", example: "[shop]", without: "outside booked", says: "works only there"},
	{name: "outside", takes: yesNo, usual: "no", example: "yes", beside: "places: pier, booked: day 3 10:00-12:00", says: "client or inspector: comes when booked, is no second person (R14)"},
	{name: "booked", takes: slots, example: "[2027-04-08 10:00-12:00]", beside: "places: pier, outside: yes", says: "for somebody from outside: when they are there"},
}}

var ticketSection = section{name: "Weld ticket", where: "people / NAME / tickets / item", host: "people/Ines/tickets/1", says: "What somebody may weld.", keys: []key{
	{name: "weld", takes: itsOwn, form: "process, by ISO 4063 number or its usual name, or `all`", shape: anyText, need: true, example: "136", says: "the process"},
	{name: "positions", takes: itsOwn, form: "ISO 6947 positions, or `all`", shape: textOrList, usual: "all", example: "[PF, PA, PB]", says: "the positions that the ticket covers"},
	{name: "joints", takes: words, words: []string{"fillet", "butt"}, usual: "all", example: "[fillet, butt]", says: "fillets, butts or both"},
	{name: "thickness", takes: itsOwn, form: "range", shape: anyText, usual: "all", example: "3 mm to 20 mm", says: "parent metal, from thinnest to thickest"},
}}

const maxPeople = 300

func (r *reader) readPeople(f *fields) {
	r.ticketsLost = r.ticketsLost || f.lost && !f.tried("people")
	r.peopleTried = r.peopleTried || f.tried("people") || f.lost
	for i, kv := range f.pairs("people") {
		if i == maxPeople {
			f.fault("people", "plan with those who do the work", "more than %d people", maxPeople)
			return
		}
		name, ok := r.newName(kv[0], "person", true)
		if !ok {
			continue
		}
		if strings.Contains(name, " or ") || strings.Contains(name, " and ") {
			r.fault(kv[0], "shorten it", "person %s: `or` and `and` join names in needs", short(name))
		}
		r.addPerson(r.person(name, kv[0], kv[1]))
	}
}

// addPerson adds somebody; one of that name from a library is replaced.
func (r *reader) addPerson(p *tasks.Person) {
	if i := slices.IndexFunc(r.job.People, func(q *tasks.Person) bool { return q.Name == p.Name }); i >= 0 {
		r.job.People[i] = p
		return
	}
	r.job.People = append(r.job.People, p)
}

func (r *reader) person(name string, at, n *yaml.Node) *tasks.Person {
	f := r.open(n, &personSection, fmt.Sprintf("person %q", name))
	p := &tasks.Person{Name: name, Pos: r.pos(at), Keys: f.keys(), Trade: f.line("trade"), Outside: f.yes("outside")}
	for _, t := range f.items("tickets") {
		faults := len(r.faults)
		if ticket, ok := r.ticket(t, f.lead("tickets")); ok {
			p.Tickets = append(p.Tickets, ticket)
		}
		r.ticketsLost = r.ticketsLost || len(r.faults) > faults
	}
	if f.has("hours") {
		p.Hours = f.weekly("hours")
	}
	zone := r.home
	if r.site != nil {
		zone = r.site.Zone
	}
	for i, ref := range f.names("places") {
		pl := r.placeOf[ref.text]
		if pl == nil {
			r.unknown(ref.pos, f.lead("places"), "place", ref.text, r.placeNames())
			continue
		}
		if i == 0 {
			zone = pl.Zone
		}
		p.Places = append(p.Places, ref.text)
	}
	p.From, p.Until = f.moment("from", zone), f.moment("until", zone)
	p.Booked = f.slots("booked", zone)
	for _, n := range f.items("off") {
		if d, ok := r.date(n, f.lead("off")); ok {
			if p.Off == nil {
				p.Off = map[hours.Date]bool{}
			}
			p.Off[d] = true
		}
	}
	switch {
	case p.Outside && !f.tried("places"):
		at := "pier"
		if f.r.site != nil {
			at = f.r.site.Name
		}
		f.fault("outside", "add `places: "+at+"`", "somebody from outside has no place")
	case p.Outside && len(f.names("places")) > 1:
		f.fault("places", "name the one place they come to", "somebody from outside comes to one place")
	case p.Outside && !f.tried("booked"):
		f.fault("outside", "add `booked: [2027-04-08 10:00-12:00]`", "nothing says when they come")
	case !p.Outside && f.has("booked"):
		f.fault("booked", "use `hours`, `from` and `until`, or add `outside: yes`", "slots are booked only for somebody from outside")
	}
	return p
}

// ticket reads a word, or the keys of a weld ticket.
func (r *reader) ticket(n *yaml.Node, lead string) (tasks.Ticket, bool) {
	if n.Kind == yaml.MappingNode {
		return r.weldTicket(n, strings.TrimSuffix(lead, ": "))
	}
	s, ok := r.text(n, lead, "fitter")
	if !ok {
		return tasks.Ticket{}, false
	}
	if _, ok := r.newName(n, "ticket", true); !ok {
		return tasks.Ticket{}, false
	}
	t, err := parseTicket(s)
	if err != nil {
		r.advice(n, lead, err, "write for instance weld 136 PF")
		return tasks.Ticket{}, false
	}
	t.Pos = r.pos(n)
	return t, true
}

// parseTicket reads "fitter" and "weld 136 PF fillet 12 mm": after the word weld, in any order, a
// process, positions, fillet or butt, and a thickness.
func parseTicket(s string) (tasks.Ticket, error) {
	word := strings.Fields(s)
	if word[0] != "weld" {
		return tasks.Ticket{Name: strings.Join(word, " ")}, nil
	}
	t := tasks.Ticket{Name: "weld"}
	for i := 1; i < len(word); i++ {
		w := word[i]
		if i+1 < len(word) {
			if v, err := quantity.Parse(w+" "+word[i+1], quantity.Length); err == nil && v > 0 {
				t.ThickFrom, t.ThickTo = v, v
				i++
				continue
			}
		}
		switch p, isProcess := weld.ParseProcess(w); {
		case isProcess:
			t.Process = processNumber(p)
		case w == "fillet" || w == "butt":
			t.Joints = append(t.Joints, w)
		default:
			pos, ok := weld.ParsePosition(w)
			if !ok {
				return t, advise("write the process by number, then positions, fillet or butt, for instance weld 136 PF fillet", "%q in %s is neither a process nor a position", w, short(s))
			}
			t.Positions = append(t.Positions, pos.String())
		}
	}
	return t, nil
}

func processNumber(p weld.Process) string { return fmt.Sprintf("%d", int(p)) }

// weldTicket reads {weld: 136, positions: [PF], joints: [fillet], thickness: 3 mm to 20 mm}.
func (r *reader) weldTicket(n *yaml.Node, what string) (tasks.Ticket, bool) {
	f := r.open(n, &ticketSection, what)
	t := tasks.Ticket{Name: "weld", Pos: r.pos(n)}
	if s, ok := f.word("weld"); ok && s != "all" {
		p, known := weld.ParseProcess(s)
		if !known {
			f.fault("weld", "write its ISO 4063 number: 111, 114, 121, 131, 135, 136, 138 or 141", "%s is not a welding process known here", short(s))
		}
		t.Process = processNumber(p)
	}
	for _, ref := range f.names("positions") {
		if ref.text == "all" {
			continue
		}
		p, ok := weld.ParsePosition(ref.text)
		if !ok {
			r.faultAt(ref.pos, "write PA, PB, PC, PD, PE, PF, PG, PH, PJ or H-L045", "%s%s is not a welding position", f.lead("positions"), short(ref.text))
			continue
		}
		t.Positions = append(t.Positions, p.String())
	}
	for _, ref := range f.names("joints") {
		if !slices.Contains(f.key("joints").words, ref.text) {
			r.faultAt(ref.pos, "write fillet, butt or both", "%s%s is neither fillet nor butt", f.lead("joints"), short(ref.text))
			continue
		}
		t.Joints = append(t.Joints, ref.text)
	}
	if s, ok := f.word("thickness"); ok {
		rg, err := quantity.ParseRange(s, quantity.Length)
		if err != nil {
			r.advice(f.vals["thickness"], f.lead("thickness"), err, "write for instance 3 mm to 20 mm")
		} else if rg.Low < 0 {
			f.fault("thickness", "write for instance 3 mm to 20 mm", "a thickness is not below zero")
		}
		t.ThickFrom, t.ThickTo = rg.Low, rg.High
	}
	return t, true
}
