package study

import "context"

type progressKey struct{}

// WithProgress returns a context under which Sweep and Envelop tell how many
// points they have just worked out. tell is called from several goroutines, and
// has no say in the result.
func WithProgress(ctx context.Context, tell func(points int)) context.Context {
	return context.WithValue(ctx, progressKey{}, tell)
}

// progress returns what is to be told of points; it does nothing where nobody
// listens.
func progress(ctx context.Context) func(points int) {
	if tell, ok := ctx.Value(progressKey{}).(func(int)); ok {
		return tell
	}
	return func(int) {}
}
