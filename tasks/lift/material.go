package lift

import (
	"sort"
	"strings"

	"sailby/tasks/origin"
)

const (
	gere      = "Gere, Mechanics of Materials, table of densities"
	simetric  = "published table of the densities of metals"
	steelBook = "steel section tables, general notes: 7850 kg/m3"
)

// densities are kg/m3. Where a source gives a range, the heavy end is used: a lift must not come
// out lighter than it is.
var densities = map[string]origin.Figure{
	"steel":               origin.Published("density", 7850, "kg/m3", steelBook),
	"stainless 304":       origin.Published("density", 7930, "kg/m3", "stainless weight table, factor 0.00793"),
	"stainless 316":       origin.Recalled("density", 8000, "kg/m3", "EN 10088-1, 1.4404"),
	"stainless":           origin.Published("density", 8000, "kg/m3", simetric+", heavy end of 7480 to 8000"),
	"aluminium 6061":      origin.Published("density", 2700, "kg/m3", gere),
	"aluminium 5083":      origin.Recalled("density", 2660, "kg/m3", "EN 573 alloy data"),
	"aluminium":           origin.Published("density", 2700, "kg/m3", gere),
	"cast iron":           origin.Published("density", 7400, "kg/m3", gere+", heavy end of 7000 to 7400"),
	"lead":                origin.Published("density", 11340, "kg/m3", simetric),
	"zinc":                origin.Published("density", 7135, "kg/m3", simetric),
	"copper":              origin.Published("density", 8930, "kg/m3", simetric),
	"titanium":            origin.Published("density", 4500, "kg/m3", simetric),
	"brass":               origin.Published("density", 8600, "kg/m3", gere+", heavy end of 8400 to 8600"),
	"bronze":              origin.Published("density", 8800, "kg/m3", gere+", heavy end of 8200 to 8800"),
	"concrete":            origin.Published("density", 2300, "kg/m3", gere),
	"reinforced concrete": origin.Published("density", 2400, "kg/m3", gere),
	"sea water":           origin.Recalled("density", 1025, "kg/m3", "usual value for sea water"),
	"fresh water":         origin.Recalled("density", 1000, "kg/m3", "usual value for fresh water"),
	"rubber":              origin.Published("density", 1300, "kg/m3", gere+", heavy end of 960 to 1300"),
	"nylon":               origin.Published("density", 1100, "kg/m3", gere+", heavy end of 880 to 1100"),
	"polyethylene":        origin.Published("density", 1400, "kg/m3", gere+", heavy end of 960 to 1400"),
	"oak":                 origin.Published("density", 720, "kg/m3", gere+", air-dry, heavy end of 640 to 720"),
	"green oak":           origin.Recalled("density", 1000, "kg/m3", "usual value for green oak"),
	"douglas fir":         origin.Published("density", 560, "kg/m3", gere+", heavy end of 480 to 560"),
	"grp":                 origin.Recalled("density", 1900, "kg/m3", "glass laminate, heavy end of 1500 to 1900"),
	"birch ply":           origin.Recalled("density", 680, "kg/m3", "usual value for birch plywood"),
	"softwood":            origin.Recalled("density", 550, "kg/m3", "heavy end of 450 to 550"),
	"silt":                origin.House("density", 1800, "kg/m3", "wet silt and mud"),
	"rust scale":          origin.House("density", 3000, "kg/m3", "wet layered scale"),
	"paint film":          origin.House("density", 1500, "kg/m3", "dry film, so that 300 um is 0.45 kg/m2"),
}

// materialNames are other words for the same material.
var materialNames = map[string]string{
	"": "steel", "carbon steel": "steel", "mild steel": "steel", "s235": "steel", "s275": "steel", "s355": "steel",
	"304": "stainless 304", "1.4301": "stainless 304", "316": "stainless 316", "316l": "stainless 316",
	"1.4404": "stainless 316", "stainless 316l": "stainless 316", "stainless steel": "stainless", "6061": "aluminium 6061",
	"5083": "aluminium 5083", "aluminum": "aluminium", "seawater": "sea water", "water": "fresh water", "pe": "polyethylene",
}

// Density gives the density of a material, kg/m3, with its source: "steel", "S355", "316L",
// "aluminium 5083", "oak" and so on; an empty word is steel.
//
// Errors: an unknown material; the hint names the nearest known.
func Density(material string) (origin.Figure, error) {
	word := strings.Join(strings.Fields(strings.ToLower(material)), " ")
	if name, ok := materialNames[word]; ok {
		word = name
	}
	f, ok := densities[word]
	if !ok && len(word) >= 4 && word[0] == 's' { // "s355j2+n" and other steel grades
		for _, g := range []string{"s235", "s275", "s355", "s420", "s460", "s690"} {
			if strings.HasPrefix(word, g) {
				f, ok, word = densities["steel"], true, "steel"
				break
			}
		}
	}
	if !ok {
		return origin.Figure{}, fault("known are "+near(word, keys(densities))+"; or state the mass of the part", "%q is not a material that has a density here", material)
	}
	f.Name = "density of " + word
	return f, nil
}

func keys(m map[string]origin.Figure) []string {
	out := make([]string, 0, len(m))
	for k := range m {
		out = append(out, k)
	}
	sort.Strings(out)
	return out
}

// near gives up to four of the words that are most like word, nearest first, ties by order.
func near(word string, words []string) string {
	type scored struct {
		w string
		d int
	}
	var list []scored
	for _, w := range words {
		list = append(list, scored{w, distance(word, w)})
	}
	sort.SliceStable(list, func(i, k int) bool { return list[i].d < list[k].d })
	if len(list) > 4 {
		list = list[:4]
	}
	var out []string
	for _, s := range list {
		out = append(out, s.w)
	}
	return strings.Join(out, ", ")
}

// distance is the number of single-letter edits between a and b (Levenshtein), O(len a x len b).
// Words beyond 40 letters count as wholly unlike.
func distance(a, b string) int {
	if len(a) > 40 || len(b) > 40 {
		return 99
	}
	row := make([]int, len(b)+1)
	for j := range row {
		row[j] = j
	}
	for i := 1; i <= len(a); i++ {
		corner := row[0]
		row[0] = i
		for j := 1; j <= len(b); j++ {
			cost := corner
			if a[i-1] != b[j-1] {
				cost++
			}
			corner = row[j]
			row[j] = min(cost, row[j]+1, row[j-1]+1)
		}
	}
	return row[len(b)]
}
