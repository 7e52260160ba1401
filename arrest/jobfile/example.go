package jobfile

import (
	"embed"
	"slices"
	"strings"
)

// Example limit sets: figures and clauses that were read in published
// documents, each with how it was read. None of them is used unless a user
// copies it, and each is capped until its user has checked it.
//
//go:embed examples/*.toml
var exampleFiles embed.FS

const exampleFolder = "examples"

// Examples returns the names of the example limit sets, sorted.
func Examples() []string {
	entries, err := exampleFiles.ReadDir(exampleFolder)
	if err != nil {
		panic("jobfile: examples: " + err.Error()) // they are part of the program
	}
	names := make([]string, len(entries))
	for i, e := range entries {
		names[i] = strings.TrimSuffix(e.Name(), ".toml")
	}
	return names
}

// Example returns an example limit set as a limit file with comments: the
// figures of published documents, each row with its clause, its edition and
// how it was read. It says that it is an example and was checked by nobody, so
// that no row comes out as within.
//
// The error is about the name.
func Example(name string) (text string, err error) {
	if !slices.Contains(Examples(), name) {
		return "", unknownKind("example limit set", name, Examples())
	}
	data, err := exampleFiles.ReadFile(exampleFolder + "/" + name + ".toml")
	if err != nil {
		panic("jobfile: examples: " + err.Error())
	}
	return string(data), nil
}
