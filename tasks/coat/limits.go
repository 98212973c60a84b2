package coat

import (
	"fmt"
	"math"

	"sailby/tasks/origin"
)

// The usual limits where a paint says nothing.
const (
	usualSpread = 3.0  // K above the dew point: FHWA-RD-98-084, ISO 8502-4
	limitSlack  = 1e-9 // a reading at the limit is within it
)

// usualWind is the wind in m/s above which a method stops: spray about 15 mph, brush and roller
// about 10 m/s. From memory: the published guides seen give no number.
var usualWind = map[string]float64{Brush: 10, Roller: 10, Airless: 6.7, AirSpray: 6.7}

// WindLimit gives the wind in m/s above which the paint may not be applied by a method; 0 for
// a method that is not known.
func (p Paint) WindLimit(method string) float64 {
	m, err := choose("method", method, "", Methods())
	if err != nil {
		return 0
	}
	if own := p.ownWind(m); own > 0 {
		return own
	}
	return usualWind[m]
}

// ownWind is the paint's own limit for a method as Methods lists it; 0 is none.
func (p Paint) ownWind(method string) float64 {
	for _, k := range sorted(p.WindMax) {
		if word(k) == method {
			return p.WindMax[k]
		}
	}
	return 0
}

// MayApply says whether a paint may be applied in the air and on the steel of one moment, and if not
// gives every reason with both numbers. air and steel are C, rh a share, wind m/s. With an empty
// method the wind is not judged. Rain is not judged here; what must hold afterwards is MayStay's question.
//
// A reading that is not a number closes the hour: what is not known is not open.
func MayApply(p Paint, air, steel, rh, wind float64, method string) (ok bool, reasons []string) {
	if reasons = unknown(air, steel, rh, wind, method); len(reasons) > 0 {
		return false, reasons
	}
	closed := func(format string, args ...any) { reasons = append(reasons, fmt.Sprintf(format, args...)) }
	reasons = coldReasons(p, steel)
	if short := p.ApplyMin - air; short > limitSlack {
		closed("air %.1f C is below the least %.1f C (%.1f K short)", air, p.ApplyMin, short)
	}
	if over := steel - p.ApplyMax; over > limitSlack {
		closed("steel %.1f C is above the greatest %.1f C (%.1f K over)", steel, p.ApplyMax, over)
	}
	reasons = append(reasons, dampReasons(p, air, steel, rh, DewPoint(air, rh))...)
	if word(method) != "" {
		reasons = append(reasons, windReasons(p, wind, method)...)
	}
	return len(reasons) == 0, reasons
}

// The states until which the limits of application may hold.
const (
	untilApplied  = "applied"
	untilTouchDry = "touch dry"
	untilHardDry  = "hard dry"
)

// Untils lists what a paint's limits may hold until: only while it is applied, until it is touch dry
// (the usual: a wet film takes up damp and dust), until it is hard dry.
func Untils() []string { return []string{untilApplied, untilTouchDry, untilHardDry} }

// HeldUntil gives what the paint's limits hold until, one of Untils.
func (p Paint) HeldUntil() string {
	if p.LimitsUntil == "" {
		return untilTouchDry
	}
	return p.LimitsUntil
}

// MayStay says whether a film that is not yet dry may be left in the air of one moment: the steel no colder
// than the paint's least and as far above the dew point as it asks, the air no more humid and the wind no stronger
// than it allows by the method. Units, unknown readings and rain are those of MayApply. How hot the steel is and how
// cold the air no longer matters, nor that the air is too dry, in which a paint that wants moisture only waits.
func MayStay(p Paint, air, steel, rh, wind float64, method string) (ok bool, reasons []string) {
	if reasons = unknown(air, steel, rh, wind, method); len(reasons) > 0 {
		return false, reasons
	}
	p.RHMin = 0
	reasons = append(coldReasons(p, steel), dampReasons(p, air, steel, rh, DewPoint(air, rh))...)
	if word(method) != "" {
		reasons = append(reasons, windReasons(p, wind, method)...)
	}
	return len(reasons) == 0, reasons
}

// Freezes says whether frost would spoil a film that is not hard dry: a US federal road specification lets nothing be
// painted where 32 F is expected before it is dry. A paint that may go on colder is held to its own least.
func Freezes(p Paint, steel float64) bool { return steel < math.Min(0, p.ApplyMin) }

// unknown lists the readings that are missing.
func unknown(air, steel, rh, wind float64, method string) (reasons []string) {
	for _, v := range []struct {
		name string
		bad  bool
	}{{"air temperature", !(air >= coldestAir && air <= hottest)}, {"steel temperature", !(steel >= coldestAir && steel <= highCelsius)},
		{"humidity", !(rh > 0 && rh <= 1)}, {"wind", word(method) != "" && !(wind >= 0 && wind < 200)}} {
		if v.bad {
			reasons = append(reasons, v.name+" is not known")
		}
	}
	return reasons
}

func coldReasons(p Paint, steel float64) []string {
	if short := p.ApplyMin - steel; short > limitSlack {
		return []string{fmt.Sprintf("steel %.1f C is below the least %.1f C (%.1f K short)", steel, p.ApplyMin, short)}
	}
	return nil
}

// dampReasons judges dew, frost and humidity.
func dampReasons(p Paint, air, steel, rh, dew float64) (reasons []string) {
	closed := func(format string, args ...any) { reasons = append(reasons, fmt.Sprintf(format, args...)) }
	spread, point := p.DewSpread, "dew point"
	if spread == 0 {
		spread = usualSpread
	}
	if dew < 0 && steel < spread { // frost settles sooner than dew would
		dew, point = frostPoint(dew), "frost point"
	}
	if have := steel - dew; have < spread-limitSlack {
		if have < 0 {
			closed("steel %.1f C is below the %s %.1f C: it is wet; %.1f K above are wanted", steel, point, dew, spread)
		} else {
			closed("steel %.1f C is only %.1f K above the %s %.1f C; %.1f K are wanted", steel, have, point, dew, spread)
		}
	}
	if p.RHMax > 0 && rh > p.RHMax+limitSlack {
		closed("humidity %.0f %% is above the greatest %.0f %%", math.Ceil(rh*100-1e-6), p.RHMax*100)
	}
	if at := SteelHumidity(air, rh, steel); p.RHMin > 0 && at < p.RHMin-limitSlack {
		closed("humidity at the steel %.0f %% is below the %.0f %% that this paint cures with (air %.0f %%)", math.Floor(at*100+1e-6), p.RHMin*100, rh*100)
	}
	return reasons
}

func windReasons(p Paint, wind float64, method string) []string {
	m, err := choose("method", method, "", Methods())
	if err != nil {
		return []string{err.Error() + "; write " + oneOf(Methods())}
	}
	if most := p.WindLimit(m); wind > most+limitSlack {
		return []string{fmt.Sprintf("wind %.1f m/s is above the greatest %.1f m/s for %s", wind, most, m)}
	}
	return nil
}

// Limits lists the paint's limits with where they come from, to be printed beside the boxes of the
// paint log: steel, humidity, dew point, wind for the method, hours that must stay dry.
func (p Paint) Limits(method string) []origin.Figure {
	out := []origin.Figure{p.fig("steel at least", p.ApplyMin, "C"), p.fig("steel at most", p.ApplyMax, "C")}
	for i := range out {
		out[i].Origin = p.source("apply")
	}
	add := func(source, name string, v float64, unit string) {
		if v > 0 {
			out = append(out, origin.Figure{Name: name, Value: v, Unit: unit, Origin: p.source(source)})
		}
	}
	if p.DewSpread > 0 {
		add("dew spread", "steel above the dew point at least", p.DewSpread, "K")
	} else {
		out = append(out, origin.Published("steel above the dew point at least", usualSpread, "K", spreadSource))
	}
	add("humidity", "humidity at most", p.RHMax*100, "%")
	add("humidity", "humidity at the steel at least", p.RHMin*100, "%")
	if m, err := choose("method", method, "", Methods()); err == nil && m != "" {
		name := "wind at most by " + m
		if p.ownWind(m) > 0 {
			add("wind", name, p.ownWind(m), "m/s")
		} else {
			out = append(out, origin.Recalled(name, usualWind[m], "m/s", "usual limit; the published guides give no number"))
		}
	}
	if until := p.HeldUntil(); until != untilApplied {
		from := origin.Origin{Kind: origin.Judgement, Source: "a wet film takes up damp and dust"}
		if o, ok := p.Sources["limits until"]; ok {
			from = o
		}
		out = append(out, origin.Word("cold, dew, damp and wind kept off until", until, from))
	}
	add("dry hours", "dry and warm after it for", p.DryHours, "h")
	return out
}

const spreadSource = "FHWA-RD-98-084: 3 C above the dew point, checked before the start and every 4 h"

// MayHold says whether prepared steel keeps its grade in this air: at least 3 K above the dew point
// (the criterion for holding a blast), with an advice where the surface humidity is above the 55 %
// up to which rust bloom stays slow (NACE 6A192/SSPC-TR 3). air and steel are C, rh a share.
func MayHold(air, steel, rh float64) (ok bool, reasons []string) {
	ok, reasons = MayApply(Paint{ApplyMin: coldestAir, ApplyMax: highCelsius}, air, steel, rh, 0, "")
	if at := SteelHumidity(air, rh, steel); ok && at > slowBloom {
		reasons = append(reasons, fmt.Sprintf("humidity at the steel is %.0f %%: rust bloom speeds up above %.0f %%, prime soon", at*100, slowBloom*100))
	}
	return ok, reasons
}

const slowBloom = 0.55 // share; NACE 6A192/SSPC-TR 3 gives 40 to 55 %
