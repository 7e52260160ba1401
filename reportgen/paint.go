package reportgen

import "github.com/fatih/color"

// A paint marks what must not be overlooked, on terminals that have colour.
// There is no colour for good news: nothing a sheet says is any.
type paint struct{ alarm, strong func(string) string }

func newPaint(on bool) paint {
	if !on {
		plain := func(s string) string { return s }
		return paint{plain, plain}
	}
	return paint{painter(color.FgRed, color.Bold), painter(color.Bold)}
}

// painter does not ask the environment: whether there is colour was decided by
// the caller.
func painter(attributes ...color.Attribute) func(string) string {
	c := color.New(attributes...)
	c.EnableColor()
	return func(s string) string { return c.Sprint(s) }
}
