package tasks

import "testing"

func TestCovers(t *testing.T) {
	held := Ticket{Name: "weld", Process: "136", Positions: []string{"PA", "PF"}, Joints: []string{"fillet"}, ThickFrom: 3, ThickTo: 20}
	for _, tc := range []struct {
		why        string
		held, need Ticket
		want       bool
	}{
		{"a need for nobody in particular", Ticket{Name: "fitter"}, Ticket{}, true},
		{"the same name in capitals", Ticket{Name: "fire watch"}, Ticket{Name: "Fire watch"}, true},
		{"another name", Ticket{Name: "fitter"}, Ticket{Name: "painter"}, false},
		{"fields count only for welding", Ticket{Name: "fitter", Process: "136"}, Ticket{Name: "fitter", Process: "111"}, true},
		{"any welding", held, Ticket{Name: "weld"}, true},
		{"all that is held", held, Ticket{Name: "weld", Process: "136", Positions: []string{"pf"}, Joints: []string{"fillet"}, ThickFrom: 3, ThickTo: 20}, true},
		{"another process", held, Ticket{Name: "weld", Process: "111"}, false},
		{"another position", held, Ticket{Name: "weld", Positions: []string{"PA", "PE"}}, false},
		{"another joint", held, Ticket{Name: "weld", Joints: []string{"butt"}}, false},
		{"all positions", Ticket{Name: "weld", Positions: []string{"all"}}, Ticket{Name: "weld", Positions: []string{"PE"}}, true},
		{"no list is any", Ticket{Name: "weld"}, Ticket{Name: "weld", Process: "141", Positions: []string{"PE"}, Joints: []string{"butt"}, ThickFrom: 50}, true},
		{"too thin", held, Ticket{Name: "weld", ThickFrom: 2}, false},
		{"too thick", held, Ticket{Name: "weld", ThickFrom: 3, ThickTo: 25}, false},
		{"one thickness in the range", held, Ticket{Name: "weld", ThickFrom: 12}, true},
		{"one thickness, given as the upper end", held, Ticket{Name: "weld", ThickTo: 2}, false},
		{"no upper limit", Ticket{Name: "weld", ThickFrom: 5}, Ticket{Name: "weld", ThickFrom: 80}, true},
	} {
		if got := tc.held.Covers(tc.need); got != tc.want {
			t.Errorf("%s: %v, want %v", tc.why, got, tc.want)
		}
	}
}

func TestDefaultClashes(t *testing.T) {
	// JOBFILE.md, R12.
	table := (&Job{}).ClashTable()
	for _, c := range [][2]string{{"hot work", "solvent"}, {"wet film", "hot work"}, {"grit", "wet film"}, {"people", "load overhead"}} {
		if !table.Has(c[0], c[1]) {
			t.Errorf("%v do not clash", c)
		}
	}
	if table.Has("people", "soft film") || len(DefaultClashes()) != 4 {
		t.Error("more clashes than the rules name")
	}
}
