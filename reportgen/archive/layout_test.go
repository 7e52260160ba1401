package archive

import (
	"math"
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// A job with a clearance: an anchor 3 m up and a connector of 2 m let a D-ring at
// 1.5 m fall 0.5 m; 1.1 + 0.2 + 0.3 + 0 m come on top of it, and the margin.
const clearanceJob = `format = "arrestcheck job 1"
[document]
title = "Lamp change"
[worker]
mass = { value = "100 kg ± 0 kg", source = "measured" }
tools = { value = "0 kg", source = "plan" }
[layout]
anchor_height = { value = "3 m ± 0 m", source = "measured" }
edge = "none"
d_ring_height = { value = "1.5 m ± 0 m", source = "measured" }
connector_length = { value = "2 m ± 0 m", source = "measured" }
slack = { value = "0 m", source = "measured" }
[[position]]
along = { value = "0 m", source = "measured" }
out = { value = "0 m", source = "measured" }
[[obstacle]]
name = "floor"
below = { value = "2 m ± 0 m", source = "measured" }
[clearance]
datum = "feet"
deceleration_distance = { value = "1.1 m ± 0 m", source = "measured" }
line_stretch = { value = "0.2 m ± 0 m", source = "measured" }
harness_stretch = { value = "0.3 m ± 0 m", source = "measured" }
anchor_give = { value = "0 m", source = "measured" }
margin = { value = "1 m ± 0 m", source = "plan" }
[[limit]]
id = "room"
quantity = "clearance_left"
at_least = "0 m"
authority = "shed rule 11"
edition = "second"
kind = "person"
checked_on = "7 July 2025"
`

// The worst row of a register is the clearance: 2 - 3.1 m are left, and without
// the margin at most 2 - 2.1 m, which is a ceiling and still beyond the limit.
func TestClearanceAsTheWorstRow(t *testing.T) {
	for job, want := range map[string]Finding{
		clearanceJob: {Demand: -1.1, Bound: arrest.Between},
		strings.Replace(clearanceJob, "margin = { value = \"1 m ± 0 m\", source = \"plan\" }\n", "", 1): {Demand: -0.1, Bound: arrest.AtMost},
	} {
		s := sheetOf(t, job)
		row := RowOf("job.toml", s, codeLike(s.Assessment))
		w := row.Worst
		if w == nil || w.Quantity != arrest.ClearanceLeft || w.Outcome != limits.Exceeded || w.Bound != want.Bound || math.Abs(w.Demand-want.Demand) > 1e-12 {
			t.Errorf("worst: %+v, want %+v", w, want)
		}
		if slices.Contains(row.NotEntered, "clearance") {
			t.Errorf("no limit on: %q", row.NotEntered)
		}
	}
}

// A comparison shows angles in degrees: 1.2 m beside a height of 1.5 m are
// 38.660 degrees.
func TestCompareAngles(t *testing.T) {
	a := Of(sheetOf(t, clearanceJob))
	b := Of(sheetOf(t, strings.Replace(clearanceJob, `along = { value = "0 m"`, `along = { value = "1.2 m ± 0 m"`, 1)))
	if page := text(t, Compare(&a, &b).Report()); !strings.Contains(page, "38.660 deg") {
		t.Errorf("no degrees:\n%s", page)
	}
}

// An archive of a layout is worked out again to the same digits.
func TestReproduceLayout(t *testing.T) {
	a, b := Of(sheetOf(t, clearanceJob)), Of(sheetOf(t, clearanceJob))
	if a.Digest() != b.Digest() || len(a.Estimates) < 10 {
		t.Errorf("%d estimates, digests %s and %s", len(a.Estimates), a.Digest(), b.Digest())
	}
	read, err := ReadResults(jsonOf(t, sheetOf(t, clearanceJob)))
	if err != nil || read.Digest() != a.Digest() {
		t.Errorf("read again: %v", err)
	}
}
