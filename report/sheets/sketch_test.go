package sheets

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/expand"
	"sailby/tasks/jobfile"
)

// slung gives a lift of the sluice gate, judged with nothing joined.
func slung(t *testing.T, key string) (*expand.Rigging, expand.Judgement) {
	t.Helper()
	job, err := jobfile.Read("../../testdata/jobs/sluice/job.yaml")
	if err != nil {
		t.Fatal(err)
	}
	w, faults := expand.Expand(job, expand.Basis{})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	for _, s := range w.Steps {
		if s.Key() == key {
			j, err := s.Rigging.Judge(nil)
			if err != nil {
				t.Fatal(err)
			}
			return s.Rigging, j
		}
	}
	t.Fatalf("no step %s", key)
	return nil, expand.Judgement{}
}

func paperOf() (*pen, *Document) {
	doc := &Document{Title: "t", Width: 210, Height: 297, Left: 15, Right: 12, Top: 17, Bottom: 10}
	p := newPen(doc)
	p.begin("Lift sheet", "lift", true)
	return p, doc
}

// The sketch is to scale: the gate of 2.0 by 1.8 m with the hook 0.9 m above its upper edge, lugs 0.3 m
// from its ends.
func TestSketchIsToScale(t *testing.T) {
	r, j := slung(t, "hang gate / lift")
	s, ok := sketchOf(r, j)
	if !ok {
		t.Fatal("no sketch")
	}
	n, _ := s.scale()
	p, doc := paperOf()
	s.draw(p, nil)
	if f := faults(doc); len(f) > 0 {
		t.Errorf("%v", f)
	}
	var shade, above Item
	var legs []Item
	for _, it := range doc.Pages[0].Items {
		if it.Kind == Shade && shade.W == 0 {
			shade = it
		} else if it.Kind == Shade {
			above = it
		}
		if it.Kind == Rule && it.W > 5 && math.Abs(it.H) > 5 {
			legs = append(legs, it)
		}
	}
	if math.Abs(shade.W-2000/n) > 1e-6 || math.Abs(shade.H-1800/n) > 1e-6 {
		t.Errorf("the gate is %.2f by %.2f mm on paper at 1:%g", shade.W, shade.H, n)
	}
	// from above: 2.0 m by 10 mm at the same scale, below the view from the front and in line with it
	if math.Abs(above.W-2000/n) > 1e-6 || math.Abs(above.H-max(10/n, 0.3)) > 1e-6 || math.Abs(above.X-shade.X) > 1e-6 || above.Y < shade.Y+shade.H {
		t.Errorf("from above: %+v, from the front %+v", above, shade)
	}
	if len(legs) != 2 {
		t.Fatalf("%d slanted lines, want two slings", len(legs))
	}
	for _, l := range legs { // 700 mm sideways, 900 mm up
		if math.Abs(l.W-700/n) > 1e-6 || math.Abs(math.Abs(l.H)-900/n) > 1e-6 {
			t.Errorf("a sling runs %.2f by %.2f mm on paper", l.W, l.H)
		}
	}
	if math.Abs(j.Legs[0].Angle-math.Atan2(math.Hypot(700, 5), 900)*180/math.Pi) > 1e-6 { // the skin is 10 mm thick, its lugs in one face
		t.Errorf("angle %v", j.Legs[0].Angle)
	}
	words := ""
	for _, it := range doc.Pages[0].Items {
		words += it.Text + " "
	}
	if !strings.Contains(words, "To scale 1 :") {
		t.Errorf("no scale: %s", words)
	}
}

// A load without sizes has no sketch; one without lugs is drawn with its slings at their angle.
func TestSketchWithLess(t *testing.T) {
	r, j := slung(t, "old gate out / lift")
	if _, ok := sketchOf(r, j); ok {
		t.Error("a load without sizes is sketched")
	}
	r, j = slung(t, "load gate / lift")
	s, ok := sketchOf(r, j)
	if !ok || len(s.lugs) != 0 {
		t.Errorf("no slings are given, %d are drawn", len(s.lugs))
	}
}

// Whatever its sizes, a sketch keeps to its room and the centre of gravity is inside the page.
func TestSketchKeepsToItsRoom(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		size := rapid.Float64Range(1, 60000)
		s := sketch{}
		s.low, s.high = [2]float64{0, 0}, [2]float64{size.Draw(t, "wide"), size.Draw(t, "tall")}
		s.boxes = []expand.Outline{{Name: "a", High: [3]float64{s.high[0], 10, s.high[1]}}}
		s.cg = [3]float64{s.high[0] / 2, 5, s.high[1] / 2}
		s.hook = [2]float64{s.cg[0], s.high[1] + size.Draw(t, "rise")}
		s.lugs = [][2]float64{{0, s.high[1]}, {s.high[0], s.high[1]}}
		s.reach(s.hook[0], s.hook[1])
		p, doc := paperOf()
		s.draw(p, []string{strings.Repeat("words beside it ", rapid.IntRange(0, 30).Draw(t, "words"))})
		if f := faults(doc); len(f) > 0 {
			t.Fatal(f[0])
		}
	})
}
