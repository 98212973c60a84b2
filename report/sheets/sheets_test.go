package sheets

import (
	"errors"
	"flag"
	"fmt"
	"os"
	"strings"
	"testing"

	"sailby/plan"
	"sailby/report/agenda"
	"sailby/report/fixture"
	"sailby/tasks"
	"sailby/tasks/expand"
	"sailby/tasks/hours"
)

var update = flag.Bool("update", false, "write the golden drawing lists anew")

func packed(t *testing.T, r *plan.Report, o Options) *Document {
	t.Helper()
	d, err := Pack(r, o)
	if err != nil {
		t.Fatal(err)
	}
	return d
}

// faults lists what breaks the laws of the sheets: inside the margins, text of 11 points or
// more, boxes to write in of 9 mm or more and empty, nothing over anything else.
func faults(d *Document) []string {
	const eps = 0.02 // mm, far below what a printer shows
	var out []string
	for n, p := range d.Pages {
		bad := func(format string, args ...any) {
			out = append(out, fmt.Sprintf("page %d (%s): ", n+1, p.Name)+fmt.Sprintf(format, args...))
		}
		var texts, blanks, boxes []Item
		for _, it := range p.Items {
			if it.X < d.Left-eps || it.X+it.W > d.Width-d.Right+eps || it.Top() < d.Top-eps || it.Bottom() > d.Height-d.Bottom+eps {
				bad("%s %q at %.2f, %.2f is outside the margins", it.Kind, it.Text, it.X, it.Y)
			}
			switch it.Kind {
			case Text:
				if it.Size < 11 {
					bad("text %q has %g pt", it.Text, it.Size)
				}
				for _, r := range it.Text {
					if r != ' ' && !drawable(r) {
						bad("text %q has %U, which the font lacks", it.Text, r)
					}
				}
				texts = append(texts, it)
			case Blank:
				if it.W < 9 || it.H < 9 {
					bad("a box to write in has %.1f by %.1f mm", it.W, it.H)
				}
				blanks = append(blanks, it)
			case Box:
				boxes = append(boxes, it)
			}
		}
		over := func(a, b Item) bool {
			return a.X+eps < b.X+b.W && b.X+eps < a.X+a.W && a.Top()+eps < b.Bottom() && b.Top()+eps < a.Bottom()
		}
		for i, a := range texts {
			for _, b := range texts[i+1:] {
				if over(a, b) {
					bad("%q lies over %q", a.Text, b.Text)
				}
			}
			for _, b := range blanks {
				if over(a, b) {
					bad("%q lies in a box to write in", a.Text)
				}
			}
			for _, b := range boxes {
				if over(a, b) && (a.X < b.X-eps || a.X+a.W > b.X+b.W+eps || a.Bottom() > b.Bottom()+1.2 || a.Top() < b.Top()-1.2) {
					bad("%q sticks out of its box", a.Text)
				}
			}
		}
		for i, a := range blanks {
			for _, b := range blanks[i+1:] {
				if over(a, b) {
					bad("two boxes to write in lie over each other")
				}
			}
		}
	}
	return out
}

func text(p *Page) string {
	var b strings.Builder
	for _, it := range p.Items {
		if it.Kind == Text {
			b.WriteString(it.Text + "\n")
		}
	}
	return b.String()
}

// flat joins the text of all pages of a name with blanks, so that wrapping does not matter.
func flat(d *Document, name string) string {
	var b strings.Builder
	for _, p := range d.Pages {
		if strings.HasPrefix(p.Name, name) {
			b.WriteString(text(p))
		}
	}
	return strings.Join(strings.Fields(b.String()), " ")
}

func TestLaws(t *testing.T) {
	for name, o := range map[string]Options{"A4": {}, "Letter": {Letter: true}, "site only": {SiteOnly: true}, "every maybe": {Maybes: true}} {
		d := packed(t, fixture.Report(), o)
		for _, f := range faults(d) {
			t.Errorf("%s: %s", name, f)
		}
	}
}

// TestLawsSeeFaults keeps the laws honest: each broken page must be seen.
func TestLawsSeeFaults(t *testing.T) {
	good := func() *Document {
		return &Document{Width: 210, Height: 297, Left: 15, Right: 12, Top: 17, Bottom: 10, Pages: []*Page{{Items: []Item{
			{Kind: Text, X: 20, Y: 40, W: width("weld", 11, false), Text: "weld", Size: 11}, {Kind: Blank, X: 20, Y: 50, W: 20, H: 10}}}}}
	}
	if f := faults(good()); len(f) > 0 {
		t.Fatalf("the good page: %v", f)
	}
	for name, spoil := range map[string]func(p *Page){
		"outside":       func(p *Page) { p.Items[0].X = 200 },
		"small":         func(p *Page) { p.Items[0].Size = 10.5 },
		"no glyph":      func(p *Page) { p.Items[0].Text = "☐" },
		"low box":       func(p *Page) { p.Items[1].H = 8 },
		"text in box":   func(p *Page) { p.Items[0].Y = 55 },
		"text on text":  func(p *Page) { p.Items = append(p.Items, p.Items[0]) },
		"box on box":    func(p *Page) { p.Items = append(p.Items, p.Items[1]) },
		"out of a box":  func(p *Page) { p.Items = append(p.Items, Item{Kind: Box, X: 18, Y: 35, W: 5, H: 9}) },
		"below the end": func(p *Page) { p.Items[1].Y = 280 },
	} {
		d := good()
		spoil(d.Pages[0])
		if len(faults(d)) == 0 {
			t.Errorf("%s: not seen", name)
		}
	}
}

func TestPages(t *testing.T) {
	d := packed(t, fixture.Report(), Options{})
	var names []string
	for i, p := range d.Pages {
		if len(names) == 0 || names[len(names)-1] != p.Name {
			names = append(names, p.Name)
		}
		if want := fmt.Sprintf("page %d of %d", i+1, len(d.Pages)); !strings.Contains(text(p), want+"\n") {
			t.Errorf("page %d does not say %q", i+1, want)
		}
		form := p.Name != "cover" && p.Name != "cautions"
		if got := strings.Contains(text(p), "Write N/A, leave no box empty.\n"); got != form {
			t.Errorf("page %d (%s) says to leave no box empty: %v, want %v", i+1, p.Name, got, form)
		}
	}
	want := "cover|shift 2027-04-01|shift 2027-04-02|shift 2027-04-03, 2027-04-05|shift 2027-04-06|shift 2027-04-07|shift 2027-04-08|" +
		"shift 2027-04-09|handover|weld list|paint log|lift load frame|lift hang frame|packing|cautions"
	if got := strings.Join(names, "|"); got != want {
		t.Errorf("pages\n %s\nwant\n %s", got, want)
	}
	if s := packed(t, fixture.Report(), Options{SiteOnly: true}); strings.Contains(flat(s, "shift"), "Home workshop") {
		t.Error("site only, and a sheet for the workshop")
	} else if list := flat(s, "lift"); strings.Contains(list, "Home workshop") || !strings.Contains(list, "hang frame") && !strings.Contains(list, "landing frame") {
		t.Error("site only, and the lift sheets are not those of the site alone")
	} else if list := flat(s, "weld list"); strings.Contains(list, "Home workshop") || !strings.Contains(list, "L1-L4") {
		t.Error("site only, and the weld list is not that of the site alone")
	}
}

func TestGolden(t *testing.T) {
	d := packed(t, fixture.Report(), Options{})
	var b strings.Builder
	for _, p := range d.Pages {
		if p.Name == "cover" || p.Name == "shift 2027-04-07" || p.Name == "weld list" {
			b.WriteString(p.List())
		}
	}
	const file = "testdata/pages.golden"
	if *update {
		if err := os.WriteFile(file, []byte(b.String()), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	got := strings.Split(b.String(), "\n")
	for i, w := range strings.Split(string(want), "\n") {
		if i >= len(got) || got[i] != w {
			g := "nothing"
			if i < len(got) {
				g = got[i]
			}
			t.Fatalf("line %d is\n%s\nwant\n%s\n(go test ./report/sheets -update writes it anew)", i+1, g, w)
		}
	}
	if len(got) != strings.Count(string(want), "\n")+1 {
		t.Errorf("%d lines, want %d", len(got), strings.Count(string(want), "\n")+1)
	}
}

func TestSheetsSay(t *testing.T) {
	d := packed(t, fixture.Report(), Options{})
	for _, c := range []struct{ page, want string }{
		{"cover", "Fits: on likely hours the work at Tarskay pier is finished by Fri 9 Apr 11:00, 5 h before the window closes."},
		{"cover", "Cannot fit: proved, at the high end of the hours"},
		{"cover", "open again Thu 8 Apr 17:30 Thu 8 Apr 16:00 1 h 30 min Thu 8 Apr 16:30"},
		{"cover", "loader crane comes Wed 7 Apr 08:00-12:00"},
		{"cover", "Tickets that only one person holds: slinger/signaller (Tom), weld (Ines)"},
		{"cover", "Look early for what may come: rot found (35 %)"},
		{"cover", agenda.Care},
		{"shift 2027-04-07", "Wednesday 7 April 2027"},
		{"shift 2027-04-07", "Tarskay pier, day 2 of 4, 07:30-18:00"},
		{"shift 2027-04-07", "56 h 30 min left to the window's end"},
		{"shift 2027-04-07", "Fire watch 16:00-17:00: Tom"},
		{"shift 2027-04-07", "oes on Thu 8 Apr 08:00, 1 h 40 min of it then"},
		{"shift 2027-04-07", "Hot work permit no."},
		{"shift 2027-04-07", "4.5 m of 6 mm fillet PF; drawing TP-104-07 rev B"},
		{"shift 2027-04-07", "Lifting: weight known, nobody below"},
		{"shift 2027-04-06", "Standing: resin set, Tarskay pier / deck, until Tue 6 Apr 23:10."},
		{"shift 2027-04-06", "weld lugs, hinge, 7 h 40 min, from 11:00 on"},
		{"shift 2027-04-08", "Must be done by 17:30"},
		{"shift 2027-04-03, 2027-04-05", "the day of leaving"},
		{"weld list", "L1-L4"},
		{"weld list", "procedure site fillet"},
		{"weld list", "procedure site fillet, 136 flux-cored, preheat 50 °C"},
		{"paint log", "steel above the dew point at least 3 K"},
		{"lift hang frame", "451 kg"},
		{"lift hang frame", "9.8 m/s gust"},
		{"lift hang frame", "Planned by a competent person, signature"},
		{"packing", "flux-cored wire 1.2 mm"},
		{"packing", "1.1 kg and 0.3 kg spare"}, // the wire of the shop's weld is not taken along
		{"packing", "! mig set for weld lugs; no spare named"},
		{"cautions", "Isocyanate paint"},
		{"cautions", agenda.Care},
	} {
		if got := flat(d, c.page); !strings.Contains(got, c.want) {
			t.Errorf("page %s does not say %q:\n%s", c.page, c.want, got)
		}
	}
	if s := flat(d, "packing"); strings.Contains(s, "loader crane") || strings.Contains(s, "chain hoist") {
		t.Error("the packing list has a hired crane or the shop's hoist on it")
	}
	if s := flat(d, "cautions"); strings.Contains(s, "Closed space") {
		t.Error("a caution for closed spaces, and the job has none")
	}
}

func TestLatePlanSaysSo(t *testing.T) {
	s := flat(packed(t, fixture.Report(), Options{Maybes: true}), "cover")
	for _, want := range []string{"This plan is late.", "These sheets are for the plan with every maybe.", "2 h 10 min late"} {
		if !strings.Contains(s, want) {
			t.Errorf("the cover of a late plan does not say %q", want)
		}
	}
}

// Short days at home share a page, and each keeps its boxes; a day at the site has its own page.
func TestShortDaysShareAPage(t *testing.T) {
	r := fixture.Report()
	d := packed(t, r, Options{})
	shared := 0
	for _, p := range d.Pages {
		if !strings.HasPrefix(p.Name, "shift ") {
			continue
		}
		days := strings.Count(p.Name, "2027-")
		if n := strings.Count(text(p), "Lead hand, name and signature\n"); days > 1 && n != days {
			t.Errorf("page %q has %d places to sign, want %d", p.Name, n, days)
		}
		if days > 1 {
			shared++
		}
		if days > 1 && strings.Contains(text(p), "Tarskay pier, day") {
			t.Errorf("page %q has a day at the site on it", p.Name)
		}
	}
	if shared == 0 {
		t.Error("no page has two days on it, and the fixture has short days at home")
	}
}

// The names of units and nothing else change.
func TestSigns(t *testing.T) {
	for in, want := range map[string]string{
		"6 m2, primer": "6 m², primer", "147 um": "147 µm", "steel at least 5 C; wind": "steel at least 5 °C; wind", "24.5 mm2": "24.5 mm²", "0.5 m3": "0.5 m³",
		"TP-2 Cm": "TP-2 Cm", "16 °C": "16 °C", "bay C": "bay C", "3 umbrellas": "3 umbrellas",
	} {
		if got := signs(in); got != want {
			t.Errorf("signs(%q) = %q, want %q", in, got, want)
		}
		if got := signs(signs(in)); got != want {
			t.Errorf("signs twice made %q", got)
		}
	}
}

func TestNoPlan(t *testing.T) {
	if _, err := Pack(fixture.Report(), Options{End: expand.High}); !errors.Is(err, ErrNoPlan) {
		t.Errorf("a pack without a plan: %v, want ErrNoPlan", err)
	}
	for _, r := range []*plan.Report{nil, {}, {Job: &tasks.Job{}}} {
		if _, err := Pack(r, Options{}); err == nil {
			t.Error("an empty report made a pack")
		}
	}
}

// crowd adds n tasks to the second site day, so that tables run over pages.
func crowd(r *plan.Report, n int, title string) {
	a := r.Likely
	for i := range n {
		t := &tasks.Task{Name: fmt.Sprintf("small job %d", i), Title: title, Kind: tasks.Plain, Place: a.Work.Window.Place}
		at := fixture.Site(7, "13:00") + hours.Minute(i*5%240)
		s := &expand.Step{Index: len(a.Work.Steps), Task: t, Name: "work", Place: t.Place, Working: 5, HandsOn: 4, Deadline: hours.Far, Site: true}
		a.Work.Job.Tasks = append(a.Work.Job.Tasks, t)
		a.Work.Steps = append(a.Work.Steps, s)
		a.Plan.Steps = append(a.Plan.Steps, plan.Step{Task: t.Name, Step: "work", Start: at, Finish: at + 5, Pieces: []hours.Span{{From: at, To: at + 5}}, People: []string{fixture.LongName}})
		a.Rows = append(a.Rows, plan.Row{})
	}
}

func TestTablesRunOverPages(t *testing.T) {
	r := fixture.Report()
	crowd(r, 60, "tidy the deck")
	d := packed(t, r, Options{})
	for _, f := range faults(d) {
		t.Error(f)
	}
	heads, rows := 0, 0
	for _, p := range d.Pages {
		if p.Name == "shift 2027-04-07" {
			rows += strings.Count(text(p), "tidy the deck\n")
			if strings.Contains(text(p), "tidy the deck\n") {
				heads++
				if !strings.Contains(text(p), "Hours left\n") {
					t.Error("a page of the table without its heads")
				}
			}
		}
	}
	if rows != 60 || heads < 3 {
		t.Errorf("%d rows on %d pages, want 60 on at least 3", rows, heads)
	}
}

// A weld list of a job without drawing, execution class and steel says nothing in their place.
func TestWeldListWithoutDrawing(t *testing.T) {
	r := fixture.Report()
	r.Job.Drawing, r.Job.Execution, r.Job.Steel = "", "", ""
	for _, p := range packed(t, r, Options{}).Pages {
		for _, it := range p.Items {
			if strings.TrimSpace(it.Text) == "." {
				t.Errorf("page %q has a full stop by itself", p.Name)
			}
		}
	}
}
