package main

import (
	"errors"
	"fmt"
	"strings"

	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
)

// refusalWords say why a study is refused; %[1]s is its key, %[2]s its quantity,
// %[3]s its figure, %[4]s its number.
var refusalWords = map[study.RefusalID]struct{ reason, hint string }{
	study.UnknownKey:   {"%[1]q is no input of this job", "the job has: %[5]s"},
	study.NotMoved:     {"%[1]q is not moved: no formula reads it", "the job has: %[5]s"},
	study.Twice:        {"%[1]q is named twice", "name two inputs, or one"},
	study.OutOfRange:   {"%[1]s cannot be %[3]s", "give another figure"},
	study.EmptyRange:   {"%[1]s: the range begins at %[3]s and does not rise", "give the lower end first, and two ends that differ"},
	study.NotRising:    {"%[1]s: %[3]s does not rise above the figure before it", "give each figure once"},
	study.TooFewPoints: {"%[1]s: %[4]s figures are too few", "give 2 or more"},
	study.TooMany:      {"%[4]s points are too many", "give fewer: at most 10000000 in all"},
	study.TooClose:     {"%[1]s: %[4]s figures lie too close to be told apart", "give fewer, or a wider range"},
	study.NoAxes:       {"%[4]s inputs cannot be moved together", "name one or two with --vary"},
	study.NothingAsked: {"nothing was asked for", "name a quantity or a limit"},
	study.NotComputed:  {"nothing entered in this job gives %[2]s", "see the estimates of: arrestcheck check"},
	study.NeedsEnd:     {"%[2]s has no better side, and the entries have bands: which end is to come to the figure?", "add --end low, or --end high"},
	study.NoSuchRow:    {"there is no row %[4]s", "count the rows of the table from 1"},
	study.NoBand:       {"no figure leads the row of %[2]s", "enter what gives the figure"},
	study.NoMotion:     {"the entries cannot happen at all", "see: arrestcheck check"},
}

// refusedStudy puts the refusal of a study in words. Figures are in u where
// they are of its dimension. Other errors stay what they are.
func refusedStudy(err error, u quantity.Unit) error {
	var r *study.Refusal
	if !errors.As(err, &r) {
		return err
	}
	words, ok := refusalWords[r.ID]
	if !ok {
		panic("arrestcheck: no words for the refusal " + string(r.ID))
	}
	figure := ""
	if u.Symbol != "" {
		figure = quantity.Format(r.SI, u, 6, quantity.Nearest)
	}
	fill := func(text string) string {
		// Every argument is used by some sentence, and none by all.
		return strings.TrimSuffix(fmt.Sprintf(text+"%[6]s", r.Key, string(r.Quantity), figure,
			fmt.Sprintf("%.0f", r.SI), strings.Join(r.Have, ", "), "\x00"), "\x00")
	}
	return &usageError{fill(words.reason), fill(words.hint)}
}
