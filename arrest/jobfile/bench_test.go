package jobfile_test

import (
	"os"
	"path/filepath"
	"testing"

	"github.com/BurntSushi/toml"

	"arrestcheck/arrest/jobfile"
)

// benchJob is the job that the benchmarks read: the one nearest to 1 KB.
const benchJob = "rated.toml"

func BenchmarkReadJob(b *testing.B) {
	path := filepath.Join(jobsFolder, benchJob)
	b.ReportAllocs()
	for b.Loop() {
		data, err := os.ReadFile(path)
		if err != nil {
			b.Fatal(err)
		}
		if _, err := jobfile.Read(benchJob, data, nil); err != nil {
			b.Fatal(err)
		}
	}
}

// BenchmarkBareDecode is what BenchmarkReadJob is held against: the same file,
// read and decoded into a map, and nothing looked at.
func BenchmarkBareDecode(b *testing.B) {
	path := filepath.Join(jobsFolder, benchJob)
	b.ReportAllocs()
	for b.Loop() {
		data, err := os.ReadFile(path)
		if err != nil {
			b.Fatal(err)
		}
		var tree map[string]any
		if err := toml.Unmarshal(data, &tree); err != nil {
			b.Fatal(err)
		}
	}
}
