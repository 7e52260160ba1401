package limits

import "arrestcheck/arrest"

// A Comparison compares results with one limit at a time, as Assess does with
// all of them. It keeps its memory from one to the next. The zero Comparison is
// ready; it is not safe for concurrent use.
type Comparison struct{ row row }

// Compare compares a result with one limit of a set. Both must stay as they are
// while the Finding is in use. It panics where Assess does.
func (c *Comparison) Compare(res *arrest.Result, set *Set, l *Limit) Finding {
	mustBeWhole(l)
	c.row.res = res
	c.row.gather(set, l)
	return c.row.finding()
}
