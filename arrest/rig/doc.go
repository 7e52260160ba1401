// Package rig works out the layout of one fall: where the anchor is, where the
// worker stands, what lies below, and what follows from it before any force
// acts and while the body swings.
//
// A Layout is one exact point in SI units, without bands and without files.
// The usual calls, from cheap to dear:
//
//	var survey rig.Survey
//	layout.Survey(&survey)                     // free fall, angles, drop of every position (M-20)
//	place := &survey.Places[survey.FreeFall.At]
//	left := layout.Left(place, needed)         // clearance to what lies below (M-21)
//	swing := layout.Swing(place, &body)        // inextensible: speeds as bounds (M-22)
//	held := layout.Restrain()                  // can the edge be passed at all (M-23)
//
//	var tether rig.Tether                      // with a connector path: in time (M-24)
//	var planar rig.Planar
//	err := tether.Set(&path, place, &body)
//	err = layout.Planar(place, &tether, &body, &planar)
//
// # Space
//
// x runs along the edge, y outwards from it, z upwards from the walking
// surface. The edge is the line y = z = 0, the structure is what lies behind it
// (y < 0) and below the surface (z < 0). Angles are in radians from straight
// down.
//
// A figure that nobody knows is NaN and makes the figures that hang on it NaN;
// zero is always a figure. Out of reach and the like are a Status, never an
// error; an index out of range is a programmer's mistake and panics.
//
// # Not modelled
//
// Motion out of the plane of the swing, toppling and turning of the body,
// friction and wear on an edge, a connector that catches on anything, air drag,
// a worker who jumps off sideways. The body is a point at the D-ring; only the
// search for obstacles gives it a height and a width. Redirects, bridles and
// horizontal lines are not part of a Layout.
package rig
