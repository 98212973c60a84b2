package expand

import (
	"strings"
	"testing"
)

// The kit of both hooks is taken, two of it where both hang on kit of one name; what is named under `by`
// lifts it, whatever else the task takes.
func TestBothHooksAreTaken(t *testing.T) {
	const second = "second hook: {by: %, at: [0 mm, 2 m]}"
	for _, tc := range []struct{ name, kit, task, want string }{
		{"two of one name", "kit: {chain hoist: {count: 2, rated: 1 t}}", "by: chain hoist, " + strings.Replace(second, "%", "chain hoist", 1), "chain hoist x2"},
		{"two of it asked for anyway", "kit: {chain hoist: {count: 2, rated: 1 t}}", "by: chain hoist, kit: {chain hoist: 2}, " + strings.Replace(second, "%", "chain hoist", 1), "chain hoist x2"},
		{"two names", "kit: {chain hoist: {rated: 1 t}, lever hoist: {rated: 1 t}}", "by: chain hoist, " + strings.Replace(second, "%", "lever hoist", 1), "chain hoist x1 lever hoist x1"},
		{"listed as kit too", "kit: {chain hoist: {rated: 1 t}, lever hoist: {rated: 1 t}}", "by: chain hoist, kit: [chain hoist, lever hoist], " + strings.Replace(second, "%", "lever hoist", 1), "chain hoist x1 lever hoist x1"},
		{"one hook", "kit: {chain hoist: {count: 2, rated: 1 t}}", "by: chain hoist", "chain hoist x1"},
	} {
		w := likely(t, tc.kit, "tasks: {up: {kind: lift, at: pier/hinge, mass: 100 kg, "+tc.task+"}}")
		s := w.step(t, "up / lift")
		var got []string
		for _, u := range s.Kit {
			got = append(got, u.Kit.Name+" x"+string(rune('0'+u.Count)))
		}
		if strings.Join(got, " ") != tc.want || s.Rigging.Kit.Name != "chain hoist" {
			t.Errorf("%s: %v by %s, want %s", tc.name, got, s.Rigging.Kit.Name, tc.want)
		}
	}
	refused(t, `its two hooks take 2 of "chain hoist", and there is 1`, "kit: {chain hoist: {rated: 1 t}}",
		"tasks: {up: {kind: lift, at: pier/hinge, mass: 100 kg, by: chain hoist, "+strings.Replace(second, "%", "chain hoist", 1)+"}}")
}
