package weld

import (
	"fmt"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"sailby/tasks/origin"
)

func smallSet() *CutTable {
	at := func(line int) origin.Origin { return origin.Origin{File: "house.yaml", Line: line} }
	return &CutTable{Name: "small plasma", Method: "plasma", Rows: []CutRow{{6, 1400, at(3)}, {12, 500, at(4)}}, From: "timed in May"}
}

// TestOwnTable: the house's speeds count in place of those here, straight between two rows, limit included, and
// the row is told.
func TestOwnTable(t *testing.T) {
	for _, c := range []struct {
		thick, bevel, speed float64
		row, fault          string
	}{
		{6, 0, 1400, "house.yaml:3 table small plasma, row 6 mm at 1400 mm/min (timed in May)", ""},
		{4, 0, 1400, "row 6 mm at 1400 mm/min", ""},
		{12, 0, 500, "house.yaml:4 table small plasma, row 12 mm at 500 mm/min", ""},
		{9, 0, 950, "between 6 mm at 1400 mm/min and 12 mm at 500 mm/min", ""},
		{6, 60, 500, "row 12 mm", ""}, // the cut goes through 12 mm
		{12.5, 0, 0, "", "small plasma ends at 12 mm, the cut goes through 12.5 mm"},
		{10, 45, 0, "", "goes through 14.14 mm"},
	} {
		cut := Cut{Method: "plasma", Thickness: c.thick, Bevel: c.bevel, Length: 1000, Table: smallSet()}
		l, err := cut.Work()
		if c.fault != "" {
			if err == nil || !strings.Contains(err.Error(), c.fault) || hintOf(err) == "" {
				t.Errorf("%v mm: %v, want %q", c.thick, err, c.fault)
			}
			continue
		}
		if err != nil {
			t.Fatal(err)
		}
		near(t, "minutes", float64(l.HandsOn), 1000/c.speed/0.4, 1e-6)
		told := false
		l.Hours.Walk(func(f origin.Figure, _ int) {
			told = told || f.Name == "cutting speed" && strings.Contains(f.Origin.String(), c.row)
		})
		if !told {
			t.Errorf("%v mm: the row %q is not told", c.thick, c.row)
		}
		checkTree(t, l.Hours)
	}
	own := smallSet()
	own.Share, own.Pierce = 0.5, 0.1
	l, err := Cut{Method: "plasma", Thickness: 6, Length: 1400, Pierces: 10, Table: own}.Work()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "own share and piercing", float64(l.HandsOn), (1+10*0.1)/0.5, 1e-9)
}

func TestTableRefused(t *testing.T) {
	for want, change := range map[string]func(*CutTable){
		"has no speeds":            func(c *CutTable) { c.Rows = nil },
		"12 mm at 1500 mm/min":     func(c *CutTable) { c.Rows[1].Speed = 1500 },
		"6 mm at 1400 mm/min and ": func(c *CutTable) { c.Rows[1].Thickness = 6 },
		"speed 1 mm/min":           func(c *CutTable) { c.Rows[1].Speed = 1 },
		"cutting share":            func(c *CutTable) { c.Share = 2 },
	} {
		c := smallSet()
		change(c)
		_, err := Cut{Method: "plasma", Thickness: 6, Length: 1000, Table: c}.Work()
		if err == nil || !strings.Contains(err.Error(), want) || hintOf(err) == "" {
			t.Errorf("%v, want %q", err, want)
		}
	}
}

// TestCuttingUsesUp: amounts are house judgement and say so; they grow with the length and are never none.
func TestCuttingUsesUp(t *testing.T) {
	names := map[string]string{"plasma": "plasma nozzles and electrodes", "oxy-fuel": "oxygen, propane for cutting", "disc": "cutting discs 230 mm"}
	rapid.Check(t, func(t *rapid.T) {
		c := Cut{Method: rapid.SampledFrom([]string{"plasma", "oxy-fuel", "disc"}).Draw(t, "by"), Thickness: drawNumber(t, "thick", 9, 20), Length: drawNumber(t, "length", 100, 9000), Pierces: rapid.IntRange(0, 9).Draw(t, "pierces")}
		more := c
		more.Length *= 2
		a, err := c.Work()
		b, err2 := more.Work()
		if err != nil || err2 != nil {
			t.Fatal(err, err2)
		}
		var said []string
		for i, n := range a.Consumables {
			said = append(said, n.Name)
			if n.Amount <= 0 || n.Spare <= 0 || b.Consumables[i].Amount <= n.Amount {
				t.Errorf("%v: %+v, of twice the length %+v", c, n, b.Consumables[i])
			}
			soft := false
			n.Why.Walk(func(f origin.Figure, _ int) { soft = soft || f.Origin.Soft() })
			if !soft {
				t.Errorf("%s does not say that it is judgement", n.Name)
			}
			checkTree(t, n.Why)
		}
		if strings.Join(said, ", ") != names[c.Method] {
			t.Errorf("%s uses up %q", c.Method, said)
		}
	})
	thin, _ := Cut{Method: "disc", Thickness: 5, Length: 800}.Work()
	if thin.Consumables[0].Name != "cutting discs 125 mm" || thin.Consumables[0].Amount != 1 { // 4,000 mm2
		t.Errorf("%+v", thin.Consumables)
	}
	// Oxygen by hand: 1.9 m of 12 mm at 300 mm/min burn 6.33 min; (40 + 12 x 1.5) x 6.33 = 367 L.
	gas, _ := Cut{Method: "oxy-fuel", Thickness: 12, Length: 1900}.Work()
	near(t, "oxygen", gas.Consumables[0].Amount, 58*1900/300.0, 1e-6)
	near(t, "propane", gas.Consumables[1].Amount, 0.9/60*1900/300.0, 1e-6)
}

func TestPreparingUsesUp(t *testing.T) {
	for name, want := range map[string]string{"dress flush": "grinding discs 125 mm", "gouge out": "grinding discs 125 mm", "drill": "cutters for the magnetic drill", "tack": ""} {
		l, err := Prepare(name, 8, 0, 0)
		if err != nil {
			t.Fatal(err)
		}
		got := ""
		if len(l.Consumables) > 0 {
			got = l.Consumables[0].Name
		}
		if got != want {
			t.Errorf("%s uses up %q, want %q", name, got, want)
		}
	}
	c, _ := GougeWith(8)
	if n := c.Carbons(3000); n.Amount != 3 || n.Name != "gouging carbons 8 mm" {
		t.Errorf("%+v", n)
	}
}

func ExampleCutTable() {
	own := &CutTable{Name: "small plasma", Method: "plasma", Rows: []CutRow{{Thickness: 6, Speed: 1400}, {Thickness: 12, Speed: 500}}}
	l, _ := Cut{Method: "plasma", Thickness: 9, Length: 1900, Table: own}.Work()
	fmt.Printf("%d min\n", l.HandsOn.Whole())
	_, err := Cut{Method: "plasma", Thickness: 15, Length: 1900, Table: own}.Work()
	fmt.Println(err)
	// Output:
	// 5 min
	// small plasma ends at 12 mm, the cut goes through 15 mm
}
