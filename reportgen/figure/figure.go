// Package figure draws the figures of a report: one small scene of lines,
// hatching, marks and texts, written as SVG or in characters.
//
// The usual way is a builder that lays a figure out and returns a Scene:
//
//	scene, err := (&figure.Plot{Title: ..., X: figure.Axis{Name: "time", Unit: "s"}, Curves: ...}).Scene()
//	svg := scene.SVG("force-time")
//	text := scene.Characters(figure.Cells{Columns: 80})
//
// Plot draws curves over two axes, Bars draws spans beside their names. A
// drawing to scale starts from NewScene and Fit and adds lines, texts, a Chain
// of dimensions and a ScaleBar itself.
//
// A scene is measured in millimetres on paper, x to the right and y downwards,
// so that a drawing at 1:50 is at 1:50 in print. Everything is black on white;
// what must be told apart is told apart by dashes, hatching, marks and words.
//
// Texts are placed by the writer, each by its own measure: at the first of
// their spots where they overlap no other text. A text that finds no room is
// replaced by a key, "(a)", and listed below the figure; none is left out
// without a word, except figures of a scale of which two others stand. Boxes
// returns where the texts of the SVG stand.
//
// The package takes plain numbers and strings and knows nothing of falls. Its
// only words of its own say why a text stands below the figure, and what a
// scale is. It is pure: the same scene gives the same bytes on every machine.
package figure
