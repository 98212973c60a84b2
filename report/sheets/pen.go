package sheets

import "strings"

// Sizes of type in points.
const (
	body   = 11.0
	strong = 13.0
	title  = 20.0
)

// boxHeight is the height of a box to write in, for gloved hands.
const boxHeight = 10.0

// headRoom is the height of the running head with the room below it.
const headRoom = 1.25*body*mmPerPoint + 3.8

// thin and thick are strokes in mm.
const (
	thin  = 0.25
	thick = 0.6
)

// pen lays items down from the top of a page to its bottom and starts a new page where room runs
// out.
type pen struct {
	doc     *Document
	page    *Page
	y       float64 // top of what comes next
	section string  // in the running head
	name    string  // of the page in lists
	form    bool    // pages with boxes: nothing may stay empty
	repeat  func()  // what a continued page begins with: the heads of a table
	forms   []bool  // by page
	left    float64
	right   float64
	bottom  float64 // the last y for content
}

// newPen gives a pen on the paper asked for.
func newPen(doc *Document) *pen {
	return &pen{doc: doc, left: doc.Left, right: doc.Width - doc.Right, bottom: doc.Height - doc.Bottom - lineHeight(body) - 2}
}

func (p *pen) wide() float64 { return p.right - p.left }

// begin starts a section on a new page with its title.
func (p *pen) begin(section, name string, form bool) {
	p.section, p.name, p.form, p.repeat = section, name, form, nil
	p.newPage()
}

// newPage starts a page with the running head: the job on the left, the section on the right.
func (p *pen) newPage() {
	p.page = &Page{Name: p.name}
	p.doc.Pages = append(p.doc.Pages, p.page)
	p.forms = append(p.forms, p.form)
	p.y = p.doc.Top
	right := fitted(p.section, body, true, p.wide()*0.55)
	rw := width(right, body, true)
	base := p.y + ascent*body*mmPerPoint
	p.put(Item{Kind: Text, X: p.right - rw, Y: base, W: rw, Text: right, Size: body, Bold: true})
	p.run(p.left, base, fitted(p.doc.Title, body, false, p.wide()-rw-6), body, false)
	p.y += headRoom - 3
	p.rule(thick)
	p.y += 3
}

// put adds an item to the page.
func (p *pen) put(it Item) { p.page.Items = append(p.page.Items, it) }

// run draws cleaned text with its baseline at y.
func (p *pen) run(x, y float64, s string, size float64, bold bool) {
	if s != "" {
		p.put(Item{Kind: Text, X: x, Y: y, W: width(s, size, bold), Text: s, Size: size, Bold: bold})
	}
}

// rule draws a line across the page at the present height.
func (p *pen) rule(stroke float64) {
	p.put(Item{Kind: Rule, X: p.left, Y: p.y, W: p.wide(), Stroke: stroke})
}

// room starts a new page unless h mm are left, and says whether it did.
func (p *pen) room(h float64) bool {
	if p.y+h <= p.bottom+1e-6 {
		return false
	}
	p.newPage()
	if p.repeat != nil {
		p.repeat()
	}
	return true
}

// lines draws lines at x, one below the other, on this page and the next ones.
func (p *pen) lines(x float64, list []string, size float64, bold bool) {
	for _, l := range list {
		p.room(lineHeight(size))
		p.run(x, p.y+ascent*size*mmPerPoint, l, size, bold)
		p.y += lineHeight(size)
	}
}

// para draws wrapped text across the page; short ones are kept whole.
func (p *pen) para(s string, size float64, bold bool) {
	list := wrapText(s, size, bold, p.wide())
	if len(list) <= 6 {
		p.room(float64(len(list)) * lineHeight(size))
	}
	p.lines(p.left, list, size, bold)
}

// point draws wrapped text behind a lead such as "1" or "-".
func (p *pen) point(lead, s string, bold bool) {
	const hang = 8.0
	list := wrapText(s, body, bold, p.wide()-hang)
	if len(list) <= 6 {
		p.room(float64(len(list)) * lineHeight(body))
	}
	for i, l := range list {
		p.room(lineHeight(body))
		if i == 0 {
			p.run(p.left+1, p.y+ascent*body*mmPerPoint, paper(lead), body, true)
		}
		p.run(p.left+hang, p.y+ascent*body*mmPerPoint, l, body, bold)
		p.y += lineHeight(body)
	}
}

// heading draws a heading and keeps it on one page with the next need mm.
func (p *pen) heading(s string, need float64) {
	list := wrapText(s, strong, true, p.wide())
	p.skip(2.5)
	p.room(float64(len(list))*lineHeight(strong) + need)
	p.lines(p.left, list, strong, true)
	p.y += 0.8
}

// skip leaves space, but not at the top of a page.
func (p *pen) skip(h float64) {
	if p.y > p.doc.Top+lineHeight(body)+5 {
		p.y += h
	}
}

// big draws the title of a section.
func (p *pen) big(s string) {
	p.lines(p.left, wrapText(s, title, true, p.wide()), title, true)
	p.y += 1
}

// joined joins the parts that say something.
func joined(sep string, parts ...string) string {
	var out []string
	for _, s := range parts {
		if strings.TrimSpace(s) != "" {
			out = append(out, s)
		}
	}
	return strings.Join(out, sep)
}
