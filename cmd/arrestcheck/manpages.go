//go:build manpages

package main

import (
	"fmt"
	"os"
	"time"

	"github.com/spf13/cobra/doc"
)

// With the tag manpages the program writes its manual pages and does nothing
// else. The tag keeps what that takes out of the program that is used.
func init() {
	if len(os.Args) != 2 {
		fmt.Fprintln(os.Stderr, "usage: go run -tags manpages ./cmd/arrestcheck FOLDER")
		os.Exit(int(exitRefused))
	}
	root := newRoot(nil, &outcome{}, surroundings{})
	root.DisableAutoGenTag = true
	// A date that never moves: the same sources give the same pages.
	date := time.Date(2025, time.June, 1, 0, 0, 0, 0, time.UTC)
	header := &doc.GenManHeader{Section: "1", Source: programName + " " + toolVersion, Manual: "Fall arrest arithmetic", Date: &date}
	if err := doc.GenManTree(root, header, os.Args[1]); err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(int(exitFile))
	}
	os.Exit(0)
}
