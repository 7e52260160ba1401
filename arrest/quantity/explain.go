package quantity

// explain completes fault, which read found in text.
func explain(d Dimension, text string, fault *Error) *Error {
	fault.Text = text
	if fault.Example == "" {
		fault.Example = d.Example()
	}
	return fault
}
