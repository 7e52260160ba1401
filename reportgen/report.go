// Package reportgen turns the results of a job into one report and writes it.
//
// Build makes a Report of a sheet, and Explain one of a single row: plain data
// with every sentence and figure final. Text writes it for a terminal or a
// file, 80 columns wide, Markdown for viewers of GitHub flavoured Markdown. JSON
// writes the same results as data. Every sentence about a job is in the files
// called wording and nowhere else; the numbered ones, S-01 and up, are also in
// SAFETY.md.
//
// Build and the writers are pure: no clock, locale or environment, and the
// same sheet gives the same bytes. The wording of sentences may change between
// versions; their numbers never do, and neither do the keys of the JSON.
package reportgen

import (
	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/limits"
	drawing "arrestcheck/reportgen/figure"
)

// UnitChoice says which units a report shows.
type UnitChoice uint8

const (
	BothUnits UnitChoice = iota // the typed one first
	SIUnits
	USUnits
)

// A Sheet is everything one report is made from.
type Sheet struct {
	File       *jobfile.File
	Result     *arrest.Result
	Assessment *limits.Assessment
	Tool       string // version of the program
	Number, Of int    // sheet n of N
}

// A Report is plain data: every sentence and figure final, no format yet. User
// text in it is as typed; the writers strip or escape what their format cannot carry.
type Report struct {
	Head     []Block // what comes first, before any warning: nothing may stand above it
	Warnings []Line  // "WARNING: read first", the number S-nn as label, in print order
	Sections []Section
}

// A Section is a heading with blocks below it. The heading may be empty.
type Section struct {
	Heading string
	Blocks  []Block
}

// A Block is a paragraph, labelled lines, a table and a figure, in that order,
// each of which may be absent.
type Block struct {
	Text   string // a paragraph, wrapped by the writer
	Lines  []Line
	Table  *Table
	Figure *drawing.Scene
	Loud   bool // the paragraph is printed so that it cannot be overlooked
}

func (b *Block) empty() bool {
	return b.Text == "" && len(b.Lines) == 0 && b.Table == nil && b.Figure == nil
}

// A Line is a text with its label beside it; the text is wrapped under itself.
type Line struct {
	Label, Text string
	Loud        bool // the label stands out
	Loudest     bool // label and text stand out from all others
}

// A Table is a table of final texts.
type Table struct {
	Header []string
	Rows   []Row
	Widths []int // of the columns, in characters; with 2 between columns at most 80 in all
	Rules  bool  // rows are told apart by rules
}

// A Row is one row of a table. Loud rows are told apart by colour where there
// is colour; their words say the same without.
type Row struct {
	Cells []string
	Loud  bool
}
