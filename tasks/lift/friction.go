package lift

import "sailby/tasks/origin"

// Surface is a pair of surfaces that a load may slide on.
type Surface string

// Friction figures, dry, static; Secure takes them by these names.
const (
	WoodOnPly       Surface = "sawn timber on plywood"
	WoodOnSteel     Surface = "sawn timber on stainless sheet"
	SteelOnPly      Surface = "steel on plywood"
	SteelOnAlu      Surface = "steel on grooved aluminium"
	SteelOnSteel    Surface = "unpainted rough steel on steel"
	PaintOnPaint    Surface = "painted rough on painted rough"
	SmoothPainted   Surface = "painted smooth on painted smooth"
	SteelOnStainles Surface = "steel on stainless sheet"
	RubberMat       Surface = "rubber mat"
)

const ctuFriction = "CTU Code informative material, friction factors"

var frictions = map[Surface]origin.Figure{
	WoodOnPly: origin.Published("friction", 0.45, "", ctuFriction), WoodOnSteel: origin.Published("friction", 0.30, "", ctuFriction),
	SteelOnPly: origin.Published("friction", 0.45, "", ctuFriction), SteelOnAlu: origin.Published("friction", 0.30, "", ctuFriction),
	SteelOnSteel: origin.Published("friction", 0.40, "", ctuFriction), PaintOnPaint: origin.Published("friction", 0.30, "", ctuFriction),
	SmoothPainted: origin.Published("friction", 0.20, "", ctuFriction), SteelOnStainles: origin.Published("friction", 0.20, "", ctuFriction),
	RubberMat: origin.Recalled("friction", 0.60, "", "EN 12195-1 Annex B"),
}

// friction gives the static friction under the load.
func (c Cargo) friction() (origin.Figure, error) {
	if c.Friction != 0 {
		if c.Friction < 0.01 {
			return origin.Figure{}, fault("put a mat under it, or block it", "a friction of %s holds nothing", origin.Trim(c.Friction))
		}
		return given("friction", c.Friction, ""), nil
	}
	if c.On == "" {
		f := frictions[SmoothPainted]
		f.Name = "friction, surfaces not named: the worst of the table"
		return f, nil
	}
	f, ok := frictions[c.On]
	if !ok {
		var names []string
		for _, n := range []Surface{WoodOnPly, WoodOnSteel, SteelOnPly, SteelOnAlu, SteelOnSteel, PaintOnPaint, SmoothPainted, SteelOnStainles, RubberMat} {
			names = append(names, string(n))
		}
		return f, fault("known are "+near(string(c.On), names)+"; or give the friction", "no friction is known for %q", string(c.On))
	}
	f.Name = "friction, " + string(c.On)
	return f, nil
}
