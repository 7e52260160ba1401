package reportgen

import (
	"testing"
	"testing/quick"
)

// The cells that spreadsheets take for formulas, or worse, come guarded, and
// come back as they were.
func TestGuardCell(t *testing.T) {
	for _, cell := range []string{
		"=1+1", "+1", "-1", "@SUM(A1)", "\tx", "\rx", "\n=1", "  =1", "\u00a0=cmd|' /C calc'!A0", "|x", "%x", "＝1", "－1", "'=1", "''", "'x",
	} {
		if got := GuardCell(cell); got != "'"+cell {
			t.Errorf("%q: %q", cell, got)
		}
	}
	for _, cell := range []string{"", " ", "RT-0417", "3.41", "a=b", " x", "ä"} {
		if got := GuardCell(cell); got != cell {
			t.Errorf("%q: %q", cell, got)
		}
	}
	if err := quick.Check(func(s string) bool { return UnguardCell(GuardCell(s)) == s }, nil); err != nil {
		t.Error(err)
	}
}

func FuzzGuardCell(f *testing.F) {
	f.Add("=1+1")
	f.Add(" '@x")
	f.Fuzz(func(t *testing.T, s string) {
		if got := UnguardCell(GuardCell(s)); got != s {
			t.Errorf("%q comes back as %q", s, got)
		}
	})
}
