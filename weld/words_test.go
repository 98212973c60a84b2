package weld

import "testing"

func TestWords(t *testing.T) {
	for word, want := range map[string]JointType{"fillet": Fillet, "Single V": SingleV, "single-v": SingleV, "double bevel": DoubleBevel, "K": DoubleBevel,
		"X": DoubleV, "half V": SingleBevel, "square butt": Square, "lap": Lap, "outside corner": Corner, "plug weld": Plug} {
		if got, ok := ParseJointType(word); !ok || got != want {
			t.Errorf("%q is %v, want %v", word, got, want)
		}
	}
	// ISO 4063 numbers and the shop's words for them.
	for word, want := range map[string]Process{"136": 136, "flux-cored": 136, "FCAW": 136, "stick": 111, "MMA": 111, "SMAW": 111, "mag": 135, "TIG": 141, "saw": 121, "self-shielded": 114, "metal cored": 138} {
		if got, ok := ParseProcess(word); !ok || got != want {
			t.Errorf("%q is %v, want %v", word, got, want)
		}
	}
	// ISO 6947 and its AWS twins.
	for word, want := range map[string]Position{"PB": PB, "2F": PB, "1G": PA, "2g": PC, "3F": PF, "vertical up": PF, "vertical-down": PG, "4F": PD, "4G": PE, "6G": HL045, "H-L045": HL045, "flat": PA, "5G": PH} {
		if got, ok := ParsePosition(word); !ok || got != want {
			t.Errorf("%q is %v, want %v", word, got, want)
		}
	}
	for _, word := range []string{"", "weld", "PZ", "137x", "f"} {
		if _, ok := ParseJointType(word); ok {
			t.Errorf("joint %q", word)
		}
		if _, ok := ParseProcess(word); ok {
			t.Errorf("process %q", word)
		}
		if _, ok := ParsePosition(word); ok {
			t.Errorf("position %q", word)
		}
	}
}

// TestWordsAreSure: no word stands for two things.
func TestWordsAreSure(t *testing.T) {
	seen := map[string]string{}
	note := func(word, means string) {
		word = plainWord(word)
		if old, ok := seen[word]; ok && old != means {
			t.Errorf("%q is %s and %s", word, old, means)
		}
		seen[word] = means
	}
	for j := Fillet; j <= lastJoint; j++ {
		for _, w := range jointWords[j] {
			note(w, j.String())
		}
	}
	clear(seen)
	for _, p := range processes {
		for _, w := range p.words {
			note(w, p.number.String())
			if plainWord(w) != w {
				t.Errorf("process word %q cannot be read", w)
			}
		}
	}
	clear(seen)
	for p := PA; p <= lastPosition; p++ {
		for _, w := range positionWords[p] {
			note(w, p.String())
		}
	}
}

// FuzzWords: what is read prints as a word that is read as the same again; what is not read is zero.
func FuzzWords(f *testing.F) {
	for _, w := range append(JointTypes(), "136", "stick", "PB", "H-L045", "vertical up", "single\u00a0V", "") {
		f.Add(w)
	}
	f.Fuzz(func(t *testing.T, word string) {
		j, ok := ParseJointType(word)
		if again, ok2 := ParseJointType(j.String()); ok && (!ok2 || again != j) || !ok && j != 0 {
			t.Errorf("joint %q gave %v, then %v", word, j, again)
		}
		p, ok := ParsePosition(word)
		if again, ok2 := ParsePosition(p.String()); ok && (!ok2 || again != p) || !ok && p != 0 {
			t.Errorf("position %q gave %v, then %v", word, p, again)
		}
		n, ok := ParseProcess(word)
		if _, known := processData(n); ok != known {
			t.Errorf("process %q gave %d", word, n)
		}
	})
}

func TestNoNames(t *testing.T) {
	if JointType(0).String() != "no joint" || JointType(200).String() != "no joint" || Position(0).String() != "no position" || Process(1).String() != "no process" {
		t.Error("what is nothing has a name")
	}
}
