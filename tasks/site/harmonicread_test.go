package site

import (
	"reflect"
	"strings"
	"testing"
)

func TestReadHarmonic(t *testing.T) {
	h, err := ReadHarmonic("invented port", strings.NewReader("# zone: UTC\n# datum: chart\n# mean: 260 cm\nname,amplitude m,phase\nM2,1.40,30\ns2,50 cm,70 deg\nK1,.12,180°\nO1,0.10,20\n"))
	if err != nil || !reflect.DeepEqual(*h, invented) {
		t.Fatalf("%+v, %v", h, err)
	}
	const head = "# zone: UTC\n# datum: chart\n# mean: 2.6\n"
	for _, c := range []struct{ text, want string }{
		{"M2,1,0\n", "p:1:1: does not state its mean"},
		{"# zone: UTC+1\n# datum: chart\n# mean: 2.6\nM2,1,0\n", "p:1:9: phase lags on UTC+1, not on Greenwich"},
		{"# zone: UTC\n# datum: chart\n# mean: much\nM2,1,0\n", `p:3:9: "much" is not a height`},
		{head, "p:3:1: no constituents"},
		{head + "M2,1\n", "p:4:4: 2 fields where 3 was expected"},
		{head + "M9,1,0\n", `p:4:1: constituent "M9" is not known here`},
		{head + "M2,tall,0\n", `p:4:4: "tall" is not a height`},
		{head + "M2,1,400\n", `p:4:6: phase "400" is not an angle in degrees`},
		{head + "M2,1,0\nM2,1,0\n", "p:5:1: p: constituent M2 is there twice"},
		{head + "M2,11,0\n", "p:4:1: p: amplitude 11 m of M2 is not between 0 and 10"},
	} {
		h, err := ReadHarmonic("p", strings.NewReader(c.text))
		if h != nil || err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("want %q in\n%v", c.want, err)
		}
	}
}

func FuzzReadHarmonic(f *testing.F) {
	f.Add("# zone: UTC\n# datum: chart\n# mean: 260 cm\nname,amplitude m,phase\nM2,1.40,30\ns2,50 cm,70 deg\n")
	f.Add("# zone: UTC\n# datum: chart\n# mean: -1 ft\nM2,0,-360\nSA,10,360\n")
	f.Fuzz(func(t *testing.T, text string) {
		h, err := ReadHarmonic("f", strings.NewReader(text))
		if err != nil {
			if fs, ok := err.(Faults); h != nil || !ok || fs[0].Line < 1 || fs[0].Col < 1 {
				t.Fatalf("%v with error %v", h, err)
			}
			return
		}
		if tt, err := h.Table(0, day); err == nil && len(tt.Waters) < 2 {
			t.Fatal("a table of no tide")
		}
	})
}
