package arrest

import "testing"

// A ratio of 1 at either end of its band leaves open whether the force came
// late or early: 2 m/s, 1 s and 1 m make r = 1, in exact figures.
func TestEdgeOfTheRatio(t *testing.T) {
	for distance, want := range map[string]WarningID{
		"1 m": RatioUndecided, "1 m .. 2 m": RatioUndecided, "0.5 m .. 1 m": RatioUndecided,
		"1.001 m .. 2 m": ForceLate, "0.5 m .. 0.999 m": ForceEarly,
	} {
		res := Evaluate(figures{mass: "100 kg", fall: "0 m", speed: "2 m/s", distance: distance, time: "1 s", gravity: "10 m/s2"}.job(t))
		for _, id := range []WarningID{RatioUndecided, ForceLate, ForceEarly} {
			if hasWarning(&res, id) != (id == want) {
				t.Errorf("%s: %s told: %v", distance, id, hasWarning(&res, id))
			}
		}
	}
}

// With g = 10 m/s2, 100 kg, 2 m/s and 1 s the mean over the time is 1200 N, and
// over 3 m the floor is 100*(10 + (4 + 60)/(4 + 10 - 6)) = 1800 N (M-06): one and
// a half times the mean, which is not yet told.
func TestEdgeOfASteepFloor(t *testing.T) {
	for distance, told := range map[string]bool{"3 m": false, "3.001 m": true} {
		res := Evaluate(figures{mass: "100 kg", fall: "0 m", speed: "2 m/s", distance: distance, time: "1 s", gravity: "10 m/s2"}.job(t))
		if hasWarning(&res, FloorIllConditioned) != told {
			t.Errorf("%s: told %v", distance, !told)
		}
	}
}

// The drag of the air is told of above 6 m of fall (M-01).
func TestEdgeOfTheDrag(t *testing.T) {
	for fall, told := range map[string]bool{"6 m": false, "6.001 m": true} {
		res := Evaluate(figures{mass: "100 kg", fall: fall, distance: "2 m"}.job(t))
		if hasWarning(&res, DragLeftOut) != told {
			t.Errorf("%s: told %v", fall, !told)
		}
	}
}
