package study

import (
	"context"
	"sync"
	"sync/atomic"
)

// blockSize is how many points a worker takes at a time. What is worked out
// within a block does not depend on who works on it or when.
const blockSize = 4096

// dearBlock is blockSize where a point is a whole check, which takes
// milliseconds over a connector path.
const dearBlock = 8

// pointsAtOnce returns how many points of a probe a worker takes at a time.
func pointsAtOnce(p probe) int {
	if _, dear := p.(*checks); dear {
		return dearBlock
	}
	return blockSize
}

// blocks calls work for every block of n points, on the given number of
// workers (below 1: one). begin is called once for each worker and returns its
// work. The error is that of the context.
func blocks(ctx context.Context, n, size, workers int, begin func() func(block, from, to int)) error {
	count := (n + size - 1) / size
	workers = min(max(workers, 1), max(count, 1))
	if workers == 1 {
		work := begin()
		for b := range count {
			if err := ctx.Err(); err != nil {
				return err
			}
			work(b, b*size, min(n, (b+1)*size))
		}
		return ctx.Err()
	}
	var next atomic.Int64
	var all sync.WaitGroup
	for range workers {
		all.Go(func() {
			work := begin()
			for ctx.Err() == nil {
				b := int(next.Add(1)) - 1
				if b >= count {
					return
				}
				work(b, b*size, min(n, (b+1)*size))
			}
		})
	}
	all.Wait()
	return ctx.Err()
}
