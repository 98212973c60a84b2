package lift

import "sailby/tasks/origin"

// row is one rolled section as its table gives it.
type row struct {
	size    float64
	mass    float64 // kg/m; 0: worked out from the sizes
	surface float64 // m2/m; 0: worked out from the sizes
	sizes   rolled  // mm; web 0: only the outside is known
}

// family is one family of rolled sections as data.
type family struct {
	name   string
	source string // of the masses
	seen   bool   // the masses were read from the source, not recalled
	rows   []row
}

const (
	ipeSource = "EN 10365, IPE section properties table"
	heaSource = "DIN EN 10034 section tables, HEA"
	upnSource = "DIN 1026 section tables, UPN"
)

// families hold the rolled sections. Sizes are recalled from EN 10365; the masses they give agree
// with the published ones to the last printed figure, which a test holds.
var families = []family{
	{"IPE", ipeSource, true, []row{
		{80, 6.0, 0, rolled{80, 46, 3.8, 5.2, 5}}, {100, 8.1, 0, rolled{100, 55, 4.1, 5.7, 7}},
		{120, 10.4, 0, rolled{120, 64, 4.4, 6.3, 7}}, {140, 12.9, 0, rolled{140, 73, 4.7, 6.9, 7}},
		{160, 15.8, 0, rolled{160, 82, 5, 7.4, 9}}, {180, 18.8, 0, rolled{180, 91, 5.3, 8, 9}},
		{200, 22.4, 0, rolled{200, 100, 5.6, 8.5, 12}}, {220, 26.2, 0, rolled{220, 110, 5.9, 9.2, 12}},
		{240, 30.7, 0, rolled{240, 120, 6.2, 9.8, 15}}, {270, 36.1, 0, rolled{270, 135, 6.6, 10.2, 15}},
		{300, 42.2, 0, rolled{300, 150, 7.1, 10.7, 15}}, {330, 49.1, 0, rolled{330, 160, 7.5, 11.5, 18}},
		{360, 57.1, 0, rolled{360, 170, 8, 12.7, 18}}, {400, 66.3, 0, rolled{400, 180, 8.6, 13.5, 21}},
		{450, 77.6, 0, rolled{450, 190, 9.4, 14.6, 21}}, {500, 90.7, 0, rolled{500, 200, 10.2, 16, 21}},
		{550, 106, 0, rolled{550, 210, 11.1, 17.2, 24}}, {600, 122, 0, rolled{600, 220, 12, 19, 24}},
	}},
	{"HEA", heaSource, true, []row{
		{100, 16.7, .56, rolled{96, 100, 5, 8, 12}}, {120, 19.9, .68, rolled{114, 120, 5, 8, 12}},
		{140, 24.7, .79, rolled{133, 140, 5.5, 8.5, 12}}, {160, 30.4, .91, rolled{152, 160, 6, 9, 15}},
		{180, 35.5, 1.02, rolled{171, 180, 6, 9.5, 15}}, {200, 42.3, 1.14, rolled{190, 200, 6.5, 10, 18}},
		{220, 50.5, 1.26, rolled{210, 220, 7, 11, 18}}, {240, 60.3, 1.37, rolled{230, 240, 7.5, 12, 21}},
		{260, 68.2, 1.48, rolled{250, 260, 7.5, 12.5, 24}}, {280, 76.4, 1.60, rolled{270, 280, 8, 13, 24}},
		{300, 88.3, 1.72, rolled{290, 300, 8.5, 14, 27}}, {320, 97.6, 1.76, rolled{310, 300, 9, 15.5, 27}},
		{340, 104.8, 1.79, rolled{330, 300, 9.5, 16.5, 27}}, {360, 112.1, 1.83, rolled{350, 300, 10, 17.5, 27}},
		{400, 124.8, 1.91, rolled{390, 300, 11, 19, 27}},
	}},
	{"HEB", "EN 10365 sizes, mass by formula", false, []row{
		{100, 0, 0, rolled{100, 100, 6, 10, 12}}, {120, 0, 0, rolled{120, 120, 6.5, 11, 12}},
		{140, 0, 0, rolled{140, 140, 7, 12, 12}}, {160, 0, 0, rolled{160, 160, 8, 13, 15}},
		{180, 0, 0, rolled{180, 180, 8.5, 14, 15}}, {200, 0, 0, rolled{200, 200, 9, 15, 18}},
		{220, 0, 0, rolled{220, 220, 9.5, 16, 18}}, {240, 0, 0, rolled{240, 240, 10, 17, 21}},
		{260, 0, 0, rolled{260, 260, 10, 17.5, 24}}, {280, 0, 0, rolled{280, 280, 10.5, 18, 24}},
		{300, 0, 0, rolled{300, 300, 11, 19, 27}},
	}},
	{"UPN", upnSource, true, []row{
		{50, 5.59, .232, rolled{h: 50, b: 38}}, {65, 7.09, .273, rolled{h: 65, b: 42}}, {80, 8.64, .312, rolled{h: 80, b: 45}},
		{100, 10.6, .372, rolled{h: 100, b: 50}}, {120, 13.4, .434, rolled{h: 120, b: 55}}, {140, 16.0, .489, rolled{h: 140, b: 60}},
		{160, 18.8, .546, rolled{h: 160, b: 65}}, {180, 22.0, .611, rolled{h: 180, b: 70}}, {200, 25.3, .661, rolled{h: 200, b: 75}},
		{220, 29.4, .718, rolled{h: 220, b: 80}}, {240, 33.2, .775, rolled{h: 240, b: 85}}, {260, 37.9, .834, rolled{h: 260, b: 90}},
		{280, 41.8, .89, rolled{h: 280, b: 95}}, {300, 46.2, .95, rolled{h: 300, b: 100}}, {320, 59.5, 0, rolled{h: 320, b: 100}},
		{350, 60.6, 0, rolled{h: 350, b: 100}}, {400, 71.8, 0, rolled{h: 400, b: 110}},
	}},
	{"UPE", "EN 10365, UPE", false, []row{
		{80, 7.90, 0, rolled{h: 80, b: 50}}, {100, 9.82, 0, rolled{h: 100, b: 55}}, {120, 12.1, 0, rolled{h: 120, b: 60}},
		{140, 14.5, 0, rolled{h: 140, b: 65}}, {160, 17.0, 0, rolled{h: 160, b: 70}}, {180, 19.7, 0, rolled{h: 180, b: 75}},
		{200, 22.8, 0, rolled{h: 200, b: 80}}, {220, 26.6, 0, rolled{h: 220, b: 85}}, {240, 30.2, 0, rolled{h: 240, b: 90}},
		{300, 44.4, 0, rolled{h: 300, b: 100}},
	}},
}

// section makes the Section of one row of a table.
func (f family) section(r row) Section {
	name := f.name + " " + num(r.size)
	s := Section{Name: name, Family: f.name, LineMass: r.mass, Surface: r.surface, High: r.sizes.h, Wide: r.sizes.b}
	kind := origin.Memory
	if f.seen {
		kind = origin.Table
	}
	s.Figure = origin.Figure{Name: "mass of " + name, Value: r.mass, Unit: "kg/m", Origin: origin.Origin{Kind: kind, Source: f.source}}
	if r.mass == 0 {
		s = exact(name, f.name, r.sizes.area(), 0, r.sizes.h, r.sizes.b, "7850 x [2 b tf + (h-2tf) tw + (4-pi) r^2]",
			origin.Recalled("height", r.sizes.h, "mm", f.source), origin.Recalled("width", r.sizes.b, "mm", f.source),
			origin.Recalled("web", r.sizes.web, "mm", f.source), origin.Recalled("flange", r.sizes.flange, "mm", f.source),
			origin.Recalled("root radius", r.sizes.root, "mm", f.source))
	}
	switch {
	case r.surface != 0:
	case r.sizes.web > 0:
		s.Surface = r.sizes.surface()
	default: // a channel whose table gives no surface: outline less two webs of about 8 mm
		s.Surface = (2*r.sizes.h + 4*r.sizes.b - 16) / 1000
		s.Notes = append(s.Notes, "surface of "+name+" is an outline estimate")
	}
	return s
}
