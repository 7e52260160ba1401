// Package arrest works out one fall and its stop: an impulse-momentum route
// and a work-energy route that must fit each other or be explained, a floor of
// the peak that no arrest with these figures can stay below, and the ceilings
// that a device's document promises while its conditions hold.
//
// The usual call is Evaluate on a Job that package jobfile has read; ShowWorking
// adds the working. At works out one exact point without allocating and is what
// sweeps and solves call. Where the job holds nothing about the parts between
// anchor and body no peak is calculated here: a floor is no peak.
//
// The package is pure: no file, clock, environment, locale, map order or
// logging; the same job gives the same result to the last bit on every machine.
// It holds no limit and no sentence: results carry ids with arguments. Products
// that feed a sum are rounded explicitly, so that fused multiply-add does not
// move the last digit on some processors.
//
// What is not promised: that the figures entered are right, or that a shape or a
// document describes this stop.
package arrest
