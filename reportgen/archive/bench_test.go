package archive

import "testing"

// BenchmarkRowOf is what a register does with a job that is worked out.
func BenchmarkRowOf(b *testing.B) {
	s := sheet(b, "settled.toml")
	b.ReportAllocs()
	for b.Loop() {
		RowOf("settled.toml", s, 0)
	}
}
