// Package connector works out an arrest in time: a body of mass m falls into a
// path of parts in series, from the anchor to the body, and the path stops it.
//
//	m x'' = W - F
//
// where x, in metres, is the travel of the body measured downwards from the
// first pull, W = m g in newtons is its weight and F in newtons is the force of
// the path on it. The path has no mass: every part carries the same F, their
// extensions add, and the anchor feels what the body feels.
//
// The usual call builds the path once and runs it as often as wanted:
//
//	var path connector.Path
//	err := path.Set(
//		connector.FromModulus(connector.Rope, 22500, 2.5),
//		connector.NewAbsorber(connector.Plateau{Force: 4000, Travel: 0.45}),
//	)
//	...
//	var result connector.Result
//	err = connector.Run(&path, &connector.Fall{Mass: 100, FreeFall: 1.8, Gravity: 9.80665}, &result)
//
// A Path is only read by Run and may be shared; a Result belongs to its caller
// and is reused, so that a run allocates nothing once it has grown.
//
// # The law of force
//
// F depends on x, on the speed v = x' and on the greatest extension so far,
// the reach X:
//
//	F = max(0, L(x, X) + c v)  while the path is taut, and 0 otherwise.
//
// At x = X, L is the loading curve: the curves of the parts, added at equal
// force, straight between corners. Below X every part goes back: along its own
// loading curve, or along a straight line of its unloading stiffness, down to
// the extension that stays. The travel of an absorber, a retractable or a rope
// grab stays whole. Loading again follows the same line up to X. One number, X,
// is therefore the whole history.
//
// The viscous coefficient c belongs to a dashpot beside the whole path, not
// beside one part: it spans from the anchor to the body, acts only while the
// path is taut and never pushes.
//
// # Exact and integrated
//
// On a straight piece of the law the motion has a closed form; Run walks from
// event to event along such forms. Integrate solves the same equations step by
// step with the method of Dormand and Prince and knows nothing of the closed
// forms: it is the independent check. IntegrateLaw is for laws that are not
// straight between corners or whose damping is not proportional to the speed.
//
// # Not modelled
//
// Side offset and swing, the mass of the path, bending and edges, wear, wet and
// cold, the give of the body beyond what a part states, a retractable that
// winds back during the rebound. Residuals of the ledgers measure the
// arithmetic, never the model; what the model is worth against measured drops
// is in Published.
package connector
