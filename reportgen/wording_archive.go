package reportgen

// This file holds the sentences, headings and labels of package archive: of the
// register, of archives and their reproduction, and of comparisons.

// The numbered statements of register, reproduction and comparison.
var (
	sameIsNotRight = statement{"S-80", quiet, phrase{nil,
		"The same digits do not make figures right. They show that these files, through this arithmetic, come to what they came to then. Whether the entries describe the place, the device and the people of then or of today is not looked at."}}
	noSignature = statement{"S-81", quiet, phrase{nil,
		"An archive is not signed. Whoever can write to it can make it anew as a whole, digests included, and nothing in it would tell. Keep its digest somewhere else, and hold it against the one printed here."}}
	laterLimits = statement{"S-82", loud, phrase{nil,
		"The entries of the archive were held against limits that were entered later. That says nothing about today's site, people or devices: for work that is to be done, enter a new job."}}
	rowsAreNotSheets = statement{"S-83", quiet, phrase{nil,
		"A row here holds less than the sheet of its job: no warnings, no conditions, no working. Read the sheet before relying on a row. A row without anything exceeded permits nothing."}}
	narrowerBand = statement{"S-84", loud, phrase{[]string{"keys"},
		"Narrower under the same source: {keys}. A band becomes narrower by a new measurement or drawing. Ask what was looked at, by whom, and have it entered as a note."}}
	touchedFiles = statement{"S-85", loud, phrase{[]string{"files"},
		"Touched since it was archived: {files}. What follows was worked out from the files as they are now."}}
)

// A Sentence is one that package archive puts figures and names into.
type Sentence struct{ statement }

// Say returns the sentence with its texts in place. It panics where their
// number is not that of its places.
func (s Sentence) Say(texts ...string) string { return display{}.say(s.phrase, texts...) }

// Warning returns a numbered statement as a line of the warnings of a report.
func (s Sentence) Warning(texts ...string) Line {
	return lines([]said{{s.number, s.Say(texts...), s.weight}})[0]
}

// ID returns the number of a numbered statement, "S-80".
func (s Sentence) ID() string { return s.number }

func sentence(text string, places ...string) Sentence {
	return Sentence{statement{phrase: phrase{places, text}}}
}

// ArchiveWords are the sentences of package archive.
var ArchiveWords = struct {
	// The numbered statements.
	SameIsNotRight, NoSignature, LaterLimits, RowsAreNotSheets, NarrowerBand, TouchedFiles Sentence

	// What a reproduction came to.
	SameDigits, SameFiguresOnly, Differs, NotRead, NotAnArchive, ResultUnreadable, ArchivesCounted Sentence

	// Why something can differ, by the id of the cause.
	Causes map[string]Sentence

	// Lines about single things.
	TextDiffers, OtherVersion, OneVersion, CountLine, JobLine, NothingDiffers, AgainLine, SetLine, KeepDigest Sentence

	// What can be said of an input in a comparison.
	Narrower, InsidePlan, BeyondPlan, AcrossPlan, NowOpen, NowSettled, OnlyA, OnlyB, LowBy, HighBy Sentence

	// The register.
	JobsCounted, ChangesCounted, Grew, OpenOf, LeftOut, RescueLine, RescueIsNone, RescueLost, WithoutRescue, FileDigest, ResultsDigest, NoRescue, CheckerLine, CheckerIsPreparer, NoChecker, ReviewLine, MoreFaults, WorstLine, NoLimits, ExampleLine Sentence
}{
	SameIsNotRight:   Sentence{sameIsNotRight},
	NoSignature:      Sentence{noSignature},
	LaterLimits:      Sentence{laterLimits},
	RowsAreNotSheets: Sentence{rowsAreNotSheets},
	NarrowerBand:     Sentence{narrowerBand},
	TouchedFiles:     Sentence{touchedFiles},

	SameDigits:       sentence("Re-calculated to the same digits: {inputs} inputs, {estimates} figures, {rows} rows; the reports read as archived.", "inputs", "estimates", "rows"),
	SameFiguresOnly:  sentence("The figures came to the same digits, and something else differs."),
	Differs:          sentence("Differs: {n} values are not those archived.", "n"),
	NotRead:          sentence("Not worked out again: the archived job is refused."),
	NotAnArchive:     sentence("Refused: this is no archive that can be worked out again."),
	ResultUnreadable: sentence("The archived result file cannot be read, so that figures cannot be held against it: {why}", "why"),

	Causes: map[string]Sentence{
		"inputs_touched": sentence("The job or a limit file is not the one that was archived."),
		"report_touched": sentence("A report or the result file is not the one that was archived."),
		"record_touched": sentence("A file that describes the archive is not the one that was archived."),
		"report_edited":  sentence("A report or the job was changed, and its digest with it: the job as it is does not give the report as it is."),
		"model_differs":  sentence("The mechanics have another version, {now} in place of {archived}: figures can differ. The history of the versions says why.", "now", "archived"),
		"tool_differs":   sentence("The program has another version, {now} in place of {archived}: the wording of reports can differ.", "now", "archived"),
		"no_cause":       sentence("No reason is known: files and versions are those of then. Report it as a wrong number, as SAFETY.md says."),
	},

	TextDiffers:     sentence("{file}: lines that differ: {lines}, the first is line {line}", "file", "lines", "line"),
	OtherVersion:    sentence("{archived} then, {now} now", "archived", "now"),
	OneVersion:      sentence("{version}, then and now", "version"),
	CountLine:       sentence("{exceeded} exceeded, {undecided} undecided, {not compared} not compared, {within} within as entered", "exceeded", "undecided", "not compared", "within"),
	JobLine:         sentence("{title}; reference {reference}, revision {revision}", "title", "reference", "revision"),
	ArchivesCounted: sentence("Archives: {all}. The same: {same}; something differs: {differ}; refused or not read: {refused}.", "all", "same", "differ", "refused"),
	NothingDiffers:  sentence("Nothing differs in inputs, figures and outcomes."),
	AgainLine:       sentence("{n} of {all} rows come to another outcome, or stand on one side only.", "n", "all"),
	KeepDigest:      sentence("The digest of {file} stands for the archive as a whole. Write it down somewhere else: the archive is not signed.", "file"),
	SetLine:         sentence("{title} ({name})", "title", "name"),

	LowBy:      sentence("low {by}", "by"),
	HighBy:     sentence("high {by}", "by"),
	Narrower:   sentence("narrower, and the source is the same"),
	InsidePlan: sentence("as found: inside what was planned"),
	BeyondPlan: sentence("as found: outside what was planned"),
	AcrossPlan: sentence("as found: reaches beyond what was planned"),
	NowOpen:    sentence("settled in A, open in B"),
	NowSettled: sentence("open in A, settled in B"),
	OnlyA:      sentence("in A only"),
	OnlyB:      sentence("in B only"),

	JobsCounted:       sentence("Jobs: {jobs}. With something exceeded: {exceeded}; with every limit within as entered and nothing left out: {settled}; otherwise: {rest}; refused or not read: {broken}.", "jobs", "exceeded", "settled", "rest", "broken"),
	ChangesCounted:    sentence("Against the earlier register: {new} new, {changed} changed, {worse} worse, {gone} gone, {same} as before.", "new", "changed", "worse", "gone", "same"),
	Grew:              sentence("{what} {is}, was {was}", "what", "is", "was"),
	OpenOf:            sentence("open inputs: {open} of {all}", "open", "all"),
	LeftOut:           sentence("no limit on: {subjects}", "subjects"),
	RescueLine:        sentence("rescue: {text}", "text"),
	RescueIsNone:      sentence("rescue: \"{text}\", which is no method", "text"),
	RescueLost:        sentence("no rescue method, was named"),
	WithoutRescue:     sentence("Without a rescue method: {n}.", "n"),
	FileDigest:        sentence("file {digest}", "digest"),
	ResultsDigest:     sentence("results {digest}", "digest"),
	NoRescue:          sentence("rescue: nothing entered"),
	CheckerLine:       sentence("checker: {name}", "name"),
	CheckerIsPreparer: sentence("checker: is the preparer"),
	NoChecker:         sentence("checker: nobody named"),
	ReviewLine:        sentence("review: {date}", "date"),
	MoreFaults:        sentence("and {n} more", "n"),
	WorstLine:         sentence("Worst, {outcome}: {quantity}, {demand}; limit {limit}", "outcome", "quantity", "demand", "limit"),
	NoLimits:          sentence("no limit was entered"),
	ExampleLine:       sentence("EXAMPLE VALUES"),
}

// Headings and labels of package archive.
const (
	NotAPermission = notAPermission
	NotEntered     = nothingEntered

	ArchiveLabel, ArchivedJobLabel, ComesToLabel = "Archive", "Job", "Comes to"
	DigestLabel, ProgramLabel, MechanicsLabel    = "Digest", "Program", "Mechanics"
	ArchivedLabel, LaterLabel, LaterSetLabel     = "As archived", "Under these", "Limits of"
	SideALabel, SideBLabel                       = "A", "B"
	DiffersHeading, CausesHeading, FilesHeading  = "What differs", "Why it can", "Files that were touched"
	TextsHeading, AgainHeading, RefusedHeading   = "Reports that differ", "Held against later limits", "Why it is refused"
	InputsDifferHeading, EstimatesDifferHeading  = "Inputs that differ", "Figures that differ"
	RowsDifferHeading, LeftOutHeading            = "Rows that differ", "Limits that nobody entered"
	DocumentDiffersHeading                       = "Texts that differ"
	RegisterHeading                              = "Register of jobs"
	InArchiveLabel, AnewLabel                    = "in the archive", "made anew"
	WhatHead, ArchivedHead, NowHead, ByHead      = "what", "archived", "now", "by"
	LaterHead, SaysHead, DigestThenHead          = "later limit", "which says", "digest"
	NumberHead, JobHead, WorstHead               = "no", "job", "limits, and the worst one"
	FilesLabel, ResultsLabel                     = "Files", "Results"
	OpenHead                                     = "open, and who"
	NothingThere                                 = "-"
)
