package arrest

import (
	"strconv"
	"strings"

	"arrestcheck/arrest/quantity"
)

// rating adds what one rating promises (M-09): ceilings while each of its
// conditions holds over the whole of the entries, no number outside any.
func (ev *evaluation) rating(n int) {
	r := &ev.job.Ratings[n]
	outside := ev.ratingOutside(r)
	uses := append(ev.restsOn(onMass|onFall), ev.ratingInputs(n)...)
	first := len(ev.res.Estimates)
	add := func(q Quantity, b *quantity.Band) {
		if b == nil {
			return
		}
		e := Estimate{
			Quantity: q, Evidence: Rated, Method: "M-09", Bound: AtMost,
			Low: nan, Value: nan, High: b.High, Reach: nan, Allowance: nan, Harder: nan,
			Typed: b.Unit, From: r.Document, Part: r.Part, Uses: uses, Outside: outside,
		}
		if outside {
			e.High = nan
		}
		ev.doubt(&e)
		ev.res.Estimates = append(ev.res.Estimates, e)
	}
	add(PeakForce, r.PeakForceAtMost)
	add(MeanAboveLevel, r.MeanForceAtMost)
	if r.TravelIsDeceleration {
		add(DecelerationDistance, r.TravelAtMost)
	} else {
		add(AbsorberTravel, r.TravelAtMost)
	}
	if !outside && r.PeakForceAtMost != nil {
		ev.ratedSeverity(r, uses)
		ev.ratedTravel(r, first)
	}
}

// ratingOutside tells and reports whether the entries leave the conditions of
// the rating anywhere.
func (ev *evaluation) ratingOutside(r *Rating) bool {
	outside := false
	m := ev.job.TotalMass()
	if m.Low < r.TotalMass.Low || m.High > r.TotalMass.High {
		outside = true
		ev.tell(RatingMassOutside, Text(r.Document), mass(m.Low), mass(m.High), mass(r.TotalMass.Low), mass(r.TotalMass.High))
	}
	i := ev.res.estimate(FreeFall, Given)
	if i < 0 {
		return true // the layout gives no fall: nothing to test the document with
	}
	if ev.res.Estimates[i].High > r.FreeFallAtMost.High {
		outside = true
		ev.tell(RatingFallOutside, Text(r.Document), length(ev.res.Estimates[i].High), length(r.FreeFallAtMost.High))
	}
	return outside
}

// ratingInputs lists the inputs that are figures of the nth rating.
func (ev *evaluation) ratingInputs(n int) []int {
	var list []int
	number := strconv.Itoa(n + 1)
	for i := range ev.job.Inputs {
		rest, rated := strings.CutPrefix(ev.job.Inputs[i].Key, "rated[")
		if rest, same := strings.CutPrefix(rest, number); rated && same && strings.HasPrefix(rest, "].") {
			list = append(list, i)
		}
	}
	return list
}

// ratedSeverity adds what the rated peak means for the lightest body (M-08).
func (ev *evaluation) ratedSeverity(r *Rating, uses []int) {
	m := ev.lo.Mass + ev.lo.Tools
	peak := r.PeakForceAtMost.High
	for _, x := range [...]struct {
		q Quantity
		v float64
	}{
		{ForceOverWeight, peak / (m * ev.lo.Gravity)},
		{PeakDeceleration, peak/m - ev.lo.Gravity},
	} {
		ev.res.Estimates = append(ev.res.Estimates, Estimate{
			Quantity: x.q, Evidence: Rated, Method: "M-08", Bound: AtMost,
			Low: nan, Value: nan, High: x.v, Reach: nan, Allowance: nan, Harder: nan, From: r.Document, Uses: uses,
		})
	}
}

// ratedTravel checks that the peak and the travel of one document can go
// together for this job: the floor of M-06 at the rated travel must lie below
// the rated peak for the heaviest body and the fastest fall. Where the travel
// is that of the absorber alone other parts may stretch too, which nobody
// entered: it is told all the same.
func (ev *evaluation) ratedTravel(r *Rating, peak int) {
	if r.TravelAtMost == nil {
		return
	}
	slow, fast := ev.lo, ev.hi
	if ev.job.Point.Layout != nil {
		speeds := ev.spans.speeds()
		slow, fast = atSpeed(slow, slow.Mass+slow.Tools, speeds[0]), atSpeed(fast, fast.Mass+fast.Tools, speeds[1])
	}
	floor := floorOver(fast, r.TravelAtMost.High)
	if floor <= r.PeakForceAtMost.High {
		return
	}
	ev.tell(RatingContradicted, Text(r.Document),
		Figure(quantity.Force, floor, quantity.Down), Figure(quantity.Force, r.PeakForceAtMost.High, quantity.Nearest))
	whole := floorOver(slow, r.TravelAtMost.High) > r.PeakForceAtMost.High
	ev.res.Contradictions = append(ev.res.Contradictions, Contradiction{peak, peak, !whole})
}

// floorOver returns the floor of the peak, N, for a case stopped over the
// distance d alone.
func floorOver(c Case, d float64) float64 {
	c.Distance, c.Time = d, 0
	var p Point
	At(&c, &p)
	return p.Floor
}

func mass(x float64) Arg { return Figure(quantity.Mass, x, quantity.Nearest) }
