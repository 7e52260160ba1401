package study

import (
	"context"
	"slices"
)

// An outline evaluates the points of an envelope that lie on boundaries, wave
// by wave. The points of a wave do not depend on each other.
type outline struct {
	*Envelope
	ctx     context.Context
	workers int
	wave    []int // points to be evaluated next
	queued  []bool
}

// A piece is a part of a grid line from one point to another, step apart.
type piece struct{ from, to, step int }

// trace evaluates the coarse lines and follows every boundary that meets one.
func (o *outline) trace() error {
	n := len(o.Across.Values)
	o.queued = make([]bool, len(o.labels))
	coarse := coarseLines(n)
	for _, j := range coarse {
		for _, i := range coarse {
			o.ask(j*n + i)
		}
	}
	if err := o.evaluate(); err != nil {
		return err
	}
	var pieces []piece
	for _, j := range coarse {
		for k, i := range coarse[1:] {
			pieces = append(pieces, piece{j*n + coarse[k], j*n + i, 1}, piece{coarse[k]*n + j, i*n + j, n})
		}
	}
	cells, err := o.split(pieces)
	if err != nil {
		return err
	}
	return o.follow(cells)
}

// coarseLines are the indexes of the lines to begin with, both ends among them.
func coarseLines(n int) []int {
	var lines []int
	for k := range coarseSteps + 1 {
		lines = append(lines, (k*(n-1)+coarseSteps/2)/coarseSteps)
	}
	return slices.Compact(lines)
}

// ask queues a point unless it is known or queued.
func (o *outline) ask(point int) {
	if !o.queued[point] {
		o.queued[point] = true
		o.wave = append(o.wave, point)
	}
}

// evaluate works the queued points out.
func (o *outline) evaluate() error {
	const size = 16
	n := len(o.Across.Values)
	got := make([]string, len(o.wave))
	tell := progress(o.ctx)
	err := blocks(o.ctx, len(o.wave), size, o.workers, func() func(int, int, int) {
		t := o.trial()
		return func(_, from, to int) {
			for i := from; i < to; i++ {
				p := o.wave[i]
				got[i] = o.check(t, o.Across.Values[p%n], o.Up.Values[p/n])
			}
			tell(to - from)
		}
	})
	if err != nil {
		return err
	}
	for i, p := range o.wave {
		o.labels[p] = o.label(got[i])
	}
	o.Evaluations += len(o.wave)
	o.wave = o.wave[:0]
	return nil
}

// label returns the number of a combination of zones.
func (e *Envelope) label(zones string) uint16 {
	if _, known := e.names[zones]; !known {
		e.zones = append(e.zones, zones)
		e.names[zones] = uint16(len(e.zones))
	}
	return e.names[zones]
}

// split halves the pieces whose ends differ down to neighbouring points, and
// returns the cells on both sides of these, by their lower left point.
func (o *outline) split(pieces []piece) ([]int, error) {
	var cells []int
	for len(pieces) > 0 {
		var halves []piece
		for _, p := range pieces {
			switch {
			case o.labels[p.from] == o.labels[p.to]:
			case p.to == p.from+p.step:
				cells = o.beside(cells, p.from, p.step)
			default:
				mid := p.from + (p.to-p.from)/p.step/2*p.step
				o.ask(mid)
				halves = append(halves, piece{p.from, mid, p.step}, piece{mid, p.to, p.step})
			}
		}
		if err := o.evaluate(); err != nil {
			return nil, err
		}
		pieces = halves
	}
	return cells, nil
}

// beside adds the cells on both sides of the edge from a point to the next one
// across (step 1) or up.
func (o *outline) beside(cells []int, point, step int) []int {
	n := len(o.Across.Values)
	i, j := point%n, point/n
	if step == 1 {
		if j+1 < n {
			cells = append(cells, point)
		}
		if j > 0 {
			cells = append(cells, point-n)
		}
		return cells
	}
	if i+1 < n {
		cells = append(cells, point)
	}
	if i > 0 {
		cells = append(cells, point-1)
	}
	return cells
}

// follow visits cells, evaluates their corners, and goes on over every edge
// whose ends differ.
func (o *outline) follow(cells []int) error {
	n := len(o.Across.Values)
	visited := make([]bool, len(o.labels))
	for len(cells) > 0 {
		var fresh []int
		for _, c := range cells {
			if !visited[c] {
				visited[c] = true
				fresh = append(fresh, c)
				for _, p := range [...]int{c, c + 1, c + n, c + n + 1} {
					o.ask(p)
				}
			}
		}
		if err := o.evaluate(); err != nil {
			return err
		}
		cells = cells[:0]
		for _, c := range fresh {
			for _, side := range [...]piece{{c, c + 1, 1}, {c + n, c + n + 1, 1}, {c, c + n, n}, {c + 1, c + n + 1, n}} {
				if o.labels[side.from] != o.labels[side.to] {
					cells = o.beside(cells, side.from, side.step)
				}
			}
		}
	}
	return nil
}
