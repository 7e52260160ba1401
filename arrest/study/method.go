package study

import "arrestcheck/arrest"

// methods are the records of what a study does, as arrest.Methods holds those
// of the evaluation it calls.
var methods = [...]arrest.Method{
	{
		ID: "M-52", Title: "what to measure first",
		Valid:  "one input is looked at alone, the others as entered; caps are left aside",
		Errs:   "the order is that of the bands as entered: a band that is too narrow moves its input down",
		Source: "derived here: the demand over the band of one input, the others least favourable; tolerances by halving on the evaluation itself",
	},
	{
		ID: "M-53", Title: "where a figure meets a limit",
		Valid:  "over the range that was asked for; the other inputs at their least favourable corner",
		Errs:   "not at all by itself: put back, the figure is the limit. It is printed towards the lower demand. As good as the figure it follows: a floor that meets a limit clears nothing",
		Source: "R. P. Brent, Algorithms for Minimization without Derivatives, 1973, chapter 4 (from memory), closed by halving to the last figure that is not beyond",
	},
	{
		ID: "M-54", Title: "sweep and envelope",
		Valid:  "every point is a single check; between points what has the same on either side is taken to be the same",
		Errs:   "not at the points; a strip that is narrower than their distance can be missed",
		Source: "derived here: boundaries are followed from the lines of a coarse grid at the full resolution",
	},
}

// Methods returns the records of the methods of this package, in order of their
// ids.
func Methods() []arrest.Method { return append([]arrest.Method(nil), methods[:]...) }
