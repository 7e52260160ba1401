package arrest

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"arrestcheck/arrest/quantity"
)

const (
	// halfSlack is how near to 1/2 the ratio of the routes must be to ask
	// whether the time is the distance over the speed (M-04).
	halfSlack = 0.005

	// steepFloor is how far the floor must lie above the greater mean before
	// the last digits of distance and time decide it (M-06).
	steepFloor = 1.5

	// dragFree is the free fall, m, up to which leaving out the drag of the air
	// overstates the speed by no more than about 3 % (M-01).
	dragFree = 6
)

func (ev *evaluation) tell(id WarningID, args ...Arg) {
	ev.res.Warnings = append(ev.res.Warnings, Warning{id, args})
}

func (ev *evaluation) told(id WarningID) bool {
	return slices.ContainsFunc(ev.res.Warnings, func(w Warning) bool { return w.ID == id })
}

// warn adds the warnings about the job as a whole.
func (ev *evaluation) warn(partImpossible bool) {
	if ev.job.Example {
		ev.tell(ExampleValues)
	}
	c := &ev.job.Point
	if len(ev.uses[2])+len(ev.uses[3]) > 0 {
		ev.tell(MeansAreNotPeaks)
	} else if len(ev.job.Ratings) == 0 && c.Path == nil {
		ev.tell(NothingAboutStop)
	}
	if partImpossible {
		var slow Point
		At(&ev.lo, &slow)
		if c.Layout != nil {
			slow.Speed = ev.spans.speeds()[0]
		}
		ev.tell(PartImpossible, length(reachable(slow.Speed, ev.lo.Gravity, ev.lo.Time)), length(ev.hi.Distance))
	}
	if c.Pulse != NoPulse && !ev.told(ShapeContradicted) {
		ev.tell(ShapeAssumed, Text(c.Pulse.String()))
	}
	ev.warnPath()
	ev.warnLayout()
	ev.warnRatio()
	ev.warnFloor()
	ev.warnContradictions()
	if !ev.job.Moving() {
		ev.warnFall()
	}
	ev.warnPlace()
	ev.res.Warnings = append(ev.res.Warnings, ev.job.Notes...)
}

// warnRatio says what the two routes have to say about the pulse (M-04).
func (ev *evaluation) warnRatio() {
	i := ev.res.estimate(ShapeRatio, Given)
	if i < 0 {
		return
	}
	e := &ev.res.Estimates[i]
	low, high := ratio(e.Low), ratio(e.High)
	switch {
	case e.High < 1:
		ev.tell(ForceLate, low, high)
	case e.Low > 1:
		ev.tell(ForceEarly, low, high)
	default:
		ev.tell(RatioUndecided, low, high)
	}
	r := e.Value
	if math.IsNaN(r) {
		r = (e.Low + e.High) / 2
	}
	if math.Abs(r-1) < shapeSlack {
		ev.tell(RoutesAgreeClosely, ratio(r))
	}
	if math.Abs(r-0.5) < halfSlack {
		ev.tell(RatioNearHalf, ratio(r))
	}
}

// warnFloor says where the floor of the peak hangs on the last digits.
func (ev *evaluation) warnFloor() {
	i := indexOf(PeakForce, Given)
	if ev.job.Point.Distance <= 0 || ev.job.Point.Time <= 0 || !ev.spans.of[i].known() {
		return
	}
	c := ev.spans.caseAt(ev.spans.of[i].low)
	var p Point
	At(&c, &p)
	if greater := math.Max(p.MeanOverDistance, p.MeanOverTime); p.Floor > steepFloor*greater {
		ev.tell(FloorIllConditioned, Figure(quantity.Force, p.Floor, quantity.Down), Figure(quantity.Force, greater, quantity.Nearest))
	}
}

func (ev *evaluation) warnContradictions() {
	for _, c := range ev.res.Contradictions {
		if c.A == c.B {
			continue // told where the rating was read
		}
		a, b := &ev.res.Estimates[c.A], &ev.res.Estimates[c.B]
		rec, _ := a.Quantity.Record()
		if c.Part {
			floor, ceiling := a, b
			if b.Bound == AtLeast {
				floor, ceiling = b, a
			}
			ev.tell(CeilingBelowFloor, Text(ceiling.From), Figure(rec.Dimension, ceiling.High, quantity.Nearest), Figure(rec.Dimension, floor.Reach, quantity.Down))
			continue
		}
		ev.tell(EstimatesDisjoint, Text(rec.Title), Text(string(a.Evidence)), a.end(rec.Dimension), Text(string(b.Evidence)), b.end(rec.Dimension))
	}
}

// end is the end of the estimate that a contradiction names: the floor of a
// floor, else the upper end.
func (e *Estimate) end(d quantity.Dimension) Arg {
	if e.Bound == AtLeast {
		return Figure(d, e.Low, quantity.Down)
	}
	return Figure(d, e.High, quantity.Nearest)
}

// warnFall says how an initial speed was counted and where drag matters.
func (ev *evaluation) warnFall() {
	i := ev.res.estimate(FreeFall, Given)
	if i < 0 {
		return // the layout gives none
	}
	fall := ev.res.Estimates[i].High
	if ev.hi.InitialSpeed > 0 {
		ev.tell(RatingSpeedCounted, Figure(quantity.Speed, ev.hi.InitialSpeed, quantity.Nearest), length(fall))
	}
	if fall > dragFree {
		ev.tell(DragLeftOut, length(fall))
	}
}

// warnPlace says what is unusual about the place and the people.
func (ev *evaluation) warnPlace() {
	if ev.job.Persons > 1 {
		ev.tell(SeveralPersons, Text(strconv.Itoa(ev.job.Persons)))
	}
	var ranges []string
	for i := range ev.job.Inputs {
		in := &ev.job.Inputs[i]
		if in.Role == OfPlace && in.Band.Low != StandardGravity {
			ev.tell(GravityStated, Text(in.Band.Text))
		}
		if in.Set != nil && !in.HasValue() {
			ranges = append(ranges, in.Key)
		}
	}
	if len(ranges) > 0 {
		ev.tell(NoMiddle, Text(strings.Join(ranges, ", ")))
	}
}

func ratio(x float64) Arg { return Figure(quantity.Ratio, x, quantity.Nearest) }
