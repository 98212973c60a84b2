package sheets

// column is a column of a table; widths are shares of the page.
type column struct {
	head  string
	share float64
}

// line is one line of a cell before wrapping.
type line struct {
	text string
	bold bool
}

// cell is what stands in a column of a row: lines of text, or a box to write in. What is under
// runs from the column to the right edge of the table, below the boxes of the row.
type cell struct {
	lines []line
	under []line
	blank bool
}

func say(texts ...string) cell {
	var c cell
	for _, t := range texts {
		if t != "" {
			c.lines = append(c.lines, line{text: t})
		}
	}
	return c
}

func loud(text string, rest ...string) cell {
	c := say(rest...)
	c.lines = append([]line{{text, true}}, c.lines...)
	return c
}

func write() cell { return cell{blank: true} }

// table is a table that is laid row by row.
type table struct {
	p     *pen
	cols  []column
	x, w  []float64
	least float64 // least height of a row
}

const (
	pad     = 1.2  // mm between text and the rules around it
	tallest = 16.0 // mm: more than this no box in a row needs
)

// table draws the heads of a table and gives it for its rows; the heads come again on every
// continued page.
func (p *pen) table(cols ...column) *table {
	t := &table{p: p, cols: cols, least: lineHeight(body) + 2*pad}
	sum := 0.0
	for _, c := range cols {
		sum += c.share
	}
	x := p.left
	for _, c := range cols {
		w := p.wide() * c.share / sum
		t.x, t.w = append(t.x, x), append(t.w, w)
		x += w
	}
	p.room(3*t.least + boxHeight)
	t.heads()
	p.repeat = t.heads
	return t
}

func (t *table) heads() {
	p := t.p
	tall := 0
	wrapped := make([][]string, len(t.cols))
	for i, c := range t.cols {
		if c.head != "" {
			wrapped[i] = wrapText(c.head, body, true, t.w[i]-2*pad)
			tall = max(tall, len(wrapped[i]))
		}
	}
	if tall == 0 {
		p.rule(thin)
		return
	}
	h := float64(tall)*lineHeight(body) + pad
	p.put(Item{Kind: Shade, X: p.left, Y: p.y, W: p.wide(), H: h, Grey: 0.88})
	for i, list := range wrapped {
		for n, s := range list {
			p.run(t.x[i]+pad, p.y+pad/2+float64(n)*lineHeight(body)+ascent*body*mmPerPoint, s, body, true)
		}
	}
	p.y += h
	p.rule(thin)
}

// end closes the table: pages after it do not repeat its heads.
func (t *table) end() {
	t.p.repeat = nil
	t.p.y += 1.5
}

type wrappedLine struct {
	text string
	bold bool
}

// row draws one row whole; one that is taller than a page goes on on the next.
func (t *table) row(cells ...cell) {
	p := t.p
	wrapped := make([][]wrappedLine, len(cells))
	var under []wrappedLine
	column, tall, box := 0, 0, false
	for i, c := range cells {
		wrapped[i] = wrapLines(c.lines, t.w[i]-2*pad)
		if len(c.under) > 0 {
			column, under = i, wrapLines(c.under, p.right-t.x[i]-2*pad)
		}
		tall = max(tall, len(wrapped[i]))
		box = box || c.blank
	}
	// A row never asks for more than fits on a fresh page below the heads.
	most := max(int((p.bottom-p.doc.Top-40)/lineHeight(body)), 1)
	for from := 0; from == 0 || from < tall; from += most {
		n := min(tall-from, most)
		h := max(float64(n)*lineHeight(body)+2*pad, t.least)
		if box && from == 0 {
			h = max(h, boxHeight+1.6)
		}
		whole := h
		if from+n >= tall && len(under) > 0 && n+len(under) <= most {
			whole += float64(len(under))*lineHeight(body) + pad/2
		}
		p.room(whole)
		for i, c := range cells {
			if c.blank && from == 0 {
				p.put(Item{Kind: Blank, X: t.x[i] + 0.6, Y: p.y + 0.8, W: t.w[i] - 1.2, H: min(h-1.6, tallest), Stroke: thin})
			}
			for k := from; k < min(from+n, len(wrapped[i])); k++ {
				l := wrapped[i][k]
				p.run(t.x[i]+pad, p.y+pad+float64(k-from)*lineHeight(body)+ascent*body*mmPerPoint, l.text, body, l.bold)
			}
		}
		p.y += h
		if from+n >= tall && len(under) > 0 {
			for _, l := range under {
				p.lines(t.x[column]+pad, []string{l.text}, body, l.bold)
			}
			p.y += pad / 2
		}
		p.rule(thin)
	}
}

func wrapLines(list []line, w float64) []wrappedLine {
	var out []wrappedLine
	for _, l := range list {
		for _, s := range wrapText(l.text, body, l.bold, w) {
			out = append(out, wrappedLine{s, l.bold})
		}
	}
	return out
}

// field is one box of a form with its label above it; a value is printed inside.
type field struct {
	label, value string
	units        int // width in units of the form; 0 is 1
}

// fields draws boxes with labels, so many units to a row.
func (p *pen) fields(units int, list ...field) {
	unit := p.wide() / float64(units)
	for len(list) > 0 {
		n, used := 0, 0
		for n < len(list) && (n == 0 || used+max(list[n].units, 1) <= units) {
			used += max(list[n].units, 1)
			n++
		}
		p.fieldRow(unit, list[:n])
		list = list[n:]
	}
}

const gutter = 2.0 // mm between boxes

func (p *pen) fieldRow(unit float64, row []field) {
	labels, values := make([][]string, len(row)), make([][]string, len(row))
	above, inside := 0, 0
	for i, f := range row {
		w := unit*float64(max(f.units, 1)) - gutter
		labels[i] = wrapText(f.label, body, false, w)
		above = max(above, len(labels[i]))
		if f.value != "" {
			values[i] = wrapText(f.value, body, true, w-2*pad)
			inside = max(inside, len(values[i]))
		}
	}
	head := float64(above) * lineHeight(body)
	h := max(boxHeight, float64(inside)*lineHeight(body)+2*pad)
	p.room(head + h + 1.5)
	x := p.left
	for i, f := range row {
		w := unit * float64(max(f.units, 1))
		top := p.y + head - float64(len(labels[i]))*lineHeight(body)
		for n, s := range labels[i] {
			p.run(x, top+float64(n)*lineHeight(body)+ascent*body*mmPerPoint, s, body, false)
		}
		kind := Blank
		if f.value != "" {
			kind = Box
		}
		p.put(Item{Kind: kind, X: x, Y: p.y + head, W: w - gutter, H: h, Stroke: thin})
		for n, s := range values[i] {
			p.run(x+pad, p.y+head+pad+float64(n)*lineHeight(body)+ascent*body*mmPerPoint, s, body, true)
		}
		x += w
	}
	p.y += head + h + 1.5
}
