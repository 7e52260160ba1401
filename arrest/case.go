package arrest

// StandardGravity is g where a job states no other, m/s2, exact.
// Source: NIST SP 811 (2008), table of conversion factors, "acceleration of
// free fall, standard".
const StandardGravity = 9.80665

// A Case is one exact point of a job, in SI units. Distance and Time are 0
// where nothing was entered: both are positive when given.
type Case struct {
	Mass         float64 // worker (or moving body), kg
	Tools        float64 // clothing, tools and what else hangs on the worker, kg
	FreeFall     float64 // m, not negative
	InitialSpeed float64 // downward, m/s, not negative
	Gravity      float64 // m/s2, positive
	Distance     float64 // stopping distance, m
	Time         float64 // stopping time, s
	Pulse        Pulse   // assumed shape of the force, NoPulse where none
	Rise         float64 // rise fraction of RisePlateau, 0..1

	// Path makes parts of Figures, the connector path from anchor to body; nil
	// where none was entered. Layout makes the geometry of them, and the free fall
	// is then its own: FreeFall is not read. Position, from 0, is the place of the
	// layout that the fall begins at.
	Path     *PathPlan
	Layout   *LayoutPlan
	Position int
	Figures  [MaxFigures]float64

	Load Load // a moving load in place of a fall; only Gravity is read beside it
}

// A Point is everything the closed forms say about one Case, SI. NaN stands
// for what the Case does not hold enough to know.
type Point struct {
	TotalMass float64 // kg
	Weight    float64 // N
	FreeFall  float64 // free fall that gives the same speed from rest, m
	Speed     float64 // when the arrest begins, m/s
	Energy    float64 // J
	Momentum  float64 // N*s

	MeanOverDistance float64 // N
	MeanOverTime     float64 // N
	ShapeRatio       float64

	Floor             float64 // least peak of any stop with these figures, N; +Inf at the edge of the possible
	FloorOverWeight   float64
	FloorDeceleration float64 // net, m/s2

	Assumed Assumed
	Load    LoadPoint  // filled for a moving load only
	Model   *PathRun   // filled where the Case has a path; kept and filled again by the next At
	Layout  *LayoutRun // filled where the Case has a layout; kept and filled again

	// Impossible is true when no force that only pulls can bring the body to
	// rest over this distance in so short a time (M-05).
	Impossible bool
}

// Assumed is what would hold if the stop had the assumed shape (M-07).
type Assumed struct {
	Peak         float64 // N
	OverWeight   float64
	Deceleration float64 // net, m/s2
	Distance     float64 // m, from the time
	Time         float64 // s, from the distance
	Onset        float64 // mean rate of the rise, N/s
}
